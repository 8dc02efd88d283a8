package tensor_test

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/holdtime/tensor"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

const (
	xx, yy, zz = tensor.XX, tensor.YY, tensor.ZZ
	yz, xz, xy = tensor.YZ, tensor.XZ, tensor.XY
)

// hostLayouts are the sets in use, with the indexes in a Sym that their words mean, written by hand.
var hostLayouts = []struct {
	components string
	at         []int
}{
	{"xx yy zz xy yz xz", []int{xx, yy, zz, xy, yz, xz}},
	{"xx yy zz yz xz xy", []int{xx, yy, zz, yz, xz, xy}},
	{"xx yy zz xy", []int{xx, yy, zz, xy}},
	{"rr zz tt rz", []int{xx, zz, yy, xz}},
	{"rr tt zz rt tz zr", []int{xx, yy, zz, xy, yz, xz}},
	{"xx yy xy", []int{xx, yy, xy}},
	{"zx yx", []int{xz, xy}},
	{"zz", []int{zz}},
	{"  xy\tzz\nyz ", []int{xy, zz, yz}},
}

func mustLayout(t testing.TB, components string, shear tensor.Shear) tensor.Layout {
	t.Helper()
	l, err := tensor.NewLayout(components, shear)
	require.NoError(t, err)
	return l
}

// TestLayoutPlacesComponents uses a different whole number in every component, and both shear conventions.
func TestLayoutPlacesComponents(t *testing.T) {
	inside := tensor.Sym{11, 22, 33, 23, 13, 12}
	for _, c := range hostLayouts {
		for _, shear := range []tensor.Shear{tensor.TensorShear, tensor.EngineeringShear} {
			l := mustLayout(t, c.components, shear)
			require.Equal(t, len(c.at), l.Len(), c.components)
			assert.Equal(t, shear, l.Shear())
			var kept tensor.Sym // what the layout has; the rest must read as zero
			stress, strain := make([]float64, l.Len()), make([]float64, l.Len())
			for i, k := range c.at {
				kept[k] = inside[k]
				stress[i], strain[i] = inside[k], inside[k]
				if k > zz && shear == tensor.EngineeringShear {
					strain[i] = 2 * inside[k]
				}
			}
			out := nans(l.Len())
			l.StressOut(out, inside)
			assert.Equal(t, stress, out, "%s: stress out", c.components)
			assert.Equal(t, kept, l.StressIn(stress), "%s: stress in", c.components)
			l.StrainOut(out, inside)
			assert.Equal(t, strain, out, "%s, %v: strain out", c.components, shear)
			assert.Equal(t, kept, l.StrainIn(strain), "%s, %v: strain in", c.components, shear)
		}
	}
}

// TestLayoutRoundTrips are exact to the bit, both ways, for numbers of every size.
func TestLayoutRoundTrips(t *testing.T) {
	r, cases := source(t, 30, 500)
	for _, c := range hostLayouts {
		for _, shear := range []tensor.Shear{tensor.TensorShear, tensor.EngineeringShear} {
			l := mustLayout(t, c.components, shear)
			host, out := make([]float64, l.Len()), nans(l.Len())
			for range cases {
				for i := range host {
					host[i] = anyNormal(r)
				}
				l.StrainOut(out, l.StrainIn(host))
				require.True(t, sameBits(host, out), "%s, %v: strain %v became %v", c.components, shear, host, out)
				l.StressOut(out, l.StressIn(host))
				require.True(t, sameBits(host, out), "%s: stress %v became %v", c.components, host, out)
				e := l.StrainIn(host)
				l.StrainOut(out, e)
				again := l.StrainIn(out)
				require.True(t, sameBits(e[:], again[:]), "%s, %v: %v became %v", c.components, shear, e, again)
			}
		}
	}
}

// anyNormal returns a number of any sign and exponent, from the smallest whose half is normal to the greatest.
func anyNormal(r *rand.Rand) float64 {
	if r.IntN(20) == 0 {
		return []float64{0, math.Copysign(0, -1), math.Inf(1), math.Inf(-1), math.MaxFloat64, 0x1p-1021}[r.IntN(6)]
	}
	return math.Ldexp(1+r.Float64(), r.IntN(2045)-1021) * float64(2*r.IntN(2)-1)
}

