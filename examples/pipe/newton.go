package main

import "math"

// near is how small a residual must be for the square to show.
const near = 1e-2

// constant is the largest r(k+1)/r(k)² of the part of a sequence that is near and above rounding; 0 if there is none. Newton's
// method is quadratic when it is bounded; with one digit gained each time it would grow as the
// inverse of the residual.
func constant(residuals []float64, rounding float64) (largest float64) {
	for k := 1; k < len(residuals); k++ {
		if r := residuals[k-1]; r < near && residuals[k] > rounding {
			largest = math.Max(largest, residuals[k]/(r*r))
		}
	}
	return largest
}
