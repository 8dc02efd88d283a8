package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

const (
	few  = 4  // terms that the common curves have: their coefficients fit a small frame
	many = 64 // the most terms of a law
)

// findInFew and findInMany differ only in the size of their frames, which costs time to clear.
func findInFew(terms []Term, kind quickKind, p creeplaw.Point) (r found) {
	switch kind {
	case quickExponentials:
		var fast quickTerms
		if fast.find(terms, p, &r) {
			return r
		}
	case quickPowers:
		if findPowers(terms, p, &r) {
			return r
		}
	}
	tried := r.evaluations
	var kept [few]frozen
	r = findInTerms(terms, kept[:len(terms)], p)
	r.evaluations += tried
	return r
}

func findInMany(terms []Term, p creeplaw.Point) found {
	var kept [many]frozen
	return findInTerms(terms, kept[:len(terms)], p)
}

func findInTerms(terms []Term, kept frozenTerms, p creeplaw.Point) found {
	logStrain := math.Log(p.Strain)
	at := conditionAt(p.Stress, p.Temperature)
	for i := range kept {
		terms[i].freeze(&kept[i], &at, logStrain)
	}
	latest := kept.latest()
	switch {
	case math.IsNaN(latest):
		return foundNothing()
	case math.IsInf(latest, 1):
		return never()
	case len(kept) == 1 && kept[0].shape == powerOfTime:
		return kept[0].inClosedForm(latest, logStrain)
	}
	z := newSearch(latest)
	kept.start(z.s)
	for {
		var v, m, k float64
		for i := range kept {
			f := &kept[i]
			v += f.v
			m += f.m
			k += f.m * f.k
		}
		next := z.advance(v, m, k/m)
		if z.done {
			return kept.result(&z, logStrain)
		}
		if z.lost && v > 1 {
			z.s = kept.spent(z.low, z.high, z.s)
		}
		if z.lost || math.Abs(next.step) > moderate {
			kept.start(z.s)
			continue
		}
		for i := range kept {
			kept[i].advance(next)
		}
	}
}

var logSpent = math.Log(spent)

// frozenTerms are the terms of a sum at one stress and temperature, scaled by one creep strain.
type frozenTerms []frozen

func (a frozenTerms) start(logTime float64) {
	for i := range a {
		a[i].start(logTime)
	}
}

// spent is the last ln t inside a bracket at which a saturating term comes to its end, for want of which it is the guess: to
// the right of it the strain may grow so little that nothing there tells how far to the left the rest of it is.
func (a frozenTerms) spent(low, high, guess float64) float64 {
	last := math.Inf(-1)
	for i := range a {
		if f := &a[i]; f.shape == saturating {
			if s := logSpent - f.logRate; s < high {
				last = max(last, s)
			}
		}
	}
	if last > low {
		return last
	}
	return guess
}

// latest is a logarithm of time at which the strain has surely been reached, +Inf if it never is: the first of the times at
// which one term alone gives it all.
func (a frozenTerms) latest() float64 {
	first, limits, bounded := math.Inf(1), 0.0, true
	for i := range a {
		f := &a[i]
		reach := f.reach()
		first = min(first, reach)
		if f.ends() {
			limits += f.limit()
			bounded = bounded && math.IsInf(reach, 1)
		}
	}
	if !bounded || !(limits > 1) {
		return first
	}
	// None of the terms with a limit gives it alone, but together they do: each has to give the same part of its limit.
	last := math.Inf(-1)
	for i := range a {
		if f := a[i]; f.ends() && f.limit() > 0 {
			f.amplitude, f.logAmplitude = limits, math.Log(limits)
			last = max(last, f.reach())
		}
	}
	return min(first, last)
}

// smallest is the t ε̇/p below which there is no creep.
const smallest = 1e-290

// result forms the rate where the search ended, to first order in the step it left out.
func (a frozenTerms) result(z *search, logStrain float64) found {
	var v, m, mk float64
	var strain, rate struct{ byStress, byTemperature float64 }
	for i := range a {
		f := &a[i]
		bent := f.m * (1 + f.k)
		v += f.v
		m += f.m
		mk += f.m * f.k
		strain.byStress += f.v*f.byStress.amplitude + f.m*f.byStress.rate
		rate.byStress += f.m*f.byStress.amplitude + bent*f.byStress.rate
		strain.byTemperature += f.v*f.byTemperature.amplitude + f.m*f.byTemperature.rate
		rate.byTemperature += f.m*f.byTemperature.amplitude + bent*f.byTemperature.rate
	}
	if m < smallest { // the strain cannot be told from the end of the curve
		return never()
	}
	r := found{logTime: z.s + z.rest, evaluations: z.evaluations}
	bend := mk / m
	r.rate = creeplaw.LogRate{
		Value:            logStrain + math.Log(m) - z.s + bend*z.rest,
		ByLogStress:      (rate.byStress - bend*strain.byStress) / m,
		ByLogStrain:      bend * (v / m),
		ByLogTemperature: (rate.byTemperature - bend*strain.byTemperature) / m,
	}
	return r
}

// inClosedForm is the rate of a single power of time, ε = c tᵐ: ṗ = m p/t.
func (f *frozen) inClosedForm(logTime, logStrain float64) found {
	m := f.exponent
	return found{logTime: logTime, rate: creeplaw.LogRate{
		Value:            logStrain + math.Log(m) - logTime,
		ByLogStress:      f.byStress.amplitude / m,
		ByLogStrain:      (m - 1) / m,
		ByLogTemperature: f.byTemperature.amplitude / m,
	}}
}
