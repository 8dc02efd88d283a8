package curve

import (
	"errors"
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// ParametricCoefficient is the capability of a coefficient to name its parameters and to be rebuilt from others, as
// creeplaw.Parametric is that of a law. Every coefficient of this package has it.
type ParametricCoefficient interface {
	Coefficient

	// Parameters are in a fixed order, for a coefficient of the unit given: 1/time for a rate constant.
	Parameters(unit creeplaw.Dimension) []creeplaw.Parameter

	// WithParameters builds the same kind of coefficient from other values. What is out of bounds is a
	// *creeplaw.ParameterError of the parameter's name, and so is a wrong number of values.
	WithParameters(values []float64) (Coefficient, error)
}

var (
	_ ParametricCoefficient = Constant(0)
	_ ParametricCoefficient = Power{}
	_ ParametricCoefficient = PowerAt{}
	_ ParametricCoefficient = InversePower{}
	_ ParametricCoefficient = Sinh{}
	_ ParametricCoefficient = Exponential{}
	_ ParametricCoefficient = Soderberg{}
	_ ParametricCoefficient = LogBilinear{}
	_ ParametricCoefficient = Activated{}
	_ ParametricCoefficient = Product{}
	_ ParametricCoefficient = RateOf{}
)

func positiveNumber(name string, value float64, unit creeplaw.Dimension) creeplaw.Parameter {
	return creeplaw.Parameter{Name: name, Value: value, High: math.Inf(1), Dimension: unit}
}

func anyNumber(name string, value float64, unit creeplaw.Dimension) creeplaw.Parameter {
	return creeplaw.Parameter{Name: name, Value: value, Low: math.Inf(-1), High: math.Inf(1), Dimension: unit}
}

// raised is a unit times a power of stress and one of temperature.
func raised(unit creeplaw.Dimension, stress, temperature float64) creeplaw.Dimension {
	unit.Stress += stress
	unit.Temperature += temperature
	return unit
}

// Units of parameters.
var (
	dimensionless = creeplaw.Dimension{}
	perTime       = creeplaw.Dimension{Time: -1}
	inStress      = creeplaw.Dimension{Stress: 1}
	perStress     = creeplaw.Dimension{Stress: -1}
)

// checked calls a maker with the right number of values, and checks what it makes.
func checked(kind string, values []float64, n int, make func(v []float64) own) (Coefficient, error) {
	if len(values) != n {
		return nil, wrongNumber(kind, len(values))
	}
	c := make(values)
	if _, err := c.prepare(); err != nil {
		var bad *creeplaw.ParameterError
		if errors.As(err, &bad) {
			return nil, &creeplaw.ParameterError{Law: kind, Parameter: bad.Parameter, Value: bad.Value, Want: bad.Want}
		}
		return nil, err
	}
	return c, nil
}

func wrongNumber(kind string, n int) error {
	return &creeplaw.ParameterError{Law: kind, Parameter: "number of values", Value: float64(n), Want: "that of the parameters"}
}

// Parameters returns the constant.
func (c Constant) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("constant", float64(c), unit)}
}

// WithParameters returns another constant.
func (c Constant) WithParameters(values []float64) (Coefficient, error) {
	return checked("constant", values, 1, func(v []float64) own { return Constant(v[0]) })
}

// Parameters returns prefactor and exponent.
func (c Power) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("prefactor", c.Prefactor, raised(unit, -c.Exponent, 0)),
		positiveNumber("exponent", c.Exponent, dimensionless)}
}

// WithParameters returns another power.
func (c Power) WithParameters(values []float64) (Coefficient, error) {
	return checked("power", values, 2, func(v []float64) own { return Power{v[0], v[1]} })
}

// Parameters returns value, stress and exponent.
func (c PowerAt) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("value", c.Value, unit), positiveNumber("stress", c.Stress, inStress),
		positiveNumber("exponent", c.Exponent, dimensionless)}
}

// WithParameters returns another power.
func (c PowerAt) WithParameters(values []float64) (Coefficient, error) {
	return checked("power", values, 3, func(v []float64) own { return PowerAt{v[0], v[1], v[2]} })
}

// Parameters returns prefactor and exponent.
func (c InversePower) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("prefactor", c.Prefactor, raised(unit, c.Exponent, 0)),
		positiveNumber("exponent", c.Exponent, dimensionless)}
}

