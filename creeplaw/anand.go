package creeplaw

import "math"

// Anand is unified creep and plasticity with one deformation resistance s,
//
//	ṗ = A exp(-Q/RT) [sinh(ξσ/s)]^(1/m)
//	ṡ = h₀ |1 - s/s*|ᵃ sign(1 - s/s*) ṗ,  s* = ŝ [(ṗ/A) exp(Q/RT)]ⁿ
//
// with s = s₀ in virgin material. Symbols: σ von Mises stress [stress]; T absolute temperature [K]; R gas constant; A prefactor
// [1/time]; Q activation energy [J/mol]; ξ multiplier of stress [-]; m strain rate sensitivity [-]; s deformation resistance
// [stress], s* its saturation at the present rate; h₀ hardening [stress]; ŝ coefficient and n exponent of the saturation
// [stress], [-]; a hardening exponent [-], ≥ 1.
//
// There is no yield surface: every stress makes strain. At constant rate the stress saturates at
// σ* = (ŝ/ξ) Zⁿ asinh(Z^m), Z = (ṗ/A) exp(Q/RT). Above saturation the resistance recovers with the flow; at rest it keeps.
// With an < 1 nothing happens at zero stress. The material does not rupture; the limit 0 of s is out of reach. At s ≤ 0, a
// negative or NaN stress, or T ≤ 0 the law is undefined (NaN). The creep strain does not enter.
//
// It is much used for solder, with the inelastic strain as a whole as creep.
//
// Source: S. B. Brown, K. H. Kim, L. Anand, Int. J. Plasticity 5 (1989) 95–130 (from memory).
type Anand struct {
	logPrefactor, activation           float64 // ln A, Q/R
	multiplier, inverseSensitivity     float64 // ξ, 1/m
	hardening, logSaturation           float64 // h₀, ln ŝ
	saturationExp, hardeningExp, start float64 // n, a, s₀

	given[Law]
}

var (
	_ Evolving    = Anand{}
	_ Logarithmic = Anand{}
)

// AnandParameters are the parameters of Anand.
type AnandParameters struct {
	InitialResistance     float64 // s₀ [stress]
	ActivationEnergy      float64 // Q [J/mol]; tables often give Q/R, to be multiplied by GasConstant
	Prefactor             float64 // A [1/time]
	StressMultiplier      float64 // ξ
	RateSensitivity       float64 // m
	Hardening             float64 // h₀ [stress]
	SaturationCoefficient float64 // ŝ [stress]
	SaturationExponent    float64 // n
	HardeningExponent     float64 // a
}

// NewAnand builds the law. s₀, A, ξ, m and ŝ must be positive and finite, Q, h₀ and n ≥ 0 and finite, a ≥ 1, and an < 1, so
// that recovery ends with the flow: otherwise a *ParameterError.
func NewAnand(p AnandParameters) (Anand, error) {
	const law = "Anand"
	if err := positive(law, parameter{"initial resistance", p.InitialResistance}, parameter{"prefactor", p.Prefactor},
		parameter{"stress multiplier", p.StressMultiplier}, parameter{"rate sensitivity", p.RateSensitivity},
		parameter{"saturation coefficient", p.SaturationCoefficient}); err != nil {
		return Anand{}, err
	}
	if err := notNegative(law, parameter{"activation energy", p.ActivationEnergy}, parameter{"hardening", p.Hardening},
		parameter{"saturation exponent", p.SaturationExponent}); err != nil {
		return Anand{}, err
	}
	if !(p.HardeningExponent >= 1) || !(p.HardeningExponent*p.SaturationExponent < 1) {
		return Anand{}, &ParameterError{law, "hardening exponent", p.HardeningExponent,
			"at least 1, and below 1 when multiplied by the saturation exponent"}
	}
	return Anand{
		logPrefactor:       math.Log(p.Prefactor),
		activation:         p.ActivationEnergy / GasConstant,
		multiplier:         p.StressMultiplier,
		inverseSensitivity: 1 / p.RateSensitivity,
		hardening:          p.Hardening,
		logSaturation:      math.Log(p.SaturationCoefficient),
		saturationExp:      p.SaturationExponent,
		hardeningExp:       p.HardeningExponent,
		start:              p.InitialResistance,
		given:              p.given(),
	}, nil
}

// Variables returns the deformation resistance, from s₀.
func (l Anand) Variables() []Variable {
	return []Variable{{Name: "deformation resistance", Initial: l.start, Limit: 0}}
}

// SeesPrincipal reports false.
func (l Anand) SeesPrincipal() bool { return false }

// Evolve returns ln ṗ and ṡ.
func (l Anand) Evolve(p EvolvingPoint) (e Evolution) {
	s := p.Internal[0]
	if !(p.Stress >= 0 && s > 0 && p.Temperature > 0) {
		return undefinedEvolution()
	}
	x := l.multiplier * p.Stress / s
	over, n, _ := logSinhOver(x)
	logSinh := math.Log(x) + over
	heat := l.activation / p.Temperature
	e.LogRate = l.logPrefactor - heat + l.inverseSensitivity*logSinh
	e.Creep.ByLogStress = l.inverseSensitivity * n
	e.Creep.ByLogTemperature = heat
	e.Creep.ByInternal[0] = -e.Creep.ByLogStress / s
	if x == 0 {
		e.Internal[0].LogScale = math.Inf(-1)
		return e
	}
	l.harden(&e, s, logSinh, n)
	return e
}

// harden sets ṡ = h₀ |y|ᵃ sign(y) ṗ with y = 1 - s/s*. Where s/s* is above 1, and possibly huge, it is taken into the scale.
func (l Anand) harden(e *Evolution, s, logSinh, n float64) {
	k := l.saturationExp * l.inverseSensitivity
	logRatio := math.Log(s) - l.logSaturation - k*logSinh // ln(s/s*)
	r := &e.Internal[0]
	r.LogScale = e.LogRate
	// |y|ᵃ = size·size1 in the scale, and its derivative by ln(s/s*) is -slope.
	var y, slope float64
	if logRatio <= 0 {
		y = -math.Expm1(logRatio)
		power := math.Pow(y, l.hardeningExp-1)
		slope = l.hardeningExp * power * math.Exp(logRatio)
		r.Value = l.hardening * power * y
	} else {
		y = -math.Expm1(-logRatio)
		power := math.Pow(y, l.hardeningExp-1)
		slope = l.hardeningExp * power
		r.Value = -l.hardening * power * y
		r.LogScale += l.hardeningExp * logRatio
	}
	slope *= l.hardening
	r.ByLogStress = r.Value*e.Creep.ByLogStress + slope*k*n
	r.ByLogTemperature = r.Value * e.Creep.ByLogTemperature
	r.ByInternal[0] = r.Value*e.Creep.ByInternal[0] - slope*(1+k*n)/s
}

// LogRate is the creep rate at the initial resistance.
func (l Anand) LogRate(p Point) LogRate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{l.start}))
	return e.LogRateInTension(p)
}

// Rate is the creep rate at the initial resistance.
func (l Anand) Rate(p Point) Rate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{l.start}))
	if p.Stress != 0 {
		return e.RateInTension(p)
	}
	p.Stress = faint
	e = l.Evolve(InTension(p, [MaxVariables]float64{l.start}))
	return Rate{ByStress: slopeAtZero(e.LogRateInTension(p), p.Stress)}
}
