package creeplaw

import "math"

// Law gives the equivalent creep strain rate of a material and its partial derivatives.
//
// A Law is immutable and safe for concurrent use. Rate must not allocate: it is called several times per material point
// and step. A law says "not here" by returning NaN; the step turns any NaN into a failure that leaves everything as it was.
// A rate of +Inf is allowed at zero creep strain only, where hardening from virgin material starts.
type Law interface {
	Rate(Point) Rate
}

// Point is the condition at which a law is evaluated.
type Point struct {
	Stress      float64 // σ: von Mises equivalent stress, >= 0 [stress]
	Strain      float64 // p: accumulated equivalent creep strain, >= 0 [-], the history that hardening remembers
	Temperature float64 // T: absolute temperature, > 0 [K]
}

// Rate is an equivalent creep strain rate and its partial derivatives at a Point.
type Rate struct {
	Value         float64 // ṗ [1/time]
	ByStress      float64 // ∂ṗ/∂σ [1/(stress·time)]
	ByStrain      float64 // ∂ṗ/∂p [1/time]
	ByTemperature float64 // ∂ṗ/∂T [1/(K·time)]
}

// Logarithmic is the capability of a law to give the logarithm of its rate. Stress exponents of 40 and stresses from 1e-6
// to 1e5 carry a rate beyond the range of a float64; its logarithm stays exact. The implicit step works on it.
// Every law of this package has it; Log supplies it, as far as the plain rate goes, for a law that has not.
type Logarithmic interface {
	Law
	LogRate(Point) LogRate
}

// LogRate is the natural logarithm of a rate and its derivatives by the logarithms of the arguments, which are the local
// exponents: a power law of stress has ByLogStress = n everywhere.
type LogRate struct {
	Value            float64 // ln(ṗ × unit of time); -Inf where the rate is zero, +Inf where it is infinite, NaN for "not here"
	ByLogStress      float64 // ∂ln ṗ/∂ln σ [-], the local stress exponent
	ByLogStrain      float64 // ∂ln ṗ/∂ln p [-], negative for hardening, positive for softening
	ByLogTemperature float64 // ∂ln ṗ/∂ln T [-], for an Arrhenius factor Q/(RT)
}

// Explainer is the capability of a law to say why a point is outside its domain. It is asked only after a failure and by
// drivers beforehand, never inside the step. It returns nil for a point at which the law is defined.
type Explainer interface {
	CheckPoint(Point) error
}

// Log returns the law itself when it is Logarithmic, and otherwise an adapter that takes the logarithm of the plain rate.
// The adapter is exact as long as the rate neither overflows nor underflows (about 1e±308).
func Log(law Law) Logarithmic {
	if l, ok := law.(Logarithmic); ok {
		return l
	}
	return logOfRate{law}
}

// logOfRate makes any Law Logarithmic.
type logOfRate struct{ Law }

func (a logOfRate) LogRate(p Point) LogRate {
	r := a.Rate(p)
	if !(r.Value >= 0) {
		return undefinedLog()
	}
	if r.Value == 0 || math.IsInf(r.Value, 1) {
		return LogRate{Value: math.Log(r.Value)} // the exponents are not to be had from 0/0
	}
	return LogRate{
		Value:            math.Log(r.Value),
		ByLogStress:      p.Stress * (r.ByStress / r.Value),
		ByLogStrain:      p.Strain * (r.ByStrain / r.Value),
		ByLogTemperature: p.Temperature * (r.ByTemperature / r.Value),
	}
}

// rateOf turns a logarithmic rate at a point of positive stress and strain into a plain one. Each derivative is formed
// inside the exponential, so that it neither overflows nor vanishes before its own value does.
func rateOf(p Point, l LogRate) Rate {
	r := Rate{Value: math.Exp(l.Value)}
	r.ByStress = derivative(l.Value, l.ByLogStress, p.Stress)
	r.ByStrain = derivative(l.Value, l.ByLogStrain, p.Strain)
	r.ByTemperature = derivative(l.Value, l.ByLogTemperature, p.Temperature)
	return r
}

// derivative is exponent·exp(logValue)/x, zero when the exponent is.
func derivative(logValue, exponent, x float64) float64 {
	if exponent == 0 {
		return 0
	}
	return exponent * math.Exp(logValue-math.Log(x))
}

func undefined() Rate {
	nan := math.NaN()
	return Rate{nan, nan, nan, nan}
}

func undefinedLog() LogRate {
	nan := math.NaN()
	return LogRate{nan, nan, nan, nan}
}
