package lawcard

import (
	"math"
	"math/big"
	"strconv"
	"strings"

	"example.com/holdtime/creeplaw"
)

// units are those a card declares.
type units struct {
	creeplaw.Units
	temperature temperatureUnit
}

func stressUnits() []creeplaw.StressUnit {
	return []creeplaw.StressUnit{creeplaw.Pascal, creeplaw.Kilopascal, creeplaw.Bar, creeplaw.Megapascal, creeplaw.Gigapascal,
		creeplaw.PoundPerSquareInch, creeplaw.KilopoundPerSquareInch}
}

func timeUnits() []creeplaw.TimeUnit {
	return []creeplaw.TimeUnit{creeplaw.Second, creeplaw.Minute, creeplaw.Hour, creeplaw.Day, creeplaw.Year}
}

// temperatureUnit is a unit of temperature: T [K] = (x + shift)·degree.
type temperatureUnit int

const (
	kelvin temperatureUnit = iota
	celsius
	fahrenheit
)

func temperatureUnits() []string { return []string{"K", "degC", "degF"} }

// degree is the size of a degree in K, shift the number that absolute zero is below the unit's own.
func (u temperatureUnit) degree() *big.Float {
	if u == fahrenheit {
		return quotient(5, 9)
	}
	return exact(1)
}

func (u temperatureUnit) shift() *big.Float {
	switch u {
	case celsius:
		return quotient(27315, 100)
	case fahrenheit:
		return quotient(45967, 100)
	}
	return exact(0)
}

// stressUnit reads "MPa" or, for a unit without a name, its size as "98066.5 Pa".
func (r *reading) stressUnit(v value) creeplaw.StressUnit {
	if !r.is(v, text) {
		return 0
	}
	var names []string
	for _, u := range stressUnits() {
		if u.String() == v.text {
			return u
		}
		names = append(names, u.String())
	}
	return creeplaw.StressUnit(r.sizedUnit(v, "stress", "Pa", names))
}

func (r *reading) timeUnit(v value) creeplaw.TimeUnit {
	if !r.is(v, text) {
		return 0
	}
	var names []string
	for _, u := range timeUnits() {
		if u.String() == v.text {
			return u
		}
		names = append(names, u.String())
	}
	return creeplaw.TimeUnit(r.sizedUnit(v, "time", "s", names))
}

func (r *reading) sizedUnit(v value, quantity, base string, names []string) float64 {
	size, ok := strings.CutSuffix(v.text, " "+base)
	if x, err := strconv.ParseFloat(size, 64); ok && err == nil && isNumber(size) && x > 0 && !math.IsInf(x, 1) {
		return x
	}
	r.fail(v, BadUnit, "is %s, no unit of %s known here; known are %s and a size such as \"1000 %s\"", quoted(v.text), quantity,
		listed(names), base)
	return 0
}

func (r *reading) temperatureUnit(v value) temperatureUnit {
	if !r.is(v, text) {
		return 0
	}
	for i, name := range temperatureUnits() {
		if name == v.text {
			return temperatureUnit(i)
		}
	}
	r.fail(v, BadUnit, "is %s, no unit of temperature known here; known are %s", quoted(v.text), listed(temperatureUnits()))
	return 0
}

// unitsOf reads the units of a card, or of a law in other units, which declares no temperature of its own.
func (r *reading) unitsOf(v value, names ...string) units {
	f := r.fields(v, names)
	if r.err != nil {
		return units{}
	}
	u := units{Units: creeplaw.Units{Stress: r.stressUnit(f["stress"]), Time: r.timeUnit(f["time"])}}
	if t, ok := f["temperature"]; ok {
		u.temperature = r.temperatureUnit(t)
	}
	return u
}
