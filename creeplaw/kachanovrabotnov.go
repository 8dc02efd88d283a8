package creeplaw

import "math"

// KachanovRabotnov is creep with one damage variable ω,
//
//	ṗ = A (σ/σ₀)ⁿ / (1-ω)ⁿ
//	ω̇ = B (σr/σ₀)^χ / (1-ω)^φ,  ω = 0 in virgin material, rupture at ω = 1
//
// Symbols: σ von Mises stress [stress]; σr rupture stress [stress], see RuptureStress; σ₀ reference stress [stress], usually
// the unit of stress; A creep rate at σ₀ [1/time]; n stress exponent [-], > 0; B damage rate at σ₀ [1/time]; χ damage stress
// exponent [-], > 0; φ damage exponent [-], ≥ 0. A temperature factor may multiply either rate.
//
// Without damage (ω = 0) it is Norton's law. Under constant stress in tension the life is
// t_r = 1/[(1+φ) B (σ/σ₀)^χ], ω = 1 - (1-t/t_r)^(1/(1+φ)), and, if φ+1 > n, the creep strain at rupture is
// A (σ/σ₀)ⁿ t_r (1+φ)/(1+φ-n). Kachanov's own form has φ = χ. There is no time factor: a clock would make the law depend on
// when the load came on.
//
// At zero stress there is neither creep nor, with σr ≤ 0, damage. The rates go to +Inf with ω → 1; at ω ≥ 1 the law is
// undefined (NaN), as for a negative or NaN stress. The creep strain does not enter.
//
// Source: L. M. Kachanov, Izv. Akad. Nauk SSSR, Otd. Tekhn. Nauk, no. 8 (1958) 26–31; Yu. N. Rabotnov, Creep Problems in
// Structural Members, North-Holland 1969 (from memory).
type KachanovRabotnov struct {
	creep, damage line
	shift         float64 // ln of the creep line's reference stress over that of damage
	damageExp     float64
	rupture       RuptureStress

	creepFactor, damageFactor TemperatureFactor // nil for none

	arguments *KachanovRabotnovParameters
}

var (
	_ Evolving    = KachanovRabotnov{}
	_ Logarithmic = KachanovRabotnov{}
)

// KachanovRabotnovParameters are the parameters of KachanovRabotnov. Optional fields may be left zero.
type KachanovRabotnovParameters struct {
	Prefactor            float64 // A [1/time], or [stress⁻ⁿ/time] without a reference stress
	StressExponent       float64 // n
	DamagePrefactor      float64 // B [1/time], or [stress^-χ/time] without a reference stress
	DamageStressExponent float64 // χ
	DamageExponent       float64 // φ

	ReferenceStress   float64           // σ₀ [stress]; zero is 1. Optional
	RuptureStress     RuptureStress     // zero is the von Mises stress. Optional
	CreepTemperature  TemperatureFactor // multiplies the creep rate. Optional
	DamageTemperature TemperatureFactor // multiplies the damage rate. Optional
}

// NewKachanovRabotnov builds the law. A, n, B, χ must be positive and finite, φ ≥ 0 and finite, σ₀ ≥ 0 and finite: otherwise
// a *ParameterError.
func NewKachanovRabotnov(p KachanovRabotnovParameters) (KachanovRabotnov, error) {
	const law = "Kachanov–Rabotnov"
	if err := positive(law, parameter{"prefactor", p.Prefactor}, parameter{"stress exponent", p.StressExponent},
		parameter{"damage prefactor", p.DamagePrefactor},
		parameter{"damage stress exponent", p.DamageStressExponent}); err != nil {
		return KachanovRabotnov{}, err
	}
	if err := notNegative(law, parameter{"damage exponent", p.DamageExponent},
		parameter{"reference stress", p.ReferenceStress}); err != nil {
		return KachanovRabotnov{}, err
	}
	if err := p.RuptureStress.check(law); err != nil {
		return KachanovRabotnov{}, err
	}
	k := KachanovRabotnov{
		creep:        newLine(p.Prefactor, p.StressExponent, p.ReferenceStress),
		damage:       newLine(p.DamagePrefactor, p.DamageStressExponent, p.ReferenceStress),
		damageExp:    p.DamageExponent,
		rupture:      p.RuptureStress,
		creepFactor:  p.CreepTemperature,
		damageFactor: p.DamageTemperature,
		arguments:    &p,
	}
	k.shift = math.Log(k.creep.stress / k.damage.stress)
	return k, nil
}

