// Package newton judges a Newton iteration by its residuals. It is quadratic when each is at most a constant times the square of
// the one before; with one digit gained each time that constant would grow as the inverse of the residual.
package newton

import (
	"fmt"
	"math"
	"strings"
)

// near is how small a residual must be for the square to show.
const near = 1e-2

// Constant is the largest r(k+1)/r(k)² of the part of a sequence that is near and above rounding; 0 if there is none.
func Constant(residuals []float64, rounding float64) (largest float64) {
	for k := 1; k < len(residuals); k++ {
		if r := residuals[k-1]; r < near && residuals[k] > rounding {
			largest = math.Max(largest, residuals[k]/(r*r))
		}
	}
	return largest
}

// Order is how fast a sequence converges at its end, from its last three values above rounding: 2 for Newton's method with the
// right tangent, 1 with a wrong one. It reports false when there are fewer, or when the last two are not near.
func Order(residuals []float64, rounding float64) (float64, bool) {
	for len(residuals) > 0 && residuals[len(residuals)-1] < rounding {
		residuals = residuals[:len(residuals)-1]
	}
	if len(residuals) < 3 || residuals[len(residuals)-2] > near {
		return 0, false
	}
	r := residuals[len(residuals)-3:]
	return math.Log(r[2]/r[1]) / math.Log(r[1]/r[0]), true
}

// Text writes residuals in a line.
func Text(residuals []float64, separator string) string {
	var words []string
	for _, r := range residuals {
		words = append(words, fmt.Sprintf("%.1e", r))
	}
	return strings.Join(words, separator)
}