// WithParameters returns another inverse power.
func (c InversePower) WithParameters(values []float64) (Coefficient, error) {
	return checked("inverse power", values, 2, func(v []float64) own { return InversePower{v[0], v[1]} })
}

// Parameters returns prefactor, stress coefficient and exponent.
func (c Sinh) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("prefactor", c.Prefactor, unit),
		positiveNumber("stress coefficient", c.StressCoefficient, perStress), positiveNumber("exponent", c.Exponent, dimensionless)}
}

// WithParameters returns another hyperbolic sine.
func (c Sinh) WithParameters(values []float64) (Coefficient, error) {
	return checked("hyperbolic sine", values, 3, func(v []float64) own { return Sinh{v[0], v[1], v[2]} })
}

// Parameters returns prefactor and stress coefficient.
func (c Exponential) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("prefactor", c.Prefactor, unit),
		anyNumber("stress coefficient", c.StressCoefficient, perStress)}
}

// WithParameters returns another exponential.
func (c Exponential) WithParameters(values []float64) (Coefficient, error) {
	return checked("exponential", values, 2, func(v []float64) own { return Exponential{v[0], v[1]} })
}

// Parameters returns prefactor and stress coefficient.
func (c Soderberg) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	return []creeplaw.Parameter{positiveNumber("prefactor", c.Prefactor, unit),
		positiveNumber("stress coefficient", c.StressCoefficient, perStress)}
}

// WithParameters returns another function of this form.
func (c Soderberg) WithParameters(values []float64) (Coefficient, error) {
	return checked("Soderberg", values, 2, func(v []float64) own { return Soderberg{v[0], v[1]} })
}

// Parameters returns a, b, c and d under the names the errors of their constructors give them.
func (c LogBilinear) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	intercept := anyNumber("intercept", c.Intercept, unit)
	intercept.Scale = creeplaw.LogarithmOf
	return []creeplaw.Parameter{intercept, anyNumber("coefficient of stress", c.ByStress, perStress),
		anyNumber("coefficient of temperature", c.ByTemperature, raised(dimensionless, 0, -1)),
		anyNumber("coefficient of the product", c.ByProduct, raised(dimensionless, -1, -1))}
}

// WithParameters returns another function of this form.
func (c LogBilinear) WithParameters(values []float64) (Coefficient, error) {
	return checked("exponential of stress and temperature", values, 4,
		func(v []float64) own { return LogBilinear{v[0], v[1], v[2], v[3]} })
}

// Parameters returns those of the coefficient, "coefficient: …", and of the factor, "temperature factor: …".
func (c Activated) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	all := prefixed("coefficient", parametersOf(c.Coefficient, unit))
	if f, ok := c.Factor.(creeplaw.ParametricFactor); ok {
		all = append(all, prefixed("temperature factor", f.Parameters())...)
	}
	return all
}

// WithParameters rebuilds both.
func (c Activated) WithParameters(values []float64) (Coefficient, error) {
	r := rebuilding{whole: "activated coefficient", rest: values}
	c.Coefficient = r.coefficient("coefficient", c.Coefficient)
	if f, ok := c.Factor.(creeplaw.ParametricFactor); ok {
		n := len(f.Parameters())
		values := r.take(n)
		if n > 0 && r.err == nil {
			other, err := f.WithParameters(values)
			r.fail("temperature factor", err)
			c.Factor = other
		}
	}
	return r.made(c)
}

// Parameters returns those of the factors, "factor 1: …" and so on. The unit is that of the first factor that has none of its
// own, as the rate of a law has.
func (c Product) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	rest, takes := unit, -1
	for i, factor := range c {
		if own, ok := ownUnit(factor); ok {
			rest = creeplaw.Dimension{Stress: rest.Stress - own.Stress, Time: rest.Time - own.Time,
				Temperature: rest.Temperature - own.Temperature}
		} else if takes < 0 {
			takes = i
		}
	}
	var all []creeplaw.Parameter
	for i, factor := range c {
		part := dimensionless
		if own, ok := ownUnit(factor); ok {
			part = own
		} else if i == takes {
			part = rest
		}
		all = append(all, prefixed(fmt.Sprintf("factor %d", i+1), parametersOf(factor, part))...)
	}
	if takes < 0 && rest != dimensionless { // no number is there to take the unit up
		tied(all)
	}
	return all
}

