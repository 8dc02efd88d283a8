package bench

import "math"

// powerDecay is the stress of every problem that reduces to dσ/dt = -modulus·ṗ(σ), σ(0) = start, with a power law.
type powerDecay struct {
	modulus, start float64
	law            Norton
}

// logKept is ln(σ/start) at time t:
//
//	(σ/σ₀)^(1-n) = 1 + (n-1) D,   D = modulus·ṗ(σ₀) t/σ₀,
//
// and its limit exp(-D) for n = 1. With n < 1 the stress reaches zero in finite time and stays there.
func (d powerDecay) logKept(t float64) float64 {
	return logKept(d.law.Exponent, logProduct(d.modulus/d.start, d.law.Rate, t)+d.law.logRatio(d.start))
}

func logKept(n, logD float64) float64 {
	switch {
	case n == 1:
		return -math.Exp(logD)
	case n > 1:
		return -softplus(math.Log(n-1)+logD) / (n - 1)
	}
	spent := math.Exp(math.Log(1-n) + logD)
	if spent >= 1 {
		return math.Inf(-1)
	}
	return math.Log1p(-spent) / (1 - n)
}

func (d powerDecay) stress(t float64) float64 { return d.start * math.Exp(d.logKept(t)) }

// lost is (σ₀-σ)/σ₀, without cancellation at early times.
func (d powerDecay) lost(t float64) float64 { return -math.Expm1(d.logKept(t)) }

// timeTo inverts stress: the time at which it has fallen to a value between 0 and the start.
func (d powerDecay) timeTo(stress float64) float64 {
	if !(stress >= 0 && stress <= d.start) {
		return math.NaN()
	}
	n, fall := d.law.Exponent, math.Log(d.start/stress)
	logUnit := logProduct(d.start/d.modulus, 1/d.law.Rate) - d.law.logRatio(d.start) // ln of σ₀/(modulus·ṗ(σ₀))
	switch y := (n - 1) * fall; {
	case fall == 0:
		return 0
	case n == 1:
		return fall * math.Exp(logUnit)
	case y > 1: // e^y alone may overflow where the product does not
		return math.Exp(logUnit+y) * (-math.Expm1(-y) / (n - 1))
	default:
		return math.Exp(logUnit) * (math.Expm1(y) / (n - 1))
	}
}

// logProduct is the logarithm of a product of positive numbers that may itself leave the range of a float64. Powers of two
// cancel exactly, where large logarithms of opposite sign would leave their rounding.
func logProduct(factors ...float64) float64 {
	fraction, exponent := 1.0, 0
	for _, x := range factors {
		f, e := math.Frexp(x)
		fraction, exponent = fraction*f, exponent+e
	}
	return math.Log(fraction) + float64(exponent)*math.Ln2
}

// softplus is ln(1 + eˣ).
func softplus(x float64) float64 {
	if x > 0 {
		return x + math.Log1p(math.Exp(-x))
	}
	return math.Log1p(math.Exp(x))
}
