package lawcard

import (
	"errors"
	"fmt"

	"example.com/holdtime/creeplaw"
)

// The kinds of law that hold other laws, and of a temperature factor that is a table.
const (
	sumKind       = "sum"
	seriesKind    = "series"
	thermalKind   = "with temperature"
	thresholdKind = "with threshold"
	tabulatedKind = "tabulated"
	unitsKind     = "in other units"
	omegaKind     = "Omega"
	hardenedKind  = "strain-hardened curve"
	tableKind     = "table"
)

func composedKinds() []string {
	return []string{sumKind, seriesKind, thermalKind, thresholdKind, tabulatedKind, unitsKind, omegaKind,
		hardenedKind}
}

// The choices of a table, in the order of the constants of package creeplaw.
func abscissas() []string    { return []string{"1/T", "T"} }
func beyondTable() []string  { return []string{"undefined", "held", "extrapolated"} }
func tableMembers() []string { return []string{"kind", "interpolated in", "outside", "rows"} }

// law reads a law and puts it into the units wanted.
func (r *reading) law(v value, c conversion) creeplaw.Law {
	kindOf := r.member(v, "kind")
	name := r.word(kindOf)
	if r.err != nil {
		return nil
	}
	switch name {
	case sumKind:
		laws := r.laws(v, c)
		return built(r, v, nil, func() (creeplaw.Law, error) { return creeplaw.NewSum(laws...) })
	case seriesKind:
		laws := r.laws(v, c)
		return built(r, v, nil, func() (creeplaw.Law, error) { return creeplaw.NewSeries(laws...) })
	case thermalKind:
		return r.thermal(v, c)
	case thresholdKind:
		return r.threshold(v, c)
	case tabulatedKind:
		return r.tabulated(v, c)
	case unitsKind:
		return r.inOtherUnits(v, c)
	case omegaKind:
		return r.omega(v, c)
	case hardenedKind:
		return r.hardened(v, c)
	}
	if k, ok := r.kinds.find(name); ok {
		return r.plain(v, k, c)
	}
	r.fail(kindOf, Unknown, "is %s, no kind of law known here; known are %s", quoted(name), listed(r.kinds.lawNames()))
	return nil
}

func (k kinds) lawNames() []string {
	all := composedKinds()
	for _, one := range k.laws {
		all = append(all, one.name)
	}
	return all
}

// built calls a constructor unless there is a fault already. What it refuses is a fault of the parameter's place, if that is
// known, and otherwise of v.
func built[T any](r *reading, v value, places map[string]value, build func() (T, error)) T {
	var none T
	if r.err != nil {
		return none
	}
	x, err := build()
	if err == nil {
		return x
	}
	var bad *creeplaw.ParameterError
	if errors.As(err, &bad) {
		if at, ok := places[bad.Parameter]; ok {
			r.refuse(at, bad)
			return none
		}
	}
	r.failWith(err, v, BadParameter, "is refused: %v", err)
	return none
}

func (r *reading) refuse(at value, bad *creeplaw.ParameterError) {
	switch {
	case at.shape != number: // of a whole, such as the number of its terms
		r.failWith(bad, at, BadParameter, "is refused: the %s is %v, must be %s", bad.Parameter, bad.Value, bad.Want)
	case r.number(at) != bad.Value: // a temperature
		r.failWith(bad, at, BadParameter, "is %s, in K %v, must be %s", at.text, bad.Value, bad.Want)
	}
	r.failWith(bad, at, BadParameter, "is %v, must be %s", bad.Value, bad.Want)
}

func (r *reading) laws(v value, c conversion) []creeplaw.Law {
	f := r.fields(v, []string{"kind", "laws"})
	var all []creeplaw.Law
	for _, item := range r.items(f["laws"], 1) {
		all = append(all, r.law(item, c))
	}
	return all
}

func (r *reading) thermal(v value, c conversion) creeplaw.Law {
	f := r.fields(v, []string{"kind", "law", "factor"})
	law, factor := r.law(f["law"], c), r.factor(f["factor"], c)
	return built(r, v, nil, func() (creeplaw.Law, error) { return creeplaw.WithTemperature(law, factor) })
}

