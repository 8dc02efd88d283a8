package curve_test

import (
	"fmt"
	"math"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// follow integrates dp/dt = ṗ(σ, p, T) under constant stress from a time to a later one by the classical fourth-order
// Runge–Kutta scheme in the logarithms of strain and of the time that has passed since origin, and extrapolates two step
// sizes once (order five).
func follow(law creeplaw.Logarithmic, stress, temperature, origin, from, to, strain float64) float64 {
	x0, x1 := math.Log(from-origin), math.Log(to-origin)
	slope := func(x, y float64) float64 {
		l := law.LogRate(creeplaw.Point{Stress: stress, Strain: math.Exp(y), Temperature: temperature})
		return math.Exp(x + l.Value - y)
	}
	run := func(n int) float64 {
		h, y := (x1-x0)/float64(n), math.Log(strain)
		for i := range n {
			x := x0 + float64(i)*h
			k1 := slope(x, y)
			k2 := slope(x+h/2, y+h/2*k1)
			k3 := slope(x+h/2, y+h/2*k2)
			k4 := slope(x+h, y+h*k3)
			y += h / 6 * (k1 + 2*k2 + 2*k3 + k4)
		}
		return y
	}
	n := max(20, int((x1-x0)/0.02))
	coarse, fine := run(n), run(2*n)
	return math.Exp(fine + (fine-coarse)/15)
}

// TestIntegratedLawIsTheCurve integrates the law over eight decades of time and finds the curve again. Tolerance: 1e-9, as
// promised, of which the integration takes a part.
func TestIntegratedLawIsTheCurve(t *testing.T) {
	for _, e := range catalogue() {
		law := must(curve.NewStrainHardened(e.curve))
		at := func(time float64) curve.Strain {
			return e.curve.At(curve.Point{Stress: 150, Temperature: 873, Time: time})
		}
		const from = 1e-4
		to := from * 1e8
		if e.breaks { // a fixed step does not meet the kink: before it only
			end, _ := e.curve.(curve.TwoRegime).EndOfPrimary(150, 873)
			to = 0.9 * end
		}
		got := follow(law, 150, 873, 0, from, to, at(from).Value)
		t.Logf("%-28s %.3g at %.3g h, off by %.1e", e.name, got, to, got/at(to).Value-1)
		check.Rel(t, e.name, got, at(to).Value, 1e-9)
	}
}

// reach finds by bisection the time at which a curve reaches a strain: nothing of the library but At is in it.
func reach(c curve.Curve, stress, temperature, strain float64) float64 {
	low, high := 1e-30, 1e30
	for range 200 {
		mid := math.Sqrt(low) * math.Sqrt(high)
		if c.At(curve.Point{Stress: stress, Temperature: temperature, Time: mid}).Value < strain {
			low = mid
		} else {
			high = mid
		}
	}
	return high
}

// TestTwoStepsShiftAlongTheStrainAxis holds the law after a change of stress against the hand construction: the new curve,
// entered at the creep strain reached under the old one. The law is integrated over the second hold. Tolerance: 1e-9.
func TestTwoStepsShiftAlongTheStrainAxis(t *testing.T) {
	for _, e := range catalogue() {
		law := must(curve.NewStrainHardened(e.curve))
		for _, step := range [][2]float64{{120, 150}, {150, 120}} {
			first := e.curve.At(curve.Point{Stress: step[0], Temperature: 873, Time: 100}).Value
			entered := reach(e.curve, step[1], 873, first)
			want := e.curve.At(curve.Point{Stress: step[1], Temperature: 873, Time: entered + 200}).Value
			label := fmt.Sprintf("%s, %v to %v MPa", e.name, step[0], step[1])
			if entered > 1e29 {
				t.Errorf("%s: never reached", label)
				continue
			}
			check.Rel(t, label+", pseudo-time", math.Exp(law.LogTime(creeplaw.Point{Stress: step[1], Strain: first, Temperature: 873})),
				entered, 1e-9)
			if e.breaks {
				continue // the fixed step of the integration does not meet the kink
			}
			check.Rel(t, label, follow(law, step[1], 873, 0, entered, entered+200, first), want, 1e-9)
		}
	}
}

// TestPublishedTwoStepHistories holds both hardening rules against worked two-step histories of ε = A σⁿ tᵐ.
//
// Source: the formulas of I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959; numbers derived from
// them with 30 digits (derived and checked). The third row is the class "primary creep, stepped load" of the fundamental
// creep benchmarks of 1993, with our own solution.
func TestPublishedTwoStepHistories(t *testing.T) {
	for _, h := range []struct {
		a, n, m, first, second, t1, t2  float64
		after, entered, strain, byClock float64
	}{
		{1e-12, 4, 0.4, 100, 150, 100, 300, 6.309573445e-4, 1.734152992, 4.229380980e-3, 2.393674373e-3},
		{1e-12, 4, 0.4, 150, 100, 100, 300, 3.194221556e-3, 5766.503906, 3.238082964e-3, 3.542412574e-3},
		{1.5625e-14, 5, 0.5, 200, 250, 100, 200, 0.05, 10.73741824, 0.1605710571, 0.1132039738},
	} {
		c := must(curve.NewBaileyNorton(h.a, h.n, h.m))
		law, clocked := must(curve.NewStrainHardened(c)), must(curve.NewTimeHardened(c))
		label := fmt.Sprintf("%v to %v", h.first, h.second)
		const tolerance = 1e-9 // ten digits are printed
		after := c.At(curve.Point{Stress: h.first, Time: h.t1}).Value
		check.Rel(t, label+", first hold", after, h.after, tolerance)
		entered := math.Exp(law.LogTime(creeplaw.Point{Stress: h.second, Strain: after}))
		check.Rel(t, label+", pseudo-time", entered, h.entered, tolerance)
		check.Rel(t, label+", strain hardening", follow(law, h.second, 0, 0, entered, entered+h.t2-h.t1, after), h.strain, tolerance)
		byClock := after + (h.t2-h.t1)*creeplaw.During{Clocked: clocked, Start: h.t1, End: h.t2}.Rate(creeplaw.Point{Stress: h.second}).Value
		check.Rel(t, label+", time hardening", byClock, h.byClock, tolerance)
	}
}

// TestWaitingUnloaded: common practice has it that under time hardening a part left unloaded creeps differently afterwards,
// and under strain hardening it does not.
func TestWaitingUnloaded(t *testing.T) {
	c := must(curve.NewBaileyNorton(1e-14, 5, 0.4))
	law, clocked := must(curve.NewStrainHardened(c)), must(curve.NewTimeHardened(c))
	strain := c.At(curve.Point{Stress: 150, Time: 100}).Value
	if rate := law.Rate(creeplaw.Point{Strain: strain}).Value; rate != 0 {
		t.Errorf("the unloaded part creeps at %g", rate)
	}
	second := func(wait float64) float64 {
		return 100 * creeplaw.During{Clocked: clocked, Start: 100 + wait, End: 200 + wait}.Rate(creeplaw.Point{Stress: 150}).Value
	}
	check.Rel(t, "no wait", strain+second(0), c.At(curve.Point{Stress: 150, Time: 200}).Value, 1e-14)
	// By hand: A σⁿ (1200^m - 1100^m).
	check.Rel(t, "wait", second(1000), 1e-14*math.Pow(150, 5)*(math.Pow(1200, 0.4)-math.Pow(1100, 0.4)), 1e-12)
}
