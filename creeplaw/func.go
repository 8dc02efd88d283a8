package creeplaw

import "math"

// RateFunc makes a user's own function a Law. It returns the rate and its partial derivatives, must not allocate and must
// be safe for concurrent use. A nil RateFunc is undefined everywhere (NaN).
type RateFunc func(Point) Rate

var _ Law = RateFunc(nil)

// Rate calls the function.
func (f RateFunc) Rate(p Point) Rate {
	if f == nil {
		return undefined()
	}
	return f(p)
}

// ValueFunc makes a user's own function a Law when it gives the rate only: the partial derivatives are formed by
// differences. That costs thirteen calls of the function per evaluation instead of one, and leaves a relative error of about
// 1e-11 in the derivatives of a smooth law; a law that matters deserves its own derivatives. The function must not allocate
// and must be safe for concurrent use.
//
// Differences are central, fourth order, with a step relative to the argument. At zero stress and at zero strain, where no
// relative step exists, the derivative is given as 0. A nil ValueFunc is undefined everywhere (NaN).
type ValueFunc func(Point) float64

var _ Law = ValueFunc(nil)

// Rate calls the function and differences it.
func (f ValueFunc) Rate(p Point) Rate {
	if f == nil {
		return undefined()
	}
	return Rate{
		Value:         f(p),
		ByStress:      fourthOrder(f, p, p.Stress, func(p *Point, x float64) { p.Stress = x }),
		ByStrain:      fourthOrder(f, p, p.Strain, func(p *Point, x float64) { p.Strain = x }),
		ByTemperature: fourthOrder(f, p, p.Temperature, func(p *Point, x float64) { p.Temperature = x }),
	}
}

// differenceStep balances the truncation (n·h)⁴/30 of a power law against rounding ε/(n·h); a power of two keeps it exact.
const differenceStep = 1.0 / (1 << 13)

func fourthOrder(f ValueFunc, p Point, x float64, set func(*Point, float64)) float64 {
	h := x * differenceStep
	if h == 0 {
		return 0
	}
	at := func(x float64) float64 {
		moved := p
		set(&moved, x)
		return f(moved)
	}
	near := at(x+h) - at(x-h)
	far := at(x+2*h) - at(x-2*h)
	d := (8*near - far) / (12 * h)
	if math.IsNaN(d) && math.IsInf(f(p), 1) {
		return math.Inf(1)
	}
	return d
}
