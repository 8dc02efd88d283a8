package bench

import "math"

// StrainHardeningRelaxation is a bar held at fixed length whose primary creep ε = A σⁿ tᵐ continues, under falling stress,
// from the creep strain reached (strain hardening). With the creep strain ε = (σ₀-σ)/E
//
//	t = A^(-1/m) ∫₀^(ε^(1/m)) (σ₀ - E uᵐ)^(-n/m) du
//
// which is elementary for n = 5, m = 1/2: t = 2/(E A)² [σ₀(σ⁻⁹ - σ₀⁻⁹)/9 - (σ⁻⁸ - σ₀⁻⁸)/8]. In general it is an incomplete
// beta function; it is found by quadrature and inverted by iteration, both to rounding: a stress is good to 1e-12.
//
// Source: I. Finnie, W. R. Heller, Creep of Engineering Materials, 1959; J. T. Boyle, J. Spence 1983.
type StrainHardeningRelaxation struct {
	Young  float64 // E [stress], > 0
	Stress float64 // σ₀: stress at the start of the hold [stress], > 0
	Curve  BaileyNorton
}

// Check reports the first impossible parameter. The stress exponent must be at least the time exponent.
func (b StrainHardeningRelaxation) Check() error {
	c := checker{problem: "StrainHardeningRelaxation"}
	c.positive("Young", b.Young)
	c.positive("Stress", b.Stress)
	b.Curve.check(&c, "Curve")
	n := b.Curve.StressExponent
	c.require(n >= b.Curve.TimeExponent, "Curve.StressExponent", n, "at least the time exponent")
	return c.err
}

// beta has w = (σ₀-σ)/σ₀; its unit of time is that in which the unchanged stress would make the creep strain σ₀/E.
func (b StrainHardeningRelaxation) beta() (i incompleteBeta, logUnit float64) {
	m := b.Curve.TimeExponent
	return incompleteBeta{1 / m, b.Curve.StressExponent / m}, b.Curve.logTime(b.Stress, b.Stress/b.Young)
}

// StressAt returns σ [stress] after a hold of t [time].
func (b StrainHardeningRelaxation) StressAt(t float64) float64 {
	i, logUnit := b.beta()
	return b.Stress * math.Exp(-softplus(i.odds(math.Log(t)-logUnit)))
}

// CreepAt returns the axial creep strain (σ₀-σ)/E [-].
func (b StrainHardeningRelaxation) CreepAt(t float64) float64 {
	i, logUnit := b.beta()
	return b.Stress / b.Young * math.Exp(-softplus(-i.odds(math.Log(t)-logUnit)))
}

// TimeTo returns the time [time] at which the stress has fallen to σ; NaN for a stress below 0 or above the start, +Inf for
// zero.
func (b StrainHardeningRelaxation) TimeTo(stress float64) float64 {
	switch {
	case !(stress >= 0 && stress <= b.Stress):
		return math.NaN()
	case stress == b.Stress:
		return 0
	case stress == 0:
		return math.Inf(1)
	}
	i, logUnit := b.beta()
	v, _ := i.log(math.Log((b.Stress - stress) / stress))
	return math.Exp(v + logUnit)
}

// TimeHardeningRelaxation is the same bar when its primary creep goes by the clock instead (time hardening), which relaxes
// faster:
//
//	σ^(1-n) = σ₀^(1-n) + (n-1) E A tᵐ
//
// It is here for contrast and for legacy analyses: a rate that depends on the clock depends on when the clock was started.
//
// Source: as StrainHardeningRelaxation.
type TimeHardeningRelaxation struct {
	Young  float64 // E [stress], > 0
	Stress float64 // σ₀: stress at the start of the hold [stress], > 0
	Curve  BaileyNorton
}

// Check reports the first impossible parameter.
func (b TimeHardeningRelaxation) Check() error {
	c := checker{problem: "TimeHardeningRelaxation"}
	c.positive("Young", b.Young)
	c.positive("Stress", b.Stress)
	b.Curve.check(&c, "Curve")
	return c.err
}

func (b TimeHardeningRelaxation) logKept(t float64) float64 {
	creep := b.Curve.logStrain(b.Stress, t) // that the unchanged stress would make
	return logKept(b.Curve.StressExponent, math.Log(b.Young/b.Stress)+creep)
}

// StressAt returns σ [stress] after a hold of t [time].
func (b TimeHardeningRelaxation) StressAt(t float64) float64 {
	return b.Stress * math.Exp(b.logKept(t))
}

// CreepAt returns the axial creep strain (σ₀-σ)/E [-].
func (b TimeHardeningRelaxation) CreepAt(t float64) float64 {
	return -b.Stress / b.Young * math.Expm1(b.logKept(t))
}

// ConstantRateTension is a bar drawn at a constant total strain rate ε̇ from zero stress, creeping by Norton's law: the
// stress rises towards σ_s = (ε̇/A)^(1/n), where all the rate is creep.
//
//	n = 1: σ = (ε̇/A) (1 - exp(-E A t))
//	n = 2: σ = σ_s tanh(E t √(A ε̇))
//	any n: t = σ_s/(E ε̇) ∫₀^(σ/σ_s) dx/(1-xⁿ)
//
// The general case is found by quadrature and iteration to rounding: a stress is good to 1e-12.
//
// Source: J. T. Boyle, J. Spence 1983 (from memory); the three lines follow from σ̇ = E(ε̇ - A σⁿ) by separation.
type ConstantRateTension struct {
	Young      float64 // E [stress], > 0
	StrainRate float64 // ε̇: total strain rate [1/time], > 0
	Law        Norton
}

// Check reports the first impossible parameter.
func (b ConstantRateTension) Check() error {
	c := checker{problem: "ConstantRateTension"}
	c.positive("Young", b.Young)
	c.positive("StrainRate", b.StrainRate)
	b.Law.check(&c)
	return c.err
}

// Saturation returns σ_s = (ε̇/A)^(1/n) [stress].
func (b ConstantRateTension) Saturation() float64 {
	return b.Law.Stress * math.Exp(math.Log(b.StrainRate/b.Law.Rate)/b.Law.Exponent)
}

// StressAt returns σ [stress] after a time t [time].
func (b ConstantRateTension) StressAt(t float64) float64 {
	if !(t >= 0) {
		return math.NaN()
	}
	n, limit := b.Law.Exponent, b.Saturation()
	elastic := b.Young * b.StrainRate * t / limit // the stress without creep, over the limit
	switch n {
	case 1:
		return -limit * math.Expm1(-elastic)
	case 2:
		return limit * math.Tanh(elastic)
	}
	// With v = xⁿ the integral is (1/n) ∫ v^(1/n-1)/(1-v) dv.
	z := incompleteBeta{1 / n, 1}.odds(math.Log(elastic))
	return limit * math.Exp(-softplus(-z)/n)
}

// TimeTo returns the time [time] at which the stress σ is reached; NaN for a stress below 0 or above the saturation, +Inf at
// the saturation.
func (b ConstantRateTension) TimeTo(stress float64) float64 {
	limit := b.Saturation()
	switch {
	case !(stress >= 0 && stress <= limit):
		return math.NaN()
	case stress == 0:
		return 0
	case stress == limit:
		return math.Inf(1)
	}
	n := b.Law.Exponent
	logV := n * math.Log(stress/limit)
	v, _ := incompleteBeta{1 / n, 1}.log(logV - math.Log(-math.Expm1(logV)))
	return limit / (b.Young * b.StrainRate) * math.Exp(v)
}
