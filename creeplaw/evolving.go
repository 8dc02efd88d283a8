package creeplaw

import (
	"fmt"
	"math"
)

// MaxVariables is the largest number of internal variables a law may have.
const MaxVariables = 4

// Variable is an internal variable of a law: a scalar such as damage, hardening or deformation resistance that a material
// point remembers besides its creep strain.
type Variable struct {
	Name    string  // such as "damage"
	Initial float64 // its value in virgin material, finite

	// Limit is a value the variable cannot reach: the law is defined on the initial value's side of it, and the material has
	// ruptured when the variable comes there, as a damage of 1. ±Inf where there is none.
	Limit float64
}

// Evolving is the capability of a law to have internal variables that evolve with it, up to MaxVariables of them, and to see
// the mean and the greatest principal stress besides the von Mises stress. A law without variables that sees those stresses is
// Evolving too.
//
// Variables and SeesPrincipal are asked once, when a material is built. Evolve must not allocate: values in, values out. Rate
// of such a law is its creep rate with the variables at their initial values, in tension (the mean stress a third of the von
// Mises stress, the greatest principal stress equal to it).
type Evolving interface {
	Law
	Variables() []Variable // in the order of EvolvingPoint.Internal; the caller must not change them
	SeesPrincipal() bool   // whether anything depends on the greatest principal stress, which costs an eigenvalue
	Evolve(EvolvingPoint) Evolution
}

// EvolvingPoint is the condition at which a law with internal variables is evaluated.
type EvolvingPoint struct {
	Point
	MeanStress      float64               // σm: a third of the trace, positive in tension [stress]
	PrincipalStress float64               // σ1: greatest principal stress [stress]; NaN for a law that does not see it
	Internal        [MaxVariables]float64 // the variables, not their deviations from the initial values; unused ones are 0
}

// Evolution is a creep rate and the rates of the internal variables at an EvolvingPoint, with all their partial derivatives.
//
// The creep rate is given by its logarithm, as in LogRate: exponents of 20 and more over decades of stress leave the range of
// a float64, their logarithm does not. "Not here" is a NaN in LogRate.
type Evolution struct {
	LogRate  float64  // ln(ṗ × unit of time); -Inf where the rate is zero
	Creep    Partials // of LogRate
	Internal [MaxVariables]InternalRate
}

// InternalRate is the rate of an internal variable
//
//	v̇ = Value · e^LogScale  [unit of the variable/time]
//
// in two parts, because a rate such as that of damage grows and vanishes with large exponents, as the creep rate does, while
// others pass through zero, where a logarithm would not do: LogScale keeps the size, Value the sign. How they share the rate
// is the law's choice; usual are Value 1 for a rate that is a product of powers, and LogScale the logarithm of the creep rate
// for a variable that follows the creep strain. LogScale may be -Inf (no rate). The partial derivatives are those of v̇, all of
// it, in the same scale: ∂v̇/∂x = By… · e^LogScale.
type InternalRate struct {
	LogScale float64
	Value    float64
	Partials // of v̇, over e^LogScale
}

// Partials are derivatives by everything a law may see. Those of the positive arguments are by their logarithm.
type Partials struct {
	ByLogStress       float64               // by ln σ, σ the von Mises stress
	ByMeanStress      float64               // by σm [1/stress]
	ByPrincipalStress float64               // by σ1 [1/stress]
	ByLogStrain       float64               // by ln p
	ByLogTemperature  float64               // by ln T
	ByInternal        [MaxVariables]float64 // by each internal variable [1/its unit]
}

// FollowCreep sets the rate of variable i to a multiple of the creep rate, v̇ = g ṗ, from the factor g and its partial
// derivatives. LogRate and Creep must have been set before.
func (e *Evolution) FollowCreep(i int, g float64, byG Partials) {
	c := &e.Creep
	r := InternalRate{LogScale: e.LogRate, Value: g, Partials: Partials{
		ByLogStress:       byG.ByLogStress + g*c.ByLogStress,
		ByMeanStress:      byG.ByMeanStress + g*c.ByMeanStress,
		ByPrincipalStress: byG.ByPrincipalStress + g*c.ByPrincipalStress,
		ByLogStrain:       byG.ByLogStrain + g*c.ByLogStrain,
		ByLogTemperature:  byG.ByLogTemperature + g*c.ByLogTemperature,
	}}
	for j, a := range c.ByInternal {
		r.ByInternal[j] = byG.ByInternal[j] + g*a
	}
	e.Internal[i] = r
}

