package integrate

import "example.com/holdtime/tensor"

// slopes are the derivatives of a state, or of its rates, by the six strains and the temperature at the end of a path.
type slopes struct {
	creep      [7]tensor.Sym
	equivalent [7]float64
	internal   [variables][7]float64
}

const temperatureColumn = 6

// add adds h·d.
func (s *slopes) add(h float64, d *slopes) {
	for k := range s.creep {
		for i := range s.creep[k] {
			s.creep[k][i] += h * d.creep[k][i]
		}
		s.equivalent[k] += h * d.equivalent[k]
	}
	for v := range s.internal {
		for k := range s.internal[v] {
			s.internal[v][k] += h * d.internal[v][k]
		}
	}
}

// through sets s to the derivatives of the rates a stage stands for, given those of its start state. part is how far along
// the path the stage ends: its strain and temperature move with that part of the path's end.
func (s *slopes) through(g *stage, from *slopes, part, dt float64, count int) {
	u, perTime := g.fraction, 1/dt
	var n, side tensor.Sym // by the deviator: of ln q, and of s1
	if g.equivalent > 0 {
		n = g.deviator.Scale((2.0 / 3) / (g.equivalent * g.equivalent))
	}
	side = g.projector.Scale(2 * g.shear)
	for k := range s.creep {
		e, volume, warm := from.creep[k].Scale(-1), 0.0, 0.0
		if k < temperatureColumn {
			e[k] += part
			if k < 3 {
				volume = part
			}
		} else {
			warm = part
		}
		e = e.Deviator()
		d := nudged{
			logTrial: n.Dot(e), strain: from.equivalent[k], temperature: warm, mean: g.bulk * volume,
			principal: side.Dot(e),
		}
		for v := range count {
			d.internal[v] = from.internal[v][k]
		}
		fall := u * (1 - u) * g.slope.z.times(&d, count)
		for i := range e {
			s.creep[k][i] = perTime * (u*e[i] + fall*g.deviator[i])
		}
		s.equivalent[k] = perTime * g.equivalent * (u*d.logTrial + fall)
		for v := range count {
			s.internal[v][k] = perTime * (g.slope.internal[v].times(&d, count) - from.internal[v][k])
		}
	}
}

// nudged is a change of the data of a stage, in the order of datum.
type nudged datum

func (a *datum) times(d *nudged, count int) float64 {
	s := a.logTrial*d.logTrial + a.strain*d.strain + a.temperature*d.temperature + a.mean*d.mean + a.principal*d.principal
	for v := range count {
		s += a.internal[v] * d.internal[v]
	}
	return s
}

// tangent writes ∂σ/∂ε and ∂σ/∂T at the end of the path, from the derivatives of the creep strain there: σ = C(T):(ε-εc-εₜ).
func (s *slopes) tangent(out *Result, g *stage) {
	for k := range 6 {
		e := s.creep[k].Scale(-1)
		e[k] += 1
		column := e.Deviator().Scale(2 * g.shear)
		if k < 3 {
			addMean(&column, g.bulk)
		} else {
			column = column.Scale(0.5) // the strain is one of two equal components, the tangent's column counts them both
		}
		for i := range column {
			out.Tangent[i][k] = column[i]
		}
	}
	warm := s.creep[temperatureColumn].Deviator().Scale(-2 * g.shear)
	out.ByTemperature = warm.Add(g.deviator.Scale(2 * g.shearByT * (1 - g.fraction)))
	addMean(&out.ByTemperature, g.meanByTemperature())
}
