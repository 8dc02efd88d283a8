package creeplaw

import "math"

// Sum is several laws acting together: their rates add,
//
//	ṗ = Σ ṗᵢ(σ, p, T)
//
// Mechanisms in parallel, or a primary and a secondary part of one law, combine this way. All see the same creep strain p,
// the total. At zero stress and zero strain the sum has the limits of its parts; its logarithm is formed without leaving
// the logarithm, so one part may overflow where another still counts.
type Sum struct{ laws []Logarithmic }

var _ Logarithmic = Sum{}

// NewSum builds a sum from one law or more; none, or a nil one, is a *MissingError, one with internal variables a
// *CompositionError.
func NewSum(laws ...Law) (Sum, error) {
	if len(laws) == 0 {
		return Sum{}, &MissingError{"sum of laws", "law"}
	}
	if err := withoutVariables("sum of laws", laws...); err != nil {
		return Sum{}, err
	}
	s := Sum{make([]Logarithmic, len(laws))}
	for i, law := range laws {
		if law == nil {
			return Sum{}, &MissingError{"sum of laws", "law"}
		}
		s.laws[i] = Log(law)
	}
	return s, nil
}

// LogRate returns ln Σ exp(Lᵢ) and the exponents of the parts averaged with their shares of the rate.
func (s Sum) LogRate(p Point) LogRate {
	var sum LogRate // weighted sums of the exponents; Value holds the largest logarithm
	total := 0.0
	sum.Value = math.Inf(-1)
	for _, law := range s.laws {
		l := law.LogRate(p)
		if math.IsNaN(l.Value) {
			return undefinedLog()
		}
		weight := 1.0
		if l.Value > sum.Value { // rescale what has been added so far to the new largest term
			shrink := math.Exp(sum.Value - l.Value)
			total *= shrink
			sum.ByLogStress *= shrink
			sum.ByLogStrain *= shrink
			sum.ByLogTemperature *= shrink
			sum.Value = l.Value
		} else if l.Value < sum.Value {
			weight = math.Exp(l.Value - sum.Value)
		}
		total += weight
		sum.ByLogStress += weight * l.ByLogStress
		sum.ByLogStrain += weight * l.ByLogStrain
		sum.ByLogTemperature += weight * l.ByLogTemperature
	}
	sum.ByLogStress /= total
	sum.ByLogStrain /= total
	sum.ByLogTemperature /= total
	sum.Value += math.Log(total)
	return sum
}

// Rate adds the rates and their derivatives.
func (s Sum) Rate(p Point) Rate {
	var sum Rate
	for _, law := range s.laws {
		r := law.Rate(p)
		sum.Value += r.Value
		sum.ByStress += r.ByStress
		sum.ByStrain += r.ByStrain
		sum.ByTemperature += r.ByTemperature
	}
	return sum
}
