package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// flow is the scalar problem of a step whose trial stress is above the yield surface. Creep and plastic flow share the
// direction of the end deviator, so that two numbers are unknown, the increments Δp of creep and Δκ of plastic strain,
//
//	σ = q - 3G (Δp + Δκ),   ln Δp = ln Δt + ln ṗ(σ, p, T),   σ <= σy(κ₀+Δκ),   Δκ >= 0,   Δκ = 0 where σ < σy.
//
// One variable serves both, the odds w = 3GΔp/σ, whose logarithm is z of the problem without plasticity. For a given w the
// stress is (q - 3GΔκ)/(1+w): either the yield surface is met, at one Δκ, or, for w above the corner q/σy(κ₀) - 1, it is not
// and Δκ = 0. Either way
//
//	F(z) = ln Δp - ln Δt - ln ṗ(σ, p, T)
//
// rises with z everywhere for a law that rises with stress and does not soften: creep takes from plastic flow, and the stress
// falls as the surface is met earlier. With k = H/(3G+H) on the surface and 1 below it, and kw for the odds,
//
//	dF/dz = (1 + m')/(1+kw) + n kw/(1+kw),
//
// m' from the hardening of creep: the same two straight lines, joined at larger odds. There is no other case: perfect
// plasticity is k = 0, and a step without creep w = 0.
type yieldFlow struct {
	relaxation
	surface   surface
	corner    float64 // the odds at which creep alone takes the stress to the yield surface
	inelastic bool    // the law remembers plastic strain too
}

// yielded is the solution of a flow.
type yielded struct {
	relaxed
	plastic float64 // Δκ
	share   float64 // k
}

// mostReturns bounds the corrections; halving alone would need fewer.
const mostReturns = 150

// solve finds the root of F. It returns zero or the code of the failure.
func (a *yieldFlow) solve(x *yielded) Code {
	a.place(x, 0) // the stress of plastic flow alone: the greatest the law will be asked for
	if math.IsInf(a.logTime, -1) {
		return 0
	}
	first := a.law.LogRate(a.at(x))
	x.rate = first
	slope := 1.0
	switch {
	case math.IsNaN(first.Value):
		return LawUndefined
	case math.IsInf(first.Value, -1):
		return 0
	case first.ByLogStrain > 0:
		return a.soften(x)
	case math.IsInf(first.Value, 1): // hardening from zero strain: look from the largest strain the step could reach
		first = a.law.LogRate(creeplaw.Point{Stress: x.kept * a.trial, Strain: a.start + a.elastic, Temperature: a.temperature})
		if !finite(first.Value) {
			return LawUndefined
		}
		slope += math.Max(0, -first.ByLogStrain)
	}
	level := (a.logTime + first.Value - math.Log(x.kept)) / slope
	if level < negligible {
		return 0
	}
	return a.iterate(x, math.Min(a.corner, a.guess(level, first.ByLogStress/slope, x.share)))
}

// guess returns the odds that a power law of the exponent n finds, where w alone would be e^level.
func (a *yieldFlow) guess(level, n, share float64) float64 {
	const straight, longest = 1e-30, 600
	if !(share*n > straight) {
		return math.Exp(math.Min(level, longest))
	}
	return firstGuess(level+math.Log(share), n) / share
}

func (a *yieldFlow) at(x *yielded) creeplaw.Point {
	return creeplaw.Point{Stress: x.kept * a.trial, Strain: x.strain, Temperature: a.temperature}
}

// place sets the unknowns from the odds.
func (a *yieldFlow) place(x *yielded, odds float64) {
	if odds >= a.corner {
		a.relaxation.place(&x.relaxed, odds)
		x.plastic, x.share = 0, 1
		return
	}
	m := a.surface.meet(1+odds, a.trial)
	x.kept, x.plastic, x.share = m.stress/a.trial, m.strain, m.share
	x.fraction = odds * x.kept
	x.strain = a.start + x.fraction*a.elastic
	if a.inelastic {
		x.strain += x.plastic
	}
}

// evaluate sets the unknowns from the odds, asks the law and returns F and ln u.
func (a *yieldFlow) evaluate(x *yielded, odds float64) (f, logFraction float64) {
	a.place(x, odds)
	x.rate = a.law.LogRate(a.at(x))
	logFraction = math.Log(x.fraction)
	return logFraction - a.logTime - x.rate.Value, logFraction
}

// hardening is m Δp/p, with the strain p that the law remembers.
func (a *yieldFlow) hardening(x *yielded) float64 {
	if x.rate.ByLogStrain == 0 || x.fraction == 0 {
		return 0
	}
	return -x.rate.ByLogStrain * (x.fraction * a.elastic / x.strain)
}

// memory is m' in dF/dz: creep that the law remembers grows with w, all of it or what plastic flow does not give back.
func (a *yieldFlow) memory(x *yielded) float64 {
	if a.inelastic {
		return x.share * a.hardening(x)
	}
	return a.hardening(x)
}

// slope is dF/dz at odds w.
func (a *yieldFlow) slope(x *yielded, odds float64) float64 {
	w := x.share * odds
	kept := 1 / (1 + w)
	return kept*(1+a.memory(x)) + (1-kept)*x.rate.ByLogStress
}

