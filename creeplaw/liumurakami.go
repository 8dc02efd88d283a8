package creeplaw

import "math"

// LiuMurakami is creep with one damage variable ω whose rates stay finite up to rupture,
//
//	ṗ = A (σ/σ₀)ⁿ exp[ 2(n+1)/(π √(1+3/n)) · (⟨σ1⟩/σ)² · ω^(3/2) ]
//	ω̇ = M (σr/σ₀)^χ · (1-e^-q)/q · e^(qω),  ω = 0 in virgin material, rupture at ω = 1
//
// Symbols: σ von Mises stress [stress]; σ1 greatest principal stress [stress], ⟨σ1⟩ = max(σ1, 0); σr rupture stress [stress],
// see RuptureStress; σ₀ reference stress [stress], usually the unit of stress; A creep rate at σ₀ [1/time]; n stress exponent
// [-], > 0; M damage rate at σ₀ [1/time]: 1/M is the life under σr = σ₀; χ damage stress exponent [-], > 0; q damage
// exponent [-], > 0. A temperature factor may multiply either rate.
//
// The damage rate grows as an exponential of ω instead of a power of 1-ω, so that a finite-element solution does not localise
// damage as much as with KachanovRabotnov. Under constant stress t_r = 1/(M (σr/σ₀)^χ) and
// ω = -ln[1 - (1-e^-q) t/t_r]/q. Without damage the creep is Norton's law.
//
// The creep rate is the form for cavities and cracks on grain boundaries across the greatest principal stress. As published it
// rises without bound where the stress is nearly hydrostatic tension. Here ⟨σ1⟩/σ counts as 10 at most, which no test reaches: a
// ratio x enters as x/(1 + (x/10)¹⁶)^(1/16), which is x to rounding up to 1, to 1e-9 at 3. Under such stress a step of damaged
// material may still end as beyond rupture. At zero von Mises stress there is no creep.
//
// At ω > 1 the law is undefined (NaN), as for a negative or NaN stress. The creep strain does not enter.
//
// Source: Y. Liu, S. Murakami, JSME Int. J. A 41 (1998) 57–65 (from memory).
type LiuMurakami struct {
	creep, damage line // the damage line holds (1-e^-q)/q
	coupling      float64
	damageExp     float64
	rupture       RuptureStress

	creepFactor, damageFactor TemperatureFactor // nil for none

	arguments *LiuMurakamiParameters
}

var (
	_ Evolving    = LiuMurakami{}
	_ Logarithmic = LiuMurakami{}
)

// boundedSquare is x² with x bounded smoothly by 10, and its derivative by ln x over itself.
func boundedSquare(x float64) (square, slope float64) {
	t := x / 10
	for range 4 {
		t *= t
	}
	switch {
	case t < 0x1p-54:
		return x * x, 2
	case t > 0x1p54:
		return 100, 0
	}
	return x * x * math.Exp(math.Log1p(t)/-8), 2 / (1 + t)
}

// LiuMurakamiParameters are the parameters of LiuMurakami. Optional fields may be left zero.
type LiuMurakamiParameters struct {
	Prefactor            float64 // A [1/time], or [stress⁻ⁿ/time] without a reference stress
	StressExponent       float64 // n
	DamagePrefactor      float64 // M [1/time], or [stress^-χ/time] without a reference stress
	DamageStressExponent float64 // χ
	DamageExponent       float64 // q

	ReferenceStress   float64           // σ₀ [stress]; zero is 1. Optional
	RuptureStress     RuptureStress     // zero is the von Mises stress. Optional
	CreepTemperature  TemperatureFactor // multiplies the creep rate. Optional
	DamageTemperature TemperatureFactor // multiplies the damage rate. Optional
}

// NewLiuMurakami builds the law. A, n, M, χ and q must be positive and finite, σ₀ ≥ 0 and finite: otherwise a *ParameterError.
func NewLiuMurakami(p LiuMurakamiParameters) (LiuMurakami, error) {
	const law = "Liu–Murakami"
	if err := positive(law, parameter{"prefactor", p.Prefactor}, parameter{"stress exponent", p.StressExponent},
		parameter{"damage prefactor", p.DamagePrefactor}, parameter{"damage stress exponent", p.DamageStressExponent},
		parameter{"damage exponent", p.DamageExponent}); err != nil {
		return LiuMurakami{}, err
	}
	if err := notNegative(law, parameter{"reference stress", p.ReferenceStress}); err != nil {
		return LiuMurakami{}, err
	}
	if err := p.RuptureStress.check(law); err != nil {
		return LiuMurakami{}, err
	}
	n, q := p.StressExponent, p.DamageExponent
	l := LiuMurakami{
		creep:        newLine(p.Prefactor, n, p.ReferenceStress),
		damage:       newLine(p.DamagePrefactor, p.DamageStressExponent, p.ReferenceStress),
		coupling:     2 * (n + 1) / (math.Pi * math.Sqrt(1+3/n)),
		damageExp:    q,
		rupture:      p.RuptureStress,
		creepFactor:  p.CreepTemperature,
		damageFactor: p.DamageTemperature,
		arguments:    &p,
	}
	l.damage.logRate += math.Log(-math.Expm1(-q) / q)
	return l, nil
}

// Variables returns the damage, from 0 to the limit 1.
func (l LiuMurakami) Variables() []Variable { return damageVariable() }

// SeesPrincipal reports true: the creep rate depends on the greatest principal stress.
func (l LiuMurakami) SeesPrincipal() bool { return true }

// Evolve returns ln ṗ and ω̇.
func (l LiuMurakami) Evolve(p EvolvingPoint) (e Evolution) {
	omega := p.Internal[0]
	if !(p.Stress >= 0 && omega <= 1) {
		return undefinedEvolution()
	}
	e.LogRate = l.creep.logRate + l.creep.exponent*math.Log(p.Stress/l.creep.stress)
	e.Creep.ByLogStress = l.creep.exponent
	if p.PrincipalStress > 0 && omega > 0 && p.Stress > 0 {
		square, more := boundedSquare(p.PrincipalStress / p.Stress)
		slope := l.coupling * square * math.Sqrt(omega) // over ω
		e.LogRate += slope * omega
		e.Creep.ByLogStress -= more * slope * omega
		e.Creep.ByPrincipalStress = more * slope * omega / p.PrincipalStress
		e.Creep.ByInternal[0] = 1.5 * slope
	}
	damage := &e.Internal[0]
	damage.setRupture(&l.damage, l.rupture, &p)
	damage.LogScale += l.damageExp * omega
	damage.Value = 1
	damage.ByInternal[0] = l.damageExp
	e.multiplyCreep(l.creepFactor, p.Temperature)
	damage.multiply(l.damageFactor, p.Temperature)
	return e
}

// LogRate is the creep rate without damage.
func (l LiuMurakami) LogRate(p Point) LogRate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{}))
	return e.LogRateInTension(p)
}

// Rate is the creep rate without damage.
func (l LiuMurakami) Rate(p Point) Rate {
	e := l.Evolve(InTension(p, [MaxVariables]float64{}))
	if p.Stress != 0 {
		return e.RateInTension(p)
	}
	p.Stress = faint
	e = l.Evolve(InTension(p, [MaxVariables]float64{}))
	return Rate{ByStress: slopeAtZero(e.LogRateInTension(p), p.Stress)}
}
