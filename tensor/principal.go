package tensor

import "math"

// PrincipalValues returns the eigenvalues of a in descending order. They are bit for bit the values of Principal, and have
// its accuracy.
func (a Sym) PrincipalValues() [3]float64 {
	p, q, r := a.principal()
	return [3]float64{p.value, q.value, r.value}
}

// Principal returns the eigenvalues of a in descending order and their unit eigenvectors: a·directions[i] =
// values[i]·directions[i]. The directions are orthonormal and right-handed, so that Rotation(directions) turns a to its
// principal axes: a.Rotate(Rotation(directions)) is diagonal.
//
// The error of each value is a few units of rounding of the greatest principal value in magnitude, for equal and nearly
// equal values too, over the whole range of float64. A tensor whose shears are all zero gives its normal components exactly.
//
// The sign of a direction means nothing; it is the same each time for the same a. Where values are equal any orthonormal
// set in their eigenspace will do; a multiple of the unit tensor gives the coordinate axes. Between nearly equal values the
// directions are as uncertain as the problem makes them (rounding divided by the relative gap), yet orthonormal to rounding.
//
// A component that is NaN or infinite makes every result NaN. A principal value beyond the range of float64 is infinite.
func (a Sym) Principal() (values [3]float64, directions [3][3]float64) {
	p, q, r := a.principal()
	return [3]float64{p.value, q.value, r.value}, [3][3]float64{p.axis.array(), q.axis.array(), r.axis.array()}
}

// eigenpair is a principal value and its unit direction.
type eigenpair struct {
	value float64
	axis  vector
}

// principal returns the pairs in descending order; the axes are right-handed.
func (a Sym) principal() (p, q, r eigenpair) {
	x, y, z := vector{1, 0, 0}, vector{0, 1, 0}, vector{0, 0, 1}
	unguard := 1.0
	if !(a.Dot(a) <= math.MaxFloat64) { // huge, or not finite
		if !a.IsFinite() {
			n := math.NaN()
			p = eigenpair{n, vector{n, n, n}}
			return p, p, p
		}
		if a.maxAbs() > 0x1p1020 { // sums of components could overflow
			a, unguard = a.Scale(0x1p-4), 0x1p4
		}
	}
	switch {
	case a[YZ] == 0 && a[XZ] == 0:
		p, q = planePrincipal(a[XX], a[XY], a[YY], x, y)
		r = eigenpair{a[ZZ], z}
	case a[XZ] == 0 && a[XY] == 0:
		q, r = planePrincipal(a[YY], a[YZ], a[ZZ], y, z)
		p = eigenpair{a[XX], x}
	case a[XY] == 0 && a[YZ] == 0:
		r, p = planePrincipal(a[ZZ], a[XZ], a[XX], z, x)
		q = eigenpair{a[YY], y}
	default:
		p, q, r = a.spacePrincipal()
	}
	p, q = descending(p, q)
	q, r = descending(q, r)
	p, q = descending(p, q)
	p.value *= unguard
	q.value *= unguard
	r.value *= unguard
	return p, q, r
}

// descending swaps two pairs that are out of order, and turns one axis over so that the three stay right-handed.
func descending(p, q eigenpair) (eigenpair, eigenpair) {
	if p.value < q.value {
		return q, eigenpair{p.value, vector{0 - p.axis.x, 0 - p.axis.y, 0 - p.axis.z}} // 0 - 0 is no minus zero
	}
	return p, q
}

// planePrincipal diagonalises the block (a b; b c) in the plane of two unit vectors by one Jacobi rotation, which leaves a
// diagonal block untouched and keeps the sense of the pair.
func planePrincipal(a, b, c float64, x, y vector) (p, q eigenpair) {
	if b == 0 {
		return eigenpair{a, x}, eigenpair{c, y}
	}
	cot := (c - a) / (2 * b) // of twice the angle; may be infinite
	t := math.Copysign(1/(math.Abs(cot)+math.Sqrt(cot*cot+1)), cot)
	cos := 1 / math.Sqrt(t*t+1)
	sin := t * cos
	return eigenpair{a - t*b, combine(cos, x, -sin, y)}, eigenpair{c + t*b, combine(sin, x, cos, y)}
}

