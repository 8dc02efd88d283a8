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

// Norton 1929, ṗ = A σⁿ and ∂ṗ/∂σ = n A σⁿ⁻¹, against exact products (math/big). The logarithm loses a unit for its own
// size and n/2 units for the rounding of σ/σ₁; the plain rate is its exponential, so that its relative error is the absolute
// one of the logarithm. One unit of rounding is ε(2 + |ln ṗ| + n).
func TestNortonAgainstExactProducts(t *testing.T) {
	const seed = 3
	rng := rand.New(rand.NewPCG(seed, 0))
	var logs, rates, slopes budget
	for range 3000 {
		n := 1 + rng.IntN(50)
		a := math.Exp(-600 / float64(n) * rng.Float64())
		s := math.Pow(10, 10*rng.Float64()-5)
		law := made(creeplaw.NewNorton(a, float64(n)))
		want := bigMul(bigOf(a), bigPow(bigOf(s), n))
		slope := bigMul(bigMul(bigOf(a), bigPow(bigOf(s), n-1)), bigOf(float64(n)))

		l, r := law.LogRate(at(s)), law.Rate(at(s))
		unit := epsilon * (2 + math.Abs(l.Value) + float64(n))
		where := fmt.Sprintf("seed %d: A %g, n %d, stress %g", seed, a, n, s)
		logs.note(logError(l.Value, want)/unit, where)
		if r.Value > 1e-290 && r.Value < 1e290 && r.ByStress > 1e-290 && r.ByStress < 1e290 {
			rates.note(relativeError(bigOf(r.Value), want)/unit, where)
			slopes.note(relativeError(bigOf(r.ByStress), slope)/(unit+epsilon*math.Abs(math.Log(s))), where)
		}
		assert.Equal(t, float64(n), l.ByLogStress, where)
		assert.Zero(t, [4]float64{r.ByStrain, r.ByTemperature, l.ByLogStrain, l.ByLogTemperature}, where)
	}
	logs.within(t, "ln rate", 1.5)
	rates.within(t, "rate", 1.5)
	slopes.within(t, "slope", 1.5)
}

// The reference point is met exactly in the logarithm's own precision, and the slope there is nṗ₁/σ₁.
func TestNortonAtItsReferencePoint(t *testing.T) {
	for _, n := range []float64{0.5, 1, 5, 50} {
		law := made(creeplaw.NewNortonAt(2e-6, 120, n))
		r := law.Rate(at(120))
		// One exponential and one logarithm of ln 2e-6 = -13: 14 roundings at most.
		check.Rel(t, fmt.Sprintf("n %v", n), r.Value, 2e-6, 14*epsilon)
		check.Rel(t, fmt.Sprintf("n %v slope", n), r.ByStress, n*2e-6/120, 20*epsilon)
	}
}

// A prefactor, however small, keeps its logarithm: the range, stresses from 1e-6 to 1e5 and an exponent of 40, and
// beyond. Exact values by powers of two.
func TestNortonLogarithmKeepsAllDigits(t *testing.T) {
	for _, c := range []struct {
		prefactorLog2 int
		n             float64
		stressLog2    int
	}{{-40, 40, -20}, {-40, 40, 17}, {-1000, 1, -60}, {-1000, 1, 60}, {1000, 1, -400}, {-1022, 50, 20}, {-300, 0.5, -400}} {
		law := made(creeplaw.NewNorton(math.Ldexp(1, c.prefactorLog2), c.n))
		want := math.Ln2 * (float64(c.prefactorLog2) + c.n*float64(c.stressLog2))
		// Three roundings of numbers no larger than the sum of sizes of the two terms.
		scale := math.Ln2 * (math.Abs(float64(c.prefactorLog2)) + c.n*math.Abs(float64(c.stressLog2)))
		check.Scaled(t, fmt.Sprintf("%+v", c), law.LogRate(at(math.Ldexp(1, c.stressLog2))).Value, want, scale, 3*epsilon)
	}
}

func TestNortonSpecialValues(t *testing.T) {
	inf := math.Inf(1)
	for _, c := range []struct{ n, slope float64 }{{0.5, inf}, {1, 2e-10}, {1.5, 0}, {5, 0}, {50, 0}} {
		law := made(creeplaw.NewNorton(2e-10, c.n))
		want := creeplaw.Rate{ByStress: c.slope}
		assert.Equal(t, want, law.Rate(creeplaw.Point{}), "n %v, zero point", c.n)
		assert.Equal(t, want, law.Rate(at(0)), "n %v, zero stress", c.n)
		assert.Equal(t, creeplaw.LogRate{Value: -inf, ByLogStress: c.n}, law.LogRate(at(0)), "n %v", c.n)
		undefinedAt(t, law, at(-1), at(math.NaN()), at(-inf))
		// It depends on neither creep strain nor temperature.
		assert.Equal(t, law.Rate(at(50)), law.Rate(creeplaw.Point{Stress: 50, Temperature: math.NaN()}))
	}
}

