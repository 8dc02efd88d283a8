package creeplaw

// Norton is the power law of steady creep
//
//	ṗ = A σⁿ      (or, the same, ṗ = ṗ₁ (σ/σ₁)ⁿ)
//
// Symbols: σ von Mises stress [stress]; A prefactor [stress⁻ⁿ/time]; n stress exponent [-], > 0; ṗ₁ the rate [1/time] under
// the stress σ₁ [stress].
//
// At zero stress the rate is zero, with slope A for n = 1, 0 for n > 1 and +Inf for n < 1. It depends neither on creep
// strain nor on temperature (see WithTemperature). Negative or NaN stress gives NaN.
//
// Source: F. H. Norton, The Creep of Steel at High Temperatures, McGraw-Hill 1929.
type Norton struct {
	power
	given[Law]
}

var _ Logarithmic = Norton{}

// NewNorton builds ṗ = A σⁿ from the prefactor A [stress⁻ⁿ/time] and the stress exponent n, both positive and finite.
// With n = 50 and stress in Pa a prefactor may fall below the range of a float64: use NewNortonAt.
func NewNorton(prefactor, stressExponent float64) (Norton, error) {
	if err := positive("Norton", parameter{"prefactor", prefactor}, parameter{"stress exponent", stressExponent}); err != nil {
		return Norton{}, err
	}
	return Norton{newPrefactor(prefactor, stressExponent), remember(nortonForm, prefactor, stressExponent)}, nil
}

// NewNortonAt builds ṗ = ṗ₁ (σ/σ₁)ⁿ from one known point: the rate ṗ₁ [1/time] under the stress σ₁ [stress]. All three
// arguments are positive and finite.
func NewNortonAt(rate, stress, stressExponent float64) (Norton, error) {
	err := positive("Norton", parameter{"rate", rate}, parameter{"stress", stress},
		parameter{"stress exponent", stressExponent})
	if err != nil {
		return Norton{}, err
	}
	return Norton{newPower(rate, stress, 1, stressExponent, 0), remember(nortonAtForm, rate, stress, stressExponent)}, nil
}
