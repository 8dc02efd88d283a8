package curve_test

import (
	"math"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// TestCurvesAreTheirEquations holds each curve against its equation as its documentation states it, written out in plain
// arithmetic. Tolerance: rounding, of logarithms up to about fifty.
func TestCurvesAreTheirEquations(t *testing.T) {
	const s, temperature, time, r = 130.0, 851.0, 37.0, creeplaw.GasConstant
	arrhenius := func(q float64) float64 { return math.Exp(-q / (r * temperature)) }
	arrheniusAt := func(q, t0 float64) float64 { return math.Exp(-q / r * (1/temperature - 1/t0)) }
	saturating := func(c, k float64) float64 { return c * (1 - math.Exp(-k*time)) }
	limit, rate := 3e-3*math.Pow(s/150, 2), 0.02*math.Exp(0.01*s)
	slow, slowRate := 5e-3*math.Pow(s/150, 1.5), 1e-3*math.Pow(s/150, 3)
	steady := 2e-7 * math.Pow(math.Sinh(0.02*s), 3)
	fastPart := transient(powerAt(3e-3, 2), exponential(0.02, 0.01))
	slowPart := transient(powerAt(5e-3, 1.5), powerAt(1e-3, 3))
	steadyPart := sinh(2e-7, 0.02, 3)
	bailey := 1e-12 * math.Pow(s, 4) * math.Pow(time, 0.3)
	theta := func(a, b, c, d float64) float64 { return math.Exp(a + b*s + c*temperature + d*s*temperature) }
	for _, c := range []struct {
		name  string
		curve curve.Curve
		want  float64
	}{
		{"Bailey–Norton", must(curve.NewBaileyNorton(1e-12, 4, 0.3)), bailey},
		{"primary and secondary", must(curve.NewPrimarySecondary(curve.PrimarySecondaryParameters{PrimaryPrefactor: 1e-12,
			PrimaryStressExponent: 4, TimeExponent: 0.3, SteadyPrefactor: 1e-16, SteadyStressExponent: 5})),
			bailey + 1e-16*math.Pow(s, 5)*time},
		{"Graham–Walles", must(curve.NewGrahamWalles(graham(1e-12, 4, 1./3, 100e3), curve.GrahamWallesTerm{Prefactor: 1e3,
			StressExponent: 5, TimeExponent: 1, ActivationEnergy: 310e3}, curve.GrahamWallesTerm{Prefactor: 1e-24,
			StressExponent: 7, TimeExponent: 3})),
			1e-12*math.Pow(s, 4)*math.Cbrt(time)*arrheniusAt(100e3, 873) + 1e3*math.Pow(s, 5)*time*arrhenius(310e3) +
				1e-24*math.Pow(s, 7)*math.Pow(time, 3)},
		{"Andrade", must(curve.NewAndrade(powerAt(3e-3, 2), hot(steadyPart))),
			limit*math.Cbrt(time) + steady*arrheniusAt(300e3, 873)*time},
		{"logarithmic", must(curve.NewLogarithmicCreep(powerAt(3e-3, 2), exponential(0.02, 0.01))), limit * math.Log(1+rate*time)},
		{"McVetty", must(curve.NewMcVetty(sinh(1e-4, 0.02, 1), 0.03, steadyPart)),
			saturating(1e-4*math.Sinh(0.02*s), 0.03) + steady*time},
		{"Garofalo transient", must(curve.NewGarofaloTransient(fastPart, steadyPart)), saturating(limit, rate) + steady*time},
		{"Blackburn", must(curve.NewBlackburn(fastPart, slowPart, steadyPart)),
			saturating(limit, rate) + saturating(slow, slowRate) + steady*time},
		{"theta projection", must(curve.NewThetaProjection(transient(bilinear(-9, 0.02, 1e-3, 1e-6), bilinear(-8, 0.01, 2e-3, 1e-6)),
			transient(bilinear(-12, 0.01, 1e-3, 2e-6), bilinear(-11, 0.015, 1e-3, 1e-6)))),
			saturating(theta(-9, 0.02, 1e-3, 1e-6), theta(-8, 0.01, 2e-3, 1e-6)) +
				theta(-12, 0.01, 1e-3, 2e-6)*(math.Exp(theta(-11, 0.015, 1e-3, 1e-6)*time)-1)},
		{"two regimes, primary", must(curve.NewTwoRegime(powerAt(1e-4, 4), 0.3, curve.Constant(40), steadyPart)),
			1e-4 * math.Pow(s/150, 4) * math.Pow(time, 0.3)},
		{"two regimes, secondary", must(curve.NewTwoRegime(powerAt(1e-4, 4), 0.3, curve.InversePower{Prefactor: 3e3, Exponent: 1}, steadyPart)),
			1e-4*math.Pow(s/150, 4)*math.Pow(3e3/s, 0.3) + steady*(time-3e3/s)},
		{"hyperbolic", must(curve.NewSum(curve.Hyperbolic(powerAt(3e-3, 2), exponential(0.02, 0.01)), curve.Steady(steadyPart))),
			limit*rate*time/(1+rate*time) + steady*time},
		{"products", must(curve.NewSum(curve.Steady(curve.Product{sinh(1e-3, 0.02, 1), sinh(1e-3, 0.01, 2),
			curve.Soderberg{Prefactor: 2, StressCoefficient: 0.01}, exponential(3, -0.001),
			curve.RateOf{Law: must(creeplaw.NewNorton(1e-6, 2))}}))),
			1e-3 * math.Sinh(0.02*s) * 1e-3 * math.Pow(math.Sinh(0.01*s), 2) * 2 * (math.Exp(0.01*s) - 1) * 3 * math.Exp(-0.001*s) *
				1e-6 * s * s * time},
	} {
		at := curve.Point{Stress: s, Temperature: temperature, Time: time}
		check.Rel(t, c.name, c.curve.At(at).Value, c.want, 1e-13)
	}
}

// TestMatchedRatesMeet: at the end of the primary stage both rates are one, and the curve is continuous there.
func TestMatchedRatesMeet(t *testing.T) {
	c := must(curve.NewMatchedTwoRegime(powerAt(1e-3, 4), 0.45, powerAt(1e-6, 8)))
	for _, stress := range []float64{1, 50, 150, 400} {
		end, strain := c.EndOfPrimary(stress, 0)
		before := c.At(curve.Point{Stress: stress, Time: end * (1 - 1e-9)})
		after := c.At(curve.Point{Stress: stress, Time: end * (1 + 1e-9)})
		check.Rel(t, "rate", before.ByTime, after.ByTime, 1e-8) // it changes by the ninth digit of time
		check.Rel(t, "strain", before.Value, strain, 1e-8)
		check.Rel(t, "strain", after.Value, strain, 1e-8)
		check.Rel(t, "rate after", after.ByTime, 1e-6*math.Pow(stress/150, 8), 1e-13)
	}
}

// TestPublishedValues holds curves against published equations worked out elsewhere, to the digits that are printed.
func TestPublishedValues(t *testing.T) {
	const digits = 6e-8 // seven or eight digits are printed

	// Type 304 steel at 1100 °F, see type304.
	steel := type304()
	fast := transient(curve.Power{Prefactor: 5.436e-5, Exponent: 1.843}, exponential(5.929e-5, 0.2029))
	check.Rel(t, "304, limit", math.Exp(fast.Strain.LogAt(15, 0).Value), 7.9949479e-3, digits)
	check.Rel(t, "304, rate constant", math.Exp(fast.Rate.LogAt(15, 0).Value), 1.2438176e-3, digits)
	check.Rel(t, "304, steady rate", steel.At(curve.Point{Stress: 15, Time: 1e7}).ByTime, 6.3076150e-7, digits)
	check.Rel(t, "304, 15 ksi, 1000 h", steel.At(curve.Point{Stress: 15, Time: 1000}).Value, 6.3209133e-3, digits)

	// Theta projection: formulas of R. W. Evans, B. Wilshire, Creep of Metals and Alloys, Institute of Metals 1985 (derived and
	// checked).
	theta := must(curve.NewThetaProjection(transient(curve.Constant(0.01), curve.Constant(2e-3)),
		transient(curve.Constant(0.002), curve.Constant(5e-4))))
	rate, time := theta.MinimumRate(100, 800)
	check.Rel(t, "theta, time of the minimum rate", time, 1752.810654, 1e-9)
	check.Rel(t, "theta, minimum rate", rate, 3.002811085e-6, 1e-9)
	for hours, want := range map[float64]float64{1000: 0.009944089709, 1752.810654: 0.01250421663, 5000: 0.03236453392} {
		check.Rel(t, "theta", theta.At(curve.Point{Stress: 100, Temperature: 800, Time: hours}).Value, want, 1e-9)
	}

	// Rigid PVC and low-density polyethylene, psi and h, 77 °F: W. N. Findley, J. S. Lai, K. Onaran, Creep and Relaxation of
	// Nonlinear Viscoelastic Materials, North-Holland 1976 (from memory, medium). The published strains are totals.
	pvc := must(curve.NewFindley(curve.FindleyParameters{Creep: 0.00008, CreepStress: 1630, TimeExponent: 0.305,
		Instantaneous: 0.00833, InstantaneousStress: 4640}))
	check.Rel(t, "PVC", pvc.Instantaneous(2000)+pvc.At(curve.Point{Stress: 2000, Time: 1000}).Value, 4.7281667e-3, digits)
	polyethylene := must(curve.NewFindley(curve.FindleyParameters{Creep: 0.0021, CreepStress: 230, TimeExponent: 0.154,
		Instantaneous: 0.027, InstantaneousStress: 585}))
	check.Rel(t, "polyethylene", polyethylene.Instantaneous(500)+polyethylene.At(curve.Point{Stress: 500, Time: 1000}).Value,
		5.2394035e-2, digits)

	// Primary and primary with secondary creep at 200 N/mm² in the class of the fundamental creep benchmarks of 1993 (numbers of
	// our own, derived and checked).
	both := must(curve.NewPrimarySecondary(curve.PrimarySecondaryParameters{PrimaryPrefactor: 1.5625e-14,
		PrimaryStressExponent: 5, TimeExponent: 0.5, SteadyPrefactor: 3.125e-16, SteadyStressExponent: 5}))
	check.Rel(t, "primary and secondary", both.At(curve.Point{Stress: 200, Time: 1000}).Value, 0.2581138830, 1e-9)
	primary := must(curve.NewBaileyNorton(1.5625e-14, 5, 0.5))
	check.Rel(t, "primary", primary.At(curve.Point{Stress: 200, Time: 100}).Value, 0.05, 1e-13)
}

// TestMinimumRateIsTheLeast holds it against rates around it, and against a curve whose rate only rises.
func TestMinimumRateIsTheLeast(t *testing.T) {
	theta := must(curve.NewThetaProjection(transient(powerAt(0.01, 2), powerAt(2e-3, 3)), transient(powerAt(0.002, 3), powerAt(5e-4, 4))))
	for _, stress := range []float64{60, 150, 300} {
		rate, time := theta.MinimumRate(stress, 800)
		at := theta.At(curve.Point{Stress: stress, Temperature: 800, Time: time})
		check.Abs(t, "curvature", at.ByTimeTwice*time/rate, 0, 1e-12)
		for _, f := range []float64{0.5, 0.9, 1.1, 2} {
			if v := theta.At(curve.Point{Stress: stress, Temperature: 800, Time: f * time}).ByTime; !(v > rate) {
				t.Errorf("%v MPa: the rate %g at %g h is below %g", stress, v, f*time, rate)
			}
		}
	}
	rising := must(curve.NewThetaProjection(transient(curve.Constant(1e-4), curve.Constant(1e-3)), transient(curve.Constant(1), curve.Constant(1))))
	rate, time := rising.MinimumRate(100, 800)
	check.Abs(t, "time", time, 0, 0)
	check.Rel(t, "initial rate", rate, 1+1e-7, 1e-14)
}
