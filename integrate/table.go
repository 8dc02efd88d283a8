package integrate

import (
	"math"
	"sort"
)

// Table is a material property as a function of absolute temperature: a constant, or piecewise linear between tabulated
// points. Outside the tabulated range it is undefined: a step there fails with OutsideTable instead of extrapolating in
// silence (see Held). At a tabulated temperature the derivative is the one towards higher temperature, at the last one the
// one from below. The zero Table is the constant zero. A Table is never changed after it is made and may be shared.
type Table struct {
	temperature []float64 // ascending; nil for a constant
	value       []float64
	constant    float64
	held        bool
}

// Constant is a property that does not depend on temperature.
func Constant(value float64) Table { return Table{constant: value} }

// NewTable builds a property from at least two points: absolute temperatures [K], positive and strictly ascending, and as
// many finite values. The slices are copied. A fault is a *TableError.
func NewTable(temperature, value []float64) (Table, error) {
	if len(temperature) != len(value) || len(temperature) < 2 {
		return Table{}, &TableError{Row: min(len(temperature), len(value)), Quantity: "number of values",
			Value: float64(len(value)), Want: "that of the temperatures, and at least two"}
	}
	for i, t := range temperature {
		switch {
		case !(t > 0) || math.IsInf(t, 1):
			return Table{}, &TableError{i, "temperature", t, "positive and finite"}
		case i > 0 && !(t > temperature[i-1]):
			return Table{}, &TableError{i, "temperature", t, "above the one before it"}
		case !finite(value[i]):
			return Table{}, &TableError{i, "value", value[i], "finite"}
		}
	}
	return Table{temperature: append([]float64(nil), temperature...), value: append([]float64(nil), value...)}, nil
}

// Held returns the same table with its end values held constant outside the tabulated range.
func (t Table) Held() Table {
	t.held = true
	return t
}

// At returns the property and its derivative by temperature [1/K] at the absolute temperature T [K]; NaN where undefined.
func (t Table) At(temperature float64) (value, slope float64) {
	if t.temperature == nil {
		return t.constant, 0
	}
	last := len(t.temperature) - 1
	switch {
	case t.held && temperature < t.temperature[0]:
		return t.value[0], 0
	case t.held && temperature > t.temperature[last]:
		return t.value[last], 0
	case !(temperature >= t.temperature[0] && temperature <= t.temperature[last]):
		return math.NaN(), math.NaN()
	}
	i := sort.Search(last-1, func(i int) bool { return t.temperature[i+1] > temperature })
	low, high := t.temperature[i], t.temperature[i+1]
	slope = (t.value[i+1] - t.value[i]) / (high - low)
	if temperature-low <= high-temperature { // from the nearer end, so that tabulated points are met exactly
		return t.value[i] + slope*(temperature-low), slope
	}
	return t.value[i+1] - slope*(high-temperature), slope
}

// Range returns the lowest and the highest temperature [K] at which the table is defined: 0 and +Inf for a constant and for a
// table that is Held.
func (t Table) Range() (lowest, highest float64) {
	if t.temperature == nil || t.held {
		return 0, math.Inf(1)
	}
	return t.temperature[0], t.temperature[len(t.temperature)-1]
}

// each calls f for every value the property is given at, with the temperature (0 for a constant).
func (t Table) each(f func(temperature, value float64) error) error {
	if t.temperature == nil {
		return f(0, t.constant)
	}
	for i, v := range t.value {
		if err := f(t.temperature[i], v); err != nil {
			return err
		}
	}
	return nil
}

func finite(x float64) bool { return x-x == 0 }
