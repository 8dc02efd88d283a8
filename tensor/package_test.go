package tensor_test

import (
	"go/parser"
	"go/token"
	"os"
	"strings"
	"testing"

	"example.com/holdtime/tensor"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// TestNothingAllocates covers every method that a material point may call. (Errors and panics allocate; they come from bad
// set-up and from bugs.)
func TestNothingAllocates(t *testing.T) {
	var (
		a, b   = tensor.Sym{150, -20, 40, 35, 1, 60}, tensor.Sym{1, 2, 3, 4, 5, 6}
		q      = mustAxisAngle(t, [3]float64{1, 2, 3}, 0.7)
		c, d   = isotropic(160e9, 0.3), isotropic(70e9, 0.33)
		dst    tensor.Tangent
		f      = c.Full()
		l      = mustLayout(t, "xx yy zz xy", tensor.EngineeringShear)
		host   = make([]float64, 4)
		matrix = make([]float64, 16)
		p      tensor.Rotation
		sink   float64
		sym    tensor.Sym
		values [3]float64
		axes   [3][3]float64
		full   tensor.FullTangent
		ok     bool
	)
	for name, call := range map[string]func(){
		"Add":              func() { sym = a.Add(b) },
		"Sub":              func() { sym = a.Sub(b) },
		"Scale":            func() { sym = a.Scale(2) },
		"Deviator":         func() { sym = a.Deviator() },
		"Trace":            func() { sink = a.Trace() },
		"Mean":             func() { sink = a.Mean() },
		"Dot":              func() { sink = a.Dot(b) },
		"Norm":             func() { sink = a.Norm() },
		"Mises":            func() { sink = a.Mises() },
		"EquivalentStrain": func() { sink = a.EquivalentStrain() },
		"IsFinite":         func() { ok = a.IsFinite() },
		"Matrix":           func() { sym = tensor.SymFromMatrix(a.Matrix()) },
		"PrincipalValues":  func() { values = a.PrincipalValues() },
		"Principal":        func() { values, axes = a.Principal() },
		"Sym.Rotate":       func() { sym = a.Rotate(q) },
		"AxisAngle":        func() { p, _ = tensor.AxisAngle([3]float64{3, 2, 1}, 0.1) },
		"RotationVector":   func() { p, _ = tensor.RotationVector([3]float64{0.3, 0.2, 0.1}) },
		"Transpose":        func() { p = q.Transpose() },
		"Mul":              func() { p = q.Mul(q) },
		"Apply":            func() { values = q.Apply(values) },
		"Check":            func() { ok = q.Check(1) == nil },
		"Contract":         func() { sym = c.Contract(a) },
		"SetIsotropic":     func() { dst.SetIsotropic(2, 1) },
		"Tangent.Add":      func() { dst.Add(&c, &d) },
		"Tangent.Scale":    func() { dst.Scale(2, &c) },
		"AddScaled":        func() { dst.AddScaled(&c, 2, &d) },
		"AddDyad":          func() { dst.AddDyad(1, a, b) },
		"IsSymmetric":      func() { ok = c.IsSymmetric(1e-14) },
		"SymmetricPart":    func() { dst.SymmetricPart(&c) },
		"Tangent.Rotate":   func() { dst.Rotate(&c, q) },
		"Full":             func() { full = c.Full() },
		"MinorPart":        func() { dst.MinorPart(&f) },
		"MinorAsymmetry":   func() { sink = f.MinorAsymmetry() },
		"StrainIn":         func() { sym = l.StrainIn(host) },
		"StrainOut":        func() { l.StrainOut(host, a) },
		"StressIn":         func() { sym = l.StressIn(host) },
		"StressOut":        func() { l.StressOut(host, a) },
		"TangentOut":       func() { l.TangentOut(matrix, &c) },
	} {
		assert.Zero(t, testing.AllocsPerRun(100, call), name)
	}
	_, _, _, _, _, _ = p, sink, sym, axes, full, ok
}

// TestStandardLibraryOnly: a host that embeds the package gets nothing else with it. The first element of an import path
// has a dot unless it is the standard library's.
func TestStandardLibraryOnly(t *testing.T) {
	files, err := os.ReadDir(".")
	require.NoError(t, err)
	seen := 0
	for _, file := range files {
		name := file.Name()
		if !strings.HasSuffix(name, ".go") || strings.HasSuffix(name, "_test.go") {
			continue
		}
		parsed, err := parser.ParseFile(token.NewFileSet(), name, nil, parser.ImportsOnly)
		require.NoError(t, err)
		seen++
		for _, i := range parsed.Imports {
			first, _, _ := strings.Cut(strings.Trim(i.Path.Value, `"`), "/")
			assert.NotContains(t, first, ".", "%s imports %s", name, i.Path.Value)
		}
	}
	assert.Positive(t, seen)
}

// TestConcurrentUse: shared values and layouts, any number of goroutines, the same bits. Meant for the race detector too.
func TestConcurrentUse(t *testing.T) {
	l := mustLayout(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	c := isotropic(160e9, 0.3)
	host := []float64{1e-3, -2e-3, 3e-4, 4e-4, 5e-5, -6e-5}
	run := func() (out [42]float64) {
		s := c.Contract(l.StrainIn(host))
		l.StressOut(out[:6], s)
		l.TangentOut(out[6:], &c)
		_, v := s.Principal()
		l.StressOut(out[:6], s.Rotate(v))
		return out
	}
	want, results := run(), make(chan [42]float64)
	for range 16 {
		go func() { results <- run() }()
	}
	for range 16 {
		assert.Equal(t, want, <-results)
	}
}
