package batch_test

import (
	"context"
	"errors"
	"fmt"
	"log"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/batch"
	"example.com/holdtime/tensor"
)

// Four points of two materials, held in shear at two temperatures. The numbers are invented.
func ExampleBatch_Step() {
	layout, err := tensor.NewLayout("xx yy zz xy", tensor.EngineeringShear)
	if err != nil {
		log.Fatal(err)
	}
	tube, weld := exampleMaterial(1e-6), exampleMaterial(1e-5)
	b, err := batch.New([]*integrate.Material{tube, weld}, layout, batch.Options{})
	if err != nil {
		log.Fatal(err)
	}
	const n = 4
	p := batch.Points{
		Dt:          100, // h
		Temperature: []float64{800, 800, 830, 830},
		Material:    []int{0, 1, 0, 1},
		Strain:      make([]float64, 4*n),
		Old:         make([]float64, b.StateStride()*n), // virgin
		Stress:      make([]float64, 4*n),
		State:       make([]float64, b.StateStride()*n),
		Tangent:     make([]float64, 16*n), // nil would leave it out
	}
	for i := range n {
		p.Strain[4*i+3] = 2e-3
	}
	if err := b.Step(context.Background(), p); err != nil {
		log.Fatal(err)
	}
	for i := range n {
		fmt.Printf("point %d: shear stress %5.1f MPa, tangent %5.0f MPa\n", i, p.Stress[4*i+3], p.Tangent[16*i+15])
	}
	// Output:
	// point 0: shear stress  77.3 MPa, tangent 15528 MPa
	// point 1: shear stress  53.1 MPa, tangent  8104 MPa
	// point 2: shear stress  59.6 MPa, tangent  9716 MPa
	// point 3: shear stress  39.7 MPa, tangent  5347 MPa
}

// One point is refused, the others are finished. Had a smaller step been able to help, the host would halve Dt and call again
// with the old states.
func ExampleRefusedError() {
	layout, err := tensor.NewLayout("xx yy zz xy", tensor.EngineeringShear)
	if err != nil {
		log.Fatal(err)
	}
	b, err := batch.New([]*integrate.Material{exampleMaterial(1e-6)}, layout, batch.Options{})
	if err != nil {
		log.Fatal(err)
	}
	p := batch.Points{Dt: 1, Temperature: []float64{800, 800, -20}, Strain: make([]float64, 12), Old: make([]float64, 21),
		Stress: make([]float64, 12), State: make([]float64, 21)}
	err = b.Step(context.Background(), p)
	fmt.Println(err)
	fmt.Println("a smaller step can help:", integrate.Recoverable(err))
	var refused *batch.RefusedError
	if errors.As(err, &refused) {
		for _, f := range refused.First {
			fmt.Println(b.Explain(p, f))
		}
	}
	// Output:
	// batch: 1 of 3 points refused, first point 2: integrate: the increment has a value no material can be asked for
	// a smaller step can help: false
	// integrate: the increment has a value no material can be asked for: temperature is -20
}

// exampleMaterial is an invented steel that creeps at a rate [1/h] under 100 MPa at 800 K.
func exampleMaterial(rate float64) *integrate.Material {
	norton, err := creeplaw.NewNortonAt(rate, 100, 5)
	if err != nil {
		log.Fatal(err)
	}
	activation, err := creeplaw.NewArrheniusAt(300e3, 800)
	if err != nil {
		log.Fatal(err)
	}
	law, err := creeplaw.WithTemperature(norton, activation)
	if err != nil {
		log.Fatal(err)
	}
	m, err := integrate.New(integrate.NewIsotropic(160e3, 0.3), law, integrate.Options{})
	if err != nil {
		log.Fatal(err)
	}
	return m
}
