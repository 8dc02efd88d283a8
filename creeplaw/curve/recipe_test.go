package curve_test

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// recipes are the catalogue and curves of every coefficient and every term, with numbers whose bits no working number gives
// back by chance.
func recipes() []entry {
	each := must(curve.NewSum(
		curve.PowerOfTime(curve.Product{curve.Power{Prefactor: 1.3e-9, Exponent: 2.3}, curve.Constant(1.7)}, 0.31),
		curve.Saturating(curve.InversePower{Prefactor: 1.3e-2, Exponent: 1.3}, curve.Exponential{Prefactor: 1.7e-3,
			StressCoefficient: -0.0031}),
		curve.Growing(curve.PowerAt{Value: 1.3e-4, Stress: 151, Exponent: 2.7}, curve.LogBilinear{Intercept: -31.7,
			ByStress: 0.021, ByTemperature: 0.017, ByProduct: 1.3e-6}),
		curve.LogOfTime(curve.Soderberg{Prefactor: 1.3e-5, StressCoefficient: 0.013}, hot(curve.Constant(0.0137))),
		curve.Hyperbolic(curve.Sinh{Prefactor: 1.3e-5, StressCoefficient: 0.013, Exponent: 1.7},
			curve.RateOf{Law: must(creeplaw.NewNorton(1.3e-12, 4.3))})))
	factors := curve.Product{curve.RateOf{Law: must(creeplaw.NewNorton(1.3e-12, 4.3))}, curve.Constant(2003)}
	cold := must(curve.NewGrahamWalles(curve.GrahamWallesTerm{Prefactor: 1.3e-12, StressExponent: 4.1, TimeExponent: 0.33},
		curve.GrahamWallesTerm{Prefactor: 1.7e-1, StressExponent: 5.1, TimeExponent: 1, ActivationEnergy: 213e3}))
	plain := must(curve.NewFindley(curve.FindleyParameters{Creep: 0.000083, CreepStress: 163, TimeExponent: 0.307}))
	return append(catalogue(), entry{name: "every term", curve: each}, entry{name: "Graham–Walles, cold", curve: cold},
		entry{name: "Findley, creep only", curve: plain},
		entry{name: "proportional to a rate", curve: must(curve.NewLogarithmicCreep(powerAt(1.3e-4, 2.1), factors))})
}

func lawOf(e entry) curve.StrainHardened { return must(curve.NewStrainHardened(e.curve)) }

func valuesOf(ps []creeplaw.Parameter) []float64 {
	values := make([]float64, len(ps))
	for i, p := range ps {
		values[i] = p.Value
	}
	return values
}

func anywhere(r *rand.Rand) creeplaw.Point {
	return creeplaw.Point{Stress: 20 + 200*r.Float64(), Strain: math.Pow(10, -2-4*r.Float64()), Temperature: 800 + 100*r.Float64()}
}

// A curve made again from its recipe is the same to the bit, and so is the law made from it.
func TestCurveMadeFromItsRecipeIsTheSame(t *testing.T) {
	const seed = 51
	for _, e := range recipes() {
		recipe, ok := curve.RecipeOf(e.curve)
		require.True(t, ok, e.name)
		parameters := recipe.Parameters()
		require.NotEmpty(t, parameters, e.name)
		names := map[string]bool{}
		for _, p := range parameters {
			assert.False(t, names[p.Name], "%s has two parameters named %s", e.name, p.Name)
			names[p.Name] = true
			assert.True(t, p.Value >= p.Low && p.Value <= p.High, "%s: %+v", e.name, p)
		}
		again, err := recipe.Make()
		require.NoError(t, err, e.name)
		assert.IsType(t, e.curve, again, e.name)
		law := lawOf(e)
		rebuilt, err := law.WithParameters(valuesOf(parameters))
		require.NoError(t, err, e.name)
		assert.Equal(t, parameters, rebuilt.(curve.StrainHardened).Parameters(), e.name)
		r := rand.New(rand.NewPCG(seed, 0))
		for range 50 {
			p := anywhere(r)
			at := curve.Point{Stress: p.Stress, Temperature: p.Temperature, Time: 1e4 * p.Strain}
			assert.Equal(t, e.curve.At(at), again.At(at), "%s at %+v, seed %d", e.name, at, seed)
			assert.Equal(t, law.LogRate(p), rebuilt.(curve.StrainHardened).LogRate(p), "%s at %+v, seed %d", e.name, p, seed)
		}
	}
	f, ok := curve.RecipeOf(must(curve.NewFindley(curve.FindleyParameters{Creep: 0.00008, CreepStress: 163, TimeExponent: 0.305,
		Instantaneous: 0.00833, InstantaneousStress: 464})))
	require.True(t, ok)
	again, err := f.Make()
	require.NoError(t, err)
	check.Rel(t, "instantaneous strain", again.(curve.Findley).Instantaneous(464), 0.00833*math.Sinh(1), 1e-14)
}

