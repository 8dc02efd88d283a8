package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

// Norton's law at three temperatures, invented numbers: the exponent falls as the temperature rises.
var (
	tableTemperatures = []float64{773.15, 823.15, 923.15}
	tableRates        = []float64{2e-9, 4e-8, 5e-6} // at 100 MPa [1/h]
	tableExponents    = []float64{9, 7.5, 5}
)

func tabulatedNorton(t *testing.T, options creeplaw.TableOptions) creeplaw.Tabulated {
	t.Helper()
	laws := make([]creeplaw.Law, len(tableRates))
	for i := range laws {
		laws[i] = must(creeplaw.NewNortonAt(tableRates[i], 100, tableExponents[i]))
	}
	return must(creeplaw.NewTabulated(tableTemperatures, laws, options))
}

// Between two temperatures the rate is on a straight line of its logarithm against 1/T, drawn here by hand.
func TestTabulatedInterpolatesTheLogarithm(t *testing.T) {
	for _, options := range []creeplaw.TableOptions{{}, {Against: creeplaw.PlainTemperature}} {
		law := tabulatedNorton(t, options)
		abscissa := func(x float64) float64 { return 1 / x }
		slopeOf := func(x float64) float64 { return -1 / (x * x) }
		if options.Against == creeplaw.PlainTemperature {
			abscissa, slopeOf = func(x float64) float64 { return x }, func(float64) float64 { return 1 }
		}
		for _, row := range []struct {
			temperature float64
			i           int
		}{{780, 0}, {823, 0}, {823.15, 1}, {824, 1}, {900, 1}, {923.15, 1}} {
			x0, x1 := abscissa(tableTemperatures[row.i]), abscissa(tableTemperatures[row.i+1])
			w := (abscissa(row.temperature) - x0) / (x1 - x0)
			for _, s := range []float64{1e-3, 40, 100, 350} {
				a := math.Log(tableRates[row.i]) + tableExponents[row.i]*math.Log(s/100)
				b := math.Log(tableRates[row.i+1]) + tableExponents[row.i+1]*math.Log(s/100)
				n := tableExponents[row.i] + w*(tableExponents[row.i+1]-tableExponents[row.i])
				label := fmt.Sprintf("%v K, %v MPa, %v", row.temperature, s, options)
				l := law.LogRate(creeplaw.Point{Stress: s, Temperature: row.temperature})
				// The weight by hand cancels (1/T - 1/Tᵢ): a few hundred roundings.
				const byHand = 1e-13
				check.Scaled(t, label, l.Value, a+w*(b-a), math.Abs(a)+math.Abs(b), byHand)
				check.Scaled(t, label+": exponent", l.ByLogStress, n, 10, byHand)
				byT := (b - a) / (x1 - x0) * slopeOf(row.temperature) * row.temperature
				check.Scaled(t, label+": by temperature", l.ByLogTemperature, byT, math.Abs(byT), byHand)
			}
		}
	}
}

func TestTabulatedMeetsItsLawsExactly(t *testing.T) {
	for _, outside := range []creeplaw.OutsideTable{creeplaw.Undefined, creeplaw.Held, creeplaw.Extrapolated} {
		law := tabulatedNorton(t, creeplaw.TableOptions{Outside: outside})
		for i, temperature := range tableTemperatures {
			node := must(creeplaw.NewNortonAt(tableRates[i], 100, tableExponents[i]))
			for _, s := range []float64{0, 3, 100, 480} {
				p := creeplaw.Point{Stress: s, Strain: 0.01, Temperature: temperature}
				got, want := law.Rate(p), node.Rate(p)
				assert.Equal(t, want.Value, got.Value, "%v K, %v MPa", temperature, s)
				assert.Equal(t, want.ByStress, got.ByStress, "%v K, %v MPa", temperature, s)
			}
		}
	}
}

