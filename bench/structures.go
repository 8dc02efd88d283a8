package bench

import "math"

// TwoBars are two parallel bars of one material between a fixed and a moving rigid block, under a dead load:
//
//	elastic   σ₁/σ₂ = L₂/L₁,   steady creep (Norton)   σ₁/σ₂ = (L₂/L₁)^(1/n),   A₁σ₁ + A₂σ₂ = P
//
// Source: J. A. H. Hult 1966; J. T. Boyle, J. Spence 1983.
type TwoBars struct {
	Length1, Length2 float64 // L₁, L₂ [length], > 0
	Area1, Area2     float64 // A₁, A₂ [area], > 0
	Load             float64 // P [force], > 0
	Law              Norton
}

// Check reports the first impossible parameter.
func (b TwoBars) Check() error {
	c := checker{problem: "TwoBars"}
	c.positive("Length1", b.Length1)
	c.positive("Length2", b.Length2)
	c.positive("Area1", b.Area1)
	c.positive("Area2", b.Area2)
	c.positive("Load", b.Load)
	b.Law.check(&c)
	return c.err
}

// ElasticStresses returns σ₁ and σ₂ [stress] before any creep.
func (b TwoBars) ElasticStresses() (first, second float64) { return b.share(1) }

// SteadyStresses returns σ₁ and σ₂ [stress] when they no longer change.
func (b TwoBars) SteadyStresses() (first, second float64) { return b.share(b.Law.Exponent) }

func (b TwoBars) share(n float64) (first, second float64) {
	ratio := math.Exp(math.Log(b.Length1/b.Length2) / n) // σ₂/σ₁
	first = b.Load / (b.Area1 + b.Area2*ratio)
	return first, first * ratio
}

// ElongationRate returns the velocity of the block in the steady state [length/time].
func (b TwoBars) ElongationRate() float64 {
	first, _ := b.SteadyStresses()
	return b.Length1 * b.Law.RateAt(first)
}

// ThreeBarTruss is a middle bar of length L and two outer bars of the same section at an angle α to it, all joined at the
// loaded point, the load along the middle bar:
//
//	elastic        σ₂/σ₁ = cos²α,        σ₁ = (P/A)/(1 + 2 cos³α)
//	steady creep   σ₂/σ₁ = (cos α)^(2/n), σ₁ = (P/A)/(1 + 2 (cos α)^((n+2)/n))
//
// with σ₁ in the middle bar and σ₂ in the outer ones. The angle does not change with the deflection.
//
// Source: F. K. G. Odqvist, J. Hult 1962; L. M. Kachanov, Theory of Creep, 1960.
type ThreeBarTruss struct {
	Angle  float64 // α [rad], above 0 and below π/2
	Length float64 // L of the middle bar [length], > 0
	Area   float64 // A of each bar [area], > 0
	Load   float64 // P [force], > 0
	Law    Norton
}

// Check reports the first impossible parameter.
func (b ThreeBarTruss) Check() error {
	c := checker{problem: "ThreeBarTruss"}
	c.require(b.Angle > 0 && b.Angle < math.Pi/2, "Angle", b.Angle, "above 0 and below π/2")
	c.positive("Length", b.Length)
	c.positive("Area", b.Area)
	c.positive("Load", b.Load)
	b.Law.check(&c)
	return c.err
}

// ElasticStresses returns the stresses [stress] of the middle and the outer bars before any creep.
func (b ThreeBarTruss) ElasticStresses() (middle, outer float64) { return b.share(1) }

// SteadyStresses returns the stresses [stress] of the middle and the outer bars when they no longer change.
func (b ThreeBarTruss) SteadyStresses() (middle, outer float64) { return b.share(b.Law.Exponent) }

func (b ThreeBarTruss) share(n float64) (middle, outer float64) {
	cos := math.Cos(b.Angle)
	ratio := math.Pow(cos, 2/n)
	middle = b.Load / b.Area / (1 + 2*cos*ratio)
	return middle, middle * ratio
}

// DeflectionRate returns the velocity of the loaded point in the steady state [length/time].
func (b ThreeBarTruss) DeflectionRate() float64 {
	middle, _ := b.SteadyStresses()
	return b.Length * b.Law.RateAt(middle)
}
