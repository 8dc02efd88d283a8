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
	value := f(p)
	var by [3]float64
	for i := range by {
		by[i] = f.difference(p, i, value)
	}
	return Rate{value, by[0], by[1], by[2]}
}

// differenceStep balances the truncation (n·h)⁴/30 of a power law against rounding ε/(n·h); a power of two keeps it exact.
const differenceStep = 1.0 / (1 << 13)

// difference is the fourth-order central difference by the argument of the given number: stress, strain, temperature.
func (f ValueFunc) difference(p Point, argument int, value float64) float64 {
	arguments := [3]float64{p.Stress, p.Strain, p.Temperature}
	x := arguments[argument]
	h := x * differenceStep
	if h == 0 {
		return 0
	}
	var at [4]float64
	for i, step := range [4]float64{-2, -1, 1, 2} {
		arguments[argument] = x + step*h
		at[i] = f(Point{arguments[0], arguments[1], arguments[2]})
	}
	d := (8*(at[2]-at[1]) - (at[3] - at[0])) / (12 * h)
	if math.IsNaN(d) && math.IsInf(value, 1) {
		return math.Inf(1)
	}
	return d
}
