package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

var _ creeplaw.Explainer = StrainHardened{}

// CheckPoint is nil where the law is defined. Where it is not, laws and temperature factors among the coefficients are asked
// first; then it is a *creeplaw.DomainError, or a *creeplaw.UndefinedError if nothing is known.
func (h StrainHardened) CheckPoint(p creeplaw.Point) error {
	if !math.IsNaN(h.LogRate(p).Value) {
		return nil
	}
	for _, c := range coefficientsOf(h.curve) {
		if err := explain(c, p); err != nil {
			return err
		}
	}
	const name = "strain-hardened curve"
	switch {
	case !(p.Stress >= 0):
		return &creeplaw.DomainError{Law: name, Quantity: "stress", Value: p.Stress, High: math.Inf(1)}
	case !(p.Strain >= 0) || math.IsInf(p.Strain, 1):
		return &creeplaw.DomainError{Law: name, Quantity: "creep strain", Value: p.Strain, High: math.MaxFloat64}
	case !(p.Temperature > 0):
		return &creeplaw.DomainError{Law: name, Quantity: "temperature", Value: p.Temperature, High: math.Inf(1)}
	}
	return &creeplaw.UndefinedError{Law: name, Point: p}
}

// coefficientsOf lists the coefficients of the terms of a curve.
func coefficientsOf(c Curve) (all []Coefficient) {
	if regimes, ok := c.(TwoRegime); ok {
		c = regimes.first
	}
	if s, ok := c.(interface{ parts() []Term }); ok {
		for _, t := range s.parts() {
			all = append(all, t.amplitude, t.rate)
		}
	}
	return all
}

// explain asks what a coefficient is made of.
func explain(c Coefficient, p creeplaw.Point) error {
	var made any
	switch c := c.(type) {
	case Activated:
		if err := explain(c.Coefficient, p); err != nil {
			return err
		}
		made = c.Factor
	case Product:
		for _, factor := range c {
			if err := explain(factor, p); err != nil {
				return err
			}
		}
	case RateOf:
		made, p.Strain = c.Law, 0
	}
	if x, ok := made.(creeplaw.Explainer); ok {
		return x.CheckPoint(p)
	}
	return nil
}
