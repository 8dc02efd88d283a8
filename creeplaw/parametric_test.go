package creeplaw_test

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
)

// parametricLaws is every kind of law, in every form of its constructors, with invented numbers whose bits no working number
// gives back by chance.
func parametricLaws() map[string]creeplaw.Law {
	arrhenius := made(creeplaw.NewArrheniusAt(312.7e3, 811.3))
	norton := made(creeplaw.NewNorton(1.37e-17, 5.3))
	lattice := creeplaw.Diffusivity{Prefactor: 1.93e-4, ActivationEnergy: 284.7e3}
	other := creeplaw.Diffusivity{Prefactor: 3.57e-15, ActivationEnergy: 115.9e3}
	dislocation := creeplaw.DislocationCreep{Prefactor: 3.1e6, StressExponent: 4.63, BurgersVector: 2.49e-10, Lattice: lattice,
		Modulus: creeplaw.ShearModulus{Value: 78.93e9, Reference: 300.7, Slope: -29.3e6}}
	withCore := dislocation
	withCore.Core = creeplaw.Diffusivity{Prefactor: 3.17e-23, ActivationEnergy: 170.3e3}
	withGrain := withCore
	withGrain.GrainExponent, withGrain.GrainSize = 1.7, 53e-6
	damage := creeplaw.KachanovRabotnovParameters{Prefactor: 1.3e-17, StressExponent: 5.3, DamagePrefactor: 1.7e-13,
		DamageStressExponent: 4.1, DamageExponent: 6.1}
	referred := creeplaw.KachanovRabotnovParameters{Prefactor: 1.3e-6, StressExponent: 5.3, DamagePrefactor: 1.7e-5,
		DamageStressExponent: 4.1, DamageExponent: 6.1, ReferenceStress: 101.3,
		RuptureStress:    creeplaw.RuptureStress{Principal: 0.71, Mean: 0.13},
		CreepTemperature: arrhenius, DamageTemperature: made(creeplaw.NewArrhenius(213.1e3))}
	cavitation := creeplaw.CavitationParameters{Prefactor: 2.1e-9, StressCoefficient: 0.131, Hardening: 1.2e4,
		HardeningSaturation: 0.57, Ageing: 9.3e-5, Cavitation: 1.9, TriaxialityExponent: 2.8, RuptureCavitation: 0.33}
	cold := cavitation
	cold.CreepTemperature, cold.AgeingTemperature = arrhenius, arrhenius
	table := made(creeplaw.NewFactorTable([]float64{500.3, 811.1, 1400.7}, []float64{0.013, 1.07, 91.3},
		creeplaw.TableOptions{Outside: creeplaw.Extrapolated}))
	return map[string]creeplaw.Law{
		"Norton":             norton,
		"Norton at":          made(creeplaw.NewNortonAt(1.7e-6, 103, 5.3)),
		"double power":       made(creeplaw.NewDoublePower(1.3e-11, 2.7, 1.1e-29, 11.3)),
		"double power at":    made(creeplaw.NewDoublePowerAt(1.3e-7, 91.7, 2.7, 11.3)),
		"Garofalo":           made(creeplaw.NewGarofalo(1.7e-9, 0.053, 3.1)),
		"exponential":        made(creeplaw.NewExponential(1.7e-9, 23.3)),
		"Soderberg":          made(creeplaw.NewSoderberg(1.7e-9, 23.3)),
		"power exponential":  made(creeplaw.NewPowerExponential(2.3e-17, 5.1, 1/0.038)),
		"diffusional":        made(creeplaw.NewDiffusional(1.09e-29, 53e-6, lattice, other)),
		"Nabarro–Herring":    made(creeplaw.NewNabarroHerring(1.09e-29, 53e-6, lattice)),
		"Coble":              made(creeplaw.NewCoble(1.09e-29, 53e-6, other)),
		"dislocation":        made(creeplaw.NewMukherjeeBirdDorn(dislocation)),
		"with core":          made(creeplaw.NewMukherjeeBirdDorn(withCore)),
		"with grain":         made(creeplaw.NewMukherjeeBirdDorn(withGrain)),
		"Darveaux–Banerji":   made(creeplaw.NewDarveauxBanerji(solder())),
		"Bailey–Norton":      made(creeplaw.NewBaileyNorton(1.3e-15, 4.7, 0.41)),
		"Bailey–Norton at":   made(creeplaw.NewBaileyNortonAt(1.3e-3, 103, 97, 4.7, 0.41)),
		"hardening":          made(creeplaw.NewStrainHardening(1.3e-18, 4.3, -1.47)),
		"hardening at":       made(creeplaw.NewStrainHardeningAt(1.3e-6, 103, 1.1e-3, 4.3, -1.47)),
		"Anand":              made(creeplaw.NewAnand(solderUnified())),
		"Kachanov–Rabotnov":  made(creeplaw.NewKachanovRabotnov(damage)),
		"Kachanov, referred": made(creeplaw.NewKachanovRabotnov(referred)),
		"Liu–Murakami":       made(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters(damage))),
		"Liu, referred":      made(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters(referred))),
		"Perrin–Hayhurst":    made(creeplaw.NewPerrinHayhurst(cavitation)),
		"Perrin, cold":       made(creeplaw.NewPerrinHayhurst(cold)),
		"Kowalewski":         made(creeplaw.NewKowalewskiHayhurstDyson(cavitation)),
		"Omega":              made(creeplaw.NewOmega(made(creeplaw.WithTemperature(norton, arrhenius)), 31.7)),
		"Omega, polynomials": made(creeplaw.NewOmegaFromPolynomials(polynomials())),
		"sum":                made(creeplaw.NewSum(norton, made(creeplaw.WithTemperature(norton, arrhenius)))),
		"series":             made(creeplaw.NewSeries(norton, made(creeplaw.NewGarofalo(1.7e-9, 0.053, 3.1)))),
		"threshold":          made(creeplaw.WithThreshold(norton, 23.7)),
		"Arrhenius":          made(creeplaw.WithTemperature(norton, made(creeplaw.NewArrhenius(271.3e3)))),
		"two branches": made(creeplaw.WithTemperature(norton, made(creeplaw.NewTwoArrhenius(
			creeplaw.ArrheniusBranch{Prefactor: 4.1e5, ActivationEnergy: 61e3},
			creeplaw.ArrheniusBranch{Prefactor: 6.3e28, ActivationEnergy: 181e3}, 807.3)))),
		"two branches at":  made(creeplaw.WithTemperature(norton, made(creeplaw.NewTwoArrheniusAt(61e3, 183e3, 807.3)))),
		"table of factors": made(creeplaw.WithTemperature(norton, table)),
		"tabulated": made(creeplaw.NewTabulated([]float64{501.7, 1403.1}, []creeplaw.Law{norton,
			made(creeplaw.NewNortonAt(3.1e-3, 97, 4.7))}, creeplaw.TableOptions{Against: creeplaw.PlainTemperature})),
		"in other units": made(creeplaw.InUnits(norton, creeplaw.Units{Stress: creeplaw.KilopoundPerSquareInch,
			Time: creeplaw.Hour}, creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Day})),
	}
}

