package bench_test

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// Primary creep starts with an infinite rate, so its studies use steps that grow from nothing, the k-th end at (k/n)⁶ of the
// time: with equal steps the first one alone leaves an error of first order times the logarithm of n.
const grading = 6

var allComponents = []int{tensor.XX, tensor.YY, tensor.ZZ, tensor.YZ, tensor.XZ, tensor.XY}

// creepOnly returns the creep strain tensor and the equivalent creep strain.
func creepOnly(out integrate.Result, _ tensor.Sym) []float64 {
	return append(slice(out.State.Creep), out.State.Equivalent)
}

// multiaxial turns an equivalent creep strain under a constant stress into what creepOnly returns.
func multiaxial(stress tensor.Sym, equivalent float64) []float64 {
	return append(slice(stress.Deviator().Scale(1.5*equivalent/stress.Mises())), equivalent)
}

// TestSteadyCreepIsExact prescribes all six stresses. A rate that does not change is integrated exactly by any step.
func TestSteadyCreepIsExact(t *testing.T) {
	const young, poisson, hours = 150e3, 0.3, 1000
	mises := generalStress.Mises()
	sinh, err := creeplaw.NewGarofalo(1e-9, 0.02, 3)
	for _, c := range []struct {
		name     string
		material *integrate.Material
		creep    float64
	}{
		{"Norton", nortonMaterial(t, young, poisson, 1e-16, 5),
			bench.NortonCreep{Stress: mises, Law: norton(1e-16, 5)}.CreepAt(hours)},
		{"Garofalo", material(t, young, poisson, sinh, err),
			bench.GarofaloCreep{Stress: mises, Law: bench.Garofalo{Prefactor: 1e-9, Coefficient: 0.02, Exponent: 3}}.CreepAt(hours)},
	} {
		for _, steps := range []int{1, 7} {
			h := &host{material: c.material, free: allComponents, load: fixed(loading{stress: generalStress})}
			out, strain, err := h.run(uniform(hours, steps))
			require.NoError(t, err)
			want := multiaxial(generalStress, c.creep)
			// The host's Newton leaves 1e-10 squared; the rate multiplies rounding of the stress by n.
			check.Slice(t, c.name, creepOnly(out, strain), want, c.creep, 1e-12)
			check.Slice(t, c.name+", stress", slice(out.Stress), slice(generalStress), mises, 1e-12)
			t.Logf("%s, %d steps: host Newton at most %d iterations", c.name, steps, h.mostIterations)
		}
	}
}

// TestPrimaryCreepConverges prescribes all six stresses: Bailey and Norton's curve A σⁿ tᵐ from zero creep strain, the direct
// rate form, and a sum of primary and secondary rates.
func TestPrimaryCreepConverges(t *testing.T) {
	const young, poisson, hours = 150e3, 0.3, 1000
	mises := generalStress.Mises()
	curve, err := creeplaw.NewBaileyNorton(1e-15, 5, 0.4)
	require.NoError(t, err)
	steep, err := creeplaw.NewBaileyNorton(1e-15, 5, 0.1)
	require.NoError(t, err)
	direct, err := creeplaw.NewStrainHardeningAt(1e-6, 200, 1e-3, 4, -2)
	require.NoError(t, err)
	steady, err := creeplaw.NewNorton(3e-17, 5)
	require.NoError(t, err)
	sum, err := creeplaw.NewSum(curve, steady)
	require.NoError(t, err)
	for _, c := range []struct {
		name  string
		law   creeplaw.Law
		creep float64
	}{
		{"m = 0.4", curve, bench.BaileyNortonCreep{Stress: mises, Curve: bailey(1e-15, 5, 0.4)}.CreepAt(hours)},
		{"m = 0.1", steep, bench.BaileyNortonCreep{Stress: mises, Curve: bailey(1e-15, 5, 0.1)}.CreepAt(hours)},
		{"k = -2", direct, bench.StrainHardeningCreep{Stress: mises, Law: bench.StrainHardening{Rate: 1e-6, Stress: 200,
			Strain: 1e-3, StressExponent: 4, StrainExponent: -2}}.CreepAt(hours)},
		{"sum", sum, bench.ParallelCreep{Stress: mises, Primary: bailey(1e-15, 5, 0.4), Secondary: norton(3e-17, 5)}.CreepAt(hours)},
	} {
		t.Run(c.name, func(t *testing.T) {
			h := &host{material: material(t, young, poisson, c.law, nil), free: allComponents,
				load: fixed(loading{stress: generalStress})}
			want := expectation{multiaxial(generalStress, c.creep), c.creep, 128, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return graded(0, hours, n, grading) }, creepOnly)
		})
	}
}

// TestStrainHardeningRelaxationConverges holds a bar and lets primary creep relax it.
func TestStrainHardeningRelaxationConverges(t *testing.T) {
	const young, stress, hours = 150e3, 200.0, 100
	for _, m := range []float64{0.4, 0.5} {
		t.Run(fmt.Sprintf("m = %g", m), func(t *testing.T) {
			p := valid(t, bench.StrainHardeningRelaxation{Young: young, Stress: stress, Curve: bailey(1e-15, 5, m)})
			law, err := creeplaw.NewBaileyNorton(1e-15, 5, m)
			h := &host{material: material(t, young, 0.3, law, err), free: sides,
				load: fixed(loading{strain: tensor.Sym{tensor.XX: stress / young}})}
			want := expectation{[]float64{p.StressAt(hours), 0, 0, 0, 0, 0}, stress, 128, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return graded(0, hours, n, grading) }, stressOnly)
		})
	}
}

// TestTwoStepsConverge changes the uniaxial stress once. The library's history is the creep strain, so strain hardening is
// the answer; time hardening must be out of reach.
func TestTwoStepsConverge(t *testing.T) {
	for _, p := range []bench.TwoStepCreep{
		{First: 100, Change: 100, Second: 150, Curve: bailey(1e-12, 4, 0.4)},
		{First: 150, Change: 100, Second: 100, Curve: bailey(1e-12, 4, 0.4)},
	} {
		t.Run(fmt.Sprintf("%g to %g", p.First, p.Second), func(t *testing.T) {
			const until = 300
			law, err := creeplaw.NewBaileyNorton(1e-12, 4, 0.4)
			h := &host{material: material(t, 150e3, 0.3, law, err), free: allComponents, load: func(t float64) loading {
				if t <= p.Change {
					return loading{stress: tensor.Sym{tensor.XX: p.First}}
				}
				return loading{stress: tensor.Sym{tensor.XX: p.Second}}
			}}
			exact := p.StrainHardeningAt(until)
			want := expectation{multiaxial(tensor.Sym{tensor.XX: 1}, exact), exact, 128, 4, orders, limit}
			s := study(t, h, want, func(n int) []float64 {
				return append(graded(0, p.Change, n, grading), graded(p.Change, until, n, grading)...)
			}, creepOnly)
			clock := p.TimeHardeningAt(until)
			if got := s.Extrapolated()[6]; !(got > clock*1.05 || got < clock*0.95) { // 9 % apart in the nearer case
				t.Errorf("the result %v is that of time hardening, %v", got, clock)
			}
		})
	}
}
