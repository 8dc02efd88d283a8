package creeplaw

import "math"

// DoublePower is the double power law of steady creep after Johnson, Henderson and Kahn
//
//	ṗ = A₁ σⁿ¹ + A₂ σⁿ²      (or, the same, ṗ = ṗₜ [(σ/σₜ)ⁿ¹ + (σ/σₜ)ⁿ²])
//
// Symbols: σ von Mises stress [stress]; A₁, A₂ prefactors [stress⁻ⁿ/time]; n₁, n₂ stress exponents [-], > 0; σₜ the
// transition stress [stress] at which both terms give the same rate ṗₜ [1/time].
//
// Below the transition stress the smaller exponent rules, above it the larger one; the logarithm is exact far to either
// side. At zero stress the rate is zero, with the slopes of the terms: A for an exponent of 1, 0 above 1 and +Inf below. It
// depends neither on creep strain nor on temperature: terms with activation energies of their own are a Sum of two laws,
// each WithTemperature. Negative or NaN stress gives NaN.
//
// Source: A. E. Johnson, J. Henderson, B. Kahn, Complex-Stress Creep, Relaxation and Fracture of Metallic Alloys, HMSO,
// Edinburgh 1962 (from memory).
type DoublePower struct {
	first, second power
	given[Law]
}

var _ Logarithmic = DoublePower{}

// NewDoublePower builds ṗ = A₁ σⁿ¹ + A₂ σⁿ² from the prefactors [stress⁻ⁿ/time] and the stress exponents of the two terms,
// all positive and finite.
func NewDoublePower(firstPrefactor, firstExponent, secondPrefactor, secondExponent float64) (DoublePower, error) {
	err := positive("double power law", parameter{"first prefactor", firstPrefactor},
		parameter{"first stress exponent", firstExponent}, parameter{"second prefactor", secondPrefactor},
		parameter{"second stress exponent", secondExponent})
	if err != nil {
		return DoublePower{}, err
	}
	return DoublePower{newPrefactor(firstPrefactor, firstExponent), newPrefactor(secondPrefactor, secondExponent),
		remember(doublePowerForm, firstPrefactor, firstExponent, secondPrefactor, secondExponent)}, nil
}

// NewDoublePowerAt builds ṗ = ṗₜ [(σ/σₜ)ⁿ¹ + (σ/σₜ)ⁿ²] from the rate ṗₜ [1/time] that each term gives at the transition
// stress σₜ [stress], and the two stress exponents, all positive and finite.
func NewDoublePowerAt(rate, transitionStress, firstExponent, secondExponent float64) (DoublePower, error) {
	err := positive("double power law", parameter{"rate", rate}, parameter{"transition stress", transitionStress},
		parameter{"first stress exponent", firstExponent}, parameter{"second stress exponent", secondExponent})
	if err != nil {
		return DoublePower{}, err
	}
	return DoublePower{newPower(rate, transitionStress, 1, firstExponent, 0),
		newPower(rate, transitionStress, 1, secondExponent, 0),
		remember(doublePowerAtForm, rate, transitionStress, firstExponent, secondExponent)}, nil
}

// LogRate returns the logarithm of the sum and the exponents averaged with their shares of the rate.
func (d DoublePower) LogRate(p Point) LogRate {
	return addLog(d.first.LogRate(p), d.second.LogRate(p))
}

// Rate returns ṗ and its derivative by stress, A₁n₁σⁿ¹⁻¹ + A₂n₂σⁿ²⁻¹.
func (d DoublePower) Rate(p Point) Rate {
	if p.Stress > 0 {
		return rateOf(p, d.LogRate(p))
	}
	r, s := d.first.Rate(p), d.second.Rate(p) // zero stress, or NaN
	return Rate{Value: r.Value + s.Value, ByStress: r.ByStress + s.ByStress, ByStrain: r.ByStrain + s.ByStrain,
		ByTemperature: r.ByTemperature + s.ByTemperature}
}

// addLog is the logarithm of the sum of two rates given by theirs. Where both vanish the smaller stress exponent is the
// limit: that term is the last to go.
func addLog(a, b LogRate) LogRate {
	switch {
	case math.IsNaN(a.Value) || math.IsNaN(b.Value):
		return undefinedLog()
	case b.Value > a.Value:
		a, b = b, a
	case math.IsInf(a.Value, -1):
		a.ByLogStress = math.Min(a.ByLogStress, b.ByLogStress)
		return a
	}
	if math.IsInf(a.Value, 1) || math.IsInf(b.Value, -1) {
		return a
	}
	weight := math.Exp(b.Value - a.Value)
	total := 1 + weight
	a.Value += math.Log1p(weight)
	a.ByLogStress = (a.ByLogStress + weight*b.ByLogStress) / total
	a.ByLogStrain = (a.ByLogStrain + weight*b.ByLogStrain) / total
	a.ByLogTemperature = (a.ByLogTemperature + weight*b.ByLogTemperature) / total
	return a
}
