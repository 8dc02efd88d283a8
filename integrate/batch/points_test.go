package batch_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/batch"
	"example.com/holdtime/tensor"
)

// seed makes every random test repeatable.
const seed = 20261203

// plant is a host with materials and layout. All numbers are invented.
type plant struct {
	materials []*integrate.Material
	layout    tensor.Layout
	stride    int // of a state
}

func newPlant(t testing.TB, components string, shear tensor.Shear) *plant {
	t.Helper()
	layout, err := tensor.NewLayout(components, shear)
	require.NoError(t, err)
	return &plant{materials: materials(t), layout: layout, stride: 8}
}

// materials are one of each kind of kernel: no temperature, tables with expansion and hardening, a curve turned into a law, an
// internal variable, and an internal variable with a law that sees the greatest principal stress.
func materials(t testing.TB) []*integrate.Material {
	t.Helper()
	norton, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	bailey, err := creeplaw.NewBaileyNortonAt(1e-3, 100, 100, 4, 0.4)
	require.NoError(t, err)
	factor, err := creeplaw.NewArrheniusAt(3e5, 800)
	require.NoError(t, err)
	thermal, err := creeplaw.WithTemperature(bailey, factor)
	require.NoError(t, err)
	bottle, err := curve.NewBaileyNorton(1e-12, 4, 0.5)
	require.NoError(t, err)
	hardened, err := curve.NewStrainHardened(bottle)
	require.NoError(t, err)
	damage := creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: 5, DamagePrefactor: 1e-6,
		DamageStressExponent: 4, DamageExponent: 5, ReferenceStress: 100, CreepTemperature: factor}
	mises, err := creeplaw.NewKachanovRabotnov(damage)
	require.NoError(t, err)
	damage.RuptureStress = creeplaw.RuptureStress{Principal: 0.7, Mean: 0.1}
	principal, err := creeplaw.NewKachanovRabotnov(damage)
	require.NoError(t, err)

	tabulated, expansion := tables(t)
	var list []*integrate.Material
	for _, m := range []struct {
		elastic integrate.Isotropic
		law     creeplaw.Law
		options integrate.Options
	}{
		{integrate.NewIsotropic(160e3, 0.3), norton, integrate.Options{}},
		{tabulated, thermal, integrate.Options{Expansion: expansion}},
		{integrate.NewIsotropic(170e3, 0.29), hardened, integrate.Options{}},
		{integrate.NewIsotropic(150e3, 0.3), mises, integrate.Options{}},
		{integrate.NewIsotropic(150e3, 0.3), principal, integrate.Options{}},
	} {
		built, err := integrate.New(m.elastic, m.law, m.options)
		require.NoError(t, err)
		list = append(list, built)
	}
	return list
}

// tables are elastic constants and expansion of an invented steel.
func tables(t testing.TB) (integrate.Isotropic, integrate.Expansion) {
	t.Helper()
	young, err := integrate.NewTable([]float64{293, 573, 773, 873, 973}, []float64{210e3, 190e3, 172e3, 160e3, 145e3})
	require.NoError(t, err)
	poisson, err := integrate.NewTable([]float64{293, 973}, []float64{0.28, 0.32})
	require.NoError(t, err)
	mean, err := integrate.NewTable([]float64{293, 973}, []float64{11e-6, 14e-6})
	require.NoError(t, err)
	return integrate.Isotropic{Young: young, Poisson: poisson}, integrate.Expansion{Mean: mean, Reference: 293}
}

func (h *plant) batch(t testing.TB, options batch.Options) *batch.Batch {
	t.Helper()
	options.StateStride = h.stride
	b, err := batch.New(h.materials, h.layout, options)
	require.NoError(t, err)
	return b
}

// draw fills the input of n points: strains of 1e-5 to 3e-3 beyond the free thermal strain, steps from next to no creep to
// nearly complete relaxation, and about one point in twenty that must be refused, for each reason a host can meet.
func (h *plant) draw(n int) batch.Points {
	r := rand.New(rand.NewPCG(seed, uint64(n)))
	size := h.layout.Len()
	p := batch.Points{Dt: 50, Temperature: make([]float64, n), Strain: make([]float64, n*size), Material: make([]int, n),
		Old: make([]float64, n*h.stride)}
	for i := range n {
		m := r.IntN(len(h.materials))
		p.Material[i] = m
		p.Temperature[i] = 700 + 200*r.Float64()
		strain := p.Strain[i*size : (i+1)*size]
		scale := math.Pow(10, -5+2.5*r.Float64())
		for j := range strain {
			strain[j] = scale * r.NormFloat64()
		}
		if m == 1 {
			for _, j := range h.normal() {
				strain[j] += 12.6e-6 * (p.Temperature[i] - 293)
			}
		}
		old := p.Old[i*h.stride : (i+1)*h.stride]
		if r.IntN(4) > 0 { // else virgin
			x, y := scale*r.NormFloat64(), scale*r.NormFloat64()
			old[0], old[1], old[2], old[5] = x, -x-y, y, scale*r.NormFloat64()
			old[6] = math.Pow(10, -6+4*r.Float64())
			old[7] = 0.3 * r.Float64()
		}
		h.spoil(r, &p, i)
	}
	return p
}

