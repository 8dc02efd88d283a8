package program_test

import (
	"context"
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/program"
	"example.com/holdtime/tensor"
)

// explicitNorton is a routine somebody else might have: Norton creep, forward Euler, in its own state (the creep strain).
func explicitNorton(creep tensor.Sym, from integrate.Conditions, inc integrate.Increment) (tensor.Sym, tensor.Sym, error) {
	stress := func(strain tensor.Sym) tensor.Sym {
		e := strain.Sub(creep)
		return e.Deviator().Scale(young / (1 + poisson)).Add(tensor.Identity().Scale(young / (3 * (1 - 2*poisson)) * e.Trace()))
	}
	s := stress(from.Strain).Deviator()
	if mises := s.Mises(); mises > 0 {
		creep = creep.Add(s.Scale(1.5 * inc.Dt * 1e-16 * math.Pow(mises, 4)))
	}
	return stress(inc.Strain), creep, nil
}

func compared(t *testing.T, steps int, routine program.Routine[tensor.Sym]) (worst float64, count int, err error) {
	t.Helper()
	m := material(t, must(creeplaw.NewNorton(1e-16, 5))(t))
	run := program.Start(context.Background(), m, of(bar("pull", program.Ramp(0, 1.2e-3), 10), bar("hold", program.Reached(), 90)),
		program.Options{Tolerance: integrate.Tolerance{Relative: 1e-7}})
	for c, e := range program.Compare(run, tensor.Sym{}, routine, steps) {
		if e != nil {
			return worst, count, e
		}
		worst, count = math.Max(worst, c.Error), count+1
	}
	return worst, count, nil
}

// TestCompareShowsTheOrderOfARoutine: a right routine of first order comes nearer in proportion to its steps, a wrong one does
// not come near at all.
func TestCompareShowsTheOrderOfARoutine(t *testing.T) {
	coarse, count, err := compared(t, 4, explicitNorton)
	require.NoError(t, err)
	fine, _, err := compared(t, 8, explicitNorton)
	require.NoError(t, err)
	require.Greater(t, count, 20)
	require.Greater(t, coarse, 1e-6)
	check.Rel(t, "first order: halving the steps halves the error, to the next order", coarse/fine, 2, 0.1)

	wrong := func(creep tensor.Sym, from integrate.Conditions, inc integrate.Increment) (tensor.Sym, tensor.Sym, error) {
		inc.Dt *= 1.1
		return explicitNorton(creep, from, inc)
	}
	off, _, err := compared(t, 64, wrong)
	require.NoError(t, err)
	require.Greater(t, off, 1e-2)

	failure := errors.New("no")
	_, _, err = compared(t, 1, func(c tensor.Sym, _ integrate.Conditions, _ integrate.Increment) (tensor.Sym, tensor.Sym, error) {
		return tensor.Sym{}, c, failure
	})
	require.ErrorIs(t, err, failure)
	_, _, err = compared(t, 0, explicitNorton)
	var e *program.SetupError
	require.ErrorAs(t, err, &e)
}
