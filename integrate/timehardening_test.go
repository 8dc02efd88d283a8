package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

func timeHardening(t *testing.T, a, n, m float64) *integrate.TimeHardening {
	t.Helper()
	c, err := curve.NewBaileyNorton(a, n, m)
	require.NoError(t, err)
	clocked, err := curve.NewTimeHardened(c)
	require.NoError(t, err)
	h, err := integrate.NewTimeHardening(integrate.NewIsotropic(150e3, 0.3), clocked, integrate.Options{})
	require.NoError(t, err)
	return h
}

// TestTimeHardeningTwoSteps: ε = A Σ σiⁿ (tiᵐ - t(i-1)ᵐ), published-values 1.17 (2.393674373e-3 and 3.542412574e-3): exact in
// one step per stress, from time zero.
func TestTimeHardeningTwoSteps(t *testing.T) {
	h := timeHardening(t, 1e-12, 4, 0.4)
	for _, c := range []struct{ first, second, strain float64 }{{100, 150, 2.393674373e-3}, {150, 100, 3.542412574e-3}} {
		var out integrate.MixedResult
		for _, s := range []struct{ stress, start, end float64 }{{c.first, 0, 100}, {c.second, 100, 300}} {
			require.NoError(t, h.StepMixed(&out, &out.State, s.start, integrate.MixedIncrement{
				Control: integrate.StressControl(), Dt: s.end - s.start, Prescribed: tensor.Sym{s.stress}, Temperature: 800}))
		}
		check.Rel(t, "creep strain", out.State.Equivalent, c.strain, 1e-9) // ten printed digits
	}
}

// TestTimeHardeningForgetsNoClock: the same load after an unloaded wait creeps less by the clock, and the same by strain
// hardening (common practice).
func TestTimeHardeningForgetsNoClock(t *testing.T) {
	hold := integrate.MixedIncrement{Control: integrate.StressControl(), Dt: 100, Prescribed: tensor.Sym{100}, Temperature: 800}
	after := func(wait float64) float64 {
		h := timeHardening(t, 1e-12, 4, 0.4)
		var out integrate.MixedResult
		idle := hold
		idle.Dt, idle.Prescribed = wait, tensor.Sym{}
		require.NoError(t, h.StepMixed(&out, &out.State, 0, idle))
		require.NoError(t, h.StepMixed(&out, &out.State, wait, hold))
		return out.State.Equivalent
	}
	check.Rel(t, "no wait", after(0), 1e-4*math.Pow(100, 0.4), 1e-12)
	check.Rel(t, "after a wait", after(1000), 1e-4*(math.Pow(1100, 0.4)-math.Pow(1000, 0.4)), 1e-12)
}

func TestTimeHardeningIsAskedForByName(t *testing.T) {
	clocked, err := curve.NewTimeHardened(mustCurve(t))
	require.NoError(t, err)
	_, err = integrate.New(integrate.NewIsotropic(150e3, 0.3), creeplaw.During{Clocked: clocked, End: 1}, integrate.Options{})
	var e *integrate.MaterialError
	require.ErrorAs(t, err, &e)
	require.Contains(t, err.Error(), "NewTimeHardening")
	_, err = integrate.NewTimeHardening(integrate.NewIsotropic(150e3, 0.3), nil, integrate.Options{})
	require.ErrorAs(t, err, &e)

	h := timeHardening(t, 1e-12, 4, 0.4)
	inc := integrate.Increment{Dt: 1, Strain: tensor.Sym{1e-3}, Temperature: 800}
	out := integrate.Result{CreepStep: 42}
	for _, clock := range []float64{-1, math.NaN(), math.Inf(1)} {
		require.Equal(t, integrate.BadIncrement, h.Step(&out, &integrate.State{}, clock, inc))
		require.Equal(t, integrate.Result{CreepStep: 42}, out)
	}
	require.Zero(t, testing.AllocsPerRun(10, func() { _ = h.Step(&out, &integrate.State{}, 5, inc) }))
}

func mustCurve(t *testing.T) curve.Curve {
	t.Helper()
	c, err := curve.NewBaileyNorton(1e-12, 4, 0.4)
	require.NoError(t, err)
	return c
}
