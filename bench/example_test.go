package bench_test

import (
	"fmt"
	"math"

	"example.com/holdtime/bench"
)

// relaxBar stands for the code under test: somebody's own explicit integration of σ̇ = -E A σ⁵.
func relaxBar(young, prefactor, stress, time float64, steps int) float64 {
	dt := time / float64(steps)
	for range steps {
		stress -= dt * young * prefactor * math.Pow(stress, 5)
	}
	return stress
}

// A harness holds its own code against a closed form: error, observed order and limit at halved steps.
func Example() {
	hold := bench.BarRelaxation{
		Young:  150e3, // MPa
		Stress: 200,   // MPa
		Law:    bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5},
	}
	if err := hold.Check(); err != nil {
		fmt.Println(err)
		return
	}
	const hours = 100
	study, err := bench.Halve([]float64{hold.StressAt(hours)}, hold.Stress, 100, 4, func(steps int) ([]float64, error) {
		return []float64{relaxBar(hold.Young, 1e-16, hold.Stress, hours, steps)}, nil
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("exact %.4f MPa\n", study.Exact[0])
	for i, order := range study.Orders() {
		fmt.Printf("%4d steps: error %.1e, order %.2f\n", study.Steps[i+1], study.Errors()[i+1], order)
	}
	fmt.Println("extrapolated within 1e-8:", study.ExtrapolatedError() < 1e-8)
	// Output:
	// exact 110.8418 MPa
	//  200 steps: error 9.3e-04, order 1.01
	//  400 steps: error 4.6e-04, order 1.00
	//  800 steps: error 2.3e-04, order 1.00
	// 1600 steps: error 1.2e-04, order 1.00
	// extrapolated within 1e-8: true
}

// The stress of a bolt while its flange follows up, and when it falls under what the gasket needs.
func ExampleFollowUpRelaxation() {
	bolt := bench.FollowUpRelaxation{
		Young:    150e3, // MPa
		Stress:   200,   // MPa
		FollowUp: bench.SeriesFollowUp(0.25, 1),
		Law:      bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5},
	}
	fmt.Printf("%.2f MPa after 1000 h\n", bolt.StressAt(1000))
	fmt.Printf("100 MPa after %.0f h\n", bolt.TimeTo(100))
	// Output:
	// 67.34 MPa after 1000 h
	// 100 MPa after 195 h
}

// A full stress tensor under fixed strain.
func ExampleSolidRelaxation() {
	hold := bench.SolidRelaxation{
		Young:   150e3,
		Poisson: 0.3,
		Stress:  generalStress,
		Law:     bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5},
	}
	fmt.Printf("start  %.2f\n", hold.Stress)
	fmt.Printf("1000 h %.2f\n", hold.StressAt(1000))
	// Output:
	// start  [150.00 -20.00 40.00 35.00 0.00 60.00]
	// 1000 h [86.59 32.09 51.32 11.22 0.00 19.24]
}

// Primary creep with a change of stress: the two hardening rules disagree.
func ExampleTwoStepCreep() {
	test := bench.TwoStepCreep{
		First: 100, Change: 100, Second: 150, // MPa, h, MPa
		Curve: bench.BaileyNorton{Strain: 1e-12, Stress: 1, Time: 1, StressExponent: 4, TimeExponent: 0.4},
	}
	fmt.Printf("strain hardening %.3e\n", test.StrainHardeningAt(300))
	fmt.Printf("time hardening   %.3e\n", test.TimeHardeningAt(300))
	// Output:
	// strain hardening 4.229e-03
	// time hardening   2.394e-03
}

// The bore of a thick cylinder after the stresses have settled.
func ExampleThickCylinder() {
	pipe := bench.ThickCylinder{Inner: 100, Outer: 200, Pressure: 50,
		Law: bench.Norton{Rate: 1e-15, Stress: 1, Exponent: 5}}
	fmt.Printf("hoop %.2f, Mises %.2f MPa\n", pipe.HoopAt(100), pipe.MisesAt(100))
	fmt.Printf("hoop strain rate %.3e 1/h\n", pipe.VelocityAt(100)/100)
	// Output:
	// hoop 32.60, Mises 71.53 MPa
	// hoop strain rate 1.622e-06 1/h
}
