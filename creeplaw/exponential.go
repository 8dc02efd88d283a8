package creeplaw

import "math"

// Exponential is the raw exponential of stress
//
//	ṗ = A exp(σ/σ₀)
//
// Symbols: σ von Mises stress [stress]; A the rate at zero stress [1/time], > 0; σ₀ stress scale [stress], > 0.
//
// It creeps under no stress: the rate at zero stress is A, with slope A/σ₀, and an unloaded part drifts for ever. It is here
// because measured rates at high stress are published this way; an audit will flag it. Two things follow. The direction of
// flow is undefined at zero stress, and a relaxation step so long that creep at the rate A alone would outrun the elastic
// strain has no solution: the step refuses it. Soderberg's form vanishes at zero stress and is the same at high stress.
//
// It depends neither on creep strain nor on temperature (see WithTemperature). Negative or NaN stress gives NaN.
//
// Source: P. Ludwik, Elemente der technologischen Mechanik, Springer 1909; I. Finnie, W. R. Heller, Creep of Engineering
// Materials, McGraw-Hill 1959 (both from memory).
type Exponential struct {
	logPrefactor, scale float64
	given[Law]
}

var _ Logarithmic = Exponential{}

// NewExponential builds ṗ = A exp(σ/σ₀) from the rate at zero stress A [1/time] and the stress scale σ₀ [stress], both
// positive and finite.
func NewExponential(prefactor, stressScale float64) (Exponential, error) {
	err := positive("exponential of stress", parameter{"prefactor", prefactor}, parameter{"stress scale", stressScale})
	if err != nil {
		return Exponential{}, err
	}
	return Exponential{math.Log(prefactor), stressScale, remember(exponentialForm, prefactor, stressScale)}, nil
}

// LogRate returns ln A + σ/σ₀; the local exponent is σ/σ₀.
func (e Exponential) LogRate(p Point) LogRate {
	if !(p.Stress >= 0) {
		return undefinedLog()
	}
	x := p.Stress / e.scale
	return LogRate{Value: e.logPrefactor + x, ByLogStress: x}
}

// Rate returns ṗ and its derivative by stress ṗ/σ₀.
func (e Exponential) Rate(p Point) Rate {
	if !(p.Stress >= 0) {
		return undefined()
	}
	l := e.logPrefactor + p.Stress/e.scale
	return Rate{Value: math.Exp(l), ByStress: math.Exp(l - math.Log(e.scale))}
}
