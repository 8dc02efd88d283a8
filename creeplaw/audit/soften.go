package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// softening reads the local strain exponent off the lines along the creep strain and says what it means for the step.
func softening(x *examination) answer {
	x.measures.LargestStep, x.measures.LargestFirstStep = math.Inf(1), math.Inf(1)
	x.measures.LargestStepAtFixedStrain = math.Inf(1)
	x.measures.SufficientStiffness = 0
	if f, falls := x.known(FallsWithStress); falls {
		x.measures.LargestStepAtFixedStrain = math.NaN()
		if dt, ok := f.Number("largest step at fixed strain"); ok {
			x.measures.LargestStepAtFixedStrain = dt
		}
	}
	lines := x.scan(Strain)
	if len(lines) == 0 {
		return skipped("the domain has one creep strain only")
	}
	exponents := newSpread()
	n := 0
	var worst softSpot
	for _, l := range lines {
		for i := range len(l.f) - 1 {
			s := l.slope(i)
			if math.IsNaN(s) {
				continue
			}
			n++
			const clear = 1e-10
			if rise := l.f[i+1] - l.f[i]; math.Abs(rise) <= math.Max(rounding(l.f[i]), clear*(l.u[i+1]-l.u[i])) {
				s = 0
			}
			exponents.add(s)
			if s > 0 {
				worst.add(x, l.point((l.u[i]+l.u[i+1])/2), s)
			}
		}
	}
	x.measures.StrainExponent = exponents.known()
	if worst.seen > 0 {
		x.noteSoftening(worst)
	}
	return hardens(n, exponents.Range, x.measures.LargestStepAtFixedStrain)
}

// hardens is the verdict on a law that does not soften.
func hardens(n int, exponents Range, atFixedStrain float64) answer {
	unique := "a backward-Euler step has exactly one solution, whatever its size, at fixed stress and at fixed strain"
	if !math.IsInf(atFixedStrain, 1) {
		unique = "a backward-Euler step at fixed stress has exactly one solution, whatever its size"
	}
	switch {
	case n == 0:
		return skipped("there is no rate along the lines")
	case exponents.Low == 0 && exponents.High == 0:
		return inOrder("no dependence on creep strain over %d intervals: %s", n, unique)
	}
	return inOrder("the rate does not rise with creep strain over %d intervals (local exponent %.3g to %.3g): %s", n,
		exponents.Low, exponents.High, unique)
}

// known tells whether there is a finding of a kind already.
func (x *examination) known(k Kind) (Finding, bool) {
	for _, f := range x.findings {
		if f.Kind == k {
			return f, true
		}
	}
	return Finding{}, false
}

// softSpot gathers where a law softens.
type softSpot struct {
	seen      int
	onset     float64 // least creep strain
	exponent  float64 // greatest
	stiffness float64 // greatest that is needed
}

func (s *softSpot) add(x *examination, p creeplaw.Point, exponent float64) {
	const aside = 1e-4
	up, down := p, p
	up.Stress *= 1 + aside
	down.Stress *= 1 - aside
	n := (x.ln(up) - x.ln(down)) / (2 * aside)
	needed := exponent / n * p.Stress / p.Strain // (∂ṗ/∂p)/(∂ṗ/∂σ)
	if !(n > 0) {
		needed = math.Inf(1)
	}
	if s.seen == 0 || p.Strain < s.onset {
		s.onset = p.Strain
	}
	s.seen++
	s.exponent, s.stiffness = math.Max(s.exponent, exponent), math.Max(s.stiffness, needed)
}

// firstStep names a figure of a finding on softening.
const firstStep = "the same from virgin material at middle stress and temperature"