// WithParameters rebuilds the factors.
func (c Product) WithParameters(values []float64) (Coefficient, error) {
	r := rebuilding{whole: "product of coefficients", rest: values}
	other := make(Product, len(c))
	for i, factor := range c {
		other[i] = r.coefficient(fmt.Sprintf("factor %d", i+1), factor)
	}
	return r.made(other)
}

// ownUnit is the unit of a coefficient that has one whatever its place, 1/time for the rate of a law.
func ownUnit(c Coefficient) (creeplaw.Dimension, bool) {
	switch c := c.(type) {
	case RateOf:
		return perTime, true
	case Activated:
		return ownUnit(c.Coefficient)
	case Product:
		all := dimensionless
		for _, factor := range c {
			own, ok := ownUnit(factor)
			if !ok {
				return dimensionless, false
			}
			all = creeplaw.Dimension{Stress: all.Stress + own.Stress, Time: all.Time + own.Time,
				Temperature: all.Temperature + own.Temperature}
		}
		return all, len(c) > 0
	}
	return dimensionless, false
}

// isTied tells whether a coefficient has something of the user's in it, which works in the units it was written for.
func isTied(c Coefficient) bool {
	switch c := c.(type) {
	case Activated:
		return isTied(c.Coefficient)
	case Product:
		for _, factor := range c {
			if isTied(factor) {
				return true
			}
		}
		return false
	}
	return len(parametersOf(c, perTime)) == 0
}

// tied marks parameters that no change of units reaches one by one.
func tied(all []creeplaw.Parameter) {
	for i := range all {
		if all[i].Scale != creeplaw.OnTemperatureScale {
			all[i].Scale, all[i].Dimension = creeplaw.FixedUnits, dimensionless
		}
	}
}

// Parameters returns those of the law, "law: …".
func (c RateOf) Parameters(unit creeplaw.Dimension) []creeplaw.Parameter {
	law, ok := c.Law.(creeplaw.Parametric)
	if !ok {
		return nil
	}
	all := prefixed("law", law.Parameters())
	if unit != perTime {
		tied(all)
	}
	return all
}

// WithParameters rebuilds the law.
func (c RateOf) WithParameters(values []float64) (Coefficient, error) {
	r := rebuilding{whole: "rate of a law", rest: values}
	if law, ok := c.Law.(creeplaw.Parametric); ok && len(law.Parameters()) > 0 {
		other, err := law.WithParameters(r.take(len(law.Parameters())))
		r.fail("law", err)
		c.Law = other
	}
	return r.made(c)
}

func parametersOf(c Coefficient, unit creeplaw.Dimension) []creeplaw.Parameter {
	if p, ok := c.(ParametricCoefficient); ok {
		return p.Parameters(unit)
	}
	return nil
}

func prefixed(part string, all []creeplaw.Parameter) []creeplaw.Parameter {
	for i := range all {
		all[i].Name = part + ": " + all[i].Name
	}
	return all
}

// rebuilding hands values to the parts of a whole, and keeps the first error.
type rebuilding struct {
	whole  string
	rest   []float64
	err    error
	prefix string // of the names of parts, for a part of many parts
}

func (r *rebuilding) take(n int) []float64 {
	if n > len(r.rest) {
		r.fail("", wrongNumber(r.whole, len(r.rest)))
		return make([]float64, n)
	}
	taken := r.rest[:n]
	r.rest = r.rest[n:]
	return taken
}

// coefficient is a part with the next values, or as it is if it has no parameters.
func (r *rebuilding) coefficient(part string, c Coefficient) Coefficient {
	p, ok := c.(ParametricCoefficient)
	if !ok {
		return c
	}
	n := len(p.Parameters(dimensionless))
	values := r.take(n)
	if n == 0 || r.err != nil {
		return c
	}
	other, err := p.WithParameters(values)
	r.fail(part, err)
	return other
}

func (r *rebuilding) fail(part string, err error) {
	if err == nil || r.err != nil {
		return
	}
	if r.err = err; part != "" {
		r.err = within(r.whole, r.prefix+part, err)
	}
}

// done returns the first error, also that of values left over.
func (r *rebuilding) done() error {
	if len(r.rest) > 0 {
		r.fail("", wrongNumber(r.whole, len(r.rest)))
	}
	return r.err
}

func (r *rebuilding) made(c Coefficient) (Coefficient, error) {
	if err := r.done(); err != nil {
		return nil, err
	}
	if _, err := prepare(r.whole, "coefficient", c); err != nil {
		return nil, err
	}
	return c, nil
}
