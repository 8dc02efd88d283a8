package lawcard_test

import (
	"example.com/holdtime/creeplaw"
)

func made[T any](built T, err error) T {
	if err != nil {
		panic(err)
	}
	return built
}

// sample is a law for the tests, in Pa and s if it is tied to them, and otherwise in MPa and h.
type sample struct {
	name  string
	makes string // the constructor it shows, by which a test knows that none is forgotten
	law   creeplaw.Law
}

// steady, hardening, damaged, composed: together every kind of law, in every form of its constructors. Numbers invented, with
// bits that no working number gives back by chance.
func steady() []sample {
	path := creeplaw.Diffusivity{Prefactor: 1.93e-4, ActivationEnergy: 284.7e3}
	other := creeplaw.Diffusivity{Prefactor: 3.57e-15, ActivationEnergy: 115.9e3}
	c := creeplaw.DislocationCreep{Prefactor: 3.1e6, StressExponent: 4.63, BurgersVector: 2.49e-10, Lattice: path,
		Modulus: creeplaw.ShearModulus{Value: 78.93e9, Reference: 300.7, Slope: -29.3e6}}
	core, grain, both := c, c, c
	core.Core = creeplaw.Diffusivity{Prefactor: 3.17e-23, ActivationEnergy: 170.3e3}
	grain.GrainExponent, grain.GrainSize = 1.7, 53e-6
	both.Core, both.GrainExponent, both.GrainSize = core.Core, 1.7, 53e-6
	return []sample{
		{"Norton", "NewNorton", made(creeplaw.NewNorton(1.37e-17, 5.3))},
		{"Norton, steep", "NewNorton", made(creeplaw.NewNorton(1.37e-117, 47.3))},
		{"Norton at", "NewNortonAt", made(creeplaw.NewNortonAt(1.7e-6, 103, 5.3))},
		{"double power", "NewDoublePower", made(creeplaw.NewDoublePower(1.3e-11, 2.7, 1.1e-29, 11.3))},
		{"double power at", "NewDoublePowerAt", made(creeplaw.NewDoublePowerAt(1.3e-7, 91.7, 2.7, 11.3))},
		{"Garofalo", "NewGarofalo", made(creeplaw.NewGarofalo(1.7e-9, 0.053, 3.1))},
		{"exponential", "NewExponential", made(creeplaw.NewExponential(1.7e-9, 23.3))},
		{"Soderberg", "NewSoderberg", made(creeplaw.NewSoderberg(1.7e-9, 23.3))},
		{"power exponential", "NewPowerExponential", made(creeplaw.NewPowerExponential(2.3e-17, 5.1, 1/0.038))},
		{"diffusional", "NewDiffusional", made(creeplaw.NewDiffusional(1.09e-29, 53e-6, path, other))},
		{"Nabarro–Herring", "NewNabarroHerring", made(creeplaw.NewNabarroHerring(1.09e-29, 53e-6, path))},
		{"Coble", "NewCoble", made(creeplaw.NewCoble(1.09e-29, 53e-6, other))},
		{"dislocation", "NewMukherjeeBirdDorn", made(creeplaw.NewMukherjeeBirdDorn(c))},
		{"with core", "NewMukherjeeBirdDorn", made(creeplaw.NewMukherjeeBirdDorn(core))},
		{"with grain", "NewMukherjeeBirdDorn", made(creeplaw.NewMukherjeeBirdDorn(grain))},
		{"with both", "NewMukherjeeBirdDorn", made(creeplaw.NewMukherjeeBirdDorn(both))},
		{"Darveaux–Banerji", "NewDarveauxBanerji", made(creeplaw.NewDarveauxBanerji(creeplaw.ModulusSinh{
			Prefactor: 9.263, Exponent: 3.31, ActivationEnergy: 52.9e3,
			Modulus:     creeplaw.ShearModulus{Value: 7085, Reference: 301.1, Slope: -1.013},
			StressScale: creeplaw.ShearModulus{Value: 37.81, Reference: 299.3, Slope: -0.00744}}))},
	}
}

