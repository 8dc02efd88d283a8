package lawtest

import (
	"math"
	"runtime"
	"strings"
	"sync/atomic"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
)

// faulty is a law with one planted fault and the rule, by name, that must catch it; no other may complain.
type faulty struct {
	fault string
	rule  string
	law   creeplaw.Law
	claim Capability
}

// changed is the model with its result altered.
func changed(change func(creeplaw.Point, *creeplaw.Rate)) plainLaw {
	return func(p creeplaw.Point) creeplaw.Rate {
		r := modelRate(p)
		change(p, &r)
		return r
	}
}

// changedLog is the model with its logarithm altered.
func changedLog(change func(creeplaw.Point, *creeplaw.LogRate)) logLaw {
	return logLaw{modelRate, func(p creeplaw.Point) creeplaw.LogRate {
		l := modelLog(p)
		change(p, &l)
		return l
	}}
}

// everywhere alters the rate only where it is a positive number, so that the limits at zero stay right.
func everywhere(change func(*creeplaw.Rate)) plainLaw {
	return changed(func(_ creeplaw.Point, r *creeplaw.Rate) {
		if r.Value > 0 && finite(r.Value) {
			change(r)
		}
	})
}

func derivativeFaults() []faulty {
	const wrong = 1 + 1e-4
	const slightlyWrong = 1 + 1e-7
	return []faulty{
		{"∂ṗ/∂σ wrong by 1e-4", "derivative by stress", everywhere(func(r *creeplaw.Rate) { r.ByStress *= wrong }), RateOnly},
		{"∂ṗ/∂p wrong by 1e-4", "derivative by strain", everywhere(func(r *creeplaw.Rate) { r.ByStrain *= wrong }), RateOnly},
		{"∂ṗ/∂T wrong by 1e-4", "derivative by temperature", everywhere(func(r *creeplaw.Rate) { r.ByTemperature *= wrong }), RateOnly},
		{"∂ṗ/∂σ wrong by 1e-7", "derivative by stress", everywhere(func(r *creeplaw.Rate) { r.ByStress *= slightlyWrong }), RateOnly},
		{"∂ṗ/∂p wrong by 1e-7", "derivative by strain", everywhere(func(r *creeplaw.Rate) { r.ByStrain *= slightlyWrong }), RateOnly},
		{"∂ṗ/∂T wrong by 1e-7", "derivative by temperature", everywhere(func(r *creeplaw.Rate) { r.ByTemperature *= slightlyWrong }), RateOnly},
		{"∂ṗ/∂T forgotten", "derivative by temperature", everywhere(func(r *creeplaw.Rate) { r.ByTemperature = 0 }), RateOnly},
		{"∂ṗ/∂σ wrong in one corner", "derivative by stress", plainLaw(wrongInOneCorner), RateOnly},
		{"∂ṗ/∂p claimed where there is none", "derivative by strain",
			plainLaw(func(p creeplaw.Point) creeplaw.Rate {
				r := softeningWithout(p)
				r.ByStrain = 1e-4 * r.Value
				return r
			}), RateOnly},
	}
}

func softeningWithout(p creeplaw.Point) creeplaw.Rate {
	return creeplaw.Rate{Value: 1e-12 * p.Stress * p.Stress, ByStress: 2e-12 * p.Stress}
}

func valueFaults() []faulty {
	swallow := func(p creeplaw.Point) creeplaw.Rate {
		if !(p.Stress > 0) {
			return creeplaw.Rate{}
		}
		return modelRate(p)
	}
	return []faulty{
		{"negative beyond a strain", "rate not negative", plainLaw(func(p creeplaw.Point) creeplaw.Rate {
			v := 1e-9 * p.Stress
			return creeplaw.Rate{Value: v * (1 - p.Strain/0.05), ByStress: 1e-9 * (1 - p.Strain/0.05), ByStrain: -v / 0.05}
		}), RateOnly},
		{"NaN inside the box", "finite in the box", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Temperature > 900 && p.Strain > 1e-3 && p.Stress > 1 {
				r.Value = math.NaN()
			}
		}), RateOnly},
		{"infinite partial derivative inside the box", "finite in the box", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Stress > 290 && p.Strain < 1e-4 {
				*r = creeplaw.Rate{Value: math.Inf(1), ByStress: math.Inf(1)}
			}
		}), RateOnly},
		{"bad stress swallowed", "NaN stress gives NaN", plainLaw(swallow), RateOnly},
	}
}

