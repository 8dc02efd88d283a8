package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// Conditions are what the host had prescribed at the start of a step: needed only to estimate its error, because the strain
// and temperature within the step are then taken as linear in time.
type Conditions struct {
	Strain      tensor.Sym // total strain [-], tensor shear components
	Temperature float64    // absolute temperature [K], > 0
}

// Estimate is how wrong a step is thought to be.
type Estimate struct {
	Stress tensor.Sym // error of the stress, step minus exact [stress]
	Creep  float64    // size of the error of the creep strain, √(⅔ Δ:Δ) [-]

	// Relative is the error of the stress, as its von Mises stress, over the trial von Mises stress of the step; the same
	// number is the error of the creep strain over the elastic strain the step could have relaxed. With plasticity strain can
	// also be taken from creep for plastic strain at the same stress: then it is the largest of the three errors.
	Relative float64

	// Dt is the length a step from the same start should have for Relative to meet the tolerance, with a margin: between a
	// tenth and five times the length tried.
	Dt float64
}

// EstimateStep carries the material through the increment like Step, and estimates the error of that result by step
// doubling: it repeats the increment in two halves, with strain and temperature linear in time from start to inc. It costs
// three steps where Step costs one. The result in out is that of the single step, with its own tangent.
//
// Backward Euler errs by C Δt² in one step, by half of that in two halves: the error of the single step is taken as twice
// the difference. Where hardening starts from zero strain the creep strain grows as a fractional power of time and the
// estimate is rough, but it still falls with the step. The strain is taken as prescribed: a compliant structure, whose strain
// within the step follows from its own equilibrium, doubles its steps at the level of the structure. tolerance is the Relative error the caller wants for one step, above
// 0; it only serves the suggestion.
//
// The error is that of Step for any of the three steps, or BadIncrement for a start or a tolerance that is not a number to
// work with; then out and the estimate are untouched and zero.
func (m *Material) EstimateStep(out *Result, old *State, start Conditions, inc Increment, tolerance float64) (Estimate, error) {
	first := Increment{Dt: inc.Dt / 2, Strain: middle(start.Strain, inc.Strain),
		Temperature: start.Temperature + (inc.Temperature-start.Temperature)/2}
	second := inc
	second.Dt = inc.Dt - first.Dt
	if !(tolerance > 0 && finite(tolerance) && start.Temperature > 0 && finite(start.Temperature) && start.Strain.IsFinite()) {
		return Estimate{}, BadIncrement
	}
	var whole, half, halves Result
	if code := m.step(&whole, old, &inc); code != 0 {
		return Estimate{}, code
	}
	if code := m.step(&half, old, &first); code != 0 {
		return Estimate{}, code
	}
	if code := m.step(&halves, &half.State, &second); code != 0 {
		return Estimate{}, code
	}
	t, _ := m.trialState(old, &inc)
	e := Estimate{
		Stress: whole.Stress.Sub(halves.Stress).Scale(2),
		Creep:  2 * whole.State.Creep.Sub(halves.State.Creep).EquivalentStrain(),
	}
	if trial := 3 * t.shear * t.equivalent; trial > 0 {
		e.Relative = e.Stress.Mises() / trial
		if m.plastic != nil {
			e.Relative = math.Max(e.Relative, shifted(&whole.State, &halves.State)/t.equivalent)
		}
	}
	e.Dt = inc.Dt * suggestion(tolerance/e.Relative)
	*out = whole
	return e, nil
}

// suggestion is the factor on the step for an error that grows with its square.
func suggestion(room float64) float64 {
	const margin, least, most = 0.8, 0.1, 5
	return math.Max(least, math.Min(most, margin*math.Sqrt(room)))
}

func middle(a, b tensor.Sym) tensor.Sym {
	for i := range a {
		a[i] += (b[i] - a[i]) / 2
	}
	return a
}