func hardening() []sample {
	return []sample{
		{"Bailey–Norton", "NewBaileyNorton", made(creeplaw.NewBaileyNorton(1.3e-15, 4.7, 0.41))},
		{"Bailey–Norton, steep", "NewBaileyNorton", made(creeplaw.NewBaileyNorton(1.3e-101, 47.7, 0.41))},
		{"Bailey–Norton at", "NewBaileyNortonAt", made(creeplaw.NewBaileyNortonAt(1.3e-3, 103, 97, 4.7, 0.41))},
		{"hardening", "NewStrainHardening", made(creeplaw.NewStrainHardening(1.3e-18, 4.3, -1.47))},
		{"hardening, steep", "NewStrainHardening", made(creeplaw.NewStrainHardening(1.3e-118, 51, -1.47))},
		{"hardening at", "NewStrainHardeningAt", made(creeplaw.NewStrainHardeningAt(1.3e-6, 103, 1.1e-3, 4.3, -1.47))},
	}
}

func damaged() []sample {
	arrhenius := made(creeplaw.NewArrheniusAt(312.7e3, 811.3))
	bare := creeplaw.KachanovRabotnovParameters{Prefactor: 1.3e-17, StressExponent: 5.3, DamagePrefactor: 1.7e-13,
		DamageStressExponent: 4.1, DamageExponent: 6.1}
	steep := bare
	steep.StressExponent, steep.Prefactor = 51, 1.3e-111
	referred := creeplaw.KachanovRabotnovParameters{Prefactor: 1.3e-6, StressExponent: 5.3, DamagePrefactor: 1.7e-5,
		DamageStressExponent: 4.1, DamageExponent: 6.1, ReferenceStress: 101.3,
		RuptureStress:    creeplaw.RuptureStress{Principal: 0.71, Mean: 0.13},
		CreepTemperature: arrhenius, DamageTemperature: made(creeplaw.NewArrhenius(213.1e3))}
	cavitation := creeplaw.CavitationParameters{Prefactor: 2.1e-9, StressCoefficient: 0.131, Hardening: 1.2e4,
		HardeningSaturation: 0.57, Ageing: 9.3e-5, Cavitation: 1.9, TriaxialityExponent: 2.8, RuptureCavitation: 0.33}
	hot, none := cavitation, cavitation
	hot.CreepTemperature, hot.AgeingTemperature = arrhenius, arrhenius
	none.Ageing, none.Cavitation, none.TriaxialityExponent, none.RuptureCavitation = 0, 0, 0, 0
	none.AgeingTemperature = arrhenius
	return []sample{
		{"Kachanov–Rabotnov", "NewKachanovRabotnov", made(creeplaw.NewKachanovRabotnov(bare))},
		{"Kachanov–Rabotnov, steep", "NewKachanovRabotnov", made(creeplaw.NewKachanovRabotnov(steep))},
		{"Kachanov–Rabotnov, referred", "NewKachanovRabotnov", made(creeplaw.NewKachanovRabotnov(referred))},
		{"Liu–Murakami", "NewLiuMurakami", made(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters(bare)))},
		{"Liu–Murakami, steep", "NewLiuMurakami", made(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters(steep)))},
		{"Liu–Murakami, referred", "NewLiuMurakami",
			made(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters(referred)))},
		{"Perrin–Hayhurst", "NewPerrinHayhurst", made(creeplaw.NewPerrinHayhurst(cavitation))},
		{"Perrin–Hayhurst, thermal", "NewPerrinHayhurst", made(creeplaw.NewPerrinHayhurst(hot))},
		{"Kowalewski", "NewKowalewskiHayhurstDyson", made(creeplaw.NewKowalewskiHayhurstDyson(none))},
		{"Omega", "NewOmega", made(creeplaw.NewOmega(made(creeplaw.WithTemperature(made(creeplaw.NewNorton(1.37e-17, 5.3)),
			arrhenius)), 31.7))},
		{"Omega, polynomials", "NewOmegaFromPolynomials", made(creeplaw.NewOmegaFromPolynomials(creeplaw.OmegaPolynomials{
			Rate: [5]float64{-21.3, 50100, -3913, 217, -1013}, Acceleration: [5]float64{-1.7, 7013, -1513, 113, -51},
			Stress: [2]float64{1.3, 39.7}, Temperature: [2]float64{513.3, 1373.7}}))},
		{"Anand", "NewAnand", made(creeplaw.NewAnand(creeplaw.AnandParameters{InitialResistance: 12.41,
			ActivationEnergy: 78.3e3, Prefactor: 4.1e6, StressMultiplier: 1.53, RateSensitivity: 0.303, Hardening: 1379.3,
			SaturationCoefficient: 13.79, SaturationExponent: 0.071, HardeningExponent: 1.31}))},
	}
}

