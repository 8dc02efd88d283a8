package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

// nickelLike is a metal with invented numbers of the size of nickel's.
func nickelLike() creeplaw.DislocationCreep {
	return creeplaw.DislocationCreep{
		Prefactor: 2e6, StressExponent: 4.5, BurgersVector: 2.5e-10,
		Modulus: creeplaw.ShearModulus{Value: 8e10, Reference: 300, Slope: -3e7},
		Lattice: creeplaw.Diffusivity{Prefactor: 2e-4, ActivationEnergy: 2.8e5},
		Core:    creeplaw.Diffusivity{Prefactor: 3e-23, ActivationEnergy: 1.7e5},
	}
}

func TestMukherjeeBirdDornIsItsFormula(t *testing.T) {
	c := nickelLike()
	c.GrainSize, c.GrainExponent = 2e-5, 1.4
	law := must(creeplaw.NewMukherjeeBirdDorn(c))
	const boltzmann, gas = 1.380649e-23, 8.314462618
	for _, temperature := range []float64{400, 800, 1300} {
		for _, s := range []float64{1e3, 1e6, 1e8, 3e9} {
			// Written out as in Frost and Ashby 1982 with (b/d)^q after Mukherjee, Bird and Dorn 1969.
			mu := 8e10 - 3e7*(temperature-300)
			lattice, core := 2e-4*math.Exp(-2.8e5/gas/temperature), 3e-23*math.Exp(-1.7e5/gas/temperature)
			shear := s / math.Sqrt(3) / mu
			effective := lattice * (1 + 10*core/(2.5e-10*2.5e-10*lattice)*shear*shear)
			want := 2e6 * effective * mu * 2.5e-10 / (boltzmann * temperature) * math.Pow(s/mu, 4.5) * math.Pow(2.5e-10/2e-5, 1.4)
			p := creeplaw.Point{Stress: s, Strain: 0.01, Temperature: temperature}
			check.Rel(t, fmt.Sprintf("%v Pa, %v K", s, temperature), law.Rate(p).Value, want, plainTolerance)
		}
	}
}

func TestMukherjeeBirdDornInItsLimits(t *testing.T) {
	law := must(creeplaw.NewMukherjeeBirdDorn(nickelLike()))
	for _, row := range []struct{ stress, exponent float64 }{{1e-250, 4.5}, {1, 4.5}, {1e30, 6.5}, {1e250, 6.5}} {
		l := law.LogRate(creeplaw.Point{Stress: row.stress, Temperature: 900})
		check.Rel(t, fmt.Sprintf("exponent at %v", row.stress), l.ByLogStress, row.exponent, 1e-14)
		assert.False(t, math.IsNaN(l.Value) || math.IsInf(l.Value, 0), "%v", l.Value)
	}
	// Without core diffusion and with a constant modulus, ∂ln ṗ/∂ln T is Q/RT - 1.
	c := nickelLike()
	c.Core, c.Modulus.Slope = creeplaw.Diffusivity{}, 0
	l := must(creeplaw.NewMukherjeeBirdDorn(c)).LogRate(creeplaw.Point{Stress: 1e7, Temperature: 1000})
	check.Rel(t, "activation", l.ByLogTemperature, 2.8e5/(creeplaw.GasConstant*1000)-1, 1e-14)
}

func TestMukherjeeBirdDornAtZeroStress(t *testing.T) {
	for _, row := range []struct{ n, slope float64 }{{0.5, math.Inf(1)}, {3, 0}} {
		c := nickelLike()
		c.StressExponent = row.n
		r := must(creeplaw.NewMukherjeeBirdDorn(c)).Rate(creeplaw.Point{Temperature: 900})
		assert.Equal(t, creeplaw.Rate{ByStress: row.slope}, r)
	}
	// n = 1: the slope is that of the linear law, A D b/kT.
	c := nickelLike()
	c.StressExponent = 1
	r := must(creeplaw.NewMukherjeeBirdDorn(c)).Rate(creeplaw.Point{Temperature: 900})
	want := 2e6 * 2e-4 * math.Exp(-2.8e5/8.314462618/900) * 2.5e-10 / (1.380649e-23 * 900)
	check.Rel(t, "slope", r.ByStress, want, plainTolerance)
	assert.Zero(t, r.Value)
}