func (r *reading) threshold(v value, c conversion) creeplaw.Law {
	const name = "threshold stress"
	f := r.fields(v, []string{"kind", "parameters", "law"})
	places := r.fields(f["parameters"], []string{name})
	stress := r.number(places[name])
	law := r.law(f["law"], c)
	return built(r, v, places, func() (creeplaw.Law, error) {
		if _, err := creeplaw.WithThreshold(law, stress); err != nil {
			return nil, err
		}
		there, _ := c.quantity(stress, creeplaw.Dimension{Stress: 1})
		return creeplaw.WithThreshold(law, there)
	})
}

func (r *reading) omega(v value, c conversion) creeplaw.Law {
	const name = "coefficient of acceleration"
	f := r.fields(v, []string{"kind", "parameters", "initial rate"})
	places := r.fields(f["parameters"], []string{name})
	omega := r.number(places[name])
	initial := r.law(f["initial rate"], c)
	return built(r, v, places, func() (creeplaw.Law, error) { return creeplaw.NewOmega(initial, omega) })
}

// rows reads what a table over temperature has besides its values: temperatures, options, and where each value stands.
func (r *reading) rows(v value, member string, c conversion) (temperatures []float64, values []value,
	options creeplaw.TableOptions, places map[string]value) {
	f := r.fields(v, tableMembers())
	options.Against = creeplaw.Abscissa(r.choice(f["interpolated in"], abscissas()...))
	options.Outside = creeplaw.OutsideTable(r.choice(f["outside"], beyondTable()...))
	for i, row := range r.items(f["rows"], 2) {
		cells := r.fields(row, []string{"temperature", member})
		at := cells["temperature"]
		t := r.temperature(at, c)
		if r.err == nil && places == nil && (!(t > 0) || i > 0 && t <= temperatures[i-1]) {
			places = map[string]value{"temperature": at} // what the constructor will refuse
		}
		temperatures, values = append(temperatures, t), append(values, cells[member])
	}
	return temperatures, values, options, places
}

func (r *reading) tabulated(v value, c conversion) creeplaw.Law {
	temperatures, values, options, places := r.rows(v, "law", c)
	var laws []creeplaw.Law
	for _, one := range values {
		laws = append(laws, r.law(one, c))
	}
	return built(r, v, places, func() (creeplaw.Law, error) { return creeplaw.NewTabulated(temperatures, laws, options) })
}

// inOtherUnits reads a law in its own units, which it keeps.
func (r *reading) inOtherUnits(v value, c conversion) creeplaw.Law {
	f := r.fields(v, []string{"kind", "units", "law"})
	own := r.unitsOf(f["units"], "stress", "time")
	own.temperature = c.from.temperature
	law := r.law(f["law"], conversion{own, own.Units})
	return built(r, v, nil, func() (creeplaw.Law, error) { return creeplaw.InUnits(law, own.Units, c.to) })
}

// factor reads a temperature factor. It has no units but those of temperature.
func (r *reading) factor(v value, c conversion) creeplaw.TemperatureFactor {
	kindOf := r.member(v, "kind")
	name := r.word(kindOf)
	if r.err != nil {
		return nil
	}
	if name == tableKind {
		return r.factorTable(v, c)
	}
	known := []string{tableKind}
	for _, k := range r.kinds.factors {
		if known = append(known, k.name); k.name != name {
			continue
		}
		f := r.fields(v, []string{"kind", "parameters"})
		forms := make([][]creeplaw.Parameter, len(k.specimens))
		for i, s := range k.specimens {
			forms[i] = s.Parameters()
		}
		i, values, places := r.parameters(f["parameters"], c, forms)
		return built(r, v, places, func() (creeplaw.TemperatureFactor, error) { return k.specimens[i].WithParameters(values) })
	}
	r.fail(kindOf, Unknown, "is %s, no kind of temperature factor known here; known are %s", quoted(name), listed(known))
	return nil
}

func (r *reading) factorTable(v value, c conversion) creeplaw.TemperatureFactor {
	temperatures, values, options, places := r.rows(v, "factor", c)
	factors := make([]float64, len(values))
	for i, one := range values {
		factors[i] = r.number(one)
		if places == nil && r.err == nil && !(factors[i] > 0) {
			places = map[string]value{"factor": one}
		}
	}
	return built(r, v, places, func() (creeplaw.TemperatureFactor, error) {
		return creeplaw.NewFactorTable(temperatures, factors, options)
	})
}

