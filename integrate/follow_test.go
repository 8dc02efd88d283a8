package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// shearOf is a deviatoric strain, in no special direction, whose elastic von Mises stress is mises.
func shearOf(mises float64) tensor.Sym {
	e := tensor.Sym{1, -0.4, -0.6, 0.3, -0.2, 0.5}
	return e.Scale(mises / (3 * shear) / e.EquivalentStrain())
}

func follow(t *testing.T, m *integrate.Material, old integrate.State, from, to tensor.Sym, dt, tolerance float64) (
	integrate.Result, integrate.Course) {
	t.Helper()
	var out integrate.Result
	c, err := m.Follow(&out, &old, integrate.Conditions{Strain: from, Temperature: 800},
		integrate.Increment{Dt: dt, Strain: to, Temperature: 800}, integrate.Tolerance{Relative: tolerance}, 0)
	require.NoError(t, err)
	return out, c
}

// TestFollowKeepsItsTolerance holds relaxation over many time constants against closed forms: Norton at fixed strain
// (published-values 1.5), strain hardening from zero strain with its infinite initial rate (published-values 1.3 with 3G for
// E, by bench's quadrature). The error may be at most three times the tolerance, and the work must stay bounded.
func TestFollowKeepsItsTolerance(t *testing.T) {
	const mises, hours = 200.0, 1000.0
	norton, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	steep, err := creeplaw.NewNortonAt(1e-4, 150, 25)
	require.NoError(t, err)
	primary, err := creeplaw.NewBaileyNorton(1e-15, 5, 0.4)
	require.NoError(t, err)
	hardened := bench.StrainHardeningRelaxation{Young: 3 * shear, Stress: mises, Curve: bench.BaileyNorton{
		Strain: 1e-15 * math.Pow(200, 5), Stress: 200, Time: 1, StressExponent: 5, TimeExponent: 0.4}}.StressAt(hours)
	for _, c := range []struct {
		name  string
		law   creeplaw.Law
		exact float64
	}{
		{"Norton", norton, held(mises, 1e-16, 5, hours)},
		{"steep Norton", steep, held(mises, 1e-4*math.Pow(150, -25), 25, hours)},
		{"Bailey–Norton", primary, hardened},
	} {
		strain := shearOf(mises)
		for _, tolerance := range []float64{1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9} {
			out, course := follow(t, material(t, c.law), integrate.State{}, strain, strain, hours, tolerance)
			achieved := math.Abs(out.Stress.Mises()/c.exact - 1)
			t.Logf("%-14s tolerance %.0e: error %.1e of the stress, %3d steps, %2d rejected, %4d solves", c.name, tolerance,
				achieved, course.Steps, course.Rejected, course.Solves)
			require.LessOrEqual(t, achieved, 3*tolerance, c.name)
			require.LessOrEqual(t, course.Error, 1.0)
			require.LessOrEqual(t, course.Solves, 8000)
			require.LessOrEqual(t, course.Rejected, 3+course.Steps/5)
			require.Equal(t, 5*(course.Steps+course.Rejected), course.Solves/5*5)
		}
	}
}

// TestFollowTangent holds the derivatives of a whole walk against differences of walks that take the very same steps: with a
// generous tolerance and a given first step nothing is rejected, so that the choice of steps does not move.
//
// Tolerance: 1e-8 of an elastic tangent. The stages amplify the rounding of the differences by up to n·D = 10.
func TestFollowTangent(t *testing.T) {
	s := newSource(41)
	kinds := lawKinds()
	worst, worstByT, cases := 0.0, 0.0, 0
	for i := range 400 {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		m, free := warm(t, law)
		old := integrate.State{Creep: s.deviator().Scale(s.decades(-6, -3)), Equivalent: s.decades(-4, -1)}
		start := integrate.Conditions{Temperature: s.uniform(720, 1000)}
		start.Strain = old.Creep.Add(s.deviator().Scale(s.decades(-4, -3))).Add(tensor.Identity().Scale(free(start.Temperature)))
		inc := integrate.Increment{Dt: s.decades(-2, 3), Temperature: start.Temperature + s.uniform(-20, 60)}
		elastic := s.deviator().Scale(s.decades(-4, -3))
		inc.Strain = old.Creep.Add(elastic).Add(tensor.Identity().Scale(free(inc.Temperature)))
		walk := func(inc integrate.Increment) (integrate.Result, integrate.Course) {
			var out integrate.Result
			c, err := m.Follow(&out, &old, start, inc, integrate.Tolerance{Relative: 0.1, Stress: 1e9, Creep: 1e9}, inc.Dt/3)
			if err != nil {
				return out, integrate.Course{}
			}
			return out, c
		}
		if stiffness(t, m, law, &old, start, inc.Dt) > 10 {
			continue // the explicit first stage would throw the others off by orders of magnitude, and rounding with them
		}
		out, course := walk(inc)
		if course.Steps != 2 || course.Rejected > 0 {
			continue // a step so long that a stage fails and is cut: no fixed steps to compare
		}
		steady := true
		stress := func(inc integrate.Increment) tensor.Sym {
			r, c := walk(inc)
			steady = steady && c.Steps == 2 && c.Rejected == 0
			return r.Stress
		}
		cases++
		size := elastic.EquivalentStrain()
		for j := range 6 {
			var unit tensor.Sym
			unit[j] = 1
			column := out.Tangent.Contract(unit).Deviator()
			d, n := gap(func(x float64) tensor.Sym {
				moved := inc
				moved.Strain[j] += x
				return stress(moved).Deviator()
			}, size, column)
			scale := 2 * shear * 0.5 // of an elastic tangent; the walk's own may be soft in every direction
			n += 4 * 0x1p-52 * out.Tangent[0][0] * (1 + largest(out.Stress)/(size*shear*0x1p-8))
			if steady && n < 1e-8*scale {
				worst = math.Max(worst, d/scale)
				require.LessOrEqual(t, d, 1e-8*scale, "%s (seed %d, case %d)", kinds[i%len(kinds)].name, seed, i)
			}
		}
		d, _ := gap(func(x float64) tensor.Sym {
			moved := inc
			moved.Temperature += x
			return stress(moved)
		}, 8, out.ByTemperature)
		if !steady {
			cases--
			continue
		}
		relative := d / math.Max(largest(out.ByTemperature), largest(out.Stress)/inc.Temperature)
		worstByT = math.Max(worstByT, relative)
		require.LessOrEqual(t, relative, 1e-8, "%s by temperature (seed %d, case %d)", kinds[i%len(kinds)].name, seed, i)
	}
	t.Logf("%d walks: worst error of ∂σ/∂ε %.1e of an elastic one, of ∂σ/∂T %.1e", cases, worst, worstByT)
	require.GreaterOrEqual(t, cases, 300)
}

