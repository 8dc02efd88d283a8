package creeplaw

import "fmt"

var (
	_ Parametric       = Sum{}
	_ Parametric       = Series{}
	_ Parametric       = Thermal{}
	_ Parametric       = Threshold{}
	_ Parametric       = Tabulated{}
	_ Parametric       = Converted{}
	_ ParametricFactor = FactorTable{}
	_ ParametricFactor = Arrhenius{}
	_ ParametricFactor = TwoArrhenius{}
)

// The names of parts in those of the parameters.
const (
	thatLaw    = "law"
	thatFactor = "temperature factor"
)

func numberedLaw(i int) string { return fmt.Sprintf("law %d", i+1) }

func parametersOf(laws []Law) []Parameter {
	var all partly
	for i, law := range laws {
		all.law(numberedLaw(i), law)
	}
	return all.list()
}

// laws rebuilds the parts of a sum or the like.
func (r *rebuilding) laws(parts []Law) []Law {
	for i, part := range parts {
		parts[i] = r.law(numberedLaw(i), part)
	}
	return parts
}

// Parameters returns those of the laws, "law 1: …" and so on.
func (s Sum) Parameters() []Parameter { return parametersOf(s.Laws()) }

// WithParameters rebuilds the sum from rebuilt laws.
func (s Sum) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: "sum of laws", rest: values}
	laws := r.laws(s.Laws())
	if err := r.done(); err != nil {
		return nil, err
	}
	return orNil(NewSum(laws...))
}

// Parameters returns those of the laws, "law 1: …" and so on.
func (s Series) Parameters() []Parameter { return parametersOf(s.Laws()) }

// WithParameters rebuilds the sequence from rebuilt laws.
func (s Series) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: "series of laws", rest: values}
	laws := r.laws(s.Laws())
	if err := r.done(); err != nil {
		return nil, err
	}
	return orNil(NewSeries(laws...))
}

// Parameters returns those of the law, "law: …", and of the factor, "temperature factor: …".
func (t Thermal) Parameters() []Parameter {
	var all partly
	all.law(thatLaw, t.Law())
	all.factor(thatFactor, t.factor)
	return all.list()
}

// WithParameters rebuilds law and factor.
func (t Thermal) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: "temperature-dependent law", rest: values}
	law := r.law(thatLaw, t.Law())
	factor := rebuilt(&r, thatFactor, t.factor)
	if err := r.done(); err != nil {
		return nil, err
	}
	return orNil(WithTemperature(law, factor))
}

// Parameters returns the threshold stress and those of the law, "law: …".
func (t Threshold) Parameters() []Parameter {
	stress := positiveNumber("threshold stress", inStress)
	stress.Value = t.threshold
	all := partly{parameters: []Parameter{stress}}
	all.law(thatLaw, t.Law())
	return all.list()
}

// WithParameters rebuilds the law and puts the threshold before it.
func (t Threshold) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: "threshold stress", rest: values}
	threshold := r.one()
	law := r.law(thatLaw, t.Law())
	if err := r.done(); err != nil {
		return nil, err
	}
	return orNil(WithThreshold(law, threshold))
}

// Parameters returns the temperatures, "temperature 1" and so on, and those of the laws, "law 1: …" and so on.
func (t Tabulated) Parameters() []Parameter {
	all := partly{parameters: numberedTemperatures(t.table.temperatures)}
	for i, law := range t.Laws() {
		all.law(numberedLaw(i), law)
	}
	return all.list()
}

// WithParameters rebuilds the table, with the same options.
func (t Tabulated) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: t.table.name, rest: values}
	temperatures := r.take(len(t.laws))
	laws := r.laws(t.Laws())
	if err := r.done(); err != nil {
		return nil, err
	}
	return orNil(NewTabulated(temperatures, laws, t.table.options))
}

func numberedTemperatures(temperatures []float64) []Parameter {
	all := make([]Parameter, len(temperatures))
	for i, v := range temperatures {
		all[i] = temperatureNumber(fmt.Sprintf("temperature %d", i+1))
		all[i].Value = v
	}
	return all
}

func factorTableForm(options TableOptions) func(v []float64) form[TemperatureFactor] {
	return func(v []float64) form[TemperatureFactor] {
		n := len(v) / 2
		all := numberedTemperatures(v[:n])
		for i := range n {
			all = append(all, positiveNumber(fmt.Sprintf("factor %d", i+1), dimensionless))
		}
		return form[TemperatureFactor]{all, func(v []float64) (TemperatureFactor, error) {
			return NewFactorTable(v[:n], v[n:], options)
		}}
	}
}

// Parameters returns those of the law within, "law: …", which stay in its own units.
func (c Converted) Parameters() []Parameter {
	var all partly
	all.law(thatLaw, c.Law())
	for i, p := range all.parameters {
		if p.Scale != OnTemperatureScale {
			fixed(all.parameters[i : i+1]...)
		}
	}
	return all.parameters
}

// WithParameters rebuilds the law within, in its own units.
func (c Converted) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: "law in other units", rest: values}
	law := r.law(thatLaw, c.Law())
	if err := r.done(); err != nil {
		return nil, err
	}
	own, wanted := c.Units()
	return orNil(InUnits(law, own, wanted))
}

func arrheniusForm([]float64) form[TemperatureFactor] {
	return form[TemperatureFactor]{[]Parameter{positiveNumber("activation energy", dimensionless)},
		func(v []float64) (TemperatureFactor, error) { return NewArrhenius(v[0]) }}
}

func arrheniusAtForm([]float64) form[TemperatureFactor] {
	return form[TemperatureFactor]{
		[]Parameter{positiveNumber("activation energy", dimensionless), temperatureNumber("reference temperature")},
		func(v []float64) (TemperatureFactor, error) { return NewArrheniusAt(v[0], v[1]) },
	}
}

// Parameters returns the activation energy, and the reference temperature if there is one.
func (a Arrhenius) Parameters() []Parameter { return a.orOne().Parameters() }

// WithParameters builds the factor from other values.
func (a Arrhenius) WithParameters(values []float64) (TemperatureFactor, error) {
	return a.orOne().WithParameters(values)
}

// orOne is how the factor was built; the zero Arrhenius, the factor one, as if from no activation energy.
func (a Arrhenius) orOne() given[TemperatureFactor] {
	if a.arguments == nil {
		return remember(arrheniusForm, 0)
	}
	return a.given
}

// twoActivations are the parameters both forms of a TwoArrhenius have.
func twoActivations() []Parameter {
	return []Parameter{positiveNumber("activation energy below", dimensionless),
		positiveNumber("activation energy above", dimensionless), temperatureNumber("transition temperature")}
}

func twoArrheniusForm([]float64) form[TemperatureFactor] {
	all := append(twoActivations(), positiveNumber("prefactor below", dimensionless),
		positiveNumber("prefactor above", dimensionless))
	return form[TemperatureFactor]{all, func(v []float64) (TemperatureFactor, error) {
		return NewTwoArrhenius(ArrheniusBranch{v[3], v[0]}, ArrheniusBranch{v[4], v[1]}, v[2])
	}}
}

func twoArrheniusAtForm([]float64) form[TemperatureFactor] {
	return form[TemperatureFactor]{twoActivations(), func(v []float64) (TemperatureFactor, error) {
		return NewTwoArrheniusAt(v[0], v[1], v[2])
	}}
}
