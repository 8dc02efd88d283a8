package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// controlledCase is a random step under control of a material in which everything depends on temperature.
type controlledCase struct {
	material    *integrate.Material
	old         integrate.State
	temperature float64
	dt          float64
	stress      tensor.Sym // of the elastic step
	strain      tensor.Sym // its elastic strain
	size        float64    // of that strain
	free        float64    // thermal strain
}

// controlled draws steps from a thousandth to a thousand times the time in which the law would use up the elastic strain.
func (s source) controlled(t *testing.T, kind lawKind) controlledCase {
	t.Helper()
	law, err := kind.draw(s)
	require.NoError(t, err)
	m, free := warm(t, law)
	c := controlledCase{material: m, old: s.state(), temperature: s.uniform(720, 1080)}
	c.free = free(c.temperature)
	for !(c.dt > 1e-20 && c.dt < 1e20) { // draw again where an exponential law makes that time absurd
		c.size = s.decades(-5, -2.7)
		c.strain = s.deviator().Scale(c.size).Add(tensor.Identity().Scale(c.size * s.NormFloat64()))
		c.stress = hooke(c.strain) // roughly: the constants of the tests, not those at this temperature
		at := creeplaw.Point{Stress: c.stress.Mises(), Strain: c.old.Equivalent + c.size, Temperature: c.temperature}
		c.dt = math.Exp(math.Log(c.size)-creeplaw.Log(law).LogRate(at).Value) * s.decades(-3, 3)
	}
	return c
}

// kelvin is a size of temperature changes: one that changes the laws moderately and the thermal strain by the elastic strain.
func (c *controlledCase) kelvin() float64 { return math.Min(64, c.size/2e-5) }

// derivativeTally gathers how far derivatives are from differences.
type derivativeTally struct {
	worst                    float64
	conclusive, inconclusive int
}

// compare takes sixth-order differences of f over several steps and returns how far got is from them, relative to itself. The
// differences must vouch for themselves: rounding of values of the given size, 4 units in the last place over the step, a
// tenth of the tolerance of 1e-8 or less, and two steps in a row that agree within it, else the case is inconclusive. Of
// several pairs, as mild and steep functions want them, the one nearest to got counts.
func (d *derivativeTally) compare(f func(x float64) tensor.Sym, scale float64, got tensor.Sym, values float64) float64 {
	const tolerance = 1e-8
	best, size := math.Inf(1), largest(got)
	before := tensor.Sym{math.Inf(1)}
	for _, h := range []float64{0x1p-6, 0x1p-7, 0x1p-8, 0x1p-9, 0x1p-10, 0x1p-11, 0x1p-12, 0x1p-13} {
		if !(4*0x1p-52*values/(h*scale) <= 0.1*tolerance*size) {
			break
		}
		now := sixth(f, h*scale)
		if !now.IsFinite() {
			return math.NaN()
		}
		if largest(now.Sub(before)) <= tolerance*largest(now) {
			best = math.Min(best, largest(got.Sub(now))/size)
		}
		before = now
	}
	if math.IsInf(best, 1) {
		d.inconclusive++
		return 0
	}
	d.conclusive++
	d.worst = max(d.worst, best)
	return best
}

