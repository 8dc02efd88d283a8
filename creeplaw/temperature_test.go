package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// Arrhenius 1889: f = exp(-Q/RT), d ln f/d ln T = Q/(RT), against the values of the formula as its comment states it.
func TestArrhenius(t *testing.T) {
	plain := made(creeplaw.NewArrhenius(300e3))
	shifted := made(creeplaw.NewArrheniusAt(300e3, 823.15))
	for _, kelvin := range []float64{200, 273.15, 823.15, 900, 2000} {
		label := fmt.Sprintf("%v K", kelvin)
		q := 300e3 / (creeplaw.GasConstant * kelvin)
		value, byLog := plain.LogFactor(kelvin)
		check.Rel(t, label, value, -q, 4*epsilon)
		check.Rel(t, label, byLog, q, 4*epsilon)
		value, byLog = shifted.LogFactor(kelvin)
		// Two reciprocals of nearly equal size cancel: the error is on the scale of either.
		check.Scaled(t, label+" shifted", value, -300e3/creeplaw.GasConstant*(823.15-kelvin)/(kelvin*823.15), q, 4*epsilon)
		check.Rel(t, label+" shifted", byLog, q, 4*epsilon)
	}
	one, _ := shifted.LogFactor(823.15)
	assert.Zero(t, one, "the factor is one, to the bit, at the reference temperature")
}

func TestArrheniusSpecialValues(t *testing.T) {
	plain := made(creeplaw.NewArrhenius(300e3))
	for _, bad := range []float64{0, -1, math.NaN(), math.Inf(-1)} {
		value, byLog := plain.LogFactor(bad)
		assert.True(t, math.IsNaN(value) && math.IsNaN(byLog), "%v K: %v %v", bad, value, byLog)
	}
	hot, byLog := plain.LogFactor(math.Inf(1))
	assert.Zero(t, [2]float64{hot, byLog}, "the factor tends to one in the heat")
	cold, _ := plain.LogFactor(5e-324)
	assert.Equal(t, math.Inf(-1), cold)
	for _, idle := range []creeplaw.Arrhenius{{}, made(creeplaw.NewArrhenius(0)), made(creeplaw.NewArrheniusAt(0, 800))} {
		value, byLog := idle.LogFactor(900)
		assert.True(t, value == 0 && byLog == 0, "no activation: %v %v", value, byLog)
	}
}

// ṗ = f(T)·law and its derivatives in closed form: ∂ṗ/∂σ = f ∂law/∂σ, ∂ṗ/∂T = law·f·Q/(RT²).
func TestThermalMultipliesTheRate(t *testing.T) {
	const q, t0 = 250e3, 800.0
	within := made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4))
	law := made(creeplaw.WithTemperature(within, made(creeplaw.NewArrheniusAt(q, t0))))
	for _, kelvin := range []float64{500, 800, 1200} {
		for _, s := range []float64{1, 90, 700} {
			p := creeplaw.Point{Stress: s, Strain: 2e-3, Temperature: kelvin}
			label := fmt.Sprintf("%+v", p)
			f := math.Exp(-q / creeplaw.GasConstant * (1/kelvin - 1/t0))
			r, w := law.Rate(p), within.Rate(p)
			// Logarithms up to 120 in the rate, 60 in the factor, each rounded once or twice.
			const tolerance = 400 * epsilon
			check.Rel(t, label, r.Value, f*w.Value, tolerance)
			check.Rel(t, label+" by stress", r.ByStress, f*w.ByStress, tolerance)
			check.Rel(t, label+" by strain", r.ByStrain, f*w.ByStrain, tolerance)
			check.Rel(t, label+" by temperature", r.ByTemperature, f*w.Value*q/(creeplaw.GasConstant*kelvin*kelvin), tolerance)
			l, v := law.LogRate(p), within.LogRate(p)
			assert.Equal(t, v.ByLogStress, l.ByLogStress)
			assert.Equal(t, v.ByLogStrain, l.ByLogStrain)
			check.Rel(t, label+" exponent", l.ByLogTemperature, q/(creeplaw.GasConstant*kelvin), 4*epsilon)
		}
	}
	p := creeplaw.Point{Stress: 90, Strain: 2e-3, Temperature: t0}
	assert.Equal(t, within.Rate(p).Value, law.Rate(p).Value, "at the reference temperature it is the law within")
}

