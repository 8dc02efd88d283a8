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

func TestThresholdIsItsFormula(t *testing.T) {
	// A (σ - σₜ)ⁿ written out; MPa, h; invented numbers.
	law := must(creeplaw.WithThreshold(must(creeplaw.NewNorton(2e-14, 5)), 40))
	for _, s := range []float64{40.0625, 41, 80, 400, 4e4} {
		p := creeplaw.Point{Stress: s, Strain: 0.01, Temperature: 900}
		want := 2e-14 * math.Pow(s-40, 5)
		r := law.Rate(p)
		check.Rel(t, fmt.Sprintf("rate at %v", s), r.Value, want, plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), r.ByStress, 5*want/(s-40), plainTolerance)
		checkLog(t, fmt.Sprint(s), law.LogRate(p), math.Log(2e-14)+5*math.Log(s-40), 5*s/(s-40))
	}
	above := math.Nextafter(40, 50)
	checkLog(t, "one bit above", law.LogRate(creeplaw.Point{Stress: above}), math.Log(2e-14)+5*math.Log(above-40),
		5*above/(above-40))
	checkLog(t, "1e100", law.LogRate(creeplaw.Point{Stress: 1e100}), math.Log(2e-14)+500*math.Ln10, 5)
}

func TestNoCreepAtOrBelowTheThreshold(t *testing.T) {
	norton := must(creeplaw.NewNorton(2e-14, 5))
	raw := must(creeplaw.NewExponential(1e-9, 20)) // creeps at zero stress by itself, but not below a threshold
	for _, within := range []creeplaw.Law{norton, raw} {
		law := must(creeplaw.WithThreshold(within, 40))
		for _, s := range []float64{0, 1e-300, 39.999, 40} {
			p := creeplaw.Point{Stress: s, Strain: 0.01, Temperature: 900}
			assert.Equal(t, creeplaw.Rate{}, law.Rate(p), "%T at %v", within, s)
			assert.Equal(t, creeplaw.LogRate{Value: math.Inf(-1)}, law.LogRate(p), "%T at %v", within, s)
		}
	}
}

func TestThresholdDoesNotHideAnUndefinedTemperature(t *testing.T) {
	table := must(creeplaw.NewFactorTable([]float64{800, 900}, []float64{1, 3}, creeplaw.TableOptions{}))
	law := must(creeplaw.WithThreshold(must(creeplaw.WithTemperature(must(creeplaw.NewNorton(1, 3)), table)), 40))
	for _, s := range []float64{10, 100} {
		p := creeplaw.Point{Stress: s, Temperature: 700}
		assert.True(t, math.IsNaN(law.Rate(p).Value))
		assert.True(t, math.IsNaN(law.LogRate(p).Value))
		checkOutside(t, law.CheckPoint(p), "temperature", 700)
		p.Temperature = 850
		assert.NoError(t, law.CheckPoint(p))
	}
}

func TestThresholdConforms(t *testing.T) {
	sinh := must(creeplaw.NewGarofalo(1e-9, 0.03, 4))
	heated := must(creeplaw.WithTemperature(sinh, must(creeplaw.NewArrheniusAt(3e5, 900))))
	law := must(creeplaw.WithThreshold(heated, 40))
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{41, 1000},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{700, 1100}, LogStress: lawtest.Range{40.001, 1e7}}
	lawtest.Run(t, law, box)
	hardening := must(creeplaw.NewBaileyNorton(1e-12, 4, 0.4))
	box.LogStress = lawtest.Range{40.001, 1e15}
	lawtest.Run(t, must(creeplaw.WithThreshold(hardening, 40)), box)
}

func TestThresholdRefusesBadParameters(t *testing.T) {
	norton := must(creeplaw.NewNorton(1, 3))
	checkRefused(t, []refused{
		{"threshold stress", func(x float64) error { return last(creeplaw.WithThreshold(norton, x)) }, notPositive},
	})
	checkMissing(t, last(creeplaw.WithThreshold(nil, 1)), "law")
}

// A particle-strengthened alloy: nothing below 40 MPa, and just above it a stress exponent far beyond that of the matrix
// (invented numbers).
func ExampleWithThreshold() {
	matrix, err := creeplaw.NewNortonAt(1e-5, 100, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := creeplaw.WithThreshold(matrix, 40)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{40, 50, 140} {
		p := creeplaw.Point{Stress: stress}
		fmt.Printf("%3.0f MPa: %.1e /h, exponent %.1f\n", stress, law.Rate(p).Value, law.LogRate(p).ByLogStress)
	}
	// Output:
	//  40 MPa: 0.0e+00 /h, exponent 0.0
	//  50 MPa: 1.0e-10 /h, exponent 25.0
	// 140 MPa: 1.0e-05 /h, exponent 7.0
}
