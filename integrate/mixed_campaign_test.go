package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// control draws what is prescribed of each component: strain, stress or a relation with a compliance from a millionth of
// the material's own to a million times it, factors of any scale and sign.
func (s source) control(t testing.TB) (integrate.Control, [6]integrate.Condition) {
	t.Helper()
	var conditions [6]integrate.Condition
	for i := range conditions {
		switch s.IntN(3) {
		case 1:
			conditions[i].By = integrate.GivenStress
		case 2:
			b := s.decades(-3, 3)
			if s.IntN(2) == 0 {
				b = -b
			}
			conditions[i] = integrate.Condition{By: integrate.GivenRelation, Stress: b * s.decades(-6, 6) / young, Strain: b}
			switch s.IntN(10) {
			case 0:
				conditions[i].Stress = 0
			case 1:
				conditions[i] = integrate.Condition{By: integrate.GivenRelation, Stress: b}
			}
		}
	}
	c, err := integrate.NewControl(conditions)
	require.NoError(t, err)
	return c, conditions
}

// prescribe turns an elastic start, a stress and the strain it makes, into prescribed values, so that stresses of a known
// size result.
func prescribe(conditions [6]integrate.Condition, stress, strain tensor.Sym) (value tensor.Sym) {
	for i, c := range conditions {
		switch c.By {
		case integrate.GivenStrain:
			value[i] = strain[i]
		case integrate.GivenStress:
			value[i] = stress[i]
		case integrate.GivenRelation:
			value[i] = c.Stress*stress[i] + c.Strain*strain[i]
		}
	}
	return value
}

// elasticStrain is Hooke's law for the constants of the tests, hooke its inverse.
func elasticStrain(stress tensor.Sym) tensor.Sym { return elasticStrainOf(stress, poisson) }
func hooke(strain tensor.Sym) tensor.Sym         { return hookeOf(strain, poisson) }

func elasticStrainOf(stress tensor.Sym, poisson float64) tensor.Sym {
	return stress.Deviator().Scale((1 + poisson) / young).Add(tensor.Identity().Scale((1 - 2*poisson) / young * stress.Mean()))
}

func hookeOf(strain tensor.Sym, poisson float64) tensor.Sym {
	return strain.Deviator().Scale(young / (1 + poisson)).Add(tensor.Identity().Scale(young / (3 * (1 - 2*poisson)) * strain.Trace()))
}

// mixedTally gathers what the random steps of one kind of law did.
type mixedTally struct {
	steps, iterations, worst             int
	relation, hooke, flow, law, stepping float64
}

// TestMixedStepNeverFails takes random steps under random mixtures of prescribed stress, strain and relations: exponents 1 to
// 50, stresses over 7 decades, Δt over 20. No step may fail. Each result is held against the equations, written out here
// from the result alone:
//
//   - what is prescribed is met to 1e-10 of the sum of the sizes of its terms;
//   - Hooke's law to 1e-12 of the size of its terms, which are strains that may be far larger than the elastic ones;
//   - the flow rule and the law: see flowResidual;
//   - Step, given the strain that came back, makes the same stress, see stepGap.
func TestMixedStepNeverFails(t *testing.T) {
	kinds := append(lawKinds(), lawKind{"threshold", func(s source) (creeplaw.Law, error) {
		law, err := creeplaw.NewNortonAt(1e-6, 100, s.uniform(1, 8))
		if err != nil {
			return nil, err
		}
		return creeplaw.WithThreshold(law, s.decades(-1, 2))
	}})
	perKind := 100_000 / len(kinds)
	if *campaign {
		perKind = 10_000_000 / len(kinds)
	}
	for i, kind := range kinds {
		s := newSource(uint64(100 + i))
		var sum mixedTally
		for range perKind {
			law, err := kind.draw(s)
			require.NoError(t, err)
			if !randomMixedStep(t, s, kind.name, law, &sum) {
				return
			}
		}
		t.Logf("%-26s %8d steps, iterations %.2f mean, %2d worst; prescribed %.0e, Hooke %.0e, flow %.0e, law %.0e, Step %.0e",
			kind.name, sum.steps, float64(sum.iterations)/float64(sum.steps), sum.worst, sum.relation, sum.hooke, sum.flow,
			sum.law, sum.stepping)
		limit := 20
		if kind.name == "threshold" { // exponents without bound: close to bisection
			limit = 80
		}
		require.LessOrEqual(t, sum.worst, limit, kind.name)
	}
}

