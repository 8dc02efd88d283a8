package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// StrainHardened is the law that a curve becomes when history enters through the creep strain reached and not through a
// clock. The pseudo-time t* at which the curve, under the present stress and temperature, would have reached the present
// creep strain gives the rate,
//
//	ε(σ, T, t*) = p,   ṗ = ∂ε/∂t (σ, T, t*)
//
// and implicit differentiation its partial derivatives: ∂ṗ/∂p = ε_tt/ε_t, ∂ṗ/∂σ = ε_tσ - ε_tt ε_σ/ε_t, ∂ṗ/∂T likewise.
//
// Symbols: σ von Mises stress [stress]; p accumulated equivalent creep strain [-]; T absolute temperature [K]; ε the curve.
//
// Under constant stress and temperature the law follows the curve; after a change it goes on from the point of the new curve
// at the same creep strain, the shift along the strain axis of the hand construction.
//
// At zero strain the rate is the curve's at zero time, +Inf for primary creep by a power of time below one. At zero stress it
// is zero if the curve does not creep there. Creep strain that the curve can never reach under this stress, because it
// saturates, gives a rate of zero (LogRate -Inf): creep has come to its end until the stress rises. Creep strain below what
// the curve has at its earliest time, as a curve with an instantaneous part would have, gives the rate of that time.
// Negative or NaN stress or strain gives NaN.
//
// A curve that starts slower than in proportion to time (smallest time exponent above one) has zero rate at zero strain, and
// a law made from it never starts: for the curves of this package NewStrainHardened refuses that.
//
// Source: the strain-hardening hypothesis, I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959;
// J. T. Boyle, J. Spence, Stress Analysis for Creep, Butterworths 1983 (both from memory).
type StrainHardened struct {
	curve  Curve
	logs   Logarithmic
	terms  []Term    // of a sum, nil for any other curve
	quick  quickKind // what they suit
	direct direct    // of a curve that needs no search, nil for any other
}

var _ creeplaw.Logarithmic = StrainHardened{}

// NewStrainHardened makes a law of a curve. A nil curve is a *creeplaw.MissingError; one that never starts to creep, as far as
// that is known, a *creeplaw.ParameterError.
func NewStrainHardened(c Curve) (StrainHardened, error) {
	const name = "strain-hardened curve"
	if c == nil {
		return StrainHardened{}, &creeplaw.MissingError{Law: name, Part: "curve"}
	}
	h := StrainHardened{curve: c, logs: Log(c)}
	h.direct, _ = c.(direct)
	if s, ok := c.(interface{ parts() []Term }); ok {
		h.terms = s.parts()
		if m := leastTimeExponent(h.terms); !(m <= 1) {
			return StrainHardened{}, &creeplaw.ParameterError{Law: name, Parameter: "smallest time exponent", Value: m,
				Want: "at most 1, or creep never starts"}
		}
		if n := len(h.terms); n > many {
			return StrainHardened{}, &creeplaw.ParameterError{Law: name, Parameter: "number of terms", Value: float64(n),
				Want: "at most 64"}
		}
	}
	h.quick = quickKindOf(h.terms)
	return h, nil
}

// Curve returns the curve the law was made from.
func (h StrainHardened) Curve() Curve { return h.curve }

// LogRate returns ln ṗ and its exponents. At zero strain and at zero stress they are limits.
func (h StrainHardened) LogRate(p creeplaw.Point) creeplaw.LogRate {
	return h.find(p).rate
}

// LogTime returns ln t*, the logarithm of the pseudo-time: -Inf at zero strain, +Inf for a creep strain that is never
// reached, NaN for "not here".
func (h StrainHardened) LogTime(p creeplaw.Point) float64 {
	r := h.find(p)
	if r.time > 0 {
		return math.Log(r.time)
	}
	return r.logTime
}

