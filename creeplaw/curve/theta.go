package curve

import "math"

// ThetaProjection is primary creep that decays and tertiary creep that grows, with no steady stage between,
//
//	ε = θ₁ (1 - e^(-θ₂t)) + θ₃ (e^(θ₄t) - 1)
//
// Symbols: t time [time]; θ₁, θ₃ [-] scale primary and tertiary strain, θ₂, θ₄ [1/time] are their rate constants; all of them
// functions of von Mises stress σ [stress] and absolute temperature T [K], as published exp(a + bσ + cT + dσT)
// (LogBilinear).
//
// Zero at zero time, with the rate θ₁θ₂ + θ₃θ₄, which falls to a minimum (MinimumRate) and rises without bound. With the
// published functions it creeps under no stress, since none of them vanishes there: use it within the stresses it was fitted
// to. The law made from it hardens below the strain of the minimum rate and softens above.
//
// Source: R. W. Evans, B. Wilshire, Creep of Metals and Alloys, Institute of Metals 1985.
type ThetaProjection struct{ sum }

var _ Logarithmic = ThetaProjection{}

// NewThetaProjection builds the curve from its primary part, θ₁ and θ₂, and its tertiary part, θ₃ and θ₄. A missing
// coefficient is a *creeplaw.MissingError, a parameter of one out of bounds a *creeplaw.ParameterError.
func NewThetaProjection(primary, tertiary Transient) (ThetaProjection, error) {
	s, err := newSum("theta projection", part{Saturating(primary.Strain, primary.Rate), "θ₁", "θ₂"},
		part{Growing(tertiary.Strain, tertiary.Rate), "θ₃", "θ₄"})
	return ThetaProjection{s}, err
}

// MinimumRate returns the least rate under a stress and temperature and the time at which it is reached: from
// t = ln[θ₁θ₂²/(θ₃θ₄²)]/(θ₂ + θ₄), zero if the rate only rises.
func (c ThetaProjection) MinimumRate(stress, temperature float64) (rate, time float64) {
	if !(stress >= 0) || len(c.terms) != 2 {
		return math.NaN(), math.NaN()
	}
	at := conditionAt(stress, temperature)
	primary, tertiary := c.terms[0].coefficients(at), c.terms[1].coefficients(at)
	ratio := primary.amplitude.Value + 2*primary.rate.Value - tertiary.amplitude.Value - 2*tertiary.rate.Value
	time = max(0, ratio/(math.Exp(primary.rate.Value)+math.Exp(tertiary.rate.Value)))
	return c.At(Point{stress, temperature, time}).ByTime, time
}
