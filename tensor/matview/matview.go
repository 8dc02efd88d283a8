// Package matview shows the tensors of package tensor to gonum's matrix routines, and brings matrices back.
//
// Tangent, Kelvin and Sym are views: they hold a pointer, copy nothing, and follow later changes of what they point to. They
// are read-only. The functions copy. Package tensor itself stays free of gonum.
//
// # Which matrix
//
// A tangent has two matrices of use, and they differ in the shear rows and columns.
//
// The plain matrix, C_IJ = C_ijkl, maps strain with engineering shear to stress. Its inverse maps stress to strain with
// engineering shear, so the inverse's shear rows and columns are not tensor components: do not take it for a tensor.Tangent.
//
// The Kelvin matrix (also Mandel's notation) has shear rows and shear columns times √2. In it the 6×6 matrix behaves as the
// fourth-order tensor does: its inverse is the compliance in the same notation, its eigenvalues are those of the tensor
// (3K once and 2G five times for isotropic elasticity), and rotating the frame changes neither. Use it for eigenvalues,
// definiteness, norms, and for inverses that are to come back through FromKelvin. (W. Thomson, later Lord Kelvin, Phil.
// Trans. R. Soc. 146 (1856), 481; J. Mandel, Int. J. Solids Struct. 1 (1965), 273; both from memory.)
//
// Reading an element outside the matrix panics, as everywhere in gonum.
package matview

import (
	"fmt"
	"math"

	"example.com/holdtime/tensor"
	"gonum.org/v1/gonum/mat"
)

var (
	_ mat.Matrix    = Tangent{}
	_ mat.Matrix    = Kelvin{}
	_ mat.Symmetric = Sym{}
)

// Tangent is a view of a tangent as its plain 6×6 matrix.
type Tangent struct {
	Of *tensor.Tangent
}

// Dims returns 6, 6.
func (v Tangent) Dims() (r, c int) { return 6, 6 }

// At returns the tensor component in row i and column j.
func (v Tangent) At(i, j int) float64 { return v.Of[i][j] }

// T returns the transpose, a view too.
func (v Tangent) T() mat.Matrix { return mat.Transpose{Matrix: v} }

// Kelvin is a view of a tangent as its 6×6 Kelvin matrix.
type Kelvin struct {
	Of *tensor.Tangent
}

// Dims returns 6, 6.
func (v Kelvin) Dims() (r, c int) { return 6, 6 }

// At returns the component in row i and column j, times √2 when one of them is a shear and times 2 when both are.
func (v Kelvin) At(i, j int) float64 { return v.Of[i][j] * kelvinFactor(i, j) }

// T returns the transpose, a view too.
func (v Kelvin) T() mat.Matrix { return mat.Transpose{Matrix: v} }

func kelvinFactor(i, j int) float64 {
	switch {
	case i > tensor.ZZ && j > tensor.ZZ:
		return 2
	case i > tensor.ZZ || j > tensor.ZZ:
		return math.Sqrt2
	}
	return 1
}

// Sym is a view of a symmetric tensor as a 3×3 matrix.
type Sym struct {
	Of *tensor.Sym
}

// Dims returns 3, 3.
func (v Sym) Dims() (r, c int) { return 3, 3 }

// SymmetricDim returns 3.
func (v Sym) SymmetricDim() int { return 3 }

// At returns the component in row i and column j.
func (v Sym) At(i, j int) float64 { return v.Of[symIndex[i][j]] }

// T returns the view itself.
func (v Sym) T() mat.Matrix { return v }

var symIndex = [3][3]int{
	{tensor.XX, tensor.XY, tensor.XZ},
	{tensor.XY, tensor.YY, tensor.YZ},
	{tensor.XZ, tensor.YZ, tensor.ZZ},
}

// DimsError says that a matrix has not the size that the tensor needs.
type DimsError struct {
	Rows, Cols int // of the matrix given
	Want       int // rows and columns needed
}

func (e *DimsError) Error() string {
	return fmt.Sprintf("matview: matrix is %d×%d, want %d×%d", e.Rows, e.Cols, e.Want, e.Want)
}

// AsymmetryError says that a tangent is not symmetric enough for a symmetric matrix.
type AsymmetryError struct {
	Asymmetry float64 // as tensor.Tangent.Asymmetry measures it
	Tolerance float64 // the caller's
}

func (e *AsymmetryError) Error() string {
	return fmt.Sprintf("matview: tangent is not symmetric: relative asymmetry %.3g, tolerance %.3g", e.Asymmetry, e.Tolerance)
}

// Dense returns a copy of the plain matrix of c.
func Dense(c *tensor.Tangent) *mat.Dense { return mat.DenseCopyOf(Tangent{c}) }

// KelvinSymDense returns a copy of the symmetric part of the Kelvin matrix of c, for eigenvalues and Cholesky
// factorisation. A c whose Asymmetry exceeds tol, or is NaN, gives an *AsymmetryError.
func KelvinSymDense(c *tensor.Tangent, tol float64) (*mat.SymDense, error) {
	if !c.IsSymmetric(tol) {
		return nil, &AsymmetryError{Asymmetry: c.Asymmetry(), Tolerance: tol}
	}
	var s tensor.Tangent
	s.SymmetricPart(c)
	m, v := mat.NewSymDense(6, nil), Kelvin{&s}
	for i := range 6 {
		for j := i; j < 6; j++ {
			m.SetSym(i, j, v.At(i, j))
		}
	}
	return m, nil
}

// SymDense returns a copy of a as a symmetric 3×3 matrix.
func SymDense(a tensor.Sym) *mat.SymDense {
	m := mat.NewSymDense(3, nil)
	m.CopySym(Sym{&a})
	return m
}

// FromPlain returns the tangent whose plain matrix is m. A matrix that is not 6×6 gives a *DimsError.
func FromPlain(m mat.Matrix) (tensor.Tangent, error) {
	var c tensor.Tangent
	if err := checkDims(m, 6); err != nil {
		return c, err
	}
	for i := range c {
		for j := range c[i] {
			c[i][j] = m.At(i, j)
		}
	}
	return c, nil
}

// FromKelvin returns the tangent, or the compliance, whose Kelvin matrix is m. A matrix that is not 6×6 gives a *DimsError.
func FromKelvin(m mat.Matrix) (tensor.Tangent, error) {
	c, err := FromPlain(m)
	if err != nil {
		return c, err
	}
	for i := range c {
		for j := range c[i] {
			c[i][j] /= kelvinFactor(i, j)
		}
	}
	return c, nil
}

// FromSymmetric returns the tensor whose matrix is m. A matrix that is not 3×3 gives a *DimsError.
func FromSymmetric(m mat.Symmetric) (tensor.Sym, error) {
	if err := checkDims(m, 3); err != nil {
		return tensor.Sym{}, err
	}
	return tensor.Sym{m.At(0, 0), m.At(1, 1), m.At(2, 2), m.At(1, 2), m.At(0, 2), m.At(0, 1)}, nil
}

func checkDims(m mat.Matrix, want int) error {
	if r, c := m.Dims(); r != want || c != want {
		return &DimsError{Rows: r, Cols: c, Want: want}
	}
	return nil
}
