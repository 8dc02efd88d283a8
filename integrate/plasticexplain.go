package integrate

import (
	"example.com/holdtime/creeplaw"
)

// explainPlastic is Explain for a material with plasticity.
func (m *Material) explainPlastic(code Code, old *State, inc *Increment) error {
	switch code {
	case BadIncrement:
		return inc.fault()
	case BadState:
		if fault := old.plasticFault(); fault != nil {
			return fault
		}
		return old.fault()
	case OutsideTable:
		name := m.tableWithout(inc.Temperature)
		if yield, _, _ := m.plastic.hardening.YieldStress(0, inc.Temperature); !(yield > 0) {
			name = "the hardening"
		}
		return &UpdateError{Code: code, Quantity: "temperature for " + name, Value: inc.Temperature}
	}
	e := &UpdateError{Code: code, Quantity: "time step", Value: inc.Dt}
	t, ok := m.trialState(old, inc)
	if !ok {
		return e
	}
	e.Quantity, e.Value = "trial von Mises stress", 3*t.shear*t.equivalent
	surface := m.plastic.surface(old, inc.Temperature, t.shear)
	if e.Value > surface.yield0 {
		e.Quantity, e.Value = "von Mises stress of plastic flow alone", surface.meet(1, e.Value).stress
	}
	if x, ok := m.given.(creeplaw.Explainer); ok {
		e.Reason = x.CheckPoint(creeplaw.Point{Stress: e.Value, Strain: m.plastic.remembered(old), Temperature: inc.Temperature})
	}
	return e
}
