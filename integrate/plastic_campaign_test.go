package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// hardeningKind draws a hardening curve of one kind, from the initial yield stress given.
type hardeningKind struct {
	name string
	draw func(s source, yield float64) integrate.Hardening
}

func hardeningKinds() []hardeningKind {
	constant := integrate.Constant
	return []hardeningKind{
		{"perfect", func(_ source, yield float64) integrate.Hardening {
			return integrate.LinearHardening{Yield: constant(yield)}
		}},
		{"linear", func(s source, yield float64) integrate.Hardening {
			return integrate.LinearHardening{Yield: constant(yield), Modulus: constant(young * s.decades(-6, 2))}
		}},
		{"Voce", func(s source, yield float64) integrate.Hardening {
			return integrate.VoceHardening{Yield: constant(yield), Saturation: constant(yield * s.decades(-3, 1)),
				Rate: constant(s.decades(-1, 5))}
		}},
		{"Voce and linear", func(s source, yield float64) integrate.Hardening {
			return integrate.VoceHardening{Yield: constant(yield), Saturation: constant(yield * s.decades(-3, 1)),
				Rate: constant(s.decades(-1, 5)), Modulus: constant(young * s.decades(-6, 1))}
		}},
		{"table", func(s source, yield float64) integrate.Hardening { return drawHardeningTable(s, yield) }},
	}
}

// drawHardeningTable draws up to 12 knots, some parts flat, every yield stress falling with temperature. No part is shorter
// than a thousandth of its strain: a curve so steep would turn the rounding of κ into more than 1e-12 of the yield stress.
func drawHardeningTable(s source, yield float64) integrate.Hardening {
	strains, stress := []float64{0}, []float64{yield}
	for range 1 + s.IntN(11) {
		rise := 0.0
		if s.IntN(4) > 0 {
			rise = yield * s.decades(-4, 0)
		}
		last := len(strains) - 1
		strains = append(strains, strains[last]*(1+1e-3)+s.decades(-6, -1))
		stress = append(stress, stress[last]+rise)
	}
	tables := make([]integrate.Table, len(strains))
	for i, v := range stress {
		table, err := integrate.NewTable([]float64{300, 700, 1100}, []float64{v * 1.3, v, v * 0.6})
		if err != nil {
			panic(err)
		}
		tables[i] = table
	}
	h, err := integrate.NewTabulatedHardening(strains, tables)
	if err != nil {
		panic(err)
	}
	return h
}

// plasticLawKinds are those of the campaign without plasticity, and one that does not creep below a threshold stress.
func plasticLawKinds() []lawKind {
	return append(lawKinds(), lawKind{"Norton above a threshold", func(s source) (creeplaw.Law, error) {
		inner, err := creeplaw.NewNortonAt(1e-6, 100, s.decades(0, math.Log10(50)))
		if err != nil {
			return nil, err
		}
		return creeplaw.WithThreshold(inner, s.decades(-1, 2.5))
	}})
}

// yieldingStep is a drawn step of a material with plasticity, and its result.
type yieldingStep struct {
	law       creeplaw.Law
	hardening integrate.Hardening
	memory    integrate.CreepMemory
	old       integrate.State
	inc       integrate.Increment
	out       integrate.Result
}

// drawYielding draws a step: yield stress over 7 decades, trial stress from a tenth of it to 10⁴ of it, Δt over 25 decades or
// 0, prior creep and plastic strain 0 or up to 3.
func drawYielding(s source, law creeplaw.Law, kind hardeningKind) yieldingStep {
	yield := s.decades(-3, 4)
	d := yieldingStep{law: law, hardening: kind.draw(s, yield), memory: integrate.CreepMemory(s.IntN(2))}
	if s.IntN(4) > 0 {
		d.old.Equivalent = s.decades(-12, 0.5)
	}
	if s.IntN(4) > 0 {
		d.old.EquivalentPlastic = s.decades(-8, 0.5)
	}
	d.inc = integrate.Increment{Dt: s.decades(-10, 15), Temperature: s.uniform(600, 1000)}
	if s.IntN(20) == 0 {
		d.inc.Dt = 0
	}
	size := s.decades(-1, 4)
	if s.IntN(2) == 0 {
		size = s.decades(-0.5, 1)
	}
	now, _, _ := d.hardening.YieldStress(d.old.EquivalentPlastic, d.inc.Temperature)
	d.inc.Strain = s.deviator().Scale(now * size / (3 * shear))
	return d
}

// yieldTally gathers what the steps did.
type yieldTally struct {
	steps, yielded, iterations, worst int
	residual, consistency, balance    float64
}

