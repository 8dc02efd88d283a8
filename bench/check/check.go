// Package check compares floating-point results in tests without the holes of the usual helpers: a NaN never passes, a
// tolerance that is NaN, infinite or negative is itself a failure, lengths must agree, and the message names the worst
// component. It is importable so that a test harness built on package bench can use the same yardsticks.
//
// Every function reports through TB.Errorf, returns whether it passed, and takes a label that says what was compared.
package check

import (
	"math"
)

// TB is the part of testing.TB that the comparisons need.
type TB interface {
	Helper()
	Errorf(format string, args ...any)
}

// Rel reports an error unless |got - want| <= tol*|want|. With want = 0 only an exact zero passes: compare such a value
// with Abs against a stated scale.
func Rel(t TB, label string, got, want, tol float64) bool {
	t.Helper()
	return within(t, label, got, want, tol*math.Abs(want), tol, "relative")
}

// Abs reports an error unless |got - want| <= tol. The caller states tol in the unit of the quantity.
func Abs(t TB, label string, got, want, tol float64) bool {
	t.Helper()
	return within(t, label, got, want, tol, tol, "absolute")
}

// Scaled reports an error unless |got - want| <= tol*scale, where scale is a size of the problem (a trial stress, a
// norm), stated by the caller and independent of got.
func Scaled(t TB, label string, got, want, scale, tol float64) bool {
	t.Helper()
	return within(t, label, got, want, tol*math.Abs(scale), tol, "of scale")
}

// Slice compares component by component like Scaled and names the worst component. Arrays are passed as a[:].
func Slice(t TB, label string, got, want []float64, scale, tol float64) bool {
	t.Helper()
	if len(got) != len(want) {
		t.Errorf("%s: %d values, want %d", label, len(got), len(want))
		return false
	}
	if !usable(t, label, tol) {
		return false
	}
	limit, worst, at := tol*math.Abs(scale), -1.0, -1
	for i := range want {
		d := distance(got[i], want[i])
		if !(d <= limit) && (at < 0 || !(d <= worst)) {
			worst, at = d, i
		}
	}
	if at >= 0 {
		t.Errorf("%s: worst component %d: got %.17g, want %.17g, difference %.3g exceeds %.3g", label, at, got[at], want[at],
			worst, limit)
		return false
	}
	return true
}

// ULP reports an error unless got and want are at most n representable numbers apart.
func ULP(t TB, label string, got, want float64, n uint64) bool {
	t.Helper()
	if d := ULPs(got, want); d > n {
		t.Errorf("%s: got %.17g, want %.17g: %d ulp apart, allowed %d", label, got, want, d, n)
		return false
	}
	return true
}

// ULPs is the number of representable float64 between a and b, or MaxUint64 when either is NaN.
func ULPs(a, b float64) uint64 {
	if math.IsNaN(a) || math.IsNaN(b) {
		return math.MaxUint64
	}
	x, y := ordered(a), ordered(b)
	if x < y {
		x, y = y, x
	}
	return uint64(x) - uint64(y) // exact modulo 2^64 even when the signed difference overflows
}

// ordered maps a float64 to an integer so that neighbouring floats are neighbouring integers.
func ordered(x float64) int64 {
	b := int64(math.Float64bits(x))
	if b < 0 {
		return math.MinInt64 - b
	}
	return b
}

func within(t TB, label string, got, want, limit, tol float64, kind string) bool {
	t.Helper()
	if !usable(t, label, tol) {
		return false
	}
	if d := distance(got, want); !(d <= limit) || math.IsInf(limit, 1) && d != 0 { // an infinite want allows only itself
		t.Errorf("%s: got %.17g, want %.17g: difference %.3g exceeds %.3g (%s tolerance %.3g)", label, got, want, d, limit,
			kind, tol)
		return false
	}
	return true
}

// distance is zero for equal infinities, so that a limit value can be asked for by name.
func distance(got, want float64) float64 {
	if got == want {
		return 0
	}
	return math.Abs(got - want)
}

func usable(t TB, label string, tol float64) bool {
	t.Helper()
	if !(tol >= 0) || math.IsInf(tol, 1) {
		t.Errorf("%s: the tolerance %v is not a number to hold anything against", label, tol)
		return false
	}
	return true
}
