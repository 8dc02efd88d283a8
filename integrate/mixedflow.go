package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// flow is the scalar problem that a step reduces to whatever is prescribed. With the odds ω = 2Gλ of the multiplier in
// Δεc = λ s, the end state is that of a linear elastic solid whose shear modulus is G/(1+ω): whatever mixture of stress and
// strain is prescribed, its von Mises stress is
//
//	σₑ(ω)² = q² Σ φₖ/(1+μₖω)²,   Σ φₖ = 1,  0 <= μₖ <= 1,   Δp = ω σₑ/3G
//
// a sum over at most six modes: μ = 1 for what is held in strain, 0 for what is held in stress, between them for what
// gives way elastically, such as the thickness of a sheet. σₑ never rises and Δp never falls with ω, so that
//
//	F(z) = ln Δp - ln Δt - ln ṗ(σₑ, p₀+Δp, T),   z = ln ω
//
// increases everywhere for a law that rises with stress and does not soften. The relaxation of Step is the case of one mode.
type flow struct {
	law         creeplaw.Logarithmic
	trial       float64 // q: von Mises stress of the trial state, ω = 0
	elastic     float64 // q/3G
	start       float64 // p₀
	temperature float64
	logTime     float64 // ln(Δt/(q/3G))
	modes       [maxModes]mode
	count       int
}

// mode is a part of the trial state that flow relaxes at its own pace.
type mode struct {
	weight float64 // φ: its share of q²
	pace   float64 // μ
}

const maxModes = 6

// flowed is a point on the path of a flow, and in the end its solution.
type flowed struct {
	odds       float64 // ω
	stress     float64 // σₑ
	creep      float64 // Δp
	strain     float64 // p₀+Δp
	spent      float64 // w = -d ln σₑ/dz, between 0 and 1
	kept       float64 // 1-w = d ln Δp/dz
	bend       float64 // dw/dz
	rate       creeplaw.LogRate
	iterations int
	residual   float64
}

// newFlow starts the problem of a step: modes are added next, then scale is called.
func (m *Material) newFlow(old *State, temperature float64) flow {
	return flow{law: m.law, start: old.Equivalent, temperature: temperature}
}

// add puts in a mode by its part of q², keeping the modes in ascending order of pace and equal ones together.
func (a *flow) add(square, pace float64) {
	if square == 0 {
		return
	}
	i := a.count
	for i > 0 && a.modes[i-1].pace > pace {
		i--
	}
	if i > 0 && a.modes[i-1].pace == pace {
		a.modes[i-1].weight += square
		return
	}
	copy(a.modes[i+1:a.count+1], a.modes[i:a.count])
	a.modes[i] = mode{square, pace}
	a.count++
}

// single sets the problem of one mode: elastic strain and modulus make the trial stress, Δp = (elastic strain) ω/(1 + pace ω).
func (a *flow) single(elastic, modulus, pace, dt float64) {
	a.trial, a.elastic = elastic*modulus, elastic
	a.logTime = math.Log(dt / elastic)
	a.modes[0], a.count = mode{1, pace}, 1
}

// scale ends the list of modes: it turns their squares into shares, for a modulus Δp = modulus⁻¹ ω σₑ and the time Δt.
func (a *flow) scale(modulus, dt float64) {
	sum := 0.0
	for k := range a.modes[:a.count] {
		sum += a.modes[k].weight
	}
	if sum == 0 {
		a.count = 0
		return
	}
	for k := range a.modes[:a.count] {
		a.modes[k].weight /= sum
	}
	a.trial = math.Sqrt(sum)
	a.elastic = a.trial / modulus
	a.logTime = math.Log(dt / a.elastic)
}

