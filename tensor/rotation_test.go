package tensor_test

import (
	"errors"
	"math"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/spatial/r3"
)

// TestRotateHandValues: a quarter turn about z takes x to y; and Mohr's circle (Mohr 1882), where a tension σ turned by θ
// has σ cos²θ, σ sin²θ and the shear σ sin θ cos θ, and a shear τ turned by 45° has the normal stresses -τ and τ.
func TestRotateHandValues(t *testing.T) {
	z := [3]float64{0, 0, 2} // of any length
	quarter := mustAxisAngle(t, z, math.Pi/2)
	got, want := tensor.Sym{1, 2, 3, 4, 5, 6}.Rotate(quarter), tensor.Sym{2, 1, 3, 5, -4, -6}
	check.Slice(t, "quarter turn", got[:], want[:], 6, 4*eps)

	thirty := mustAxisAngle(t, z, math.Pi/6)
	got, want = tensor.Sym{100}.Rotate(thirty), tensor.Sym{75, 25, 0, 0, 0, 25 * math.Sqrt(3)}
	check.Slice(t, "tension at 30°", got[:], want[:], 100, 4*eps)

	eighth := mustAxisAngle(t, z, math.Pi/4)
	got, want = tensor.Sym{tensor.XY: 70}.Rotate(eighth), tensor.Sym{-70, 70}
	check.Slice(t, "shear at 45°", got[:], want[:], 70, 4*eps)

	third := mustAxisAngle(t, [3]float64{1, 1, 1}, 2*math.Pi/3) // x to y to z to x
	got, want = tensor.Sym{1, 2, 3, 4, 5, 6}.Rotate(third), tensor.Sym{3, 1, 2, 6, 4, 5}
	check.Slice(t, "third of a turn about the diagonal", got[:], want[:], 6, 8*eps)
}

// TestRotateAgainstGonum holds q a qᵀ against gonum's product of dense matrices, and vectors and constructors against its
// quaternions (r3.Rotation). Each component is two sums of three products.
func TestRotateAgainstGonum(t *testing.T) {
	r, cases := source(t, 10, 3000)
	for range cases {
		axis, angle := [3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()}, 20*r.NormFloat64()
		q := mustAxisAngle(t, axis, angle)
		require.NoError(t, q.Check(16*eps)) // at half a turn the rounding of the unit axis counts fourfold
		quaternion := r3.NewRotation(angle, r3.Vec{X: axis[0], Y: axis[1], Z: axis[2]})
		v := [3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()}
		want := quaternion.Rotate(r3.Vec{X: v[0], Y: v[1], Z: v[2]})
		got := q.Apply(v)
		// gonum turns by the half angle, whose own rounding is |angle| eps/4.
		check.Slice(t, "vector", got[:], []float64{want.X, want.Y, want.Z}, r3.Norm(want), (16+math.Abs(angle))*eps)

		a := randomSym(r)
		var product mat.Dense
		mq := rotationDense(q)
		product.Product(mq, dense3(a), mq.T())
		turned, reference := a.Rotate(q), symOf(&product)
		check.Slice(t, "tensor", turned[:], reference[:], a.Norm(), 8*eps)

		p := randomRotation(t, r)
		product.Mul(mq, rotationDense(p))
		both := q.Mul(p)
		check.Slice(t, "product", rotationDense(both).RawMatrix().Data, product.RawMatrix().Data, 1, 4*eps)
		if t.Failed() {
			t.Fatalf("axis %v, angle %v, a = %v", axis, angle, a)
		}
	}
}

// TestRotateProperties: what a rotation may not change, and the way back. Two rotations of six sums each bound the rounding.
func TestRotateProperties(t *testing.T) {
	r, cases := source(t, 11, 3000)
	for range cases {
		a, b, q := randomSym(r), randomSym(r), randomRotation(t, r)
		turned, size := a.Rotate(q), a.Norm()
		check.Scaled(t, "trace", turned.Trace(), a.Trace(), size, 16*eps)
		check.Scaled(t, "norm", turned.Norm(), size, size, 16*eps)
		check.Scaled(t, "Mises", turned.Mises(), a.Mises(), size, 24*eps)
		check.Scaled(t, "double contraction", turned.Dot(b.Rotate(q)), a.Dot(b), size*b.Norm(), 32*eps)
		w, want := turned.PrincipalValues(), a.PrincipalValues()
		check.Slice(t, "principal values", w[:], want[:], size, 24*eps)
		back := turned.Rotate(q.Transpose())
		check.Slice(t, "there and back", back[:], a[:], size, 24*eps)
		p := randomRotation(t, r)
		once, twice := a.Rotate(p.Mul(q)), turned.Rotate(p)
		check.Slice(t, "first q, then p", once[:], twice[:], size, 32*eps)
		if t.Failed() {
			t.Fatalf("a = %v, q = %v", a, q)
		}
	}
	a := tensor.Sym{1, 2, 3, 4, 5, 6}
	assert.Equal(t, a, a.Rotate(tensor.IdentityRotation()))
}

// TestSmallRotation keeps the digits of a small angle: to second order q = 1 + ω× + ω×ω×/2.
func TestSmallRotation(t *testing.T) {
	const angle = 1e-8
	q, err := tensor.RotationVector([3]float64{0, 0, angle})
	require.NoError(t, err)
	check.Rel(t, "sine", q[1][0], angle, 2*eps) // angle - angle³/6
	assert.Equal(t, -q[1][0], q[0][1])
	q, err = tensor.RotationVector([3]float64{angle, angle, 0})
	require.NoError(t, err)
	check.Rel(t, "second order", q[0][1], angle*angle/2, 8*eps) // ω_x ω_y/2 alone: ω_z is zero
}

