package main

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// condition is the joint at one moment, in equilibrium.
type condition struct {
	time         float64 // [h]
	bolt, flange float64 // temperatures [K]
	load         float64 // F, of one bolt [N]
	nut          float64 // u, the nut's position [mm]
	points       []point // one per section
}

// point is the material point of one bolt section. The axis is x.
type point struct {
	axial, lateral float64 // total strains, thermal strain included
	state          integrate.State
	stress         float64 // axial [MPa]
}

// copyOf has its own points.
func (c *condition) copyOf() condition {
	d := *c
	d.points = append([]point(nil), c.points...)
	return d
}

// demand is what a step imposes.
type demand struct {
	duration     float64 // [h], 0 for an elastic change
	bolt, flange float64 // temperatures at its end [K]
	tighten      bool    // the nut moves until the load is reached; otherwise it stays
	load         float64 // of one bolt [N]
}

// balance is the joint's system of equations. Unknown are the axial and lateral strain of every section, the load and the
// nut's position,
//
//	σxx(εᵢ, λᵢ) Aᵢ - F = 0          the sections carry the same load
//	σyy(εᵢ, λᵢ) Aᵢ = 0              and are free at the sides
//	Σ Lᵢ εᵢ + F c - u - L εf = 0    the bolt spans what it clamps (see joint)
//	u - u(before) = 0               the nut stays;  or F - F(wanted) = 0, it is turned
//
// Residuals and unknowns are scaled by the preload and its elastic strain, so that one tolerance serves all.
type balance struct {
	*joint
	force, strain, travel float64 // scales: of F [N], of ε, of u and elongations [mm]
	out                   []integrate.Result
	residual              *mat.VecDense
	jacobian              *mat.Dense
	correction            *mat.VecDense
	effort                effort
}

// effort is what the global Newton iterations cost.
type effort struct {
	solves, iterations int
	worst              []float64 // largest residual before each iteration and after the last, of the longest solve
}

func newBalance(j *joint, temperature float64) *balance {
	n := 2*len(j.sections) + 2
	b := &balance{joint: j, force: j.perBolt(j.preload), out: make([]integrate.Result, len(j.sections)),
		residual: mat.NewVecDense(n, nil), jacobian: mat.NewDense(n, n, nil), correction: mat.NewVecDense(n, nil)}
	b.travel = b.force * j.boltCompliance(temperature)
	b.strain = b.travel / j.length()
	return b
}

const (
	// solved is the scaled residual at which the iteration stops: four decades above the rounding, seen at 1e-15, of stresses
	// that come from differences of total and thermal strain.
	solved        = 1e-11
	mostIteration = 20
)

// stepFailed says that a step found no equilibrium; a shorter one may.
type stepFailed struct{ reason error }

func (e *stepFailed) Error() string { return e.reason.Error() }

// solve finds the equilibrium at the end of a step by Newton's method on the library's consistent tangent, starting from
// the strains of guess. from is left as it is.
func (b *balance) solve(from, guess *condition, d demand) (condition, error) {
	c := guess.copyOf()
	c.time, c.bolt, c.flange = from.time+d.duration, d.bolt, d.flange
	var residuals []float64
	for {
		size, err := b.assemble(from, &c, d)
		if err != nil {
			return condition{}, err
		}
		residuals = append(residuals, size)
		if size <= solved {
			b.effort.add(residuals)
			for i := range c.points {
				c.points[i].state, c.points[i].stress = b.out[i].State, b.out[i].Stress[tensor.XX]
			}
			return c, nil
		}
		if len(residuals) > mostIteration || !(size < math.MaxFloat64) {
			return condition{}, &stepFailed{fmt.Errorf("no equilibrium after %d iterations, residuals %.2g", len(residuals)-1,
				residuals)}
		}
		if err := b.correction.SolveVec(b.jacobian, b.residual); err != nil {
			return condition{}, &stepFailed{fmt.Errorf("the equations of the joint: %w", err)}
		}
		b.correct(&c)
	}
}

func (e *effort) add(residuals []float64) {
	e.solves++
	e.iterations += len(residuals) - 1
	if len(residuals) > len(e.worst) {
		e.worst = residuals
	}
}

