package creeplaw

import "math"

// TwoArrhenius is the temperature factor of a rate whose activation energy changes at one temperature
//
//	f(T) = f₁ exp(-Q₁/RT)   for T ≤ T₁₂,    f(T) = f₂ exp(-Q₂/RT)   above
//
// Symbols: T absolute temperature [K]; Q₁, Q₂ activation energies [J/mol], ≥ 0; f₁, f₂ prefactors of the two branches; T₁₂
// the transition temperature [K]; R = 8.314462618 J/(mol K). As glacier ice is described on either side of -10 °C.
//
// d ln f/d ln T = Q/(RT) of the branch; at the transition that of the colder. Published branches may miss each other there
// by their rounding, and f then jumps; NewTwoArrheniusAt makes them meet. T ≤ 0 or NaN gives NaN.
//
// Source: W. S. B. Paterson, W. F. Budd, Cold Reg. Sci. Technol. 6 (1982) 175–177 (from memory).
type TwoArrhenius struct {
	transition   float64
	below, above arrheniusBranch
	given[TemperatureFactor]
}

// arrheniusBranch is f exp(-q/T), with ln f relative to the transition, where the factor is of moderate size.
type arrheniusBranch struct{ logAtTransition, activation float64 }

var _ TemperatureFactor = TwoArrhenius{}

// ArrheniusBranch is one branch of a TwoArrhenius factor, f exp(-Q/RT).
type ArrheniusBranch struct {
	Prefactor        float64 // f, > 0
	ActivationEnergy float64 // Q [J/mol], >= 0
}

const twoArrheniusName = "Arrhenius with two branches"

// NewTwoArrhenius builds the factor from its two branches and the transition temperature T₁₂ [K]: prefactors and transition
// positive and finite, activation energies at least 0 and finite.
func NewTwoArrhenius(below, above ArrheniusBranch, transition float64) (TwoArrhenius, error) {
	t, err := NewTwoArrheniusAt(below.ActivationEnergy, above.ActivationEnergy, transition)
	if err == nil {
		err = positive(twoArrheniusName, parameter{"prefactor below", below.Prefactor}, parameter{"prefactor above", above.Prefactor})
	}
	if err != nil {
		return TwoArrhenius{}, err
	}
	t.below.logAtTransition = math.Log(below.Prefactor) - t.below.activation/transition
	t.above.logAtTransition = math.Log(above.Prefactor) - t.above.activation/transition
	t.given = remember(twoArrheniusForm, below.ActivationEnergy, above.ActivationEnergy, transition, below.Prefactor, above.Prefactor)
	return t, nil
}

// NewTwoArrheniusAt builds the factor that is one at the transition temperature [K] and continuous there, from the
// activation energies [J/mol] below and above it.
func NewTwoArrheniusAt(activationBelow, activationAbove, transition float64) (TwoArrhenius, error) {
	for _, q := range []parameter{{"activation energy below", activationBelow}, {"activation energy above", activationAbove}} {
		if !(q.value >= 0) || math.IsInf(q.value, 1) {
			return TwoArrhenius{}, &ParameterError{twoArrheniusName, q.name, q.value, "at least 0 and finite"}
		}
	}
	if err := positive(twoArrheniusName, parameter{"transition temperature", transition}); err != nil {
		return TwoArrhenius{}, err
	}
	return TwoArrhenius{transition, arrheniusBranch{0, activationBelow / GasConstant},
		arrheniusBranch{0, activationAbove / GasConstant},
		remember(twoArrheniusAtForm, activationBelow, activationAbove, transition)}, nil
}

// LogFactor returns ln f and Q/(RT) of the branch in use.
func (t TwoArrhenius) LogFactor(temperature float64) (value, byLogTemperature float64) {
	if !(temperature > 0) {
		return math.NaN(), math.NaN()
	}
	b := t.below
	if temperature > t.transition {
		b = t.above
	}
	return b.logAtTransition - b.activation*(1/temperature-1/t.transition), b.activation / temperature
}
