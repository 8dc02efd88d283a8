package curve

import (
	"errors"
	"math"

	"example.com/holdtime/creeplaw"
)

// Coefficient is a function of stress and temperature, never negative, that scales a term of a curve: a limit of transient
// strain, a rate constant, a steady creep rate. It must be immutable, safe for concurrent use and free of allocation.
//
// This package has Constant, Power, PowerAt, InversePower, Sinh, Exponential, Soderberg, LogBilinear, Activated, Product and RateOf. Their
// fields are checked by the constructor of the curve they are handed to.
type Coefficient interface {
	LogAt(stress, temperature float64) LogValue
}

// LogValue is the natural logarithm of a coefficient and its local exponents.
type LogValue struct {
	Value            float64 // ln c; -Inf where the coefficient is zero, NaN for "not here"
	ByLogStress      float64 // ∂ln c/∂ln σ [-]
	ByLogTemperature float64 // ∂ln c/∂ln T [-]
}

// condition is the stress and temperature a curve is evaluated at. The curves have checked that the stress is not negative.
type condition struct{ stress, logStress, temperature, inverse float64 }

func conditionAt(stress, temperature float64) condition {
	c := condition{stress, math.Log(stress), temperature, 1 / temperature}
	if !(temperature > 0) {
		c.inverse = math.NaN() // for those who ask
	}
	return c
}

// prepared is a coefficient whose fields have been checked and worked up, once, when a curve was built.
type prepared interface {
	at(condition) LogValue
	plainAt(condition) plainValue
}

// plainValue is a coefficient itself, with the exponents of LogValue. It may have overflowed or vanished.
type plainValue struct{ value, byLogStress, byLogTemperature float64 }

func plainOf(l LogValue) plainValue {
	return plainValue{math.Exp(l.Value), l.ByLogStress, l.ByLogTemperature}
}

// own is a coefficient of this package.
type own interface {
	Coefficient
	prepare() (prepared, error)
}

// external is a coefficient of the user's.
type external struct{ Coefficient }

func (e external) at(c condition) LogValue { return e.LogAt(c.stress, c.temperature) }

func (e external) plainAt(c condition) plainValue { return plainOf(e.at(c)) }

// prepare checks a coefficient on its way into a curve. Errors name the curve and the part of it.
func prepare(curve, part string, c Coefficient) (prepared, error) {
	if c == nil {
		return nil, &creeplaw.MissingError{Law: curve, Part: part}
	}
	p, err := workUp(c)
	return p, within(curve, part, err)
}

func workUp(c Coefficient) (prepared, error) {
	if c, ok := c.(own); ok {
		return c.prepare()
	}
	return external{c}, nil
}

// logAt is LogAt of a coefficient that no curve has prepared yet.
func logAt(c own, stress, temperature float64) LogValue {
	p, err := c.prepare()
	if err != nil || !(stress >= 0) {
		return undefinedValue()
	}
	return p.at(conditionAt(stress, temperature))
}

// within tells an error of a part whose part it is.
func within(curve, part string, err error) error {
	var bad *creeplaw.ParameterError
	if errors.As(err, &bad) {
		return &creeplaw.ParameterError{Law: curve, Parameter: part + ": " + bad.Parameter, Value: bad.Value, Want: bad.Want}
	}
	var missing *creeplaw.MissingError
	if errors.As(err, &missing) {
		return &creeplaw.MissingError{Law: curve, Part: part + ": " + missing.Part}
	}
	return err
}

const wantPositive = "positive and finite"

func positive(parameter string, v float64) error {
	if !(v > 0) || math.IsInf(v, 1) {
		return &creeplaw.ParameterError{Parameter: parameter, Value: v, Want: wantPositive}
	}
	return nil
}

func finite(parameter string, v float64) error {
	if v-v != 0 {
		return &creeplaw.ParameterError{Parameter: parameter, Value: v, Want: "finite"}
	}
	return nil
}

func undefinedValue() LogValue {
	nan := math.NaN()
	return LogValue{nan, nan, nan}
}
