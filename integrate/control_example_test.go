package integrate_test

import (
	"fmt"
	"log"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// exampleMaterial is invented: E = 150 GPa, ν = 0.3, Norton's law 1e-16 σ⁵ in MPa and hours, α = 12e-6 /K.
func exampleMaterial() *integrate.Material {
	law, err := creeplaw.NewNorton(1e-16, 5)
	if err != nil {
		log.Fatal(err)
	}
	mat, err := integrate.New(integrate.NewIsotropic(150e3, 0.3), law,
		integrate.Options{Expansion: integrate.Expansion{Mean: integrate.Constant(12e-6), Reference: 293}})
	if err != nil {
		log.Fatal(err)
	}
	return mat
}

// A bar is loaded to 200 MPa and held at its length for 100 h in seven steps that grow. The exact stress is 111 MPa: the rule is
// of first order, and shorter steps come nearer.
func ExampleMaterial_StepUniaxial() {
	mat := exampleMaterial()
	var out integrate.UniaxialResult
	inc := integrate.UniaxialIncrement{Strain: 200.0 / 150e3, Temperature: 293}
	for _, inc.Dt = range []float64{0, 0.1, 0.3, 1, 3, 10, 30, 55.6} {
		if err := mat.StepUniaxial(&out, &out.State, inc); err != nil {
			log.Fatal(mat.ExplainControlled(err, &out.State, inc))
		}
	}
	fmt.Printf("stress %.0f MPa, tangent %.0f GPa, lateral strain %.3f %%\n", out.Stress, out.Tangent/1e3, 100*out.Strain[tensor.YY])
	// Output: stress 120 MPa, tangent 80 GPa, lateral strain -0.051 %
}

// A hanger carries 120 MPa for ten years.
func ExampleMaterial_StepUniaxialStress() {
	mat := exampleMaterial()
	var out integrate.UniaxialResult
	load := integrate.UniaxialLoad{Dt: 87_600, Stress: 120, Temperature: 293}
	if err := mat.StepUniaxialStress(&out, &out.State, load); err != nil {
		log.Fatal(mat.ExplainControlled(err, &out.State, load))
	}
	fmt.Printf("strain %.2f %%\n", 100*out.Strain[tensor.XX])
	// Output: strain 21.88 %
}

// A point of a shell, whose host code stores xx, yy and the engineering shear strain, takes the condensed tangent through a
// layout.
func ExampleMaterial_StepPlaneStress() {
	mat := exampleMaterial()
	layout, err := tensor.NewLayout("xx yy xy", tensor.EngineeringShear)
	if err != nil {
		log.Fatal(err)
	}
	strain := []float64{1e-3, 2e-4, 5e-4} // the host's
	var out integrate.PlaneStressResult
	inc := integrate.PlaneStressIncrement{Dt: 50, Strain: layout.StrainIn(strain), Temperature: 293}
	if err := mat.StepPlaneStress(&out, &integrate.State{}, inc); err != nil {
		log.Fatal(mat.ExplainControlled(err, &integrate.State{}, inc))
	}
	stress, stiffness := make([]float64, 3), make([]float64, 9)
	layout.StressOut(stress, out.Stress)
	var tangent tensor.Tangent
	out.Spread(&tangent)
	layout.TangentOut(stiffness, &tangent)
	fmt.Printf("stress %.0f MPa\n", stress)
	fmt.Printf("stiffness %.0f GPa\n", []float64{stiffness[0] / 1e3, stiffness[4] / 1e3, stiffness[8] / 1e3})
	fmt.Printf("thickness strain %.3f %%\n", 100*out.Strain[tensor.ZZ])
	// Output:
	// stress [147 74 23] MPa
	// stiffness [89 132 43] GPa
	// thickness strain -0.061 %
}

// A bolt relaxes while the flange between nut and head, with a follow-up factor of 1.25, springs back.
func ExampleFollowUp() {
	mat := exampleMaterial()
	control, err := integrate.FollowUp(150e3, 1.25)
	if err != nil {
		log.Fatal(err)
	}
	var out integrate.MixedResult
	inc := integrate.MixedIncrement{Control: control, Temperature: 293}
	inc.Prescribed[tensor.XX] = 1.25 * 200 / 150e3 // what tightening to 200 MPa gave bolt and flange together
	for _, inc.Dt = range []float64{0, 1, 3, 10, 30, 100, 300, 556} {
		if err := mat.StepMixed(&out, &out.State, inc); err != nil {
			log.Fatal(mat.ExplainControlled(err, &out.State, inc))
		}
	}
	fmt.Printf("stress %.0f MPa, strain of the bolt %.3f %%\n", out.Stress[tensor.XX], 100*out.Strain[tensor.XX])
	// Output: stress 76 MPa, strain of the bolt 0.154 %
}

// A bar between rigid ends is heated by 100 K and held for 1000 h.
func ExampleUniaxialStress() {
	mat := exampleMaterial()
	var out integrate.MixedResult
	inc := integrate.MixedIncrement{Control: integrate.UniaxialStress(), Temperature: 393}
	for _, inc.Dt = range []float64{0, 10, 30, 100, 300, 560} {
		if err := mat.StepMixed(&out, &out.State, inc); err != nil {
			log.Fatal(mat.ExplainControlled(err, &out.State, inc))
		}
		if inc.Dt == 0 {
			fmt.Printf("heated: %.0f MPa\n", out.Stress[tensor.XX])
		}
	}
	fmt.Printf("held: %.0f MPa\n", out.Stress[tensor.XX])
	// Output:
	// heated: -180 MPa
	// held: -72 MPa
}

// A control of one's own: a specimen loaded along x between stiff side plates that give way by 1e-6 per MPa in y, free in z.
// The derivative says how much the side plates take of a change of load.
func ExampleNewControl() {
	mat := exampleMaterial()
	conditions := [6]integrate.Condition{
		tensor.XX: {By: integrate.GivenStress},
		tensor.YY: {By: integrate.GivenRelation, Stress: 1e-6, Strain: 1},
		tensor.ZZ: {By: integrate.GivenStress},
	}
	control, err := integrate.NewControl(conditions)
	if err != nil {
		log.Fatal(err)
	}
	var out integrate.MixedResult
	inc := integrate.MixedIncrement{Control: control, Dt: 1000, Prescribed: tensor.Sym{tensor.XX: -150}, Temperature: 293}
	if err := mat.StepMixed(&out, &integrate.State{}, inc); err != nil {
		log.Fatal(mat.ExplainControlled(err, &integrate.State{}, inc))
	}
	fmt.Println(control)
	fmt.Printf("side stress %.0f MPa, by load %.2f\n", out.Stress[tensor.YY], out.StressBy[tensor.YY][tensor.XX])
	// Output:
	// strain yz xz xy, stress xx zz, relation yy
	// side stress -67 MPa, by load 0.61
}
