package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// repeatable asks for every point, and once more in the opposite order.
func repeatable(x *examination) answer {
	if x.settings.SetClock != nil {
		x.settings.SetClock(x.domain.Time.middle())
	}
	x.rates = make([]creeplaw.Rate, len(x.points))
	x.logRates = make([]creeplaw.LogRate, len(x.points))
	for i, p := range x.points {
		x.rates[i] = x.rate(p)
		if x.ownLogs {
			x.logRates[i] = x.logRate(p)
		}
	}
	for i := len(x.points) - 1; i >= 0; i-- {
		p := x.points[i]
		again, logs := x.rate(p), x.logRates[i]
		if x.ownLogs {
			logs = x.logRate(p)
		}
		if bits(again, logs) != bits(x.rates[i], x.logRates[i]) {
			f := x.found(NotRepeatable, Fault, p)
			f.Numbers = []Number{x.rateNumber("first", x.rates[i].Value), x.rateNumber("then", again.Value)}
			f.Sentence = "The same stress, strain and temperature give another answer when asked again: the law keeps something " +
				"between calls, and no result computed with it can be reproduced."
			x.note(f, math.Abs(again.Value-x.rates[i].Value), "")
		}
	}
	return inOrder("the same bits in the opposite order at %d points", len(x.points))
}

func bits(r creeplaw.Rate, l creeplaw.LogRate) [8]uint64 {
	f := math.Float64bits
	return [8]uint64{f(r.Value), f(r.ByStress), f(r.ByStrain), f(r.ByTemperature),
		f(l.Value), f(l.ByLogStress), f(l.ByLogStrain), f(l.ByLogTemperature)}
}

func (x *examination) rateNumber(name string, v float64) Number {
	return Number{name, v, "1/" + x.settings.timeUnit()}
}

// logarithm compares LogRate with ln Rate wherever the plain rate is a number of full precision.
func logarithm(x *examination) answer {
	if !x.ownLogs {
		return skipped("the law gives the plain rate only; its logarithm is taken from that")
	}
	compared := 0
	for i, p := range x.points {
		plain, given := x.rates[i].Value, x.logRates[i].Value
		const smallestNormal = 0x1p-1000
		if !(plain >= smallestNormal) || math.IsInf(plain, 1) {
			continue // zero, negative, out of range, or not a number: other questions
		}
		compared++
		want := math.Log(plain)
		if off := math.Abs(given - want); !(off <= 1e-10*(1+math.Abs(want))) {
			x.trustLogs = false
			f := x.found(LogContradictsRate, Fault, p)
			f.Numbers = []Number{{"logarithm given", given, ""}, {"logarithm of the rate", want, ""}}
			f.Sentence = fmt.Sprintf("LogRate says %.9g where the logarithm of Rate is %.9g: the implicit step, which works on "+
				"logarithms, would follow another law than the one that is printed.", given, want)
			x.note(f, ifNaN(off, math.Inf(1)), "")
		}
	}
	return inOrder("LogRate is the logarithm of Rate at %d points", compared)
}

// ifNaN is v, or another value if v is NaN.
func ifNaN(v, other float64) float64 {
	if math.IsNaN(v) {
		return other
	}
	return v
}

// signAndFiniteness looks at the points and along the lines. What it finds on a line it traces to the edge.
func signAndFiniteness(x *examination) answer {
	n := len(x.points)
	for i, p := range x.points {
		x.classify(p, x.rates[i], math.NaN(), None, 0)
	}
	for _, along := range axes {
		for _, l := range x.scan(along) {
			n += len(l.u)
			x.classifyLine(l)
		}
	}
	return inOrder("finite and not negative at %d points", n)
}

func (x *examination) classifyLine(l *line) {
	usable := func(u float64) bool {
		v := x.rate(l.point(u)).Value
		return v >= 0 && !math.IsInf(v, 1)
	}
	for i, f := range l.f {
		if finite(f) || math.IsInf(f, -1) {
			continue
		}
		p := l.point(l.u[i])
		x.classify(p, x.rate(p), math.NaN(), None, 0)
		for _, j := range []int{i - 1, i + 1} {
			if j < 0 || j >= len(l.f) || !usable(l.u[j]) || usable(l.u[i]) {
				continue
			}
			_, first := edge(l.u[j], l.u[i], func(u float64) bool { return !usable(u) })
			at := l.point(first)
			x.classify(at, x.rate(at), math.Exp(first), l.along, 1)
		}
	}
}

// classify notes a rate that is negative or no number. An edge, where one is known, is where along an argument it starts.
func (x *examination) classify(p creeplaw.Point, r creeplaw.Rate, edge float64, along Argument, badness float64) {
	infinite := !finite(r.Value) || !finite(r.ByStress) || !finite(r.ByStrain) || !finite(r.ByTemperature)
	var f Finding
	switch {
	case r.Value < 0:
		f = x.found(NegativeRate, Fault, p)
		f.Numbers = []Number{x.rateNumber("rate", r.Value)}
		f.Sentence = "The equivalent rate is negative: creep would run against the stress and give energy back."
		badness = -r.Value
	case math.IsInf(r.Value, 1) && x.ownLogs && finite(x.logRate(p).Value):
		f = x.found(NotFinite, Warning, p)
		f.Numbers = []Number{{"logarithm of the rate", x.logRate(p).Value, ""}}
		f.Sentence = "The plain rate is beyond the range of a float64 though its logarithm is a number: the step works, a plain " +
			"evaluation does not."
	case infinite:
		f = x.found(NotFinite, Fault, p)
		f.Numbers = []Number{x.rateNumber("rate", r.Value)}
		f.Sentence = fmt.Sprintf("The rate or a derivative of it is not finite (%v) inside the domain: every step that comes "+
			"here fails.", worst(r)) + x.reason(p)
	default:
		return
	}
	if !math.IsNaN(edge) {
		f.Numbers = append(f.Numbers, Number{"from " + along.String(), edge, along.unit(&x.settings)})
	}
	x.note(f, badness, "")
}

// worst is the component that is not finite.
func worst(r creeplaw.Rate) float64 {
	for _, v := range []float64{r.Value, r.ByStress, r.ByStrain, r.ByTemperature} {
		if !finite(v) {
			return v
		}
	}
	return r.Value
}

// reason is what the law says for itself, as the end of a sentence.
func (x *examination) reason(p creeplaw.Point) string {
	explainer, ok := x.logs.(creeplaw.Explainer)
	if !ok {
		return ""
	}
	if err := explainer.CheckPoint(p); err != nil {
		return " The law's own reason: " + err.Error() + "."
	}
	return " The law has no reason to give."
}

// notANumber asks for the rate at a NaN stress.
func notANumber(x *examination) answer {
	p := x.points[0]
	p.Stress = math.NaN()
	r := x.rate(p)
	if !math.IsNaN(r.Value) {
		f := x.found(AcceptsNaN, Warning, p)
		f.Numbers = []Number{x.rateNumber("rate", r.Value)}
		f.Sentence = "A stress that is not a number gives a rate that is one: an error upstream would pass unseen."
		x.note(f, 0, "")
	}
	return inOrder("it stays not a number")
}
