package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

func TestTwoArrheniusIsArrheniusOnEitherSide(t *testing.T) {
	// S. Arrhenius 1889, written out for two branches that miss each other; invented numbers.
	factor := must(creeplaw.NewTwoArrhenius(creeplaw.ArrheniusBranch{Prefactor: 3e-4, ActivationEnergy: 6e4},
		creeplaw.ArrheniusBranch{Prefactor: 2e9, ActivationEnergy: 1.3e5}, 263))
	continuous := must(creeplaw.NewTwoArrheniusAt(6e4, 1.3e5, 263))
	for _, row := range []struct{ temperature, f, q float64 }{
		{120, 3e-4, 6e4}, {262, 3e-4, 6e4}, {263, 3e-4, 6e4}, {263.0001, 2e9, 1.3e5}, {273, 2e9, 1.3e5}, {400, 2e9, 1.3e5},
	} {
		value, slope := factor.LogFactor(row.temperature)
		rt := 8.314462618 * row.temperature
		check.Rel(t, fmt.Sprintf("ln f at %v K", row.temperature), value, math.Log(row.f)-row.q/rt, 1e-14)
		check.Rel(t, fmt.Sprintf("activation at %v K", row.temperature), slope, row.q/rt, 1e-14)
		value, slope = continuous.LogFactor(row.temperature)
		want := -row.q / 8.314462618 * (1/row.temperature - 1.0/263)
		check.Scaled(t, fmt.Sprintf("continuous: ln f at %v K", row.temperature), value, want, row.q/rt, 1e-15)
		check.Rel(t, fmt.Sprintf("continuous: activation at %v K", row.temperature), slope, row.q/rt, 1e-14)
	}
	value, _ := continuous.LogFactor(263)
	assert.Equal(t, 0.0, value)
	for _, bad := range []float64{0, -3, math.NaN()} {
		value, slope := factor.LogFactor(bad)
		assert.True(t, math.IsNaN(value) && math.IsNaN(slope))
	}
}

func TestTwoArrheniusConforms(t *testing.T) {
	factor := must(creeplaw.NewTwoArrheniusAt(6e4, 1.3e5, 263))
	law := must(creeplaw.WithTemperature(must(creeplaw.NewNorton(1e-25, 3)), factor))
	lawtest.Run(t, law, lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1e3, 1e6},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{200, 280}})
}

func TestTwoArrheniusRefusesBadParameters(t *testing.T) {
	build := func(f1, q1, f2, q2, transition float64) error {
		return last(creeplaw.NewTwoArrhenius(creeplaw.ArrheniusBranch{Prefactor: f1, ActivationEnergy: q1},
			creeplaw.ArrheniusBranch{Prefactor: f2, ActivationEnergy: q2}, transition))
	}
	checkRefused(t, []refused{
		{"prefactor below", func(x float64) error { return build(x, 1, 1, 1, 1) }, notPositive},
		{"activation energy below", func(x float64) error { return build(1, x, 1, 1, 1) }, negative},
		{"prefactor above", func(x float64) error { return build(1, 1, x, 1, 1) }, notPositive},
		{"activation energy above", func(x float64) error { return build(1, 1, 1, x, 1) }, negative},
		{"transition temperature", func(x float64) error { return build(1, 1, 1, 1, x) }, notPositive},
	})
}

// Above -10 °C the activation energy doubles (invented numbers).
func ExampleNewTwoArrheniusAt() {
	factor, err := creeplaw.NewTwoArrheniusAt(60e3, 120e3, 263.15)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, celsius := range []float64{-20, -10, 0} {
		logFactor, _ := factor.LogFactor(celsius + 273.15)
		fmt.Printf("%3.0f °C: %.2f\n", celsius, math.Exp(logFactor))
	}
	// Output:
	// -20 °C: 0.34
	// -10 °C: 1.00
	//   0 °C: 7.45
}
