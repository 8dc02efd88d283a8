package creeplaw

import "math"

// CavitationParameters are the parameters of the hyperbolic-sine laws with hardening, ageing and cavitation: PerrinHayhurst and
// KowalewskiHayhurstDyson. Optional fields may be left zero.
type CavitationParameters struct {
	Prefactor           float64 // A [1/time]
	StressCoefficient   float64 // B [1/stress]
	Hardening           float64 // h [stress]
	HardeningSaturation float64 // H* [-], between 0 and 1
	Ageing              float64 // Kc [1/time]; zero for none. Optional
	Cavitation          float64 // C (D in the aluminium form) [-]; zero for none. Optional

	TriaxialityExponent float64 // ν [-]; zero: cavitation follows the creep strain alone. Optional
	RuptureCavitation   float64 // ω at rupture; zero is 1. Optional

	CreepTemperature  TemperatureFactor // multiplies the creep rate. Optional
	AgeingTemperature TemperatureFactor // multiplies the ageing rate. Optional
}

// Indexes of the internal variables of the laws with cavitation.
const (
	hardening = iota
	ageing
	cavitation
)

// cavitating is what the two laws share.
type cavitating struct {
	logPrefactor, coefficient float64
	hardening, saturation     float64
	logAgeing                 float64 // ln(Kc/3)
	cavitation, triaxiality   float64
	rupture                   float64

	creepFactor, ageingFactor TemperatureFactor // nil for none

	arguments *CavitationParameters
}

func newCavitating(law string, p CavitationParameters) (cavitating, error) {
	if err := positive(law, parameter{"prefactor", p.Prefactor}, parameter{"stress coefficient", p.StressCoefficient},
		parameter{"hardening", p.Hardening}); err != nil {
		return cavitating{}, err
	}
	if err := notNegative(law, parameter{"ageing", p.Ageing}, parameter{"cavitation", p.Cavitation},
		parameter{"triaxiality exponent", p.TriaxialityExponent}); err != nil {
		return cavitating{}, err
	}
	if !(p.HardeningSaturation > 0 && p.HardeningSaturation < 1) {
		return cavitating{}, &ParameterError{law, "hardening saturation", p.HardeningSaturation, "between 0 and 1"}
	}
	if !(p.RuptureCavitation >= 0 && p.RuptureCavitation <= 1) {
		return cavitating{}, &ParameterError{law, "cavitation at rupture", p.RuptureCavitation, "from 0 (for 1) to 1"}
	}
	c := cavitating{
		logPrefactor: math.Log(p.Prefactor),
		coefficient:  p.StressCoefficient,
		hardening:    p.Hardening,
		saturation:   p.HardeningSaturation,
		logAgeing:    math.Log(p.Ageing / 3),
		cavitation:   p.Cavitation,
		triaxiality:  p.TriaxialityExponent,
		rupture:      p.RuptureCavitation,
		creepFactor:  p.CreepTemperature,
		ageingFactor: p.AgeingTemperature,
		arguments:    &p,
	}
	if c.rupture == 0 {
		c.rupture = 1
	}
	return c, nil
}

// Variables returns hardening H and ageing Φ, which both have the limit 1, and cavitation ω with its value at rupture.
func (c *cavitating) variables() []Variable {
	return []Variable{
		hardening:  {Name: "hardening", Limit: 1},
		ageing:     {Name: "ageing", Limit: 1},
		cavitation: {Name: "cavitation", Limit: c.rupture},
	}
}

// defined reports whether the variables leave the sinh an argument.
func defined(p *EvolvingPoint) bool {
	return p.Stress >= 0 && p.Internal[hardening] < 1 && p.Internal[ageing] < 1 && p.Internal[cavitation] < 1
}

// logSinhOver returns ln(sinh x/x), x coth x and its derivative by ln x, x ≥ 0.
func logSinhOver(x float64) (log, n, nByLog float64) {
	switch {
	case x > sinhSaturation:
		return x - math.Ln2 - math.Log(x), x, x
	case x < 1e-3: // series, exact to rounding
		s := x * x
		return s / 6 * (1 - s/30), 1 + s/3*(1-s/15), s / 3 * (2 - s/15*4)
	}
	e := -math.Expm1(-2 * x) // sinh x = e^x·e/2
	n = x * (2 - e) / e
	log = x + math.Log(e/(2*x))
	over := 2 * x * math.Exp(-x) / e // x/sinh x
	return log, n, n - over*over
}

