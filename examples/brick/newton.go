package main

import "math"

// Newton's method is quadratic when each residual is at most a constant times the square of the one before.

const (
	rounding = solved // residuals below it may be rounding
	near     = 1e-2   // residuals above it are too far away for the square to show
)

// constant is the largest r(k+1)/r(k)² of the part of a sequence that is near and above rounding; 0 if there is none.
func constant(residuals []float64) (largest float64) {
	for k := 1; k < len(residuals); k++ {
		if r := residuals[k-1]; r < near && residuals[k] > rounding {
			largest = math.Max(largest, residuals[k]/(r*r))
		}
	}
	return largest
}

// order is how fast a sequence converges at its end, from its last three values above rounding: 2 for Newton's method with
// the right tangent, 1 with a wrong one. It reports false when there are fewer.
func order(residuals []float64) (float64, bool) {
	for len(residuals) > 0 && residuals[len(residuals)-1] < rounding {
		residuals = residuals[:len(residuals)-1]
	}
	if len(residuals) < 3 || residuals[len(residuals)-2] > near {
		return 0, false
	}
	r := residuals[len(residuals)-3:]
	return math.Log(r[2]/r[1]) / math.Log(r[1]/r[0]), true
}
