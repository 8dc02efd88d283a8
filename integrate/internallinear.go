package integrate

import "math"

// linear solves the equations linearised at x with one coordinate held: the Newton correction d, and, if asked for, the
// direction of the curve of solutions, scaled so that the held coordinate changes by 1. It reports false for a singular system.
func (c *coupled) linear(x *node, held int, d, along *direction) bool {
	n := c.size()
	if n == 2 && held == 2 && along == nil {
		return x.linear2(d)
	}
	var w dense
	for i := range n {
		k := 0
		for j := 0; j <= n; j++ {
			if j != held {
				w[i][k] = x.jacobian[i][j]
				k++
			}
		}
		w[i][n] = -x.residual[i]
		w[i][n+1] = -x.jacobian[i][held]
	}
	if !w.eliminate(n, n+2) {
		return false
	}
	for i, k := 0, 0; i <= n; i++ {
		if i == held {
			d[i] = 0
			if along != nil {
				along[i] = 1
			}
			continue
		}
		d[i] = w[k][n]
		if along != nil {
			along[i] = w[k][n+1]
		}
		k++
	}
	return true
}

// linear2 is linear for one variable and creep, with the time held.
func (x *node) linear2(d *direction) bool {
	a, b := &x.jacobian[0], &x.jacobian[1]
	det := a[0]*b[1] - a[1]*b[0]
	if det == 0 {
		return false
	}
	d[0] = (a[1]*x.residual[1] - b[1]*x.residual[0]) / det
	d[1] = (b[0]*x.residual[0] - a[0]*x.residual[1]) / det
	d[2] = 0
	return finite(d[0] + d[1])
}

// rightSides is the largest number of right-hand sides solved for at once.
const rightSides = 10

// dense is a small system of equations with its right-hand sides in the columns behind.
type dense [unknowns][unknowns + rightSides]float64

// eliminate solves the first n columns for the others, which hold the solutions afterwards: Gauss with rows scaled and
// pivoted. It reports false for a singular matrix or one that is not finite.
func (w *dense) eliminate(n, width int) bool {
	for i := range n {
		largest := 0.0
		for j := range n {
			largest = max(largest, math.Abs(w[i][j]))
		}
		if !(largest > 0 && largest <= math.MaxFloat64) {
			return false
		}
		for j := range width {
			w[i][j] /= largest
		}
	}
	for k := range n {
		p := k
		for i := k + 1; i < n; i++ {
			if math.Abs(w[i][k]) > math.Abs(w[p][k]) {
				p = i
			}
		}
		if w[p][k] == 0 {
			return false
		}
		if p != k {
			w[p], w[k] = w[k], w[p]
		}
		for i := k + 1; i < n; i++ {
			f := w[i][k] / w[k][k]
			if f == 0 {
				continue
			}
			for j := k + 1; j < width; j++ {
				w[i][j] -= f * w[k][j]
			}
		}
	}
	for j := n; j < width; j++ {
		for k := n - 1; k >= 0; k-- {
			s := w[k][j]
			for i := k + 1; i < n; i++ {
				s -= w[k][i] * w[i][j]
			}
			w[k][j] = s / w[k][k]
			if !finite(w[k][j]) {
				return false
			}
		}
	}
	return true
}