// TestSubnormalShear is the documented exception: an engineering shear below 2^-1021 may lose its last bit to the halving,
// by no more than half the smallest number and to even; a tensor component never does, and nothing is lost without halving.
func TestSubnormalShear(t *testing.T) {
	const smallest = 5e-324
	engineering := mustLayout(t, "xy", tensor.EngineeringShear)
	out := make([]float64, 1)
	for _, c := range []struct{ host, inside float64 }{ // in units of the smallest number
		{1, 0}, {2, 1}, {3, 2}, {4, 2}, {5, 2}, {-7, -4}, {1<<53 - 2, 1<<52 - 1}, {1<<53 - 1, 1 << 52},
	} {
		e := engineering.StrainIn([]float64{c.host * smallest})
		assert.Equal(t, c.inside*smallest, e[xy], "%v smallest numbers", c.host)
	}
	for _, inside := range []float64{1, 3, 1<<52 - 1} {
		engineering.StrainOut(out, tensor.Sym{xy: inside * smallest})
		assert.Equal(t, inside*smallest, engineering.StrainIn(out)[xy])
	}
	exact := mustLayout(t, "xy", tensor.TensorShear)
	assert.Equal(t, smallest, exact.StrainIn([]float64{smallest})[xy])
	assert.Equal(t, smallest, engineering.StressIn([]float64{smallest})[xy])
	engineering.StrainOut(out, tensor.Sym{xy: math.MaxFloat64})
	assert.True(t, math.IsInf(out[0], 1), "doubling overflows")
}

// TestLayoutPassesNaN: nothing is filtered at the boundary.
func TestLayoutPassesNaN(t *testing.T) {
	l := mustLayout(t, "xx xy", tensor.EngineeringShear)
	e := l.StrainIn([]float64{math.NaN(), math.NaN()})
	assert.True(t, math.IsNaN(e[xx]) && math.IsNaN(e[xy]))
	assert.Zero(t, e[yy])
	out := make([]float64, 2)
	l.StrainOut(out, e)
	assert.True(t, math.IsNaN(out[0]) && math.IsNaN(out[1]))
}

// TestTangentOutIsTheDerivative: the host's stress is linear in the host's strain, so the column of a unit host strain is
// the stress it causes, and halving and doubling make that exact to the bit.
func TestTangentOutIsTheDerivative(t *testing.T) {
	r, _ := source(t, 31, 0)
	for _, c := range hostLayouts {
		for _, shear := range []tensor.Shear{tensor.TensorShear, tensor.EngineeringShear} {
			l, tangent := mustLayout(t, c.components, shear), randomTangent(r)
			n := l.Len()
			out := nans(n * n)
			l.TangentOut(out, &tangent)
			for j := range n {
				strain, stress := make([]float64, n), make([]float64, n)
				strain[j] = 1
				l.StressOut(stress, tangent.Contract(l.StrainIn(strain)))
				for i := range n {
					assert.Equal(t, stress[i], out[i*n+j], "%s, %v: row %d, column %d", c.components, shear, i, j)
				}
			}
		}
	}
}

// TestTangentOutHandValues: plane strain with Hooke's law, bulk modulus 5 and shear modulus 3, so that C_xxxx = 9 and
// C_xxyy = 3. With engineering shear the last entry is G, with tensor shear 2G.
func TestTangentOutHandValues(t *testing.T) {
	var c tensor.Tangent
	c.SetIsotropic(5, 3)
	c[xx][xy], c[xy][xx] = 0.5, 0.25 // a coupling, to tell rows from columns
	out := nans(9)
	mustLayout(t, "xx yy xy", tensor.EngineeringShear).TangentOut(out, &c)
	assert.Equal(t, []float64{9, 3, 0.5, 3, 9, 0, 0.25, 0, 3}, out)
	mustLayout(t, "xx yy xy", tensor.TensorShear).TangentOut(out, &c)
	assert.Equal(t, []float64{9, 3, 1, 3, 9, 0, 0.25, 0, 6}, out)
}

// TestZeroLayout is the order of Sym with tensor shear, and equal to the layout built from its words.
func TestZeroLayout(t *testing.T) {
	var l tensor.Layout
	built := mustLayout(t, "xx yy zz yz xz xy", tensor.TensorShear)
	assert.True(t, l == built)
	assert.Equal(t, 6, l.Len())
	assert.Equal(t, tensor.Sym{1, 2, 3, 4, 5, 6}, l.StrainIn([]float64{1, 2, 3, 4, 5, 6}))
	assert.False(t, l == mustLayout(t, "xx yy zz yz xz xy", tensor.EngineeringShear))
	assert.False(t, l == mustLayout(t, "xx yy zz xy yz xz", tensor.TensorShear))
	assert.True(t, mustLayout(t, "xx yx", tensor.EngineeringShear) == mustLayout(t, "xx xy", tensor.EngineeringShear))
	assert.True(t, mustLayout(t, "rr zz tt rz", 0) == mustLayout(t, "xx zz yy xz", 0))
	assert.Equal(t, "xx zz yy xz", mustLayout(t, "rr zz tt zr", 0).Components())
	assert.Equal(t, "tensor shear", tensor.TensorShear.String())
	assert.Equal(t, "engineering shear", tensor.EngineeringShear.String())
	assert.Equal(t, "Shear(7)", tensor.Shear(7).String())
}

