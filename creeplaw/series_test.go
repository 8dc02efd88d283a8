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

func TestReciprocalRatesAdd(t *testing.T) {
	// 1/ṗ = 1/ṗ₁ + 1/ṗ₂, written out for two power laws; invented numbers.
	law := must(creeplaw.NewSeries(must(creeplaw.NewNorton(2e-9, 1)), must(creeplaw.NewNorton(3e-20, 6))))
	for _, s := range []float64{0.1, 10, 100, 150, 1000} {
		a, b := 2e-9*s, 3e-20*math.Pow(s, 6)
		want := a * b / (a + b)
		n := (1*b + 6*a) / (a + b) // the slower part weighs more
		p := creeplaw.Point{Stress: s, Strain: 0.02, Temperature: 800}
		r := law.Rate(p)
		check.Rel(t, fmt.Sprintf("rate at %v", s), r.Value, want, plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), r.ByStress, want*n/s, plainTolerance)
		check.Rel(t, fmt.Sprintf("exponent at %v", s), law.LogRate(p).ByLogStress, n, plainTolerance)
		p.Strain = 0
		check.Rel(t, fmt.Sprintf("slope at %v, zero strain", s), law.Rate(p).ByStress, want*n/s, plainTolerance)
	}
}

func TestSeriesFarFromWhereItsPartsMeet(t *testing.T) {
	steep, linear := must(creeplaw.NewNortonAt(1e-7, 60, 50)), must(creeplaw.NewNortonAt(1e-7, 60, 1))
	law := must(creeplaw.NewSeries(linear, steep))
	// The slower part alone: here the rates differ by thousands of decades.
	checkLog(t, "1e-199", law.LogRate(creeplaw.Point{Stress: 6e-199}), math.Log(1e-7)-50*200*math.Ln10, 50)
	checkLog(t, "1e201", law.LogRate(creeplaw.Point{Stress: 6e201}), math.Log(1e-7)+200*math.Ln10, 1)
	checkLog(t, "60", law.LogRate(creeplaw.Point{Stress: 60}), math.Log(0.5e-7), 25.5)
}

func TestSeriesOfOneAndOfManyEqualLaws(t *testing.T) {
	one := must(creeplaw.NewStrainHardening(1e-12, 4, -1.5))
	p := creeplaw.Point{Stress: 80, Strain: 1e-3, Temperature: 900}
	r := must(creeplaw.NewSeries(one)).Rate(p)
	check.Rel(t, "one: rate", r.Value, one.Rate(p).Value, plainTolerance)
	check.Rel(t, "one: by strain", r.ByStrain, one.Rate(p).ByStrain, plainTolerance)
	r = must(creeplaw.NewSeries(one, one, one)).Rate(p) // equal laws n times over: the nth part
	check.Rel(t, "three: rate", r.Value, one.Rate(p).Value/3, plainTolerance)
	check.Rel(t, "three: by stress", r.ByStress, one.Rate(p).ByStress/3, plainTolerance)
}

func TestSeriesAtZeroStress(t *testing.T) {
	linear := func(a float64) creeplaw.Law { return must(creeplaw.NewNorton(a, 1)) }
	raw := must(creeplaw.NewExponential(6, 2)) // rate 6, slope 3
	for _, row := range []struct {
		name        string
		laws        []creeplaw.Law
		rate, slope float64
	}{
		{"linear beside linear", []creeplaw.Law{linear(2), linear(3)}, 0, 6.0 / 5},
		{"linear beside cubic", []creeplaw.Law{linear(2), must(creeplaw.NewNorton(3, 3))}, 0, 0},
		{"linear beside root", []creeplaw.Law{linear(2), must(creeplaw.NewNorton(3, 0.5))}, 0, 2},
		{"linear beside one that creeps", []creeplaw.Law{raw, linear(2)}, 0, 2},
		{"root beside root", []creeplaw.Law{must(creeplaw.NewNorton(1, 0.5)), must(creeplaw.NewNorton(3, 0.5))}, 0, math.Inf(1)},
		{"two that creep", []creeplaw.Law{raw, raw}, 3, 1.5},
	} {
		law := must(creeplaw.NewSeries(row.laws...))
		r := law.Rate(creeplaw.Point{Strain: 0.01, Temperature: 900})
		check.Rel(t, row.name+": rate", r.Value, row.rate, plainTolerance)
		check.Rel(t, row.name+": slope", r.ByStress, row.slope, plainTolerance)
		assert.Zero(t, r.ByStrain, row.name)
		assert.Zero(t, r.ByTemperature, row.name)
	}
	n := must(creeplaw.NewSeries(linear(2), must(creeplaw.NewNorton(3, 3)))).LogRate(creeplaw.Point{}).ByLogStress
	assert.Equal(t, 3.0, n, "the slowest at vanishing stress is the steepest")
}

