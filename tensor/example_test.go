package tensor_test

import (
	"errors"
	"fmt"
	"math"

	"example.com/holdtime/tensor"
)

// A stress at the wall of a thick tube, with invented numbers in MPa: hoop 120, axial 50, radial -30, shear 20.
func ExampleSym() {
	s := tensor.Sym{tensor.XX: -30, tensor.YY: 120, tensor.ZZ: 50, tensor.YZ: 20}
	fmt.Printf("mean %.1f MPa, von Mises %.1f MPa\n", s.Mean(), s.Mises())
	fmt.Printf("principal %.1f MPa\n", s.PrincipalValues())
	// Output:
	// mean 46.7 MPa, von Mises 134.5 MPa
	// principal [125.3 44.7 -30.0] MPa
}

// The flow direction of creep, 3/2 s/σe, has an equivalent strain of one and no volume change.
func ExampleSym_Deviator() {
	s := tensor.Sym{100, 50, 0, 0, 0, 30}
	n := s.Deviator().Scale(1.5 / s.Mises())
	fmt.Printf("direction %.3f\n", n)
	fmt.Printf("equivalent %.3f\n", n.EquivalentStrain())
	// Output:
	// direction [0.743 0.000 -0.743 0.000 0.000 0.446]
	// equivalent 1.000
}

// The energy per volume of a stress on a strain counts each shear twice. Stress in MPa gives MJ/m³.
func ExampleSym_Dot() {
	s := tensor.Sym{100, 0, 0, 0, 0, 20}
	e := tensor.Sym{1e-3, 0, 0, 0, 0, 5e-4} // tensor shear: half of the engineering shear 1e-3
	fmt.Printf("%.2f\n", s.Dot(e))
	// Output: 0.12
}

// The directions are a rotation to the principal axes.
func ExampleSym_Principal() {
	s := tensor.Sym{80, 20, 30, 0, 0, 40} // Mohr's circle in the plane: centre 50, radius 50
	values, directions := s.Principal()
	fmt.Printf("values %.0f\n", values)
	fmt.Printf("greatest along %.3f\n", directions[0])
	turned := s.Rotate(tensor.Rotation(directions))
	fmt.Printf("turned %.0f\n", turned[:3])
	// Output:
	// values [100 30 0]
	// greatest along [0.894 0.447 0.000]
	// turned [100 30 0]
}

// A host with its own objective rate turns the stress and the creep strain that it stores by the spin of the increment.
func ExampleRotationVector() {
	spin, dt := [3]float64{0, 0, 0.02}, 5. // rad/s about z, s
	q, err := tensor.RotationVector([3]float64{spin[0] * dt, spin[1] * dt, spin[2] * dt})
	if err != nil {
		fmt.Println(err)
		return
	}
	stress := tensor.Sym{tensor.XX: 100}
	fmt.Printf("%.2f\n", stress.Rotate(q))
	// Output: [99.00 1.00 0.00 0.00 0.00 9.93]
}

// Bad data from outside are typed errors.
func ExampleAxisAngle() {
	_, err := tensor.AxisAngle([3]float64{}, math.Pi)
	var axis *tensor.AxisError
	fmt.Println(errors.As(err, &axis))
	fmt.Println(err)
	// Output:
	// true
	// tensor: rotation axis [0 0 0] has no direction: it must be finite and not zero
}

// A matrix from a file with seven digits passes a check at that accuracy.
func ExampleRotation_Check() {
	q := tensor.Rotation{{0.8660254, -0.5, 0}, {0.5, 0.8660254, 0}, {0, 0, 1}}
	fmt.Println(q.Check(1e-6))
	q[0][0] = -0.8660254
	fmt.Println(q.Check(1e-6))
	// Output:
	// <nil>
	// tensor: not a rotation: q qᵀ differs from the unit matrix by 0.866 (tolerance 1e-06), determinant -0.5
}

// Hooke's law for E = 200 GPa and ν = 0.3, through the bulk and the shear modulus. A tension along x with its contraction
// leaves no stress across.
func ExampleTangent_Contract() {
	const e, nu = 200e3, 0.3 // MPa
	var c tensor.Tangent
	c.SetIsotropic(e/(3*(1-2*nu)), e/(2*(1+nu)))
	s := c.Contract(tensor.Sym{1e-3, -3e-4, -3e-4})
	fmt.Printf("%.0f MPa across %.0f MPa\n", s[tensor.XX], math.Abs(s[tensor.YY]))
	// Output: 200 MPa across 0 MPa
}

