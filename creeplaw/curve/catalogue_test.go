package curve_test

import (
	"flag"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

var campaign = flag.Bool("campaign", false, "run the long random campaigns")

// entry is one curve of the catalogue under invented parameters of a realistic size (MPa, h, K).
type entry struct {
	name               string
	curve              curve.Curve
	creepsAtZeroStress bool
	breaks             bool // has a kink in time
}

// must is for parameters that are right.
func must[T any](c T, err error) T {
	if err != nil {
		panic(err)
	}
	return c
}

func powerAt(value, exponent float64) curve.Coefficient {
	return curve.PowerAt{Value: value, Stress: 150, Exponent: exponent}
}

func sinh(prefactor, perStress, exponent float64) curve.Coefficient {
	return curve.Sinh{Prefactor: prefactor, StressCoefficient: perStress, Exponent: exponent}
}

func exponential(prefactor, perStress float64) curve.Coefficient {
	return curve.Exponential{Prefactor: prefactor, StressCoefficient: perStress}
}

func bilinear(a, b, c, d float64) curve.Coefficient {
	return curve.LogBilinear{Intercept: a, ByStress: b, ByTemperature: c, ByProduct: d}
}

func transient(strain, rate curve.Coefficient) curve.Transient {
	return curve.Transient{Strain: strain, Rate: rate}
}

// hot is a coefficient that holds at 873 K, with 300 kJ/mol.
func hot(c curve.Coefficient) curve.Coefficient {
	return curve.Activated{Coefficient: c, Factor: must(creeplaw.NewArrheniusAt(300e3, 873))}
}

func graham(prefactor, stressExponent, timeExponent, activation float64) curve.GrahamWallesTerm {
	return curve.GrahamWallesTerm{Prefactor: prefactor, StressExponent: stressExponent, TimeExponent: timeExponent,
		ActivationEnergy: activation, ReferenceTemperature: 873}
}

// type304 is the creep of type 304 steel at 1100 °F: ORNL-5014 (J. M. Corum and others, 1974), in ksi and h. The digits are
// from memory (high), the attribution from memory (medium).
func type304() curve.GarofaloTransient {
	return must(curve.NewGarofaloTransient(
		transient(curve.Power{Prefactor: 5.436e-5, Exponent: 1.843}, exponential(5.929e-5, 0.2029)),
		sinh(6.73e-9, 0.1479, 3)))
}

func catalogue() []entry {
	steady := hot(sinh(1e-9, 0.02, 2))
	raw := func(a, b float64) curve.Coefficient { return exponential(a, b) }
	return []entry{
		{name: "Bailey–Norton", curve: must(curve.NewBaileyNorton(1e-14, 5, 0.4))},
		{name: "primary and secondary", curve: must(curve.NewPrimarySecondary(curve.PrimarySecondaryParameters{
			PrimaryPrefactor: 1e-14, PrimaryStressExponent: 5, TimeExponent: 0.4, SteadyPrefactor: 1e-21,
			SteadyStressExponent: 7}))},
		{name: "Graham–Walles", curve: must(curve.NewGrahamWalles(graham(1e-12, 4, 1./3, 100e3),
			graham(1e-19, 6, 1, 300e3), graham(1e-34, 8, 3, 900e3)))},
		{name: "Graham–Walles, 8 terms", curve: must(curve.NewGrahamWalles(
			graham(1e-12, 4, 1./3, 100e3), graham(1e-15, 5, 1./3, 120e3), graham(1e-19, 6, 1, 300e3),
			graham(1e-21, 7, 1, 320e3), graham(1e-24, 8, 1, 350e3), graham(1e-34, 8, 3, 900e3),
			graham(1e-36, 9, 3, 950e3), graham(1e-39, 10, 3, 990e3)))},
		{name: "Andrade", curve: must(curve.NewAndrade(hot(powerAt(1e-4, 4)), hot(powerAt(1e-6, 6))))},
		{name: "logarithmic", curve: must(curve.NewLogarithmicCreep(powerAt(2e-3, 1), hot(powerAt(1e-2, 1.5))))},
		{name: "McVetty", curve: must(curve.NewMcVetty(sinh(1e-4, 0.02, 1), 1e-3, steady))},
		{name: "Garofalo transient", curve: must(curve.NewGarofaloTransient(
			transient(powerAt(5e-3, 2), curve.Product{curve.Constant(2000), steady}), steady))},
		{name: "Blackburn", curve: must(curve.NewBlackburn(transient(powerAt(1e-3, 1.8), hot(raw(1e-2, 0.02))),
			transient(powerAt(5e-3, 2.2), hot(raw(1e-4, 0.03))), steady))},
		{name: "Blackburn, raw exponentials", creepsAtZeroStress: true, curve: must(curve.NewBlackburn(
			transient(raw(1e-4, 0.02), raw(1e-2, 0.02)), transient(raw(5e-4, 0.02), raw(1e-4, 0.03)), raw(1e-8, 0.04)))},
		{name: "Findley", curve: must(curve.NewFindley(curve.FindleyParameters{Creep: 0.00008, CreepStress: 163,
			TimeExponent: 0.305, Instantaneous: 0.00833, InstantaneousStress: 464}))},
		{name: "two regimes", breaks: true, curve: must(curve.NewTwoRegime(powerAt(1e-3, 4), 0.45,
			curve.InversePower{Prefactor: 1e9, Exponent: 3}, hot(powerAt(1e-7, 8))))},
		{name: "two regimes, matched", breaks: true, curve: must(curve.NewMatchedTwoRegime(powerAt(1e-3, 4), 0.45,
			hot(powerAt(1e-6, 8))))},
		{name: "theta projection", creepsAtZeroStress: true, curve: must(curve.NewThetaProjection(
			transient(bilinear(-9, 0.02, 0.001, 1e-6), bilinear(-30, 0.03, 0.025, 1e-5)),
			transient(bilinear(-8, 0.004, 0.001, 1e-6), bilinear(-34, 0.03, 0.024, 1e-5))))},
		{name: "hyperbolic and steady", curve: must(curve.NewSum(
			curve.Hyperbolic(powerAt(5e-3, 2), hot(curve.Soderberg{Prefactor: 1e-5, StressCoefficient: 0.03})),
			curve.Steady(curve.RateOf{Law: must(creeplaw.NewNorton(1e-21, 7))})))},
		{name: "power and saturating", curve: must(curve.NewSum(curve.PowerOfTime(powerAt(1e-4, 4), 0.3),
			curve.Saturating(powerAt(5e-3, 2), hot(powerAt(1e-3, 3))), curve.Steady(steady)))},
	}
}
