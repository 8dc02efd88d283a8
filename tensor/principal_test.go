package tensor_test

import (
	"math"
	"math/rand/v2"
	"sort"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
)

// Budgets, in eps of the greatest principal value in magnitude. Forming the deviator, the cubic's root and the 2×2 block each
// err by a few halves of an eps; the greatest errors seen in the campaign (2.8 million values, 400,000 frames, one million
// residuals), with fused operations or without, are 4.0 for a value, 2.0 over the relative gap for a direction, between
// 4 and 8 for a component of a·v - λ v.
const (
	valueBudget     = 6
	directionBudget = 4
	residualBudget  = 8
)

// TestPrincipalHandValues are closed forms: principal stresses of the von Mises table (published-values.md 1.7), pure shear
// (±τ), the matrix of ones less the unit matrix (2, -1, -1), the second-difference matrix (2 + √2, 2, 2 - √2: its values
// are 2 - 2 cos kπ/4), and Mohr's circle (Mohr 1882) for 80, 20, 40: centre 50, radius 50.
func TestPrincipalHandValues(t *testing.T) {
	for _, c := range []struct {
		name string
		a    tensor.Sym
		want [3]float64
	}{
		{"diagonal", tensor.Sym{100, 300, 200}, [3]float64{300, 200, 100}},
		{"diagonal, mixed signs", tensor.Sym{-50, 80, 250}, [3]float64{250, 80, -50}},
		{"shear yz", tensor.Sym{tensor.YZ: 100}, [3]float64{100, 0, -100}},
		{"shear xz", tensor.Sym{tensor.XZ: -100}, [3]float64{100, 0, -100}},
		{"shear xy", tensor.Sym{tensor.XY: 100}, [3]float64{100, 0, -100}},
		{"three equal shears", tensor.Sym{0, 0, 0, 1, 1, 1}, [3]float64{2, -1, -1}},
		{"three equal shears, negative", tensor.Sym{0, 0, 0, -1, -1, -1}, [3]float64{1, 1, -2}},
		{"second difference", tensor.Sym{2, 2, 2, -1, 0, -1}, [3]float64{2 + math.Sqrt2, 2, 2 - math.Sqrt2}},
		{"Mohr's circle xy", tensor.Sym{80, 20, 30, 0, 0, 40}, [3]float64{100, 30, 0}},
		{"Mohr's circle yz", tensor.Sym{30, 80, 20, -40, 0, 0}, [3]float64{100, 30, 0}},
		{"Mohr's circle xz", tensor.Sym{20, 130, 80, 0, 40, 0}, [3]float64{130, 100, 0}},
		{"pressure", tensor.Identity().Scale(-7), [3]float64{-7, -7, -7}},
		{"zero", tensor.Sym{}, [3]float64{}},
	} {
		got := c.a.PrincipalValues()
		check.Slice(t, c.name, got[:], c.want[:], maxAbs(c.want[:]), valueBudget*eps)
		checkPrincipal(t, c.name, c.a)
	}
}

// TestPrincipalExact: components without shear come out exactly, and a multiple of the unit tensor keeps the axes x, y, z.
func TestPrincipalExact(t *testing.T) {
	values, directions := tensor.Sym{0.1, 0.3, 0.2}.Principal()
	assert.Equal(t, [3]float64{0.3, 0.2, 0.1}, values)
	assert.Equal(t, [3][3]float64{{0, 1, 0}, {0, 0, 1}, {1, 0, 0}}, directions)
	values, directions = tensor.Sym{4, 4, 4}.Principal()
	assert.Equal(t, [3]float64{4, 4, 4}, values)
	assert.Equal(t, [3][3]float64{{1, 0, 0}, {0, 1, 0}, {0, 0, 1}}, directions)
}

