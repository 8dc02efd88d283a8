package curve

import (
	"errors"
	"math"

	"example.com/holdtime/creeplaw"
)

// Constant is a coefficient that depends on nothing: c > 0.
type Constant float64

// LogAt returns ln c.
func (c Constant) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c Constant) prepare() (prepared, error) {
	return &common{intercept: math.Log(float64(c))}, positive("constant", float64(c))
}

// Power is A σⁿ: prefactor A > 0 [unit of the coefficient × stress⁻ⁿ] and exponent n > 0. It vanishes at zero stress.
type Power struct{ Prefactor, Exponent float64 }

// LogAt returns ln A + n ln σ and n.
func (c Power) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c Power) prepare() (prepared, error) {
	err := errors.Join(positive("prefactor", c.Prefactor), positive("exponent", c.Exponent))
	return &common{intercept: math.Log(c.Prefactor), exponent: c.Exponent}, err
}

// PowerAt is c₁ (σ/σ₁)ⁿ: the coefficient has the Value c₁ > 0 under the Stress σ₁ > 0; n > 0. It serves where the prefactor
// of Power would leave the range of a float64.
type PowerAt struct{ Value, Stress, Exponent float64 }

// LogAt returns ln c₁ + n ln(σ/σ₁) and n.
func (c PowerAt) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c PowerAt) prepare() (prepared, error) {
	err := errors.Join(positive("value", c.Value), positive("stress", c.Stress), positive("exponent", c.Exponent))
	return &common{intercept: math.Log(c.Value) - c.Exponent*math.Log(c.Stress), exponent: c.Exponent}, err
}

// InversePower is A σ⁻ⁿ: prefactor A > 0 [unit of the coefficient × stressⁿ] and exponent n > 0. It is infinite at zero
// stress and serves for times, such as the end of primary creep.
type InversePower struct{ Prefactor, Exponent float64 }

// LogAt returns ln A - n ln σ and -n.
func (c InversePower) LogAt(stress, temperature float64) LogValue {
	return logAt(c, stress, temperature)
}

func (c InversePower) prepare() (prepared, error) {
	err := errors.Join(positive("prefactor", c.Prefactor), positive("exponent", c.Exponent))
	return &common{intercept: math.Log(c.Prefactor), exponent: -c.Exponent}, err
}

// Sinh is A sinhⁿ(Bσ): prefactor A > 0 [unit of the coefficient], stress coefficient B > 0 [1/stress], exponent n > 0. It
// vanishes at zero stress. A stress scale σ₀ is B = 1/σ₀.
type Sinh struct{ Prefactor, StressCoefficient, Exponent float64 }

// LogAt returns ln A + n ln sinh(Bσ) and n·Bσ·coth(Bσ).
func (c Sinh) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c Sinh) prepare() (prepared, error) {
	err := errors.Join(positive("prefactor", c.Prefactor), positive("stress coefficient", c.StressCoefficient),
		positive("exponent", c.Exponent))
	return &common{intercept: math.Log(c.Prefactor), sinhCoefficient: c.StressCoefficient, sinhExponent: c.Exponent}, err
}

// Exponential is A exp(Bσ): prefactor A > 0 [unit of the coefficient] and stress coefficient B [1/stress], finite, of either
// sign. At zero stress it is A, not zero: a curve whose every term is scaled by exponentials of stress creeps under no
// stress. Soderberg is the form that vanishes.
type Exponential struct{ Prefactor, StressCoefficient float64 }

// LogAt returns ln A + Bσ and Bσ.
func (c Exponential) LogAt(stress, temperature float64) LogValue {
	return logAt(c, stress, temperature)
}

func (c Exponential) prepare() (prepared, error) {
	err := errors.Join(positive("prefactor", c.Prefactor), finite("stress coefficient", c.StressCoefficient))
	return &common{intercept: math.Log(c.Prefactor), byStress: c.StressCoefficient}, err
}

// Soderberg is A [exp(Bσ) - 1]: prefactor A > 0 [unit of the coefficient] and stress coefficient B > 0 [1/stress]. It
// vanishes at zero stress and is the exponential at high stress.
type Soderberg struct{ Prefactor, StressCoefficient float64 }

// LogAt returns ln A + ln(exp(Bσ) - 1) and Bσ/(1 - exp(-Bσ)).
func (c Soderberg) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c Soderberg) prepare() (prepared, error) {
	if err := positive("stress coefficient", c.StressCoefficient); err != nil {
		return nil, err
	}
	law, err := creeplaw.NewSoderberg(c.Prefactor, 1/c.StressCoefficient)
	return soderberg{law}, err
}

func (c soderberg) plainAt(x condition) plainValue { return plainOf(c.at(x)) }

type soderberg struct{ law creeplaw.Soderberg }

