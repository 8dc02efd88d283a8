package curve_test

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// A published curve becomes a law. The numbers are invented.
func Example() {
	c, err := curve.NewAndrade(
		curve.Power{Prefactor: 2e-13, Exponent: 4},                         // MPa and h
		curve.Sinh{Prefactor: 1e-11, StressCoefficient: 0.03, Exponent: 3}, // 1/h
	)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := curve.NewStrainHardened(c)
	if err != nil {
		fmt.Println(err)
		return
	}
	at := c.At(curve.Point{Stress: 150, Time: 1000})
	fmt.Printf("after 1000 h: strain %.4g, rate %.4g /h\n", at.Value, at.ByTime)
	fmt.Printf("law there:    rate %.4g /h\n", law.Rate(creeplaw.Point{Stress: 150, Strain: at.Value}).Value)
	fmt.Printf("at 120 MPa:   rate %.4g /h\n", law.Rate(creeplaw.Point{Stress: 120, Strain: at.Value}).Value)
	// Output:
	// after 1000 h: strain 0.001924, rate 1.249e-06 /h
	// law there:    rate 1.249e-06 /h
	// at 120 MPa:   rate 8.406e-08 /h
}

// An equation that has no name here takes one call: a hyperbolic transient, faster when hot, beside a steady rate that any
// steady law of package creeplaw may give. The numbers are invented.
func ExampleNewSum() {
	factor, err := creeplaw.NewArrheniusAt(280e3, 823)
	if err != nil {
		fmt.Println(err)
		return
	}
	norton, err := creeplaw.NewNorton(1e-17, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	steady, err := creeplaw.WithTemperature(norton, factor)
	if err != nil {
		fmt.Println(err)
		return
	}
	c, err := curve.NewSum(
		curve.Hyperbolic(curve.Power{Prefactor: 1e-7, Exponent: 2}, curve.Activated{Coefficient: curve.Constant(1e-3), Factor: factor}),
		curve.Steady(curve.RateOf{Law: steady}),
	)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, temperature := range []float64{823, 873} {
		at := c.At(curve.Point{Stress: 100, Temperature: temperature, Time: 1000})
		fmt.Printf("%v K: strain %.3e, rate %.3e /h\n", temperature, at.Value, at.ByTime)
	}
	// Output:
	// 823 K: strain 6.000e-04, rate 3.500e-07 /h
	// 873 K: strain 1.954e-03, rate 1.122e-06 /h
}

// A missing or impossible parameter is an error that says which.
func ExampleNewBlackburn_error() {
	_, err := curve.NewBlackburn(
		curve.Transient{Strain: curve.Power{Prefactor: 1e-7, Exponent: 2}, Rate: curve.Constant(0.1)},
		curve.Transient{Strain: curve.Power{Prefactor: 1e-7, Exponent: -2}, Rate: curve.Constant(0.001)},
		curve.Constant(1e-8),
	)
	fmt.Println(err)
	// Output:
	// creeplaw: Blackburn: slow transient strain: exponent is -2, must be positive and finite
}

// After a step of stress the law goes on along the new curve from the creep strain reached.
func ExampleStrainHardened() {
	c, err := curve.NewBaileyNorton(1e-12, 4, 0.4) // MPa and h
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := curve.NewStrainHardened(c)
	if err != nil {
		fmt.Println(err)
		return
	}
	strain := c.At(curve.Point{Stress: 100, Time: 100}).Value
	for _, stress := range []float64{100, 150} {
		p := creeplaw.Point{Stress: stress, Strain: strain}
		fmt.Printf("%v MPa: as after %.3g h, rate %.3g /h\n", stress, math.Exp(law.LogTime(p)), law.Rate(p).Value)
	}
	// Output:
	// 100 MPa: as after 100 h, rate 2.52e-06 /h
	// 150 MPa: as after 1.73 h, rate 0.000146 /h
}

// Time hardening reproduces a legacy analysis: it is no law, and needs to be told the time.
func ExampleTimeHardened() {
	c, err := curve.NewBaileyNorton(1e-12, 4, 0.4) // MPa and h
	if err != nil {
		fmt.Println(err)
		return
	}
	clocked, err := curve.NewTimeHardened(c)
	if err != nil {
		fmt.Println(err)
		return
	}
	strain := 0.0
	for _, hold := range []struct{ stress, start, end float64 }{{100, 0, 100}, {150, 100, 300}} {
		law := creeplaw.During{Clocked: clocked, Start: hold.start, End: hold.end}
		strain += (hold.end - hold.start) * law.Rate(creeplaw.Point{Stress: hold.stress}).Value
		fmt.Printf("%3v h: %.4g\n", hold.end, strain)
	}
	// Output:
	// 100 h: 0.000631
	// 300 h: 0.002394
}

// The minimum rate of a theta projection, with the numbers of a worked example.
func ExampleThetaProjection_MinimumRate() {
	c, err := curve.NewThetaProjection(
		curve.Transient{Strain: curve.Constant(0.01), Rate: curve.Constant(2e-3)},
		curve.Transient{Strain: curve.Constant(0.002), Rate: curve.Constant(5e-4)},
	)
	if err != nil {
		fmt.Println(err)
		return
	}
	rate, time := c.MinimumRate(100, 800)
	fmt.Printf("%.4g /h after %.0f h\n", rate, time)
	// Output:
	// 3.003e-06 /h after 1753 h
}
