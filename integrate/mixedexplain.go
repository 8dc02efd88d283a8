package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// Controlled is the increment of an entry point under control: a UniaxialIncrement, UniaxialLoad, PlaneStressIncrement or
// MixedIncrement.
type Controlled interface {
	asMixed() MixedIncrement
}

func (inc MixedIncrement) asMixed() MixedIncrement { return inc }

func (inc UniaxialIncrement) asMixed() MixedIncrement {
	return MixedIncrement{Control: UniaxialStress(), Dt: inc.Dt, Prescribed: tensor.Sym{inc.Strain}, Temperature: inc.Temperature}
}

func (inc UniaxialLoad) asMixed() MixedIncrement {
	return MixedIncrement{Control: StressControl(), Dt: inc.Dt, Prescribed: tensor.Sym{inc.Stress}, Temperature: inc.Temperature}
}

func (inc PlaneStressIncrement) asMixed() MixedIncrement {
	plane := tensor.Sym{inc.Strain[tensor.XX], inc.Strain[tensor.YY], tensor.XY: inc.Strain[tensor.XY]}
	return MixedIncrement{Control: PlaneStress(), Dt: inc.Dt, Prescribed: plane, Temperature: inc.Temperature}
}

// ExplainControlled tells why StepUniaxial, StepUniaxialStress, StepPlaneStress or StepMixed was refused, as Explain does for
// Step: it takes the error, the start state and the increment, and returns an *UpdateError that names the quantity and its
// value, and the law's own reason where it has one. An error that is not a Code comes back as it is.
func (m *Material) ExplainControlled(err error, old *State, increment Controlled) error {
	code, ok := err.(Code)
	if !ok {
		return err
	}
	inc := increment.asMixed()
	switch code {
	case BadIncrement:
		return inc.fault()
	case BadState, OutsideTable:
		return m.Explain(err, old, Increment{Dt: inc.Dt, Temperature: inc.Temperature})
	}
	e := &UpdateError{Code: code, Quantity: "time step", Value: inc.Dt}
	var p mixedPoint
	if code != LawUndefined || !inc.valid() || !old.valid() || m.begin(&p, old, &inc) != 0 {
		return e
	}
	trial := m.newFlow(old, inc.Temperature)
	p.trial.addTo(&trial, &p.system)
	trial.scale(3*p.shear, inc.Dt)
	at := creeplaw.Point{Stress: trial.trial, Strain: old.Equivalent, Temperature: inc.Temperature}
	if x, ok := m.given.(creeplaw.Explainer); ok {
		e.Reason = x.CheckPoint(at)
	}
	e.Quantity, e.Value = "trial von Mises stress", at.Stress
	if rate := m.law.LogRate(at).Value; e.Reason == nil && !math.IsNaN(rate) && !m.throughStep() {
		e.Quantity, e.Value = "creep strain the prescribed stress would make", math.Inf(1)
	}
	return e
}

func (inc *MixedIncrement) fault() error {
	e := &UpdateError{Code: BadIncrement}
	switch {
	case !(inc.Dt >= 0) || math.IsInf(inc.Dt, 1):
		e.Quantity, e.Value = "time step", inc.Dt
		return e
	case !(inc.Temperature > 0) || math.IsInf(inc.Temperature, 1):
		e.Quantity, e.Value = "temperature", inc.Temperature
		return e
	}
	for i, v := range inc.Prescribed {
		e.Quantity, e.Value = "prescribed "+inc.Control.given(i).String()+" "+componentNames[i], v
		if !finite(v) {
			return e
		}
	}
	e.Quantity, e.Value = "trial von Mises stress", math.Inf(1) // finite values whose squares overflow
	return e
}