// solve finds the root of F in x. It returns zero or the code of the failure.
func (a *flow) solve(x *flowed) Code {
	first := a.law.LogRate(creeplaw.Point{Stress: a.trial, Strain: a.start, Temperature: a.temperature})
	switch {
	case math.IsNaN(first.Value):
		return LawUndefined
	case math.IsInf(first.Value, -1):
		a.unrelaxed(x, first)
		return 0
	case first.ByLogStrain > 0:
		return a.solveSoftening(x, first)
	}
	level, slope := a.logTime+first.Value, 1.0
	switch hardening := -first.ByLogStrain; {
	case math.IsInf(first.Value, 1): // hardening from zero strain: look from the elastic strain
		first = a.law.LogRate(creeplaw.Point{Stress: a.trial, Strain: a.start + a.elastic, Temperature: a.temperature})
		if !finite(first.Value) {
			return LawUndefined
		}
		slope = 1 - math.Min(first.ByLogStrain, 0)
		level = (a.logTime + first.Value) / slope
	case hardening > 0 && (a.start < a.elastic || a.modes[0].pace == 0): // the step may outgrow the strain before it
		if l := (level - hardening*math.Log(a.elastic/a.start)) / (1 + hardening); l < level {
			level, slope = l, 1+hardening
		}
	}
	if level < negligible {
		a.unrelaxed(x, first)
		return 0
	}
	return a.iterate(x, first, a.firstGuess(level, math.Max(first.ByLogStress, 0)/slope))
}

func (a *flow) unrelaxed(x *flowed, rate creeplaw.LogRate) {
	*x = flowed{stress: a.trial, strain: a.start, kept: 1, rate: rate}
}

// firstGuess returns the odds that solve ln(Δp 3G/q) - n ln(σₑ/q) = level, the problem of a power law without hardening.
// One mode has the answer of relaxation; several are improved from there. The law is not asked.
func (a *flow) firstGuess(level, n float64) float64 {
	const farthest = 680 // as far as odds are finite
	pace := a.modes[0].pace
	if a.count == 1 {
		if pace == 0 {
			return math.Exp(math.Min(level, farthest))
		}
		return oneMode(level+math.Log(pace), n) / pace
	}
	var mean, slow float64
	for k := range a.modes[:a.count] {
		mean += a.modes[k].weight * a.modes[k].pace
		slow += a.modes[k].weight / (a.modes[k].pace * a.modes[k].pace)
	}
	if finite(slow) {
		mean = math.Sqrt(mean / math.Sqrt(slow))
	}
	z := math.Max(-farthest, math.Min(math.Log(oneMode(level+math.Log(mean), n)/mean), farthest))
	var x flowed
	low, high := math.Inf(-1), math.Inf(1)
	for range 30 {
		odds := math.Exp(z)
		a.place(&x, odds)
		f := z + (1-n)*math.Log(x.stress/a.trial) - level
		if f < 0 {
			low = z
		} else {
			high = z
		}
		slope := x.kept + n*x.spent
		halley := slope*slope - 0.5*f*(n-1)*x.bend
		if !(halley > 0.5*slope*slope) {
			halley = 0.5 * slope * slope
		}
		step := -f * slope / halley
		if math.Abs(step) < 0.1 {
			return odds * exponential(step)
		}
		const longest = 40
		next := math.Min(z+math.Max(-longest, math.Min(longest, step)), farthest)
		if !(next > low && next < high) {
			next = (math.Max(low, z-2*longest) + math.Min(high, z+2*longest)) / 2
		}
		z = next
	}
	return math.Exp(z)
}

// oneMode is the first guess of relaxation, which may leave the numbers where the exponent is in the thousands, as just above
// a threshold stress; then it is the asymptote.
func oneMode(level, n float64) float64 {
	if odds := firstGuess(level, n); odds > 0 && odds <= math.MaxFloat64 {
		return odds
	}
	return math.Exp(math.Min(level, level/math.Max(n, 1)))
}

