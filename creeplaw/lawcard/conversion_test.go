package lawcard_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
	"example.com/holdtime/creeplaw/lawcard"
)

func read(t *testing.T, text string, wanted creeplaw.Units) lawcard.Card {
	t.Helper()
	c, err := lawcard.Read(strings.NewReader(text), wanted)
	require.NoError(t, err, text)
	return c
}

// from is a card of a law in units of its own.
func from(stress, time, temperature, law string) string {
	text := strings.Replace(withLaw(law), `"stress": "MPa", "time": "h", "temperature": "K"`,
		fmt.Sprintf(`"stress": %q, "time": %q, "temperature": %q`, stress, time, temperature), 1)
	return text
}

// A converted number is the nearest float64 to the exact one. The numbers on the right were computed with mpmath (Python, 50
// digits) from the float64 on the left and the sizes of the units.
func TestConvertedNumbersAreRoundedOnce(t *testing.T) {
	const gigapascal = creeplaw.Gigapascal
	for _, c := range []struct {
		law, parameter string
		from           [2]string
		wanted         creeplaw.Units
		want           float64
	}{
		{`{"kind": "Norton", "parameters": {"prefactor": 1.47e-29, "stress exponent": 10.147}}`, "prefactor",
			[2]string{"MPa", "h"}, pascalSecond, 5.358149587661728867001419e-94},
		{`{"kind": "Norton", "parameters": {"prefactor": 1.47e-29, "stress exponent": 10.147}}`, "prefactor",
			[2]string{"MPa", "h"}, creeplaw.Units{Stress: creeplaw.KilopoundPerSquareInch, Time: creeplaw.Day},
			1.137576720259004385730933e-19},
		{`{"kind": "Norton", "parameters": {"prefactor": 1e-100, "stress exponent": 50}}`, "prefactor", [2]string{"MPa", "h"},
			creeplaw.Units{Stress: gigapascal, Time: creeplaw.Minute}, 1.6666666666666666999865e+48},
		{`{"kind": "Bailey-Norton", "parameters": {"prefactor": 1.3e-15, "stress exponent": 4.7, "time exponent": 0.41}}`,
			"prefactor", [2]string{"MPa", "h"}, pascalSecond, 2.856665086624972898467828e-45},
	} {
		law := read(t, from(c.from[0], c.from[1], "K", c.law), c.wanted).Law.(creeplaw.Parametric)
		for _, p := range law.Parameters() {
			if p.Name == c.parameter {
				assert.Equal(t, bits(c.want), bits(p.Value), "%s in %v: %.17g, want %.17g", c.law, c.wanted, p.Value, c.want)
			}
		}
	}
	// The intercept of a logarithm: -31.7 - ln 3600, mpmath again; one addition of rounded numbers, so within two units.
	theta := curve.LogBilinear{Intercept: -31.7, ByStress: 0.02}
	law := made(curve.NewStrainHardened(made(curve.NewLogarithmicCreep(curve.Constant(1e-3), theta))))
	there, err := card(sample{"logarithm", "", law}).In(pascalSecond)
	require.NoError(t, err)
	for _, p := range there.Law.(creeplaw.Parametric).Parameters() {
		switch p.Name {
		case "rate constant: intercept":
			check.ULP(t, p.Name, p.Value, -39.8886891244442006591182, 2)
		case "rate constant: coefficient of stress":
			assert.Equal(t, bits(2e-8), bits(p.Value), p.Name)
		}
	}
}

// With n = 50 and stress in Pa no float64 holds the prefactor. The law then is about a stress of one unit of the card, or
// keeps its numbers: the same rates either way.
func TestSteepLawsSurviveConversion(t *testing.T) {
	for _, c := range []struct {
		law   string
		wants any
	}{
		{`{"kind": "Norton", "parameters": {"prefactor": 1e-106, "stress exponent": 50}}`, creeplaw.Norton{}},
		{`{"kind": "strain hardening", "parameters": {"prefactor": 1e-106, "stress exponent": 50, "strain exponent": 0}}`,
			creeplaw.StrainHardening{}},
		{`{"kind": "double power law", "parameters": {"first prefactor": 1e-106, "first stress exponent": 50,
      "second prefactor": 1e-300, "second stress exponent": 1}}`, creeplaw.Converted{}},
		{`{"kind": "with threshold", "parameters": {"threshold stress": 1e-200}, "law": {"kind": "Norton",
      "parameters": {"prefactor": 1e-106, "stress exponent": 50}}}`, creeplaw.Threshold{}},
	} {
		law := read(t, from("MPa", "h", "K", c.law), pascalSecond).Law
		assert.IsType(t, c.wants, law, c.law)
		// 1e-106 × 100⁵⁰ per hour at 100 MPa.
		at := creeplaw.Point{Stress: 100e6, Strain: 1, Temperature: 800}
		// Fifty roundings of the stress and those of a logarithm of 50 ln(100) and a sum: 1e-13 of the logarithm of -14.
		check.Abs(t, c.law, creeplaw.Log(law).LogRate(at).Value, math.Log(1e-6/3600), 1e-12)
	}
}

