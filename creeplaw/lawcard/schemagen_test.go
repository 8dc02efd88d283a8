package lawcard

import (
	"encoding/json"
	"flag"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

var update = flag.Bool("update", false, "write schema.json anew from the tables of kinds")

// The schema is made from the tables that cards are read by, so that it cannot fall behind them.
func TestSchemaIsThatOfTheTables(t *testing.T) {
	made := encoded(t, wholeSchema(), "") + "\n"
	if *update {
		require.NoError(t, os.WriteFile("schema.json", []byte(made), 0o644))
		return
	}
	assert.True(t, made == Schema(), "schema.json is not up to date: go test ./creeplaw/lawcard -run SchemaIs -update")
}

// encoded lays an ordered value out as JSON; what fits a line stays on one.
func encoded(t *testing.T, v any, indent string) string {
	t.Helper()
	inner := indent + "  "
	var parts []string
	brackets := "[]"
	switch v := v.(type) {
	case members:
		brackets = "{}"
		for _, m := range v {
			parts = append(parts, quote(m.name)+": "+encoded(t, m.value, inner))
		}
	case list:
		for _, item := range v {
			parts = append(parts, encoded(t, item, inner))
		}
	default:
		var b strings.Builder
		e := json.NewEncoder(&b)
		e.SetEscapeHTML(false)
		require.NoError(t, e.Encode(v))
		return strings.TrimSpace(b.String())
	}
	if line := strings.Join(parts, ", "); !strings.Contains(line, "\n") && len(indent)+len(line) < 100 {
		return brackets[:1] + line + brackets[1:]
	}
	return brackets[:1] + "\n" + inner + strings.Join(parts, ",\n"+inner) + "\n" + indent + brackets[1:]
}

func wholeSchema() members {
	return append(members{
		{"$schema", "https://json-schema.org/draft/2020-12/schema"},
		{"$id", "https://example.com/holdtime/lawcard/1/schema.json"},
		{"title", "holdtime law card, version 1"},
		{"description", "A creep law with its units, source and tested range. Activation energies are in J/mol, lengths in m, " +
			"strains are not in per cent. The schema holds the structure and the bounds of single numbers; what depends on two " +
			"numbers is for the reader to refuse, as are names given twice and numbers beyond a 64-bit float."},
	}, append(closed(
		named{"format", members{{"const", format}}},
		named{"version", members{{"const", Version}}},
		named{"name", described("word", "Material and law.")},
		named{"source", described("word", "Where the numbers come from: publication, report, fit.")},
		named{"status", described("word", "How far they may be trusted, such as \"invented\", \"fitted to tests\", \"from memory, "+
			"confidence high\".")},
		named{"caution", described("word", "What to know before use. May be left out.")},
		named{"units", closed(
			named{"stress", ref("stress unit")}, named{"time", ref("time unit")},
			named{"temperature", members{{"enum", texts(temperatureUnits())}}})},
		named{"tested range", testedSchema()},
		named{"law", ref("law")},
	).optional("caution"), named{"$defs", definitions()})...)
}

func texts(words []string) list {
	var all list
	for _, w := range words {
		all = append(all, w)
	}
	return all
}

func ref(to string) members { return members{{"$ref", "#/$defs/" + slug(to)}} }

func slug(s string) string { return strings.NewReplacer(" ", "-", "'", "").Replace(s) }

func described(to, text string) members { return append(ref(to), named{"description", text}) }

// closed is an object with just these members, all of them required.
func closed(properties ...named) members {
	var required list
	for _, p := range properties {
		required = append(required, p.name)
	}
	m := members{{"type", "object"}, {"properties", members(properties)}, {"required", required}}
	if len(required) == 0 {
		m = m[:2]
	}
	return append(m, named{"additionalProperties", false})
}

// optional takes names out of what is required.
func (m members) optional(which ...string) members {
	for i := range m {
		if m[i].name != "required" {
			continue
		}
		var kept list
		for _, name := range m[i].value.(list) {
			if !strings.Contains("|"+strings.Join(which, "|")+"|", "|"+name.(string)+"|") {
				kept = append(kept, name)
			}
		}
		m[i].value = kept
	}
	return m
}

func testedSchema() members {
	m := closed(
		named{"stress", described("interval", "Lowest and highest von Mises stress.")},
		named{"strain", described("interval", "Lowest and highest creep strain.")},
		named{"temperature", members{{"type", "array"}, {"items", members{{"type", "number"}}}, {"minItems", 2}, {"maxItems", 2},
			{"description", "Lowest and highest temperature, in the unit declared."}}},
		named{"time", described("interval", "Duration of the shortest and of the longest test.")},
		named{"basis", described("word", "Where the bounds come from, or why there are none.")},
	).optional("stress", "strain", "temperature", "time")
	return append(m, named{"description", "Where the tests were made. A quantity left out has no bounds on record."})
}

func definitions() members {
	sized := func(names list, base string) members {
		return members{{"anyOf", list{members{{"enum", names}},
			members{{"type", "string"}, {"pattern", "^[0-9]+([.][0-9]+)?([eE][+-]?[0-9]+)? " + base + "$"}}}}}
	}
	var stress, time list
	for _, u := range stressUnits() {
		stress = append(stress, u.String())
	}
	for _, u := range timeUnits() {
		time = append(time, u.String())
	}
	all := members{
		{"word", members{{"type", "string"}, {"pattern", "\\S"}}},
		{"interval", members{{"type", "array"}, {"items", members{{"type", "number"}, {"minimum", 0}}}, {"minItems", 2},
			{"maxItems", 2}}},
		{slug("stress unit"), sized(stress, "Pa")},
		{slug("time unit"), sized(time, "s")},
	}
	all = append(all, group("law", lawSchemas())...)
	all = append(all, group("factor", factorSchemas())...)
	all = append(all, group("curve", curveSchemas())...)
	return append(all, group("coefficient", coefficientSchemas())...)
}

// group is a definition that is one of several, each under a name of its own.
func group(name string, kinds members) members {
	var one list
	var all members
	for _, k := range kinds {
		own := name + " " + k.name
		one = append(one, ref(own))
		all = append(all, named{slug(own), k.value})
	}
	return append(members{{name, members{{"oneOf", one}}}}, all...)
}

// ofKind is an object of a kind, with a remark on it.
func ofKind(kind string, properties ...named) named {
	m := closed(append([]named{{"kind", members{{"const", kind}}}}, properties...)...)
	if text := remarks()[kind]; text != "" {
		m = append(members{{"description", text}}, m...)
	}
	return named{kind, m}
}

// numbers is an object of parameters, in one of the forms; refused tells whether the constructor takes a bound itself.
func numbers(forms [][]creeplaw.Parameter, refused func(form, parameter int, bound float64) bool) members {
	var all list
	for i, form := range forms {
		var properties []named
		for j, p := range form {
			properties = append(properties, named{p.Name, bounded(p, func(x float64) bool { return refused(i, j, x) })})
		}
		all = append(all, closed(properties...))
	}
	if len(all) == 1 {
		return all[0].(members)
	}
	return members{{"oneOf", all}}
}

func bounded(p creeplaw.Parameter, refused func(float64) bool) members {
	m := members{{"type", "number"}}
	if p.Scale == creeplaw.OnTemperatureScale {
		return m // its bound is absolute zero, in whatever unit
	}
	for _, side := range []struct {
		name, open string
		bound      float64
	}{{"minimum", "exclusiveMinimum", p.Low}, {"maximum", "exclusiveMaximum", p.High}} {
		switch {
		case !finite(side.bound):
		case refused(side.bound):
			m = append(m, named{side.open, side.bound})
		default:
			m = append(m, named{side.name, side.bound})
		}
	}
	return m
}

// refuses tells whether a law is refused with one of its parameters at a bound.
func refuses[T any](p interface {
	Parameters() []creeplaw.Parameter
	WithParameters([]float64) (T, error)
}, parameter int, bound float64) bool {
	values := valuesOf(p.Parameters())
	values[parameter] = bound
	_, err := p.WithParameters(values)
	return err != nil
}

func lawSchemas() members {
	rows := func(member string, of members) members {
		return members{{"type", "array"}, {"minItems", 2},
			{"items", closed(named{"temperature", members{{"type", "number"}}}, named{member, of})}}
	}
	all := members{
		ofKind(sumKind, named{"laws", many("law")}),
		ofKind(seriesKind, named{"laws", many("law")}),
		ofKind(thermalKind, named{"law", ref("law")}, named{"factor", ref("factor")}),
		ofKind(thresholdKind, named{"parameters", closed(named{"threshold stress", above(0)})}, named{"law", ref("law")}),
		ofKind(tabulatedKind, named{"interpolated in", members{{"enum", texts(abscissas())}}},
			named{"outside", members{{"enum", texts(beyondTable())}}}, named{"rows", rows("law", ref("law"))}),
		ofKind(unitsKind, named{"units", closed(named{"stress", ref("stress unit")}, named{"time", ref("time unit")})},
			named{"law", ref("law")}),
		ofKind(omegaKind, named{"parameters", closed(named{"coefficient of acceleration", above(0)})},
			named{"initial rate", ref("law")}),
		ofKind(hardenedKind, named{"curve", ref("curve")}),
	}
	known, _ := known(nil)
	for _, k := range known.laws {
		var forms [][]creeplaw.Parameter
		for _, s := range k.specimens {
			forms = append(forms, s.Parameters())
		}
		properties := []named{{"parameters", numbers(forms, func(form, parameter int, bound float64) bool {
			return refuses(k.specimens[form], parameter, bound)
		})}}
		for _, name := range k.factors {
			properties = append(properties, named{name, ref("factor")})
		}
		one := ofKind(k.name, properties...)
		one.value = one.value.(members).optional(k.factors...)
		all = append(all, one)
	}
	return all
}

func above(x float64) members { return members{{"type", "number"}, {"exclusiveMinimum", x}} }

func many(of string) members { return members{{"type", "array"}, {"items", ref(of)}, {"minItems", 1}} }

func factorSchemas() members {
	rows := members{{"type", "array"}, {"minItems", 2},
		{"items", closed(named{"temperature", members{{"type", "number"}}}, named{"factor", above(0)})}}
	all := members{ofKind(tableKind, named{"interpolated in", members{{"enum", texts(abscissas())}}},
		named{"outside", members{{"enum", texts(beyondTable())}}}, named{"rows", rows})}
	for _, k := range factorKinds() {
		var forms [][]creeplaw.Parameter
		for _, s := range k.specimens {
			forms = append(forms, s.Parameters())
		}
		all = append(all, ofKind(k.name, named{"parameters", numbers(forms, func(form, parameter int, bound float64) bool {
			return refuses(k.specimens[form], parameter, bound)
		})}))
	}
	return all
}

func curveSchemas() members {
	var all members
	for _, k := range curveKinds() {
		if len(k.specimens[0].Coefficients) == 0 { // the forms differ by their numbers
			all = append(all, ofKind(k.name, recipeSchema(k.name, k.specimens)...))
			continue
		}
		var forms list
		for _, s := range k.specimens {
			forms = append(forms, ofKind(k.name, recipeSchema(k.name, []curve.Recipe{s})...).value)
		}
		if len(forms) == 1 {
			all = append(all, named{k.name, forms[0]})
		} else {
			all = append(all, named{k.name, members{{"oneOf", forms}}})
		}
	}
	return all
}

// recipeSchema are the members of a curve or term, its numbers in one of the forms of the specimens.
func recipeSchema(kind string, specimens []curve.Recipe) []named {
	var properties []named
	var forms [][]creeplaw.Parameter
	for _, s := range specimens {
		forms = append(forms, s.Numbers)
	}
	if len(forms[0]) > 0 {
		properties = append(properties, named{"parameters", numbers(forms, func(form, parameter int, bound float64) bool {
			p := forms[form][parameter]
			return bound == p.Low && p.Name != "activation energy" // a time exponent may be 1
		})})
	}
	for _, i := range specimens[0].Coefficients {
		properties = append(properties, named{i.Name, ref("coefficient")})
	}
	var terms list
	for _, k := range termKinds(kind) {
		if k.name == "" {
			terms = append(terms, closed(recipeSchema("", k.specimens)...))
		} else {
			terms = append(terms, ofKind(k.name, recipeSchema("", k.specimens)...).value)
		}
	}
	if len(terms) > 0 {
		properties = append(properties, named{"terms", members{{"type", "array"}, {"minItems", 1}, {"items",
			members{{"oneOf", terms}}}}})
	}
	return properties
}

func coefficientSchemas() members {
	all := members{
		ofKind(activatedKind, named{"coefficient", ref("coefficient")}, named{"factor", ref("factor")}),
		ofKind(productKind, named{"factors", many("coefficient")}),
		ofKind(rateKind, named{"law", ref("law")}),
	}
	for _, k := range coefficientKinds() {
		var forms [][]creeplaw.Parameter
		for _, s := range k.specimens {
			forms = append(forms, s.Parameters(creeplaw.Dimension{}))
		}
		all = append(all, ofKind(k.name, named{"parameters", numbers(forms, func(_, _ int, bound float64) bool {
			return true // none takes its bound
		})}))
	}
	return all
}