// place sets stress, strain and the derivatives of σₑ from the odds.
func (a *flow) place(x *flowed, odds float64) {
	if a.count == 1 {
		t := a.modes[0].pace * odds
		d := 1 / (1 + t)
		x.odds = odds
		x.stress = a.trial * d
		x.creep = a.elastic * (odds * d)
		x.strain = a.start + x.creep
		x.kept, x.spent = d, t*d
		x.bend = x.kept * x.spent
		return
	}
	first := 1 + a.modes[0].pace*odds // the mode that relaxes least: sums are relative to it
	var sum, kept, spent, bend float64
	for k := range a.modes[:a.count] {
		m := &a.modes[k]
		t := m.pace * odds
		d := 1 / (1 + t)
		ratio := first * d
		share := m.weight * (ratio * ratio)
		u := t * d
		sum += share
		kept += share * d
		spent += share * u
		bend += share * u * (d - 2*u)
	}
	root := math.Sqrt(sum)
	x.odds = odds
	x.stress = a.trial * (root / first)
	x.creep = a.elastic * (root * (odds / first))
	x.strain = a.start + x.creep
	inverse := 1 / sum
	x.kept, x.spent = kept*inverse, spent*inverse
	x.bend = bend*inverse + 2*x.spent*x.spent
}

// evaluate places the unknowns, asks the law and returns F and ln(Δp 3G/q).
func (a *flow) evaluate(x *flowed, odds float64) (f, logFraction float64) {
	a.place(x, odds)
	x.rate = a.law.LogRate(creeplaw.Point{Stress: x.stress, Strain: x.strain, Temperature: a.temperature})
	logFraction = math.Log(x.creep / a.elastic)
	f = logFraction - a.logTime - x.rate.Value
	x.residual = math.Abs(f)
	return f, logFraction
}

