package curve

import "math"

// plainAt turns the logarithms of a curve into plain numbers at positive time. Each derivative is formed inside the
// exponential, so that it neither overflows nor vanishes before its own value does.
func plainAt(c Logarithmic, p Point) Strain {
	q := LogPoint{p.Stress, p.Temperature, math.Log(p.Time)}
	l := c.LogAt(q)
	e := Strain{
		Value:             math.Exp(l.Strain.Value),
		ByTime:            math.Exp(l.Rate.Value),
		ByTimeTwice:       derivative(l.Rate.Value, l.Rate.ByLogTime, p.Time),
		ByTemperature:     derivative(l.Strain.Value, l.Strain.ByLogTemperature, p.Temperature),
		ByTimeTemperature: derivative(l.Rate.Value, l.Rate.ByLogTemperature, p.Temperature),
	}
	if p.Stress == 0 {
		q.Stress = faint
		l = c.LogAt(q)
		e.ByStress, e.ByTimeStress = slopeFrom(l.Strain), slopeFrom(l.Rate)
		return e
	}
	e.ByStress = derivative(l.Strain.Value, l.Strain.ByLogStress, p.Stress)
	e.ByTimeStress = derivative(l.Rate.Value, l.Rate.ByLogStress, p.Stress)
	return e
}

// faint is a stress so near to zero, in any units, that only the limiting behaviour is left.
const faint = 0x1p-1000

// slopeFrom is the derivative by stress at zero stress, taken from the logarithm at a faint one: only an exponent of one, or
// a quantity that does not vanish there, leaves a slope that is neither zero nor infinite.
func slopeFrom(e Exponents) float64 {
	const sharp = 1e-9
	switch n := e.ByLogStress; {
	case math.IsInf(e.Value, -1), n > 1+sharp:
		return 0
	case n > sharp && n < 1-sharp:
		return math.Inf(1)
	}
	return derivative(e.Value, e.ByLogStress, faint)
}
