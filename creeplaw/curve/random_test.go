package curve_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// randomCurve draws a curve of one family with coefficients over twenty decades and stress exponents up to fifty.
func randomCurve(rng *rand.Rand, family int) curve.Curve {
	value := func(low, high float64) curve.Coefficient {
		v := draw(rng, low, high)
		switch rng.IntN(4) {
		case 0:
			return hot(powerAt(v, draw(rng, 1, 50)))
		case 1:
			return sinh(v, draw(rng, 1e-4, 0.1), draw(rng, 1, 8))
		case 2:
			return exponential(v, draw(rng, 1e-4, 0.1))
		default:
			return curve.Constant(v)
		}
	}
	strain := func() curve.Coefficient { return value(1e-8, 1) }
	rate := func() curve.Coefficient { return value(1e-15, 1e5) }
	part := func() curve.Transient { return transient(strain(), rate()) }
	switch family {
	case 0:
		return must(curve.NewGarofaloTransient(part(), rate()))
	case 1:
		return must(curve.NewBlackburn(part(), part(), rate()))
	case 2:
		return must(curve.NewAndrade(strain(), rate()))
	case 3:
		return must(curve.NewSum(curve.PowerOfTime(strain(), draw(rng, 0.05, 1)), curve.PowerOfTime(rate(), draw(rng, 0.05, 3)),
			curve.PowerOfTime(strain(), draw(rng, 0.5, 6))))
	case 4:
		return must(curve.NewThetaProjection(part(), part()))
	case 5:
		return must(curve.NewSum(curve.LogOfTime(strain(), rate()), curve.Steady(rate())))
	case 6:
		return must(curve.NewSum(curve.Hyperbolic(strain(), rate()), curve.Hyperbolic(strain(), rate()), curve.Steady(rate())))
	case 7:
		return must(curve.NewSum(curve.Saturating(strain(), rate()), curve.PowerOfTime(strain(), draw(rng, 0.05, 0.9)),
			curve.Growing(strain(), rate())))
	case 8:
		return must(curve.NewSum(curve.Saturating(strain(), rate()), curve.Hyperbolic(strain(), rate())))
	case 9:
		return must(curve.NewMatchedTwoRegime(strain(), draw(rng, 0.05, 0.95), rate()))
	default:
		return must(curve.NewTwoRegime(strain(), draw(rng, 0.05, 1), value(1e-3, 1e6), rate()))
	}
}

var families = []string{"Garofalo", "Blackburn", "Andrade", "three powers", "theta", "logarithmic", "hyperbolic",
	"power and exponentials", "only limits", "matched regimes", "two regimes"}

// TestSearchCannotFail draws curves, stresses over eleven decades and creep strains at pseudo-times over forty decades, and
// holds what the law finds against the curve itself: the strain at the pseudo-time must be the strain that was asked for, to
// rounding of logarithms of the size at hand; the rate must be the curve's there. Strains drawn beyond the end must give zero.
func TestSearchCannotFail(t *testing.T) {
	count := 100000 / len(families)
	if *campaign {
		count *= 100
	}
	const seed = 51
	for family, name := range families {
		rng := rand.New(rand.NewPCG(seed, uint64(family)))
		tally := newTally()
		for i := range count {
			c := randomCurve(rng, family)
			law := must(curve.NewStrainHardened(c))
			q := curve.LogPoint{Stress: draw(rng, 1e-6, 1e5), Temperature: draw(rng, 600, 1200), LogTime: math.Log(draw(rng, 1e-20, 1e20))}
			logStrain := curve.Log(c).LogAt(q).Strain.Value
			p := creeplaw.Point{Stress: q.Stress, Temperature: q.Temperature, Strain: math.Exp(logStrain)}
			if !(p.Strain > 1e-300 && p.Strain < 1e30) { // a strain out of all reason: draw one instead
				p.Strain = draw(rng, 1e-20, 1)
			}
			if r, ok := residual(t, c, law, p, fmt.Sprintf("%s, case %d at %+v (seed %d)", name, i, p, seed)); ok {
				tally.add(r, law, p)
			}
		}
		t.Logf("%-24s %s", name, tally)
		if tally.found < count/3 {
			t.Errorf("%s: only %d of %d points have a pseudo-time", name, tally.found, count)
		}
	}
}

