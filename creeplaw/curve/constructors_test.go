package curve_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// bad are the numbers that no positive parameter may have.
var bad = []float64{0, -1, math.NaN(), math.Inf(1), math.Inf(-1)}

// refused holds a constructor's error against the curve, the parameter and the value it must name.
func refused(t *testing.T, err error, law, parameter string, value float64) {
	t.Helper()
	var p *creeplaw.ParameterError
	switch {
	case !errors.As(err, &p):
		t.Errorf("%s, %s %v: %v is no ParameterError", law, parameter, value, err)
	case p.Law != law || p.Parameter != parameter || math.Float64bits(p.Value) != math.Float64bits(value) || p.Want == "":
		t.Errorf("%s, %s %v: got %+v", law, parameter, value, p)
	case !strings.Contains(p.Error(), parameter):
		t.Errorf("the message %q does not name %q", p, parameter)
	}
}

func errorOf[T any](_ T, err error) error { return err }

// TestNumbersAreChecked: every number of every constructor, one at a time.
func TestNumbersAreChecked(t *testing.T) {
	for _, v := range bad {
		const bailey = "Bailey–Norton curve"
		refused(t, errorOf(curve.NewBaileyNorton(v, 5, 0.4)), bailey, "strain: prefactor", v)
		refused(t, errorOf(curve.NewBaileyNorton(1, v, 0.4)), bailey, "strain: exponent", v)
		refused(t, errorOf(curve.NewBaileyNorton(1, 5, v)), bailey, "time exponent", v)

		const both = "primary and secondary powers"
		for _, c := range []struct {
			name string
			set  func(*curve.PrimarySecondaryParameters)
		}{
			{"primary strain: prefactor", func(p *curve.PrimarySecondaryParameters) { p.PrimaryPrefactor = v }},
			{"primary strain: exponent", func(p *curve.PrimarySecondaryParameters) { p.PrimaryStressExponent = v }},
			{"time exponent", func(p *curve.PrimarySecondaryParameters) { p.TimeExponent = v }},
			{"steady rate: prefactor", func(p *curve.PrimarySecondaryParameters) { p.SteadyPrefactor = v }},
			{"steady rate: exponent", func(p *curve.PrimarySecondaryParameters) { p.SteadyStressExponent = v }},
		} {
			p := curve.PrimarySecondaryParameters{PrimaryPrefactor: 1, PrimaryStressExponent: 5, TimeExponent: 0.4, SteadyPrefactor: 1,
				SteadyStressExponent: 5}
			c.set(&p)
			refused(t, errorOf(curve.NewPrimarySecondary(p)), both, c.name, v)
		}

		const walles = "Graham–Walles"
		refused(t, errorOf(curve.NewGrahamWalles(graham(v, 5, 1, 1e5))), walles, "term: prefactor", v)
		refused(t, errorOf(curve.NewGrahamWalles(graham(1, v, 1, 1e5))), walles, "term: exponent", v)
		refused(t, errorOf(curve.NewGrahamWalles(graham(1, 5, v, 1e5))), walles, "time exponent", v)
		if v != 0 { // an activation energy or a reference temperature of zero is none
			refused(t, errorOf(curve.NewGrahamWalles(graham(1, 5, 1, v))), walles, "term: activation energy", v)
			term := graham(1, 5, 1, 1e5)
			term.ReferenceTemperature = v
			refused(t, errorOf(curve.NewGrahamWalles(term)), walles, "term: reference temperature", v)
		}

		refused(t, errorOf(curve.NewMcVetty(powerAt(1, 1), v, powerAt(1, 1))), "McVetty", "transient rate constant: constant", v)

		for name, set := range map[string]func(*curve.FindleyParameters){
			"creep: prefactor":                func(p *curve.FindleyParameters) { p.Creep = v },
			"creep: stress":                   func(p *curve.FindleyParameters) { p.CreepStress = v },
			"time exponent":                   func(p *curve.FindleyParameters) { p.TimeExponent = v },
			"instantaneous strain: prefactor": func(p *curve.FindleyParameters) { p.Instantaneous = v },
			"instantaneous strain: stress":    func(p *curve.FindleyParameters) { p.InstantaneousStress = v },
		} {
			p := curve.FindleyParameters{Creep: 1, CreepStress: 100, TimeExponent: 0.3, Instantaneous: 1, InstantaneousStress: 100}
			set(&p)
			refused(t, errorOf(curve.NewFindley(p)), "Findley", name, v)
		}

		const regimes = "two-regime curve"
		refused(t, errorOf(curve.NewTwoRegime(powerAt(1, 1), v, powerAt(1, 1), powerAt(1, 1))), regimes, "time exponent", v)
		refused(t, errorOf(curve.NewMatchedTwoRegime(powerAt(1, 1), v, powerAt(1, 1))), regimes, "time exponent", v)
		refused(t, errorOf(curve.NewSum(curve.PowerOfTime(powerAt(1, 1), v))), "sum of terms", "time exponent", v)
	}
	refused(t, errorOf(curve.NewBaileyNorton(1, 5, 1.1)), "Bailey–Norton curve", "time exponent", 1.1)
	refused(t, errorOf(curve.NewMatchedTwoRegime(powerAt(1, 1), 1, powerAt(1, 1))), "two-regime curve", "time exponent", 1)
}

