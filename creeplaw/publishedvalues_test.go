package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// The published problems of this file are histories; a law alone can be held to them through the time that a history takes
// by that law, t = ∫ dσ/σ̇ or ∫ dp/ṗ, done in the logarithm of the variable by the five-point formula of Gauss and Legendre
// (Abramowitz and Stegun 1964, table 25.4) on 2000 intervals. The integrands change by a factor e over 3 of them at the
// fastest, which leaves less than 1e-12.
func integralOverLog(f func(float64) float64, from, to float64) float64 {
	const n = 2000
	nodes := [5]float64{0, 0.538469310105683, -0.538469310105683, 0.906179845938664, -0.906179845938664}
	weights := [5]float64{0.568888888888889, 0.478628670499366, 0.478628670499366, 0.236926885056189, 0.236926885056189}
	a, h := math.Log(from), math.Log(to/from)/n
	sum := 0.0
	for i := range n {
		for j, u := range nodes {
			x := math.Exp(a + h*(float64(i)+(1+u)/2))
			sum += weights[j] * x * f(x)
		}
	}
	return sum * h / 2
}

// digitsAgree holds a printed value, ten significant digits, to a time that increases as the value falls (or rises): half a
// unit of the last digit either side of the print must enclose the time it is printed for.
func digitsAgree(t *testing.T, label string, printed, time float64, timeOf func(float64) float64) {
	t.Helper()
	half := 0.51 * math.Pow(10, math.Floor(math.Log10(printed))-9)
	a, b := timeOf(printed-half), timeOf(printed+half)
	assert.Truef(t, math.Min(a, b) <= time && time <= math.Max(a, b), "%s: %.10g is reached between %.12g and %.12g, not at %g",
		label, printed, a, b, time)
}

type instant struct{ time, value float64 }

// Relaxation at fixed total strain, σ̇ = -M ṗ(σ, p) with p = (σ₀-σ)/M.
//
// Sources: Norton 1929 (fixed bar), the closed form after Nadai 1938 for the hyperbolic sine, Finnie and Heller 1959
// (strain hardening), elastic follow-up as in the R5 procedure vol. 2/3, 3-D hold on von Mises stress with M = 3G. Values
// computed from the closed forms with 30 digits and checked by another route; the attributions are from memory.
func TestPublishedRelaxation(t *testing.T) {
	norton := made(creeplaw.NewNorton(1e-16, 5))
	const e, threeG = 150000, 3 * 150000 / 2.6
	tensor := math.Sqrt(0.5*(170*170+60*60+110*110) + 3*(60*60+35*35)) // 191.768…, of xx 150, yy -20, zz 40, xy 60, yz 35
	for _, c := range []struct {
		problem        string
		law            creeplaw.Law
		modulus, start float64
		history        []instant
	}{
		{"bar, Norton", norton, e, 200, []instant{{1, 195.4687596}, {10, 169.0308509}, {100, 110.8417897}, {1000, 63.72899388}, {10000, 35.92106041}}},
		{"bar, Maxwell", made(creeplaw.NewNorton(1e-8, 1)), e, 200, []instant{{500, 94.47331055}}},
		{"bar, hyperbolic sine", made(creeplaw.NewGarofalo(1e-9, 0.05, 1)), e, 200,
			[]instant{{10, 187.9575269}, {100, 155.4860829}, {1000, 111.4794058}}},
		{"bar, strain hardening", made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4)), e, 200,
			[]instant{{1, 172.3586887}, {100, 134.7553414}, {1000, 115.1519486}}}, // the collection ends in 5; 30 digits give 115.15194856
		{"bar, strain hardening, m = 1/2", made(creeplaw.NewBaileyNorton(1.5625e-14, 5, 0.5)), 200000, 200,
			[]instant{{1, 106.8633108}, {10, 85.21658560}, {100, 67.29006893}, {1000, 52.81765309}}},
		{"follow-up, Z = 3", norton, e / 3.0, 200, []instant{{100, 139.7068411}, {1000, 83.44522897}}},
		{"bolt, Z = 1.25", norton, e / 1.25, 200, []instant{{1000, 67.34185827}}},
		{"3-D hold", norton, threeG, 200, []instant{{100, 107.2854731}, {1000, 61.51052449}}},
		{"3-D hold of a tensor", norton, threeG, tensor, []instant{{1000, 61.48536122}}},
	} {
		timeTo := func(stress float64) float64 { // over the creep strain, from so little of it that no time is lost
			end := (c.start - stress) / c.modulus
			return integralOverLog(func(p float64) float64 {
				return 1 / c.law.Rate(creeplaw.Point{Stress: c.start - c.modulus*p, Strain: p}).Value
			}, 1e-13*end, end)
		}
		for _, x := range c.history {
			digitsAgree(t, fmt.Sprintf("%s, %v h", c.problem, x.time), x.value, x.time, timeTo)
		}
	}
	// The half-life of the first problem is 156.25 h exactly.
	half := integralOverLog(func(s float64) float64 { return 1 / (e * norton.Rate(at(s)).Value) }, 100, 200)
	check.Rel(t, "half-life", half, 156.25, 1e-11)
}

