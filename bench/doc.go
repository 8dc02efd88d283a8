// Package bench holds problems of creep with a known answer, so that a test harness can hold its own code against them.
//
// Each problem is a small value with exported parameters. Its methods give the exact stress, strain or time; nothing in this
// package integrates by steps, and nothing in it uses the laws or the steps of the library, so the library can be held
// against it as well.
//
//	p := bench.BarRelaxation{Young: 150e3, Stress: 200, Law: bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5}}
//	if err := p.Check(); err != nil { … }
//	want := p.StressAt(100) // 110.84 after 100 h, when Young and Stress are in MPa and Rate in 1/h
//
// # Problems
//
//	constant strain     BarRelaxation, SinhRelaxation, SolidRelaxation (any 3-D state), ShearRelaxation,
//	                    EqualBiaxialRelaxation, OppositeBiaxialRelaxation (plane stress)
//	elastic follow-up   FollowUpRelaxation
//	primary creep       StrainHardeningRelaxation, TimeHardeningRelaxation
//	constant rate       ConstantRateTension
//	constant stress     NortonCreep, GarofaloCreep, BaileyNortonCreep, StrainHardeningCreep, PrimarySecondaryCreep,
//	                    ParallelCreep, SteadyFlow (any 3-D stress)
//	two stress levels   TwoStepCreep, by either hardening rule
//	vessels             ThickCylinder, ThickSphere
//	beams and shafts    RectangularBeam, Cantilever, TorsionBar
//	bars                TwoBars, ThreeBarTruss
//
// Halve runs a routine of the caller's at halved steps and reports errors, observed orders and the extrapolated result.
// Package bench/check has comparisons that a NaN cannot pass.
//
// # Parameters and times
//
// Any consistent units; each field names its own in brackets. Check reports the first impossible parameter as a
// *ParameterError. The other methods do not check: with parameters that Check refuses their results mean nothing. A time
// below zero or NaN gives NaN; time zero is the start and +Inf the limit.
//
// # Accuracy
//
// Results are formed through logarithms, so that a stress exponent of 50 in Pa and s neither overflows nor vanishes. Unless
// a type says otherwise they are good to 1e-12 relative to themselves, as long as they are within the range of a float64;
// the worst of 640 answers held against 40-digit arithmetic is off by 4e-13 (a stress fallen by 124 decades), the others by
// 1e-13 or less.
//
// # Speed
//
// The benchmarks of this package time the library's step against the least it could cost and against the same step done with
// dense matrices, in one run. Dated results are in results, readable by benchstat.
//
// The problems are idealised. They say whether a code solves its equations, never whether a part is safe: that is decided
// by the governing code of design and by qualified engineers.
package bench
