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

func TestSoderbergIsItsFormula(t *testing.T) {
	law := must(creeplaw.NewSoderberg(3e-9, 18)) // MPa, h; invented numbers
	for _, s := range []float64{1e-12, 1e-3, 1, 18, 300, 683, 684, 685, 5000} {
		r := law.Rate(creeplaw.Point{Stress: s})
		check.Rel(t, fmt.Sprintf("rate at %v", s), r.Value, 3e-9*math.Expm1(s/18), plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), r.ByStress, 3e-9/18*math.Exp(s/18), plainTolerance)
	}
}

// The limits: the linear law A σ/σ₀ far below σ₀, the raw exponential far above.
func TestSoderbergInItsLimits(t *testing.T) {
	law := must(creeplaw.NewSoderberg(3e-9, 18))
	for _, s := range []float64{1e-320, 1e-307, 1e-300, 1e-100, 1e-15} {
		checkLog(t, fmt.Sprint(s), law.LogRate(creeplaw.Point{Stress: s}), math.Log(3e-9)+math.Log(s)-math.Log(18), 1)
	}
	for _, s := range []float64{1e3, 1e5, 1e12, 1e300} {
		checkLog(t, fmt.Sprint(s), law.LogRate(creeplaw.Point{Stress: s}), math.Log(3e-9)+s/18, s/18)
	}
	assert.Equal(t, 1.0, law.LogRate(creeplaw.Point{}).ByLogStress)
	assert.Zero(t, law.Rate(creeplaw.Point{}).Value)
	check.Rel(t, "slope at zero stress", law.Rate(creeplaw.Point{}).ByStress, 3e-9/18, 1e-14)
}

func TestSoderbergConforms(t *testing.T) {
	lawtest.Run(t, must(creeplaw.NewSoderberg(3e-9, 18)), lawtest.Box{Claims: lawtest.Logarithmic,
		Stress: lawtest.Range{1e-8, 3e3}, Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{300, 1300},
		LogStress: logRangeOfExponentials})
}

func TestSoderbergRefusesBadParameters(t *testing.T) {
	checkRefused(t, []refused{
		{"prefactor", func(x float64) error { return last(creeplaw.NewSoderberg(x, 1)) }, notPositive},
		{"stress scale", func(x float64) error { return last(creeplaw.NewSoderberg(1, x)) }, notPositive},
	})
}

// The local stress exponent runs from 1 at low stress to σ/σ₀ at high stress (invented numbers).
func ExampleNewSoderberg() {
	law, err := creeplaw.NewSoderberg(1e-9, 20)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{1, 20, 200} {
		fmt.Printf("%3.0f MPa: exponent %.2f\n", stress, law.LogRate(creeplaw.Point{Stress: stress}).ByLogStress)
	}
	// Output:
	//   1 MPa: exponent 1.03
	//  20 MPa: exponent 1.58
	// 200 MPa: exponent 10.00
}
