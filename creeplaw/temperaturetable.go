package creeplaw

import (
	"math"
	"slices"
)

// Abscissa says against what the logarithm of a tabulated rate is interpolated in a straight line.
type Abscissa int

const (
	// InverseTemperature interpolates linearly in 1/T: an activation energy between each two temperatures. The default.
	InverseTemperature Abscissa = iota
	// PlainTemperature interpolates linearly in T.
	PlainTemperature
)

// OutsideTable says what a table does at a temperature beyond its ends.
type OutsideTable int

const (
	// Undefined beyond the ends: the rate is NaN and CheckPoint says why. The default.
	Undefined OutsideTable = iota
	// Held at the values of the end.
	Held
	// Extrapolated along the line through the last two temperatures.
	Extrapolated
)

// TableOptions are the choices a table over temperature leaves open. The zero value is the default: interpolation of the
// logarithm of the rate in 1/T, undefined outside.
type TableOptions struct {
	Against Abscissa
	Outside OutsideTable
}

// temperatureTable finds a temperature's place between tabulated ones.
type temperatureTable struct {
	name         string
	temperatures []float64 // strictly ascending [K]
	options      TableOptions
}

func newTemperatureTable(name string, temperatures []float64, values int, options TableOptions) (temperatureTable, error) {
	if len(temperatures) < 2 || len(temperatures) != values {
		return temperatureTable{}, &ParameterError{name, "number of temperatures", float64(len(temperatures)),
			"at least 2 and that of the values given"}
	}
	for i, t := range temperatures {
		if !(t > 0) || math.IsInf(t, 1) {
			return temperatureTable{}, &ParameterError{name, "temperature", t, "positive and finite"}
		}
		if i > 0 && !(t > temperatures[i-1]) {
			return temperatureTable{}, &ParameterError{name, "temperature", t, "above the one before it"}
		}
	}
	if a := options.Against; a != InverseTemperature && a != PlainTemperature {
		return temperatureTable{}, &ParameterError{name, "abscissa", float64(a), "one of those declared"}
	}
	if o := options.Outside; o < Undefined || o > Extrapolated {
		return temperatureTable{}, &ParameterError{name, "choice outside the table", float64(o), "one of those declared"}
	}
	return temperatureTable{name, slices.Clone(temperatures), options}, nil
}

// place is where a temperature falls: fraction of the way from row i to row i+1, and d(fraction)/d ln T. Exactly 0 and 1
// at tabulated temperatures; at an inner one the row is that towards higher temperature.
type place struct {
	row             int
	fraction, slope float64
}

// find returns false where the table is undefined.
func (t *temperatureTable) find(temperature float64) (place, bool) {
	last := len(t.temperatures) - 1
	low, high := t.temperatures[0], t.temperatures[last]
	if !(temperature >= low && temperature <= high) {
		switch {
		case !(temperature > 0) || math.IsInf(temperature, 1) || t.options.Outside == Undefined:
			return place{}, false
		case t.options.Outside == Held && temperature < low:
			return place{row: 0, fraction: 0}, true
		case t.options.Outside == Held:
			return place{row: last - 1, fraction: 1}, true
		}
	}
	i := 0
	for i < last-1 && temperature >= t.temperatures[i+1] {
		i++
	}
	a, b := t.temperatures[i], t.temperatures[i+1]
	x := place{row: i, fraction: (temperature - a) / (b - a), slope: temperature / (b - a)}
	if t.options.Against == InverseTemperature {
		x.fraction *= b / temperature // (1/T - 1/a)/(1/b - 1/a)
		x.slope = a * (b / temperature) / (b - a)
	}
	if temperature == b {
		x.fraction = 1
	}
	return x, true
}

// check explains why a temperature is outside; nil inside.
func (t *temperatureTable) check(p Point) error {
	if _, ok := t.find(p.Temperature); ok {
		return nil
	}
	low, high := t.temperatures[0], t.temperatures[len(t.temperatures)-1]
	if t.options.Outside != Undefined {
		low, high = 0, math.Inf(1)
	}
	return &DomainError{t.name, "temperature", p.Temperature, low, high}
}

