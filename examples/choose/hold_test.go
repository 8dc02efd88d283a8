package main

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

var bench = conditions{stress: 100, temperature: commonTemperature, horizon: 1e4}

func end(c course) sample { return c.samples[len(c.samples)-1] }

// TestCreepCurvesAgainstClosedForms: what the pictures show is right. Tolerances: the last stride of the quadrature is straight, a
// few parts in 10⁴ of the strain at the most; the steps of the laws with variables are held to 1e-6 each.
func TestCreepCurvesAgainstClosedForms(t *testing.T) {
	const quadrature, steps = 2e-4, 1e-4
	for _, c := range []struct {
		name      string
		law       built
		want, tol float64
	}{
		{"Norton 1929: A σⁿ t", plain(creeplaw.NewNortonAt(1e-6, 100, 5)), 1e-2, quadrature},
		{"Bailey 1935, Norton 1929: A σⁿ tᵐ", plain(creeplaw.NewBaileyNortonAt(0.01, 100, 1e4, 4, 0.4)), 1e-2, quadrature},
		{"Phillips 1905: α ln(1 + γ t)", hardened(curve.NewLogarithmicCreep(power(2e-3, 2), power(1e-3, 3))), 2e-3 * math.Log(11), quadrature},
		{"Andrade 1910: β t^(1/3) + κ t", hardened(curve.NewAndrade(power(1e-4, 4), power(1e-7, 6))), 1e-4*math.Cbrt(1e4) + 1e-3, quadrature},
		{"saturating: c (1 - e^(-rt))", hardened(curve.NewSum(curve.Saturating(power(1e-2, 2), power(1e-3, 3)))), 1e-2 * -math.Expm1(-10),
			quadrature},
		{"Prager 1995: -ln(1 - Ω ε̇₀ t)/Ω", plain(omega()), -math.Log1p(-50*7.87e-7*1e4) / 50, quadrature},
		{"Kachanov 1958: λ A t_r [1 - (1-t/t_r)^(1/λ)]", plain(kachanov()), 3.5 * 1e-6 * 2e4 * (1 - math.Pow(0.5, 1/3.5)), steps},
		{"time hardening, exact for a curve: A σⁿ tᵐ", clocked(bailey()), 1e-2, 1e-10},
	} {
		require.NoError(t, c.law.err)
		course := hold(c.law, bench)
		require.False(t, course.ruptured || course.stopped, c.name)
		last := end(course)
		check.Rel(t, c.name+", time", last.time, bench.horizon, 1e-12)
		check.Rel(t, c.name, last.strain, c.want, c.tol)
		for i, s := range course.samples[1:] {
			require.True(t, s.time > course.samples[i].time && s.strain >= course.samples[i].strain, "%s: sample %d", c.name, i)
		}
	}
}

// kachanov has the life 20 000 h at 100 MPa and λ = 3.5.
func kachanov() (creeplaw.KachanovRabotnov, error) {
	return creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: 5,
		DamagePrefactor: 1.0 / 7 / 2e4, DamageStressExponent: 4, DamageExponent: 6, ReferenceStress: 100})
}

// TestRupture: the curve ends where the closed form says the life does (Kachanov 1958; Prager 1995).
func TestRupture(t *testing.T) {
	long := bench
	long.horizon = 1e5
	c := hold(plain(kachanov()), long)
	require.True(t, c.ruptured)
	check.Rel(t, "life of Kachanov–Rabotnov", end(c).time, 2e4, 1e-4)
	c = hold(plain(omega()), long)
	require.True(t, c.ruptured)
	check.Rel(t, "life of Omega", end(c).time, 1/(50*7.87e-7), 1e-4) // up to half a strain
}

// TestUndefinedLaw: a curve stops where its law does.
func TestUndefinedLaw(t *testing.T) {
	c := hold(built{law: creeplaw.ValueFunc(func(p creeplaw.Point) float64 {
		if p.Strain > 0.005 {
			return math.NaN()
		}
		return 1e-6
	})}, bench)
	require.True(t, c.stopped)
	check.Rel(t, "strain where it stops", end(c).strain, 0.005, 0.02) // a stride
}

// TestOneSteel: what is said of the invented steel is so: about one per cent at 100 MPa and 600 °C after 10 000 h.
func TestOneSteel(t *testing.T) {
	for _, x := range invented() {
		require.NoError(t, x.err, x.name)
		check.Rel(t, x.name, end(hold(x.built, bench)).strain, commonStrain, 0.1)
	}
}
