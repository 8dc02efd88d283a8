package curve_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
	"example.com/holdtime/creeplaw/lawtest"
)

// rational is the form of the creep equation for 2.25Cr-1Mo steel of M. K. Booker, Oak Ridge 1977 (form from memory, high; the
// numbers here are invented), as a user writes it in plain numbers: ε = c rt/(1 + rt) + ṡ t with c ~ σ, r ~ σ², ṡ ~ σ⁴.
func rational(p curve.Point) curve.Strain {
	s, t := p.Stress, p.Time
	c, r, g := 3e-5*s, 1e-7*s*s, 1e-16*s*s*s*s
	one := 1 / (1 + r*t)
	x := r * t * one
	return curve.Strain{
		Value:        c*x + g*t,
		ByTime:       c*r*one*one + g,
		ByTimeTwice:  -2 * c * r * r * one * one * one,
		ByStress:     3e-5*(x+2*x*one) + 4e-16*s*s*s*t,
		ByTimeStress: 3e-5*r*one*one*(3-4*x) + 4e-16*s*s*s,
	}
}

// acosh is the form of the creep equation for cold-worked 316 steel of ASME J. Eng. Mater. Technol. 99 (1977) 168 (form verified;
// the numbers here are invented), ε = A σ acosh(1 + rt) + P σⁿ tᵐ: of infinite initial rate.
func acosh(p curve.Point) curve.Strain {
	const a, r, b, n, m = 2e-6, 1e-3, 1e-18, 6.0, 0.9
	s, t := p.Stress, p.Time
	if t == 0 {
		return curve.Strain{ByTime: inf, ByTimeTwice: -inf, ByTimeStress: inf}
	}
	square := r * t * (2 + r*t) // (1+rt)² - 1
	root := math.Sqrt(square)
	one, rate := a*math.Log1p(r*t+root), a*r/root
	power := b * math.Pow(s, n) * math.Pow(t, m)
	return curve.Strain{
		Value:        s*one + power,
		ByTime:       s*rate + m*power/t,
		ByTimeTwice:  -s*rate*r*(1+r*t)/square + (m-1)*m*power/(t*t),
		ByStress:     one + n*power/s,
		ByTimeStress: rate + n*m*power/(s*t),
	}
}

// TestUsersCurve: plain functions become laws that follow them, and conform.
func TestUsersCurve(t *testing.T) {
	lawtest.Run(t, must(curve.NewStrainHardened(curve.Func(rational))), lawtest.Box{Claims: lawtest.Logarithmic,
		Stress: lawtest.Range{40, 400}, Strain: lawtest.Range{1e-9, 0.05}, Temperature: lawtest.Range{750, 950},
		LogStress: lawtest.Range{1, 1e4}, Points: 100})
	for name, f := range map[string]curve.Func{"rational": rational, "acosh": acosh} {
		law := must(curve.NewStrainHardened(f))
		for time := 1e-6; time < 1e8; time *= 10 {
			at := f(curve.Point{Stress: 150, Time: time})
			p := creeplaw.Point{Stress: 150, Strain: at.Value}
			check.Rel(t, fmt.Sprintf("%s, %g h", name, time), law.Rate(p).Value, at.ByTime, 1e-9)
			if n := law.Evaluations(p); n > 12 {
				t.Errorf("%s, %g h: %d evaluations", name, time, n)
			}
		}
	}
}

