package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// remote divides a stress or a strain that is meant to stand for the limit at zero.
const remote = 0x1p200

// leftAtZero is the part of the rate at the edge of the domain that may be left in the limit: a power of 1/30 passes.
const leftAtZero = 0.01

// zeroStress looks at no stress, and at a remote one, for several creep strains and temperatures.
func zeroStress(x *examination) answer {
	n := 0
	x.measures.ZeroStressRate = 0
	for _, temperature := range []float64{0, 0.5, 1} {
		for _, strain := range []float64{-1, 0, 0.5, 1} {
			p := x.domain.at(0, math.Max(strain, 0), temperature)
			if strain < 0 {
				p.Strain = 0
			}
			x.atNoStress(p)
			n++
		}
	}
	return inOrder("no creep under no stress, and none left as the stress goes there, at %d strains and temperatures", n)
}

func (x *examination) atNoStress(lowest creeplaw.Point) {
	if v := x.rate(lowest).Value; !(v >= 0) || math.IsInf(v, 1) && lowest.Strain > 0 {
		return // not the fault of zero stress
	}
	p := lowest
	p.Stress = 0
	r := x.rate(p)
	if math.IsNaN(r.Value) {
		f := x.found(UndefinedAtZeroStress, Fault, p)
		f.Sentence = "The rate under no stress is not a number: an unloaded point, or the first step from zero, fails." + x.reason(p)
		x.note(f, 1, "")
		return
	}
	if hasNaN(r) && !hasNaN(x.rate(lowest)) {
		f := x.found(UndefinedAtZeroStress, Warning, p)
		f.Sentence = "The rate under no stress is a number but a derivative of it is not: the tangent of an unloaded point fails."
		x.note(f, 0, "")
	}
	near := lowest
	near.Stress /= remote
	left, inDomain := x.ln(near), x.ln(lowest)
	switch {
	case r.Value != 0:
		x.creepsAtNoStress(p, r.Value, inDomain)
	case math.IsNaN(left):
		f := x.found(UndefinedAtZeroStress, Fault, near)
		f.Sentence = "The rate is not a number as the stress goes to zero: an unloading part passes there." + x.reason(near)
		x.note(f, 0.5, "")
	case finite(inDomain) && left-inDomain > math.Log(leftAtZero):
		x.creepsAtNoStress(near, math.Exp(left), inDomain)
	}
}

func (x *examination) creepsAtNoStress(p creeplaw.Point, rate, inDomain float64) {
	x.measures.ZeroStressRate = math.Max(x.measures.ZeroStressRate, rate)
	const noticeable = 1e-3
	share := rate / math.Exp(inDomain)
	f := x.found(CreepAtZeroStress, Fault, p)
	f.Numbers = []Number{x.rateNumber("rate", rate), {"share of the rate at the lowest stress", share, ""},
		{"time to 0.1 % strain", noticeable / rate, x.settings.timeUnit()}}
	f.Sentence = fmt.Sprintf("Under no stress the law still creeps at %.3g 1/%s at %.4g K, in no direction that could be named: an "+
		"unloaded part strains by 0.1 %% in %.3g %s. Use a form that vanishes at zero stress.", rate, x.settings.timeUnit(),
		p.Temperature, noticeable/rate, x.settings.timeUnit())
	x.note(f, math.Abs(rate), "")
}

// zeroStrain looks at virgin material, and near it, for several stresses and temperatures.
func zeroStrain(x *examination) answer {
	n := 0
	for _, temperature := range []float64{0, 0.5, 1} {
		for _, stress := range []float64{0, 0.5, 1} {
			x.virgin(x.domain.at(stress, 0, temperature))
			n++
		}
	}
	return inOrder("virgin material starts at a finite rate, the limit of those near it, at %d stresses and temperatures", n)
}

func (x *examination) virgin(least creeplaw.Point) {
	p, near := least, least
	p.Strain = 0
	near.Strain /= remote
	r := x.rate(p)
	limit, inDomain := x.ln(near), x.ln(least)
	if math.IsNaN(inDomain) || math.IsInf(inDomain, 1) {
		return // not the fault of zero strain
	}
	switch {
	case math.IsNaN(r.Value):
		f := x.found(UndefinedAtZeroStrain, Fault, p)
		f.Sentence = "The rate of virgin material is not a number: no history can start." + x.reason(p)
		x.note(f, 1, "")
	case hasNaN(r):
		f := x.found(UndefinedAtZeroStrain, Warning, p)
		f.Sentence = "The rate of virgin material is a number but a derivative of it is not: the first tangent fails."
		x.note(f, 0, "")
	case math.IsInf(r.Value, 1):
		x.startsInfinitely(p, limit, inDomain)
	case r.Value == 0 && finite(inDomain) && !(limit > inDomain-1):
		f := x.found(NeverStarts, Fault, p)
		f.Numbers = []Number{x.rateNumber("rate at the lowest strain", math.Exp(inDomain))}
		f.Sentence = "Virgin material does not creep under stress, though material that has crept does: a history that starts " +
			"from zero strain stays there for ever."
		x.note(f, inDomain, "")
	case finite(inDomain) && !(math.Abs(limit-math.Log(r.Value)) < leftAtZero):
		f := x.found(UndefinedAtZeroStrain, Fault, p)
		f.Numbers = []Number{x.rateNumber("rate at zero strain", r.Value), x.rateNumber("limit", math.Exp(limit))}
		f.Sentence = fmt.Sprintf("The rate of virgin material is given as %.4g, but as the strain goes to zero it goes to %.4g: the "+
			"first step depends on its size.", r.Value, math.Exp(limit))
		x.note(f, math.Abs(limit-math.Log(r.Value)), "")
	}
}

func (x *examination) startsInfinitely(p creeplaw.Point, limit, inDomain float64) {
	f := x.found(InfiniteStart, Remark, p)
	exponent := (limit - inDomain) / -math.Log(remote)
	f.Numbers = []Number{{"strain exponent near zero", exponent, ""}}
	f.Sentence = "Virgin material starts at an infinite rate, as primary creep by a power of time does: an explicit scheme cannot " +
		"start, and the first implicit step carries the largest error."
	if !(exponent < 0) {
		f.Kind, f.Severity = UndefinedAtZeroStrain, Fault
		f.Sentence = "The rate of virgin material is given as infinite, but the rates near zero strain do not lead there."
	}
	x.note(f, 0, "")
}
