package integrate_test

import (
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// drawEvolving draws steps of a law with an internal variable and the greatest principal stress, some beyond rupture.
func drawEvolving(t *testing.T, stream uint64, count int) []drawn {
	t.Helper()
	s := newSource(stream)
	steps := make([]drawn, count)
	for i := range steps {
		law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{
			Prefactor: 1e-6, StressExponent: s.uniform(1, 12), ReferenceStress: 100,
			DamagePrefactor: s.decades(-8, -4), DamageStressExponent: s.uniform(1, 10), DamageExponent: s.uniform(0, 12),
			RuptureStress: creeplaw.RuptureStress{Principal: float64(i%3) * 0.4},
		})
		require.NoError(t, err)
		m, _ := warm(t, law)
		old := integrate.State{Creep: s.deviator().Scale(1e-3), Equivalent: s.decades(-6, -1)}
		old.Internal[0] = s.uniform(0, 0.9)
		steps[i] = drawn{m, old, integrate.Increment{Dt: s.decades(-4, 4), Temperature: s.uniform(320, 1090),
			Strain: s.deviator().Scale(s.decades(-5, -2.5))}}
	}
	return steps
}

// TestStressIsStep: Stress gives the bits of Step's stress and state and refuses what Step refuses, for the same reason, with
// nothing written.
func TestStressIsStep(t *testing.T) {
	steps := append(drawSteps(t, 41, 800), drawEvolving(t, 42, 800)...)
	for _, f := range failures(t) {
		steps = append(steps, f)
	}
	elastic := drawEvolving(t, 43, 2)
	for _, d := range append(elastic, drawSteps(t, 44, 2)...) {
		d.inc.Dt = 0
		steps = append(steps, d)
	}
	refused := map[error]int{}
	for _, d := range steps {
		junk := junkResult()
		stress, end, before := junk.Stress, junk.State, d.old
		want := junk
		wantErr := d.material.Step(&want, &d.old, d.inc)
		err := d.material.Stress(&stress, &end, &d.old, d.inc)
		require.Equal(t, wantErr, err)
		require.Equal(t, before, d.old, "the start state was written")
		if err != nil {
			refused[err]++
			require.True(t, sameJunk(stress, end), "written although refused: %v %v", stress, end)
			continue
		}
		require.Equal(t, want.Stress, stress)
		require.Equal(t, want.State, end)
		require.NoError(t, d.material.Stress(&stress, &d.old, &d.old, d.inc))
		require.Equal(t, want.State, d.old, "in place")
		require.Equal(t, want.Stress, stress, "in place")
	}
	t.Log("refused:", refused)
	require.Len(t, refused, 6, "every code is met")
}

// sameJunk reports whether all is still NaN.
func sameJunk(stress tensor.Sym, end integrate.State) bool {
	all := append(stress[:], end.Creep[:]...)
	for _, v := range append(all, end.Equivalent) {
		if v == v {
			return false
		}
	}
	return true
}

func TestStressAllocatesNothing(t *testing.T) {
	var stress tensor.Sym
	var end integrate.State
	steps := append(drawSteps(t, 45, 8), drawEvolving(t, 46, 8)...)
	for _, f := range failures(t) {
		steps = append(steps, f)
	}
	for _, d := range steps {
		require.Zero(t, testing.AllocsPerRun(20, func() { _ = d.material.Stress(&stress, &end, &d.old, d.inc) }))
	}
}
