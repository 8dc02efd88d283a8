package batch_test

import (
	"context"
	"math/rand/v2"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/batch"
	"example.com/holdtime/tensor"
)

// TestSameBits: any number of workers and any layout give the bits of a plain loop over Material.Step, with derivatives and
// without, and report the same points in the same order.
func TestSameBits(t *testing.T) {
	ctx := context.Background()
	for _, layout := range []struct {
		components string
		shear      tensor.Shear
	}{{"xx yy zz xy yz xz", tensor.EngineeringShear}, {"xx yy zz yz xz xy", tensor.TensorShear}, {"xx yy zz xy", tensor.EngineeringShear},
		{"rr zz tt rz", tensor.TensorShear}, {"xx", tensor.TensorShear}} {
		h := newPlant(t, layout.components, layout.shear)
		for _, n := range []int{1, 15, 16, 17, 700, 3000} {
			input := h.draw(n)
			want := h.outputs(input, true)
			refused := h.loop(want)
			for _, workers := range []int{1, 2, 3, 8} {
				b := h.batch(t, batch.Options{Workers: workers, Listed: n})
				got := h.outputs(input, true)
				requireRefused(t, refused, b.Step(ctx, got), n)
				requireBits(t, want, got, layout.components)

				got = h.outputs(input, false)
				requireRefused(t, refused, b.Step(ctx, got), n)
				got.Tangent, got.ByTemperature = want.Tangent, want.ByTemperature
				requireBits(t, want, got, layout.components+" without derivatives")
			}
		}
	}
}

// TestMillionSameBits is TestSameBits for 10⁶ points, with -campaign.
func TestMillionSameBits(t *testing.T) {
	if !*campaign {
		t.Skip("only with -campaign")
	}
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	input := h.draw(million)
	want := h.outputs(input, true)
	refused := h.loop(want)
	t.Log(len(refused), "points are refused")
	for _, workers := range []int{1, 2, 3, 8} {
		b := h.batch(t, batch.Options{Workers: workers, Listed: million})
		got := h.outputs(input, true)
		requireRefused(t, refused, b.Step(context.Background(), got), million)
		requireBits(t, want, got, "a million points")
		got = h.outputs(input, false)
		requireRefused(t, refused, b.Step(context.Background(), got), million)
		got.Tangent, got.ByTemperature = want.Tangent, want.ByTemperature
		requireBits(t, want, got, "a million points without derivatives")
	}
}

func requireRefused(t *testing.T, want []batch.Failure, err error, points int) {
	t.Helper()
	if len(want) == 0 {
		require.NoError(t, err)
		return
	}
	var refused *batch.RefusedError
	require.ErrorAs(t, err, &refused)
	require.Equal(t, want, refused.First)
	require.Equal(t, len(want), refused.Total)
	require.Equal(t, points, refused.Points)
}

// TestMaxwell is the outside check: with a rate linear in stress, ṗ = A σ, one backward-Euler step has a closed form, deviator
// and deviatoric stiffness both divided by 1 + 3GAΔt, the mean stress elastic. Tolerance: a dozen roundings of the solve.
func TestMaxwell(t *testing.T) {
	const young, poisson, prefactor, dt = 120e3, 0.25, 2e-7, 40.0
	law, err := creeplaw.NewNorton(prefactor, 1)
	require.NoError(t, err)
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
	require.NoError(t, err)
	layout, err := tensor.NewLayout("xx yy zz xy", tensor.EngineeringShear)
	require.NoError(t, err)
	b, err := batch.New([]*integrate.Material{m}, layout, batch.Options{Workers: 2})
	require.NoError(t, err)
	const n = 100
	p := batch.Points{Dt: dt, Temperature: []float64{800}, Strain: make([]float64, 4*n), Old: make([]float64, 7*n),
		Stress: make([]float64, 4*n), State: make([]float64, 7*n), Tangent: make([]float64, 16*n)}
	r := rand.New(rand.NewPCG(seed, 1))
	for i := range p.Strain {
		p.Strain[i] = 1e-3 * r.NormFloat64()
	}
	require.NoError(t, b.Step(context.Background(), p))
	const shear, bulk = young / (2 * (1 + poisson)), young / (3 * (1 - 2*poisson))
	const relaxed = shear / (1 + 3*shear*prefactor*dt)
	for i := range n {
		e := p.Strain[4*i : 4*i+4]
		trace := e[0] + e[1] + e[2]
		want := []float64{0, 0, 0, relaxed * e[3]}
		for j := range 3 {
			want[j] = bulk*trace + 2*relaxed*(e[j]-trace/3)
		}
		check.Slice(t, "stress", p.Stress[4*i:4*i+4], want, young*1e-3, 1e-14)
		on, off := bulk+4*relaxed/3, bulk-2*relaxed/3
		check.Slice(t, "tangent", p.Tangent[16*i:16*i+16], []float64{on, off, off, 0, off, on, off, 0, off, off, on, 0,
			0, 0, 0, relaxed}, young, 1e-14)
		check.Scaled(t, "creep strain xy", p.State[7*i+5], e[3]/2*(1-relaxed/shear), 1e-3, 1e-14)
	}
}

