package integrate_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

func damageMaterial(t testing.TB, p creeplaw.KachanovRabotnovParameters) *integrate.Material {
	t.Helper()
	law, err := creeplaw.NewKachanovRabotnov(p)
	require.NoError(t, err)
	return material(t, law)
}

// TestDamageUnderConstantStress holds a bar with damage under constant stress against the closed form
//
//	ω = 1 - (1-t/t_r)^(1/(1+φ)),   ε = ε_r [1 - (1-t/t_r)^((1+φ-n)/(1+φ))]
//	t_r = 1/((1+φ) B σ^χ),         ε_r = A σⁿ t_r (1+φ)/(1+φ-n)
//
// half of the life, and under control of stress, of the light entry point and the general one.
//
// Source: L. M. Kachanov 1958; Yu. N. Rabotnov 1969.
func TestDamageUnderConstantStress(t *testing.T) {
	const n, chi, phi, stress, life = 5.0, 4.0, 6.0, 100.0, 1000.0
	m := damageMaterial(t, creeplaw.KachanovRabotnovParameters{Prefactor: 1e-5, StressExponent: n,
		DamagePrefactor: 1 / ((1 + phi) * life), DamageStressExponent: chi, DamageExponent: phi, ReferenceStress: stress})
	const end, ratio = 0.5 * life, (1 + phi) / (1 + phi - n)
	exact := []float64{
		1 - math.Pow(1-end/life, 1/(1+phi)),
		1e-5 * life * ratio * (1 - math.Pow(1-end/life, 1/ratio)),
	}
	limit(t, "light", exact, exact[0], 1e-10, func(steps int) ([]float64, error) {
		var out integrate.UniaxialResult
		for range steps {
			if err := m.StepUniaxialStress(&out, &out.State, integrate.UniaxialLoad{Dt: end / float64(steps), Stress: stress,
				Temperature: 800}); err != nil {
				return nil, err
			}
		}
		return []float64{out.State.Internal[0], out.State.Equivalent}, nil
	})
	limit(t, "mixed", exact, exact[0], 1e-10, func(steps int) ([]float64, error) {
		var out integrate.MixedResult
		for range steps {
			if err := m.StepMixed(&out, &out.State, integrate.MixedIncrement{Control: integrate.StressControl(),
				Dt: end / float64(steps), Prescribed: tensor.Sym{stress}, Temperature: 800}); err != nil {
				return nil, err
			}
		}
		return []float64{out.State.Internal[0], out.State.Equivalent}, nil
	})
}

// TestRuptureOfOneStep looks for the longest single step from virgin material under constant stress. Backward Euler in damage
// is ω = Δt B σ^χ/(1-ω)^φ, which has a solution as long as Δt B σ^χ <= φ^φ/(1+φ)^(1+φ) (own derivation: the maximum of
// ω (1-ω)^φ), and two below: the lower one, connected to Δt → 0, must come back.
func TestRuptureOfOneStep(t *testing.T) {
	const phi, prefactor = 6.0, 1e-4
	m := damageMaterial(t, creeplaw.KachanovRabotnovParameters{Prefactor: 1e-5, StressExponent: 5, DamagePrefactor: prefactor,
		DamageStressExponent: 4, DamageExponent: phi, ReferenceStress: 100})
	longest := math.Pow(phi, phi) / math.Pow(1+phi, 1+phi) / prefactor
	for _, part := range []float64{1e-6, 1e-3, 0.5, 0.9, 0.99, 0.999, 1.001, 1.1, 2, 100, 1e8} {
		var out integrate.UniaxialResult
		dt := part * longest
		err := m.StepUniaxialStress(&out, &integrate.State{}, integrate.UniaxialLoad{Dt: dt, Stress: 100, Temperature: 800})
		if part > 1 {
			require.Equal(t, integrate.BeyondRupture, err, "%v of the longest step", part)
			require.Zero(t, out)
			continue
		}
		require.NoError(t, err, "%v of the longest step", part)
		w := out.State.Internal[0]
		require.Less(t, w, 1/(1+phi), "the lower of the two solutions")
		check.Rel(t, "damage equation", w*math.Pow(1-w, phi), dt*prefactor, 1e-11)
	}
}

