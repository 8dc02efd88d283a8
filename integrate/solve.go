package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// relaxation is the scalar problem the 3-D step reduces to. With isotropic elasticity the end deviator is parallel to the
// trial deviator, so one number is unknown: the fraction u of the trial deviatoric elastic strain that creeps away,
//
//	u = 3G Δp/q,   σ = (1-u) q,   p = p₀ + u q/3G.
//
// The residual is taken in logarithms and in the variable z = ln[u/(1-u)],
//
//	F(z) = ln u - ln(Δt/(q/3G)) - ln ṗ(σ, p, T)
//
// because F is then smooth and, for a law that rises with stress and does not soften, increasing everywhere, with the slope
// 1 + hardening where little relaxes (z → -∞) and the stress exponent n where nearly all does (z → +∞). One variable serves
// both regimes, and neither u nor 1-u loses digits.
type relaxation struct {
	law         creeplaw.Logarithmic
	trial       float64 // q: von Mises stress of the trial state
	elastic     float64 // q/3G: its equivalent elastic strain
	start       float64 // p₀: equivalent creep strain at the start
	temperature float64
	logTime     float64 // ln(Δt/(q/3G))
}

// relaxed is the solution of a relaxation.
type relaxed struct {
	fraction   float64          // u
	kept       float64          // r = 1-u
	strain     float64          // p at the end
	rate       creeplaw.LogRate // the law at the end
	iterations int
	residual   float64 // |F| at the last evaluation of the law
}

const (
	epsilon       = 0x1p-52
	maxIterations = 60
	// tolerance on F: the relative error of Δp left by the iteration in the worst case. Usually it stops at rounding.
	tolerance = 2e-13
	// negligible is the ln u below which the creep increment is beneath all float64 arithmetic on the trial strain.
	negligible = -640
	// mostStalls is how often in a row |F| may fail to fall well before the bracket is halved.
	mostStalls = 3
)

// solve finds the root of F. It returns zero or the code of the failure.
func (a *relaxation) solve(x *relaxed) Code {
	first := a.law.LogRate(creeplaw.Point{Stress: a.trial, Strain: a.start, Temperature: a.temperature})
	*x = relaxed{kept: 1, strain: a.start, rate: first}
	switch {
	case math.IsNaN(first.Value):
		return LawUndefined
	case math.IsInf(first.Value, -1):
		return 0
	case first.ByLogStrain > 0:
		return a.soften(x)
	}
	level, slope := a.logTime+first.Value, 1.0
	switch hardening := -first.ByLogStrain; {
	case math.IsInf(first.Value, 1): // hardening from zero strain: look from the largest strain the step could reach
		first = a.law.LogRate(creeplaw.Point{Stress: a.trial, Strain: a.start + a.elastic, Temperature: a.temperature})
		if !finite(first.Value) {
			return LawUndefined
		}
		if first.ByLogStrain < 0 {
			slope -= first.ByLogStrain
		}
		level = (a.logTime + first.Value) / slope
	case hardening > 0 && a.start < a.elastic: // the strain of the step may outgrow the strain before it
		if l := (level - hardening*math.Log(a.elastic/a.start)) / (1 + hardening); l < level {
			level, slope = l, 1+hardening
		}
	}
	if level < negligible {
		return 0
	}
	n := first.ByLogStress / slope
	if !(n > 0) {
		n = 0
	}
	return a.iterate(x, first, firstGuess(level, n))
}