// Constant total strain rate from zero stress, σ̇ = E(ė - ṗ): σ tends to (ė/A)^(1/n) (closed forms for n = 1 and 2, the third
// by quadrature and by a differential equation; from the same collection).
func TestPublishedConstantStrainRate(t *testing.T) {
	const e, rate = 150000, 1e-6
	for _, c := range []struct {
		prefactor, n float64
		history      []instant
	}{
		{1e-8, 1, []instant{{500, 52.76334473}}},
		{1e-10, 2, []instant{{100, 14.88850336}, {500, 63.51489524}, {1000, 90.51482536}}},
		{1e-15, 5, []instant{{500, 59.78864769}}}, // nine digits in the collection; 30 give 59.788647688
	} {
		law := made(creeplaw.NewNorton(c.prefactor, c.n))
		for _, x := range c.history {
			digitsAgree(t, fmt.Sprintf("n %v, %v h", c.n, x.time), x.value, x.time, func(stress float64) float64 {
				return integralOverLog(func(s float64) float64 { return 1 / (e * (rate - law.Rate(at(s)).Value)) }, 1e-13*stress, stress)
			})
		}
	}
}

// Two-step stress history under strain hardening, ε = A σⁿ tᵐ, A = 1e-12, n = 4, m = 0.4 (Finnie and Heller 1959, Hult 1966;
// values from the closed form): the law takes 100 h to the first strain and 200 h from there to the second. The primary
// creep set with m = 1/2 is a problem of the same class solved for this collection.
func TestPublishedTwoStepHistories(t *testing.T) {
	type step struct{ stress, strain, time float64 }
	for _, c := range []struct {
		a, n, m float64
		steps   [2]step
	}{
		{1e-12, 4, 0.4, [2]step{{100, 6.309573445e-4, 100}, {150, 4.229380980e-3, 200}}},
		{1e-12, 4, 0.4, [2]step{{150, 3.194221556e-3, 100}, {100, 3.238082964e-3, 200}}},
		{1.5625e-14, 5, 0.5, [2]step{{200, 0.05, 100}, {250, 0.1605710571, 100}}},
	} {
		law := made(creeplaw.NewBaileyNorton(c.a, c.n, c.m))
		from := 1e-13 * c.steps[0].strain
		for _, s := range c.steps {
			digitsAgree(t, fmt.Sprintf("%+v", s), s.strain, s.time, func(strain float64) float64 {
				return integralOverLog(func(p float64) float64 {
					return 1 / law.Rate(creeplaw.Point{Stress: s.stress, Strain: p}).Value
				}, from, strain)
			})
			from = c.a * math.Pow(s.stress, c.n) * math.Pow(s.time, c.m) // ten digits of it would be too few for the second step
		}
	}
}

// Equivalent rates of Norton's law under multiaxial stress, A = 1e-15, n = 5 (values from the formula, ten digits).
func TestPublishedEquivalentRates(t *testing.T) {
	law := made(creeplaw.NewNorton(1e-15, 5))
	for _, c := range []struct{ s1, s2, s3, rate float64 }{
		{300, 200, 100, 1.558845727e-4}, {250, -50, 80, 1.201363507e-3}, {100, 100, 0, 1e-5},
		{100, -100, 0, 1.558845727e-4}, {100, 50, 0, 4.871392896e-6},
	} {
		mises := math.Sqrt(0.5 * ((c.s1-c.s2)*(c.s1-c.s2) + (c.s2-c.s3)*(c.s2-c.s3) + (c.s3-c.s1)*(c.s3-c.s1)))
		check.Rel(t, fmt.Sprintf("%+v", c), law.Rate(at(mises)).Value, c.rate, 0.6e-9) // half a unit of the tenth digit
	}
}

