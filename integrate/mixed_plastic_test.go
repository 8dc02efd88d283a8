package integrate_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

func plasticMaterial(t testing.TB, law creeplaw.Law, hardening integrate.Hardening) *integrate.Material {
	t.Helper()
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{
		Plasticity: integrate.Plasticity{Hardening: hardening}})
	require.NoError(t, err)
	return m
}

// TestPlasticBar pulls a bar beyond yield in no time: with linear hardening σ = σ₀ + Eₜ (ε - σ₀/E), Eₜ = E H/(E+H), on
// loading, whether strain or stress is prescribed, and E on unloading. (Textbook: R. Hill, The Mathematical Theory of
// Plasticity, 1950.)
func TestPlasticBar(t *testing.T) {
	const yield, modulus = 200.0, 8000.0
	law, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	m := plasticMaterial(t, law, integrate.LinearHardening{Yield: integrate.Constant(yield), Modulus: integrate.Constant(modulus)})
	const strain = 5e-3
	const tangent = young * modulus / (young + modulus)
	const stress = yield + tangent*(strain-yield/young)
	const plastic = strain - stress/young
	for _, sign := range []float64{1, -1} {
		var out integrate.UniaxialResult
		require.NoError(t, m.StepUniaxial(&out, &integrate.State{}, integrate.UniaxialIncrement{Strain: sign * strain, Temperature: 800}))
		check.Rel(t, "stress", out.Stress, sign*stress, 1e-12)
		check.Rel(t, "tangent", out.Tangent, tangent, 1e-10)
		check.Rel(t, "plastic strain", out.State.Plastic[tensor.XX], sign*plastic, 1e-12)
		check.Rel(t, "its step", out.PlasticStep, plastic, 1e-12)
		check.Rel(t, "lateral strain", out.Strain[tensor.YY], -sign*(poisson*stress/young+plastic/2), 1e-12)
		require.Zero(t, out.State.Equivalent)

		require.NoError(t, m.StepUniaxialStress(&out, &integrate.State{}, integrate.UniaxialLoad{Stress: sign * stress, Temperature: 800}))
		check.Rel(t, "strain", out.Strain[tensor.XX], sign*strain, 1e-12)
		check.Rel(t, "tangent under load", out.Tangent, tangent, 1e-10)

		unload := integrate.UniaxialLoad{Stress: 0, Temperature: 800}
		require.NoError(t, m.StepUniaxialStress(&out, &out.State, unload))
		check.Rel(t, "strain left", out.Strain[tensor.XX], sign*plastic, 1e-12)
		require.Zero(t, out.PlasticStep)
	}
}

// TestPlasticLimit: perfect plasticity carries its yield stress and no more; under a prescribed strain it flows.
func TestPlasticLimit(t *testing.T) {
	law, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	m := plasticMaterial(t, law, integrate.LinearHardening{Yield: integrate.Constant(200)})
	var out integrate.UniaxialResult
	require.NoError(t, m.StepUniaxialStress(&out, &integrate.State{}, integrate.UniaxialLoad{Dt: 10, Stress: 199.9, Temperature: 800}))
	require.Zero(t, out.PlasticStep)
	for _, stress := range []float64{200.1, 300, 1e5} {
		for _, dt := range []float64{0, 10} {
			out = integrate.UniaxialResult{}
			err := m.StepUniaxialStress(&out, &integrate.State{}, integrate.UniaxialLoad{Dt: dt, Stress: stress, Temperature: 800})
			require.Equal(t, integrate.BeyondRupture, err, "%v in %v", stress, dt)
			require.Zero(t, out)
		}
	}
	var sheet integrate.PlaneStressResult
	require.NoError(t, m.StepPlaneStress(&sheet, &integrate.State{}, integrate.PlaneStressIncrement{
		Strain: tensor.Sym{5e-3, 5e-3}, Temperature: 800}))
	check.Rel(t, "equal biaxial", sheet.Stress[tensor.XX], 200, 1e-10)
	check.Rel(t, "equal biaxial", sheet.Stress[tensor.YY], 200, 1e-10)
	inPlane := 5e-3 - (1-poisson)*200/young
	check.Rel(t, "thickness strain", sheet.Strain[tensor.ZZ], -2*poisson*200/young-2*inPlane, 1e-10)
}

