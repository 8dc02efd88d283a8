package program_test

import (
	"context"
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/program"
)

const (
	young   = 150e3 // MPa; times in h
	poisson = 0.3
	warmth  = 800
)

func must[T any](v T, err error) func(t *testing.T) T {
	return func(t *testing.T) T {
		t.Helper()
		require.NoError(t, err)
		return v
	}
}

func material(t *testing.T, law creeplaw.Law) *integrate.Material {
	t.Helper()
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
	require.NoError(t, err)
	return m
}

// tension is a segment of uniaxial stress.
func tension(name string, stress, duration float64) program.Segment {
	return program.Segment{Name: name, Duration: duration, Control: integrate.StressControl(),
		Prescribed: [6]program.Signal{program.Constant(stress)}, Temperature: program.Constant(warmth)}
}

// bar is a segment of a bar with free sides whose axial strain follows a signal.
func bar(name string, strain program.Signal, duration float64) program.Segment {
	return program.Segment{Name: name, Duration: duration, Control: integrate.UniaxialStress(),
		Prescribed: [6]program.Signal{strain}, Temperature: program.Constant(warmth)}
}

func of(segments ...program.Segment) program.Program {
	return program.Program{Temperature: warmth, Blocks: []program.Block{{Segments: segments}}}
}

// through runs a program to its end and returns all records.
func through(t *testing.T, m *integrate.Material, p program.Program, o program.Options) ([]program.Record, *program.Run) {
	t.Helper()
	run := program.Start(context.Background(), m, p, o)
	var records []program.Record
	for r := range run.Records() {
		records = append(records, r)
	}
	return records, run
}

func within(relative float64) program.Options {
	return program.Options{Tolerance: integrate.Tolerance{Relative: relative}, TimesOnly: true}
}

// closed is an event or a rupture whose time is known in closed form.
type closed struct {
	name    string
	law     creeplaw.Law
	program program.Program
	event   program.Event // without a quantity: the rupture is waited for
	time    float64
}

func closedForms(t *testing.T) []closed {
	norton := must(creeplaw.NewNorton(1e-16, 5))(t)
	maxwell := must(creeplaw.NewNorton(1e-8, 1))(t)
	square := must(creeplaw.NewNorton(1e-10, 2))(t)
	primary := must(creeplaw.NewBaileyNorton(1e-12, 4, 0.4))(t)
	sinh := must(creeplaw.NewGarofalo(1e-9, 0.05, 1))(t)
	damage := must(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6}))(t)
	kachanov := must(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-18, StressExponent: 3,
		DamagePrefactor: 1e-15, DamageStressExponent: 5, DamageExponent: 5}))(t)
	liu := must(creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 1e-18, StressExponent: 5,
		DamagePrefactor: 1e-12, DamageStressExponent: 4.5, DamageExponent: 7}))(t)
	omega := must(creeplaw.NewOmega(must(creeplaw.NewNortonAt(1e-6, 100, 5))(t), 50))(t)
	followUp := must(integrate.FollowUp(young, 3))(t)
	held := func(stress float64) program.Program { return of(bar("hold", program.Constant(stress/young), 1e5)) }
	relaxed := func(to float64) program.Event { return program.StressComponent(0, to, program.Falling, true) }
	follow := of(bar("hold", program.Constant(3*200/young), 1e5)) // ε + (Z-1)σ/E with σ = 200 at the start
	follow.Blocks[0].Segments[0].Control = followUp
	follow.Blocks[0].Segments[0].Prescribed[0] = program.Constant(200/young + 2*200/young)
	return []closed{
		// Constant stress: p = A σⁿ t, and A σⁿ tᵐ (Finnie & Heller 1959).
		{"Norton creep strain", norton, of(tension("hold", 150, 1e4)), program.CreepStrain(1e-3, true),
			1e-3 / (1e-16 * math.Pow(150, 5))},
		{"primary creep strain", primary, of(tension("hold", 100, 1e4)), program.CreepStrain(8e-4, true),
			math.Pow(8e-4/1e-4, 2.5)},
		// Relaxation of a bar (published-values 1.1: half the stress after 156.25 h exactly; Maxwell; 1.2 after Nadai 1938).
		{"half the stress", norton, held(200), relaxed(100), 156.25},
		{"Maxwell relaxation", maxwell, held(200), relaxed(120), math.Log(200.0/120) / (young * 1e-8)},
		{"sinh relaxation", sinh, held(200), relaxed(130),
			math.Log(math.Tanh(0.05*100)/math.Tanh(0.05*65)) / (young * 1e-9 * 0.05)},
		// Elastic follow-up Z = 3 (published-values 1.4).
		{"follow-up", norton, follow, relaxed(120), (math.Pow(120, -4) - math.Pow(200, -4)) / (4 * young / 3 * 1e-16)},
		// Constant strain rate, n = 2: σ = σs tanh(E t √(A ε̇)) (published-values 1.6).
		{"constant rate", square, of(bar("pull", program.Ramp(0, 1e-3), 1000)),
			program.StressComponent(0, 63.51489524, program.Rising, true), 500},
		// Kachanov 1958, Rabotnov 1969 (published-values 1.15).
		{"damage 0.0943", damage, of(tension("hold", 100, 1e4)), program.InternalVariable(0, "damage", 0.09427633574, true),
			0.5 / 7e-13 / math.Pow(100, 4.5)},
		{"damage rupture", damage, of(tension("hold", 100, 1e4)), program.Event{}, 1 / (7e-13 * math.Pow(100, 4.5))},
		{"two-step damage rupture", damage, of(tension("low", 100, 0.4/(7e-13*math.Pow(100, 4.5))), tension("high", 120, 1e4)),
			program.Event{}, 948.7727055},
		{"Kachanov rupture", kachanov, of(tension("hold", 100, 1e6)), program.Event{}, 16666.6666666667},
		// Liu & Murakami 1998: ω(t) = -ln[1-(1-e^-q) t/t_r]/q, t_r = 1/(M σ^χ).
		{"Liu–Murakami damage", liu, of(tension("hold", 100, 1e5)), program.InternalVariable(0, "damage", 0.3277730927, true), 900},
		// Prager 1995 (published-values 1.20): ε = -ln(1-Ωε̇₀t)/Ω, t_r = 1/(Ω ε̇₀).
		{"Omega creep strain", omega, of(tension("hold", 100, 1e6)), program.CreepStrain(0.04605170186, true), 18000},
		{"Omega rupture", omega, of(tension("hold", 100, 1e6)), program.Event{}, 20000},
	}
}

