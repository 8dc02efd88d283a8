package curve

import (
	"math"
)

// Findley is the power of time with hyperbolic sines of stress that describes polymers,
//
//	ε = m′ sinh(σ/σₘ) tⁿ,  0 < n ≤ 1,   beside the instantaneous strain ε₀′ sinh(σ/σₑ)
//
// Symbols: σ von Mises stress [stress]; t time [time]; m′ [time⁻ⁿ] and σₘ [stress] of the creep strain; n time exponent [-];
// ε₀′ [-] and σₑ [stress] of the instantaneous strain.
//
// The curve is the creep strain, the part that grows with time. The instantaneous strain belongs to the elasticity of the
// host's model; Instantaneous gives it, so that published totals can be met. Zero at zero stress, linear in stress below
// σₘ; the rate at zero time is +Inf for n < 1; no bound at large time. Polymers recover after unloading, which strain
// hardening does not show: Findley himself preferred superposition there.
//
// Source: W. N. Findley, J. S. Lai, K. Onaran, Creep and Relaxation of Nonlinear Viscoelastic Materials, North-Holland 1976.
type Findley struct {
	sum
	instantaneous prepared // nil for none
	given         *FindleyParameters
}

var _ Logarithmic = Findley{}

// FindleyParameters are the parameters of a Findley curve. The first three are positive and finite, TimeExponent ≤ 1; the
// last two likewise, or both zero for none.
type FindleyParameters struct {
	Creep        float64 // m′ [time⁻ⁿ]
	CreepStress  float64 // σₘ [stress]
	TimeExponent float64 // n [-]

	Instantaneous       float64 // ε₀′ [-]
	InstantaneousStress float64 // σₑ [stress]
}

// NewFindley builds the curve. A fault is a *creeplaw.ParameterError.
func NewFindley(p FindleyParameters) (Findley, error) {
	const curve = "Findley"
	if err := atMostOne(curve, p.TimeExponent); err != nil {
		return Findley{}, err
	}
	if err := positive("stress", p.CreepStress); err != nil {
		return Findley{}, within(curve, "creep", err)
	}
	s, err := newSum(curve, part{PowerOfTime(Sinh{p.Creep, 1 / p.CreepStress, 1}, p.TimeExponent), "creep", ""})
	if err != nil {
		return Findley{}, err
	}
	f := Findley{sum: s, given: &p}
	if p.Instantaneous != 0 || p.InstantaneousStress != 0 {
		const name = "instantaneous strain"
		if err := positive("stress", p.InstantaneousStress); err != nil {
			return Findley{}, within(curve, name, err)
		}
		f.instantaneous, err = prepare(curve, name, Sinh{p.Instantaneous, 1 / p.InstantaneousStress, 1})
		if err != nil {
			return Findley{}, err
		}
	}
	return f, nil
}

// Instantaneous is the strain on loading, ε₀′ sinh(σ/σₑ) [-].
func (f Findley) Instantaneous(stress float64) float64 {
	switch {
	case !(stress >= 0):
		return math.NaN()
	case f.instantaneous == nil:
		return 0
	}
	return math.Exp(f.instantaneous.at(conditionAt(stress, 0)).Value)
}
