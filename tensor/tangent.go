package tensor

import "math"

// Tangent is a fourth-order tensor C_ijkl with the two minor symmetries C_ijkl = C_jikl = C_ijlk: the derivative of a
// stress by a strain.
//
// It holds the tensor components, row ij and column kl in the order of Sym: c[XX][XY] is C_xxxy. As a matrix it therefore
// maps a strain with engineering shear to stress. Major symmetry C_ijkl = C_klij is not assumed. The zero value is the
// zero tensor.
//
// Methods that produce a Tangent write it to their receiver, as in math/big, because it is large: c.Add(a, b) is c = a + b.
// Any of the arguments may be the receiver. No method allocates.
type Tangent [6][6]float64

// symIndex is the index in a Sym of the component with two axis numbers; axes is its inverse.
var (
	symIndex = [3][3]int{{XX, XY, XZ}, {XY, YY, YZ}, {XZ, YZ, ZZ}}
	axes     = [6][2]int{{0, 0}, {1, 1}, {2, 2}, {1, 2}, {0, 2}, {0, 1}}
)

// Contract returns C:e, the stress that belongs to a strain (with tensor shear, as every Sym): Σ C_ijkl e_kl over all nine
// kl, so that each shear column counts twice.
func (c *Tangent) Contract(e Sym) Sym {
	yz, xz, xy := 2*e[YZ], 2*e[XZ], 2*e[XY]
	var s Sym
	for i := range s {
		r := &c[i]
		s[i] = r[XX]*e[XX] + r[YY]*e[YY] + r[ZZ]*e[ZZ] + r[YZ]*yz + r[XZ]*xz + r[XY]*xy
	}
	return s
}

// SetIsotropic sets c to the tangent of isotropic linear elasticity with the bulk modulus and the shear modulus:
// C_ijkl = bulk δ_ij δ_kl + shear (δ_ik δ_jl + δ_il δ_jk - 2/3 δ_ij δ_kl).
func (c *Tangent) SetIsotropic(bulk, shear float64) {
	*c = Tangent{}
	for i := XX; i <= ZZ; i++ {
		for j := XX; j <= ZZ; j++ {
			c[i][j] = bulk - shear*(2./3)
		}
		c[i][i] = bulk + shear*(4./3)
		c[YZ+i][YZ+i] = shear
	}
}

// Add sets c to a + b.
func (c *Tangent) Add(a, b *Tangent) {
	for i := range c {
		for j := range c[i] {
			c[i][j] = a[i][j] + b[i][j]
		}
	}
}

// Scale sets c to k a.
func (c *Tangent) Scale(k float64, a *Tangent) {
	for i := range c {
		for j := range c[i] {
			c[i][j] = k * a[i][j]
		}
	}
}

// AddScaled sets c to a + k b.
func (c *Tangent) AddScaled(a *Tangent, k float64, b *Tangent) {
	for i := range c {
		for j := range c[i] {
			c[i][j] = a[i][j] + k*b[i][j]
		}
	}
}

// AddDyad adds k a⊗b, with components k a_ij b_kl, to c. When a and b are equal, a c with major symmetry keeps it to the
// bit.
func (c *Tangent) AddDyad(k float64, a, b Sym) {
	for i := range c {
		for j := range c[i] {
			c[i][j] += k * (a[i] * b[j])
		}
	}
}

// Asymmetry returns how far c is from major symmetry: the greatest |C_IJ - C_JI| divided by the greatest |C_IJ|. It is 0
// for a symmetric (and for the zero) tangent, 2 for an antisymmetric one, NaN when a component is NaN or infinite, and
// +Inf when the difference overflows.
func (c *Tangent) Asymmetry() float64 {
	var size, worst float64
	for i := range c {
		for j := range i {
			size = max(size, math.Abs(c[i][j]), math.Abs(c[j][i]))
			worst = max(worst, math.Abs(c[i][j]-c[j][i])) // max keeps a NaN
		}
		size = max(size, math.Abs(c[i][i]))
	}
	return relativeTo(size, worst)
}

// IsSymmetric reports whether Asymmetry is at most tol: 0 asks for equality to the bit, 1e-14 allows rounding. A component
// or a tol that is NaN makes it false.
func (c *Tangent) IsSymmetric(tol float64) bool { return c.Asymmetry() <= tol }

// SymmetricPart sets c to the part of a with major symmetry, (C_IJ + C_JI)/2. The result is symmetric to the bit, and a
// symmetric a comes through unchanged.
func (c *Tangent) SymmetricPart(a *Tangent) {
	for i := range c {
		for j := range i {
			m := mean(a[i][j], a[j][i])
			c[i][j], c[j][i] = m, m
		}
		c[i][i] = a[i][i]
	}
}

// Rotate sets c to a turned by q: C_ijkl = q_im q_jn q_kp q_lr A_mnpr, or the components of a in the frame whose axes are
// the rows of q. For any strain, c.Contract(e.Rotate(q)) is a.Contract(e).Rotate(q).
func (c *Tangent) Rotate(a *Tangent, q Rotation) {
	// m turns the six components of a stress, so c = m a mᵀ (Bond 1943).
	var m, t Tangent
	for i, ij := range axes {
		p, r := &q[ij[0]], &q[ij[1]]
		for k := range 3 {
			m[i][k] = p[k] * r[k]
		}
		for k := YZ; k <= XY; k++ {
			u, v := axes[k][0], axes[k][1]
			m[i][k] = p[u]*r[v] + p[v]*r[u]
		}
	}
	for i := range t { // t = m a
		for k, f := range m[i] {
			for j := range t[i] {
				t[i][j] += f * a[k][j]
			}
		}
	}
	for i := range c {
		for j := range c[i] {
			c[i][j] = dot6(&t[i], &m[j])
		}
	}
}

func dot6(a, b *[6]float64) float64 {
	return a[0]*b[0] + a[1]*b[1] + a[2]*b[2] + a[3]*b[3] + a[4]*b[4] + a[5]*b[5]
}
