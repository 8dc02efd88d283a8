package check

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
)

// recorder stands in for a test so that a failing comparison can itself be tested.
type recorder struct{ failures int }

func (r *recorder) Helper()               {}
func (r *recorder) Errorf(string, ...any) { r.failures++ }

func TestComparisonsFailWhenTheyShould(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	cases := []struct {
		name string
		run  func(TB) bool
		pass bool
	}{
		{"equal", func(t TB) bool { return Rel(t, "", 2, 2, 0) }, true},
		{"factor two of a small number", func(t TB) bool { return Rel(t, "", 1e-12, 2e-12, 1e-9) }, false},
		{"NaN got", func(t TB) bool { return Rel(t, "", nan, 1, 1) }, false},
		{"NaN both", func(t TB) bool { return Abs(t, "", nan, nan, 1) }, false},
		{"NaN tolerance", func(t TB) bool { return Abs(t, "", 1, 2, nan) }, false},
		{"infinite tolerance", func(t TB) bool { return Abs(t, "", 1, 2, inf) }, false},
		{"equal infinities", func(t TB) bool { return Abs(t, "", inf, inf, 0) }, true},
		{"opposite infinities", func(t TB) bool { return Abs(t, "", inf, -inf, 1) }, false},
		{"finite for infinite", func(t TB) bool { return Rel(t, "", 1, inf, 1e-3) }, false},
		{"relative to zero", func(t TB) bool { return Rel(t, "", 1e-300, 0, 1e-3) }, false},
		{"scaled", func(t TB) bool { return Scaled(t, "", 1e-9, 0, 100, 1e-10) }, true},
		{"slice", func(t TB) bool { return Slice(t, "", []float64{1, 2}, []float64{1, 2}, 1, 0) }, true},
		{"slice short", func(t TB) bool { return Slice(t, "", nil, []float64{1, 2}, 1, 1) }, false},
		{"slice NaN", func(t TB) bool { return Slice(t, "", []float64{1, nan}, []float64{1, 2}, 1, 1) }, false},
		{"one ulp", func(t TB) bool { return ULP(t, "", math.Nextafter(1, 2), 1, 1) }, true},
		{"two ulp", func(t TB) bool { return ULP(t, "", 1, 1-math.Ldexp(1, -52), 1) }, false},
		{"across zero", func(t TB) bool { return ULP(t, "", 5e-324, -5e-324, 2) }, true},
		{"NaN ulp", func(t TB) bool { return ULP(t, "", nan, 1, 1<<60) }, false},
	}
	for _, c := range cases {
		r := &recorder{}
		assert.Equal(t, c.pass, c.run(r), c.name)
		assert.Equal(t, !c.pass, r.failures > 0, "%s: reported", c.name)
	}
}
