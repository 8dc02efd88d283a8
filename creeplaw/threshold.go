package creeplaw

import "math"

// Threshold is a law that sees only the part of the stress above a threshold
//
//	ṗ = law(σ - σₜ, p, T)   for σ > σₜ,    ṗ = 0   for σ ≤ σₜ
//
// Symbols: σ von Mises stress [stress]; σₜ threshold stress [stress], > 0. With Norton's law within it is
//
//	ṗ = A (σ - σₜ)ⁿ,  or  ṗ₁ [(σ - σₜ)/σ₁]ⁿ
//
// the usual description of alloys strengthened by particles.
//
// At and below the threshold, zero stress included, the rate is exactly zero (LogRate -Inf), also for a law that itself
// does not vanish at zero stress, and its derivatives are given as zero. Just above it the local exponent n σ/(σ - σₜ)
// grows without bound. Strain and temperature act as in the law within; where that is undefined, so is this. A threshold
// that depends on temperature is a Tabulated law of several of these. Negative or NaN stress gives NaN.
//
// Source: R. Lagneborg, B. Bergman, Metal Sci. 10 (1976) 20–28 (from memory).
type Threshold struct {
	law       Logarithmic
	threshold float64
}

var (
	_ Logarithmic = Threshold{}
	_ Explainer   = Threshold{}
)

// WithThreshold puts a threshold stress σₜ [stress], positive and finite, before a law. A nil law is a
// *MissingError, one with internal variables a *CompositionError.
func WithThreshold(law Law, thresholdStress float64) (Threshold, error) {
	if law == nil {
		return Threshold{}, &MissingError{"threshold stress", "law"}
	}
	if err := positive("threshold stress", parameter{"threshold stress", thresholdStress}); err != nil {
		return Threshold{}, err
	}
	if err := withoutVariables("threshold stress", law); err != nil {
		return Threshold{}, err
	}
	return Threshold{Log(law), thresholdStress}, nil
}

// LogRate returns that of the law within at σ - σₜ, its stress exponent times σ/(σ - σₜ).
func (t Threshold) LogRate(p Point) LogRate {
	if !(p.Stress >= 0) {
		return undefinedLog()
	}
	acting := p
	acting.Stress = p.Stress - t.threshold
	if acting.Stress <= 0 {
		if math.IsNaN(t.law.LogRate(p).Value) { // a table left is not to be hidden by a low stress
			return undefinedLog()
		}
		return LogRate{Value: math.Inf(-1)}
	}
	l := t.law.LogRate(acting)
	l.ByLogStress *= p.Stress / acting.Stress
	return l
}

// Rate returns that of the law within at σ - σₜ.
func (t Threshold) Rate(p Point) Rate {
	if !(p.Stress >= 0) {
		return undefined()
	}
	acting := p
	acting.Stress = p.Stress - t.threshold
	if acting.Stress <= 0 {
		if math.IsNaN(t.law.LogRate(p).Value) {
			return undefined()
		}
		return Rate{}
	}
	return t.law.Rate(acting)
}

// CheckPoint hands on what the law within says.
func (t Threshold) CheckPoint(p Point) error { return reason("threshold stress", t, p, t.law) }
