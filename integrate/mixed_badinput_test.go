package integrate_test

import (
	"math"
	"reflect"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

func controlMaterial(t testing.TB) *integrate.Material {
	t.Helper()
	law, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	return material(t, law)
}

// entry is one of the entry points under control, with a typical increment that a test may spoil.
type entry struct {
	name       string
	prescribed []int // components it reads
	given      func(component int) string
	step       func(m *integrate.Material, old *integrate.State, spoiled integrate.MixedIncrement) (out any, explained, err error)
}

// entries run each entry point on a destination full of marks and give it back.
func entries() []entry {
	names := [6]string{"xx", "yy", "zz", "yz", "xz", "xy"}
	strain := func(i int) string { return "prescribed strain " + names[i] }
	return []entry{
		{"bar", []int{0}, strain, func(m *integrate.Material, old *integrate.State, i integrate.MixedIncrement) (any, error, error) {
			out := integrate.UniaxialResult{CreepStep: 42}
			inc := integrate.UniaxialIncrement{Dt: i.Dt, Strain: i.Prescribed[0], Temperature: i.Temperature}
			err := m.StepUniaxial(&out, old, inc)
			return out, m.ExplainControlled(err, old, inc), err
		}},
		{"bar under load", []int{0}, func(int) string { return "prescribed stress xx" },
			func(m *integrate.Material, old *integrate.State, i integrate.MixedIncrement) (any, error, error) {
				out := integrate.UniaxialResult{CreepStep: 42}
				inc := integrate.UniaxialLoad{Dt: i.Dt, Stress: young * i.Prescribed[0], Temperature: i.Temperature}
				err := m.StepUniaxialStress(&out, old, inc)
				return out, m.ExplainControlled(err, old, inc), err
			}},
		{"sheet", []int{0, 1, 5}, strain, func(m *integrate.Material, old *integrate.State, i integrate.MixedIncrement) (any, error, error) {
			out := integrate.PlaneStressResult{CreepStep: 42}
			inc := integrate.PlaneStressIncrement{Dt: i.Dt, Strain: i.Prescribed, Temperature: i.Temperature}
			err := m.StepPlaneStress(&out, old, inc)
			return out, m.ExplainControlled(err, old, inc), err
		}},
		{"mixed", []int{0, 1, 2, 3, 4, 5}, func(i int) string {
			return "prescribed " + [6]string{"relation", "stress", "strain", "strain", "relation", "stress"}[i] + " " + names[i]
		}, func(m *integrate.Material, old *integrate.State, i integrate.MixedIncrement) (any, error, error) {
			out := integrate.MixedResult{CreepStep: 42}
			relation := integrate.Condition{By: integrate.GivenRelation, Stress: 1 / young, Strain: 1}
			stress := integrate.Condition{By: integrate.GivenStress}
			i.Control, _ = integrate.NewControl([6]integrate.Condition{relation, stress, {}, {}, relation, stress})
			i.Prescribed[1] *= young
			i.Prescribed[5] *= young
			err := m.StepMixed(&out, old, i)
			return out, m.ExplainControlled(err, old, i), err
		}},
	}
}

// sameBits compares two values bit for bit, NaN equal to NaN.
func sameBits(a, b any) bool {
	x, y := reflect.ValueOf(a), reflect.ValueOf(b)
	switch x.Kind() {
	case reflect.Float64:
		return math.Float64bits(x.Float()) == math.Float64bits(y.Float())
	case reflect.Struct:
		for i := range x.NumField() {
			if !sameBits(x.Field(i).Interface(), y.Field(i).Interface()) {
				return false
			}
		}
		return true
	case reflect.Array:
		for i := range x.Len() {
			if !sameBits(x.Index(i).Interface(), y.Index(i).Interface()) {
				return false
			}
		}
		return true
	}
	return reflect.DeepEqual(a, b)
}

// TestControlledStepsRefuse: every bad number is refused with its code and named, and neither the result nor the start state
// changes by a bit.
func TestControlledStepsRefuse(t *testing.T) {
	m := controlMaterial(t)
	nan, inf := math.NaN(), math.Inf(1)
	good := integrate.MixedIncrement{Dt: 1, Prescribed: tensor.Sym{1e-3, 2e-4, -1e-4, 1e-4, 3e-4, 2e-4}, Temperature: 800}
	for _, e := range entries() {
		refuse := func(inc integrate.MixedIncrement, old integrate.State, code integrate.Code, quantity string) {
			t.Helper()
			before := old
			marked, _, _ := e.step(m, &integrate.State{Equivalent: -1}, good)
			out, explained, err := e.step(m, &old, inc)
			require.Equal(t, code, err, "%s: %+v %+v", e.name, inc, old)
			require.True(t, sameBits(marked, out), "%s: something was written", e.name)
			require.True(t, sameBits(before, old), "%s: the start state was written", e.name)
			var u *integrate.UpdateError
			require.ErrorAs(t, explained, &u, e.name)
			require.Equal(t, quantity, u.Quantity, e.name)
			require.ErrorIs(t, explained, code)
		}
		_, _, err := e.step(m, &integrate.State{}, good)
		require.NoError(t, err, e.name)
		for _, v := range []float64{nan, inf, -inf, -1, math.Copysign(5e-324, -1)} {
			inc := good
			inc.Dt = v
			refuse(inc, integrate.State{}, integrate.BadIncrement, "time step")
		}
		for _, v := range []float64{nan, inf, -inf, -1, 0} {
			inc := good
			inc.Temperature = v
			refuse(inc, integrate.State{}, integrate.BadIncrement, "temperature")
		}
		for _, v := range []float64{nan, inf, -inf} {
			for _, i := range e.prescribed {
				inc := good
				inc.Prescribed[i] = v
				refuse(inc, integrate.State{}, integrate.BadIncrement, e.given(i))
			}
			for i, name := range []string{"xx", "yy", "zz", "yz", "xz", "xy"} {
				old := integrate.State{}
				old.Creep[i] = v
				refuse(good, old, integrate.BadState, "creep strain "+name)
			}
		}
		for _, v := range []float64{nan, inf, -inf, -1e-300} {
			refuse(good, integrate.State{Equivalent: v}, integrate.BadState, "equivalent creep strain")
		}
		for _, huge := range []float64{1e200, -1e306} { // finite, but neither their squares nor the stress they make
			inc := good
			inc.Prescribed[0] = huge
			if e.name == "sheet" || e.name == "mixed" || e.name == "bar" && huge < 0 {
				refuse(inc, integrate.State{}, integrate.BadIncrement, "trial von Mises stress")
			}
		}
	}
}

// TestHugePressureIsRefused: equal strains that make an infinite pressure, but no deviator.
func TestHugePressureIsRefused(t *testing.T) {
	m := controlMaterial(t)
	out := integrate.MixedResult{CreepStep: 42}
	err := m.StepMixed(&out, &integrate.State{}, integrate.MixedIncrement{Dt: 1, Prescribed: tensor.Sym{1e304, 1e304, 1e304},
		Temperature: 800})
	require.Equal(t, integrate.BadIncrement, err)
	require.Equal(t, integrate.MixedResult{CreepStep: 42}, out)
}

// TestSheetIgnoresTheRest: what is out of the plane is not read.
func TestSheetIgnoresTheRest(t *testing.T) {
	m := controlMaterial(t)
	inc := integrate.PlaneStressIncrement{Dt: 1, Strain: tensor.Sym{1e-3, 2e-4, 0, 0, 0, 2e-4}, Temperature: 800}
	var want, got integrate.PlaneStressResult
	require.NoError(t, m.StepPlaneStress(&want, &integrate.State{}, inc))
	inc.Strain[tensor.ZZ], inc.Strain[tensor.YZ], inc.Strain[tensor.XZ] = math.NaN(), 7, math.Inf(1)
	require.NoError(t, m.StepPlaneStress(&got, &integrate.State{}, inc))
	require.Equal(t, want, got)
}

// TestControlledFailuresOfLaws provokes the codes that come from the law or a table, in every entry point.
func TestControlledFailuresOfLaws(t *testing.T) {
	norton, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	young, err := integrate.NewTable([]float64{300, 700}, []float64{2e5, 1.6e5})
	require.NoError(t, err)
	cold, err := integrate.New(integrate.Isotropic{Young: young, Poisson: integrate.Constant(poisson)}, norton, integrate.Options{})
	require.NoError(t, err)
	narrow := material(t, creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		if p.Stress > 20 {
			return creeplaw.Rate{Value: math.NaN()}
		}
		return creeplaw.Rate{Value: p.Stress, ByStress: 1}
	}))
	jump := material(t, creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		if p.Strain > 1e-5 {
			return creeplaw.Rate{Value: 1e-8}
		}
		return creeplaw.Rate{Value: 1}
	}))
	softens := material(t, creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		f := 1e-4 * math.Exp(3e4*p.Strain)
		return creeplaw.Rate{Value: f * p.Stress, ByStress: f, ByStrain: 3e4 * f * p.Stress}
	}))
	inc := integrate.MixedIncrement{Dt: 1, Prescribed: tensor.Sym{1e-3, 2e-4, -1e-4, 1e-4, 3e-4, 2e-4}, Temperature: 800}
	for _, c := range []struct {
		m    *integrate.Material
		code integrate.Code
	}{
		{cold, integrate.OutsideTable}, {narrow, integrate.LawUndefined}, {jump, integrate.NoConvergence},
		{softens, integrate.BeyondRupture},
	} {
		for _, e := range entries() {
			old := integrate.State{}
			marked, _, _ := e.step(c.m, &integrate.State{Equivalent: -1}, inc)
			out, explained, err := e.step(c.m, &old, inc)
			require.Equal(t, c.code, err, e.name)
			require.True(t, sameBits(marked, out), "%s: %v: something was written", e.name, err)
			require.Equal(t, integrate.State{}, old)
			require.ErrorIs(t, explained, c.code)
			require.Contains(t, explained.Error(), " is ")
			require.Equal(t, c.code != integrate.OutsideTable, integrate.Recoverable(err))
		}
	}
}

