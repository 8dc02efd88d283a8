package lawcard

import (
	"slices"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// curveKind is a kind of curve, or of a term of one, by specimens of the forms it can be given in. Their numbers and
// coefficients do not matter.
type curveKind struct {
	name      string
	specimens []curve.Recipe
}

func specimensOf(curves ...curve.Curve) curveKind {
	var k curveKind
	for _, c := range curves {
		r, _ := curve.RecipeOf(c)
		k.name, k.specimens = r.Curve, append(k.specimens, r)
	}
	return k
}

func curveKinds() []curveKind {
	one := curve.Constant(1)
	both := curve.Transient{Strain: one, Rate: one}
	findley := curve.FindleyParameters{Creep: 1, CreepStress: 1, TimeExponent: 1}
	instantaneous := findley
	instantaneous.Instantaneous, instantaneous.InstantaneousStress = 1, 1
	graham := curve.GrahamWallesTerm{Prefactor: 1, StressExponent: 1, TimeExponent: 1}
	return []curveKind{
		specimensOf(must(curve.NewBaileyNorton(1, 1, 1))),
		specimensOf(must(curve.NewPrimarySecondary(curve.PrimarySecondaryParameters{PrimaryPrefactor: 1,
			PrimaryStressExponent: 1, TimeExponent: 1, SteadyPrefactor: 1, SteadyStressExponent: 1}))),
		specimensOf(must(curve.NewGrahamWalles(graham))),
		specimensOf(must(curve.NewAndrade(one, one))),
		specimensOf(must(curve.NewLogarithmicCreep(one, one))),
		specimensOf(must(curve.NewMcVetty(one, 1, one))),
		specimensOf(must(curve.NewGarofaloTransient(both, one))),
		specimensOf(must(curve.NewBlackburn(both, both, one))),
		specimensOf(must(curve.NewFindley(findley)), must(curve.NewFindley(instantaneous))),
		specimensOf(must(curve.NewTwoRegime(one, 0.5, one, one)), must(curve.NewMatchedTwoRegime(one, 0.5, one))),
		specimensOf(must(curve.NewThetaProjection(both, both))),
		specimensOf(must(curve.NewSum(curve.Steady(one)))),
	}
}

// termKinds are the terms that a kind of curve may have any number of; nil for one that has none.
func termKinds(of string) []curveKind {
	one := curve.Constant(1)
	switch of {
	case "sum of terms":
		sum, _ := curve.RecipeOf(must(curve.NewSum(curve.PowerOfTime(one, 1), curve.Saturating(one, one),
			curve.Growing(one, one), curve.LogOfTime(one, one), curve.Hyperbolic(one, one))))
		var kinds []curveKind
		for _, t := range sum.Terms {
			kinds = append(kinds, curveKind{t.Curve, []curve.Recipe{t}})
		}
		return kinds
	case "Graham-Walles":
		term := curve.GrahamWallesTerm{Prefactor: 1, StressExponent: 1, TimeExponent: 1}
		activated, referred := term, term
		activated.ActivationEnergy, referred.ReferenceTemperature = 1, 1
		graham, _ := curve.RecipeOf(must(curve.NewGrahamWalles(term, activated, referred)))
		return []curveKind{{"", graham.Terms}}
	}
	return nil
}

// coefficientKind is a kind of coefficient that is made of numbers.
type coefficientKind struct {
	name      string
	specimens []curve.ParametricCoefficient
}

func coefficientKinds() []coefficientKind {
	of := func(name string, specimens ...curve.ParametricCoefficient) coefficientKind {
		return coefficientKind{name, specimens}
	}
	return []coefficientKind{
		of("constant", curve.Constant(1)),
		of("power", curve.Power{}, curve.PowerAt{}),
		of("inverse power", curve.InversePower{}),
		of("hyperbolic sine", curve.Sinh{}),
		of("exponential", curve.Exponential{}),
		of("Soderberg", curve.Soderberg{}),
		of(bilinearKind, curve.LogBilinear{}),
	}
}

// The kinds of coefficients that are made of others.
const (
	activatedKind = "with temperature"
	productKind   = "product"
	rateKind      = "rate of a law"
	bilinearKind  = "exponential of stress and temperature"
)

func coefficientNames() []string {
	all := []string{activatedKind, productKind, rateKind}
	for _, k := range coefficientKinds() {
		all = append(all, k.name)
	}
	return all
}

// membersOf are the names a recipe has in a card, numbers among them.
func membersOf(r curve.Recipe) []string {
	all := names(r.Numbers)
	for _, c := range r.Coefficients {
		all = append(all, c.Name)
	}
	return all
}

// shapeOf chooses the specimen that the members of an object in a card name.
func (k curveKind) shapeOf(v value, parameters value) curve.Recipe {
	var given []string
	for _, from := range []value{v, parameters} {
		if from.node == nil || from.shape != object {
			continue
		}
		for _, m := range from.members {
			if !slices.Contains([]string{"kind", "parameters", "terms"}, m.name) {
				given = append(given, m.name)
			}
		}
	}
	forms := make([][]string, len(k.specimens))
	for i, s := range k.specimens {
		forms[i] = membersOf(s)
	}
	return k.specimens[nearest(given, forms)]
}

// hardened reads the law made from a curve, and puts it into the units wanted.
func (r *reading) hardened(v value, c conversion) creeplaw.Law {
	f := r.fields(v, []string{"kind", "curve"})
	own := conversion{c.from, c.from.Units} // the numbers of the curve are converted all at once
	made, places := r.curve(f["curve"], own)
	law := built(r, v, places, func() (creeplaw.Law, error) { return curve.NewStrainHardened(made) })
	c.from.temperature = kelvin // factors and laws within are in K by now
	return r.inUnits(v, law, nil, c)
}
