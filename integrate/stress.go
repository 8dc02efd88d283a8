package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// Stress is Step without the derivatives: it carries the material from the state old through an increment by the same rule and
// writes the stress and the state at its end, to the bit those of Step. Explicit and lumped codes that need no tangent save
// its cost. It allocates nothing.
//
// The error is nil or a Code, the same that Step returns; then stress and end are untouched. old is never written, but may be
// end.
func (m *Material) Stress(stress *tensor.Sym, end, old *State, inc Increment) error {
	if code := m.stress(stress, end, old, &inc); code != 0 {
		return code
	}
	return nil
}

func (m *Material) stress(stress *tensor.Sym, end, old *State, inc *Increment) Code {
	if m.plastic != nil {
		return m.stressPlastic(stress, end, old, inc)
	}
	var t trial
	if ok := t.set(m, old, inc); !(ok && inc.Dt >= 0 && inc.Temperature > 0 && old.Equivalent >= 0 && finite(inc.Dt+inc.Temperature+old.Equivalent)) {
		return refusal(old, inc)
	}
	if m.memory.law != nil {
		return m.stressInternal(stress, end, old, inc, &t)
	}
	x := relaxed{kept: 1, strain: old.Equivalent}
	if inc.Dt > 0 && t.equivalent > 0 {
		problem := relaxation{law: m.law, trial: 3 * t.shear * t.equivalent, elastic: t.equivalent, start: old.Equivalent,
			temperature: inc.Temperature, logTime: math.Log(inc.Dt / t.equivalent)}
		if code := problem.solve(&x); code != 0 {
			return code
		}
		if _, ok := problem.linearise(&x); !ok { // no tangent is asked for, but where it does not exist lies rupture
			return BeyondRupture
		}
	}
	t.write(stress, end, old, x.fraction, x.kept)
	return 0
}

// stressInternal is stress for a law with internal variables.
func (m *Material) stressInternal(stress *tensor.Sym, end, old *State, inc *Increment, t *trial) Code {
	if !m.memory.holds(old) {
		return BadState
	}
	var x node
	c := m.coupledProblem(old, inc, t)
	if inc.Dt > 0 {
		if code := c.solve(&x); code != 0 {
			return code
		}
	} else {
		x.v = c.before
	}
	if !x.finish(&c) {
		return BeyondRupture
	}
	t.write(stress, end, old, x.fraction, x.kept)
	for i := range c.count {
		end.Internal[i] = x.v[i] * m.memory.unit[i]
	}
	return 0
}

// write sets stress and state for the fraction of the trial deviator that crept away. end may be old.
func (t *trial) write(stress *tensor.Sym, end, old *State, fraction, kept float64) {
	mean, keep := t.bulk*t.volumetric, 2*t.shear*kept
	for i, e := range t.deviator {
		stress[i] = keep * e
		end.Creep[i] = old.Creep[i] + fraction*e
	}
	addMean(stress, mean)
	step := fraction * t.equivalent
	end.Equivalent = old.Equivalent + step
	end.Internal, end.Plastic, end.EquivalentPlastic = old.Internal, old.Plastic, old.EquivalentPlastic
}
