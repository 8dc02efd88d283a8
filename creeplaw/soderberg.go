package creeplaw

import "math"

// Soderberg is the exponential of stress that vanishes at zero stress
//
//	ṗ = A [exp(σ/σ₀) - 1]
//
// Symbols: σ von Mises stress [stress]; A prefactor [1/time], > 0; σ₀ stress scale [stress], > 0.
//
// At low stress it is the linear law A σ/σ₀, at high stress A exp(σ/σ₀); the logarithm is exact in both limits. At zero
// stress the rate is zero with slope A/σ₀. It depends neither on creep strain nor on temperature (see WithTemperature).
// Negative or NaN stress gives NaN.
//
// Source: C. R. Soderberg, The interpretation of creep tests for machine design, Trans. ASME 58 (1936) 733–743 (from
// memory).
type Soderberg struct {
	logPrefactor, scale float64
	given[Law]
}

var _ Logarithmic = Soderberg{}

// NewSoderberg builds ṗ = A [exp(σ/σ₀) - 1] from the prefactor A [1/time] and the stress scale σ₀ [stress], both positive
// and finite.
func NewSoderberg(prefactor, stressScale float64) (Soderberg, error) {
	err := positive("Soderberg", parameter{"prefactor", prefactor}, parameter{"stress scale", stressScale})
	if err != nil {
		return Soderberg{}, err
	}
	return Soderberg{math.Log(prefactor), stressScale, remember(soderbergForm, prefactor, stressScale)}, nil
}

// expSaturation is the argument beyond which e^(-x) is below the rounding of 1.
const expSaturation = 38

// LogRate returns ln A + ln(eˣ - 1) and the local exponent x/(1 - e⁻ˣ) with x = σ/σ₀.
func (s Soderberg) LogRate(p Point) LogRate {
	x := p.Stress / s.scale
	switch {
	case x > expSaturation:
		return LogRate{Value: s.logPrefactor + x, ByLogStress: x}
	case x >= 0x1p-1000:
		e := -math.Expm1(-x)
		return LogRate{Value: s.logPrefactor + x + math.Log(e), ByLogStress: x / e}
	case p.Stress > 0: // the ratio has lost digits to underflow, the logarithms have not
		return LogRate{Value: s.logPrefactor + math.Log(p.Stress) - math.Log(s.scale), ByLogStress: 1}
	case p.Stress == 0:
		return LogRate{Value: math.Inf(-1), ByLogStress: 1}
	}
	return undefinedLog()
}

// Rate returns ṗ and its derivative by stress A exp(σ/σ₀)/σ₀.
func (s Soderberg) Rate(p Point) Rate {
	if !(p.Stress >= 0) {
		return undefined()
	}
	return Rate{
		Value:    math.Exp(s.LogRate(p).Value),
		ByStress: math.Exp(s.logPrefactor + p.Stress/s.scale - math.Log(s.scale)),
	}
}