// Temperatures in degC and degF: exact to rounding, and places on the scale shift where differences do not.
func TestTemperatureUnits(t *testing.T) {
	factor := func(reference string) string {
		return `{"kind": "with temperature", "law": ` + norton + `, "factor": {"kind": "Arrhenius", "parameters": {
      "activation energy": 3e5, "reference temperature": ` + reference + `}}}`
	}
	for _, c := range []struct {
		unit, number string
		kelvin       float64
	}{
		{"K", "823.15", 823.15}, {"degC", "550", 823.15}, {"degC", "-273.15", 0}, {"degC", "0", 273.15}, {"degC", "-20.3", 252.85},
		{"degF", "1100", 866.4833333333333333}, {"degF", "-40", 233.15}, {"degF", "32", 273.15},
	} {
		text := from("MPa", "h", c.unit, factor(c.number))
		if c.kelvin == 0 {
			_, err := lawcard.Read(strings.NewReader(text), creeplaw.Units{})
			assert.Error(t, err, "absolute zero")
			continue
		}
		f := read(t, text, creeplaw.Units{}).Law.(creeplaw.Thermal).Factor().(creeplaw.Arrhenius)
		got := f.Parameters()[1].Value
		assert.Equal(t, bits(c.kelvin), bits(got), "%s %s is %.17g K", c.number, c.unit, got)
	}
	table := `{"kind": "tabulated", "interpolated in": "1/T", "outside": "held", "rows": [{"temperature": 500, "law": ` + norton +
		`}, {"temperature": 600, "law": ` + norton + `}]}`
	text := strings.Replace(from("MPa", "h", "degC", table), `"basis"`, `"temperature": [-50, 650], "basis"`, 1)
	c := read(t, text, creeplaw.Units{})
	assert.Equal(t, []float64{773.15, 873.15}, c.Law.(creeplaw.Tabulated).Temperatures())
	assert.Equal(t, lawcard.Interval{Low: 223.15, High: 923.15}, c.Tested.Temperature)
}

// A law of solder in psi, min and degF against its own formula with Fahrenheit's degrees all through:
//
//	ṗ = A [μ/T] sinhⁿ(σ/s) exp(-Q/RT),  μ and s linear in T
func TestNumbersPerDegreeFahrenheit(t *testing.T) {
	const (
		a, n, q         = 16.7, 3.3, 52.9e3
		mu, muSlope     = 7100.0, -0.57 // at 75 °F
		scale, sSlope   = 5400.0, -0.61
		reference, zero = 75.0, 459.67
	)
	law := fmt.Sprintf(`{"kind": "Darveaux-Banerji", "parameters": {"prefactor": %v, "exponent": %v, "modulus": %v,
    "slope of the modulus": %v, "reference temperature of the modulus": %v, "stress scale": %v,
    "slope of the stress scale": %v, "reference temperature of the stress scale": %v, "activation energy": %v}}`,
		a, n, mu, muSlope, reference, scale, sSlope, reference, q)
	text := from("psi", "min", "degF", law)
	hardened := from("psi", "min", "degF", `{"kind": "strain-hardened curve", "curve": {"kind": "sum of terms", "terms": [
    {"kind": "power of time", "parameters": {"time exponent": 1}, "amplitude": {"kind": "rate of a law", "law": `+law+`}}]}}`)
	for _, wanted := range []creeplaw.Units{{}, megapascalHour, pascalSecond} {
		for _, text := range []string{text, hardened} {
			c := read(t, text, wanted)
			for _, fahrenheit := range []float64{32, 75, 212, 300} {
				for _, psi := range []float64{100, 2000, 9000} {
					rankine := fahrenheit + zero
					m, s := mu+muSlope*(fahrenheit-reference), scale+sSlope*(fahrenheit-reference)
					perMinute := a * m / rankine * math.Pow(math.Sinh(psi/s), n) *
						math.Exp(-q/(creeplaw.GasConstant*rankine*5/9))
					p := creeplaw.Point{Stress: psi * float64(creeplaw.PoundPerSquareInch/c.Units.Stress), Strain: 1e-3,
						Temperature: rankine * 5 / 9}
					// Q/RT up to 23 and some ten roundings, magnified by the exponent.
					check.Rel(t, fmt.Sprintf("%v °F, %v psi in %v", fahrenheit, psi, c.Units), c.Law.Rate(p).Value,
						perMinute*float64(c.Units.Time/creeplaw.Minute), 1e-13)
				}
			}
		}
	}
}

// The zero Units leave a card in its own, and what is asked for must be units.
func TestUnitsWanted(t *testing.T) {
	c := read(t, from("ksi", "d", "K", norton), creeplaw.Units{})
	assert.Equal(t, creeplaw.Units{Stress: creeplaw.KilopoundPerSquareInch, Time: creeplaw.Day}, c.Units)
	assert.Equal(t, 1e-15, c.Law.(creeplaw.Norton).Parameters()[0].Value)
	assert.Equal(t, lawcard.Interval{Low: 60, High: 200}, c.Tested.Stress)
	odd := read(t, from("98066.5 Pa", "1e3 s", "K", norton), creeplaw.Units{})
	assert.Equal(t, creeplaw.Units{Stress: 98066.5, Time: 1000}, odd.Units)
	for _, u := range []creeplaw.Units{{Stress: 1}, {Time: 1}, {Stress: -1, Time: 1}, {Stress: 1, Time: creeplaw.TimeUnit(math.NaN())},
		{Stress: creeplaw.StressUnit(math.Inf(1)), Time: 1}} {
		_, err := lawcard.Read(strings.NewReader(withLaw(norton)), u)
		var bad *creeplaw.ParameterError
		if assert.ErrorAs(t, err, &bad) {
			assert.Equal(t, "unit wanted", bad.Parameter)
		}
	}
	assert.Equal(t, lawcard.Interval{Low: 60e6, High: 200e6}, read(t, withLaw(norton), pascalSecond).Tested.Stress)
}