// wholeNumbers returns a tensor of whole numbers whose principal values and axes are known exactly: with M the whole-number
// matrix n q of a rotation q from a whole-number quaternion of square n, and K = diag(k), M K Mᵀ has the values n² k and the
// columns of M/n for axes. (Rational rotations after Euler; the construction makes no use of the code under test.)
func wholeNumbers(r *rand.Rand, k [3]float64) (a tensor.Sym, values [3]float64, axes [3][3]float64) {
	var w, x, y, z, n float64
	for n == 0 {
		w, x, y, z = float64(r.IntN(9)-4), float64(r.IntN(9)-4), float64(r.IntN(9)-4), float64(r.IntN(9)-4)
		n = w*w + x*x + y*y + z*z
	}
	m := [3][3]float64{
		{w*w + x*x - y*y - z*z, 2 * (x*y - w*z), 2 * (x*z + w*y)},
		{2 * (x*y + w*z), w*w - x*x + y*y - z*z, 2 * (y*z - w*x)},
		{2 * (x*z - w*y), 2 * (y*z + w*x), w*w - x*x - y*y + z*z},
	}
	var full [3][3]float64
	for i := range full {
		for j := range full {
			full[i][j] = m[i][0]*k[0]*m[j][0] + m[i][1]*k[1]*m[j][1] + m[i][2]*k[2]*m[j][2]
		}
	}
	for i := range values {
		values[i] = n * n * k[i]
		axes[i] = [3]float64{m[0][i] / n, m[1][i] / n, m[2][i] / n}
	}
	return tensor.SymFromMatrix(full), values, axes
}

// TestPrincipalAgainstExactValues measures the error over regions, nearly equal values above all, and prints the table.
// Every product in wholeNumbers is below 2^53 (n ≤ 64, k ≤ 2^38), so the reference has no error.
func TestPrincipalAgainstExactValues(t *testing.T) {
	const top = 1 << 38
	whole := func(r *rand.Rand) float64 { return float64(r.Int64N(2*top) - top) }
	regions := []struct {
		name string
		k    func(*rand.Rand) [3]float64
	}{
		{"any three values", func(r *rand.Rand) [3]float64 { return [3]float64{whole(r), whole(r), whole(r)} }},
		{"two values equal", func(r *rand.Rand) [3]float64 { k := whole(r); return [3]float64{k, k, whole(r)} }},
		{"two values apart by 4e-12 to 1e-6", func(r *rand.Rand) [3]float64 {
			k := float64(top - r.Int64N(1000))
			return [3]float64{k, k - float64(int(1)<<r.IntN(18)), whole(r)}
		}},
		{"all within 4e-10 of a great mean", func(r *rand.Rand) [3]float64 {
			return [3]float64{top - float64(r.IntN(100)), top - float64(r.IntN(100)), top - float64(r.IntN(100))}
		}},
		{"three values equal", func(r *rand.Rand) [3]float64 { k := whole(r); return [3]float64{k, k, k} }},
		{"one value only", func(r *rand.Rand) [3]float64 { return [3]float64{whole(r), 0, 0} }},
		{"sizes apart by up to 1e11", func(r *rand.Rand) [3]float64 { return [3]float64{whole(r), float64(r.IntN(1000)), 1} }},
	}
	r, cases := source(t, 4, 2000)
	for _, region := range regions {
		peak, sum := 0.0, 0.0
		for range cases {
			a, values, _ := wholeNumbers(r, region.k(r))
			exponent := r.IntN(1900) - 1000 // multiplying by a power of two changes nothing
			a = scaleByPowerOfTwo(a, exponent)
			sort.Sort(sort.Reverse(sort.Float64Slice(values[:])))
			got := a.PrincipalValues()
			for i := range got {
				err := math.Abs(math.Ldexp(got[i], -exponent)-values[i]) / max(maxAbs(values[:]), 1) / eps
				if !(err <= valueBudget) {
					t.Fatalf("%s: %v (scaled by 2^%d): got %v, want %v: %g eps", region.name, a, exponent, got, values, err)
				}
				peak, sum = max(peak, err), sum+err
			}
		}
		t.Logf("%-36s peak %4.2f eps, mean %5.3f eps of the greatest value", region.name, peak, sum/float64(3*cases))
	}
}