// TestInPlace: one array of states for start and end gives the bits of two, and a refused point keeps its old state.
func TestInPlace(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	for _, derivatives := range []bool{true, false} {
		p := h.outputs(h.draw(2000), derivatives)
		b := h.batch(t, batch.Options{Workers: 4, Listed: 2000})
		var refused *batch.RefusedError
		require.ErrorAs(t, b.Step(context.Background(), p), &refused)

		inPlace := h.outputs(p, derivatives)
		inPlace.Old = slices.Clone(p.Old)
		inPlace.State = inPlace.Old
		err := b.Step(context.Background(), inPlace)
		require.Equal(t, refused, err)
		for _, f := range refused.First {
			copy(p.State[f.Point*h.stride:(f.Point+1)*h.stride], p.Old[f.Point*h.stride:(f.Point+1)*h.stride])
		}
		for i, m := range p.Material { // what lies behind a state keeps what the array had
			for j := h.materials[m].StateLength(); j < h.stride; j++ {
				require.EqualValues(t, p.Old[i*h.stride+j], inPlace.State[i*h.stride+j])
				p.State[i*h.stride+j] = inPlace.State[i*h.stride+j]
			}
		}
		requireBits(t, p, inPlace, "in place")
	}
}

// TestOneForAll: a single temperature, and no material indices, are what they stand for.
func TestOneForAll(t *testing.T) {
	h := newPlant(t, "xx yy zz xy", tensor.EngineeringShear)
	p := h.draw(500)
	for i := range p.Temperature {
		p.Temperature[i], p.Material[i] = 812.5, 0
	}
	want := h.outputs(p, true)
	refused := h.loop(want)
	got := h.outputs(p, true)
	got.Temperature, got.Material = got.Temperature[:1], nil
	requireRefused(t, refused, h.batch(t, batch.Options{Listed: 500}).Step(context.Background(), got), 500)
	requireBits(t, want, got, "one for all")
}

// TestDefaultStride is the longest state of the materials.
func TestDefaultStride(t *testing.T) {
	h := newPlant(t, "xx", tensor.TensorShear)
	b, err := batch.New(h.materials, h.layout, batch.Options{})
	require.NoError(t, err)
	require.Equal(t, 8, b.StateStride())
	b, err = batch.New(h.materials[:3], h.layout, batch.Options{})
	require.NoError(t, err)
	require.Equal(t, 7, b.StateStride())
	h.stride = 11
	want := h.outputs(h.draw(300), true)
	h.loop(want)
	got := h.outputs(want, true)
	require.Error(t, h.batch(t, batch.Options{}).Step(context.Background(), got))
	requireBits(t, want, got, "a stride beyond the states")
}

// TestNoPoints is a call with nothing to do.
func TestNoPoints(t *testing.T) {
	h := newPlant(t, "xx yy zz xy", tensor.EngineeringShear)
	require.NoError(t, h.batch(t, batch.Options{}).Step(context.Background(), batch.Points{Temperature: []float64{800}}))
}
