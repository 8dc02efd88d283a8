package curve

import "math"

// plain turns the logarithms of a curve at a point of positive stress and time into plain numbers. Each derivative is formed
// inside the exponential, so that it neither overflows nor vanishes before its own value does.
func plain(p Point, l LogStrain) Strain {
	return Strain{
		Value:             math.Exp(l.Strain.Value),
		ByTime:            math.Exp(l.Rate.Value),
		ByTimeTwice:       derivative(l.Rate.Value, l.Rate.ByLogTime, p.Time),
		ByStress:          derivative(l.Strain.Value, l.Strain.ByLogStress, p.Stress),
		ByTemperature:     derivative(l.Strain.Value, l.Strain.ByLogTemperature, p.Temperature),
		ByTimeStress:      derivative(l.Rate.Value, l.Rate.ByLogStress, p.Stress),
		ByTimeTemperature: derivative(l.Rate.Value, l.Rate.ByLogTemperature, p.Temperature),
	}
}

// unloaded is plain at zero stress, where the slopes by stress are taken from the curve at a faint one.
func unloaded(p Point, l, faintly LogStrain) Strain {
	e := plain(p, l)
	e.ByStress, e.ByTimeStress = slopeFrom(faintly.Strain), slopeFrom(faintly.Rate)
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