// The tangents of two substeps, combined as Richardson's extrapolation combines their stresses: 2 C₂ - C₁.
func ExampleTangent_AddScaled() {
	var whole, halves, c tensor.Tangent
	whole.SetIsotropic(150, 40)
	halves.SetIsotropic(150, 45)
	c.Scale(2, &halves)
	c.AddScaled(&c, -1, &whole)
	fmt.Printf("shear modulus %.0f\n", c[tensor.XY][tensor.XY])
	// Output: shear modulus 50
}

// A law that sees more than the von Mises stress has an unsymmetric tangent. A host whose solver stores half a matrix can
// measure what it would drop.
func ExampleTangent_SymmetricPart() {
	var c tensor.Tangent
	c.SetIsotropic(150, 40)
	c.AddDyad(0.5, tensor.Sym{2, -1, -1}, tensor.Identity())
	fmt.Printf("asymmetry %.4f\n", c.Asymmetry())
	c.SymmetricPart(&c)
	fmt.Println(c.IsSymmetric(0))
	// Output:
	// asymmetry 0.0073
	// true
}

// The elastic constants of a cubic crystal in a frame turned by 45° about z (invented, GPa).
func ExampleTangent_Rotate() {
	c := tensor.Tangent{
		{168, 121, 121}, {121, 168, 121}, {121, 121, 168},
		{tensor.YZ: 75}, {tensor.XZ: 75}, {tensor.XY: 75},
	}
	q, err := tensor.AxisAngle([3]float64{0, 0, 1}, math.Pi/4)
	if err != nil {
		fmt.Println(err)
		return
	}
	c.Rotate(&c, q)
	fmt.Printf("C_xxxx %.1f, C_xxyy %.1f, C_xyxy %.1f\n", c[tensor.XX][tensor.XX], c[tensor.XX][tensor.YY], c[tensor.XY][tensor.XY])
	// Output: C_xxxx 219.5, C_xxyy 69.5, C_xyxy 23.5
}

// From a derivation in indexes: C_ijkl = λ δ_ij δ_kl + 2μ δ_ik δ_jl lacks the minor symmetries until it is symmetrised.
func ExampleTangent_MinorPart() {
	const lambda, mu = 100., 50.
	var f tensor.FullTangent
	for i := range 3 {
		for j := range 3 {
			f[i][i][j][j] += lambda
			f[i][j][i][j] += 2 * mu
		}
	}
	fmt.Printf("minor asymmetry %.1f\n", f.MinorAsymmetry())
	var c tensor.Tangent
	c.MinorPart(&f)
	fmt.Printf("C_xxxx %.0f, C_xxyy %.0f, C_xyxy %.0f\n", c[tensor.XX][tensor.XX], c[tensor.XX][tensor.YY], c[tensor.XY][tensor.XY])
	// Output:
	// minor asymmetry 0.5
	// C_xxxx 200, C_xxyy 100, C_xyxy 50
}

// A host in plane strain with engineering shear: strain in, stress and tangent out.
func ExampleLayout() {
	layout, err := tensor.NewLayout("xx yy zz xy", tensor.EngineeringShear)
	if err != nil {
		fmt.Println(err)
		return
	}
	var c tensor.Tangent
	c.SetIsotropic(150e3, 80e3) // MPa

	hostStrain := []float64{1e-3, -4e-4, 0, 5e-4} // the last is γ_xy
	strain := layout.StrainIn(hostStrain)
	fmt.Printf("tensor shear %.2e\n", strain[tensor.XY])

	hostStress := make([]float64, layout.Len())
	layout.StressOut(hostStress, c.Contract(strain))
	fmt.Printf("stress %.0f MPa\n", hostStress)

	hostTangent := make([]float64, layout.Len()*layout.Len())
	layout.TangentOut(hostTangent, &c)
	fmt.Printf("dτ/dγ %.0f MPa\n", hostTangent[15])
	// Output:
	// tensor shear 2.50e-04
	// stress [218 -6 58 40] MPa
	// dτ/dγ 80000 MPa
}

// An axisymmetric host names radial, axial and hoop; a mistake in the list is named with its place.
func ExampleNewLayout() {
	layout, err := tensor.NewLayout("rr zz tt rz", tensor.EngineeringShear)
	fmt.Println(layout.Components(), err)
	_, err = tensor.NewLayout("rr zz tt zr rz", tensor.EngineeringShear)
	fmt.Println(err)
	// Output:
	// xx zz yy xz <nil>
	// tensor: layout "rr zz tt zr rz": component 5 "rz": is the same component as "zr" before it
}
