package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// maxwell is a closed form: sheared at a constant equivalent rate e, a point that creeps by Aσ obeys dσ/dt = K (e - Aσ), with
// K = 3G below yield and K = 3GH/(3G+H) on a linear hardening curve (plastic flow takes H⁻¹ dσ of the strain). So in each
// regime σ = e/A + (σ₀ - e/A) exp(-KAt), the creep strain is ∫Aσ dt and the plastic strain (σ - σ₀)/H.
type maxwell struct{ a, hardening, yield float64 }

func (w maxwell) part(stress, k, e, t float64) (after, creep float64) {
	limit := e / w.a
	after = limit + (stress-limit)*math.Exp(-k*w.a*t)
	return after, w.a*limit*t + (stress-limit)*-math.Expm1(-k*w.a*t)/k
}

// ramp returns stress, creep and plastic strain after the time t of a ramp at the rate e from virgin material.
func (w maxwell) ramp(e, t float64) (stress, p, kappa float64) {
	limit := e / w.a
	onset := math.Log(limit/(limit-w.yield)) / (3 * shear * w.a)
	if t <= onset {
		stress, p = w.part(0, 3*shear, e, t)
		return stress, p, 0
	}
	_, p = w.part(0, 3*shear, e, onset)
	stress, more := w.part(w.yield, 3*shear*w.hardening/(3*shear+w.hardening), e, t-onset)
	return stress, p + more, (stress - w.yield) / w.hardening
}

// TestFollowThroughYielding: one increment from nothing to beyond yield, onset inside, keeps its tolerance on stress, creep
// strain and plastic strain; a second one unloads and creeps, elastically, at the constant rate -e.
func TestFollowThroughYielding(t *testing.T) {
	w := maxwell{a: 2e-8, hardening: 6000, yield: 150}
	const rate, time, back = 2e-5, 200.0, 30.0
	m := plastic(t, norton(t, w.a, 1),
		integrate.LinearHardening{Yield: integrate.Constant(w.yield), Modulus: integrate.Constant(w.hardening)}, integrate.RemembersCreep)
	direction := shearOf(1)
	direction = direction.Scale(1 / direction.EquivalentStrain())
	at := func(e float64) integrate.Conditions {
		return integrate.Conditions{Strain: direction.Scale(e), Temperature: 800}
	}
	stress, p, kappa := w.ramp(rate, time)
	require.Greater(t, kappa, 1e-3)
	require.Greater(t, p, 3e-4)
	unloaded, crept := w.part(stress, 3*shear, -rate, back)
	require.Greater(t, unloaded, 0.0, "no reversal")
	for _, tolerance := range []float64{1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8} {
		var out integrate.Result
		limit := integrate.Tolerance{Relative: tolerance}
		course, err := m.Follow(&out, &integrate.State{}, at(0), integrate.Increment{Dt: time, Strain: direction.Scale(rate * time),
			Temperature: 800}, limit, 0)
		require.NoError(t, err)
		floor := stress / (3 * shear) // of the tolerance on strains
		off := math.Max(math.Abs(out.Stress.Mises()/stress-1), math.Max(math.Abs(out.State.Equivalent-p)/math.Max(p, floor),
			math.Abs(out.State.EquivalentPlastic-kappa)/math.Max(kappa, floor)))
		t.Logf("tolerance %.0e: error %.1e, %3d steps, %2d rejected, %5d solves", tolerance, off, course.Steps, course.Rejected,
			course.Solves)
		require.LessOrEqual(t, off, 3*tolerance)
		require.LessOrEqual(t, course.Error, 1.0)
		require.LessOrEqual(t, course.Solves, 4000)
		_, err = m.Follow(&out, &out.State, at(rate*time), integrate.Increment{Dt: back, Strain: direction.Scale(rate * (time - back)),
			Temperature: 800}, limit, 0)
		require.NoError(t, err)
		check.Rel(t, "unloaded stress", out.Stress.Mises(), unloaded, 5*tolerance*stress/unloaded)
		check.Rel(t, "creep strain while unloading", out.State.Equivalent, p+crept, 5*tolerance)
	}
}