// TestPrincipalAxesAgainstExactValues holds the directions against exact axes: the angle between them is bounded by rounding
// divided by the relative gap to the nearest other value.
func TestPrincipalAxesAgainstExactValues(t *testing.T) {
	r, cases := source(t, 5, 2000)
	peak := 0.0
	for range cases {
		gap, far, base := math.Ldexp(1, r.IntN(36)), math.Ldexp(1, r.IntN(37)), math.Ldexp(1, r.IntN(38))
		k := [3]float64{base + gap, base, base - far}
		a, values, axes := wholeNumbers(r, k)
		_, got := a.Principal()
		for i := range got {
			along := got[i][0]*axes[i][0] + got[i][1]*axes[i][1] + got[i][2]*axes[i][2]
			sine := 0.0
			for j := range 3 {
				sine = max(sine, math.Abs(got[i][j]-math.Copysign(axes[i][j], along*axes[i][j])))
			}
			err := sine * (min(gap, far) / maxAbs(k[:])) / eps
			if !(err <= directionBudget) {
				t.Fatalf("a = %v, values %v: direction %v, want ±%v: %g eps over the relative gap", a, values, got[i], axes[i], err)
			}
			peak = max(peak, err)
		}
	}
	t.Logf("direction: peak %.2f eps over the relative gap", peak)
}

// TestPrincipalAgainstGonum uses the QR algorithm of gonum's EigenSym as reference. Its own error is some eps of the norm,
// hence the wider tolerance. Directions are held against the definition, in checkPrincipal.
func TestPrincipalAgainstGonum(t *testing.T) {
	r, cases := source(t, 6, 5000)
	for i := range cases {
		a := randomSym(r)
		if i%2 == 1 { // nearly degenerate: a pair apart by 1e-16 to 1 of a third value, in any frame
			w := r.NormFloat64()
			a = tensor.Sym{1, w, w + math.Pow(10, -16*r.Float64())}.Rotate(randomRotation(t, r)).Scale(a.Norm())
		}
		var eigen mat.EigenSym
		require.True(t, eigen.Factorize(mat.NewSymDense(3, dense3(a).RawMatrix().Data), false))
		want := eigen.Values(nil)
		sort.Sort(sort.Reverse(sort.Float64Slice(want)))
		got := a.PrincipalValues()
		check.Slice(t, "values", got[:], want, maxAbs(want), 16*eps)
		checkPrincipal(t, "random", a)
		if t.Failed() {
			t.Fatalf("a = %v", a)
		}
	}
}

// checkPrincipal holds Principal against what defines it: order, a rotation, and a·v = λ v.
func checkPrincipal(t *testing.T, name string, a tensor.Sym) {
	t.Helper()
	values, directions := a.Principal()
	assert.Equal(t, a.PrincipalValues(), values, "%s: values with and without directions", name)
	assert.True(t, values[0] >= values[1] && values[1] >= values[2], "%s: order of %v", name, values)
	assert.NoError(t, tensor.Rotation(directions).Check(8*eps), name) // five roundings or so in each axis
	m, size := a.Matrix(), max(math.Abs(values[0]), math.Abs(values[2]))
	for i, v := range directions {
		for j := range 3 {
			check.Scaled(t, name+": a·v = λ v", m[j][0]*v[0]+m[j][1]*v[1]+m[j][2]*v[2], values[i]*v[j], size, residualBudget*eps)
		}
	}
}

// TestPrincipalTurnsToDiagonal: the directions are a rotation to the principal axes.
func TestPrincipalTurnsToDiagonal(t *testing.T) {
	r, cases := source(t, 7, 2000)
	for range cases {
		a := randomSym(r)
		values, directions := a.Principal()
		got := a.Rotate(tensor.Rotation(directions))
		want := tensor.Sym{values[0], values[1], values[2]}
		check.Slice(t, "turned", got[:], want[:], a.Norm(), 16*eps)
		if t.Failed() {
			t.Fatalf("a = %v", a)
		}
	}
}

