package lawtest

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// logTolerance is the error allowed to LogRate against the logarithm of Rate, in units of rounding of the larger of: one,
// the logarithm and the exponents, through which the rounding of the arguments enters.
const logTolerance = 64 * epsilon

func logValue(x *examination, y *tally) {
	y.due = len(x.points) / 2
	y.lacking = ": the plain rate has underflowed at the others"
	for _, p := range x.points {
		plain := x.law.Rate(p).Value
		if plain < 0x1p-1022 || !finite(plain) {
			continue // digits are lost there, and math.Log itself is wrong for such numbers on amd64
		}
		l := x.logarithmic.LogRate(p)
		want := math.Log(plain)
		scale := 1 + math.Abs(want) + math.Abs(l.ByLogStress) + math.Abs(l.ByLogStrain) + math.Abs(l.ByLogTemperature)
		y.within(math.Abs(l.Value-want), logTolerance*scale, p, func() string {
			return fmt.Sprintf("LogRate.Value is %.15g, the logarithm of Rate.Value %.15g", l.Value, want)
		})
	}
}

// exponentOf compares a log derivative with differences of the logarithm, over the wide range of stress.
func exponentOf(a argument) func(*examination, *tally) {
	return func(x *examination, y *tally) {
		y.due = len(x.logPoints) * 4 / 5
		y.lacking = ": differences of LogRate cannot resolve the exponent at the others"
		within := a.rangeIn(&x.box)
		if a.name == stress.name {
			within = x.box.LogStress
		}
		for _, p := range x.logPoints {
			l := x.logarithmic.LogRate(p)
			along := func(v float64) float64 {
				q := p
				*a.of(&q) = v
				return x.logarithmic.LogRate(q).Value
			}
			d := logSlope(along, *a.of(&p), within, roundingOfLog)
			given := a.exponent(&l)
			if !finite(l.Value) || !finite(given) {
				y.breaks(math.Inf(1), p, func() string { return fmt.Sprintf("%+v", l) })
				continue
			}
			y.derivative(x.box.DerivativeTolerance, given, d, 1, p, func() string {
				return fmt.Sprintf("the logarithm is %.9g, its derivative by that of %s %.12g, by differences %.12g ± %.1g",
					l.Value, a.name, given, d.value, d.bound)
			})
		}
	}
}

func logAtZero(x *examination, y *tally) {
	y.due = 3 * len(x.points)
	for _, p := range x.points {
		for _, zero := range []creeplaw.Point{
			{Strain: p.Strain, Temperature: p.Temperature},
			{Temperature: p.Temperature},
			{Stress: p.Stress, Temperature: p.Temperature},
		} {
			r, l := x.law.Rate(zero), x.logarithmic.LogRate(zero)
			want := math.Log(r.Value)
			agrees := l.Value == want || finite(want) && math.Abs(l.Value-want) <= logTolerance*(1+math.Abs(want))
			exponents := !math.IsNaN(l.ByLogStress) && !math.IsNaN(l.ByLogStrain) && !math.IsNaN(l.ByLogTemperature)
			y.that(agrees && exponents, zero, func() string {
				return fmt.Sprintf("%+v, the rate is %g: Value must be its logarithm, no exponent NaN", l, r.Value)
			})
		}
	}
}

// explains looks inside the box, where CheckPoint must be silent, and far outside it and at impossible points. It must speak
// wherever the rate is NaN, and may speak elsewhere only of a point that no host can mean, such as a negative stress.
func explains(x *examination, y *tally) {
	y.due = 2 * len(x.points)
	undefined := 0
	look := func(p creeplaw.Point) {
		v, err := x.law.Rate(p).Value, x.explainer.CheckPoint(p)
		ok := err == nil || !possible(p)
		if math.IsNaN(v) {
			undefined++
			ok = err != nil && err.Error() != ""
		}
		y.that(ok, p, func() string { return fmt.Sprintf("the rate is %g and CheckPoint says %v", v, err) })
	}
	for i, p := range x.points {
		look(p)
		look(astray(p, i))
	}
	y.overall(undefined > 0, func() string { return "the law has an explanation for nothing: no point is undefined" })
}

func possible(p creeplaw.Point) bool {
	return p.Stress >= 0 && p.Strain >= 0 && p.Temperature > 0 && finite(p.Stress) && finite(p.Strain) && finite(p.Temperature)
}

// astray moves one argument of a point out of the box, by up to twelve decades or to an impossible value.
func astray(p creeplaw.Point, i int) creeplaw.Point {
	for n, a := range []argument{stress, strain, temperature} {
		if i%3 != n {
			continue
		}
		v := a.of(&p)
		switch k := i / 3 % 28; k {
		case 24:
			*v = math.NaN()
		case 25:
			*v = -*v
		case 26:
			*v = 0
		case 27:
			*v = math.Inf(1)
		default:
			*v *= math.Pow(10, float64(k-12))
		}
	}
	return p
}