// TestOneStepOfSoftening is the same for a law that softens with creep strain, ṗ = A σ exp(Ω p) (the form of the Omega method,
// M. Prager 1995): backward Euler is x exp(-x) = Ω A σ Δt exp(Ω p₀) with x = Ω Δp, solved by the branch of Lambert's function
// with x < 1 as long as the right side is below 1/e.
func TestOneStepOfSoftening(t *testing.T) {
	const prefactor, omega, stress, before = 1e-8, 50.0, 120.0, 0.01
	m := material(t, creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		f := prefactor * math.Exp(omega*p.Strain)
		return creeplaw.Rate{Value: f * p.Stress, ByStress: f, ByStrain: omega * f * p.Stress}
	}))
	old := integrate.State{Equivalent: before}
	longest := 1 / (math.E * omega * prefactor * stress * math.Exp(omega*before))
	for _, part := range []float64{1e-9, 1e-3, 0.5, 0.99, 0.9999, 1.0001, 2, 1e6} {
		for _, light := range []bool{true, false} {
			dt := part * longest
			var bar integrate.UniaxialResult
			var full integrate.MixedResult
			var err error
			label := fmt.Sprintf("%v of the longest step, light %v", part, light)
			if light {
				err = m.StepUniaxialStress(&bar, &old, integrate.UniaxialLoad{Dt: dt, Stress: stress, Temperature: 800})
			} else {
				err = m.StepMixed(&full, &old, integrate.MixedIncrement{Control: integrate.StressControl(), Dt: dt,
					Prescribed: tensor.Sym{stress}, Temperature: 800})
				bar.CreepStep, bar.Tangent = full.CreepStep, 1
				if err == nil {
					bar.Tangent = 1 / full.StrainBy[0][0]
				}
			}
			if part > 1 {
				require.Equal(t, integrate.BeyondRupture, err, label)
				continue
			}
			require.NoError(t, err, label)
			x := omega * bar.CreepStep
			require.Less(t, x, 1.0, label)
			check.Rel(t, label, x*math.Exp(-x), part/math.E, 1e-12)
			// d ln x (1-x) = d ln σ
			check.Rel(t, label+": compliance", 1/bar.Tangent, 1/young+x/(omega*(1-x)*stress), 1e-9)
		}
	}
}

// TestMixedEvolvingIsStep takes random steps of a damaging law, the greatest principal stress at work in half of them, under
// random mixtures of control: Step with the strain that comes back makes the same stress, or the step is beyond rupture.
func TestMixedEvolvingIsStep(t *testing.T) {
	count := 1500
	if *campaign {
		count = 60_000
	}
	s := newSource(230)
	beyond, lost, iterations, most := 0, 0, 0, 0
	var prescribed, stepping float64
	for i := range count {
		n := s.uniform(1, 10)
		p := creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: n, DamagePrefactor: s.decades(-8, -3),
			DamageStressExponent: s.uniform(1, n), DamageExponent: s.uniform(1, 8), ReferenceStress: 100}
		if i%2 == 0 {
			p.RuptureStress = creeplaw.RuptureStress{Principal: s.uniform(0, 0.6), Mean: s.uniform(0, 0.4)}
		}
		m := damageMaterial(t, p)
		old := s.state()
		if i%3 > 0 {
			old.Internal[0] = s.uniform(0, 0.5)
		}
		control, conditions := s.control(t)
		stress := s.deviator().Scale(s.decades(0, 2.5)).Add(tensor.Identity().Scale(s.NormFloat64() * s.decades(0, 2)))
		inc := integrate.MixedIncrement{Control: control, Dt: s.decades(-2, 8), Temperature: 800,
			Prescribed: prescribe(conditions, stress, elasticStrain(stress).Add(old.Creep))}
		var out integrate.MixedResult
		switch err := m.StepMixed(&out, &old, inc); err {
		case nil:
			prescribed = max(prescribed, prescribedResidual(conditions, &out, &inc))
			sizes := young * (out.Strain.Norm() + old.Creep.Norm())
			stepping = max(stepping, stepGap(t, m, &out, &old, &inc)/(out.Stress.Norm()+1e-3*sizes))
			iterations += out.Iterations
			most = max(most, out.Iterations)
		case integrate.BeyondRupture:
			beyond++
		case integrate.NoConvergence:
			lost++
		default:
			t.Fatalf("seed %d, case %d: %v at %+v from %+v with %+v", seed, i, err, inc, old, p)
		}
	}
	t.Logf("%d steps, %d beyond rupture, %d not converged, %.1f iterations mean, %d most; prescribed %.0e, Step %.0e", count,
		beyond, lost, float64(iterations)/float64(count-beyond), most, prescribed, stepping)
	require.LessOrEqual(t, lost, count/10_000, "one in ten thousand may be lost at a corner of Step")
	require.LessOrEqual(t, prescribed, 1e-10)
	require.LessOrEqual(t, stepping, 1e-11)
	require.Less(t, beyond, count/2, "most of the steps must be possible")
}
