package integrate_test

import (
	"math"
	"sync"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// TestNewRefusesHardening: what no yield surface can be is an error from New that names the quantity and its value.
func TestNewRefusesHardening(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	constant := integrate.Constant
	table := func(values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 900}, values)
		require.NoError(t, err)
		return made
	}
	law := norton(t, 1e-16, 5)
	for _, c := range []struct {
		name        string
		curve       integrate.Hardening
		quantity    string
		temperature float64
	}{
		{"no yield stress", integrate.LinearHardening{}, "yield stress", 0},
		{"σ₀ < 0", integrate.LinearHardening{Yield: constant(-1)}, "yield stress", 0},
		{"σ₀ NaN", integrate.LinearHardening{Yield: constant(nan)}, "yield stress", 0},
		{"σ₀ infinite", integrate.LinearHardening{Yield: constant(inf)}, "yield stress", 0},
		{"σ₀ < 0 in a table", integrate.LinearHardening{Yield: table(100, -5)}, "yield stress", 900},
		{"H < 0", integrate.LinearHardening{Yield: constant(100), Modulus: constant(-1)}, "plastic modulus", 0},
		{"H NaN", integrate.LinearHardening{Yield: constant(100), Modulus: constant(nan)}, "plastic modulus", 0},
		{"H < 0 in a table", integrate.LinearHardening{Yield: constant(100), Modulus: table(-1, 5)}, "plastic modulus", 300},
		{"Voce without yield stress", integrate.VoceHardening{Saturation: constant(10), Rate: constant(10)}, "yield stress", 0},
		{"Q < 0", integrate.VoceHardening{Yield: constant(100), Saturation: constant(-10), Rate: constant(10)}, "saturation stress", 0},
		{"Q NaN", integrate.VoceHardening{Yield: constant(100), Saturation: constant(nan), Rate: constant(10)}, "saturation stress", 0},
		{"b < 0", integrate.VoceHardening{Yield: constant(100), Saturation: constant(10), Rate: constant(-1)}, "saturation rate", 0},
		{"b infinite", integrate.VoceHardening{Yield: constant(100), Saturation: constant(10), Rate: constant(inf)}, "saturation rate", 0},
		{"Voce H < 0", integrate.VoceHardening{Yield: constant(100), Modulus: constant(-1)}, "plastic modulus", 0},
		{"empty table", integrate.TabulatedHardening{}, "number of plastic strains of the hardening table", 0},
	} {
		m, err := integrate.New(integrate.NewIsotropic(2e5, 0.3), law,
			integrate.Options{Plasticity: integrate.Plasticity{Hardening: c.curve}})
		require.Nil(t, m, c.name)
		var e *integrate.MaterialError
		require.ErrorAs(t, err, &e, c.name)
		require.Equal(t, c.quantity, e.Quantity, c.name)
		require.Equal(t, c.temperature, e.Temperature, c.name)
		require.Contains(t, err.Error(), c.quantity)
	}
	fine := integrate.LinearHardening{Yield: constant(100)}
	_, err := integrate.New(integrate.NewIsotropic(2e5, 0.3), law,
		integrate.Options{Plasticity: integrate.Plasticity{Hardening: fine, Memory: 2}})
	var e *integrate.MaterialError
	require.ErrorAs(t, err, &e)
	require.Equal(t, "creep memory", e.Quantity)

	evolving, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-6, StressExponent: 5,
		DamagePrefactor: 1e-4, DamageStressExponent: 4, DamageExponent: 5, ReferenceStress: 100})
	require.NoError(t, err)
	_, err = integrate.New(integrate.NewIsotropic(2e5, 0.3), evolving, integrate.Options{Plasticity: integrate.Plasticity{Hardening: fine}})
	var combination *integrate.CombinationError
	require.ErrorAs(t, err, &combination)
	require.Contains(t, err.Error(), "plasticity")
	_, err = integrate.New(integrate.NewIsotropic(2e5, 0.3), evolving, integrate.Options{})
	require.NoError(t, err)
}