// Variables returns the damage, from 0 to the limit 1.
func (k KachanovRabotnov) Variables() []Variable { return damageVariable() }

// SeesPrincipal reports whether the rupture stress holds the greatest principal stress.
func (k KachanovRabotnov) SeesPrincipal() bool { return k.rupture.Principal != 0 }

// Evolve returns ln ṗ and ω̇.
func (k KachanovRabotnov) Evolve(p EvolvingPoint) (e Evolution) {
	whole := 1 - p.Internal[0]
	if !(p.Stress >= 0 && whole > 0) {
		return undefinedEvolution()
	}
	logStress := math.Log(p.Stress / k.creep.stress)
	logWhole := math.Log(whole)
	n, damage := k.creep.exponent, &e.Internal[0]
	e.LogRate = k.creep.logRate + n*(logStress-logWhole)
	e.Creep.ByLogStress = n
	e.Creep.ByInternal[0] = n / whole
	if k.rupture.isMises() {
		damage.LogScale = k.damage.logRate + k.damage.exponent*(logStress+k.shift) - k.damageExp*logWhole
		damage.ByLogStress = k.damage.exponent
	} else {
		damage.setRupture(&k.damage, k.rupture, &p)
		damage.LogScale -= k.damageExp * logWhole
	}
	damage.Value = 1
	damage.ByInternal[0] = k.damageExp / whole
	e.multiplyCreep(k.creepFactor, p.Temperature)
	damage.multiply(k.damageFactor, p.Temperature)
	return e
}

// LogRate is the creep rate without damage.
func (k KachanovRabotnov) LogRate(p Point) LogRate {
	e := k.Evolve(InTension(p, [MaxVariables]float64{}))
	return e.LogRateInTension(p)
}

// Rate is the creep rate without damage.
func (k KachanovRabotnov) Rate(p Point) Rate {
	e := k.Evolve(InTension(p, [MaxVariables]float64{}))
	if p.Stress != 0 {
		return e.RateInTension(p)
	}
	p.Stress = faint
	e = k.Evolve(InTension(p, [MaxVariables]float64{}))
	return Rate{ByStress: slopeAtZero(e.LogRateInTension(p), p.Stress)}
}

// damageVariable is the one variable of the laws with a single damage.
func damageVariable() []Variable { return []Variable{{Name: "damage", Initial: 0, Limit: 1}} }

// line is a power law of stress, straight in logarithms, about a stress at which the rate is of moderate size.
type line struct{ logRate, stress, exponent float64 }

// newLine is rate·(σ/reference)^exponent; reference 0 is 1.
func newLine(rate, exponent, reference float64) line {
	if reference != 0 {
		return line{math.Log(rate), reference, exponent}
	}
	w := newPrefactor(rate, exponent)
	return line{w.logRate, w.stress, exponent}
}

// setRupture sets a damage rate to a line in the rupture stress, with Value 1.
func (r *InternalRate) setRupture(w *line, rupture RuptureStress, p *EvolvingPoint) {
	log, by := rupture.logAt(p, w.stress)
	r.LogScale = w.logRate + w.exponent*log
	r.ByLogStress = w.exponent * by.ByLogStress
	r.ByMeanStress = w.exponent * by.ByMeanStress
	r.ByPrincipalStress = w.exponent * by.ByPrincipalStress
}
