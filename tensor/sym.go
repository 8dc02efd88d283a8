package tensor

import "math"

// Indexes of the components of a Sym, and of the rows and columns of a Tangent.
const (
	XX = iota
	YY
	ZZ
	YZ
	XZ
	XY
)

// Sym is a symmetric second-order tensor in three dimensions: a stress, or a small strain.
//
// It holds the six independent components xx, yy, zz, yz, xz, xy. The shear components are tensor components: the shear
// strain in a Sym is half the engineering shear strain. Engineering shear exists only at a host's boundary, see Layout.
// The zero value is the zero tensor.
//
// Every method takes and returns values and allocates nothing. A component that is NaN or infinite goes through the
// arithmetic as IEEE 754 has it: nothing is checked and nothing panics.
type Sym [6]float64

// Identity returns the unit tensor: 1 for the normal components, 0 for the shear components.
func Identity() Sym { return Sym{XX: 1, YY: 1, ZZ: 1} }

// Add returns a + b.
func (a Sym) Add(b Sym) Sym {
	return Sym{a[XX] + b[XX], a[YY] + b[YY], a[ZZ] + b[ZZ], a[YZ] + b[YZ], a[XZ] + b[XZ], a[XY] + b[XY]}
}

// Sub returns a - b.
func (a Sym) Sub(b Sym) Sym {
	return Sym{a[XX] - b[XX], a[YY] - b[YY], a[ZZ] - b[ZZ], a[YZ] - b[YZ], a[XZ] - b[XZ], a[XY] - b[XY]}
}

// Scale returns k a.
func (a Sym) Scale(k float64) Sym {
	return Sym{k * a[XX], k * a[YY], k * a[ZZ], k * a[YZ], k * a[XZ], k * a[XY]}
}

// Trace returns xx + yy + zz: three times the mean stress, or the volume strain.
func (a Sym) Trace() float64 { return a[XX] + a[YY] + a[ZZ] }

// Mean returns a third of the trace. For a stress it is the mean stress, positive in tension (minus the pressure).
func (a Sym) Mean() float64 { return (a[XX] + a[YY] + a[ZZ]) / 3 }

// Deviator returns a less its mean on the diagonal.
//
// The normal components are formed from differences, s_xx = ((xx - yy) + (xx - zz))/3, so a large mean stress costs no
// digits beyond those it took from the components of a, and equal normal components give exact zeros. The trace of the
// result is zero to rounding of the deviator itself. Normal components further apart than about 4e307 overflow.
func (a Sym) Deviator() Sym {
	p, q, r := a[XX]-a[YY], a[YY]-a[ZZ], a[ZZ]-a[XX]
	return Sym{(p - r) / 3, (q - p) / 3, (r - q) / 3, a[YZ], a[XZ], a[XY]}
}

// Dot returns the double contraction a:b = Σ a_ij b_ij over all nine components, so that each stored shear component
// counts twice. For a stress and a strain it is an energy per volume.
func (a Sym) Dot(b Sym) float64 {
	return a[XX]*b[XX] + a[YY]*b[YY] + a[ZZ]*b[ZZ] + 2*(a[YZ]*b[YZ]+a[XZ]*b[XZ]+a[XY]*b[XY])
}

// Norm returns √(a:a), the Frobenius norm of the 3×3 matrix. The range in which it is accurate is that of Mises.
func (a Sym) Norm() float64 { return math.Sqrt(a.Dot(a)) }

// Mises returns the von Mises equivalent of a stress, √(3/2 s:s) with s the deviator (von Mises 1913):
//
//	σe² = ((xx - yy)² + (yy - zz)² + (zz - xx)²)/2 + 3(yz² + xz² + xy²)
//
// In uniaxial tension it is the stress, in pure shear √3 times the shear stress. Because only differences of the normal
// components enter, adding a pressure changes the result by no more than the rounding of the components themselves. The
// relative error is a few units in the last place.
//
// The squares are not guarded: the result is +Inf when a difference or a shear exceeds about 1e153, and it loses digits,
// down to zero, when all of them are below about 1e-146. A NaN component gives NaN.
func (a Sym) Mises() float64 {
	p, q, r := a[XX]-a[YY], a[YY]-a[ZZ], a[ZZ]-a[XX]
	return math.Sqrt(0.5*(p*p+q*q+r*r) + 3*(a[YZ]*a[YZ]+a[XZ]*a[XZ]+a[XY]*a[XY]))
}

// EquivalentStrain returns the von Mises equivalent of a strain, √(2/3 e:e) with e the deviator. For the creep strain of
// a bar in tension, whose volume does not change, it is the axial creep strain; in pure shear it is the engineering shear
// divided by √3. It is two thirds of what Mises gives for the same components, and has its accuracy and range.
func (a Sym) EquivalentStrain() float64 {
	p, q, r := a[XX]-a[YY], a[YY]-a[ZZ], a[ZZ]-a[XX]
	return math.Sqrt((2*(p*p+q*q+r*r) + 12*(a[YZ]*a[YZ]+a[XZ]*a[XZ]+a[XY]*a[XY])) / 9)
}

// IsFinite reports whether no component is NaN or infinite.
func (a Sym) IsFinite() bool {
	return (a[XX]-a[XX])+(a[YY]-a[YY])+(a[ZZ]-a[ZZ])+(a[YZ]-a[YZ])+(a[XZ]-a[XZ])+(a[XY]-a[XY]) == 0
}

// Matrix returns the full symmetric 3×3 matrix.
func (a Sym) Matrix() [3][3]float64 {
	return [3][3]float64{
		{a[XX], a[XY], a[XZ]},
		{a[XY], a[YY], a[YZ]},
		{a[XZ], a[YZ], a[ZZ]},
	}
}

// SymFromMatrix returns the symmetric part (m + mᵀ)/2. The antisymmetric part, a spin, is dropped without notice; a
// matrix that is already symmetric comes back bit for bit, unless it holds infinities, whose difference is NaN. A difference
// of two opposite components beyond 9e307 overflows.
func SymFromMatrix(m [3][3]float64) Sym {
	return Sym{m[0][0], m[1][1], m[2][2], mean(m[1][2], m[2][1]), mean(m[0][2], m[2][0]), mean(m[0][1], m[1][0])}
}

// mean of two numbers, exact when they are equal; a/2 + b/2 would not be for subnormal numbers.
func mean(a, b float64) float64 { return a + (b-a)/2 }
