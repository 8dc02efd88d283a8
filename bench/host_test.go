package bench_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/bench"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// host is a one-point simulation code around the library's step: some strain components are prescribed, the others are free
// and found by Newton's method with the library's tangent so that their stresses are what the load asks for.
type host struct {
	material *integrate.Material
	free     []int                   // components whose stress is prescribed
	load     func(t float64) loading // at the end of a step
	spring   tensor.Sym              // stiffness of elastic surroundings pulling at a free component [stress per strain]

	mostIterations int // of the host's Newton, over all steps
}

// loading prescribes the strain of the components that are not free and the stress of those that are. Surroundings add
// -spring·(ε - anchor) to the stress.
type loading struct{ strain, stress, anchor tensor.Sym }

// run marches from virgin material through the ends of the steps and returns the last result and total strain.
func (h *host) run(ends []float64) (out integrate.Result, strain tensor.Sym, err error) {
	last := 0.0
	for _, end := range ends {
		increment := integrate.Increment{Dt: end - last, Temperature: 800, Strain: strain}
		if err := h.step(&out, &increment, h.load(end)); err != nil {
			return out, strain, fmt.Errorf("at time %v: %w", end, err)
		}
		last, strain = end, increment.Strain
	}
	return out, strain, nil
}

// step finds the free strains. out.State is the state at the start and is replaced.
func (h *host) step(out *integrate.Result, inc *integrate.Increment, l loading) error {
	start := out.State
	free := tensor.Sym{}
	for _, i := range h.free {
		free[i] = 1
	}
	for i := range l.strain {
		if free[i] == 0 {
			inc.Strain[i] = l.strain[i]
		}
	}
	n := len(h.free)
	for iteration := 0; ; iteration++ {
		if err := h.material.Step(out, &start, *inc); err != nil {
			return err
		}
		if n == 0 {
			return nil
		}
		jacobian, unbalanced := mat.NewDense(n, n, nil), mat.NewVecDense(n, nil)
		for a, i := range h.free {
			unbalanced.SetVec(a, l.stress[i]-out.Stress[i]-h.spring[i]*(inc.Strain[i]-l.anchor[i]))
			for b, j := range h.free {
				jacobian.Set(a, b, out.Tangent[i][j]*shearTwice(j))
			}
			jacobian.Set(a, a, jacobian.At(a, a)+h.spring[i])
		}
		var change mat.VecDense
		if err := change.SolveVec(jacobian, unbalanced); err != nil {
			return err
		}
		size, moved := 0.0, 0.0
		for a, i := range h.free {
			inc.Strain[i] += change.AtVec(a)
			size, moved = max(size, math.Abs(inc.Strain[i])), max(moved, math.Abs(change.AtVec(a)))
		}
		h.mostIterations = max(h.mostIterations, iteration)
		// Quadratic convergence leaves the square of this behind. The last correction is made good by one more update.
		if moved <= 1e-10*size {
			return h.material.Step(out, &start, *inc)
		}
		if !(iteration < 50) {
			return fmt.Errorf("the host's Newton has not converged: last correction %v of strain %v", moved, size)
		}
	}
}

// shearTwice is 2 for a shear column of a tangent that acts on tensor components.
func shearTwice(component int) float64 {
	if component >= tensor.YZ {
		return 2
	}
	return 1
}

// uniform returns the ends of n equal steps up to a time.
func uniform(until float64, n int) []float64 { return graded(0, until, n, 1) }

// graded returns the ends of n steps from a time to another, k-th end at from + (until-from)(k/n)^power: small steps first,
// for solutions that start with a power of time.
func graded(from, until float64, n int, power float64) []float64 {
	ends := make([]float64, n)
	for k := range ends {
		ends[k] = from + (until-from)*math.Pow(float64(k+1)/float64(n), power)
	}
	return ends
}

// material is an elastic constant pair with a law, or the end of the test.
func material(t *testing.T, young, poisson float64, law creeplaw.Law, err error) *integrate.Material {
	t.Helper()
	require.NoError(t, err)
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
	require.NoError(t, err)
	return m
}

func nortonMaterial(t *testing.T, young, poisson, prefactor, exponent float64) *integrate.Material {
	t.Helper()
	law, err := creeplaw.NewNorton(prefactor, exponent)
	return material(t, young, poisson, law, err)
}

// fixed is a load that does not change.
func fixed(l loading) func(float64) loading { return func(float64) loading { return l } }

// study runs a host at halved steps, prints the table, and asserts observed orders and the extrapolated error.
func study(t *testing.T, h *host, want expectation, ends func(steps int) []float64,
	pick func(integrate.Result, tensor.Sym) []float64) bench.Study {
	t.Helper()
	s, err := bench.Halve(want.exact, want.scale, want.first, want.halvings, func(steps int) ([]float64, error) {
		out, strain, err := h.run(ends(steps))
		return pick(out, strain), err
	})
	require.NoError(t, err)
	t.Logf("%s (host Newton at most %d iterations)\n%v", t.Name(), h.mostIterations, s)
	for i, order := range s.Orders() {
		if !(math.Abs(order-1) <= want.order) {
			t.Errorf("observed order %v of halving %d is not 1 ± %v", order, i, want.order)
		}
	}
	if e := s.ExtrapolatedError(); !(e <= want.limit) {
		t.Errorf("the extrapolated result is off by %v, allowed %v", e, want.limit)
	}
	return s
}

// expectation is the answer of a study and what is asked of the way to it.
type expectation struct {
	exact           []float64
	scale           float64 // that errors are relative to
	first, halvings int
	order           float64 // greatest deviation of an observed order from 1
	limit           float64 // greatest error of the extrapolated result
}
