package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
)

// TestStepAboveThreshold takes random steps with laws that do not creep below a threshold stress, where ln ṗ falls to -Inf
// with an exponent that grows without bound. With n = 1 the step has a closed form: (q-σ)/3G = Δt A (σ-σₜ).
func TestStepAboveThreshold(t *testing.T) {
	count := 20_000
	if *campaign {
		count = 2_000_000
	}
	s := newSource(31)
	sum, worst := 0, 0
	for range count {
		n := 1.0
		if s.IntN(2) > 0 {
			n = s.decades(0, math.Log10(50))
		}
		inner, err := creeplaw.NewNortonAt(1e-6, 100, n)
		require.NoError(t, err)
		threshold := s.decades(-1, 2.3)
		law, err := creeplaw.WithThreshold(inner, threshold)
		require.NoError(t, err)
		m := material(t, law)
		q := threshold * (0.5 + s.decades(-3, 2))
		inc := integrate.Increment{Dt: s.decades(-6, 15), Temperature: 800, Strain: s.deviator().Scale(q / (3 * shear))}
		var out integrate.Result
		require.NoError(t, m.Step(&out, &integrate.State{}, inc), "seed %d: %+v, threshold %v, n = %v", seed, inc, threshold, n)
		sum += out.Iterations
		worst = max(worst, out.Iterations)
		mises := out.Stress.Mises()
		q = 3 * shear * inc.Strain.EquivalentStrain()
		switch {
		case q <= threshold:
			check.Scaled(t, "elastic below the threshold", mises, q, q, 1e-14)
		case n == 1:
			d := 3 * shear * inc.Dt * 1e-6 / 100
			// The residual in ln Δp is good to 2e-13 and to the rounding of the trial stress in its exponent.
			check.Rel(t, "closed form", mises, (q+d*threshold)/(1+d), 1e-12)
		default:
			// The stress is where ln Δp - ln(Δt ṗ) changes sign: within 1e-12 of itself.
			residual := func(stress float64) float64 {
				l := law.LogRate(creeplaw.Point{Stress: stress, Temperature: 800})
				return math.Log((q-stress)/(3*shear)) - math.Log(inc.Dt) - l.Value
			}
			const near = 1e-12
			if mises < q*(1-1e-3) { // nearer to q the difference q-stress has lost its digits
				require.LessOrEqual(t, residual(mises*(1+near)), 0.0, "seed %d: n %v threshold %v %+v", seed, n, threshold, inc)
				require.GreaterOrEqual(t, residual(mises*(1-near)), 0.0, "seed %d: n %v threshold %v %+v", seed, n, threshold, inc)
			}
		}
	}
	t.Logf("%d steps, iterations %.1f mean, %d worst", count, float64(sum)/float64(count), worst)
}
