package main

import (
	"math"

	"gonum.org/v1/gonum/integrate/quad"

	"example.com/holdtime/bench"
)

// wallStress are the three stresses at a radius.
type wallStress struct{ radial, hoop, axial float64 }

func (s wallStress) mises() float64 {
	a, b, c := s.hoop-s.radial, s.hoop-s.axial, s.axial-s.radial
	return math.Sqrt((a*a + b*b + c*c) / 2)
}

// elastic is the closed form of the start: pressure after G. Lamé 1833, closed ends, and a temperature linear in ln r with
// free ends after S. Timoshenko, J. N. Goodier, Theory of Elasticity (from memory).
func (p *pipe) elastic(radius float64) wallStress {
	ratio, out := p.inner*p.inner/(p.outer*p.outer-p.inner*p.inner), p.outer*p.outer/(radius*radius)
	lame := p.pressure * ratio
	s := wallStress{lame * (1 - out), lame * (1 + out), lame}
	all, here := math.Log(p.outer/p.inner), math.Log(p.outer/radius)
	thermal := p.young * p.expansion * (p.boreKelvin - p.outerKelvin) / (2 * (1 - p.poisson) * all)
	s.radial += thermal * (-here - ratio*(1-out)*all)
	s.hoop += thermal * (1 - here - ratio*(1+out)*all)
	s.axial += thermal * (1 - 2*here - 2*ratio*all)
	return s
}

// bailey is the steady state at one temperature.
func (p *pipe) bailey() bench.ThickCylinder {
	return bench.ThickCylinder{Inner: p.inner, Outer: p.outer, Pressure: p.pressure, Law: p.nortonAt(p.boreKelvin)}
}

// steady is the state in which the stresses no longer change, for any temperature through the wall, without elements and
// without time steps. With closed ends the axial rate vanishes, so that the radial velocity is V/r, the equivalent rate
// (2/√3)V/r², and
//
//	σₑ = S [(2/√3)V / (r² R f)]^(1/n),   σθ - σr = (2/√3)σₑ,   σz = (σr + σθ)/2,   dσr/dr = (σθ - σr)/r
//
// with the rate R at the stress S and the factor f of temperature. V follows from the pressure by one integral over ln r. That
// the ends are in balance, ∫σz 2πr dr = πa²p, follows from equilibrium alone, whatever f is.
type steady struct {
	inner, outer    float64
	stress, rate, n float64
	factor          func(radius float64) float64 // f
	velocity        float64                      // V [mm²/h]
}

func (p *pipe) steady() steady {
	s := steady{inner: p.inner, outer: p.outer, stress: p.stress, rate: p.rate, n: p.exponent, velocity: 1,
		factor: func(radius float64) float64 { return p.activated(p.kelvinAt(radius)) }}
	s.velocity = math.Pow(p.pressure/-s.radialAt(p.inner), s.n)
	return s
}

func (s *steady) misesAt(radius float64) float64 {
	rate := 2 / math.Sqrt(3) * s.velocity / (radius * radius)
	return s.stress * math.Pow(rate/(s.rate*s.factor(radius)), 1/s.n)
}

// radialAt integrates equilibrium inwards from the outside by Gauss–Legendre quadrature in ln r; the integrand is an
// exponential of a slowly varying function, for which 40 points are far more than enough.
func (s *steady) radialAt(radius float64) float64 {
	if radius == s.outer {
		return 0
	}
	f := func(x float64) float64 { return 2 / math.Sqrt(3) * s.misesAt(math.Exp(x)) }
	return -quad.Fixed(f, math.Log(radius), math.Log(s.outer), 40, quad.Legendre{}, 0)
}

func (s *steady) at(radius float64) wallStress {
	radial, mises := s.radialAt(radius), s.misesAt(radius)
	return wallStress{radial, radial + 2/math.Sqrt(3)*mises, radial + mises/math.Sqrt(3)}
}

// power is Bailey's solution for a factor of temperature that is a power of the radius, f ∝ rᵐ through the values at both
// surfaces: the same with (2+m)/n in place of 2/n. It is an approximation for Arrhenius and steady conduction.
func (p *pipe) power(radius float64) wallStress {
	m := math.Log(p.activated(p.outerKelvin)/p.activated(p.boreKelvin)) / math.Log(p.outer/p.inner)
	k := (2 + m) / p.exponent
	if k == 0 { // limit
		k = 1e-9
	}
	out, all := k*math.Log(p.outer/radius), math.Expm1(k*math.Log(p.outer/p.inner))
	radial, grade := -p.pressure*math.Expm1(out)/all, p.pressure*k*math.Exp(out)/all
	return wallStress{radial, radial + grade, radial + grade/2}
}
