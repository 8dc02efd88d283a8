package tensor

import (
	"strconv"
	"strings"
)

// Shear says what a host stores as the shear components of a strain.
type Shear uint8

const (
	// TensorShear: the shear strain is the tensor component ε_xy.
	TensorShear Shear = iota
	// EngineeringShear: the shear strain is the engineering shear γ_xy = 2 ε_xy.
	EngineeringShear
)

// String returns "tensor shear" or "engineering shear".
func (s Shear) String() string {
	switch s {
	case TensorShear:
		return "tensor shear"
	case EngineeringShear:
		return "engineering shear"
	}
	return "Shear(" + strconv.Itoa(int(s)) + ")"
}

// Layout says how a host code stores a stress or a strain as a slice: which components, in which order, and whether its
// shear strains are engineering or tensor. It carries strain in and stress and tangent out.
//
// Host and library round trips are exact to the bit; the one exception is named at StrainIn. The zero value is the
// order of Sym with tensor shear. A Layout is a small value without pointers: copy it, compare it with ==, share it between
// goroutines. No method but Components allocates, and none keeps or changes the slice it reads.
//
// Every slice must have exactly the length that the method states; another length is a bug of the caller and panics with
// a message that starts with "tensor: ". NaN and infinities pass through.
type Layout struct {
	// Component i of the host is component i+offset[i] of a Sym; so stored, the zero value is the order of Sym.
	offset  [6]int8
	missing uint8 // 6 - Len
	shear   Shear
}

// Len returns the number of components of the layout, 1 to 6.
func (l Layout) Len() int { return 6 - int(l.missing) }

// Shear returns the convention of the layout's shear strains.
func (l Layout) Shear() Shear { return l.shear }

// Components returns the names of the components in the host's order, such as "xx yy zz xy", always in the letters x, y, z.
// NewLayout(l.Components(), l.Shear()) is l again.
func (l Layout) Components() string {
	names := make([]string, l.Len())
	for i := range names {
		names[i] = componentNames[l.component(i)]
	}
	return strings.Join(names, " ")
}

var componentNames = [6]string{"xx", "yy", "zz", "yz", "xz", "xy"}

// StrainIn reads a host's strain of length Len. Components that the layout lacks are zero.
//
// Engineering shear is halved. That is exact for every number of magnitude 2^-1021 (4.5e-308) or more; below, where float64
// runs out of bits, an odd last bit is rounded to even, and such a strain may come out again changed by 5e-324.
func (l Layout) StrainIn(host []float64) Sym {
	if len(host) != l.Len() {
		panicLength("StrainIn", len(host), l.Len())
	}
	var e Sym
	for i, v := range host {
		k := l.component(i)
		if k > ZZ && l.shear == EngineeringShear {
			v *= 0.5
		}
		e[k] = v
	}
	return e
}

// StrainOut writes a strain to a host's slice of length Len. Components that the layout lacks are dropped.
//
// Engineering shear is the double of the tensor component, exact unless it overflows.
func (l Layout) StrainOut(dst []float64, e Sym) {
	if len(dst) != l.Len() {
		panicLength("StrainOut", len(dst), l.Len())
	}
	for i := range dst {
		k := l.component(i)
		v := e[k]
		if k > ZZ && l.shear == EngineeringShear {
			v *= 2
		}
		dst[i] = v
	}
}

// StressIn reads a host's stress of length Len. Components that the layout lacks are zero: a host that keeps three or four
// components but lives with a stress in another (the out-of-plane stress of plane strain under xx yy xy) must keep the
// whole Sym to carry it from step to step.
func (l Layout) StressIn(host []float64) Sym {
	if len(host) != l.Len() {
		panicLength("StressIn", len(host), l.Len())
	}
	var s Sym
	for i, v := range host {
		s[l.component(i)] = v
	}
	return s
}

// StressOut writes a stress to a host's slice of length Len. Components that the layout lacks are dropped. The shear
// convention plays no part: a shear stress is the same number in both.
func (l Layout) StressOut(dst []float64, s Sym) {
	if len(dst) != l.Len() {
		panicLength("StressOut", len(dst), l.Len())
	}
	for i := range dst {
		dst[i] = s[l.component(i)]
	}
}