func TestHardeningTableRefuses(t *testing.T) {
	nan := math.NaN()
	constant := integrate.Constant
	table := func(from, to float64, values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{from, to}, values)
		require.NoError(t, err)
		return made
	}
	crossing, err := integrate.NewTable([]float64{300, 600, 900}, []float64{200, 100, 90})
	require.NoError(t, err)
	type tables = []integrate.Table
	for _, c := range []struct {
		name     string
		strain   []float64
		yield    tables
		quantity string
	}{
		{"none", nil, nil, "number of plastic strains"},
		{"one", []float64{0}, tables{constant(100)}, "number of plastic strains"},
		{"unequal", []float64{0, 1}, tables{constant(100)}, "number of yield stresses"},
		{"not from 0", []float64{1e-3, 1}, tables{constant(100), constant(110)}, "first plastic strain"},
		{"NaN first", []float64{nan, 1}, tables{constant(100), constant(110)}, "first plastic strain"},
		{"descending", []float64{0, 0.1, 0.05}, tables{constant(100), constant(110), constant(120)}, "plastic strain 2"},
		{"twice", []float64{0, 0}, tables{constant(100), constant(110)}, "plastic strain 1"},
		{"NaN strain", []float64{0, nan}, tables{constant(100), constant(110)}, "plastic strain 1"},
		{"infinite strain", []float64{0, math.Inf(1)}, tables{constant(100), constant(110)}, "plastic strain 1"},
		{"negative", []float64{0, 1}, tables{constant(-100), constant(110)}, "yield stress at plastic strain 0"},
		{"NaN", []float64{0, 1}, tables{constant(100), constant(nan)}, "yield stress at plastic strain 1"},
		{"softening", []float64{0, 1}, tables{constant(100), constant(99)}, "yield stress at plastic strain 1"},
		{"softening when hot", []float64{0, 1}, tables{constant(100), table(300, 900, 150, 99)}, "yield stress at plastic strain 1"},
		{"softening between the temperatures of one", []float64{0, 1}, tables{crossing, table(300, 900, 201, 91)}, ""},
		{"softening at a temperature of the other", []float64{0, 1}, tables{table(300, 900, 201, 91), crossing},
			"yield stress at plastic strain 1"},
		{"no common temperature", []float64{0, 1}, tables{table(300, 400, 100, 100), table(500, 600, 110, 110)}, "lowest temperature"},
	} {
		h, err := integrate.NewTabulatedHardening(c.strain, c.yield)
		if c.quantity == "" {
			require.NoError(t, err, c.name)
			continue
		}
		var e *integrate.MaterialError
		require.ErrorAs(t, err, &e, c.name)
		require.Contains(t, e.Quantity, c.quantity, c.name)
		require.Zero(t, h, c.name)
	}
}

