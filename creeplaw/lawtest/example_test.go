package lawtest_test

import (
	"fmt"
	"math"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

// sinh is a user's own law, ṗ = A sinh(σ/S) exp(-B/T), with invented constants.
type sinh struct {
	A float64 // [1/h]
	S float64 // [MPa]
	B float64 // [K]
}

func (l sinh) Rate(p creeplaw.Point) creeplaw.Rate {
	a := l.A * math.Exp(-l.B/p.Temperature)
	v := a * math.Sinh(p.Stress/l.S)
	return creeplaw.Rate{
		Value:         v,
		ByStress:      a * math.Cosh(p.Stress/l.S) / l.S,
		ByTemperature: v * l.B / (p.Temperature * p.Temperature),
	}
}

var _ creeplaw.Law = sinh{}

func TestUsersLaw(t *testing.T) {
	lawtest.Run(t, sinh{A: 1e6, S: 20, B: 3e4}, lawtest.Box{Claims: lawtest.RateOnly,
		Stress: lawtest.Range{1, 300}, Strain: lawtest.Range{1e-8, 0.1}, Temperature: lawtest.Range{700, 950}})
}

// forgetful is the same law by an author who forgot the inner derivative 1/S.
type forgetful struct{ sinh }

func (l forgetful) Rate(p creeplaw.Point) creeplaw.Rate {
	r := l.sinh.Rate(p)
	r.ByStress *= l.S
	return r
}

// silent takes the place of a *testing.T, so that the example can show which rule is broken.
type silent struct{}

func (silent) Helper()               {}
func (silent) Errorf(string, ...any) {}

func ExampleRun() {
	box := lawtest.Box{Claims: lawtest.RateOnly,
		Stress: lawtest.Range{1, 300}, Strain: lawtest.Range{1e-8, 0.1}, Temperature: lawtest.Range{700, 950}}
	for _, r := range lawtest.Run(silent{}, forgetful{sinh{A: 1e6, S: 20, B: 3e4}}, box) {
		if r.Broken > 0 {
			fmt.Printf("%s: %d of %d\n", r.Rule, r.Broken, r.Checks)
		}
	}
	// Output: derivative by stress: 1008 of 1008
}
