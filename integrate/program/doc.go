// Package program carries a material point through a load program: a history of segments in which stresses, strains, relations
// between them and temperature follow signals over time, with cycles repeated without being stored. The step size is chosen by
// a tolerance; results come at every step, at requested times and where events happen, rupture among them.
//
//	law, mat := …
//	p := program.Program{Blocks: []program.Block{{Segments: []program.Segment{
//		{Name: "load", Duration: 1, Control: integrate.StressControl(), Prescribed: [6]program.Signal{program.Ramp(0, 150)}},
//		{Name: "hold", Duration: 1e4, Control: integrate.StressControl(), Prescribed: [6]program.Signal{program.Constant(150)}},
//	}}}}
//	run := program.Start(ctx, mat, p, program.Options{Tolerance: integrate.Tolerance{Relative: 1e-6}})
//	for r := range run.Records() {
//		…
//	}
//	if err := run.Err(); err != nil { … }
//
// It stands on the public step integrate.Material.StepMixed alone: what a program shows is what a host code gets.
//
// # What is computed
//
// Within a segment the walk takes steps of the fourth-order implicit Runge–Kutta method that is under Material.Follow: each
// stage is a backward-Euler step under mixed control. The difference to the embedded third-order result, judged for the stress
// as the control lets it show, for the creep strain and for the internal variables, keeps every step within the tolerance. A
// signal that jumps is answered elastically, or by yielding, in no time. Hardening that starts from zero strain with an infinite rate is
// entered by a backward-Euler step too short to matter, from which the steps grow.
//
// A material with plasticity is walked by plain steps, whole and in halves, extrapolated to second order: at tight tolerances
// that takes many more steps than creep alone.
//
// # Units
//
// Those of the material. Times run from 0 at the start of the program; signals run from 0 at the start of their segment.
package program