func zeroFaults() []faulty {
	return []faulty{
		{"creeps under no stress", "zero stress", plainLaw(exponential), RateOnly},
		{"creeps under any stress but none", "zero stress", plainLaw(func(p creeplaw.Point) creeplaw.Rate {
			if p.Stress == 0 {
				return creeplaw.Rate{}
			}
			return exponential(p)
		}), RateOnly},
		{"∂ṗ/∂σ formed as 0/0", "zero stress", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Stress == 0 {
				r.ByStress = stressPower * r.Value / p.Stress
			}
		}), RateOnly},
		{"∂ṗ/∂T under no stress", "zero stress", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Stress == 0 {
				r.ByTemperature = 1e-9
			}
		}), RateOnly},
		{"NaN at zero strain", "zero strain", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Strain == 0 && p.Stress > 0 {
				r.Value = math.NaN()
			}
		}), RateOnly},
		{"∂ṗ/∂p NaN at zero strain", "zero strain", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Strain == 0 && p.Stress > 0 {
				r.ByStrain = math.NaN()
			}
		}), RateOnly},
		{"finite at zero strain, boundless beside it", "zero strain", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Strain == 0 && p.Stress > 0 {
				*r = creeplaw.Rate{}
			}
		}), RateOnly},
		{"infinite at zero strain, finite beside it", "zero strain", plainLaw(func(p creeplaw.Point) creeplaw.Rate {
			r := softening(p)
			if p.Strain == 0 && p.Stress > 0 {
				r.Value = math.Inf(1)
			}
			return r
		}), RateOnly},
	}
}

// keep makes what an allocating law allocates escape to the heap.
var keep atomic.Pointer[creeplaw.Rate]

func conductFaults() []faulty {
	var calls, inside atomic.Int64
	lastBit := func(r *creeplaw.Rate) { r.Value = math.Nextafter(r.Value, math.Inf(1)) }
	return []faulty{
		{"remembers how often it was called", "same input, same bits", everywhere(func(r *creeplaw.Rate) {
			if calls.Add(1)%97 == 0 {
				lastBit(r)
			}
		}), RateOnly},
		{"disturbed by another goroutine", "same input, same bits", everywhere(func(r *creeplaw.Rate) {
			busy := inside.Add(1) > 1
			runtime.Gosched()
			if busy || inside.Load() > 1 {
				lastBit(r)
			}
			inside.Add(-1)
		}), RateOnly},
		{"allocates", "no allocation", everywhere(func(r *creeplaw.Rate) { keep.Store(&creeplaw.Rate{Value: r.Value}) }), RateOnly},
		{"allocates in one corner", "no allocation", changed(func(p creeplaw.Point, r *creeplaw.Rate) {
			if p.Stress >= 300 && p.Temperature >= 950 {
				keep.Store(&creeplaw.Rate{Value: r.Value})
			}
		}), RateOnly},
		{"LogRate allocates", "no allocation", logLaw{modelRate, func(p creeplaw.Point) creeplaw.LogRate {
			keep.Store(&creeplaw.Rate{})
			return modelLog(p)
		}}, Logarithmic},
	}
}

