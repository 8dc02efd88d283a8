package lawcard

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// Range is where the tests behind a law were made. A zero Interval means that no bounds are on record, not that there are
// none. The intervals are those that an audit of the law takes for its domain.
type Range struct {
	Stress      Interval // von Mises stress [stress]
	Strain      Interval // accumulated creep strain [-]
	Temperature Interval // absolute [K]
	Time        Interval // of the tests, how long they ran [time]
	Basis       string   // where the bounds come from, or why there are none
}

// Interval is a closed interval; the zero value has no bounds on record.
type Interval struct{ Low, High float64 }

// Contains tells whether a value is inside, to a rounding of its units. Without bounds on record everything but NaN is.
func (i Interval) Contains(x float64) bool {
	if i == (Interval{}) {
		return !math.IsNaN(x)
	}
	const rounding = 1e-12 // what a change of units leaves of a bound, many times over
	return x >= i.Low*(1-rounding) && x <= i.High*(1+rounding)
}

// Quantity is one that a tested range bounds.
type Quantity int

// The quantities of a tested range.
const (
	Stress Quantity = iota
	Strain
	Temperature
	Time
	quantities int = iota
)

// String names the quantity.
func (q Quantity) String() string {
	return [...]string{"stress", "creep strain", "temperature", "time"}[q]
}

// RangeError says that a law was used outside the range it was tested in. It may well give a number there.
type RangeError struct {
	Card      string // the name of the card
	Quantity  Quantity
	Value     float64
	Low, High float64
	Unit      string // of Value and the bounds; "" for strain
}

func (e *RangeError) Error() string {
	unit := ""
	if e.Unit != "" {
		unit = " " + e.Unit
	}
	return fmt.Sprintf("lawcard: %s: the %v %.7g%s is outside the tested range, %.7g … %.7g", e.Card, e.Quantity, e.Value, unit,
		e.Low, e.High)
}

// Check returns a *RangeError for the first quantity of a point, in the units of the card, that is outside the tested range,
// and nil inside. A host calls it for the states it accepts; Watch sees every evaluation.
func (c *Card) Check(p creeplaw.Point) error {
	for q, x := range coordinates(p) {
		if i := c.Tested.of(Quantity(q)); !i.Contains(x) {
			return c.outside(Quantity(q), x, i)
		}
	}
	return nil
}

// CheckTime is Check for the time a part is under load [time]: what lies beyond the longest test is extrapolation, and this
// law has no clock to see it. Times below the shortest test are no fault.
func (c *Card) CheckTime(t float64) error {
	i := c.Tested.Time
	if i == (Interval{}) && !math.IsNaN(t) || (Interval{0, i.High}).Contains(t) {
		return nil
	}
	return c.outside(Time, t, i)
}

func (c *Card) outside(q Quantity, x float64, i Interval) error {
	return &RangeError{c.Name, q, x, i.Low, i.High, c.unit(q)}
}

func coordinates(p creeplaw.Point) [3]float64 { return [3]float64{p.Stress, p.Strain, p.Temperature} }

func (r *Range) of(q Quantity) Interval {
	return [...]Interval{r.Stress, r.Strain, r.Temperature, r.Time}[q]
}

func (c *Card) unit(q Quantity) string {
	return [...]string{c.Units.Stress.String(), "", "K", c.Units.Time.String()}[q]
}