func (c soderberg) at(x condition) LogValue {
	l := c.law.LogRate(creeplaw.Point{Stress: x.stress})
	return LogValue{l.Value, l.ByLogStress, 0}
}

// LogBilinear is exp(a + bσ + cT + dσT), the function of stress [stress] and temperature [K] that the parameters of the
// theta projection are fitted to: Intercept a, ByStress b [1/stress], ByTemperature c [1/K] and ByProduct d
// [1/(stress·K)], all finite. Constants fitted to decimal logarithms are to be multiplied by ln 10. At zero stress it does
// not vanish.
type LogBilinear struct{ Intercept, ByStress, ByTemperature, ByProduct float64 }

// LogAt returns a + bσ + cT + dσT, (b + dT)σ and (c + dσ)T.
func (c LogBilinear) LogAt(stress, temperature float64) LogValue {
	return logAt(c, stress, temperature)
}

func (c LogBilinear) prepare() (prepared, error) {
	err := errors.Join(finite("intercept", c.Intercept), finite("coefficient of stress", c.ByStress),
		finite("coefficient of temperature", c.ByTemperature), finite("coefficient of the product", c.ByProduct))
	return &common{intercept: c.Intercept, byStress: c.ByStress, byTemperature: c.ByTemperature, byProduct: c.ByProduct}, err
}

// Activated is a coefficient times a factor of temperature, such as creeplaw.Arrhenius.
type Activated struct {
	Coefficient Coefficient
	Factor      creeplaw.TemperatureFactor
}

// LogAt adds ln f(T) to the logarithm of the coefficient.
func (c Activated) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c Activated) prepare() (prepared, error) {
	switch {
	case c.Coefficient == nil:
		return nil, &creeplaw.MissingError{Part: "coefficient"}
	case c.Factor == nil:
		return nil, &creeplaw.MissingError{Part: "temperature factor"}
	}
	within, err := workUp(c.Coefficient)
	if err != nil {
		return nil, err
	}
	return multiplied(within, factorOf(c.Factor)), nil
}

// factor is a factor of temperature as a coefficient.
type factor struct{ creeplaw.TemperatureFactor }

func (f factor) at(x condition) LogValue {
	v, byLog := f.LogFactor(x.temperature)
	return LogValue{v, 0, byLog}
}

func (f factor) plainAt(x condition) plainValue { return plainOf(f.at(x)) }

// factorOf turns an Arrhenius factor into its two numbers, which it gives away at one kelvin and at infinite temperature.
func factorOf(f creeplaw.TemperatureFactor) prepared {
	if a, ok := f.(creeplaw.Arrhenius); ok {
		_, activation := a.LogFactor(1)
		intercept, _ := a.LogFactor(math.Inf(1))
		return &common{intercept: intercept, activation: activation}
	}
	return factor{f}
}

// Product is the product of coefficients, one at least: a transient rate constant in proportion to the steady creep rate is
// Product{Constant(k), steady}.
type Product []Coefficient

// LogAt adds the logarithms.
func (c Product) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c Product) prepare() (prepared, error) {
	if len(c) == 0 {
		return nil, &creeplaw.MissingError{Part: "factor of the product"}
	}
	var all prepared = &common{}
	for _, factor := range c {
		p, err := prepare("", "factor of the product", factor)
		if err != nil {
			return nil, err
		}
		all = multiplied(all, p)
	}
	return all, nil
}

// RateOf is the rate of a law of steady creep as a coefficient [1/time]: any law of package creeplaw that does not depend
// on creep strain can be the steady part of a curve. The law is asked at zero strain; one that hardens from an infinite rate
// there is undefined here (NaN), and one with internal variables, which would be lost, is a *creeplaw.CompositionError.
type RateOf struct{ Law creeplaw.Law }

// LogAt returns ln ṗ and its exponents.
func (c RateOf) LogAt(stress, temperature float64) LogValue { return logAt(c, stress, temperature) }

func (c RateOf) prepare() (prepared, error) {
	if c.Law == nil {
		return nil, &creeplaw.MissingError{Part: "law"}
	}
	if e, ok := c.Law.(creeplaw.Evolving); ok {
		lost := &creeplaw.CompositionError{Law: "rate of a law in a curve", Variable: "the principal stress"}
		if v := e.Variables(); len(v) > 0 {
			lost.Variable = v[0].Name
		}
		return nil, lost
	}
	return rateOf{creeplaw.Log(c.Law)}, nil
}

type rateOf struct{ law creeplaw.Logarithmic }

func (c rateOf) at(x condition) LogValue {
	l := c.law.LogRate(creeplaw.Point{Stress: x.stress, Temperature: x.temperature})
	if math.IsInf(l.Value, 1) {
		return undefinedValue()
	}
	return LogValue{l.Value, l.ByLogStress, l.ByLogTemperature}
}

func (c rateOf) plainAt(x condition) plainValue { return plainOf(c.at(x)) }
