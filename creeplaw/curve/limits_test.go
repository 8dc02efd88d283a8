package curve_test

import (
	"errors"
	"math"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

var (
	inf = math.Inf(1)
	nan = math.NaN()
)

// TestCurvesAtZeroStressAndTime: no creep at no time, none at no stress unless a curve says so, and the limits of the rate.
func TestCurvesAtZeroStressAndTime(t *testing.T) {
	for _, e := range catalogue() {
		start := e.curve.At(curve.Point{Stress: 150, Temperature: 873})
		early := e.curve.At(curve.Point{Stress: 150, Temperature: 873, Time: 1e-200})
		check.Abs(t, e.name+", strain at zero time", start.Value, 0, 0)
		check.Abs(t, e.name+", its slope by stress", start.ByStress, 0, 0)
		if math.IsInf(start.ByTime, 1) {
			if !(early.ByTime > 1e100) {
				t.Errorf("%s: infinite rate at zero time, but %g soon after", e.name, early.ByTime)
			}
		} else {
			check.Rel(t, e.name+", initial rate", start.ByTime, early.ByTime, 1e-13)
			check.Rel(t, e.name+", its curvature", start.ByTimeTwice, early.ByTimeTwice, 1e-13)
			check.Rel(t, e.name+", its slope by stress", start.ByTimeStress, early.ByTimeStress, 1e-13)
			check.Rel(t, e.name+", its slope by temperature", start.ByTimeTemperature, early.ByTimeTemperature, 1e-13)
		}
		unloaded := e.curve.At(curve.Point{Temperature: 873, Time: 100})
		if creeps := unloaded.Value > 0 && unloaded.ByTime > 0; creeps != e.creepsAtZeroStress {
			t.Errorf("%s: creeps at zero stress: %v, declared %v", e.name, creeps, e.creepsAtZeroStress)
		}
		for _, p := range []curve.Point{{Stress: -1, Temperature: 873, Time: 1}, {Stress: nan, Temperature: 873, Time: 1},
			{Stress: 1, Temperature: 873, Time: -1}, {Stress: 1, Temperature: 873, Time: nan}} {
			if at := e.curve.At(p); !math.IsNaN(at.Value) || !math.IsNaN(at.ByTime) {
				t.Errorf("%s: %+v at %+v", e.name, at, p)
			}
		}
	}
}

// TestSlopesAtZeroStress: the slope by stress is finite for a leading exponent of one only.
func TestSlopesAtZeroStress(t *testing.T) {
	at := curve.Point{Temperature: 873, Time: 10}
	for _, c := range []struct {
		name string
		rate curve.Coefficient
		want float64 // slope of the steady rate
	}{
		{"linear", curve.Power{Prefactor: 2e-6, Exponent: 1}, 2e-6},
		{"sinh", sinh(3e-6, 0.5, 1), 1.5e-6},
		{"Soderberg", curve.Soderberg{Prefactor: 3e-6, StressCoefficient: 0.5}, 1.5e-6},
		{"square", curve.Power{Prefactor: 2e-6, Exponent: 2}, 0},
		{"root", curve.Power{Prefactor: 2e-6, Exponent: 0.5}, inf},
		{"exponential", exponential(3e-6, 0.5), 1.5e-6},
		{"constant", curve.Constant(3e-6), 0},
	} {
		steady := must(curve.NewSum(curve.Steady(c.rate)))
		near(t, c.name+", strain", steady.At(at).ByStress, 10*c.want)
		near(t, c.name+", rate", steady.At(at).ByTimeStress, c.want)
		near(t, c.name+", rate at zero time", steady.At(curve.Point{Temperature: 873}).ByTimeStress, c.want)
		law := must(curve.NewStrainHardened(steady))
		near(t, c.name+", law", law.Rate(creeplaw.Point{Strain: 1e-3, Temperature: 873}).ByStress, c.want)
		clocked := creeplaw.During{Clocked: must(curve.NewTimeHardened(steady)), Start: 3, End: 10}
		near(t, c.name+", clocked", clocked.Rate(creeplaw.Point{Temperature: 873}).ByStress, c.want)
	}
}

// near is a comparison to 1e-13 that also takes infinite limits at their word.
func near(t *testing.T, label string, got, want float64) {
	t.Helper()
	if math.IsInf(want, 0) {
		check.Abs(t, label, got, want, 0)
		return
	}
	check.Rel(t, label, got, want, 1e-13)
}

// TestLawAtTheEndOfTheCurve: creep strain beyond the reach of a curve that saturates gives no rate, and no error.
func TestLawAtTheEndOfTheCurve(t *testing.T) {
	saturating := must(curve.NewSum(curve.Saturating(powerAt(3e-3, 2), powerAt(1e-3, 1))))
	two := must(curve.NewSum(curve.Saturating(powerAt(1e-3, 2), powerAt(1e-1, 1)), curve.Hyperbolic(powerAt(2e-3, 2), powerAt(1e-3, 1))))
	plain := curve.Func(saturating.At)
	for name, c := range map[string]curve.Curve{"saturating": saturating, "saturating and hyperbolic": two, "a user's": plain} {
		law := must(curve.NewStrainHardened(c))
		p := creeplaw.Point{Stress: 150, Temperature: 873}
		for _, p.Strain = range []float64{3e-3 * (1 + 1e-12), 3.1e-3, 1, 1e30} {
			if r := law.Rate(p); r != (creeplaw.Rate{}) {
				t.Errorf("%s: %+v at %+v", name, r, p)
			}
			check.Abs(t, name, law.LogRate(p).Value, -inf, 0)
			check.Abs(t, name+", pseudo-time", law.LogTime(p), inf, 0)
		}
		p.Strain = 2.99e-3
		if r := law.Rate(p).Value; !(r > 0) {
			t.Errorf("%s: rate %g short of the end", name, r)
		}
		p.Stress *= 1.01 // a little more stress, and it goes on
		p.Strain = 3.01e-3
		if r := law.Rate(p).Value; !(r > 0) {
			t.Errorf("%s: rate %g after a rise of stress", name, r)
		}
		p.Stress = 0
		if r := law.Rate(p); r.Value != 0 || r.ByStrain != 0 || r.ByTemperature != 0 || math.IsNaN(r.ByStress) {
			t.Errorf("%s: %+v at zero stress", name, r)
		}
	}
}

// TestLawAtZeroStrain: the initial rate of the curve and its derivatives, by hand; infinite for primary creep by a power.
func TestLawAtZeroStrain(t *testing.T) {
	p := creeplaw.Point{Stress: 150, Temperature: 873}
	finite := must(curve.NewGarofaloTransient(transient(powerAt(3e-3, 2), hot(powerAt(1e-3, 1))), powerAt(1e-7, 5)))
	r := must(curve.NewStrainHardened(finite)).Rate(p)
	rate := 3e-3*1e-3 + 1e-7
	check.Rel(t, "rate", r.Value, rate, 1e-14)
	check.Rel(t, "by stress", r.ByStress, (3*3e-6+5*1e-7)/150, 1e-14)
	check.Rel(t, "by strain", r.ByStrain, -3e-3*1e-6/rate, 1e-14)
	check.Rel(t, "by temperature", r.ByTemperature, 3e-6*300e3/(creeplaw.GasConstant*873*873), 1e-14)

	infinite := must(curve.NewAndrade(hot(powerAt(1e-4, 4)), powerAt(1e-6, 6)))
	law := must(curve.NewStrainHardened(infinite))
	if got, want := law.Rate(p), (creeplaw.Rate{Value: inf, ByStress: inf, ByStrain: -inf, ByTemperature: inf}); got != want {
		t.Errorf("got %+v, want %+v", got, want)
	}
	l := law.LogRate(p)
	check.Abs(t, "logarithm", l.Value, inf, 0)
	check.Rel(t, "limiting stress exponent", l.ByLogStress, 12, 1e-14)
	check.Rel(t, "limiting strain exponent", l.ByLogStrain, -2, 1e-14)
	check.Rel(t, "limiting temperature exponent", l.ByLogTemperature, 3*300e3/(creeplaw.GasConstant*873), 1e-14)
}

// TestLawIsUndefinedForImpossiblePoints: NaN, not a number that looks right.
func TestLawIsUndefinedForImpossiblePoints(t *testing.T) {
	var zero curve.StrainHardened
	for _, e := range catalogue() {
		law := must(curve.NewStrainHardened(e.curve))
		for _, p := range []creeplaw.Point{{Stress: -1, Strain: 1e-3, Temperature: 873}, {Stress: nan, Strain: 1e-3, Temperature: 873},
			{Stress: 100, Strain: -1e-3, Temperature: 873}, {Stress: 100, Strain: nan, Temperature: 873},
			{Stress: 100, Strain: inf, Temperature: 873}} {
			if r := law.Rate(p); !math.IsNaN(r.Value) {
				t.Errorf("%s: %+v at %+v", e.name, r, p)
			}
		}
	}
	if r := zero.Rate(creeplaw.Point{Stress: 100, Strain: 1e-3}); !math.IsNaN(r.Value) {
		t.Errorf("the zero law gives %+v", r)
	}
	arrhenius := must(curve.NewStrainHardened(must(curve.NewSum(curve.Steady(hot(powerAt(1, 1)))))))
	for _, temperature := range []float64{0, -10, nan} {
		if r := arrhenius.Rate(creeplaw.Point{Stress: 100, Strain: 1e-3, Temperature: temperature}); !math.IsNaN(r.Value) {
			t.Errorf("%+v at %v K", r, temperature)
		}
	}
	hardening := must(creeplaw.NewStrainHardening(1e-10, 3, -2)) // no steady law
	misused := must(curve.NewStrainHardened(must(curve.NewSum(curve.Steady(curve.RateOf{Law: hardening})))))
	if r := misused.Rate(creeplaw.Point{Stress: 100, Strain: 1e-3}); !math.IsNaN(r.Value) {
		t.Errorf("%+v of a law that hardens taken for a steady one", r)
	}
}

// TestUndefinedPointsAreExplained: by the quantity out of bounds, by a part that knows, or at the least by where it was.
func TestUndefinedPointsAreExplained(t *testing.T) {
	good := creeplaw.Point{Stress: 100, Strain: 1e-3, Temperature: 873}
	table := must(creeplaw.NewFactorTable([]float64{800, 900}, []float64{1, 10}, creeplaw.TableOptions{}))
	law := must(curve.NewStrainHardened(must(curve.NewSum(curve.Steady(
		curve.Product{curve.Constant(1e-6), curve.Activated{Coefficient: powerAt(1, 2), Factor: table}})))))
	if err := law.CheckPoint(good); err != nil {
		t.Errorf("%v at %+v", err, good)
	}
	for quantity, spoil := range map[string]func(*creeplaw.Point){
		"stress":       func(p *creeplaw.Point) { p.Stress = -1 },
		"creep strain": func(p *creeplaw.Point) { p.Strain = nan },
		"temperature":  func(p *creeplaw.Point) { p.Temperature = 950 },
	} {
		p := good
		spoil(&p)
		var domain *creeplaw.DomainError
		if err := law.CheckPoint(p); !errors.As(err, &domain) || domain.Quantity != quantity {
			t.Errorf("%v at %+v, want a DomainError of the %s", err, p, quantity)
		}
	}
	broken := must(curve.NewStrainHardened(curve.Func(func(curve.Point) curve.Strain { return curve.Strain{Value: nan} })))
	var undefined *creeplaw.UndefinedError
	if err := broken.CheckPoint(good); !errors.As(err, &undefined) || undefined.Point != good {
		t.Errorf("%v, want an UndefinedError", err)
	}
}