// TestUsersCurveAgainstTheTerms hides the terms of a sum behind a plain function: nothing but the values may count.
// Tolerance: plain numbers know the time to rounding of the strain only.
func TestUsersCurveAgainstTheTerms(t *testing.T) {
	const seed = 61
	for _, e := range catalogue() {
		if e.breaks {
			continue // the user's function has no way to say on which side of a kink it is
		}
		rng := rand.New(rand.NewPCG(seed, 1))
		known, hidden := must(curve.NewStrainHardened(e.curve)), must(curve.NewStrainHardened(curve.Func(e.curve.At)))
		most, total := 0, 0
		for range 200 {
			p := creeplaw.Point{Stress: draw(rng, 40, 400), Strain: draw(rng, 1e-8, 0.05), Temperature: draw(rng, 750, 950)}
			got, want := hidden.LogRate(p), known.LogRate(p)
			if want.Value < -690 {
				continue // the plain rate vanishes
			}
			label := fmt.Sprintf("%s at %+v (seed %d)", e.name, p, seed)
			steepness := 10 + math.Abs(want.ByLogStrain) + math.Abs(want.ByLogStress) + math.Abs(want.ByLogTemperature)
			check.Scaled(t, label, got.Value, want.Value, steepness, 1e-12)
			check.Scaled(t, label+", by stress", got.ByLogStress, want.ByLogStress, steepness*steepness, 1e-10)
			check.Scaled(t, label+", by strain", got.ByLogStrain, want.ByLogStrain, steepness*steepness, 1e-10)
			check.Scaled(t, label+", by temperature", got.ByLogTemperature, want.ByLogTemperature, steepness*steepness, 1e-10)
			n := hidden.Evaluations(p)
			most, total = max(most, n), total+n
		}
		t.Logf("%-28s evaluations %.2f, at most %d", e.name, float64(total)/200, most)
		if most > 25 {
			t.Errorf("%s: %d evaluations", e.name, most)
		}
	}
}

// TestUsersCurveWithAnInstantaneousPart: below its earliest strain the law has its earliest rate.
func TestUsersCurveWithAnInstantaneousPart(t *testing.T) {
	law := must(curve.NewStrainHardened(curve.Func(func(p curve.Point) curve.Strain {
		return curve.Strain{Value: 1e-4 + 1e-6*p.Time, ByTime: 1e-6}
	})))
	for _, strain := range []float64{1e-9, 1e-5, 9e-5, 2e-4, 1} {
		check.Rel(t, fmt.Sprintf("strain %g", strain), law.Rate(creeplaw.Point{Stress: 1, Strain: strain}).Value, 1e-6, 1e-12)
	}
}

// ownCoefficient is a user's function of stress and temperature.
type ownCoefficient struct{}

func (ownCoefficient) LogAt(stress, temperature float64) curve.LogValue { // 1e-8 σ³/(1 + σ/100) · T/873
	x := stress / 100
	return curve.LogValue{
		Value:            math.Log(1e-8) + 3*math.Log(stress) - math.Log1p(x) + math.Log(temperature/873),
		ByLogStress:      3 - x/(1+x),
		ByLogTemperature: 1,
	}
}

// TestUsersCoefficient: it goes where those of the package go, alone and in a product.
func TestUsersCoefficient(t *testing.T) {
	for name, c := range map[string]curve.Coefficient{"alone": ownCoefficient{}, "product": curve.Product{ownCoefficient{},
		curve.Constant(2), sinh(1, 0.01, 2)}} {
		law := must(curve.NewStrainHardened(must(curve.NewSum(curve.PowerOfTime(powerAt(1e-4, 4), 0.3), curve.Steady(c)))))
		for _, r := range lawtest.Run(t, law, lawtest.Box{Claims: lawtest.Logarithmic, Stress: lawtest.Range{40, 400},
			Strain: lawtest.Range{1e-7, 0.05}, Temperature: lawtest.Range{750, 950}, LogStress: lawtest.Range{1, 1e4}, Points: 90}) {
			t.Logf("%s: %-30s %6d checks, worst %.2g of the allowed", name, r.Rule, r.Checks, r.Worst)
		}
	}
}

// TestUndefinedUsersCurves: NaN from the user, in value or rate, is NaN to the law; a nil function and a nil law within too.
func TestUndefinedUsersCurves(t *testing.T) {
	for name, f := range map[string]curve.Func{
		"nil":      nil,
		"value":    func(curve.Point) curve.Strain { return curve.Strain{Value: nan, ByTime: 1} },
		"rate":     func(p curve.Point) curve.Strain { return curve.Strain{Value: p.Time, ByTime: nan} },
		"negative": func(p curve.Point) curve.Strain { return curve.Strain{Value: -p.Time, ByTime: -1} },
	} {
		law := must(curve.NewStrainHardened(f))
		for _, strain := range []float64{0, 1e-3} {
			if r := law.LogRate(creeplaw.Point{Stress: 100, Strain: strain, Temperature: 800}); !math.IsNaN(r.Value) {
				t.Errorf("%s: %+v at strain %g", name, r, strain)
			}
		}
	}
}