// TestMixedPlasticIsStep takes random steps of creep beside plasticity under random mixtures of control, and holds the result
// against Step, Hooke's law and what is prescribed; a prescribed stress beyond what the hardening can carry is refused.
func TestMixedPlasticIsStep(t *testing.T) {
	count := 4000
	if *campaign {
		count = 200_000
	}
	s := newSource(260)
	kinds := lawKinds()
	kinds = append(kinds[:1:1], kinds[2:6]...) // powers: an exponential makes absurd strains under prescribed stress
	yielded, refused, most := 0, 0, 0
	var prescribed, stepping, elastic float64
	for i := range count {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		voce := integrate.VoceHardening{Yield: integrate.Constant(s.decades(0, 2)), Saturation: integrate.Constant(s.decades(0, 2)),
			Rate: integrate.Constant(s.decades(0, 3))}
		if i%2 == 0 {
			voce.Modulus = integrate.Constant(s.decades(2, 4))
		}
		m := plasticMaterial(t, law, voce)
		old := s.state()
		if i%3 == 0 {
			old.Plastic, old.EquivalentPlastic = s.deviator().Scale(s.decades(-5, -2)), s.decades(-5, -1)
		}
		control, conditions := s.control(t)
		stress := s.deviator().Scale(s.decades(-1, 1.8)).Add(tensor.Identity().Scale(s.NormFloat64() * s.decades(-1, 2)))
		inc := integrate.MixedIncrement{Control: control, Dt: s.decades(-6, 6), Temperature: 800,
			Prescribed: prescribe(conditions, stress, elasticStrain(stress).Add(old.Creep).Add(old.Plastic))}
		if i%5 == 0 {
			inc.Dt = 0
		}
		var out integrate.MixedResult
		if err := m.StepMixed(&out, &old, inc); err != nil {
			if !errors.Is(err, integrate.BeyondRupture) || i%2 == 0 {
				t.Fatalf("seed %d, case %d: %v at %+v from %+v with %+v", seed, i, err, inc, old, voce)
			}
			refused++
			continue
		}
		if out.PlasticStep > 0 {
			yielded++
		}
		most = max(most, out.Iterations)
		sizes := 4 * young * (out.Strain.Norm() + old.Creep.Norm() + old.Plastic.Norm())
		prescribed = max(prescribed, prescribedResidual(conditions, &out, &inc))
		stepping = max(stepping, stepGap(t, m, &out, &old, &inc)/(out.Stress.Norm()+1e-3*sizes))
		strain := out.Strain.Sub(out.State.Creep).Sub(out.State.Plastic)
		elastic = max(elastic, out.Stress.Sub(hooke(strain)).Norm()/(out.Stress.Norm()+sizes))
		if !(prescribed <= 1e-10 && stepping <= 1e-11 && elastic <= 1e-13) {
			t.Fatalf("seed %d, case %d: prescribed %v, Step %v, Hooke %v at %+v from %+v with %+v: %+v", seed, i, prescribed, stepping,
				elastic, inc, old, voce, out)
		}
	}
	t.Logf("%d steps, %d yielded, %d refused, %d iterations at most; prescribed %.0e, Step %.0e, Hooke %.0e", count, yielded, refused,
		most, prescribed, stepping, elastic)
	require.Greater(t, yielded, count/5)
	require.Less(t, refused, count/5)
}

// TestMixedDerivativesWithPlasticity compares them with differences, as TestMixedDerivatives does. A step near yield has a
// corner within the reach of the differences: those are not conclusive.
func TestMixedDerivativesWithPlasticity(t *testing.T) {
	s := newSource(261)
	var tally derivativeTally
	for i := range 150 {
		law, err := creeplaw.NewNortonAt(1e-6, 100, s.uniform(1, 8))
		require.NoError(t, err)
		m := plasticMaterial(t, law, integrate.VoceHardening{Yield: integrate.Constant(s.decades(0.5, 1.5)),
			Saturation: integrate.Constant(s.decades(0, 2)), Rate: integrate.Constant(s.decades(0, 2)),
			Modulus: integrate.Constant(s.decades(2, 4))})
		control, conditions := s.control(t)
		stress := s.deviator().Scale(s.decades(1, 2)).Add(tensor.Identity().Scale(30 * s.NormFloat64()))
		inc := integrate.MixedIncrement{Control: control, Dt: s.decades(-2, 4), Temperature: 800,
			Prescribed: prescribe(conditions, stress, elasticStrain(stress))}
		var out integrate.MixedResult
		require.NoError(t, m.StepMixed(&out, &integrate.State{}, inc))
		for j := range 6 {
			scale := math.Abs(prescribe(conditions, ones(stress.Norm()), ones(stress.Norm()/young))[j]) / 4
			var byStrain, byStress tensor.Sym
			for k := range 6 {
				byStress[k], byStrain[k] = out.StressBy[k][j], out.StrainBy[k][j]
			}
			run := func(strain bool) func(x float64) tensor.Sym {
				return func(x float64) tensor.Sym {
					moved := inc
					moved.Prescribed[j] += x
					var r integrate.MixedResult
					require.NoError(t, m.StepMixed(&r, &integrate.State{}, moved))
					if strain {
						return r.Strain
					}
					return r.Stress
				}
			}
			gap := max(tally.compare(run(false), scale, byStress, 1e2*out.Stress.Norm()),
				tally.compare(run(true), scale, byStrain, 1e2*out.Strain.Norm()))
			require.LessOrEqual(t, gap, 1e-8, "seed %d, case %d, %d: %+v: %+v", seed, i, j, inc, out)
		}
	}
	t.Logf("%+v", tally)
	require.Greater(t, tally.conclusive, tally.inconclusive)
}