// iterate runs the safeguarded third-order iteration of relaxation.iterate on F.
func (a *flow) iterate(x *flowed, first creeplaw.LogRate, odds float64) Code {
	low, high := bound{}, bound{odds: math.Inf(1)}
	before, beforeStress := first, a.trial // the previous evaluation
	last, stalls := math.Inf(1), 0         // its |F|, and how often in a row that was not halved
	const most = 2 * maxIterations         // a hair above a threshold stress it comes close to bisection
	watch := flowProgress{size: math.Inf(1), width: math.Inf(1)}
	x.iterations = 0
	for small := false; x.iterations <= most; x.iterations++ {
		f, logFraction := a.evaluate(x, odds)
		size := math.Abs(f)
		switch {
		case math.IsNaN(f), f < 0 && (odds > 1e295 || math.IsInf(x.strain, 1)): // no finite creep strain is enough
			return LawUndefined
		case x.rate.ByLogStrain > 0: // not to be seen at zero strain, where the exponent vanishes
			return a.solveSoftening(x, first)
		case small && size <= tolerance, size < 1e-6 && size <= a.rounding(x, logFraction):
			return 0
		}
		slope := a.slope(x)
		sameLaw := x.rate.ByLogStress == before.ByLogStress && x.rate.ByLogStrain == before.ByLogStrain
		step := a.step(x, f, slope, 0)
		curved := step
		if !sameLaw {
			fall := math.Log(x.stress / beforeStress)
			curved = a.step(x, f, slope, exponentByLogStress(x.rate.ByLogStress, before.ByLogStress, fall))
		}
		small = math.Abs(curved) < 1e-4
		if small && sameLaw {
			// A power law between the last two points: the third-order step leaves less than a few |step|³.
			if rest := 4 * math.Abs(step*step*step); rest <= tolerance {
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
		if stalls++; size < last/2 || last == 0 {
			stalls = 0
		}
		next := 0.0
		switch bracketed := low.odds > 0 && finite(high.f) && !math.IsInf(high.odds, 1); {
		case bracketed && watch.slow(x.iterations, size, math.Log(high.odds/low.odds)):
			next = math.Sqrt(low.odds) * math.Sqrt(high.odds)
		case bracketed && (stalls > 0 || corner(&low, &high, from) != from):
			next = between(&low, &high, from, stalls)
		default:
			next = advance(odds, curved, low.odds, high.odds)
		}
		if next == odds || next == low.odds || next == high.odds { // neighbouring numbers bracket the root
			return a.settle(x, low.odds, logFraction)
		}
		last, before, beforeStress, odds = size, x.rate, x.stress, next
	}
	return NoConvergence
}

// flowProgress watches the iteration: F may have three straight parts, alike on both sides of the root, between which the local
// models throw it to and fro.
type flowProgress struct {
	size, width float64 // |F| and the bracket in z when it was looked at last
	iteration   int
}

// slow reports, every third time, whether neither |F| nor the bracket has shrunk by much.
func (p *flowProgress) slow(iteration int, size, width float64) bool {
	if iteration < p.iteration+3 {
		return false
	}
	slow := size > p.size/8 && width > p.width/2
	*p = flowProgress{size, width, iteration}
	return slow
}

// settle accepts a root that the number system cannot resolve further: one that meets the tolerance, one that misses it by no
// more than neighbouring numbers differ, where the exponent is in the thousands, or one at which the law stops creeping
// altogether, as at a threshold stress, on the side where it still creeps.
func (a *flow) settle(x *flowed, low, logFraction float64) Code {
	switch {
	case math.IsInf(x.residual, 1) && low > 0:
		if f, _ := a.evaluate(x, low); math.IsNaN(f) {
			return LawUndefined
		}
		x.residual = 0
		return 0
	case x.residual <= 8*a.rounding(x, logFraction) && finite(x.residual):
		return 0
	}
	return settled(x.residual)
}

// rounding is the size of F that is rounding of its own terms, and of the stress the law was asked at.
func (a *flow) rounding(x *flowed, logFraction float64) float64 {
	return epsilon * (math.Abs(logFraction) + math.Abs(a.logTime) + math.Abs(x.rate.Value) + math.Abs(x.rate.ByLogStress))
}

// slope is dF/dz.
func (a *flow) slope(x *flowed) float64 {
	return x.kept*a.stiffening(x) + x.spent*x.rate.ByLogStress
}

// stiffening is d(ln Δp - ln ṗ)/d ln Δp at fixed stress.
func (a *flow) stiffening(x *flowed) float64 {
	return 1 - x.rate.ByLogStrain*a.share(x)
}

// share is Δp/p, the part of the accumulated creep strain that this step adds.
func (a *flow) share(x *flowed) float64 {
	if a.start == 0 {
		return 1
	}
	return x.creep / x.strain
}

// step is the change of z that solves the local model of relaxation.step: F' e^(cδ), or a pole where the law's exponent grows
// that fast as the stress falls.
func (a *flow) step(x *flowed, f, slope, lawCurvature float64) float64 {
	if !(slope > 0) || math.IsInf(f, 0) {
		return math.NaN() // no direction to trust: let the bracket decide
	}
	share, n, hardening := a.share(x), x.rate.ByLogStress, -x.rate.ByLogStrain
	second := x.bend*(n-1-hardening*share) + hardening*share*(1-share)*x.kept*x.kept - x.spent*x.spent*lawCurvature
	newton := -f / slope
	t := -newton * second / slope // F F”/F'²
	switch {
	case math.Abs(t) < 0.25:
		return newton / (1 - t*(0.5+t*(1.0/12+t/24)))
	case t < 0 && lawCurvature < -n:
		return newton * math.Expm1(t) / t
	case t > 0.95:
		t = 0.95
	}
	return -newton * math.Log1p(-t) / t
}

// exponentByLogStress estimates dn/d ln σ from the exponents at two stresses, exact for a power law and an exponential.
func exponentByLogStress(n, before, logRatio float64) float64 {
	change := n - before
	switch {
	case change == 0 || logRatio == 0:
		return 0
	case math.Abs(change) < 0.1*before || !(n > 0 && before > 0):
		return change / logRatio
	}
	return n * math.Log(n/before) / logRatio
}
