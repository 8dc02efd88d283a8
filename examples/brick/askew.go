package main

import "math"

// askewHours are the lengths of the steps, most of them far beyond what accuracy would allow, that show the global iteration.
var askewHours = []float64{0, 1, 100, 1e4}

const askewLoad = 6000 // N in all

// askew clamps a brick's lower face, pulls two corners of the upper one sideways and a third upwards, and returns the
// residuals of each step. The stress is uniform nowhere. imbalance is the largest over the steps.
func askew(b *body) (residuals [][]float64, imbalance float64, err error) {
	d := demand{temperature: reference, force: b.none(), held: b.clamp()}
	d.force[3*4], d.force[3*5] = askewLoad/3.0, askewLoad/3.0
	d.force[3*6+2] = askewLoad / 3.0
	now := b.virgin(reference)
	for _, hours := range askewHours {
		d.duration = hours
		next, r, err := b.solve(now, now.displacement, d)
		residuals = append(residuals, r)
		if err != nil {
			return residuals, imbalance, err
		}
		now = next
		imbalance = math.Max(imbalance, b.imbalance(now, d)/askewLoad)
	}
	return residuals, imbalance, nil
}

// imbalance is the largest component of the sum of loads and supports' forces [N], and of the sum of their moments over the
// length of an edge of the cube.
func (b *body) imbalance(c *condition, d demand) float64 {
	force := append([]float64(nil), d.force...)
	internal := b.internalForces(c)
	for i, held := range d.held {
		if held {
			force[i] += internal[i]
		}
	}
	var sum, moment vector
	for a, x := range b.nodes {
		f := vector(force[3*a : 3*a+3])
		m := cross(x, f)
		for k := range 3 {
			sum[k] += f[k]
			moment[k] += m[k] / cube[1][0]
		}
	}
	largest := 0.0
	for k := range 3 {
		largest = math.Max(largest, math.Max(math.Abs(sum[k]), math.Abs(moment[k])))
	}
	return largest
}

// internalForces are ∫BᵀσdV of a condition.
func (b *body) internalForces(c *condition) []float64 {
	internal := b.none()
	var matrix [6][24]float64
	for i := range b.bricks {
		e := &b.bricks[i]
		for j := range e.points {
			e.points[j].strainMatrix(&matrix)
			for p := range 24 {
				for k, s := range c.stress[8*i+j] {
					internal[3*e.nodes[p/3]+p%3] += e.points[j].volume * matrix[k][p] * s
				}
			}
		}
	}
	return internal
}
