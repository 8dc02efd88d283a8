package integrate_test

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// TestEveryCodeIsProvoked: each failure returns its own code, explains itself, says whether a smaller step can help, and
// leaves result and state bit for bit as they were.
func TestEveryCodeIsProvoked(t *testing.T) {
	want := map[string]struct {
		code        integrate.Code
		recoverable bool
	}{
		"BadIncrement":  {integrate.BadIncrement, false},
		"BadState":      {integrate.BadState, false},
		"OutsideTable":  {integrate.OutsideTable, false},
		"LawUndefined":  {integrate.LawUndefined, true},
		"NoConvergence": {integrate.NoConvergence, true},
		"BeyondRupture": {integrate.BeyondRupture, true},
	}
	cases := failures(t)
	require.Len(t, cases, len(want))
	for name, f := range cases {
		out := integrate.Result{CreepStep: 42, Iterations: 3}
		before, old := out, f.old
		err := f.material.Step(&out, &f.old, f.inc)
		require.Equal(t, want[name].code, err, name)
		require.Equal(t, before, out, name)
		require.Equal(t, old, f.old, name)
		require.Equal(t, want[name].recoverable, integrate.Recoverable(err), name)
		require.Equal(t, want[name].recoverable, integrate.Recoverable(fmt.Errorf("point 7: %w", err)), name)
		require.NotContains(t, err.Error(), "unknown")

		explained := f.material.Explain(err, &f.old, f.inc)
		require.ErrorIs(t, explained, want[name].code, name)
		require.Contains(t, explained.Error(), " is ", "%s names a quantity and its value", name)
	}
	require.False(t, integrate.Recoverable(nil))
	require.False(t, integrate.Recoverable(errors.New("other")))
	require.Contains(t, integrate.Code(0).Error(), "unknown")
	require.Contains(t, integrate.Code(200).Error(), "unknown")
}

func TestIncrementAndStateFaultsAreNamed(t *testing.T) {
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := material(t, law)
	nan, inf := math.NaN(), math.Inf(1)
	good := integrate.Increment{Dt: 1, Strain: tensor.Sym{1e-3}, Temperature: 800}
	type fault struct {
		old      integrate.State
		inc      integrate.Increment
		quantity string
		code     integrate.Code
	}
	var faults []fault
	for _, v := range []float64{nan, inf, -inf, -1, math.Copysign(5e-324, -1)} {
		i := good
		i.Dt = v
		faults = append(faults, fault{integrate.State{}, i, "time step", integrate.BadIncrement})
	}
	for _, v := range []float64{nan, inf, -inf, -1, 0} {
		i := good
		i.Temperature = v
		faults = append(faults, fault{integrate.State{}, i, "temperature", integrate.BadIncrement})
	}
	for _, v := range []float64{nan, inf, -inf} {
		for c, name := range []string{"xx", "yy", "zz", "yz", "xz", "xy"} {
			i := good
			i.Strain[c] = v
			faults = append(faults, fault{integrate.State{}, i, "strain " + name, integrate.BadIncrement})
			var s integrate.State
			s.Creep[c] = v
			faults = append(faults, fault{s, good, "creep strain " + name, integrate.BadState})
		}
	}
	for _, v := range []float64{nan, inf, -inf, -1e-300} {
		faults = append(faults, fault{integrate.State{Equivalent: v}, good, "equivalent creep strain", integrate.BadState})
	}
	for _, f := range faults {
		out := integrate.Result{CreepStep: 42}
		err := m.Step(&out, &f.old, f.inc)
		require.Equal(t, f.code, err, "%s: %+v %+v", f.quantity, f.old, f.inc)
		require.Equal(t, integrate.Result{CreepStep: 42}, out)
		var u *integrate.UpdateError
		require.ErrorAs(t, m.Explain(err, &f.old, f.inc), &u)
		require.Equal(t, f.quantity, u.Quantity)
	}
	// Finite strains whose squares overflow are no state of a small-strain solid.
	i := good
	i.Strain[0] = 1e200
	require.Equal(t, integrate.BadIncrement, m.Step(&integrate.Result{}, &integrate.State{}, i))
}