// TestFollowPlasticTangent holds the derivatives of a whole walk against differences of walks that take the very same steps.
// Tolerance: 1e-8 of an elastic tangent.
func TestFollowPlasticTangent(t *testing.T) {
	s := newSource(63)
	kinds := lawKinds()
	worst, worstByT, cases, yielding := 0.0, 0.0, 0, 0
	for i := range 400 {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		p := integrate.Plasticity{Hardening: drawWarmHardening(t, s, i%4, s.decades(1.5, 2.5)), Memory: integrate.CreepMemory(i / 4 % 2)}
		m, free := warmPlastic(t, law, p)
		old := integrate.State{Creep: s.deviator().Scale(s.decades(-6, -3)), Equivalent: s.decades(-4, -1),
			Plastic: s.deviator().Scale(s.decades(-6, -3)), EquivalentPlastic: s.decades(-6, -2)}
		inelastic := old.Creep.Add(old.Plastic)
		start := integrate.Conditions{Temperature: s.uniform(720, 1000)}
		start.Strain = inelastic.Add(s.deviator().Scale(s.decades(-4, -3))).Add(tensor.Identity().Scale(free(start.Temperature)))
		inc := integrate.Increment{Dt: s.decades(-2, 3), Temperature: start.Temperature + s.uniform(-20, 60)}
		elastic := s.deviator().Scale(s.decades(-3, -2))
		inc.Strain = inelastic.Add(elastic).Add(tensor.Identity().Scale(free(inc.Temperature)))
		var course integrate.Course
		var out integrate.Result
		walk := func(inc integrate.Increment, out *integrate.Result) (integrate.Course, error) {
			return m.Follow(out, &old, start, inc, integrate.Tolerance{Relative: 0.1, Stress: 1e9, Creep: 1e9}, inc.Dt/3)
		}
		course, err = walk(inc, &out)
		require.NoError(t, err)
		steady := course.Rejected == 0
		stress := func(inc integrate.Increment) tensor.Sym {
			var r integrate.Result
			c, err := walk(inc, &r)
			steady = steady && err == nil && c.Steps == course.Steps && c.Rejected == 0 && c.Solves == course.Solves &&
				(r.PlasticStep > 0) == (out.PlasticStep > 0)
			return r.Stress
		}
		size, scale := elastic.EquivalentStrain(), shear
		deviation := 0.0
		for j := range 6 {
			var unit tensor.Sym
			unit[j] = 1
			d, n := gap(func(x float64) tensor.Sym {
				moved := inc
				moved.Strain[j] += x
				return stress(moved).Deviator()
			}, size*0x1p-3, out.Tangent.Contract(unit).Deviator())
			deviation = math.Max(deviation, d-n)
		}
		d, _ := gap(func(x float64) tensor.Sym {
			moved := inc
			moved.Temperature += x
			return stress(moved)
		}, 8, out.ByTemperature)
		if !steady {
			continue
		}
		cases++
		if out.PlasticStep > 0 {
			yielding++
		}
		relative := d / math.Max(largest(out.ByTemperature), largest(out.Stress)/inc.Temperature)
		worst, worstByT = math.Max(worst, deviation/scale), math.Max(worstByT, relative)
		require.LessOrEqual(t, deviation, 1e-8*scale, "%s (seed %d, case %d)", kinds[i%len(kinds)].name, seed, i)
		require.LessOrEqual(t, relative, 1e-8, "%s by temperature (seed %d, case %d)", kinds[i%len(kinds)].name, seed, i)
	}
	t.Logf("%d walks, %d with plastic flow: worst error of ∂σ/∂ε %.1e of an elastic one, of ∂σ/∂T %.1e", cases, yielding, worst, worstByT)
	require.GreaterOrEqual(t, yielding, 200)
}

