package lawtest

import (
	"math"
	"sync/atomic"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
)

// evolvingLaw is a user's law with internal variables, to be spoiled.
type evolvingLaw struct {
	variables     func() []creeplaw.Variable
	seesPrincipal bool
	evolve        func(creeplaw.EvolvingPoint) creeplaw.Evolution
}

var _ creeplaw.Evolving = evolvingLaw{}

func (l evolvingLaw) Variables() []creeplaw.Variable                     { return l.variables() }
func (l evolvingLaw) SeesPrincipal() bool                                { return l.seesPrincipal }
func (l evolvingLaw) Evolve(p creeplaw.EvolvingPoint) creeplaw.Evolution { return l.evolve(p) }
func (l evolvingLaw) Rate(p creeplaw.Point) creeplaw.Rate {
	e := modelEvolve(creeplaw.InTension(p, modelStart))
	if p.Stress == 0 {
		return creeplaw.Rate{}
	}
	return e.RateInTension(p)
}

var (
	modelStart    = [creeplaw.MaxVariables]float64{0, 40}
	modelInternal = []Range{{0, 0.8}, {-10, 90}}
)

func modelVariables() []creeplaw.Variable {
	return []creeplaw.Variable{{Name: "damage", Limit: 1}, {Name: "back stress", Initial: 40, Limit: math.Inf(1)}}
}

// modelEvolve sees everything a law may see: ṗ = σ³ p^-½ exp(σm/200 + w/100 - 3e4/T)/(1-d)²,
// ḋ = σ2 exp(σ1/100)/(1-d) with σ2 = σ², ẇ = (50 - w) ṗ, which changes its sign in the box.
func modelEvolve(p creeplaw.EvolvingPoint) (e creeplaw.Evolution) {
	d, w := p.Internal[0], p.Internal[1]
	e.LogRate = 3*math.Log(p.Stress) - 0.5*math.Log(p.Strain) + p.MeanStress/200 + w/100 - 3e4/p.Temperature - 2*math.Log(1-d)
	e.Creep = creeplaw.Partials{ByLogStress: 3, ByLogStrain: -0.5, ByMeanStress: 1. / 200, ByLogTemperature: 3e4 / p.Temperature,
		ByInternal: [creeplaw.MaxVariables]float64{2 / (1 - d), 0.01}}
	e.Internal[0] = creeplaw.InternalRate{LogScale: 2*math.Log(p.Stress) + p.PrincipalStress/100, Value: 1 / (1 - d),
		Partials: creeplaw.Partials{ByLogStress: 2 / (1 - d), ByPrincipalStress: 0.01 / (1 - d),
			ByInternal: [creeplaw.MaxVariables]float64{1 / ((1 - d) * (1 - d))}}}
	e.FollowCreep(1, 50-w, creeplaw.Partials{ByInternal: [creeplaw.MaxVariables]float64{0, -1}})
	return e
}

func modelEvolving() evolvingLaw { return evolvingLaw{modelVariables, true, modelEvolve} }

// spoilt is the model with its evolution altered, by value: a pointer would allocate, which is another fault.
func spoilt(change func(p creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution) evolvingLaw {
	l := modelEvolving()
	l.evolve = func(p creeplaw.EvolvingPoint) creeplaw.Evolution { return change(p, modelEvolve(p)) }
	return l
}

func evolvingFaults() []faulty {
	const wrong = 1 + 1e-4
	unnamed, blind := modelEvolving(), modelEvolving()
	unnamed.variables = func() []creeplaw.Variable {
		v := modelVariables()
		v[0].Limit = 0
		return v
	}
	blind.seesPrincipal = false
	var calls atomic.Int64
	faults := []faulty{
		{"no Evolve", "claimed capability", plainLaw(modelRate), Evolving},
		{"limit at the initial value", "sound variables", unnamed, Evolving},
		{"starts at another rate", "evolution at the start",
			spoilt(func(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
				e.LogRate += 1e-9
				return e
			}), Evolving},
		{"evolves what it has not", "evolution finite",
			spoilt(func(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
				e.Internal[2].Value = 1
				return e
			}), Evolving},
		{"swallows a NaN", "evolution of NaN is NaN", spoilt(func(p creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
			if math.IsNaN(p.Stress) {
				e.LogRate = 0
			}
			return e
		}), Evolving},
		{"sees what it does not say", "blind to the principal stress", blind, Evolving},
		{"remembers how often it was called", "evolution has the same bits", spoilt(func(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
			if calls.Add(1)%41 == 0 {
				e.LogRate = math.Nextafter(e.LogRate, math.Inf(1))
			}
			return e
		}), Evolving},
		{"allocates", "evolution without allocation", spoilt(func(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
			keep.Store(&creeplaw.Rate{Value: e.LogRate})
			return e
		}), Evolving},
	}
	partials := []struct {
		name string
		bend func(e creeplaw.Evolution) creeplaw.Evolution
	}{
		{"∂ln ṗ/∂ln σ", func(e creeplaw.Evolution) creeplaw.Evolution { e.Creep.ByLogStress *= wrong; return e }},
		{"∂ln ṗ/∂σm", func(e creeplaw.Evolution) creeplaw.Evolution { e.Creep.ByMeanStress *= wrong; return e }},
		{"∂ln ṗ/∂ln p", func(e creeplaw.Evolution) creeplaw.Evolution { e.Creep.ByLogStrain *= wrong; return e }},
		{"∂ln ṗ/∂ln T", func(e creeplaw.Evolution) creeplaw.Evolution { e.Creep.ByLogTemperature *= wrong; return e }},
		{"∂ln ṗ/∂w", func(e creeplaw.Evolution) creeplaw.Evolution { e.Creep.ByInternal[1] *= wrong; return e }},
		{"∂ḋ/∂ln σ", func(e creeplaw.Evolution) creeplaw.Evolution { e.Internal[0].ByLogStress *= wrong; return e }},
		{"∂ḋ/∂σ1", func(e creeplaw.Evolution) creeplaw.Evolution { e.Internal[0].ByPrincipalStress *= wrong; return e }},
		{"∂ḋ/∂d", func(e creeplaw.Evolution) creeplaw.Evolution { e.Internal[0].ByInternal[0] *= wrong; return e }},
		{"∂ẇ/∂d", func(e creeplaw.Evolution) creeplaw.Evolution { e.Internal[1].ByInternal[0] *= wrong; return e }},
	}
	for _, f := range partials {
		faults = append(faults, faulty{f.name + " wrong by 1e-4", "derivatives of the evolution",
			spoilt(func(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution { return f.bend(e) }), Evolving})
	}
	return faults
}

func TestGoodEvolvingLawPasses(t *testing.T) {
	box := modelBox(Evolving)
	box.Internal = modelInternal
	for _, r := range Run(t, modelEvolving(), box) {
		assert.Positive(t, r.Checks, r.Rule)
		assert.Zero(t, r.Broken, r.Rule)
	}
}

// A box that has no ranges for the variables of the law is a failure, not a skip.
func TestVariablesNeedRanges(t *testing.T) {
	var r recorder
	Run(&r, modelEvolving(), modelBox(Evolving))
	assert.Contains(t, r.rules(), "sound variables")
}