// iterate runs the safeguarded iteration from the odds w: the exact root of a power law through the last point, then Newton's
// steps. A bracket is kept; a step across the corner stops there first, so that the rest is smooth but for the corners of a
// table or of a sum of laws.
func (a *yieldFlow) iterate(x *yielded, odds float64) Code {
	low, high := bound{}, bound{odds: math.Inf(1), f: math.Inf(1)}
	before := yielded{relaxed: relaxed{rate: x.rate, kept: x.kept}} // the previous evaluation
	last, stalls := math.Inf(1), 0
	for x.iterations = 0; x.iterations <= mostReturns; x.iterations++ {
		f, logFraction := a.evaluate(x, odds)
		size := math.Abs(f)
		switch {
		case math.IsNaN(f):
			return LawUndefined
		case x.rate.ByLogStrain > 0:
			return a.soften(x)
		case size <= tolerance, (size < 1e-6 || x.rate.ByLogStress > 1e8) && size <= a.rounding(&x.relaxed, logFraction):
			x.residual = size
			return 0
		}
		if f > 0 {
			high = bound{odds: odds, f: f}
			if odds == a.corner { // the root is on the yield surface
				x.share = a.surface.shareOf(a.surface.slope0)
			}
		} else {
			low = bound{odds: odds, f: f}
		}
		if stalls++; size < 0.5*last {
			stalls = 0
		}
		next := a.next(x, &before, f, odds, &low, &high, stalls)
		if next == odds || next == low.odds || next == high.odds { // neighbouring numbers bracket the root
			return a.settle(x, low.odds, size)
		}
		if finite(f) {
			before = *x
		}
		last, odds = size, next
	}
	return NoConvergence
}

// next chooses the odds to try next.
func (a *yieldFlow) next(x, before *yielded, f, odds float64, low, high *bound, stalls int) float64 {
	step := math.NaN()
	switch bracketed := low.odds > 0 && finite(high.f); {
	case bracketed && stalls%4 == 2: // on the chord
		return advance(low.odds, math.Log(high.odds/low.odds)*low.f/(low.f-high.f), low.odds, high.odds)
	case bracketed && stalls%4 == 3, math.IsInf(f, 0): // halve
	default:
		step = a.step(x, before, f, odds)
	}
	next := advance(odds, step, low.odds, high.odds)
	if a.corner > low.odds && a.corner < high.odds && (next > a.corner) != (odds > a.corner) {
		return a.corner
	}
	return next
}

// step is the change of z to the root: for a law with one exponent that of a power law, exact but for the guess of it, when it
// is far, and otherwise the third-order step of the problem without plasticity that has the same odds and the same creep.
func (a *yieldFlow) step(x, before *yielded, f, odds float64) float64 {
	slope := a.slope(x, odds)
	if !(slope > 0) {
		return math.NaN() // no direction to trust: let the bracket decide
	}
	const far, near, smallest = 0.1, 1e-3, 1e-280
	memory, w := 1+a.memory(x), x.share*odds
	curvature := 0.0
	if rise := logRatio(x.kept, before.kept); math.Abs(rise) > 1e-4 {
		curvature = curvatureOfLaw(&x.rate, &before.rate, rise)
	}
	n := x.rate.ByLogStress / memory
	switch {
	case !(w > smallest) || math.Abs(f) < near:
		return -f / slope
	case math.Abs(f) > far && n > 0 && (curvature == 0 || x.iterations == 0):
		level := math.Log(w) + (n-1)*math.Log1p(w) - f/memory
		return math.Log(firstGuess(level, n) / w)
	}
	like := relaxed{kept: 1 / (1 + w), fraction: w / (1 + w), strain: x.strain, rate: x.rate}
	creep := x.fraction * a.elastic
	problem := relaxation{start: math.Max(0, x.strain-creep), elastic: creep / like.fraction}
	return problem.step(&like, f, slope, curvature)
}

// settle accepts a root that the number system cannot resolve further, as relaxation.settle does.
func (a *yieldFlow) settle(x *yielded, low, size float64) Code {
	if math.IsInf(size, 1) && low > 0 { // the law stops creeping there: take the end of the bracket that still creeps
		f, _ := a.evaluate(x, low)
		if math.IsNaN(f) {
			return LawUndefined
		}
		x.residual = 0
		return 0
	}
	x.residual = size
	if size <= a.rounding(&x.relaxed, math.Log(x.fraction)) {
		return 0
	}
	return settled(size)
}

// linearise differentiates the solution by q and by T at the end. It reports false where the solution turns back, which is
// rupture.
func (a *yieldFlow) linearise(x *yielded) (linearised, bool) {
	if x.share == 1 {
		return a.relaxation.linearise(&x.relaxed)
	}
	odds := x.fraction / x.kept
	slope := a.slope(x, odds)
	if !(slope > 0) {
		return linearised{}, false
	}
	hardening := 1 + a.hardening(x)
	creeps := hardening // of dσy/dT what reaches the stress: creep hardens against it
	if a.inelastic {
		creeps = 1
	}
	_, _, yieldByT := a.surface.stress(a.surface.start + x.plastic)
	perSlope := 1 / ((1 + x.share*odds) * slope)
	byTrial := x.share * hardening * perSlope
	return linearised{
		excess:  byTrial - x.kept,
		elastic: byTrial,
		byTemperature: perSlope * ((1-x.share)*creeps*yieldByT/a.trial -
			x.share*x.fraction*x.rate.ByLogTemperature/a.temperature),
	}, true
}