// TestFollowPlasticAgreesWithFineSteps: from a state loaded beyond yield, along a path that turns while it yields, with temperature, E(T) and the yield stress
// changing and creep that hardens by all inelastic strain, the walk ends where ever finer plain steps, extrapolated, do.
func TestFollowPlasticAgreesWithFineSteps(t *testing.T) {
	law, err := creeplaw.NewStrainHardeningAt(2e-5, 150, 1e-3, 5, -0.8)
	require.NoError(t, err)
	table := func(values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 700, 1100}, values)
		require.NoError(t, err)
		return made
	}
	m, _ := warmPlastic(t, law, integrate.Plasticity{Memory: integrate.RemembersInelastic, Hardening: integrate.VoceHardening{
		Yield: table(250, 180, 60), Saturation: table(120, 90, 50), Rate: table(100, 150, 200)}})
	start := integrate.Conditions{Strain: tensor.Sym{3e-3, 0, 0, 2e-4}, Temperature: 860}
	var loaded integrate.Result // at once, beyond yield
	require.NoError(t, m.Step(&loaded, &integrate.State{}, integrate.Increment{Strain: start.Strain, Temperature: 860}))
	require.Positive(t, loaded.PlasticStep)
	inc := integrate.Increment{Dt: 20, Strain: tensor.Sym{4e-3, -1e-3, -5e-4, 2.4e-3, 1.3e-3}, Temperature: 830}
	fine := func(steps int) integrate.State {
		out := loaded
		for k := 1; k <= steps; k++ {
			part := float64(k) / float64(steps)
			require.NoError(t, m.Step(&out, &out.State, integrate.Increment{Dt: inc.Dt / float64(steps),
				Strain:      start.Strain.Add(inc.Strain.Sub(start.Strain).Scale(part)),
				Temperature: start.Temperature + part*(inc.Temperature-start.Temperature)}))
		}
		return out.State
	}
	// Richardson's extrapolation of first- and second-order terms.
	a, b, c := fine(2000), fine(4000), fine(8000)
	extrapolate := func(of func(s *integrate.State) float64) float64 {
		once, again := 2*of(&b)-of(&a), 2*of(&c)-of(&b)
		return (4*again - once) / 3
	}
	require.Greater(t, c.EquivalentPlastic, 1e-3)
	require.Greater(t, c.Equivalent, 1e-4)
	for _, tolerance := range []float64{1e-3, 1e-5, 1e-7, 1e-9} {
		var out integrate.Result
		course, err := m.Follow(&out, &loaded.State, start, inc, integrate.Tolerance{Relative: tolerance}, 0)
		require.NoError(t, err)
		off := 0.0
		for i := range 6 {
			creep := extrapolate(func(s *integrate.State) float64 { return s.Creep[i] })
			plastic := extrapolate(func(s *integrate.State) float64 { return s.Plastic[i] })
			off = math.Max(off, math.Max(math.Abs(out.State.Creep[i]-creep), math.Abs(out.State.Plastic[i]-plastic)))
		}
		off = math.Max(off, math.Abs(out.State.EquivalentPlastic-extrapolate(func(s *integrate.State) float64 { return s.EquivalentPlastic })))
		off /= out.State.EquivalentPlastic
		t.Logf("tolerance %.0e: strains off by %.1e of κ, %d steps, %d rejected, %d solves", tolerance, off, course.Steps,
			course.Rejected, course.Solves)
		require.LessOrEqual(t, off, 3*tolerance+1e-10) // the extrapolation is good to about 1e-11
	}
}

func TestFollowPlasticContract(t *testing.T) {
	m := plastic(t, norton(t, 1e-16, 5), integrate.LinearHardening{Yield: integrate.Constant(150), Modulus: integrate.Constant(4e3)},
		integrate.RemembersCreep)
	start := integrate.Conditions{Strain: shearOf(100), Temperature: 800}
	inc := integrate.Increment{Dt: 100, Strain: shearOf(300), Temperature: 800}
	tolerance := integrate.Tolerance{Relative: 1e-5}
	old := integrate.State{Creep: tensor.Sym{1e-5, -1e-5}, Equivalent: 1e-5, Plastic: tensor.Sym{2e-5, -2e-5}, EquivalentPlastic: 2e-5}
	var want integrate.Result
	course, err := m.Follow(&want, &old, start, inc, tolerance, 0)
	require.NoError(t, err)
	require.Positive(t, want.PlasticStep)

	junk := junkResult()
	junk.PlasticStep, junk.State.Plastic, junk.State.EquivalentPlastic = math.NaN(), tensor.Sym{math.NaN()}, math.NaN()
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

	bad := old
	bad.EquivalentPlastic = -1
	out := integrate.Result{CreepStep: 42}
	course, err = m.Follow(&out, &bad, start, inc, tolerance, 0)
	require.Equal(t, integrate.BadState, err)
	require.Zero(t, course)
	require.Equal(t, integrate.Result{CreepStep: 42}, out)
}