// TestYieldStressValues: the curves at points where their values are plain, and their derivatives against differences.
// Tolerances: rounding; the central differences of smooth curves with a step of 1e-5 are good to 1e-9.
func TestYieldStressValues(t *testing.T) {
	table := func(values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 500}, values)
		require.NoError(t, err)
		return made
	}
	linear := integrate.LinearHardening{Yield: table(200, 100), Modulus: table(1000, 2000)}
	voce := integrate.VoceHardening{Yield: table(200, 100), Saturation: table(80, 60), Rate: table(10, 20), Modulus: table(1000, 2000)}
	knots, err := integrate.NewTabulatedHardening([]float64{0, 0.01, 0.03}, []integrate.Table{table(200, 100), table(220, 110), table(220, 130)})
	require.NoError(t, err)
	for _, c := range []struct {
		name                string
		curve               integrate.Hardening
		strain, temperature float64
		want                float64
	}{
		{"linear at 0", linear, 0, 400, 150},
		{"linear", linear, 0.02, 400, 150 + 1500*0.02},
		{"Voce", voce, 0.1, 400, 150 + 70*(1-math.Exp(-1.5)) + 150},
		{"table at 0", knots, 0, 300, 200},
		{"table at a knot", knots, 0.01, 500, 110},
		{"table between", knots, 0.02, 400, 0.5 * (165 + 175)},
		{"table beyond", knots, 7, 400, 175},
	} {
		value, byStrain, byT := c.curve.YieldStress(c.strain, c.temperature)
		check.Rel(t, c.name, value, c.want, 1e-15)
		const h = 1e-5
		at := func(strain, temperature float64) float64 {
			v, _, _ := c.curve.YieldStress(strain, temperature)
			return v
		}
		from := math.Max(0, c.strain-h) // one-sided at 0, and towards higher strain and temperature at knots
		if c.name == "table at a knot" {
			from = c.strain
		}
		check.Scaled(t, c.name+" by strain", byStrain, (at(c.strain+h, c.temperature)-at(from, c.temperature))/(c.strain+h-from), 4000, 1e-7)
		low, high := math.Max(300, c.temperature-0.01), math.Min(500, c.temperature+0.01)
		check.Scaled(t, c.name+" by temperature", byT, (at(c.strain, high)-at(c.strain, low))/(high-low), 1, 1e-6)
	}
	for _, c := range []integrate.Hardening{linear, voce, knots} {
		for _, p := range [][2]float64{{0.1, 299}, {0.1, 501}, {0.1, math.NaN()}, {-1e-9, 400}, {math.NaN(), 400}} {
			value, _, _ := c.YieldStress(p[0], p[1])
			require.True(t, math.IsNaN(value), "%T at %v", c, p)
		}
	}
}

// plasticFailures is one step for every code, with the quantity that explains it.
func plasticFailures(t *testing.T) map[string]struct {
	drawn
	quantity string
} {
	t.Helper()
	curve := integrate.LinearHardening{Yield: integrate.Constant(100), Modulus: integrate.Constant(1000)}
	warmed, _ := warmPlastic(t, norton(t, 1e-16, 5), integrate.Plasticity{Hardening: curve})
	yieldTable, err := integrate.NewTable([]float64{300, 900}, []float64{200, 100})
	require.NoError(t, err)
	tabulated := plastic(t, norton(t, 1e-16, 5), integrate.LinearHardening{Yield: yieldTable}, integrate.RemembersCreep)
	of := func(rate func(p creeplaw.Point) creeplaw.Rate) *integrate.Material {
		return plastic(t, creeplaw.RateFunc(rate), curve, integrate.RemembersCreep)
	}
	lawless := of(func(creeplaw.Point) creeplaw.Rate { return creeplaw.Rate{Value: math.NaN()} })
	jump := of(func(p creeplaw.Point) creeplaw.Rate { // no root: the rate jumps past it
		if p.Stress > 100.3 { // on the way from 100 to 100.6, the stress of plastic flow alone
			return creeplaw.Rate{Value: 1e-3}
		}
		return creeplaw.Rate{Value: 1e-30}
	})
	softening := of(func(p creeplaw.Point) creeplaw.Rate {
		v := 1e-7 * math.Exp(1e6*p.Strain)
		return creeplaw.Rate{Value: v, ByStrain: 1e6 * v}
	})
	inc := integrate.Increment{Dt: 1, Strain: tensor.Sym{1e-3, -1e-3, 0, 0, 0, 0}, Temperature: 800}
	cold, hot, long := inc, inc, inc
	cold.Temperature, hot.Temperature, long.Dt = -1, 2000, 10
	type failure = struct {
		drawn
		quantity string
	}
	return map[string]failure{
		"BadIncrement":           {drawn{warmed, integrate.State{}, cold}, "temperature"},
		"BadState":               {drawn{warmed, integrate.State{Equivalent: -1}, inc}, "equivalent creep strain"},
		"BadState, plastic":      {drawn{warmed, integrate.State{EquivalentPlastic: -1}, inc}, "equivalent plastic strain"},
		"BadState, NaN":          {drawn{warmed, integrate.State{EquivalentPlastic: math.NaN()}, inc}, "equivalent plastic strain"},
		"BadState, strain":       {drawn{warmed, integrate.State{Plastic: tensor.Sym{4: math.Inf(1)}}, inc}, "plastic strain xz"},
		"OutsideTable":           {drawn{warmed, integrate.State{}, hot}, "temperature for Young's modulus"},
		"OutsideTable, yield":    {drawn{tabulated, integrate.State{}, hot}, "temperature for the hardening"},
		"LawUndefined":           {drawn{lawless, integrate.State{}, inc}, "von Mises stress of plastic flow alone"},
		"NoConvergence":          {drawn{jump, integrate.State{}, inc}, "von Mises stress of plastic flow alone"},
		"BeyondRupture":          {drawn{softening, integrate.State{}, long}, "von Mises stress of plastic flow alone"},
		"LawUndefined, no yield": {drawn{lawless, integrate.State{EquivalentPlastic: 1}, inc}, "trial von Mises stress"},
	}
}