// TestPrincipalInvariants holds the values against invariants that need no eigenvalues: trace, norm and determinant.
func TestPrincipalInvariants(t *testing.T) {
	r, cases := source(t, 8, 2000)
	for range cases {
		a := randomSym(r)
		w, size := a.PrincipalValues(), a.Norm()
		check.Scaled(t, "trace", w[0]+w[1]+w[2], a.Trace(), size, 8*eps)
		check.Scaled(t, "norm", math.Sqrt(w[0]*w[0]+w[1]*w[1]+w[2]*w[2]), size, size, 8*eps)
		check.Scaled(t, "determinant", w[0]*w[1]*w[2], mat.Det(dense3(a)), size*size*size, 16*eps)
		check.Scaled(t, "Mises", tensor.Sym{w[0], w[1], w[2]}.Mises(), a.Mises(), size, 16*eps)
		if t.Failed() {
			t.Fatalf("a = %v", a)
		}
	}
}

// TestPrincipalRange: the ends of float64, where a square or a sum would overflow or vanish.
func TestPrincipalRange(t *testing.T) {
	ones := tensor.Sym{0, 0, 0, 1, 1, 1} // values 2, -1, -1
	for _, size := range []float64{5e-324, 1e-310, 1e-200, 1e200, 8e307} {
		w := ones.Scale(size).PrincipalValues()
		unit := max(valueBudget*eps*2*size, 2*5e-324) // or two of the smallest numbers
		check.Abs(t, "greatest", w[0], 2*size, unit)
		check.Abs(t, "middle", w[1], -size, unit)
		check.Abs(t, "least", w[2], -size, unit)
	}
	w := tensor.Sym{math.MaxFloat64, -math.MaxFloat64, math.MaxFloat64}.PrincipalValues()
	assert.Equal(t, [3]float64{math.MaxFloat64, math.MaxFloat64, -math.MaxFloat64}, w)
	w = tensor.Sym{tensor.XY: math.MaxFloat64}.PrincipalValues()
	assert.Equal(t, [3]float64{math.MaxFloat64, 0, -math.MaxFloat64}, w)
	w = ones.Scale(math.MaxFloat64).PrincipalValues() // twice the greatest number
	assert.True(t, math.IsInf(w[0], 1))
	// A shear 1e-250 of the pressure it stands on still has its directions.
	_, v := tensor.Sym{1e50, 1e50, 1e50, 1e-200, 1e-200, 1e-200}.Principal()
	for i := range 3 {
		check.Abs(t, "direction of equal shears", math.Abs(v[0][i]), math.Sqrt(1./3), 8*eps)
	}
}

// TestPrincipalScales: a power of two multiplies the values and leaves the directions, to the bit, wherever the squares
// and cubes on the way need a scale of their own.
func TestPrincipalScales(t *testing.T) {
	r, cases := source(t, 9, 2000)
	for range cases {
		var a tensor.Sym
		for i := range a {
			a[i] = math.Ldexp(r.NormFloat64(), r.IntN(20)) // one component may dominate
		}
		values, directions := a.Principal()
		exponent := r.IntN(1900) - 900 // up to the greatest number
		got, same := scaleByPowerOfTwo(a, exponent).Principal()
		for i := range values {
			require.Equal(t, math.Ldexp(values[i], exponent), got[i], "a = %v, exponent %d", a, exponent)
		}
		require.Equal(t, directions, same, "a = %v, exponent %d", a, exponent)
	}
}

// TestPrincipalNotFinite: one bad component makes every result NaN.
func TestPrincipalNotFinite(t *testing.T) {
	for i := range 6 {
		for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
			for _, a := range []tensor.Sym{{1, 2, 3, 4, 5, 6}, {1, 2, 3}} {
				a[i] = bad
				values, directions := a.Principal()
				for j := range 3 {
					assert.True(t, math.IsNaN(values[j]), "value of %v", a)
					for k := range 3 {
						assert.True(t, math.IsNaN(directions[j][k]), "direction of %v", a)
					}
				}
			}
		}
	}
}

func scaleByPowerOfTwo(a tensor.Sym, exponent int) tensor.Sym {
	for i := range a {
		a[i] = math.Ldexp(a[i], exponent)
	}
	return a
}
