package bench_test

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/lapack/lapack64"
	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// denseNewton is the Norton step as one would write it with a general-purpose matrix library alone: seven unknowns, the six
// stress components and Δp, Newton's method with the analytic Jacobian and its LU factors, the tangent from the inverse
// Jacobian at the solution. Equations, in strain:
//
//	(σ - σ_trial)/E + (3G/E) Δp s/σₑ = 0,   Δp - Δt A σₑⁿ = 0
//
// All buffers are kept between steps; the matrices are filled through their backing slices.
type denseNewton struct {
	young, bulk, shear  float64
	prefactor, exponent float64

	jacobian           *mat.Dense
	residual, change   *mat.Dense // 7×1
	byStrain, response *mat.Dense // 7×6
	lu                 factors
}

// factors are the LU factors of a matrix.
type factors interface {
	factorize(a *mat.Dense)
	solve(x, b *mat.Dense) error
}

// matLU is gonum's LU type, which also estimates the condition number.
type matLU struct{ mat.LU }

func (f *matLU) factorize(a *mat.Dense)      { f.Factorize(a) }
func (f *matLU) solve(x, b *mat.Dense) error { return f.SolveTo(x, false, b) }

// bareLU calls the two LAPACK routines and nothing else.
type bareLU struct {
	lu    *mat.Dense
	pivot [7]int
	ok    bool
}

func (f *bareLU) factorize(a *mat.Dense) {
	f.lu.Copy(a)
	f.ok = lapack64.Getrf(f.lu.RawMatrix(), f.pivot[:])
}

func (f *bareLU) solve(x, b *mat.Dense) error {
	if !f.ok {
		return errDenseNewton
	}
	x.Copy(b)
	lapack64.Getrs(blas.NoTrans, f.lu.RawMatrix(), x.RawMatrix(), f.pivot[:])
	return nil
}

func newDenseNewton(young, poisson, prefactor, exponent float64, lu factors) *denseNewton {
	return &denseNewton{
		young: young, bulk: young / (3 * (1 - 2*poisson)), shear: young / (2 * (1 + poisson)),
		prefactor: prefactor, exponent: exponent,
		jacobian: mat.NewDense(7, 7, nil), residual: mat.NewDense(7, 1, nil), change: mat.NewDense(7, 1, nil),
		byStrain: mat.NewDense(7, 6, nil), response: mat.NewDense(7, 6, nil), lu: lu,
	}
}

var errDenseNewton = errors.New("dense Newton: no convergence")

func (n *denseNewton) step(out *integrate.Result, old *integrate.State, inc *integrate.Increment) error {
	var elastic tensor.Tangent
	elastic.SetIsotropic(n.bulk, n.shear)
	trial := elastic.Contract(inc.Strain.Sub(old.Creep))
	stress, dp := trial, 0.0
	change := n.change.RawMatrix().Data
	size := trial.Mises() / n.young
	const tolerance = 1e-13
	for iteration := 0; ; iteration++ {
		worst := n.assemble(&stress, &trial, dp, inc.Dt)
		n.lu.factorize(n.jacobian)
		if worst <= tolerance*size {
			break
		}
		if iteration == 50 {
			return errDenseNewton
		}
		if err := n.lu.solve(n.change, n.residual); err != nil {
			return err
		}
		for i := range stress {
			stress[i] -= change[i]
		}
		dp -= change[6]
	}
	rhs := n.byStrain.RawMatrix().Data
	for i := range elastic {
		for j := range elastic[i] {
			rhs[6*i+j] = elastic[i][j] / n.young
		}
	}
	if err := n.lu.solve(n.response, n.byStrain); err != nil {
		return err
	}
	data := n.response.RawMatrix().Data
	for i := range out.Tangent {
		copy(out.Tangent[i][:], data[6*i:6*i+6])
	}
	out.Stress, out.CreepStep = stress, dp
	out.State.Equivalent = old.Equivalent + dp
	out.State.Creep = old.Creep.Add(stress.Deviator().Scale(1.5 * dp / stress.Mises()))
	return nil
}

// assemble fills residual and Jacobian and returns the greatest residual.
func (n *denseNewton) assemble(stress, trial *tensor.Sym, dp, dt float64) float64 {
	s, mises := stress.Deviator(), stress.Mises()
	rate := n.prefactor * math.Pow(mises, n.exponent)
	flow := 3 * n.shear / n.young / mises
	r, jac := n.residual.RawMatrix().Data, n.jacobian.RawMatrix().Data
	worst := 0.0
	for i := 0; i < 6; i++ {
		r[i] = (stress[i]-trial[i])/n.young + flow*dp*s[i]
		worst = math.Max(worst, math.Abs(r[i]))
		row := jac[7*i : 7*i+7]
		for j := 0; j < 6; j++ {
			bySigma := 1.5 * s[j] / mises // ∂σₑ/∂σⱼ
			if j >= tensor.YZ {
				bySigma *= 2
			}
			row[j] = -flow * dp * s[i] * bySigma / mises
			if i < 3 && j < 3 {
				row[j] -= flow * dp / 3
			}
		}
		row[i] += 1/n.young + flow*dp
		row[6] = flow * s[i]
	}
	r[6] = dp - dt*rate
	last := jac[42:49]
	for j := 0; j < 6; j++ {
		last[j] = -dt * n.exponent * rate / mises * 1.5 * s[j] / mises
		if j >= tensor.YZ {
			last[j] *= 2
		}
	}
	last[6] = 1
	return math.Max(worst, math.Abs(r[6]))
}

// TestDenseNewtonAgrees: what is timed against the library must solve the same step, tangent included. It is also a check of
// the library's step and tangent by an unlike method.
func TestDenseNewtonAgrees(t *testing.T) {
	c := speedCases(t)[0]
	for name, lu := range denseFactors() {
		t.Run(name, func(t *testing.T) {
			agrees(t, &c, newDenseNewton(mixYoung, mixNu, 1e-15, 5, lu))
		})
	}
}

func denseFactors() map[string]factors {
	return map[string]factors{"mat.LU": &matLU{}, "lapack64": &bareLU{lu: mat.NewDense(7, 7, nil)}}
}

func agrees(t *testing.T, c *speedCase, dense *denseNewton) {
	var a, b integrate.Result
	for i := range c.points {
		p := &c.points[i]
		if err := c.material.Step(&a, &p.start, p.increment); err != nil {
			t.Fatal(err)
		}
		if err := dense.step(&b, &p.start, &p.increment); err != nil {
			t.Fatal(err)
		}
		// The dense residual is good to 1e-13 of the elastic strain in its own scaling; the stiffest points multiply it by up
		// to 1e4 between stress and creep.
		trial := 3 * dense.shear * p.increment.Strain.Sub(p.start.Creep).EquivalentStrain()
		check.Slice(t, "stress", slice(b.Stress), slice(a.Stress), trial, 1e-11)
		check.Scaled(t, "Δp", b.CreepStep, a.CreepStep, trial/mixYoung, 1e-11)
		for row := range a.Tangent {
			check.Slice(t, "tangent", b.Tangent[row][:], a.Tangent[row][:], mixYoung, 1e-9)
		}
		if t.Failed() {
			t.Fatalf("seed %d, point %d: %+v", mixSeed, i, *p)
		}
	}
}