// S. Arrhenius 1889: with one activation energy the table is that law, between and, if asked, beyond its temperatures.
func TestTabulatedReproducesArrhenius(t *testing.T) {
	norton := must(creeplaw.NewNortonAt(1e-6, 100, 6))
	arrhenius := must(creeplaw.NewArrheniusAt(3.2e5, 800))
	exact := must(creeplaw.WithTemperature(norton, arrhenius))
	temperatures := []float64{750, 800, 900}
	laws := make([]creeplaw.Law, 3)
	factors := make([]float64, 3)
	for i, temperature := range temperatures {
		lnFactor, _ := arrhenius.LogFactor(temperature)
		factors[i] = math.Exp(lnFactor)
		laws[i] = must(creeplaw.NewNortonAt(1e-6*factors[i], 100, 6))
	}
	options := creeplaw.TableOptions{Outside: creeplaw.Extrapolated}
	tabulated := must(creeplaw.NewTabulated(temperatures, laws, options))
	byFactor := must(creeplaw.WithTemperature(norton, must(creeplaw.NewFactorTable(temperatures, factors, options))))
	for _, temperature := range []float64{500, 749, 760, 800, 850, 901, 1500} {
		p := creeplaw.Point{Stress: 60, Strain: 0.01, Temperature: temperature}
		want := exact.Rate(p)
		for name, law := range map[string]creeplaw.Law{"laws": tabulated, "factors": byFactor} {
			got := law.Rate(p)
			// ln of the factors is kept to rounding; far outside an error in it is magnified some ten times.
			check.Rel(t, fmt.Sprintf("%s at %v K", name, temperature), got.Value, want.Value, 1e-12)
			check.Rel(t, fmt.Sprintf("%s at %v K: by temperature", name, temperature), got.ByTemperature, want.ByTemperature, 1e-12)
		}
	}
}

func TestOutsideTheTable(t *testing.T) {
	undefined := tabulatedNorton(t, creeplaw.TableOptions{})
	held := tabulatedNorton(t, creeplaw.TableOptions{Outside: creeplaw.Held})
	for _, row := range []struct{ outside, end float64 }{{700, 773.15}, {1000, 923.15}} {
		p := creeplaw.Point{Stress: 80, Strain: 0.01, Temperature: row.outside}
		assert.True(t, math.IsNaN(undefined.Rate(p).Value))
		assert.True(t, math.IsNaN(undefined.LogRate(p).Value))
		err := undefined.CheckPoint(p)
		checkOutside(t, err, "temperature", row.outside)
		assert.ErrorContains(t, err, "773.15 … 923.15")

		atEnd := p
		atEnd.Temperature = row.end
		assert.Equal(t, undefined.Rate(atEnd).Value, held.Rate(p).Value)
		assert.Zero(t, held.Rate(p).ByTemperature)
		assert.NoError(t, held.CheckPoint(p))
	}
	assert.NoError(t, undefined.CheckPoint(creeplaw.Point{Stress: 80, Temperature: 800}))
	checkOutside(t, held.CheckPoint(creeplaw.Point{Stress: 80, Temperature: -1}), "temperature", -1)
	checkOutside(t, undefined.CheckPoint(creeplaw.Point{Stress: -2, Temperature: 800}), "stress", -2)

	factor := must(creeplaw.NewFactorTable([]float64{800, 900}, []float64{1, 5}, creeplaw.TableOptions{}))
	value, slope := factor.LogFactor(799)
	assert.True(t, math.IsNaN(value) && math.IsNaN(slope))
	law := must(creeplaw.WithTemperature(must(creeplaw.NewNorton(1, 3)), factor))
	checkOutside(t, law.CheckPoint(creeplaw.Point{Stress: 1, Temperature: 799}), "temperature", 799)
	sum := must(creeplaw.NewSum(must(creeplaw.NewNorton(1, 3)), law))
	checkOutside(t, sum.CheckPoint(creeplaw.Point{Stress: 1, Temperature: 799}), "temperature", 799)
}

func TestTabulatedAtZeroStress(t *testing.T) {
	temperatures := []float64{800, 900}
	middle := 2 / (1.0/800 + 1.0/900) // half-way in 1/T
	for _, row := range []struct{ n1, n2, slope float64 }{
		{1, 1, math.Sqrt(2e-5 * 8e-3)}, // the geometric mean of the slopes
		{1, 3, 0}, {0.5, 1, math.Inf(1)}, {0.5, 1.2, math.Inf(1)}, {0.5, 3, 0},
	} {
		laws := []creeplaw.Law{must(creeplaw.NewNorton(2e-5, row.n1)), must(creeplaw.NewNorton(8e-3, row.n2))}
		law := must(creeplaw.NewTabulated(temperatures, laws, creeplaw.TableOptions{}))
		r := law.Rate(creeplaw.Point{Strain: 0.01, Temperature: middle})
		check.Rel(t, fmt.Sprintf("slope for %v and %v", row.n1, row.n2), r.ByStress, row.slope, plainTolerance)
		assert.Zero(t, r.Value)
		assert.Zero(t, r.ByTemperature)
	}
	creeping := []creeplaw.Law{must(creeplaw.NewExponential(1e-6, 10)), must(creeplaw.NewExponential(1e-4, 20))}
	r := must(creeplaw.NewTabulated(temperatures, creeping, creeplaw.TableOptions{})).Rate(creeplaw.Point{Temperature: middle})
	check.Rel(t, "rate", r.Value, 1e-5, plainTolerance)
	check.Rel(t, "slope", r.ByStress, 1e-5*(0.5/10+0.5/20), plainTolerance)
}

