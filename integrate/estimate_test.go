package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// held is the deviatoric hold of published-values 1.5 (Norton, von Mises; closed form derived and checked there):
// σₑ^(1-n) = σₑ₀^(1-n) + 3(n-1) G A t.
func held(mises, a, n, time float64) float64 {
	return math.Pow(math.Pow(mises, 1-n)+3*(n-1)*shear*a*time, 1/(1-n))
}

// TestEstimateIsTheError holds the estimate against the true error of the step, known from the closed form.
func TestEstimateIsTheError(t *testing.T) {
	const a, n, mises = 1e-16, 5.0, 200.0
	law, err := creeplaw.NewNorton(a, n)
	require.NoError(t, err)
	m := material(t, law)
	strain := tensor.Sym{1, -1, 0, 0.3, 0, 0.4}
	strain = strain.Scale(mises / (3 * shear) / strain.EquivalentStrain())
	for _, dt := range []float64{1, 2, 4} { // D = 3 G Δt A σⁿ⁻¹ = 0.03 … 0.12
		var out integrate.Result
		inc := integrate.Increment{Dt: dt, Strain: strain, Temperature: 800}
		e, err := m.EstimateStep(&out, &integrate.State{}, integrate.Conditions{Strain: strain, Temperature: 800}, inc, 1e-4)
		require.NoError(t, err)
		truth := (out.Stress.Mises() - held(mises, a, n, dt)) / mises
		// Step doubling neglects the next order, a relative n·D of the error: 30 % at the largest step here.
		check.Rel(t, "relative error", e.Relative, truth, 0.35)
		check.Rel(t, "stress error", e.Stress.Mises(), e.Relative*mises, 1e-9)
		check.Rel(t, "creep error against stress error", 3*shear*e.Creep, e.Stress.Mises(), 1e-9) // σ = C:(ε-εc)

		var single integrate.Result
		require.NoError(t, m.Step(&single, &integrate.State{}, inc))
		require.Equal(t, single, out, "the result is that of the single step")

		// Asked again at the length it suggests, as an adaptive host does, it settles on a step that keeps the tolerance
		// and does not waste more than half of it. The suggestion keeps a margin of 0.8² = 0.64.
		const tolerance = 1e-4
		inc.Dt = e.Dt
		e, err = m.EstimateStep(&out, &integrate.State{}, integrate.Conditions{Strain: strain, Temperature: 800}, inc, tolerance)
		require.NoError(t, err)
		achieved := math.Abs(held(mises, a, n, e.Dt)-mustStep(t, m, strain, e.Dt).Stress.Mises()) / mises
		require.LessOrEqual(t, achieved, tolerance)
		require.GreaterOrEqual(t, achieved, tolerance/2)
	}
}

func mustStep(t *testing.T, m *integrate.Material, strain tensor.Sym, dt float64) integrate.Result {
	t.Helper()
	var out integrate.Result
	require.NoError(t, m.Step(&out, &integrate.State{}, integrate.Increment{Dt: dt, Strain: strain, Temperature: 800}))
	return out
}

func TestEstimateFollowsTheLoad(t *testing.T) {
	law, err := creeplaw.NewBaileyNorton(1e-14, 5, 0.4)
	require.NoError(t, err)
	m := material(t, law)
	strain := tensor.Sym{1e-3, -1e-3, 0, 0, 0, 0}
	var out integrate.Result
	e, err := m.EstimateStep(&out, &integrate.State{}, integrate.Conditions{Temperature: 800},
		integrate.Increment{Dt: 0, Strain: strain, Temperature: 800}, 1e-3)
	require.NoError(t, err)
	require.Zero(t, e.Relative, "an elastic step has no error")

	// From zero strain, with the infinite initial rate: the estimate falls with the step.
	last := math.Inf(1)
	for _, dt := range []float64{100, 10, 1, 0.1} {
		e, err := m.EstimateStep(&out, &integrate.State{}, integrate.Conditions{Strain: strain, Temperature: 800},
			integrate.Increment{Dt: dt, Strain: strain, Temperature: 800}, 1e-3)
		require.NoError(t, err)
		require.Less(t, e.Relative, last)
		require.Greater(t, e.Relative, 0.0)
		last = e.Relative
	}
}

func TestEstimateRefuses(t *testing.T) {
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := material(t, law)
	good := integrate.Increment{Dt: 1, Strain: tensor.Sym{1e-3}, Temperature: 800}
	bad := func(change func(*integrate.Conditions, *integrate.Increment, *float64)) error {
		start, inc, tolerance := integrate.Conditions{Temperature: 800}, good, 1e-3
		change(&start, &inc, &tolerance)
		out := integrate.Result{CreepStep: 42}
		e, err := m.EstimateStep(&out, &integrate.State{}, start, inc, tolerance)
		require.Equal(t, integrate.Result{CreepStep: 42}, out)
		require.Zero(t, e)
		return err
	}
	nan := math.NaN()
	for name, change := range map[string]func(*integrate.Conditions, *integrate.Increment, *float64){
		"tolerance 0":       func(_ *integrate.Conditions, _ *integrate.Increment, x *float64) { *x = 0 },
		"tolerance NaN":     func(_ *integrate.Conditions, _ *integrate.Increment, x *float64) { *x = nan },
		"start temperature": func(c *integrate.Conditions, _ *integrate.Increment, _ *float64) { c.Temperature = 0 },
		"start strain":      func(c *integrate.Conditions, _ *integrate.Increment, _ *float64) { c.Strain[2] = nan },
		"end strain":        func(_ *integrate.Conditions, i *integrate.Increment, _ *float64) { i.Strain[2] = nan },
		"time step":         func(_ *integrate.Conditions, i *integrate.Increment, _ *float64) { i.Dt = -1 },
	} {
		require.ErrorIs(t, bad(change), integrate.BadIncrement, name)
	}
}
