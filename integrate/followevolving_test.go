package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// evolvingLaws are laws with internal variables, one of each kind, with invented parameters in MPa and h.
func evolvingLaws(t *testing.T) map[string]creeplaw.Law {
	t.Helper()
	multiaxial := creeplaw.RuptureStress{Principal: 0.3, Mean: 0.1}
	factor, err := creeplaw.NewArrheniusAt(3e5, 850)
	require.NoError(t, err)
	damage, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6, RuptureStress: multiaxial, CreepTemperature: factor})
	require.NoError(t, err)
	liu, err := creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6})
	require.NoError(t, err)
	cavitation, err := creeplaw.NewPerrinHayhurst(creeplaw.CavitationParameters{Prefactor: 2e-9, StressCoefficient: 0.05,
		Hardening: 24000, HardeningSaturation: 0.6, Ageing: 1e-4, Cavitation: 2, TriaxialityExponent: 2.8})
	require.NoError(t, err)
	anand, err := creeplaw.NewAnand(creeplaw.AnandParameters{InitialResistance: 150, ActivationEnergy: 1.5e5, Prefactor: 1,
		StressMultiplier: 3, RateSensitivity: 0.25, Hardening: 3000, SaturationCoefficient: 300, SaturationExponent: 0.02,
		HardeningExponent: 1.4})
	require.NoError(t, err)
	return map[string]creeplaw.Law{"Kachanov–Rabotnov": damage, "Liu–Murakami": liu, "Perrin–Hayhurst": cavitation,
		"Anand": anand}
}

// TestFollowWithInternalVariables: along a path that turns and warms, the walk ends where backward-Euler steps, extrapolated,
// do, and its derivatives are those of the walk.
func TestFollowWithInternalVariables(t *testing.T) {
	for name, law := range evolvingLaws(t) {
		m, free := warm(t, law)
		old := integrate.State{}
		start := integrate.Conditions{Temperature: 860}
		start.Strain = tensor.Sym{8e-4, -2e-4, -3e-4, 2e-4}.Add(tensor.Identity().Scale(free(860)))
		inc := integrate.Increment{Dt: 300, Temperature: 840}
		inc.Strain = tensor.Sym{1e-3, 4e-4, -7e-4, -3e-4, 3e-4}.Add(tensor.Identity().Scale(free(840)))
		fine := func(steps int) (tensor.Sym, integrate.State) {
			var out integrate.Result
			for k := 1; k <= steps; k++ {
				part := float64(k) / float64(steps)
				require.NoError(t, m.Step(&out, &out.State, integrate.Increment{Dt: inc.Dt / float64(steps),
					Strain:      start.Strain.Add(inc.Strain.Sub(start.Strain).Scale(part)),
					Temperature: start.Temperature + part*(inc.Temperature-start.Temperature)}), name)
			}
			return out.Stress, out.State
		}
		// Romberg over backward Euler with 500 to 8000 steps: its errors run in whole powers of the step.
		rows := make([][]float64, 5)
		for i := range rows {
			stress, state := fine(500 << i)
			rows[i] = append(stress[:], state.Internal[0])
		}
		best, _ := romberg(rows)
		exact, damage := tensor.Sym(best[:6]), best[6]
		for _, tolerance := range []float64{1e-4, 1e-6, 1e-8} {
			var out integrate.Result
			course, err := m.Follow(&out, &old, start, inc, integrate.Tolerance{Relative: tolerance}, 0)
			require.NoError(t, err, name)
			achieved := out.Stress.Sub(exact).Norm() / exact.Deviator().Norm()
			v := m.Variables()[0]
			unit := math.Abs(v.Limit - v.Initial)
			if math.IsInf(unit, 1) {
				unit = v.Initial
			}
			variable := math.Abs(out.State.Internal[0]-damage) / math.Max(math.Abs(damage), 0.1*unit)
			t.Logf("%s, tolerance %.0e: error of the stress %.1e, of the variable %.1e, %d steps", name, tolerance, achieved, variable,
				course.Steps)
			require.LessOrEqual(t, achieved, 3*tolerance+1e-9) // the extrapolation is good to about 1e-10
			require.LessOrEqual(t, variable, 3*tolerance+1e-9, name)

			var stress tensor.Sym
			var end integrate.State
			light, err := m.FollowStress(&stress, &end, &old, start, inc, integrate.Tolerance{Relative: tolerance}, 0)
			require.NoError(t, err)
			require.Equal(t, out.Stress, stress)
			require.Equal(t, out.State, end)
			require.Equal(t, course, light)
		}
		require.Zero(t, testing.AllocsPerRun(5, func() {
			var out integrate.Result
			_, _ = m.Follow(&out, &old, start, inc, integrate.Tolerance{Relative: 1e-4}, 0)
		}), name)
		followsItsTangent(t, name, m, old, start, inc)
	}
}

// followsItsTangent holds the derivatives against differences of walks of the same two steps.
func followsItsTangent(t *testing.T, name string, m *integrate.Material, old integrate.State, start integrate.Conditions,
	inc integrate.Increment) {
	t.Helper()
	old.Internal[0] = 0.1
	inc.Dt = 30
	walk := func(inc integrate.Increment) integrate.Result {
		var out integrate.Result
		c, err := m.Follow(&out, &old, start, inc, integrate.Tolerance{Relative: 0.1, Stress: 1e9, Creep: 1e9}, inc.Dt/3)
		require.NoError(t, err, name)
		require.Equal(t, [2]int{2, 0}, [2]int{c.Steps, c.Rejected}, name)
		return out
	}
	out := walk(inc)
	for j := range 6 {
		var unit tensor.Sym
		unit[j] = 1
		d, _ := gap(func(x float64) tensor.Sym {
			moved := inc
			moved.Strain[j] += x
			return walk(moved).Stress
		}, 1e-3, out.Tangent.Contract(unit))
		// Relative to an elastic tangent; rounding of a stress with its mean, and of the step's own solve.
		require.LessOrEqual(t, d, 1e-7*2*shear, "%s, column %d", name, j)
	}
	d, _ := gap(func(x float64) tensor.Sym {
		moved := inc
		moved.Temperature += x
		return walk(moved).Stress
	}, 8, out.ByTemperature)
	require.LessOrEqual(t, d, 1e-7*largest(out.ByTemperature), "%s by temperature", name)
}
