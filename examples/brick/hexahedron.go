package main

import (
	"fmt"
	"math"
)

// vector is a place or a displacement [mm].
type vector [3]float64

func cross(a, b vector) vector {
	return vector{a[1]*b[2] - a[2]*b[1], a[2]*b[0] - a[0]*b[2], a[0]*b[1] - a[1]*b[0]}
}

func dot(a, b vector) float64 { return a[0]*b[0] + a[1]*b[1] + a[2]*b[2] }

// corners of the reference cube, in the order of a brick's nodes: the lower face counter-clockwise seen from above, then the
// upper one.
var corners = [8]vector{{-1, -1, -1}, {1, -1, -1}, {1, 1, -1}, {-1, 1, -1}, {-1, -1, 1}, {1, -1, 1}, {1, 1, 1}, {-1, 1, 1}}

// faces of the reference cube, counter-clockwise seen from outside.
var faces = [6][4]int{{0, 3, 2, 1}, {4, 5, 6, 7}, {0, 1, 5, 4}, {1, 2, 6, 5}, {2, 3, 7, 6}, {3, 0, 4, 7}}

// gauss is the place of the two-point rule, ±1/√3, with weights 1. It is exact up to the third power, which covers all that
// a uniform stress asks of a trilinear brick and of its bilinear faces.
var gauss = 1 / math.Sqrt(3)

// trilinear returns the shape functions N = Π(1+ξᵢξᵢ(corner))/8 and their derivatives by ξ.
func trilinear(at vector) (value [8]float64, slope [8]vector) {
	for a, c := range corners {
		x, y, z := 1+c[0]*at[0], 1+c[1]*at[1], 1+c[2]*at[2]
		value[a] = x * y * z / 8
		slope[a] = vector{c[0] * y * z / 8, x * c[1] * z / 8, x * y * c[2] / 8}
	}
	return value, slope
}

// integrationPoint is one of the 2×2×2 points of a brick.
type integrationPoint struct {
	volume   float64   // that it stands for, the Jacobian determinant [mm³]
	gradient [8]vector // ∂N/∂x of the brick's nodes [1/mm]
}

// integrationPoints places the points of a brick; a brick that is turned inside out at one of them is an error.
func integrationPoints(nodes *[8]vector) (points [8]integrationPoint, err error) {
	for i, c := range corners {
		at := vector{c[0] * gauss, c[1] * gauss, c[2] * gauss}
		_, slope := trilinear(at)
		var rows [3]vector // row k is ∂x/∂ξ_k
		for a, s := range slope {
			for k := range 3 {
				for d := range 3 {
					rows[k][d] += s[k] * nodes[a][d]
				}
			}
		}
		// The inverse of ∂x/∂ξ has the cross products of its rows as columns, over the determinant.
		dual := [3]vector{cross(rows[1], rows[2]), cross(rows[2], rows[0]), cross(rows[0], rows[1])}
		determinant := dot(rows[0], dual[0])
		if !(determinant > 0) {
			return points, fmt.Errorf("the brick is turned inside out at integration point %d: Jacobian determinant %.3g",
				i+1, determinant)
		}
		points[i].volume = determinant
		for a, s := range slope {
			for d := range 3 {
				points[i].gradient[a][d] = (s[0]*dual[0][d] + s[1]*dual[1][d] + s[2]*dual[2][d]) / determinant
			}
		}
	}
	return points, nil
}

// hostOrder is how this program stores strains and stresses: engineering shear, and not in the library's order.
const hostOrder = "xx yy zz xy yz xz"

// hostComponents are the two directions of each component of hostOrder.
var hostComponents = [6][2]int{{0, 0}, {1, 1}, {2, 2}, {0, 1}, {1, 2}, {0, 2}}

// strainMatrix is B of ε = B u in hostOrder: γ_ij = ∂u_i/∂x_j + ∂u_j/∂x_i off the diagonal.
func (p *integrationPoint) strainMatrix(b *[6][24]float64) {
	*b = [6][24]float64{}
	for row, c := range hostComponents {
		i, j := c[0], c[1]
		for a, g := range p.gradient {
			b[row][3*a+i] = g[j]
			b[row][3*a+j] = g[i]
		}
	}
}

// faceForces are the nodal forces of a uniform traction field σ·n on a face with these corners, counter-clockwise seen from
// outside: ∫ N σ·n dA over the bilinear face, which is curved when its corners are not in one plane.
func faceForces(nodes *[4]vector, stress [3]vector) (forces [4]vector) {
	square := [4][2]float64{{-1, -1}, {1, -1}, {1, 1}, {-1, 1}}
	for _, q := range square {
		x, y := q[0]*gauss, q[1]*gauss
		var value [4]float64
		var along, across vector
		for a, c := range square {
			value[a] = (1 + c[0]*x) * (1 + c[1]*y) / 4
			for d := range 3 {
				along[d] += c[0] * (1 + c[1]*y) / 4 * nodes[a][d]
				across[d] += (1 + c[0]*x) * c[1] / 4 * nodes[a][d]
			}
		}
		area := cross(along, across) // n dA
		for a, n := range value {
			for d := range 3 {
				forces[a][d] += n * dot(stress[d], area)
			}
		}
	}
	return forces
}