// mixedCase is a random step under mixed control.
type mixedCase struct {
	material   *integrate.Material
	poisson    float64
	law        creeplaw.Law
	old        integrate.State
	conditions [6]integrate.Condition
	inc        integrate.MixedIncrement
}

func (s source) mixedCase(t *testing.T, law creeplaw.Law) (c mixedCase) {
	t.Helper()
	c.law, c.poisson = law, poisson
	if s.IntN(3) == 0 { // nearly incompressible, and of less volume stiffness than shear stiffness
		c.poisson = []float64{0.4999, 0.49, 0, -0.5, -0.9}[s.IntN(5)]
	}
	var err error
	c.material, err = integrate.New(integrate.NewIsotropic(young, c.poisson), law, integrate.Options{})
	require.NoError(t, err)
	if s.IntN(3) > 0 {
		c.old = integrate.State{Creep: s.deviator().Scale(s.decades(-6, -2)), Equivalent: s.decades(-12, -1)}
	}
	c.inc.Control, c.conditions = s.control(t)
	c.inc.Dt, c.inc.Temperature = s.decades(-10, 10), s.uniform(600, 1000)
	// Where stress is prescribed nothing bounds the creep strain: up to three times the stress of the laws' anchor.
	stress := s.deviator().Scale(s.decades(-4, 2.5)).Add(tensor.Identity().Scale(s.NormFloat64() * s.decades(-4, 2.5)))
	c.inc.Prescribed = prescribe(c.conditions, stress, elasticStrainOf(stress, c.poisson).Add(c.old.Creep))
	if s.IntN(2) == 0 { // 20 decades about the time in which the law would make the elastic strain
		e := stress.Mises() / (3 * shear)
		dt := s.decades(-10, 10) * e / law.Rate(creeplaw.Point{Stress: stress.Mises(), Strain: c.old.Equivalent + e,
			Temperature: c.inc.Temperature}).Value
		if dt < 1e100 {
			c.inc.Dt = dt
		}
	}
	return c
}

func randomMixedStep(t *testing.T, s source, kind string, law creeplaw.Law, sum *mixedTally) bool {
	c := s.mixedCase(t, law)
	var out integrate.MixedResult
	if err := c.material.StepMixed(&out, &c.old, c.inc); err != nil {
		t.Errorf("%s (seed %d): %v at %+v", kind, seed, err, c)
		return false
	}
	sum.steps++
	sum.iterations += out.Iterations
	sum.worst = max(sum.worst, out.Iterations)
	relation := prescribedResidual(c.conditions, &out, &c.inc)
	stiffest := young/(1+c.poisson) + young/(1-2*c.poisson) // 2G + 3K: rounding of the strains makes stress with it
	sizes := stiffest*(out.Strain.Norm()+out.State.Creep.Norm()) + out.Stress.Norm()
	gap := out.Stress.Sub(hookeOf(out.Strain.Sub(out.State.Creep), c.poisson)).Norm() / sizes
	flow, rate := flowResidual(law, &out, &c.old, &c.inc)
	step := stepGap(t, c.material, &out, &c.old, &c.inc) / (out.Stress.Norm() + 1e-3*sizes)
	sum.relation, sum.hooke = math.Max(sum.relation, relation), math.Max(sum.hooke, gap)
	sum.flow, sum.law = math.Max(sum.flow, flow), math.Max(sum.law, rate)
	sum.stepping = math.Max(sum.stepping, step)
	if !(relation <= 1e-10 && gap <= 1e-14 && flow <= 1e-14 && rate <= 1e-12 && step <= 1e-11) {
		t.Errorf("%s (seed %d): prescribed %v, Hooke %v, flow %v, law %v, Step %v at %+v: %+v", kind, seed, relation, gap, flow, rate,
			step, c, out)
		return false
	}
	return true
}