func factors() map[string]creeplaw.TemperatureFactor {
	return map[string]creeplaw.TemperatureFactor{
		"NewArrhenius":   made(creeplaw.NewArrhenius(271.3e3)),
		"NewArrheniusAt": made(creeplaw.NewArrheniusAt(312.7e3, 811.3)),
		"NewTwoArrhenius": made(creeplaw.NewTwoArrhenius(creeplaw.ArrheniusBranch{Prefactor: 4.1e5, ActivationEnergy: 61e3},
			creeplaw.ArrheniusBranch{Prefactor: 6.3e28, ActivationEnergy: 181e3}, 807.3)),
		"NewTwoArrheniusAt": made(creeplaw.NewTwoArrheniusAt(61e3, 183e3, 807.3)),
		"NewFactorTable": made(creeplaw.NewFactorTable([]float64{500.3, 811.1, 1400.7}, []float64{0.013, 1.07, 91.3},
			creeplaw.TableOptions{Outside: creeplaw.Extrapolated})),
	}
}

func composed() []sample {
	norton := made(creeplaw.NewNorton(1.37e-17, 5.3))
	sinh := made(creeplaw.NewGarofalo(1.7e-9, 0.053, 3.1))
	primary := made(creeplaw.NewBaileyNortonAt(1.3e-3, 103, 97, 4.7, 0.41))
	hot := made(creeplaw.WithTemperature(norton, factors()["NewArrheniusAt"]))
	mukherjee := steady()[15].law
	pascal := creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second}
	all := []sample{
		{"sum", "NewSum", made(creeplaw.NewSum(primary, hot, made(creeplaw.NewSum(norton, sinh))))},
		{"series", "NewSeries", made(creeplaw.NewSeries(norton, sinh))},
		{"threshold", "WithThreshold", made(creeplaw.WithThreshold(norton, 23.7))},
		{"tabulated", "NewTabulated", made(creeplaw.NewTabulated([]float64{501.7, 1403.1}, []creeplaw.Law{norton, hot},
			creeplaw.TableOptions{Against: creeplaw.PlainTemperature, Outside: creeplaw.Held}))},
		{"in other units", "InUnits", made(creeplaw.InUnits(made(creeplaw.NewSum(primary, norton)),
			creeplaw.Units{Stress: creeplaw.KilopoundPerSquareInch, Time: creeplaw.Day}, megapascalHour))},
		{"in units without a name", "InUnits", made(creeplaw.InUnits(norton, creeplaw.Units{Stress: 98066.5, Time: 7200},
			megapascalHour))},
		{"tied to Pa and s, in others", "InUnits", made(creeplaw.InUnits(mukherjee, pascal, megapascalHour))},
		{"the same in a sum", "InUnits", made(creeplaw.NewSum(norton, made(creeplaw.InUnits(mukherjee, pascal,
			megapascalHour))))},
	}
	for name, factor := range factors() {
		all = append(all, sample{"temperature by " + name, "WithTemperature", made(creeplaw.WithTemperature(sinh, factor))})
	}
	return all
}

var megapascalHour = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}

// ownUnits are the units a sample is in.
func (s sample) ownUnits() creeplaw.Units {
	if bound, ok := s.law.(creeplaw.UnitBound); ok && bound.OwnUnits() != (creeplaw.Units{}) {
		return bound.OwnUnits()
	}
	return megapascalHour
}
