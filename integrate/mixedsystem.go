package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// mixedSystem is the linear problem of mixed control at fixed ω,
//
//	(1+ω)/2G s_i + tr σ/9K + k_i σ_i = d_i   for the components not prescribed in stress,
//
// where k is the compliance of a relation and d what is prescribed less the creep strain at the start and the thermal strain.
// Shear components stand alone. The normal ones are brought to at most two independent modes that obey
//
//	(1+ξ+ω) η = 2G g,   so that η(ω) = η(0)/(1 + ω/(1+ξ))
//
// on top of a part that does not depend on ω: the hydrostatic stress, or what the prescribed stresses leave. All sums that
// make ξ are of terms of one sign, so that very soft and very stiff surroundings lose no digits.
type mixedSystem struct {
	twoG     float64
	volume   float64    // 1/3K
	given    [6]bool    // prescribed in stress
	count    int        // normal components not prescribed in stress
	order    [3]int     // the normal components: those not prescribed in stress first, stiffest surroundings first
	soft     [3]float64 // their compliances k, in this order
	drift    [3]float64 // three of them: (1/3K+k_i)/Σ, how much of the trace condition each carries
	cos, sin float64    // the rotation that makes the normal modes independent
	normal   [2]float64 // 1+ξ of the normal modes
	shear    [3]float64 // 1+ξ of yz, xz, xy
}

// mixedAmplitudes is a right side of the system, solved for ω = 0.
type mixedAmplitudes struct {
	base     tensor.Sym // the part that does not depend on ω
	deviator tensor.Sym // its deviator
	normal   [2]float64 // η(0) of the normal modes
	shear    [3]float64 // of the shear components not prescribed in stress
}

// mixedKeep holds what is left of each mode, 1/(1 + ω/(1+ξ)).
type mixedKeep struct {
	normal [2]float64
	shear  [3]float64
}

func (s *mixedSystem) build(c *Control, bulk, shear float64) {
	s.twoG, s.volume = 2*shear, 1/(3*bulk)
	for i := range c.component {
		k := &c.component[i]
		s.given[i] = k.stress
		switch {
		case i > tensor.ZZ:
			s.shear[i-tensor.YZ] = 1 + s.twoG*k.compliance
		case !k.stress:
			s.insert(i, k.compliance)
		}
	}
	last := 3
	for i := tensor.XX; i <= tensor.ZZ; i++ {
		if s.given[i] {
			last--
			s.order[last] = i
		}
	}
	s.cos = 1
	v, k1, k2, k3 := s.volume, s.soft[0], s.soft[1], s.soft[2]
	switch s.count {
	case 1:
		s.normal[0] = 1 + s.twoG*1.5*(v/3+k1)
	case 2:
		s.diagonalise(v/3+k1, v/3, v/3+k2)
	case 3:
		sum := 3*v + k1 + k2 + k3
		for i := range s.drift {
			s.drift[i] = (v + s.soft[i]) / sum
		}
		s.diagonalise(
			(v*(4*k1+k2+k3)+3*k1*(k2+k3))/(3*sum),
			(v*(k3-2*(k1+k2))-3*k1*k2)/(3*sum),
			(v*(4*k2+k1+k3)+3*k2*(k1+k3))/(3*sum))
	}
}

// insert adds a normal component not prescribed in stress, ascending in compliance.
func (s *mixedSystem) insert(i int, compliance float64) {
	at := s.count
	for at > 0 && s.soft[at-1] > compliance {
		s.soft[at], s.order[at] = s.soft[at-1], s.order[at-1]
		at--
	}
	s.soft[at], s.order[at] = compliance, i
	s.count++
}

// The deviatoric compliance of the first two normal components is (1/2G) L Lᵀ with L Lᵀ = [⅔ -⅓; -⅓ ⅔].
const (
	root3   = 1.7320508075688772935274463415059
	root2   = 1.4142135623730950488016887242097
	root1p5 = 1.2247448713915890490986420373529
)

// diagonalise takes what surroundings and volume add to the compliance of the first two normal components to the
// coordinates in which the deviatoric compliance is 1/2G times unity, and from there to independent modes by one rotation.
func (s *mixedSystem) diagonalise(x11, x12, x22 float64) {
	c11 := s.twoG * 1.5 * x11
	c12 := s.twoG * root3 * (x11/2 + x12)
	c22 := s.twoG * (x11/2 + 2*x12 + 2*x22)
	t := 0.0
	if c12 != 0 {
		zeta := (c22 - c11) / (2 * c12)
		t = math.Copysign(1/(math.Abs(zeta)+math.Hypot(1, zeta)), zeta)
	}
	s.cos = 1 / math.Sqrt(1+t*t)
	s.sin = t * s.cos
	s.normal = [2]float64{1 + math.Max(c11-t*c12, 0), 1 + c22 + t*c12}
}

