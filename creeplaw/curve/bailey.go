package curve

import "example.com/holdtime/creeplaw"

// BaileyNorton is the single power of time and stress
//
//	ε = A σⁿ tᵐ,  0 < m ≤ 1
//
// Symbols: σ von Mises stress [stress]; t time [time]; A prefactor [stress⁻ⁿ time⁻ᵐ]; n stress exponent [-], > 0; m time
// exponent [-].
//
// Zero at zero stress and at zero time, where the rate is +Inf for m < 1; no bound at large time. Temperature does not enter:
// creeplaw.WithTemperature multiplies the rate of the law made from it. That law is creeplaw.BaileyNorton.
//
// Source: R. W. Bailey, Proc. Inst. Mech. Engrs 131 (1935) 131–349; F. H. Norton, The Creep of Steel at High Temperatures,
// McGraw-Hill 1929.
type BaileyNorton struct{ sum }

var _ Logarithmic = BaileyNorton{}

// NewBaileyNorton builds the curve from the prefactor A [stress⁻ⁿ time⁻ᵐ] and the stress exponent n, positive and finite, and
// the time exponent 0 < m ≤ 1. A fault is a *creeplaw.ParameterError.
func NewBaileyNorton(prefactor, stressExponent, timeExponent float64) (BaileyNorton, error) {
	const curve = "Bailey–Norton curve"
	if err := atMostOne(curve, timeExponent); err != nil {
		return BaileyNorton{}, err
	}
	s, err := newSum(curve, part{PowerOfTime(Power{prefactor, stressExponent}, timeExponent), "strain", ""})
	return BaileyNorton{s}, err
}

func atMostOne(curve string, timeExponent float64) error {
	if !(timeExponent > 0 && timeExponent <= 1) {
		return &creeplaw.ParameterError{Law: curve, Parameter: "time exponent", Value: timeExponent,
			Want: "above 0 and at most 1"}
	}
	return nil
}

// PrimarySecondary is a power of time for primary creep beside steady creep,
//
//	ε = A σⁿ tᵐ + B σᵏ t,  0 < m < 1
//
// Symbols: σ von Mises stress [stress]; t time [time]; A prefactor [stress⁻ⁿ time⁻ᵐ]; n, k stress exponents [-], > 0; m time
// exponent [-]; B prefactor of the steady rate [stress⁻ᵏ/time].
//
// Zero at zero stress and at zero time, where the rate is +Inf; at large time the rate falls to B σᵏ. The law made from it
// lets primary and steady creep share one creep strain. That is not the sum of creeplaw.BaileyNorton and creeplaw.Norton,
// in which steady creep uses up the primary.
//
// Source: I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959 (from memory).
type PrimarySecondary struct{ sum }

var _ Logarithmic = PrimarySecondary{}

// PrimarySecondaryParameters are the parameters of a PrimarySecondary curve, all positive and finite, TimeExponent ≤ 1.
type PrimarySecondaryParameters struct {
	PrimaryPrefactor      float64 // A [stress⁻ⁿ time⁻ᵐ]
	PrimaryStressExponent float64 // n [-]
	TimeExponent          float64 // m [-]
	SteadyPrefactor       float64 // B [stress⁻ᵏ/time]
	SteadyStressExponent  float64 // k [-]
}

// NewPrimarySecondary builds the curve. A fault is a *creeplaw.ParameterError.
func NewPrimarySecondary(p PrimarySecondaryParameters) (PrimarySecondary, error) {
	const curve = "primary and secondary powers"
	if err := atMostOne(curve, p.TimeExponent); err != nil {
		return PrimarySecondary{}, err
	}
	s, err := newSum(curve,
		part{PowerOfTime(Power{p.PrimaryPrefactor, p.PrimaryStressExponent}, p.TimeExponent), "primary strain", ""},
		part{Steady(Power{p.SteadyPrefactor, p.SteadyStressExponent}), "steady rate", ""})
	return PrimarySecondary{s}, err
}

