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

// TestLawFollowsItsCurve holds the law at the creep strain of the curve against the curve's own rate, over sixteen decades of
// time. Tolerance: 1e-9, as promised; the pseudo-time, where the curve is nearly flat, as far as rounding of the strain
// leaves it known.
func TestLawFollowsItsCurve(t *testing.T) {
	for _, e := range catalogue() {
		law, c := must(curve.NewStrainHardened(e.curve)), curve.Log(e.curve)
		points, worst := 0, 0.0
		for _, stress := range []float64{50, 150, 350} {
			for time := 1e-9; time < 2e7; time *= 10 {
				at := e.curve.At(curve.Point{Stress: stress, Temperature: 873, Time: time})
				if at.Value > 1 {
					break
				}
				p := creeplaw.Point{Stress: stress, Strain: at.Value, Temperature: 873}
				label := fmt.Sprintf("%s, %v MPa, %g h", e.name, stress, time)
				got := law.Rate(p).Value
				check.Rel(t, label, got, at.ByTime, 1e-9)
				exponent := c.LogAt(curve.LogPoint{Stress: stress, Temperature: 873, LogTime: math.Log(time)}).Strain.ByLogTime
				check.Abs(t, label+", pseudo-time", law.LogTime(p), math.Log(time), 1e-14*(1+math.Abs(math.Log(time))+1/exponent))
				worst = math.Max(worst, math.Abs(got/at.ByTime-1))
				points++
			}
		}
		t.Logf("%-28s %2d points, worst %.1e", e.name, points, worst)
		if points < 3*8 {
			t.Errorf("%s: only %d points", e.name, points)
		}
	}
}

// closedForm is a law whose rate form can be written down.
type closedForm struct {
	name  string
	curve curve.Curve
	rate  func(stress, strain float64) float64
	ends  float64 // limit of strain at 150 MPa, 0 for none
}

// closedForms have rates found by hand: time is eliminated from the strain at constant stress.
func closedForms() []closedForm {
	const c, r, g = 3e-3, 2e-4, 4e-7 // at 150 MPa
	cn := func(s float64) float64 { return c * math.Pow(s/150, 2) }
	rn := func(s float64) float64 { return r * math.Pow(s/150, 3) }
	gn := func(s float64) float64 { return g * math.Pow(s/150, 5) }
	amplitude, constant, steady := powerAt(c, 2), powerAt(r, 3), powerAt(g, 5)
	bailey := must(creeplaw.NewBaileyNorton(1e-14, 5, 0.4))
	return []closedForm{
		{name: "Bailey–Norton", curve: must(curve.NewBaileyNorton(1e-14, 5, 0.4)),
			rate: func(s, p float64) float64 { return bailey.Rate(creeplaw.Point{Stress: s, Strain: p}).Value }},
		{name: "Norton", curve: must(curve.NewBaileyNorton(1e-17, 6, 1)),
			rate: func(s, p float64) float64 { return 1e-17 * math.Pow(s, 6) }},
		{name: "Findley", curve: must(curve.NewFindley(curve.FindleyParameters{Creep: 1e-4, CreepStress: 163, TimeExponent: 0.25})),
			rate: func(s, p float64) float64 { return 0.25 * math.Pow(1e-4*math.Sinh(s/163), 4) * math.Pow(p, -3) }},
		{name: "logarithmic", curve: must(curve.NewLogarithmicCreep(amplitude, constant)),
			rate: func(s, p float64) float64 { return cn(s) * rn(s) * math.Exp(-p/cn(s)) }},
		{name: "saturating", curve: must(curve.NewSum(curve.Saturating(amplitude, constant))), ends: c,
			rate: func(s, p float64) float64 { return rn(s) * (cn(s) - p) }},
		{name: "growing", curve: must(curve.NewSum(curve.Growing(amplitude, constant))),
			rate: func(s, p float64) float64 { return rn(s) * (cn(s) + p) }},
		{name: "hyperbolic", curve: must(curve.NewSum(curve.Hyperbolic(amplitude, constant))), ends: c,
			rate: func(s, p float64) float64 { return cn(s) * rn(s) * math.Pow(1-p/cn(s), 2) }},
		{name: "Andrade, by the cubic", curve: must(curve.NewAndrade(amplitude, steady)),
			rate: func(s, p float64) float64 { // κy³ + βy = p has one real root (Viète, hyperbolic form)
				beta, kappa := cn(s), gn(s)
				y := 2 * math.Sqrt(beta/(3*kappa)) * math.Sinh(math.Asinh(1.5*p/beta*math.Sqrt(3*kappa/beta))/3)
				return beta/(3*y*y) + kappa
			}},
		{name: "square root and steady", curve: must(curve.NewSum(curve.PowerOfTime(amplitude, 0.5), curve.Steady(steady))),
			rate: func(s, p float64) float64 { // gy² + cy = p
				y := 2 * p / (cn(s) + math.Sqrt(cn(s)*cn(s)+4*gn(s)*p))
				return cn(s)/(2*y) + gn(s)
			}},
		{name: "two regimes", curve: must(curve.NewTwoRegime(amplitude, 0.5, curve.InversePower{Prefactor: 3.375e8, Exponent: 3}, steady)),
			rate: func(s, p float64) float64 {
				if end := cn(s) * math.Sqrt(100*math.Pow(s/150, -3)); p > end {
					return gn(s)
				}
				return cn(s) * cn(s) / (2 * p)
			}},
		{name: "equal transients", curve: must(curve.NewSum(curve.Saturating(amplitude, constant), curve.Saturating(amplitude, constant))),
			rate: func(s, p float64) float64 { return rn(s) * (2*cn(s) - p) }, ends: 2 * c},
	}
}