// amplitudes solves for ω = 0. data holds the stress where that is prescribed, d elsewhere.
func (s *mixedSystem) amplitudes(data *tensor.Sym) mixedAmplitudes {
	var a mixedAmplitudes
	for i := tensor.YZ; i <= tensor.XY; i++ {
		if s.given[i] {
			a.base[i], a.deviator[i] = data[i], data[i]
		} else {
			a.shear[i-tensor.YZ] = s.twoG / s.shear[i-tensor.YZ] * data[i]
		}
	}
	first, second, third := s.order[0], s.order[1], s.order[2]
	var f1, f2 float64 // forcing of the first two normal components
	switch s.count {
	case 0:
		for i := tensor.XX; i <= tensor.ZZ; i++ {
			a.base[i] = data[i]
		}
		d := a.base.Deviator()
		copy(a.deviator[:3], d[:3])
		return a
	case 1: // the free stress at the mean of the others leaves the least von Mises stress
		middle, half := (data[second]+data[third])/2, (data[second]-data[third])/2
		a.base[first], a.base[second], a.base[third] = middle, data[second], data[third]
		a.deviator[second], a.deviator[third] = half, -half
		a.normal[0] = root1p5 * (data[first] - (s.volume+s.soft[0])*middle) * (s.twoG / s.normal[0])
		return a
	case 2:
		pressure := data[third]
		a.base[first], a.base[second], a.base[third] = pressure, pressure, pressure
		f1 = data[first] - (s.volume+s.soft[0])*pressure
		f2 = data[second] - (s.volume+s.soft[1])*pressure
	case 3:
		d1, d2, d3 := data[first], data[second], data[third]
		sum := 3*s.volume + s.soft[0] + s.soft[1] + s.soft[2]
		pressure := (d1 + d2 + d3) / sum
		a.base[first], a.base[second], a.base[third] = pressure, pressure, pressure
		// d_i less its part of the trace condition, from differences that do not cancel for k₁ <= k₂ <= k₃
		k12, k13, k23 := (s.soft[1]-s.soft[0])/sum, (s.soft[2]-s.soft[0])/sum, (s.soft[2]-s.soft[1])/sum
		f1 = s.drift[0]*((d1-d2)+(d1-d3)) + (k12+k13)*d1
		f2 = s.drift[0]*(d2-d1) - k12*d1 + s.drift[1]*(d2-d3) + k23*d2
	}
	g1, g2 := root1p5*f1, f1/root2+root2*f2 // L⁻¹ f
	a.normal[0] = (s.cos*g1 - s.sin*g2) * (s.twoG / s.normal[0])
	a.normal[1] = (s.sin*g1 + s.cos*g2) * (s.twoG / s.normal[1])
	return a
}

// addTo gives a flow the modes of the trial state.
func (a *mixedAmplitudes) addTo(f *flow, s *mixedSystem) {
	f.add(1.5*a.deviator.Dot(a.deviator), 0)
	for i, v := range a.normal {
		if v != 0 {
			f.add(1.5*v*v, 1/s.normal[i])
		}
	}
	for i, v := range a.shear {
		if v != 0 {
			f.add(3*v*v, 1/s.shear[i])
		}
	}
}

// keep returns what is left of the modes at ω.
func (s *mixedSystem) keep(odds float64) (k mixedKeep) {
	for i, inner := range s.normal {
		k.normal[i] = 1 / (1 + odds/math.Max(inner, 1))
	}
	for i, inner := range s.shear {
		k.shear[i] = 1 / (1 + odds/inner)
	}
	return k
}

// byOdds returns the derivative of a keep by ln ω.
func (k mixedKeep) byOdds() mixedKeep {
	for i, r := range k.normal {
		k.normal[i] = -r * (1 - r)
	}
	for i, r := range k.shear {
		k.shear[i] = -r * (1 - r)
	}
	return k
}

// stress composes a stress, its deviator and its mean from the modes and from base times the part without ω.
func (s *mixedSystem) stress(a *mixedAmplitudes, k *mixedKeep, base float64) (stress, deviator tensor.Sym, mean float64) {
	stress, deviator = a.base.Scale(base), a.deviator.Scale(base)
	for i := range a.shear {
		if j := i + tensor.YZ; !s.given[j] {
			stress[j] = k.shear[i] * a.shear[i]
			deviator[j] = stress[j]
		}
	}
	y1, y2 := k.normal[0]*a.normal[0], k.normal[1]*a.normal[1]
	y1, y2 = s.cos*y1+s.sin*y2, s.cos*y2-s.sin*y1
	c1, c2 := root1p5*y1+y2/root2, root2*y2 // L⁻ᵀ y: the stresses of the first two components
	deviator[s.order[0]] += (2*c1 - c2) / 3
	deviator[s.order[1]] += (2*c2 - c1) / 3
	deviator[s.order[2]] -= (c1 + c2) / 3
	shift := s.drift[0]*c1 + s.drift[1]*c2
	stress[s.order[0]] += c1 - shift
	stress[s.order[1]] += c2 - shift
	stress[s.order[2]] -= shift
	return stress, deviator, stress.Mean()
}

// stiffer reports whether the surroundings of a component are stiffer than the material, so that its strain is better found
// from what is prescribed than from the flow rule.
func (s *mixedSystem) stiffer(k *condition) bool {
	return !k.stress && k.compliance*s.twoG <= 1
}
