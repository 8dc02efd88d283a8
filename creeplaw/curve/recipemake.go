package curve

import (
	"errors"
	"fmt"

	"example.com/holdtime/creeplaw"
)

// Make builds the curve. What its constructor refuses comes back as a *creeplaw.ParameterError under the name the number has
// in Parameters, or as a *creeplaw.MissingError; so does a recipe that lacks something or is of an unknown kind.
func (r Recipe) Make() (Curve, error) {
	m := making{recipe: r}
	c, err := m.make()
	if m.missing != "" {
		return nil, &creeplaw.MissingError{Law: r.Curve, Part: m.missing}
	}
	if err != nil {
		return nil, r.renamed(err)
	}
	return c, nil
}

// making takes what a constructor needs out of a recipe.
type making struct {
	recipe  Recipe
	missing string // the first thing that was not there
}

func (m *making) number(name string) float64 {
	for _, p := range m.recipe.Numbers {
		if p.Name == name {
			return p.Value
		}
	}
	m.lacks(name)
	return 0
}

// has tells whether a number or a coefficient of the name is there.
func (m *making) has(name string) bool {
	for _, p := range m.recipe.Numbers {
		if p.Name == name {
			return true
		}
	}
	for _, i := range m.recipe.Coefficients {
		if i.Name == name {
			return true
		}
	}
	return false
}

func (m *making) coefficient(name string) Coefficient {
	for _, i := range m.recipe.Coefficients {
		if i.Name == name && i.Coefficient != nil {
			return i.Coefficient
		}
	}
	m.lacks(name)
	return nil
}

func (m *making) lacks(name string) {
	if m.missing == "" {
		m.missing = name
	}
}

func (m *making) transient(name string) Transient {
	return Transient{m.coefficient(name + "transient strain"), m.coefficient(name + "transient rate constant")}
}

func (m *making) make() (Curve, error) {
	switch m.recipe.Curve {
	case "Bailey-Norton":
		return NewBaileyNorton(m.number("prefactor"), m.number("stress exponent"), m.number("time exponent"))
	case "primary and secondary powers":
		return NewPrimarySecondary(PrimarySecondaryParameters{m.number("primary prefactor"),
			m.number("primary stress exponent"), m.number("time exponent"), m.number("steady prefactor"),
			m.number("steady stress exponent")})
	case "Graham-Walles":
		return m.graham()
	case "Findley":
		return m.findley()
	case "two regimes":
		if !m.has("end of primary creep") {
			return NewMatchedTwoRegime(m.coefficient("primary coefficient"), m.number("time exponent"),
				m.coefficient("steady rate"))
		}
		return NewTwoRegime(m.coefficient("primary coefficient"), m.number("time exponent"),
			m.coefficient("end of primary creep"), m.coefficient("steady rate"))
	case "McVetty":
		return NewMcVetty(m.coefficient("transient strain"), m.number("decay constant"), m.coefficient("steady rate"))
	case "Andrade":
		return NewAndrade(m.coefficient("cube-root coefficient"), m.coefficient("steady rate"))
	case "logarithmic creep":
		return NewLogarithmicCreep(m.coefficient("strain"), m.coefficient("rate constant"))
	case "Garofalo's transient":
		return NewGarofaloTransient(m.transient(""), m.coefficient("steady rate"))
	case "Blackburn":
		return NewBlackburn(m.transient("fast "), m.transient("slow "), m.coefficient("steady rate"))
	case "theta projection":
		return NewThetaProjection(Transient{m.coefficient("primary strain"), m.coefficient("primary rate constant")},
			Transient{m.coefficient("tertiary strain"), m.coefficient("tertiary rate constant")})
	case "sum of terms":
		return m.terms()
	}
	m.lacks("kind of curve")
	return nil, nil
}

