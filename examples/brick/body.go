package main

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// body is a mesh of bricks of one material.
type body struct {
	nodes    []vector
	bricks   []brick
	material *integrate.Material
	layout   tensor.Layout // hostOrder
	force    float64       // what residuals are relative to [N]: the stress at hand times the area of the body
}

// brick is one element.
type brick struct {
	nodes  [8]int
	points [8]integrationPoint
}

// newBody places the integration points. stress is the size of the stresses to come [MPa]; it only scales residuals.
func newBody(nodes []vector, bricks [][8]int, material *integrate.Material, stress float64) (*body, error) {
	layout, err := tensor.NewLayout(hostOrder, tensor.EngineeringShear)
	if err != nil {
		return nil, err
	}
	b := &body{nodes: nodes, material: material, layout: layout}
	for i, n := range bricks {
		e := brick{nodes: n}
		places := b.places(n)
		if e.points, err = integrationPoints(&places); err != nil {
			return nil, fmt.Errorf("brick %d: %w", i+1, err)
		}
		b.bricks = append(b.bricks, e)
	}
	b.force = stress * math.Pow(b.volume(), 2.0/3)
	return b, nil
}

func (b *body) places(nodes [8]int) (places [8]vector) {
	for i, n := range nodes {
		places[i] = b.nodes[n]
	}
	return places
}

func (b *body) volume() (sum float64) {
	for i := range b.bricks {
		for j := range b.bricks[i].points {
			sum += b.bricks[i].points[j].volume
		}
	}
	return sum
}

// unknowns is the number of displacement components; that of node a in direction i is 3a+i.
func (b *body) unknowns() int { return 3 * len(b.nodes) }

// condition is the body at one moment, in equilibrium.
type condition struct {
	time, temperature float64 // [h], [K]
	displacement      []float64
	stress            [][6]float64 // of every integration point, brick by brick, in hostOrder [MPa]
	states            []integrate.State
}

// virgin is the body before anything has happened to it.
func (b *body) virgin(temperature float64) *condition {
	points := 8 * len(b.bricks)
	return &condition{temperature: temperature, displacement: make([]float64, b.unknowns()), stress: make([][6]float64, points),
		states: make([]integrate.State, points)}
}

// demand is what a step imposes.
type demand struct {
	duration    float64   // [h], 0 for an elastic change
	temperature float64   // at its end [K]
	force       []float64 // nodal forces at its end [N]
	held        []bool    // components whose displacement is the one that the iteration starts from
}

const (
	// solved is the residual, over the body's force, at which the iteration stops. Rounding is seen at 1e-15, and at 1e-14
	// where creep strains are tens of times the elastic ones.
	solved        = 1e-13
	mostIteration = 30
)

// system is the body's equations in one step: internal forces, tangent stiffness.
type system struct {
	internal  []float64
	stiffness *mat.Dense
	element   [24][24]float64 // of one brick
}

func newSystem(unknowns int) *system {
	return &system{internal: make([]float64, unknowns), stiffness: mat.NewDense(unknowns, unknowns, nil)}
}

// assemble steps every integration point from the states of from to the strains of displacement and adds up internal forces
// ∫BᵀσdV and stiffness ∫BᵀCB dV. This is the loop of a host code: strains in the host's order go in through the layout,
// stresses and tangents come out through it.
func (b *body) assemble(s *system, end, from *condition, d demand) error {
	clear(s.internal)
	s.stiffness.Zero()
	var out integrate.Result
	var matrix [6][24]float64
	var strain [6]float64
	var tangent [36]float64
	for i := range b.bricks {
		e := &b.bricks[i]
		s.element = [24][24]float64{}
		for j := range e.points {
			point := 8*i + j
			e.points[j].strainMatrix(&matrix)
			b.strain(&strain, &matrix, e, end.displacement)
			inc := integrate.Increment{Dt: d.duration, Strain: b.layout.StrainIn(strain[:]), Temperature: d.temperature}
			if err := b.material.Step(&out, &from.states[point], inc); err != nil {
				return fmt.Errorf("brick %d, integration point %d: %w", i+1, j+1,
					b.material.Explain(err, &from.states[point], inc))
			}
			b.layout.StressOut(end.stress[point][:], out.Stress)
			b.layout.TangentOut(tangent[:], &out.Tangent)
			end.states[point] = out.State
			s.add(e, &matrix, &end.stress[point], &tangent, e.points[j].volume)
		}
		s.place(e)
	}
	return nil
}

