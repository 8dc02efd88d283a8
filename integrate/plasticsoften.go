package integrate

import "math"

// soften finds the root connected to Δt → 0 for a creep law whose rate grows with strain. F can then rise, fall and rise again;
// only its first crossing of zero, met coming from w = 0, which is plastic flow alone, continues the history. The search walks
// up from where F is negative, in steps short enough that neither softening nor stress changes the slope by much, until F
// changes sign; where F turns down before, no connected solution exists.
func (a *yieldFlow) soften(x *yielded) Code {
	z, code := a.below(x)
	if code != 0 || x.fraction == 0 {
		return code
	}
	const most = 2000 // bounds the walk, which covers 40 decades
	for x.iterations = 0; x.iterations < most; x.iterations++ {
		odds := math.Exp(z)
		f, logFraction := a.evaluate(x, odds)
		slope := a.slope(x, odds)
		switch {
		case math.IsNaN(f):
			return LawUndefined
		case math.Abs(f) <= a.rounding(&x.relaxed, logFraction):
			x.residual = math.Abs(f)
			return 0
		case f > 0:
			return a.closeIn(x, z)
		case !(slope > 0):
			return BeyondRupture
		}
		z += math.Min(-f/slope*(1+0x1p-20), a.stride(x))
	}
	return NoConvergence
}

// stride is how far z may go at once: the slope's softening part grows in proportion to Δp.
func (a *yieldFlow) stride(x *yielded) float64 { return 0.25 / (1 + math.Abs(a.hardening(x))) }

// below returns a z below which F has no root, near to where it would vanish without softening. Softening only lowers F, so
// that below the root for the strain at w = 0 there is none; nor is there one where the law still hardens and F is negative. If
// the step does not creep, the fraction of x is 0.
func (a *yieldFlow) below(x *yielded) (z float64, code Code) {
	const longest, singular = 600, 40
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
		if f <= 0 && (frozen <= 0 || x.rate.ByLogStrain <= 0) {
			return z, 0
		}
	}
	return 0, LawUndefined
}

// closeIn closes in on the root just passed: F > 0 at z, negative one stride before.
func (a *yieldFlow) closeIn(x *yielded, high float64) Code {
	low, z := high-0.25*(1+0x1p-10), high
	walked := x.iterations
	for ; x.iterations < walked+maxIterations; x.iterations++ {
		f, logFraction := a.evaluate(x, math.Exp(z))
		if math.IsNaN(f) {
			return LawUndefined
		}
		x.residual = math.Abs(f)
		if x.residual <= a.rounding(&x.relaxed, logFraction) {
			return 0
		}
		if f > 0 {
			high = z
		} else {
			low = z
		}
		next := z - f/a.slope(x, math.Exp(z))
		if !(next > low && next < high) {
			next = low + (high-low)/2
		}
		if next == z || next == low || next == high {
			break
		}
		z = next
	}
	return settled(x.residual)
}
