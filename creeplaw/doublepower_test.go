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

func TestDoublePowerIsTheSumOfItsTerms(t *testing.T) {
	// Closed form, Johnson, Henderson and Kahn 1962, written out. MPa, h; invented numbers.
	law := must(creeplaw.NewDoublePower(2e-9, 1, 3e-24, 9))
	for _, s := range []float64{0.01, 1, 50, 74, 90, 200, 1000} {
		want := 2e-9*s + 3e-24*math.Pow(s, 9)
		slope := 2e-9 + 27e-24*math.Pow(s, 8)
		r := law.Rate(creeplaw.Point{Stress: s, Strain: 0.01, Temperature: 800})
		check.Rel(t, fmt.Sprintf("rate at %v", s), r.Value, want, plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), r.ByStress, slope, plainTolerance)
		assert.Zero(t, r.ByStrain)
		assert.Zero(t, r.ByTemperature)
	}
}

func TestDoublePowerAtItsTransition(t *testing.T) {
	law := must(creeplaw.NewDoublePowerAt(1e-7, 60, 1.5, 11))
	r := law.LogRate(creeplaw.Point{Stress: 60})
	// By definition both terms are equal there: twice the rate, the mean of the exponents.
	checkLog(t, "transition", r, math.Log(2e-7), (1.5+11)/2)
}

func TestDoublePowerFarFromItsTransition(t *testing.T) {
	law := must(creeplaw.NewDoublePowerAt(1e-7, 60, 1, 50))
	// Where the other term is beneath rounding, each is a power law alone.
	checkLog(t, "1e-200", law.LogRate(creeplaw.Point{Stress: 6e-199}), math.Log(1e-7)-200*math.Ln10, 1)
	checkLog(t, "1e200", law.LogRate(creeplaw.Point{Stress: 6e201}), math.Log(1e-7)+50*200*math.Ln10, 50)
}

func TestDoublePowerAtZeroStress(t *testing.T) {
	for _, row := range []struct{ n1, n2, slope float64 }{{1, 3, 2}, {1, 1, 5}, {2, 3, 0}, {0.5, 3, math.Inf(1)}} {
		law := must(creeplaw.NewDoublePower(2, row.n1, 3, row.n2))
		assert.Equal(t, creeplaw.Rate{ByStress: row.slope}, law.Rate(creeplaw.Point{}), "exponents %v and %v", row.n1, row.n2)
		assert.True(t, math.IsInf(law.LogRate(creeplaw.Point{}).Value, -1))
	}
}

func TestDoublePowerConforms(t *testing.T) {
	box := lawtest.Box{Claims: lawtest.Logarithmic, Stress: lawtest.Range{1e-3, 1e3}, Strain: lawtest.Range{1e-8, 0.5},
		Temperature: lawtest.Range{300, 1300}}
	lawtest.Run(t, must(creeplaw.NewDoublePower(2e-9, 1, 3e-24, 9)), box)
	box.Stress = lawtest.Range{1, 1e5}
	lawtest.Run(t, must(creeplaw.NewDoublePowerAt(1e-7, 60, 3, 50)), box)
}

func TestDoublePowerRefusesBadParameters(t *testing.T) {
	checkRefused(t, []refused{
		{"first prefactor", func(x float64) error { return last(creeplaw.NewDoublePower(x, 1, 1, 2)) }, notPositive},
		{"first stress exponent", func(x float64) error { return last(creeplaw.NewDoublePower(1, x, 1, 2)) }, notPositive},
		{"second prefactor", func(x float64) error { return last(creeplaw.NewDoublePower(1, 1, x, 2)) }, notPositive},
		{"second stress exponent", func(x float64) error { return last(creeplaw.NewDoublePower(1, 1, 1, x)) }, notPositive},
		{"rate", func(x float64) error { return last(creeplaw.NewDoublePowerAt(x, 1, 1, 2)) }, notPositive},
		{"transition stress", func(x float64) error { return last(creeplaw.NewDoublePowerAt(1, x, 1, 2)) }, notPositive},
		{"first stress exponent", func(x float64) error { return last(creeplaw.NewDoublePowerAt(1, 1, x, 2)) }, notPositive},
		{"second stress exponent", func(x float64) error { return last(creeplaw.NewDoublePowerAt(1, 1, 1, x)) }, notPositive},
	})
}

// A steel creeps linearly at low stress and with the ninth power at high stress; both give 1e-8 /h at 60 MPa (invented
// numbers).
func ExampleNewDoublePowerAt() {
	law, err := creeplaw.NewDoublePowerAt(1e-8, 60, 1, 9)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{10, 60, 200} {
		p := creeplaw.Point{Stress: stress}
		fmt.Printf("%3.0f MPa: %.2e /h, exponent %.2f\n", stress, law.Rate(p).Value, law.LogRate(p).ByLogStress)
	}
	// Output:
	//  10 MPa: 1.67e-09 /h, exponent 1.00
	//  60 MPa: 2.00e-08 /h, exponent 5.00
	// 200 MPa: 5.08e-04 /h, exponent 9.00
}
