package integrate_test

import (
	"math"
	"sync"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// drawn is a random but repeatable step.
type drawn struct {
	material *integrate.Material
	old      integrate.State
	inc      integrate.Increment
}

func drawSteps(t *testing.T, stream uint64, count int) []drawn {
	t.Helper()
	s := newSource(stream)
	kinds := lawKinds()
	steps := make([]drawn, count)
	for i := range steps {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		m, _ := warm(t, law)
		steps[i] = drawn{m, integrate.State{Creep: s.deviator().Scale(1e-3), Equivalent: s.decades(-6, -1)},
			integrate.Increment{Dt: s.decades(-4, 6), Temperature: s.uniform(320, 1090),
				Strain: s.deviator().Scale(s.decades(-5, -2))}}
	}
	return steps
}

// TestSameBits: the same input gives the same bits, twice, into a destination full of junk, in place, and from any number of
// goroutines sharing the materials.
func TestSameBits(t *testing.T) {
	steps := drawSteps(t, 11, 400)
	want := make([]integrate.Result, len(steps))
	for i, d := range steps {
		require.NoError(t, d.material.Step(&want[i], &d.old, d.inc))

		junk := junkResult()
		old := d.old
		require.NoError(t, d.material.Step(&junk, &old, d.inc))
		require.Equal(t, want[i], junk, "junk in the destination shows")
		require.Equal(t, d.old, old, "the start state was written")

		var inPlace integrate.Result
		inPlace.State = d.old
		require.NoError(t, d.material.Step(&inPlace, &inPlace.State, d.inc))
		require.Equal(t, want[i], inPlace, "a start state that is &out.State")
	}
	for _, workers := range []int{2, 3, 8} {
		got := make([]integrate.Result, len(steps))
		var wait sync.WaitGroup
		for w := range workers {
			wait.Go(func() {
				for i := w; i < len(steps); i += workers {
					if err := steps[i].material.Step(&got[i], &steps[i].old, steps[i].inc); err != nil {
						t.Error(err)
					}
				}
			})
		}
		wait.Wait()
		require.Equal(t, want, got, "%d goroutines", workers)
	}
}

func junkResult() integrate.Result {
	nan := math.NaN()
	r := integrate.Result{CreepStep: nan, Iterations: -7, Residual: nan}
	for i := range r.Stress {
		r.Stress[i], r.ByTemperature[i], r.State.Creep[i] = nan, math.Inf(1), nan
		for j := range r.Tangent {
			r.Tangent[i][j] = nan
		}
	}
	r.State.Equivalent = nan
	return r
}

// TestUnitsDoNotMatter takes the same steps in (MPa, h) and in (Pa, s). No absolute epsilon may hide anywhere: results must
// agree to rounding, and the solve must take the same way.
//
// Tolerance: the stress to 8 ulp of the trial stress. The creep strain of the step is the exponential of a logarithm: it
// carries the rounding of the stress to the power of its exponent and that of each logarithm that is summed, up to an ulp of
// |ln u|, of |ln ṗ Δt| and of n/m·|ln σ/σ₀| in either set of units. The number of iterations may differ by the last,
// negligible one where a test against rounding falls on either side.
func TestUnitsDoNotMatter(t *testing.T) {
	s := newSource(12)
	var stressUlps, differ int
	creepShare := 0.0
	const count = 4000
	for range count {
		n, m := s.uniform(1, 20), s.uniform(0.3, 1)
		mpa, pa := bothUnits(t, s.IntN(3), n, m, s.decades(-8, -4), s.decades(-2.5, -1))
		old := integrate.State{Equivalent: s.decades(-6, -2)}
		inc := integrate.Increment{Dt: s.decades(-2, 5), Temperature: 800, Strain: s.deviator().Scale(s.decades(-5, -2.5))}
		incSeconds := inc
		incSeconds.Dt *= 3600
		var a, b integrate.Result
		require.NoError(t, mpa.Step(&a, &old, inc))
		require.NoError(t, pa.Step(&b, &old, incSeconds))
		if a.Iterations != b.Iterations {
			differ++
		}
		elastic := inc.Strain.EquivalentStrain()
		ulp := 0x1p-52 * 3 * shear * elastic
		worst := largest(a.Stress.Sub(b.Stress.Scale(1e-6)))
		require.LessOrEqual(t, worst, 8*ulp, "stress")
		stressUlps = max(stressUlps, int(math.Ceil(worst/ulp)))

		logs := math.Abs(math.Log(a.CreepStep/elastic)) + (n/m)*(1+math.Abs(math.Log(3*shear*elastic/100))) + 10
		check.Rel(t, "creep strain of the step", b.CreepStep, a.CreepStep, 4*0x1p-52*logs)
		creepShare = math.Max(creepShare, math.Abs(b.CreepStep/a.CreepStep-1)/(4*0x1p-52*logs))
	}
	t.Logf("worst: stress %d ulp of the trial stress, creep step %.2f of what its logarithms allow; iterations differ in %d of %d",
		stressUlps, creepShare, differ, count)
	require.LessOrEqual(t, differ, count/100)
}

// bothUnits builds one material in (MPa, h) and in (Pa, s).
func bothUnits(t *testing.T, kind int, n, m, rate, coefficient float64) (mpa, pa *integrate.Material) {
	t.Helper()
	build := func(stress, time float64) *integrate.Material {
		var law creeplaw.Law
		var err error
		switch kind {
		case 0:
			law, err = creeplaw.NewNortonAt(rate/time, 100*stress, n)
		case 1:
			law, err = creeplaw.NewGarofalo(rate/time, coefficient/stress, 1+n/5)
		default:
			law, err = creeplaw.NewBaileyNortonAt(1e-3, 100*stress, 100*time, n, m)
		}
		require.NoError(t, err)
		mat, err := integrate.New(integrate.NewIsotropic(young*stress, poisson), law, integrate.Options{})
		require.NoError(t, err)
		return mat
	}
	return build(1, 1), build(1e6, 3600)
}

// TestStepAllocatesNothing includes every failure path.
func TestStepAllocatesNothing(t *testing.T) {
	steps := drawSteps(t, 13, 16)
	var out integrate.Result
	for _, d := range steps {
		require.Zero(t, testing.AllocsPerRun(20, func() { _ = d.material.Step(&out, &d.old, d.inc) }))
		start := integrate.Conditions{Temperature: 800}
		require.Zero(t, testing.AllocsPerRun(20, func() { _, _ = d.material.EstimateStep(&out, &d.old, start, d.inc, 1e-3) }))
	}
	for name, f := range failures(t) {
		require.Zero(t, testing.AllocsPerRun(20, func() { _ = f.material.Step(&out, &f.old, f.inc) }), name)
	}
	packed := make([]float64, steps[0].material.StateLength())
	require.Zero(t, testing.AllocsPerRun(20, func() {
		steps[0].material.PackState(packed, &steps[0].old)
		steps[0].material.UnpackState(&out.State, packed)
	}))
}

// failures is one step for every code that can be provoked through the public interface.
func failures(t *testing.T) map[string]drawn {
	t.Helper()
	good, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m, _ := warm(t, good)
	strain := tensor.Sym{1e-3, -1e-3, 0, 0, 0, 0}
	inc := integrate.Increment{Dt: 1, Strain: strain, Temperature: 800}
	lawless := material(t, creeplaw.RateFunc(func(creeplaw.Point) creeplaw.Rate {
		return creeplaw.Rate{Value: math.NaN()}
	}))
	jump := material(t, creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate { // no root: the rate jumps past it
		if p.Stress > 100 {
			return creeplaw.Rate{Value: 1e9}
		}
		return creeplaw.Rate{Value: 1e-30}
	}))
	softening := material(t, creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		v := 1e-7 * math.Exp(1e6*p.Strain)
		return creeplaw.Rate{Value: v, ByStrain: 1e6 * v}
	}))
	hot, cold := inc, inc
	hot.Temperature, cold.Temperature = 2000, -1
	long := inc
	long.Dt = 10
	return map[string]drawn{
		"BadIncrement":  {m, integrate.State{}, cold},
		"BadState":      {m, integrate.State{Equivalent: -1}, inc},
		"OutsideTable":  {m, integrate.State{}, hot},
		"LawUndefined":  {lawless, integrate.State{}, inc},
		"NoConvergence": {jump, integrate.State{}, inc},
		"BeyondRupture": {softening, integrate.State{}, long},
	}
}
