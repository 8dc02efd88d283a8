package creeplaw

import "math"

// power is the product rate·(σ/stress)^n·(p/strain)^k that Norton's law and strain hardening share, kept as logarithms about
// a reference point where the rate is of moderate size: that keeps the full precision of the logarithm in any set of units.
type power struct {
	logRate          float64 // ln of the rate at the reference point
	stress, strain   float64 // the reference point
	stressExp        float64 // n > 0
	strainExp        float64 // k
	linearPrefactor  float64 // the rate per unit stress at the reference strain, for n = 1 at zero stress
	dependsOnHistory bool    // k != 0
}

func newPower(rate, stress, strain, n, k float64) power {
	w := power{logRate: math.Log(rate), stress: stress, strain: strain, stressExp: n, strainExp: k, dependsOnHistory: k != 0}
	w.linearPrefactor = rate / stress
	return w
}

// newPrefactor is newPower for rate = a·σⁿ. The reference stress becomes the power of two at which the rate is nearest one,
// so that ln(rate) is small and n·ln(σ/stress) carries no large cancelling part.
func newPrefactor(a, n float64) power {
	fraction, exponent := math.Frexp(a)
	e := float64(exponent)
	const far = 500 // keeps σ/2^±shift representable, with all its digits, for stresses from 1e-150 to 1e150
	shift := math.Max(-far, math.Min(far, math.Round(-(e+math.Log2(fraction))/n)))
	w := newPower(1, math.Ldexp(1, int(shift)), 1, n, 0)
	w.logRate = math.Log(fraction) + math.FMA(shift, n, e)*math.Ln2
	w.linearPrefactor = a
	return w
}

func (w power) LogRate(p Point) LogRate {
	l := LogRate{Value: w.logRate + w.stressExp*math.Log(p.Stress/w.stress), ByLogStress: w.stressExp}
	if w.dependsOnHistory {
		l.Value += w.strainExp * math.Log(p.Strain/w.strain)
		l.ByLogStrain = w.strainExp
		if p.Stress == 0 {
			l.Value = math.Inf(-1) // no stress, no creep: also where hardening starts from zero strain
		}
	}
	if !(p.Stress >= 0 && p.Strain >= 0) {
		return undefinedLog()
	}
	return l
}

func (w power) Rate(p Point) Rate {
	switch {
	case !(p.Stress >= 0 && p.Strain >= 0):
		return undefined()
	case p.Stress == 0:
		return Rate{ByStress: w.slopeAtZeroStress(p.Strain)}
	case p.Strain == 0 && w.dependsOnHistory:
		inf := math.Inf(1)
		return Rate{Value: inf, ByStress: inf, ByStrain: math.Inf(-1)}
	}
	return rateOf(p, w.LogRate(p))
}

// slopeAtZeroStress is ∂ṗ/∂σ at σ = 0, which is neither zero nor infinite for n = 1 only.
func (w power) slopeAtZeroStress(strain float64) float64 {
	switch {
	case w.stressExp > 1:
		return 0
	case w.stressExp < 1:
		return math.Inf(1)
	case !w.dependsOnHistory:
		return w.linearPrefactor
	}
	return w.linearPrefactor * math.Pow(strain/w.strain, w.strainExp)
}
