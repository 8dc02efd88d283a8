package creeplaw_test

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

func ExampleNewKachanovRabotnov() {
	law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{
		Prefactor: 1e-15, StressExponent: 5, // MPa, h
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6,
		RuptureStress: creeplaw.RuptureStress{Principal: 0.3},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	at := creeplaw.Point{Stress: 100, Temperature: 873}
	for _, damage := range []float64{0, 0.3} {
		e := law.Evolve(creeplaw.InTension(at, [creeplaw.MaxVariables]float64{damage}))
		fmt.Printf("damage %.1f: creep %.2e, damage %.2e per hour\n", damage, math.Exp(e.LogRate),
			e.Internal[0].Value*math.Exp(e.Internal[0].LogScale))
	}
	// Output:
	// damage 0.0: creep 1.00e-05, damage 1.00e-04 per hour
	// damage 0.3: creep 5.95e-05, damage 8.50e-04 per hour
}

func ExampleNewLiuMurakami() {
	law, err := creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{
		Prefactor: 1e-15, StressExponent: 5, // MPa, h
		DamagePrefactor: 1e-12, DamageStressExponent: 4.5, DamageExponent: 7,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	e := law.Evolve(creeplaw.InTension(creeplaw.Point{Stress: 100}, [creeplaw.MaxVariables]float64{1}))
	fmt.Printf("at rupture the rate is still finite: %.1e per hour\n", math.Exp(e.LogRate))
	// Output: at rupture the rate is still finite: 2.0e-04 per hour
}

func ExampleNewPerrinHayhurst() {
	law, err := creeplaw.NewPerrinHayhurst(creeplaw.CavitationParameters{
		Prefactor: 2e-9, StressCoefficient: 0.2, Hardening: 24e3, HardeningSaturation: 0.6, // MPa, h
		Ageing: 1e-4, Cavitation: 2, RuptureCavitation: 1. / 3,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, v := range law.Variables() {
		fmt.Printf("%s from %g, limit %.3g\n", v.Name, v.Initial, v.Limit)
	}
	// Output:
	// hardening from 0, limit 1
	// ageing from 0, limit 1
	// cavitation from 0, limit 0.333
}

func ExampleNewAnand() {
	law, err := creeplaw.NewAnand(creeplaw.AnandParameters{
		InitialResistance: 40, ActivationEnergy: 90e3, Prefactor: 2e7, StressMultiplier: 10, RateSensitivity: 0.3, // MPa, s
		Hardening: 4000, SaturationCoefficient: 80, SaturationExponent: 0.02, HardeningExponent: 1.4,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	at := creeplaw.Point{Stress: 10, Temperature: 350}
	for _, resistance := range []float64{40, 50} {
		e := law.Evolve(creeplaw.InTension(at, [creeplaw.MaxVariables]float64{resistance}))
		fmt.Printf("resistance %g MPa: %.1e per second\n", resistance, math.Exp(e.LogRate))
	}
	// Output:
	// resistance 40 MPa: 3.0e-04 per second
	// resistance 50 MPa: 5.4e-05 per second
}

// Under constant stress the life is 1/(Ω times the initial rate), and 1/(Ω times the present rate) is what is left of it.
func ExampleNewOmega() {
	initial, err := creeplaw.NewNortonAt(1e-6, 100, 5) // MPa, h
	if err != nil {
		fmt.Println(err)
		return
	}
	const omega = 50
	law, err := creeplaw.NewOmega(initial, omega)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, strain := range []float64{0, 0.02} {
		r := law.Rate(creeplaw.Point{Stress: 100, Strain: strain})
		fmt.Printf("strain %.2f: rate %.2e, %.0f h left\n", strain, r.Value, 1/(omega*r.Value))
	}
	// Output:
	// strain 0.00: rate 1.00e-06, 20000 h left
	// strain 0.02: rate 2.72e-06, 7358 h left
}

func ExampleRuptureStress() {
	r := creeplaw.RuptureStress{Principal: 0.3, Mean: 0.1}
	fmt.Printf("equal biaxial tension of 100 MPa damages like %.0f MPa\n", r.At(100, 200./3, 100))
	// Output: equal biaxial tension of 100 MPa damages like 110 MPa
}