// spoil makes some points such that they must be refused.
func (h *plant) spoil(r *rand.Rand, p *batch.Points, i int) {
	switch r.IntN(80) {
	case 0:
		p.Strain[i*h.layout.Len()] = math.NaN() // BadIncrement
	case 1:
		p.Old[i*h.stride+6] = -1 // BadState
	case 2:
		p.Material[i], p.Temperature[i] = 1, 1200 // OutsideTable
	case 3: // close to the limit, under load: BeyondRupture
		p.Material[i], p.Old[i*h.stride+7] = 3, 0.999
		p.Strain[i*h.layout.Len()] += 3e-3
	}
}

// normal are the places of the normal components in the layout.
func (h *plant) normal() (places []int) {
	var e [6]float64
	h.layout.StrainOut(e[:h.layout.Len()], tensor.Sym{1, 1, 1})
	for i, v := range e[:h.layout.Len()] {
		if v == 1 {
			places = append(places, i)
		}
	}
	return places
}

// junk is what outputs hold before a call; a refused point must still hold it after.
const junk = -777.25

// outputs adds the output arrays, full of junk.
func (h *plant) outputs(p batch.Points, derivatives bool) batch.Points {
	n, size := len(p.Temperature), h.layout.Len()
	if p.Material != nil {
		n = len(p.Material)
	}
	p.Stress, p.State = junkOf(n*size), junkOf(n*h.stride)
	p.Tangent, p.ByTemperature = nil, nil
	if derivatives {
		p.Tangent, p.ByTemperature = junkOf(n*size*size), junkOf(n*size)
	}
	return p
}

func junkOf(n int) []float64 {
	a := make([]float64, n)
	for i := range a {
		a[i] = junk
	}
	return a
}

// loop is what a host would write without this package: Material.Step in a plain loop. It returns the points refused.
func (h *plant) loop(p batch.Points) (refused []batch.Failure) {
	var out integrate.Result
	var old integrate.State
	size := h.layout.Len()
	for i := range len(p.Strain) / size {
		m := h.materials[0]
		if p.Material != nil {
			m = h.materials[p.Material[i]]
		}
		temperature := p.Temperature[0]
		if len(p.Temperature) > 1 {
			temperature = p.Temperature[i]
		}
		m.UnpackState(&old, p.Old[i*h.stride:i*h.stride+m.StateLength()])
		err := m.Step(&out, &old, integrate.Increment{
			Dt: p.Dt, Strain: h.layout.StrainIn(p.Strain[i*size : (i+1)*size]), Temperature: temperature})
		if err != nil {
			refused = append(refused, batch.Failure{Point: i, Code: err.(integrate.Code)})
			continue
		}
		h.layout.StressOut(p.Stress[i*size:(i+1)*size], out.Stress)
		m.PackState(p.State[i*h.stride:i*h.stride+m.StateLength()], &out.State)
		if p.Tangent != nil {
			h.layout.TangentOut(p.Tangent[i*size*size:(i+1)*size*size], &out.Tangent)
		}
		if p.ByTemperature != nil {
			h.layout.StressOut(p.ByTemperature[i*size:(i+1)*size], out.ByTemperature)
		}
	}
	return refused
}

// requireBits fails unless both calls wrote the same bits everywhere.
func requireBits(t *testing.T, want, got batch.Points, label string) {
	t.Helper()
	for _, a := range []struct {
		name      string
		want, got []float64
	}{{"Stress", want.Stress, got.Stress}, {"State", want.State, got.State}, {"Tangent", want.Tangent, got.Tangent},
		{"ByTemperature", want.ByTemperature, got.ByTemperature}} {
		require.Equal(t, len(a.want), len(a.got), "%s: length of %s", label, a.name)
		for i := range a.want {
			if math.Float64bits(a.want[i]) != math.Float64bits(a.got[i]) {
				t.Fatalf("%s: %s[%d] is %v, want %v", label, a.name, i, a.got[i], a.want[i])
			}
		}
	}
}
