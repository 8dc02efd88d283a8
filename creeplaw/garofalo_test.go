package creeplaw_test

import (
	"fmt"
	"math"
	"math/big"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// Garofalo 1963, ṗ = A sinhⁿ(Bσ), against exponentials summed at 600 bits. Bσ runs from 1e-30, where sinh is its argument, to
// 1e4, where it is half an exponential and its power is beyond a float64. The logarithm is held to 2 units of
// ε(2 + |ln ṗ| + n(1 + x coth x)), what its terms and the rounding of Bσ lose; the exponent n x coth x to a few ε.
func TestGarofaloAgainstSeries(t *testing.T) {
	const seed = 5
	rng := rand.New(rand.NewPCG(seed, 0))
	var logs, rates, exponents budget
	for range 800 {
		n := []int{1, 2, 3, 7, 50}[rng.IntN(5)]
		x := math.Pow(10, -30+34*rng.Float64()) // Bσ with B = 1/4, exactly
		if rng.IntN(2) == 0 {
			x = math.Pow(10, -2+4*rng.Float64()) // more of them where the form changes
		}
		const a = 0x1p-30
		law := made(creeplaw.NewGarofalo(a, 0.25, float64(n)))
		sinh2, cosh2 := bigSinhCosh(bigOf(x))
		half := new(big.Float).Quo(sinh2, bigOf(2))
		want := bigMul(bigOf(a), bigPow(half, n))
		byLog := bigMul(bigMul(bigOf(float64(n)), bigOf(x)), new(big.Float).Quo(cosh2, sinh2))

		l, r := law.LogRate(at(4*x)), law.Rate(at(4*x))
		unit := epsilon * (2 + math.Abs(l.Value) + l.ByLogStress + float64(n))
		where := fmt.Sprintf("seed %d: n %d, Bσ %g", seed, n, x)
		logs.note(logError(l.Value, want)/unit, where)
		exponents.note(relativeError(bigOf(l.ByLogStress), byLog)/epsilon, where)
		if r.Value > 1e-290 && r.Value < 1e290 && r.ByStress < 1e290 {
			rates.note(relativeError(bigOf(r.Value), want)/unit, where)
			slope := new(big.Float).Quo(bigMul(want, byLog), bigOf(4*x))
			rates.note(relativeError(bigOf(r.ByStress), slope)/(unit+epsilon*math.Abs(math.Log(4*x))), where)
		}
	}
	logs.within(t, "ln rate", 2)
	rates.within(t, "rate and slope", 2)
	exponents.within(t, "exponent, in ε", 4)
}

// In its limits it is the power law A(Bσ)ⁿ, to second order in Bσ, and the exponential A 2⁻ⁿ exp(nBσ).
func TestGarofaloLimits(t *testing.T) {
	const a, b = 1e-9, 0.05
	for _, n := range []float64{1, 3.79, 6.41} {
		law := made(creeplaw.NewGarofalo(a, b, n))
		power := made(creeplaw.NewNorton(a*math.Pow(b, n), n))
		for _, s := range []float64{1e-12, 1e-8, 1e-4, 1e-2} {
			x := b * s
			// ln(sinh x/x) = x²/6 - x⁴/180; both logarithms are of size up to 300.
			want := power.LogRate(at(s)).Value + n*x*x/6
			check.Abs(t, fmt.Sprintf("n %v, stress %v", n, s), law.LogRate(at(s)).Value, want, n*x*x*x*x/180+300*4*epsilon)
			check.Rel(t, "exponent", law.LogRate(at(s)).ByLogStress, n*(1+x*x/3), x*x*x*x/45+8*epsilon)
		}
		for _, s := range []float64{600, 1e4, 1e7} {
			x := b * s
			// What is left out is exp(-2x) < 1e-26.
			check.Rel(t, fmt.Sprintf("n %v, stress %v", n, s), law.LogRate(at(s)).Value, math.Log(a)+n*(x-math.Ln2), 4*epsilon)
			check.Rel(t, "exponent", law.LogRate(at(s)).ByLogStress, n*x, 4*epsilon)
		}
	}
}

// The form changes where exp(-2Bσ) drops below rounding; value and exponent pass there without a jump.
func TestGarofaloIsContinuousWhereItsFormChanges(t *testing.T) {
	law := made(creeplaw.NewGarofalo(1, 1, 2))
	below, above := law.LogRate(at(19)), law.LogRate(at(math.Nextafter(19, 20)))
	check.Rel(t, "logarithm", above.Value, below.Value, 4*epsilon)
	check.Rel(t, "exponent", above.ByLogStress, below.ByLogStress, 4*epsilon)
}

// Common practice: a hyperbolic sine vanishes at zero stress.
func TestGarofaloSpecialValues(t *testing.T) {
	inf := math.Inf(1)
	for _, c := range []struct{ n, slope float64 }{{0.5, inf}, {1, 3e-9 * 0.05}, {2, 0}, {6.41, 0}} {
		law := made(creeplaw.NewGarofalo(3e-9, 0.05, c.n))
		r := law.Rate(at(0))
		assert.Zero(t, [3]float64{r.Value, r.ByStrain, r.ByTemperature}, "n %v", c.n)
		if c.n == 1 {
			check.Rel(t, "slope AB", r.ByStress, c.slope, 25*epsilon) // the exponential of a logarithm of -23
		} else {
			assert.Equal(t, c.slope, r.ByStress, "n %v", c.n)
		}
		assert.Equal(t, creeplaw.LogRate{Value: -inf, ByLogStress: c.n}, law.LogRate(at(0)), "n %v", c.n)
		undefinedAt(t, law, at(-1), at(math.NaN()), at(-inf))
		assert.Equal(t, law.Rate(at(50)), law.Rate(creeplaw.Point{Stress: 50, Strain: 0, Temperature: 400}), "neither strain nor temperature")
	}
}