// GrahamWalles is a sum of powers of stress and time, each with its own activation energy,
//
//	ε = Σ Aᵢ σ^nᵢ t^mᵢ exp(-Qᵢ/RT)
//
// Symbols: σ von Mises stress [stress]; t time [time]; T absolute temperature [K]; Aᵢ prefactors [stress^-nᵢ time^-mᵢ]; nᵢ
// stress exponents [-], > 0; mᵢ time exponents [-], > 0, in the original 1/3 for primary, 1 for secondary and 3 for
// tertiary creep; Qᵢ activation energies of the terms of strain [J/mol], ≥ 0; R = 8.314462618 J/(mol K).
//
// Zero at zero stress and at zero time, where the rate is +Inf if the smallest time exponent is below one; no bound at large
// time. With a time exponent above one the rate rises again: tertiary creep, on which the law made from it softens. A curve
// of time exponents all above one never starts to creep from zero strain; NewStrainHardened refuses it.
//
// Source: A. Graham, K. F. A. Walles, Relationships between long- and short-time creep and tensile properties of a
// commercial alloy, J. Iron Steel Inst. 179 (1955) 105–120 (from memory), with an Arrhenius factor in place of the original
// function of temperature.
type GrahamWalles struct{ sum }

var _ Logarithmic = GrahamWalles{}

// GrahamWallesTerm is one term of a Graham–Walles curve.
type GrahamWallesTerm struct {
	Prefactor        float64 // Aᵢ [stress⁻ⁿ time⁻ᵐ], > 0
	StressExponent   float64 // nᵢ [-], > 0
	TimeExponent     float64 // mᵢ [-], > 0
	ActivationEnergy float64 // Qᵢ [J/mol], ≥ 0; zero leaves the term independent of temperature
	// ReferenceTemperature T₀ [K] makes the factor exp[-(Q/R)(1/T - 1/T₀)], so that the prefactor is the one at T₀. Zero is
	// none: the factor is exp(-Q/RT).
	ReferenceTemperature float64
}

// NewGrahamWalles builds the curve from one term or more. None is a *creeplaw.MissingError, a parameter out of bounds a
// *creeplaw.ParameterError.
func NewGrahamWalles(terms ...GrahamWallesTerm) (GrahamWalles, error) {
	const curve = "Graham–Walles"
	parts := make([]part, len(terms))
	for i, t := range terms {
		amplitude, err := withActivation(Power{t.Prefactor, t.StressExponent}, t.ActivationEnergy, t.ReferenceTemperature)
		if err != nil {
			return GrahamWalles{}, within(curve, "term", err)
		}
		parts[i] = part{PowerOfTime(amplitude, t.TimeExponent), "term", ""}
	}
	s, err := newSum(curve, parts...)
	return GrahamWalles{s}, err
}

func withActivation(c Coefficient, activationEnergy, referenceTemperature float64) (Coefficient, error) {
	if activationEnergy == 0 && referenceTemperature == 0 {
		return c, nil
	}
	if referenceTemperature == 0 {
		f, err := creeplaw.NewArrhenius(activationEnergy)
		return Activated{c, f}, err
	}
	f, err := creeplaw.NewArrheniusAt(activationEnergy, referenceTemperature)
	return Activated{c, f}, err
}

// Andrade is the cube root of time beside steady creep
//
//	ε = β(σ, T) t^(1/3) + κ(σ, T) t
//
// Symbols: σ von Mises stress [stress]; T absolute temperature [K]; t time [time]; β [time^(-1/3)] and κ [1/time] functions of
// stress and temperature.
//
// Zero at zero time, with a rate of +Inf; at large time the rate falls to κ. At zero stress it is zero if both functions are:
// one that is an exponential of stress makes it creep under no stress.
//
// Source: E. N. da C. Andrade, Proc. R. Soc. Lond. A 84 (1910) 1–12, in the form for small strains.
type Andrade struct{ sum }

var _ Logarithmic = Andrade{}

// NewAndrade builds the curve from β [time^(-1/3)] and κ [1/time]. A missing one is a *creeplaw.MissingError, a parameter of
// them out of bounds a *creeplaw.ParameterError.
func NewAndrade(cubeRoot, steadyRate Coefficient) (Andrade, error) {
	s, err := newSum("Andrade", part{PowerOfTime(cubeRoot, 1.0/3), "cube-root coefficient", ""},
		part{Steady(steadyRate), "steady rate", ""})
	return Andrade{s}, err
}
