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

// TestMeanRateOverIntervals holds the mean rate against intervals written out by hand, also so short that a difference of
// strains would lose every digit, and against the rate for an interval of no length.
func TestMeanRateOverIntervals(t *testing.T) {
	const c, r, g = 3e-3, 2e-2, 4e-7
	clocked := must(curve.NewTimeHardened(must(curve.NewGarofaloTransient(transient(powerAt(c, 2), powerAt(r, 3)), powerAt(g, 5)))))
	for _, end := range []float64{1e-6, 1, 50, 300, 1e5} {
		for _, part := range []float64{1, 0.5, 0.02, 0.0157, 0.01, 1e-3, 1e-6, 1e-9, 1e-12, 0} {
			start := end * (1 - part)
			want := c*r*math.Exp(-r*start) + g
			if length := end - start; length > 0 {
				want = -c*math.Exp(-r*start)*math.Expm1(-r*length)/length + g
			}
			got := clocked.MeanLogRate(creeplaw.Point{Stress: 150}, start, end)
			check.Abs(t, fmt.Sprintf("from %v to %v", start, end), got.Value, math.Log(want), 1e-12) // six bits of the logarithms of strain may go
		}
	}
}

// TestClockedDerivatives holds the exponents of the mean rate against differences. Tolerance: 1e-7, as promised.
func TestClockedDerivatives(t *testing.T) {
	const seed = 71
	for _, e := range catalogue() {
		rng := rand.New(rand.NewPCG(seed, 1))
		clocked := must(curve.NewTimeHardened(e.curve))
		for range 50 {
			p := creeplaw.Point{Stress: draw(rng, 40, 400), Temperature: draw(rng, 750, 950)}
			end := draw(rng, 1e-2, 1e5)
			start := end * []float64{0, 0.3, 0.995, 1}[rng.IntN(4)]
			if c, ok := e.curve.(curve.TwoRegime); ok {
				if t, _ := c.EndOfPrimary(p.Stress, p.Temperature); t > end/50 && t < end*50 {
					continue // no derivative at the kink
				}
			}
			during := creeplaw.During{Clocked: clocked, Start: start, End: end}
			l := during.LogRate(p)
			label := fmt.Sprintf("%s at %+v from %g to %g (seed %d)", e.name, p, start, end, seed)
			byStress, doubt := slope(func(h float64) float64 { q := p; q.Stress *= math.Exp(h); return during.LogRate(q).Value })
			if doubt < 1e-8 {
				check.Scaled(t, label+", stress", l.ByLogStress, byStress, 1+math.Abs(byStress), 1e-7)
			}
			byTemperature, doubt := slope(func(h float64) float64 { q := p; q.Temperature *= math.Exp(h); return during.LogRate(q).Value })
			if doubt < 1e-8 {
				check.Scaled(t, label+", temperature", l.ByLogTemperature, byTemperature, 1+math.Abs(byTemperature), 1e-7)
			}
			r := during.Rate(p)
			check.Rel(t, label+", rate", r.Value, math.Exp(l.Value), 1e-15)
			check.Rel(t, label+", rate by stress", r.ByStress*p.Stress, l.ByLogStress*r.Value, 1e-13)
			check.Abs(t, label+", by strain", r.ByStrain, 0, 0)
		}
	}
}

// TestTimeHardeningRelaxation integrates the relaxation of a bar at fixed length and holds it against the closed form
//
//	σ^(1-n) = σ₀^(1-n) + (n-1) E A tᵐ
//
// Source: I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959; J. T. Boyle, J. Spence, Stress Analysis for
// Creep, Butterworths 1983; numbers derived and checked, to ten digits. The trapezoidal steps are even in tᵐ, on which the
// problem depends smoothly, and extrapolated twice.
func TestTimeHardeningRelaxation(t *testing.T) {
	const young, sigma0, a, n, m = 150000.0, 200.0, 1e-15, 5.0, 0.4
	clocked := must(curve.NewTimeHardened(must(curve.NewBaileyNorton(a, n, m))))
	relax := func(end float64, steps int) float64 {
		stress, last := sigma0, 0.0
		for i := 1; i <= steps; i++ {
			time := end * math.Pow(float64(i)/float64(steps), 1/m)
			creep := func(s float64) (float64, float64) {
				r := creeplaw.During{Clocked: clocked, Start: last, End: time}.Rate(creeplaw.Point{Stress: s})
				return r.Value * (time - last), r.ByStress * (time - last)
			}
			atStart, _ := creep(stress)
			next := stress
			for range 20 { // Newton on σ = σ₁ - E (Δε(σ₁) + Δε(σ))/2
				v, byStress := creep(next)
				next -= (next - stress + young*(atStart+v)/2) / (1 + young*byStress/2)
			}
			stress, last = next, time
		}
		return stress
	}
	for end, want := range map[float64]float64{1: 169.0308509, 100: 122.7077620, 1000: 99.66689468} {
		x, y, z := relax(end, 400), relax(end, 800), relax(end, 1600)
		once, twice := y+(y-x)/3, z+(z-y)/3
		check.Rel(t, fmt.Sprintf("%v h", end), twice+(twice-once)/15, want, 2e-9)
	}
}

// TestClockedLimits: zero stress, zero time, times out of order, a nil clock.
func TestClockedLimits(t *testing.T) {
	clocked := must(curve.NewTimeHardened(must(curve.NewBaileyNorton(1e-14, 5, 0.4))))
	p := creeplaw.Point{Stress: 150}
	check.Abs(t, "rate at zero time", clocked.MeanLogRate(p, 0, 0).Value, inf, 0)
	check.Abs(t, "unloaded", creeplaw.During{Clocked: clocked, Start: 1, End: 2}.Rate(creeplaw.Point{}).Value, 0, 0)
	for _, interval := range [][2]float64{{2, 1}, {-1, 1}, {nan, 1}, {0, nan}, {0, inf}} {
		if l := clocked.MeanLogRate(p, interval[0], interval[1]); !math.IsNaN(l.Value) {
			t.Errorf("%+v from %v to %v", l, interval[0], interval[1])
		}
	}
	if l := clocked.MeanLogRate(creeplaw.Point{Stress: -1}, 0, 1); !math.IsNaN(l.Value) {
		t.Errorf("%+v at negative stress", l)
	}
	if r := (creeplaw.During{}).Rate(p); !math.IsNaN(r.Value) {
		t.Errorf("%+v of no clock", r)
	}
	saturating := must(curve.NewTimeHardened(must(curve.NewSum(curve.Saturating(powerAt(1e-3, 2), powerAt(1, 1))))))
	l := saturating.MeanLogRate(p, 1e6, 2e6)
	check.Abs(t, "saturated", l.Value, -inf, 0)
}

// TestNoAllocation of the clocked rate; lawtest counts those of the laws.
func TestNoAllocation(t *testing.T) {
	for _, e := range catalogue() {
		var clocked creeplaw.Clocked = must(curve.NewTimeHardened(e.curve))
		sink := 0.0
		n := testing.AllocsPerRun(20, func() {
			for _, start := range []float64{0, 50, 99.9, 100} {
				sink += creeplaw.During{Clocked: clocked, Start: start, End: 100}.LogRate(creeplaw.Point{Stress: 150, Temperature: 873}).Value
				sink += e.curve.At(curve.Point{Stress: 150, Temperature: 873, Time: start}).Value
			}
		})
		if n != 0 || math.IsNaN(sink) {
			t.Errorf("%s: %v allocations, sum %v", e.name, n, sink)
		}
	}
}