// stiffness is n·D: the creep of an explicit step from the start, over the elastic strain, times the stress exponent.
func stiffness(t *testing.T, m *integrate.Material, law creeplaw.Law, old *integrate.State, at integrate.Conditions,
	dt float64) float64 {
	t.Helper()
	stress := stepStress(t, m, old, integrate.Increment{Strain: at.Strain, Temperature: at.Temperature}).Mises()
	l := creeplaw.Log(law).LogRate(creeplaw.Point{Stress: stress, Strain: old.Equivalent, Temperature: at.Temperature})
	return l.ByLogStress * dt * math.Exp(l.Value) * 3 * shear / stress
}

// TestFollowAgreesWithFineSteps: along a path that turns, with temperature and E(T) changing, the walk ends where ever finer
// backward-Euler steps, extrapolated, do.
func TestFollowAgreesWithFineSteps(t *testing.T) {
	law, err := creeplaw.NewGarofalo(1e-8, 0.03, 3)
	require.NoError(t, err)
	factor, err := creeplaw.NewArrheniusAt(3e5, 850)
	require.NoError(t, err)
	thermal, err := creeplaw.WithTemperature(law, factor)
	require.NoError(t, err)
	m, _ := warm(t, thermal)
	old := integrate.State{Creep: tensor.Sym{1e-4, -1e-4}, Equivalent: 1e-4}
	start := integrate.Conditions{Strain: tensor.Sym{1e-3, 0, 0, 2e-4}, Temperature: 860}
	inc := integrate.Increment{Dt: 50, Strain: tensor.Sym{1e-3, 1e-3, -5e-4, -4e-4, 3e-4}, Temperature: 830}
	fine := func(steps int) tensor.Sym {
		var out integrate.Result
		out.State = old
		for k := 1; k <= steps; k++ {
			part := float64(k) / float64(steps)
			require.NoError(t, m.Step(&out, &out.State, integrate.Increment{Dt: inc.Dt / float64(steps),
				Strain:      start.Strain.Add(inc.Strain.Sub(start.Strain).Scale(part)),
				Temperature: start.Temperature + part*(inc.Temperature-start.Temperature)}))
		}
		return out.Stress
	}
	// Richardson's extrapolation of first- and second-order terms.
	a, b, c := fine(1000), fine(2000), fine(4000)
	ab, bc := b.Scale(2).Sub(a), c.Scale(2).Sub(b)
	exact := bc.Scale(4.0 / 3).Sub(ab.Scale(1.0 / 3))
	for _, tolerance := range []float64{1e-4, 1e-6, 1e-8} {
		var out integrate.Result
		_, err := m.Follow(&out, &old, start, inc, integrate.Tolerance{Relative: tolerance}, 0)
		require.NoError(t, err)
		achieved := out.Stress.Sub(exact).Norm() / exact.Deviator().Norm()
		t.Logf("tolerance %.0e: error %.1e", tolerance, achieved)
		require.LessOrEqual(t, achieved, 3*tolerance+1e-9) // the extrapolation is good to about 1e-10
	}
}