// TestCoefficientsAreChecked: every number of every coefficient, where a curve takes it up.
func TestCoefficientsAreChecked(t *testing.T) {
	in := func(c curve.Coefficient) error { return errorOf(curve.NewSum(curve.Saturating(curve.Constant(1), c))) }
	const sum, part = "sum of terms", "rate constant of a term: "
	for _, v := range bad {
		for name, c := range map[string]curve.Coefficient{
			"constant":                         curve.Constant(v),
			"prefactor":                        curve.Power{Prefactor: v, Exponent: 1},
			"exponent":                         curve.Power{Prefactor: 1, Exponent: v},
			"value":                            curve.PowerAt{Value: v, Stress: 1, Exponent: 1},
			"stress":                           curve.PowerAt{Value: 1, Stress: v, Exponent: 1},
			"stress coefficient":               curve.Sinh{Prefactor: 1, StressCoefficient: v, Exponent: 1},
			"constant, hot":                    hot(curve.Constant(v)),
			"factor of the product: prefactor": curve.Product{curve.Constant(1), exponential(v, 1)},
		} {
			refused(t, in(c), sum, part+strings.TrimSuffix(name, ", hot"), v)
		}
		refused(t, in(curve.PowerAt{Value: 1, Stress: 1, Exponent: v}), sum, part+"exponent", v)
		refused(t, in(curve.InversePower{Prefactor: v, Exponent: 1}), sum, part+"prefactor", v)
		refused(t, in(curve.InversePower{Prefactor: 1, Exponent: v}), sum, part+"exponent", v)
		refused(t, in(sinh(v, 1, 1)), sum, part+"prefactor", v)
		refused(t, in(sinh(1, 1, v)), sum, part+"exponent", v)
		refused(t, in(curve.Soderberg{Prefactor: v, StressCoefficient: 1}), sum, part+"prefactor", v)
		refused(t, in(curve.Soderberg{Prefactor: 1, StressCoefficient: v}), sum, part+"stress coefficient", v)
		if v-v != 0 { // exponents and logarithms may have any sign
			refused(t, in(exponential(1, v)), sum, part+"stress coefficient", v)
			refused(t, in(bilinear(v, 0, 0, 0)), sum, part+"intercept", v)
			refused(t, in(bilinear(0, v, 0, 0)), sum, part+"coefficient of stress", v)
			refused(t, in(bilinear(0, 0, v, 0)), sum, part+"coefficient of temperature", v)
			refused(t, in(bilinear(0, 0, 0, v)), sum, part+"coefficient of the product", v)
		}
		for _, c := range []curve.Coefficient{curve.Power{Prefactor: v, Exponent: 1}, curve.Constant(v)} {
			if l := c.LogAt(100, 800); !math.IsNaN(l.Value) {
				t.Errorf("%#v gives %+v", c, l)
			}
		}
	}
}

