package bench

import "math"

// Norton is the power law ṗ = Rate · (σ/Stress)^Exponent of steady creep, stated by one point of its line. With Stress 1 the
// Rate is the usual prefactor A of ṗ = A σⁿ. Where A would leave the range of a float64, as in Pa and s with a large
// exponent, a Stress of the size at hand keeps everything representable.
//
// Source: F. H. Norton, The Creep of Steel at High Temperatures, McGraw-Hill 1929.
type Norton struct {
	Rate     float64 // ṗ₁: creep rate under the stress below [1/time], > 0
	Stress   float64 // σ₁ [stress], > 0
	Exponent float64 // n [-], > 0
}

// RateAt returns the creep rate [1/time] under a von Mises stress σ ≥ 0 [stress].
func (l Norton) RateAt(stress float64) float64 { return math.Exp(l.logRate(stress)) }

func (l Norton) logRate(stress float64) float64 { return math.Log(l.Rate) + l.logRatio(stress) }

// logRatio is ln(ṗ/Rate).
func (l Norton) logRatio(stress float64) float64 { return l.Exponent * math.Log(stress/l.Stress) }

func (l Norton) check(c *checker) { l.checkAs(c, "Law") }

func (l Norton) checkAs(c *checker, field string) {
	c.positive(field+".Rate", l.Rate)
	c.positive(field+".Stress", l.Stress)
	c.positive(field+".Exponent", l.Exponent)
}

// Garofalo is the hyperbolic-sine law ṗ = Prefactor · sinh^Exponent(Coefficient·σ) of steady creep.
//
// Source: F. Garofalo, Trans. AIME 227 (1963) 351–356.
type Garofalo struct {
	Prefactor   float64 // A [1/time], > 0
	Coefficient float64 // B [1/stress], > 0
	Exponent    float64 // n [-], > 0
}

// RateAt returns the creep rate [1/time] under a von Mises stress σ ≥ 0 [stress].
func (l Garofalo) RateAt(stress float64) float64 {
	x := l.Coefficient * stress
	logSinh := x + math.Log(-math.Expm1(-2*x)/2) // sinh itself overflows at 710
	return math.Exp(math.Log(l.Prefactor) + l.Exponent*logSinh)
}

func (l Garofalo) check(c *checker) {
	c.positive("Law.Prefactor", l.Prefactor)
	c.positive("Law.Coefficient", l.Coefficient)
	c.positive("Law.Exponent", l.Exponent)
}

// BaileyNorton is the primary creep curve at constant stress
//
//	ε = Strain · (σ/Stress)^StressExponent · (t/Time)^TimeExponent
//
// stated by one point of one curve. With Stress and Time 1 the Strain is the usual prefactor A of ε = A σⁿ tᵐ.
//
// Source: R. W. Bailey, Proc. Inst. Mech. Engrs 131 (1935) 131–349; F. H. Norton 1929.
type BaileyNorton struct {
	Strain         float64 // ε₁: creep strain under the stress below after the time below [-], > 0
	Stress         float64 // σ₁ [stress], > 0
	Time           float64 // t₁ [time], > 0
	StressExponent float64 // n [-], > 0
	TimeExponent   float64 // m [-], 0 < m ≤ 1
}

// StrainAt returns the creep strain [-] after a time t ≥ 0 under a constant stress σ > 0.
func (l BaileyNorton) StrainAt(stress, time float64) float64 {
	return math.Exp(l.logStrain(stress, time))
}

func (l BaileyNorton) logStrain(stress, time float64) float64 {
	return math.Log(l.Strain) + l.StressExponent*math.Log(stress/l.Stress) + l.TimeExponent*math.Log(time/l.Time)
}

// logTime is the logarithm of the time at which a strain is reached under constant stress.
func (l BaileyNorton) logTime(stress, strain float64) float64 {
	return math.Log(l.Time) + (math.Log(strain/l.Strain)-l.StressExponent*math.Log(stress/l.Stress))/l.TimeExponent
}

func (l BaileyNorton) check(c *checker, field string) {
	c.positive(field+".Strain", l.Strain)
	c.positive(field+".Stress", l.Stress)
	c.positive(field+".Time", l.Time)
	c.positive(field+".StressExponent", l.StressExponent)
	m := l.TimeExponent
	c.require(m > 0 && m <= 1, field+".TimeExponent", m, "above 0 and at most 1")
}

// StrainHardening is primary creep as a rate, ṗ = Rate · (σ/Stress)^StressExponent · (p/Strain)^StrainExponent, stated by
// one known rate. With Stress and Strain 1 the Rate is the prefactor A of ṗ = A σⁿ pᵏ.
//
// Source: I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959.
type StrainHardening struct {
	Rate           float64 // ṗ₁: creep rate at the stress and creep strain below [1/time], > 0
	Stress         float64 // σ₁ [stress], > 0
	Strain         float64 // p₁ [-], > 0
	StressExponent float64 // n [-], > 0
	StrainExponent float64 // k [-], ≤ 0
}

func (l StrainHardening) check(c *checker) {
	c.positive("Law.Rate", l.Rate)
	c.positive("Law.Stress", l.Stress)
	c.positive("Law.Strain", l.Strain)
	c.positive("Law.StressExponent", l.StressExponent)
	k := l.StrainExponent
	c.require(k <= 0 && !math.IsInf(k, -1), "Law.StrainExponent", k, "at most 0 and finite")
}