// strain is ε = B u of a brick.
func (b *body) strain(strain *[6]float64, matrix *[6][24]float64, e *brick, displacement []float64) {
	*strain = [6]float64{}
	for row := range strain {
		for a, n := range e.nodes {
			for k := range 3 {
				strain[row] += matrix[row][3*a+k] * displacement[3*n+k]
			}
		}
	}
}

// add adds the share of one integration point.
func (s *system) add(e *brick, matrix *[6][24]float64, stress *[6]float64, tangent *[36]float64, volume float64) {
	var moved [6][24]float64 // C B
	for row := range 6 {
		for k := range 6 {
			c := tangent[6*row+k] * volume
			for column := range 24 {
				moved[row][column] += c * matrix[k][column]
			}
		}
	}
	for p := range 24 {
		force := 0.0
		for k := range 6 {
			b := matrix[k][p]
			if b == 0 {
				continue
			}
			force += b * stress[k]
			for q := range 24 {
				s.element[p][q] += b * moved[k][q]
			}
		}
		s.internal[3*e.nodes[p/3]+p%3] += volume * force
	}
}

// place adds the stiffness of one brick to that of the body.
func (s *system) place(e *brick) {
	raw := s.stiffness.RawMatrix()
	for p := range 24 {
		row := raw.Data[(3*e.nodes[p/3]+p%3)*raw.Stride:]
		for q := range 24 {
			row[3*e.nodes[q/3]+q%3] += s.element[p][q]
		}
	}
}

// solve finds the equilibrium at the end of a step by Newton's method on the library's consistent tangent, from the
// displacements of guess, and returns with it the residual before each correction and after the last. from is left as it is.
func (b *body) solve(from *condition, guess []float64, d demand) (*condition, []float64, error) {
	end := b.virgin(d.temperature)
	end.time = from.time + d.duration
	copy(end.displacement, guess)
	s := newSystem(b.unknowns())
	free := freeOf(d.held)
	residual, stiffness := mat.NewVecDense(len(free), nil), mat.NewDense(len(free), len(free), nil)
	var correction mat.VecDense
	var residuals []float64
	for {
		if err := b.assemble(s, end, from, d); err != nil {
			return nil, residuals, err
		}
		for i, p := range free {
			residual.SetVec(i, s.internal[p]-d.force[p])
			for j, q := range free {
				stiffness.Set(i, j, s.stiffness.At(p, q))
			}
		}
		size := mat.Norm(residual, math.Inf(1)) / b.force
		residuals = append(residuals, size)
		if size <= solved {
			return end, residuals, nil
		}
		if len(residuals) > mostIteration || !(size < math.MaxFloat64) {
			return nil, residuals, errors.New("no equilibrium found")
		}
		if err := correction.SolveVec(stiffness, residual); err != nil {
			return nil, residuals, fmt.Errorf("the equations of the body: %w", err)
		}
		for i, p := range free {
			end.displacement[p] -= correction.AtVec(i)
		}
	}
}

// freeOf lists the components that are not held.
func freeOf(held []bool) (free []int) {
	for i, h := range held {
		if !h {
			free = append(free, i)
		}
	}
	return free
}

// tractions are the nodal forces of a uniform stress acting on the body from outside: σ·n on every face that belongs to one
// brick only.
func (b *body) tractions(stress tensor.Sym) []float64 {
	force := make([]float64, b.unknowns())
	m := [3]vector{{stress[tensor.XX], stress[tensor.XY], stress[tensor.XZ]},
		{stress[tensor.XY], stress[tensor.YY], stress[tensor.YZ]}, {stress[tensor.XZ], stress[tensor.YZ], stress[tensor.ZZ]}}
	for _, face := range b.surface() {
		places := [4]vector{b.nodes[face[0]], b.nodes[face[1]], b.nodes[face[2]], b.nodes[face[3]]}
		for a, f := range faceForces(&places, m) {
			for d := range 3 {
				force[3*face[a]+d] += f[d]
			}
		}
	}
	return force
}

// surface lists the outer faces: inner ones occur twice, with opposite sense.
func (b *body) surface() (outer [][4]int) {
	count := map[int]int{}
	key := func(f [4]int) (bits int) { // the set of its nodes
		for _, n := range f {
			bits |= 1 << n
		}
		return bits
	}
	var all [][4]int
	for i := range b.bricks {
		for _, f := range faces {
			n := &b.bricks[i].nodes
			face := [4]int{n[f[0]], n[f[1]], n[f[2]], n[f[3]]}
			all = append(all, face)
			count[key(face)]++
		}
	}
	for _, f := range all {
		if count[key(f)] == 1 {
			outer = append(outer, f)
		}
	}
	return outer
}
