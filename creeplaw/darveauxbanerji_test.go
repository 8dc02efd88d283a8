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

// solderLike has invented numbers of the size of a tin–lead solder's.
func solderLike() creeplaw.ModulusSinh {
	return creeplaw.ModulusSinh{
		Prefactor: 900, Exponent: 3.2, ActivationEnergy: 5e4,
		Modulus:     creeplaw.ShearModulus{Value: 200, Reference: 300, Slope: -1},
		StressScale: creeplaw.ShearModulus{Value: 15, Reference: 300, Slope: -0.07},
	}
}

func TestDarveauxBanerjiIsItsFormula(t *testing.T) {
	law := must(creeplaw.NewDarveauxBanerji(solderLike()))
	for _, temperature := range []float64{200, 300, 420} {
		for _, s := range []float64{1e-3, 1, 20, 900} {
			want := 900 * (500 - temperature) / temperature * math.Pow(math.Sinh(s/(36-0.07*temperature)), 3.2) *
				math.Exp(-5e4/(8.314462618*temperature))
			p := creeplaw.Point{Stress: s, Strain: 0.01, Temperature: temperature}
			check.Rel(t, fmt.Sprintf("%v MPa, %v K", s, temperature), law.Rate(p).Value, want, plainTolerance)
		}
	}
}

func TestDarveauxBanerjiInItsLimits(t *testing.T) {
	law := must(creeplaw.NewDarveauxBanerji(solderLike()))
	rest := math.Log(900*200.0/300) - 5e4/(8.314462618*300)
	// Power law far below s = 15, exponential far above.
	checkLog(t, "1e-200", law.LogRate(creeplaw.Point{Stress: 15e-200, Temperature: 300}), rest-640*math.Ln10, 3.2)
	checkLog(t, "1e6", law.LogRate(creeplaw.Point{Stress: 15e6, Temperature: 300}), rest+3.2*(1e6-math.Ln2), 3.2e6)
	for _, row := range []struct{ n, slope float64 }{{1, math.Exp(rest) / 15}, {2, 0}, {0.5, math.Inf(1)}} {
		c := solderLike()
		c.Exponent = row.n
		r := must(creeplaw.NewDarveauxBanerji(c)).Rate(creeplaw.Point{Temperature: 300})
		check.Rel(t, fmt.Sprintf("slope for n = %v", row.n), r.ByStress, row.slope, plainTolerance)
		assert.Zero(t, r.Value)
	}
}

func TestDarveauxBanerjiExplains(t *testing.T) {
	law := must(creeplaw.NewDarveauxBanerji(solderLike()))
	for _, temperature := range []float64{501, 0, math.NaN()} {
		p := creeplaw.Point{Stress: 1, Temperature: temperature}
		assert.True(t, math.IsNaN(law.Rate(p).Value))
		checkOutside(t, law.CheckPoint(p), "temperature", temperature)
	}
	checkOutside(t, law.CheckPoint(creeplaw.Point{Stress: -1, Temperature: 300}), "stress", -1)
	assert.NoError(t, law.CheckPoint(creeplaw.Point{Stress: 1, Temperature: 499}))
}

func TestDarveauxBanerjiConforms(t *testing.T) {
	lawtest.Run(t, must(creeplaw.NewDarveauxBanerji(solderLike())), lawtest.Box{
		Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1e-3, 300}, Strain: lawtest.Range{1e-8, 0.5},
		Temperature: lawtest.Range{220, 450}, LogStress: logRangeOfExponentials})
}

func TestDarveauxBanerjiRefusesBadParameters(t *testing.T) {
	with := func(set func(*creeplaw.ModulusSinh, float64)) func(float64) error {
		return func(x float64) error {
			c := solderLike()
			set(&c, x)
			return last(creeplaw.NewDarveauxBanerji(c))
		}
	}
	checkRefused(t, []refused{
		{"prefactor", with(func(c *creeplaw.ModulusSinh, x float64) { c.Prefactor = x }), notPositive},
		{"exponent", with(func(c *creeplaw.ModulusSinh, x float64) { c.Exponent = x }), notPositive},
		{"activation energy", with(func(c *creeplaw.ModulusSinh, x float64) { c.ActivationEnergy = x }), negative},
		{"modulus", with(func(c *creeplaw.ModulusSinh, x float64) { c.Modulus.Value = x }), notPositive},
		{"slope of the modulus", with(func(c *creeplaw.ModulusSinh, x float64) { c.Modulus.Slope = x }), negative[1:]},
		{"stress scale", with(func(c *creeplaw.ModulusSinh, x float64) { c.StressScale.Value = x }), notPositive},
		{"reference temperature of the stress scale",
			with(func(c *creeplaw.ModulusSinh, x float64) { c.StressScale.Reference = x }), notPositive},
	})
}

// A solder at room temperature and in a hot engine bay (invented numbers).
func ExampleNewDarveauxBanerji() {
	law, err := creeplaw.NewDarveauxBanerji(creeplaw.ModulusSinh{
		Prefactor: 900, Exponent: 3.2, ActivationEnergy: 50e3,
		Modulus:     creeplaw.ShearModulus{Value: 200, Reference: 300, Slope: -1},
		StressScale: creeplaw.ShearModulus{Value: 15, Reference: 300, Slope: -0.07},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, temperature := range []float64{298, 398} {
		p := creeplaw.Point{Stress: 10, Temperature: temperature}
		fmt.Printf("%v K: %.1e /s\n", temperature, law.Rate(p).Value)
	}
	// Output:
	// 298 K: 3.5e-07 /s
	// 398 K: 2.6e-04 /s
}
