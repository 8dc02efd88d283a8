package creeplaw

import "math"

// GasConstant is R in J/(mol K), exact to the digits printed (CODATA 2018).
const GasConstant = 8.314462618

// TemperatureFactor is a positive, dimensionless function of temperature that multiplies a rate. Multiplying the rate at
// given stress and creep strain is the same as letting time run faster: one factor serves steady and primary laws alike.
type TemperatureFactor interface {
	// LogFactor returns ln f(T) and d ln f/d ln T at the absolute temperature T [K]; NaN where the factor is undefined.
	LogFactor(temperature float64) (value, byLogTemperature float64)
}

// Arrhenius is the temperature factor of a thermally activated rate
//
//	f(T) = exp[-(Q/R)(1/T - 1/T₀)]
//
// Symbols: T absolute temperature [K]; Q activation energy [J/mol], ≥ 0; R = 8.314462618 J/(mol K); T₀ reference
// temperature [K] at which the factor is one. Without a reference temperature the factor is exp(-Q/RT).
// d ln f/d ln T = Q/(RT). T ≤ 0 or NaN gives NaN. The zero Arrhenius is the factor one.
//
// Source: S. Arrhenius, Z. Phys. Chem. 4 (1889) 226; for creep, J. E. Dorn, J. Mech. Phys. Solids 3 (1955) 85 (from memory).
type Arrhenius struct {
	activation       float64 // Q/R [K]
	inverseReference float64 // 1/T₀ [1/K]
	given[TemperatureFactor]
}

var _ TemperatureFactor = Arrhenius{}

// NewArrhenius builds the factor exp(-Q/RT) from the activation energy Q [J/mol], ≥ 0 and finite.
func NewArrhenius(activationEnergy float64) (Arrhenius, error) {
	if !(activationEnergy >= 0) || math.IsInf(activationEnergy, 1) {
		return Arrhenius{}, &ParameterError{"Arrhenius", "activation energy", activationEnergy, "at least 0 and finite"}
	}
	return Arrhenius{activation: activationEnergy / GasConstant, given: remember(arrheniusForm, activationEnergy)}, nil
}

// NewArrheniusAt builds the factor that is one at the reference temperature T₀ [K], positive and finite: the wrapped law
// then keeps the parameters it was measured with at T₀.
func NewArrheniusAt(activationEnergy, referenceTemperature float64) (Arrhenius, error) {
	a, err := NewArrhenius(activationEnergy)
	if err != nil {
		return Arrhenius{}, err
	}
	if err := positive("Arrhenius", parameter{"reference temperature", referenceTemperature}); err != nil {
		return Arrhenius{}, err
	}
	a.inverseReference = 1 / referenceTemperature
	a.given = remember(arrheniusAtForm, activationEnergy, referenceTemperature)
	return a, nil
}

// LogFactor returns -(Q/R)(1/T - 1/T₀) and Q/(RT).
func (a Arrhenius) LogFactor(temperature float64) (value, byLogTemperature float64) {
	if !(temperature > 0) {
		return math.NaN(), math.NaN()
	}
	return -a.activation * (1/temperature - a.inverseReference), a.activation / temperature
}

// Thermal is a law whose rate is multiplied by a factor of temperature:
//
//	ṗ = f(T) · law(σ, p, T)
//
// Zero stress, zero strain and the limits are those of the law within.
type Thermal struct {
	law    Logarithmic
	factor TemperatureFactor
}

var _ Logarithmic = Thermal{}

// WithTemperature multiplies the rate of a law by a temperature factor. A nil law or factor is a *MissingError. A law
// with internal variables takes its factors as parameters; here it is a *CompositionError.
func WithTemperature(law Law, factor TemperatureFactor) (Thermal, error) {
	if law == nil {
		return Thermal{}, &MissingError{"temperature-dependent law", "law"}
	}
	if factor == nil {
		return Thermal{}, &MissingError{"temperature-dependent law", "temperature factor"}
	}
	if err := withoutVariables("temperature-dependent law", law); err != nil {
		return Thermal{}, err
	}
	return Thermal{Log(law), factor}, nil
}

// LogRate adds ln f to the logarithm of the law within.
func (t Thermal) LogRate(p Point) LogRate {
	l := t.law.LogRate(p)
	f, byLog := t.factor.LogFactor(p.Temperature)
	l.Value += f
	l.ByLogTemperature += byLog
	return l
}

// Rate multiplies the law within by f and adds the derivative of f. It goes by way of the logarithm, which holds where the
// factor or the law within alone would leave the range of a float64, except at zero stress and zero strain.
func (t Thermal) Rate(p Point) Rate {
	if p.Stress > 0 && p.Strain > 0 {
		return rateOf(p, t.LogRate(p))
	}
	r := t.law.Rate(p)
	if p.Stress > 0 && r.ByStrain == 0 { // zero strain, which the law within does not heed
		return rateOf(p, t.LogRate(p))
	}
	logFactor, byLog := t.factor.LogFactor(p.Temperature)
	if math.IsNaN(logFactor) {
		return undefined()
	}
	f := math.Exp(logFactor)
	scaled := Rate{scale(r.Value, f), scale(r.ByStress, f), scale(r.ByStrain, f), scale(r.ByTemperature, f)}
	if scaled.Value != 0 && byLog != 0 {
		scaled.ByTemperature += scaled.Value * byLog / p.Temperature
	}
	return scaled
}

// scale multiplies by a positive factor, which may have over- or underflowed: zero and infinity are limits it cannot change.
func scale(x, f float64) float64 {
	if x == 0 || math.IsInf(x, 0) {
		return x
	}
	return x * f
}

func finite(x float64) bool { return x-x == 0 }