// TangentOut writes the derivative of each host stress component by each host strain component, row by row (the stress
// component is the row), to a slice of length Len×Len.
//
// With engineering shear the entries are the tensor components C_ijkl themselves, and the matrix is symmetric when c is.
// With tensor shear the columns of shear strains are twice that, because the host's one number stands for the two equal
// components ε_xy and ε_yx; that matrix is not symmetric even when c is. Rows and columns of components that the layout
// lacks are dropped, which holds those strains fixed (plane strain, axisymmetry), not the stresses: plane stress needs a
// condensed tangent instead.
func (l Layout) TangentOut(dst []float64, c *Tangent) {
	n := l.Len()
	if len(dst) != n*n {
		panicLength("TangentOut", len(dst), n*n)
	}
	var column [6]int
	var factor [6]float64
	for j := range n {
		column[j], factor[j] = l.component(j), 1
		if column[j] > ZZ && l.shear == TensorShear {
			factor[j] = 2
		}
	}
	for i := range n {
		row, out := &c[column[i]], dst[i*n:i*n+n]
		for j := range out {
			out[j] = factor[j] * row[column[j]]
		}
	}
}

// component returns the index in a Sym of host component i.
func (l Layout) component(i int) int { return i + int(l.offset[i]) }

// NewLayout builds a layout from the names of its components in the host's order, separated by white space, such as
// "xx yy zz xy yz xz". "yx" is the same component as "xy". One to six components may be named, each once; the doc of each
// method says what happens to the rest.
//
// A host in cylindrical coordinates names them with r, t (the hoop direction θ) and z: they are read as x, y and z in this
// order, so that "rr zz tt rz" is the same layout as "xx zz yy xz". One list keeps to one set of letters.
//
// A *LayoutError reports an empty list, a word that is no component, a component named twice, mixed letters, and a shear
// convention that is neither TensorShear nor EngineeringShear.
func NewLayout(components string, shear Shear) (Layout, error) {
	fail := func(position int, word, reason string) (Layout, error) {
		return Layout{}, &LayoutError{Components: components, Word: word, Position: position, Reason: reason}
	}
	if shear > EngineeringShear {
		return fail(0, "", "unknown shear convention "+shear.String())
	}
	words := strings.Fields(components)
	if len(words) == 0 {
		return fail(0, "", "names no component")
	}
	var (
		l      = Layout{shear: shear}
		seen   [6]string
		family byte // 'x' or 'r' once a letter has told
	)
	for i, word := range words {
		k, f := parseComponent(word)
		switch {
		case k < 0:
			return fail(i+1, word, "is not two of the letters x y z, or of r t z")
		case f == mixedLetters, f != 0 && family != 0 && f != family:
			return fail(i+1, word, "mixes x, y with r, t in one layout")
		case seen[k] != "":
			return fail(i+1, word, "is the same component as "+strconv.Quote(seen[k])+" before it")
		}
		seen[k] = word
		if f != 0 {
			family = f
		}
		l.offset[i] = int8(k - i) // i < 6: a seventh word repeats one of six
	}
	l.missing = uint8(6 - len(words))
	return l, nil
}

// mixedLetters is the family of a word such as "xr".
const mixedLetters = 'm'

// parseComponent returns the index of a component in a Sym, or -1, and the letters it was written in: 'x', 'r', or 0 for
// "zz", which belongs to both.
func parseComponent(word string) (index int, family byte) {
	if len(word) != 2 {
		return -1, 0
	}
	i, f := parseAxis(word[0])
	j, g := parseAxis(word[1])
	switch {
	case i < 0 || j < 0:
		return -1, 0
	case f == 0:
		f = g
	case g != 0 && f != g:
		f = mixedLetters
	}
	return symIndex[i][j], f
}

func parseAxis(letter byte) (axis int, family byte) {
	switch letter {
	case 'x':
		return 0, 'x'
	case 'y':
		return 1, 'x'
	case 'r':
		return 0, 'r'
	case 't':
		return 1, 'r'
	case 'z':
		return 2, 0
	}
	return -1, 0
}
