package matview_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
	"example.com/holdtime/tensor/matview"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
)

const (
	eps  = 0x1p-52
	e    = 200000. // MPa
	nu   = 0.3
	bulk = e / (3 * (1 - 2*nu))
	g    = e / (2 * (1 + nu))
)

func elastic() tensor.Tangent {
	var c tensor.Tangent
	c.SetIsotropic(bulk, g)
	return c
}

// TestPlainInverseIsHooke inverts the elastic tangent with gonum and compares it with Hooke's law solved for the strain
// (Timoshenko and Goodier, Theory of Elasticity, from memory): 1/E, -ν/E, and 1/G for the engineering shear. The condition
// number of the matrix is below 10, so the inverse is good to some tens of eps.
func TestPlainInverseIsHooke(t *testing.T) {
	c := elastic()
	var inverse mat.Dense
	require.NoError(t, inverse.Inverse(matview.Tangent{Of: &c}))
	for i := range 6 {
		for j := range 6 {
			want := 0.
			switch {
			case i == j && i <= tensor.ZZ:
				want = 1 / e
			case i == j:
				want = 1 / g
			case i <= tensor.ZZ && j <= tensor.ZZ:
				want = -nu / e
			}
			check.Scaled(t, "compliance", inverse.At(i, j), want, 1/g, 64*eps)
		}
	}
}

// TestKelvinInverseIsTheCompliance: through the Kelvin matrix the inverse comes back as a fourth-order tensor, which gives
// the strain, tensor shear and all, that Hooke's law gives.
func TestKelvinInverseIsTheCompliance(t *testing.T) {
	c := elastic()
	var inverse mat.Dense
	require.NoError(t, inverse.Inverse(matview.Kelvin{Of: &c}))
	compliance, err := matview.FromKelvin(&inverse)
	require.NoError(t, err)
	s := tensor.Sym{100, -30, 50, 20, -10, 40}
	got := compliance.Contract(s)
	want := s.Scale((1 + nu) / e).Sub(tensor.Identity().Scale(nu / e * s.Trace()))
	check.Slice(t, "strain", got[:], want[:], want.Norm(), 64*eps)
}

// TestKelvinEigenvalues of isotropic elasticity are 2G five times and 3K once (W. Thomson 1856, from memory), in any frame.
func TestKelvinEigenvalues(t *testing.T) {
	c := elastic()
	q, err := tensor.AxisAngle([3]float64{1, 2, 3}, 0.7)
	require.NoError(t, err)
	c.Rotate(&c, q)
	m, err := matview.KelvinSymDense(&c, 16*eps)
	require.NoError(t, err)
	var eigen mat.EigenSym
	require.True(t, eigen.Factorize(m, false))
	check.Slice(t, "eigenvalues", eigen.Values(nil), []float64{2 * g, 2 * g, 2 * g, 2 * g, 2 * g, 3 * bulk}, 3*bulk, 64*eps)
	var cholesky mat.Cholesky
	assert.True(t, cholesky.Factorize(m), "positive definite")
	check.Rel(t, "determinant", cholesky.Det(), 3*bulk*math.Pow(2*g, 5), 256*eps)
}

// TestViews: each element sits where the tensor has it, a view follows its tensor, and the transposes turn.
func TestViews(t *testing.T) {
	r := rand.New(rand.NewPCG(40, 1))
	c, a := random(r), tensor.Sym{1, 2, 3, 4, 5, 6}
	plain, kelvin, sym := matview.Tangent{Of: &c}, matview.Kelvin{Of: &c}, matview.Sym{Of: &a}
	rows, cols := plain.Dims()
	assert.Equal(t, [2]int{6, 6}, [2]int{rows, cols})
	rows, cols = kelvin.T().Dims()
	assert.Equal(t, [2]int{6, 6}, [2]int{rows, cols})
	rows, cols = sym.Dims()
	assert.Equal(t, [3]int{3, 3, 3}, [3]int{rows, cols, sym.SymmetricDim()})
	for i := range 6 {
		for j := range 6 {
			assert.Equal(t, c[i][j], plain.At(i, j))
			assert.Equal(t, c[j][i], plain.T().At(i, j))
			assert.Equal(t, kelvin.At(j, i), kelvin.T().At(i, j))
		}
	}
	assert.Equal(t, c[0][1], kelvin.At(0, 1))
	assert.Equal(t, math.Sqrt2*c[0][4], kelvin.At(0, 4))
	assert.Equal(t, math.Sqrt2*c[4][0], kelvin.At(4, 0))
	assert.Equal(t, 2*c[3][5], kelvin.At(3, 5))
	m := a.Matrix()
	for i := range 3 {
		for j := range 3 {
			assert.Equal(t, m[i][j], sym.At(i, j))
			assert.Equal(t, m[i][j], sym.T().At(i, j))
		}
	}
	c[2][4], a[tensor.YZ] = -1, -2
	assert.Equal(t, -1., plain.At(2, 4))
	assert.Equal(t, -2., sym.At(2, 1))
	assert.Panics(t, func() { plain.At(6, 0) })
	assert.Panics(t, func() { kelvin.At(0, -1) })
	assert.Panics(t, func() { sym.At(3, 3) })
}

