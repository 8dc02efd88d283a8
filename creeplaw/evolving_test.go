package creeplaw_test

import (
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

// steelDamage is invented, of the size of a low-alloy steel at about 600 °C in MPa and h.
func steelDamage() creeplaw.KachanovRabotnovParameters {
	return creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5, DamagePrefactor: 1e-12,
		DamageStressExponent: 4.5, DamageExponent: 6}
}

func damageBox() lawtest.Box {
	return lawtest.Box{
		Claims: lawtest.Logarithmic | lawtest.Evolving,
		Stress: lawtest.Range{1e-2, 1e4}, Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{500, 1500},
		Internal: []lawtest.Range{{0, 0.99}},
		Points:   60, // each is differenced by every argument
	}
}

func TestKachanovRabotnovConforms(t *testing.T) {
	conform(t, "von Mises", made(creeplaw.NewKachanovRabotnov(steelDamage())), damageBox())
	p := steelDamage()
	p.RuptureStress = creeplaw.RuptureStress{Principal: 0.3, Mean: 0.1}
	conform(t, "Hayhurst", made(creeplaw.NewKachanovRabotnov(p)), damageBox())
	p.RuptureStress = creeplaw.RuptureStress{Principal: 1}
	p.CreepTemperature, p.DamageTemperature = made(creeplaw.NewArrheniusAt(300e3, 873)), made(creeplaw.NewArrheniusAt(250e3, 873))
	conform(t, "principal, warm", made(creeplaw.NewKachanovRabotnov(p)), damageBox())
	steep := creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: 25, DamagePrefactor: 1e-4,
		DamageStressExponent: 20, DamageExponent: 30, ReferenceStress: 100}
	box := damageBox()
	box.Stress, box.LogStress = lawtest.Range{1, 1e4}, lawtest.Range{1e-8, 1e8}
	conform(t, "steep", made(creeplaw.NewKachanovRabotnov(steep)), box)
	steep.StressExponent, steep.DamageExponent = 1, 0
	conform(t, "linear", made(creeplaw.NewKachanovRabotnov(steep)), damageBox())
}

func TestLiuMurakamiConforms(t *testing.T) {
	p := creeplaw.LiuMurakamiParameters{Prefactor: 1.092e-20, StressExponent: 8.462, DamagePrefactor: 2.952e-16,
		DamageStressExponent: 6.789, DamageExponent: 7.346}
	box := damageBox()
	box.Internal[0] = lawtest.Range{1e-3, 1} // ω^3/2 has no third derivative at 0
	conform(t, "von Mises", made(creeplaw.NewLiuMurakami(p)), box)
	p.RuptureStress = creeplaw.RuptureStress{Principal: 0.48, Mean: 0.2}
	p.CreepTemperature, p.DamageTemperature = made(creeplaw.NewArrheniusAt(300e3, 873)), made(creeplaw.NewArrheniusAt(250e3, 873))
	conform(t, "Hayhurst, warm", made(creeplaw.NewLiuMurakami(p)), box)
}

func TestCavitationConforms(t *testing.T) {
	p := creeplaw.CavitationParameters{Prefactor: 2.1618e-9, StressCoefficient: 0.20524, Hardening: 24326,
		HardeningSaturation: 0.5929, Ageing: 9.2273e-5, Cavitation: 1.8537}
	box := damageBox()
	box.Stress, box.LogStress = lawtest.Range{1e-2, 300}, lawtest.Range{1e-9, 500}
	box.Internal = []lawtest.Range{{0, 0.8}, {0, 0.9}, {0, 0.3}}
	conform(t, "Perrin–Hayhurst", made(creeplaw.NewPerrinHayhurst(p)), box)
	conform(t, "Kowalewski–Hayhurst–Dyson", made(creeplaw.NewKowalewskiHayhurstDyson(p)), box)
	p.TriaxialityExponent, p.RuptureCavitation = 2.8, 1./3
	p.CreepTemperature, p.AgeingTemperature = made(creeplaw.NewArrheniusAt(300e3, 873)), made(creeplaw.NewArrheniusAt(250e3, 873))
	conform(t, "Perrin–Hayhurst, triaxial, warm", made(creeplaw.NewPerrinHayhurst(p)), box)
	conform(t, "Kowalewski–Hayhurst–Dyson, triaxial, warm", made(creeplaw.NewKowalewskiHayhurstDyson(p)), box)
}

func TestAnandConforms(t *testing.T) {
	box := damageBox()
	box.Stress, box.LogStress = lawtest.Range{1e-2, 100}, lawtest.Range{1e-9, 300}
	box.Temperature, box.Internal[0] = lawtest.Range{200, 450}, lawtest.Range{5, 100}
	conform(t, "62Sn36Pb2Ag", made(creeplaw.NewAnand(tinLead())), box)
	p := tinLead()
	p.HardeningExponent = 1
	conform(t, "linear hardening", made(creeplaw.NewAnand(p)), box)
}

// tinLead is 62Sn36Pb2Ag in MPa and s; Q is given by Q/R = 11262 K. C. H. Wang (2001), from memory, see published-values 3.3.
func tinLead() creeplaw.AnandParameters {
	return creeplaw.AnandParameters{InitialResistance: 42.32, ActivationEnergy: 11262 * creeplaw.GasConstant, Prefactor: 2.30e7,
		StressMultiplier: 11, RateSensitivity: 0.303, Hardening: 4121.31, SaturationCoefficient: 80.79,
		SaturationExponent: 0.0212, HardeningExponent: 1.38}
}

func TestOmegaConforms(t *testing.T) {
	norton := made(creeplaw.NewNortonAt(1e-6, 100, 5))
	primary := made(creeplaw.NewBaileyNortonAt(1e-3, 100, 100, 5, 0.4))
	conform(t, "Norton", made(creeplaw.NewOmega(norton, 50)), wide())
	conform(t, "after primary", made(creeplaw.NewOmega(primary, 50)), representable(12.5))
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{2, 30}, Strain: lawtest.Range{1e-8, 0.5},
		Temperature: lawtest.Range{700, 900}, LogStress: lawtest.Range{1e-6, 1e4}}
	conform(t, "polynomials", made(creeplaw.NewOmegaFromPolynomials(carbonSteel())), box)
}

// carbonSteel is the set of API 579-1/ASME FFS-1 as remembered, see published-values 3.5; the ranges are invented.
func carbonSteel() creeplaw.OmegaPolynomials {
	return creeplaw.OmegaPolynomials{
		Rate:         [5]float64{-16.3, 38060, -9165, 1200, -600},
		Acceleration: [5]float64{-1.0, 3060, 135, -760, 247},
		Stress:       [2]float64{2, 30},
		Temperature:  [2]float64{700, 900},
	}
}