func solder() creeplaw.ModulusSinh {
	return creeplaw.ModulusSinh{Prefactor: 9.263, Exponent: 3.31, ActivationEnergy: 52.9e3,
		Modulus:     creeplaw.ShearModulus{Value: 7085, Reference: 301.1, Slope: -1.013},
		StressScale: creeplaw.ShearModulus{Value: 37.81, Reference: 299.3, Slope: -0.00744}}
}

func solderUnified() creeplaw.AnandParameters {
	return creeplaw.AnandParameters{InitialResistance: 12.41, ActivationEnergy: 78.3e3, Prefactor: 4.1e6, StressMultiplier: 1.53,
		RateSensitivity: 0.303, Hardening: 1379.3, SaturationCoefficient: 13.79, SaturationExponent: 0.071,
		HardeningExponent: 1.31}
}

// polynomials are invented, of the size of those for low-alloy steels.
func polynomials() creeplaw.OmegaPolynomials {
	return creeplaw.OmegaPolynomials{Rate: [5]float64{-21.3, 50100, -3913, 217, -1013},
		Acceleration: [5]float64{-1.7, 7013, -1513, 113, -51}, Stress: [2]float64{1.3, 39.7},
		Temperature: [2]float64{600.3, 1200.7}}
}

// somewhere draws a point; the seed is a parameter so that a failure can name it.
func somewhere(r *rand.Rand) creeplaw.Point {
	return creeplaw.Point{Stress: math.Exp(math.Log(400) * r.Float64()), Strain: math.Pow(10, -1-5*r.Float64()),
		Temperature: 520 + 800*r.Float64()}
}

