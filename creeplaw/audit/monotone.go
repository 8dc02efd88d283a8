package audit

import (
	"fmt"
	"math"
)

// monotone looks for intervals of stress over which the rate falls.
func monotone(x *examination) answer {
	lines := x.scan(Stress)
	if len(lines) == 0 {
		return skipped("the domain has one stress only")
	}
	exponents := newSpread()
	n := 0
	for _, l := range lines {
		for i := range len(l.f) - 1 {
			s := l.slope(i)
			if math.IsNaN(s) {
				continue
			}
			n++
			exponents.add(s)
			if fall := l.f[i] - l.f[i+1]; fall > rounding(l.f[i]) {
				x.falls(l, i, s)
			}
		}
	}
	x.measures.StressExponent = exponents.known()
	if n == 0 {
		return skipped("there is no rate along the lines")
	}
	return inOrder("the rate rises with stress over %d intervals, the local exponent is from %.3g to %.3g", n,
		exponents.Low, exponents.High)
}

func (x *examination) falls(l *line, i int, slope float64) {
	u := (l.u[i] + l.u[i+1]) / 2
	p := l.point(u)
	f := x.found(FallsWithStress, Fault, p)
	f.By = Stress
	f.Numbers = []Number{{"stress exponent", slope, ""}}
	compliance := -slope * math.Exp(x.ln(p)) / p.Stress // -∂ṗ/∂σ
	f.Sentence = fmt.Sprintf("More stress gives less creep here, with a local exponent of %.3g: a step at fixed strain has several "+
		"solutions unless Δt·E·|∂ṗ/∂σ| < 1, E being the stiffness that holds the strain.", slope)
	if e := x.settings.Stiffness; e > 0 {
		f.Numbers = append(f.Numbers, Number{"largest step at fixed strain", 1 / (e * compliance), x.settings.timeUnit()})
	}
	x.note(f, -slope, "")
}
