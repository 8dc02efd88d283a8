package creeplaw

import "math"

// Garofalo is the hyperbolic-sine law of steady creep
//
//	ṗ = A sinhⁿ(B σ)
//
// Symbols: σ von Mises stress [stress]; A prefactor [1/time]; B stress coefficient [1/stress]; n exponent [-], > 0.
//
// At low stress it is the power law A (Bσ)ⁿ, at high stress the exponential A 2⁻ⁿ exp(nBσ); the logarithm is exact in both
// limits. At zero stress the rate is zero, with slope AB for n = 1, 0 for n > 1 and +Inf for n < 1. It depends neither on
// creep strain nor on temperature (see WithTemperature). Negative or NaN stress gives NaN.
//
// Source: F. Garofalo, Trans. AIME 227 (1963) 351–356.
type Garofalo struct {
	logPrefactor, coefficient, exponent float64
	given[Law]
}

var _ Logarithmic = Garofalo{}

// NewGarofalo builds ṗ = A sinhⁿ(B σ) from the prefactor A [1/time], the stress coefficient B [1/stress] and the exponent n,
// all positive and finite.
func NewGarofalo(prefactor, stressCoefficient, exponent float64) (Garofalo, error) {
	err := positive("Garofalo", parameter{"prefactor", prefactor}, parameter{"stress coefficient", stressCoefficient},
		parameter{"exponent", exponent})
	if err != nil {
		return Garofalo{}, err
	}
	return Garofalo{math.Log(prefactor), stressCoefficient, exponent,
		remember(garofaloForm, prefactor, stressCoefficient, exponent)}, nil
}

// sinhSaturation is the argument beyond which e^(-2x) is below the rounding of 1.
const sinhSaturation = 19

// LogRate returns ln ṗ = ln A + n ln sinh(Bσ) and the local exponent n·x·coth x with x = Bσ.
func (g Garofalo) LogRate(p Point) LogRate {
	x := g.coefficient * p.Stress
	switch {
	case x > sinhSaturation:
		return LogRate{Value: g.logPrefactor + g.exponent*(x-math.Ln2), ByLogStress: g.exponent * x}
	case x > 0:
		e, logE := oneMinusExp(2 * x) // sinh x = e^x·e/2
		return LogRate{
			Value:       g.logPrefactor + g.exponent*(x-math.Ln2+logE),
			ByLogStress: g.exponent * x * (2 - e) / e,
		}
	case x == 0:
		return LogRate{Value: math.Inf(-1), ByLogStress: g.exponent}
	}
	return undefinedLog()
}

// oneMinusExp is 1 - e^-y and its logarithm for y > 0, to rounding.
func oneMinusExp(y float64) (value, logarithm float64) {
	switch {
	case y < 0.7: // where the difference would lose digits
		value = -math.Expm1(-y)
		return value, math.Log(value)
	case y < 2:
		value = 1 - math.Exp(-y)
		return value, math.Log(value)
	}
	small := math.Exp(-y)
	t := small / (2 - small) // ln(1-small) = -2 artanh t, |t| < 0.073
	s := t * t
	return 1 - small, -2 * t * (1 + s*(1.0/3+s*(1.0/5+s*(1.0/7+s*(1.0/9+s*(1.0/11+s*(1.0/13)))))))
}

// Rate returns ṗ and its derivative by stress, A n B sinhⁿ⁻¹(Bσ) cosh(Bσ).
func (g Garofalo) Rate(p Point) Rate {
	switch {
	case !(p.Stress >= 0):
		return undefined()
	case p.Stress == 0 && g.exponent > 1:
		return Rate{}
	case p.Stress == 0 && g.exponent == 1:
		return Rate{ByStress: math.Exp(g.logPrefactor + math.Log(g.coefficient))}
	case p.Stress == 0:
		return Rate{ByStress: math.Inf(1)}
	}
	return rateOf(p, g.LogRate(p))
}
