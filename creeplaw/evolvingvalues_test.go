package creeplaw_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// The sets of these tests are from memory, as package creeplaw/published repeats them, and are held against the rate or the
// life of their law in a reference table, "published-values", that was computed by other means.

// evolve is the evolution in tension.
func evolve(law creeplaw.Evolving, stress, temperature float64, internal ...float64) creeplaw.Evolution {
	var v [creeplaw.MaxVariables]float64
	copy(v[:], internal)
	return law.Evolve(creeplaw.InTension(creeplaw.Point{Stress: stress, Temperature: temperature}, v))
}

// rateOfVariable is v̇.
func rateOfVariable(e *creeplaw.Evolution, i int) float64 {
	return e.Internal[i].Value * math.Exp(e.Internal[i].LogScale)
}

func TestKachanovRabotnovIsItsFormula(t *testing.T) {
	law := made(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 6.599e-16, StressExponent: 6.108,
		DamagePrefactor: 5.998e-14, DamageStressExponent: 5.767, DamageExponent: 4.5,
		RuptureStress: creeplaw.RuptureStress{Principal: 0.3}}))
	virgin := evolve(law, 40, 913)
	check.Rel(t, "rate at 40 MPa", math.Exp(virgin.LogRate), 4.0259e-6, 2e-5) // five digits are printed
	check.Rel(t, "life at 40 MPa", 1/(5.5*rateOfVariable(&virgin, 0)), 1748.04, 5e-6)
	for _, omega := range []float64{0, 0.25, 0.9} {
		e := evolve(law, 70, 913, omega)
		check.Rel(t, "creep rate", math.Exp(e.LogRate), 6.599e-16*math.Pow(70/(1-omega), 6.108), 1e-13)
		check.Rel(t, "damage rate", rateOfVariable(&e, 0), 5.998e-14*math.Pow(70, 5.767)/math.Pow(1-omega, 4.5), 1e-13)
	}
	for _, omega := range []float64{1, 1.5, math.NaN()} {
		assert.True(t, math.IsNaN(evolve(law, 70, 913, omega).LogRate), omega)
	}
}

func TestLiuMurakamiIsItsFormula(t *testing.T) {
	for _, c := range []struct {
		p                  creeplaw.LiuMurakamiParameters
		stress, rate, life float64
	}{
		{creeplaw.LiuMurakamiParameters{Prefactor: 1.092e-20, StressExponent: 8.462, DamagePrefactor: 2.952e-16, DamageStressExponent: 6.789,
			DamageExponent: 7.346}, 70, 4.4817e-5, 1008.12},
		{creeplaw.LiuMurakamiParameters{Prefactor: 1.47e-29, StressExponent: 10.147, DamagePrefactor: 2.73e-30, DamageStressExponent: 10.949,
			DamageExponent: 6.35}, 240, 2.0860e-5, 3183.5},
	} {
		law := made(creeplaw.NewLiuMurakami(c.p))
		virgin := evolve(law, c.stress, 923)
		check.Rel(t, "rate", math.Exp(virgin.LogRate), c.rate, 3e-5) // the digits printed
		q := c.p.DamageExponent
		check.Rel(t, "life", -math.Expm1(-q)/q/rateOfVariable(&virgin, 0), c.life, 3e-5)
		n := c.p.StressExponent
		e := evolve(law, c.stress, 923, 0.4)
		more := math.Exp(2 * (n + 1) / (math.Pi * math.Sqrt(1+3/n)) * math.Pow(0.4, 1.5))
		check.Rel(t, "damaged rate", math.Exp(e.LogRate), math.Exp(virgin.LogRate)*more, 1e-13)
		check.Rel(t, "damage rate", rateOfVariable(&e, 0), rateOfVariable(&virgin, 0)*math.Exp(0.4*q), 1e-13)
	}
}

