package main

import "example.com/holdtime/integrate"

// cube are the corners of a cube of 10 mm, in the order of a brick's nodes.
var cube = [8]vector{{0, 0, 0}, {10, 0, 0}, {10, 10, 0}, {0, 10, 0}, {0, 0, 10}, {10, 0, 10}, {10, 10, 10}, {0, 10, 10}}

// distortion moves the corners of the cube [mm], so that no two edges are parallel and no face is plane. Invented.
var distortion = [8]vector{{0, 0, 0}, {1.8, -2.4, 1.6}, {-1.8, -2.6, -2.8}, {-1.6, 1.4, 2.2}, {2.6, 1.8, -1.6},
	{2.4, 0.8, 3.2}, {1.4, 3.6, -2.4}, {3.2, -1.6, 2.8}}

// inner are the inner nodes of the patch in the unit cube. Source: R. H. MacNeal, R. L. Harder, A proposed standard set of
// problems to test finite element accuracy, Finite Elements in Analysis and Design 1 (1985) 3–20 (from memory; any inner
// nodes would serve).
var inner = [8]vector{{0.249, 0.342, 0.192}, {0.826, 0.288, 0.288}, {0.850, 0.649, 0.263}, {0.273, 0.750, 0.230},
	{0.320, 0.186, 0.643}, {0.677, 0.305, 0.683}, {0.788, 0.693, 0.644}, {0.165, 0.745, 0.702}}

// distorted are the corners of the brick; share 0 is the cube, 1 the full distortion.
func distorted(share float64) []vector {
	nodes := make([]vector, 8)
	for a, x := range cube {
		for d := range 3 {
			nodes[a][d] = x[d] + share*distortion[a][d]
		}
	}
	return nodes
}

// oneBrick is the distorted brick by itself.
func oneBrick(material *integrate.Material, share, stress float64) (*body, error) {
	return newBody(distorted(share), [][8]int{{0, 1, 2, 3, 4, 5, 6, 7}}, material, stress)
}

// sevenBricks is the same brick cut into seven: one inside, nodes 8 to 15, and one between it and each face.
func sevenBricks(material *integrate.Material, share, stress float64) (*body, error) {
	nodes := distorted(share)
	for _, x := range inner {
		value, _ := trilinear(vector{2*x[0] - 1, 2*x[1] - 1, 2*x[2] - 1})
		var place vector
		for a, n := range value {
			for d := range 3 {
				place[d] += n * nodes[a][d]
			}
		}
		nodes = append(nodes, place)
	}
	bricks := [][8]int{{8, 9, 10, 11, 12, 13, 14, 15}}
	for _, f := range faces {
		// Counter-clockwise seen from outside is the upper face of a brick whose lower face is that of the inner one.
		bricks = append(bricks, [8]int{f[0] + 8, f[1] + 8, f[2] + 8, f[3] + 8, f[0], f[1], f[2], f[3]})
	}
	return newBody(nodes, bricks, material, stress)
}

// Components that are held.

// supports hold a body without straining it: node 1 in three directions, node 2 in two, node 4 in one.
func (b *body) supports() []bool {
	held := make([]bool, b.unknowns())
	for _, i := range []int{0, 1, 2, 3*1 + 1, 3*1 + 2, 3*3 + 2} {
		held[i] = true
	}
	return held
}

// plates hold all nodes along x and leave them free across, but for the motions of the body as a whole.
func (b *body) plates() []bool {
	held := make([]bool, b.unknowns())
	for _, i := range []int{1, 2, 3*3 + 2} {
		held[i] = true
	}
	for a := range b.nodes {
		held[3*a] = true
	}
	return held
}

// boundary holds the eight outer nodes.
func (b *body) boundary() []bool {
	held := make([]bool, b.unknowns())
	for i := range 3 * 8 {
		held[i] = true
	}
	return held
}

// clamp holds the lower face.
func (b *body) clamp() []bool {
	held := make([]bool, b.unknowns())
	for i := range 3 * 4 {
		held[i] = true
	}
	return held
}
