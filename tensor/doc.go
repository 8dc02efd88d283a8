// Package tensor holds the stress, the strain and the material tangent of a point, and carries them to and from the order
// and the shear convention in which a host code stores them.
//
//   - Sym: a symmetric second-order tensor, six components. Trace, mean, deviator, double contraction, von Mises
//     equivalents, principal values and directions, rotation.
//   - Rotation: a proper orthogonal matrix, for hosts that turn stress and creep strain with their own objective rate.
//   - Tangent: a fourth-order tensor as 6×6 components. Contraction, major and minor symmetry, rotation.
//   - Layout: which components a host stores, in which order, and whether its shear strains are engineering or tensor.
//
// # Conventions
//
// Components are in the order xx, yy, zz, yz, xz, xy. Shear components are tensor components everywhere in the library;
// engineering shear strain, which is twice that, exists only in a host's slices, through its Layout. Tension is positive.
// Any consistent set of units will do: no function holds a constant that has one.
//
//	Mises              σe = √(3/2 s:s)              s the deviator of the stress
//	EquivalentStrain   εe = √(2/3 e:e)              e the deviator of the strain
//	Dot                a:b = Σ a_ij b_ij            nine terms: shear counts twice
//	Contract           σ_ij = Σ C_ijkl ε_kl         nine terms in kl
//	Rotate             q a qᵀ, or q_im q_jn q_kp q_lr C_mnpr
//
// # Layouts
//
// A layout names its components; NewLayout says how. Some that are in use:
//
//	xx yy zz xy yz xz    three dimensions
//	xx yy zz yz xz xy    three dimensions, the order of this package
//	xx yy zz xy          plane strain; axisymmetry with x radial, y axial, z hoop
//	rr zz tt rz          axisymmetry in the letters of cylindrical coordinates: radial, axial, hoop
//	xx yy xy             plane strain without the out-of-plane stress
//
// The two axisymmetric ones put the hoop direction in different places inside. That shows only to a host that uses both for
// the same point, or a tangent that is not isotropic about the axis.
//
// A component that a layout lacks is zero on the way in and dropped on the way out. That is right for the strains of plane
// strain and axisymmetry; for a stress that does exist, such as the one across the plane, the host keeps the whole Sym.
//
// The tangent that goes out is the derivative of the host's stress numbers by the host's strain numbers. With tensor shear
// its shear columns are therefore twice the tensor components: Layout.TangentOut has the details.
//
// # Cost and concurrency
//
// All types are plain values without pointers; there is no state to share or to lock. Nothing on the path of a material
// point allocates. The package imports the standard library only; subpackage matview has the bridge to gonum.
//
// # Accuracy
//
// Results are correct to a few units of rounding of the size of the tensor, and the doc of each method says where the range
// of float64 sets a limit. Deviator and Mises are formed from differences of the normal components, so that a pressure costs
// no digits. The same input gives the same bits on the same build; builds for processors that fuse multiplication and
// addition may differ in the last bits.
//
// # Failure
//
// Data that may come from outside (a rotation axis, a matrix, the words of a layout) get typed errors. A slice of the wrong length
// is a bug of the caller and panics. NaN and infinity are passed on by the arithmetic, never hidden.
package tensor
