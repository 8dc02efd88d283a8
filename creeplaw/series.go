package creeplaw

import "math"

// Series is several mechanisms acting in sequence, where each must do its part before the next can: their times add, so the
// reciprocals of their rates do,
//
//	1/ṗ = Σ 1/ṗᵢ(σ, p, T)
//
// and the slowest rules. (Mechanisms acting side by side are a Sum, where the fastest rules.) All see the same creep strain
// p, the total. Where one part gives no creep there is none; a part that is infinitely fast drops out. At zero stress the
// slope is that of the parts in sequence, 1/Σ(1/slope). At zero strain, beside a part that starts infinitely fast, the
// derivative by strain is its limit too: zero, finite or -Inf as that part's strain exponent is below, at or above -1. The
// logarithm is formed without leaving the logarithm, so one part may overflow where another still counts.
//
// Source: H. J. Frost, M. F. Ashby, Deformation-Mechanism Maps, Pergamon 1982, chapter 2 (from memory).
type Series struct{ laws []Logarithmic }

var (
	_ Logarithmic = Series{}
	_ Explainer   = Series{}
)

// NewSeries builds a sequence from one law or more; none, or a nil one, is a *MissingError, one with internal variables
// a *CompositionError.
func NewSeries(laws ...Law) (Series, error) {
	if len(laws) == 0 {
		return Series{}, &MissingError{"series of laws", "law"}
	}
	if err := withoutVariables("series of laws", laws...); err != nil {
		return Series{}, err
	}
	s := Series{make([]Logarithmic, len(laws))}
	for i, law := range laws {
		if law == nil {
			return Series{}, &MissingError{"series of laws", "law"}
		}
		s.laws[i] = Log(law)
	}
	return s, nil
}

// LogRate returns -ln Σ exp(-Lᵢ) and the exponents of the parts averaged with their shares of the time.
func (s Series) LogRate(p Point) LogRate {
	slowest := LogRate{Value: math.Inf(1)}
	var sum LogRate // weighted sums of the exponents
	total := 0.0
	for _, law := range s.laws {
		l := law.LogRate(p)
		if math.IsNaN(l.Value) {
			return undefinedLog()
		}
		weight := 1.0
		switch {
		case l.Value < slowest.Value: // rescale what has been added so far to the new slowest part
			shrink := math.Exp(l.Value - slowest.Value)
			total *= shrink
			sum.ByLogStress *= shrink
			sum.ByLogStrain *= shrink
			sum.ByLogTemperature *= shrink
			slowest = l
		case math.IsInf(l.Value, 0): // another part without creep, or one that takes no time
			if l.Value < 0 {
				slowest.ByLogStress = math.Max(slowest.ByLogStress, l.ByLogStress)
			}
			continue
		case l.Value > slowest.Value:
			weight = math.Exp(slowest.Value - l.Value)
		}
		total += weight
		sum.ByLogStress += weight * l.ByLogStress
		sum.ByLogStrain += weight * l.ByLogStrain
		sum.ByLogTemperature += weight * l.ByLogTemperature
	}
	if math.IsInf(slowest.Value, 0) {
		return slowest
	}
	return LogRate{slowest.Value - math.Log(total), sum.ByLogStress / total, sum.ByLogStrain / total,
		sum.ByLogTemperature / total}
}

// Rate returns ṗ and its derivatives, Σ (ṗ/ṗᵢ)² of those of the parts.
func (s Series) Rate(p Point) Rate {
	l := s.LogRate(p)
	switch {
	case math.IsNaN(l.Value):
		return undefined()
	case p.Stress > 0 && p.Strain > 0:
		return rateOf(p, l)
	case math.IsInf(l.Value, 1):
		return s.laws[0].Rate(p)
	case math.IsInf(l.Value, -1) && p.Stress > 0:
		return Rate{}
	case math.IsInf(l.Value, -1):
		return Rate{ByStress: s.slopeAtZeroStress(p, l.Value)}
	}
	r := rateOf(p, l)
	if p.Stress == 0 {
		r.ByStress = s.slopeAtZeroStress(p, l.Value)
	}
	if p.Strain == 0 {
		r.ByStrain = s.slopeAtZeroStrain(p, l.Value)
	}
	return r
}

// slopeAtZeroStress is 1/Σ(1/slope) over the parts that vanish there, beside which the others take no time; where none
// vanishes it is Σ (ṗ/ṗᵢ)² slope.
func (s Series) slopeAtZeroStress(p Point, logRate float64) float64 {
	inverse, sum := 0.0, 0.0
	for _, law := range s.laws {
		r := law.Rate(p)
		if r.Value == 0 {
			inverse += 1 / r.ByStress
		}
		share := math.Exp(logRate) / r.Value
		sum += scale(r.ByStress, share*share)
	}
	if math.IsInf(logRate, -1) {
		return 1 / inverse
	}
	return sum
}

// slopeAtZeroStrain is Σ (ṗ/ṗᵢ)² ∂ṗᵢ/∂p, with the limit for the parts that are infinitely fast at zero strain.
func (s Series) slopeAtZeroStrain(p Point, logRate float64) float64 {
	sum := 0.0
	for _, law := range s.laws {
		part := law.LogRate(p)
		if math.IsInf(part.Value, 1) {
			sum += hardeningAtZeroStrain(law, p, logRate, part.ByLogStrain)
			continue
		}
		if slope := law.Rate(p).ByStrain; slope != 0 {
			sum += slope * math.Exp(2*(logRate-part.Value))
		}
	}
	return sum
}

// CheckPoint hands on the first reason a part gives.
func (s Series) CheckPoint(p Point) error { return reasonOfParts("series of laws", s, p, s.laws) }

// hardeningAtZeroStrain is the limit of (ṗ/ṗᵢ)² ∂ṗᵢ/∂p at p → 0 for a part ṗᵢ ~ C pᵏ, k < 0: k (ṗ²/C) p^(-k-1).
func hardeningAtZeroStrain(law Logarithmic, p Point, logRate, k float64) float64 {
	switch {
	case k > -1:
		return math.Inf(-1)
	case k < -1:
		return 0
	}
	p.Strain = 0x1p-1000 // near enough to zero for any law that starts as 1/p
	near := law.LogRate(p).Value + math.Log(p.Strain)
	return -math.Exp(2*logRate - near)
}
