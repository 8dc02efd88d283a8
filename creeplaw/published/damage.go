package published

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// The sets of this file are laws with internal variables: damage, and deformation resistance. Their Law is a creeplaw.Evolving.

const damageCaution = generalCaution + "Fitted to a few batches, and to lives of some thousand hours: lives scatter by a factor of " +
	"two to five within one grade, and the law is no basis for a longer life than was tested. "

// P91At650C is creep and damage of P91 steel at 650 °C after Hyde, Saber and Sun, Liu–Murakami in MPa and h,
//
//	ṗ = 1.092e-20 σ^8.462 exp[…],  ω̇ = 2.952e-16 σ^6.789 (1-e^-q)/q e^(qω),  q = 7.346
//
// with the von Mises stress driving damage: the multiaxial parameter of the source is not on record here.
func P91At650C() Set {
	return Set{
		Record: Record{
			Name:     "P91 steel at 650 °C, Liu–Murakami",
			Citation: "T. H. Hyde, M. Saber, W. Sun, Eng. Fract. Mech. 77 (2010); M. Saber, PhD thesis, Nottingham 2011",
			Status:   FromMemoryMedium, Units: megapascalHour, Range: oneTemperature(923.15),
			Caution: damageCaution + "Damage by the von Mises stress: the multiaxial parameter is not on record here.",
		},
		Law: known(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 1.092e-20, StressExponent: 8.462,
			DamagePrefactor: 2.952e-16, DamageStressExponent: 6.789, DamageExponent: 7.346})),
	}
}

// CrMoVAt640C is creep and damage of 0.5Cr0.5Mo0.25V steel, parent metal, at 640 °C after Hyde, Sun and Becker,
// Kachanov–Rabotnov in MPa and h,
//
//	ṗ = 6.599e-16 (σ/(1-ω))^6.108,  ω̇ = 5.998e-14 σr^5.767/(1-ω)^4.5,  σr = 0.3 σ1 + 0.7 σ
func CrMoVAt640C() Set {
	return Set{
		Record: Record{
			Name:     "0.5Cr0.5Mo0.25V steel at 640 °C, Kachanov–Rabotnov",
			Citation: "T. H. Hyde, W. Sun, A. A. Becker, Int. J. Mech. Sci. 38 (1996), and later papers from Nottingham",
			Status:   FromMemoryMedium, Units: megapascalHour, Range: oneTemperature(913.15),
			Caution: damageCaution + "Parent metal of a weld.",
		},
		Law: known(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 6.599e-16, StressExponent: 6.108,
			DamagePrefactor: 5.998e-14, DamageStressExponent: 5.767, DamageExponent: 4.5,
			RuptureStress: creeplaw.RuptureStress{Principal: 0.3}})),
	}
}

// Steel316DamageAt600C is creep and damage of type 316 steel at 600 °C after Hyde and others, Liu–Murakami in MPa and h,
//
//	ṗ = 1.47e-29 σ^10.147 exp[…],  ω̇ = 2.73e-30 σr^10.949 (1-e^-q)/q e^(qω),  q = 6.35,  σr = 0.48 σ1 + 0.52 σ
//
// Its creep without damage is that of Steel316At600C, whose parameters were read; those of damage are from memory.
func Steel316DamageAt600C() Set {
	return Set{
		Record: Record{
			Name:     "316 stainless steel at 600 °C, Liu–Murakami",
			Citation: "T. H. Hyde and others, Nottingham, about 2010; creep: 13th International Conference on Fracture, Beijing 2013, paper 1381",
			Status:   FromMemoryMedium, Units: megapascalHour, Range: oneTemperature(873.15),
			Caution: damageCaution + "The damage parameters are less well known here than those of creep.",
		},
		Law: known(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 1.47e-29, StressExponent: 10.147,
			DamagePrefactor: 2.73e-30, DamageStressExponent: 10.949, DamageExponent: 6.35,
			RuptureStress: creeplaw.RuptureStress{Principal: 0.48}})),
	}
}

