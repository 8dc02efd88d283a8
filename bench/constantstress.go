package bench

import (
	"math"

	"example.com/holdtime/tensor"
)

// NortonCreep is steady creep under constant uniaxial stress by Norton's law: ε = A σⁿ t.
//
// Source: F. H. Norton 1929.
type NortonCreep struct {
	Stress float64 // σ [stress], > 0
	Law    Norton
}

// Check reports the first impossible parameter.
func (b NortonCreep) Check() error {
	c := checker{problem: "NortonCreep"}
	c.positive("Stress", b.Stress)
	b.Law.check(&c)
	return c.err
}

// CreepAt returns the creep strain [-] after a time t [time].
func (b NortonCreep) CreepAt(t float64) float64 { return steady(b.Law.RateAt(b.Stress), t) }

// steady is rate·t for times there are.
func steady(rate, t float64) float64 {
	if !(t >= 0) {
		return math.NaN()
	}
	return rate * t
}

// GarofaloCreep is steady creep under constant uniaxial stress by the hyperbolic-sine law: ε = A sinhⁿ(Bσ) t.
//
// Source: F. Garofalo 1963.
type GarofaloCreep struct {
	Stress float64 // σ [stress], > 0
	Law    Garofalo
}

// Check reports the first impossible parameter.
func (b GarofaloCreep) Check() error {
	c := checker{problem: "GarofaloCreep"}
	c.positive("Stress", b.Stress)
	b.Law.check(&c)
	return c.err
}

// CreepAt returns the creep strain [-] after a time t [time].
func (b GarofaloCreep) CreepAt(t float64) float64 { return steady(b.Law.RateAt(b.Stress), t) }

// BaileyNortonCreep is primary creep under constant uniaxial stress: ε = A σⁿ tᵐ.
//
// Source: R. W. Bailey 1935; F. H. Norton 1929.
type BaileyNortonCreep struct {
	Stress float64 // σ [stress], > 0
	Curve  BaileyNorton
}

// Check reports the first impossible parameter.
func (b BaileyNortonCreep) Check() error {
	c := checker{problem: "BaileyNortonCreep"}
	c.positive("Stress", b.Stress)
	b.Curve.check(&c, "Curve")
	return c.err
}

// CreepAt returns the creep strain [-] after a time t [time].
func (b BaileyNortonCreep) CreepAt(t float64) float64 { return b.Curve.StrainAt(b.Stress, t) }

// TimeTo returns the time [time] at which a creep strain is reached.
func (b BaileyNortonCreep) TimeTo(strain float64) float64 {
	return math.Exp(b.Curve.logTime(b.Stress, strain))
}

// StrainHardeningCreep is creep under constant uniaxial stress by ṗ = A σⁿ pᵏ from virgin material:
//
//	p = [(1-k) A σⁿ t]^(1/(1-k))
//
// Source: I. Finnie, W. R. Heller 1959.
type StrainHardeningCreep struct {
	Stress float64 // σ [stress], > 0
	Law    StrainHardening
}

// Check reports the first impossible parameter.
func (b StrainHardeningCreep) Check() error {
	c := checker{problem: "StrainHardeningCreep"}
	c.positive("Stress", b.Stress)
	b.Law.check(&c)
	return c.err
}

// CreepAt returns the creep strain [-] after a time t [time].
func (b StrainHardeningCreep) CreepAt(t float64) float64 {
	l, one := b.Law, 1-b.Law.StrainExponent
	logRate := math.Log(l.Rate/l.Strain) + l.StressExponent*math.Log(b.Stress/l.Stress) // of p/Strain where p = Strain
	return l.Strain * math.Exp((math.Log(one)+logRate+math.Log(t))/one)
}

// PrimarySecondaryCreep is primary and secondary creep under constant uniaxial stress as the sum of two curves over time,
//
//	ε = A σⁿ tᵐ + A₂ σ^n₂ t
//
// A rate law in which both parts share one creep strain follows another curve: see ParallelCreep.
//
// Source: J. T. Boyle, J. Spence 1983 (form).
type PrimarySecondaryCreep struct {
	Stress    float64 // σ [stress], > 0
	Primary   BaileyNorton
	Secondary Norton
}

// Check reports the first impossible parameter.
func (b PrimarySecondaryCreep) Check() error {
	return checkTwoParts("PrimarySecondaryCreep", b.Stress, b.Primary, b.Secondary)
}

func checkTwoParts(problem string, stress float64, primary BaileyNorton, secondary Norton) error {
	c := checker{problem: problem}
	c.positive("Stress", stress)
	primary.check(&c, "Primary")
	secondary.checkAs(&c, "Secondary")
	return c.err
}

// CreepAt returns the creep strain [-] after a time t [time].
func (b PrimarySecondaryCreep) CreepAt(t float64) float64 {
	return b.Primary.StrainAt(b.Stress, t) + steady(b.Secondary.RateAt(b.Stress), t)
}

// ParallelCreep is creep under constant uniaxial stress when the rates of a strain-hardening primary law and of a steady law
// add and both see the one creep strain p:
//
//	ṗ = m A^(1/m) σ^(n/m) p^((m-1)/m) + A₂ σ^n₂ = C p^(-κ) + D,   κ = (1-m)/m
//	t = ∫₀ᵖ dp/(C p^(-κ) + D),   for m = 1/2   t = p/D - (C/D²) ln(1 + D p/C)
//
// The general case is an incomplete beta function, found by quadrature and iteration: a strain is good to 1e-12 as long as
// m ≤ 0.9, and loses digits in proportion to m/(1-m) beyond.
//
// Source: separation of the rate equation; the strain-hardening form after I. Finnie, W. R. Heller 1959.
type ParallelCreep struct {
	Stress    float64 // σ [stress], > 0
	Primary   BaileyNorton
	Secondary Norton
}