func TestTabulatedAtZeroStrain(t *testing.T) {
	temperatures := []float64{800, 900}
	hardening := must(creeplaw.NewBaileyNorton(1e-12, 4, 0.4))
	steady := must(creeplaw.NewNorton(1e-10, 3))
	p := creeplaw.Point{Stress: 80, Temperature: 850}
	for _, laws := range [][]creeplaw.Law{{hardening, hardening}, {steady, hardening}, {hardening, steady}} {
		law := must(creeplaw.NewTabulated(temperatures, laws, creeplaw.TableOptions{}))
		r := law.Rate(p)
		assert.True(t, math.IsInf(r.Value, 1) && math.IsInf(r.ByStress, 1) && math.IsInf(r.ByStrain, -1), "%+v", r)
		assert.False(t, math.IsNaN(r.ByTemperature))
		assert.True(t, math.IsInf(law.LogRate(p).Value, 1))
	}
}

func TestTabulatedWithoutCreepAtOneTemperature(t *testing.T) {
	creeps := must(creeplaw.NewNorton(1e-10, 3))
	stops := must(creeplaw.WithThreshold(creeps, 100))
	law := must(creeplaw.NewTabulated([]float64{800, 900}, []creeplaw.Law{stops, creeps}, creeplaw.TableOptions{}))
	p := creeplaw.Point{Stress: 80, Strain: 0.01, Temperature: 899}
	assert.Equal(t, 0.0, law.Rate(p).Value)
	p.Temperature = 900
	assert.Equal(t, creeps.Rate(p).Value, law.Rate(p).Value)
	assert.Equal(t, 0.0, law.Rate(p).ByTemperature)
}

func TestTablesConform(t *testing.T) {
	// Inside, the kinks at tabulated temperatures are left to the kit, which passes over them.
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1, 1000},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{773.15, 923.15}}
	lawtest.Run(t, tabulatedNorton(t, creeplaw.TableOptions{}), box)
	lawtest.Run(t, tabulatedNorton(t, creeplaw.TableOptions{Against: creeplaw.PlainTemperature}), box)
	hardening := []creeplaw.Law{must(creeplaw.NewBaileyNorton(1e-12, 4, 0.4)), must(creeplaw.NewBaileyNorton(3e-11, 4, 0.3))}
	box.Temperature = lawtest.Range{700, 1000}
	lawtest.Run(t, must(creeplaw.NewTabulated([]float64{800, 900}, hardening, creeplaw.TableOptions{Outside: creeplaw.Extrapolated})), box)
	factor := must(creeplaw.NewFactorTable([]float64{800, 850, 900}, []float64{1, 4, 20}, creeplaw.TableOptions{}))
	box.Temperature = lawtest.Range{800, 900}
	lawtest.Run(t, must(creeplaw.WithTemperature(must(creeplaw.NewGarofalo(1e-9, 0.02, 5)), factor)),
		lawtest.Box{Claims: box.Claims, Stress: lawtest.Range{0.1, 1000}, Strain: box.Strain, Temperature: box.Temperature,
			LogStress: lawtest.Range{1e-9, 1e7}})
}