// Rate returns ṗ and its derivatives.
func (h StrainHardened) Rate(p creeplaw.Point) creeplaw.Rate {
	if p.Strain == 0 && p.Stress > 0 && h.curve != nil {
		return h.start(p)
	}
	l := h.LogRate(p)
	r := creeplaw.Rate{
		Value:         math.Exp(l.Value),
		ByStress:      derivative(l.Value, l.ByLogStress, p.Stress),
		ByTemperature: derivative(l.Value, l.ByLogTemperature, p.Temperature),
	}
	if p.Strain > 0 {
		r.ByStrain = derivative(l.Value, l.ByLogStrain, p.Strain)
	}
	if p.Stress == 0 {
		p.Stress, p.Strain = faint, max(p.Strain, faint)
		l = h.LogRate(p)
		r.ByStress = slopeFrom(Exponents{Value: l.Value, ByLogStress: l.ByLogStress})
	}
	return r
}

// direct is a curve that finds its point itself.
type direct interface{ find(creeplaw.Point) found }

// found is the point of the curve that a creep strain belongs to.
type found struct {
	rate        creeplaw.LogRate
	logTime     float64 // ln t*
	time        float64 // t* instead, if positive
	evaluations int     // of the curve
}

func (h StrainHardened) find(p creeplaw.Point) found {
	switch {
	case !(p.Stress >= 0 && p.Strain >= 0) || math.IsInf(p.Strain, 1) || h.curve == nil:
		return foundNothing()
	case p.Strain == 0:
		return found{rate: h.logStart(p), logTime: math.Inf(-1)}
	case h.direct != nil:
		return h.direct.find(p)
	case h.terms == nil:
		return h.findInAny(p)
	case len(h.terms) <= few:
		return findInFew(h.terms, h.quick, p)
	}
	return findInMany(h.terms, p)
}

// start is the plain rate at zero strain and positive stress.
func (h StrainHardened) start(p creeplaw.Point) creeplaw.Rate {
	e := h.curve.At(Point{Stress: p.Stress, Temperature: p.Temperature})
	if math.IsNaN(e.Value) {
		e = undefined()
	}
	r := creeplaw.Rate{Value: e.ByTime, ByStress: e.ByTimeStress, ByTemperature: e.ByTimeTemperature}
	switch {
	case math.IsInf(e.ByTime, 1):
		r.ByStrain = math.Inf(-1)
	case e.ByTimeTwice != 0:
		r.ByStrain = e.ByTimeTwice / e.ByTime
	}
	return r
}

// logStart is its logarithm, with the exponents at vanishing strain.
func (h StrainHardened) logStart(p creeplaw.Point) creeplaw.LogRate {
	if h.terms != nil {
		first := sum{h.terms}.start(p.Stress, p.Temperature)
		c, m := first.prefactor, first.exponent
		switch {
		case m == 1 || math.IsNaN(c.Value):
			return creeplaw.LogRate{Value: c.Value, ByLogStress: c.ByLogStress, ByLogTemperature: c.ByLogTemperature}
		case m > 1:
			return creeplaw.LogRate{Value: math.Inf(-1)}
		}
		return creeplaw.LogRate{Value: math.Inf(1), ByLogStress: c.ByLogStress / m, ByLogStrain: (m - 1) / m,
			ByLogTemperature: c.ByLogTemperature / m}
	}
	e := h.curve.At(Point{Stress: p.Stress, Temperature: p.Temperature})
	x := exponentsOf(Point{p.Stress, p.Temperature, 0}, e.ByTime, 0, e.ByTimeStress, e.ByTimeTemperature)
	if !(e.ByTime >= 0 && e.Value >= 0) {
		return undefinedRate()
	}
	return creeplaw.LogRate{Value: x.Value, ByLogStress: x.ByLogStress, ByLogTemperature: x.ByLogTemperature}
}

// never is a creep strain beyond the end of the curve.
func never() found {
	return found{rate: creeplaw.LogRate{Value: math.Inf(-1)}, logTime: math.Inf(1)}
}

func foundNothing() found {
	nan := math.NaN()
	return found{rate: undefinedRate(), logTime: nan}
}

func undefinedRate() creeplaw.LogRate {
	nan := math.NaN()
	return creeplaw.LogRate{Value: nan, ByLogStress: nan, ByLogStrain: nan, ByLogTemperature: nan}
}