func capabilityFaults() []faulty {
	tiny := func(p creeplaw.Point) bool { return p.Stress > 0 && p.Stress < 1e-6 }
	return []faulty{
		{"no LogRate", "claimed capability", plainLaw(modelRate), Logarithmic},
		{"LogRate of another signature", "claimed capability", driftedLaw{modelRate}, Logarithmic},
		{"no CheckPoint", "claimed capability", logLaw{modelRate, modelLog}, Logarithmic | Explainer},
		{"LogRate off by 1e-10", "logarithm of the rate",
			changedLog(func(_ creeplaw.Point, l *creeplaw.LogRate) { l.Value *= 1 + 1e-10 }), Logarithmic},
		{"LogRate off by 1e-10, not claimed", "logarithm of the rate",
			changedLog(func(_ creeplaw.Point, l *creeplaw.LogRate) { l.Value *= 1 + 1e-10 }), RateOnly},
		{"exponent of stress wrong where only logarithms live", "log exponent of stress",
			changedLog(func(p creeplaw.Point, l *creeplaw.LogRate) {
				if tiny(p) {
					l.ByLogStress *= 1 + 1e-4
				}
			}), Logarithmic},
		{"exponent of strain wrong", "log exponent of strain",
			changedLog(func(_ creeplaw.Point, l *creeplaw.LogRate) { l.ByLogStrain *= 1 + 1e-4 }), Logarithmic},
		{"exponent of temperature wrong", "log exponent of temperature",
			changedLog(func(_ creeplaw.Point, l *creeplaw.LogRate) { l.ByLogTemperature *= 1 + 1e-4 }), Logarithmic},
		{"LogRate finite at zero stress", "logarithm at zero", changedLog(func(_ creeplaw.Point, l *creeplaw.LogRate) {
			if math.IsInf(l.Value, -1) {
				l.Value = -745
			}
		}), Logarithmic},
		{"an exponent NaN at zero strain", "logarithm at zero", changedLog(func(p creeplaw.Point, l *creeplaw.LogRate) {
			if p.Strain == 0 {
				l.ByLogStrain = math.NaN()
			}
		}), Logarithmic},
		{"explains a good point", "explains what is undefined", explainingLaw{edged, func(p creeplaw.Point) error {
			if p.Stress > 250 && p.Temperature > 900 {
				return assert.AnError
			}
			return modelCheck(p)
		}}, Explainer},
		{"does not explain a bad one", "explains what is undefined", explainingLaw{edged, func(p creeplaw.Point) error {
			if p.Temperature > 2*edge {
				return nil
			}
			return modelCheck(p)
		}}, Explainer},
	}
}

func TestEveryPlantedFaultIsCaughtUnderItsRule(t *testing.T) {
	caught := map[string]bool{}
	for _, faults := range [][]faulty{derivativeFaults(), valueFaults(), zeroFaults(), conductFaults(), capabilityFaults(), evolvingFaults(), parametricFaults()} {
		for _, f := range faults {
			t.Run(f.fault, func(t *testing.T) {
				var r recorder
				box := modelBox(f.claim)
				box.Points = 250 // a fault in one place sits in a corner, which is always looked at
				if _, ok := f.law.(creeplaw.Evolving); ok {
					box.Points, box.Internal = 50, modelInternal
				}
				Run(&r, f.law, box)
				assert.Equal(t, []string{f.rule}, r.rules(), "%q", r.failures)
				caught[f.rule] = true
			})
		}
	}
	for _, r := range rules {
		assert.True(t, caught[r.name], "no planted fault shows that the rule %q can fail", r.name)
	}
}

// Differences of a rate with an error of 1e-6 in it cannot resolve 1e-8: the rule then has too little to go by, which is a
// failure too.
func TestTooRoughForDifferences(t *testing.T) {
	rough := plainLaw(func(p creeplaw.Point) creeplaw.Rate {
		scatter := math.Float64bits(p.Stress) * 0x9e3779b97f4a7c15 >> 11
		f := 1 + 1e-6*math.Ldexp(float64(scatter), -53)
		return creeplaw.Rate{Value: f * p.Stress * p.Stress, ByStress: 2 * f * p.Stress}
	})
	var r recorder
	Run(&r, rough, modelBox(RateOnly))
	assert.Equal(t, []string{"derivative by stress"}, r.rules(), "%q", r.failures)
	assert.Contains(t, strings.Join(r.failures, ""), "0 checks, fewer than the 806 due (seed 7): differences of the rate cannot")
}

// A logarithm taken of the plain rate leaves its range together with it; the wide range of stress shows that.
func TestLogarithmOfThePlainRateIsNotEnough(t *testing.T) {
	steep := plainLaw(func(p creeplaw.Point) creeplaw.Rate {
		v := math.Pow(p.Stress/100, 40)
		return creeplaw.Rate{Value: v, ByStress: 40 * v / math.Max(p.Stress, 0x1p-1000)}
	})
	lazy := logLaw{steep, creeplaw.Log(creeplaw.RateFunc(steep)).LogRate}
	var r recorder
	Run(&r, lazy, modelBox(Logarithmic))
	assert.Equal(t, []string{"log exponent of stress", "log exponent of strain", "log exponent of temperature"}, r.rules(),
		"%q", r.failures)

	box := modelBox(Logarithmic)
	box.LogStress = box.Stress
	Run(t, lazy, box) // where the plain rate is a number, it is enough
}

// A declaration that the law creeps under no stress must be true.
func TestFalseDeclaration(t *testing.T) {
	box := modelBox(RateOnly)
	box.CreepsAtZeroStress = true
	var r recorder
	Run(&r, plainLaw(modelRate), box)
	assert.Equal(t, []string{"zero stress"}, r.rules())
}
