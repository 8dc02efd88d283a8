package program

import (
	"math"

	"example.com/holdtime/integrate"
)

// Plastic strain has no rate of its own, so a material with plasticity is not walked by the fourth-order method. A step is
// taken whole and in two halves by the plain step, and extrapolated to second order; the elastic–plastic answer in no time then
// brings the extrapolated state back to the yield surface where it has left it. The error is taken as that of the halves.

// attemptPlastic takes a step of length h from now.
func (w *walker) attemptPlastic(h float64) (end point, worst float64, err error) {
	full, _, err := w.stage(&w.now, w.now.time+h, h, false)
	if err != nil {
		return end, 0, err
	}
	middle, _, err := w.stage(&w.now, w.now.time+h/2, h/2, false)
	if err != nil {
		return end, 0, err
	}
	halves, _, err := w.stage(&middle, w.now.time+h, h/2, false)
	if err != nil {
		return end, 0, err
	}
	better := halves
	better.state = extrapolated(&w.now.state, &halves.state, &full.state)
	end, _, err = w.stage(&better, halves.time, 0, false)
	if err != nil {
		return end, 0, err
	}
	whole := full.stress.Dot(inelastic(&w.now.state, &full.state))
	parts := middle.stress.Dot(inelastic(&w.now.state, &middle.state)) + halves.stress.Dot(inelastic(&middle.state, &halves.state))
	end.dissipated = w.now.dissipated + 2*parts - whole
	return end, w.judgePlastic(&end, &halves), nil
}

// extrapolated is twice the halves less the whole; the equivalent strains do not fall below those of the start.
func extrapolated(start, halves, full *integrate.State) integrate.State {
	s := *halves
	for i := range s.Creep {
		s.Creep[i] += halves.Creep[i] - full.Creep[i]
		s.Plastic[i] += halves.Plastic[i] - full.Plastic[i]
	}
	s.Equivalent = math.Max(start.Equivalent, 2*halves.Equivalent-full.Equivalent)
	s.EquivalentPlastic = math.Max(start.EquivalentPlastic, 2*halves.EquivalentPlastic-full.EquivalentPlastic)
	return s
}

// judgePlastic returns the estimated error over what the tolerance allows.
func (w *walker) judgePlastic(end, halves *point) float64 {
	strain := w.elastic
	mises := math.Max(end.stress.Mises(), w.now.stress.Mises())
	largest := math.Max(w.largest, mises)
	if largest > w.largest {
		strain = end.strain.Sub(end.state.Creep).Sub(end.state.Plastic).Deviator().EquivalentStrain()
	}
	stressFloor, creepFloor := w.tolerance.Stress, w.tolerance.Creep
	if stressFloor == 0 {
		stressFloor = 1e-3 * largest
	}
	if creepFloor == 0 {
		creepFloor = strain
	}
	stress := end.stress.Sub(halves.stress)
	worst := math.Max(stress.Mises(), math.Abs(stress.Mean())) / math.Max(stressFloor, mises)
	creep := end.state.Creep.Sub(halves.state.Creep).EquivalentStrain()
	worst = math.Max(worst, creep/math.Max(creepFloor, end.state.Equivalent))
	plastic := end.state.Plastic.Sub(halves.state.Plastic).EquivalentStrain()
	worst = math.Max(worst, plastic/math.Max(creepFloor, end.state.EquivalentPlastic))
	return worst / w.tolerance.Relative
}
