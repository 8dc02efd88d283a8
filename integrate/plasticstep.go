package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// stepPlastic is step for a material with plasticity.
func (m *Material) stepPlastic(out *Result, old *State, inc *Increment) Code {
	var y plasticStep
	if code := y.solve(m, old, inc); code != 0 {
		return code
	}
	d, ok := y.linearise(&y.x)
	if !ok {
		return BeyondRupture
	}
	start := *old // which may be &out.State
	out.write(&start, &y.trial, &y.x.relaxed, d)
	y.write(&out.State, &start)
	out.PlasticStep = y.x.plastic
	return 0
}

// stressPlastic is stress for a material with plasticity: the same without the derivatives.
func (m *Material) stressPlastic(stress *tensor.Sym, end, old *State, inc *Increment) Code {
	var out Result
	if code := m.stepPlastic(&out, old, inc); code != 0 {
		return code
	}
	*stress, *end = out.Stress, out.State
	return 0
}

// plasticStep is a step of a material with plasticity, solved.
type plasticStep struct {
	trial
	yieldFlow
	x yielded
}

// solve judges the step and solves its scalar problem: without plastic flow where the trial stress is below the yield stress.
func (y *plasticStep) solve(m *Material, old *State, inc *Increment) Code {
	var ok bool
	if y.trial, ok = m.trialState(old, inc); !ok || !inc.valid() || !old.valid() || !old.plasticValid() {
		return m.refusalPlastic(old, inc)
	}
	q, equivalent := 3*y.shear*y.equivalent, y.equivalent
	y.yieldFlow = yieldFlow{
		relaxation: relaxation{law: m.law, trial: q, elastic: equivalent, start: m.plastic.remembered(old),
			temperature: inc.Temperature, logTime: math.Log(inc.Dt / equivalent)},
		surface:   m.plastic.surface(old, inc.Temperature, y.shear),
		inelastic: m.plastic.inelastic,
	}
	yield := y.surface.yield0
	if !(yield > 0) {
		return OutsideTable
	}
	y.corner = q/yield - 1
	y.x = yielded{relaxed: relaxed{kept: 1, strain: y.start}, share: 1}
	const slack = 8 * epsilon // of the trial stress: its rounding
	switch {
	case y.corner > slack:
		return y.yieldFlow.solve(&y.x)
	case inc.Dt > 0 && equivalent > 0:
		return y.relaxation.solve(&y.x.relaxed)
	}
	return 0
}

// write adds the plastic strain of the step.
func (y *plasticStep) write(end, old *State) {
	if y.x.plastic > 0 {
		per := y.x.plastic / y.equivalent
		for i, e := range y.deviator {
			end.Plastic[i] = old.Plastic[i] + per*e
		}
		end.EquivalentPlastic = old.EquivalentPlastic + y.x.plastic
	}
}

// shifted is the error of creep or plastic strain in one step, from that step and two halves: twice their difference.
func shifted(whole, halves *State) float64 {
	creep, plastic := whole.Creep.Sub(halves.Creep), whole.Plastic.Sub(halves.Plastic)
	return 2 * math.Max(creep.EquivalentStrain(), plastic.EquivalentStrain())
}

func (m *Material) refusalPlastic(old *State, inc *Increment) Code {
	switch {
	case !inc.valid():
		return BadIncrement
	case !old.valid() || !old.plasticValid():
		return BadState
	}
	sum := old.inelastic()
	return refusal(&sum, inc)
}