// firstGuess returns the odds u/(1-u) that solve z + (n-1) softplus(z) = level with z = ln(odds): the problem of a power law
// whose exponent n (over the stiffening) is the local one. Far from the corner it starts from the asymptotes z = level and
// z = level/n, near it from the hyperbola that has them, and improves that by third-order steps in rational arithmetic. The
// law itself is not asked. The error left is below 1e-3 but for large exponents in the corner.
func firstGuess(level, n float64) float64 {
	z, odds := level, roughExponential(level)
	if n*odds > 0.4 {
		if z = level / n; z < 2 {
			const width = 1.9 // (2 ln 2)² meets softplus at z = 0; this value shares the error out over n = 1 … 50
			z = ((n+1)*level - (n-1)*math.Sqrt(level*level+n*width)) / (2 * n)
		}
		odds = roughExponential(z)
	}
	if n == 0 { // a law that does not feel the stress
		return odds
	}
	rise := n - 1
	for range 2 {
		f := z - level
		y := odds / (2 + odds) // ln(1+x) = 2 artanh(x/(2+x))
		if odds > 1 {
			y = 1 / (1 + 2*odds)
			f += rise * z
		}
		f += rise * doubleArtanh(y)
		kept := 1 / (1 + odds)
		u := odds * kept
		slope := 1 + rise*u
		halley := slope*slope - 0.5*f*rise*u*kept
		if !(halley > 0.5*slope*slope) {
			halley = 0.5 * slope * slope
		}
		step := -f * slope / halley
		z += step
		odds *= exponential(step)
		if step*step < 0.01 { // what is left is of third order
			break
		}
	}
	return odds
}

// doubleArtanh is 2 artanh(y) for |y| <= 1/3, to 1e-5.
func doubleArtanh(y float64) float64 {
	s := y * y
	return 2 * y * (1 + s*(1.0/3+s*(1.0/5+s*(1.0/7))))
}

// logRatio is ln(x/y), to 1e-4 of itself where x and y are within a factor of two, as they most often are.
func logRatio(x, y float64) float64 {
	if x < 2*y && y < 2*x {
		return doubleArtanh((x - y) / (x + y))
	}
	return math.Log(x / y)
}

// bound is one end of the bracket: where F was evaluated, and where it pointed.
type bound struct {
	odds  float64 // u/(1-u)
	f     float64 // F there, +Inf where the law does not creep at all
	slope float64 // dF/dz there
	step  float64 // the step of the model there, without the law's curvature; NaN where it is not wanted any more
}

// iterate runs the safeguarded third-order iteration from the odds u/(1-u).
func (a *relaxation) iterate(x *relaxed, first creeplaw.LogRate, odds float64) Code {
	low, high := bound{}, bound{odds: math.Inf(1)}
	before, beforeKept := first, 1.0 // the previous evaluation, at r = 1-u
	last, stalls := math.Inf(1), 0   // its |F|, and how often in a row that did not fall well
	for small := false; x.iterations <= maxIterations; x.iterations++ {
		f, logFraction := a.evaluate(x, odds)
		size := math.Abs(f)
		switch {
		case math.IsNaN(f):
			return LawUndefined
		case x.rate.ByLogStrain > 0: // not to be seen at zero strain, where the exponent vanishes
			return a.soften(x)
		case small && size <= tolerance, (size < 1e-6 || x.rate.ByLogStress-x.rate.ByLogStrain > 1e8) && size <= a.rounding(x, logFraction):
			x.residual = size
			return 0
		}
		slope := a.slope(x)
		sameLaw := x.rate.ByLogStress == before.ByLogStress && x.rate.ByLogStrain == before.ByLogStrain
		step, curved := math.NaN(), math.NaN()
		if sameLaw || size > 1 {
			step = a.step(x, f, slope, 0)
			curved = step
		}
		if !sameLaw {
			curved = a.step(x, f, slope, curvatureOfLaw(&x.rate, &before, logRatio(x.kept, beforeKept)))
		}
		small = math.Abs(curved) < 1e-4
		if small && sameLaw {
			// A power law between the last two points: the third-order step leaves less than |F| step².
			if rest := size * step * step; rest <= tolerance {
				x.iterations++
				x.residual = rest
				a.place(x, odds*exponential(step))
				return 0
			}
		}
		from := &low
		if f > 0 {
			from = &high
		}
		*from = bound{odds, f, slope, step}
		if stalls++; size < 0.7*last || stalls > mostStalls {
			stalls = 0
		}
		next := 0.0
		switch bracketed := low.odds > 0 && finite(high.f) && !math.IsInf(high.odds, 1); {
		case bracketed && (stalls > 0 || corner(&low, &high, from) != from):
			next = between(&low, &high, from, stalls)
		default:
			next = advance(odds, curved, low.odds, high.odds)
		}
		if next == odds || next == low.odds || next == high.odds { // neighbouring numbers bracket the root
			x.residual = size
			return a.settle(x, low.odds, size)
		}
		if finite(f) {
			before, beforeKept = x.rate, x.kept
		}
		last, odds = size, next
	}
	return NoConvergence
}

