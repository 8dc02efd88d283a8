package published

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// Set is a published parameter set made into a law.
type Set struct {
	Record
	Law creeplaw.Law
}

// Record says what a set is and how far it may be trusted.
type Record struct {
	Name     string         // material and law
	Citation string         // where the numbers were published
	Status   Status         // how they came here
	Units    creeplaw.Units // of stress and time in the law and in Range
	Range    Range          // where the set is known to apply
	Caution  string         // what to know before use; every set has one
}

// Status says how well the numbers of a set are known.
type Status int

// From the best to the least. What the project's list of values marks as low is not in this package.
const (
	Verified             Status = iota + 1 // read in a retrieved text
	FromMemoryHigh                         // typed from memory, confidence high
	FromMemoryHighMedium                   // typed from memory, confidence high to medium
	FromMemoryMedium                       // typed from memory, confidence medium: look before use
)

// String spells the status out.
func (s Status) String() string {
	switch s {
	case Verified:
		return "verified"
	case FromMemoryHigh:
		return "from memory, confidence high"
	case FromMemoryHighMedium:
		return "from memory, confidence high to medium"
	case FromMemoryMedium:
		return "from memory, confidence medium"
	}
	return fmt.Sprintf("unknown status %d", int(s))
}

// Range is where a set is known to apply. The zero Interval means that no bounds are on record, not that there are none.
type Range struct {
	Stress      Interval // in the set's unit of stress
	Temperature Interval // [K]
	Basis       string   // where the bounds come from
}

// Interval is a closed interval; the zero value has no bounds on record.
type Interval struct{ Low, High float64 }

// Contains tells whether a value is inside, to a rounding of its units. Without bounds on record everything but NaN is.
func (i Interval) Contains(x float64) bool {
	if i == (Interval{}) {
		return !math.IsNaN(x)
	}
	const rounding = 1e-9
	return x >= i.Low*(1-rounding) && x <= i.High*(1+rounding)
}

// RangeError says that a point is outside the range a set is known for. The law may well give a number there.
type RangeError struct {
	Set       string
	Quantity  string // "stress" or "temperature"
	Value     float64
	Low, High float64
	Unit      string
}

func (e *RangeError) Error() string {
	return fmt.Sprintf("published: %s: the %s %.7g %s is outside the range on record, %.7g … %.7g", e.Set, e.Quantity, e.Value,
		e.Unit, e.Low, e.High)
}

// CheckRange returns a *RangeError when a point is outside the range on record, in the set's own units, and nil inside.
func (r *Record) CheckRange(p creeplaw.Point) error {
	if i := r.Range.Stress; !i.Contains(p.Stress) {
		return &RangeError{r.Name, "stress", p.Stress, i.Low, i.High, r.Units.Stress.String()}
	}
	if i := r.Range.Temperature; !i.Contains(p.Temperature) {
		return &RangeError{r.Name, "temperature", p.Temperature, i.Low, i.High, "K"}
	}
	return nil
}

// In returns the set in other units, its range with it. A unit that is not positive and finite is a
// *creeplaw.ParameterError.
func (s Set) In(units creeplaw.Units) (Set, error) {
	var law creeplaw.Law
	var err error
	if _, ok := s.Law.(creeplaw.Evolving); ok {
		law, err = byParameters(s.Law.(creeplaw.Parametric), s.Units, units)
	} else {
		law, err = creeplaw.InUnits(s.Law, s.Units, units)
	}
	if err != nil {
		return Set{}, err
	}
	factor := float64(s.Units.Stress / units.Stress)
	s.Law, s.Units = law, units
	s.Range.Stress.Low *= factor
	s.Range.Stress.High *= factor
	return s, nil
}

// Sets returns every set of this package that is a law of stress and temperature, in a fixed order. Where a set needs a grain
// size, the one stated in its name is used here; its constructor takes any.
func Sets() []Set {
	var all []Set
	for _, part := range [][]Set{iceSets(), saltSets(), rockSets(), solderSets(), metalSets(), steelSets()} {
		all = append(all, part...)
	}
	return all
}

// known takes a law or a set built from constants of this package, which a test proves to be good.
func known[T any](built T, err error) T {
	if err != nil {
		panic(err)
	}
	return built
}

const generalCaution = "A starting point, not design data. "

// Units of the sources.
var (
	pascalSecond     = creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second}
	megapascalSecond = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Second}
	megapascalHour   = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}
	megapascalDay    = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Day}
)

// arrhenius multiplies a law by exp(-Q/RT), Q in J/mol.
func arrhenius(law creeplaw.Law, activationEnergy float64) creeplaw.Law {
	return known(creeplaw.WithTemperature(law, known(creeplaw.NewArrhenius(activationEnergy))))
}

// powerLaw is A σⁿ exp(-Q/RT).
func powerLaw(prefactor, exponent, activationEnergy float64) creeplaw.Law {
	return arrhenius(known(creeplaw.NewNorton(prefactor, exponent)), activationEnergy)
}
