package bench

import "math"

// ThickCylinder is a thick-walled cylinder under internal pressure in the steady state of Norton creep after von Mises, in
// plane strain. With k = 2/n and D = (b/a)^k - 1
//
//	σ_r = p [1 - (b/r)^k]/D,   σ_θ = p [1 - (1-k)(b/r)^k]/D,   σ_z = (σ_r + σ_θ)/2,   σₑ = (√3/n) p (b/r)^k/D
//
// Closed ends give the same stresses. n = 1 is the elastic distribution of an incompressible cylinder.
//
// Source: R. W. Bailey 1935; I. Finnie, W. R. Heller 1959; F. K. G. Odqvist, J. Hult 1962; J. T. Boyle, J. Spence 1983.
type ThickCylinder struct {
	Inner    float64 // a: bore radius [length], > 0
	Outer    float64 // b [length], > a
	Pressure float64 // p [stress], > 0
	Law      Norton
}

// Check reports the first impossible parameter.
func (v ThickCylinder) Check() error {
	return checkWall("ThickCylinder", v.Inner, v.Outer, v.Pressure, v.Law)
}

func checkWall(problem string, inner, outer, pressure float64, law Norton) error {
	c := checker{problem: problem}
	c.positive("Inner", inner)
	c.positive("Outer", outer)
	c.require(outer > inner, "Outer", outer, "above Inner")
	c.positive("Pressure", pressure)
	law.check(&c)
	return c.err
}

// wall returns p (b/r)^k/D and -p [(b/r)^k - 1]/D, which do not cancel for large n or a thin wall; NaN outside the wall.
func wall(inner, outer, r, k, pressure float64) (grade, radial float64) {
	if !(r >= inner && r <= outer) {
		return math.NaN(), math.NaN()
	}
	out, all := k*math.Log(outer/r), math.Expm1(k*math.Log(outer/inner))
	return pressure * math.Exp(out) / all, -pressure * math.Expm1(out) / all
}

func (v ThickCylinder) wall(r float64) (grade, radial float64) {
	return wall(v.Inner, v.Outer, r, 2/v.Law.Exponent, v.Pressure)
}

// RadialAt returns σ_r [stress] at the radius r [length]; NaN outside the wall, as the other methods.
func (v ThickCylinder) RadialAt(r float64) float64 {
	_, radial := v.wall(r)
	return radial
}

// HoopAt returns σ_θ [stress] at the radius r.
func (v ThickCylinder) HoopAt(r float64) float64 {
	grade, radial := v.wall(r)
	return radial + 2/v.Law.Exponent*grade
}

// AxialAt returns σ_z [stress] at the radius r.
func (v ThickCylinder) AxialAt(r float64) float64 {
	grade, radial := v.wall(r)
	return radial + grade/v.Law.Exponent
}

// MisesAt returns σₑ [stress] at the radius r.
func (v ThickCylinder) MisesAt(r float64) float64 {
	grade, _ := v.wall(r)
	return math.Sqrt(3) / v.Law.Exponent * grade
}

// VelocityAt returns the radial velocity (√3/2) r A σₑⁿ [length/time], which falls as 1/r.
func (v ThickCylinder) VelocityAt(r float64) float64 {
	return math.Sqrt(3) / 2 * r * v.Law.RateAt(v.MisesAt(r))
}

// ThickSphere is a thick-walled sphere under internal pressure in the steady state of Norton creep after von Mises. With
// k = 3/n and D = (b/a)^k - 1
//
//	σ_r = p [1 - (b/r)^k]/D,   σ_θ = σ_φ = p [1 - (1-k/2)(b/r)^k]/D,   σₑ = σ_θ - σ_r = (k/2) p (b/r)^k/D
//
// Source: R. W. Bailey 1935; I. Finnie, W. R. Heller 1959; J. T. Boyle, J. Spence 1983.
type ThickSphere struct {
	Inner    float64 // a: inner radius [length], > 0
	Outer    float64 // b [length], > a
	Pressure float64 // p [stress], > 0
	Law      Norton
}

// Check reports the first impossible parameter.
func (v ThickSphere) Check() error {
	return checkWall("ThickSphere", v.Inner, v.Outer, v.Pressure, v.Law)
}

func (v ThickSphere) wall(r float64) (grade, radial float64) {
	return wall(v.Inner, v.Outer, r, 3/v.Law.Exponent, v.Pressure)
}

// RadialAt returns σ_r [stress] at the radius r [length]; NaN outside the wall, as the other methods.
func (v ThickSphere) RadialAt(r float64) float64 {
	_, radial := v.wall(r)
	return radial
}

// HoopAt returns σ_θ = σ_φ [stress] at the radius r.
func (v ThickSphere) HoopAt(r float64) float64 {
	_, radial := v.wall(r)
	return radial + v.MisesAt(r)
}

// MisesAt returns σₑ [stress] at the radius r.
func (v ThickSphere) MisesAt(r float64) float64 {
	grade, _ := v.wall(r)
	return 1.5 / v.Law.Exponent * grade
}

// VelocityAt returns the radial velocity r A σₑⁿ/2 [length/time], which falls as 1/r².
func (v ThickSphere) VelocityAt(r float64) float64 { return r / 2 * v.Law.RateAt(v.MisesAt(r)) }
