package creeplaw

import "math"

// BaileyNorton is primary creep after Bailey and Norton in its strain-hardening rate form. From the curve at constant stress
//
//	ε = A σⁿ tᵐ,  0 < m ≤ 1
//
// the time is eliminated, so that the rate depends on the creep strain reached and on no clock:
//
//	ṗ = m A^(1/m) σ^(n/m) p^((m-1)/m)
//
// Symbols: σ von Mises stress [stress]; p accumulated equivalent creep strain [-]; t time since loading [time];
// A prefactor [stress⁻ⁿ time⁻ᵐ]; n stress exponent [-], > 0; m time exponent [-].
//
// At zero stress the rate is zero, whatever the strain. At zero strain and m < 1 it is +Inf (Rate) with infinite partial
// derivatives; the step starts from there without help. With m = 1 it is Norton's law. Negative or NaN stress or strain
// gives NaN. Temperature does not enter (see WithTemperature).
//
// Source: R. W. Bailey, Proc. Inst. Mech. Engrs 131 (1935) 131–349; I. Finnie, W. R. Heller, Creep of Engineering
// Materials, McGraw-Hill 1959 (strain-hardening form).
type BaileyNorton struct {
	power
	given[Law]
}

var _ Logarithmic = BaileyNorton{}

// NewBaileyNorton builds the law from the curve ε = A σⁿ tᵐ: prefactor A [stress⁻ⁿ time⁻ᵐ] and stress exponent n positive
// and finite, time exponent 0 < m ≤ 1.
func NewBaileyNorton(prefactor, stressExponent, timeExponent float64) (BaileyNorton, error) {
	const law = "Bailey–Norton"
	if err := positive(law, parameter{"prefactor", prefactor}, parameter{"stress exponent", stressExponent}); err != nil {
		return BaileyNorton{}, err
	}
	if err := checkTimeExponent(law, timeExponent); err != nil {
		return BaileyNorton{}, err
	}
	// In terms of σ alone, ε = (σ/σ₀)ⁿ tᵐ defines the reference stress; the reference time is one unit.
	m := timeExponent
	w := newPrefactor(prefactor, stressExponent)
	strain := math.Exp(w.logRate) // the curve's strain after unit time at the reference stress
	return BaileyNorton{baileyPower(w.logRate, w.stress, strain, 0, stressExponent, m),
		remember(baileyForm, prefactor, stressExponent, timeExponent)}, nil
}

// NewBaileyNortonAt builds the law from one point of a measured curve: the creep strain [-] that the stress [stress] made
// in the given time [time]. It serves where the prefactor would leave the range of a float64. The first four arguments are
// positive and finite, 0 < m ≤ 1.
func NewBaileyNortonAt(strain, stress, time, stressExponent, timeExponent float64) (BaileyNorton, error) {
	const law = "Bailey–Norton"
	err := positive(law, parameter{"strain", strain}, parameter{"stress", stress}, parameter{"time", time},
		parameter{"stress exponent", stressExponent})
	if err != nil {
		return BaileyNorton{}, err
	}
	if err := checkTimeExponent(law, timeExponent); err != nil {
		return BaileyNorton{}, err
	}
	return BaileyNorton{baileyPower(math.Log(strain), stress, strain, math.Log(time), stressExponent, timeExponent),
		remember(baileyAtForm, strain, stress, time, stressExponent, timeExponent)}, nil
}

// baileyPower is the rate m·strain/time at the point (stress, strain) that the curve passes at that time.
func baileyPower(logStrain, stress, strain, logTime, n, m float64) power {
	w := newPower(1, stress, strain, n/m, (m-1)/m)
	w.logRate = logStrain - logTime + math.Log(m)
	w.linearPrefactor = math.Exp(w.logRate) / stress
	return w
}

func checkTimeExponent(law string, m float64) error {
	if !(m > 0 && m <= 1) {
		return &ParameterError{law, "time exponent", m, "above 0 and at most 1"}
	}
	return nil
}

// StrainHardening is the direct rate form of strain hardening
//
//	ṗ = A σⁿ pᵏ,  k ≤ 0
//
// Symbols: σ von Mises stress [stress]; p accumulated equivalent creep strain [-]; A prefactor [stress⁻ⁿ/time]; n stress
// exponent [-], > 0; k strain exponent [-]: zero is Norton's law, negative makes primary creep.
//
// At zero stress the rate is zero. At zero strain and k < 0 it is +Inf with infinite partial derivatives. Negative or NaN
// stress or strain gives NaN. Under constant stress p = [(1-k) A σⁿ t]^(1/(1-k)).
//
// Source: I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959.
type StrainHardening struct {
	power
	given[Law]
}

var _ Logarithmic = StrainHardening{}

// NewStrainHardening builds ṗ = A σⁿ pᵏ from the prefactor A [stress⁻ⁿ/time] and the stress exponent n, both positive and
// finite, and the strain exponent k ≤ 0.
func NewStrainHardening(prefactor, stressExponent, strainExponent float64) (StrainHardening, error) {
	const law = "strain hardening"
	if err := positive(law, parameter{"prefactor", prefactor}, parameter{"stress exponent", stressExponent}); err != nil {
		return StrainHardening{}, err
	}
	if err := checkStrainExponent(law, strainExponent); err != nil {
		return StrainHardening{}, err
	}
	w := newPrefactor(prefactor, stressExponent)
	w.strainExp, w.dependsOnHistory = strainExponent, strainExponent != 0
	return StrainHardening{w, remember(hardeningForm, prefactor, stressExponent, strainExponent)}, nil
}

// NewStrainHardeningAt builds ṗ = ṗ₁ (σ/σ₁)ⁿ (p/p₁)ᵏ from the rate ṗ₁ [1/time] known at the stress σ₁ [stress] and creep
// strain p₁ [-]. The first four arguments are positive and finite, k ≤ 0.
func NewStrainHardeningAt(rate, stress, strain, stressExponent, strainExponent float64) (StrainHardening, error) {
	const law = "strain hardening"
	err := positive(law, parameter{"rate", rate}, parameter{"stress", stress}, parameter{"strain", strain},
		parameter{"stress exponent", stressExponent})
	if err != nil {
		return StrainHardening{}, err
	}
	if err := checkStrainExponent(law, strainExponent); err != nil {
		return StrainHardening{}, err
	}
	return StrainHardening{newPower(rate, stress, strain, stressExponent, strainExponent),
		remember(hardeningAtForm, rate, stress, strain, stressExponent, strainExponent)}, nil
}

func checkStrainExponent(law string, k float64) error {
	if !(k <= 0) || math.IsInf(k, -1) {
		return &ParameterError{law, "strain exponent", k, "at most 0 and finite"}
	}
	return nil
}