// corner says which end of the bracket sees the root. Where two laws act together F is nearly two straight lines; the sign
// of F where the tangents of the ends meet tells on which of them the root lies. Where it cannot tell it returns the end
// evaluated last.
func corner(low, high, last *bound) *bound {
	const alike = 1.5 // slopes within this ratio make no corner
	if low.slope < alike*high.slope && high.slope < alike*low.slope {
		return last
	}
	width := math.Log(high.odds / low.odds)
	meet := (high.f - low.f - high.slope*width) / (low.slope - high.slope) // distance in z from the low end
	switch {
	case !(meet > 0 && meet < width):
		return last
	case low.f+low.slope*meet > 0:
		return low
	}
	return high
}

// between chooses a point inside the bracket when the models of law and solution threw the iteration to the far side of a
// corner between laws: first from the end that sees the root, then on the chord, and then by halving the bracket.
func between(low, high, last *bound, stalls int) float64 {
	from := corner(low, high, last)
	if math.IsNaN(from.step) {
		from = last
	}
	step := from.step
	from.step = math.NaN() // a second time it would lead to the same point
	switch stalls {
	case 2:
		from, step = low, math.Log(high.odds/low.odds)*low.f/(low.f-high.f)
	case mostStalls:
		step = math.NaN()
	}
	return advance(from.odds, step, low.odds, high.odds)
}

// settle accepts a root that the number system cannot resolve further: one that meets the tolerance or is lost in the rounding
// of its own terms, or one at which the law stops creeping altogether, as at a threshold stress: there the end of the bracket
// that still creeps is taken.
func (a *relaxation) settle(x *relaxed, low, size float64) Code {
	if math.IsInf(size, 1) && low > 0 {
		f, _ := a.evaluate(x, low)
		if math.IsNaN(f) {
			return LawUndefined
		}
		x.residual = 0
		return 0
	}
	if size <= 4*a.rounding(x, math.Log(x.fraction)) { // the law rounds as well
		return 0
	}
	return settled(size)
}

func settled(size float64) Code {
	if size <= tolerance {
		return 0
	}
	return NoConvergence
}

// place sets the unknowns from the odds u/(1-u).
func (a *relaxation) place(x *relaxed, odds float64) {
	x.kept = 1 / (1 + odds)
	x.fraction = odds * x.kept
	if odds > 1e300 {
		x.fraction = 1
	}
	x.strain = a.start + x.fraction*a.elastic
}

// evaluate sets the unknowns from the odds, asks the law and returns F and ln u.
func (a *relaxation) evaluate(x *relaxed, odds float64) (f, logFraction float64) {
	a.place(x, odds)
	x.rate = a.law.LogRate(creeplaw.Point{Stress: x.kept * a.trial, Strain: x.strain, Temperature: a.temperature})
	logFraction = math.Log(x.fraction)
	f = logFraction - a.logTime - x.rate.Value
	return f, logFraction
}

// rounding is the size of F that is rounding of its own terms, and of the stress and strain the law was asked at.
func (a *relaxation) rounding(x *relaxed, logFraction float64) float64 {
	return epsilon * (math.Abs(logFraction) + math.Abs(a.logTime) + math.Abs(x.rate.Value) +
		2*math.Abs(x.rate.ByLogStress) + 2*math.Abs(x.rate.ByLogStrain))
}

// slope is dF/dz: (1-u)(1 + hardening) + u n, with the hardening seen by the increment.
func (a *relaxation) slope(x *relaxed) float64 {
	return x.kept*a.stiffening(x) + x.fraction*x.rate.ByLogStress
}

// stiffening is d(ln u - ln ṗ)/d ln u at fixed stress: 1 - (∂ln ṗ/∂ln p) Δp/p.
func (a *relaxation) stiffening(x *relaxed) float64 {
	return 1 - x.rate.ByLogStrain*a.share(x)
}

// share is Δp/p, the part of the accumulated creep strain that this step adds.
func (a *relaxation) share(x *relaxed) float64 {
	if a.start == 0 {
		return 1
	}
	return x.fraction * a.elastic / x.strain
}

