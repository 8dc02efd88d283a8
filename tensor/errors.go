package tensor

import (
	"fmt"
	"strconv"
)

// AxisError says that a rotation axis is zero or not finite.
type AxisError struct {
	Axis [3]float64 // as given
}

func (e *AxisError) Error() string {
	return fmt.Sprintf("tensor: rotation axis %v has no direction: it must be finite and not zero", e.Axis)
}

// AngleError says that a rotation angle is NaN or infinite.
type AngleError struct {
	Angle float64 // as given, in radians
}

func (e *AngleError) Error() string {
	return fmt.Sprintf("tensor: rotation angle %v is not a finite number of radians", e.Angle)
}

// RotationError says that a matrix is not a rotation within the tolerance of the check.
type RotationError struct {
	Deviation   float64 // greatest component of |q qᵀ - 1|
	Determinant float64 // of q; negative for a reflection
	Tolerance   float64 // the caller's
}

func (e *RotationError) Error() string {
	return fmt.Sprintf("tensor: not a rotation: q qᵀ differs from the unit matrix by %.3g (tolerance %.3g), determinant %.3g",
		e.Deviation, e.Tolerance, e.Determinant)
}

// LayoutError says why a list of components makes no Layout.
type LayoutError struct {
	Components string // the list as given
	Word       string // the word at fault; empty when the fault is not in one word
	Position   int    // place of the word in the list, counted from 1; 0 when the fault is not in one word
	Reason     string // what is wrong, in words
}

func (e *LayoutError) Error() string {
	if e.Position == 0 {
		return fmt.Sprintf("tensor: layout %q: %s", e.Components, e.Reason)
	}
	return fmt.Sprintf("tensor: layout %q: component %d %q: %s", e.Components, e.Position, e.Word, e.Reason)
}

// panicLength reports a caller's bug. It is out of line so that its formatting costs the callers nothing.
//
//go:noinline
func panicLength(method string, got, want int) {
	panic("tensor: " + method + ": slice of length " + strconv.Itoa(got) + ", the layout needs " + strconv.Itoa(want))
}
