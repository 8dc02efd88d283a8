// Package lawtest checks a creep law, a user's own included, in one line of a test:
//
//	lawtest.Run(t, law, lawtest.Box{
//		Claims: lawtest.RateOnly,
//		Stress: lawtest.Range{1, 300}, Strain: lawtest.Range{1e-8, 0.1}, Temperature: lawtest.Range{700, 950},
//	})
//
// Run samples the box log-uniformly from a seed, corners included, and holds the law to these rules. A broken rule is
// one failure of the test, which names the rule, the worst point, the numbers found there and the seed.
//
//	finite in the box           the rate and its partial derivatives are finite numbers
//	rate not negative           ṗ >= 0
//	derivative by stress        ∂ṗ/∂σ, ∂ṗ/∂p, ∂ṗ/∂T agree with differences of the rate
//	derivative by strain
//	derivative by temperature
//	zero stress                 no creep there, and none is left as the stress goes there
//	zero strain                 a number or +Inf, and the rates at small strains lead to it
//	NaN stress gives NaN        a bad number is not swallowed
//	same input, same bits       in any order and from several goroutines
//	no allocation               by Rate, nor by LogRate
//	claimed capability          the law has every capability the box claims
//	logarithm of the rate       LogRate agrees with ln ṗ where the plain rate is a number
//	log exponent of stress      ∂ln ṗ/∂ln σ, … agree with differences of LogRate, over LogStress
//	log exponent of strain
//	log exponent of temperature
//	logarithm at zero           LogRate leads to the rates at zero stress and zero strain
//	explains what is undefined  CheckPoint returns an error where the rate is NaN, and nil at every other possible point
//	sound variables             of an Evolving law: named, finite at first, with a limit; the box has ranges for them
//	evolution at the start      Rate is what Evolve says of virgin material in tension
//	evolution finite            Evolve gives finite numbers in the box, and nothing for variables the law has not
//	derivatives of the evolution  all partial derivatives agree with differences of Evolve
//	evolution of NaN is NaN
//	blind to the principal stress  a law that says it does not see it gives the same without
//	evolution has the same bits
//	evolution without allocation
//	sound parameters            of a Parametric law: each has a name of its own and lies within its bounds
//	rebuilt from its parameters  the same bits; NaN and a wrong number of values are refused, with no law
//	units of the parameters     numbers in other units, by their dimensions, give the same rate there
//
// The rules for a capability run whenever the law has it. A capability that is claimed and missing is a failure, never a
// skip, and so is a rule that could examine fewer points than it should have.
//
// # What differences can resolve
//
// Each derivative is taken by the logarithm of its argument from seven points that stay inside the box (central where they
// fit, one-sided at its faces), exact for polynomials of the sixth degree, with steps from 1/4 down to 2⁻²² of the argument.
// Between one step and the next the truncation error falls 64-fold and the rounding error doubles. So the distance to the
// neighbours' results, on either side, bounds the error of each: truncation shows against the coarser step, rounding against
// the finer. Neighbours may agree by chance; so the bound also has the scatter of a value, as the largest step-to-step change
// over the seven finest steps shows it, and what rounding must cost at the least, a few units in the last place of the rate
// and of its logarithm, each over the step. The step with the smallest bound is used, and a derivative breaks its rule when
// it is further from the difference than DerivativeTolerance times the derivative plus four times that bound. A point counts as
// examined only if the bound is itself below DerivativeTolerance times the larger of derivative and rate; four of five
// points must count. At a kink, where a law changes regime, there is no derivative: such a point does not count.
//
// The sampling proves nothing between its points. A law that passes is consistent, not right: whether its numbers describe
// a material is for tests and for the governing code to say.
package lawtest