// thermal composes a law with exp(-(Q/R)/T), the form in which such sets are printed.
func thermal(law creeplaw.Law, activationOverR float64) creeplaw.Thermal {
	return made(creeplaw.WithTemperature(law, made(creeplaw.NewArrhenius(activationOverR*creeplaw.GasConstant))))
}

// Published parameter sets. Where not said otherwise the parameters are from memory, and the value is what the printed law
// gives with them, computed apart from this library: a check of the arithmetic, not of a material. Starting points, never
// design data.
func TestPublishedParameterSets(t *testing.T) {
	const r, calorie = creeplaw.GasConstant, creeplaw.GasConstant / 1.987 // R = 1.987 cal/(mol K) in the salt literature
	norton := func(a, n float64) creeplaw.Law { return made(creeplaw.NewNorton(a, n)) }
	const any = 1.0 // where temperature is not in the law
	for _, c := range []struct {
		set                 string
		law                 creeplaw.Law
		stress, temperature float64
		rate, tolerance     float64 // half a unit of the last digit printed
	}{
		{"ice at -10 °C, Glen's law after Cuffey and Paterson 2010, 2A/9", norton(3.5e-25*2/9, 3), 1e5, any, 7.7777778e-11, 0.6e-8},
		{"rock salt, BGRa, Hunsche and Schulze 1994", thermal(norton(0.18, 5), 54e3/r), 10, 295.15, 4.9971610e-6, 0.6e-7},
		{"rock salt, WIPP reference law 1980, cal", thermal(norton(5.79e-36, 4.9), 12e3/1.987), 10e6, 300, 2.0891e-10, 0.6e-4},
		{"rock salt, WIPP reference law 1980, J", thermal(norton(5.79e-36, 4.9), 12e3*4.184/r), 10e6, 300, 2.0934e-10, 0.6e-4},
		{"rock salt, Carter and others 1993, low stress", thermal(norton(8.1e-5, 3.4), 51.6e3/r), 10, 373.15, 1.2176e-8, 0.6e-4},
		{"rock salt, Carter and others 1993, high stress", thermal(norton(1.6e-4, 5.3), 68.1e3/r), 10, 373.15, 9.3641e-9, 0.6e-4},
		{"rock salt, Munson and Dawson, two mechanisms of WIPP salt", made(creeplaw.NewSum(
			made(creeplaw.WithTemperature(made(creeplaw.NewNortonAt(8.386e22, 12.4e9, 5.5)), made(creeplaw.NewArrhenius(25e3*calorie)))),
			made(creeplaw.WithTemperature(made(creeplaw.NewNortonAt(9.672e12, 12.4e9, 5)), made(creeplaw.NewArrhenius(10e3*calorie)))))),
			10e6, 300, 1.7142308e-10, 0.6e-7},
		{"Sn-Ag-Cu, Schubert and others 2003, 25 °C", thermal(made(creeplaw.NewGarofalo(277984, 0.02447, 6.41)), 6500), 20, 298.15, 1.2500239e-6, 0.6e-7},
		{"Sn-Ag-Cu, Schubert and others 2003, 125 °C", thermal(made(creeplaw.NewGarofalo(277984, 0.02447, 6.41)), 6500), 20, 398.15, 2.9849824e-4, 0.6e-7},
		{"Sn-Ag-Cu, Wiese's double power law", made(creeplaw.NewSum(thermal(norton(4e-7, 3), 3223), thermal(norton(1e-12, 12), 7348))),
			20, 298.15, 1.4573215e-7, 0.6e-7},
		{"304 at 593 °C, ORNL-5014 secondary rate, ksi", made(creeplaw.NewGarofalo(6.73e-9, 0.1479, 3)), 15, any, 6.3076150e-7, 0.6e-7},
		{"316 at 600 °C, 13th Int. Conf. on Fracture 2013, table 2 (parameters verified)", norton(1.47e-29, 10.147), 200, any, 3.2799612e-6, 0.6e-7},
		{"P91 at 650 °C, Hyde and others 2010", norton(1.092e-20, 8.462), 70, any, 4.4817e-5, 0.6e-4},
		{"0.5Cr0.5Mo0.25V at 640 °C, Hyde and others 1996", norton(6.599e-16, 6.108), 40, any, 4.0259e-6, 0.6e-4},
		{"0.5Cr0.5Mo0.25V at 590 °C, Perrin and Hayhurst 1996, saturated", made(creeplaw.NewGarofalo(2.1618e-9, 0.20524*(1-0.5929), 1)), 100, any, 4.5968e-6, 0.6e-4},
		{"aluminium at 150 °C, Kowalewski and others 1994, saturated", made(creeplaw.NewGarofalo(2.960e-11, 7.167e-2*(1-0.2032), 1)), 241.3, any, 1.4281e-5, 0.6e-4},
	} {
		p := creeplaw.Point{Stress: c.stress, Strain: 0.01, Temperature: c.temperature}
		check.Rel(t, c.set, c.law.Rate(p).Value, c.rate, c.tolerance)
	}
}