// spacePrincipal treats a tensor with no coordinate axis among its principal axes. It works on the deviator, whose
// eigenvalue farthest from the other two is a well-conditioned root of the characteristic cubic: its eigenvector is a
// column of an adjugate, and the other two values, however close, are left to a 2×2 problem that is solved exactly.
// (Deflation after Scherzinger and Dohrmann, Comput. Methods Appl. Mech. Engrg. 197 (2008), 4007, from memory.)
func (a Sym) spacePrincipal() (p, q, r eigenpair) {
	s, exponent := a.Deviator(), 0
	if d := s.Dot(s); !(d > 0x1p-200 && d < 0x1p200) { // products of up to six components must stay in range
		_, exponent = math.Frexp(s.maxAbs())
		s = s.ldexp(-exponent)
	}
	eta := s.distinctValue()
	x := s.eigenvector(eta)
	y := x.perpendicular()
	z := x.cross(y)
	sy, sz := s.apply(y), s.apply(z)
	p = eigenpair{eta, x}
	q, r = planePrincipal(y.dot(sy), z.dot(sy), z.dot(sz), y, z)
	if exponent != 0 {
		p.value, q.value, r.value = math.Ldexp(p.value, exponent), math.Ldexp(q.value, exponent), math.Ldexp(r.value, exponent)
	}
	m := a.Mean()
	p.value += m
	q.value += m
	r.value += m
	return p, q, r
}

// distinctValue returns the eigenvalue of a deviator that is farthest from the other two: the greatest when the determinant
// is positive, the smallest when it is negative.
func (a Sym) distinctValue() float64 {
	xx, yy, zz, yz, xz, xy := a[XX], a[YY], a[ZZ], a[YZ], a[XZ], a[XY]
	j2 := 0.5*(xx*xx+yy*yy+zz*zz) + yz*yz + xz*xz + xy*xy
	j3 := xx*(yy*zz-yz*yz) + xy*(yz*xz-xy*zz) + xz*(xy*yz-yy*xz)
	g := math.Sqrt(j2 * (1. / 3))
	// The value is g y with y³ - 3y = 2x; x is the cosine of three times the Lode angle and y runs from √3 to 2. The cubic
	// start (interpolation at Chebyshev points) is within 1e-4 and the slope at least 6: two Newton steps reach rounding.
	x := min(math.Abs(j3)/(2*g*g*g), 1)
	y := 1.73213266 + x*(0.3306607+x*(-0.0813824+x*0.0186394))
	y -= (y*(y*y-3) - 2*x) / (3 * (y*y - 1))
	y -= (y*(y*y-3) - 2*x) / (3 * (y*y - 1))
	return math.Copysign(g*y, j3)
}

// eigenvector returns the unit eigenvector of an eigenvalue that is well apart from the others: the longest column of the
// adjugate of a - eta 1.
func (a Sym) eigenvector(eta float64) vector {
	r0 := vector{a[XX] - eta, a[XY], a[XZ]}
	r1 := vector{a[XY], a[YY] - eta, a[YZ]}
	r2 := vector{a[XZ], a[YZ], a[ZZ] - eta}
	best := r1.cross(r2)
	n := best.dot(best)
	if c := r2.cross(r0); c.dot(c) > n {
		best, n = c, c.dot(c)
	}
	if c := r0.cross(r1); c.dot(c) > n {
		best, n = c, c.dot(c)
	}
	k := 1 / math.Sqrt(n)
	return vector{k * best.x, k * best.y, k * best.z}
}

func (a Sym) apply(v vector) vector {
	return vector{
		a[XX]*v.x + a[XY]*v.y + a[XZ]*v.z,
		a[XY]*v.x + a[YY]*v.y + a[YZ]*v.z,
		a[XZ]*v.x + a[YZ]*v.y + a[ZZ]*v.z,
	}
}

func (a Sym) maxAbs() float64 {
	return max(math.Abs(a[XX]), math.Abs(a[YY]), math.Abs(a[ZZ]), math.Abs(a[YZ]), math.Abs(a[XZ]), math.Abs(a[XY]))
}

func (a Sym) ldexp(exponent int) Sym {
	for i := range a {
		a[i] = math.Ldexp(a[i], exponent)
	}
	return a
}

// vector is a struct because the compiler keeps small structs in registers, and arrays in memory.
type vector struct{ x, y, z float64 }

func (v vector) array() [3]float64 { return [3]float64{v.x, v.y, v.z} }

func (v vector) dot(w vector) float64 { return v.x*w.x + v.y*w.y + v.z*w.z }

func (v vector) cross(w vector) vector {
	return vector{v.y*w.z - v.z*w.y, v.z*w.x - v.x*w.z, v.x*w.y - v.y*w.x}
}

// perpendicular returns a unit vector perpendicular to the unit vector v.
func (v vector) perpendicular() vector {
	if math.Abs(v.x) < math.Abs(v.y) {
		k := 1 / math.Sqrt(v.y*v.y+v.z*v.z)
		return vector{0, -k * v.z, k * v.y}
	}
	k := 1 / math.Sqrt(v.x*v.x+v.z*v.z)
	return vector{k * v.z, 0, -k * v.x}
}

func combine(k float64, v vector, l float64, w vector) vector {
	return vector{k*v.x + l*w.x, k*v.y + l*w.y, k*v.z + l*w.z}
}
