package creeplaw

import (
	"fmt"
	"math"
)

// DomainError says that a law is not defined at a point because one coordinate of it is out of bounds. CheckPoint of the
// laws of this package returns it, found with errors.As.
type DomainError struct {
	Law       string  // the law, or the part of it, that has the bounds
	Quantity  string  // "stress", "creep strain" or "temperature"
	Value     float64 // what it was
	Low, High float64 // the bounds
}

func (e *DomainError) Error() string {
	return fmt.Sprintf("creeplaw: %s: the %s %.7g is outside %.7g … %.7g", e.Law, e.Quantity, e.Value, e.Low, e.High)
}

// UndefinedError says that a law is not defined at a point, where no part of it can say why.
type UndefinedError struct {
	Law   string
	Point Point
}

func (e *UndefinedError) Error() string {
	return fmt.Sprintf("creeplaw: %s is undefined at stress %v, creep strain %v, temperature %v", e.Law, e.Point.Stress,
		e.Point.Strain, e.Point.Temperature)
}

var (
	_ Explainer = Sum{}
	_ Explainer = Thermal{}
	_ Explainer = logOfRate{}
)

// CheckPoint hands on the first reason a part gives.
func (s Sum) CheckPoint(p Point) error { return reasonOfParts("sum of laws", s, p, s.laws) }

// CheckPoint hands on what the temperature factor or the law within says.
func (t Thermal) CheckPoint(p Point) error {
	return reason("temperature-dependent law", t, p, t.factor, t.law)
}

// CheckPoint hands on what the law within says.
func (a logOfRate) CheckPoint(p Point) error {
	return reason(fmt.Sprintf("%T", a.Law), a, p, a.Law)
}

// reason is nil where the law is defined. Where it is not, the parts of it, laws and temperature factors, are asked first.
func reason(name string, law Logarithmic, p Point, parts ...any) error {
	if !math.IsNaN(law.LogRate(p).Value) {
		return nil
	}
	for _, part := range parts {
		if x, ok := part.(Explainer); ok {
			if err := x.CheckPoint(p); err != nil {
				return err
			}
		}
	}
	inf := math.Inf(1)
	switch {
	case !(p.Stress >= 0):
		return &DomainError{name, "stress", p.Stress, 0, inf}
	case !(p.Strain >= 0):
		return &DomainError{name, "creep strain", p.Strain, 0, inf}
	case !(p.Temperature > 0):
		return &DomainError{name, "temperature", p.Temperature, 0, inf}
	}
	return &UndefinedError{name, p}
}

func reasonOfParts(name string, law Logarithmic, p Point, laws []Logarithmic) error {
	parts := make([]any, len(laws))
	for i, l := range laws {
		parts[i] = l
	}
	return reason(name, law, p, parts...)
}
