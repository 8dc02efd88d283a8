package integrate_test

import (
	"errors"
	"fmt"
	"log"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// host stands for a simulation code with its own arrays: six strains per point with engineering shear, its own order.
type host struct {
	strain, stress [][]float64 // [point][6]
	stiffness      [][]float64 // [point][36]
	temperature    []float64
	old, next      []integrate.State
}

func newHost(points int) *host {
	h := &host{temperature: make([]float64, points), old: make([]integrate.State, points),
		next: make([]integrate.State, points)}
	for i := range points {
		h.strain = append(h.strain, make([]float64, 6))
		h.stress = append(h.stress, make([]float64, 6))
		h.stiffness = append(h.stiffness, make([]float64, 36))
		h.temperature[i] = 823
	}
	return h
}

// One pass over the material points of a host code. The start states stay as they are until the host accepts the step, so
// it can iterate or cut the step at will.
func (h *host) update(mat *integrate.Material, layout tensor.Layout, dt float64) error {
	var out integrate.Result // scratch, one per goroutine
	for i := range h.old {
		inc := integrate.Increment{Dt: dt, Strain: layout.StrainIn(h.strain[i]), Temperature: h.temperature[i]}
		if err := mat.Step(&out, &h.old[i], inc); err != nil {
			return fmt.Errorf("point %d: %w", i, mat.Explain(err, &h.old[i], inc)) // nothing was written
		}
		layout.StressOut(h.stress[i], out.Stress)
		layout.TangentOut(h.stiffness[i], &out.Tangent)
		h.next[i] = out.State
	}
	return nil
}

// A host code with its own component order and engineering shear strains embeds the library: a bar of three points is
// strained in shear and held.
func Example_hostLoop() {
	law, err := creeplaw.NewNorton(1e-16, 5) // MPa, h
	if err != nil {
		log.Fatal(err)
	}
	mat, err := integrate.New(integrate.NewIsotropic(150e3, 0.3), law, integrate.Options{})
	if err != nil {
		log.Fatal(err)
	}
	layout, err := tensor.NewLayout("xx yy zz xy yz xz", tensor.EngineeringShear)
	if err != nil {
		log.Fatal(err)
	}
	h := newHost(3)
	for i := range h.strain {
		h.strain[i][3] = 2e-3
	}
	for _, dt := range []float64{0, 10, 90, 900} {
		if err := h.update(mat, layout, dt); err != nil {
			if integrate.Recoverable(err) {
				log.Fatal("a real host would halve the step and call update again")
			}
			log.Fatal(err)
		}
		h.old, h.next = h.next, h.old
		fmt.Printf("after %3.0f h more: shear stress %5.1f MPa, tangent %5.0f MPa\n", dt, h.stress[0][3], h.stiffness[0][21])
	}
	// Output:
	// after   0 h more: shear stress 115.4 MPa, tangent 57692 MPa
	// after  10 h more: shear stress  99.9 MPa, tangent 32494 MPa
	// after  90 h more: shear stress  72.3 MPa, tangent 19815 MPa
	// after 900 h more: shear stress  45.4 MPa, tangent 14545 MPa
}

// The step estimates its own error by doubling, and suggests the length of the next one.
func ExampleMaterial_EstimateStep() {
	law, err := creeplaw.NewNorton(1e-16, 5)
	if err != nil {
		log.Fatal(err)
	}
	mat, err := integrate.New(integrate.NewIsotropic(150e3, 0.3), law, integrate.Options{})
	if err != nil {
		log.Fatal(err)
	}
	strain := tensor.Sym{1e-3, -5e-4, -5e-4}
	var out integrate.Result
	e, err := mat.EstimateStep(&out, &integrate.State{}, integrate.Conditions{Strain: strain, Temperature: 823},
		integrate.Increment{Dt: 10, Strain: strain, Temperature: 823}, 1e-3)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("stress %.1f MPa, thought wrong by %.1f MPa; for 0.1 %% take %.0f h\n", out.Stress.Mises(), e.Stress.Mises(), e.Dt)
	// Output:
	// stress 156.7 MPa, thought wrong by 2.9 MPa; for 0.1 % take 2 h
}

// A refused step says why, and leaves everything as it was.
func ExampleMaterial_Explain() {
	law, err := creeplaw.NewNorton(1e-16, 5)
	if err != nil {
		log.Fatal(err)
	}
	young, err := integrate.NewTable([]float64{293, 873}, []float64{210e3, 160e3})
	if err != nil {
		log.Fatal(err)
	}
	mat, err := integrate.New(integrate.Isotropic{Young: young, Poisson: integrate.Constant(0.3)}, law, integrate.Options{})
	if err != nil {
		log.Fatal(err)
	}
	var out integrate.Result
	var old integrate.State
	inc := integrate.Increment{Dt: 1, Temperature: 550} // meant as °C, taken as K: in the table by luck
	fmt.Println(mat.Step(&out, &old, inc))
	inc.Temperature = 20
	err = mat.Step(&out, &old, inc)
	fmt.Println(errors.Is(err, integrate.OutsideTable), integrate.Recoverable(err))
	fmt.Println(mat.Explain(err, &old, inc))
	// Output:
	// <nil>
	// true false
	// integrate: the temperature is outside the range of a tabulated property: temperature for Young's modulus is 20
}
