package curve

import "math"

// Curve is creep strain at constant stress and temperature as a function of time, with its derivatives.
//
// It counts creep strain only and starts from zero: instantaneous strain on loading belongs to elasticity or plasticity. It
// never falls with time. A Curve is immutable and safe for concurrent use, At must not allocate. "Not here" is NaN. At zero
// time a rate of +Inf is allowed, where primary creep starts.
type Curve interface {
	At(Point) Strain
}

// Point is the condition at which a curve is evaluated.
type Point struct {
	Stress      float64 // σ: von Mises equivalent stress, >= 0 [stress]
	Temperature float64 // T: absolute temperature, > 0 [K]
	Time        float64 // t: time since loading, >= 0 [time]
}

// Strain is a creep strain and its partial derivatives at a Point. The two mixed ones are the derivatives of the rate: a law
// made from the curve needs them for its own.
type Strain struct {
	Value             float64 // ε [-]
	ByTime            float64 // ∂ε/∂t, the creep rate [1/time]
	ByTimeTwice       float64 // ∂²ε/∂t² [1/time²]
	ByStress          float64 // ∂ε/∂σ [1/stress]
	ByTemperature     float64 // ∂ε/∂T [1/K]
	ByTimeStress      float64 // ∂²ε/∂t∂σ [1/(stress·time)]
	ByTimeTemperature float64 // ∂²ε/∂t∂T [1/(K·time)]
}

// Func makes a user's own function a Curve. It returns the strain and all its derivatives, must not allocate and must be
// safe for concurrent use. A nil Func is undefined everywhere (NaN).
type Func func(Point) Strain

var _ Curve = Func(nil)

// At calls the function.
func (f Func) At(p Point) Strain {
	if f == nil {
		return undefined()
	}
	return f(p)
}

// Logarithmic is the capability of a curve to work in the logarithms of strain, rate and time. Times of forty decades and
// more, and strains and rates beyond the range of a float64, stay exact there. Every curve of this package has it; Log
// supplies it, as far as the plain numbers go, for a curve that has not.
type Logarithmic interface {
	Curve
	LogAt(LogPoint) LogStrain
}

// LogPoint is a Point of positive time.
type LogPoint struct {
	Stress      float64 // σ [stress], >= 0
	Temperature float64 // T [K], > 0
	LogTime     float64 // ln(t/unit of time)
}

// LogStrain is a creep strain and a creep rate, each as a logarithm with its local exponents.
type LogStrain struct {
	Strain Exponents // of ε
	Rate   Exponents // of ∂ε/∂t
}

// Exponents is the natural logarithm of a quantity and its derivatives by the logarithms of the arguments.
type Exponents struct {
	Value            float64 // ln of the quantity; -Inf where it is zero, NaN for "not here"
	ByLogTime        float64 // local time exponent [-]
	ByLogStress      float64 // local stress exponent [-]
	ByLogTemperature float64 // [-], Q/(RT) for an Arrhenius factor
}

// Log returns the curve itself when it is Logarithmic, and otherwise an adapter that takes the logarithms of the plain
// numbers, exact as long as none of them overflows or vanishes (about 1e±308).
func Log(c Curve) Logarithmic {
	if l, ok := c.(Logarithmic); ok {
		return l
	}
	return logOf{c}
}

type logOf struct{ Curve }

func (a logOf) LogAt(q LogPoint) LogStrain {
	p := Point{q.Stress, q.Temperature, math.Exp(q.LogTime)}
	e := a.At(p)
	if !(e.Value >= 0 && e.ByTime >= 0) {
		return undefinedLog()
	}
	return LogStrain{
		Strain: exponentsOf(p, e.Value, e.ByTime, e.ByStress, e.ByTemperature),
		Rate:   exponentsOf(p, e.ByTime, e.ByTimeTwice, e.ByTimeStress, e.ByTimeTemperature),
	}
}

func exponentsOf(p Point, v, byTime, byStress, byTemperature float64) Exponents {
	if v == 0 || math.IsInf(v, 1) {
		return Exponents{Value: math.Log(v)} // the exponents are not to be had from 0/0
	}
	return Exponents{math.Log(v), p.Time * (byTime / v), p.Stress * (byStress / v), p.Temperature * (byTemperature / v)}
}

func undefined() Strain {
	nan := math.NaN()
	return Strain{nan, nan, nan, nan, nan, nan, nan}
}

func undefinedLog() LogStrain {
	nan := math.NaN()
	e := Exponents{nan, nan, nan, nan}
	return LogStrain{e, e}
}

// derivative is exponent·exp(logValue)/x, zero when the exponent is.
func derivative(logValue, exponent, x float64) float64 {
	if exponent == 0 {
		return 0
	}
	return exponent * math.Exp(logValue-math.Log(x))
}