func TestTablesRefuseBadData(t *testing.T) {
	good := must(creeplaw.NewNorton(1, 3))
	tabulated := func(temperatures []float64, laws ...creeplaw.Law) error {
		return last(creeplaw.NewTabulated(temperatures, laws, creeplaw.TableOptions{}))
	}
	factors := func(temperatures, values []float64) error {
		return last(creeplaw.NewFactorTable(temperatures, values, creeplaw.TableOptions{}))
	}
	at := func(temperature float64) []float64 { return []float64{temperature, 900} }
	checkRefused(t, []refused{
		{"temperature", func(x float64) error { return tabulated(at(x), good, good) }, notPositive},
		{"temperature", func(x float64) error { return tabulated([]float64{900, x}, good, good) }, []float64{900, 800}},
		{"temperature", func(x float64) error { return factors(at(x), []float64{1, 2}) }, notPositive},
		{"factor", func(x float64) error { return factors(at(800), []float64{1, x}) }, notPositive},
		{"abscissa", func(x float64) error {
			return last(creeplaw.NewFactorTable(at(800), at(1), creeplaw.TableOptions{Against: creeplaw.Abscissa(x)}))
		}, []float64{-1, 2}},
		{"choice outside the table", func(x float64) error {
			return last(creeplaw.NewFactorTable(at(800), at(1), creeplaw.TableOptions{Outside: creeplaw.OutsideTable(x)}))
		}, []float64{-1, 3}},
	})
	for _, err := range []error{tabulated(nil), tabulated(at(800), good), tabulated([]float64{800}, good),
		factors(at(800), []float64{1}), factors(nil, nil)} {
		var p *creeplaw.ParameterError
		if assert.ErrorAs(t, err, &p) {
			assert.Equal(t, "number of temperatures", p.Parameter)
		}
	}
	checkMissing(t, tabulated(at(800), good, nil), "law")
}

func TestTablesKeepTheirOwnData(t *testing.T) {
	temperatures, values := []float64{800, 900}, []float64{1, 2}
	laws := []creeplaw.Law{must(creeplaw.NewNorton(1, 3)), must(creeplaw.NewNorton(2, 3))}
	factor := must(creeplaw.NewFactorTable(temperatures, values, creeplaw.TableOptions{}))
	law := must(creeplaw.NewTabulated(temperatures, laws, creeplaw.TableOptions{}))
	p := creeplaw.Point{Stress: 2, Temperature: 850}
	before, _ := factor.LogFactor(850)
	rate := law.Rate(p)
	temperatures[0], values[1], laws[0] = 1, 7, nil
	after, _ := factor.LogFactor(850)
	assert.Equal(t, before, after)
	assert.Equal(t, rate, law.Rate(p))
}

// Norton's law measured at two temperatures; between them the rate follows an activation energy (invented numbers).
func ExampleNewTabulated() {
	cold, err := creeplaw.NewNortonAt(1e-8, 100, 8)
	if err != nil {
		fmt.Println(err)
		return
	}
	hot, err := creeplaw.NewNortonAt(1e-5, 100, 6)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := creeplaw.NewTabulated([]float64{800, 900}, []creeplaw.Law{cold, hot}, creeplaw.TableOptions{})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, temperature := range []float64{800, 850, 900, 950} {
		p := creeplaw.Point{Stress: 100, Temperature: temperature}
		fmt.Printf("%v K: %.1e /h, exponent %.2f\n", temperature, law.Rate(p).Value, law.LogRate(p).ByLogStress)
	}
	fmt.Println(law.CheckPoint(creeplaw.Point{Stress: 100, Temperature: 950}))
	// Output:
	// 800 K: 1.0e-08 /h, exponent 8.00
	// 850 K: 3.9e-07 /h, exponent 6.94
	// 900 K: 1.0e-05 /h, exponent 6.00
	// 950 K: NaN /h, exponent NaN
	// creeplaw: tabulated law: the temperature 950 is outside 800 … 900
}

// A rate that grows as measured between three temperatures, held at the last above it (invented numbers).
func ExampleNewFactorTable() {
	factor, err := creeplaw.NewFactorTable([]float64{800, 850, 900}, []float64{1, 6, 30},
		creeplaw.TableOptions{Outside: creeplaw.Held})
	if err != nil {
		fmt.Println(err)
		return
	}
	norton, err := creeplaw.NewNortonAt(1e-7, 100, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := creeplaw.WithTemperature(norton, factor)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, temperature := range []float64{825, 850, 1000} {
		fmt.Printf("%v K: %.2e /h\n", temperature, law.Rate(creeplaw.Point{Stress: 100, Temperature: temperature}).Value)
	}
	// Output:
	// 825 K: 2.52e-07 /h
	// 850 K: 6.00e-07 /h
	// 1000 K: 3.00e-06 /h
}
