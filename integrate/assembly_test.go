package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// cell is one homogeneous material point of a small assembly: a bar of unit length and section between two nodes, loaded
// along x, its lateral strains free.
type cell struct {
	material *integrate.Material
	from, to int // nodes; node 0 is fixed
	state    integrate.State
	result   integrate.Result
}

// assembly has one axial displacement per node above 0 and two lateral strains per cell as unknowns.
type assembly struct {
	nodes int
	cells []cell
	load  float64 // on the last node
}

func (a *assembly) unknowns() int { return a.nodes + 2*len(a.cells) }

func (a *assembly) strain(i int, x []float64) tensor.Sym {
	c := &a.cells[i]
	axial := x[c.to-1]
	if c.from > 0 {
		axial -= x[c.from-1]
	}
	return tensor.Sym{axial, x[a.nodes+2*i], x[a.nodes+2*i+1]}
}

// equilibrium fills residual and Jacobian at x with the library's stresses and tangents.
func (a *assembly) equilibrium(t *testing.T, x []float64, dt float64) (*mat.VecDense, *mat.Dense) {
	t.Helper()
	r, jacobian := mat.NewVecDense(a.unknowns(), nil), mat.NewDense(a.unknowns(), a.unknowns(), nil)
	r.SetVec(a.nodes-1, -a.load)
	for i := range a.cells {
		c := &a.cells[i]
		inc := integrate.Increment{Dt: dt, Temperature: 800, Strain: a.strain(i, x)}
		require.NoError(t, c.material.Step(&c.result, &c.state, inc))
		columns := [4]int{c.to - 1, c.from - 1, a.nodes + 2*i, a.nodes + 2*i + 1}
		rows := [4]struct {
			row, component int
			sign           float64
		}{{c.to - 1, 0, 1}, {c.from - 1, 0, -1}, {a.nodes + 2*i, 1, 1}, {a.nodes + 2*i + 1, 2, 1}}
		byColumn := [4]struct {
			component int
			sign      float64
		}{{0, 1}, {0, -1}, {1, 1}, {2, 1}}
		for _, row := range rows {
			if row.row < 0 {
				continue
			}
			r.SetVec(row.row, r.AtVec(row.row)+row.sign*c.result.Stress[row.component])
			for k, column := range columns {
				if column >= 0 {
					d := row.sign * byColumn[k].sign * c.result.Tangent[row.component][byColumn[k].component]
					jacobian.Set(row.row, column, jacobian.At(row.row, column)+d)
				}
			}
		}
	}
	return r, jacobian
}

// solve runs plain Newton from x and returns the relative residuals.
func (a *assembly) solve(t *testing.T, x []float64, dt float64) (residuals []float64) {
	t.Helper()
	for range 25 {
		r, jacobian := a.equilibrium(t, x, dt)
		size := mat.Norm(r, math.Inf(1)) / math.Max(math.Abs(a.load), 1)
		residuals = append(residuals, size)
		if size < 1e-12 {
			return residuals
		}
		var dx mat.VecDense
		require.NoError(t, dx.SolveVec(jacobian, r))
		for i := range x {
			x[i] -= dx.AtVec(i)
		}
	}
	return residuals
}

// TestGlobalNewtonIsQuadratic solves a small structure of points in series and in parallel, with mixed materials, by plain
// Newton on the library's tangents: after a few steps of loading and creep the residuals must fall quadratically, and the
// number of iterations is bounded (a wrong tangent also converges, but slowly).
func TestGlobalNewtonIsQuadratic(t *testing.T) {
	made := func(law creeplaw.Law, err error) *integrate.Material {
		require.NoError(t, err)
		return material(t, law)
	}
	sum := func() (creeplaw.Law, error) {
		primary, err := creeplaw.NewBaileyNorton(1e-13, 4, 0.4)
		require.NoError(t, err)
		secondary, err := creeplaw.NewNorton(1e-17, 6)
		require.NoError(t, err)
		return creeplaw.NewSum(primary, secondary)
	}
	norton, err := creeplaw.NewNorton(1e-15, 5)
	require.NoError(t, err)
	garofalo, err := creeplaw.NewGarofalo(1e-9, 0.05, 1.5)
	require.NoError(t, err)
	bailey, err := creeplaw.NewBaileyNorton(1e-14, 5, 0.4)
	require.NoError(t, err)
	// Nodes 0 –(two cells in parallel)– 1 – 2 –(two in parallel)– 3, and one cell from 0 to 3 past them all.
	a := assembly{nodes: 3, load: 260, cells: []cell{
		{material: made(norton, nil), from: 0, to: 1}, {material: made(bailey, nil), from: 0, to: 1},
		{material: made(garofalo, nil), from: 1, to: 2},
		{material: made(sum()), from: 2, to: 3}, {material: made(norton, nil), from: 2, to: 3},
		{material: made(bailey, nil), from: 0, to: 3},
	}}
	x := make([]float64, a.unknowns())
	for _, dt := range []float64{0, 1, 30, 1000} {
		residuals := a.solve(t, x, dt)
		t.Logf("Δt = %4g h: residuals %.1e", dt, residuals)
		require.Less(t, residuals[len(residuals)-1], 1e-12, "converged")
		require.LessOrEqual(t, len(residuals), 9)
		quadratic(t, residuals)
		for i := range a.cells {
			a.cells[i].state = a.cells[i].result.State
		}
	}
}

// quadratic demands r_{k+1} <= C r_k² with one constant over the last steps above rounding. C is the curvature of the
// problem in units of the load: n²/2 with exponents up to 12.5 here, so 100 is generous; linear convergence with any ratio
// would exceed it as soon as r_k < 1e-3.
func quadratic(t *testing.T, residuals []float64) {
	t.Helper()
	for k := 1; k < len(residuals); k++ {
		if r := residuals[k-1]; r < 1e-2 && residuals[k] > 1e-12 {
			require.LessOrEqual(t, residuals[k], 100*r*r, "step %d of %v", k, residuals)
		}
	}
}
