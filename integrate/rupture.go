package integrate

import (
	"math"
)

// ruptureWithin returns the time within a step at which its solution ends: where the curve of solutions from Δt = 0 turns back,
// or an internal variable comes to its limit. It reports false if no end is found. It is for Explain, off the path of a step.
func (m *Material) ruptureWithin(old *State, inc *Increment) (time float64, found bool) {
	t, ok := m.trialState(old, inc)
	if !ok || !(inc.Dt > 0) || !m.memory.holds(old) {
		return 0, false
	}
	var c coupled
	switch {
	case m.memory.law != nil:
		c = m.coupledProblem(old, inc, &t)
		var x node
		x.v, x.logTime = c.before, c.logTime
		if c.evaluate(&x) == undefined {
			return 0, false
		}
		c.creeps = c.trial > 0 && !math.IsInf(x.rate.LogRate, -1)
	case t.equivalent > 0:
		a := relaxation{law: m.law, trial: 3 * t.shear * t.equivalent, elastic: t.equivalent, start: old.Equivalent,
			temperature: inc.Temperature, logTime: math.Log(inc.Dt / t.equivalent)}
		c = a.coupled()
		c.creeps = true
	default:
		return 0, false
	}
	w := walker{coupled: &c, target: c.logTime, locate: true}
	if w.run() != BeyondRupture {
		return 0, false
	}
	return math.Exp(w.end), true
}

// fault names the internal variable that a state cannot have.
func (m *memory) fault(s *State) error {
	for i := range m.count {
		if v := s.Internal[i]; !finite(v) || v/m.unit[i]/m.limit[i] >= 1 {
			return &UpdateError{Code: BadState, Quantity: m.names[i] + " less its initial value", Value: v}
		}
	}
	return nil
}
