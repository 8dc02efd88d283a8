package integrate

import "math"

// soften finds the root connected to Δt → 0 for a creep law whose rate grows with strain. F can then rise, fall and rise again;
// the history continues to its first crossing of zero, met coming from w = 0, which is plastic flow alone, but only while F rises:
// where it falls, the solutions for longer and longer steps turn back, and rupture lies within the step. The search walks up from
// where softening does not matter yet, in strides so short that neither softening nor stress changes the slope by much, until F
// changes sign or falls.
func (a *yieldFlow) soften(x *yielded) Code {
	z, code := a.below(x)
	if code != 0 || x.fraction == 0 {
		return code
	}
	const most = 4000 // bounds the walk: that of the whole range of z without softening
	odds := math.Exp(z)
	for x.iterations = 0; x.iterations < most; x.iterations++ {
		f, logFraction := a.evaluate(x, odds)
		slope := a.slope(x, odds)
		switch {
		case math.IsNaN(f):
			return LawUndefined
		case math.Abs(f) <= a.rounding(&x.relaxed, logFraction):
			x.residual = math.Abs(f)
			return 0
		case f > 0:
			return a.closeIn(x, odds)
		case !(slope > 0) || odds == a.corner && !(a.slopeBelowCorner(x) > 0):
			return BeyondRupture
		}
		next := odds * math.Exp(math.Min(-f/slope*(1+0x1p-20), a.stride(x, odds)))
		if odds < a.corner && next > a.corner {
			next = a.corner
		}
		odds = next
	}
	return NoConvergence
}

// slopeBelowCorner is dF/dz at the corner on the side with plastic flow.
func (a *yieldFlow) slopeBelowCorner(x *yielded) float64 {
	side := *x
	side.share = a.surface.shareOf(a.surface.slope0)
	return a.slope(&side, a.corner)
}

// stride is how far z may go at once: the slope's softening part grows in proportion to Δp, as long as stress is left to creep.
func (a *yieldFlow) stride(x *yielded, odds float64) float64 {
	return 0.25 / (1 + math.Abs(a.memory(x))/(1+x.share*odds))
}

// below returns a z below which F rises and has no root. Softening only lowers F, so that there is none below the root for the
// strain at w = 0, nor where the law still hardens and F is negative; and where the softening share of the slope is slight, it was
// less before. If the step does not creep, the fraction of x is 0.
func (a *yieldFlow) below(x *yielded) (z float64, code Code) {
	const longest, singular, slight = 600, 40, 0.1
	a.place(x, 0)
	virgin := a.at(x)
	x.rate = a.law.LogRate(virgin)
	level := a.logTime + x.rate.Value - math.Log(x.kept)
	switch {
	case math.IsNaN(level):
		return 0, LawUndefined
	case level < negligible:
		return 0, 0
	case math.IsInf(level, 1): // hardening from zero strain, before it softens
		level = singular
	}
	for z = math.Min(level, longest); z >= negligible; z-- {
		f, logFraction := a.evaluate(x, math.Exp(z))
		virgin.Stress = x.kept * a.trial
		frozen := logFraction - a.logTime - a.law.LogRate(virgin).Value
		if f <= 0 && (frozen <= 0 || x.rate.ByLogStrain <= 0) && a.memory(x) > -slight {
			return z, 0
		}
	}
	return 0, LawUndefined
}

// closeIn closes in on the root just passed: F > 0 at the odds, negative one stride before.
func (a *yieldFlow) closeIn(x *yielded, odds float64) Code {
	low, high := odds*math.Exp(-0.25*(1+0x1p-10)), odds
	for last := x.iterations + maxIterations; x.iterations < last; x.iterations++ {
		f, logFraction := a.evaluate(x, odds)
		if math.IsNaN(f) {
			return LawUndefined
		}
		slope := a.slope(x, odds)
		x.residual = math.Abs(f)
		if x.residual <= a.rounding(&x.relaxed, logFraction) {
			return 0
		}
		if f > 0 {
			high = odds
		} else {
			low = odds
		}
		next := advance(odds, -f/slope, low, high)
		if next == odds || next == low || next == high { // neighbouring numbers bracket the root
			if x.residual <= 4*epsilon*math.Abs(slope) {
				return 0
			}
			break
		}
		odds = next
	}
	return settled(x.residual)
}
