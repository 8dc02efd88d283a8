package integrate

import "example.com/holdtime/tensor"

// dependence is how a step's scalar solution moves with what the step starts from.
type dependence struct {
	byElastic, byTemperature float64 // dσ by √(⅔ e:e) of the trial deviator, by T at the end
	byCreep, byPlastic       float64 // dσ by p and κ at the start
	logShearByT              float64
	hardening                float64 // m Δp/p
	elastic                  float64 // 3G
	stress                   float64 // σ at the end
}

func (s *plasticStep) dependence(d *linearised) dependence {
	x := &s.x
	odds := 0.0
	if x.kept > 0 {
		odds = x.fraction / x.kept
	}
	out := dependence{logShearByT: s.shearByT / s.shear, hardening: s.hardening(x), elastic: 3 * s.shear,
		stress: x.kept * s.relaxation.trial}
	out.byElastic = out.elastic * d.elastic
	out.byTemperature = out.stress*out.logShearByT*d.elastic + s.relaxation.trial*d.byTemperature
	perSlope := out.elastic * x.share / ((1 + x.share*odds) * s.slope(x, odds))
	out.byCreep = perSlope * out.hardening
	switch {
	case x.plastic > 0:
		out.byPlastic = perSlope * (1 + out.hardening)
	case s.inelastic:
		out.byPlastic = out.byCreep
	}
	return out
}

// through carries derivatives of the start state by the end of a path through the step. part is how far along the path the step
// ends: its strain and temperature move with that part of the path's end.
func (s *plasticStep) through(c *carried, l *linearised, part float64) {
	d := s.dependence(l)
	var n, e0 tensor.Sym // of √(⅔ e:e) by the deviator e; e over it
	plastic := 0.0       // Δκ over it
	if s.equivalent > 0 {
		e0 = s.deviator.Scale(1 / s.equivalent)
		n = e0.Scale(2.0 / 3)
		plastic = s.x.plastic / s.equivalent
	}
	for k := range c[1:] {
		row := &c[1+k]
		e, warm := c.strainBy(k).Scale(-1), 0.0
		if k < temperatureColumn {
			e[k] += part
		} else {
			warm = part
		}
		e = e.Deviator()
		size := n.Dot(e)
		creepBy, plasticBy := s.increments(&d, size, warm, row[carriedEquivalent], row[carriedKappa])
		for i := range e {
			row[i] += s.x.fraction*e[i] + e0[i]*(creepBy-s.x.fraction*size)
			row[carriedPlastic+i] += plastic*e[i] + e0[i]*(plasticBy-plastic*size)
		}
		row[carriedEquivalent] += creepBy
		row[carriedKappa] += plasticBy
	}
}

// increments are dΔp and dΔκ for a change of the trial's equivalent elastic strain, of T, and of p and κ at the start.
func (s *plasticStep) increments(d *dependence, elastic, warm, creep, kappa float64) (creepBy, plasticBy float64) {
	x := &s.x
	if d.stress == 0 {
		return elastic, 0 // nothing is left of the stress, or there was none
	}
	stress := d.byElastic*elastic + d.byTemperature*warm + d.byCreep*creep + d.byPlastic*kappa
	made := elastic + (d.stress*d.logShearByT*warm-stress)/d.elastic // of both
	fed := x.fraction * s.equivalent * (x.rate.ByLogStress*stress/d.stress + x.rate.ByLogTemperature/s.temperature*warm)
	remembered := creep
	if s.inelastic {
		remembered += kappa
	}
	switch {
	case x.plastic > 0 && s.inelastic:
		creepBy = fed - d.hardening*(made+remembered)
	default:
		creepBy = (fed - d.hardening*remembered) / (1 + d.hardening)
	}
	if x.plastic > 0 {
		plasticBy = made - creepBy
	}
	return creepBy, plasticBy
}
