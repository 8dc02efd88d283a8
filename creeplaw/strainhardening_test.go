package creeplaw_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// Bailey 1935, Finnie and Heller 1959: along the curve ε = A σⁿ tᵐ at constant stress, the rate at the strain reached is the
// derivative of the curve, m A σⁿ tᵐ⁻¹ = m ε/t, whatever the way the law was built.
//
// The strain enters with the exponent (m-1)/m and the stress with n/m, so their roundings and those of the logarithms are
// multiplied by up to (n+1)/m: the unit is ε(2 + |ln ṗ| + (n+1)/m (1 + |ln σ/σ₁| + |ln p/p₁|)).
func TestBaileyNortonRateIsTheDerivativeOfItsCurve(t *testing.T) {
	const seed = 6
	rng := rand.New(rand.NewPCG(seed, 0))
	var units budget
	for range 5000 {
		n, m := 1+9*rng.Float64(), 0.1+0.9*rng.Float64()
		stress := 20 + 380*rng.Float64()
		time := math.Pow(10, -3+9*rng.Float64())
		a := 1e-3 / math.Pow(100, n) // strain 1e-3 after unit time at stress 100
		strain := a * math.Pow(stress, n) * math.Pow(time, m)
		p := creeplaw.Point{Stress: stress, Strain: strain}
		want := m * strain / time
		for form, law := range map[string]creeplaw.BaileyNorton{
			"prefactor": made(creeplaw.NewBaileyNorton(a, n, m)),
			"At":        made(creeplaw.NewBaileyNortonAt(1e-3*math.Pow(1000, m), 100, 1000, n, m)),
		} {
			got := law.Rate(p)
			unit := epsilon * (2 + math.Abs(math.Log(want)) + (n+1)/m*(1+math.Log(stress)+math.Abs(math.Log(strain))))
			where := fmt.Sprintf("seed %d: %s, n %g, m %g, stress %g, time %g", seed, form, n, m, stress, time)
			units.note(math.Abs(got.Value/want-1)/unit, where)
			// Partial derivatives of the rate at given strain: by stress (n/m)ṗ/σ, by strain ((m-1)/m)ṗ/p.
			units.note(math.Abs(got.ByStress/(n/m*want/stress)-1)/unit, where+" by stress")
			if m < 1 {
				units.note(math.Abs(got.ByStrain/((m-1)/m*want/strain)-1)/unit, where+" by strain")
			}
		}
	}
	units.within(t, "rate and derivatives along the curve", 1)
}

// The direct form ṗ = A σⁿ pᵏ, and the creep curve it makes under constant stress, p = [(1-k) A σⁿ t]^(1/(1-k)) (Finnie and
// Heller 1959): dp/dt = p/((1-k)t).
func TestStrainHardeningAlongItsCurve(t *testing.T) {
	for _, c := range []struct{ n, k float64 }{{1, -0.5}, {4, -1.5}, {5, -2}, {8, -10}} {
		const a = 1e-18
		law := made(creeplaw.NewStrainHardening(a, c.n, c.k))
		atPoint := made(creeplaw.NewStrainHardeningAt(a*math.Pow(90, c.n)*math.Pow(1e-2, c.k), 90, 1e-2, c.n, c.k))
		for _, time := range []float64{1e-2, 1, 1e3, 1e6} {
			for _, s := range []float64{5, 90, 400} {
				strain := math.Pow((1-c.k)*a*math.Pow(s, c.n)*time, 1/(1-c.k))
				want := strain / ((1 - c.k) * time)
				p := creeplaw.Point{Stress: s, Strain: strain}
				label := fmt.Sprintf("n %v, k %v, stress %v, time %v", c.n, c.k, s, time)
				// Terms of the logarithm: n ln σ, k ln p and ln A, none above 120; four of them.
				const tolerance = 4 * 120 * epsilon
				check.Rel(t, label, law.Rate(p).Value, want, tolerance)
				check.Rel(t, label+", At", atPoint.Rate(p).Value, want, tolerance)
				check.Rel(t, label+", by stress", law.Rate(p).ByStress, c.n*want/s, tolerance)
				check.Rel(t, label+", by strain", law.Rate(p).ByStrain, c.k*want/strain, tolerance)
				assert.Equal(t, creeplaw.LogRate{Value: law.LogRate(p).Value, ByLogStress: c.n, ByLogStrain: c.k}, law.LogRate(p))
			}
		}
	}
}

// Common practice: a strain-hardening law with zero strain exponent is Norton's law, to the bit, and so is a curve linear in
// time.
func TestNoHardeningIsNorton(t *testing.T) {
	const a = 3e-15
	for _, n := range []float64{0.7, 1, 5, 50} {
		norton := made(creeplaw.NewNorton(a, n))
		direct := made(creeplaw.NewStrainHardening(a, n, 0))
		curve := made(creeplaw.NewBaileyNorton(a, n, 1))
		for _, s := range []float64{0, 1e-6, 1, 123.456, 1e5} {
			for _, p := range []creeplaw.Point{{Stress: s}, {Stress: s, Strain: 0.3}} {
				label := fmt.Sprintf("n %v at %+v", n, p)
				assert.Equal(t, norton.LogRate(p), direct.LogRate(p), label)
				assert.Equal(t, norton.Rate(p), direct.Rate(p), label)
				assert.Equal(t, norton.LogRate(p), curve.LogRate(p), label)
				if s > 0 || n != 1 {
					assert.Equal(t, norton.Rate(p), curve.Rate(p), label)
				} else { // A comes back from its logarithm, -33
					check.Rel(t, label, curve.Rate(p).ByStress, a, 34*epsilon)
				}
			}
		}
	}
}