// TestPlasticFailures: each failure returns its own code, explains itself, allocates nothing and leaves everything as it was.
func TestPlasticFailures(t *testing.T) {
	codes := map[string]integrate.Code{"BadIncrement": integrate.BadIncrement, "BadState": integrate.BadState,
		"OutsideTable": integrate.OutsideTable, "LawUndefined": integrate.LawUndefined, "NoConvergence": integrate.NoConvergence,
		"BeyondRupture": integrate.BeyondRupture}
	for name, f := range plasticFailures(t) {
		var code integrate.Code
		for prefix, c := range codes {
			if len(name) >= len(prefix) && name[:len(prefix)] == prefix {
				code = c
			}
		}
		out := integrate.Result{CreepStep: 42, PlasticStep: 43}
		before := out
		err := f.material.Step(&out, &f.old, f.inc)
		require.Equal(t, code, err, name)
		require.Equal(t, before, out, name)
		var u *integrate.UpdateError
		require.ErrorAs(t, f.material.Explain(err, &f.old, f.inc), &u, name)
		require.Equal(t, code, u.Code, name)
		require.Equal(t, f.quantity, u.Quantity, name)
		stress, end := tensor.Sym{1}, integrate.State{Equivalent: 2}
		require.Equal(t, code, f.material.Stress(&stress, &end, &f.old, f.inc), name)
		require.Equal(t, tensor.Sym{1}, stress, name)
		require.Equal(t, integrate.State{Equivalent: 2}, end, name)
		require.Zero(t, testing.AllocsPerRun(20, func() { _ = f.material.Step(&out, &f.old, f.inc) }), name)
	}
}

// drawPlasticSteps draws repeatable steps, most of which yield.
func drawPlasticSteps(t *testing.T, stream uint64, count int) []drawn {
	t.Helper()
	s := newSource(stream)
	kinds := lawKinds()
	steps := make([]drawn, count)
	for i := range steps {
		law, err := kinds[i%len(kinds)].draw(s)
		require.NoError(t, err)
		m, _ := warmPlastic(t, law, integrate.Plasticity{Hardening: drawWarmHardening(t, s, i%5, s.decades(1, 2.5)),
			Memory: integrate.CreepMemory(i / 5 % 2)})
		steps[i] = drawn{m, integrate.State{Creep: s.deviator().Scale(1e-3), Equivalent: s.decades(-6, -1),
			Plastic: s.deviator().Scale(1e-3), EquivalentPlastic: s.decades(-6, -1)},
			integrate.Increment{Dt: s.decades(-4, 6), Temperature: s.uniform(320, 1090), Strain: s.deviator().Scale(s.decades(-4, -2))}}
	}
	return steps
}