// TestFollowPlasticKeepsItsToleranceOnRandomPaths draws paths, most of which begin to yield or stop inside, and compares walks
// with walks of a tolerance a thousand times as small, which the tests above hold against closed forms and fine steps.
func TestFollowPlasticKeepsItsToleranceOnRandomPaths(t *testing.T) {
	const tolerance = 1e-3
	count := 300
	if *campaign {
		count = 10_000
	}
	s := newSource(65)
	kinds := lawKinds()
	worst, within, yielded, solves := 0.0, 0, 0, 0
	for i := range count {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		p := integrate.Plasticity{Hardening: drawWarmHardening(t, s, i%5, s.decades(1.5, 2.5)), Memory: integrate.CreepMemory(i / 5 % 2)}
		m, free := warmPlastic(t, law, p)
		start := integrate.Conditions{Temperature: s.uniform(720, 1000)}
		start.Strain = s.deviator().Scale(s.decades(-5, -3)).Add(tensor.Identity().Scale(free(start.Temperature)))
		var loaded integrate.Result
		require.NoError(t, m.Step(&loaded, &integrate.State{}, integrate.Increment{Strain: start.Strain, Temperature: start.Temperature}))
		inc := integrate.Increment{Dt: s.decades(-2, 3), Temperature: start.Temperature + s.uniform(-20, 60)}
		inc.Strain = s.deviator().Scale(s.decades(-3.5, -2)).Add(tensor.Identity().Scale(free(inc.Temperature)))
		var rough, fine integrate.Result
		course, err := m.Follow(&rough, &loaded.State, start, inc, integrate.Tolerance{Relative: tolerance}, 0)
		require.NoError(t, err, "%s (seed %d, case %d)", kinds[i%len(kinds)].name, seed, i)
		_, err = m.Follow(&fine, &loaded.State, start, inc, integrate.Tolerance{Relative: 1e-3 * tolerance}, course.Dt/10)
		require.NoError(t, err, "%s (seed %d, case %d)", kinds[i%len(kinds)].name, seed, i)
		solves += course.Solves
		if rough.PlasticStep > 0 {
			yielded++
		}
		floor := math.Max(rough.Stress.Mises(), loaded.Stress.Mises()) / (3 * shear)
		off := 0.0
		for _, pair := range [][3]float64{
			{rough.State.Creep.Sub(fine.State.Creep).EquivalentStrain(), 0, fine.State.Equivalent},
			{rough.State.Plastic.Sub(fine.State.Plastic).EquivalentStrain(), 0, fine.State.EquivalentPlastic},
			{rough.State.Equivalent, fine.State.Equivalent, fine.State.Equivalent},
			{rough.State.EquivalentPlastic, fine.State.EquivalentPlastic, fine.State.EquivalentPlastic},
		} {
			off = math.Max(off, math.Abs(pair[0]-pair[1])/math.Max(floor, pair[2]))
		}
		worst = math.Max(worst, off)
		if off <= 3*tolerance {
			within++
		}
		require.LessOrEqual(t, off, 10*tolerance, "%s (seed %d, case %d): %+v", kinds[i%len(kinds)].name, seed, i, inc)
	}
	t.Logf("%d walks, %d with plastic flow, %.0f solves each: worst error %.1f of the tolerance, within 3 in %.1f %%", count, yielded,
		float64(solves)/float64(count), worst/tolerance, 100*float64(within)/float64(count))
	require.GreaterOrEqual(t, float64(within), 0.95*float64(count))
	require.GreaterOrEqual(t, yielded, count/2)
}
