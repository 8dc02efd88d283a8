package tensor

import "math"

// PrincipalValues returns the eigenvalues of a in descending order. They are bit for bit the values of Principal, and have
// its accuracy.
func (a Sym) PrincipalValues() [3]float64 {
	w, _ := a.principal(false)
	return w
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
// A component that is NaN or infinite makes every result NaN.
func (a Sym) Principal() (values [3]float64, directions [3][3]float64) {
	return a.principal(true)
}

// principal is both of the above; the directions are left zero unless they are asked for.
func (a Sym) principal(directions bool) (w [3]float64, v [3][3]float64) {
	if !a.IsFinite() {
		nan := math.NaN()
		w = [3]float64{nan, nan, nan}
		return w, [3][3]float64{w, w, w}
	}
	const huge, guard = 0x1p1020, 0x1p-4 // above, sums of components could overflow
	unguard := 1.0
	if a.maxAbs() > huge {
		a, unguard = a.Scale(guard), 1/guard
	}
	x, y, z := [3]float64{1, 0, 0}, [3]float64{0, 1, 0}, [3]float64{0, 0, 1}
	switch {
	case a[YZ] == 0 && a[XZ] == 0 && a[XY] == 0:
		w, v = [3]float64{a[XX], a[YY], a[ZZ]}, [3][3]float64{x, y, z}
	case a[YZ] == 0 && a[XZ] == 0:
		w[0], w[1], v[0], v[1] = planePrincipal(a[XX], a[XY], a[YY], x, y, directions)
		w[2], v[2] = a[ZZ], z
	case a[XZ] == 0 && a[XY] == 0:
		w[1], w[2], v[1], v[2] = planePrincipal(a[YY], a[YZ], a[ZZ], y, z, directions)
		w[0], v[0] = a[XX], x
	case a[XY] == 0 && a[YZ] == 0:
		w[2], w[0], v[2], v[0] = planePrincipal(a[ZZ], a[XZ], a[XX], z, x, directions)
		w[1], v[1] = a[YY], y
	default:
		w, v = a.spacePrincipal(directions)
	}
	order(&w, &v, 0, 1)
	order(&w, &v, 1, 2)
	order(&w, &v, 0, 1)
	return [3]float64{w[0] * unguard, w[1] * unguard, w[2] * unguard}, v
}

// planePrincipal diagonalises the block (p b; b r) in the plane of two unit vectors by one Jacobi rotation, which leaves a
// diagonal block untouched and keeps the sense of the pair.
func planePrincipal(p, b, r float64, x, y [3]float64, directions bool) (float64, float64, [3]float64, [3]float64) {
	if b == 0 {
		return p, r, x, y
	}
	theta := (r - p) / (2 * b)
	t := math.Copysign(1/(math.Abs(theta)+math.Sqrt(theta*theta+1)), theta) // tangent of the smaller angle
	if directions {
		c := 1 / math.Sqrt(t*t+1)
		x, y = combine(c, x, -t*c, y), combine(t*c, x, c, y)
	}
	return p - t*b, r + t*b, x, y
}

// spacePrincipal treats a tensor with no coordinate axis among its principal axes. It works on the deviator, whose
// eigenvalue farthest from the other two is a well-conditioned root of the characteristic cubic: its eigenvector is a
// column of an adjugate, and the other two values, however close, are left to a 2×2 problem that is solved exactly.
// (Deflation after Scherzinger and Dohrmann, Comput. Methods Appl. Mech. Engrg. 197 (2008), 4007, from memory.)
func (a Sym) spacePrincipal(directions bool) (w [3]float64, v [3][3]float64) {
	s, exponent := a.Deviator(), 0
	if m := s.maxAbs(); !(m > 0x1p-200 && m < 0x1p200) { // cubes and products of four must stay in range
		_, exponent = math.Frexp(m)
		s = s.ldexp(-exponent)
	}
	eta := s.distinctValue()
	x := s.eigenvector(eta)
	y := perpendicular(x)
	z := cross(x, y)
	sy, sz := s.apply(y), s.apply(z)
	w[0], v[0] = eta, x
	w[1], w[2], v[1], v[2] = planePrincipal(dot(y, sy), dot(z, sy), dot(z, sz), y, z, directions)
	m := a.Mean()
	for i := range w {
		if exponent != 0 {
			w[i] = math.Ldexp(w[i], exponent)
		}
		w[i] += m
	}
	return w, v
}

// distinctValue returns the eigenvalue of a deviator that is farthest from the other two: the greatest when the determinant
// is positive, the smallest when it is negative.
func (s Sym) distinctValue() float64 {
	j2 := 0.5*(s[XX]*s[XX]+s[YY]*s[YY]+s[ZZ]*s[ZZ]) + s[YZ]*s[YZ] + s[XZ]*s[XZ] + s[XY]*s[XY]
	j3 := s[XX]*(s[YY]*s[ZZ]-s[YZ]*s[YZ]) + s[XY]*(s[YZ]*s[XZ]-s[XY]*s[ZZ]) + s[XZ]*(s[XY]*s[YZ]-s[YY]*s[XZ])
	g := math.Sqrt(j2 / 3)
	// The value is g y with y³ - 3y = 2x, x = cos 3θ of the Lode angle, y from √3 to 2. The start is within 0.002, and the
	// slope is at least 6, so three Newton steps reach rounding.
	x := min(math.Abs(j3)/(2*g*g*g), 1)
	y := math.Sqrt(3) + x*(1./3-x*0.0653841)
	for range 3 {
		y -= (y*(y*y-3) - 2*x) / (3 * (y*y - 1))
	}
	return math.Copysign(g*y, j3)
}

// eigenvector returns the unit eigenvector of an eigenvalue that is well apart from the others: the longest column of the
// adjugate of s - eta 1.
func (s Sym) eigenvector(eta float64) [3]float64 {
	r0 := [3]float64{s[XX] - eta, s[XY], s[XZ]}
	r1 := [3]float64{s[XY], s[YY] - eta, s[YZ]}
	r2 := [3]float64{s[XZ], s[YZ], s[ZZ] - eta}
	best := cross(r1, r2)
	if c := cross(r2, r0); dot(c, c) > dot(best, best) {
		best = c
	}
	if c := cross(r0, r1); dot(c, c) > dot(best, best) {
		best = c
	}
	n := math.Sqrt(dot(best, best))
	return [3]float64{best[0] / n, best[1] / n, best[2] / n}
}

// perpendicular returns a unit vector perpendicular to a unit vector.
func perpendicular(x [3]float64) [3]float64 {
	if math.Abs(x[0]) < math.Abs(x[1]) {
		n := math.Hypot(x[1], x[2])
		return [3]float64{0, -x[2] / n, x[1] / n}
	}
	n := math.Hypot(x[0], x[2])
	return [3]float64{x[2] / n, 0, -x[0] / n}
}

// order puts two values into descending order and turns their directions along, so that the three stay right-handed.
func order(w *[3]float64, v *[3][3]float64, i, j int) {
	if w[i] < w[j] {
		w[i], w[j] = w[j], w[i]
		d := v[i]
		v[i], v[j] = v[j], [3]float64{0 - d[0], 0 - d[1], 0 - d[2]} // 0 - 0 is no minus zero
	}
}

func combine(k float64, x [3]float64, l float64, y [3]float64) [3]float64 {
	return [3]float64{k*x[0] + l*y[0], k*x[1] + l*y[1], k*x[2] + l*y[2]}
}

func dot(x, y [3]float64) float64 { return x[0]*y[0] + x[1]*y[1] + x[2]*y[2] }

func (a Sym) apply(x [3]float64) [3]float64 {
	return [3]float64{
		a[XX]*x[0] + a[XY]*x[1] + a[XZ]*x[2],
		a[XY]*x[0] + a[YY]*x[1] + a[YZ]*x[2],
		a[XZ]*x[0] + a[YZ]*x[1] + a[ZZ]*x[2],
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
