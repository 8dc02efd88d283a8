package lawcard

import (
	"fmt"
	"reflect"
	"slices"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// curve reads a curve in the units of the card, and where its numbers stand.
func (r *reading) curve(v value, c conversion) (curve.Curve, map[string]value) {
	kindOf := r.member(v, "kind")
	name := r.word(kindOf)
	all := curveKinds()
	i := slices.IndexFunc(all, func(k curveKind) bool { return k.name == name })
	if i < 0 {
		if r.err == nil {
			var known []string
			for _, k := range all {
				known = append(known, k.name)
			}
			r.fail(kindOf, Unknown, "is %s, no kind of curve known here; known are %s", quoted(name), listed(known))
		}
		return nil, nil
	}
	places := map[string]value{}
	recipe := r.recipe(v, all[i], termKinds(name), c, places)
	made := built(r, v, places, func() (curve.Curve, error) { return recipe.Make() })
	// NewStrainHardened counts the terms and looks for the smallest time exponent.
	if len(recipe.Terms) > 0 {
		places["smallest time exponent"], places["number of terms"] = r.member(v, "terms"), r.member(v, "terms")
	}
	return made, places
}

// recipe reads a curve or a term of one. Places of numbers are kept under their names, those of terms after "term 1: ".
func (r *reading) recipe(v value, k curveKind, terms []curveKind, c conversion, places map[string]value) curve.Recipe {
	if !r.is(v, object) {
		return curve.Recipe{}
	}
	var parameters value
	for _, m := range v.members {
		if m.name == "parameters" {
			parameters = value{m.value, under(v.path, m.name)}
		}
	}
	shape := k.shapeOf(v, parameters)
	var required []string
	if k.name != "" {
		required = append(required, "kind")
	}
	if len(shape.Numbers) > 0 {
		required = append(required, "parameters")
	}
	for _, i := range shape.Coefficients {
		required = append(required, i.Name)
	}
	if terms != nil {
		required = append(required, "terms")
	}
	f := r.fields(v, required)
	made := curve.Recipe{Curve: k.name}
	if len(shape.Numbers) > 0 {
		made.Numbers = r.numbers(f["parameters"], k, shape, c, places)
	}
	for _, i := range shape.Coefficients {
		i.Coefficient = r.coefficient(f[i.Name], c)
		made.Coefficients = append(made.Coefficients, i)
	}
	if terms != nil {
		for n, item := range r.items(f["terms"], 1) {
			made.Terms = append(made.Terms, r.term(item, terms, c, places, fmt.Sprintf("term %d: ", n+1)))
		}
	}
	return made
}

// numbers are those of a curve or term that are not in coefficients.
func (r *reading) numbers(v value, k curveKind, shape curve.Recipe, c conversion, places map[string]value) []creeplaw.Parameter {
	forms := [][]creeplaw.Parameter{shape.Numbers}
	if len(shape.Coefficients) == 0 { // the forms differ by their numbers
		forms = nil
		for _, s := range k.specimens {
			forms = append(forms, s.Numbers)
		}
	}
	i, values, found := r.parameters(v, c, forms)
	if r.err != nil {
		return nil
	}
	all := slices.Clone(forms[i])
	for j := range all {
		all[j].Value = values[j]
		places[all[j].Name] = found[all[j].Name]
	}
	return all
}

func (r *reading) term(v value, kinds []curveKind, c conversion, places map[string]value, prefix string) curve.Recipe {
	k := kinds[0]
	if k.name != "" {
		kindOf := r.member(v, "kind")
		name := r.word(kindOf)
		i := slices.IndexFunc(kinds, func(k curveKind) bool { return k.name == name })
		if i < 0 {
			var known []string
			for _, k := range kinds {
				known = append(known, k.name)
			}
			if r.err == nil {
				r.fail(kindOf, Unknown, "is %s, no function of time known here; known are %s", quoted(name), listed(known))
			}
			return curve.Recipe{}
		}
		k = kinds[i]
	}
	own := map[string]value{}
	made := r.recipe(v, k, nil, c, own)
	for name, at := range own {
		places[prefix+name] = at
	}
	return made
}

// coefficient reads a function of stress and temperature in the units of the card.
func (r *reading) coefficient(v value, c conversion) curve.Coefficient {
	kindOf := r.member(v, "kind")
	name := r.word(kindOf)
	if r.err != nil {
		return nil
	}
	switch name {
	case activatedKind:
		f := r.fields(v, []string{"kind", "coefficient", "factor"})
		return curve.Activated{Coefficient: r.coefficient(f["coefficient"], c), Factor: r.factor(f["factor"], c)}
	case productKind:
		f := r.fields(v, []string{"kind", "factors"})
		var all curve.Product
		for _, item := range r.items(f["factors"], 1) {
			all = append(all, r.coefficient(item, c))
		}
		return all
	case rateKind:
		f := r.fields(v, []string{"kind", "law"})
		return curve.RateOf{Law: r.law(f["law"], c)}
	case bilinearKind:
		if c.from.temperature != kelvin {
			r.fail(kindOf, BadUnit, "is a function of the absolute temperature: the card must be in K")
		}
	}
	for _, k := range coefficientKinds() {
		if k.name == name {
			return r.plainCoefficient(v, k, c)
		}
	}
	r.fail(kindOf, Unknown, "is %s, no kind of coefficient known here; known are %s", quoted(name), listed(coefficientNames()))
	return nil
}

func (r *reading) plainCoefficient(v value, k coefficientKind, c conversion) curve.Coefficient {
	f := r.fields(v, []string{"kind", "parameters"})
	forms := make([][]creeplaw.Parameter, len(k.specimens))
	for i, s := range k.specimens {
		forms[i] = s.Parameters(creeplaw.Dimension{})
	}
	i, values, places := r.parameters(f["parameters"], c, forms)
	return built(r, v, places, func() (curve.Coefficient, error) { return k.specimens[i].WithParameters(values) })
}

// hardened writes the law made from a curve.
func (w *writing) hardened(law curve.StrainHardened, path string, in creeplaw.Units) members {
	r, ok := curve.RecipeOf(law.Curve())
	if !ok {
		return w.fail(path+"/curve", Unwritable, "is a %T, which no kind of curve describes", law.Curve())
	}
	return members{{"kind", hardenedKind}, {"curve", w.recipe(r, path+"/curve", in)}}
}

func (w *writing) recipe(r curve.Recipe, path string, in creeplaw.Units) members {
	var m members
	if r.Curve != "" {
		m = append(m, named{"kind", r.Curve})
	}
	if len(r.Numbers) > 0 {
		m = append(m, named{"parameters", w.parameters(r.Numbers, path)})
	}
	for _, i := range r.Coefficients {
		m = append(m, named{i.Name, w.coefficient(i.Coefficient, under(path, i.Name), in)})
	}
	if len(r.Terms) > 0 {
		terms := list{}
		for i, t := range r.Terms {
			terms = append(terms, w.recipe(t, fmt.Sprintf("%s/terms/%d", path, i), in))
		}
		m = append(m, named{"terms", terms})
	}
	return m
}

func (w *writing) coefficient(c curve.Coefficient, path string, in creeplaw.Units) members {
	switch c := c.(type) {
	case curve.Activated:
		return members{{"kind", activatedKind}, {"factor", w.factor(c.Factor, path+"/factor")},
			{"coefficient", w.coefficient(c.Coefficient, path+"/coefficient", in)}}
	case curve.Product:
		factors := list{}
		for i, one := range c {
			factors = append(factors, w.coefficient(one, fmt.Sprintf("%s/factors/%d", path, i), in))
		}
		return members{{"kind", productKind}, {"factors", factors}}
	case curve.RateOf:
		return members{{"kind", rateKind}, {"law", w.law(c.Law, path+"/law", in)}}
	}
	for _, k := range coefficientKinds() {
		for _, s := range k.specimens {
			if reflect.TypeOf(s) == reflect.TypeOf(c) {
				ps := c.(curve.ParametricCoefficient).Parameters(creeplaw.Dimension{})
				return members{{"kind", k.name}, {"parameters", w.parameters(ps, path)}}
			}
		}
	}
	return w.fail(path, Unwritable, "is a %T, which no kind of coefficient describes", c)
}
