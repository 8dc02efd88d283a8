package bench

import "math"

// RectangularBeam is a beam of rectangular section in pure bending in the steady state of Norton creep; plane sections stay
// plane:
//
//	σ(y) = (M/I_n) y^(1/n),   I_n = 2 b n/(2n+1) c^((2n+1)/n),   κ' = A (M/I_n)ⁿ
//
// Source: I. Finnie, W. R. Heller 1959; J. A. H. Hult 1966; J. T. Boyle, J. Spence 1983; R. K. Penny, D. L. Marriott 1971.
type RectangularBeam struct {
	Width     float64 // b [length], > 0
	HalfDepth float64 // c [length], > 0
	Moment    float64 // M [force·length], > 0
	Law       Norton
}

// Check reports the first impossible parameter.
func (b RectangularBeam) Check() error {
	c := checker{problem: "RectangularBeam"}
	c.positive("Width", b.Width)
	c.positive("HalfDepth", b.HalfDepth)
	c.positive("Moment", b.Moment)
	b.Law.check(&c)
	return c.err
}

// CreepInertia returns I_n [length^(3+1/n)], which is the moment of inertia for n = 1.
func (b RectangularBeam) CreepInertia() float64 {
	n := b.Law.Exponent
	return 2 * b.Width * n / (2*n + 1) * b.HalfDepth * b.HalfDepth * math.Pow(b.HalfDepth, 1/n)
}

// MaxStress returns the stress at the surface [stress], (2n+1)/(3n) of the elastic one.
func (b RectangularBeam) MaxStress() float64 {
	n := b.Law.Exponent
	return b.Moment / (2 * b.Width * b.HalfDepth * b.HalfDepth) * (2*n + 1) / n
}

// ElasticMaxStress returns the stress at the surface before any creep, 3M/(2bc²) [stress].
func (b RectangularBeam) ElasticMaxStress() float64 {
	return b.Moment / (2 * b.Width * b.HalfDepth * b.HalfDepth) * 3
}

// StressAt returns σ [stress] at the distance y from the middle plane [length], -c ≤ y ≤ c; NaN beyond.
func (b RectangularBeam) StressAt(y float64) float64 {
	return powerProfile(b.MaxStress(), y/b.HalfDepth, b.Law.Exponent)
}

// powerProfile is most·x^(1/n), odd in x, for -1 ≤ x ≤ 1.
func powerProfile(most, x, n float64) float64 {
	if !(math.Abs(x) <= 1) {
		return math.NaN()
	}
	return math.Copysign(most*math.Pow(math.Abs(x), 1/n), x)
}

// CurvatureRate returns κ' [1/(length·time)].
func (b RectangularBeam) CurvatureRate() float64 { return b.Law.RateAt(b.MaxStress()) / b.HalfDepth }

// SkeletalPoint returns y/c [-] of the point whose stress is the same before creep and in the steady state,
// [(2n+1)/(3n)]^(n/(n-1)), with the limit e^(-1/3) at n = 1, where the two states coincide.
func (b RectangularBeam) SkeletalPoint() float64 { return skeletal(b.Law.Exponent, 3) }

// skeletal is [1 - (n-1)/(parts·n)]^(n/(n-1)).
func skeletal(n, parts float64) float64 {
	if n == 1 {
		return math.Exp(-1 / parts)
	}
	return math.Exp(n / (n - 1) * math.Log1p(-(n-1)/(parts*n)))
}

// Cantilever is a beam of rectangular section, clamped at one end and loaded across the other, in the steady state of Norton
// creep. Shear deformation is left out:
//
//	δ' = A (P/I_n)ⁿ L^(n+2)/(n+2)
//
// Source: as RectangularBeam.
type Cantilever struct {
	Width     float64 // b [length], > 0
	HalfDepth float64 // c [length], > 0
	Length    float64 // L [length], > 0
	Load      float64 // P [force], > 0
	Law       Norton
}

// Check reports the first impossible parameter.
func (b Cantilever) Check() error {
	c := checker{problem: "Cantilever"}
	c.positive("Width", b.Width)
	c.positive("HalfDepth", b.HalfDepth)
	c.positive("Length", b.Length)
	c.positive("Load", b.Load)
	b.Law.check(&c)
	return c.err
}

// Root returns the beam under the moment P L of the clamped end.
func (b Cantilever) Root() RectangularBeam {
	return RectangularBeam{b.Width, b.HalfDepth, b.Load * b.Length, b.Law}
}

// TipVelocity returns δ' [length/time] of the loaded end.
func (b Cantilever) TipVelocity() float64 {
	return b.Root().CurvatureRate() * b.Length * b.Length / (b.Law.Exponent + 2)
}

// TorsionBar is a solid round bar in torsion in the steady state of Norton creep after von Mises. The tension law gives the
// shear law γ' = 3^((n+1)/2) A τⁿ, and
//
//	τ(r) = (T/J_n) r^(1/n),   J_n = 2π n/(3n+1) R^((3n+1)/n),   θ' = 3^((n+1)/2) A (T/J_n)ⁿ
//
// Source: I. Finnie, W. R. Heller 1959; F. K. G. Odqvist, J. Hult 1962; J. T. Boyle, J. Spence 1983.
type TorsionBar struct {
	Radius float64 // R [length], > 0
	Torque float64 // T [force·length], > 0
	Law    Norton  // in tension
}

// Check reports the first impossible parameter.
func (b TorsionBar) Check() error {
	c := checker{problem: "TorsionBar"}
	c.positive("Radius", b.Radius)
	c.positive("Torque", b.Torque)
	b.Law.check(&c)
	return c.err
}

// CreepInertia returns J_n [length^(3+1/n)], the polar moment of inertia for n = 1.
func (b TorsionBar) CreepInertia() float64 {
	n := b.Law.Exponent
	return 2 * math.Pi * n / (3*n + 1) * b.Radius * b.Radius * b.Radius * math.Pow(b.Radius, 1/n)
}

// MaxStress returns the shear stress at the surface [stress], (3n+1)/(4n) of the elastic one.
func (b TorsionBar) MaxStress() float64 {
	n := b.Law.Exponent
	return b.Torque / (2 * math.Pi * b.Radius * b.Radius * b.Radius) * (3*n + 1) / n
}

// ElasticMaxStress returns the shear stress at the surface before any creep, 2T/(πR³) [stress].
func (b TorsionBar) ElasticMaxStress() float64 {
	return 2 * b.Torque / (math.Pi * b.Radius * b.Radius * b.Radius)
}

// StressAt returns τ [stress] at the radius r [length], 0 ≤ r ≤ R; NaN beyond.
func (b TorsionBar) StressAt(r float64) float64 {
	if r < 0 {
		return math.NaN()
	}
	return powerProfile(b.MaxStress(), r/b.Radius, b.Law.Exponent)
}

// TwistRate returns θ' [rad/(length·time)].
func (b TorsionBar) TwistRate() float64 {
	return math.Sqrt(3) * b.Law.RateAt(math.Sqrt(3)*b.MaxStress()) / b.Radius
}

// SkeletalPoint returns r/R [-] of the point whose stress is the same before creep and in the steady state,
// [(3n+1)/(4n)]^(n/(n-1)), with the limit e^(-1/4) at n = 1.
func (b TorsionBar) SkeletalPoint() float64 { return skeletal(b.Law.Exponent, 4) }