// Tabulated is a law whose parameters are given at several temperatures: a law at each, and between two neighbours Tᵢ and
// Tⱼ the logarithm of the rate on a straight line in 1/T (or in T, if so chosen)
//
//	ln ṗ(σ, p, T) = (1 - w) ln ṗᵢ(σ, p) + w ln ṗⱼ(σ, p),   w = (1/T - 1/Tᵢ)/(1/Tⱼ - 1/Tᵢ)
//
// Symbols: σ von Mises stress [stress]; p accumulated equivalent creep strain [-]; T absolute temperature [K]; ṗᵢ the law
// given for Tᵢ, evaluated at Tᵢ. For power laws this interpolates ln A and n, each linearly in 1/T: an activation energy
// between neighbours that may depend on stress.
//
// At a tabulated temperature the rate is exactly that of its law, and the derivative by temperature is the one towards higher
// temperature (at the last, from below). Where one neighbour gives no creep (zero stress, a threshold) there is none between
// them. Outside the table the rate is NaN and CheckPoint says so, unless Held or Extrapolated was asked for. Zero stress and
// zero strain are as in the laws given.
//
// The interpolation assumes a constant activation energy between neighbours, after Arrhenius (common practice).
type Tabulated struct {
	table temperatureTable
	laws  []Logarithmic
}

var (
	_ Logarithmic = Tabulated{}
	_ Explainer   = Tabulated{}
)

// NewTabulated builds the law from at least two temperatures [K], positive and strictly ascending, and a law for each. The
// slices are copied. A temperature out of order is a *ParameterError, a nil law a *MissingError, one with internal
// variables a *CompositionError.
func NewTabulated(temperatures []float64, laws []Law, options TableOptions) (Tabulated, error) {
	const name = "tabulated law"
	table, err := newTemperatureTable(name, temperatures, len(laws), options)
	if err != nil {
		return Tabulated{}, err
	}
	if err := withoutVariables(name, laws...); err != nil {
		return Tabulated{}, err
	}
	t := Tabulated{table, make([]Logarithmic, len(laws))}
	for i, law := range laws {
		if law == nil {
			return Tabulated{}, &MissingError{name, "law"}
		}
		t.laws[i] = Log(law)
	}
	return t, nil
}

// LogRate returns the interpolated logarithm; the exponents of stress and strain are interpolated with it.
func (t Tabulated) LogRate(p Point) LogRate {
	x, ok := t.table.find(p.Temperature)
	if !ok {
		return undefinedLog()
	}
	a, b := t.neighbours(p, x)
	switch {
	case math.IsInf(a.Value, 0) && a.Value != b.Value && x.fraction < 1:
		b = a // one neighbour without creep, or infinitely fast, rules all the way to the other
	case math.IsInf(b.Value, 0) && a.Value != b.Value && x.fraction > 0:
		a = b
	}
	l := LogRate{
		Value:       between(a.Value, b.Value, x.fraction),
		ByLogStress: between(a.ByLogStress, b.ByLogStress, x.fraction),
		ByLogStrain: between(a.ByLogStrain, b.ByLogStrain, x.fraction),
	}
	if change := b.Value - a.Value; finite(change) { // else no creep on one side: the derivative does not exist, 0 is given
		l.ByLogTemperature = x.slope * change
	}
	return l
}

// neighbours evaluates the laws of the two rows, each at its own temperature.
func (t Tabulated) neighbours(p Point, x place) (a, b LogRate) {
	p.Temperature = t.table.temperatures[x.row]
	a = t.laws[x.row].LogRate(p)
	p.Temperature = t.table.temperatures[x.row+1]
	b = t.laws[x.row+1].LogRate(p)
	return a, b
}

// between is a at 0 and b at 1, exactly and whatever the other is, and their common value, infinite too, if they agree.
func between(a, b, fraction float64) float64 {
	switch {
	case fraction == 0 || a == b:
		return a
	case fraction == 1:
		return b
	}
	return (1-fraction)*a + fraction*b
}

