package main

import (
	"math"

	"gonum.org/v1/gonum/integrate/quad"

	"example.com/holdtime/bench"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
)

// The material is invented: it has the size of a low-alloy steel at 550 °C. MPa, h, K.
const (
	young      = 150e3
	poisson    = 0.3
	expansion  = 14e-6       // 1/K, from the reference temperature
	reference  = 823.15      // K, also where the mesh is unstrained
	rateAt     = 1e-6        // 1/h, under
	stressAt   = 100         // MPa
	activation = 350e3       // J/mol
	hotter     = 30          // K, how far the programs heat
	gas        = 8.314462618 // J/(mol K), CODATA 2018
)

// newMaterial is what the library gets: Norton creep with an Arrhenius factor.
func newMaterial(exponent float64) (*integrate.Material, error) {
	norton, err := creeplaw.NewNortonAt(rateAt, stressAt, exponent)
	if err != nil {
		return nil, err
	}
	arrhenius, err := creeplaw.NewArrheniusAt(activation, reference)
	if err != nil {
		return nil, err
	}
	law, err := creeplaw.WithTemperature(norton, arrhenius)
	if err != nil {
		return nil, err
	}
	return integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{
		Expansion: integrate.Expansion{Mean: integrate.Constant(expansion), Reference: reference}})
}

// closedNorton is the same law for the closed forms, hotter by some kelvin; nothing of the library is in it.
func closedNorton(exponent, above float64) bench.Norton {
	return bench.Norton{Rate: rateAt * activated(reference+above), Stress: stressAt, Exponent: exponent}
}

// activated is exp[-(Q/R)(1/T - 1/T₀)].
func activated(temperature float64) float64 {
	return math.Exp(-activation / gas * (1/temperature - 1/reference))
}

// meanActivated is the mean of the factor while the temperature rises evenly from one value to another, by Gauss–Legendre
// quadrature with 30 points, which is exact to rounding for a factor as smooth as this.
func meanActivated(from, to float64) float64 {
	if to == from {
		return activated(to)
	}
	return quad.Fixed(activated, from, to, 30, quad.Legendre{}, 0) / (to - from)
}