// correct subtracts the correction from the unknowns.
func (b *balance) correct(c *condition) {
	n := len(c.points)
	for i := range c.points {
		c.points[i].axial -= b.correction.AtVec(2*i) * b.strain
		c.points[i].lateral -= b.correction.AtVec(2*i+1) * b.strain
	}
	c.load -= b.correction.AtVec(2*n) * b.force
	c.nut -= b.correction.AtVec(2*n+1) * b.travel
}

// assemble steps every material point to the strains of c and fills residual and Jacobian. It returns the largest residual.
func (b *balance) assemble(from, c *condition, d demand) (float64, error) {
	n := len(c.points)
	load, nut := 2*n, 2*n+1 // columns; and rows of the compatibility and of what is imposed
	b.jacobian.Zero()
	compliance, _ := b.flange.compliance(d.flange)
	free, _ := freeStrain(&b.flange.growth, d.flange)
	gap := c.load*compliance - c.nut - b.length()*free
	for i, s := range b.sections {
		p, r := &c.points[i], &b.out[i]
		inc := integrate.Increment{Dt: d.duration, Temperature: d.bolt, Strain: tensor.Sym{
			tensor.XX: p.axial, tensor.YY: p.lateral, tensor.ZZ: p.lateral}}
		if err := b.bolt.Step(r, &from.points[i].state, inc); err != nil {
			err = fmt.Errorf("section %q: %w", s.name, b.bolt.Explain(err, &from.points[i].state, inc))
			if integrate.Recoverable(err) {
				err = &stepFailed{err}
			}
			return 0, err
		}
		axial, side, t := 2*i, 2*i+1, &r.Tangent
		scale := s.area / b.force
		b.residual.SetVec(axial, r.Stress[tensor.XX]*scale-c.load/b.force)
		b.residual.SetVec(side, r.Stress[tensor.YY]*scale)
		b.jacobian.Set(axial, axial, t[tensor.XX][tensor.XX]*scale*b.strain)
		b.jacobian.Set(axial, side, (t[tensor.XX][tensor.YY]+t[tensor.XX][tensor.ZZ])*scale*b.strain)
		b.jacobian.Set(side, axial, t[tensor.YY][tensor.XX]*scale*b.strain)
		b.jacobian.Set(side, side, (t[tensor.YY][tensor.YY]+t[tensor.YY][tensor.ZZ])*scale*b.strain)
		b.jacobian.Set(axial, load, -1)
		b.jacobian.Set(load, axial, s.length*b.strain/b.travel)
		gap += s.length * p.axial
	}
	b.residual.SetVec(load, gap/b.travel)
	b.jacobian.Set(load, load, compliance*b.force/b.travel)
	b.jacobian.Set(load, nut, -1)
	if d.tighten {
		b.residual.SetVec(nut, (c.load-d.load)/b.force)
		b.jacobian.Set(nut, load, 1)
	} else {
		b.residual.SetVec(nut, (c.nut-from.nut)/b.travel)
		b.jacobian.Set(nut, nut, 1)
	}
	return mat.Norm(b.residual, math.Inf(1)), nil
}

// sensitivity is what one kelvin does to the load of one bolt [N/K] with the nut left alone: the derivative of the
// equilibrium by the bolts' and by the flange's temperature, from the library's stress derivative by temperature.
func (b *balance) sensitivity(c *condition) (byBolt, byFlange float64, err error) {
	if _, err := b.assemble(c, c, demand{bolt: c.bolt, flange: c.flange}); err != nil {
		return 0, 0, err
	}
	n := len(c.points)
	right := mat.NewDense(2*n+2, 2, nil)
	for i, s := range b.sections {
		right.Set(2*i, 0, -b.out[i].ByTemperature[tensor.XX]*s.area/b.force)
		right.Set(2*i+1, 0, -b.out[i].ByTemperature[tensor.YY]*s.area/b.force)
	}
	_, compliance := b.flange.compliance(c.flange)
	_, growth := freeStrain(&b.flange.growth, c.flange)
	right.Set(2*n, 1, (b.length()*growth-c.load*compliance)/b.travel)
	var change mat.Dense
	if err := change.Solve(b.jacobian, right); err != nil {
		return 0, 0, err
	}
	return change.At(2*n, 0) * b.force, change.At(2*n, 1) * b.force, nil
}
