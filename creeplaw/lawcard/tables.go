package lawcard

import "example.com/holdtime/creeplaw"

// The numbers of the specimens do not matter, as long as the constructors take them.

func plain(name string, laws ...creeplaw.Parametric) kind {
	k := kind{name: name}
	for _, law := range laws {
		k.specimens = append(k.specimens, specimen{law, nil})
	}
	return k
}

// withPoint gives the first form of a kind, that with a prefactor, its form about a stress of one unit.
func (k kind) withPoint(point func(v []float64) (creeplaw.Law, error)) kind {
	k.specimens[0].point = point
	return k
}

func steadyKinds() []kind {
	path := creeplaw.Diffusivity{Prefactor: 1, ActivationEnergy: 1}
	modulus := creeplaw.ShearModulus{Value: 1, Reference: 300}
	return []kind{
		plain("Norton", must(creeplaw.NewNorton(1, 1)), must(creeplaw.NewNortonAt(1, 1, 1))).
			withPoint(func(v []float64) (creeplaw.Law, error) { return creeplaw.NewNortonAt(v[0], 1, v[1]) }),
		plain("double power law", must(creeplaw.NewDoublePower(1, 1, 1, 2)), must(creeplaw.NewDoublePowerAt(1, 1, 1, 2))),
		plain("Garofalo", must(creeplaw.NewGarofalo(1, 1, 1))),
		plain("exponential of stress", must(creeplaw.NewExponential(1, 1))),
		plain("Soderberg", must(creeplaw.NewSoderberg(1, 1))),
		plain("power law with exponential", must(creeplaw.NewPowerExponential(1, 1, 1))),
		plain("diffusional creep", must(creeplaw.NewDiffusional(1, 1, path, path)),
			must(creeplaw.NewNabarroHerring(1, 1, path)), must(creeplaw.NewCoble(1, 1, path))),
		plain("Mukherjee-Bird-Dorn", dislocation(modulus, path, false, false), dislocation(modulus, path, true, false),
			dislocation(modulus, path, false, true), dislocation(modulus, path, true, true)),
		plain("Darveaux-Banerji", must(creeplaw.NewDarveauxBanerji(creeplaw.ModulusSinh{Prefactor: 1, Modulus: modulus,
			StressScale: modulus, Exponent: 1}))),
	}
}

func dislocation(modulus creeplaw.ShearModulus, path creeplaw.Diffusivity, core, grain bool) creeplaw.Parametric {
	c := creeplaw.DislocationCreep{Prefactor: 1, StressExponent: 1, Modulus: modulus, Lattice: path, BurgersVector: 1}
	if core {
		c.Core = path
	}
	if grain {
		c.GrainSize, c.GrainExponent = 1, 1
	}
	return must(creeplaw.NewMukherjeeBirdDorn(c))
}

func hardeningKinds() []kind {
	return []kind{
		plain("Bailey-Norton", must(creeplaw.NewBaileyNorton(1, 1, 1)), must(creeplaw.NewBaileyNortonAt(1, 1, 1, 1, 1))).
			withPoint(func(v []float64) (creeplaw.Law, error) {
				return creeplaw.NewBaileyNortonAt(v[0], 1, 1, v[1], v[2])
			}),
		plain("strain hardening", must(creeplaw.NewStrainHardening(1, 1, 0)),
			must(creeplaw.NewStrainHardeningAt(1, 1, 1, 1, 0))).
			withPoint(func(v []float64) (creeplaw.Law, error) {
				return creeplaw.NewStrainHardeningAt(v[0], 1, 1, v[1], v[2])
			}),
	}
}

// The members that hold temperature factors, as their parameters are named in package creeplaw.
const (
	ofCreep  = "temperature factor of creep"
	ofDamage = "temperature factor of damage"
	ofAgeing = "temperature factor of ageing"
)

func damageKinds() []kind {
	return []kind{
		kachanovRabotnov(), liuMurakami(),
		cavitating("Perrin-Hayhurst",
			func(p creeplaw.CavitationParameters) (creeplaw.Parametric, error) {
				return creeplaw.NewPerrinHayhurst(p)
			}),
		cavitating("Kowalewski-Hayhurst-Dyson", func(p creeplaw.CavitationParameters) (creeplaw.Parametric, error) {
			return creeplaw.NewKowalewskiHayhurstDyson(p)
		}),
		plain("Omega polynomials", must(creeplaw.NewOmegaFromPolynomials(creeplaw.OmegaPolynomials{
			Rate: [5]float64{2: -1}, Stress: [2]float64{1, 2}, Temperature: [2]float64{1, 2}}))),
		plain("Anand", must(creeplaw.NewAnand(creeplaw.AnandParameters{InitialResistance: 1, Prefactor: 1,
			StressMultiplier: 1, RateSensitivity: 1, SaturationCoefficient: 1, HardeningExponent: 1}))),
	}
}

