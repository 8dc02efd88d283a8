package tensor_test

import (
	"math"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
)

// TestMisesOfPrincipalStresses holds Mises against the table of steady creep rates, published-values.md section 1.7 (plain
// arithmetic on von Mises 1913 at 30 digits). The table has ten digits, hence the tolerance.
func TestMisesOfPrincipalStresses(t *testing.T) {
	for _, c := range []struct {
		principal [3]float64
		mises     float64
	}{
		{[3]float64{300, 200, 100}, 173.2050808},
		{[3]float64{250, -50, 80}, 260.5762844},
		{[3]float64{100, 100, 0}, 100},
		{[3]float64{100, -100, 0}, 173.2050808},
		{[3]float64{100, 50, 0}, 86.60254038},
	} {
		for shift := range 3 { // the order of the three must not matter
			p := c.principal
			s := tensor.Sym{p[shift], p[(shift+1)%3], p[(shift+2)%3]}
			check.Rel(t, "Mises", s.Mises(), c.mises, 5e-10)
		}
	}
}

// TestCreepRatesFromDeviator uses the same table: the rate by components is 3/2 A σe^(n-1) s, with A = 1e-15 and n = 5.
func TestCreepRatesFromDeviator(t *testing.T) {
	for _, c := range []struct{ stress, rate [3]float64 }{
		{[3]float64{300, 200, 100}, [3]float64{1.35e-4, 0, -1.35e-4}},
		{[3]float64{250, -50, 80}, [3]float64{1.083446350e-3, -9.9123815e-4, -9.22082e-5}},
		{[3]float64{100, 100, 0}, [3]float64{5e-6, 5e-6, -1e-5}},
		{[3]float64{100, -100, 0}, [3]float64{1.35e-4, -1.35e-4, 0}},
		{[3]float64{100, 50, 0}, [3]float64{4.21875e-6, 0, -4.21875e-6}},
	} {
		s := tensor.Sym{c.stress[0], c.stress[1], c.stress[2]}
		rate := s.Deviator().Scale(1.5e-15 * math.Pow(s.Mises(), 4))
		check.Slice(t, "rate", rate[:3], c.rate[:], maxAbs(c.rate[:]), 5e-9) // the table's digits
		check.Rel(t, "equivalent rate", rate.EquivalentStrain(), 1e-15*math.Pow(s.Mises(), 5), 8*eps)
	}
}

// TestGeneralStress is the start of the three-dimensional hold of published-values.md section 1.5, ten digits.
func TestGeneralStress(t *testing.T) {
	s := tensor.Sym{150, -20, 40, 35, 0, 60}
	check.Rel(t, "Mises", s.Mises(), 191.7680891, 5e-10)
	check.Rel(t, "mean", s.Mean(), 56.66666667, 5e-10)
	assert.Equal(t, 170., s.Trace())
}

// TestSpecialStates are the definitions of the equivalents: in tension the stress or the strain itself, in shear √3 τ and
// γ/√3, and nothing under a mean stress alone.
func TestSpecialStates(t *testing.T) {
	for axis := tensor.XX; axis <= tensor.ZZ; axis++ {
		var s tensor.Sym
		s[axis] = -250
		assert.Equal(t, 250., s.Mises())
		e := tensor.Sym{-0.005, -0.005, -0.005} // isochoric tension: half the axial strain, contracting, across
		e[axis] = 0.01
		check.ULP(t, "equivalent strain in tension", e.EquivalentStrain(), 0.01, 2)
	}
	for shear := tensor.YZ; shear <= tensor.XY; shear++ {
		var s, e tensor.Sym
		s[shear] = -70
		e[shear] = 0.003 / 2 // engineering shear 0.003
		check.ULP(t, "Mises in shear", s.Mises(), 70*math.Sqrt(3), 2)
		check.ULP(t, "equivalent strain in shear", e.EquivalentStrain(), 0.003/math.Sqrt(3), 2)
	}
	p := tensor.Identity().Scale(-0.1)
	assert.Zero(t, p.Mises())
	assert.Zero(t, p.EquivalentStrain())
	assert.Equal(t, tensor.Sym{}, p.Deviator())
}

// TestAgainstMatrices holds the arithmetic against gonum's on the full 3×3 matrices, and against the definitions of the
// equivalents, √(3/2 s:s) and √(2/3 e:e), computed there. Nine products and sums round to within 16 eps of the norm; the
// deviator that gonum forms by subtracting the mean errs by as much of a's norm, not of its own.
func TestAgainstMatrices(t *testing.T) {
	r, cases := source(t, 1, 3000)
	for range cases {
		a, b, k := randomSym(r), randomSym(r), r.NormFloat64()
		ma, mb := dense3(a), dense3(b)
		var sum, diff, scaled, product, s mat.Dense
		sum.Add(ma, mb)
		diff.Sub(ma, mb)
		scaled.Scale(k, ma)
		product.Mul(ma, mb.T())
		require.Equal(t, symOf(&sum), a.Add(b))
		require.Equal(t, symOf(&diff), a.Sub(b))
		require.Equal(t, symOf(&scaled), a.Scale(k))
		norm := mat.Norm(ma, 2)
		check.Scaled(t, "norm", a.Norm(), norm, norm, 16*eps)
		check.Scaled(t, "dot", a.Dot(b), mat.Trace(&product), norm*mat.Norm(mb, 2), 16*eps)
		check.Scaled(t, "trace", a.Trace(), mat.Trace(ma), norm, 8*eps)
		check.Scaled(t, "mean", a.Mean(), mat.Trace(ma)/3, norm, 8*eps)

		s.Sub(ma, dense3(tensor.Identity().Scale(mat.Trace(ma)/3)))
		got, want := a.Deviator(), symOf(&s)
		check.Slice(t, "deviator", got[:], want[:], norm, 8*eps)
		check.Scaled(t, "Mises", a.Mises(), math.Sqrt(1.5)*mat.Norm(&s, 2), norm, 32*eps)
		check.Scaled(t, "equivalent strain", a.EquivalentStrain(), math.Sqrt(2./3)*mat.Norm(&s, 2), norm, 32*eps)
		if t.Failed() {
			t.Fatalf("a = %v, b = %v", a, b)
		}
	}
}