// TestMissingPartsAreNamed: a nil coefficient, factor, law or curve.
func TestMissingPartsAreNamed(t *testing.T) {
	one := curve.Constant(1)
	pair := curve.Transient{Strain: one, Rate: one}
	for _, c := range []struct {
		err       error
		law, part string
	}{
		{errorOf(curve.NewSum()), "sum of terms", "term"},
		{errorOf(curve.NewSum(curve.Term{})), "sum of terms", "amplitude of a term"},
		{errorOf(curve.NewSum(curve.Steady(nil))), "sum of terms", "amplitude of a term"},
		{errorOf(curve.NewSum(curve.Hyperbolic(one, nil))), "sum of terms", "rate constant of a term"},
		{errorOf(curve.NewGrahamWalles()), "Graham–Walles", "term"},
		{errorOf(curve.NewAndrade(nil, one)), "Andrade", "cube-root coefficient"},
		{errorOf(curve.NewAndrade(one, nil)), "Andrade", "steady rate"},
		{errorOf(curve.NewLogarithmicCreep(one, nil)), "logarithmic creep", "rate constant"},
		{errorOf(curve.NewMcVetty(nil, 1, one)), "McVetty", "transient strain"},
		{errorOf(curve.NewGarofaloTransient(curve.Transient{Strain: one}, one)), "Garofalo's transient", "transient rate constant"},
		{errorOf(curve.NewGarofaloTransient(pair, nil)), "Garofalo's transient", "steady rate"},
		{errorOf(curve.NewBlackburn(pair, curve.Transient{Rate: one}, one)), "Blackburn", "slow transient strain"},
		{errorOf(curve.NewThetaProjection(pair, curve.Transient{Strain: one})), "theta projection", "θ₄"},
		{errorOf(curve.NewTwoRegime(nil, 0.5, one, one)), "two-regime curve", "primary coefficient"},
		{errorOf(curve.NewTwoRegime(one, 0.5, nil, one)), "two-regime curve", "end of primary creep"},
		{errorOf(curve.NewTwoRegime(one, 0.5, one, nil)), "two-regime curve", "steady rate"},
		{errorOf(curve.NewAndrade(curve.Activated{Coefficient: one}, one)), "Andrade", "cube-root coefficient: temperature factor"},
		{errorOf(curve.NewAndrade(hot(nil), one)), "Andrade", "cube-root coefficient: coefficient"},
		{errorOf(curve.NewAndrade(curve.Product{}, one)), "Andrade", "cube-root coefficient: factor of the product"},
		{errorOf(curve.NewAndrade(curve.RateOf{}, one)), "Andrade", "cube-root coefficient: law"},
		{errorOf(curve.NewStrainHardened(nil)), "strain-hardened curve", "curve"},
		{errorOf(curve.NewTimeHardened(nil)), "time-hardened curve", "curve"},
	} {
		var m *creeplaw.MissingError
		if !errors.As(c.err, &m) || m.Law != c.law || m.Part != c.part {
			t.Errorf("got %v, want the %s of the %s missing", c.err, c.part, c.law)
		}
	}
}

// TestLawsWithVariablesAreRefused: a damage law taken for a steady one would lose its damage.
func TestLawsWithVariablesAreRefused(t *testing.T) {
	damage := must(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6}))
	err := errorOf(curve.NewSum(curve.Steady(curve.RateOf{Law: damage})))
	var lost *creeplaw.CompositionError
	if !errors.As(err, &lost) || lost.Variable == "" {
		t.Errorf("got %v", err)
	}
}

// TestCurvesThatMakeNoLaw: one that never starts, one with too many terms.
func TestCurvesThatMakeNoLaw(t *testing.T) {
	late := must(curve.NewGrahamWalles(graham(1e-20, 5, 3, 1e5), graham(1e-15, 5, 1.5, 1e5)))
	refused(t, errorOf(curve.NewStrainHardened(late)), "strain-hardened curve", "smallest time exponent", 1.5)
	terms := make([]curve.Term, 65)
	for i := range terms {
		terms[i] = curve.Steady(curve.Constant(1))
	}
	refused(t, errorOf(curve.NewStrainHardened(must(curve.NewSum(terms...)))), "strain-hardened curve", "number of terms", 65)
	law := must(curve.NewStrainHardened(must(curve.NewSum(terms[:64]...))))
	if got := law.Rate(creeplaw.Point{Stress: 1, Strain: 1}).Value; !(math.Abs(got-64) < 1e-12) {
		t.Errorf("64 steady terms of one: %v", got)
	}
}