func kachanovRabotnov() kind {
	build := creeplaw.NewKachanovRabotnov
	p := creeplaw.KachanovRabotnovParameters{Prefactor: 1, StressExponent: 1, DamagePrefactor: 1, DamageStressExponent: 1}
	referred := p
	referred.ReferenceStress = 1
	k := plain("Kachanov-Rabotnov", must(build(p)), must(build(referred))).withPoint(func(v []float64) (creeplaw.Law, error) {
		return build(creeplaw.KachanovRabotnovParameters{Prefactor: v[0], StressExponent: v[1], DamagePrefactor: v[2],
			DamageStressExponent: v[3], DamageExponent: v[4],
			RuptureStress: creeplaw.RuptureStress{Principal: v[5], Mean: v[6]}, ReferenceStress: 1})
	})
	k.factors = []string{ofCreep, ofDamage}
	k.strip = func(law creeplaw.Law) (creeplaw.Law, []creeplaw.TemperatureFactor) {
		p := law.(creeplaw.KachanovRabotnov).Arguments()
		factors := []creeplaw.TemperatureFactor{p.CreepTemperature, p.DamageTemperature}
		p.CreepTemperature, p.DamageTemperature = nil, nil
		bare, _ := build(p)
		return bare, factors
	}
	k.dress = func(law creeplaw.Law, factors []creeplaw.TemperatureFactor) (creeplaw.Law, error) {
		p := law.(creeplaw.KachanovRabotnov).Arguments()
		p.CreepTemperature, p.DamageTemperature = factors[0], factors[1]
		return build(p)
	}
	return k
}

func liuMurakami() kind {
	build := creeplaw.NewLiuMurakami
	p := creeplaw.LiuMurakamiParameters{Prefactor: 1, StressExponent: 1, DamagePrefactor: 1, DamageStressExponent: 1,
		DamageExponent: 1}
	referred := p
	referred.ReferenceStress = 1
	k := plain("Liu-Murakami", must(build(p)), must(build(referred))).withPoint(func(v []float64) (creeplaw.Law, error) {
		return build(creeplaw.LiuMurakamiParameters{Prefactor: v[0], StressExponent: v[1], DamagePrefactor: v[2],
			DamageStressExponent: v[3], DamageExponent: v[4],
			RuptureStress: creeplaw.RuptureStress{Principal: v[5], Mean: v[6]}, ReferenceStress: 1})
	})
	k.factors = []string{ofCreep, ofDamage}
	k.strip = func(law creeplaw.Law) (creeplaw.Law, []creeplaw.TemperatureFactor) {
		p := law.(creeplaw.LiuMurakami).Arguments()
		factors := []creeplaw.TemperatureFactor{p.CreepTemperature, p.DamageTemperature}
		p.CreepTemperature, p.DamageTemperature = nil, nil
		bare, _ := build(p)
		return bare, factors
	}
	k.dress = func(law creeplaw.Law, factors []creeplaw.TemperatureFactor) (creeplaw.Law, error) {
		p := law.(creeplaw.LiuMurakami).Arguments()
		p.CreepTemperature, p.DamageTemperature = factors[0], factors[1]
		return build(p)
	}
	return k
}

// cavitating is a kind with cavitation; both have the same parameters.
func cavitating(name string, build func(creeplaw.CavitationParameters) (creeplaw.Parametric, error)) kind {
	k := plain(name, must(build(creeplaw.CavitationParameters{Prefactor: 1, StressCoefficient: 1, Hardening: 1,
		HardeningSaturation: 0.5})))
	arguments := func(law creeplaw.Law) creeplaw.CavitationParameters {
		return law.(interface {
			Arguments() creeplaw.CavitationParameters
		}).Arguments()
	}
	k.factors = []string{ofCreep, ofAgeing}
	k.strip = func(law creeplaw.Law) (creeplaw.Law, []creeplaw.TemperatureFactor) {
		p := arguments(law)
		factors := []creeplaw.TemperatureFactor{p.CreepTemperature, p.AgeingTemperature}
		p.CreepTemperature, p.AgeingTemperature = nil, nil
		bare, _ := build(p)
		return bare, factors
	}
	k.dress = func(law creeplaw.Law, factors []creeplaw.TemperatureFactor) (creeplaw.Law, error) {
		p := arguments(law)
		p.CreepTemperature, p.AgeingTemperature = factors[0], factors[1]
		return build(p)
	}
	return k
}

func factorKinds() []factorKind {
	branch := creeplaw.ArrheniusBranch{Prefactor: 1}
	return []factorKind{
		{"Arrhenius", []creeplaw.ParametricFactor{must(creeplaw.NewArrhenius(1)), must(creeplaw.NewArrheniusAt(1, 1))}},
		{"Arrhenius with two branches", []creeplaw.ParametricFactor{must(creeplaw.NewTwoArrheniusAt(1, 1, 1)),
			must(creeplaw.NewTwoArrhenius(branch, branch, 1))}},
	}
}