// undefinedAt says that both forms of a law are NaN at these points.
func undefinedAt(t *testing.T, law creeplaw.Logarithmic, points ...creeplaw.Point) {
	t.Helper()
	for _, p := range points {
		assert.True(t, math.IsNaN(law.Rate(p).Value), "%T at %+v: %+v", law, p, law.Rate(p))
		assert.True(t, math.IsNaN(law.LogRate(p).Value), "%T at %+v: %+v", law, p, law.LogRate(p))
	}
}

// Common practice: the same law in another set of units. Going from (MPa, h) to (Pa, s) divides the rate by 3600, and nothing
// else may change but rounding.
//
// With stresses that both sets hold exactly, σ/σ₁ has the same bits in both, and only the constant ln ṗ₁ is another number.
// The logarithms then agree to 2 ε of the larger of their terms, ln ṗ₁ = -14 to -22 and n ln(σ/σ₁) up to ±115. The rates are
// exponentials of them, which hand an absolute error of the logarithm on as a relative one: tens of ulp of the rate. The
// slope, formed as exp(ln ṗ - ln σ), adds that of ln σ, up to 20.
func TestNortonInTwoSetsOfUnitsExactStress(t *testing.T) {
	for _, n := range []float64{1, 5, 20, 50} {
		mpa := made(creeplaw.NewNortonAt(1e-6, 100, n))
		pa := made(creeplaw.NewNortonAt(1e-6/3600, 100e6, n))
		var logs budget
		var worst uint64
		for s := 10.0; s <= 300; s++ {
			label := fmt.Sprintf("n %v, stress %v", n, s)
			a, b := mpa.LogRate(at(s)), pa.LogRate(at(s*1e6))
			terms := -math.Log(1e-6/3600) + n*math.Abs(math.Log(s/100))
			logs.note(math.Abs(b.Value+math.Log(3600)-a.Value)/(epsilon*terms), label)
			assert.Equal(t, a.ByLogStress, b.ByLogStress)
			x, y := mpa.Rate(at(s)), pa.Rate(at(s*1e6))
			worst = max(worst, check.ULPs(x.Value, y.Value*3600))
			check.Rel(t, label, y.Value*3600, x.Value, 2*epsilon*terms)
			check.Rel(t, label+", slope", y.ByStress*3600e6, x.ByStress, 2*epsilon*(terms+20))
		}
		logs.within(t, fmt.Sprintf("n = %v, ln rate in two sets of units, exact stress (rates within %d ulp)", n, worst), 2)
	}
}

// With any stress, σ·10⁶ and then σ/σ₁ are rounded, which the exponent multiplies by n: for each of the two sets one unit
// ε(2 + |ln ṗ| + n) at the most.
func TestNortonInTwoSetsOfUnitsAnyStress(t *testing.T) {
	const seed = 4
	rng := rand.New(rand.NewPCG(seed, 0))
	for _, n := range []int{1, 5, 20, 50} {
		var worst uint64
		var units budget
		perPa, _ := new(big.Float).Quo(bigOf(1), bigMul(bigPow(bigOf(1e6), n), bigOf(3600))).Float64()
		prefactor := 1e-6 / math.Pow(100, float64(n))
		for range 2000 {
			s := 10 + 290*rng.Float64() // a rate of 1e-6 /h at 100 MPa
			compare := func(form string, mpa, pa creeplaw.Norton) {
				a, b := mpa.Rate(at(s)).Value, pa.Rate(at(s*1e6)).Value*3600
				worst = max(worst, check.ULPs(a, b))
				unit := epsilon * (2 + math.Abs(math.Log(a)) + float64(n))
				units.note(math.Abs(b/a-1)/unit, fmt.Sprintf("seed %d, %s, stress %g", seed, form, s))
			}
			compare("At", made(creeplaw.NewNortonAt(1e-6, 100, float64(n))), made(creeplaw.NewNortonAt(1e-6/3600, 100e6, float64(n))))
			if n < 50 { // 1e-106 in MPa, but 1e-409 in Pa
				compare("prefactor", made(creeplaw.NewNorton(prefactor, float64(n))), made(creeplaw.NewNorton(prefactor*perPa, float64(n))))
			}
		}
		t.Logf("n = %d: rates agree to %d ulp", n, worst)
		units.within(t, fmt.Sprintf("n = %d, two sets of units", n), 2)
	}
}

// Where the prefactor in one set of units leaves the range of a float64, the constructor says so and names the other form.
func TestNortonPrefactorOutOfRange(t *testing.T) {
	_, err := creeplaw.NewNorton(1e-106*math.Pow(1e6, -50), 50)
	assert.EqualError(t, err, "creeplaw: Norton: prefactor is 0, must be positive and finite")
}