// Check reports the first impossible parameter.
func (b ParallelCreep) Check() error {
	return checkTwoParts("ParallelCreep", b.Stress, b.Primary, b.Secondary)
}

// CreepAt returns the creep strain [-] after a time t [time].
func (b ParallelCreep) CreepAt(t float64) float64 {
	m, n := b.Primary.TimeExponent, b.Primary.StressExponent
	logStress := n * math.Log(b.Stress/b.Primary.Stress)
	logSteady := b.Secondary.logRate(b.Stress)
	if m == 1 {
		primary := b.Primary.Strain / b.Primary.Time * math.Exp(logStress)
		return steady(primary+math.Exp(logSteady), t)
	}
	kappa := (1 - m) / m
	logC := math.Log(m/b.Primary.Time) + (math.Log(b.Primary.Strain)+logStress)/m
	logEven := (logC - logSteady) / kappa // of the strain at which both rates are equal
	// With w = D/(D + C p^(-κ)) the time is m (strain/D) I(w), a = b = 1/(1-m).
	a := 1 / (1 - m)
	z := incompleteBeta{a, a}.odds(math.Log(t) - (math.Log(m) + logEven - logSteady))
	return math.Exp(logEven + z/kappa)
}

// SteadyFlow is the creep rate of a point under any constant stress by Norton's law with the flow rule of von Mises:
//
//	ε̇_ij = (3/2) A σₑ^(n-1) s_ij
//
// Source: F. K. G. Odqvist, J. Hult 1962; J. T. Boyle, J. Spence 1983.
type SteadyFlow struct {
	Stress tensor.Sym // σ [stress]
	Law    Norton
}

// Check reports the first impossible parameter.
func (b SteadyFlow) Check() error {
	c := checker{problem: "SteadyFlow"}
	checkStress(&c, b.Stress)
	b.Law.check(&c)
	return c.err
}

func checkStress(c *checker, stress tensor.Sym) {
	for i, v := range stress {
		c.finite("Stress "+[6]string{"xx", "yy", "zz", "yz", "xz", "xy"}[i], v)
	}
}

// EquivalentRate returns A σₑⁿ [1/time].
func (b SteadyFlow) EquivalentRate() float64 { return b.Law.RateAt(b.Stress.Mises()) }

// Rate returns the creep rate tensor [1/time], tensor shear components; zero for a stress without deviator.
func (b SteadyFlow) Rate() tensor.Sym {
	mises := b.Stress.Mises()
	if mises == 0 {
		return tensor.Sym{}
	}
	return b.Stress.Deviator().Scale(1.5 * b.Law.RateAt(mises) / mises)
}

// CreepAt returns the creep strain [-] after a time t [time], tensor shear components.
func (b SteadyFlow) CreepAt(t float64) tensor.Sym { return b.Rate().Scale(steady(1, t)) }

// TwoStepCreep is primary creep ε = A σⁿ tᵐ under a uniaxial stress that jumps once. What happens after the jump is the
// difference between the two hardening rules.
//
// Source: I. Finnie, W. R. Heller 1959; J. A. H. Hult, Creep in Engineering Structures, 1966.
type TwoStepCreep struct {
	First  float64 // σ₁: stress until the change [stress], > 0
	Change float64 // t₁: time of the change [time], > 0
	Second float64 // σ₂: stress afterwards [stress], > 0
	Curve  BaileyNorton
}

// Check reports the first impossible parameter.
func (b TwoStepCreep) Check() error {
	c := checker{problem: "TwoStepCreep"}
	c.positive("First", b.First)
	c.positive("Change", b.Change)
	c.positive("Second", b.Second)
	b.Curve.check(&c, "Curve")
	return c.err
}

// EquivalentTime returns t_e = t₁ (σ₁/σ₂)^(n/m) [time]: the age at which the second stress alone would have made the creep
// strain of the first.
func (b TwoStepCreep) EquivalentTime() float64 {
	return math.Exp(b.logEquivalentTime())
}

func (b TwoStepCreep) logEquivalentTime() float64 {
	return math.Log(b.Change) + b.Curve.StressExponent/b.Curve.TimeExponent*math.Log(b.First/b.Second)
}

// StrainHardeningAt returns the creep strain [-] at time t by strain hardening, A σ₂ⁿ (t_e + t - t₁)ᵐ after the change.
func (b TwoStepCreep) StrainHardeningAt(t float64) float64 {
	if !(t > b.Change) {
		return b.Curve.StrainAt(b.First, t)
	}
	later := math.Log(t-b.Change) - b.logEquivalentTime()
	return math.Exp(b.Curve.logStrain(b.First, b.Change) + b.Curve.TimeExponent*softplus(later))
}

// TimeHardeningAt returns the creep strain [-] at time t by time hardening, A σ₁ⁿ t₁ᵐ + A σ₂ⁿ (tᵐ - t₁ᵐ) after the change.
func (b TwoStepCreep) TimeHardeningAt(t float64) float64 {
	if !(t > b.Change) {
		return b.Curve.StrainAt(b.First, t)
	}
	grown := math.Expm1(b.Curve.TimeExponent * math.Log(t/b.Change)) // (t/t₁)ᵐ - 1
	return b.Curve.StrainAt(b.First, b.Change) + b.Curve.StrainAt(b.Second, b.Change)*grown
}
