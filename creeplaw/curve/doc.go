// Package curve turns published creep curves into laws. A curve is creep strain at constant stress and temperature as a
// function of time; most creep equations in papers, handbooks and design codes are of that kind. A law (package creeplaw)
// depends on the creep strain reached and on no clock.
//
//	c, err := curve.NewAndrade(β, κ)                  the curve under its published name
//	law, err := curve.NewStrainHardened(c)            a creeplaw.Law, ready for integrate.New
//
// # Curves
//
//	BaileyNorton, PrimarySecondary, GrahamWalles, Andrade      powers of time
//	LogarithmicCreep, McVetty, GarofaloTransient, Blackburn    transients that slow down or end, and steady creep
//	Findley                                                    polymers
//	TwoRegime                                                  primary, then steady, as nuclear codes have it
//	ThetaProjection                                            primary and tertiary
//	Sum                                                        any other, of the terms below
//
// All but TwoRegime are sums of terms: PowerOfTime, Steady, Saturating, Growing, LogOfTime, Hyperbolic. Each term is scaled
// by coefficients, functions of stress and temperature: Constant, Power, PowerAt, InversePower, Sinh, Exponential,
// Soderberg, LogBilinear, the rate of any steady law (RateOf), with a factor of temperature (Activated), multiplied
// (Product), or the user's own. So an equation that is not in the list is one call of NewSum:
//
//	c, err := curve.NewSum(
//		curve.Hyperbolic(curve.Power{Prefactor: 1e-7, Exponent: 2}, curve.Constant(1e-3)),
//		curve.Steady(curve.Sinh{Prefactor: 1e-9, StressCoefficient: 0.05, Exponent: 3}))
//
// A curve of another form implements Curve, or is a function made one by Func, with its derivatives. Coefficients and
// parameters are checked by the constructors; errors are those of package creeplaw and name curve, part and parameter.
//
// # From a curve to a law
//
// StrainHardened finds the time at which the curve would have reached the creep strain and takes its rate there. For sums
// that costs one to four evaluations of the curve, none for a single power of time, and no allocation; the coefficients
// are evaluated once. For a user's Curve it costs about twice as many, whole ones. TimeHardened, for legacy analyses only,
// is not a law: it needs the time handed in (creeplaw.During).
//
// # Accuracy
//
// The law follows its curve to rounding: to about 1e-14 of the rate, times the steepness of the rate where the curve is so
// flat that the creep strain hardly tells the time. The search works in logarithms where plain numbers will not do, over any
// span of time; it always ends.
//
// # Units
//
// Any consistent set, as in package creeplaw. Published parameters are starting points, never design data; beyond the
// stresses, temperatures and times they were fitted to they may mean nothing.
package curve