// noteSoftening finds the least of the largest steps over the domain and writes the finding.
func (x *examination) noteSoftening(soft softSpot) {
	d := &x.domain
	least, fixedStrain := math.Inf(1), math.Inf(1)
	at := d.at(0.5, 1, 0.5)
	for _, stress := range []float64{0, 0.5, 1} {
		for _, temperature := range []float64{0, 0.5, 1} {
			for _, strain := range []float64{-1, 0, 0.5, 1} {
				p := d.at(stress, math.Max(strain, 0), temperature)
				if strain < 0 {
					p.Strain = 0
				}
				if dt := x.largestStep(p); dt < least {
					least, at = dt, p
				}
				if x.settings.Stiffness > 0 {
					fixedStrain = math.Min(fixedStrain, x.largestStepAtFixedStrain(p))
				}
			}
		}
	}
	virgin := d.at(0.5, 0, 0.5)
	virgin.Strain = 0
	unit := x.settings.timeUnit()
	f := x.found(Softening, Warning, at)
	f.By, f.Seen = Strain, soft.seen
	f.Numbers = []Number{{"greatest strain exponent", soft.exponent, ""}, {"softens from creep strain", soft.onset, ""},
		{"largest step at fixed stress", least, unit},
		{firstStep, x.largestStep(virgin), unit},
		{"sufficient stiffness", soft.stiffness, x.settings.stressUnit()}}
	held := fmt.Sprintf("at fixed strain any step has one if the stiffness is above %.3g %s", soft.stiffness, x.settings.stressUnit())
	if x.settings.Stiffness > 0 {
		f.Numbers = append(f.Numbers, Number{"largest step at fixed strain", fixedStrain, unit})
		held += fmt.Sprintf(", and with %.3g %s steps up to %.3g %s do", x.settings.Stiffness, x.settings.stressUnit(), fixedStrain, unit)
		if math.IsInf(fixedStrain, 1) {
			held = fmt.Sprintf("at fixed strain with a stiffness of %.3g %s any step has", x.settings.Stiffness, x.settings.stressUnit())
		}
	}
	f.Sentence = fmt.Sprintf("The rate grows with creep strain from %.3g on, which is tertiary creep if it is meant: a backward-Euler step "+
		"at fixed stress has a solution connected to the start only while Δt·∂ṗ/∂p < 1 at its end, that is up to the first maximum of "+
		"(p₁-p₀)/ṗ(p₁), here %.3g %s; %s.", soft.onset, least, unit, held)
	if math.IsInf(least, 1) {
		f.Sentence = fmt.Sprintf("The rate grows with creep strain from %.3g on, which is tertiary creep if it is meant, but by less than in "+
			"proportion: (p₁-p₀)/ṗ(p₁) has no maximum, and a backward-Euler step of any size has its solution.", soft.onset)
	}
	x.measures.LargestStep, x.measures.SufficientStiffness = least, soft.stiffness
	x.measures.LargestFirstStep, _ = f.Number(firstStep)
	x.measures.LargestStepAtFixedStrain = math.NaN()
	if x.settings.Stiffness > 0 {
		x.measures.LargestStepAtFixedStrain = fixedStrain
	}
	x.note(f, 0, "")
}

// largestStep is the first maximum of (p₁-p₀)/ṗ(p₁) over p₁ at the stress and temperature of a point with the strain p₀;
// +Inf where it rises as far as it is followed, thirty times the greatest strain of the domain.
func (x *examination) largestStep(p creeplaw.Point) float64 {
	const before, beyond = 20, 30 // the walk starts e⁻²⁰ below the least strain
	low := math.Log(math.Max(p.Strain, x.domain.Strain.Low)) - before
	high := math.Log(beyond * x.domain.Strain.High)
	return firstMaximum(low, high, func(y float64) float64 {
		q := p
		q.Strain += math.Exp(y)
		return y - x.ln(q)
	})
}

// largestStepAtFixedStrain is the same with the stress falling by the stiffness times p₁-p₀.
func (x *examination) largestStepAtFixedStrain(p creeplaw.Point) float64 {
	whole := math.Log(p.Stress / x.settings.Stiffness) // the creep strain that takes all stress away
	// In z the share of the stress that is gone, z/(1-z) = e^z, closes in on none and on all evenly.
	return firstMaximum(-25, 25, func(z float64) float64 {
		gone := 1 / (1 + math.Exp(-z))
		q := p
		q.Stress *= 1 / (1 + math.Exp(z))
		q.Strain += gone * math.Exp(whole)
		return math.Log(gone) + whole - x.ln(q)
	})
}

// firstMaximum walks up from low and returns e^g at the first maximum of g; +Inf if g rises to the end. Where g ends in NaN,
// the last value counts: the law ends there.
func firstMaximum(low, high float64, g func(float64) float64) float64 {
	const stride = 0.05
	last, before := g(low), math.Inf(-1)
	for y := low + stride; y < high; y += stride {
		v := g(y)
		switch {
		case math.IsNaN(v):
			return math.Exp(last)
		case math.IsInf(v, 1):
			return v // no creep any more: any time passes
		case v < last-1e-12*(1+math.Abs(last)):
			return math.Exp(peak(before, last, v))
		}
		before, last = last, v
	}
	return math.Inf(1)
}

// peak is the height of the parabola through three values at even distances, the middle one the highest.
func peak(a, b, c float64) float64 {
	if math.IsInf(a, -1) {
		return b
	}
	slope, bend := (c-a)/2, a-2*b+c
	return b - slope*slope/(2*bend)
}
