package bench_test

import (
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
)

// damageCases are laws with internal variables over the same mix, from the variables given. The stiffest points relax almost
// all of their stress; the parameters are of the size of a low-alloy steel in MPa and h and of solder in MPa and s, as the
// reference values have them from memory, and leave every point short of rupture.
func damageCases(t testing.TB) []speedCase {
	t.Helper()
	steel := creeplaw.KachanovRabotnovParameters{Prefactor: 6.599e-16, StressExponent: 6.108, DamagePrefactor: 5.998e-14,
		DamageStressExponent: 5.767, DamageExponent: 4.5}
	damage, err := creeplaw.NewKachanovRabotnov(steel)
	require.NoError(t, err)
	steel.RuptureStress.Principal = 0.3
	multiaxial, err := creeplaw.NewKachanovRabotnov(steel)
	require.NoError(t, err)
	cavitation, err := creeplaw.NewPerrinHayhurst(creeplaw.CavitationParameters{Prefactor: 2.1618e-9, StressCoefficient: 0.05,
		Hardening: 24326, HardeningSaturation: 0.5929, Ageing: 9.2273e-5, Cavitation: 1.8537})
	require.NoError(t, err)
	solder, err := creeplaw.NewAnand(creeplaw.AnandParameters{InitialResistance: 42.32, ActivationEnergy: 11262 * creeplaw.GasConstant,
		Prefactor: 2.30e7, StressMultiplier: 11, RateSensitivity: 0.303, Hardening: 4121.31, SaturationCoefficient: 80.79,
		SaturationExponent: 0.0212, HardeningExponent: 1.38})
	require.NoError(t, err)
	cases := []struct {
		name  string
		law   creeplaw.Logarithmic
		start [creeplaw.MaxVariables]float64
	}{
		{"KachanovRabotnovVirgin", damage, [creeplaw.MaxVariables]float64{}},
		{"KachanovRabotnovDamaged", damage, [creeplaw.MaxVariables]float64{0.3}},
		{"KachanovRabotnovPrincipal", multiaxial, [creeplaw.MaxVariables]float64{0.1}},
		{"PerrinHayhurst", cavitation, [creeplaw.MaxVariables]float64{0.5, 0.1, 0.05}},
		{"Anand", solder, [creeplaw.MaxVariables]float64{10}},
	}
	var out []speedCase
	for _, c := range cases {
		s := speedCase{name: c.name, law: c.law, from: hardened, points: mix(c.law, hardened)}
		s.material, err = integrate.New(integrate.NewIsotropic(mixYoung, mixNu), c.law, integrate.Options{})
		require.NoError(t, err)
		for i := range s.points {
			s.points[i].start.Internal = c.start
		}
		out = append(out, s)
	}
	return out
}

// BenchmarkDamageStep is the full step with tangent of laws with internal variables against the floor.
func BenchmarkDamageStep(b *testing.B) {
	for _, c := range damageCases(b) {
		b.Run(c.name, func(b *testing.B) {
			f := newFloor()
			var low, out integrate.Result
			iterations, steps, refused := 0, 0, 0
			race(b, "xfloor", c.points, 256, func(p *mixPoint) { f.step(&low, &p.start, &p.increment) }, func(p *mixPoint) {
				if err := c.material.Step(&out, &p.start, p.increment); err != nil {
					refused++
				}
				iterations, steps = iterations+out.Iterations, steps+1
			})
			b.ReportMetric(float64(iterations)/float64(steps), "iterations")
			b.ReportMetric(float64(refused)/float64(steps), "refused")
		})
	}
}
