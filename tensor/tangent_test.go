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

// TestIsotropicHandValues: Hooke's law in E and ν (Timoshenko and Goodier, Theory of Elasticity, from memory):
// σ_xx = E/((1+ν)(1-2ν)) ((1-ν) ε_xx + ν (ε_yy + ε_zz)), τ_xy = G γ_xy, and tension alone under the strains 1, -ν, -ν.
func TestIsotropicHandValues(t *testing.T) {
	const e, nu = 200000., 0.3
	c := isotropic(e, nu)
	k := e / ((1 + nu) * (1 - 2*nu))
	check.Rel(t, "C_xxxx", c[tensor.XX][tensor.XX], k*(1-nu), 8*eps)
	check.Rel(t, "C_xxyy", c[tensor.XX][tensor.YY], k*nu, 8*eps)
	check.Rel(t, "C_xyxy", c[tensor.XY][tensor.XY], e/(2*(1+nu)), 8*eps)
	assert.Zero(t, c[tensor.XX][tensor.XY])
	assert.True(t, c.IsSymmetric(0))
	s := c.Contract(tensor.Sym{0.001, -0.0003, -0.0003, 0.002 / 2, 0, 0}) // engineering shear 0.002
	want := tensor.Sym{200, 0, 0, 200000 / 2.6 * 0.002, 0, 0}
	check.Slice(t, "stress", s[:], want[:], 200, 8*eps)
}

// TestContractAgainstFullSum holds Contract against the sum over all 81 components, which has nine terms a component.
func TestContractAgainstFullSum(t *testing.T) {
	r, cases := source(t, 20, 2000)
	for range cases {
		c, e := randomTangent(r), randomSym(r)
		f, m := c.Full(), e.Matrix()
		var s [3][3]float64
		for i := range 3 {
			for j := range 3 {
				for k := range 3 {
					for l := range 3 {
						s[i][j] += f[i][j][k][l] * m[k][l]
					}
				}
			}
		}
		got, want := c.Contract(e), tensor.SymFromMatrix(s)
		check.Slice(t, "C:e", got[:], want[:], maxAbs(flat(c))*e.Norm(), 16*eps)
		if t.Failed() {
			t.Fatalf("c = %v, e = %v", c, e)
		}
	}
}

// TestRotateTangentAgainstFullSum turns all four indexes one after the other, with gonum's product as reference for each.
func TestRotateTangentAgainstFullSum(t *testing.T) {
	r, cases := source(t, 21, 500)
	for range cases {
		c, q, e := randomTangent(r), randomRotation(t, r), randomSym(r)
		f := c.Full()
		for range 4 { // turn the first index, then move it to the back
			flat81 := make([]float64, 0, 81)
			for i := range 3 {
				for j := range 3 {
					for k := range 3 {
						flat81 = append(flat81, f[i][j][k][:]...)
					}
				}
			}
			var turned mat.Dense
			turned.Mul(rotationDense(q), mat.NewDense(3, 27, flat81))
			for i := range 3 {
				for rest := range 27 {
					f[rest/9][rest/3%3][rest%3][i] = turned.At(i, rest)
				}
			}
		}
		var got, want, back tensor.Tangent
		got.Rotate(&c, q)
		want.MinorPart(&f)
		size := maxAbs(flat(c))
		check.Slice(t, "turned", flat(got), flat(want), size, 64*eps) // sums of up to 9 terms, twice
		back.Rotate(&got, q.Transpose())
		check.Slice(t, "there and back", flat(back), flat(c), size, 128*eps)
		s, turnedStress := got.Contract(e.Rotate(q)), c.Contract(e).Rotate(q)
		check.Slice(t, "C:e turns along", s[:], turnedStress[:], size*e.Norm(), 64*eps)
		if t.Failed() {
			t.Fatalf("c = %v, q = %v", c, q)
		}
	}
}