func TestFollowContract(t *testing.T) {
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := material(t, law)
	strain := shearOf(200)
	start := integrate.Conditions{Strain: strain, Temperature: 800}
	inc := integrate.Increment{Dt: 100, Strain: strain.Scale(1.2), Temperature: 800}
	tolerance := integrate.Tolerance{Relative: 1e-5}
	old := integrate.State{Creep: tensor.Sym{1e-4, -1e-4}, Equivalent: 1e-4}
	var want integrate.Result
	course, err := m.Follow(&want, &old, start, inc, tolerance, 0)
	require.NoError(t, err)

	junk := junkResult()
	again, err := m.Follow(&junk, &old, start, inc, tolerance, 0)
	require.NoError(t, err)
	require.Equal(t, want, junk, "junk in the destination shows")
	require.Equal(t, course, again)
	inPlace := integrate.Result{State: old}
	_, err = m.Follow(&inPlace, &inPlace.State, start, inc, tolerance, 0)
	require.NoError(t, err)
	require.Equal(t, want, inPlace, "a start state that is &out.State")

	var stress tensor.Sym
	end := old
	light, err := m.FollowStress(&stress, &end, &end, start, inc, tolerance, 0)
	require.NoError(t, err)
	require.Equal(t, want.Stress, stress)
	require.Equal(t, want.State, end)
	require.Equal(t, course, light)
	require.Zero(t, testing.AllocsPerRun(10, func() { _, _ = m.Follow(&junk, &old, start, inc, tolerance, 0) }))
	require.Zero(t, testing.AllocsPerRun(10, func() { _, _ = m.FollowStress(&stress, &end, &old, start, inc, tolerance, 0) }))

	inc.Dt = 0
	var single integrate.Result
	require.NoError(t, m.Step(&single, &old, inc))
	_, err = m.Follow(&junk, &old, start, inc, tolerance, 0)
	require.NoError(t, err)
	require.Equal(t, single, junk, "no time is an elastic step")
}

func TestFollowRefuses(t *testing.T) {
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := material(t, law)
	nan, inf := math.NaN(), math.Inf(1)
	type arguments struct {
		old       integrate.State
		start     integrate.Conditions
		inc       integrate.Increment
		tolerance integrate.Tolerance
		first     float64
	}
	for name, c := range map[string]struct {
		change func(*arguments)
		code   integrate.Code
	}{
		"tolerance 0":       {func(a *arguments) { a.tolerance.Relative = 0 }, integrate.BadIncrement},
		"tolerance 1":       {func(a *arguments) { a.tolerance.Relative = 1 }, integrate.BadIncrement},
		"tolerance NaN":     {func(a *arguments) { a.tolerance.Relative = nan }, integrate.BadIncrement},
		"stress floor":      {func(a *arguments) { a.tolerance.Stress = -1 }, integrate.BadIncrement},
		"creep floor":       {func(a *arguments) { a.tolerance.Creep = inf }, integrate.BadIncrement},
		"first step":        {func(a *arguments) { a.first = -1 }, integrate.BadIncrement},
		"first step NaN":    {func(a *arguments) { a.first = nan }, integrate.BadIncrement},
		"time step":         {func(a *arguments) { a.inc.Dt = -1 }, integrate.BadIncrement},
		"end strain":        {func(a *arguments) { a.inc.Strain[3] = inf }, integrate.BadIncrement},
		"start strain":      {func(a *arguments) { a.start.Strain[3] = nan }, integrate.BadIncrement},
		"start temperature": {func(a *arguments) { a.start.Temperature = 0 }, integrate.BadIncrement},
		"state":             {func(a *arguments) { a.old.Equivalent = -1 }, integrate.BadState},
		"state strain":      {func(a *arguments) { a.old.Creep[1] = nan }, integrate.BadState},
	} {
		a := arguments{start: integrate.Conditions{Temperature: 800},
			inc:       integrate.Increment{Dt: 1, Strain: tensor.Sym{1e-3}, Temperature: 800},
			tolerance: integrate.Tolerance{Relative: 1e-4}}
		c.change(&a)
		out := integrate.Result{CreepStep: 42}
		before := a.old
		course, err := m.Follow(&out, &a.old, a.start, a.inc, a.tolerance, a.first)
		require.Equal(t, c.code, err, name)
		require.Zero(t, course, name)
		require.Equal(t, integrate.Result{CreepStep: 42}, out, name)
		if before == before { // not for the NaN state
			require.Equal(t, before, a.old, name)
		}
		_, err = m.FollowStress(&out.Stress, &a.old, &a.old, a.start, a.inc, a.tolerance, a.first)
		require.Equal(t, c.code, err, name)
	}
	// ṗ = 1e-7 exp(1e6 p) ends after 10 h, within these 20.
	softening := failures(t)["BeyondRupture"]
	softening.inc.Dt = 20
	out := integrate.Result{CreepStep: 42}
	_, err = softening.material.Follow(&out, &softening.old,
		integrate.Conditions{Strain: softening.inc.Strain, Temperature: 800}, softening.inc, integrate.Tolerance{Relative: 1e-4}, 0)
	require.ErrorIs(t, err, integrate.BeyondRupture)
	require.Equal(t, integrate.Result{CreepStep: 42}, out)
}