// Every number counts.
func TestEveryParameterOfACurveCounts(t *testing.T) {
	for _, e := range recipes() {
		law := lawOf(e)
		for i, p := range law.Parameters() {
			values := valuesOf(law.Parameters())
			values[i] /= 4 // the place of a break in time shows only if it moves far
			if values[i] == 0 {
				values[i] = 1.0 / 64
			}
			other, err := law.WithParameters(values)
			require.NoError(t, err, "%s, %s", e.name, p.Name)
			if p.Name == "instantaneous strain" || p.Name == "instantaneous stress" {
				f := other.(curve.StrainHardened).Curve().(curve.Findley)
				assert.NotEqual(t, e.curve.(curve.Findley).Instantaneous(100), f.Instantaneous(100), p.Name)
				continue
			}
			assert.True(t, differ(law, other), "%s does not depend on its %s", e.name, p.Name)
		}
	}
}

func differ(a, b creeplaw.Law) bool {
	r := rand.New(rand.NewPCG(7, 7))
	for range 300 {
		p := anywhere(r)
		p.Strain *= math.Pow(10, 4*r.Float64()) // beyond the first of two regimes
		if a.Rate(p) != b.Rate(p) {
			return true
		}
	}
	return false
}

// Numbers taken to other units by their dimensions give the rate that creeplaw.InUnits gives, whose numbers stay as they are.
func TestDimensionsOfCurveParameters(t *testing.T) {
	const seed = 53
	own := creeplaw.Units{Stress: 1, Time: 1}
	wanted := creeplaw.Units{Stress: 1.0 / 16, Time: 8}
	for _, e := range recipes() {
		law := lawOf(e)
		values := valuesOf(law.Parameters())
		for i, p := range law.Parameters() {
			factor := math.Pow(16, p.Dimension.Stress) * math.Pow(1.0/8, p.Dimension.Time)
			switch p.Scale {
			case creeplaw.Proportional:
				values[i] *= factor
			case creeplaw.LogarithmOf:
				values[i] += math.Log(factor)
			case creeplaw.FixedUnits:
				t.Errorf("%s: %s is in units of its own", e.name, p.Name)
			}
		}
		scaled, err := law.WithParameters(values)
		require.NoError(t, err, e.name)
		reference := must(creeplaw.InUnits(law, own, wanted))
		r := rand.New(rand.NewPCG(seed, 0))
		for range 50 {
			p := anywhere(r)
			p.Stress *= 16
			got, want := scaled.(creeplaw.Logarithmic).LogRate(p), reference.LogRate(p)
			if math.IsInf(want.Value, -1) {
				assert.True(t, math.IsInf(got.Value, -1), e.name)
				continue
			}
			// Powers, logarithms and the search for the pseudo-time are rounded; near its end a saturating curve magnifies that.
			tolerance := 1e-12 * (1 + math.Abs(want.ByLogStrain) + math.Abs(want.ByLogStress) + math.Abs(want.ByLogTemperature))
			check.Abs(t, fmt.Sprintf("%s at %+v, seed %d", e.name, p, seed), got.Value, want.Value, tolerance)
		}
	}
}

