package main

import (
	"errors"
	"math"
	"slices"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// The families, in the order of the table and the picture.
const (
	powers     family = "Steady: powers of stress"
	sines      family = "Steady: exponentials of stress"
	mechanisms family = "Steady: mechanisms"
	primary    family = "Primary creep"
	transients family = "Primary creep that ends"
	regimes    family = "Two regimes; the clock"
	tertiary   family = "Tertiary creep"
	damage     family = "Damage and other variables"
)

// families of the invented steel.
var families = []family{powers, sines, mechanisms, primary, transients, regimes, tertiary, damage}

// invented are the laws of the catalogue on the invented steel. To add a law, add a line to one of the three lists.
func invented() []specimen { return slices.Concat(steady(), hardening(), tertiaryLaws()) }

func steady() []specimen {
	return []specimen{
		{powers, "Norton", hot(creeplaw.NewNortonAt(commonRate, commonStress, 5))},
		{powers, "double power", hot(creeplaw.NewDoublePowerAt(3.102e-6, 150, 3, 9))},
		{powers, "power and exponential", hot(creeplaw.NewPowerExponential(6.065e-15, 4, 200))},
		{powers, "Norton above a threshold", hot(aboveThreshold())},
		{powers, "Norton tabulated over temperature", plain(tabulated())},
		{powers, "two powers in sequence", hot(inSequence())},

		{sines, "Garofalo", hot(creeplaw.NewGarofalo(2.096e-8, 0.02, 3))},
		{sines, "Soderberg", hot(creeplaw.NewSoderberg(6.784e-9, 20))},
		{sines, "exponential of stress", hot(creeplaw.NewExponential(6.738e-9, 20))},

		{mechanisms, "Mukherjee–Bird–Dorn", matched(dislocations())},
		{mechanisms, "Nabarro–Herring", matched(creeplaw.NewNabarroHerring(atomicVolume, grainSize, lattice))},
		{mechanisms, "Coble", matched(creeplaw.NewCoble(atomicVolume, grainSize, boundary))},
		{mechanisms, "diffusional, both paths", matched(creeplaw.NewDiffusional(atomicVolume, grainSize, lattice, boundary))},
		{mechanisms, "Darveaux–Banerji", matched(withModulus())},
		{mechanisms, "dislocations and diffusion in parallel", plain(inParallel())},
	}
}

func hardening() []specimen {
	return []specimen{
		{primary, "Bailey–Norton", hot(creeplaw.NewBaileyNortonAt(commonStrain, commonStress, commonTime, 4, 0.4))},
		{primary, "strain hardening", hot(creeplaw.NewStrainHardeningAt(3.333e-7, commonStress, commonStrain, 12, -2))},
		{primary, "logarithmic", hardened(curve.NewLogarithmicCreep(power(2e-3, 2), power(1.474e-2, 3)))},
		{primary, "Findley", hardened(curve.NewFindley(curve.FindleyParameters{Creep: 2.471e-4, CreepStress: 60, TimeExponent: 0.3}))},
		{primary, "primary and secondary powers", hardened(curve.NewPrimarySecondary(curve.PrimarySecondaryParameters{
			PrimaryPrefactor: 1.256e-12, PrimaryStressExponent: 4, TimeExponent: 0.4, SteadyPrefactor: 5e-19, SteadyStressExponent: 6}))},
		{primary, "Andrade", hardened(curve.NewAndrade(power(2.321e-4, 4), power(5e-7, 6)))},

		{transients, "McVetty", hardened(curve.NewMcVetty(sinh(5e-3, 1), 1e-3, sinh(5e-7, 3)))},
		{transients, "Garofalo's transient", hardened(curve.NewGarofaloTransient(transient(power(5e-3, 1.5), power(1e-3, 3)),
			sinh(5e-7, 3)))},
		{transients, "Blackburn", hardened(curve.NewBlackburn(transient(power(2e-3, 2), power(1e-2, 2)),
			transient(power(4e-3, 2), power(5e-4, 3)), sinh(4e-7, 3)))},
		{transients, "Blackburn with exponentials", hardened(curve.NewBlackburn(transient(growing(2e-3, 0.02), growing(1e-2, 0.02)),
			transient(growing(4e-3, 0.02), growing(5e-4, 0.02)), growing(4e-7, 0.05)))},
		{transients, "saturating only", hardened(curve.NewSum(curve.Saturating(power(1.1e-2, 2), power(2.4e-4, 3))))},

		{regimes, "two regimes", hardened(curve.NewTwoRegime(power(1e-4, 4), 0.5, endOfPrimary(3000, 3), power(6.457e-7, 7)))},
		{regimes, "two regimes, matched", hardened(curve.NewMatchedTwoRegime(power(8.426e-5, 4), 0.5, power(7.692e-7, 7)))},
		{regimes, "Bailey–Norton, strain hardening", hardenedAsItIs(bailey())},
		{regimes, "Bailey–Norton, time hardening", clocked(bailey())},
	}
}

func tertiaryLaws() []specimen {
	return []specimen{
		{tertiary, "Omega", plain(omega())},
		{tertiary, "theta projection", hardenedAsItIs(curve.NewThetaProjection(transient(theta(4e-3, 0.01, 0.002),
			theta(5e-4, 0.02, 0.047)), transient(theta(3.5e-3, 0.004, 0.002), theta(1e-4, 0.025, 0.047))))},
		{tertiary, "Graham–Walles", hardenedAsItIs(curve.NewGrahamWalles(walles(1.393e-12, 4, 1.0/3), walles(4e-19, 6, 1),
			walles(3e-31, 8, 3)))},

		{damage, "Kachanov–Rabotnov", plain(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 7.95e-7,
			StressExponent: 5, DamagePrefactor: 7.143e-6, DamageStressExponent: 4, DamageExponent: 6, ReferenceStress: commonStress,
			CreepTemperature: arrhenius(), DamageTemperature: arrhenius()}))},
		{damage, "Liu–Murakami", plain(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 9.5e-7,
			StressExponent: 5, DamagePrefactor: 5e-5, DamageStressExponent: 4, DamageExponent: 5, ReferenceStress: commonStress,
			CreepTemperature: arrhenius(), DamageTemperature: arrhenius()}))},
		{damage, "Perrin–Hayhurst", plain(creeplaw.NewPerrinHayhurst(cavitation()))},
		{damage, "Kowalewski–Hayhurst–Dyson", plain(creeplaw.NewKowalewskiHayhurstDyson(cavitation()))},
		{damage, "Anand", plain(creeplaw.NewAnand(creeplaw.AnandParameters{InitialResistance: 150, ActivationEnergy: activationEnergy,
			Prefactor: 3e-10 * math.Exp(activationEnergy/(creeplaw.GasConstant*commonTemperature)), StressMultiplier: 5,
			RateSensitivity: 0.3, Hardening: 8000, SaturationCoefficient: 180, SaturationExponent: 0.02, HardeningExponent: 1.3}))},
	}
}

