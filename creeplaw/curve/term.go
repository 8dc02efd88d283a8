package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// Term is one part of a Sum: an amplitude times a function of time that starts from zero. Each is scaled by coefficients of
// stress and temperature. The zero Term is not a term; the functions below make one.
type Term struct {
	shape           shape
	exponent        float64     // of time, for powerOfTime
	amplitude, rate Coefficient // c and r as they were given; no r for powerOfTime
	c, r            scale       // the same, worked up for a curve
}

type shape uint8

const (
	noShape shape = iota
	powerOfTime
	saturating
	growing
	logOfTime
	hyperbolic
)

// PowerOfTime is the term c tᵐ: amplitude c [1/timeᵐ], time exponent m > 0. Below one it starts at an infinite rate.
func PowerOfTime(amplitude Coefficient, exponent float64) Term {
	return Term{shape: powerOfTime, exponent: exponent, amplitude: amplitude}
}

// Steady is the term ṡ t of steady creep at the rate ṡ [1/time].
func Steady(rate Coefficient) Term { return PowerOfTime(rate, 1) }

// Saturating is the term c (1 - e^(-rt)) that ends at the limit c [-], with the rate constant r [1/time].
func Saturating(limit, rate Coefficient) Term {
	return Term{shape: saturating, amplitude: limit, rate: rate}
}

// Growing is the term c (e^(rt) - 1) of tertiary creep: amplitude c [-], rate constant r [1/time].
func Growing(amplitude, rate Coefficient) Term {
	return Term{shape: growing, amplitude: amplitude, rate: rate}
}

// LogOfTime is the term c ln(1 + rt): amplitude c [-], rate constant r [1/time].
func LogOfTime(amplitude, rate Coefficient) Term {
	return Term{shape: logOfTime, amplitude: amplitude, rate: rate}
}

// Hyperbolic is the term c rt/(1 + rt) that ends at the limit c [-], slower than an exponential: rate constant r [1/time].
func Hyperbolic(limit, rate Coefficient) Term {
	return Term{shape: hyperbolic, amplitude: limit, rate: rate}
}

// part is a term on its way through a constructor, with the names its coefficients have there.
type part struct {
	Term
	amplitudeName, rateName string
}

// prepare checks the term for the curve it belongs to.
func (p part) prepare(curve string) (Term, error) {
	t := p.Term
	switch {
	case t.shape == noShape:
		return t, &creeplaw.MissingError{Law: curve, Part: p.amplitudeName}
	case t.shape == powerOfTime && (!(t.exponent > 0) || math.IsInf(t.exponent, 1)):
		return t, &creeplaw.ParameterError{Law: curve, Parameter: "time exponent", Value: t.exponent, Want: wantPositive}
	}
	c, err := prepare(curve, p.amplitudeName, t.amplitude)
	if err != nil {
		return t, err
	}
	t.c = scaleOf(c)
	if t.shape == powerOfTime {
		return t, nil
	}
	r, err := prepare(curve, p.rateName, t.rate)
	if err != nil {
		return t, err
	}
	t.r = scaleOf(r)
	return t, nil
}

// coefficients are the numbers of a term at one stress and temperature: ln c and ln r with their exponents.
type coefficients struct {
	amplitude, rate LogValue
}

func (t *Term) coefficients(x condition) (c coefficients) {
	c.amplitude = t.c.at(&x)
	if t.shape != powerOfTime {
		c.rate = t.r.at(&x)
	}
	return c
}

// The limits of the argument y = ln(rt) beyond which functions of rt equal their asymptotes to rounding.
const (
	early = -37
	late  = 37
)

// logAt returns ln ε, ln(t ∂ε/∂t) and k = ∂ln(∂ε/∂t)/∂ln t of the term at the logarithm of time.
func (t *Term) logAt(c *coefficients, logTime float64) (strain, rate, k float64) {
	if t.shape == powerOfTime {
		strain = c.amplitude.Value + t.exponent*logTime
		return strain, strain + math.Log(t.exponent), t.exponent - 1
	}
	y := logTime + c.rate.Value
	if y < early { // all of them start as rt
		strain = c.amplitude.Value + y
		return strain, strain, t.bend(math.Exp(y))
	}
	switch x := math.Exp(y); t.shape {
	case saturating:
		strain, rate = math.Log(-math.Expm1(-x)), y-x
	case growing:
		strain, rate = x+math.Log(-math.Expm1(-x)), y+x
	case logOfTime:
		l := softplus(y)
		strain, rate = math.Log(l), y-l
	default: // hyperbolic
		l := softplus(y)
		strain, rate = y-l, y-2*l
	}
	return c.amplitude.Value + strain, c.amplitude.Value + rate, t.bend(math.Exp(y))
}

// bend is k as a function of x = rt.
func (t *Term) bend(x float64) float64 {
	switch t.shape {
	case saturating:
		return -x
	case growing:
		return x
	case logOfTime:
		return -share(x)
	case hyperbolic:
		return -2 * share(x)
	}
	return t.exponent - 1
}

// share is x/(1+x), also for infinite x.
func share(x float64) float64 { return 1 / (1 + 1/x) }

// softplus is ln(1 + eʸ).
func softplus(y float64) float64 {
	if y > late {
		return y
	}
	return math.Log1p(math.Exp(y))
}