func TestNewRefuses(t *testing.T) {
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	nan, inf := math.NaN(), math.Inf(1)
	table := func(values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 900}, values)
		require.NoError(t, err)
		return made
	}
	expansion := func(reference float64, mean integrate.Table) integrate.Options {
		return integrate.Options{Expansion: integrate.Expansion{Mean: mean, Reference: reference}}
	}
	fine := integrate.NewIsotropic(2e5, 0.3)
	for _, c := range []struct {
		name     string
		elastic  integrate.Isotropic
		law      creeplaw.Law
		options  integrate.Options
		quantity string
	}{
		{"E = 0", integrate.NewIsotropic(0, 0.3), law, integrate.Options{}, "Young's modulus"},
		{"E < 0", integrate.NewIsotropic(-1, 0.3), law, integrate.Options{}, "Young's modulus"},
		{"E NaN", integrate.NewIsotropic(nan, 0.3), law, integrate.Options{}, "Young's modulus"},
		{"E Inf", integrate.NewIsotropic(inf, 0.3), law, integrate.Options{}, "Young's modulus"},
		{"ν = 0.5", integrate.NewIsotropic(2e5, 0.5), law, integrate.Options{}, "Poisson's ratio"},
		{"ν = -1", integrate.NewIsotropic(2e5, -1), law, integrate.Options{}, "Poisson's ratio"},
		{"ν NaN", integrate.NewIsotropic(2e5, nan), law, integrate.Options{}, "Poisson's ratio"},
		{"E table", integrate.Isotropic{Young: table(2e5, -1), Poisson: integrate.Constant(0.3)}, law, integrate.Options{},
			"Young's modulus"},
		{"ν table", integrate.Isotropic{Young: table(2e5, 1e5), Poisson: table(0.3, 0.6)}, law, integrate.Options{},
			"Poisson's ratio"},
		{"zero elasticity", integrate.Isotropic{}, law, integrate.Options{}, "Young's modulus"},
		{"no law", fine, nil, integrate.Options{}, "creep law"},
		{"α without reference", fine, law, expansion(0, integrate.Constant(1e-5)), "reference temperature of the expansion"},
		{"reference NaN", fine, law, expansion(nan, integrate.Constant(1e-5)), "reference temperature of the expansion"},
		{"α NaN", fine, law, expansion(293, integrate.Constant(nan)), "mean expansion coefficient"},
	} {
		m, err := integrate.New(c.elastic, c.law, c.options)
		require.Nil(t, m, c.name)
		var e *integrate.MaterialError
		require.ErrorAs(t, err, &e, c.name)
		require.Equal(t, c.quantity, e.Quantity, c.name)
		require.Contains(t, err.Error(), c.quantity)
	}
}

func TestTableRefuses(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		name         string
		temperatures []float64
		values       []float64
		row          int
	}{
		{"one point", []float64{300}, []float64{1}, 1},
		{"none", nil, nil, 0},
		{"unequal", []float64{300, 400}, []float64{1}, 1},
		{"descending", []float64{400, 300}, []float64{1, 2}, 1},
		{"twice", []float64{300, 300}, []float64{1, 2}, 1},
		{"zero kelvin", []float64{0, 300}, []float64{1, 2}, 0},
		{"NaN temperature", []float64{300, nan}, []float64{1, 2}, 1},
		{"Inf temperature", []float64{300, inf}, []float64{1, 2}, 1},
		{"NaN value", []float64{300, 400}, []float64{1, nan}, 1},
	} {
		_, err := integrate.NewTable(c.temperatures, c.values)
		var e *integrate.TableError
		require.ErrorAs(t, err, &e, c.name)
		require.Equal(t, c.row, e.Row, c.name)
	}
}

func TestTableValues(t *testing.T) {
	table, err := integrate.NewTable([]float64{300, 500, 600}, []float64{10, 20, 5})
	require.NoError(t, err)
	held := table.Held()
	for _, c := range []struct{ temperature, value, slope float64 }{
		{300, 10, 0.05}, {400, 15, 0.05}, {500, 20, -0.15}, {560, 11, -0.15}, {600, 5, -0.15},
	} {
		v, d := table.At(c.temperature)
		require.Equal(t, [2]float64{c.value, c.slope}, [2]float64{v, d}, "at %v", c.temperature)
		v, d = held.At(c.temperature)
		require.Equal(t, [2]float64{c.value, c.slope}, [2]float64{v, d}, "held at %v", c.temperature)
	}
	for _, outside := range []float64{299.9, 600.1, math.NaN()} {
		v, _ := table.At(outside)
		require.True(t, math.IsNaN(v))
	}
	v, d := held.At(100)
	require.Equal(t, [2]float64{10, 0}, [2]float64{v, d})
	v, d = held.At(1000)
	require.Equal(t, [2]float64{5, 0}, [2]float64{v, d})
	v, _ = held.At(math.NaN())
	require.True(t, math.IsNaN(v))
	var zero integrate.Table
	v, d = zero.At(300)
	require.Equal(t, [2]float64{0, 0}, [2]float64{v, d})
}

func TestPackingPanicsOnWrongLength(t *testing.T) {
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := material(t, law)
	s := integrate.State{Creep: tensor.Sym{1, 2, 3, 4, 5, 6}, Equivalent: 7}
	packed := make([]float64, m.StateLength())
	m.PackState(packed, &s)
	var back integrate.State
	m.UnpackState(&back, packed)
	require.Equal(t, s, back)
	for _, n := range []int{0, m.StateLength() - 1, m.StateLength() + 1} {
		require.PanicsWithValue(t, fmt.Sprintf("integrate: dst has length %d, want %d", n, m.StateLength()),
			func() { m.PackState(make([]float64, n), &s) })
		require.PanicsWithValue(t, fmt.Sprintf("integrate: src has length %d, want %d", n, m.StateLength()),
			func() { m.UnpackState(&s, make([]float64, n)) })
	}
}