// TestImpossibleStress: a stress under which no finite creep strain satisfies the law.
func TestImpossibleStress(t *testing.T) {
	law, err := creeplaw.NewGarofalo(1e-9, 1, 1)
	require.NoError(t, err)
	m := material(t, law)
	load := integrate.UniaxialLoad{Dt: 1, Stress: 1000, Temperature: 800}
	var out integrate.UniaxialResult
	err = m.StepUniaxialStress(&out, &integrate.State{}, load)
	require.Equal(t, integrate.LawUndefined, err)
	require.Equal(t, integrate.UniaxialResult{}, out)
	var u *integrate.UpdateError
	require.ErrorAs(t, m.ExplainControlled(err, &integrate.State{}, load), &u)
	require.Equal(t, "creep strain the prescribed stress would make", u.Quantity)
	inc := integrate.MixedIncrement{Control: integrate.Torsion(), Dt: 1, Prescribed: tensor.Sym{1000, 0, 0, 0, 0, 1e-3}, Temperature: 800}
	var mixed integrate.MixedResult
	require.Equal(t, integrate.LawUndefined, m.StepMixed(&mixed, &integrate.State{}, inc))
	require.Zero(t, mixed)
	// The same stress in a bar held at the strain that would make it elastically is no trouble.
	require.NoError(t, m.StepUniaxial(&out, &integrate.State{}, integrate.UniaxialIncrement{Dt: 1, Strain: 1000 / young,
		Temperature: 800}))
}