func TestParametersOfCurvesOutOfBounds(t *testing.T) {
	refusals := 0
	for _, e := range recipes() {
		law := lawOf(e)
		for i, p := range law.Parameters() {
			outside := []float64{math.NaN(), math.Inf(1), math.Inf(-1)}
			if !math.IsInf(p.Low, 0) {
				outside = append(outside, p.Low-1)
			}
			if !math.IsInf(p.High, 0) {
				outside = append(outside, p.High+1e-9)
			}
			for _, x := range outside {
				values := valuesOf(law.Parameters())
				values[i] = x
				other, err := law.WithParameters(values)
				var bad *creeplaw.ParameterError
				if assert.True(t, errors.As(err, &bad), "%s, %s = %v: %v", e.name, p.Name, x, err) {
					assert.Equal(t, p.Name, bad.Parameter, e.name)
					assert.Equal(t, math.Float64bits(x), math.Float64bits(bad.Value), "%s, %s", e.name, p.Name)
				}
				assert.Nil(t, other, "%s: no law is made", e.name)
				refusals++
			}
		}
		values := valuesOf(law.Parameters())
		for _, wrong := range [][]float64{nil, values[:len(values)-1], append(values, 1)} {
			_, err := law.WithParameters(wrong)
			var bad *creeplaw.ParameterError
			if assert.True(t, errors.As(err, &bad), "%s: %v", e.name, err) {
				assert.Equal(t, "number of values", bad.Parameter)
			}
		}
	}
	assert.Greater(t, refusals, 300)
}

// A recipe that lacks something says what.
func TestIncompleteRecipes(t *testing.T) {
	for _, e := range recipes() {
		recipe, _ := curve.RecipeOf(e.curve)
		lacking := func(r curve.Recipe, part string) {
			_, err := r.Make()
			var missing *creeplaw.MissingError
			if assert.True(t, errors.As(err, &missing), "%s without its %s: %v", e.name, part, err) {
				assert.Equal(t, part, missing.Part, e.name)
			}
		}
		for i, n := range recipe.Numbers {
			if n.Name == "instantaneous strain" {
				break // may be left out
			}
			less := recipe
			less.Numbers = append(append([]creeplaw.Parameter(nil), recipe.Numbers[:i]...), recipe.Numbers[i+1:]...)
			lacking(less, n.Name)
		}
		for i, c := range recipe.Coefficients {
			if c.Name == "end of primary creep" {
				continue
			}
			less := recipe
			less.Coefficients = append(append([]curve.Ingredient(nil), recipe.Coefficients[:i]...), recipe.Coefficients[i+1:]...)
			lacking(less, c.Name)
		}
	}
	_, ok := curve.RecipeOf(curve.Func(func(curve.Point) curve.Strain { return curve.Strain{} }))
	assert.False(t, ok, "a function has no recipe")
	_, err := curve.Recipe{Curve: "some other"}.Make()
	assert.EqualError(t, err, "creeplaw: some other: the kind of curve is missing")
	for _, zero := range []curve.Curve{curve.Findley{}, curve.TwoRegime{}, curve.Sum{}, curve.BaileyNorton{}, curve.McVetty{},
		curve.PrimarySecondary{}, curve.GrahamWalles{}, curve.Andrade{}} {
		_, ok := curve.RecipeOf(zero)
		assert.False(t, ok, "%T", zero)
	}
}

// With a user's function in it a curve works in the units it was written for: no number of it changes with the units.
func TestAUsersCoefficientTiesACurveToUnits(t *testing.T) {
	for name, c := range map[string]curve.Coefficient{"alone": ownCoefficient{}, "in a product": curve.Product{curve.Constant(2),
		ownCoefficient{}}, "activated": hot(ownCoefficient{}), "a law": curve.RateOf{Law: creeplaw.ValueFunc(func(creeplaw.Point) float64 {
		return 1
	})}} {
		law := must(curve.NewStrainHardened(must(curve.NewAndrade(powerAt(1e-4, 4), c))))
		parameters := law.Parameters()
		require.GreaterOrEqual(t, len(parameters), 3, name)
		for _, p := range parameters {
			assert.True(t, p.Scale == creeplaw.FixedUnits || p.Scale == creeplaw.OnTemperatureScale, "%s: %s", name, p.Name)
		}
		again, err := law.WithParameters(valuesOf(parameters))
		require.NoError(t, err, name)
		p := creeplaw.Point{Stress: 150, Strain: 1e-3, Temperature: 873}
		assert.Equal(t, law.Rate(p), again.Rate(p), name)
	}
}
