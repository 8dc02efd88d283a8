package bench

import "math"

// ShearRelaxation is a point in pure shear, held at fixed shear strain while it creeps by Norton's law in the form of von
// Mises. The tension law gives the rate of engineering shear γ' = 3^((n+1)/2) A τⁿ, hence
//
//	τ^(1-n) = τ₀^(1-n) + (n-1) G 3^((n+1)/2) A t
//
// Source: F. K. G. Odqvist, J. Hult 1962; J. T. Boyle, J. Spence 1983.
type ShearRelaxation struct {
	Shear  float64 // G [stress], > 0
	Stress float64 // τ₀: shear stress at the start of the hold [stress], > 0
	Law    Norton  // in tension
}

// Check reports the first impossible parameter.
func (s ShearRelaxation) Check() error {
	c := checker{problem: "ShearRelaxation"}
	c.positive("Shear", s.Shear)
	c.positive("Stress", s.Stress)
	s.Law.check(&c)
	return c.err
}

// decay of the von Mises stress √3 τ.
func (s ShearRelaxation) decay() powerDecay {
	return powerDecay{3 * s.Shear, math.Sqrt(3) * s.Stress, s.Law}
}

// StressAt returns τ [stress] after a hold of t [time].
func (s ShearRelaxation) StressAt(t float64) float64 {
	return s.Stress * math.Exp(s.decay().logKept(t))
}

// Strain returns the engineering shear strain γ = τ₀/G [-] that is held.
func (s ShearRelaxation) Strain() float64 { return s.Stress / s.Shear }

// TimeTo returns the time [time] at which the shear stress has fallen to τ; NaN below 0 or above the start.
func (s ShearRelaxation) TimeTo(stress float64) float64 {
	return s.decay().timeTo(math.Sqrt(3) * stress)
}

// EqualBiaxialRelaxation is a sheet in plane stress under equal tension in its two directions, both in-plane strains held,
// the thickness free:
//
//	σ^(1-n) = σ₀^(1-n) + (n-1) E A t/(2(1-ν))
//
// Source: own derivation from the flow rule of von Mises for the class of problem "biaxial fixed displacement" (A. A. Becker,
// T. H. Hyde 1993 treat the class; their numbers are not used).
type EqualBiaxialRelaxation struct {
	Young   float64 // E [stress], > 0
	Poisson float64 // ν [-], above -1 and below 0.5
	Stress  float64 // σ₀: stress in each of the two directions at the start [stress], > 0
	Law     Norton
}

// Check reports the first impossible parameter.
func (b EqualBiaxialRelaxation) Check() error {
	return checkBiaxial("EqualBiaxialRelaxation", b.Young, b.Poisson, b.Stress, b.Law)
}

func checkBiaxial(problem string, young, poisson, stress float64, law Norton) error {
	c := checker{problem: problem}
	c.positive("Young", young)
	c.poisson(poisson)
	c.positive("Stress", stress)
	law.check(&c)
	return c.err
}

func (b EqualBiaxialRelaxation) decay() powerDecay {
	return powerDecay{b.Young / (2 * (1 - b.Poisson)), b.Stress, b.Law}
}

// StressAt returns the stress in each direction [stress] after a hold of t [time].
func (b EqualBiaxialRelaxation) StressAt(t float64) float64 { return b.decay().stress(t) }

// Strain returns the strain (1-ν)σ₀/E [-] held in each of the two directions.
func (b EqualBiaxialRelaxation) Strain() float64 { return (1 - b.Poisson) * b.Stress / b.Young }

// ThicknessStrainAt returns the strain through the thickness [-], which the hold leaves free.
func (b EqualBiaxialRelaxation) ThicknessStrainAt(t float64) float64 {
	elastic := -2 * b.Poisson * b.StressAt(t) / b.Young
	creep := -2 * b.Strain() * b.decay().lost(t) // twice the in-plane creep strain, volume being kept
	return elastic + creep
}

// TimeTo returns the time [time] at which the stress has fallen to σ; NaN for a stress below 0 or above the start.
func (b EqualBiaxialRelaxation) TimeTo(stress float64) float64 { return b.decay().timeTo(stress) }

// OppositeBiaxialRelaxation is a sheet in plane stress with σ in one direction and -σ in the other, both in-plane strains
// held. It is pure shear seen at 45°; the thickness does not change:
//
//	σ^(1-n) = σ₀^(1-n) + (n-1) E A 3^((n+1)/2) t/(2(1+ν))
//
// Source: as EqualBiaxialRelaxation.
type OppositeBiaxialRelaxation struct {
	Young   float64 // E [stress], > 0
	Poisson float64 // ν [-], above -1 and below 0.5
	Stress  float64 // σ₀: the tensile one of the two stresses at the start [stress], > 0
	Law     Norton
}

// Check reports the first impossible parameter.
func (b OppositeBiaxialRelaxation) Check() error {
	return checkBiaxial("OppositeBiaxialRelaxation", b.Young, b.Poisson, b.Stress, b.Law)
}

func (b OppositeBiaxialRelaxation) asShear() ShearRelaxation {
	return ShearRelaxation{b.Young / (2 * (1 + b.Poisson)), b.Stress, b.Law}
}

// StressAt returns the tensile stress [stress] after a hold of t [time]; the other is its negative.
func (b OppositeBiaxialRelaxation) StressAt(t float64) float64 { return b.asShear().StressAt(t) }

// Strain returns the strain (1+ν)σ₀/E [-] held in the direction of tension; the other is its negative.
func (b OppositeBiaxialRelaxation) Strain() float64 { return (1 + b.Poisson) * b.Stress / b.Young }

// TimeTo returns the time [time] at which the stress has fallen to σ; NaN for a stress below 0 or above the start.
func (b OppositeBiaxialRelaxation) TimeTo(stress float64) float64 { return b.asShear().TimeTo(stress) }
