package integrate

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// Plasticity is rate-independent von Mises plasticity with isotropic hardening beside creep,
//
//	σₑ <= σy(κ, T),   dεp = (3/2) dκ s/σₑ,   dκ >= 0,   dκ = 0 where σₑ < σy
//
// with the von Mises stress σₑ, its deviator s and the accumulated equivalent plastic strain κ. Creep and plastic flow act
// together and share the direction of s; the strains are kept apart in State. The zero Plasticity is none.
//
// A step is backward Euler in both, solved at once for any size and any law that rises with stress:
//
//	σₑ = q - 3G (Δp + Δκ),   Δp = Δt ṗ(σₑ, p, T),   σₑ = σy(κ(old)+Δκ, T) if Δκ > 0
//
// with the trial von Mises stress q of the step and all of σₑ, p, κ, T at its end. Δt = 0 is plasticity alone. The tangent is
// exact and symmetric. Where plastic flow sets in it has a corner: a step that ends at the yield stress without plastic strain
// has the tangent of the side without plastic flow, and so has one whose trial stress is above the yield stress by no more than
// its own rounding. At a strain of a tabulated curve the tangent is that of the part the step ends in. Beside perfect plasticity
// the tangent has no stiffness along s: that is correct, and a host whose structure is unloaded far in one step does well to
// start from an elastic iteration. Heating alone can cause yielding, because σy falls with temperature.
//
// A creep law that softens with strain is followed from plastic flow alone, the limit of vanishing creep; where the solutions for
// longer and longer steps turn back, the step is beyond rupture.
//
// Not covered: kinematic hardening, a yield stress that depends on the rate, and laws with internal variables
// (creeplaw.Evolving), for which New returns a *CombinationError.
//
// The yield stress is a material's own at the temperatures of the component: a published one is a starting point, not design
// data, and the governing code says what may be used in an assessment.
//
// Sources: R. von Mises, Mechanik der festen Körper im plastisch-deformablen Zustand, Nachr. Ges. Wiss. Göttingen (1913)
// 582–592; J. C. Simo, T. J. R. Hughes, Computational Inelasticity, Springer 1998, chapter 3, for the return along the trial
// deviator without creep (both from memory).
type Plasticity struct {
	Hardening Hardening   // σy(κ, T); nil for no plasticity
	Memory    CreepMemory // what strain the creep law remembers; creep strain alone by default
}

// CreepMemory says which accumulated strain a creep law is given as its Point.Strain beside plasticity. It matters to laws
// that harden or soften with strain.
type CreepMemory uint8

// The strains a creep law can remember.
const (
	// RemembersCreep: the equivalent creep strain p alone. Plastic flow neither hardens nor softens creep.
	RemembersCreep CreepMemory = iota

	// RemembersInelastic: creep and plastic strain together, p + κ. A plastic prestrain then hardens creep as so much creep
	// strain would.
	RemembersInelastic
)

// Plasticity returns the plasticity the material was built with; its Hardening is nil if there is none.
func (m *Material) Plasticity() Plasticity {
	if m.plastic == nil {
		return Plasticity{}
	}
	p := Plasticity{Hardening: m.plastic.hardening}
	if m.plastic.inelastic {
		p.Memory = RemembersInelastic
	}
	return p
}

// CombinationError says that a material was asked for with two properties that this package does not combine.
type CombinationError struct {
	One, Other string
}

func (e *CombinationError) Error() string {
	return fmt.Sprintf("integrate: %s together with %s is not available", e.One, e.Other)
}

// plasticity is the Plasticity of a material, checked.
type plasticity struct {
	hardening Hardening
	inelastic bool
}

// newPlasticity returns nil for none.
func newPlasticity(p Plasticity, law creeplaw.Law) (*plasticity, error) {
	if p.Memory > RemembersInelastic {
		return nil, &MaterialError{"creep memory", float64(p.Memory), 0, "RemembersCreep or RemembersInelastic"}
	}
	if p.Hardening == nil {
		return nil, nil
	}
	if err := p.Hardening.check(); err != nil {
		return nil, err
	}
	if _, ok := law.(creeplaw.Evolving); ok {
		return nil, &CombinationError{"plasticity", "a creep law with internal variables"}
	}
	return &plasticity{hardening: p.Hardening, inelastic: p.Memory == RemembersInelastic}, nil
}

// remembered is the strain that the creep law sees.
func (m *plasticity) remembered(s *State) float64 {
	if m.inelastic {
		return s.Equivalent + s.EquivalentPlastic
	}
	return s.Equivalent
}

// inelastic is the state with its plastic strain counted as creep strain: what the elastic strain is short of.
func (s *State) inelastic() State {
	sum := *s
	sum.Creep = s.Creep.Add(s.Plastic)
	return sum
}

// plasticLength is the number of floats the plastic strains of a state pack to.
const plasticLength = 7

// length is the number of floats that plasticity adds to a packed state.
func (m *plasticity) length() int {
	if m == nil {
		return 0
	}
	return plasticLength
}

// pack and unpack write and read them. Without plasticity there are none, and unpacking leaves virgin material.
func (m *plasticity) pack(dst []float64, s *State) {
	if m != nil {
		copy(dst, s.Plastic[:])
		dst[len(s.Plastic)] = s.EquivalentPlastic
	}
}

func (m *plasticity) unpack(s *State, src []float64) {
	s.Plastic, s.EquivalentPlastic = tensor.Sym{}, 0
	if m != nil {
		copy(s.Plastic[:], src)
		s.EquivalentPlastic = src[len(s.Plastic)]
	}
}

// plasticValid reports whether the plastic strains are ones a material can have.
func (s *State) plasticValid() bool {
	return s.EquivalentPlastic >= 0 && finite(s.EquivalentPlastic) && s.Plastic.IsFinite()
}

// plasticFault names the one that is not, nil if there is none.
func (s *State) plasticFault() error {
	switch {
	case !(s.EquivalentPlastic >= 0) || math.IsInf(s.EquivalentPlastic, 1):
		return &UpdateError{Code: BadState, Quantity: "equivalent plastic strain", Value: s.EquivalentPlastic}
	case !s.Plastic.IsFinite():
		return componentFault(BadState, "plastic strain ", &s.Plastic)
	}
	return nil
}