// prescribedResidual is the largest misfit of what is prescribed, relative to the sizes of its terms.
func prescribedResidual(conditions [6]integrate.Condition, out *integrate.MixedResult, inc *integrate.MixedIncrement) float64 {
	worst := 0.0
	for i, c := range conditions {
		a, b := c.Stress, c.Strain
		switch c.By {
		case integrate.GivenStrain:
			b = 1
		case integrate.GivenStress:
			a = 1
		}
		gap := math.Abs(a*out.Stress[i] + b*out.Strain[i] - inc.Prescribed[i])
		if gap != 0 {
			worst = max(worst, gap/(math.Abs(a)*out.Stress.Norm()+math.Abs(b)*out.Strain.Norm()+math.Abs(inc.Prescribed[i])))
		}
	}
	return worst
}

// flowResidual returns how far the creep strain of the step is from the flow rule, relative to creep strain at start and end,
// and |ln Δp - ln Δt - ln ṗ(σ, p, T)|. The second means nothing where Δp is below the normal numbers or where the deviator is
// rounding of the mean stress; and it is zero when rounding of the stress alone, as much as 8 units in its last place, turns
// its sign, as happens a hair above a threshold stress.
func flowResidual(law creeplaw.Law, out *integrate.MixedResult, old *integrate.State, inc *integrate.MixedIncrement) (flow,
	rate float64) {
	const smallest = 1e-270
	mises := out.Stress.Mises()
	step := out.State.Creep.Sub(old.Creep)
	if out.CreepStep == 0 {
		return step.Norm(), 0
	}
	n := out.Stress.Deviator().Scale(1.5 / mises)
	if mises > 1e-10*out.Stress.Norm() {
		flow = step.Sub(n.Scale(out.CreepStep)).Norm() / (out.CreepStep*out.Stress.Norm()/mises + old.Creep.Norm())
	}
	if !(out.CreepStep > smallest) || mises < 1e-10*out.Stress.Norm() {
		return flow, 0
	}
	residual := func(mises float64) float64 {
		l := creeplaw.Log(law).LogRate(creeplaw.Point{Stress: mises, Strain: old.Equivalent + out.CreepStep,
			Temperature: inc.Temperature})
		return math.Log(out.CreepStep) - math.Log(inc.Dt) - l.Value
	}
	rounding := 8 * 0x1p-52 * out.Stress.Norm()
	if residual(mises-rounding)*residual(mises+rounding) <= 0 {
		return flow, 0
	}
	return flow, math.Abs(residual(mises))
}

// stepGap is the difference between the stress of Step for the strain that came back and the stress that came with it. Step
// sees the strain with its rounding, which a hundred thousand times the elastic strain makes worth more than the stress;
// the caller divides by the stress and a thousandth of what the whole strain would be worth elastically.
func stepGap(t *testing.T, m *integrate.Material, out *integrate.MixedResult, old *integrate.State,
	inc *integrate.MixedIncrement) float64 {
	t.Helper()
	if out.Strain.Norm() > 1e3 {
		return 0 // the trial stress would be beyond the sense of an exponential law
	}
	var full integrate.Result
	if err := m.Step(&full, old, integrate.Increment{Dt: inc.Dt, Strain: out.Strain, Temperature: inc.Temperature}); err != nil {
		t.Errorf("Step: %v at Δt %v strain %v from %+v: law %+v", err, inc.Dt, out.Strain, old, m.Law())
		return math.NaN()
	}
	return full.Stress.Sub(out.Stress).Norm()
}
