package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// span is what the substeps of a step went through.
type span struct {
	lowest, highest float64 // von Mises stress
	yields, elastic bool    // whether any of them had plastic flow, and whether any had none
	direction       tensor.Sym
	yielding        bool // the last one
	stress          float64
	room            [mostColumns]float64 // σy - σ of the latest column's substeps, +Inf with plastic flow
	count           int                  // of them
	threat          float64              // how far above the yield surface the stress may have been within one of them
}

// add adds substep i of n.
func (s *span) add(p *plasticStep, i, n int, threat float64) {
	if i == 1 {
		s.threat = 0
	}
	s.stress, s.count = p.x.kept*p.relaxation.trial, n
	s.lowest, s.highest = math.Min(s.lowest, s.stress), math.Max(s.highest, s.stress)
	s.yielding = p.x.plastic > 0
	s.yields, s.elastic = s.yields || s.yielding, s.elastic || !s.yielding
	s.direction = p.flowDirection()
	s.room[i-1] = math.Inf(1)
	if !s.yielding {
		s.room[i-1] = p.surface.yield0 - s.stress
		s.threat = math.Max(s.threat, threat)
	}
}

// threat bounds how far above the yield surface the stress may have been within a substep that ends below it: up to its trial
// stress, but no further than the strain drives it against the creep rate at the yield stress, at either end of the substep.
func (f *plasticFollower) threat(s *plasticStep, old *State, inc *Increment, from float64, temperature float64) float64 {
	q := s.relaxation.trial
	yield := math.Min(s.surface.yield0, q)
	if before, _, _ := f.material.plastic.hardening.YieldStress(old.EquivalentPlastic, temperature); before < yield {
		yield = before
	}
	if !(q > yield) {
		return 0
	}
	at := creeplaw.Point{Stress: yield, Strain: s.start, Temperature: temperature}
	slowest := s.law.LogRate(at).Value
	at.Strain, at.Temperature = s.x.strain, inc.Temperature
	slowest = math.Min(slowest, s.law.LogRate(at).Value)
	return math.Min(q-yield, q-from-3*s.shear*inc.Dt*math.Exp(slowest))
}

// flowDirection is e over √(⅔ e:e), of the trial deviator and of the end's.
func (s *plasticStep) flowDirection() (n tensor.Sym) {
	if s.equivalent > 0 {
		n = s.deviator.Scale(1 / s.equivalent)
	}
	return n
}

// above is how far the stress is above the yield surface within the step, where a plain step, which relaxes too much, did not
// see it: with the stress that extrapolation gives the end, and so much more before that as is its share of the way.
func (s *span) above(end float64) (most float64) {
	for i, room := range s.room[:s.count] {
		most = math.Max(most, (end-s.stress)*float64(i+1)/float64(s.count)-room)
	}
	return most
}

// inaccuracy is an error of the strains of a step: of creep and plastic strain together, which the stress feels, and of each.
type inaccuracy struct{ both, creep, plastic float64 }

// allowance says what the tolerance allows to a step.
type allowance struct {
	relative       float64
	time           float64 // part of the tolerance for its time, and for being one
	elastic        float64 // 3G
	size           float64 // von Mises stress that its error is relative to
	creep, plastic float64 // strains that theirs are relative to
	creeps, flows  float64 // Δp and Δκ
}

// over is an inaccuracy over what is allowed. Errors of many steps add up, so that a step may use up only the part of the
// tolerance that its strain is of the whole, and a little for its time and for being one.
func (a *allowance) over(e inaccuracy) float64 {
	one := func(off, made, whole float64) float64 {
		if off == 0 {
			return 0
		}
		const sharing = 4.0 / 5 // as in Follow
		return off / (a.relative * whole * math.Pow(math.Min(1, math.Max(0, made/whole)+a.time), sharing))
	}
	stress := one(a.elastic*e.both, a.elastic*(a.creeps+a.flows), a.size)
	return math.Max(stress, math.Max(one(e.creep, a.creeps, a.creep), one(e.plastic, a.flows, a.plastic)))
}

// judge returns the estimated error of a column over what the tolerance allows, its difference from the column before, and the
// same for what extrapolation does not see.
func (f *plasticFollower) judge(last, before *carried, h float64) (seen, unseen float64) {
	end := last.state(&f.start)
	at, _ := f.path.at(f.time + h)
	t, _ := f.material.trialState(&end, &Increment{Strain: at.Strain, Temperature: at.Temperature})
	f.reached = 3 * t.shear * t.equivalent
	largest := math.Max(f.largest, f.reached)
	stressFloor, strainFloor := f.tolerance.Stress, f.tolerance.Creep
	if stressFloor == 0 {
		stressFloor = 1e-3 * largest
	}
	if strainFloor == 0 {
		strainFloor = largest / (3 * t.shear)
	}
	const idle, least = 0.1, 0.003 // as in Follow
	a := allowance{
		relative: f.tolerance.Relative,
		time:     least + idle*h/f.path.length,
		elastic:  3 * t.shear,
		size:     math.Max(stressFloor, math.Max(f.mises, f.reached)),
		creep:    math.Max(strainFloor, end.Equivalent),
		plastic:  math.Max(strainFloor, end.EquivalentPlastic),
		creeps:   last[0][carriedEquivalent] - f.now[0][carriedEquivalent],
		flows:    last[0][carriedKappa] - f.now[0][carriedKappa],
	}
	yield, _, _ := f.material.plastic.hardening.YieldStress(end.EquivalentPlastic, at.Temperature)
	f.reaches = f.span.yielding || f.reached >= yield*(1-f.tolerance.Relative)
	hidden := f.unseen(&end, at.Temperature, h, a.flows)
	if above := math.Max(f.reached-yield, math.Max(f.span.threat, f.span.above(f.reached))) / a.elastic; above > 0 {
		hidden.both, hidden.plastic = hidden.both+above, hidden.plastic+above
	}
	return a.over(last.off(before)), a.over(hidden)
}

// off is the difference between two results for a state.
func (c *carried) off(from *carried) inaccuracy {
	var creep, plastic tensor.Sym
	for i := range creep {
		creep[i] = c[0][i] - from[0][i]
		plastic[i] = c[0][carriedPlastic+i] - from[0][carriedPlastic+i]
	}
	return inaccuracy{
		both:    creep.Add(plastic).EquivalentStrain(),
		creep:   math.Max(creep.EquivalentStrain(), math.Abs(c[0][carriedEquivalent]-from[0][carriedEquivalent])),
		plastic: math.Max(plastic.EquivalentStrain(), math.Abs(c[0][carriedKappa]-from[0][carriedKappa])),
	}
}

// unseen bounds what the onset or the end of plastic flow within a step, at a time that extrapolation does not see, makes the
// strains wrong by: the creep rate takes its value on one side of it for that on the other, and plastic flow its direction.
func (f *plasticFollower) unseen(end *State, temperature, h, flows float64) inaccuracy {
	s := &f.span
	if !s.yields || f.onSurface && !s.elastic {
		return inaccuracy{}
	}
	rate := func(stress float64) float64 {
		return math.Exp(f.material.law.LogRate(creeplaw.Point{Stress: stress, Strain: f.material.plastic.remembered(end),
			Temperature: temperature}).Value)
	}
	creep := h * math.Abs(rate(s.highest)-rate(s.lowest))
	turn := math.Abs(flows) * s.direction.Sub(f.direction).EquivalentStrain()
	return inaccuracy{both: creep + turn, creep: creep, plastic: creep + turn}
}