// evolveAt is the evolution of a law with internal variables, moved off their initial values.
func evolveAt(law creeplaw.Evolving, p creeplaw.Point) creeplaw.Evolution {
	var internal [creeplaw.MaxVariables]float64
	for i, v := range law.Variables() {
		internal[i] = v.Initial + 0.1*(math.Max(v.Initial, math.Min(v.Limit, 1))-v.Initial)
	}
	return law.Evolve(creeplaw.InTension(p, internal))
}

func valuesOf(ps []creeplaw.Parameter) []float64 {
	values := make([]float64, len(ps))
	for i, p := range ps {
		values[i] = p.Value
	}
	return values
}

// A law rebuilt from its own parameters is the same law to the bit, and has the same parameters.
func TestRebuiltFromItsParametersALawIsTheSame(t *testing.T) {
	const seed = 41
	for name, law := range parametricLaws() {
		p, ok := law.(creeplaw.Parametric)
		require.True(t, ok, name)
		parameters := p.Parameters()
		require.NotEmpty(t, parameters, name)
		again, err := p.WithParameters(valuesOf(parameters))
		require.NoError(t, err, name)
		assert.IsType(t, law, again, name)
		assert.Equal(t, parameters, again.(creeplaw.Parametric).Parameters(), name)
		r := rand.New(rand.NewPCG(seed, 0))
		for range 50 {
			at := somewhere(r)
			assert.Equal(t, bitsOf(law, at), bitsOf(again, at), "%s at %+v, seed %d", name, at, seed)
			if e, ok := law.(creeplaw.Evolving); ok {
				assert.Equal(t, evolveAt(e, at), evolveAt(again.(creeplaw.Evolving), at), "%s at %+v, seed %d", name, at, seed)
			}
		}
		names := map[string]bool{}
		for _, q := range parameters {
			assert.False(t, names[q.Name], "%s has two parameters named %s", name, q.Name)
			names[q.Name] = true
			assert.True(t, q.Value >= q.Low && q.Value <= q.High, "%s: %+v", name, q)
		}
	}
}

func bitsOf(law creeplaw.Law, p creeplaw.Point) [2]uint64 {
	return [2]uint64{math.Float64bits(creeplaw.Log(law).LogRate(p).Value), math.Float64bits(law.Rate(p).Value)}
}

// Each parameter counts: another value gives another law. This finds arguments that a constructor's form has mixed up.
func TestEveryParameterCounts(t *testing.T) {
	for name, law := range parametricLaws() {
		p := law.(creeplaw.Parametric)
		for i, q := range p.Parameters() {
			values := valuesOf(p.Parameters())
			values[i] *= 1 - 1.0/64
			if values[i] == 0 {
				values[i] = 1.0 / 64
			}
			other, err := p.WithParameters(values)
			require.NoError(t, err, "%s, %s", name, q.Name)
			assert.Equal(t, math.Float64bits(values[i]), math.Float64bits(other.(creeplaw.Parametric).Parameters()[i].Value))
			assert.True(t, differ(law, other), "%s does not depend on its %s", name, q.Name)
		}
	}
}

