package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// Rates add, and so do their derivatives; the logarithm is that of the sum. Power laws written out.
func TestSumAddsRates(t *testing.T) {
	law := made(creeplaw.NewSum(made(creeplaw.NewNorton(2e-9, 1)), made(creeplaw.NewNorton(1e-15, 5)),
		made(creeplaw.NewStrainHardening(1e-12, 2, -1))))
	for _, s := range []float64{1, 30, 41, 200, 900} {
		for _, p := range []float64{1e-6, 1e-2} {
			point := creeplaw.Point{Stress: s, Strain: p}
			label := fmt.Sprintf("%+v", point)
			a, b, c := 2e-9*s, 1e-15*math.Pow(s, 5), 1e-12*s*s/p
			// Each part is the exponential of a logarithm of up to 35.
			const tolerance = 64 * epsilon
			r, l := law.Rate(point), law.LogRate(point)
			check.Rel(t, label, r.Value, a+b+c, tolerance)
			check.Rel(t, label+" by stress", r.ByStress, (a+5*b+2*c)/s, tolerance)
			check.Rel(t, label+" by strain", r.ByStrain, -c/p, tolerance)
			check.Abs(t, label+" logarithm", l.Value, math.Log(a+b+c), tolerance)
			check.Rel(t, label+" exponent of stress", l.ByLogStress, (a+5*b+2*c)/(a+b+c), tolerance)
			check.Rel(t, label+" exponent of strain", l.ByLogStrain, -c/(a+b+c), tolerance)
			assert.Zero(t, [2]float64{r.ByTemperature, l.ByLogTemperature})
		}
	}
}

// A sum of equal power laws is one with the sum of the prefactors; a sum of one is that one, to the bit.
func TestSumOfLikeLaws(t *testing.T) {
	one, three := made(creeplaw.NewNorton(1e-15, 5)), made(creeplaw.NewNorton(3e-15, 5))
	single, triple := made(creeplaw.NewSum(one)), made(creeplaw.NewSum(one, one, one))
	for _, s := range []float64{0, 1e-200, 1, 321, 1e200} {
		assert.Equal(t, one.LogRate(at(s)), single.LogRate(at(s)))
		assert.Equal(t, one.Rate(at(s)), single.Rate(at(s)))
		assert.Equal(t, 5.0, triple.LogRate(at(s)).ByLogStress)
		if s > 0 {
			check.Rel(t, "ln 3A", triple.LogRate(at(s)).Value, three.LogRate(at(s)).Value, 4*epsilon)
		}
	}
}

// One part may leave the range of a float64 where another still counts.
func TestSumStaysInTheLogarithm(t *testing.T) {
	steep, viscous := made(creeplaw.NewNortonAt(1e-6, 100, 50)), made(creeplaw.NewNortonAt(1e-8, 100, 1))
	law := made(creeplaw.NewSum(steep, viscous))
	assert.Equal(t, viscous.LogRate(at(1e-6)), law.LogRate(at(1e-6)), "the steep one is 1e-406")
	assert.Equal(t, steep.LogRate(at(1e9)), law.LogRate(at(1e9)), "it is 1e344")
	assert.Zero(t, law.Rate(at(1e-6)).Value-viscous.Rate(at(1e-6)).Value)

	// The order of the parts changes rounding at the most.
	swapped := made(creeplaw.NewSum(viscous, steep))
	for _, s := range []float64{1e-6, 80, 91.02, 95, 1e9} {
		a, b := law.LogRate(at(s)), swapped.LogRate(at(s))
		check.Rel(t, "value", a.Value, b.Value, 2*epsilon)
		check.Rel(t, "exponent", a.ByLogStress, b.ByLogStress, 4*epsilon)
	}
}

func TestSumSpecialValues(t *testing.T) {
	inf := math.Inf(1)
	viscous := made(creeplaw.NewNorton(2e-9, 1))
	primary := made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4))
	law := made(creeplaw.NewSum(viscous, primary))
	assert.Equal(t, creeplaw.Rate{ByStress: 2e-9}, law.Rate(creeplaw.Point{Strain: 0.1}), "zero stress")
	assert.Equal(t, creeplaw.Rate{ByStress: 2e-9}, law.Rate(creeplaw.Point{}), "zero point")
	assert.Equal(t, -inf, law.LogRate(creeplaw.Point{}).Value)
	assert.Equal(t, creeplaw.Rate{Value: inf, ByStress: inf, ByStrain: -inf}, law.Rate(creeplaw.Point{Stress: 9}), "zero strain")
	assert.Equal(t, primary.LogRate(creeplaw.Point{Stress: 9}), law.LogRate(creeplaw.Point{Stress: 9}), "zero strain")
	undefinedAt(t, law, at(-1), at(math.NaN()), creeplaw.Point{Stress: 1, Strain: math.NaN()})

	absent := made(creeplaw.NewSum(viscous, creeplaw.RateFunc(nil))) // one part undefined makes the sum so
	undefinedAt(t, absent, at(1))
}

// The sum keeps its own list: a caller who reuses the slice does not change the law.
func TestSumIsImmutable(t *testing.T) {
	parts := []creeplaw.Law{made(creeplaw.NewNorton(2e-9, 1)), made(creeplaw.NewNorton(1e-15, 5))}
	law := made(creeplaw.NewSum(parts...))
	before := law.Rate(at(100))
	parts[0] = nil
	assert.Equal(t, before, law.Rate(at(100)))
}
