package lawtest

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// parametersSound looks at what the law says of its parameters.
func parametersSound(x *examination, y *tally) {
	parameters := x.parametric.Parameters()
	names := map[string]bool{}
	for _, p := range parameters {
		y.overall(p.Name != "" && !names[p.Name], func() string { return fmt.Sprintf("%+v must have a name of its own", p) })
		names[p.Name] = true
		y.overall(finite(p.Value) && p.Low <= p.Value && p.Value <= p.High, func() string {
			return fmt.Sprintf("%s is %v, must be a number from its Low to its High, %v and %v", p.Name, p.Value, p.Low, p.High)
		})
	}
	again := x.parametric.Parameters()
	for i := range parameters {
		parameters[i].Value = math.NaN() // the slice is the caller's
	}
	y.overall(fmt.Sprint(again) == fmt.Sprint(x.parametric.Parameters()), func() string {
		return "Parameters returns a slice that the law goes on using"
	})
}

func valuesOf(parameters []creeplaw.Parameter) []float64 {
	values := make([]float64, len(parameters))
	for i, p := range parameters {
		values[i] = p.Value
	}
	return values
}

// rebuilds builds the law from its own parameters and compares, and tries what must be refused.
func rebuilds(x *examination, y *tally) {
	parameters := x.parametric.Parameters()
	values := valuesOf(parameters)
	again, err := x.parametric.WithParameters(values)
	y.overall(err == nil && again != nil, func() string { return fmt.Sprintf("its own parameters are refused: %v", err) })
	if err != nil || again == nil {
		return
	}
	other, ok := again.(creeplaw.Parametric)
	y.overall(ok && fmt.Sprint(other.Parameters()) == fmt.Sprint(parameters), func() string {
		return "rebuilt from its parameters it has others"
	})
	for _, p := range x.points {
		want, got := x.law.Rate(p), again.Rate(p)
		y.that(want == got, p, func() string { return fmt.Sprintf("%+v, rebuilt from its parameters %+v", want, got) })
	}
	for i, p := range parameters {
		bad := append([]float64(nil), values...)
		bad[i] = math.NaN()
		law, err := x.parametric.WithParameters(bad)
		y.overall(err != nil && law == nil, func() string { return "NaN is taken for the " + p.Name })
	}
	law, err := x.parametric.WithParameters(append(values, 1))
	y.overall(err != nil && law == nil, func() string { return "a number too many is taken" })
}

// unitsOfParameters takes the numbers to units a power of two apart, by their dimensions, and compares with InUnits, which
// leaves the numbers alone. Laws with internal variables InUnits does not take; numbers in units of their own stay as they are.
func unitsOfParameters(x *examination, y *tally) {
	const stress, time = 2.0, 4.0 // of the new unit in the old one
	y.overall(true, nil)
	parameters := x.parametric.Parameters()
	values := valuesOf(parameters)
	for i, p := range parameters {
		factor := math.Pow(stress, -p.Dimension.Stress) * math.Pow(time, -p.Dimension.Time)
		switch p.Scale {
		case creeplaw.Proportional:
			values[i] *= factor
		case creeplaw.LogarithmOf:
			values[i] += math.Log(factor)
		case creeplaw.FixedUnits:
			return
		}
	}
	own := creeplaw.Units{Stress: 1, Time: 1}
	reference, err := creeplaw.InUnits(x.law, own, creeplaw.Units{Stress: stress, Time: time})
	if err != nil || len(parameters) == 0 {
		return
	}
	scaled, err := x.parametric.WithParameters(values)
	if err != nil {
		return // beyond the range of a float64
	}
	for _, p := range x.points {
		want := reference.Rate(creeplaw.Point{Stress: p.Stress / stress, Strain: p.Strain, Temperature: p.Temperature})
		got := scaled.Rate(creeplaw.Point{Stress: p.Stress / stress, Strain: p.Strain, Temperature: p.Temperature})
		exponents := math.Abs(p.Stress/stress*want.ByStress) + math.Abs(p.Strain*want.ByStrain) +
			math.Abs(p.Temperature*want.ByTemperature)
		y.within(math.Abs(got.Value-want.Value), unitTolerance*(want.Value*(1+math.Abs(math.Log(want.Value)))+exponents), p, func() string {
			return fmt.Sprintf("with its numbers in other units, by their Dimension, the rate is %.12g, must be %.12g", got.Value,
				want.Value)
		})
	}
}

// unitTolerance is the error that the rounding of converted numbers may make, relative to the rate and its logarithm.
const unitTolerance = 1e-10