func differ(a, b creeplaw.Law) bool {
	r := rand.New(rand.NewPCG(7, 7))
	for range 1000 {
		at := somewhere(r)
		if bitsOf(a, at) != bitsOf(b, at) {
			return true
		}
		e, ok := a.(creeplaw.Evolving)
		if !ok {
			continue
		}
		f := b.(creeplaw.Evolving)
		if evolveAt(e, at) != evolveAt(f, at) || fmt.Sprint(e.Variables()) != fmt.Sprint(f.Variables()) {
			return true
		}
		off := creeplaw.InTension(at, [creeplaw.MaxVariables]float64{0.1})
		off.PrincipalStress *= 0.7 // out of tension the shares in the rupture stress show
		if e.Evolve(off) != f.Evolve(off) {
			return true
		}
	}
	return false
}

// What lies outside the bounds a parameter states is refused, under the name the parameter has.
func TestParametersOutOfBoundsAreRefusedByName(t *testing.T) {
	refusals := 0
	for name, law := range parametricLaws() {
		p := law.(creeplaw.Parametric)
		for i, q := range p.Parameters() {
			outside := []float64{math.NaN(), math.Inf(1), math.Inf(-1)}
			if !math.IsInf(q.Low, 0) {
				outside = append(outside, q.Low-1e-9*(1+math.Abs(q.Low)))
			}
			if !math.IsInf(q.High, 0) {
				outside = append(outside, q.High+1e-9*(1+math.Abs(q.High)))
			}
			for _, x := range outside {
				values := valuesOf(p.Parameters())
				values[i] = x
				other, err := p.WithParameters(values)
				var bad *creeplaw.ParameterError
				if assert.True(t, errors.As(err, &bad), "%s, %s = %v: %v", name, q.Name, x, err) {
					assert.Equal(t, q.Name, nameIn(bad, q.Name), name)
					assert.Equal(t, math.Float64bits(x), math.Float64bits(bad.Value), "%s, %s", name, q.Name)
				}
				assert.Nil(t, other, "%s: no law is made", name)
				refusals++
			}
		}
	}
	assert.Greater(t, refusals, 500)
}

// nameIn is the name an error gives; tables do not number their rows.
func nameIn(e *creeplaw.ParameterError, of string) string {
	var n int
	if k, _ := fmt.Sscanf(of, e.Parameter+" %d", &n); k == 1 {
		return of
	}
	for _, table := range []string{"temperature factor: temperature", "temperature factor: factor"} {
		if k, _ := fmt.Sscanf(of, table+" %d", &n); k == 1 && e.Parameter == table {
			return of
		}
	}
	return e.Parameter
}

func TestAWrongNumberOfValuesIsRefused(t *testing.T) {
	for name, law := range parametricLaws() {
		p := law.(creeplaw.Parametric)
		values := valuesOf(p.Parameters())
		for _, v := range [][]float64{nil, values[:len(values)-1], append(values, 1)} {
			_, err := p.WithParameters(v)
			var bad *creeplaw.ParameterError
			if assert.True(t, errors.As(err, &bad), "%s: %v", name, err) {
				assert.Equal(t, "number of values", bad.Parameter, name)
			}
		}
	}
	// Zero values were not built: they have no parameters.
	for _, law := range []creeplaw.Parametric{creeplaw.Norton{}, creeplaw.Garofalo{}, creeplaw.KachanovRabotnov{},
		creeplaw.LiuMurakami{}, creeplaw.PerrinHayhurst{}, creeplaw.KowalewskiHayhurstDyson{}, creeplaw.Anand{},
		creeplaw.Omega{}, creeplaw.Sum{}, creeplaw.Series{}, creeplaw.Thermal{}, creeplaw.Tabulated{}, creeplaw.Converted{}} {
		assert.Empty(t, law.Parameters(), "%T", law)
		_, err := law.WithParameters([]float64{1})
		assert.Error(t, err, "%T", law)
	}
}

