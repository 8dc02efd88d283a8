package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

const (
	tenfold = 10
	// farOff is how far ln ṗ may be from the power law that the domain ends with before it is a warning: a factor of 1000.
	farOff = 6.907755278982137
	// hardlyRises is the local exponent under which more stress no longer counts.
	hardlyRises = 0.3
)

// beyond looks at ten times the highest stress and at a tenth of the lowest, in the middle of the domain and at its corners.
func beyond(x *examination) answer {
	d := &x.domain
	list := []creeplaw.Point{d.at(0, 0.5, 0.5), d.at(0, 0, 0), d.at(0, 1, 0), d.at(0, 0, 1), d.at(0, 1, 1)}
	for i := len(list) - 1; i >= 0; i-- { // the middle last, for the measures
		x.above(list[i])
		x.below(list[i])
	}
	high, low := x.measures.TenfoldExponent, x.measures.TenthExponent
	switch {
	case math.IsNaN(high):
		return skipped("the law does not creep at the highest stress of the domain")
	case math.IsNaN(low):
		return inOrder("at ten times the stress the local exponent is %.3g, much as within; below the domain there is no creep", high)
	}
	return inOrder("at ten times the stress the local exponent is %.3g, at a tenth %.3g, much as within", high, low)
}

// exponentAt is the local exponent just below a stress.
func (x *examination) exponentAt(p creeplaw.Point, f float64) float64 {
	const back = 0.02
	p.Stress *= 1 - back
	return (f - x.ln(p)) / -math.Log1p(-back)
}

func (x *examination) above(p creeplaw.Point) {
	p.Stress = x.domain.Stress.High
	top := x.ln(p)
	if !finite(top) {
		return
	}
	n := x.exponentAt(p, top)
	p.Stress *= tenfold
	far := x.ln(p)
	if math.IsNaN(far) {
		x.undefinedBeyond(p)
		return
	}
	exponent := x.exponentAt(p, far)
	excess := far - top - n*math.Log(tenfold)
	x.measures.TenfoldExponent, x.measures.TenfoldExcess = exponent, excess/math.Ln10
	f := x.found(ExplodesBeyond, Warning, p)
	f.Numbers = []Number{{"exponent in the domain", n, ""}, {"exponent at ten times the stress", exponent, ""},
		{"decades above the power law", excess / math.Ln10, ""}}
	switch {
	case excess > farOff && exponent > 2*n:
		f.Sentence = fmt.Sprintf("At ten times the highest stress the rate is 10^%.3g times what the power law with the exponent %.3g at the "+
			"end of the domain would give: a stress peak at a notch or an iterate on its way can take it out of all bounds.",
			excess/math.Ln10, n)
	case excess < -farOff || exponent < hardlyRises || math.IsInf(far, -1):
		f.Kind = StallsBeyond
		f.Sentence = fmt.Sprintf("At ten times the highest stress the rate rises with an exponent of %.3g only, after %.3g at the end of the "+
			"domain: a stress peak is not relieved as it ought to be.", exponent, n)
	case math.Abs(exponent-n) > 0.2+0.2*n:
		f.Kind, f.Severity = ExponentChanges, Remark
		f.Sentence = fmt.Sprintf("The local stress exponent is %.3g at the highest stress of the domain and %.3g at ten times that.", n,
			exponent)
	default:
		return
	}
	x.note(f, math.Abs(excess), "above")
}

func (x *examination) below(p creeplaw.Point) {
	p.Stress = x.domain.Stress.Low
	edge := p
	edge.Stress *= 1.02
	bottom := x.ln(p)
	n := x.exponentAt(edge, x.ln(edge))
	if !finite(bottom) {
		return
	}
	p.Stress /= tenfold
	far := x.ln(p)
	if math.IsNaN(far) {
		x.undefinedBeyond(p)
		return
	}
	exponent := x.exponentAt(p, far)
	x.measures.TenthExponent = exponent
	f := x.found(ExponentChanges, Remark, p)
	f.Numbers = []Number{{"exponent in the domain", n, ""}, {"exponent at a tenth of the stress", exponent, ""}}
	switch {
	case math.IsInf(far, -1):
		f.Sentence = "At a tenth of the lowest stress there is no creep at all: the law has a threshold, or has come to its end there."
	case math.Abs(exponent-n) > 0.2+0.2*n:
		f.Sentence = fmt.Sprintf("The local stress exponent is %.3g at the lowest stress of the domain and %.3g at a tenth of that.", n,
			exponent)
	default:
		return
	}
	x.note(f, ifNaN(math.Abs(exponent-n), math.Inf(1)), "below")
}

func (x *examination) undefinedBeyond(p creeplaw.Point) {
	f := x.found(UndefinedBeyond, Warning, p)
	f.Sentence = fmt.Sprintf("The law is undefined at the stress %.4g, beyond the domain: an iterate or a peak that comes there fails the "+
		"step.", p.Stress) + x.reason(p)
	x.note(f, 0, "")
}
