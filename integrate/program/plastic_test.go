package program_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/program"
)

// TestPlasticProgram: a bar is pulled beyond yield in no time, then held: the stress starts on the hardening curve
// σ = (σy + H ε)/(1 + H/E) and relaxes by Norton's closed form with E (Norton 1929); the plastic strain stays what the pull
// made it; the work of the pull and what the hold relaxes show in the energy.
func TestPlasticProgram(t *testing.T) {
	const yield, modulus, strain = 180.0, 10e3, 2e-3
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), must(creeplaw.NewNorton(1e-16, 5))(t),
		integrate.Options{Plasticity: integrate.Plasticity{Hardening: integrate.LinearHardening{
			Yield: integrate.Constant(yield), Modulus: integrate.Constant(modulus)}}})
	require.NoError(t, err)
	start := (yield + modulus*strain) / (1 + modulus/young)
	plastic := strain - start/young
	for _, tolerance := range []float64{1e-3, 1e-4, 1e-5} {
		records, run := through(t, m, of(bar("hold", program.Constant(strain), 500)), program.Options{
			Tolerance: integrate.Tolerance{Relative: tolerance}})
		require.NoError(t, run.Err())
		require.Equal(t, program.AtJump, records[1].Reason)
		check.Rel(t, "stress after the pull", records[1].Stress[0], start, 1e-10) // a Newton-free scalar solve
		check.Rel(t, "plastic strain", records[1].State.EquivalentPlastic, plastic, 1e-9)
		last := run.Last()
		exact := math.Pow(math.Pow(start, -4)+4*young*1e-16*500, -0.25)
		check.Rel(t, "relaxed stress", last.Stress[0], exact, 3*tolerance)
		check.Rel(t, "plastic strain after the hold", last.State.EquivalentPlastic, plastic, 1e-9)
		// Work of the pull on the hardening curve, and the elastic energy that creep used up.
		work := (yield+start)/2*plastic + (start*start-exact*exact)/(2*young)
		check.Rel(t, "dissipation", last.Dissipated, work, 0.15) // the jump yields in one step, at the stress of its end
		t.Logf("tolerance %.0e: %d steps, %d rejected, stress off by %.1e", tolerance, last.Count.Steps, last.Count.Rejected,
			last.Stress[0]/exact-1)
	}
}

// TestPlasticCyclesWithRamp: strain cycles with perfect plasticity without creep to speak of follow the elastic–plastic
// hysteresis, whose stress at any strain is known: a ramp from +ε to -ε unloads elastically and yields at -σy.
func TestPlasticCyclesWithRamp(t *testing.T) {
	const yield = 150.0
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), must(creeplaw.NewNortonAt(1e-30, 100, 3))(t),
		integrate.Options{Plasticity: integrate.Plasticity{Hardening: integrate.LinearHardening{Yield: integrate.Constant(yield)}}})
	require.NoError(t, err)
	p := program.Program{Temperature: warmth, Blocks: []program.Block{
		{Segments: []program.Segment{bar("start", program.Ramp(0, 2e-3), 1)}},
		{Repeat: 3, Segments: []program.Segment{bar("down", program.Ramp(2e-3, -2e-3), 2), bar("up", program.Ramp(-2e-3, 2e-3), 2)}},
	}}
	o := within(1e-4)
	o.Times = []float64{1, 1.5, 3, 3.25, 5, 13}
	records, run := through(t, m, p, o)
	require.NoError(t, run.Err())
	want := map[float64]float64{1: yield, 1.5: yield - young*1e-3, 3: -yield, 3.25: -yield + young*5e-4, 5: yield, 13: yield}
	seen := 0
	for _, r := range records {
		if r.Reason == program.AtTime {
			check.Scaled(t, "stress", r.Stress[0], want[r.Time], yield, 1e-9)
			seen++
		}
	}
	require.Equal(t, len(want), seen)
	// Accumulated plastic strain: 1e-3 at first, then 2e-3 in each of six ramps.
	check.Rel(t, "plastic strain", run.Last().State.EquivalentPlastic, 1e-3+6*2e-3, 1e-6)
}