// Ice, Cuffey and Paterson 2010, eq. 3.35: A = 3.5e-25 exp[-(Q/R)(1/T - 1/263.15)] s⁻¹ Pa⁻³, Q = 60 kJ/mol below -10 °C and
// 115 above (from memory; four digits as computed from the formula, which agree with the book's table to its two).
func TestPublishedIceFactor(t *testing.T) {
	cold, warm := made(creeplaw.NewArrheniusAt(60e3, 263.15)), made(creeplaw.NewArrheniusAt(115e3, 263.15))
	for _, c := range []struct{ celsius, a float64 }{{0, 2.397e-24}, {-2, 1.650e-24}, {-5, 9.326e-25}, {-10, 3.500e-25},
		{-15, 2.058e-25}, {-20, 1.185e-25}, {-25, 6.671e-26}, {-30, 3.668e-26}, {-35, 1.967e-26}, {-40, 1.027e-26},
		{-45, 5.212e-27}, {-50, 2.566e-27}} {
		factor := cold
		if c.celsius > -10 {
			factor = warm
		}
		f, _ := factor.LogFactor(c.celsius + 273.15)
		check.Rel(t, fmt.Sprintf("%v °C", c.celsius), 3.5e-25*math.Exp(f), c.a, 5e-4)
	}
}

// Rates from textbook tables (Callister and Rethwisch, data read; answers worked out apart from this library).
func TestPublishedTextbookRates(t *testing.T) {
	// Nickel, problem 8.34 of the 8th edition: n from two stresses at 1273 K, then another temperature.
	n := math.Log(1e-4/1e-6) / math.Log(15/4.5)
	check.Rel(t, "nickel exponent", n, 3.824978579, 0.6e-9)
	nickel := made(creeplaw.WithTemperature(made(creeplaw.NewNortonAt(1e-4, 15, n)), made(creeplaw.NewArrheniusAt(272e3, 1273))))
	check.Rel(t, "nickel", nickel.Rate(creeplaw.Point{Stress: 25, Temperature: 1123}).Value, 2.279e-5, 3e-4)
	// An iron, problem 8.43 of the 9th edition: the activation energy from two temperatures at 140 MPa, then 1300 K, 83 MPa.
	q := math.Log(8.8e-2/6.6e-4) * creeplaw.GasConstant / (1/1090.0 - 1/1200.0)
	iron := made(creeplaw.WithTemperature(made(creeplaw.NewNortonAt(6.6e-4, 140, 8.5)), made(creeplaw.NewArrheniusAt(q, 1090))))
	check.Rel(t, "iron", iron.Rate(creeplaw.Point{Stress: 83, Temperature: 1300}).Value, 0.04307910794, 0.6e-9)
	check.Rel(t, "iron, given point", iron.Rate(creeplaw.Point{Stress: 140, Temperature: 1200}).Value, 8.8e-2, 1e-13)
}
