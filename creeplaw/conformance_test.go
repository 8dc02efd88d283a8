package creeplaw_test

import (
	"flag"
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

var campaign = flag.Bool("campaign", false, "run the long random campaigns")

// made is for parameters that a test knows to be good.
func made[L any](law L, err error) L {
	if err != nil {
		panic(err)
	}
	return law
}

// wide is a box of ten decades of stress about 100 (MPa), nearly eight of creep strain and any temperature of metals.
func wide() lawtest.Box {
	return lawtest.Box{
		Claims: lawtest.Logarithmic,
		Stress: lawtest.Range{1e-3, 1e7}, Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{300, 1500},
	}
}

// representable narrows the stress to where a plain rate of about 1e-6 at 100, of this exponent of stress, is a float64
// together with its derivatives by σ and p. The logarithm is examined over ten decades and more all the same.
func representable(exponent float64) lawtest.Box {
	b := wide()
	half := math.Pow(10, math.Min(5, 120/exponent))
	b.Stress = lawtest.Range{100 / half, 100 * half}
	b.LogStress = lawtest.Range{1e-8, 1e8}
	return b
}

func conform(t *testing.T, name string, law creeplaw.Law, box lawtest.Box) {
	t.Helper()
	if box.Points == 0 {
		box.Points = 300
	}
	if *campaign {
		box.Points *= 50
	}
	t.Run(name, func(t *testing.T) {
		for _, r := range lawtest.Run(t, law, box) {
			assert.Positive(t, r.Checks, r.Rule)
		}
	})
}

func TestNortonConforms(t *testing.T) {
	for _, n := range []float64{0.5, 1, 1.5, 3, 5, 10.147, 20, 50} {
		conform(t, fmt.Sprintf("At, n %v", n), made(creeplaw.NewNortonAt(1e-6, 100, n)), wide())
	}
	conform(t, "prefactor", made(creeplaw.NewNorton(1e-15, 5)), wide())
	conform(t, "prefactor in Pa", made(creeplaw.NewNorton(1e-15*1e-30/3600, 5)), lawtest.Box{Claims: lawtest.Logarithmic,
		Stress: lawtest.Range{1e3, 1e13}, Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{300, 1500}})
}

func TestGarofaloConforms(t *testing.T) {
	for _, n := range []float64{0.5, 1, 2, 6.41, 50} {
		box := wide()
		box.Stress[1] = 1e3 * math.Min(10, 10/n) // B σ n up to 600: an exponential leaves the float64 soon afterwards
		box.LogStress = lawtest.Range{1e-8, 1e8}
		conform(t, fmt.Sprintf("n %v", n), made(creeplaw.NewGarofalo(1e-9, 0.05, n)), box)
	}
}

func TestBaileyNortonConforms(t *testing.T) {
	for _, c := range []struct{ n, m float64 }{{1, 1}, {5, 1}, {1, 0.5}, {5, 0.4}, {3, 0.1}, {20, 0.3}, {50, 0.05}} {
		law := made(creeplaw.NewBaileyNortonAt(1e-3, 100, 100, c.n, c.m))
		box := representable(c.n / c.m)
		if c.m < 0.1 {
			box.Strain[0] = 1e-6 // (m-1)/m = -19
		}
		conform(t, fmt.Sprintf("n %v m %v", c.n, c.m), law, box)
	}
	conform(t, "prefactor", made(creeplaw.NewBaileyNorton(1e-15, 5, 0.4)), representable(12.5))
}

func TestStrainHardeningConforms(t *testing.T) {
	for _, c := range []struct{ n, k float64 }{{1, 0}, {5, 0}, {1, -1}, {0.5, -0.3}, {5, -2}, {20, -10}, {50, -0.01}} {
		law := made(creeplaw.NewStrainHardeningAt(1e-6, 100, 1e-3, c.n, c.k))
		conform(t, fmt.Sprintf("n %v k %v", c.n, c.k), law, representable(c.n))
	}
	conform(t, "prefactor", made(creeplaw.NewStrainHardening(1e-18, 4, -1.5)), representable(4))
}

func TestThermalConforms(t *testing.T) {
	factor := made(creeplaw.NewArrheniusAt(300e3, 800))
	none := made(creeplaw.NewArrhenius(0))
	primary := made(creeplaw.NewBaileyNortonAt(1e-3, 100, 100, 5, 0.4))
	for name, law := range map[string]creeplaw.Law{
		"Norton":                        made(creeplaw.WithTemperature(made(creeplaw.NewNortonAt(1e-6, 100, 5)), factor)),
		"primary":                       made(creeplaw.WithTemperature(primary, factor)),
		"no activation, infinite start": made(creeplaw.WithTemperature(primary, none)),
		"zero factor":                   made(creeplaw.WithTemperature(primary, creeplaw.Arrhenius{})),
		"twice":                         made(creeplaw.WithTemperature(made(creeplaw.WithTemperature(primary, factor)), factor)),
	} {
		conform(t, name, law, representable(12.5))
	}
	cold := representable(5) // Q/RT of 1800: the factor underflows, the logarithm does not
	cold.Temperature, cold.Stress = lawtest.Range{20, 40}, lawtest.Range{10, 1e3}
	hardened := made(creeplaw.NewStrainHardeningAt(1e300, 100, 1e-3, 5, -1))
	conform(t, "factor beyond a float64", made(creeplaw.WithTemperature(hardened, made(creeplaw.NewArrhenius(200e3)))), cold)
}

func TestSumConforms(t *testing.T) {
	steady := made(creeplaw.NewNortonAt(1e-6, 100, 5))
	viscous := made(creeplaw.NewNortonAt(1e-8, 100, 1))
	steep := made(creeplaw.NewNortonAt(1e-6, 100, 50))
	primary := made(creeplaw.NewBaileyNortonAt(1e-3, 100, 100, 5, 0.4))
	sinh := made(creeplaw.NewGarofalo(1e-9, 0.05, 1))
	warm := made(creeplaw.WithTemperature(steady, made(creeplaw.NewArrheniusAt(300e3, 800))))
	for name, law := range map[string]creeplaw.Law{
		"one":                   made(creeplaw.NewSum(steady)),
		"primary and secondary": made(creeplaw.NewSum(primary, steady)),
		"two mechanisms":        made(creeplaw.NewSum(viscous, warm)),
		"in the other order":    made(creeplaw.NewSum(warm, primary, viscous)), // the larger one may come last
		"of sums":               made(creeplaw.NewSum(made(creeplaw.NewSum(primary, viscous)), warm)),
	} {
		conform(t, name, law, representable(12.5))
	}
	conform(t, "one leaves the range of a float64 first", made(creeplaw.NewSum(viscous, steep)), wide())
	box := wide()
	box.Stress[1], box.LogStress = 1e4, lawtest.Range{1e-8, 1e8}
	conform(t, "power and exponential", made(creeplaw.NewSum(viscous, sinh)), box)
}

// square is ṗ = c σ², written as users write it.
func square(p creeplaw.Point) creeplaw.Rate {
	return creeplaw.Rate{Value: 1e-10 * p.Stress * p.Stress, ByStress: 2e-10 * p.Stress}
}

// primaryOnly is ṗ = c σ³ p^-½ without derivatives, temperature by way of Q/R = 30000 K.
func primaryOnly(p creeplaw.Point) float64 {
	if p.Stress == 0 {
		return 0
	}
	return 1e-2 * p.Stress * p.Stress * p.Stress / math.Sqrt(p.Strain) * math.Exp(-3e4/p.Temperature)
}

func TestFunctionsConform(t *testing.T) {
	plain := wide()
	plain.Claims = lawtest.RateOnly
	conform(t, "RateFunc", creeplaw.RateFunc(square), plain)
	plain.Points = 200 // differences of differences
	conform(t, "ValueFunc", creeplaw.ValueFunc(primaryOnly), plain)

	adapted := wide()
	adapted.LogStress = adapted.Stress // the adapter reaches as far as the plain rate
	conform(t, "Log of RateFunc", creeplaw.Log(creeplaw.RateFunc(square)), adapted)
	adapted.Points = 200
	conform(t, "Log of ValueFunc", creeplaw.Log(creeplaw.ValueFunc(primaryOnly)), adapted)
	conform(t, "ValueFunc with temperature and company", made(creeplaw.NewSum(creeplaw.RateFunc(square),
		made(creeplaw.WithTemperature(creeplaw.ValueFunc(primaryOnly), made(creeplaw.NewArrheniusAt(1e5, 800)))))), adapted)
}
