package lawcard_test

import (
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// hardened are laws made from curves: every kind of curve, of term and of coefficient. Numbers invented, MPa and h.
func hardened() []sample {
	var all []sample
	for _, c := range append(plainCurves(), curvesOfCoefficients()...) {
		all = append(all, sample{c.name, c.makes, made(curve.NewStrainHardened(c.curve))})
	}
	return all
}

type curveSample struct {
	name, makes string
	curve       curve.Curve
}

func hot(c curve.Coefficient) curve.Coefficient {
	return curve.Activated{Coefficient: c, Factor: made(creeplaw.NewArrheniusAt(301.3e3, 871.3))}
}

func power(value, exponent float64) curve.Coefficient {
	return curve.PowerAt{Value: value, Stress: 151.3, Exponent: exponent}
}

func plainCurves() []curveSample {
	term := curve.GrahamWallesTerm{Prefactor: 1.3e-12, StressExponent: 4.1, TimeExponent: 1.0 / 3}
	activated := curve.GrahamWallesTerm{Prefactor: 1.7e-1, StressExponent: 5.1, TimeExponent: 1, ActivationEnergy: 213.7e3}
	referred := curve.GrahamWallesTerm{Prefactor: 1.1e-31, StressExponent: 8.1, TimeExponent: 3, ActivationEnergy: 913.7e3,
		ReferenceTemperature: 871.3}
	findley := curve.FindleyParameters{Creep: 8.3e-5, CreepStress: 163.7, TimeExponent: 0.307}
	instantaneous := findley
	instantaneous.Instantaneous, instantaneous.InstantaneousStress = 0.00833, 464.3
	return []curveSample{
		{"Bailey–Norton curve", "curve.NewBaileyNorton", made(curve.NewBaileyNorton(1.3e-14, 5.1, 0.41))},
		{"steep curve", "curve.NewBaileyNorton", made(curve.NewBaileyNorton(1.3e-101, 47.1, 0.41))},
		{"two powers", "curve.NewPrimarySecondary", made(curve.NewPrimarySecondary(curve.PrimarySecondaryParameters{
			PrimaryPrefactor: 1.3e-14, PrimaryStressExponent: 5.1, TimeExponent: 0.41, SteadyPrefactor: 1.7e-21,
			SteadyStressExponent: 7.3}))},
		{"Graham–Walles", "curve.NewGrahamWalles", made(curve.NewGrahamWalles(term, activated, referred))},
		{"Findley", "curve.NewFindley", made(curve.NewFindley(findley))},
		{"Findley, instantaneous", "curve.NewFindley", made(curve.NewFindley(instantaneous))},
	}
}

func curvesOfCoefficients() []curveSample {
	steady := hot(curve.Sinh{Prefactor: 1.3e-9, StressCoefficient: 0.0213, Exponent: 2.3})
	norton := made(creeplaw.NewNorton(1.3e-12, 4.3))
	fast := curve.Transient{Strain: power(1.3e-3, 1.8), Rate: hot(curve.Exponential{Prefactor: 1.7e-2, StressCoefficient: 0.021})}
	slow := curve.Transient{Strain: curve.Power{Prefactor: 1.3e-7, Exponent: 2.2}, Rate: curve.Constant(1.7e-4)}
	proportional := curve.Transient{Strain: power(5.3e-3, 2.1), Rate: curve.Product{curve.RateOf{Law: norton},
		curve.Constant(2003)}}
	theta := func(a, b, c, d float64) curve.Coefficient {
		return curve.LogBilinear{Intercept: a, ByStress: b, ByTemperature: c, ByProduct: d}
	}
	mukherjee := made(creeplaw.InUnits(steadyLaw("with both"), creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second},
		megapascalHour))
	table := curve.Activated{Coefficient: power(1e-6, 3), Factor: factors()["NewFactorTable"]}
	return []curveSample{
		{"Andrade", "curve.NewAndrade", made(curve.NewAndrade(hot(power(1.3e-4, 4.1)), table))},
		{"logarithmic", "curve.NewLogarithmicCreep", made(curve.NewLogarithmicCreep(power(2.3e-3, 1.1),
			hot(power(1.3e-2, 1.5))))},
		{"McVetty", "curve.NewMcVetty", made(curve.NewMcVetty(curve.Sinh{Prefactor: 1.3e-4, StressCoefficient: 0.0213,
			Exponent: 1}, 1.3e-3, steady))},
		{"Garofalo's transient", "curve.NewGarofaloTransient", made(curve.NewGarofaloTransient(proportional, steady))},
		{"Blackburn", "curve.NewBlackburn", made(curve.NewBlackburn(fast, slow, steady))},
		{"two regimes", "curve.NewTwoRegime", made(curve.NewTwoRegime(power(1.3e-3, 4.1), 0.4571,
			curve.InversePower{Prefactor: 1.3e9, Exponent: 3.1}, hot(power(1.3e-7, 8.1))))},
		{"two regimes, matched", "curve.NewMatchedTwoRegime", made(curve.NewMatchedTwoRegime(power(1.3e-3, 4.1), 0.4571,
			hot(power(1.3e-6, 8.1))))},
		{"theta projection", "curve.NewThetaProjection", made(curve.NewThetaProjection(
			curve.Transient{Strain: theta(-9.1, 0.021, 0.0011, 1.3e-6), Rate: theta(-30.1, 0.031, 0.0251, 1.3e-5)},
			curve.Transient{Strain: theta(-8.1, 0.0041, 0.0011, 1.3e-6), Rate: theta(-34.1, 0.031, 0.0241, 1.3e-5)}))},
		{"sum of terms", "curve.NewSum", made(curve.NewSum(curve.PowerOfTime(power(1.3e-4, 4.1), 0.31),
			curve.Saturating(power(1.3e-3, 2.1), curve.Constant(1.3e-3)), curve.Growing(power(1.3e-4, 2.1), power(1.3e-6, 2.1)),
			curve.LogOfTime(curve.Soderberg{Prefactor: 1.3e-5, StressCoefficient: 0.013}, curve.Constant(1.3e-2)),
			curve.Hyperbolic(power(1.3e-3, 2.1), curve.Constant(1.7e-3)), curve.Steady(curve.RateOf{Law: norton})))},
		{"a law tied to SI as the steady part", "NewStrainHardened", made(curve.NewAndrade(power(1.3e-5, 4.1),
			curve.RateOf{Law: mukherjee}))},
	}
}

func steadyLaw(name string) creeplaw.Law {
	for _, s := range steady() {
		if s.name == name {
			return s.law
		}
	}
	panic(name)
}
