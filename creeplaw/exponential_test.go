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

func TestExponentialIsItsFormula(t *testing.T) {
	law := must(creeplaw.NewExponential(3e-9, 18)) // MPa, h; invented numbers
	for _, s := range []float64{0, 1e-9, 1, 40, 300, 5000} {
		want := 3e-9 * math.Exp(s/18)
		r := law.Rate(creeplaw.Point{Stress: s})
		check.Rel(t, fmt.Sprintf("rate at %v", s), r.Value, want, plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), r.ByStress, want/18, plainTolerance)
		checkLog(t, fmt.Sprint(s), law.LogRate(creeplaw.Point{Stress: s}), math.Log(3e-9)+s/18, s/18)
	}
	checkLog(t, "1e9", law.LogRate(creeplaw.Point{Stress: 1e9}), 1e9/18+math.Log(3e-9), 1e9/18)
}

// Common practice: an exponential of stress does not vanish at zero stress.
func TestExponentialCreepsAtZeroStress(t *testing.T) {
	law := must(creeplaw.NewExponential(3e-9, 18))
	r := law.Rate(creeplaw.Point{})
	check.Rel(t, "rate", r.Value, 3e-9, 1e-14)
	check.Rel(t, "slope", r.ByStress, 3e-9/18, 1e-14)
	assert.True(t, math.IsNaN(law.Rate(creeplaw.Point{Stress: -1}).Value))
}

// The logarithm grows with σ/σ₀ itself; beyond 1e6 its rounding drowns a derivative by strain or temperature, which is zero.
var logRangeOfExponentials = lawtest.Range{1e-13, 1e6}

func TestExponentialConforms(t *testing.T) {
	lawtest.Run(t, must(creeplaw.NewExponential(3e-9, 18)), lawtest.Box{Claims: lawtest.Logarithmic,
		Stress: lawtest.Range{1e-3, 3e3}, Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{300, 1300},
		LogStress: logRangeOfExponentials, CreepsAtZeroStress: true})
}

func TestExponentialRefusesBadParameters(t *testing.T) {
	checkRefused(t, []refused{
		{"prefactor", func(x float64) error { return last(creeplaw.NewExponential(x, 1)) }, notPositive},
		{"stress scale", func(x float64) error { return last(creeplaw.NewExponential(1, x)) }, notPositive},
	})
}

// The raw exponential creeps under no stress; Soderberg's form does not. At high stress they agree (invented numbers).
func ExampleNewExponential() {
	raw, err := creeplaw.NewExponential(1e-9, 20)
	if err != nil {
		fmt.Println(err)
		return
	}
	vanishing, err := creeplaw.NewSoderberg(1e-9, 20)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{0, 20, 200} {
		p := creeplaw.Point{Stress: stress}
		fmt.Printf("%3.0f MPa: %.3e and %.3e /h\n", stress, raw.Rate(p).Value, vanishing.Rate(p).Value)
	}
	// Output:
	//   0 MPa: 1.000e-09 and 0.000e+00 /h
	//  20 MPa: 2.718e-09 and 1.718e-09 /h
	// 200 MPa: 2.203e-05 and 2.203e-05 /h
}