// Common practice: forms that differ only by how their constants are grouped give identical rates.
func TestGroupingOfConstants(t *testing.T) {
	const a, n, m = 1e-15, 5.0, 0.4
	curve := made(creeplaw.NewBaileyNorton(a, n, m))
	direct := made(creeplaw.NewStrainHardening(m*math.Pow(a, 1/m), n/m, (m-1)/m))
	byPoint := made(creeplaw.NewBaileyNortonAt(a*math.Pow(150, n)*math.Pow(2e3, m), 150, 2e3, n, m))
	norton := made(creeplaw.NewNorton(a, n))
	scaled := made(creeplaw.NewNortonAt(1, math.Pow(a, -1/n), n)) // (σ/D)ⁿ, D the drag stress of unit rate
	for _, s := range []float64{1, 30, 200, 900} {
		for _, strain := range []float64{1e-8, 1e-3, 0.2} {
			p := creeplaw.Point{Stress: s, Strain: strain}
			label := fmt.Sprintf("%+v", p)
			want := curve.LogRate(p)
			// The logarithms have terms up to ln A/m = -87 and n/m ln σ = 85; a quarter of a thousand ε holds their roundings.
			check.Abs(t, label+" direct", direct.LogRate(p).Value, want.Value, 256*epsilon)
			check.Abs(t, label+" by a point", byPoint.LogRate(p).Value, want.Value, 256*epsilon)
			check.Rel(t, label+" rate", direct.Rate(p).Value, curve.Rate(p).Value, 512*epsilon)
			check.Rel(t, label+" rate by a point", byPoint.Rate(p).Value, curve.Rate(p).Value, 512*epsilon)
			check.Abs(t, label+" Norton", scaled.LogRate(p).Value, norton.LogRate(p).Value, 64*epsilon)
		}
	}
}

func TestHardeningSpecialValues(t *testing.T) {
	inf, nan := math.Inf(1), math.NaN()
	laws := map[string]creeplaw.Logarithmic{
		"Bailey–Norton":    made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4)),
		"strain hardening": made(creeplaw.NewStrainHardening(1e-18, 4, -1.5)),
	}
	for name, law := range laws {
		assert.Equal(t, creeplaw.Rate{}, law.Rate(creeplaw.Point{Strain: 0.1}), "%s, zero stress", name)
		assert.Equal(t, creeplaw.Rate{}, law.Rate(creeplaw.Point{}), "%s, zero stress and strain", name)
		assert.Equal(t, -inf, law.LogRate(creeplaw.Point{Strain: 0.1}).Value, name)
		assert.Equal(t, -inf, law.LogRate(creeplaw.Point{}).Value, name)
		assert.Equal(t, creeplaw.Rate{Value: inf, ByStress: inf, ByStrain: -inf}, law.Rate(creeplaw.Point{Stress: 100}), "%s, zero strain", name)
		assert.Equal(t, inf, law.LogRate(creeplaw.Point{Stress: 100}).Value, name)
		undefinedAt(t, law, creeplaw.Point{Stress: -1, Strain: 0.1}, creeplaw.Point{Stress: nan, Strain: 0.1},
			creeplaw.Point{Stress: 1, Strain: -0.1}, creeplaw.Point{Stress: 1, Strain: nan}, creeplaw.Point{Stress: -1}, creeplaw.Point{Stress: nan})
		p := creeplaw.Point{Stress: 100, Strain: 0.01}
		warm := p
		warm.Temperature = 900
		assert.Equal(t, law.Rate(p), law.Rate(warm), "%s: temperature does not enter", name)
	}
}

// At zero stress the slope of a law linear in stress is its prefactor times pᵏ.
func TestHardeningSlopeAtZeroStress(t *testing.T) {
	law := made(creeplaw.NewStrainHardening(2e-12, 1, -0.5))
	check.Rel(t, "slope", law.Rate(creeplaw.Point{Strain: 0.04}).ByStress, 2e-12/math.Sqrt(0.04), 4*epsilon)
	assert.Equal(t, math.Inf(1), law.Rate(creeplaw.Point{}).ByStress)
	// n/m = 1: ṗ = m A^(1/m) σ p^((m-1)/m), here 0.5·1e-24·σ/p.
	curve := made(creeplaw.NewBaileyNorton(1e-12, 0.5, 0.5))
	check.Rel(t, "curve slope", curve.Rate(creeplaw.Point{Strain: 0.04}).ByStress, 0.5*1e-24/0.04, 64*epsilon) // ln of 1e-24
	root := made(creeplaw.NewStrainHardening(2e-12, 0.5, -0.5))
	assert.Equal(t, math.Inf(1), root.Rate(creeplaw.Point{Strain: 0.04}).ByStress)
}

// Common practice: a negative strain exponent makes primary creep, a rate that falls as strain gathers.
func TestNegativeStrainExponentIsPrimaryCreep(t *testing.T) {
	law := made(creeplaw.NewStrainHardening(1e-18, 4, -1.5))
	last := math.Inf(1)
	for _, strain := range []float64{0, 1e-9, 1e-6, 1e-3, 0.1, 0.5} {
		r := law.Rate(creeplaw.Point{Stress: 100, Strain: strain})
		if strain > 0 {
			assert.Less(t, r.Value, last)
		}
		assert.Negative(t, r.ByStrain)
		last = r.Value
	}
}
