package creeplaw

import "math"

// Diffusional is creep by diffusion of vacancies between the boundaries of the grains, in tension
//
//	ṗ = 14 (σ Ω/kT d²) D_v [1 + π δD_b/(d D_v)]
//
// The first term alone, through the lattice, is Nabarro–Herring creep, the second alone, along the boundaries, Coble creep.
//
// Symbols: σ von Mises stress [Pa]; T absolute temperature [K]; Ω atomic volume [m³]; d grain size [m]; D_v = D₀ exp(-Q/RT)
// lattice diffusivity [m²/s]; δD_b boundary diffusivity times the boundary's width [m³/s]; k Boltzmann's constant [J/K].
//
// The law is in Pa, s and K; see InUnits for others. It is linear in stress: at zero stress the rate is zero and the slope
// finite. The factor 14 is Frost and Ashby's 42 for shear divided by 3; other authors' factors differ with the shape of the
// grain. No creep strain enters. Temperatures that are not positive, and negative or NaN stress, give NaN and are explained
// by CheckPoint.
//
// Source: F. R. N. Nabarro, Report of a Conference on the Strength of Solids, Physical Society, London 1948, 75; C. Herring,
// J. Appl. Phys. 21 (1950) 437; R. L. Coble, J. Appl. Phys. 34 (1963) 1679; in the form of H. J. Frost, M. F. Ashby,
// Deformation-Mechanism Maps, Pergamon 1982, equations 2.29–2.30 (all from memory).
type Diffusional struct {
	lattice, boundary diffusionTerm
	given[Law]
}

// diffusionTerm is exp(constant - activation/T)·σ/T; a constant of -Inf leaves it out.
type diffusionTerm struct{ logConstant, activation float64 }

var (
	_ Logarithmic = Diffusional{}
	_ Explainer   = Diffusional{}
)

// frostAshbyTension is the factor of diffusional flow in tension, 42/3.
const frostAshbyTension = 14

// NewDiffusional builds the law with both paths from the atomic volume Ω [m³], the grain size d [m], the lattice diffusivity
// [m²/s] and the boundary diffusivity δD_b [m³/s], all positive and finite, activation energies at least 0.
func NewDiffusional(atomicVolume, grainSize float64, lattice, boundary Diffusivity) (Diffusional, error) {
	const law = "diffusional creep"
	l, err := newDiffusionTerm(law, "lattice", atomicVolume, grainSize, 2, lattice)
	if err != nil {
		return Diffusional{}, err
	}
	b, err := newDiffusionTerm(law, "boundary", atomicVolume, grainSize, 3, boundary)
	if err != nil {
		return Diffusional{}, err
	}
	b.logConstant += math.Log(math.Pi)
	v := append(append([]float64{atomicVolume, grainSize}, lattice.values()...), boundary.values()...)
	return Diffusional{l, b, remember(diffusionalForm, v...)}, nil
}

// NewNabarroHerring builds ṗ = 14 σΩD_v/(kT d²), diffusion through the lattice alone: atomic volume Ω [m³], grain size d
// [m], lattice diffusivity [m²/s].
func NewNabarroHerring(atomicVolume, grainSize float64, lattice Diffusivity) (Diffusional, error) {
	l, err := newDiffusionTerm("Nabarro–Herring", "lattice", atomicVolume, grainSize, 2, lattice)
	if err != nil {
		return Diffusional{}, err
	}
	v := append([]float64{atomicVolume, grainSize}, lattice.values()...)
	return Diffusional{l, noDiffusion(), remember(nabarroHerringForm, v...)}, nil
}

// NewCoble builds ṗ = 14π σΩ δD_b/(kT d³), diffusion along the grain boundaries alone: atomic volume Ω [m³], grain size d
// [m], boundary diffusivity δD_b [m³/s].
func NewCoble(atomicVolume, grainSize float64, boundary Diffusivity) (Diffusional, error) {
	b, err := newDiffusionTerm("Coble", "boundary", atomicVolume, grainSize, 3, boundary)
	if err != nil {
		return Diffusional{}, err
	}
	b.logConstant += math.Log(math.Pi)
	v := append([]float64{atomicVolume, grainSize}, boundary.values()...)
	return Diffusional{noDiffusion(), b, remember(cobleForm, v...)}, nil
}

func newDiffusionTerm(law, path string, volume, grain, grainExponent float64, d Diffusivity) (diffusionTerm, error) {
	err := positive(law, parameter{"atomic volume", volume}, parameter{"grain size", grain})
	if err == nil {
		err = d.check(law, path)
	}
	if err != nil {
		return diffusionTerm{}, err
	}
	return diffusionTerm{
		logConstant: math.Log(frostAshbyTension) + math.Log(volume/BoltzmannConstant) + math.Log(d.Prefactor) -
			grainExponent*math.Log(grain),
		activation: d.ActivationEnergy / GasConstant,
	}, nil
}

func noDiffusion() diffusionTerm { return diffusionTerm{logConstant: math.Inf(-1)} }

// coefficient returns ln(ṗ/σ) and its derivative by ln T.
func (d Diffusional) coefficient(temperature float64) (value, byLogTemperature float64) {
	l := addLog(d.lattice.at(temperature), d.boundary.at(temperature))
	return l.Value - math.Log(temperature), l.ByLogTemperature - 1
}

func (t diffusionTerm) at(temperature float64) LogRate {
	x := t.activation / temperature
	return LogRate{Value: t.logConstant - x, ByLogTemperature: x}
}

// LogRate returns the logarithm; the stress exponent is 1.
func (d Diffusional) LogRate(p Point) LogRate {
	if !(p.Stress >= 0 && p.Temperature > 0) {
		return undefinedLog()
	}
	c, byLogTemperature := d.coefficient(p.Temperature)
	return LogRate{Value: c + math.Log(p.Stress), ByLogStress: 1, ByLogTemperature: byLogTemperature}
}

// Rate returns ṗ and its derivatives by stress and temperature.
func (d Diffusional) Rate(p Point) Rate {
	if p.Stress == 0 && p.Temperature > 0 {
		c, _ := d.coefficient(p.Temperature)
		return Rate{ByStress: math.Exp(c)}
	}
	return rateOf(p, d.LogRate(p))
}

// CheckPoint says whether temperature or stress is out of bounds.
func (d Diffusional) CheckPoint(p Point) error {
	return reason("diffusional creep", d, p)
}