// TestCopies go there and back, and do not follow the tensor. The factor √2 and back errs by one rounding each.
func TestCopies(t *testing.T) {
	r := rand.New(rand.NewPCG(41, 1))
	for range 100 {
		c := random(r)
		dense := matview.Dense(&c)
		back, err := matview.FromPlain(dense)
		require.NoError(t, err)
		require.Equal(t, c, back)
		back, err = matview.FromKelvin(matview.Kelvin{Of: &c})
		require.NoError(t, err)
		for i := range c {
			check.Slice(t, "Kelvin and back", back[i][:], c[i][:], 1, eps)
		}
		a := tensor.Sym{c[0][0], c[0][1], c[0][2], c[0][3], c[0][4], c[0][5]}
		sym := matview.SymDense(a)
		same, err := matview.FromSymmetric(sym)
		require.NoError(t, err)
		require.Equal(t, a, same)

		dense.Set(0, 0, math.NaN())
		sym.SetSym(0, 0, math.NaN())
		require.False(t, math.IsNaN(c[0][0]))
		require.False(t, math.IsNaN(a[0]))
	}
}

// TestContractAsMatrix: the plain matrix times strain with engineering shear, by gonum, is Contract; and the Kelvin matrix
// times the strain with its shears times √2 is the stress with its shears times √2.
func TestContractAsMatrix(t *testing.T) {
	r := rand.New(rand.NewPCG(42, 1))
	for range 100 {
		c := random(r)
		strain := tensor.Sym{r.Float64(), r.Float64(), r.Float64(), r.Float64(), r.Float64(), r.Float64()}
		want := c.Contract(strain)
		engineering, scaled := strain, strain
		for k := tensor.YZ; k <= tensor.XY; k++ {
			engineering[k] *= 2
			scaled[k] *= math.Sqrt2
		}
		var s mat.VecDense
		s.MulVec(matview.Tangent{Of: &c}, mat.NewVecDense(6, engineering[:]))
		check.Slice(t, "plain", s.RawVector().Data, want[:], 6, 8*eps) // six products below 2
		var k mat.VecDense
		k.MulVec(matview.Kelvin{Of: &c}, mat.NewVecDense(6, scaled[:]))
		for i := tensor.YZ; i <= tensor.XY; i++ {
			want[i] *= math.Sqrt2
		}
		check.Slice(t, "Kelvin", k.RawVector().Data, want[:], 6, 8*eps)
	}
}

func TestBadMatrices(t *testing.T) {
	var dims *matview.DimsError
	_, err := matview.FromPlain(mat.NewDense(6, 5, nil))
	require.ErrorAs(t, err, &dims)
	assert.Equal(t, matview.DimsError{Rows: 6, Cols: 5, Want: 6}, *dims)
	assert.Equal(t, "matview: matrix is 6×5, want 6×6", err.Error())
	_, err = matview.FromKelvin(mat.NewDense(3, 6, nil))
	require.ErrorAs(t, err, &dims)
	_, err = matview.FromSymmetric(mat.NewSymDense(6, nil))
	require.ErrorAs(t, err, &dims)
	assert.Equal(t, matview.DimsError{Rows: 6, Cols: 6, Want: 3}, *dims)

	c := elastic()
	c[0][5] = 0.001 * c[0][0]
	m, err := matview.KelvinSymDense(&c, 1e-6)
	var asymmetry *matview.AsymmetryError
	require.ErrorAs(t, err, &asymmetry)
	assert.Nil(t, m)
	check.Rel(t, "asymmetry", asymmetry.Asymmetry, 0.001, 4*eps)
	assert.Equal(t, 1e-6, asymmetry.Tolerance)
	assert.Contains(t, err.Error(), "0.001")
	m, err = matview.KelvinSymDense(&c, 0.01) // allowed: the symmetric part
	require.NoError(t, err)
	check.Rel(t, "symmetric part", m.At(5, 0), math.Sqrt2*0.0005*c[0][0], 4*eps)
	for _, tol := range []float64{math.NaN(), 1} {
		if tol == 1 {
			c[1][1] = math.NaN()
		}
		_, err = matview.KelvinSymDense(&c, tol)
		assert.ErrorAs(t, err, &asymmetry)
	}
}

func random(r *rand.Rand) tensor.Tangent {
	var c tensor.Tangent
	for i := range c {
		for j := range c[i] {
			c[i][j] = 2*r.Float64() - 1
		}
	}
	return c
}
