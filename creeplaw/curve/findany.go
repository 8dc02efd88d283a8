package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// outermost bounds |ln t| of the search on a curve of which nothing is known but its values: more than 600 decades.
const outermost = 700

// findInAny finds the point of a curve that is not a sum of terms.
func (h StrainHardened) findInAny(p creeplaw.Point) found {
	at := LogPoint{Stress: p.Stress, Temperature: p.Temperature}
	logStrain := math.Log(p.Strain)
	z := newSearch(h.firstGuess(p, logStrain))
	var l LogStrain
	for !z.done {
		at.LogTime = z.s
		l = h.logs.LogAt(at)
		above := l.Strain.Value - logStrain // ln(ε/p)
		switch {
		case math.IsNaN(l.Strain.Value) || math.IsNaN(l.Rate.Value):
			return foundNothing()
		case above < 0 && z.s == outermost:
			return never()
		case above > 0 && z.s == -outermost:
			return found{logTime: z.s, evaluations: z.evaluations, rate: creeplaw.LogRate{Value: l.Rate.Value,
				ByLogStress: l.Rate.ByLogStress, ByLogTemperature: l.Rate.ByLogTemperature}}
		}
		above = max(-huge, min(huge, above)) // far away no step but the longest is taken anyway
		v, m := math.Exp(above), 0.0
		if !math.IsInf(l.Rate.Value, -1) && !math.IsInf(l.Strain.Value, -1) {
			m = v * math.Exp(l.Rate.Value+z.s-l.Strain.Value)
		}
		z.advance(v, m, l.Rate.ByLogTime)
		z.s = max(-outermost, min(outermost, z.s))
	}
	return pointOf(l, z.s, z.rest, z.evaluations)
}

// firstGuess is ln t of creep at the initial rate, where that is finite, and of one unit of time otherwise.
func (h StrainHardened) firstGuess(p creeplaw.Point, logStrain float64) float64 {
	initial := h.curve.At(Point{Stress: p.Stress, Temperature: p.Temperature}).ByTime
	if guess := logStrain - math.Log(initial); guess > -outermost && guess < outermost {
		return guess
	}
	return 0
}

// pointOf forms the rate where a curve reaches a creep strain, to first order in the part of ln t that is left.
func pointOf(l LogStrain, logTime, rest float64, evaluations int) found {
	exponent := math.Exp(l.Rate.Value + logTime - l.Strain.Value) // ∂ln ε/∂ln t
	if exponent < smallest {
		return never()
	}
	r := found{logTime: logTime + rest, evaluations: evaluations}
	bend := l.Rate.ByLogTime / exponent // ∂ln ε̇/∂ln ε
	r.rate = creeplaw.LogRate{
		Value:            l.Rate.Value + l.Rate.ByLogTime*rest,
		ByLogStress:      l.Rate.ByLogStress - bend*l.Strain.ByLogStress,
		ByLogStrain:      bend,
		ByLogTemperature: l.Rate.ByLogTemperature - bend*l.Strain.ByLogTemperature,
	}
	return r
}
