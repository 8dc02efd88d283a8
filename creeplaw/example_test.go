package creeplaw_test

import (
	"errors"
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// The numbers of these examples are invented.

func ExampleNewNorton() {
	law, err := creeplaw.NewNorton(1e-15, 5) // MPa, h
	if err != nil {
		fmt.Println(err)
		return
	}
	r := law.Rate(creeplaw.Point{Stress: 100})
	fmt.Printf("%.2e per hour, rising by %.2e per MPa\n", r.Value, r.ByStress)
	// Output: 1.00e-05 per hour, rising by 5.00e-07 per MPa
}

// A rate measured at one stress serves where the prefactor itself would be out of range, here 1e-406 Pa⁻⁵⁰/s.
func ExampleNewNortonAt() {
	law, err := creeplaw.NewNortonAt(1e-6, 100e6, 50)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.3g\n", law.Rate(creeplaw.Point{Stress: 105e6}).Value)
	// Output: 1.15e-05
}

func ExampleNewGarofalo() {
	law, err := creeplaw.NewGarofalo(1e-9, 0.05, 3)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{1, 20, 200} {
		fmt.Printf("at %g MPa the local stress exponent is %.1f\n", stress, law.LogRate(creeplaw.Point{Stress: stress}).ByLogStress)
	}
	// Output:
	// at 1 MPa the local stress exponent is 3.0
	// at 20 MPa the local stress exponent is 3.9
	// at 200 MPa the local stress exponent is 30.0
}

// The law remembers the strain reached, not the time: after 1000 h at 100 MPa the rate is that of the curve there.
func ExampleNewBaileyNorton() {
	const a, n, m = 1e-12, 4.0, 0.4
	law, err := creeplaw.NewBaileyNorton(a, n, m)
	if err != nil {
		fmt.Println(err)
		return
	}
	strain := a * math.Pow(100, n) * math.Pow(1000, m)
	fmt.Printf("strain %.3e, rate %.3e per hour\n", strain, law.Rate(creeplaw.Point{Stress: 100, Strain: strain}).Value)
	fmt.Printf("from virgin material %v\n", law.Rate(creeplaw.Point{Stress: 100}).Value)
	// Output:
	// strain 1.585e-03, rate 6.340e-07 per hour
	// from virgin material +Inf
}

// The curve is known by one point: a strain of 0.2 % after 1000 h at 120 MPa.
func ExampleNewBaileyNortonAt() {
	law, err := creeplaw.NewBaileyNortonAt(2e-3, 120, 1000, 6, 0.35)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.2e per hour\n", law.Rate(creeplaw.Point{Stress: 120, Strain: 2e-3}).Value)
	// Output: 7.00e-07 per hour
}

func ExampleNewStrainHardening() {
	law, err := creeplaw.NewStrainHardening(1e-18, 4, -1.5)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, strain := range []float64{1e-4, 1e-3, 1e-2} {
		fmt.Printf("%.1e ", law.Rate(creeplaw.Point{Stress: 100, Strain: strain}).Value)
	}
	// Output: 1.0e-04 3.2e-06 1.0e-07
}

func ExampleNewStrainHardeningAt() {
	law, err := creeplaw.NewStrainHardeningAt(1e-6, 100, 1e-3, 5, -2)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.2e\n", law.Rate(creeplaw.Point{Stress: 100, Strain: 2e-3}).Value)
	// Output: 2.50e-07
}

// A law measured at 550 °C, carried to 575 °C with an activation energy of 300 kJ/mol.
func ExampleWithTemperature() {
	norton, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	factor, err := creeplaw.NewArrheniusAt(300e3, 823.15)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := creeplaw.WithTemperature(norton, factor)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, celsius := range []float64{550, 575} {
		fmt.Printf("%g °C: %.2e per hour\n", celsius, law.Rate(creeplaw.Point{Stress: 100, Temperature: celsius + 273.15}).Value)
	}
	// Output:
	// 550 °C: 1.00e-06 per hour
	// 575 °C: 3.64e-06 per hour
}

func ExampleNewArrhenius() {
	factor, err := creeplaw.NewArrhenius(54e3)
	if err != nil {
		fmt.Println(err)
		return
	}
	logFactor, byLogTemperature := factor.LogFactor(295.15)
	fmt.Printf("factor %.2e, exponent of temperature %.1f\n", math.Exp(logFactor), byLogTemperature)
	// Output: factor 2.78e-10, exponent of temperature 22.0
}

// Diffusional creep at low stress and dislocation creep at high stress, in parallel.
func ExampleNewSum() {
	diffusion, err := creeplaw.NewNorton(2e-9, 1)
	if err != nil {
		fmt.Println(err)
		return
	}
	dislocation, err := creeplaw.NewNorton(1e-15, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := creeplaw.NewSum(diffusion, dislocation)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, stress := range []float64{1, 37.6, 300} {
		fmt.Printf("%.2f ", law.LogRate(creeplaw.Point{Stress: stress}).ByLogStress)
	}
	// Output: 1.00 3.00 5.00
}

// A user's own function with its derivatives.
func ExampleRateFunc() {
	law := creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate {
		return creeplaw.Rate{Value: 1e-10 * p.Stress * p.Stress, ByStress: 2e-10 * p.Stress}
	})
	fmt.Printf("%.1e\n", law.Rate(creeplaw.Point{Stress: 100}).ByStress)
	// Output: 2.0e-08
}

// A user's own function without derivatives.
func ExampleValueFunc() {
	law := creeplaw.ValueFunc(func(p creeplaw.Point) float64 { return 1e-10 * p.Stress * p.Stress })
	fmt.Printf("%.1e\n", law.Rate(creeplaw.Point{Stress: 100}).ByStress)
	// Output: 2.0e-08
}

func ExampleLog() {
	law := creeplaw.Log(creeplaw.ValueFunc(func(p creeplaw.Point) float64 { return 1e-10 * p.Stress * p.Stress }))
	l := law.LogRate(creeplaw.Point{Stress: 100})
	fmt.Printf("ln rate %.2f, stress exponent %.2f\n", l.Value, l.ByLogStress)
	// Output: ln rate -13.82, stress exponent 2.00
}

// A logarithm goes where a rate cannot: here ṗ = 1e-406.
func ExampleLogarithmic() {
	var law creeplaw.Logarithmic
	law, err := creeplaw.NewNortonAt(1e-6, 100, 50)
	if err != nil {
		fmt.Println(err)
		return
	}
	p := creeplaw.Point{Stress: 1e-6}
	fmt.Printf("rate %v, decimal logarithm %.0f\n", law.Rate(p).Value, law.LogRate(p).Value/math.Ln10)
	// Output: rate 0, decimal logarithm -406
}

func ExampleParameterError() {
	_, err := creeplaw.NewBaileyNorton(1e-12, 4, 1.4)
	var p *creeplaw.ParameterError
	if errors.As(err, &p) {
		fmt.Println(p.Parameter, "=", p.Value)
	}
	fmt.Println(err)
	// Output:
	// time exponent = 1.4
	// creeplaw: Bailey–Norton: time exponent is 1.4, must be above 0 and at most 1
}

// tested is a user's law with a limited domain: it was tested up to 900 K and says so.
type tested struct{ creeplaw.Law }

func (l tested) Rate(p creeplaw.Point) creeplaw.Rate {
	if !(p.Temperature <= 900) { // no error is made here: Rate must not allocate
		return creeplaw.Rate{Value: math.NaN()}
	}
	return l.Law.Rate(p)
}

func (l tested) CheckPoint(p creeplaw.Point) error {
	if p.Temperature <= 900 {
		return nil
	}
	return fmt.Errorf("tested up to 900 K, asked for %g K", p.Temperature)
}

func ExampleExplainer() {
	norton, err := creeplaw.NewNorton(1e-15, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	var law creeplaw.Explainer = tested{norton}
	fmt.Println(law.CheckPoint(creeplaw.Point{Stress: 100, Temperature: 950}))
	// Output: tested up to 900 K, asked for 950 K
}