// TestTimesOfEventsAndRuptures locates limits and ruptures whose times are known in closed form.
//
// Tolerance: 1e-6 of the time. The walk's own tolerance is 1e-9, and the closed forms are printed to ten digits.
func TestTimesOfEventsAndRuptures(t *testing.T) {
	for _, c := range closedForms(t) {
		o := within(1e-9)
		if c.event.Of != nil {
			o.Events = []program.Event{c.event}
		}
		records, run := through(t, material(t, c.law), c.program, o)
		last := records[len(records)-1]
		at := last.Time
		if c.event.Of == nil {
			var stop *program.StopError
			require.ErrorAs(t, run.Err(), &stop, c.name)
			require.ErrorIs(t, run.Err(), integrate.BeyondRupture, c.name)
			at = stop.Time
		} else {
			require.NoError(t, run.Err(), c.name)
			require.Equal(t, program.AtEvent, last.Reason, c.name)
			require.Equal(t, c.event.Name, run.Stopped(), c.name)
		}
		t.Logf("%-24s %14.8g h, %9.1e off, %d steps, %d rejected", c.name, at, at/c.time-1, run.Last().Count.Steps,
			run.Last().Count.Rejected)
		check.Rel(t, c.name, at, c.time, 1e-6)
	}
}

// TestTwoStepStress: strain hardening across a change of stress (published-values 1.17: strain hardening 4.229380980e-3 and
// 3.238082964e-3), from zero strain with its infinite rate.
func TestTwoStepStress(t *testing.T) {
	m := material(t, must(creeplaw.NewBaileyNorton(1e-12, 4, 0.4))(t))
	for _, c := range []struct{ first, second, strain float64 }{{100, 150, 4.229380980e-3}, {150, 100, 3.238082964e-3}} {
		for _, tolerance := range []float64{1e-3, 1e-5, 1e-7, 1e-9} {
			_, run := through(t, m, of(tension("first", c.first, 100), tension("second", c.second, 200)), within(tolerance))
			require.NoError(t, run.Err())
			// Ten printed digits, and local errors that add up: three times the tolerance.
			check.Rel(t, "strain", run.Last().State.Equivalent, c.strain, 3*tolerance+1e-9)
		}
	}
}

