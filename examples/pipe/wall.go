package main

import (
	"math"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// wall is the mesh through the pipe's wall: axisymmetric line elements with three nodes (quadratic in the radial displacement
// u) and one axial strain for all (generalised plane strain). The radii of the element ends are in geometric series, so that
// all elements have the same shape.
//
// Steady creep is incompressible. Two points per element leave 2N conditions on the 2N+1 displacements of N elements, just
// as many as there are in the continuum, where one constant is free in u = V/r; so the element does not lock. With three
// points it has N more and does: the mesh study shows both.
type wall struct {
	*pipe
	law    *integrate.Material
	layout tensor.Layout
	nodes  []float64 // radii [mm]
	points []station
}

// station is an integration point.
type station struct {
	radius, kelvin float64
	weight         float64 // ∫ r dr that it stands for [mm²]
	node           int     // the first of its element's three
	value, slope   [3]float64
}

// hostOrder is how this program stores strains and stresses: radial, hoop, axial. There is no shear.
const hostOrder = "rr tt zz"

// Gauss–Legendre rules on (-1, 1) with two and three points.
var rules = map[int][][2]float64{
	2: {{-1 / math.Sqrt(3), 1}, {1 / math.Sqrt(3), 1}},
	3: {{-math.Sqrt(0.6), 5.0 / 9}, {0, 8.0 / 9}, {math.Sqrt(0.6), 5.0 / 9}},
}

// newWall makes a mesh of so many elements with two or three points each.
func newWall(p *pipe, elements, perElement int) (*wall, error) {
	law, err := p.material()
	if err != nil {
		return nil, err
	}
	layout, err := tensor.NewLayout(hostOrder, tensor.EngineeringShear)
	if err != nil {
		return nil, err
	}
	w := &wall{pipe: p, law: law, layout: layout, nodes: make([]float64, 2*elements+1)}
	for i := range elements + 1 {
		w.nodes[2*i] = p.inner * math.Pow(p.outer/p.inner, float64(i)/float64(elements))
	}
	w.nodes[2*elements] = p.outer
	for e := range elements {
		first, last := w.nodes[2*e], w.nodes[2*e+2]
		w.nodes[2*e+1] = (first + last) / 2
		for _, g := range rules[perElement] {
			half, x := (last-first)/2, g[0]
			s := station{radius: (first+last)/2 + half*x, node: 2 * e,
				value: [3]float64{x * (x - 1) / 2, 1 - x*x, x * (x + 1) / 2},
				slope: [3]float64{(x - 0.5) / half, -2 * x / half, (x + 0.5) / half}}
			s.weight, s.kelvin = s.radius*half*g[1], p.kelvinAt(s.radius)
			w.points = append(w.points, s)
		}
	}
	return w, nil
}

// strain is the host's strain at a point: du/dr, u/r and the axial strain.
func (s *station) strain(displacement []float64, axial float64) [3]float64 {
	e := [3]float64{0, 0, axial}
	for i := range 3 {
		u := displacement[s.node+i]
		e[0] += s.slope[i] * u
		e[1] += s.value[i] / s.radius * u
	}
	return e
}

// condition is the wall at one moment, in equilibrium.
type condition struct {
	time         float64
	displacement []float64 // of the nodes, radial [mm]
	axial        float64   // strain
	stress       []wallStress
	states       []integrate.State
}

// virgin is the wall before anything has happened to it.
func (w *wall) virgin() *condition {
	n := len(w.points)
	return &condition{displacement: make([]float64, len(w.nodes)), stress: make([]wallStress, n), states: make([]integrate.State, n)}
}

// surface is the stress at the bore and at the outside, extrapolated from the two points nearest to it.
func (w *wall) surface(c *condition) (bore, outside wallStress) {
	along := func(near, far int, radius float64) wallStress {
		x := (radius - w.points[near].radius) / (w.points[far].radius - w.points[near].radius)
		a, b := c.stress[near], c.stress[far]
		return wallStress{a.radial + x*(b.radial-a.radial), a.hoop + x*(b.hoop-a.hoop), a.axial + x*(b.axial-a.axial)}
	}
	last := len(w.points) - 1
	return along(0, 1, w.inner), along(last, last-1, w.outer)
}