// TestRotationVector is the rotation by the length about the direction, for every length there is.
func TestRotationVector(t *testing.T) {
	for _, length := range []float64{5e-324, 1e-300, 1e-3, 1, 3, 100} {
		got, err := tensor.RotationVector([3]float64{0, length, 0})
		require.NoError(t, err)
		assert.Equal(t, mustAxisAngle(t, [3]float64{0, 1, 0}, length), got)
	}
	zero, err := tensor.RotationVector([3]float64{})
	require.NoError(t, err)
	assert.Equal(t, tensor.IdentityRotation(), zero)
}

// TestAxisOfAnyLength: only the direction of an axis counts, from the smallest number to the greatest.
func TestAxisOfAnyLength(t *testing.T) {
	want := mustAxisAngle(t, [3]float64{1, -1, 1}, 1.25)
	for _, k := range []float64{5e-324, 1e-310, 1e-200, 3, 1e200, math.MaxFloat64} {
		got := mustAxisAngle(t, [3]float64{k, -k, k}, 1.25)
		check.Slice(t, "rotation", rotationDense(got).RawMatrix().Data, rotationDense(want).RawMatrix().Data, 1, 2*eps)
	}
}

func TestBadRotations(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, axis := range [][3]float64{{}, {nan, 1, 0}, {1, nan, 0}, {0, 1, nan}, {inf, 0, 0}, {0, -inf, 1}} {
		q, err := tensor.AxisAngle(axis, 1)
		var axisError *tensor.AxisError
		if assert.ErrorAs(t, err, &axisError) {
			assert.Contains(t, err.Error(), "tensor: ")
			assert.True(t, sameBits(axis[:], axisError.Axis[:]))
		}
		assert.Equal(t, tensor.Rotation{}, q)
		if axis != [3]float64{} { // the zero vector is a good rotation vector
			_, err = tensor.RotationVector(axis)
			assert.ErrorAs(t, err, &axisError)
		}
	}
	_, err := tensor.RotationVector([3]float64{math.MaxFloat64, math.MaxFloat64, 0}) // its length overflows
	var axisError *tensor.AxisError
	assert.ErrorAs(t, err, &axisError)
	for _, angle := range []float64{nan, inf, -inf} {
		_, err := tensor.AxisAngle([3]float64{1, 0, 0}, angle)
		var angleError *tensor.AngleError
		if assert.ErrorAs(t, err, &angleError) {
			assert.Contains(t, err.Error(), "tensor: rotation angle ")
			assert.True(t, sameBits([]float64{angle}, []float64{angleError.Angle}))
		}
	}
}

func TestRotationCheck(t *testing.T) {
	turn := tensor.IdentityRotation()
	for _, c := range []struct {
		name string
		q    tensor.Rotation
		tol  float64
		ok   bool
	}{
		{"identity", turn, 0, true},
		{"zero value", tensor.Rotation{}, 1e-6, false},
		{"reflection", tensor.Rotation{{1, 0, 0}, {0, 1, 0}, {0, 0, -1}}, 1e-6, false},
		{"stretched by 1e-4", tensor.Rotation{{1.0001, 0, 0}, {0, 1, 0}, {0, 0, 1}}, 1e-4, false},
		{"stretched by 1e-4, allowed", tensor.Rotation{{1.0001, 0, 0}, {0, 1, 0}, {0, 0, 1}}, 3e-4, true},
		{"sheared", tensor.Rotation{{1, 0.01, 0}, {0, 1, 0}, {0, 0, 1}}, 1e-3, false},
		{"NaN", tensor.Rotation{{1, 0, 0}, {0, math.NaN(), 0}, {0, 0, 1}}, 1, false},
		{"infinite", tensor.Rotation{{math.Inf(1), 0, 0}, {0, 1, 0}, {0, 0, 1}}, 1, false},
		{"NaN tolerance", turn, math.NaN(), false},
	} {
		err := c.q.Check(c.tol)
		if c.ok {
			assert.NoError(t, err, c.name)
			continue
		}
		var rotationError *tensor.RotationError
		if assert.True(t, errors.As(err, &rotationError), c.name) {
			assert.Contains(t, err.Error(), "tensor: not a rotation", c.name)
		}
	}
	var e *tensor.RotationError
	require.ErrorAs(t, tensor.Rotation{{1, 0, 0}, {0, 1, 0}, {0, 0, -1}}.Check(1e-9), &e)
	assert.Equal(t, tensor.RotationError{Deviation: 0, Determinant: -1, Tolerance: 1e-9}, *e)
}

func mustAxisAngle(t *testing.T, axis [3]float64, angle float64) tensor.Rotation {
	t.Helper()
	q, err := tensor.AxisAngle(axis, angle)
	require.NoError(t, err)
	return q
}

func rotationDense(q tensor.Rotation) *mat.Dense {
	return mat.NewDense(3, 3, append(append(append([]float64{}, q[0][:]...), q[1][:]...), q[2][:]...))
}

// sameBits compares two slices bit by bit, NaN included.
func sameBits(a, b []float64) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if math.Float64bits(a[i]) != math.Float64bits(b[i]) {
			return false
		}
	}
	return true
}
