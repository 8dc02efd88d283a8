package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// TimeHardening is a material whose creep goes by a clock. It exists to reproduce legacy analyses and published benchmarks and
// has to be asked for by name: a part left unloaded on the bench creeps differently afterwards, and a change of load
// contradicts tests (common practice is strain hardening). New refuses such a rate.
//
// Each step is given the time at which it starts, counted from when the clock was started. The rate in it is the mean rate of
// the clocked curve over the step, so a step under constant stress adds exactly what the curve grows by, also from time zero.
//
// Unlike a Material it keeps the interval of the step being taken: use one per goroutine. Making one is cheap.
type TimeHardening struct {
	material *Material
	law      *clockedLaw
}

// clockedLaw is the law of the step being taken.
type clockedLaw struct{ creeplaw.During }

// NewTimeHardening builds the material, like New. A nil rate is a *MaterialError.
func NewTimeHardening(elastic Isotropic, rate creeplaw.Clocked, options Options) (*TimeHardening, error) {
	if rate == nil {
		return nil, &MaterialError{"clocked creep rate", math.NaN(), 0, "given"}
	}
	law := &clockedLaw{creeplaw.During{Clocked: rate}}
	m, err := New(elastic, law, options)
	if err != nil {
		return nil, err
	}
	return &TimeHardening{m, law}, nil
}

// Step is Material.Step from a time of the clock [time], >= 0; a time that is negative or not finite is BadIncrement.
func (h *TimeHardening) Step(out *Result, old *State, clock float64, inc Increment) error {
	if !h.set(clock, inc.Dt) {
		return BadIncrement
	}
	return h.material.Step(out, old, inc)
}

// StepMixed is Material.StepMixed from a time of the clock [time], >= 0.
func (h *TimeHardening) StepMixed(out *MixedResult, old *State, clock float64, inc MixedIncrement) error {
	if !h.set(clock, inc.Dt) {
		return BadIncrement
	}
	return h.material.StepMixed(out, old, inc)
}

func (h *TimeHardening) set(clock, dt float64) bool {
	h.law.Start, h.law.End = clock, clock+dt
	return clock >= 0 && finite(clock+dt)
}