func TestMukherjeeBirdDornExplains(t *testing.T) {
	law := must(creeplaw.NewMukherjeeBirdDorn(nickelLike()))
	beyond := 300 + 8e10/3e7 // where the modulus is gone
	for _, temperature := range []float64{beyond * 1.001, 0, -5, math.NaN()} {
		p := creeplaw.Point{Stress: 1e6, Temperature: temperature}
		assert.True(t, math.IsNaN(law.Rate(p).Value), "%v", temperature)
		checkOutside(t, law.CheckPoint(p), "temperature", temperature)
	}
	checkOutside(t, law.CheckPoint(creeplaw.Point{Stress: -1, Temperature: 900}), "stress", -1)
	assert.NoError(t, law.CheckPoint(creeplaw.Point{Stress: 1e6, Temperature: 900}))
	c := nickelLike()
	c.Modulus.Slope = 1e8 // rises from nothing at 300 K - 800 K < 0: bounded by 0
	rising := must(creeplaw.NewMukherjeeBirdDorn(c))
	assert.NoError(t, rising.CheckPoint(creeplaw.Point{Stress: 1e6, Temperature: 5000}))
}

func TestMukherjeeBirdDornConforms(t *testing.T) {
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1e4, 1e9},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{400, 2500}, LogStress: lawtest.Range{1e-10, 1e20}}
	lawtest.Run(t, must(creeplaw.NewMukherjeeBirdDorn(nickelLike())), box)
	c := nickelLike()
	c.Core = creeplaw.Diffusivity{}
	c.StressExponent = 40
	box.Stress = lawtest.Range{1e7, 1e10}
	lawtest.Run(t, must(creeplaw.NewMukherjeeBirdDorn(c)), box)
}

func TestMukherjeeBirdDornRefusesBadParameters(t *testing.T) {
	with := func(set func(*creeplaw.DislocationCreep, float64)) func(float64) error {
		return func(x float64) error {
			c := nickelLike()
			set(&c, x)
			return last(creeplaw.NewMukherjeeBirdDorn(c))
		}
	}
	checkRefused(t, []refused{
		{"prefactor", with(func(c *creeplaw.DislocationCreep, x float64) { c.Prefactor = x }), notPositive},
		{"stress exponent", with(func(c *creeplaw.DislocationCreep, x float64) { c.StressExponent = x }), notPositive},
		{"Burgers vector", with(func(c *creeplaw.DislocationCreep, x float64) { c.BurgersVector = x }), notPositive},
		{"shear modulus", with(func(c *creeplaw.DislocationCreep, x float64) { c.Modulus.Value = x }), notPositive},
		{"slope of the shear modulus", with(func(c *creeplaw.DislocationCreep, x float64) { c.Modulus.Slope = x }), negative[1:]},
		{"reference temperature of the shear modulus",
			with(func(c *creeplaw.DislocationCreep, x float64) { c.Modulus.Reference = x }), notPositive},
		{"lattice diffusivity", with(func(c *creeplaw.DislocationCreep, x float64) { c.Lattice.Prefactor = x }), notPositive},
		{"lattice activation energy",
			with(func(c *creeplaw.DislocationCreep, x float64) { c.Lattice.ActivationEnergy = x }), negative},
		{"core diffusivity", with(func(c *creeplaw.DislocationCreep, x float64) { c.Core.Prefactor = x }), notPositive},
		{"core activation energy", with(func(c *creeplaw.DislocationCreep, x float64) { c.Core.ActivationEnergy = x }), negative},
		{"grain-size exponent", with(func(c *creeplaw.DislocationCreep, x float64) { c.GrainExponent = x }), negative},
		{"grain size", with(func(c *creeplaw.DislocationCreep, x float64) { c.GrainExponent, c.GrainSize = 2, x }), notPositive},
	})
}

// Dislocation creep of a metal in Pa and s, asked for in MPa and h (invented numbers).
func ExampleNewMukherjeeBirdDorn() {
	law, err := creeplaw.NewMukherjeeBirdDorn(creeplaw.DislocationCreep{
		Prefactor: 1e6, StressExponent: 4.5, BurgersVector: 2.5e-10,
		Modulus: creeplaw.ShearModulus{Value: 80e9, Reference: 300, Slope: -30e6},
		Lattice: creeplaw.Diffusivity{Prefactor: 2e-4, ActivationEnergy: 280e3},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	host, err := creeplaw.InUnits(law, creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second},
		creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.1e /h\n", host.Rate(creeplaw.Point{Stress: 20, Temperature: 1100}).Value)
	fmt.Println(host.CheckPoint(creeplaw.Point{Stress: 20, Temperature: 3000}))
	// Output:
	// 1.0e-02 /h
	// creeplaw: Mukherjee–Bird–Dorn: the temperature 3000 is outside 0 … 2966.667
}
