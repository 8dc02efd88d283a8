package creeplaw

// PowerExponential is a power of stress with an exponential on top
//
//	ṗ = A σⁿ exp(σ/σ₀)
//
// Symbols: σ von Mises stress [stress]; A prefactor [stress⁻ⁿ/time], > 0; n stress exponent [-], > 0; σ₀ stress scale
// [stress], > 0.
//
// The exponential describes the breakdown of the power law at high stress: the local exponent n + σ/σ₀ grows without bound.
// At zero stress the rate is zero, with slope A for n = 1, 0 for n > 1 and +Inf for n < 1. It depends neither on creep
// strain nor on temperature (see WithTemperature). Negative or NaN stress gives NaN.
//
// Source: the form of the minimum rate of 9Cr-1Mo-V in R. W. Swindeman, ASME PVP-391 (1999) 95–100 (from memory).
type PowerExponential struct {
	power power
	scale float64
	given[Law]
}

var _ Logarithmic = PowerExponential{}

// NewPowerExponential builds ṗ = A σⁿ exp(σ/σ₀) from the prefactor A [stress⁻ⁿ/time], the stress exponent n and the stress
// scale σ₀ [stress], all positive and finite.
func NewPowerExponential(prefactor, stressExponent, stressScale float64) (PowerExponential, error) {
	err := positive("power law with exponential", parameter{"prefactor", prefactor},
		parameter{"stress exponent", stressExponent}, parameter{"stress scale", stressScale})
	if err != nil {
		return PowerExponential{}, err
	}
	return PowerExponential{newPrefactor(prefactor, stressExponent), stressScale,
		remember(powerExponentialForm, prefactor, stressExponent, stressScale)}, nil
}

// LogRate returns ln A + n ln σ + σ/σ₀ and the local exponent n + σ/σ₀.
func (e PowerExponential) LogRate(p Point) LogRate {
	l := e.power.LogRate(p)
	x := p.Stress / e.scale
	l.Value += x
	l.ByLogStress += x
	return l
}

// Rate returns ṗ and its derivative by stress ṗ (n/σ + 1/σ₀).
func (e PowerExponential) Rate(p Point) Rate {
	if p.Stress > 0 {
		return rateOf(p, e.LogRate(p))
	}
	return e.power.Rate(p) // zero stress, where the exponential is one; or NaN
}
