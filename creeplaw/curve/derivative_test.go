package curve_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw/curve"
)

// slope differentiates f at zero by central differences of the eighth order, with halved steps until two agree best. It
// returns the derivative and half of the disagreement.
func slope(f func(float64) float64) (value, doubt float64) {
	doubt = math.Inf(1)
	last := math.NaN()
	for h := 0x1p-3; h > 0x1p-20; h /= 2 {
		d := (672*(f(h)-f(-h)) - 168*(f(2*h)-f(-2*h)) + 32*(f(3*h)-f(-3*h)) - 3*(f(4*h)-f(-4*h))) / (840 * h)
		if gap := math.Abs(d - last); gap < doubt {
			value, doubt = d, gap
		}
		last = d
	}
	return value, doubt
}

// draw is log-uniform.
func draw(rng *rand.Rand, low, high float64) float64 {
	return low * math.Exp(rng.Float64()*math.Log(high/low))
}

// TestExponentsAgainstDifferences holds the eight numbers of LogAt beside the values against differences of the values, over
// forty decades of time and eleven of stress. Tolerance: relative 1e-7 of the larger of one and the exponent, which is what
// the library promises; differences that do not agree with each other to a tenth of that decide nothing and must be rare.
func TestExponentsAgainstDifferences(t *testing.T) {
	const seed = 31
	for _, e := range catalogue() {
		rng := rand.New(rand.NewPCG(seed, 1))
		c := curve.Log(e.curve)
		worst, decided, asked := 0.0, 0, 0
		for range 200 {
			q := curve.LogPoint{Stress: draw(rng, 1e-6, 1e5), Temperature: draw(rng, 700, 1000), LogTime: math.Log(draw(rng, 1e-20, 1e20))}
			if !logsAreUsable(c.LogAt(q)) || e.breaks && nearBreak(e.curve.(curve.TwoRegime), q) {
				continue
			}
			for _, x := range exponents(c, q) {
				asked++
				d, doubt := slope(x.along)
				scale := math.Max(1, math.Abs(x.given))
				if doubt > 1e-8*scale {
					continue
				}
				decided++
				worst = math.Max(worst, math.Abs(d-x.given)/scale)
				check.Scaled(t, fmt.Sprintf("%s, %s at %+v (seed %d)", e.name, x.name, q, seed), x.given, d, scale, 1e-7)
			}
		}
		t.Logf("%-28s %5d of %5d decided, worst %.1e", e.name, decided, asked, worst)
		if asked < 300 || decided < asked*9/10 {
			t.Errorf("%s: only %d of %d exponents decided", e.name, decided, asked)
		}
	}
}

// logsAreUsable: theta's tertiary part and saturated rates leave every range.
func logsAreUsable(l curve.LogStrain) bool {
	return math.Abs(l.Strain.Value) < 1e6 && math.Abs(l.Rate.Value) < 1e6
}

// nearBreak: there is no derivative at the kink.
func nearBreak(c curve.TwoRegime, q curve.LogPoint) bool {
	time, _ := c.EndOfPrimary(q.Stress, q.Temperature)
	return math.Abs(q.LogTime-math.Log(time)) < 40
}

type exponent struct {
	name  string
	given float64
	along func(float64) float64
}

func exponents(c curve.Logarithmic, q curve.LogPoint) (xs []exponent) {
	l := c.LogAt(q)
	moves := []struct {
		name string
		move func(q curve.LogPoint, h float64) curve.LogPoint
		of   func(curve.Exponents) float64
	}{
		{"time", func(q curve.LogPoint, h float64) curve.LogPoint { q.LogTime += h; return q },
			func(e curve.Exponents) float64 { return e.ByLogTime }},
		{"stress", func(q curve.LogPoint, h float64) curve.LogPoint { q.Stress *= math.Exp(h); return q },
			func(e curve.Exponents) float64 { return e.ByLogStress }},
		{"temperature", func(q curve.LogPoint, h float64) curve.LogPoint { q.Temperature *= math.Exp(h); return q },
			func(e curve.Exponents) float64 { return e.ByLogTemperature }},
	}
	for _, m := range moves {
		xs = append(xs,
			exponent{"strain by " + m.name, m.of(l.Strain), func(h float64) float64 { return c.LogAt(m.move(q, h)).Strain.Value }},
			exponent{"rate by " + m.name, m.of(l.Rate), func(h float64) float64 { return c.LogAt(m.move(q, h)).Rate.Value }})
	}
	return xs
}

