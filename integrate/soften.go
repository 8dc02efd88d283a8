package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// solveSoftening finds the root connected to Δt → 0 for a law whose rate grows with creep strain. F can then rise, fall and
// rise again; only its first crossing of zero, met coming from u = 0, continues the history. The search walks up from where
// F is surely negative, in steps short enough that neither softening nor stress changes the slope by much, until F changes
// sign; the bracketed iteration finishes. When F turns down before it reached zero, no connected solution exists.
func (a *relaxation) solveSoftening(first creeplaw.LogRate) (relaxed, Code) {
	level := a.logTime + first.Value
	if level < negligible {
		return a.unrelaxed(first), 0
	}
	// Without softening the root lies to the left; there F cannot be positive.
	z := math.Log(firstGuess(level, math.Max(first.ByLogStress, 1)))
	var x relaxed
	for range 4 { // the guess is approximate: step back until F is negative
		if f, _ := a.evaluate(&x, math.Exp(z)); math.IsNaN(f) {
			return x, LawUndefined
		} else if f <= 0 {
			break
		}
		z -= 1
	}
	const most = 400 // bounds the walk; with the step below it covers more than 40 decades
	for x.iterations = 0; x.iterations < most; x.iterations++ {
		f, logFraction := a.evaluate(&x, math.Exp(z))
		slope := a.slope(&x)
		switch {
		case math.IsNaN(f):
			return x, LawUndefined
		case math.Abs(f) <= a.rounding(&x, logFraction):
			return x, 0
		case f > 0:
			return a.finishSoftening(x, z)
		case slope <= 0:
			return x, BeyondRupture
		}
		// The slope's softening part grows in proportion to u, its stress part with u(1-u)n: keep both changes moderate.
		softening := x.rate.ByLogStrain * a.share(&x)
		longest := 0.25 / (1 + math.Abs(softening))
		z += math.Min(-f/slope*(1+0x1p-20), longest)
	}
	return x, NoConvergence
}

// finishSoftening closes in on the root just passed: F > 0 at z, negative one step before.
func (a *relaxation) finishSoftening(x relaxed, high float64) (relaxed, Code) {
	low := high - 0.25*(1+0x1p-10)
	z, walked := high, x.iterations
	for x.iterations = walked; x.iterations < walked+maxIterations; x.iterations++ {
		f, logFraction := a.evaluate(&x, math.Exp(z))
		if math.IsNaN(f) {
			return x, LawUndefined
		}
		if math.Abs(f) <= a.rounding(&x, logFraction) {
			return x, 0
		}
		if f > 0 {
			high = z
		} else {
			low = z
		}
		next := z - f/a.slope(&x)
		if !(next > low && next < high) {
			next = low + (high-low)/2
		}
		if next == z || next == low || next == high {
			return x, settled(math.Abs(f))
		}
		z = next
	}
	return x, settled(x.residual)
}
