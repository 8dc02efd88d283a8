package integrate

import (
	"fmt"

	"example.com/holdtime/tensor"
)

// State is what a material point remembers. The caller owns it: a step reads a start state and writes an end state, so that
// a step can be repeated or cut. The zero State is virgin material. States are plain values: comparable, copied by
// assignment. A host that rotates its stresses rotates Creep with the same rotation.
type State struct {
	Creep      tensor.Sym // creep strain εc [-], tensor shear components
	Equivalent float64    // p: accumulated equivalent creep strain ∫√(⅔ ε̇c:ε̇c) dt [-], >= 0
}

// stateLength is the number of floats a state packs to.
const stateLength = 7

// StateLength is the number of values that PackState writes for one point of this material.
func (m *Material) StateLength() int { return stateLength }

// PackState writes a state as StateLength values: the creep strain xx, yy, zz, yz, xz, xy, then the equivalent creep strain.
// A dst of another length is a caller's bug and panics. The round trip is exact.
func (m *Material) PackState(dst []float64, s *State) {
	checkLength("dst", len(dst), m.StateLength())
	copy(dst, s.Creep[:])
	dst[6] = s.Equivalent
}

// UnpackState reads what PackState wrote. A src of another length is a caller's bug and panics. The values are not judged
// here: the next step refuses a state no material can be in.
func (m *Material) UnpackState(s *State, src []float64) {
	checkLength("src", len(src), m.StateLength())
	copy(s.Creep[:], src)
	s.Equivalent = src[6]
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
