// Package batch steps many material points at once, in the host's own arrays: strain, temperature and state in; stress, state
// and, if wanted, the tangent out. Each point is one Material.Step of package integrate; what the package adds is the loop, on
// all cores.
//
//	b, err := batch.New([]*integrate.Material{shell, weld}, layout, batch.Options{})
//	…
//	err = b.Step(ctx, batch.Points{Dt: dt, Temperature: temperature, Strain: strain, Material: material, Old: old,
//		Stress: stress, Tangent: tangent, State: state})
//
// # Arrays
//
// Every array is a flat []float64 of one record after the other, one record for each point: a strain or stress in the host's
// tensor.Layout, a tangent row by row as Layout.TangentOut writes it, a state as Material.PackState writes it. An array of the
// wrong length is a caller's bug and panics with its name, its length and the length wanted, before anything is written.
//
// State and Old may be the same array, of the same points: each point is read before it is written and sees no other, and a
// point that is refused keeps its old state. A host that may have to repeat the step with a smaller Dt keeps two arrays and
// swaps them. Any other overlap of an output with another array gives results that mean nothing.
//
// # Results
//
// A point's results are those of Material.Step, or of Material.Stress where no tangent is asked for, to the bit. They depend
// neither on the number of workers nor on the other points of the call.
//
// A point whose step is refused keeps its outputs as they were, and the rest is finished. Step then returns a *RefusedError
// with the number of points refused and the first of them, in the order of the points. A step the context cuts short returns an
// *InterruptedError: the points before its Done are complete, the others untouched.
//
// # Goroutines and memory
//
// Step works in the goroutine that calls it and starts others for the other workers, which have ended when it returns. It
// allocates a few hundred bytes for each worker, the list of failures if there are any, and nothing for a point. A panic in a
// user's own law stops the call and comes out of Step, in the goroutine of the caller, as an error that wraps the law's and tells
// its stack.
package batch