// CrMoVAt590C is creep of 0.5Cr0.5Mo0.25V steel at 590 °C with hardening, ageing and cavitation after Perrin and Hayhurst, in
// MPa and h: A = 2.1618e-9 /h, B = 0.20524 /MPa, C = 1.8537, h = 24326 MPa, H* = 0.5929, Kc = 9.2273e-5 /h.
func CrMoVAt590C() Set {
	return Set{
		Record: Record{
			Name:     "0.5Cr0.5Mo0.25V steel at 590 °C, Perrin–Hayhurst",
			Citation: "I. J. Perrin, D. R. Hayhurst, J. Strain Anal. 31 (1996) 299; Q. Xu, D. R. Hayhurst 2003",
			Status:   FromMemoryMedium, Units: megapascalHour, Range: oneTemperature(863.15),
			Caution: damageCaution + "Uniaxial: the exponent of triaxiality is not on record here, and cavitation follows the creep " +
				"strain under any stress. Rupture is where the cavitation comes to 1; the literature also takes a third.",
		},
		Law: known(creeplaw.NewPerrinHayhurst(creeplaw.CavitationParameters{Prefactor: 2.1618e-9, StressCoefficient: 0.20524,
			Hardening: 24326, HardeningSaturation: 0.5929, Ageing: 9.2273e-5, Cavitation: 1.8537})),
	}
}

// AluminiumAt150C is creep of an aluminium alloy to BS 1472 at 150 °C with hardening, ageing and cavitation after Kowalewski,
// Hayhurst and Dyson, in MPa and h: A = 2.960e-11 /h, B = 7.167e-2 /MPa, D = 6.630, h = 1.370e5 MPa, H* = 0.2032,
// Kc = 1.931e-4 /h; for use with E = 71.1 GPa.
func AluminiumAt150C() Set {
	return Set{
		Record: Record{
			Name:     "aluminium alloy BS 1472 at 150 °C, Kowalewski–Hayhurst–Dyson",
			Citation: "Z. L. Kowalewski, D. R. Hayhurst, B. F. Dyson, J. Strain Anal. 29 (1994) 309–316",
			Status:   FromMemoryHighMedium, Units: megapascalHour, Range: oneTemperature(423.15),
			Caution: damageCaution + "Uniaxial: the exponent of triaxiality is not on record here.",
		},
		Law: known(creeplaw.NewKowalewskiHayhurstDyson(creeplaw.CavitationParameters{Prefactor: 2.960e-11, StressCoefficient: 7.167e-2,
			Hardening: 1.370e5, HardeningSaturation: 0.2032, Ageing: 1.931e-4, Cavitation: 6.630})),
	}
}

func oneTemperature(t float64) Range {
	return Range{Temperature: Interval{t, t}, Basis: "the one temperature of the source; the stresses of its tests are not on record here"}
}

// anandSet is Anand's law with Q/R in K, as the tables print it.
func anandSet(name, citation string, status Status, in Range, p creeplaw.AnandParameters) Set {
	p.ActivationEnergy *= creeplaw.GasConstant
	return Set{
		Record: Record{Name: name + ", Anand", Citation: citation, Status: status, Units: megapascalSecond, Range: in,
			Caution: generalCaution + "Creep and plasticity as one strain, isotropic, without damage. Sets for one alloy differ by " +
				"how and how fast it was tested."},
		Law: known(creeplaw.NewAnand(p)),
	}
}

const wang2001 = "C. H. Wang and others, J. Electron. Packag. 123 (2001) 247–253"

func tinLeadRange() Range {
	return Range{Temperature: Interval{218.15, 423.15}, Basis: "nominal, -55 to 150 °C as such joints are used (common practice); the " +
		"range of the tests is not on record here"}
}

// SolderTinLeadSilverAnand is 62Sn36Pb2Ag after Wang and others, Anand's law in MPa and s.
func SolderTinLeadSilverAnand() Set {
	return anandSet("62Sn36Pb2Ag solder, Wang", wang2001, FromMemoryHigh, tinLeadRange(), creeplaw.AnandParameters{
		InitialResistance: 42.32, ActivationEnergy: 11262, Prefactor: 2.30e7, StressMultiplier: 11, RateSensitivity: 0.303,
		Hardening: 4121.31, SaturationCoefficient: 80.79, SaturationExponent: 0.0212, HardeningExponent: 1.38})
}

// SolderTinLeadAnand is 60Sn40Pb after Wang and others, Anand's law in MPa and s.
func SolderTinLeadAnand() Set {
	return anandSet("60Sn40Pb solder, Wang", wang2001, FromMemoryHigh, tinLeadRange(), creeplaw.AnandParameters{
		InitialResistance: 56.33, ActivationEnergy: 10830, Prefactor: 1.49e7, StressMultiplier: 11, RateSensitivity: 0.303,
		Hardening: 2640.75, SaturationCoefficient: 80.42, SaturationExponent: 0.0231, HardeningExponent: 1.34})
}