// TestPlasticStepNeverFails takes random steps with every law and every hardening. No failure and no NaN is allowed; what a
// step must meet is formed here, from its result alone.
func TestPlasticStepNeverFails(t *testing.T) {
	laws, hardenings := plasticLawKinds(), hardeningKinds()
	perKind := 10_000/len(laws)/len(hardenings) + 1
	if *campaign {
		perKind = 1_000_000/len(laws)/len(hardenings) + 1
	}
	var all yieldTally
	for j, hardening := range hardenings {
		var sum yieldTally
		for i, kind := range laws {
			s := newSource(uint64(1000 + 100*j + i))
			for range perKind {
				law, err := kind.draw(s)
				require.NoError(t, err)
				d := drawYielding(s, law, hardening)
				if !d.take(t, kind.name+", "+hardening.name, &sum) {
					return
				}
			}
		}
		sum.log(t, hardening.name)
		all.add(&sum)
	}
	all.log(t, "all")
	require.LessOrEqual(t, float64(all.iterations)/float64(all.steps), 4.0)
	require.LessOrEqual(t, all.worst, 100)
	require.LessOrEqual(t, all.residual, 1e-12)
	require.LessOrEqual(t, all.consistency, 1e-12)
	require.GreaterOrEqual(t, all.yielded, all.steps/4)
}

func (a *yieldTally) add(b *yieldTally) {
	a.steps, a.yielded, a.iterations, a.worst = a.steps+b.steps, a.yielded+b.yielded, a.iterations+b.iterations, max(a.worst, b.worst)
	a.residual, a.consistency = math.Max(a.residual, b.residual), math.Max(a.consistency, b.consistency)
	a.balance = math.Max(a.balance, b.balance)
}

func (a *yieldTally) log(t *testing.T, name string) {
	t.Logf("%-16s %7d steps, %7d yielded; iterations %.2f mean, %3d worst; residual %.1e, |σ-σy|/σy %.1e, balance %.1e", name,
		a.steps, a.yielded, float64(a.iterations)/float64(a.steps), a.worst, a.residual, a.consistency, a.balance)
}

// take takes the step and judges it.
func (d *yieldingStep) take(t *testing.T, name string, sum *yieldTally) bool {
	fail := func(what string, value any) bool {
		t.Errorf("%s (seed %d): %s %v at %+v from %+v, memory %d, with %+v and %+v", name, seed, what, value, d.inc, d.old, d.memory,
			d.law, d.hardening)
		return false
	}
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), d.law,
		integrate.Options{Plasticity: integrate.Plasticity{Hardening: d.hardening, Memory: d.memory}})
	require.NoError(t, err)
	if err := m.Step(&d.out, &d.old, d.inc); err != nil {
		return fail("error", err)
	}
	out := &d.out
	sum.steps++
	sum.iterations += out.Iterations
	sum.worst = max(sum.worst, out.Iterations)
	if !finiteResult(out) {
		return fail("not finite:", *out)
	}
	mises := out.Stress.Mises()
	trial := 3 * shear * d.inc.Strain.EquivalentStrain()
	yield, _, _ := d.hardening.YieldStress(out.State.EquivalentPlastic, d.inc.Temperature)
	off := (mises - yield) / yield
	if out.PlasticStep > 0 {
		sum.yielded++
		off = math.Abs(off)
	}
	sum.consistency = math.Max(sum.consistency, off)
	balance := math.Abs(trial-mises-3*shear*(out.CreepStep+out.PlasticStep)) / trial
	sum.balance = math.Max(sum.balance, balance)
	step := out.State.Plastic.Sub(d.old.Plastic)
	switch {
	case !(off <= 1e-12):
		return fail("off the yield surface by", off)
	case !(balance <= 1e-14):
		return fail("elastic and inelastic strain are short by", balance)
	case !(out.CreepStep >= 0 && out.PlasticStep >= 0):
		return fail("negative increment", out)
	case !(out.Stress.Dot(out.State.Creep.Sub(d.old.Creep)) >= 0 && out.Stress.Dot(step) >= 0):
		return fail("negative dissipation", out)
	case !(math.Abs(step.EquivalentStrain()-out.PlasticStep) <= 1e-14*out.PlasticStep):
		return fail("plastic strain is not", out.PlasticStep)
	}
	r, meaningful := d.residual(mises)
	if meaningful {
		sum.residual = math.Max(sum.residual, r)
		if !(r <= 1e-12) {
			return fail("residual", r)
		}
	}
	return true
}

// residual is |ln Δp - ln Δt - ln ṗ(σ, p, T)| of the end state. It means nothing without creep, or where the stress is below
// what the trial stress resolves.
func (d *yieldingStep) residual(mises float64) (float64, bool) {
	if !(d.out.CreepStep > 1e-270) || mises < 1e-13*3*shear*d.inc.Strain.EquivalentStrain() {
		return 0, false
	}
	at := creeplaw.Point{Stress: mises, Strain: d.old.Equivalent + d.out.CreepStep, Temperature: d.inc.Temperature}
	if d.memory == integrate.RemembersInelastic {
		at.Strain += d.old.EquivalentPlastic + d.out.PlasticStep
	}
	l := creeplaw.Log(d.law).LogRate(at)
	if l.ByLogStress > 1e3 { // at a threshold the rounding of the stress itself is more than the tolerance
		return 0, false
	}
	return math.Abs(math.Log(d.out.CreepStep) - math.Log(d.inc.Dt) - l.Value), true
}

func finiteResult(r *integrate.Result) bool {
	ok := r.Stress.IsFinite() && r.ByTemperature.IsFinite() && r.State.Creep.IsFinite() && r.State.Plastic.IsFinite()
	for _, row := range r.Tangent {
		ok = ok && tensor.Sym(row).IsFinite()
	}
	return ok
}