// TestSecondaryRates: hardening has saturated, nothing has aged.
func TestSecondaryRates(t *testing.T) {
	steel := made(creeplaw.NewPerrinHayhurst(creeplaw.CavitationParameters{Prefactor: 2.1618e-9, StressCoefficient: 0.20524,
		Hardening: 24326, HardeningSaturation: 0.5929, Ageing: 9.2273e-5, Cavitation: 1.8537}))
	aluminium := made(creeplaw.NewKowalewskiHayhurstDyson(creeplaw.CavitationParameters{Prefactor: 2.960e-11, StressCoefficient: 7.167e-2,
		Hardening: 1.370e5, HardeningSaturation: 0.2032, Ageing: 1.931e-4, Cavitation: 6.630}))
	for _, c := range []struct {
		law                      creeplaw.Evolving
		stress, saturation, want float64
	}{{steel, 100, 0.5929, 4.5968e-6}, {aluminium, 241.3, 0.2032, 1.4281e-5}} {
		e := evolve(c.law, c.stress, 800, c.saturation)
		check.Rel(t, "secondary rate", math.Exp(e.LogRate), c.want, 3e-5) // five digits are printed
		check.Abs(t, "hardening has ended", rateOfVariable(&e, 0), 0, 1e-300)
	}
}

// TestCavitationIsItsFormula evaluates the equations as the comments state them.
func TestCavitationIsItsFormula(t *testing.T) {
	p := creeplaw.CavitationParameters{Prefactor: 2e-9, StressCoefficient: 0.1, Hardening: 2e4, HardeningSaturation: 0.5, Ageing: 1e-4,
		Cavitation: 2, TriaxialityExponent: 1.5}
	at := creeplaw.EvolvingPoint{Point: creeplaw.Point{Stress: 80, Temperature: 800}, MeanStress: 60, PrincipalStress: 110,
		Internal: [creeplaw.MaxVariables]float64{0.2, 0.3, 0.1}}
	x := 0.1 * 80 * 0.8 / 0.7
	for name, c := range map[string]struct {
		law  creeplaw.Evolving
		rate float64
	}{
		"Perrin–Hayhurst":           {made(creeplaw.NewPerrinHayhurst(p)), 2e-9 * math.Sinh(x/0.9)},
		"Kowalewski–Hayhurst–Dyson": {made(creeplaw.NewKowalewskiHayhurstDyson(p)), 2e-9 * math.Sinh(x) / math.Pow(0.9, x/math.Tanh(x))},
	} {
		e := c.law.Evolve(at)
		check.Rel(t, name, math.Exp(e.LogRate), c.rate, 1e-13)
		check.Rel(t, name+" hardening", rateOfVariable(&e, 0), 2e4/80*(1-0.2/0.5)*c.rate, 1e-13)
		check.Rel(t, name+" ageing", rateOfVariable(&e, 1), 1e-4/3*math.Pow(0.7, 4), 1e-13)
		check.Rel(t, name+" cavitation", rateOfVariable(&e, 2), 2*c.rate*math.Pow(110./80, 1.5), 1e-13)
		squeezed := at
		squeezed.PrincipalStress = -10
		e = c.law.Evolve(squeezed)
		assert.Zero(t, rateOfVariable(&e, 2), "compression opens no cavities")
	}
}

// TestHayhurstStressByHand: stresses of 100 with α = 0.3, β = 0.1 by hand; the first and the last line are published-values 1.23
// (derived there).
func TestHayhurstStressByHand(t *testing.T) {
	blend, hayhurst := creeplaw.RuptureStress{Principal: 0.3}, creeplaw.RuptureStress{Principal: 0.3, Mean: 0.1}
	root3 := math.Sqrt(3)
	for _, c := range []struct {
		name                         string
		r                            creeplaw.RuptureStress
		mises, mean, principal, want float64
	}{
		{"torsion, α", blend, 100 * root3, 0, 100, 151.2435565},
		{"torsion", hayhurst, 100 * root3, 0, 100, 30 + 60*root3},
		{"tension", hayhurst, 100, 100. / 3, 100, 100},
		{"compression", hayhurst, 100, -100. / 3, 0, 50},
		{"equal biaxial tension", hayhurst, 100, 200. / 3, 100, 110},
		{"hydrostatic tension", hayhurst, 0, 100, 100, 60},
		{"von Mises", creeplaw.RuptureStress{}, 123, 7, math.NaN(), 123},
		{"(100, 50, 0)", hayhurst, 50 * root3, 50, 100, 96.96152423},
	} {
		check.Rel(t, c.name, c.r.At(c.mises, c.mean, c.principal), c.want, 1e-9) // ten digits are printed
	}
}

