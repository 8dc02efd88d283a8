package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// slope is a derivative by differences, with a bound on its error.
type slope struct{ value, bound float64 }

// levels of step halving, from 2⁻⁴ on.
const levels = 14

// differentiate is dg/du at u by central differences with Ridders' extrapolation: the step is halved, the truncation
// extrapolated away, and the entry of the tableau kept that agrees best with its neighbours. Steps stay within reach of u.
//
// Source: C. J. F. Ridders, Adv. Eng. Software 4 (1982) 75–76.
func differentiate(g func(u float64) float64, u, reach float64) slope {
	best := slope{math.NaN(), math.Inf(1)}
	h := math.Min(0x1p-4, reach)
	var row [levels]float64
	for i := range levels {
		up, down := u+h, u-h
		d := (g(up) - g(down)) / (up - down)
		above := d
		factor := 4.0
		for j := range i {
			// row[j] is column j at the step before, above is column j at this one.
			extrapolated := above + (above-row[j])/(factor-1)
			bound := math.Max(math.Abs(extrapolated-above), math.Abs(extrapolated-row[j]))
			row[j] = above
			if bound <= best.bound {
				best = slope{extrapolated, bound}
			}
			above = extrapolated
			factor *= 4
		}
		row[i] = above
		h /= 2
	}
	return best
}

// reach is how far u may be left to either side without leaving the domain.
func (x *examination) reach(along Argument, v float64) float64 {
	r := x.domain.along(along)
	if r.fixed() {
		return 0x1p-4
	}
	return math.Min(math.Log(r.High/v), math.Log(v/r.Low))
}

// derivatives holds the partial derivatives of Rate, and those of LogRate if the law has it, against differences.
func derivatives(x *examination) answer {
	compared, possible := 0, 0
	for i := 9; i < len(x.points); i += 2 { // the scattered points, none on a face
		p := x.points[i]
		for _, along := range axes {
			reach := x.reach(along, *along.of(&p))
			if reach < 0x1p-12 {
				continue
			}
			possible++
			if x.plainDerivative(p, x.rates[i], along, reach) {
				compared++
			}
			if x.ownLogs && x.trustLogs {
				x.logDerivative(p, x.logRates[i], along, reach)
			}
		}
	}
	if possible > 0 && compared < possible/2 {
		return skipped("differences resolve only %d of %d derivatives: the rate vanishes, or is too rough", compared, possible)
	}
	return inOrder("derivatives by stress, strain and temperature agree with differences to %.0e, %d compared",
		x.settings.DerivativeTolerance, compared)
}

// plainDerivative reports whether differences could resolve the derivative. The comparison is of x ∂ṗ/∂x over ṗ.
func (x *examination) plainDerivative(p creeplaw.Point, r creeplaw.Rate, along Argument, reach float64) bool {
	if !finite(r.Value) || r.Value == 0 {
		return false
	}
	at := *along.of(&p)
	positive := true
	relative := func(u float64) float64 {
		q := p
		*along.of(&q) = at * math.Exp(u)
		ratio := x.rate(q).Value / r.Value
		positive = positive && ratio > 0
		return ratio
	}
	logarithmic := func(u float64) float64 { return math.Log(relative(u)) }
	d := differentiate(logarithmic, 0, reach)
	if !positive {
		d = differentiate(relative, 0, reach)
	}
	given := at * (partial(r, along) / r.Value)
	return x.compare(p, along, given, d, func() Finding {
		f := x.found(WrongDerivative, Fault, p)
		unit := "1/(" + x.settings.timeUnit() + ")"
		if u := along.unit(&x.settings); u != "" {
			unit = "1/(" + u + " " + x.settings.timeUnit() + ")"
		}
		f.Numbers = []Number{{"derivative given", partial(r, along), unit}, {"by differences", d.value * r.Value / at, unit}}
		f.Sentence = fmt.Sprintf("The derivative by %v is given as %.6g where the values rise by %.6g: the tangent is not that of the "+
			"step, and the global Newton iteration loses its quadratic rate without a word.", along, f.Numbers[0].Value,
			f.Numbers[1].Value)
		return f
	})
}

func (x *examination) logDerivative(p creeplaw.Point, l creeplaw.LogRate, along Argument, reach float64) {
	if !finite(l.Value) {
		return
	}
	at := *along.of(&p)
	d := differentiate(func(u float64) float64 {
		q := p
		*along.of(&q) = at * math.Exp(u)
		return x.logRate(q).Value
	}, 0, reach)
	given := exponent(l, along)
	x.compare(p, along, given, d, func() Finding {
		f := x.found(WrongLogDerivative, Fault, p)
		f.Numbers = []Number{{"exponent given", given, ""}, {"by differences", d.value, ""}}
		f.Sentence = fmt.Sprintf("The local exponent of %v is given as %.6g where LogRate itself has %.6g: the implicit step, which "+
			"works on it, converges slowly or to no end.", along, given, d.value)
		return f
	})
}

// compare notes a derivative that is off by more than the tolerance and what the differences cannot resolve.
func (x *examination) compare(p creeplaw.Point, along Argument, given float64, d slope, describe func() Finding) bool {
	tolerance := x.settings.DerivativeTolerance
	scale := math.Max(math.Abs(d.value), 1)
	if !(d.bound <= tolerance/4*scale) {
		return false
	}
	off := math.Abs(given - d.value)
	if !(off <= tolerance*scale+4*d.bound) {
		f := describe()
		f.By = along
		if off < 1e-3*scale {
			f.Severity = Warning
		}
		x.note(f, ifNaN(off/scale, math.Inf(1)), "")
	}
	return true
}

func partial(r creeplaw.Rate, by Argument) float64 {
	switch by {
	case Stress:
		return r.ByStress
	case Strain:
		return r.ByStrain
	}
	return r.ByTemperature
}

func exponent(l creeplaw.LogRate, by Argument) float64 {
	switch by {
	case Stress:
		return l.ByLogStress
	case Strain:
		return l.ByLogStrain
	}
	return l.ByLogTemperature
}