func aboveThreshold() (creeplaw.Threshold, error) {
	norton, err := creeplaw.NewNortonAt(commonRate, 70, 4)
	if err != nil {
		return creeplaw.Threshold{}, err
	}
	return creeplaw.WithThreshold(norton, 30)
}

// tabulated has its own temperature: the rates at 500 and 700 °C are about those of the Arrhenius factor.
func tabulated() (creeplaw.Tabulated, error) {
	rows := []struct{ temperature, rate, exponent float64 }{{773.15, 5e-9, 6}, {873.15, commonRate, 5}, {973.15, 7e-5, 4.5}}
	var temperatures []float64
	var laws []creeplaw.Law
	for _, r := range rows {
		law, err := creeplaw.NewNortonAt(r.rate, commonStress, r.exponent)
		if err != nil {
			return creeplaw.Tabulated{}, err
		}
		temperatures, laws = append(temperatures, r.temperature), append(laws, law)
	}
	return creeplaw.NewTabulated(temperatures, laws, creeplaw.TableOptions{})
}

func inSequence() (creeplaw.Series, error) {
	slow, err := creeplaw.NewNortonAt(1.5e-6, commonStress, 3)
	if err != nil {
		return creeplaw.Series{}, err
	}
	fast, err := creeplaw.NewNortonAt(3e-6, commonStress, 9)
	if err != nil {
		return creeplaw.Series{}, err
	}
	return creeplaw.NewSeries(slow, fast)
}

// Invented numbers of the size of iron's, for the laws of mechanisms; their rates are then matched to the steel's.
const (
	atomicVolume = 1.2e-29 // [m³]
	grainSize    = 5e-5    // [m]
)

var (
	lattice  = creeplaw.Diffusivity{Prefactor: 2e-4, ActivationEnergy: 280e3}
	boundary = creeplaw.Diffusivity{Prefactor: 1e-12, ActivationEnergy: 170e3}
	modulus  = creeplaw.ShearModulus{Value: 8e10, Reference: 300, Slope: -3e7}
)

