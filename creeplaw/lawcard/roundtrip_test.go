package lawcard_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawcard"
	"example.com/holdtime/creeplaw/published"
)

func everyLaw() []sample {
	return slices.Concat(steady(), hardening(), damaged(), composed(), hardened())
}

// card puts a law into a card.
func card(s sample) lawcard.Card {
	return lawcard.Card{Name: s.name, Source: "invented for a test", Status: "invented", Units: s.ownUnits(), Law: s.law,
		Tested: lawcard.Range{Stress: lawcard.Interval{Low: 13.7, High: 223.1}, Strain: lawcard.Interval{Low: 0, High: 0.013},
			Temperature: lawcard.Interval{Low: 701.3, High: 923.7}, Time: lawcard.Interval{Low: 1, High: 10313}, Basis: "invented"}}
}

func written(t *testing.T, c lawcard.Card) string {
	t.Helper()
	var b strings.Builder
	require.NoError(t, lawcard.Write(&b, c), c.Name)
	return b.String()
}

// somewhere draws a point in MPa and K.
func somewhere(r *rand.Rand) creeplaw.Point {
	return creeplaw.Point{Stress: math.Exp(math.Log(400) * r.Float64()), Strain: math.Pow(10, -1-5*r.Float64()),
		Temperature: 520 + 800*r.Float64()}
}

func bits(x float64) uint64 { return math.Float64bits(x) }

// parametersOf gives names and values, by their bits.
func parametersOf(law creeplaw.Law) (names []string, values []uint64) {
	for _, p := range law.(creeplaw.Parametric).Parameters() {
		names, values = append(names, p.Name), append(values, bits(p.Value))
	}
	return names, values
}

// Written and read in the same units a law has the same parameters and the same rates, to the bit.
func TestRoundTripIsExact(t *testing.T) {
	const seed = 11
	for _, s := range everyLaw() {
		c := card(s)
		text := written(t, c)
		again, err := lawcard.Read(strings.NewReader(text), c.Units)
		require.NoError(t, err, "%s\n%s", s.name, text)
		same(t, s.name, c.Law, again.Law, seed)
		assert.Equal(t, text, written(t, again), s.name)
		again.Law, c.Law = nil, nil
		assert.Equal(t, c, again, s.name)
	}
}

func same(t *testing.T, name string, law, again creeplaw.Law, seed uint64) {
	t.Helper()
	require.NotNil(t, again, name)
	assert.IsType(t, law, again, name)
	names, values := parametersOf(law)
	namesAgain, valuesAgain := parametersOf(again)
	assert.Equal(t, names, namesAgain, name)
	assert.Equal(t, values, valuesAgain, name)
	r := rand.New(rand.NewPCG(seed, 0))
	for range 50 {
		at := somewhere(r)
		assert.Equal(t, bits(creeplaw.Log(law).LogRate(at).Value), bits(creeplaw.Log(again).LogRate(at).Value),
			"%s at %+v, seed %d", name, at, seed)
		if e, ok := law.(creeplaw.Evolving); ok {
			// As text, which has all digits, so that NaN is like NaN.
			assert.Equal(t, fmt.Sprint(evolved(e, at)), fmt.Sprint(evolved(again.(creeplaw.Evolving), at)), "%s at %+v, seed %d",
				name, at, seed)
		}
	}
}

// evolved is the evolution of a law, its variables off their initial values and the stress out of tension.
func evolved(law creeplaw.Evolving, p creeplaw.Point) creeplaw.Evolution {
	var internal [creeplaw.MaxVariables]float64
	for i, v := range law.Variables() {
		internal[i] = v.Initial + 0.1*(math.Max(v.Initial, math.Min(v.Limit, 1))-v.Initial)
	}
	q := creeplaw.InTension(p, internal)
	q.PrincipalStress *= 0.7
	return law.Evolve(q)
}

func TestPublishedSetsRoundTrip(t *testing.T) {
	for _, s := range append(published.Sets(), published.EvolvingSets()...) {
		c := lawcard.Published(s)
		again, err := lawcard.Read(strings.NewReader(written(t, c)), s.Units)
		require.NoError(t, err, s.Name)
		same(t, s.Name, s.Law, again.Law, 12)
	}
}