// step is the change of z that solves the local model F(z+δ) = F + F'·(e^(cδ)-1)/c, c = F”/F', which is exact for a power
// law at both ends and for an exponential of stress: Newton's step with a factor that makes it third order. Where the exponent
// grows faster than that as the stress falls, as it does above a threshold stress, the model is a pole instead, F' ∝ 1/(1-cδ),
// whose step stays short of it.
func (a *relaxation) step(x *relaxed, f, slope, lawCurvature float64) float64 {
	u, r, share := x.fraction, x.kept, 1.0
	if a.start > 0 {
		share = u * a.elastic / x.strain
	}
	n, hardening := x.rate.ByLogStress, -x.rate.ByLogStrain
	if !(slope > 0) || math.IsInf(f, 0) {
		return math.NaN() // no direction to trust: let the bracket decide
	}
	second := u*r*(n-1-hardening*share) + hardening*share*(1-share)*r*r - u*u*lawCurvature
	perSlope := 1 / slope
	newton := -f * perSlope
	t := -newton * second * perSlope // F F”/F'²
	switch {
	case math.Abs(t) < 0.25:
		return newton / (1 - t*(0.5+t*(1.0/12+t/24)))
	case t < 0 && lawCurvature < -n:
		reach := -slope / second * math.Expm1(t)
		if t < -1 {
			reach *= 0.97 // the pole is only estimated
		}
		return reach
	case t > 0.95:
		t = 0.95
	}
	return -newton * math.Log1p(-t) / t
}

// curvatureOfLaw estimates dn/d ln σ from the law at two stresses, rise apart in ln σ: exact for a power law, for an exponential
// and for a pole.
func curvatureOfLaw(l, before *creeplaw.LogRate, rise float64) float64 {
	n, nBefore := l.ByLogStress, before.ByLogStress
	change := n - nBefore
	switch {
	case change == 0 || rise == 0:
		return 0
	case change*rise < 0 && n > 1.5*nBefore: // as above a threshold: n grows like a pole as the stress falls
		return change / rise * n / nBefore
	case l.ByLogStrain == 0 && before.ByLogStrain == 0 && math.Abs(rise) < 1:
		// Stress alone: the cubic through both values and exponents.
		return ((4*n+2*nBefore)*rise - 6*(l.Value-before.Value)) / (rise * rise)
	case math.Abs(change) < 0.1*nBefore || !(n > 0 && nBefore > 0):
		return change / rise
	}
	return n * logRatio(n, nBefore) / rise
}

// advance moves by a step in z, inside the bracket of odds; without a step (NaN) it halves the bracket or looks further out.
func advance(odds, step, low, high float64) float64 {
	const longest = 300 // keeps the exponential finite
	step = math.Max(-longest, math.Min(longest, step))
	next := odds * exponential(step)
	switch {
	case next > low && next < high && finite(next), next == odds:
		return next
	case low == 0:
		return math.Min(math.Sqrt(high), high*math.Exp(-2))
	case math.IsInf(high, 1):
		return low * math.Exp(2)
	}
	return math.Sqrt(low) * math.Sqrt(high)
}

// exponential is e^x: to rounding for the last, small steps, to 1e-6 for the moderate ones before, which only aim.
func exponential(x float64) float64 {
	switch s := x * x; {
	case s < 1e-8:
		return 1 + x*(1+x*(1.0/2+x/6))
	case s < 0.25:
		even, odd := 12+s, 6*x
		return (even + odd) / (even - odd) // Padé [2/2], error x⁵/720
	}
	return math.Exp(x)
}

// roughExponential is e^x to 3e-6: enough for a first guess, at a fraction of the cost.
func roughExponential(x float64) float64 {
	const largest = 700
	if !(x < largest) {
		x = largest
	} else if x < -largest {
		x = -largest
	}
	t := x * math.Log2E
	whole := int64(t) // truncated: the rest is within ±1
	y := (t - float64(whole)) * (math.Ln2 / 2)
	e := 1 + y*(1+y*(1.0/2+y*(1.0/6+y*(1.0/24+y*(1.0/120+y/720)))))
	return math.Float64frombits(uint64(whole+1023)<<52) * e * e
}
