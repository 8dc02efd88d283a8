package integrate

import "example.com/holdtime/tensor"

// mixedChange is a change of the data of a step and what it does to the end state at fixed ω.
type mixedChange struct {
	deviator           tensor.Sym // of the change of stress
	mean               float64
	softer             tensor.Sym // minus what temperature does to the strain at fixed stress and ω
	logShear, byKelvin float64    // δ ln G, δT
}

// sensitivity says how z = ln ω follows a change of the data. For a law that sees the von Mises stress and p,
//
//	δz = [(n-h) δ ln σₑ + h δ ln G + (∂ln ṗ/∂ln T) δ ln T]/F'
//
// with δσₑ taken at fixed ω.
type sensitivity struct {
	n, h, slope, byT float64  // byT: ∂ln ṗ/∂T
	bridge           *bridged // instead, for a law with internal variables
}

func (s *sensitivity) logOdds(p *mixedPoint, x *flowed, d *mixedChange) float64 {
	if s.bridge != nil {
		return s.bridge.logOdds(p, d)
	}
	beta := 1.5 * p.deviator.Scale(1/x.stress).Dot(d.deviator) / x.stress
	return ((s.n-s.h)*beta + s.h*d.logShear + s.byT*d.byKelvin) / s.slope
}

// derive fills the derivatives. At fixed ω the update is linear; the change of ω follows from the scalar equation.
func (out *MixedResult) derive(inc *MixedIncrement, p *mixedPoint, x *flowed, s sensitivity) {
	for j := range inc.Control.component {
		var data tensor.Sym
		data[j] = inc.Control.component[j].unit()
		stress, strain := p.turn(inc, x, &s, &data, mixedChange{})
		for i := range stress {
			out.StressBy[i][j], out.StrainBy[i][j] = stress[i], strain[i]
		}
	}
	shearLog, bulkLog := p.shearByT/p.shear, p.bulkByT/p.bulk
	softer := p.deviator.Scale(shearLog * (1 + x.odds) / (2 * p.shear))
	for i := tensor.XX; i <= tensor.ZZ; i++ {
		softer[i] += bulkLog*p.mean/(3*p.bulk) - p.freeByT
	}
	data := softer
	for i := range data {
		if inc.Control.component[i].stress {
			data[i] = 0
		}
	}
	out.StressByTemperature, out.StrainByTemperature = p.turn(inc, x, &s, &data,
		mixedChange{softer: softer, logShear: shearLog, byKelvin: 1})
}

// turn returns how stress and strain at the end follow a change of the data.
func (p *mixedPoint) turn(inc *MixedIncrement, x *flowed, s *sensitivity, data *tensor.Sym, d mixedChange) (stress,
	strain tensor.Sym) {
	a := p.system.amplitudes(data)
	stress, d.deviator, d.mean = p.system.stress(&a, &p.keep, 1)
	dz := 0.0
	if x.odds != 0 {
		dz = s.logOdds(p, x, &d)
	}
	elastic, creep := 1/(2*p.shear), x.odds/(2*p.shear)
	for i := range stress {
		stress[i] += p.along[i] * dz
		deviator := d.deviator[i] + p.alongDeviator[i]*dz
		strain[i] = elastic*deviator + creep*(deviator+p.deviator[i]*dz) - d.softer[i]
		if i <= tensor.ZZ {
			strain[i] += (d.mean + p.alongMean*dz) / (3 * p.bulk)
		}
		if k := &inc.Control.component[i]; p.system.stiffer(k) {
			strain[i] = data[i] - d.softer[i] - k.compliance*stress[i]
		}
	}
	return stress, strain
}
