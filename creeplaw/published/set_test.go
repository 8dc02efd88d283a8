package published_test

import (
	"flag"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
	"example.com/holdtime/creeplaw/published"
)

var campaign = flag.Bool("campaign", false, "examine the sets at 20000 points each instead of 200")

func TestEverySetSaysWhatItIs(t *testing.T) {
	names := map[string]bool{}
	for _, s := range published.Sets() {
		assert.False(t, names[s.Name], "two sets are named %q", s.Name)
		names[s.Name] = true
		assert.NotEmpty(t, s.Name)
		assert.NotEmpty(t, s.Citation, s.Name)
		assert.NotNil(t, s.Law, s.Name)
		assert.NotContains(t, s.Status.String(), "unknown", s.Name)
		assert.True(t, strings.HasPrefix(s.Caution, "A starting point, not design data."), s.Name)
		assert.NotEmpty(t, s.Range.Basis, s.Name)
		assert.True(t, s.Units.Stress > 0 && s.Units.Time > 0, s.Name)
		for _, i := range []published.Interval{s.Range.Stress, s.Range.Temperature} {
			assert.True(t, i.Low >= 0 && i.Low <= i.High, "%s: %v", s.Name, i)
		}
	}
	// One for each constructor, two for each metal: a set that is forgotten in the list is found by its absence.
	assert.Len(t, names, 3+5+2+5+2*len(published.Metals())+2)
	assert.Equal(t, "unknown status 0", published.Status(0).String())
}

func TestOnlyWhatWasReadIsVerified(t *testing.T) {
	for _, s := range published.Sets() {
		if s.Status == published.Verified {
			assert.Equal(t, published.Steel316At600C().Name, s.Name)
		}
	}
}

func TestEverySetConforms(t *testing.T) {
	points := 200
	if *campaign {
		points = 20000
	}
	worst, checks := 0.0, 0
	for _, s := range published.Sets() {
		stress := s.Range.Stress.High
		if stress == 0 {
			stress = 100e6 / float64(s.Units.Stress)
		}
		temperature := lawtest.Range{s.Range.Temperature.Low, s.Range.Temperature.High}
		switch {
		case temperature[1] == 0: // not on record
			temperature = lawtest.Range{800, 1600}
		case temperature[0] == 0:
			temperature[0] = 0.7 * temperature[1]
		case temperature[0] == temperature[1]:
			temperature = lawtest.Range{0.9 * temperature[0], 1.1 * temperature[1]}
		}
		claims := lawtest.Logarithmic
		if _, ok := s.Law.(creeplaw.Explainer); ok {
			claims |= lawtest.Explainer
		}
		t.Run(s.Name, func(t *testing.T) {
			for _, r := range lawtest.Run(t, s.Law, lawtest.Box{
				Claims: claims, Stress: lawtest.Range{1e-2 * stress, 3 * stress}, Strain: lawtest.Range{1e-8, 0.5},
				Temperature: temperature, LogStress: lawtest.Range{1e-12 * stress, 1e4 * stress}, Points: points,
			}) {
				worst, checks = math.Max(worst, r.Worst), checks+r.Checks
			}
		})
	}
	t.Logf("%d checks, the worst at %.2f of what is allowed", checks, worst)
}

func TestSetInOtherUnits(t *testing.T) {
	host := creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}
	for _, s := range published.Sets() {
		converted, err := s.In(host)
		if !assert.NoError(t, err, s.Name) {
			continue
		}
		stress, temperature := 50e6, 900.0
		own := s.Law.Rate(creeplaw.Point{Stress: stress / float64(s.Units.Stress), Temperature: temperature})
		got := converted.Law.Rate(creeplaw.Point{Stress: 50, Temperature: temperature})
		if math.IsNaN(own.Value) { // beyond melting
			assert.True(t, math.IsNaN(got.Value), s.Name)
			continue
		}
		// Strain per hour from strain per own unit of time, by hand.
		check.Rel(t, s.Name, got.Value, own.Value*3600/float64(s.Units.Time), 1e-11)
		assert.Equal(t, host, converted.Units)
		check.Rel(t, s.Name+": range", converted.Range.Stress.High*1e6, s.Range.Stress.High*float64(s.Units.Stress), 1e-15)
	}
	// Printed in both units: 4.9971610e-6 /d = 5.7837511e-11 /s at 10 MPa, 295.15 K (list of published values).
	salt, err := published.SaltBGRa().In(creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second})
	if assert.NoError(t, err) {
		check.Rel(t, "BGRa in Pa, s", salt.Law.Rate(creeplaw.Point{Stress: 10e6, Temperature: 295.15}).Value, 5.7837511e-11, 1e-8)
	}
	_, err = published.SaltBGRa().In(creeplaw.Units{})
	var p *creeplaw.ParameterError
	assert.ErrorAs(t, err, &p)
}

