package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// The quick search is for sums without fractional powers of time, in plain numbers instead of logarithms, which saves a
// third of the cost as long as no coefficient is very large or very small. It keeps no bracket. Whenever anything is out of the ordinary
// it gives up, and the search in logarithms, which cannot fail, takes over.

const (
	quickRange       = 1e75 // bound of all numbers that enter, and of their reciprocals
	quickEvaluations = 6    // then it gives up
)

// quick is a term at one stress and temperature, scaled by the creep strain p that is looked for.
type quick struct {
	shape                   shape
	amplitude, rate         float64 // c/p, r; steady creep has the rate one
	byStress, byTemperature exponentPair

	v, m, k, kk float64 // ε/p, t ε̇/p, t ε̈/ε̇, t² ε⃛/ε̇ at a time
}

// quickTerms are the terms of a sum.
type quickTerms struct {
	terms [few]quick
	n     int
}

// quickKind tells which quick search terms suit.
type quickKind uint8

const (
	notQuick          quickKind = iota // both kinds mixed, too many terms, or a single power, which has a closed form
	quickExponentials                  // none but steady creep is a power of time
	quickPowers                        // all are powers of time
)

func quickKindOf(terms []Term) quickKind {
	powers, fractional := 0, 0
	for _, t := range terms {
		if t.shape == powerOfTime {
			powers++
			if t.exponent != 1 {
				fractional++
			}
		}
	}
	switch n := len(terms); {
	case n == 0 || n > few || n == 1 && powers == 1:
		return notQuick
	case powers == n:
		return quickPowers
	case fractional == 0:
		return quickExponentials
	}
	return notQuick
}

// find returns false if it has given up.
func (a *quickTerms) find(terms []Term, p creeplaw.Point, r *found) bool {
	if !inQuickRange(p.Strain) {
		return false
	}
	t := a.prepare(terms, p)
	for evaluations := 1; evaluations <= quickEvaluations && t > 0 && t <= math.MaxFloat64; evaluations++ {
		var v, m, mk, mkk float64
		for i := range a.terms[:a.n] {
			f := &a.terms[i]
			f.evaluate(t)
			v += f.v
			m += f.m
			mk += f.m * f.k
			mkk += f.m * f.kk
		}
		one := 1 / m
		d, k := (1-v)*one, mk*one
		if math.Abs(v-1) <= 0x1p-51 { // that near rounding decides
			d = 0
		}
		r.evaluations = evaluations
		if math.Abs(d)*(1+math.Abs(k)) <= finished {
			if !(m*(p.Strain/t) > smallest) {
				return false // rounding of numbers that small, and math.Log of them, loses digits
			}
			a.result(r, p.Strain/t, d, k)
			r.time = t + t*d
			return true
		}
		// Householder's step of third order: value and three derivatives of the curve are met.
		b := k * d
		t += t * d * (1 + 0.5*b) / (1 + b + mkk*one*d*d*(1.0/6))
	}
	return false
}

func inQuickRange(x float64) bool { return x > 1/quickRange && x < quickRange }

// prepare forms the terms and returns a first guess of the time, 0 if it gives up: the time that each term would take alone,
// together as if all went on at even rates.
func (a *quickTerms) prepare(terms []Term, p creeplaw.Point) float64 {
	at := conditionAt(p.Stress, p.Temperature)
	scale := 1 / p.Strain
	frequency := 0.0
	a.n = len(terms)
	for i := range terms {
		t, f := &terms[i], &a.terms[i]
		c := t.c.plainAt(&at)
		f.shape, f.rate = t.shape, 1
		f.amplitude = c.value * scale
		f.byStress.amplitude, f.byTemperature.amplitude = c.byLogStress, c.byLogTemperature
		if t.shape != powerOfTime {
			r := t.r.plainAt(&at)
			f.rate = r.value
			f.byStress.rate, f.byTemperature.rate = r.byLogStress, r.byLogTemperature
		}
		if !(inQuickRange(c.value) && inQuickRange(f.rate)) {
			return 0
		}
		frequency += f.rate * f.haste()
	}
	return 1 / frequency
}

// haste is 1/x for the x = rt at which the term alone gives about the strain, zero if it never does.
func (f *quick) haste() float64 {
	switch a := f.amplitude; f.shape {
	case saturating: // -ln(1 - 1/a) by a rational form
		if a > 1 {
			return a * (6*a - 4) / (6*a - 1)
		}
		return 0
	case hyperbolic:
		return max(0, a-1)
	case growing:
		return 1 / math.Log1p(1/a)
	case logOfTime:
		return 1 / math.Expm1(1/a)
	default:
		return a
	}
}

func (f *quick) evaluate(t float64) {
	a, x := f.amplitude, f.rate*t
	switch f.shape {
	case saturating:
		if x > 100 { // nothing is left to come
			f.v, f.m, f.k, f.kk = a, 0, 0, 0
			return
		}
		gone, left := decay(x)
		f.v, f.m, f.k, f.kk = a*gone, a*x*left, -x, x*x
	case growing:
		gain := math.Expm1(x)
		f.v, f.m, f.k, f.kk = a*gain, a*x*(1+gain), x, x*x
	case logOfTime:
		q := x / (1 + x)
		f.v, f.m, f.k, f.kk = a*math.Log1p(x), a*q, -q, 2*q*q
	case hyperbolic:
		left := 1 / (1 + x)
		q := x * left
		f.v, f.m, f.k, f.kk = a*q, a*q*left, -2*q, 6*q*q
	default: // steady
		f.v, f.m = a*x, a*x
	}
}

// result forms the rate, to first order in the part d of the time that is left.
func (a *quickTerms) result(r *found, strainByTime, d, bend float64) {
	var v, m float64
	var strain, rate struct{ byStress, byTemperature float64 }
	for i := range a.terms[:a.n] {
		f := &a.terms[i]
		bent := f.m * (1 + f.k)
		v += f.v
		m += f.m
		strain.byStress += f.v*f.byStress.amplitude + f.m*f.byStress.rate
		rate.byStress += f.m*f.byStress.amplitude + bent*f.byStress.rate
		strain.byTemperature += f.v*f.byTemperature.amplitude + f.m*f.byTemperature.rate
		rate.byTemperature += f.m*f.byTemperature.amplitude + bent*f.byTemperature.rate
	}
	one := 1 / m
	r.rate = creeplaw.LogRate{
		Value:            math.Log(m*strainByTime) + bend*d,
		ByLogStress:      (rate.byStress - bend*strain.byStress) * one,
		ByLogStrain:      bend * (v * one),
		ByLogTemperature: (rate.byTemperature - bend*strain.byTemperature) * one,
	}
}