// internal sets the rates of the variables from LogRate and Creep, and logOver, the logarithm of ṗ/σ.
func (c *cavitating) internal(e *Evolution, p *EvolvingPoint, logOver float64) {
	// Ḣ = (h/σ)(1 - H/H*) ṗ has a limit at zero stress; so has its scale ṗ/σ.
	h := &e.Internal[hardening]
	h.LogScale, h.Value = logOver, c.hardening*(1-p.Internal[hardening]/c.saturation)
	h.ByLogStress = h.Value * (e.Creep.ByLogStress - 1)
	h.ByLogTemperature = h.Value * e.Creep.ByLogTemperature
	for j, a := range e.Creep.ByInternal {
		h.ByInternal[j] = h.Value * a
	}
	h.ByInternal[hardening] -= c.hardening / c.saturation

	a := &e.Internal[ageing]
	whole := 1 - p.Internal[ageing]
	a.LogScale, a.Value = c.logAgeing+4*math.Log(whole), 1
	a.ByInternal[ageing] = -4 / whole
	a.multiply(c.ageingFactor, p.Temperature)

	factor, by := c.cavitation, Partials{}
	if c.triaxiality > 0 && p.Stress > 0 {
		factor *= math.Pow(math.Max(p.PrincipalStress, 0)/p.Stress, c.triaxiality)
		by.ByLogStress = -c.triaxiality * factor
		if factor > 0 {
			by.ByPrincipalStress = c.triaxiality * factor / p.PrincipalStress
		}
	}
	e.FollowCreep(cavitation, factor, by)
}

// PerrinHayhurst is creep of ferritic steel with hardening H, ageing Φ (coarsening of carbides) and cavitation ω,
//
//	ṗ = A sinh[ Bσ (1-H) / ((1-Φ)(1-ω)) ]
//	Ḣ = (h/σ)(1 - H/H*) ṗ
//	Φ̇ = (Kc/3)(1-Φ)⁴
//	ω̇ = C ṗ (⟨σ1⟩/σ)^ν
//
// all 0 in virgin material. Symbols: σ von Mises stress, σ1 greatest principal stress [stress], ⟨σ1⟩ = max(σ1, 0); A prefactor
// [1/time]; B stress coefficient [1/stress]; h hardening [stress], H* its saturation, between 0 and 1; Kc ageing [1/time];
// C cavitation [-]; ν triaxiality exponent [-], with ν = 0 σ1 does not enter.
//
// Primary creep ends with H at H*: the secondary rate is A sinh[Bσ(1-H*)]. Ageing goes on without stress, also on a bench:
// it is a change of the metal with time at temperature. Hardening at zero stress has the limit of the published form, which is
// not zero. Rupture is at the cavitation given as RuptureCavitation. At H, Φ or ω ≥ 1, at a negative or NaN stress the law is
// undefined (NaN). The creep strain does not enter.
//
// Source: I. J. Perrin, D. R. Hayhurst, J. Strain Anal. 31 (1996) 299–314 (from memory).
type PerrinHayhurst struct{ cavitating }

var (
	_ Evolving    = PerrinHayhurst{}
	_ Logarithmic = PerrinHayhurst{}
)

// NewPerrinHayhurst builds the law. A, B and h must be positive and finite, 0 < H* < 1, the other numbers ≥ 0 and finite:
// otherwise a *ParameterError.
func NewPerrinHayhurst(p CavitationParameters) (PerrinHayhurst, error) {
	c, err := newCavitating("Perrin–Hayhurst", p)
	return PerrinHayhurst{c}, err
}

// Variables returns hardening and ageing, which have the limit 1, and cavitation with its value at rupture.
func (l PerrinHayhurst) Variables() []Variable { return l.variables() }

// SeesPrincipal reports whether the triaxiality exponent is above 0.
func (l PerrinHayhurst) SeesPrincipal() bool { return l.triaxiality > 0 }

// Evolve returns ln ṗ and the rates of hardening, ageing and cavitation.
func (l PerrinHayhurst) Evolve(p EvolvingPoint) (e Evolution) {
	if !defined(&p) {
		return undefinedEvolution()
	}
	soft, aged, whole := 1-p.Internal[hardening], 1-p.Internal[ageing], 1-p.Internal[cavitation]
	slope := l.coefficient * soft / (aged * whole)
	log, n, _ := logSinhOver(slope * p.Stress)
	e.Creep.ByLogStress = n
	e.Creep.ByInternal = [MaxVariables]float64{hardening: -n / soft, ageing: n / aged, cavitation: n / whole}
	return l.complete(e, &p, l.logPrefactor+math.Log(slope)+log)
}