// TestBadLayouts: each fault gets an error that names the word, its place and the reason.
func TestBadLayouts(t *testing.T) {
	for _, c := range []struct {
		components string
		shear      tensor.Shear
		want       tensor.LayoutError // without Components
		reason     string
	}{
		{"", 0, tensor.LayoutError{}, "no component"},
		{" \t\n", 0, tensor.LayoutError{}, "no component"},
		{"xx yy", 2, tensor.LayoutError{}, "Shear(2)"},
		{"xx yy qq", 0, tensor.LayoutError{Word: "qq", Position: 3}, "letters"},
		{"xx y zz", 0, tensor.LayoutError{Word: "y", Position: 2}, "letters"},
		{"xxx", 0, tensor.LayoutError{Word: "xxx", Position: 1}, "letters"},
		{"XX YY", 0, tensor.LayoutError{Word: "XX", Position: 1}, "letters"},
		{"xx,yy", 0, tensor.LayoutError{Word: "xx,yy", Position: 1}, "letters"},
		{"11 22", 0, tensor.LayoutError{Word: "11", Position: 1}, "letters"},
		{"xx θθ", 0, tensor.LayoutError{Word: "θθ", Position: 2}, "letters"},
		{"xx θ", 0, tensor.LayoutError{Word: "θ", Position: 2}, "letters"}, // two bytes long
		{"xx yy xx", 0, tensor.LayoutError{Word: "xx", Position: 3}, `"xx" before`},
		{"xy yy yx", 0, tensor.LayoutError{Word: "yx", Position: 3}, `"xy" before`},
		{"xx yy zz yz xz xy xx", 0, tensor.LayoutError{Word: "xx", Position: 7}, `"xx" before`},
		{"zz xx rr", 0, tensor.LayoutError{Word: "rr", Position: 3}, "mixes"},
		{"tt zz yy", 0, tensor.LayoutError{Word: "yy", Position: 3}, "mixes"},
		{"zz rz xz", 0, tensor.LayoutError{Word: "xz", Position: 3}, "mixes"},
		{"rx", 0, tensor.LayoutError{Word: "rx", Position: 1}, "mixes"},
		{"ty", 0, tensor.LayoutError{Word: "ty", Position: 1}, "mixes"},
	} {
		l, err := tensor.NewLayout(c.components, c.shear)
		assert.Equal(t, tensor.Layout{}, l)
		var got *tensor.LayoutError
		if !assert.ErrorAs(t, err, &got, "%q", c.components) {
			continue
		}
		assert.Equal(t, c.components, got.Components)
		assert.Equal(t, c.want.Word, got.Word, "%q", c.components)
		assert.Equal(t, c.want.Position, got.Position, "%q", c.components)
		assert.Contains(t, got.Reason, c.reason, "%q", c.components)
		assert.True(t, strings.HasPrefix(err.Error(), "tensor: layout "), err.Error())
		assert.Contains(t, err.Error(), got.Word)
	}
}

// TestWrongLengthPanics: too short, too long and nil, for every method, with nothing written.
func TestWrongLengthPanics(t *testing.T) {
	for _, components := range []string{"xx yy zz yz xz xy", "xx yy zz xy", "xx"} {
		l := mustLayout(t, components, tensor.EngineeringShear)
		n := l.Len()
		for name, method := range map[string]struct {
			length int
			call   func([]float64)
		}{
			"StrainIn":   {n, func(s []float64) { l.StrainIn(s) }},
			"StrainOut":  {n, func(s []float64) { l.StrainOut(s, tensor.Sym{1, 2, 3, 4, 5, 6}) }},
			"StressIn":   {n, func(s []float64) { l.StressIn(s) }},
			"StressOut":  {n, func(s []float64) { l.StressOut(s, tensor.Sym{1, 2, 3, 4, 5, 6}) }},
			"TangentOut": {n * n, func(s []float64) { l.TangentOut(s, new(tensor.Tangent)) }},
		} {
			for _, length := range []int{0, method.length - 1, method.length + 1} {
				slice := nans(length)
				message := func() (message any) {
					defer func() { message = recover() }()
					method.call(slice)
					return nil
				}()
				text, ok := message.(string)
				require.True(t, ok, "%s of length %d: %v", name, length, message)
				assert.True(t, strings.HasPrefix(text, "tensor: "+name+": slice of length "), text)
				assert.True(t, sameBits(nans(length), slice), "%s wrote before it panicked", name)
			}
		}
	}
}

// TestOutStaysInside writes the middle of a longer slice and looks at its neighbours; and reads and writes the same slice.
func TestOutStaysInside(t *testing.T) {
	l := mustLayout(t, "xx yy zz xy", tensor.EngineeringShear)
	field := nans(30)
	l.StrainOut(field[5:9], tensor.Sym{1, 2, 3, 4, 5, 6})
	l.TangentOut(field[10:26], new(tensor.Tangent))
	want := nans(30)
	copy(want[5:9], []float64{1, 2, 3, 12})
	copy(want[10:26], make([]float64, 16))
	assert.True(t, sameBits(want, field), "%v", field)
	l.StressOut(field[5:9], l.StressIn(field[5:9]).Scale(2))
	assert.Equal(t, []float64{2, 4, 6, 24}, field[5:9])
}

func nans(n int) []float64 {
	s := make([]float64, n)
	for i := range s {
		s[i] = math.NaN()
	}
	return s
}