// TestAnandSaturationStress: at the saturation stress printed for 1e-3 /s, 298.15 K (1100 aluminium: 673.15 K), the creep rate is
// 1e-3 /s at the deformation resistance that no longer changes.
func TestAnandSaturationStress(t *testing.T) {
	for name, c := range map[string]struct {
		p                   creeplaw.AnandParameters // activation energy as Q/R
		temperature, stress float64
	}{
		"62Sn36Pb2Ag, Wang":     {creeplaw.AnandParameters{InitialResistance: 42.32, ActivationEnergy: 11262, Prefactor: 2.30e7, StressMultiplier: 11, RateSensitivity: 0.303, Hardening: 4121.31, SaturationCoefficient: 80.79, SaturationExponent: 0.0212, HardeningExponent: 1.38}, 298.15, 48.426568},
		"60Sn40Pb, Wang":        {creeplaw.AnandParameters{InitialResistance: 56.33, ActivationEnergy: 10830, Prefactor: 1.49e7, StressMultiplier: 11, RateSensitivity: 0.303, Hardening: 2640.75, SaturationCoefficient: 80.42, SaturationExponent: 0.0231, HardeningExponent: 1.34}, 298.15, 45.321491},
		"96.5Sn3.5Ag, Wang":     {creeplaw.AnandParameters{InitialResistance: 39.09, ActivationEnergy: 8900, Prefactor: 2.23e4, StressMultiplier: 6, RateSensitivity: 0.182, Hardening: 3321.15, SaturationCoefficient: 73.81, SaturationExponent: 0.018, HardeningExponent: 1.82}, 298.15, 47.333898},
		"97.5Pb2.5Sn, Wang":     {creeplaw.AnandParameters{InitialResistance: 15.09, ActivationEnergy: 15583, Prefactor: 3.25e12, StressMultiplier: 7, RateSensitivity: 0.143, Hardening: 1787.02, SaturationCoefficient: 72.73, SaturationExponent: 0.00437, HardeningExponent: 3.73}, 298.15, 34.197101},
		"62Sn36Pb2Ag, Darveaux": {creeplaw.AnandParameters{InitialResistance: 12.41, ActivationEnergy: 9400, Prefactor: 4e6, StressMultiplier: 1.5, RateSensitivity: 0.303, Hardening: 1378.95, SaturationCoefficient: 13.79, SaturationExponent: 0.07, HardeningExponent: 1.3}, 298.15, 63.057605},
		"Sn3Ag0.5Cu":            {creeplaw.AnandParameters{InitialResistance: 1.3, ActivationEnergy: 9000, Prefactor: 500, StressMultiplier: 7.1, RateSensitivity: 0.3, Hardening: 5900, SaturationCoefficient: 39.4, SaturationExponent: 0.03, HardeningExponent: 1.4}, 298.15, 53.815389},
		"1100 aluminium":        {creeplaw.AnandParameters{InitialResistance: 35, ActivationEnergy: 175.3e3 / creeplaw.GasConstant, Prefactor: 1.91e7, StressMultiplier: 7.00, RateSensitivity: 0.23348, Hardening: 1115.6, SaturationCoefficient: 18.92, SaturationExponent: 0.07049, HardeningExponent: 1.3}, 673.15, 11.519088},
	} {
		c.p.ActivationEnergy *= creeplaw.GasConstant
		law := made(creeplaw.NewAnand(c.p))
		// The resistance at which ṡ changes its sign, by bisection of the law itself.
		low, high := 1e-3, 1e4
		for range 100 {
			s := math.Sqrt(low * high)
			if e := evolve(law, c.stress, c.temperature, s); e.Internal[0].Value > 0 {
				low = s
			} else {
				high = s
			}
		}
		e := evolve(law, c.stress, c.temperature, low)
		// The stress is printed to eight digits; the rate magnifies the error of the last one by its exponent, below 30.
		check.Rel(t, name, math.Exp(e.LogRate), 1e-3, 30*2e-8)
	}
}