// Common practice, a form that differs only by grouping: A exp(-Q/RT) is A' = A exp(-Q/RT₀) with the factor one at T₀.
func TestActivationGroupedWithThePrefactor(t *testing.T) {
	const q, t0 = 250e3, 800.0
	a := made(creeplaw.WithTemperature(made(creeplaw.NewNorton(1e3, 5)), made(creeplaw.NewArrhenius(q))))
	b := made(creeplaw.WithTemperature(made(creeplaw.NewNorton(1e3*math.Exp(-q/(creeplaw.GasConstant*t0)), 5)),
		made(creeplaw.NewArrheniusAt(q, t0))))
	for _, kelvin := range []float64{400, 800, 1300} {
		p := creeplaw.Point{Stress: 60, Strain: 0.01, Temperature: kelvin}
		// The largest term is Q/RT = 75 at 400 K.
		check.Abs(t, fmt.Sprintf("%v K", kelvin), a.LogRate(p).Value, b.LogRate(p).Value, 8*75*epsilon)
		check.Rel(t, fmt.Sprintf("%v K", kelvin), a.Rate(p).Value, b.Rate(p).Value, 16*75*epsilon)
	}
}

// Zero stress, zero strain and the limits are those of the law within.
func TestThermalSpecialValues(t *testing.T) {
	inf, nan := math.Inf(1), math.NaN()
	factor := made(creeplaw.NewArrheniusAt(250e3, 800))
	f900 := math.Exp(250e3 / creeplaw.GasConstant * (1/800.0 - 1/900.0))
	viscous := made(creeplaw.WithTemperature(made(creeplaw.NewNorton(2e-9, 1)), factor))
	r := viscous.Rate(creeplaw.Point{Temperature: 900})
	check.Rel(t, "slope at zero stress", r.ByStress, 2e-9*f900, 16*epsilon)
	r.ByStress = 0
	assert.Equal(t, creeplaw.Rate{}, r)

	steady := made(creeplaw.WithTemperature(made(creeplaw.NewNorton(2e-9, 5)), factor))
	virgin := steady.Rate(creeplaw.Point{Stress: 50, Temperature: 900})
	assert.Equal(t, steady.Rate(creeplaw.Point{Stress: 50, Strain: 0.1, Temperature: 900}), virgin, "strain does not enter")

	for name, primary := range map[string]creeplaw.Thermal{
		"activated": made(creeplaw.WithTemperature(made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4)), factor)),
		"zero":      made(creeplaw.WithTemperature(made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4)), creeplaw.Arrhenius{})),
	} {
		assert.Equal(t, creeplaw.Rate{}, primary.Rate(creeplaw.Point{Temperature: 900}), name)
		start := primary.Rate(creeplaw.Point{Stress: 50, Temperature: 900})
		assert.Equal(t, [3]float64{inf, inf, -inf}, [3]float64{start.Value, start.ByStress, start.ByStrain}, name)
		assert.False(t, math.IsNaN(start.ByTemperature), name)
		assert.Equal(t, inf, primary.LogRate(creeplaw.Point{Stress: 50, Temperature: 900}).Value, name)
		for _, bad := range []float64{0, -5, nan} {
			for _, p := range []creeplaw.Point{{}, {Stress: 50}, {Stress: 50, Strain: 0.1}, {Strain: 0.1}} {
				p.Temperature = bad
				undefinedAt(t, primary, p)
			}
		}
		undefinedAt(t, primary, creeplaw.Point{Stress: -1, Strain: 0.1, Temperature: 900},
			creeplaw.Point{Stress: nan, Strain: 0.1, Temperature: 900}, creeplaw.Point{Stress: 50, Strain: nan, Temperature: 900})
	}
}

// The factor, or the law within, may leave the range of a float64 where their product does not, and where the rate is zero or
// infinite no factor changes that.
func TestThermalBeyondTheRangeOfItsParts(t *testing.T) {
	const q, kelvin = 200e3, 30.0 // Q/RT = 802
	factor := made(creeplaw.NewArrhenius(q))
	large := made(creeplaw.NewNortonAt(1e300, 1, 10))
	law := made(creeplaw.WithTemperature(large, factor))
	for _, strain := range []float64{0, 0.1} {
		p := creeplaw.Point{Stress: 100, Strain: strain, Temperature: kelvin} // 1e320 · e^-802
		want := math.Exp(320*math.Ln10 - q/(creeplaw.GasConstant*kelvin))
		check.Rel(t, "product", law.Rate(p).Value, want, 4*802*epsilon)
	}
	primary := made(creeplaw.WithTemperature(made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4)), factor))
	assert.Equal(t, math.Inf(1), primary.Rate(creeplaw.Point{Stress: 100, Temperature: kelvin}).Value, "zero strain, frozen")
	hot := made(creeplaw.WithTemperature(large, made(creeplaw.NewArrheniusAt(3e6, 300)))) // e^842 at 1000 K
	assert.Equal(t, creeplaw.Rate{}, hot.Rate(creeplaw.Point{Temperature: 1000}), "zero stress, whatever the factor")
}