// TestControlledInPlace: the start state may be the state of the result, junk in the result does not show, and the same input
// gives the same bits.
func TestControlledInPlace(t *testing.T) {
	s := newSource(250)
	kinds := lawKinds()
	for i := range 400 {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		c := s.mixedCase(t, law)
		bar := integrate.UniaxialIncrement{Dt: c.inc.Dt, Strain: 1e-4, Temperature: 800}
		load := integrate.UniaxialLoad{Dt: c.inc.Dt, Stress: 10, Temperature: 800}
		sheet := integrate.PlaneStressIncrement{Dt: c.inc.Dt, Strain: tensor.Sym{1e-4, 2e-4, 0, 0, 0, 1e-5}, Temperature: 800}
		inPlace(t, &c.old, func(out *integrate.UniaxialResult, old *integrate.State) error {
			return c.material.StepUniaxial(out, old, bar)
		}, func(r *integrate.UniaxialResult) *integrate.State { return &r.State })
		inPlace(t, &c.old, func(out *integrate.UniaxialResult, old *integrate.State) error {
			return c.material.StepUniaxialStress(out, old, load)
		}, func(r *integrate.UniaxialResult) *integrate.State { return &r.State })
		inPlace(t, &c.old, func(out *integrate.PlaneStressResult, old *integrate.State) error {
			return c.material.StepPlaneStress(out, old, sheet)
		}, func(r *integrate.PlaneStressResult) *integrate.State { return &r.State })
		inPlace(t, &c.old, func(out *integrate.MixedResult, old *integrate.State) error {
			return c.material.StepMixed(out, old, c.inc)
		}, func(r *integrate.MixedResult) *integrate.State { return &r.State })
	}
}