// Rate returns ṗ and its derivatives.
func (t Tabulated) Rate(p Point) Rate {
	l := t.LogRate(p)
	switch {
	case math.IsNaN(l.Value):
		return undefined()
	case p.Stress > 0 && math.IsInf(l.Value, -1):
		return Rate{}
	case p.Stress > 0 && p.Strain > 0 || math.IsInf(l.Value, 1):
		return rateOf(p, l)
	}
	x, _ := t.table.find(p.Temperature)
	a, b := t.ratesOfNeighbours(p, x)
	if math.IsInf(l.Value, -1) {
		return Rate{ByStress: slopeBetween(l.ByLogStress, a.ByStress, b.ByStress, x.fraction)}
	}
	r := rateOf(p, l)
	if p.Stress == 0 {
		r.ByStress = r.Value * between(a.ByStress/a.Value, b.ByStress/b.Value, x.fraction)
	}
	if p.Strain == 0 {
		r.ByStrain = r.Value * between(a.ByStrain/a.Value, b.ByStrain/b.Value, x.fraction)
	}
	return r
}

func (t Tabulated) ratesOfNeighbours(p Point, x place) (a, b Rate) {
	p.Temperature = t.table.temperatures[x.row]
	a = t.laws[x.row].Rate(p)
	p.Temperature = t.table.temperatures[x.row+1]
	b = t.laws[x.row+1].Rate(p)
	return a, b
}

// slopeBetween is the slope at zero stress of a rate interpolated between two that vanish there: for the exponent n it is
// that of a power law, and for n = 1 the slopes are interpolated as the rates are.
func slopeBetween(n, a, b, fraction float64) float64 {
	switch {
	case fraction == 0:
		return a
	case fraction == 1:
		return b
	case n > 0 && n < 1:
		return math.Inf(1)
	case n > 1 || a == 0 || b == 0:
		return 0
	}
	return math.Exp(between(math.Log(a), math.Log(b), fraction))
}

// CheckPoint says whether the temperature is outside the table, and otherwise what the two laws in use say.
func (t Tabulated) CheckPoint(p Point) error {
	x, ok := t.table.find(p.Temperature)
	if !ok {
		return t.table.check(p)
	}
	if !math.IsNaN(t.LogRate(p).Value) {
		return nil
	}
	at := p
	for i := x.row; i <= x.row+1; i++ {
		at.Temperature = t.table.temperatures[i]
		if err := reason(t.table.name, t.laws[i], at, t.laws[i]); err != nil {
			return err
		}
	}
	return reason(t.table.name, t, p)
}

// FactorTable is a temperature factor given at several temperatures, its logarithm interpolated in a straight line in 1/T
// (or in T, if so chosen): between neighbours an Arrhenius factor of its own.
//
// At a tabulated temperature the factor is that of the table and the derivative the one towards higher temperature (at the
// last, from below). Outside the table it is NaN and CheckPoint says so, unless Held or Extrapolated was asked for.
type FactorTable struct {
	table      temperatureTable
	logFactors []float64
	given[TemperatureFactor]
}

var (
	_ TemperatureFactor = FactorTable{}
	_ Explainer         = FactorTable{}
)

// NewFactorTable builds the factor from at least two temperatures [K], positive and strictly ascending, and a factor [-],
// positive and finite, for each. The slices are copied. A fault is a *ParameterError.
func NewFactorTable(temperatures, factors []float64, options TableOptions) (FactorTable, error) {
	const name = "table of temperature factors"
	table, err := newTemperatureTable(name, temperatures, len(factors), options)
	if err != nil {
		return FactorTable{}, err
	}
	f := FactorTable{table, make([]float64, len(factors)),
		remember(factorTableForm(options), slices.Concat(temperatures, factors)...)}
	for i, v := range factors {
		if err := positive(name, parameter{"factor", v}); err != nil {
			return FactorTable{}, err
		}
		f.logFactors[i] = math.Log(v)
	}
	return f, nil
}

// LogFactor returns ln f(T) and d ln f/d ln T; NaN outside the table.
func (f FactorTable) LogFactor(temperature float64) (value, byLogTemperature float64) {
	x, ok := f.table.find(temperature)
	if !ok {
		return math.NaN(), math.NaN()
	}
	a, b := f.logFactors[x.row], f.logFactors[x.row+1]
	return between(a, b, x.fraction), x.slope * (b - a)
}

// CheckPoint says whether the temperature is outside the table.
func (f FactorTable) CheckPoint(p Point) error { return f.table.check(p) }
