package tensor

import "math"

// Rotation is a proper orthogonal 3×3 matrix q, row by row. It turns a vector v into q v and a tensor a into q a qᵀ.
//
// Seen the other way, if row i holds the i-th axis of a second frame in components of the first, q v and q a qᵀ are the
// components of the unchanged vector and tensor in that second frame.
//
// The zero value is not a rotation. Nothing but Check looks at whether the matrix is orthogonal.
type Rotation [3][3]float64

// IdentityRotation returns the rotation that leaves everything as it is.
func IdentityRotation() Rotation { return Rotation{{1, 0, 0}, {0, 1, 0}, {0, 0, 1}} }

// AxisAngle returns the rotation by an angle in radians about an axis, counter-clockwise seen against the axis
// (right-hand rule). The axis may have any finite length but zero.
//
// A zero axis, or one with a NaN or infinite component, gives an *AxisError. An angle that is NaN or infinite gives an
// *AngleError.
func AxisAngle(axis [3]float64, angle float64) (Rotation, error) {
	u, length, ok := unitVector(axis)
	if !ok || length == 0 {
		return Rotation{}, &AxisError{Axis: axis}
	}
	if math.IsNaN(angle) || math.IsInf(angle, 0) {
		return Rotation{}, &AngleError{Angle: angle}
	}
	return axisAngle(u, angle), nil
}

// RotationVector returns the rotation about the direction of w by its length in radians, such as a spin times a time
// increment. The zero vector gives the identity; a NaN or infinite component, or a length beyond the range of float64, gives
// an *AxisError.
func RotationVector(w [3]float64) (Rotation, error) {
	u, length, ok := unitVector(w)
	switch {
	case !ok || math.IsInf(length, 1):
		return Rotation{}, &AxisError{Axis: w}
	case length == 0:
		return IdentityRotation(), nil
	}
	return axisAngle(u, length), nil
}

// axisAngle is Rodrigues' formula, with 1 - cos written as 2 sin² of the half angle so that small angles keep their digits.
func axisAngle(u [3]float64, angle float64) Rotation {
	s, c := math.Sincos(angle)
	h := math.Sin(angle / 2)
	k := 2 * h * h
	x, y, z := u[0], u[1], u[2]
	return Rotation{
		{c + k*x*x, k*x*y - s*z, k*x*z + s*y},
		{k*x*y + s*z, c + k*y*y, k*y*z - s*x},
		{k*x*z - s*y, k*y*z + s*x, c + k*z*z},
	}
}

// unitVector returns v/|v| and |v|, of any finite v without overflow of the squares; |v| itself may overflow. A zero v comes
// back as it is, and ok is false when a component is not finite.
func unitVector(v [3]float64) (unit [3]float64, length float64, ok bool) {
	m := max(math.Abs(v[0]), math.Abs(v[1]), math.Abs(v[2]))
	if !(m <= math.MaxFloat64) {
		return v, m, false
	}
	if m == 0 {
		return v, 0, true
	}
	_, e := math.Frexp(m)
	x, y, z := math.Ldexp(v[0], -e), math.Ldexp(v[1], -e), math.Ldexp(v[2], -e)
	n := math.Sqrt(x*x + y*y + z*z)
	return [3]float64{x / n, y / n, z / n}, math.Ldexp(n, e), true
}

// Transpose returns the transpose, which for a rotation is its inverse.
func (q Rotation) Transpose() Rotation {
	return Rotation{
		{q[0][0], q[1][0], q[2][0]},
		{q[0][1], q[1][1], q[2][1]},
		{q[0][2], q[1][2], q[2][2]},
	}
}

// Mul returns the product q r: first r, then q.
func (q Rotation) Mul(r Rotation) Rotation {
	var p Rotation
	for i := range p {
		for j := range p[i] {
			p[i][j] = q[i][0]*r[0][j] + q[i][1]*r[1][j] + q[i][2]*r[2][j]
		}
	}
	return p
}

// Apply returns q v.
func (q Rotation) Apply(v [3]float64) [3]float64 {
	return [3]float64{
		q[0][0]*v[0] + q[0][1]*v[1] + q[0][2]*v[2],
		q[1][0]*v[0] + q[1][1]*v[1] + q[1][2]*v[2],
		q[2][0]*v[0] + q[2][1]*v[1] + q[2][2]*v[2],
	}
}

// Check returns a *RotationError unless every component of q qᵀ - 1 is at most tol in magnitude and the determinant is
// positive. The components of a rotation are numbers of order one, so tol is relative and absolute at once: 1e-14 is
// rounding, 1e-6 a matrix that was written to a text file. A NaN anywhere, tol included, is an error.
func (q Rotation) Check(tol float64) error {
	p := q.Mul(q.Transpose())
	worst := 0.0
	for i := range p {
		for j := range p[i] {
			want := 0.0
			if i == j {
				want = 1
			}
			worst = max(worst, math.Abs(p[i][j]-want)) // max keeps a NaN
		}
	}
	det := q.determinant()
	if !(worst <= tol) || !(det > 0) {
		return &RotationError{Deviation: worst, Determinant: det, Tolerance: tol}
	}
	return nil
}

func (q Rotation) determinant() float64 {
	a, b, c := vector{q[0][0], q[0][1], q[0][2]}, vector{q[1][0], q[1][1], q[1][2]}, vector{q[2][0], q[2][1], q[2][2]}
	return a.cross(b).dot(c)
}

// Rotate returns q a qᵀ: the tensor turned by q, or its components in the frame whose axes are the rows of q.
func (a Sym) Rotate(q Rotation) Sym {
	var t [3][3]float64 // q a
	for i := range t {
		x, y, z := q[i][0], q[i][1], q[i][2]
		t[i][0] = x*a[XX] + y*a[XY] + z*a[XZ]
		t[i][1] = x*a[XY] + y*a[YY] + z*a[YZ]
		t[i][2] = x*a[XZ] + y*a[YZ] + z*a[ZZ]
	}
	return Sym{
		t[0][0]*q[0][0] + t[0][1]*q[0][1] + t[0][2]*q[0][2],
		t[1][0]*q[1][0] + t[1][1]*q[1][1] + t[1][2]*q[1][2],
		t[2][0]*q[2][0] + t[2][1]*q[2][1] + t[2][2]*q[2][2],
		t[1][0]*q[2][0] + t[1][1]*q[2][1] + t[1][2]*q[2][2],
		t[0][0]*q[2][0] + t[0][1]*q[2][1] + t[0][2]*q[2][2],
		t[0][0]*q[1][0] + t[0][1]*q[1][1] + t[0][2]*q[1][2],
	}
}