func inPlace[R any](t *testing.T, start *integrate.State, step func(*R, *integrate.State) error, state func(*R) *integrate.State) {
	t.Helper()
	var want, again R
	old := *start
	require.NoError(t, step(&want, &old))
	require.Equal(t, *start, old, "the start state was written")
	*state(&again) = *start
	require.NoError(t, step(&again, state(&again)))
	require.True(t, sameBits(want, again), "in place: %+v, want %+v", again, want)
	junk := want
	state(&junk).Creep[3] = math.NaN()
	reflect.ValueOf(&junk).Elem().FieldByName("CreepStep").SetFloat(math.Inf(1))
	require.NoError(t, step(&junk, &old))
	require.True(t, sameBits(want, junk), "junk in the destination shows")
}

// TestControlledStepsAllocateNothing, also when they fail.
func TestControlledStepsAllocateNothing(t *testing.T) {
	plain := controlMaterial(t)
	damage := damageMaterial(t, creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: 5, DamagePrefactor: 1e-6,
		DamageStressExponent: 4, DamageExponent: 5, ReferenceStress: 100})
	yields := plasticMaterial(t, plain.Law(), integrate.LinearHardening{Yield: integrate.Constant(50), Modulus: integrate.Constant(1e4)})
	var bar integrate.UniaxialResult
	var sheet integrate.PlaneStressResult
	var mixed integrate.MixedResult
	old := integrate.State{Equivalent: 1e-4}
	follow, err := integrate.FollowUp(young, 2)
	require.NoError(t, err)
	for _, c := range []struct {
		name   string
		strain float64
		dt     float64
		fails  bool
	}{{"good", 1e-3, 10, false}, {"elastic", 1e-3, 0, false}, {"refused", math.NaN(), 10, true}} {
		for name, m := range map[string]*integrate.Material{"plain": plain, "with damage": damage, "with plasticity": yields} {
			for entry, step := range map[string]func() error{
				"bar": func() error {
					return m.StepUniaxial(&bar, &old, integrate.UniaxialIncrement{Dt: c.dt, Strain: c.strain, Temperature: 800})
				},
				"load": func() error {
					return m.StepUniaxialStress(&bar, &old, integrate.UniaxialLoad{Dt: c.dt, Stress: 1e5 * c.strain, Temperature: 800})
				},
				"sheet": func() error {
					return m.StepPlaneStress(&sheet, &old, integrate.PlaneStressIncrement{Dt: c.dt, Strain: tensor.Sym{c.strain, 1e-4},
						Temperature: 800})
				},
				"mixed": func() error {
					return m.StepMixed(&mixed, &old, integrate.MixedIncrement{Control: follow, Dt: c.dt, Prescribed: tensor.Sym{c.strain},
						Temperature: 800})
				},
			} {
				var err error
				allocations := testing.AllocsPerRun(100, func() { err = step() })
				require.Zero(t, allocations, "%s, %s, %s", c.name, name, entry)
				require.Equal(t, c.fails, err != nil, "%s, %s, %s: %v", c.name, name, entry, err)
			}
		}
	}
}