// TestCyclesAreNotStored: a block repeated n times is the same as n copies of it, and its records carry the cycle.
func TestCyclesAreNotStored(t *testing.T) {
	m := material(t, must(creeplaw.NewNorton(1e-16, 5))(t))
	cycle := []program.Segment{bar("up", program.Ramp(-1e-3, 1e-3), 1), bar("hold", program.Reached(), 20),
		bar("down", program.Ramp(1e-3, -1e-3), 1), bar("rest", program.Reached(), 20)}
	start := bar("start", program.Ramp(0, -1e-3), 1)
	repeated := program.Program{Temperature: warmth, Blocks: []program.Block{{Segments: []program.Segment{start}},
		{Repeat: 5, Segments: cycle}}}
	copied := program.Program{Temperature: warmth, Blocks: []program.Block{{Segments: []program.Segment{start}}}}
	for range 5 {
		copied.Blocks[0].Segments = append(copied.Blocks[0].Segments, cycle...)
	}
	o := program.Options{Tolerance: integrate.Tolerance{Relative: 1e-5}}
	a, run := through(t, m, repeated, o)
	require.NoError(t, run.Err())
	b, run := through(t, m, copied, o)
	require.NoError(t, run.Err())
	require.Len(t, b, len(a))
	cycles := map[int]bool{}
	for i := range a {
		cycles[a[i].Place.Cycle] = true
		a[i].Place, b[i].Place = program.Place{}, program.Place{}
	}
	require.Equal(t, b, a)
	require.Len(t, cycles, 5)
}

// TestRequestedTimes are met exactly, in order, also across segments, and the energy balance closes: work done on a bar is the
// elastic energy in it and what creep dissipates.
func TestRequestedTimes(t *testing.T) {
	m := material(t, must(creeplaw.NewNorton(1e-16, 5))(t))
	o := within(1e-8)
	o.Times = []float64{0, 5, 10, 12.5, 100}
	records, run := through(t, m, of(bar("pull", program.Ramp(0, 1.2e-3), 10), bar("hold", program.Reached(), 90)), o)
	require.NoError(t, run.Err())
	var times []float64
	for _, r := range records {
		if r.Reason == program.AtTime {
			times = append(times, r.Time)
		}
	}
	require.Equal(t, o.Times, times)
	last := records[len(records)-1]
	require.Equal(t, 100.0, last.Time)

	// The work is ∫σ dε over the pull; by the trapezium rule on fine records.
	o = program.Options{Tolerance: integrate.Tolerance{Relative: 1e-8}}
	for i := range 4001 {
		o.Times = append(o.Times, float64(i)/400)
	}
	fine, run := through(t, m, of(bar("pull", program.Ramp(0, 1.2e-3), 10), bar("hold", program.Reached(), 90)), o)
	require.NoError(t, run.Err())
	work := 0.0
	for i := 1; i < len(fine); i++ {
		work += (fine[i].Stress[0] + fine[i-1].Stress[0]) / 2 * (fine[i].Strain[0] - fine[i-1].Strain[0])
	}
	elastic := last.Stress[0] * last.Stress[0] / (2 * young)
	check.Rel(t, "energy", elastic+last.Dissipated, work, 1e-6) // the trapezium rule on 4000 points
}

// TestRunsThatEndEarly leave complete output up to the last accepted step, and say where and why.
func TestRunsThatEndEarly(t *testing.T) {
	m := material(t, must(creeplaw.NewNorton(1e-16, 5))(t))
	p := of(bar("pull", program.Ramp(0, 1.2e-3), 10), bar("hold", program.Reached(), 1e4))
	o := program.Options{Tolerance: integrate.Tolerance{Relative: 1e-6}}
	whole, run := through(t, m, p, o)
	require.NoError(t, run.Err())

	ctx, cancel := context.WithCancel(context.Background())
	seen := 0
	o.Observe = func(r program.Record) {
		if seen++; seen == 7 {
			cancel()
		}
	}
	cancelled := program.Start(ctx, m, p, o)
	var records []program.Record
	for r := range cancelled.Records() {
		records = append(records, r)
	}
	require.ErrorIs(t, cancelled.Err(), context.Canceled)
	var stop *program.StopError
	require.ErrorAs(t, cancelled.Err(), &stop)
	require.Equal(t, whole[:len(records)], records)
	require.Equal(t, records[len(records)-1].Time, stop.Time)
	require.Len(t, records, 8) // the start, and seven steps
	o.Observe = nil

	left := program.Start(context.Background(), m, p, o)
	for range left.Records() {
		break
	}
	require.NoError(t, left.Err(), "a loop that is left is no failure")

	// A stress that the material can reach only at an infinite rate.
	impossible := must(creeplaw.NewNortonAt(1e-6, 100, 50))(t)
	absurd := of(tension("load", 100, 1), tension("overload", 1e12, 1))
	absurd.Blocks[0].Segments[1].Name = "overload"
	_, run = through(t, material(t, impossible), absurd, o)
	require.ErrorAs(t, run.Err(), &stop)
	require.Equal(t, 1, stop.Place.Segment)
	require.Contains(t, run.Err().Error(), "overload")
	var code integrate.Code
	require.True(t, errors.As(run.Err(), &code), "%v", run.Err())
}

