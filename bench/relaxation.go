package bench

import (
	"math"

	"example.com/holdtime/tensor"
)

// BarRelaxation is a bar loaded to a stress and held at fixed length while it creeps by Norton's law; its sides are free:
//
//	σ^(1-n) = σ₀^(1-n) + (n-1) E A t,   for n = 1   σ = σ₀ exp(-E A t)  (Maxwell)
//
// For n < 1 the stress is gone after a finite time.
//
// Source: F. H. Norton, The Creep of Steel at High Temperatures, 1929; F. K. G. Odqvist, J. Hult, Kriechfestigkeit
// metallischer Werkstoffe, 1962; J. T. Boyle, J. Spence, Stress Analysis for Creep, 1983.
type BarRelaxation struct {
	Young  float64 // E [stress], > 0
	Stress float64 // σ₀: stress at the start of the hold [stress], > 0
	Law    Norton
}

// Check reports the first impossible parameter.
func (b BarRelaxation) Check() error {
	c := checker{problem: "BarRelaxation"}
	c.positive("Young", b.Young)
	c.positive("Stress", b.Stress)
	b.Law.check(&c)
	return c.err
}

func (b BarRelaxation) decay() powerDecay { return powerDecay{b.Young, b.Stress, b.Law} }

// StressAt returns σ [stress] after a hold of t [time].
func (b BarRelaxation) StressAt(t float64) float64 { return b.decay().stress(t) }

// CreepAt returns the axial creep strain (σ₀-σ)/E [-], exact also while it is small.
func (b BarRelaxation) CreepAt(t float64) float64 { return b.Stress / b.Young * b.decay().lost(t) }

// TimeTo returns the time [time] at which the stress has fallen to σ; NaN for a stress below 0 or above the start.
func (b BarRelaxation) TimeTo(stress float64) float64 { return b.decay().timeTo(stress) }

// HalfLife returns the time at which half the stress is left, (2^(n-1) - 1)/((n-1) E A σ₀^(n-1)).
func (b BarRelaxation) HalfLife() float64 { return b.TimeTo(b.Stress / 2) }

// FollowUpRelaxation is a creeping bar whose elastic surroundings follow up: it lengthens by creep more than it would at
// fixed length, and relaxes as if its modulus were E/Z:
//
//	σ^(1-n) = σ₀^(1-n) + (n-1) (E/Z) A t
//
// Z = 1 is fixed length, Z → ∞ a dead load. SeriesFollowUp and ParallelFollowUp give Z for two arrangements.
//
// Source: definition of Z as in the R5 procedure, vol. 2/3 (from memory); J. T. Boyle, J. Spence 1983; R. K. Penny,
// D. L. Marriott, Design for Creep, 1971.
type FollowUpRelaxation struct {
	Young    float64 // E of the creeping bar [stress], > 0
	Stress   float64 // σ₀: its stress at the start [stress], > 0
	FollowUp float64 // Z [-], ≥ 1
	Law      Norton
}

// SeriesFollowUp returns Z = 1 + k_bar/k_joint of a creeping bar in series with an elastic joint, such as a bolt in a
// flange, held at a fixed sum of lengths. The stiffnesses [force/length] have the same unit.
func SeriesFollowUp(bar, joint float64) float64 { return 1 + bar/joint }

// ParallelFollowUp returns Z = 1 + k_bar/k_elastic of a creeping bar beside an elastic bar under a dead load that both
// carry; for equal lengths the stiffness is area times modulus.
func ParallelFollowUp(bar, elastic float64) float64 { return 1 + bar/elastic }

// Check reports the first impossible parameter.
func (b FollowUpRelaxation) Check() error {
	c := checker{problem: "FollowUpRelaxation"}
	c.positive("Young", b.Young)
	c.positive("Stress", b.Stress)
	c.require(b.FollowUp >= 1 && !math.IsInf(b.FollowUp, 1), "FollowUp", b.FollowUp, "at least 1 and finite")
	b.Law.check(&c)
	return c.err
}

func (b FollowUpRelaxation) decay() powerDecay {
	return powerDecay{b.Young / b.FollowUp, b.Stress, b.Law}
}

// StressAt returns σ [stress] of the creeping bar after a hold of t [time].
func (b FollowUpRelaxation) StressAt(t float64) float64 { return b.decay().stress(t) }

// StrainAt returns the total strain σ₀/E + (Z-1)(σ₀-σ)/E [-] of the creeping bar, which grows as the surroundings unload.
func (b FollowUpRelaxation) StrainAt(t float64) float64 {
	return b.Stress / b.Young * (1 + (b.FollowUp-1)*b.decay().lost(t))
}

// CreepAt returns the axial creep strain Z (σ₀-σ)/E [-].
func (b FollowUpRelaxation) CreepAt(t float64) float64 {
	return b.FollowUp * b.Stress / b.Young * b.decay().lost(t)
}

// TimeTo returns the time [time] at which the stress has fallen to σ; NaN for a stress below 0 or above the start.
func (b FollowUpRelaxation) TimeTo(stress float64) float64 { return b.decay().timeTo(stress) }