// TestMixedDerivatives compares every derivative of StepMixed, of stress and of strain by each prescribed value and by
// temperature, with sixth-order differences of StepMixed itself, over random laws, states and mixtures of control.
//
// Tolerance 1e-8 of the column, as for Step; see TestTangentIsTheDerivativeOfTheUpdate.
func TestMixedDerivatives(t *testing.T) {
	count := 300
	if *campaign {
		count = 20_000
	}
	s := newSource(240)
	kinds := lawKinds()
	var byPrescribed, byTemperature derivativeTally
	for i := range count {
		kind := kinds[i%len(kinds)]
		c := s.controlled(t, kind)
		control, conditions := s.control(t)
		inc := integrate.MixedIncrement{Control: control, Dt: c.dt, Temperature: c.temperature,
			Prescribed: prescribe(conditions, c.stress, c.old.Creep.Add(c.strain).Add(tensor.Identity().Scale(c.free)))}
		var out integrate.MixedResult
		require.NoError(t, c.material.StepMixed(&out, &c.old, inc), kind.name)
		run := func(x float64, strain bool, move func(*integrate.MixedIncrement, float64)) tensor.Sym {
			moved := inc
			move(&moved, x)
			var r integrate.MixedResult
			require.NoError(t, c.material.StepMixed(&r, &c.old, moved), kind.name)
			if strain {
				return r.Strain
			}
			return r.Stress
		}
		stressSize, strainSize := out.Stress.Norm(), out.Strain.Norm()+c.old.Creep.Norm()
		gap := 0.0
		for j := range 6 {
			scale := prescribe(conditions, tensor.Sym{}.Add(ones(c.stress.Norm())), ones(c.size))[j] / 2
			var byStress, byStrain tensor.Sym
			for k := range 6 {
				byStress[k], byStrain[k] = out.StressBy[k][j], out.StrainBy[k][j]
			}
			by := func(m *integrate.MixedIncrement, x float64) { m.Prescribed[j] += x }
			exact := func(strain bool) func(float64) tensor.Sym { // differences over the change that rounding left
				return func(x float64) tensor.Sym {
					dx := (inc.Prescribed[j] + x) - inc.Prescribed[j]
					return run(x, strain, by).Sub(run(0, strain, by)).Scale(x / dx)
				}
			}
			gap = max(gap, byPrescribed.compare(exact(false), math.Abs(scale), byStress, stressSize))
			gap = max(gap, byPrescribed.compare(exact(true), math.Abs(scale), byStrain, strainSize))
		}
		byT := func(m *integrate.MixedIncrement, x float64) { m.Temperature += x }
		gapT := max(
			byTemperature.compare(func(x float64) tensor.Sym { return run(x, false, byT) }, c.kelvin(), out.StressByTemperature, stressSize),
			byTemperature.compare(func(x float64) tensor.Sym { return run(x, true, byT) }, c.kelvin(), out.StrainByTemperature, strainSize))
		require.LessOrEqual(t, gap, 1e-8, "%s (seed %d, case %d): %+v from %+v: %+v", kind.name, seed, i, inc, c.old, out)
		require.LessOrEqual(t, gapT, 1e-8, "%s (seed %d, case %d): by T: %+v from %+v: %+v", kind.name, seed, i, inc, c.old, out)
	}
	t.Logf("%d steps: by what is prescribed %+v, by temperature %+v", count, byPrescribed, byTemperature)
	require.Greater(t, byPrescribed.conclusive, 5*byPrescribed.inconclusive)
	require.Greater(t, byTemperature.conclusive, byTemperature.inconclusive)
}

func ones(x float64) tensor.Sym { return tensor.Sym{x, x, x, x, x, x} }

// TestLightDerivatives does the same for the light entry points.
func TestLightDerivatives(t *testing.T) {
	count := 2000
	if *campaign {
		count = 50_000
	}
	s := newSource(241)
	kinds := lawKinds()
	var bar, load, sheet derivativeTally
	for i := range count {
		kind := kinds[i%len(kinds)]
		c := s.controlled(t, kind)
		gaps := [3]float64{bar.bar(t, &c), load.load(t, &c), sheet.sheet(t, &c)}
		require.LessOrEqual(t, max(gaps[0], gaps[1], gaps[2]), 1e-8, "%s (seed %d, case %d): %v: %+v", kind.name, seed, i, gaps, c)
	}
	for name, d := range map[string]derivativeTally{"bar": bar, "bar under load": load, "sheet": sheet} {
		t.Logf("%s: %+v", name, d)
		require.Greater(t, d.conclusive, d.inconclusive, name)
	}
}

// scalar makes a function of one number a tensor-valued one.
func scalar(f func(float64) float64) func(float64) tensor.Sym {
	return func(x float64) tensor.Sym { return tensor.Sym{f(x)} }
}

func (d *derivativeTally) bar(t *testing.T, c *controlledCase) float64 {
	t.Helper()
	inc := integrate.UniaxialIncrement{Dt: c.dt, Temperature: c.temperature,
		Strain: c.old.Creep[tensor.XX] + c.free + c.size}
	run := func(dStrain, dT float64) (r integrate.UniaxialResult) {
		moved := inc
		moved.Strain += dStrain
		moved.Temperature += dT
		require.NoError(t, c.material.StepUniaxial(&r, &c.old, moved))
		return r
	}
	out := run(0, 0)
	byStrain := scalar(func(x float64) float64 {
		dx := (inc.Strain + x) - inc.Strain
		return (run(x, 0).Stress - out.Stress) * (x / dx)
	})
	byT := scalar(func(x float64) float64 { return run(0, x).Stress })
	// Rounding: the elastic strain is a difference of strains, and its rounding comes through the tangent.
	values := math.Abs(out.Stress) + 4*out.Tangent*(math.Abs(inc.Strain)+c.size)
	return max(d.compare(byStrain, c.size, tensor.Sym{out.Tangent}, values), d.compare(byT, c.kelvin(), tensor.Sym{out.ByTemperature}, values))
}