// TestOmegaPolynomials: the material annex sets at 10 ksi and 1000 °F, published-values 3.5.
func TestOmegaPolynomials(t *testing.T) {
	chromium := carbonSteel()
	chromium.Rate, chromium.Acceleration = [5]float64{-21.86, 51635, -7330, -2577, 0}, [5]float64{-1.85, 7205, -2436, 0, 0}
	const temperature = (1000-32)/1.8 + 273.15
	for name, c := range map[string]struct {
		p                     creeplaw.OmegaPolynomials
		rate, omega, exponent float64
	}{
		"carbon steel":    {carbonSteel(), 1.252983e-4, 6.870468, 5.866438},
		"2.25Cr-1Mo, N+T": {chromium, 1.901858e-7, 26.08785, 8.550685},
	} {
		law := made(creeplaw.NewOmegaFromPolynomials(c.p))
		l := law.LogRate(creeplaw.Point{Stress: 10, Temperature: temperature})
		check.Rel(t, name+" initial rate", math.Exp(l.Value), c.rate, 1e-6) // seven digits are printed
		check.Rel(t, name+" exponent", l.ByLogStress, c.exponent, 1e-6)
		l = law.LogRate(creeplaw.Point{Stress: 10, Strain: 0.01, Temperature: temperature})
		check.Rel(t, name+" Ω", l.ByLogStrain/0.01, c.omega, 1e-6)
	}
	// Beyond the range of stress the initial rate goes on with the exponent at its end.
	law := made(creeplaw.NewOmegaFromPolynomials(carbonSteel()))
	edge := law.LogRate(creeplaw.Point{Stress: 30, Temperature: temperature})
	far := law.LogRate(creeplaw.Point{Stress: 300, Temperature: temperature})
	check.Rel(t, "exponent beyond", far.ByLogStress, edge.ByLogStress, 1e-13)
	check.Rel(t, "rate beyond", far.Value, edge.Value+math.Log(10)*edge.ByLogStress, 1e-13)
	assert.True(t, math.IsNaN(law.Rate(creeplaw.Point{Stress: 10, Temperature: 650}).Value), "colder than the range")
}

// TestCompositionsRefuseVariables: nothing drops the variables of a law without a word.
func TestCompositionsRefuseVariables(t *testing.T) {
	law := made(creeplaw.NewKachanovRabotnov(steelDamage()))
	norton := made(creeplaw.NewNortonAt(1e-6, 100, 5))
	units := creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}
	for name, build := range map[string]func() error{
		"sum":       func() error { _, err := creeplaw.NewSum(norton, law); return err },
		"series":    func() error { _, err := creeplaw.NewSeries(norton, law); return err },
		"thermal":   func() error { _, err := creeplaw.WithTemperature(law, creeplaw.Arrhenius{}); return err },
		"threshold": func() error { _, err := creeplaw.WithThreshold(law, 10); return err },
		"units":     func() error { _, err := creeplaw.InUnits(law, units, units); return err },
		"Omega":     func() error { _, err := creeplaw.NewOmega(law, 50); return err },
		"table": func() error {
			_, err := creeplaw.NewTabulated([]float64{800, 900}, []creeplaw.Law{norton, law}, creeplaw.TableOptions{})
			return err
		},
	} {
		var c *creeplaw.CompositionError
		require.True(t, errors.As(build(), &c), name)
		assert.Equal(t, "damage", c.Variable, name)
		assert.Contains(t, c.Error(), "damage, that would be lost")
	}
}

