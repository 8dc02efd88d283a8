package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

func TestRateFunc(t *testing.T) {
	p := creeplaw.Point{Stress: 30, Strain: 0.1, Temperature: 700}
	want := creeplaw.Rate{Value: 30, ByStress: 1, ByStrain: 0.1, ByTemperature: 700}
	f := creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		return creeplaw.Rate{Value: p.Stress, ByStress: 1, ByStrain: p.Strain, ByTemperature: p.Temperature}
	})
	assert.Equal(t, want, f.Rate(p))
	allNaN(t, creeplaw.RateFunc(nil).Rate(p))
	allNaN(t, creeplaw.ValueFunc(nil).Rate(p))
}

func allNaN(t *testing.T, r creeplaw.Rate) {
	t.Helper()
	assert.True(t, math.IsNaN(r.Value) && math.IsNaN(r.ByStress) && math.IsNaN(r.ByStrain) && math.IsNaN(r.ByTemperature), "%+v", r)
}

// The derivatives of a function without any, against those of σⁿ p^(-1/2) exp(-B/T) in closed form. Truncation leaves
// (nh)⁴/30 with h = 2⁻¹³, which is 5e-11 at n = 50; rounding leaves ε·|ln f|/(nh), at most 1e-11 here.
func TestValueFuncDifferences(t *testing.T) {
	worst := map[float64]float64{}
	for _, n := range []float64{1, 3, 5, 10, 20, 50} {
		f := creeplaw.ValueFunc(func(p creeplaw.Point) float64 {
			return math.Pow(p.Stress/100, n) * math.Exp(-2e4/p.Temperature) / math.Sqrt(p.Strain)
		})
		for _, s := range []float64{1, 90, 300} {
			p := creeplaw.Point{Stress: s, Strain: 1e-4, Temperature: 800}
			r := f.Rate(p)
			label := fmt.Sprintf("n %v, stress %v", n, s)
			tolerance := 2e-11 + 1.2*math.Pow(n/8192, 4)/30
			check.Rel(t, label+" by stress", r.ByStress, n*r.Value/s, tolerance)
			check.Rel(t, label+" by strain", r.ByStrain, -0.5*r.Value/1e-4, tolerance)
			check.Rel(t, label+" by temperature", r.ByTemperature, 2e4*r.Value/(800*800), tolerance)
			worst[n] = math.Max(worst[n], math.Abs(r.ByStress*s/(n*r.Value)-1))
		}
	}
	t.Logf("largest relative error of the derivative by stress, by exponent: %.1e", worst)
}

// Thirteen calls per evaluation, as the comment says, and none of them away from the point by more than two steps.
func TestValueFuncCalls(t *testing.T) {
	calls := 0
	p := creeplaw.Point{Stress: 100, Strain: 0.01, Temperature: 800}
	creeplaw.ValueFunc(func(q creeplaw.Point) float64 {
		calls++
		for _, x := range [3]float64{q.Stress / p.Stress, q.Strain / p.Strain, q.Temperature / p.Temperature} {
			assert.True(t, math.Abs(x-1) <= 2.0/(1<<13)+epsilon, "%+v", q)
		}
		return q.Stress
	}).Rate(p)
	assert.Equal(t, 13, calls)
}

// Where no relative step exists the derivative is given as 0; where the rate is infinite, the others are too.
func TestValueFuncAtZero(t *testing.T) {
	inf := math.Inf(1)
	f := creeplaw.ValueFunc(primaryOnly)
	assert.Equal(t, creeplaw.Rate{}, f.Rate(creeplaw.Point{Strain: 0.1, Temperature: 800}))
	start := f.Rate(creeplaw.Point{Stress: 10, Temperature: 800})
	assert.Equal(t, creeplaw.Rate{Value: inf, ByStress: inf, ByStrain: 0, ByTemperature: inf}, start)
	assert.True(t, math.IsNaN(f.Rate(creeplaw.Point{Stress: math.NaN(), Strain: 0.1, Temperature: 800}).Value))
}

// The adapter takes the logarithm of a plain rate and forms the exponents x/ṗ ∂ṗ/∂x.
func TestLogOfPlainLaw(t *testing.T) {
	plain := creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate { // σ³ p^-½ T²
		v := math.Pow(p.Stress, 3) / math.Sqrt(p.Strain) * p.Temperature * p.Temperature
		return creeplaw.Rate{Value: v, ByStress: 3 * v / p.Stress, ByStrain: -0.5 * v / p.Strain, ByTemperature: 2 * v / p.Temperature}
	})
	p := creeplaw.Point{Stress: 70, Strain: 1e-3, Temperature: 800}
	l := creeplaw.Log(plain).LogRate(p)
	check.Rel(t, "logarithm", l.Value, 3*math.Log(70)-0.5*math.Log(1e-3)+2*math.Log(800), 4*epsilon)
	check.Rel(t, "of stress", l.ByLogStress, 3, 4*epsilon)
	check.Rel(t, "of strain", l.ByLogStrain, -0.5, 4*epsilon)
	check.Rel(t, "of temperature", l.ByLogTemperature, 2, 4*epsilon)
	assert.Equal(t, plain.Rate(p), creeplaw.Log(plain).Rate(p), "the plain rate is left alone")
}

func TestLogSpecialValues(t *testing.T) {
	inf := math.Inf(1)
	logOf := func(v float64) creeplaw.LogRate {
		return creeplaw.Log(creeplaw.RateFunc(func(creeplaw.Point) creeplaw.Rate {
			return creeplaw.Rate{Value: v, ByStress: v, ByStrain: v, ByTemperature: v}
		})).LogRate(at(1))
	}
	assert.Equal(t, creeplaw.LogRate{Value: -inf}, logOf(0))
	assert.Equal(t, creeplaw.LogRate{Value: inf}, logOf(inf))
	for _, bad := range []float64{-1, math.NaN(), -inf} {
		l := logOf(bad)
		assert.True(t, math.IsNaN(l.Value) && math.IsNaN(l.ByLogStress) && math.IsNaN(l.ByLogStrain) && math.IsNaN(l.ByLogTemperature),
			"%v: %+v", bad, l)
	}
	check.Rel(t, "smallest normal number", logOf(0x1p-1022).Value, -1022*math.Ln2, 2*epsilon)
	check.Rel(t, "largest number", logOf(math.MaxFloat64).Value, 1024*math.Ln2, 2*epsilon)
}

// A law that gives its own logarithm is used as it is.
func TestLogOfLogarithmicLaw(t *testing.T) {
	law := made(creeplaw.NewNorton(1e-15, 5))
	assert.Equal(t, creeplaw.Logarithmic(law), creeplaw.Log(law))
	assert.Equal(t, creeplaw.Log(creeplaw.Log(law)), creeplaw.Log(law))
}
