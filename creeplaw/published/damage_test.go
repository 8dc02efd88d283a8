package published_test

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
	"example.com/holdtime/creeplaw/published"
)

func evolving(s published.Set) creeplaw.Evolving { return s.Law.(creeplaw.Evolving) }

// inTension is the evolution of a bar.
func inTension(s published.Set, stress, temperature float64, internal ...float64) creeplaw.Evolution {
	var v [creeplaw.MaxVariables]float64
	copy(v[:], internal)
	return evolving(s).Evolve(creeplaw.InTension(creeplaw.Point{Stress: stress, Temperature: temperature}, v))
}

func rateOf(e *creeplaw.Evolution, i int) float64 {
	return e.Internal[i].Value * math.Exp(e.Internal[i].LogScale)
}

func TestEveryEvolvingSetSaysWhatItIs(t *testing.T) {
	names := map[string]bool{}
	for _, s := range append(published.EvolvingSets(), published.Sets()...) {
		assert.False(t, names[s.Name], "two sets are named %q", s.Name)
		names[s.Name] = true
		assert.NotEmpty(t, s.Citation, s.Name)
		assert.NotContains(t, s.Status.String(), "unknown", s.Name)
		assert.True(t, strings.HasPrefix(s.Caution, "A starting point, not design data."), s.Name)
		assert.NotEmpty(t, s.Range.Basis, s.Name)
	}
	assert.Len(t, published.EvolvingSets(), 5+6)
}

// TestDamageSetsGiveThePrintedRatesAndLives: the list of published values prints a rate and a life for each set, computed there
// apart from this library to the digits given; the rates with hardening at its saturation.
func TestDamageSetsGiveThePrintedRatesAndLives(t *testing.T) {
	for _, c := range []struct {
		set                  published.Set
		stress               float64
		internal, rate, life float64
		lifeOf               func(damage float64) float64
	}{
		{published.P91At650C(), 70, 0, 4.4817e-5, 1008.12, liuLife(7.346)},
		{published.CrMoVAt640C(), 40, 0, 4.0259e-6, 1748.04, func(d float64) float64 { return 1 / (5.5 * d) }},
		{published.Steel316DamageAt600C(), 240, 0, 2.0860e-5, 3183.5, liuLife(6.35)},
		{published.CrMoVAt590C(), 100, 0.5929, 4.5968e-6, 0, nil},
		{published.AluminiumAt150C(), 241.3, 0.2032, 1.4281e-5, 0, nil},
	} {
		e := inTension(c.set, c.stress, c.set.Range.Temperature.Low, c.internal)
		check.Rel(t, c.set.Name, math.Exp(e.LogRate), c.rate, 3e-5) // five digits
		if c.life > 0 {
			check.Rel(t, c.set.Name+": life", c.lifeOf(rateOf(&e, 0)), c.life, 3e-5)
		}
	}
}

// liuLife is 1/(M σ^χ), from the damage rate at ω = 0.
func liuLife(q float64) func(float64) float64 {
	return func(damage float64) float64 { return -math.Expm1(-q) / q / damage }
}

// TestAnandSetsSaturateAsPrinted: the list prints the saturation stress at 1e-3 /s and 298.15 K to eight digits. There the rate
// is that at the resistance ŝ Zⁿ, Z = (ṗ/A) exp(Q/RT), at which the resistance changes no more.
func TestAnandSetsSaturateAsPrinted(t *testing.T) {
	for i, want := range []float64{48.426568, 45.321491, 47.333898, 34.197101, 63.057605, 53.815389} {
		s := published.EvolvingSets()[5+i]
		p := map[string]float64{}
		for _, x := range s.Law.(creeplaw.Parametric).Parameters() {
			p[x.Name] = x.Value
		}
		z := 1e-3 / p["prefactor"] * math.Exp(p["activation energy"]/(creeplaw.GasConstant*298.15))
		saturation := p["saturation coefficient"] * math.Pow(z, p["saturation exponent"])
		e := inTension(s, want, 298.15, saturation)
		check.Rel(t, s.Name, math.Exp(e.LogRate), 1e-3, 30*2e-8) // by the stress exponent, below 30
		// y = 1 - s/s* is what the eighth digit makes it; the rate of the resistance is yᵃ of its full value.
		assert.Less(t, math.Pow(math.Abs(e.Internal[0].Value)/p["hardening"], 1/p["hardening exponent"]), 1e-6, s.Name)
	}
}

func TestEveryEvolvingSetConforms(t *testing.T) {
	points := 50
	if *campaign {
		points = 2000
	}
	for _, s := range published.EvolvingSets() {
		box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Evolving, Stress: lawtest.Range{0.5, 150}, Strain: lawtest.Range{1e-8, 0.5},
			Temperature: lawtest.Range{250, 1000}, LogStress: lawtest.Range{1e-10, 500}, Points: points}
		for _, v := range evolving(s).Variables() {
			if v.Initial == 0 {
				box.Internal = append(box.Internal, lawtest.Range{1e-3, 0.3})
			} else {
				box.Internal = append(box.Internal, lawtest.Range{0.8 * v.Initial, 2 * v.Initial})
			}
		}
		if strings.HasSuffix(s.Name, "Anand") {
			box.Stress[1] = math.Min(40, 10*evolving(s).Variables()[0].Initial) // beyond, the rate leaves the range of a float64
		}
		t.Run(s.Name, func(t *testing.T) {
			for _, r := range lawtest.Run(t, s.Law, box) {
				assert.Positive(t, r.Checks, r.Rule)
			}
		})
	}
}

// TestEvolvingSetsInOtherUnits: all rates by hand from those in the set's own units.
func TestEvolvingSetsInOtherUnits(t *testing.T) {
	host := creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Day}
	for _, s := range published.EvolvingSets() {
		converted, err := s.In(host)
		if !assert.NoError(t, err, s.Name) {
			continue
		}
		internal, unit := 0.2, 1.0
		if strings.HasSuffix(s.Name, "Anand") {
			internal, unit = 50, 1e6 // a stress
		}
		own := inTension(s, 30, 400, internal)
		got := inTension(converted, 30e6, 400, internal*unit)
		perDay := 86400 / float64(s.Units.Time)
		// A prefactor in Pa^-10 is a power of a power: its exponent costs digits.
		check.Rel(t, s.Name, math.Exp(got.LogRate), math.Exp(own.LogRate)*perDay, 1e-11)
		check.Rel(t, s.Name+": variable", rateOf(&got, 0), rateOf(&own, 0)*perDay*unit, 1e-11)
	}
	_, err := published.CrMoVAt640C().In(creeplaw.Units{})
	var p *creeplaw.ParameterError
	assert.ErrorAs(t, err, &p)
}