func TestRangeIsChecked(t *testing.T) {
	salt := published.SaltBGRa()
	assert.NoError(t, salt.CheckRange(creeplaw.Point{Stress: 10, Temperature: 300}))
	for _, stress := range []float64{0.4, 21, math.NaN()} {
		err := salt.CheckRange(creeplaw.Point{Stress: stress, Temperature: 300})
		var r *published.RangeError
		if assert.ErrorAs(t, err, &r, "%v MPa", stress) {
			assert.Equal(t, "stress", r.Quantity)
			assert.Equal(t, "MPa", r.Unit)
			assert.Equal(t, 5.0, r.Low)
			assert.Equal(t, 20.0, r.High)
		}
	}
	steel := published.Steel316At600C()
	assert.NoError(t, steel.CheckRange(creeplaw.Point{Stress: 150, Temperature: 600 + 273.15}))
	err := steel.CheckRange(creeplaw.Point{Stress: 150, Temperature: 900})
	var r *published.RangeError
	if assert.ErrorAs(t, err, &r) {
		assert.Equal(t, "temperature", r.Quantity)
	}
	assert.NoError(t, steel.CheckRange(creeplaw.Point{Stress: 1e4, Temperature: 873.15}), "no bounds of stress are on record")
}

func TestBadGrainSizes(t *testing.T) {
	build := map[string]func(float64) (published.Set, error){
		"olivine": published.OlivineHirthKohlstedt,
		"ice":     published.IceGoldsbyKohlstedt,
		"copper":  published.Copper().Diffusional,
	}
	for name, f := range build {
		for _, bad := range []float64{0, -1e-6, math.NaN(), math.Inf(1)} {
			_, err := f(bad)
			var p *creeplaw.ParameterError
			if assert.ErrorAs(t, err, &p, "%s, %v", name, bad) {
				assert.Equal(t, "grain size", p.Parameter)
			}
		}
	}
	for _, f := range []func(float64) (published.Set, error){published.OlivineHirthKohlstedt, published.IceGoldsbyKohlstedt} {
		_, err := f(1e-320) // its power leaves the range of a float64
		var p *creeplaw.ParameterError
		if assert.ErrorAs(t, err, &p) {
			assert.Equal(t, "prefactor", p.Parameter)
		}
	}
	bad := published.Nickel()
	bad.StressExponent = -1
	_, err := bad.PowerLaw()
	var p *creeplaw.ParameterError
	assert.ErrorAs(t, err, &p)
}

// A metal of the tables at 0.6 of its melting point, in MPa and h. Parameters from memory; not design data.
func ExampleMetal_PowerLaw() {
	set, err := published.Copper().PowerLaw()
	if err != nil {
		fmt.Println(err)
		return
	}
	set, err = set.In(creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(set.Name)
	fmt.Println(set.Status)
	fmt.Printf("%.1e /h\n", set.Law.Rate(creeplaw.Point{Stress: 10, Temperature: 813}).Value)
	// Output:
	// copper, power-law creep, Frost and Ashby
	// from memory, confidence high
	// 1.1e-04 /h
}

// Ice at -10 °C under 0.1 MPa, and a stress that the set was never meant for.
func ExampleIceCuffeyPaterson() {
	ice := published.IceCuffeyPaterson()
	p := creeplaw.Point{Stress: 0.1e6, Temperature: 263.15}
	fmt.Printf("%.2e /s\n", ice.Law.Rate(p).Value)
	p.Stress = 5e6
	fmt.Println(ice.CheckRange(p))
	// Output:
	// 7.78e-11 /s
	// published: glacier ice, Glen's law, Cuffey and Paterson: the stress 5000000 Pa is outside the range on record, 20000 … 500000
}