// SinhRelaxation is a bar held at fixed length while it creeps by ṗ = A sinh(Bσ):
//
//	tanh(Bσ/2) = tanh(Bσ₀/2) exp(-E A B t)
//
// Source: A. Nadai 1938 (from memory); I. Finnie, W. R. Heller, Creep of Engineering Materials, 1959.
type SinhRelaxation struct {
	Young       float64 // E [stress], > 0
	Stress      float64 // σ₀ [stress], > 0
	Prefactor   float64 // A [1/time], > 0
	Coefficient float64 // B [1/stress], > 0
}

// Check reports the first impossible parameter.
func (b SinhRelaxation) Check() error {
	c := checker{problem: "SinhRelaxation"}
	c.positive("Young", b.Young)
	c.positive("Stress", b.Stress)
	c.positive("Prefactor", b.Prefactor)
	c.positive("Coefficient", b.Coefficient)
	return c.err
}

// StressAt returns σ [stress] after a hold of t [time].
func (b SinhRelaxation) StressAt(t float64) float64 {
	if !(t >= 0) {
		return math.NaN()
	}
	y := minusLogTanhHalf(b.Coefficient*b.Stress) + b.Young*b.Prefactor*b.Coefficient*t
	return math.Min(b.Stress, minusLogTanhHalf(y)/b.Coefficient)
}

// TimeTo returns the time [time] at which the stress has fallen to σ; NaN for a stress below 0 or above the start.
func (b SinhRelaxation) TimeTo(stress float64) float64 {
	if !(stress >= 0 && stress <= b.Stress) {
		return math.NaN()
	}
	fall := minusLogTanhHalf(b.Coefficient*stress) - minusLogTanhHalf(b.Coefficient*b.Stress)
	return fall / (b.Young * b.Prefactor * b.Coefficient)
}

// minusLogTanhHalf is -ln tanh(x/2), which is its own inverse.
func minusLogTanhHalf(x float64) float64 { return math.Log1p(2 / math.Expm1(x)) }

// SolidRelaxation is a material point whose six strains are all held fixed while it creeps by Norton's law with the flow rule
// of von Mises. The deviator shrinks along a straight line, the mean stress stays:
//
//	σₑ^(1-n) = σₑ₀^(1-n) + (n-1) 3G A t,   s = s₀ σₑ/σₑ₀
//
// A bar held with free sides (BarRelaxation) relaxes with E, this one with 3G.
//
// Source: F. K. G. Odqvist, J. Hult 1962; J. T. Boyle, J. Spence 1983.
type SolidRelaxation struct {
	Young   float64    // E [stress], > 0
	Poisson float64    // ν [-], above -1 and below 0.5
	Stress  tensor.Sym // σ₀: stress at the start of the hold [stress]
	Law     Norton
}

// Check reports the first impossible parameter. A start without deviator is allowed: it does not creep.
func (s SolidRelaxation) Check() error {
	c := checker{problem: "SolidRelaxation"}
	c.positive("Young", s.Young)
	c.poisson(s.Poisson)
	checkStress(&c, s.Stress)
	s.Law.check(&c)
	return c.err
}

func (s SolidRelaxation) shear() float64 { return s.Young / (2 * (1 + s.Poisson)) }

func (s SolidRelaxation) decay() powerDecay {
	return powerDecay{3 * s.shear(), s.Stress.Mises(), s.Law}
}

// Strain returns the strain that is held [-], with tensor shear components: the elastic strain of the starting stress.
func (s SolidRelaxation) Strain() tensor.Sym {
	volume := (1 - 2*s.Poisson) / s.Young * s.Stress.Mean()
	return s.Stress.Deviator().Scale(0.5 / s.shear()).Add(tensor.Identity().Scale(volume))
}

// MisesAt returns the von Mises stress σₑ [stress] after a hold of t [time].
func (s SolidRelaxation) MisesAt(t float64) float64 {
	if s.decay().start == 0 {
		return s.still(t)
	}
	return s.decay().stress(t)
}

// StressAt returns the stress [stress] after a hold of t [time].
func (s SolidRelaxation) StressAt(t float64) tensor.Sym {
	kept := 1 - s.still(t)
	if d := s.decay(); d.start != 0 {
		kept = math.Exp(d.logKept(t))
	}
	return s.Stress.Deviator().Scale(kept).Add(tensor.Identity().Scale(s.Stress.Mean()))
}

// CreepAt returns the creep strain (s₀-s)/2G [-], tensor shear components.
func (s SolidRelaxation) CreepAt(t float64) tensor.Sym {
	return s.Stress.Deviator().Scale(0.5 / s.shear() * s.lost(t))
}

// EquivalentCreepAt returns the accumulated equivalent creep strain (σₑ₀-σₑ)/3G [-].
func (s SolidRelaxation) EquivalentCreepAt(t float64) float64 {
	return s.Stress.Mises() / (3 * s.shear()) * s.lost(t)
}

func (s SolidRelaxation) lost(t float64) float64 {
	if s.decay().start == 0 {
		return s.still(t)
	}
	return s.decay().lost(t)
}

// still is zero at every time there is.
func (s SolidRelaxation) still(t float64) float64 {
	if !(t >= 0) {
		return math.NaN()
	}
	return 0
}
