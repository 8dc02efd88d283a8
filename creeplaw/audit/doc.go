// Package audit examines a creep law as a reviewer would, before the law misbehaves in somebody's plant: any law, a user's own
// included, over the domain of stress, creep strain and temperature it is meant for.
//
//	report, err := audit.Run(law, audit.Domain{
//		Stress: audit.Range{20, 300}, Strain: audit.Range{1e-6, 0.1}, Temperature: audit.Range{773, 923},
//	}, audit.Settings{Units: creeplaw.Units{creeplaw.Megapascal, creeplaw.Hour}})
//	…
//	fmt.Print(report.Text("1 May 2025"))
//
// A Report holds typed findings (Kind, Severity, the point where each was seen, the figures, one sentence a reviewer would
// write), and every question that was put with how it came out. A law needs no registration; capabilities are found by type
// assertion. RunClocked does the same for a rate that depends on a clock.
//
// # What is asked
//
//	same input, same bits        every point again in the opposite order; a law that fails this is examined no further
//	internal variables           count, start, limit; Evolve in tension with the initial values is Rate
//	logarithm of the rate        LogRate is ln Rate
//	sign and finiteness          ṗ ≥ 0, ṗ and its derivatives finite, traced to the edge of the region where they are not
//	a NaN stress                 stays NaN
//	zero stress                  no creep there, and none left as the stress goes there
//	zero creep strain            the limit of the rates near it; infinite is remarked; zero is a law that never starts
//	derivatives                  of Rate by differences of its values, of LogRate by those of its own
//	continuity                   jumps and corners of ln ṗ along each argument, and at the breakpoints named
//	rise with stress             ln ṗ does not fall along a line of rising stress
//	hardening and softening      ∂ln ṗ/∂ln p, and what it means for the step, see below
//	unloaded wait                two histories that differ by an unloaded wait agree
//	activation                   -R ∂ln ṗ/∂(1/T): negative, none over a wide range, outside the bounds of common practice
//	ten times the stress         and a tenth: local exponents, how far ṗ is from the power law the domain ends with, NaN
//	rates of the variables       finite and differentiated, at states that creep at constant stress leads to in tension, torsion
//	                             and equal biaxial tension; their direction, and the step they allow
//
// # Uniqueness and the largest step
//
// Backward Euler over Δt at fixed stress solves p₁ = p₀ + Δt ṗ(σ, p₁, T). If the rate does not rise with creep strain there is
// exactly one solution for any Δt; at fixed strain, where σ = σ₀ - E(p₁-p₀) with the stiffness E of what holds it, likewise if
// it also rises with stress. If the rate softens, the solution connected to Δt → 0 exists while
//
//	Δt ∂ṗ/∂p < 1    at fixed stress,    Δt (∂ṗ/∂p - E ∂ṗ/∂σ) < 1    at fixed strain,
//
// both at the end of the step: up to the first maximum of Δt(p₁) = (p₁-p₀)/ṗ(p₁), which the audit walks to. So the criterion
// evaluated at the start is too kind, by e = 2.718 for an exponential softening. At fixed strain any step will do if
// E > (∂ṗ/∂p)/(∂ṗ/∂σ). With internal variables the determinant of 1 - Δt J takes the place of 1 - Δt ∂ṗ/∂p, J being the
// derivatives of the rates of creep strain and variables by themselves; it is followed along the solution as Δt grows.
//
// # How jumps and corners are found
//
// Along each line ln ṗ is scanned evenly in the logarithm of the argument. Where its fourth difference sticks out from those
// around, the place is closed in on: what is left between neighbouring numbers is a jump, a change of slope that does not
// shrink with the interval is a corner. A jump of one part in a million and a corner of one per cent of one plus the exponent
// are reported.
//
// # What it cannot see
//
// It samples: between its points and lines anything may be. A law that passes is consistent, not right; whether its numbers
// describe a material is for tests, for the governing code and for qualified engineers to say. A clock is seen where the law
// is a creeplaw.Clocked, a creeplaw.During, or reads a clock that Settings.SetClock moves, not where it is hidden deeper.
package audit
