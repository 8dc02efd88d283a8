package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// Sum is a curve of any number of terms,
//
//	ε(σ, T, t) = Σ cᵢ(σ, T) hᵢ(rᵢ(σ, T) t)
//
// Most published creep equations are one, and the named curves of this package are built of the same terms; an equation that
// is not among them takes one call of NewSum. StrainHardened knows the terms: it evaluates their coefficients once per call,
// not once per iteration. Four terms or fewer are the fastest; a law takes at most 64.
//
// Negative or NaN stress or time gives NaN.
type Sum struct{ sum }

var _ Logarithmic = Sum{}

// NewSum builds a curve from one term or more. None, an empty one or one without a coefficient is a *creeplaw.MissingError,
// a parameter out of bounds a *creeplaw.ParameterError that names term and parameter.
func NewSum(terms ...Term) (Sum, error) {
	parts := make([]part, len(terms))
	for i, t := range terms {
		parts[i] = part{t, "amplitude of a term", "rate constant of a term"}
	}
	s, err := newSum("sum of terms", parts...)
	return Sum{s}, err
}

type sum struct{ terms []Term }

func newSum(curve string, parts ...part) (sum, error) {
	if len(parts) == 0 {
		return sum{}, &creeplaw.MissingError{Law: curve, Part: "term"}
	}
	s := sum{make([]Term, len(parts))}
	for i, p := range parts {
		var err error
		if s.terms[i], err = p.prepare(curve); err != nil {
			return sum{}, err
		}
	}
	return s, nil
}

// LogAt returns the logarithms of Σ εᵢ and Σ ∂εᵢ/∂t, each with the exponents of the terms averaged with their shares.
func (s sum) LogAt(q LogPoint) LogStrain {
	if !(q.Stress >= 0) || math.IsNaN(q.LogTime) || len(s.terms) == 0 {
		return undefinedLog()
	}
	at := conditionAt(q.Stress, q.Temperature)
	strain, rate := nothing(), nothing()
	for i := range s.terms {
		t := &s.terms[i]
		c := t.coefficients(at)
		e, r, k := t.logAt(&c, q.LogTime)
		m := math.Exp(r - e) // local time exponent of the term
		strain.add(Exponents{e, m, c.amplitude.ByLogStress + m*c.rate.ByLogStress,
			c.amplitude.ByLogTemperature + m*c.rate.ByLogTemperature})
		rate.add(Exponents{r - q.LogTime, k, c.amplitude.ByLogStress + (1+k)*c.rate.ByLogStress,
			c.amplitude.ByLogTemperature + (1+k)*c.rate.ByLogTemperature})
	}
	return LogStrain{strain.total(), rate.total()}
}

// logSum adds quantities given as logarithms: weighted sums of the exponents beside the largest logarithm.
type logSum struct {
	Exponents
	weight float64
}

func nothing() logSum { return logSum{Exponents: Exponents{Value: math.Inf(-1)}} }

func (s *logSum) add(e Exponents) {
	weight := 1.0
	switch {
	case math.IsInf(e.Value, -1):
		return
	case e.Value > s.Value:
		s.scale(math.Exp(s.Value - e.Value))
		s.Value = e.Value
	case e.Value < s.Value:
		if weight = math.Exp(e.Value - s.Value); weight == 0 {
			return // its exponents may be infinite
		}
	case e.Value != s.Value: // NaN
		s.Value = math.NaN()
	}
	s.weight += weight
	s.ByLogTime += weight * e.ByLogTime
	s.ByLogStress += weight * e.ByLogStress
	s.ByLogTemperature += weight * e.ByLogTemperature
}

func (s *logSum) scale(f float64) {
	if f == 0 {
		*s = nothing()
		return
	}
	s.weight *= f
	s.ByLogTime *= f
	s.ByLogStress *= f
	s.ByLogTemperature *= f
}

func (s *logSum) total() Exponents {
	if s.weight == 0 {
		return s.Exponents
	}
	s.Value += math.Log(s.weight)
	s.scale(1 / s.weight)
	return s.Exponents
}

// At returns strain, rate and their derivatives. At zero stress and at zero time they are the limits from above.
func (s sum) At(p Point) Strain {
	switch {
	case !(p.Stress >= 0 && p.Time >= 0):
		return undefined()
	case p.Time == 0:
		return s.atStart(p)
	}
	q := LogPoint{p.Stress, p.Temperature, math.Log(p.Time)}
	l := s.LogAt(q)
	if p.Stress == 0 {
		q.Stress = faint
		return unloaded(p, l, s.LogAt(q))
	}
	return plain(p, l)
}

// parts are the terms, for the law that freezes them.
func (s sum) parts() []Term { return s.terms }

func leastTimeExponent(terms []Term) float64 {
	least := math.Inf(1)
	for _, t := range terms {
		if t.shape == powerOfTime {
			least = min(least, t.exponent)
		} else {
			least = min(least, 1)
		}
	}
	return least
}
