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

func TestPowerExponentialIsItsFormula(t *testing.T) {
	law := must(creeplaw.NewPowerExponential(4e-18, 5, 26)) // MPa, h; invented numbers
	for _, s := range []float64{1e-3, 1, 26, 300, 3000} {
		want := 4e-18 * math.Pow(s, 5) * math.Exp(s/26)
		r := law.Rate(creeplaw.Point{Stress: s})
		check.Rel(t, fmt.Sprintf("rate at %v", s), r.Value, want, plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), r.ByStress, want*(5/s+1.0/26), plainTolerance)
	}
	checkLog(t, "1e-200", law.LogRate(creeplaw.Point{Stress: 1e-200}), math.Log(4e-18)-1000*math.Ln10, 5)
	checkLog(t, "1e6", law.LogRate(creeplaw.Point{Stress: 1e6}), math.Log(4e-18)+30*math.Ln10+1e6/26, 5+1e6/26)
}

func TestPowerExponentialAtZeroStress(t *testing.T) {
	for _, row := range []struct{ n, slope float64 }{{1, 2}, {2, 0}, {0.5, math.Inf(1)}} {
		law := must(creeplaw.NewPowerExponential(2, row.n, 10))
		assert.Equal(t, creeplaw.Rate{ByStress: row.slope}, law.Rate(creeplaw.Point{}), "exponent %v", row.n)
		assert.True(t, math.IsInf(law.LogRate(creeplaw.Point{}).Value, -1))
	}
}

func TestPowerExponentialConforms(t *testing.T) {
	box := lawtest.Box{Claims: lawtest.Logarithmic, Stress: lawtest.Range{1e-3, 3e3}, Strain: lawtest.Range{1e-8, 0.5},
		Temperature: lawtest.Range{300, 1300}, LogStress: logRangeOfExponentials}
	lawtest.Run(t, must(creeplaw.NewPowerExponential(4e-18, 5, 26)), box)
}

func TestPowerExponentialRefusesBadParameters(t *testing.T) {
	checkRefused(t, []refused{
		{"prefactor", func(x float64) error { return last(creeplaw.NewPowerExponential(x, 1, 1)) }, notPositive},
		{"stress exponent", func(x float64) error { return last(creeplaw.NewPowerExponential(1, x, 1)) }, notPositive},
		{"stress scale", func(x float64) error { return last(creeplaw.NewPowerExponential(1, 1, x)) }, notPositive},
	})
}

// A fifth-power law that breaks down above some 100 MPa (invented numbers).
func ExampleNewPowerExponential() {
	law, err := creeplaw.NewPowerExponential(4e-18, 5, 25)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{10, 100, 250} {
		fmt.Printf("%3.0f MPa: exponent %.1f\n", stress, law.LogRate(creeplaw.Point{Stress: stress}).ByLogStress)
	}
	// Output:
	//  10 MPa: exponent 5.4
	// 100 MPa: exponent 9.0
	// 250 MPa: exponent 15.0
}
