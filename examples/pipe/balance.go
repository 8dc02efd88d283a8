package main

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/integrate"
)

// balance is the wall's system of equations at the end of a step: with the nodal shape functions N,
//
//	∫(σr N' + σθ N/r) r dr - p a [node at the bore] = 0,   ∫σz r dr - p a²/2 = 0
//
// The stiffness is banded but for the axial strain, which couples with every node: column and row are kept beside the band.
type balance struct {
	*wall
	band     *mat.SymBandDense
	coupling *mat.Dense // residual of the nodes, and its derivative by the axial strain
	row      []float64  // derivative of the axial residual by the displacements
	corner   float64    // and by the axial strain
	end      float64    // axial residual
	floor    float64    // what rounding leaves of the residual
	effort   effort
}

// effort is what the global Newton iterations cost.
type effort struct {
	solves, iterations int
	longest            []float64 // residual before each correction and after the last
	rounding           float64   // part of those residuals that may be rounding
}

func newBalance(w *wall) *balance {
	n := len(w.nodes)
	return &balance{wall: w, band: mat.NewSymBandDense(n, 2, nil), coupling: mat.NewDense(n, 2, nil), row: make([]float64, n)}
}

const (
	// solved is the residual, over the load, at which the iteration stops, unless rounding leaves more.
	solved        = 1e-12
	mostIteration = 25
)

// stepFailed says that a step found no equilibrium; a shorter one may.
type stepFailed struct{ reason error }

func (e *stepFailed) Error() string { return e.reason.Error() }
func (e *stepFailed) Unwrap() error { return e.reason }

// solve finds the equilibrium at the end of a step of some hours by Newton's method on the library's consistent tangent,
// starting from the displacements of guess. from is left as it is.
func (b *balance) solve(from, guess *condition, hours float64) (*condition, error) {
	c := b.virgin()
	c.time, c.axial = from.time+hours, guess.axial
	copy(c.displacement, guess.displacement)
	var residuals []float64
	for {
		size, err := b.assemble(c, from, hours)
		if err != nil {
			return nil, err
		}
		residuals = append(residuals, size)
		if size <= math.Max(solved, b.floor) {
			b.effort.add(residuals, math.Max(solved, b.floor))
			return c, nil
		}
		if len(residuals) > mostIteration || !(size < math.MaxFloat64) {
			return nil, &stepFailed{fmt.Errorf("no equilibrium, residuals %.1e", residuals)}
		}
		if err := b.correct(c); err != nil {
			return nil, &stepFailed{err}
		}
	}
}

func (e *effort) add(residuals []float64, rounding float64) {
	e.solves++
	e.iterations += len(residuals) - 1
	if len(residuals) > len(e.longest) {
		e.longest, e.rounding = residuals, rounding
	}
}

// assemble carries every point from the states of from to the strains of c, and fills residual and stiffness. It returns the
// largest residual over the load.
func (b *balance) assemble(c, from *condition, hours float64) (float64, error) {
	b.band.Zero()
	b.coupling.Zero()
	clear(b.row)
	b.corner, b.end, b.floor = 0, -b.pressure*b.inner*b.inner/2, 0
	b.coupling.Set(0, 0, -b.pressure*b.inner)
	var out integrate.Result
	var stress [3]float64
	var tangent [9]float64
	for i := range b.points {
		s := &b.points[i]
		strain := s.strain(c.displacement, c.axial)
		inc := integrate.Increment{Dt: hours, Strain: b.layout.StrainIn(strain[:]), Temperature: s.kelvin}
		if err := b.law.Step(&out, &from.states[i], inc); err != nil {
			err = fmt.Errorf("at the radius %.4g mm: %w", s.radius, b.law.Explain(err, &from.states[i], inc))
			if integrate.Recoverable(err) {
				err = &stepFailed{err}
			}
			return 0, err
		}
		b.layout.StressOut(stress[:], out.Stress)
		b.layout.TangentOut(tangent[:], &out.Tangent)
		c.states[i], c.stress[i] = out.State, wallStress{stress[0], stress[1], stress[2]}
		b.add(s, &stress, &tangent)
		b.floor = math.Max(b.floor, b.rounding(s, c.displacement))
	}
	n := len(b.nodes)
	largest := math.Abs(b.end) / (b.pressure * b.inner * b.inner)
	for i := range n {
		largest = math.Max(largest, math.Abs(b.coupling.At(i, 0))/(b.pressure*b.inner))
	}
	return largest, nil
}

// rounding is what float64 leaves of the equilibrium at a point, over the load: the elastic strain is a small difference of
// strains, which are small differences of displacements.
func (b *balance) rounding(s *station, displacement []float64) float64 {
	terms := 0.0
	for i := range 3 {
		terms += math.Abs(s.slope[i] * displacement[s.node+i])
	}
	const few = 16 * 0x1p-53
	confined := b.young * (1 - b.poisson) / ((1 + b.poisson) * (1 - 2*b.poisson)) // modulus for one strain alone
	return few * confined * terms / b.pressure
}

// add adds the share of one point. The rows of the strain matrix are N', N/r and 0 for a displacement, 0, 0 and 1 for the axial
// strain.
func (b *balance) add(s *station, stress *[3]float64, tangent *[9]float64) {
	for i := range 3 {
		row := s.node + i
		slope, hoop := s.slope[i], s.value[i]/s.radius
		b.coupling.Set(row, 0, b.coupling.At(row, 0)+s.weight*(slope*stress[0]+hoop*stress[1]))
		b.coupling.Set(row, 1, b.coupling.At(row, 1)+s.weight*(slope*tangent[2]+hoop*tangent[5]))
		b.row[row] += s.weight * (tangent[6]*slope + tangent[7]*hoop)
		for j := i; j < 3; j++ {
			slopeJ, hoopJ := s.slope[j], s.value[j]/s.radius
			k := slope*(tangent[0]*slopeJ+tangent[1]*hoopJ) + hoop*(tangent[3]*slopeJ+tangent[4]*hoopJ)
			b.band.SetSymBand(row, s.node+j, b.band.At(row, s.node+j)+s.weight*k)
		}
	}
	b.end += s.weight * stress[2]
	b.corner += s.weight * tangent[8]
}

// correct solves the linear equations and subtracts the correction. The tangent of this law is symmetric and positive definite,
// so that the band has a Cholesky factor; the axial strain follows from the rest (block elimination).
func (b *balance) correct(c *condition) error {
	var factor mat.BandCholesky
	if !factor.Factorize(b.band) {
		return errors.New("the stiffness is not positive definite")
	}
	var x mat.Dense // what residual and axial strain do to the nodes
	if err := factor.SolveTo(&x, b.coupling); err != nil {
		return fmt.Errorf("the equations of the wall: %w", err)
	}
	right, left := b.end, b.corner
	for i, r := range b.row {
		right -= r * x.At(i, 0)
		left -= r * x.At(i, 1)
	}
	axial := right / left
	c.axial -= axial
	for i := range c.displacement {
		c.displacement[i] -= x.At(i, 0) - axial*x.At(i, 1)
	}
	return nil
}
