package integrate_test

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"
	"os"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// This file reads ../testdata/histories/histories.json, strictly, for reference_test.go.

// property is a constant or a table [[T, value], …] of the file.
type property struct{ integrate.Table }

func (p *property) UnmarshalJSON(text []byte) error {
	var value float64
	if json.Unmarshal(text, &value) == nil {
		p.Table = integrate.Constant(value)
		return nil
	}
	var rows [][2]float64
	if err := json.Unmarshal(text, &rows); err != nil {
		return err
	}
	var temperature, values []float64
	for _, row := range rows {
		temperature, values = append(temperature, row[0]), append(values, row[1])
	}
	var err error
	p.Table, err = integrate.NewTable(temperature, values)
	return err
}

// breaks are the temperatures of a table of the file; a constant has none.
func breaks(text json.RawMessage) []float64 {
	var rows [][2]float64
	if json.Unmarshal(text, &rows) != nil {
		return nil
	}
	var out []float64
	for _, row := range rows {
		out = append(out, row[0])
	}
	return out
}

type lawOfFile struct {
	Kind                 string      `json:"kind"`
	Prefactor            float64     `json:"prefactor"`
	StressExponent       float64     `json:"stress_exponent"`
	StressCoefficient    float64     `json:"stress_coefficient"`
	TimeExponent         float64     `json:"time_exponent"`
	StrainExponent       float64     `json:"strain_exponent"`
	Law                  *lawOfFile  `json:"law"`
	ActivationEnergy     float64     `json:"activation_energy"`
	ReferenceTemperature float64     `json:"reference_temperature"`
	Terms                []lawOfFile `json:"terms"`
}

func (l *lawOfFile) build() (creeplaw.Law, error) {
	switch l.Kind {
	case "norton":
		return creeplaw.NewNorton(l.Prefactor, l.StressExponent)
	case "garofalo":
		return creeplaw.NewGarofalo(l.Prefactor, l.StressCoefficient, l.StressExponent)
	case "bailey_norton":
		return creeplaw.NewBaileyNorton(l.Prefactor, l.StressExponent, l.TimeExponent)
	case "strain_hardening":
		return creeplaw.NewStrainHardening(l.Prefactor, l.StressExponent, l.StrainExponent)
	case "arrhenius":
		law, err := l.Law.build()
		if err != nil {
			return nil, err
		}
		factor, err := creeplaw.NewArrheniusAt(l.ActivationEnergy, l.ReferenceTemperature)
		if err != nil {
			return nil, err
		}
		return creeplaw.WithTemperature(law, factor)
	case "sum":
		var laws []creeplaw.Law
		for i := range l.Terms {
			law, err := l.Terms[i].build()
			if err != nil {
				return nil, err
			}
			laws = append(laws, law)
		}
		return creeplaw.NewSum(laws...)
	}
	return nil, fmt.Errorf("unknown law %q", l.Kind)
}

type referenceHistory struct {
	Name       string            `json:"name"`
	About      string            `json:"about"`
	Units      map[string]string `json:"units"`
	Elasticity struct {
		Young   json.RawMessage `json:"young"`
		Poisson json.RawMessage `json:"poisson"`
	} `json:"elasticity"`
	Expansion *struct {
		Mean      property `json:"mean_coefficient"`
		Reference float64  `json:"reference_temperature"`
	} `json:"expansion"`
	Law          lawOfFile          `json:"law"`
	Knots        [][]float64        `json:"knots"` // time, six strains, temperature
	StressScale  float64            `json:"stress_scale"`
	StrainScale  float64            `json:"strain_scale"`
	Disagreement map[string]float64 `json:"disagreement"`
	Third        *struct {
		Method     string  `json:"method"`
		Difference float64 `json:"difference"`
	} `json:"third"`
	Evaluations []int `json:"evaluations"`
	Results     []struct {
		Knot       int        `json:"knot"`
		Time       float64    `json:"time"`
		Stress     tensor.Sym `json:"stress"`
		Creep      tensor.Sym `json:"creep_strain"`
		Equivalent float64    `json:"equivalent"`
	} `json:"results"`
}

func readReference(t *testing.T) []referenceHistory {
	t.Helper()
	text, err := os.ReadFile("../testdata/histories/histories.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Format     string             `json:"format"`
		Provenance json.RawMessage    `json:"provenance"`
		Histories  []referenceHistory `json:"histories"`
	}
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	if err := d.Decode(&file); err != nil {
		t.Fatal(err)
	}
	if _, err := d.Token(); err != io.EOF {
		t.Fatal("histories.json: something follows the end")
	}
	if file.Format != "creep reference histories, version 1" {
		t.Fatalf("histories.json: format %q", file.Format)
	}
	seen := map[string]bool{}
	for i := range file.Histories {
		h := &file.Histories[i]
		if seen[h.Name] {
			t.Fatalf("%s: twice in the file", h.Name)
		}
		seen[h.Name] = true
		if err := h.fault(); err != nil {
			t.Fatalf("%s: %v", h.Name, err)
		}
	}
	return file.Histories
}

// fault says what is wrong with a history of the file. A reference on which two methods disagree by more than 1e-11 of the
// scales is no reference for the tolerances below.
func (h *referenceHistory) fault() error {
	if len(h.Knots) < 4 || len(h.Results) != len(h.Knots)-1 {
		return fmt.Errorf("%d knots, %d results", len(h.Knots), len(h.Results))
	}
	if !(h.StressScale > 0 && h.StrainScale > 0) || len(h.Disagreement) != 3 {
		return fmt.Errorf("scales or disagreement missing")
	}
	for name, d := range h.Disagreement {
		if !(d >= 0 && d <= 1e-11) {
			return fmt.Errorf("%s: the reference's two methods disagree by %g", name, d)
		}
	}
	if h.Third != nil && !(h.Third.Difference >= 0 && h.Third.Difference <= 1e-11) {
		return fmt.Errorf("the reference's third method disagrees by %g", h.Third.Difference)
	}
	for i, knot := range h.Knots {
		if len(knot) != 8 || i > 0 && !(knot[0] >= h.Knots[i-1][0]) {
			return fmt.Errorf("knot %d: %v", i, knot)
		}
		if i > 0 && (h.Results[i-1].Knot != i || h.Results[i-1].Time != knot[0]) {
			return fmt.Errorf("result %d is not at knot %d", i-1, i)
		}
	}
	return nil
}

func (h *referenceHistory) material() (*integrate.Material, error) {
	law, err := h.Law.build()
	if err != nil {
		return nil, err
	}
	var young, poisson property
	if err := young.UnmarshalJSON(h.Elasticity.Young); err != nil {
		return nil, err
	}
	if err := poisson.UnmarshalJSON(h.Elasticity.Poisson); err != nil {
		return nil, err
	}
	var options integrate.Options
	if h.Expansion != nil {
		options.Expansion = integrate.Expansion{Mean: h.Expansion.Mean.Table, Reference: h.Expansion.Reference}
	}
	return integrate.New(integrate.Isotropic{Young: young.Table, Poisson: poisson.Table}, law, options)
}