func (m *making) graham() (Curve, error) {
	var terms []GrahamWallesTerm
	for i, t := range m.recipe.Terms {
		n := making{recipe: t}
		one := GrahamWallesTerm{Prefactor: n.number("prefactor"), StressExponent: n.number("stress exponent"),
			TimeExponent: n.number("time exponent")}
		if n.has("activation energy") {
			one.ActivationEnergy = n.number("activation energy")
		}
		if n.has("reference temperature") {
			one.ReferenceTemperature = n.number("reference temperature")
			if err := positive("reference temperature", one.ReferenceTemperature); err != nil { // zero would mean none
				return nil, within("Graham-Walles", fmt.Sprintf("term %d", i+1), err)
			}
		}
		m.lacksIn(i, n.missing)
		terms = append(terms, one)
		if _, err := NewGrahamWalles(one); err != nil { // the constructor does not say which
			return nil, within("Graham-Walles", fmt.Sprintf("term %d", i+1), t.renamed(err))
		}
	}
	return NewGrahamWalles(terms...)
}

func (m *making) lacksIn(term int, name string) {
	if name != "" {
		m.lacks(fmt.Sprintf("term %d: %s", term+1, name))
	}
}

func (m *making) findley() (Curve, error) {
	p := FindleyParameters{Creep: m.number("creep"), CreepStress: m.number("creep stress"),
		TimeExponent: m.number("time exponent")}
	if m.has("instantaneous strain") {
		p.Instantaneous, p.InstantaneousStress = m.number("instantaneous strain"), m.number("instantaneous stress")
		err := errors.Join(positive("instantaneous strain", p.Instantaneous),
			positive("instantaneous stress", p.InstantaneousStress)) // zeros would mean none
		if err != nil {
			return nil, err
		}
	}
	return NewFindley(p)
}

func (m *making) terms() (Curve, error) {
	var terms []Term
	for i, t := range m.recipe.Terms {
		n := making{recipe: t}
		one, ok := n.term()
		if !ok {
			n.lacks("function of time")
		}
		m.lacksIn(i, n.missing)
		if m.missing != "" {
			return nil, nil
		}
		if one.shape == powerOfTime {
			if err := positive("time exponent", one.exponent); err != nil {
				return nil, within(m.recipe.Curve, fmt.Sprintf("term %d", i+1), err)
			}
		}
		terms = append(terms, one)
	}
	return NewSum(terms...)
}

func (n *making) term() (Term, bool) {
	switch n.recipe.Curve {
	case powerName:
		return PowerOfTime(n.coefficient("amplitude"), n.number("time exponent")), true
	case saturatingName:
		return Saturating(n.coefficient("amplitude"), n.coefficient("rate constant")), true
	case growingName:
		return Growing(n.coefficient("amplitude"), n.coefficient("rate constant")), true
	case logName:
		return LogOfTime(n.coefficient("amplitude"), n.coefficient("rate constant")), true
	case hyperbolicName:
		return Hyperbolic(n.coefficient("amplitude"), n.coefficient("rate constant")), true
	}
	return Term{}, false
}

// renamed gives an error of a constructor the name the number has in the recipe, where the constructor names the coefficient
// it makes of it.
func (r Recipe) renamed(err error) error {
	var bad *creeplaw.ParameterError
	if !errors.As(err, &bad) {
		return err
	}
	name, ok := map[string]string{
		"strain: prefactor":                 "prefactor",
		"strain: exponent":                  "stress exponent",
		"primary strain: prefactor":         "primary prefactor",
		"primary strain: exponent":          "primary stress exponent",
		"steady rate: prefactor":            "steady prefactor",
		"steady rate: exponent":             "steady stress exponent",
		"term: prefactor":                   "prefactor",
		"term: exponent":                    "stress exponent",
		"term: activation energy":           "activation energy",
		"term: reference temperature":       "reference temperature",
		"creep: prefactor":                  "creep",
		"creep: stress":                     "creep stress",
		"creep: stress coefficient":         "creep stress",
		"transient rate constant: constant": "decay constant",
		"instantaneous strain: prefactor":   "instantaneous strain",
		"instantaneous strain: stress":      "instantaneous stress",
	}[bad.Parameter]
	if !ok || !(&making{recipe: r}).has(name) {
		return err
	}
	return &creeplaw.ParameterError{Law: bad.Law, Parameter: name, Value: bad.Value, Want: bad.Want}
}