func TestSeriesAtZeroStrain(t *testing.T) {
	// ṗ = 1/(1/b + p^(-k)/C): closed form, ∂ṗ/∂p = k (ṗ²/C) p^(-k-1) → 0, -b²/C or -∞. b = 5, C = 2·σ³ at σ = 1.
	steady := must(creeplaw.NewNorton(5, 2))
	for _, row := range []struct{ k, slope float64 }{{-3, 0}, {-1, -25.0 / 2}, {-0.5, math.Inf(-1)}} {
		law := must(creeplaw.NewSeries(must(creeplaw.NewStrainHardening(2, 3, row.k)), steady))
		r := law.Rate(creeplaw.Point{Stress: 1, Temperature: 900})
		check.Rel(t, fmt.Sprintf("k = %v: rate", row.k), r.Value, 5, plainTolerance)
		check.Rel(t, fmt.Sprintf("k = %v: by stress", row.k), r.ByStress, 10, plainTolerance)
		check.Rel(t, fmt.Sprintf("k = %v: by strain", row.k), r.ByStrain, row.slope, plainTolerance)
	}
	both := must(creeplaw.NewSeries(must(creeplaw.NewStrainHardening(2, 3, -1)), must(creeplaw.NewStrainHardening(1, 1, -2))))
	r := both.Rate(creeplaw.Point{Stress: 1})
	assert.True(t, math.IsInf(r.Value, 1) && math.IsInf(r.ByStress, 1) && math.IsInf(r.ByStrain, -1), "%+v", r)
	assert.True(t, math.IsInf(both.LogRate(creeplaw.Point{Stress: 1}).Value, 1))
}

func TestSeriesWithAPartThatStops(t *testing.T) {
	stopped := must(creeplaw.WithThreshold(must(creeplaw.NewNorton(1, 3)), 40))
	law := must(creeplaw.NewSeries(must(creeplaw.NewNorton(1, 3)), stopped))
	assert.Equal(t, creeplaw.Rate{}, law.Rate(creeplaw.Point{Stress: 30, Strain: 0.1, Temperature: 900}))
	// Beside an infinitely fast start the part that stops still rules.
	law = must(creeplaw.NewSeries(must(creeplaw.NewStrainHardening(1, 3, -1)), stopped))
	assert.Equal(t, 0.0, law.Rate(creeplaw.Point{Stress: 30, Temperature: 900}).Value)
}

func TestSeriesConforms(t *testing.T) {
	slip := must(creeplaw.WithTemperature(must(creeplaw.NewNortonAt(1e-6, 50, 4)), must(creeplaw.NewArrheniusAt(2.8e5, 900))))
	climb := must(creeplaw.WithTemperature(must(creeplaw.NewNortonAt(1e-6, 50, 1.5)), must(creeplaw.NewArrheniusAt(1.2e5, 900))))
	hardening := must(creeplaw.NewStrainHardeningAt(1e-4, 50, 1e-3, 5, -1.5))
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1, 1000},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{700, 1200}}
	lawtest.Run(t, must(creeplaw.NewSeries(slip, climb)), box)
	lawtest.Run(t, must(creeplaw.NewSeries(slip, hardening, climb)), box)
}

func TestSeriesNeedsLaws(t *testing.T) {
	checkMissing(t, last(creeplaw.NewSeries()), "law")
	checkMissing(t, last(creeplaw.NewSeries(must(creeplaw.NewNorton(1, 3)), nil)), "law")
}

// A slow and a fast mechanism: in sequence the slow one rules, side by side the fast one (invented numbers).
func ExampleNewSeries() {
	slow, err := creeplaw.NewNortonAt(1e-9, 50, 4)
	if err != nil {
		fmt.Println(err)
		return
	}
	fast, err := creeplaw.NewNortonAt(1e-6, 50, 2)
	if err != nil {
		fmt.Println(err)
		return
	}
	sequence, err := creeplaw.NewSeries(slow, fast)
	if err != nil {
		fmt.Println(err)
		return
	}
	parallel, err := creeplaw.NewSum(slow, fast)
	if err != nil {
		fmt.Println(err)
		return
	}
	p := creeplaw.Point{Stress: 50}
	fmt.Printf("in sequence %.3e, in parallel %.3e /h\n", sequence.Rate(p).Value, parallel.Rate(p).Value)
	// Output:
	// in sequence 9.990e-10, in parallel 1.001e-06 /h
}
