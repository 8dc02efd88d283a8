package main

import (
	"errors"
	"fmt"
	"sort"
	"strings"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/examples/jsontree"
)

// readLaw reads a creep law. Its "kind" says which fields belong to it; stresses are in MPa, times in h.
func readLaw(r *reading, n *jsontree.Node, path string) creeplaw.Law {
	if n == nil || r.err != nil {
		return nil
	}
	if n.Kind != jsontree.Object {
		r.fault(n.Offset, "%s must be %s, not %s", path, jsontree.Object, n.Kind)
		return nil
	}
	o := object{r, path, n}
	name := o.text("kind", false)
	read, ok := lawKinds()[name]
	if r.err == nil && !ok {
		r.fault(o.find("kind").Offset, "%s.kind %q is not known; there are %s", path, name, strings.Join(lawNames(), ", "))
	}
	if r.err != nil {
		return nil
	}
	law, err := read(o)
	if r.err == nil && err != nil {
		r.fault(o.culprit(err), "%s: %v", path, err)
	}
	return law
}

// culprit is where the parameter stands that a constructor refused: the library's "stress exponent" is the file's
// "stress_exponent", with or without a unit behind it.
func (o object) culprit(err error) int {
	var wrong *creeplaw.ParameterError
	if errors.As(err, &wrong) {
		prefix := strings.ReplaceAll(wrong.Parameter, " ", "_")
		for _, f := range o.node.Fields {
			if strings.HasPrefix(f.Name, prefix) {
				return f.Value.Offset
			}
		}
	}
	return o.node.Offset
}

// lawReader builds a law from the fields of an object; the constructors of the library judge the values.
type lawReader func(object) (creeplaw.Law, error)

func lawKinds() map[string]lawReader {
	return map[string]lawReader{
		"norton":           readNorton,
		"garofalo":         readGarofalo,
		"bailey-norton":    readBaileyNorton,
		"strain-hardening": readStrainHardening,
		"sum":              readSum,
		"arrhenius":        readArrhenius,
	}
}

func lawNames() []string {
	var names []string
	for name := range lawKinds() {
		names = append(names, name)
	}
	sort.Strings(names)
	return names
}

// parameters reads the named numbers, after a check that there is no other field.
func (o object) parameters(names ...string) []float64 {
	o = o.object(o.node, o.path, append([]string{"kind"}, names...)...)
	values := make([]float64, len(names))
	for i, name := range names {
		values[i] = o.number(name, anything)
	}
	return values
}

// Each power law may be given by its prefactor or by one measured point, which says which fields it has.

func readNorton(o object) (creeplaw.Law, error) {
	if o.find("prefactor") != nil {
		p := o.parameters("prefactor", "stress_exponent")
		return creeplaw.NewNorton(p[0], p[1])
	}
	p := o.parameters("rate_per_h", "stress_MPa", "stress_exponent")
	return creeplaw.NewNortonAt(p[0], p[1], p[2])
}

func readGarofalo(o object) (creeplaw.Law, error) {
	p := o.parameters("prefactor_per_h", "stress_coefficient_per_MPa", "exponent")
	return creeplaw.NewGarofalo(p[0], p[1], p[2])
}

func readBaileyNorton(o object) (creeplaw.Law, error) {
	if o.find("prefactor") != nil {
		p := o.parameters("prefactor", "stress_exponent", "time_exponent")
		return creeplaw.NewBaileyNorton(p[0], p[1], p[2])
	}
	p := o.parameters("strain", "stress_MPa", "time_h", "stress_exponent", "time_exponent")
	return creeplaw.NewBaileyNortonAt(p[0], p[1], p[2], p[3], p[4])
}

func readStrainHardening(o object) (creeplaw.Law, error) {
	if o.find("prefactor") != nil {
		p := o.parameters("prefactor", "stress_exponent", "strain_exponent")
		return creeplaw.NewStrainHardening(p[0], p[1], p[2])
	}
	p := o.parameters("rate_per_h", "stress_MPa", "strain", "stress_exponent", "strain_exponent")
	return creeplaw.NewStrainHardeningAt(p[0], p[1], p[2], p[3], p[4])
}

func readSum(o object) (creeplaw.Law, error) {
	o = o.object(o.node, o.path, "kind", "laws")
	var laws []creeplaw.Law
	for i, n := range o.list("laws") {
		laws = append(laws, readLaw(o.reading, n, fmt.Sprintf("%s.laws[%d]", o.path, i)))
	}
	if o.err != nil {
		return nil, nil
	}
	return creeplaw.NewSum(laws...)
}

func readArrhenius(o object) (creeplaw.Law, error) {
	o = o.object(o.node, o.path, "kind", "activation_energy_J_per_mol", "reference_temperature_C", "reference_temperature_K",
		"law")
	energy := o.number("activation_energy_J_per_mol", anything)
	reference := o.temperature("reference_temperature")
	law := readLaw(o.reading, o.must("law"), o.path+".law")
	if o.err != nil {
		return nil, nil
	}
	factor, err := creeplaw.NewArrheniusAt(energy, reference)
	if err != nil {
		return nil, err
	}
	return creeplaw.WithTemperature(law, factor)
}