// residual is the error of the strain at the pseudo-time found, in units of the rounding of the logarithms that it is made of.
func residual(t *testing.T, c curve.Curve, law curve.StrainHardened, p creeplaw.Point, label string) (float64, bool) {
	t.Helper()
	rate, logTime := law.LogRate(p), law.LogTime(p)
	logs := curve.Log(c)
	at := logs.LogAt(curve.LogPoint{Stress: p.Stress, Temperature: p.Temperature, LogTime: logTime})
	if math.IsInf(rate.Value, -1) && math.IsInf(logTime, 1) { // then 1e43 h must fall short
		end := logs.LogAt(curve.LogPoint{Stress: p.Stress, Temperature: p.Temperature, LogTime: 100}).Strain.Value
		if !(end <= math.Log(p.Strain)+1e-12) {
			t.Errorf("%s: never reached, but ln ε becomes %g, ln p is %g", label, end, math.Log(p.Strain))
		}
		return 0, false
	}
	for _, v := range []float64{rate.Value, rate.ByLogStress, rate.ByLogStrain, rate.ByLogTemperature, logTime} {
		if v-v != 0 {
			t.Errorf("%s: %+v at ln t %g", label, rate, logTime)
			return 0, false
		}
	}
	if c, ok := c.(curve.TwoRegime); ok {
		end, _ := c.EndOfPrimary(p.Stress, p.Temperature)
		if math.Abs(logTime-math.Log(end)) < 1e-13*(1+math.Abs(logTime)+20*math.Abs(math.Log(p.Strain))) || !(end > 1e-300 && end < 1e300) {
			return 0, false // the time cannot tell the regime: a rate that jumps up by many decades gets far in no time
		}
	}
	// Rounding of ln t and of the logarithms of the coefficients, which are as large as those of strain and rate together,
	// moves the strain by its time exponent.
	rounding := 0x1p-52 * (10 + math.Abs(math.Log(p.Strain)) + at.Strain.ByLogTime*(10+math.Abs(logTime)+math.Abs(at.Rate.Value)) +
		math.Abs(at.Strain.ByLogStress) + math.Abs(at.Strain.ByLogTemperature))
	r := math.Abs(at.Strain.Value-math.Log(p.Strain)) / rounding
	if !(r <= 16) {
		t.Errorf("%s: ln ε is %.17g at ln t %.17g, ln p %.17g: %g units of rounding", label, at.Strain.Value, logTime, math.Log(p.Strain), r)
	}
	steepness := math.Abs(at.Rate.ByLogTime) / at.Strain.ByLogTime
	check.Abs(t, label+", rate", rate.Value, at.Rate.Value, 16*(1+steepness)*(rounding+0x1p-52*(10+math.Abs(at.Rate.Value))))
	return r, true
}

// tally counts what a family of curves cost.
type tally struct {
	found, evaluations, most, robust, mostRobust int
	worst                                        float64
	histogram                                    map[int]int
}

func newTally() *tally { return &tally{histogram: map[int]int{}} }

func (a *tally) add(residual float64, law curve.StrainHardened, p creeplaw.Point) {
	n := law.Evaluations(p)
	a.found++
	a.evaluations += n
	a.most = max(a.most, n)
	a.worst = math.Max(a.worst, residual)
	if _, _, n, ok := law.Robust(p); ok {
		a.robust += n
		a.mostRobust = max(a.mostRobust, n)
	}
}

func (a *tally) String() string {
	n := float64(max(a.found, 1))
	return fmt.Sprintf("%6d found, worst residual %5.2f roundings, evaluations %.2f, at most %d; without the quick search %.2f, at most %d",
		a.found, a.worst, float64(a.evaluations)/n, a.most, float64(a.robust)/n, a.mostRobust)
}

// TestQuickSearchAgrees holds the quick searches against the search in logarithms, which shares no arithmetic with them but
// the coefficients, over service conditions. Tolerance: the steepness of the rate times rounding.
func TestQuickSearchAgrees(t *testing.T) {
	const seed = 52
	for _, e := range catalogue() {
		rng := rand.New(rand.NewPCG(seed, 1))
		law := must(curve.NewStrainHardened(e.curve))
		for range 2000 {
			p := creeplaw.Point{Stress: draw(rng, 20, 500), Strain: draw(rng, 1e-12, 0.1), Temperature: draw(rng, 750, 950)}
			want, logTime, _, ok := law.Robust(p)
			if !ok {
				break
			}
			got := law.LogRate(p)
			label := fmt.Sprintf("%s at %+v (seed %d)", e.name, p, seed)
			scale := 10 + math.Abs(want.Value) + math.Abs(want.ByLogStrain) + math.Abs(want.ByLogStress)
			// The exponents may be off by the step left out, 1e-10 at the most, and by rounding times their own steepness.
			check.Scaled(t, label+", value", got.Value, want.Value, scale, 2e-14)
			check.Scaled(t, label+", stress", got.ByLogStress, want.ByLogStress, scale*scale, 1e-10)
			check.Scaled(t, label+", strain", got.ByLogStrain, want.ByLogStrain, scale*scale, 1e-10)
			check.Scaled(t, label+", temperature", got.ByLogTemperature, want.ByLogTemperature, scale*scale, 1e-10)
			check.Scaled(t, label+", pseudo-time", law.LogTime(p), logTime, scale, 1e-12)
			if t.Failed() {
				return
			}
		}
	}
}
