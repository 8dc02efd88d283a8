package bench

import "math"

// incompleteBeta is the integral to which primary creep and constant-rate tension lead,
//
//	I(w) = a ∫₀ʷ v^(a-1) (1-v)^(-b) dv,   a > 0, b ≥ 1, 0 ≤ w < 1,
//
// an incomplete beta function whose second parameter 1-b is not positive. It is kept as ln I over z = ln[w/(1-w)]: that
// curve is smooth and rising, with slope a for z → -∞ and b-1 (at least 0) for z → +∞.
type incompleteBeta struct{ a, b float64 }

// log returns ln I and its slope by z. With X = w/(1-w) and v = w e⁻ˢ
//
//	I = a Xᵃ (1-w)^(a-b) K,   K = ∫₀^∞ e^(-as) [1 + X(1-e⁻ˢ)]^(-b) ds,   d ln I/dz = (1-w)/K.
func (i incompleteBeta) log(z float64) (value, slope float64) {
	k := i.kernel(math.Exp(z))
	rest := math.Exp(-softplus(z)) // 1-w
	return math.Log(i.a) + i.a*z + (i.b-i.a)*softplus(z) + math.Log(k), rest / k
}

// kernel is K by the trapezoidal rule in ln s. The integrand is analytic for |Im ln s| < π/2, so the error of spacing h is
// about exp(-π²/h), 7e-18 here; the ends are cut where the integrand has fallen as far.
func (i incompleteBeta) kernel(x float64) float64 {
	const (
		spacing = 0.25
		reach   = 42 // e⁻⁴² = 6e-19
	)
	sum := 0.0
	first := math.Floor((-math.Log(i.a+i.b*x) - reach) / spacing)
	last := math.Ceil(math.Log(reach/i.a) / spacing)
	for j := first; j <= last; j++ {
		s := math.Exp(j * spacing)
		sum += s * math.Exp(-i.a*s-i.b*math.Log1p(-x*math.Expm1(-s)))
	}
	return sum * spacing
}

// farthest is the odds' logarithm beyond which w or 1-w leaves the range of a float64.
const farthest = 700

// odds returns z = ln[w/(1-w)] at which ln I has the given value, +Inf where I never gets there or 1-w vanishes.
//
// ln I bends one way only, from slope a to slope b-1. Newton's iteration from the asymptote on the far side of the bend
// approaches the root from that side and never passes it; the count only bounds the wait at rounding.
func (i incompleteBeta) odds(logValue float64) float64 {
	z := i.firstGuess(logValue)
	for range 100 {
		switch {
		case math.IsNaN(z), z < -farthest: // so early that I = wᵃ
			return z
		case z > farthest:
			return math.Inf(1)
		}
		v, slope := i.log(z)
		step := (v - logValue) / slope
		z -= step
		if math.Abs(step) <= 0x1p-51*(1+math.Abs(z)) {
			break
		}
	}
	return z
}

// firstGuess is where the later of the two asymptotes passes the value, the earlier if ln I bends upwards.
func (i incompleteBeta) firstGuess(logValue float64) float64 {
	early := logValue / i.a
	if !(i.b > 1) {
		return early
	}
	late := (logValue - math.Log(i.a/(i.b-1))) / (i.b - 1)
	if i.b-1 > i.a {
		return math.Min(early, late)
	}
	return math.Max(early, late)
}
