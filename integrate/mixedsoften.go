package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// solveSoftening finds the root of F that is connected to Δt → 0 for a law whose rate grows with creep strain, as
// relaxation.soften does: it walks up from where F is surely negative until F changes sign. Where F turns down
// before, no connected solution exists.
func (a *flow) solveSoftening(x *flowed, first creeplaw.LogRate) Code {
	level := a.logTime + first.Value
	if level < negligible {
		a.unrelaxed(x, first)
		return 0
	}
	z := math.Log(a.firstGuess(level, math.Max(first.ByLogStress, 1))) // without softening: the root is not below
	for range 4 {                                                      // the guess is approximate: step back until F is negative
		if f, _ := a.evaluate(x, math.Exp(z)); math.IsNaN(f) {
			return LawUndefined
		} else if f <= 0 {
			break
		}
		z--
	}
	const most = 400 // bounds the walk; with the step below it covers more than 40 decades
	low := math.Inf(-1)
	for x.iterations = 0; x.iterations < most; x.iterations++ {
		f, logFraction := a.evaluate(x, math.Exp(z))
		slope := a.slope(x)
		switch {
		case math.IsNaN(f):
			return LawUndefined
		case math.IsInf(f, -1): // a rate without bound
			return BeyondRupture
		case finite(f) && math.Abs(f) <= a.rounding(x, logFraction):
			return 0
		case f > 0:
			return a.finishSoftening(x, low, z)
		case slope <= 0, math.IsInf(x.strain, 1):
			return BeyondRupture
		}
		// The slope's softening part grows in proportion to Δp: keep its change moderate.
		softening := x.rate.ByLogStrain * a.share(x)
		longest := 0.25 / (1 + math.Abs(softening))
		low = z
		z += math.Min(-f/slope*(1+0x1p-20), longest)
	}
	return NoConvergence
}

// finishSoftening closes in on the root just passed: F > 0 at z = high, negative at low.
func (a *flow) finishSoftening(x *flowed, low, high float64) Code {
	if math.IsInf(low, -1) {
		low = high - 1
	}
	z, walked := high, x.iterations
	for x.iterations = walked; x.iterations < walked+maxIterations; x.iterations++ {
		f, logFraction := a.evaluate(x, math.Exp(z))
		if math.IsNaN(f) {
			return LawUndefined
		}
		if finite(f) && math.Abs(f) <= a.rounding(x, logFraction) {
			return 0
		}
		if f > 0 {
			high = z
		} else {
			low = z
		}
		next := z - f/a.slope(x)
		if !(next > low && next < high) {
			next = low + (high-low)/2
		}
		if next == z || next == low || next == high {
			return settled(math.Abs(f))
		}
		z = next
	}
	return settled(x.residual)
}