// TestRotateIsotropic: an isotropic tangent is the same in every frame; and a cubic one in the frame turned by 45° about z
// has C'_xxxx = (C11 + C12)/2 + C44, C'_xxyy = (C11 + C12)/2 - C44, C'_xyxy = (C11 - C12)/2 (Nye, Physical Properties of
// Crystals, 1957, from memory; it follows in two lines).
func TestRotateIsotropic(t *testing.T) {
	r, _ := source(t, 22, 0)
	c := isotropic(160e9, 0.3)
	for range 100 {
		var turned tensor.Tangent
		turned.Rotate(&c, randomRotation(t, r))
		check.Slice(t, "isotropic", flat(turned), flat(c), c[0][0], 16*eps)
	}
	const c11, c12, c44 = 168., 121., 75. // invented, in GPa
	var cubic tensor.Tangent
	for i := range 3 {
		for j := range 3 {
			cubic[i][j] = c12
		}
		cubic[i][i] = c11
		cubic[3+i][3+i] = c44
	}
	cubic.Rotate(&cubic, mustAxisAngle(t, [3]float64{0, 0, 1}, math.Pi/4))
	check.Rel(t, "C'_xxxx", cubic[tensor.XX][tensor.XX], (c11+c12)/2+c44, 8*eps)
	check.Rel(t, "C'_xxyy", cubic[tensor.XX][tensor.YY], (c11+c12)/2-c44, 16*eps)
	check.Rel(t, "C'_xyxy", cubic[tensor.XY][tensor.XY], (c11-c12)/2, 16*eps)
	check.Rel(t, "C'_xxzz", cubic[tensor.XX][tensor.ZZ], c12, 8*eps)
}

// TestLinearCombinations holds the arithmetic against gonum's. Whole numbers make every result exact.
func TestLinearCombinations(t *testing.T) {
	r, _ := source(t, 23, 0)
	for range 200 {
		a, b, k := wholeTangent(r.IntN), wholeTangent(r.IntN), float64(r.IntN(19)-9)
		ma, mb := mat.NewDense(6, 6, flat(a)), mat.NewDense(6, 6, flat(b))
		x, y := tensor.Sym{1, -2, 3, 4, -5, 6}, tensor.Sym{-7, 0, 2, 1, 3, 5}
		for name, c := range map[string]struct {
			compute   func(dst, a, b *tensor.Tangent)
			reference func(dst, a, b *mat.Dense)
		}{
			"Add":   {func(dst, a, b *tensor.Tangent) { dst.Add(a, b) }, func(dst, a, b *mat.Dense) { dst.Add(a, b) }},
			"Scale": {func(dst, a, _ *tensor.Tangent) { dst.Scale(k, a) }, func(dst, a, _ *mat.Dense) { dst.Scale(k, a) }},
			"AddScaled": {func(dst, a, b *tensor.Tangent) { dst.AddScaled(a, k, b) },
				func(dst, a, b *mat.Dense) { dst.Scale(k, b); dst.Add(a, dst) }},
			"SymmetricPart": {func(dst, a, _ *tensor.Tangent) { dst.SymmetricPart(a) },
				func(dst, a, _ *mat.Dense) { dst.Add(a, mat.DenseCopyOf(a.T())); dst.Scale(0.5, dst) }},
			"AddDyad": {func(dst, a, _ *tensor.Tangent) { *dst = *a; dst.AddDyad(k, x, y) },
				func(dst, a, _ *mat.Dense) { dst.RankOne(a, k, mat.NewVecDense(6, x[:]), mat.NewVecDense(6, y[:])) }},
		} {
			got, want := junk(), mat.NewDense(6, 6, nil)
			c.compute(&got, &a, &b)
			c.reference(want, ma, mb)
			require.Equal(t, want.RawMatrix().Data, flat(got), name)
		}
	}
}

// TestTangentAliases: the receiver may be any of the arguments.
func TestTangentAliases(t *testing.T) {
	r, _ := source(t, 24, 0)
	q := randomRotation(t, r)
	for name, op := range map[string]func(dst, a, b *tensor.Tangent){
		"Add":           func(dst, a, b *tensor.Tangent) { dst.Add(a, b) },
		"Scale":         func(dst, a, _ *tensor.Tangent) { dst.Scale(-3, a) },
		"AddScaled":     func(dst, a, b *tensor.Tangent) { dst.AddScaled(a, 7, b) },
		"SymmetricPart": func(dst, a, _ *tensor.Tangent) { dst.SymmetricPart(a) },
		"Rotate":        func(dst, a, _ *tensor.Tangent) { dst.Rotate(a, q) },
	} {
		a, b, want := randomTangent(r), randomTangent(r), junk()
		keepA, keepB := a, b
		op(&want, &a, &b)
		assert.Equal(t, [2]tensor.Tangent{keepA, keepB}, [2]tensor.Tangent{a, b}, "%s: arguments stay", name)
		overA, overB := a, b
		op(&overA, &overA, &b)
		assert.Equal(t, want, overA, "%s over its first argument", name)
		if name == "Add" || name == "AddScaled" {
			op(&overB, &a, &overB)
			assert.Equal(t, want, overB, "%s over its second argument", name)
		}
		both, same := junk(), a
		op(&both, &a, &a)
		op(&same, &same, &same)
		assert.Equal(t, both, same, "%s with all the same", name)
	}
	c, f := junk(), new(tensor.FullTangent)
	c.MinorPart(f)
	assert.Equal(t, tensor.Tangent{}, c)
	c = junk()
	c.SetIsotropic(2, 3)
	assert.Equal(t, tensor.Tangent{{6, 0, 0}, {0, 6, 0}, {0, 0, 6}, {3: 3}, {4: 3}, {5: 3}}, c)
}