func dislocations() (creeplaw.MukherjeeBirdDorn, error) {
	return creeplaw.NewMukherjeeBirdDorn(creeplaw.DislocationCreep{Prefactor: 1e6, StressExponent: 5, Modulus: modulus,
		Lattice: lattice, BurgersVector: 2.5e-10, Core: creeplaw.Diffusivity{Prefactor: 1e-23, ActivationEnergy: 170e3}})
}

func withModulus() (creeplaw.DarveauxBanerji, error) {
	return creeplaw.NewDarveauxBanerji(creeplaw.ModulusSinh{Prefactor: 1, Modulus: modulus,
		StressScale: creeplaw.ShearModulus{Value: 7.3e7, Reference: 300, Slope: -4e4}, Exponent: 3, ActivationEnergy: 290e3})
}

// inParallel is nine parts of dislocation creep and one of diffusional flow.
func inParallel() (creeplaw.Sum, error) {
	first, second := matched(dislocations()), matched(creeplaw.NewDiffusional(atomicVolume, grainSize, lattice, boundary))
	if err := errors.Join(first.err, second.err); err != nil {
		return creeplaw.Sum{}, err
	}
	nine, err := creeplaw.InUnits(first.law, creeplaw.Units{Stress: units.Stress, Time: units.Time * 10 / 9}, units)
	if err != nil {
		return creeplaw.Sum{}, err
	}
	one, err := creeplaw.InUnits(second.law, creeplaw.Units{Stress: units.Stress, Time: units.Time * 10}, units)
	if err != nil {
		return creeplaw.Sum{}, err
	}
	return creeplaw.NewSum(nine, one)
}

func omega() (creeplaw.Omega, error) {
	norton, err := creeplaw.NewNortonAt(7.87e-7, commonStress, 5)
	if err != nil {
		return creeplaw.Omega{}, err
	}
	initial, err := creeplaw.WithTemperature(norton, arrhenius())
	if err != nil {
		return creeplaw.Omega{}, err
	}
	return creeplaw.NewOmega(initial, 50)
}

func cavitation() creeplaw.CavitationParameters {
	return creeplaw.CavitationParameters{Prefactor: 1e-7, StressCoefficient: 0.05, Hardening: 30000, HardeningSaturation: 0.5,
		Ageing: 3e-5, Cavitation: 8, RuptureCavitation: 1.0 / 3, CreepTemperature: arrhenius(), AgeingTemperature: arrhenius()}
}

// bailey is the curve of the first primary law with its activation energy in the strain, m·300 kJ/mol, so that a clock may
// have it too.
func bailey() (curve.GrahamWalles, error) {
	const m = 0.4
	return curve.NewGrahamWalles(curve.GrahamWallesTerm{
		Prefactor: commonStrain / (math.Pow(commonStress, 4) * math.Pow(commonTime, m)), StressExponent: 4, TimeExponent: m,
		ActivationEnergy: m * activationEnergy, ReferenceTemperature: commonTemperature})
}

// walles is a term whose rate has the steel's activation energy.
func walles(prefactor, stressExponent, timeExponent float64) curve.GrahamWallesTerm {
	return curve.GrahamWallesTerm{Prefactor: prefactor, StressExponent: stressExponent, TimeExponent: timeExponent,
		ActivationEnergy: timeExponent * activationEnergy, ReferenceTemperature: commonTemperature}
}

// power is a coefficient with a value at the common stress and a stress exponent.
func power(value, exponent float64) curve.Coefficient {
	return curve.PowerAt{Value: value, Stress: commonStress, Exponent: exponent}
}

// sinh is value·[sinh(0.02 σ)/sinh 2]ⁿ.
func sinh(value, exponent float64) curve.Coefficient {
	return curve.Sinh{Prefactor: value / math.Pow(math.Sinh(2), exponent), StressCoefficient: 0.02, Exponent: exponent}
}

// growing is value·exp[b (σ - 100)].
func growing(value, b float64) curve.Coefficient {
	return curve.Exponential{Prefactor: value * math.Exp(-b*commonStress), StressCoefficient: b}
}

// theta is value·exp[b (σ - 100) + c (T - 873.15)].
func theta(value, b, c float64) curve.Coefficient {
	return curve.LogBilinear{Intercept: math.Log(value) - b*commonStress - c*commonTemperature, ByStress: b, ByTemperature: c}
}

// endOfPrimary is the time at the common stress, falling with a power of it.
func endOfPrimary(hours, exponent float64) curve.Coefficient {
	return curve.InversePower{Prefactor: hours * math.Pow(commonStress, exponent), Exponent: exponent}
}

func transient(strain, rate curve.Coefficient) curve.Transient {
	return curve.Transient{Strain: strain, Rate: rate}
}