// TestEvolvingConstructorsRefuse: each bad parameter by name.
func TestEvolvingConstructorsRefuse(t *testing.T) {
	bad := []float64{-1, math.NaN(), math.Inf(1)}
	refuses := func(law, parameter string, zero bool, build func(x float64) error) {
		t.Helper()
		for _, x := range append(bad, map[bool][]float64{true: {0}}[zero]...) {
			var e *creeplaw.ParameterError
			if assert.True(t, errors.As(build(x), &e), "%s: %s = %v", law, parameter, x) {
				assert.Equal(t, parameter, e.Parameter)
				assert.Equal(t, law, e.Law)
			}
		}
	}
	kachanov := func(set func(p *creeplaw.KachanovRabotnovParameters, x float64)) func(float64) error {
		return func(x float64) error {
			p := steelDamage()
			set(&p, x)
			_, err := creeplaw.NewKachanovRabotnov(p)
			return err
		}
	}
	const kr = "Kachanov–Rabotnov"
	refuses(kr, "prefactor", true, kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.Prefactor = x }))
	refuses(kr, "stress exponent", true, kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.StressExponent = x }))
	refuses(kr, "damage prefactor", true, kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.DamagePrefactor = x }))
	refuses(kr, "damage stress exponent", true, kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.DamageStressExponent = x }))
	refuses(kr, "damage exponent", false, kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.DamageExponent = x }))
	refuses(kr, "reference stress", false, kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.ReferenceStress = x }))
	refuses(kr, "share of the greatest principal stress in the rupture stress", false,
		kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.RuptureStress.Principal = x }))
	refuses(kr, "share of the mean stress in the rupture stress", false,
		kachanov(func(p *creeplaw.KachanovRabotnovParameters, x float64) { p.RuptureStress.Mean = x }))

	liu := func(x float64) error {
		_, err := creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 1, StressExponent: 1, DamagePrefactor: 1,
			DamageStressExponent: 1, DamageExponent: x})
		return err
	}
	refuses("Liu–Murakami", "damage exponent", true, liu)
	cavitation := func(set func(p *creeplaw.CavitationParameters, x float64)) func(float64) error {
		return func(x float64) error {
			p := creeplaw.CavitationParameters{Prefactor: 1e-9, StressCoefficient: 0.1, Hardening: 1e4, HardeningSaturation: 0.5}
			set(&p, x)
			_, err := creeplaw.NewPerrinHayhurst(p)
			return err
		}
	}
	const ph = "Perrin–Hayhurst"
	refuses(ph, "hardening saturation", true, cavitation(func(p *creeplaw.CavitationParameters, x float64) { p.HardeningSaturation = x }))
	refuses(ph, "hardening", true, cavitation(func(p *creeplaw.CavitationParameters, x float64) { p.Hardening = x }))
	refuses(ph, "ageing", false, cavitation(func(p *creeplaw.CavitationParameters, x float64) { p.Ageing = x }))
	refuses(ph, "cavitation", false, cavitation(func(p *creeplaw.CavitationParameters, x float64) { p.Cavitation = x }))
	refuses(ph, "cavitation at rupture", false, cavitation(func(p *creeplaw.CavitationParameters, x float64) { p.RuptureCavitation = x }))
	anand := func(set func(p *creeplaw.AnandParameters, x float64)) func(float64) error {
		return func(x float64) error {
			p := tinLead()
			set(&p, x)
			_, err := creeplaw.NewAnand(p)
			return err
		}
	}
	refuses("Anand", "initial resistance", true, anand(func(p *creeplaw.AnandParameters, x float64) { p.InitialResistance = x }))
	refuses("Anand", "rate sensitivity", true, anand(func(p *creeplaw.AnandParameters, x float64) { p.RateSensitivity = x }))
	refuses("Anand", "hardening exponent", true, anand(func(p *creeplaw.AnandParameters, x float64) { p.HardeningExponent = x }))
	refuses("Omega", "coefficient of acceleration", true, func(x float64) error {
		_, err := creeplaw.NewOmega(made(creeplaw.NewNortonAt(1e-6, 100, 5)), x)
		return err
	})
	refuses("Omega", "highest stress", true, func(x float64) error {
		p := carbonSteel()
		p.Stress[1] = x
		_, err := creeplaw.NewOmegaFromPolynomials(p)
		return err
	})
}