// TestMajorSymmetry: the measure and what it says of bad components.
func TestMajorSymmetry(t *testing.T) {
	r, _ := source(t, 25, 0)
	for range 100 {
		c := randomTangent(r)
		c.SymmetricPart(&c)
		assert.True(t, c.IsSymmetric(0))
		assert.Zero(t, c.Asymmetry())
		size := maxAbs(flat(c))
		c[tensor.XX][tensor.XY] += 0.001 * size
		check.Rel(t, "asymmetry", c.Asymmetry(), 0.001*size/maxAbs(flat(c)), 1e-12) // 0.001 of size, rounded in c
		assert.False(t, c.IsSymmetric(0.0009))
		assert.True(t, c.IsSymmetric(0.0011))
	}
	var zero, opposite, c tensor.Tangent
	assert.True(t, zero.IsSymmetric(0))
	opposite[2][5], opposite[5][2] = 4, -4
	assert.Equal(t, 2., opposite.Asymmetry())
	tiny := tensor.Tangent{{1: 5e-324}, {5e-324}} // (a+b)/2 of the smallest number
	c.SymmetricPart(&tiny)
	assert.Equal(t, tiny, c)
	for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		for _, at := range [][2]int{{0, 0}, {1, 4}, {4, 1}, {5, 5}} {
			c := isotropic(1, 0.25)
			c[at[0]][at[1]] = bad
			assert.True(t, math.IsNaN(c.Asymmetry()), "%v at %v", bad, at)
			assert.False(t, c.IsSymmetric(math.MaxFloat64), "%v at %v", bad, at)
		}
	}
	assert.False(t, zero.IsSymmetric(math.NaN()))
}

// TestDyadKeepsSymmetry to the bit, with whatever rounding.
func TestDyadKeepsSymmetry(t *testing.T) {
	r, cases := source(t, 26, 1000)
	for range cases {
		c, a := randomTangent(r), randomSym(r)
		c.SymmetricPart(&c)
		c.AddDyad(r.NormFloat64(), a, a)
		require.True(t, c.IsSymmetric(0), "a = %v", a)
	}
}

// TestMinorSymmetry: to 81 components and back, and what happens to a tensor without the symmetries.
func TestMinorSymmetry(t *testing.T) {
	r, _ := source(t, 27, 0)
	for range 100 {
		c, back := randomTangent(r), junk()
		f := c.Full()
		require.Zero(t, f.MinorAsymmetry())
		back.MinorPart(&f)
		require.Equal(t, c, back)
	}
	var c tensor.Tangent
	var f tensor.FullTangent
	f[0][1][0][2] = 8 // C_xyxz alone: a quarter of it has the symmetries
	assert.Equal(t, 1., f.MinorAsymmetry())
	c.MinorPart(&f)
	assert.Equal(t, tensor.Tangent{tensor.XY: {tensor.XZ: 2}}, c)
	f[0][1][0][2] = math.NaN()
	assert.True(t, math.IsNaN(f.MinorAsymmetry()))
	f = tensor.FullTangent{}
	f[2][2][2][2] = math.Inf(-1)
	assert.True(t, math.IsNaN(f.MinorAsymmetry()))
}

func isotropic(e, nu float64) tensor.Tangent {
	var c tensor.Tangent
	c.SetIsotropic(e/(3*(1-2*nu)), e/(2*(1+nu)))
	return c
}

func wholeTangent(intN func(int) int) tensor.Tangent {
	var c tensor.Tangent
	for i := range c {
		for j := range c[i] {
			c[i][j] = float64(2*intN(1000) - 1000) // even, so that halves are whole too
		}
	}
	return c
}

// junk is a destination full of what a result may not depend on.
func junk() tensor.Tangent {
	var c tensor.Tangent
	for i := range c {
		for j := range c[i] {
			c[i][j] = math.NaN()
		}
	}
	return c
}
