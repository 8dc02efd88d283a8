package audit

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// line is ln ṗ along one argument through the domain, evenly in its logarithm.
type line struct {
	along Argument
	span  Range // of the argument
	at    creeplaw.Point
	u, f  []float64 // ln of the argument, ln ṗ
	jumps []float64 // u of the jumps found on it
}

// scan evaluates the lines along an argument once. None where the domain has one value of it only.
func (x *examination) scan(along Argument) []*line {
	lines := &x.lines[along-Stress]
	if *lines != nil || x.domain.along(along).fixed() {
		return *lines
	}
	span, n := x.domain.along(along), x.settings.Intervals
	var scanned []*line
	for _, p := range x.across(along) {
		l := &line{along: along, span: span, at: p, u: make([]float64, n+1), f: make([]float64, n+1)}
		for i := range l.u {
			v := span.at(float64(i) / float64(n))
			*along.of(&l.at) = v
			l.u[i], l.f[i] = math.Log(v), x.ln(l.at)
		}
		scanned = append(scanned, l)
	}
	*lines = scanned // all or none, should the law panic
	return scanned
}

// point is the point of the line at u.
func (l *line) point(u float64) creeplaw.Point {
	p := l.at
	*l.along.of(&p) = math.Max(l.span.Low, math.Min(l.span.High, math.Exp(u)))
	return p
}

// value is ln ṗ on the line at u.
func (x *examination) value(l *line, u float64) float64 { return x.ln(l.point(u)) }

// jumpsIn tells whether an interval of the line holds a jump that has been found.
func (l *line) jumpsIn(i int) bool {
	for _, u := range l.jumps {
		if u >= l.u[i]-1e-12 && u <= l.u[i+1]+1e-12 {
			return true
		}
	}
	return false
}

// slope is the local exponent over an interval of the line; NaN where there is none to be had.
func (l *line) slope(i int) float64 {
	if !finite(l.f[i]) || !finite(l.f[i+1]) || l.jumpsIn(i) {
		return math.NaN()
	}
	return (l.f[i+1] - l.f[i]) / (l.u[i+1] - l.u[i])
}

// rounding is how far a value of ln ṗ may be off without meaning anything.
func rounding(f float64) float64 { return 64 * 0x1p-52 * (4 + math.Abs(f)) }

// edge bisects between a place where a condition does not hold and one where it does, and returns the last place without it
// and the first with it.
func edge(without, with float64, holds func(u float64) bool) (float64, float64) {
	for range 60 {
		middle := without + (with-without)/2
		if middle == without || middle == with {
			break
		}
		if holds(middle) {
			with = middle
		} else {
			without = middle
		}
	}
	return without, with
}

// spread is the least and the greatest of the numbers given to it.
type spread struct{ Range }

func newSpread() spread { return spread{Range{math.Inf(1), math.Inf(-1)}} }

func (s *spread) add(v float64) {
	if !math.IsNaN(v) {
		s.Low, s.High = math.Min(s.Low, v), math.Max(s.High, v)
	}
}

// known is the range, or NaN if nothing was added.
func (s *spread) known() Range {
	if s.Low > s.High {
		return Range{math.NaN(), math.NaN()}
	}
	return s.Range
}
