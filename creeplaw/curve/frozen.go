package curve

import "math"

// frozen is a term at one stress and temperature, scaled by the creep strain p that is looked for.
type frozen struct {
	shape                   shape
	exponent                float64 // of time, for powerOfTime
	logAmplitude, amplitude float64 // ln(c/p), c/p
	logRate                 float64 // ln r
	byStress, byTemperature exponentPair

	x, y    float64 // rt and its logarithm
	v, m, k float64 // ε/p, t (∂ε/∂t)/p and ∂ln(∂ε/∂t)/∂ln t there
}

// exponentPair is the exponents of amplitude and rate constant by stress, or by temperature.
type exponentPair struct{ amplitude, rate float64 }

// huge bounds the logarithms of the amplitudes that are used outside the logarithm.
const huge = 600

func (t *Term) freeze(f *frozen, at *condition, logStrain float64) {
	c := t.c.at(at)
	f.shape, f.exponent = t.shape, t.exponent
	f.logAmplitude = c.Value - logStrain
	f.byStress.amplitude, f.byTemperature.amplitude = c.ByLogStress, c.ByLogTemperature
	if t.shape == powerOfTime {
		return
	}
	r := t.r.at(at)
	if f.logAmplitude > huge { // reaches p while rt is below 1e-260
		f.shape, f.exponent = powerOfTime, 1
		f.logAmplitude += r.Value
		f.byStress.amplitude += r.ByLogStress
		f.byTemperature.amplitude += r.ByLogTemperature
		return
	}
	f.amplitude, f.logRate = math.Exp(f.logAmplitude), r.Value
	f.byStress.rate, f.byTemperature.rate = r.ByLogStress, r.ByLogTemperature
}

// reach is the ln t at which the term alone reaches p; +Inf if it never does.
func (f *frozen) reach() float64 {
	if f.shape == powerOfTime {
		return -f.logAmplitude / f.exponent
	}
	v := 1 / f.amplitude
	var y float64 // ln(rt)
	switch f.shape {
	case saturating:
		if !(v < 1) {
			return math.Inf(1)
		}
		y = math.Log(-math.Log1p(-v))
	case growing:
		y = math.Log(math.Log1p(v))
		if math.IsInf(v, 1) {
			y = math.Log(-f.logAmplitude)
		}
	case logOfTime:
		if y = v; v < late {
			y = math.Log(math.Expm1(v))
		}
	default: // hyperbolic
		if !(v < 1) {
			return math.Inf(1)
		}
		y = -f.logAmplitude - math.Log1p(-v)
	}
	return y - f.logRate
}

// ends tells whether the term has a limit at large time.
func (f *frozen) ends() bool { return f.shape == saturating || f.shape == hyperbolic }

// limit is the part of p that a term that ends gives at infinite time.
func (f *frozen) limit() float64 {
	if math.IsInf(f.logRate, -1) {
		return 0 // it never starts
	}
	return f.amplitude
}

// start evaluates the term at ln t.
func (f *frozen) start(logTime float64) {
	if f.shape == powerOfTime {
		f.v = math.Exp(f.logAmplitude + f.exponent*logTime)
		f.m, f.k = f.exponent*f.v, f.exponent-1
		return
	}
	f.y = logTime + f.logRate
	f.x = math.Exp(f.y)
	f.evaluate()
}

// moderate is the longest step in ln t that a term is carried over; after a longer one it starts anew.
const moderate = 0.5

// advance carries the term to a later or earlier time.
func (f *frozen) advance(next move) {
	switch {
	case f.shape != powerOfTime:
		f.y += next.step
		if f.x *= 1 + next.change; f.x > math.MaxFloat64 {
			f.x = math.Exp(f.y) // it may have come back from infinity
		}
		f.evaluate()
		return
	case f.exponent == 1:
		f.v += f.v * next.change
	default:
		f.v *= exponential(f.exponent * next.step)
	}
	f.m = f.exponent * f.v
}

// evaluate sets ε/p, m = t (∂ε/∂t)/p and the bend k of the rate from x = rt = eʸ.
func (f *frozen) evaluate() {
	a, x := f.amplitude, f.x
	switch f.shape {
	case saturating:
		if x > 100 { // nothing is left to come
			f.v, f.m, f.k = a, 0, 0
			return
		}
		gone, left := decay(x)
		f.v, f.m, f.k = a*gone, a*x*left, -x
	case growing:
		if f.y > 6 { // the amplitude may be beneath all numbers where the product counts
			grown := math.Exp(f.logAmplitude + x)
			f.v, f.m, f.k = grown-a, x*grown, x
			return
		}
		gain := math.Expm1(x)
		f.v, f.m, f.k = a*gain, a*x*(1+gain), x
	case logOfTime:
		q := share(x)
		f.v, f.m, f.k = a*softplus(f.y), a*q, -q
	default: // hyperbolic
		q, left := share(x), 1/(1+x)
		f.v, f.m, f.k = a*q, a*q*left, -2*q
	}
}

// decay is 1 - e⁻ˣ and e⁻ˣ.
func decay(x float64) (gone, left float64) {
	if x > 0.5 {
		left = math.Exp(-x)
		return 1 - left, left
	}
	gone = -math.Expm1(-x)
	return gone, 1 - gone
}

// exponential is eˣ, by a rational form good to rounding of small arguments.
func exponential(x float64) float64 {
	if math.Abs(x) > 0.1 {
		return math.Exp(x)
	}
	s := x * x
	even, odd := 1680+s*(180+s), x*(840+20*s)
	return (even + odd) / (even - odd) // Padé [4/4], error x⁹/25401600
}