// InTension is a point of a bar in tension with the internal variables given: the mean stress is a third of the von Mises
// stress, the greatest principal stress equal to it.
func InTension(p Point, internal [MaxVariables]float64) EvolvingPoint {
	return EvolvingPoint{Point: p, MeanStress: p.Stress / 3, PrincipalStress: p.Stress, Internal: internal}
}

// LogRateInTension is the creep rate alone, as a function of the stress of a bar in tension: what a law's LogRate method
// returns for l.Evolve(InTension(p, initial)).
func (e *Evolution) LogRateInTension(p Point) LogRate {
	c := &e.Creep
	l := LogRate{
		Value:            e.LogRate,
		ByLogStress:      c.ByLogStress,
		ByLogStrain:      c.ByLogStrain,
		ByLogTemperature: c.ByLogTemperature,
	}
	if by := c.ByMeanStress/3 + c.ByPrincipalStress; by != 0 {
		l.ByLogStress += p.Stress * by
	}
	return l
}

// RateInTension is LogRateInTension as a plain rate, for a point of positive stress; without stress the rate is e^LogRate
// and the derivative by stress is given as 0.
func (e *Evolution) RateInTension(p Point) Rate {
	l := e.LogRateInTension(p)
	switch {
	case math.IsNaN(l.Value):
		return undefined()
	case p.Stress == 0:
		return Rate{Value: math.Exp(l.Value)}
	}
	return rateOf(p, l)
}

func undefinedEvolution() Evolution { return Evolution{LogRate: math.NaN()} }

// multiplyCreep multiplies the creep rate by a factor of temperature; nil is one.
func (e *Evolution) multiplyCreep(f TemperatureFactor, temperature float64) {
	if f == nil {
		return
	}
	value, by := f.LogFactor(temperature)
	e.LogRate += value
	e.Creep.ByLogTemperature += by
}

// multiply multiplies the rate of a variable by a factor of temperature; nil is one.
func (r *InternalRate) multiply(f TemperatureFactor, temperature float64) {
	if f == nil {
		return
	}
	value, by := f.LogFactor(temperature)
	r.LogScale += value
	r.ByLogTemperature += r.Value * by
}

// faint is a stress at which only the limiting exponent of a law is left.
const faint = 0x1p-500

// slopeAtZero is the slope of a rate at zero stress, from its logarithm at a faint stress.
func slopeAtZero(l LogRate, stress float64) float64 {
	switch n := l.ByLogStress; {
	case n > 1+1e-9:
		return 0
	case n < 1-1e-9:
		return math.Inf(1)
	}
	return derivative(l.Value, l.ByLogStress, stress)
}

func notNegative(law string, ps ...parameter) error {
	for _, p := range ps {
		if !(p.value >= 0) || math.IsInf(p.value, 1) {
			return &ParameterError{law, p.name, p.value, "at least 0 and finite"}
		}
	}
	return nil
}

// CompositionError says that a law with internal variables was given as a part to a law that would lose them: a sum, a
// sequence, a factor of temperature, other units. Such laws take their own factors of temperature as parameters.
type CompositionError struct {
	Law      string // the law that was asked for, such as "sum of laws"
	Variable string // the first variable that would be lost
}

func (e *CompositionError) Error() string {
	return fmt.Sprintf("creeplaw: %s: a part has an internal variable, %s, that would be lost", e.Law, e.Variable)
}

// withoutVariables refuses an Evolving law, or one that sees more than the von Mises stress, as a part.
func withoutVariables(name string, laws ...Law) error {
	for _, law := range laws {
		if e, ok := law.(Evolving); ok {
			c := &CompositionError{Law: name, Variable: "the principal stress"}
			if v := e.Variables(); len(v) > 0 {
				c.Variable = v[0].Name
			}
			return c
		}
	}
	return nil
}
