package integrate

import (
	"fmt"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// State is what a material point remembers. The caller owns it: a step reads a start state and writes an end state, so that
// a step can be repeated or cut. The zero State is virgin material. States are plain values: comparable, copied by
// assignment. A host that rotates its stresses rotates Creep with the same rotation.
type State struct {
	Creep      tensor.Sym // creep strain εc [-], tensor shear components
	Equivalent float64    // p: accumulated equivalent creep strain ∫√(⅔ ε̇c:ε̇c) dt [-], >= 0

	// Plastic strain εp [-], tensor shear components, and κ: accumulated equivalent plastic strain ∫√(⅔ ε̇p:ε̇p) dt [-], >= 0. A
	// material without Options.Plasticity leaves them as they are and does not see them.
	Plastic           tensor.Sym
	EquivalentPlastic float64

	// Internal are the internal variables of the law, in the order of Material.Variables, each as its deviation from the
	// initial value: 0 is virgin. What a law does not use is left as it is.
	Internal [creeplaw.MaxVariables]float64
}

// strainLength is the number of floats a state packs to, without internal variables.
const strainLength = 7

// StateLength is the number of values that PackState writes for one point of this material: seven, one for each internal
// variable of its law, and seven more with plasticity.
func (m *Material) StateLength() int { return strainLength + m.memory.count + m.plastic.length() }

// PackState writes a state as StateLength values: the creep strain xx, yy, zz, yz, xz, xy, the equivalent creep strain, then
// the deviations of the law's internal variables, then with plasticity the plastic strain and the equivalent plastic strain. A
// dst of another length is a caller's bug and panics. The round trip is exact.
func (m *Material) PackState(dst []float64, s *State) {
	checkLength("dst", len(dst), m.StateLength())
	copy(dst, s.Creep[:])
	dst[6] = s.Equivalent
	n := strainLength + copy(dst[strainLength:], s.Internal[:m.memory.count])
	m.plastic.pack(dst[n:], s)
}

// UnpackState reads what PackState wrote. A src of another length is a caller's bug and panics. The values are not judged
// here: the next step refuses a state no material can be in.
func (m *Material) UnpackState(s *State, src []float64) {
	checkLength("src", len(src), m.StateLength())
	copy(s.Creep[:], src)
	s.Equivalent = src[6]
	s.Internal = [creeplaw.MaxVariables]float64{}
	n := strainLength + copy(s.Internal[:m.memory.count], src[strainLength:])
	m.plastic.unpack(s, src[n:])
}

func checkLength(name string, got, want int) {
	if got != want {
		panic(fmt.Sprintf("integrate: %s has length %d, want %d", name, got, want))
	}
}

// valid reports whether the state is one a material can be in.
func (s *State) valid() bool {
	return s.Equivalent >= 0 && finite(s.Equivalent) && s.Creep.IsFinite()
}