// TestRateIsTheDerivativeOfStrain holds the two halves of LogAt against each other: ε̇ = ε ∂ln ε/∂ln t / t. Tolerance: the
// rounding of logarithms of the size at hand.
func TestRateIsTheDerivativeOfStrain(t *testing.T) {
	const seed = 32
	for _, e := range catalogue() {
		rng := rand.New(rand.NewPCG(seed, 1))
		c := curve.Log(e.curve)
		compared := 0
		for range 1000 {
			q := curve.LogPoint{Stress: draw(rng, 1, 500), Temperature: draw(rng, 700, 1000), LogTime: math.Log(draw(rng, 1e-20, 1e20))}
			l := c.LogAt(q)
			if !logsAreUsable(l) || l.Strain.ByLogTime < 1e-300 {
				continue
			}
			compared++
			want := l.Strain.Value + math.Log(l.Strain.ByLogTime) - q.LogTime
			check.Scaled(t, fmt.Sprintf("%s at %+v (seed %d)", e.name, q, seed), l.Rate.Value, want,
				10+math.Abs(want)+math.Abs(l.Strain.Value), 1e-14)
		}
		if compared < 300 {
			t.Errorf("%s: only %d comparisons", e.name, compared)
		}
	}
}

// TestPlainNumbersAgainstDifferences holds the seven numbers of At against differences of Value and ByTime over a box of
// service conditions. Tolerance as above.
func TestPlainNumbersAgainstDifferences(t *testing.T) {
	const seed = 33
	for _, e := range catalogue() {
		rng := rand.New(rand.NewPCG(seed, 1))
		for range 60 {
			p := curve.Point{Stress: draw(rng, 40, 400), Temperature: draw(rng, 750, 950), Time: draw(rng, 1e-3, 1e5)}
			at := e.curve.At(p)
			if e.breaks && nearBreak(e.curve.(curve.TwoRegime), curve.LogPoint{Stress: p.Stress, Temperature: p.Temperature,
				LogTime: math.Log(p.Time)}) || math.IsInf(at.Value, 1) {
				continue
			}
			for _, x := range partials(e.curve, p, at) {
				d, doubt := slope(x.along)
				scale := math.Max(math.Abs(x.given), x.size)
				if doubt > 1e-8*scale {
					continue
				}
				check.Scaled(t, fmt.Sprintf("%s, %s at %+v (seed %d)", e.name, x.name, p, seed), x.given, d, scale, 1e-7)
			}
		}
	}
}

type partial struct {
	name        string
	given, size float64 // times the argument; the size of the function
	along       func(float64) float64
}

func partials(c curve.Curve, p curve.Point, at curve.Strain) []partial {
	byTime := func(h float64) curve.Point { q := p; q.Time *= math.Exp(h); return q }
	byStress := func(h float64) curve.Point { q := p; q.Stress *= math.Exp(h); return q }
	byTemperature := func(h float64) curve.Point { q := p; q.Temperature *= math.Exp(h); return q }
	strain := func(m func(float64) curve.Point) func(float64) float64 {
		return func(h float64) float64 { return c.At(m(h)).Value }
	}
	rate := func(m func(float64) curve.Point) func(float64) float64 {
		return func(h float64) float64 { return c.At(m(h)).ByTime }
	}
	return []partial{
		{"ByTime", at.ByTime * p.Time, at.Value, strain(byTime)},
		{"ByTimeTwice", at.ByTimeTwice * p.Time, at.ByTime, rate(byTime)},
		{"ByStress", at.ByStress * p.Stress, at.Value, strain(byStress)},
		{"ByTimeStress", at.ByTimeStress * p.Stress, at.ByTime, rate(byStress)},
		{"ByTemperature", at.ByTemperature * p.Temperature, at.Value, strain(byTemperature)},
		{"ByTimeTemperature", at.ByTimeTemperature * p.Temperature, at.ByTime, rate(byTemperature)},
	}
}