// SolderTinSilverAnand is 96.5Sn3.5Ag after Wang and others, Anand's law in MPa and s.
func SolderTinSilverAnand() Set {
	return anandSet("96.5Sn3.5Ag solder, Wang", wang2001, FromMemoryHigh, tinSilverCopperRange(), creeplaw.AnandParameters{
		InitialResistance: 39.09, ActivationEnergy: 8900, Prefactor: 2.23e4, StressMultiplier: 6, RateSensitivity: 0.182,
		Hardening: 3321.15, SaturationCoefficient: 73.81, SaturationExponent: 0.018, HardeningExponent: 1.82})
}

// SolderLeadTinAnand is 97.5Pb2.5Sn after Wang and others, Anand's law in MPa and s.
func SolderLeadTinAnand() Set {
	return anandSet("97.5Pb2.5Sn solder, Wang", wang2001, FromMemoryHigh, tinLeadRange(), creeplaw.AnandParameters{
		InitialResistance: 15.09, ActivationEnergy: 15583, Prefactor: 3.25e12, StressMultiplier: 7, RateSensitivity: 0.143,
		Hardening: 1787.02, SaturationCoefficient: 72.73, SaturationExponent: 0.00437, HardeningExponent: 3.73})
}

// SolderTinLeadSilverAnandDarveaux is 62Sn36Pb2Ag after Darveaux, Anand's law in MPa and s.
func SolderTinLeadSilverAnandDarveaux() Set {
	return anandSet("62Sn36Pb2Ag solder, Darveaux", "R. Darveaux, Proc. 50th Electronic Components and Technology Conference, 2000",
		FromMemoryHigh, tinLeadRange(), creeplaw.AnandParameters{
			InitialResistance: 12.41, ActivationEnergy: 9400, Prefactor: 4e6, StressMultiplier: 1.5, RateSensitivity: 0.303,
			Hardening: 1378.95, SaturationCoefficient: 13.79, SaturationExponent: 0.07, HardeningExponent: 1.3})
}

// SolderSACAnandReinikainen is Sn3Ag0.5Cu after Reinikainen and others, Anand's law in MPa and s.
func SolderSACAnandReinikainen() Set {
	return anandSet("Sn3Ag0.5Cu solder, Reinikainen", "T. O. Reinikainen and others, 2005 (where printed is not on record here)",
		FromMemoryMedium, tinSilverCopperRange(), creeplaw.AnandParameters{
			InitialResistance: 1.3, ActivationEnergy: 9000, Prefactor: 500, StressMultiplier: 7.1, RateSensitivity: 0.3,
			Hardening: 5900, SaturationCoefficient: 39.4, SaturationExponent: 0.03, HardeningExponent: 1.4})
}

// EvolvingSets returns every set with internal variables, in a fixed order. 1100 aluminium after Brown, Kim and Anand is left
// out: its initial resistance depends on temperature, which the law has no place for.
func EvolvingSets() []Set {
	return []Set{P91At650C(), CrMoVAt640C(), Steel316DamageAt600C(), CrMoVAt590C(), AluminiumAt150C(),
		SolderTinLeadSilverAnand(), SolderTinLeadAnand(), SolderTinSilverAnand(), SolderLeadTinAnand(),
		SolderTinLeadSilverAnandDarveaux(), SolderSACAnandReinikainen()}
}

// byParameters rebuilds a law in other units from its parameters. The laws of this file have none on a scale of temperature
// with another zero, and no logarithms.
func byParameters(law creeplaw.Parametric, own, wanted creeplaw.Units) (creeplaw.Law, error) {
	stress, time := float64(own.Stress/wanted.Stress), float64(own.Time/wanted.Time)
	if !(stress > 0 && time > 0) || math.IsInf(stress*time, 1) {
		return nil, &creeplaw.ParameterError{Law: "law in other units", Parameter: "size of the units wanted", Value: stress * time,
			Want: "positive and finite"}
	}
	var values []float64
	for _, p := range law.Parameters() {
		values = append(values, p.Value*math.Pow(stress, p.Dimension.Stress)*math.Pow(time, p.Dimension.Time))
	}
	return law.WithParameters(values)
}
