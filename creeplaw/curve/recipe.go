package curve

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// Recipe is what a curve of this package was built from, by name, to the bit: numbers, coefficients and, for a curve of any
// number of terms, the terms. Law cards are written from it, and the parameters of StrainHardened are its.
type Recipe struct {
	Curve        string               // the kind of curve; of a term its function of time, "" where there is but one
	Numbers      []creeplaw.Parameter // those that are not in coefficients
	Coefficients []Ingredient
	Terms        []Recipe
}

// Ingredient is a coefficient by the name it has in a curve, and its unit there.
type Ingredient struct {
	Name        string
	Coefficient Coefficient
	Unit        creeplaw.Dimension
}

// RecipeOf returns the recipe of a curve of this package, false for any other.
func RecipeOf(c Curve) (Recipe, bool) {
	switch c := c.(type) {
	case BaileyNorton:
		return recipeOfPower(c.terms)
	case PrimarySecondary:
		return recipeOfPowers(c.terms)
	case GrahamWalles:
		return recipeOfGraham(c.terms)
	case Findley:
		return recipeOfFindley(c)
	case TwoRegime:
		return recipeOfTwoRegime(c)
	case McVetty:
		return recipeOfMcVetty(c.terms)
	case Sum:
		return recipeOfTerms(c.terms)
	case Andrade:
		return namedTerms("Andrade", c.terms, "cube-root coefficient", "", "steady rate")
	case LogarithmicCreep:
		return namedTerms("logarithmic creep", c.terms, "strain", "rate constant")
	case GarofaloTransient:
		return namedTerms("Garofalo's transient", c.terms, "transient strain", "transient rate constant", "steady rate")
	case Blackburn:
		return namedTerms("Blackburn", c.terms, "fast transient strain", "fast transient rate constant",
			"slow transient strain", "slow transient rate constant", "steady rate")
	case ThetaProjection:
		return namedTerms("theta projection", c.terms, "primary strain", "primary rate constant", "tertiary strain",
			"tertiary rate constant")
	}
	return Recipe{}, false
}

// unit of the amplitude of a term.
func (t *Term) unit() creeplaw.Dimension {
	if t.shape == powerOfTime {
		return creeplaw.Dimension{Time: -t.exponent}
	}
	return dimensionless
}

// namedTerms gives the coefficients of terms their names, amplitude and rate constant in turn; a power of time has no rate
// constant and may leave its name "", or out if it comes last.
func namedTerms(kind string, terms []Term, names ...string) (Recipe, bool) {
	r := Recipe{Curve: kind}
	for i := range terms {
		t := &terms[i]
		r.Coefficients = append(r.Coefficients, Ingredient{names[0], t.amplitude, t.unit()})
		names = names[1:]
		if t.shape != powerOfTime {
			r.Coefficients = append(r.Coefficients, Ingredient{names[0], t.rate, perTime})
			names = names[1:]
		} else if len(names) > 0 && names[0] == "" {
			names = names[1:]
		}
	}
	return r, len(terms) > 0
}

func timeExponent(m float64) creeplaw.Parameter {
	return creeplaw.Parameter{Name: "time exponent", Value: m, High: 1}
}

// powerNumbers are prefactor and stress exponent of a term that is a power of stress and time, and its time exponent m.
func powerNumbers(t *Term, prefix string) (numbers []creeplaw.Parameter, m float64) {
	p := t.amplitude.(Power)
	return []creeplaw.Parameter{positiveNumber(prefix+"prefactor", p.Prefactor, raised(t.unit(), -p.Exponent, 0)),
		positiveNumber(prefix+"stress exponent", p.Exponent, dimensionless)}, t.exponent
}

func recipeOfPower(terms []Term) (Recipe, bool) {
	if len(terms) == 0 {
		return Recipe{}, false
	}
	numbers, m := powerNumbers(&terms[0], "")
	return Recipe{Curve: "Bailey-Norton", Numbers: append(numbers, timeExponent(m))}, true
}

func recipeOfPowers(terms []Term) (Recipe, bool) {
	if len(terms) == 0 {
		return Recipe{}, false
	}
	primary, m := powerNumbers(&terms[0], "primary ")
	steady, _ := powerNumbers(&terms[1], "steady ")
	return Recipe{Curve: "primary and secondary powers", Numbers: append(append(primary, timeExponent(m)), steady...)}, true
}

func recipeOfGraham(terms []Term) (Recipe, bool) {
	r := Recipe{Curve: "Graham-Walles"}
	for i := range terms {
		t := terms[i]
		var activation []creeplaw.Parameter
		if a, ok := t.amplitude.(Activated); ok {
			activation = a.Factor.(creeplaw.Arrhenius).Parameters()
			t.amplitude = a.Coefficient
		}
		numbers, m := powerNumbers(&t, "")
		exponent := timeExponent(m)
		exponent.High = math.Inf(1)
		r.Terms = append(r.Terms, Recipe{Numbers: append(append(numbers, exponent), activation...)})
	}
	return r, len(terms) > 0
}