// TestPlasticSameBits: the same input gives the same bits, into a destination full of junk, in place, without the tangent, and
// from goroutines that share the materials; a step allocates nothing.
func TestPlasticSameBits(t *testing.T) {
	steps := drawPlasticSteps(t, 75, 400)
	want := make([]integrate.Result, len(steps))
	yielded := 0
	for i, d := range steps {
		require.NoError(t, d.material.Step(&want[i], &d.old, d.inc))
		if want[i].PlasticStep > 0 {
			yielded++
		}
		junk, old := junkResult(), d.old
		junk.PlasticStep, junk.State.Plastic, junk.State.EquivalentPlastic = math.NaN(), tensor.Sym{math.NaN()}, math.NaN()
		require.NoError(t, d.material.Step(&junk, &old, d.inc))
		require.Equal(t, want[i], junk, "junk in the destination shows")
		require.Equal(t, d.old, old, "the start state was written")
		inPlace := integrate.Result{State: d.old}
		require.NoError(t, d.material.Step(&inPlace, &inPlace.State, d.inc))
		require.Equal(t, want[i], inPlace, "a start state that is &out.State")
		var stress tensor.Sym
		end := d.old
		require.NoError(t, d.material.Stress(&stress, &end, &end, d.inc))
		require.Equal(t, want[i].Stress, stress)
		require.Equal(t, want[i].State, end)
		if i < 20 {
			require.Zero(t, testing.AllocsPerRun(10, func() { _ = d.material.Step(&junk, &d.old, d.inc) }))
			require.Zero(t, testing.AllocsPerRun(10, func() { _ = d.material.Stress(&stress, &end, &d.old, d.inc) }))
			start := integrate.Conditions{Temperature: 800}
			require.Zero(t, testing.AllocsPerRun(10, func() { _, _ = d.material.EstimateStep(&junk, &d.old, start, d.inc, 1e-3) }))
		}
	}
	require.Greater(t, yielded, 200)
	got := make([]integrate.Result, len(steps))
	var wait sync.WaitGroup
	for w := range 3 {
		wait.Go(func() {
			for i := w; i < len(steps); i += 3 {
				if err := steps[i].material.Step(&got[i], &steps[i].old, steps[i].inc); err != nil {
					t.Error(err)
				}
			}
		})
	}
	wait.Wait()
	require.Equal(t, want, got)
}

// TestPlasticPacking: a packed state is seven values longer with plasticity and no longer without.
func TestPlasticPacking(t *testing.T) {
	law := norton(t, 1e-16, 5)
	m := plastic(t, law, integrate.LinearHardening{Yield: integrate.Constant(100)}, integrate.RemembersCreep)
	plain := material(t, law)
	require.Equal(t, plain.StateLength()+7, m.StateLength())
	require.Nil(t, plain.Plasticity().Hardening)
	require.NotNil(t, m.Plasticity().Hardening)
	s := integrate.State{Creep: tensor.Sym{1, 2, 3, 4, 5, 6}, Equivalent: 7, Plastic: tensor.Sym{8, 9, 10, 11, 12, 13}, EquivalentPlastic: 14}
	packed := make([]float64, m.StateLength())
	m.PackState(packed, &s)
	require.Equal(t, []float64{1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14}, packed)
	var back integrate.State
	m.UnpackState(&back, packed)
	require.Equal(t, s, back)
	plain.UnpackState(&back, packed[:7])
	require.Equal(t, integrate.State{Creep: s.Creep, Equivalent: 7}, back)
	require.Panics(t, func() { m.PackState(packed[:7], &s) })

	// A material without plasticity carries plastic strain on and does not see it.
	inc := integrate.Increment{Dt: 1, Strain: tensor.Sym{1e-3, -1e-3}, Temperature: 800}
	var with, without integrate.Result
	require.NoError(t, plain.Step(&with, &integrate.State{Plastic: s.Plastic, EquivalentPlastic: 14}, inc))
	require.NoError(t, plain.Step(&without, &integrate.State{}, inc))
	require.Equal(t, without.Stress, with.Stress)
	require.Equal(t, s.Plastic, with.State.Plastic)
	require.Equal(t, 14.0, with.State.EquivalentPlastic)
	require.Zero(t, with.PlasticStep)
}

