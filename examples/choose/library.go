package main

import (
	"strings"

	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/creeplaw/published"
)

// The families of the published sets.
const (
	ice     family = "Ice, published sets"
	rock    family = "Rock, published sets"
	salt    family = "Rock salt, published sets"
	solder  family = "Solder, published sets"
	metal   family = "Metals, published sets"
	steel   family = "Steels, published sets"
	unknown family = "Other published sets"
)

var publishedFamilies = []family{ice, rock, salt, solder, metal, steel, unknown}

// set is a specimen from package published, in MPa and h, over the range it is known for.
type set struct {
	specimen
	conditions
	status string
}

// library are all sets of package published; a new one there appears here.
func library() ([]set, error) {
	var list []set
	for _, s := range published.Sets() {
		own, err := s.In(units)
		if err != nil {
			return nil, err
		}
		f := familyOf(s.Name)
		list = append(list, set{specimen{f, s.Name, built{law: own.Law}}, rangeOf(f, own), s.Status.String()})
	}
	return list, nil
}

// familyOf goes by the material in the name.
func familyOf(name string) family {
	for _, f := range []struct {
		family
		words []string
	}{
		{steel, []string{"steel"}}, {salt, []string{"salt"}}, {solder, []string{"solder", "Sn", "tin"}},
		{rock, []string{"olivine", "quartz"}}, {ice, []string{"ice"}},
		{metal, []string{"nickel", "copper", "aluminium", "lead", "iron", "Frost"}},
	} {
		for _, w := range f.words {
			if strings.Contains(strings.ToLower(name), strings.ToLower(w)) {
				return f.family
			}
		}
	}
	return unknown
}

// usual is where a set is audited that has no range on record: temperatures and stresses at which such materials are tested
// (common practice), in K and MPa.
var usual = map[family]struct{ temperature, stress audit.Range }{
	ice:    {audit.Range{Low: 233.15, High: 273.15}, audit.Range{Low: 0.1, High: 2}},
	rock:   {audit.Range{Low: 1273.15, High: 1573.15}, audit.Range{Low: 20, High: 200}},
	salt:   {audit.Range{Low: 298.15, High: 373.15}, audit.Range{Low: 5, High: 20}},
	solder: {audit.Range{Low: 298.15, High: 398.15}, audit.Range{Low: 2, High: 20}},
}

// rangeOf is the range on record, and what is usual where there is none: for a material not listed there 600 °C and 20 to 200 MPa.
// An open end is put two decades of stress, or a fifth of the temperature, below the other.
func rangeOf(f family, s published.Set) conditions {
	d := audit.Domain{Strain: audit.Range{Low: 1e-6, High: 0.1}, Stress: audit.Range{Low: 20, High: 200},
		Temperature: audit.Range{Low: commonTemperature, High: commonTemperature}}
	if u, ok := usual[f]; ok {
		d.Temperature, d.Stress = u.temperature, u.stress
	}
	if r := s.Range.Temperature; r.High > 0 {
		d.Temperature = audit.Range{Low: max(r.Low, 0.8*r.High), High: r.High}
	}
	if r := s.Range.Stress; r.High > 0 {
		d.Stress = audit.Range{Low: max(r.Low, r.High/100), High: r.High}
	}
	return conditions{domain: d, stress: middle(d.Stress), temperature: middle(d.Temperature)}
}
