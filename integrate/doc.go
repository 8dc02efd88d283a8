// Package integrate is the material point: it carries stress and creep state through an increment of time.
//
// Small strains: total strain = elastic + creep + thermal (+ plastic), σ = C(T) : εₑ with isotropic elasticity, and creep flow
// along the stress deviator, dεc = (3/2) dp s/σₑ, with the equivalent rate dp/dt = ṗ(σₑ, p, T) given by a creeplaw.Law. The
// step is backward Euler in stress, creep strain and internal variables, solved for any step size, and returns the exact
// consistent tangent: the derivative of the discrete update by strain and by temperature.
//
// Options.Plasticity adds rate-independent plasticity, solved together with creep; plastic strain is kept apart from creep
// strain.
//
// # Use
//
//	mat, err := integrate.New(integrate.NewIsotropic(160e3, 0.3), law, integrate.Options{})
//	…
//	err = mat.Step(&out, &old, integrate.Increment{Dt: dt, Strain: strain, Temperature: temperature})
//
// A Material is built once, checked by its constructor, never changed, and shared by all goroutines. Result is scratch, one
// per goroutine. State belongs to the caller: virgin material is the zero State, and a step never writes its start state.
// Steps allocate nothing, also when they fail; they start no goroutine, print nothing and keep nothing.
//
// # Which step
//
//	Step                strain prescribed: stress, state, 6×6 tangent                     3-D, plane strain, axisymmetry
//	Stress              the same without derivatives                                      explicit and lumped codes
//	StepUniaxial        a bar by its axial strain; StepUniaxialStress by its stress       bars, bolts, trusses
//	StepPlaneStress     a sheet by its strains, 3×3 tangent                               shells
//	StepMixed           any mixture of stresses, strains and relations between them       single elements, follow-up
//	EstimateStep        Step and an estimate of its error, with the next step             adaptive hosts
//	Follow              the same increment with as many fourth-order steps as a tolerance asks for, with its tangent
//	FollowStress        Follow without derivatives
//
// One step is first order in time: halving it halves the error. Follow keeps the error. Package integrate/program follows
// whole load histories, integrate/batch takes many points at once on all cores. TimeHardening is for legacy analyses.
//
// # Failures
//
// A slice of the wrong length is a caller's bug and panics. Bad data is an error from a constructor. A refused update
// returns a Code, and nothing has been written; Recoverable says whether a smaller step can help, Explain says what was
// wrong.
//
// # Units
//
// Any consistent set. Temperature is absolute [K]. Inside, shear strains are tensor components and the order is xx, yy, zz,
// yz, xz, xy; tensor.Layout translates a host's own.
//
// # Cautions
//
// The package computes; it does not certify. Parts are designed and assessed to the governing code by qualified engineers.
package integrate