// complete sets LogRate from the logarithm of ṗ/σ, the factor of temperature, and the variables.
func (c *cavitating) complete(e Evolution, p *EvolvingPoint, logOver float64) Evolution {
	e.LogRate = logOver
	e.multiplyCreep(c.creepFactor, p.Temperature)
	logOver = e.LogRate
	e.LogRate += math.Log(p.Stress)
	c.internal(&e, p, logOver)
	return e
}

// LogRate is the creep rate of virgin material.
func (l PerrinHayhurst) LogRate(p Point) LogRate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{}))
	return e.LogRateInTension(p)
}

// Rate is the creep rate of virgin material; its slope at zero stress is AB.
func (l PerrinHayhurst) Rate(p Point) Rate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{}))
	if p.Stress != 0 {
		return e.RateInTension(p)
	}
	p.Stress = faint
	e = l.Evolve(InTension(p, [MaxVariables]float64{}))
	return Rate{ByStress: slopeAtZero(e.LogRateInTension(p), p.Stress)}
}

// KowalewskiHayhurstDyson is creep of aluminium alloys with hardening H, ageing Φ and cavitation ω,
//
//	ṗ = A/(1-ω)ⁿ sinh[x],  x = Bσ (1-H)/(1-Φ),  n = x coth x
//	Ḣ = (h/σ)(1 - H/H*) ṗ
//	Φ̇ = (Kc/3)(1-Φ)⁴
//	ω̇ = D ṗ (⟨σ1⟩/σ)^ν
//
// It differs from PerrinHayhurst in how cavitation enters: to first order in ω the two agree, because n is the local stress
// exponent of the sinh. Symbols, units, limits and cautions are those of PerrinHayhurst; D is its Cavitation parameter.
//
// Source: Z. L. Kowalewski, D. R. Hayhurst, B. F. Dyson, J. Strain Anal. 29 (1994) 309–316 (from memory).
type KowalewskiHayhurstDyson struct{ cavitating }

var (
	_ Evolving    = KowalewskiHayhurstDyson{}
	_ Logarithmic = KowalewskiHayhurstDyson{}
)

// NewKowalewskiHayhurstDyson builds the law. A, B and h must be positive and finite, 0 < H* < 1, the other numbers ≥ 0 and
// finite: otherwise a *ParameterError.
func NewKowalewskiHayhurstDyson(p CavitationParameters) (KowalewskiHayhurstDyson, error) {
	c, err := newCavitating("Kowalewski–Hayhurst–Dyson", p)
	return KowalewskiHayhurstDyson{c}, err
}

// Variables returns hardening and ageing, which have the limit 1, and cavitation with its value at rupture.
func (l KowalewskiHayhurstDyson) Variables() []Variable { return l.variables() }

// SeesPrincipal reports whether the triaxiality exponent is above 0.
func (l KowalewskiHayhurstDyson) SeesPrincipal() bool { return l.triaxiality > 0 }

// Evolve returns ln ṗ and the rates of hardening, ageing and cavitation.
func (l KowalewskiHayhurstDyson) Evolve(p EvolvingPoint) (e Evolution) {
	if !defined(&p) {
		return undefinedEvolution()
	}
	soft, aged, whole := 1-p.Internal[hardening], 1-p.Internal[ageing], 1-p.Internal[cavitation]
	slope := l.coefficient * soft / aged
	log, n, nByLog := logSinhOver(slope * p.Stress)
	logWhole := math.Log(whole)
	byLog := n - nByLog*logWhole // ∂ln ṗ/∂ln x
	e.Creep.ByLogStress = byLog
	e.Creep.ByInternal = [MaxVariables]float64{hardening: -byLog / soft, ageing: byLog / aged, cavitation: n / whole}
	return l.complete(e, &p, l.logPrefactor+math.Log(slope)+log-n*logWhole)
}

// LogRate is the creep rate of virgin material.
func (l KowalewskiHayhurstDyson) LogRate(p Point) LogRate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{}))
	return e.LogRateInTension(p)
}

// Rate is the creep rate of virgin material; its slope at zero stress is AB.
func (l KowalewskiHayhurstDyson) Rate(p Point) Rate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{}))
	if p.Stress != 0 {
		return e.RateInTension(p)
	}
	p.Stress = faint
	e = l.Evolve(InTension(p, [MaxVariables]float64{}))
	return Rate{ByStress: slopeAtZero(e.LogRateInTension(p), p.Stress)}
}