func (d *derivativeTally) load(t *testing.T, c *controlledCase) float64 {
	t.Helper()
	inc := integrate.UniaxialLoad{Dt: c.dt, Temperature: c.temperature, Stress: -young * c.size}
	run := func(dStress, dT float64) (r integrate.UniaxialResult) {
		moved := inc
		moved.Stress += dStress
		moved.Temperature += dT
		require.NoError(t, c.material.StepUniaxialStress(&r, &c.old, moved))
		return r
	}
	out := run(0, 0)
	byStress := func(x float64) tensor.Sym { return tensor.Sym{run(x, 0).Strain[tensor.XX]} }
	byT := func(x float64) tensor.Sym { return tensor.Sym{run(0, x).Strain[tensor.XX]} }
	values := out.Strain.Norm() + c.old.Creep.Norm()
	return max(d.compare(byStress, young*c.size, tensor.Sym{1 / out.Tangent}, values),
		d.compare(byT, c.kelvin(), tensor.Sym{-out.ByTemperature / out.Tangent}, values))
}

func (d *derivativeTally) sheet(t *testing.T, c *controlledCase) float64 {
	t.Helper()
	inc := integrate.PlaneStressIncrement{Dt: c.dt, Temperature: c.temperature,
		Strain: c.old.Creep.Add(c.strain).Add(tensor.Identity().Scale(c.free))}
	run := func(j int, dStrain, dT float64) (r integrate.PlaneStressResult) {
		moved := inc
		moved.Strain[j] += dStrain
		moved.Temperature += dT
		require.NoError(t, c.material.StepPlaneStress(&r, &c.old, moved))
		return r
	}
	out := run(0, 0, 0)
	gap := 0.0
	plane := [3]int{tensor.XX, tensor.YY, tensor.XY}
	stiffest := 0.0
	for _, row := range out.Tangent {
		stiffest = max(stiffest, largest(tensor.Sym{row[0], row[1], row[2]}))
	}
	values := out.Stress.Norm() + 4*stiffest*(inc.Strain.Norm()+c.old.Creep.Norm())
	for k, j := range plane {
		var column tensor.Sym
		for row, i := range plane {
			column[i] = out.Tangent[row][k]
			if j == tensor.XY {
				column[i] *= 2 // differences are taken by the tensor shear
			}
		}
		f := func(x float64) tensor.Sym {
			dx := (inc.Strain[j] + x) - inc.Strain[j]
			return run(j, x, 0).Stress.Sub(out.Stress).Scale(x / dx)
		}
		gap = max(gap, d.compare(f, c.size, column, values))
	}
	byT := func(x float64) tensor.Sym { return run(0, 0, x).Stress }
	return max(gap, d.compare(byT, c.kelvin(), out.ByTemperature, values))
}

// TestMixedDerivativesWithDamage does the same for a law with internal variables, whose steps are found another way.
func TestMixedDerivativesWithDamage(t *testing.T) {
	s := newSource(242)
	var tally derivativeTally
	for i := range 150 {
		n := s.uniform(1, 8)
		m := damageMaterial(t, creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: n, DamagePrefactor: s.decades(-8, -4),
			DamageStressExponent: s.uniform(1, n), DamageExponent: s.uniform(1, 6), ReferenceStress: 100,
			RuptureStress: creeplaw.RuptureStress{Principal: 0.4 * float64(i%2), Mean: 0.2}})
		control, conditions := s.control(t)
		stress := s.deviator().Scale(s.decades(0, 2)).Add(tensor.Identity().Scale(30 * s.NormFloat64()))
		inc := integrate.MixedIncrement{Control: control, Dt: s.decades(-2, 4), Temperature: 800,
			Prescribed: prescribe(conditions, stress, elasticStrain(stress))}
		var out integrate.MixedResult
		var old integrate.State
		old.Internal[0] = s.uniform(0, 0.3)
		if err := m.StepMixed(&out, &old, inc); err != nil {
			require.Equal(t, integrate.BeyondRupture, err)
			continue
		}
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
					require.NoError(t, m.StepMixed(&r, &old, moved))
					if strain {
						return r.Strain
					}
					return r.Stress
				}
			}
			// Step solves ln Δp to 2e-13, not to rounding: a thousand units of rounding.
			gap := max(tally.compare(run(false), scale, byStress, 1e2*out.Stress.Norm()),
				tally.compare(run(true), scale, byStrain, 1e2*out.Strain.Norm()))
			require.LessOrEqual(t, gap, 1e-8, "seed %d, case %d, %d: %+v: %+v", seed, i, j, inc, out)
		}
	}
	t.Logf("%+v", tally)
	require.Greater(t, tally.conclusive, tally.inconclusive)
}