// TestLawHasTheClosedForm holds the law against rate forms found by hand. Tolerance: 1e-12, as promised, of strain well short
// of a limit, up to which the difference to it is good to a thousandth.
func TestLawHasTheClosedForm(t *testing.T) {
	const seed = 41
	for _, f := range closedForms() {
		rng := rand.New(rand.NewPCG(seed, 1))
		law := must(curve.NewStrainHardened(f.curve))
		for range 300 {
			p := creeplaw.Point{Stress: draw(rng, 50, 400), Strain: draw(rng, 1e-12, 5e-2), Temperature: 873}
			if f.ends > 0 {
				p.Strain = draw(rng, 1e-12, 0.999) * f.ends * math.Pow(p.Stress/150, 2)
			}
			want := f.rate(p.Stress, p.Strain)
			if want < 1e-290 {
				continue
			}
			check.Rel(t, fmt.Sprintf("%s at %+v (seed %d)", f.name, p, seed), law.Rate(p).Value, want, 1e-12)
		}
	}
}

// TestAgreesWithBaileyNorton holds all four numbers, plain and logarithmic, against the law that has the closed form.
func TestAgreesWithBaileyNorton(t *testing.T) {
	const seed = 42
	rng := rand.New(rand.NewPCG(seed, 1))
	for range 500 {
		a, n, m := draw(rng, 1e-30, 1e-5), 1+9*rng.Float64(), 0.1+0.9*rng.Float64()
		closed := must(creeplaw.NewBaileyNorton(a, n, m))
		law := must(curve.NewStrainHardened(must(curve.NewBaileyNorton(a, n, m))))
		p := creeplaw.Point{Stress: draw(rng, 1, 500), Strain: draw(rng, 1e-8, 0.1), Temperature: 873}
		label := fmt.Sprintf("A %g, n %g, m %g at %+v (seed %d)", a, n, m, p, seed)
		got, want := law.LogRate(p), closed.LogRate(p)
		// The logarithm of the rate is n/m logarithms of stress and 1/m of strain: that is what rounding is relative to.
		check.Scaled(t, label, got.Value, want.Value, 100+math.Abs(math.Log(a))/m, 1e-15)
		check.Rel(t, label, got.ByLogStress, want.ByLogStress, 1e-15)
		check.Scaled(t, label, got.ByLogStrain, want.ByLogStrain, 1, 1e-14)
		g, w := law.Rate(p), closed.Rate(p)
		if w.Value > 1e-290 && w.Value < 1e290 {
			check.Rel(t, label, g.Value, w.Value, 1e-12)
			check.Rel(t, label, g.ByStress, w.ByStress, 1e-12)
			check.Rel(t, label, g.ByStrain, w.ByStrain, 1e-12)
		}
		for _, zero := range []creeplaw.Point{{Strain: p.Strain}, {}, {Stress: p.Stress}} {
			if g, w := law.Rate(zero), closed.Rate(zero); g != w && m != 1 {
				t.Errorf("%s: at %+v got %+v, want %+v", label, zero, g, w)
			}
		}
	}
}