// TestPressureCostsNoDigits adds a mean stress 2^k times a stress whose components are small whole numbers, so that the sum
// is exact and Mises and the deviator may not change by a single bit.
func TestPressureCostsNoDigits(t *testing.T) {
	r, cases := source(t, 2, 2000)
	for range cases {
		var a tensor.Sym
		for i := range a {
			a[i] = float64(r.IntN(2001) - 1000)
		}
		p := math.Ldexp(float64(r.IntN(3)-1), 20+r.IntN(22))
		under := a.Add(tensor.Identity().Scale(p))
		require.Equal(t, a.Mises(), under.Mises(), "a = %v, pressure %v", a, -p)
		require.Equal(t, a.EquivalentStrain(), under.EquivalentStrain(), "a = %v, pressure %v", a, -p)
		require.Equal(t, a.Deviator(), under.Deviator(), "a = %v, pressure %v", a, -p)
	}
}

// TestPressureMayRound adds any mean stress: what changes is bounded by the rounding of the components when they are
// formed, half an ulp of each, through |∂σe/∂σ| = √(3/2).
func TestPressureMayRound(t *testing.T) {
	r, cases := source(t, 3, 2000)
	for range cases {
		a := randomSym(r)
		p := a.Norm() * math.Pow(10, 12*r.Float64()) * (2*r.Float64() - 1)
		under := a.Add(tensor.Identity().Scale(p))
		size := a.Norm() + math.Abs(p)
		check.Scaled(t, "Mises", under.Mises(), a.Mises(), size, 4*eps)
		check.Scaled(t, "trace of the deviator", under.Deviator().Trace(), 0, under.Mises(), 4*eps)
		if t.Failed() {
			t.Fatalf("a = %v, pressure %v", a, -p)
		}
	}
}

// TestMisesRange holds the range that the documentation states: scaling by a power of two is exact inside it.
func TestMisesRange(t *testing.T) {
	s := tensor.Sym{150, -20, 40, 35, 0, 60}
	for _, exponent := range []int{-480, -400, -100, 100, 400, 500} { // stresses from 1e-143 to 1e153
		k := math.Ldexp(1, exponent)
		assert.Equal(t, s.Mises()*k, s.Scale(k).Mises(), "2^%d", exponent)
	}
	assert.True(t, math.IsInf(tensor.Sym{1e155}.Mises(), 1))
	assert.Zero(t, tensor.Sym{1e-170}.Mises())
}

// TestNotFinite: each bad component, one at a time, is seen by IsFinite and passed on by the equivalents.
func TestNotFinite(t *testing.T) {
	good := tensor.Sym{1, -2, 3, -4, 5, math.MaxFloat64}
	assert.True(t, good.IsFinite())
	assert.True(t, tensor.Sym{}.IsFinite())
	for i := range good {
		for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
			a := tensor.Sym{1, -2, 3, -4, 5, 6}
			a[i] = bad
			assert.False(t, a.IsFinite(), "%v at %d", bad, i)
			for name, v := range map[string]float64{"Mises": a.Mises(), "EquivalentStrain": a.EquivalentStrain(), "Norm": a.Norm()} {
				assert.True(t, math.IsNaN(v) || math.IsInf(v, 1), "%s of %v at %d is %v", name, bad, i, v)
			}
		}
	}
	assert.True(t, math.IsNaN(tensor.Sym{tensor.YZ: math.NaN()}.Mises()))
}

// TestMatrix: the components sit where their names say, and the symmetric part comes back.
func TestMatrix(t *testing.T) {
	a := tensor.Sym{1, 2, 3, 4, 5, 6}
	m := a.Matrix()
	assert.Equal(t, [3][3]float64{{1, 6, 5}, {6, 2, 4}, {5, 4, 3}}, m)
	assert.Equal(t, a, tensor.SymFromMatrix(m))
	// A spin on top is dropped: its antisymmetric part is ±1, ±2, ±3.
	assert.Equal(t, a, tensor.SymFromMatrix([3][3]float64{{1, 6 + 1, 5 + 2}, {6 - 1, 2, 4 + 3}, {5 - 2, 4 - 3, 3}}))
	tiny := tensor.Sym{tensor.XY: 5e-324} // the smallest number has no half
	assert.Equal(t, tiny, tensor.SymFromMatrix(tiny.Matrix()))
}

// TestArgumentsStay: methods on values leave their operands alone.
func TestArgumentsStay(t *testing.T) {
	a := tensor.Sym{1, 2, 3, 4, 5, 6}
	b := a
	_ = a.Add(b).Sub(a).Scale(3).Deviator().Rotate(tensor.IdentityRotation())
	a.Principal()
	assert.Equal(t, b, a)
}

func dense3(a tensor.Sym) *mat.Dense {
	m := a.Matrix()
	return mat.NewDense(3, 3, append(append(append([]float64{}, m[0][:]...), m[1][:]...), m[2][:]...))
}

func symOf(m mat.Matrix) tensor.Sym {
	return tensor.Sym{m.At(0, 0), m.At(1, 1), m.At(2, 2), m.At(1, 2), m.At(0, 2), m.At(0, 1)}
}
