package creeplaw

import (
	"errors"
	"math"
)

// Parametric is the capability of a law to name its parameters and to be rebuilt from others: what calibration and law cards
// need. The parameters are the numbers the law was built from, to the bit, under the names its constructor's errors give them.
//
// Composed laws have the parameters of their parts, each name after that of its part, such as "law 2: stress exponent". A part
// that is not Parametric, as a user's function, has none and stays as it is.
type Parametric interface {
	Law

	// Parameters are in a fixed order. The caller may change the slice.
	Parameters() []Parameter

	// WithParameters builds the same kind of law, of the same parts, from other values, in the order of Parameters. It refuses
	// what the constructor refuses, with a *ParameterError of the parameter's name, and so a wrong number of values.
	WithParameters(values []float64) (Law, error)
}

// ParametricFactor is the same capability of a temperature factor.
type ParametricFactor interface {
	TemperatureFactor
	Parameters() []Parameter
	WithParameters(values []float64) (TemperatureFactor, error)
}

// Parameter is a parameter of a law: its name, its value, what it may be and how it depends on the units.
type Parameter struct {
	Name      string
	Value     float64
	Low, High float64 // what the constructor accepts lies between; it may refuse the ends. Zero to +Inf is a positive number
	Scale     Scale
	Dimension Dimension
}

// Dimension is the unit of a quantity as powers of the units of stress, time and temperature. The powers of a prefactor
// depend on other parameters: A of Norton's law is in stress⁻ⁿ time⁻¹. Lengths, energies and amounts are always in m, J, mol.
type Dimension struct{ Stress, Time, Temperature float64 }

// Scale says how the number that stands for a parameter changes with the units.
type Scale int

const (
	// Proportional is a quantity of the Dimension, any numbers included.
	Proportional Scale = iota
	// LogarithmOf is the natural logarithm of a quantity of the Dimension: another unit adds to it.
	LogarithmOf
	// OnTemperatureScale is a temperature at which something is so, such as a reference temperature: it shifts with the zero
	// of the scale, where a difference of temperatures does not.
	OnTemperatureScale
	// FixedUnits is a number that belongs to units of the law's own, whatever those of the host: the numbers of a law in
	// other units than its own (InUnits), of one that is tied to SI, or of one with a user's function in it. With one of them
	// among its parameters a law cannot be taken to other units by its numbers.
	FixedUnits
)

// UnitBound is the capability of a law to say that its formula holds in one set of units only, as one with Boltzmann's
// constant in it. InUnits takes it to others.
type UnitBound interface {
	Law
	OwnUnits() Units
}

// given is what a law (T = Law) or a temperature factor (T = TemperatureFactor) remembers of how it was built: the form of its
// constructor and the arguments, which its working numbers need not give back to the bit. It is a pointer, so that it
// costs the law one word, and never changes.
type given[T any] struct{ *arguments[T] }

type arguments[T any] struct {
	form   func(values []float64) form[T]
	values []float64
}

// form describes one constructor. It is made for the values of the arguments, on which dimensions depend.
type form[T any] struct {
	parameters []Parameter // without their values
	build      func(values []float64) (T, error)
}

func remember[T any](f func([]float64) form[T], values ...float64) given[T] {
	return given[T]{&arguments[T]{f, values}}
}

// Parameters returns the arguments of the constructor; nil for the zero value, which was not built.
func (g given[T]) Parameters() []Parameter {
	if g.arguments == nil {
		return nil
	}
	all := g.form(g.values).parameters
	for i := range all {
		all[i].Value = g.values[i]
	}
	return all
}

// WithParameters calls the same constructor with other arguments.
func (g given[T]) WithParameters(values []float64) (T, error) {
	var none T
	if g.arguments == nil || len(values) != len(g.values) {
		return none, wrongNumber(len(values))
	}
	built, err := g.form(values).build(append([]float64(nil), values...))
	if err != nil {
		return none, err
	}
	return built, nil
}

func wrongNumber(n int) error {
	return &ParameterError{Law: "parameters", Parameter: "number of values", Value: float64(n), Want: "that of the parameters"}
}

// Parameters as constructors restrict them.

func positiveNumber(name string, d Dimension) Parameter {
	return Parameter{Name: name, High: math.Inf(1), Dimension: d}
}

func anyNumber(name string, d Dimension) Parameter {
	return Parameter{Name: name, Low: math.Inf(-1), High: math.Inf(1), Dimension: d}
}

func temperatureNumber(name string) Parameter {
	return Parameter{Name: name, High: math.Inf(1), Scale: OnTemperatureScale, Dimension: Dimension{Temperature: 1}}
}

// partly gathers the parameters of the parts of a composed law.
type partly struct {
	parameters []Parameter
	tied       bool // to units: a part has none, and works in the units it was written for
}

func (all *partly) law(name string, part Law) {
	n := len(all.parameters)
	all.add(name, part)
	if len(all.parameters) == n {
		all.tied = true
	}
}

// factor adds those of a temperature factor, which knows no units; nil is none.
func (all *partly) factor(name string, part TemperatureFactor) { all.add(name, part) }

func (all *partly) add(name string, part any) {
	p, ok := part.(interface{ Parameters() []Parameter })
	if !ok {
		return
	}
	for _, one := range p.Parameters() {
		one.Name = name + ": " + one.Name
		all.parameters = append(all.parameters, one)
	}
}

// list returns them; where they are tied no number changes with the units.
func (all *partly) list() []Parameter {
	if all.tied {
		fixed(all.parameters...)
	}
	return all.parameters
}

// rebuilding hands the values for a composed law to its parts, and keeps the first error.
type rebuilding struct {
	name string
	rest []float64
	err  error
}

// take returns the next n values; zeros if there are not so many.
func (r *rebuilding) take(n int) []float64 {
	if n > len(r.rest) {
		r.fail("", wrongNumber(len(r.rest)))
		return make([]float64, n)
	}
	taken := r.rest[:n]
	r.rest = r.rest[n:]
	return taken
}

func (r *rebuilding) one() float64 { return r.take(1)[0] }

func (r *rebuilding) law(name string, part Law) Law { return rebuilt(r, name, part) }

// rebuilt is a part of a composed law with the next values for its parameters, or as it is if it has none.
func rebuilt[T any](r *rebuilding, name string, part T) T {
	p, ok := any(part).(interface {
		Parameters() []Parameter
		WithParameters([]float64) (T, error)
	})
	if !ok {
		return part
	}
	n := len(p.Parameters())
	values := r.take(n)
	if n == 0 || r.err != nil {
		return part
	}
	other, err := p.WithParameters(values)
	if err != nil {
		r.fail(name, err)
		return part
	}
	return other
}

func (r *rebuilding) fail(part string, err error) {
	if r.err != nil {
		return
	}
	r.err = err
	var bad *ParameterError
	if part != "" && errors.As(err, &bad) {
		r.err = &ParameterError{r.name, part + ": " + bad.Parameter, bad.Value, bad.Want}
	}
}

// done returns the first error, also that of values left over.
func (r *rebuilding) done() error {
	if r.err == nil && len(r.rest) > 0 {
		r.err = wrongNumber(len(r.rest))
	}
	return r.err
}

// orNil is the result of a constructor as a Law, nil if there is none.
func orNil[L Law](law L, err error) (Law, error) {
	if err != nil {
		return nil, err
	}
	return law, nil
}
