package matview_test

import (
	"fmt"

	"example.com/holdtime/tensor"
	"example.com/holdtime/tensor/matview"
	"gonum.org/v1/gonum/mat"
)

// The strain with engineering shear that belongs to a stress: solve the tangent's plain matrix.
func ExampleTangent() {
	var c tensor.Tangent
	c.SetIsotropic(150e3, 80e3) // MPa
	stress := tensor.Sym{tensor.XX: 120, tensor.XY: 40}
	var strain mat.VecDense
	if err := strain.SolveVec(matview.Tangent{Of: &c}, mat.NewVecDense(6, stress[:])); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("ε_xx %.3e, γ_xy %.3e\n", strain.AtVec(tensor.XX), strain.AtVec(tensor.XY))
	// Output: ε_xx 5.889e-04, γ_xy 5.000e-04
}

// The stiffnesses of a tangent that no frame changes are the eigenvalues of its Kelvin matrix: 2G and 3K.
func ExampleKelvinSymDense() {
	var c tensor.Tangent
	c.SetIsotropic(150e3, 80e3)
	m, err := matview.KelvinSymDense(&c, 1e-12)
	if err != nil {
		fmt.Println(err)
		return
	}
	var eigen mat.EigenSym
	if !eigen.Factorize(m, false) {
		fmt.Println("no convergence")
		return
	}
	fmt.Printf("%.0f\n", eigen.Values(nil))
	// Output: [160000 160000 160000 160000 160000 450000]
}

// A compliance as a fourth-order tensor, by way of the Kelvin matrix.
func ExampleFromKelvin() {
	var c tensor.Tangent
	c.SetIsotropic(150e3, 80e3)
	var inverse mat.Dense
	if err := inverse.Inverse(matview.Kelvin{Of: &c}); err != nil {
		fmt.Println(err)
		return
	}
	compliance, err := matview.FromKelvin(&inverse)
	if err != nil {
		fmt.Println(err)
		return
	}
	strain := compliance.Contract(tensor.Sym{tensor.XY: 40})
	fmt.Printf("tensor shear %.2e\n", strain[tensor.XY])
	// Output: tensor shear 2.50e-04
}

// Any routine of gonum that takes a matrix reads a stress without a copy.
func ExampleSym() {
	stress := tensor.Sym{2, 2, 2, -1, 0, -1}
	fmt.Printf("determinant %.0f\n", mat.Det(matview.Sym{Of: &stress}))
	// Output: determinant 4
}
