package creeplaw

import (
	"fmt"
	"math"
)

// StressUnit is a unit of stress, as its size in pascal.
type StressUnit float64

// Units of stress in use for creep. The two in pounds are exact to the digits of a float64.
const (
	Pascal                 StressUnit = 1
	Kilopascal             StressUnit = 1e3
	Bar                    StressUnit = 1e5
	Megapascal             StressUnit = 1e6
	Gigapascal             StressUnit = 1e9
	PoundPerSquareInch     StressUnit = 6894.757293168361
	KilopoundPerSquareInch StressUnit = 6894757.293168361
)

// String names the unit, or gives its size.
func (u StressUnit) String() string {
	switch u {
	case Pascal:
		return "Pa"
	case Kilopascal:
		return "kPa"
	case Bar:
		return "bar"
	case Megapascal:
		return "MPa"
	case Gigapascal:
		return "GPa"
	case PoundPerSquareInch:
		return "psi"
	case KilopoundPerSquareInch:
		return "ksi"
	}
	return fmt.Sprintf("%g Pa", float64(u))
}

// TimeUnit is a unit of time, as its size in seconds.
type TimeUnit float64

// Units of time in use for creep. A year is the Julian year of 365.25 days.
const (
	Second TimeUnit = 1
	Minute TimeUnit = 60
	Hour   TimeUnit = 3600
	Day    TimeUnit = 86400
	Year   TimeUnit = 31557600
)

// String names the unit, or gives its size.
func (u TimeUnit) String() string {
	switch u {
	case Second:
		return "s"
	case Minute:
		return "min"
	case Hour:
		return "h"
	case Day:
		return "d"
	case Year:
		return "a"
	}
	return fmt.Sprintf("%g s", float64(u))
}

// Units are the units a law or a host code works in. Temperature is always in K.
type Units struct {
	Stress StressUnit
	Time   TimeUnit
}

// String gives both, such as "MPa, h".
func (u Units) String() string { return u.Stress.String() + ", " + u.Time.String() }

// Converted is a law in other units:
//
//	ṗ [1/time wanted] = c · law(σ·s, p, T)
//
// with s the size of the wanted unit of stress in the law's own, and c that of the wanted unit of time. Zero stress, zero
// strain and the limits are those of the law within.
type Converted struct {
	law          Logarithmic
	stress, time float64 // s and c
	logTime      float64
	units        *ownAndWanted
}

// ownAndWanted are the units of the law within and those it was taken to.
type ownAndWanted struct{ own, wanted Units }

var (
	_ Logarithmic = Converted{}
	_ Explainer   = Converted{}
)

// InUnits takes a law written in its own units and returns it in the units wanted. A unit that is not positive and finite is
// a *ParameterError, a nil law a *MissingError, one with internal variables a *CompositionError.
func InUnits(law Law, own, wanted Units) (Converted, error) {
	const name = "law in other units"
	if law == nil {
		return Converted{}, &MissingError{name, "law"}
	}
	err := positive(name, parameter{"unit of stress", float64(own.Stress)}, parameter{"unit of time", float64(own.Time)},
		parameter{"unit of stress wanted", float64(wanted.Stress)}, parameter{"unit of time wanted", float64(wanted.Time)})
	if err != nil {
		return Converted{}, err
	}
	if err := withoutVariables(name, law); err != nil {
		return Converted{}, err
	}
	c := Converted{law: Log(law), stress: float64(wanted.Stress / own.Stress), time: float64(wanted.Time / own.Time)}
	c.logTime = math.Log(c.time)
	c.units = &ownAndWanted{own, wanted}
	return c, nil
}

// LogRate adds the logarithm of the unit of time; the exponents do not depend on units.
func (c Converted) LogRate(p Point) LogRate {
	p.Stress *= c.stress
	l := c.law.LogRate(p)
	l.Value += c.logTime
	return l
}

// Rate multiplies by the unit of time, and the derivative by stress by that of stress.
func (c Converted) Rate(p Point) Rate {
	p.Stress *= c.stress
	r := c.law.Rate(p)
	return Rate{r.Value * c.time, r.ByStress * c.time * c.stress, r.ByStrain * c.time, r.ByTemperature * c.time}
}

// CheckPoint hands on what the law within says. A stress that it names is in the law's own units.
func (c Converted) CheckPoint(p Point) error {
	p.Stress *= c.stress
	return reason("law in other units", c.law, p, c.law)
}