// parameters reads the numbers of a kind: the form they are in, their values, temperatures in K, and where they stand.
func (r *reading) parameters(v value, c conversion, forms [][]creeplaw.Parameter) (int, []float64, map[string]value) {
	if !r.is(v, object) {
		return 0, nil, nil
	}
	given := make([]string, len(v.members))
	for i, m := range v.members {
		given[i] = m.name
	}
	wanted := make([][]string, len(forms))
	for i, form := range forms {
		wanted[i] = names(form)
	}
	best := nearest(given, wanted)
	places := r.fields(v, wanted[best])
	if r.err != nil {
		if len(forms) > 1 {
			r.err.Reason += otherForms(wanted, best)
		}
		return 0, nil, nil
	}
	values := make([]float64, len(forms[best]))
	for i, p := range forms[best] {
		if at := places[p.Name]; p.Scale == creeplaw.OnTemperatureScale {
			values[i] = r.temperature(at, c)
		} else {
			values[i] = r.number(at)
		}
	}
	return best, values, places
}

// otherForms tells what else could have been given.
func otherForms(forms [][]string, but int) string {
	text := ""
	for i, form := range forms {
		if i != but {
			text += fmt.Sprintf("; or give %s", listed(form))
		}
	}
	return text
}

// plain reads a law made of numbers.
func (r *reading) plain(v value, k kind, c conversion) creeplaw.Law {
	f := r.fields(v, []string{"kind", "parameters"}, k.factors...)
	forms := make([][]creeplaw.Parameter, len(k.specimens))
	for i, s := range k.specimens {
		forms[i] = s.Parameters()
	}
	i, values, places := r.parameters(f["parameters"], c, forms)
	s := k.specimens[i]
	law := built(r, v, places, func() (creeplaw.Law, error) { return s.WithParameters(values) })
	law = r.inUnits(v, law, s.point, c)
	if k.dress == nil || r.err != nil {
		return law
	}
	factors := make([]creeplaw.TemperatureFactor, len(k.factors))
	for i, name := range k.factors {
		if at, ok := f[name]; ok {
			factors[i] = r.factor(at, c)
		}
	}
	return built(r, v, nil, func() (creeplaw.Law, error) { return k.dress(law, factors) })
}

// inUnits takes a law from the units of the card to those wanted: by its numbers, or, where they would leave the range of a
// float64, by those of its form about a stress of one unit, or by InUnits, which leaves the numbers as they are.
func (r *reading) inUnits(v value, law creeplaw.Law, point func([]float64) (creeplaw.Law, error), c conversion) creeplaw.Law {
	if r.err != nil {
		return nil
	}
	if bound, ok := law.(creeplaw.UnitBound); ok {
		if own := bound.OwnUnits(); own == c.to {
			return law
		} else if own != (creeplaw.Units{}) {
			return built(r, v, nil, func() (creeplaw.Law, error) { return creeplaw.InUnits(law, own, c.to) })
		}
	}
	if c.from.temperature == fahrenheit { // degrees of another size, in coefficients per degree
		var ok bool
		if law, ok = converted(law, conversion{c.from, c.from.Units}); !ok {
			r.fail(v, NotConvertible, "has a coefficient that leaves the range of a float64 in K")
			return nil
		}
	}
	c.from.temperature = kelvin
	if c.idle() {
		return law
	}
	if there, ok := converted(law, c); ok {
		return there
	}
	if p, ok := law.(creeplaw.Parametric); ok && point != nil {
		if about, err := point(valuesOf(p.Parameters())); err == nil {
			if there, ok := converted(about, c); ok {
				return there
			}
		}
	}
	there, err := creeplaw.InUnits(law, c.from.Units, c.to)
	if err != nil {
		r.failWith(err, v, NotConvertible, "cannot be put in %v: its numbers leave the range of a float64", c.to)
		return nil
	}
	return there
}

// converted is the law with its numbers in other units; false where they leave the range of a float64.
func converted(law creeplaw.Law, c conversion) (creeplaw.Law, bool) {
	p, ok := law.(creeplaw.Parametric)
	if !ok {
		return law, false
	}
	values, ok := c.parameters(p.Parameters())
	if !ok {
		return law, false
	}
	there, err := p.WithParameters(values)
	return there, err == nil
}