// The dimensions are right: numbers taken to other units by them give the rate that the law itself, taken there by InUnits,
// gives. Units a power of two apart keep the arithmetic of the reference exact.
func TestDimensionsOfParameters(t *testing.T) {
	const seed = 43
	own := creeplaw.Units{Stress: 1, Time: 1}
	wanted := creeplaw.Units{Stress: 1.0 / 16, Time: 8}
	for name, law := range parametricLaws() {
		if u, bound := law.(creeplaw.UnitBound); bound && u.OwnUnits() != (creeplaw.Units{}) || name == "in other units" {
			for _, q := range law.(creeplaw.Parametric).Parameters() {
				assert.True(t, q.Scale == creeplaw.FixedUnits || q.Scale == creeplaw.OnTemperatureScale, "%s, %s", name, q.Name)
			}
			continue
		}
		p := law.(creeplaw.Parametric)
		values := valuesOf(p.Parameters())
		for i, q := range p.Parameters() {
			values[i] *= math.Pow(16, q.Dimension.Stress) * math.Pow(1.0/8, q.Dimension.Time)
		}
		scaled, err := p.WithParameters(values)
		require.NoError(t, err, name)
		r := rand.New(rand.NewPCG(seed, 0))
		for range 50 {
			at := somewhere(r)
			e, ok := law.(creeplaw.Evolving)
			there := at
			there.Stress *= 16
			if !ok {
				reference := made(creeplaw.InUnits(law, own, wanted)).LogRate(there)
				// The powers of 16 and the logarithms of prefactors down to 1e-29 are rounded, to some 1e-14 of a logarithm of 70.
				label := fmt.Sprintf("%s at %+v, seed %d", name, at, seed)
				check.Abs(t, label, creeplaw.Log(scaled).LogRate(there).Value, reference.Value, 1e-12)
				continue
			}
			sameEvolution(t, fmt.Sprintf("%s at %+v, seed %d", name, at, seed), e, scaled.(creeplaw.Evolving), at, there)
		}
	}
}

// sameEvolution holds a law whose unit of stress is 16 times smaller and of time 8 times larger to the law it came from.
func sameEvolution(t *testing.T, label string, law, scaled creeplaw.Evolving, at, there creeplaw.Point) {
	a, b := evolveAt(law, at), evolveAt(scaled, there)
	check.Abs(t, label, b.LogRate, a.LogRate+math.Log(8), 1e-12)
	for i, v := range law.Variables() {
		unit := 1.0
		if v.Name == "deformation resistance" {
			unit = 16
		}
		x, y := a.Internal[i], b.Internal[i]
		check.Rel(t, label+", "+v.Name, y.Value*math.Exp(y.LogScale-x.LogScale), 8*unit*x.Value, 1e-12)
	}
}

// Parts that have no parameters stay as they are.
func TestAPartWithoutParametersIsKept(t *testing.T) {
	own := creeplaw.RateFunc(square)
	law := made(creeplaw.NewSum(own, made(creeplaw.NewNorton(1e-15, 5))))
	parameters := law.Parameters()
	require.Len(t, parameters, 2)
	assert.Equal(t, "law 2: prefactor", parameters[0].Name)
	for _, p := range parameters { // the function works in the units it was written for
		assert.Equal(t, creeplaw.FixedUnits, p.Scale, p.Name)
	}
	other, err := law.WithParameters([]float64{2e-15, 5})
	require.NoError(t, err)
	check.Rel(t, "x² and twice the other", other.Rate(at(10)).Value, own.Rate(at(10)).Value+2e-10, 1e-15)
}