func TestSetupsAreRefused(t *testing.T) {
	m := material(t, must(creeplaw.NewNorton(1e-16, 5))(t))
	nan, inf := math.NaN(), math.Inf(1)
	for name, c := range map[string]struct {
		change   func(*program.Program, *program.Options)
		quantity string
	}{
		"no tolerance":     {func(_ *program.Program, o *program.Options) { o.Tolerance.Relative = 0 }, "relative tolerance"},
		"loose tolerance":  {func(_ *program.Program, o *program.Options) { o.Tolerance.Relative = 1 }, "relative tolerance"},
		"stress floor":     {func(_ *program.Program, o *program.Options) { o.Tolerance.Stress = nan }, "stress floor of the tolerance"},
		"creep floor":      {func(_ *program.Program, o *program.Options) { o.Tolerance.Creep = -1 }, "creep floor of the tolerance"},
		"first step":       {func(_ *program.Program, o *program.Options) { o.FirstStep = inf }, "first step"},
		"times disordered": {func(_ *program.Program, o *program.Options) { o.Times = []float64{2, 1} }, "requested time 1"},
		"time outside":     {func(_ *program.Program, o *program.Options) { o.Times = []float64{1e9} }, "requested time 0"},
		"time NaN":         {func(_ *program.Program, o *program.Options) { o.Times = []float64{nan} }, "requested time 0"},
		"event":            {func(_ *program.Program, o *program.Options) { o.Events = []program.Event{{Name: "x"}} }, "quantity of event x"},
		"event limit": {func(_ *program.Program, o *program.Options) {
			o.Events = []program.Event{program.CreepStrain(nan, true)}
		}, "limit of event creep strain"},
		"start temperature": {func(p *program.Program, _ *program.Options) { p.Temperature = 0 }, "temperature"},
		"start strain":      {func(p *program.Program, _ *program.Options) { p.Strain[2] = nan }, "strain"},
		"duration":          {func(p *program.Program, _ *program.Options) { p.Blocks[0].Segments[1].Duration = -1 }, "duration"},
		"duration NaN":      {func(p *program.Program, _ *program.Options) { p.Blocks[0].Segments[1].Duration = nan }, "duration"},
		"signal NaN": {func(p *program.Program, _ *program.Options) {
			p.Blocks[0].Segments[1].Prescribed[3] = program.Constant(nan)
		}, "prescribed yz"},
		"ramp Inf": {func(p *program.Program, _ *program.Options) {
			p.Blocks[0].Segments[1].Prescribed[0] = program.Ramp(0, inf)
		}, "prescribed xx"},
		"temperature zero": {func(p *program.Program, _ *program.Options) { p.Blocks[0].Segments[1].Temperature = program.Signal{} }, "temperature"},
		"temperature ramp": {func(p *program.Program, _ *program.Options) {
			p.Blocks[0].Segments[1].Temperature = program.Ramp(800, -5)
		}, "temperature"},
		"repeat": {func(p *program.Program, _ *program.Options) { p.Blocks[0].Repeat = -2 }, "number of repeats"},
	} {
		p := of(tension("a", 100, 1), tension("b", 100, 1))
		o := within(1e-4)
		c.change(&p, &o)
		records, run := through(t, m, p, o)
		require.Empty(t, records, name)
		var e *program.SetupError
		require.ErrorAs(t, run.Err(), &e, name)
		require.Equal(t, c.quantity, e.Quantity, name)
		require.Contains(t, run.Err().Error(), c.quantity, name)
	}
	require.Panics(t, func() { program.Start(context.Background(), nil, program.Program{}, program.Options{}) })
}

// TestTimesKeepTheTolerance: the same times at tolerances from 1e-3 to 1e-9. Issue: within three tolerances in at least 95 of 100
// cases, within ten in all. Granted besides are the ten digits of the closed forms, and for a rupture the length of the step at
// which it is given up.
func TestTimesKeepTheTolerance(t *testing.T) {
	cases, within3 := 0, 0
	for _, tolerance := range []float64{1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9} {
		worst, name := 0.0, ""
		for _, c := range closedForms(t) {
			o := within(tolerance)
			if c.event.Of != nil {
				o.Events = []program.Event{c.event}
			}
			records, run := through(t, material(t, c.law), c.program, o)
			at, granted := records[len(records)-1].Time, 1e-9
			var stop *program.StopError
			if errors.As(run.Err(), &stop) {
				at, granted = stop.Time, 1e-8
			}
			ratio := math.Max(0, math.Abs(at/c.time-1)-granted) / tolerance
			cases++
			if ratio <= 3 {
				within3++
			}
			require.LessOrEqual(t, ratio, 10.0, "%s at %v", c.name, tolerance)
			if ratio > worst {
				worst, name = ratio, c.name
			}
		}
		t.Logf("tolerance %.0e: worst time off by %.2f tolerances (%s)", tolerance, worst, name)
	}
	require.GreaterOrEqual(t, float64(within3), 0.95*float64(cases))
}