func recipeOfFindley(c Findley) (Recipe, bool) {
	if c.given == nil {
		return Recipe{}, false
	}
	p := c.given
	r := Recipe{Curve: "Findley", Numbers: []creeplaw.Parameter{
		positiveNumber("creep", p.Creep, creeplaw.Dimension{Time: -p.TimeExponent}),
		positiveNumber("creep stress", p.CreepStress, inStress), timeExponent(p.TimeExponent)}}
	if c.instantaneous != nil {
		r.Numbers = append(r.Numbers, positiveNumber("instantaneous strain", p.Instantaneous, dimensionless),
			positiveNumber("instantaneous stress", p.InstantaneousStress, inStress))
	}
	return r, true
}

func recipeOfTwoRegime(c TwoRegime) (Recipe, bool) {
	if c.given == nil {
		return Recipe{}, false
	}
	r := Recipe{Curve: "two regimes", Numbers: []creeplaw.Parameter{timeExponent(c.exponent)},
		Coefficients: []Ingredient{{"primary coefficient", c.given.primary, creeplaw.Dimension{Time: -c.exponent}},
			{"steady rate", c.given.steady, perTime}}}
	if c.given.end != nil {
		r.Coefficients = append(r.Coefficients, Ingredient{"end of primary creep", c.given.end, creeplaw.Dimension{Time: 1}})
	}
	return r, true
}

func recipeOfMcVetty(terms []Term) (Recipe, bool) {
	if len(terms) == 0 {
		return Recipe{}, false
	}
	r := Recipe{Curve: "McVetty"}
	r.Numbers = terms[0].rate.(Constant).Parameters(perTime)
	r.Numbers[0].Name = "decay constant"
	r.Coefficients = []Ingredient{{"transient strain", terms[0].amplitude, dimensionless},
		{"steady rate", terms[1].amplitude, perTime}}
	return r, true
}

// The functions of time of terms.
const (
	powerName      = "power of time"
	saturatingName = "saturating"
	growingName    = "growing"
	logName        = "logarithm of time"
	hyperbolicName = "hyperbolic"
)

func recipeOfTerms(terms []Term) (Recipe, bool) {
	r := Recipe{Curve: "sum of terms"}
	for i := range terms {
		t := &terms[i]
		one := Recipe{Curve: [...]string{powerOfTime: powerName, saturating: saturatingName, growing: growingName,
			logOfTime: logName, hyperbolic: hyperbolicName}[t.shape],
			Coefficients: []Ingredient{{"amplitude", t.amplitude, t.unit()}}}
		if t.shape == powerOfTime {
			exponent := timeExponent(t.exponent)
			exponent.High = math.Inf(1)
			one.Numbers = []creeplaw.Parameter{exponent}
		} else {
			one.Coefficients = append(one.Coefficients, Ingredient{"rate constant", t.rate, perTime})
		}
		r.Terms = append(r.Terms, one)
	}
	return r, len(terms) > 0
}

// Parameters returns all numbers: its own, those of the coefficients, each name after that of its coefficient, and those of the
// terms, "term 1: …" and so on.
func (r Recipe) Parameters() []creeplaw.Parameter {
	all := append([]creeplaw.Parameter(nil), r.Numbers...)
	for _, i := range r.Coefficients {
		all = append(all, prefixed(i.Name, parametersOf(i.Coefficient, i.Unit))...)
	}
	for i, t := range r.Terms {
		all = append(all, prefixed(fmt.Sprintf("term %d", i+1), t.Parameters())...)
	}
	if r.isTied() {
		tied(all)
	}
	return all
}

// isTied tells whether the curve works in the units it was written for, whatever its numbers: a coefficient is the user's.
func (r Recipe) isTied() bool {
	for _, i := range r.Coefficients {
		if isTied(i.Coefficient) {
			return true
		}
	}
	for _, t := range r.Terms {
		if t.isTied() {
			return true
		}
	}
	return false
}

// WithParameters returns the recipe with other numbers, in the order of Parameters, and checks those of the coefficients.
// Make checks the rest. The units in it are still those of the old numbers, until a curve has been made.
func (r Recipe) WithParameters(values []float64) (Recipe, error) {
	hand := rebuilding{whole: r.Curve, rest: values}
	other := r.rebuilt(&hand)
	if err := hand.done(); err != nil {
		return Recipe{}, err
	}
	return other, nil
}

func (r Recipe) rebuilt(hand *rebuilding) Recipe {
	other := Recipe{Curve: r.Curve}
	for i, x := range hand.take(len(r.Numbers)) {
		p := r.Numbers[i]
		p.Value = x
		other.Numbers = append(other.Numbers, p)
	}
	for _, i := range r.Coefficients {
		i.Coefficient = hand.coefficient(i.Name, i.Coefficient)
		other.Coefficients = append(other.Coefficients, i)
	}
	for i, t := range r.Terms {
		hand.prefix = fmt.Sprintf("term %d: ", i+1)
		other.Terms = append(other.Terms, t.rebuilt(hand))
	}
	return other
}
