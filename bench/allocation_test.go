package bench_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// TestStepAllocatesNothing counts allocations of the timed steps over their whole mix.
func TestStepAllocatesNothing(t *testing.T) {
	for _, c := range speedCases(t) {
		var out integrate.Result
		failed := 0
		count := testing.AllocsPerRun(3, func() {
			for i := range c.points {
				if c.material.Step(&out, &c.points[i].start, c.points[i].increment) != nil {
					failed++
				}
			}
		})
		assert.Zero(t, count, c.name)
		assert.Zero(t, failed, c.name)
	}
}

// failure is a step that is refused.
type failure struct {
	code      integrate.Code
	material  *integrate.Material
	start     integrate.State
	increment integrate.Increment
}

// failures reaches every code.
func failures(t *testing.T) []failure {
	t.Helper()
	norton, err := creeplaw.NewNorton(1e-15, 5)
	require.NoError(t, err)
	table, err := integrate.NewTable([]float64{700, 900}, []float64{160e3, 150e3})
	require.NoError(t, err)
	build := func(young integrate.Table, law creeplaw.Law) *integrate.Material {
		m, err := integrate.New(integrate.Isotropic{Young: young, Poisson: integrate.Constant(0.3)}, law, integrate.Options{})
		require.NoError(t, err)
		return m
	}
	steel := integrate.Constant(150e3)
	undefined := creeplaw.RateFunc(func(creeplaw.Point) creeplaw.Rate { return creeplaw.Rate{Value: math.NaN()} })
	// A rate that jumps by a factor of 1e6 at half the trial stress: no stress meets it, and the residual changes sign
	// without a zero.
	jump := creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		if p.Stress > 100 {
			return creeplaw.Rate{Value: 1e-3}
		}
		return creeplaw.Rate{Value: 1e-9}
	})
	// Softening ṗ = A σ⁵ exp(500 p): in this step the creep strain runs away.
	softening := creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		rate := 1e-15 * math.Pow(p.Stress, 5) * math.Exp(5e4*p.Strain)
		return creeplaw.Rate{Value: rate, ByStress: 5 * rate / p.Stress, ByStrain: 5e4 * rate}
	})
	strain := tensor.Sym{1e-3, -5e-4, -5e-4} // σₑ = 173 MPa
	fine := integrate.Increment{Dt: 1, Strain: strain, Temperature: 800}
	return []failure{
		{integrate.BadIncrement, build(steel, norton), integrate.State{}, integrate.Increment{Dt: -1, Strain: strain, Temperature: 800}},
		{integrate.BadState, build(steel, norton), integrate.State{Equivalent: -1}, fine},
		{integrate.OutsideTable, build(table, norton), integrate.State{}, integrate.Increment{Dt: 1, Strain: strain, Temperature: 600}},
		{integrate.LawUndefined, build(steel, undefined), integrate.State{}, fine},
		{integrate.NoConvergence, build(steel, jump), integrate.State{}, fine},
		{integrate.BeyondRupture, build(steel, softening), integrate.State{}, integrate.Increment{Dt: 1e3, Strain: strain, Temperature: 800}},
	}
}

// TestFailureAllocatesNothing refuses a step for every reason there is: the code comes back, nothing is allocated, nothing is
// written.
func TestFailureAllocatesNothing(t *testing.T) {
	for _, f := range failures(t) {
		out := integrate.Result{CreepStep: 42, Stress: tensor.Sym{1, 2, 3}}
		untouched := out
		err := f.material.Step(&out, &f.start, f.increment)
		if !assert.Equal(t, f.code, err) {
			continue
		}
		assert.Equal(t, untouched, out, "%v: the result was written", f.code)
		wrong := 0
		count := testing.AllocsPerRun(100, func() {
			if err := f.material.Step(&out, &f.start, f.increment); err != f.code || integrate.Recoverable(err) != integrate.Recoverable(f.code) {
				wrong++
			}
		})
		assert.Zero(t, count, "%v allocates", f.code)
		assert.Zero(t, wrong, "%v", f.code)
	}
}