// Written in one set of units and read in another a law is the law that creeplaw.InUnits makes of it, which leaves the numbers
// alone; and back in its own units its parameters are those it had, to three units in the last place (each is rounded
// once on either way, and the dimensions come out of exponents that do not change).
func TestThroughOtherUnits(t *testing.T) {
	const seed = 13
	steep := 0
	for _, s := range everyLaw() {
		for _, wanted := range []creeplaw.Units{
			{Stress: creeplaw.Pascal, Time: creeplaw.Second}, {Stress: creeplaw.KilopoundPerSquareInch, Time: creeplaw.Year},
			{Stress: creeplaw.Gigapascal, Time: creeplaw.Minute}, {Stress: creeplaw.PoundPerSquareInch, Time: creeplaw.Day},
			{Stress: 98066.5, Time: 7200},
		} {
			c := card(s)
			there, err := c.In(wanted)
			require.NoError(t, err, "%s in %v", s.name, wanted)
			assert.Equal(t, wanted, there.Units)
			agree(t, s, there.Law, wanted, seed)
			back, err := there.In(c.Units)
			require.NoError(t, err, "%s from %v", s.name, wanted)
			rangesAgree(t, s.name, back.Tested, c.Tested)
			names, values := parametersOf(s.law)
			namesBack, valuesBack := parametersOf(back.Law)
			if !slices.Equal(names, namesBack) { // about a stress of one unit, or behind InUnits
				steep++
				agree(t, s, back.Law, c.Units, seed)
				continue
			}
			for i, v := range values {
				check.ULP(t, s.name+", "+names[i], math.Float64frombits(valuesBack[i]), math.Float64frombits(v), 3)
			}
		}
	}
	assert.Positive(t, steep, "no law left the range of a float64")
}

// agree holds a law in other units to the law it came from.
func agree(t *testing.T, s sample, there creeplaw.Law, in creeplaw.Units, seed uint64) {
	t.Helper()
	own := s.ownUnits()
	r := rand.New(rand.NewPCG(seed, 1))
	for range 20 {
		at := somewhere(r)
		at.Stress *= float64(creeplaw.Megapascal / own.Stress)
		p := at
		p.Stress *= float64(own.Stress / in.Stress)
		want := creeplaw.Log(s.law).LogRate(at)
		if math.IsInf(want.Value, -1) { // below a threshold
			assert.True(t, math.IsInf(creeplaw.Log(there).LogRate(p).Value, -1), s.name)
			continue
		}
		// Sixteen roundings: those of stress and strain count by the exponents, those of the logarithm by its size, and those of
		// its terms, which may cancel, by the largest prefactor, of some 10^-43.
		tolerance := 0x1p-48 * (100 + math.Abs(want.ByLogStress) + math.Abs(want.ByLogStrain) + math.Abs(want.Value))
		label := s.name + " in " + in.String()
		check.Abs(t, label, creeplaw.Log(there).LogRate(p).Value, want.Value+math.Log(float64(in.Time/own.Time)), tolerance)
		e, ok := s.law.(creeplaw.Evolving)
		if !ok {
			continue
		}
		if there, ok := there.(creeplaw.Evolving); assert.True(t, ok, label) {
			check.Abs(t, label, evolved(there, p).LogRate, evolved(e, at).LogRate+math.Log(float64(in.Time/own.Time)), tolerance)
			assert.Len(t, there.Variables(), len(e.Variables()))
		}
	}
}

func rangesAgree(t *testing.T, name string, got, want lawcard.Range) {
	t.Helper()
	assert.Equal(t, want.Strain, got.Strain, name)
	assert.Equal(t, want.Temperature, got.Temperature, name)
	for _, p := range [][2]float64{{got.Stress.Low, want.Stress.Low}, {got.Stress.High, want.Stress.High},
		{got.Time.Low, want.Time.Low}, {got.Time.High, want.Time.High}} {
		check.ULP(t, name+", tested range", p[0], p[1], 3)
	}
}
