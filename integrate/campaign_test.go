package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// tally gathers what the random steps of one kind of law did.
type tally struct {
	steps, iterations, worst int
	residual                 float64
}

// TestStepNeverFails takes random steps with every law: exponents 1 to 50, trial stress over 10 decades, Δt over 25 decades,
// prior creep strain 0 or up to 0.5. No failure and no NaN is allowed; the residual is formed here, from the result alone.
func TestStepNeverFails(t *testing.T) {
	perKind := 100_000 / len(lawKinds())
	if *campaign {
		perKind = 10_000_000 / len(lawKinds())
	}
	var all tally
	for i, kind := range lawKinds() {
		s := newSource(uint64(i))
		var sum tally
		for range perKind {
			law, err := kind.draw(s)
			require.NoError(t, err)
			if !randomStep(t, s, kind.name, law, &sum) {
				return
			}
		}
		t.Logf("%-26s %8d steps, iterations %.2f mean, %2d worst, residual %.1e", kind.name, sum.steps,
			float64(sum.iterations)/float64(sum.steps), sum.worst, sum.residual)
		all.steps += sum.steps
		all.iterations += sum.iterations
		all.worst = max(all.worst, sum.worst)
		all.residual = math.Max(all.residual, sum.residual)
	}
	mean := float64(all.iterations) / float64(all.steps)
	t.Logf("%-26s %8d steps, iterations %.2f mean, %2d worst, residual %.1e", "all", all.steps, mean, all.worst, all.residual)
	require.LessOrEqual(t, mean, 3.0)
	require.LessOrEqual(t, all.worst, 12)
	require.LessOrEqual(t, all.residual, 1e-12)
}

func randomStep(t *testing.T, s source, kind string, law creeplaw.Law, sum *tally) bool {
	m := material(t, law)
	q := s.decades(-5, 5)
	old := integrate.State{}
	if s.IntN(4) > 0 {
		old.Equivalent = s.decades(-12, math.Log10(0.5))
	}
	inc := integrate.Increment{
		Dt:          s.decades(-10, 15),
		Temperature: s.uniform(600, 1000),
		Strain:      s.deviator().Scale(q / (3 * shear)),
	}
	var out integrate.Result
	if err := m.Step(&out, &old, inc); err != nil {
		t.Errorf("%s (seed %d): %v at %+v from %+v with %+v", kind, seed, err, inc, old, law)
		return false
	}
	sum.steps++
	sum.iterations += out.Iterations
	sum.worst = max(sum.worst, out.Iterations)
	for _, v := range out.Tangent {
		for _, w := range v {
			if math.IsNaN(w) || math.IsInf(w, 0) {
				t.Errorf("%s (seed %d): tangent %v at %+v from %+v with %+v", kind, seed, out.Tangent, inc, old, law)
				return false
			}
		}
	}
	r, meaningful := residual(law, &out, &old, inc)
	if !meaningful {
		return true
	}
	sum.residual = math.Max(sum.residual, r)
	if !(r <= 1e-12) {
		t.Errorf("%s (seed %d): residual %v at %+v from %+v with %+v", kind, seed, r, inc, old, law)
		return false
	}
	return true
}

// residual is |ln Δp - ln Δt - ln ṗ(σ, p, T)| of the end state. It means nothing where the creep strain of the step is below
// the normal numbers, or where the stress left is so small that the rounding of the result's own mean stress hides it.
func residual(law creeplaw.Law, out *integrate.Result, old *integrate.State, inc integrate.Increment) (float64, bool) {
	const smallest = 1e-270
	mises := out.Stress.Mises()
	if !(out.CreepStep > smallest) || mises < 1e-13*3*shear*inc.Strain.EquivalentStrain() {
		return 0, out.CreepStep > smallest && !out.Stress.IsFinite()
	}
	l := creeplaw.Log(law).LogRate(creeplaw.Point{Stress: mises, Strain: old.Equivalent + out.CreepStep,
		Temperature: inc.Temperature})
	return math.Abs(math.Log(out.CreepStep) - math.Log(inc.Dt) - l.Value), true
}

// TestStepKeepsWhatItMust holds random steps against what mechanics demands whatever the law: creep keeps the volume, it
// dissipates, it never overshoots zero stress, and turning the strain turns the result.
func TestStepKeepsWhatItMust(t *testing.T) {
	s := newSource(99)
	kinds := lawKinds()
	for range 2000 {
		kind := kinds[s.IntN(len(kinds))]
		law, err := kind.draw(s)
		require.NoError(t, err)
		m := material(t, law)
		old := integrate.State{Creep: s.deviator().Scale(s.decades(-6, -2)), Equivalent: s.decades(-6, -1)}
		elastic := s.deviator().Scale(s.decades(-5, -2)).Add(tensor.Identity().Scale(s.uniform(-1e-3, 1e-3)))
		inc := integrate.Increment{Dt: s.decades(-6, 8), Temperature: 800, Strain: old.Creep.Add(elastic)}
		var out, turned integrate.Result
		require.NoError(t, m.Step(&out, &old, inc))

		step := out.State.Creep.Sub(old.Creep)
		size := old.Creep.Norm() + elastic.Norm()
		require.LessOrEqual(t, math.Abs(step.Trace()), 8*0x1p-52*size, "%s: volume, rounding of the strains", kind.name)
		require.GreaterOrEqual(t, out.Stress.Dot(step), -1e-14*out.Stress.Norm()*size, "%s: dissipation", kind.name)
		require.LessOrEqual(t, out.CreepStep, elastic.EquivalentStrain()*(1+1e-12), "%s: no overshoot", kind.name)

		q, err := tensor.AxisAngle([3]float64{s.NormFloat64(), s.NormFloat64(), s.NormFloat64()}, s.uniform(0, 3))
		require.NoError(t, err)
		oldTurned := integrate.State{Creep: old.Creep.Rotate(q), Equivalent: old.Equivalent}
		inc.Strain = inc.Strain.Rotate(q)
		require.NoError(t, m.Step(&turned, &oldTurned, inc))
		want := out.Stress.Rotate(q)
		// The trial strain is a difference of strains up to size/elastic larger than itself, and n ≤ 250 amplifies.
		scale := 2 * shear * size
		require.LessOrEqual(t, turned.Stress.Sub(want).Norm(), 1e-11*scale, "%s: objectivity", kind.name)
	}
}