// TestPlasticUnitsDoNotMatter takes the same steps in (MPa, h) and in (Pa, s): no absolute epsilon may hide anywhere.
// Tolerances as in TestUnitsDoNotMatter.
func TestPlasticUnitsDoNotMatter(t *testing.T) {
	s := newSource(76)
	for range 2000 {
		n, m := s.uniform(1, 20), s.uniform(0.3, 1)
		kind, rate, coefficient := s.IntN(3), s.decades(-8, -4), s.decades(-2.5, -1)
		yield, modulus, saturation, b := s.decades(1, 3), young*s.decades(-4, 0), s.decades(0, 2), s.decades(0, 3)
		build := func(stress, time float64) *integrate.Material {
			law := inUnits(t, kind, n, m, rate, coefficient, stress, time)
			made, err := integrate.New(integrate.NewIsotropic(young*stress, poisson), law, integrate.Options{
				Plasticity: integrate.Plasticity{Hardening: integrate.VoceHardening{Yield: integrate.Constant(yield * stress),
					Modulus: integrate.Constant(modulus * stress), Saturation: integrate.Constant(saturation * stress), Rate: integrate.Constant(b)}}})
			require.NoError(t, err)
			return made
		}
		old := integrate.State{Equivalent: s.decades(-6, -2), EquivalentPlastic: s.decades(-6, -2)}
		elastic := yield / (3 * shear) * s.decades(-0.3, 1)
		inc := integrate.Increment{Dt: s.decades(-2, 5), Temperature: 800, Strain: s.deviator().Scale(elastic)}
		seconds := inc
		seconds.Dt *= 3600
		var x, y integrate.Result
		require.NoError(t, build(1, 1).Step(&x, &old, inc))
		require.NoError(t, build(1e6, 3600).Step(&y, &old, seconds))
		ulp := 0x1p-52 * 3 * shear * elastic
		require.LessOrEqual(t, largest(x.Stress.Sub(y.Stress.Scale(1e-6))), 16*ulp, "stress")
		check.Scaled(t, "plastic strain", y.PlasticStep, x.PlasticStep, elastic, 1e-13)
		logs := math.Abs(math.Log(x.CreepStep/elastic)) + (n/m)*(1+math.Abs(math.Log(3*shear*elastic/100))) + 10
		check.Rel(t, "creep strain", y.CreepStep, x.CreepStep, 4*0x1p-52*logs+4e-13) // and what two solves leave
	}
}

func inUnits(t *testing.T, kind int, n, m, rate, coefficient, stress, time float64) creeplaw.Law {
	t.Helper()
	var law creeplaw.Law
	var err error
	switch kind {
	case 0:
		law, err = creeplaw.NewNortonAt(rate/time, 100*stress, n)
	case 1:
		law, err = creeplaw.NewGarofalo(rate/time, coefficient/stress, 1+n/5)
	default:
		law, err = creeplaw.NewBaileyNortonAt(1e-3, 100*stress, 100*time, n, m)
	}
	require.NoError(t, err)
	return law
}

// TestPlasticObjectivity: turning strain and state turns the result. Tolerance as in TestStepKeepsWhatItMust.
func TestPlasticObjectivity(t *testing.T) {
	s := newSource(77)
	for _, d := range drawPlasticSteps(t, 78, 500) {
		var out, turned integrate.Result
		require.NoError(t, d.material.Step(&out, &d.old, d.inc))
		q, err := tensor.AxisAngle([3]float64{s.NormFloat64(), s.NormFloat64(), s.NormFloat64()}, s.uniform(0, 3))
		require.NoError(t, err)
		old, inc := d.old, d.inc
		old.Creep, old.Plastic, inc.Strain = old.Creep.Rotate(q), old.Plastic.Rotate(q), inc.Strain.Rotate(q)
		require.NoError(t, d.material.Step(&turned, &old, inc))
		scale := 2 * shear * (d.inc.Strain.Norm() + d.old.Creep.Norm() + d.old.Plastic.Norm())
		require.LessOrEqual(t, turned.Stress.Sub(out.Stress.Rotate(q)).Norm(), 1e-11*scale)
		require.LessOrEqual(t, math.Abs(turned.State.Plastic.Trace()), 1e-15, "plastic flow keeps the volume")
	}
}
