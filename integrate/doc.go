// Package integrate is the material point: it carries stress and creep state through an increment of time.
//
// Small strains: total strain = elastic + creep + thermal, σ = C(T) : εₑ with isotropic elasticity, and creep flow along the
// stress deviator, dεc = (3/2) dp s/σₑ, with the equivalent rate dp/dt = ṗ(σₑ, p, T) given by a creeplaw.Law. The step is
// backward Euler in stress and creep strain, solved for any step size, and returns the exact consistent tangent: the
// derivative of the discrete update by strain and by temperature.
//
// # Use
//
//	mat, err := integrate.New(integrate.NewIsotropic(160e3, 0.3), law, integrate.Options{})
//	…
//	err = mat.Step(&out, &old, integrate.Increment{Dt: dt, Strain: strain, Temperature: temperature})
//
// A Material is built once, checked by its constructor, never changed, and shared by all goroutines. Result is scratch, one
// per goroutine. State belongs to the caller: virgin material is the zero State, and a step never writes its start state.
// Step allocates nothing, also when it fails; it starts no goroutine, prints nothing and keeps nothing.
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
package integrate
