// Package creeplaw holds creep rate laws: the equivalent creep strain rate of a material as a function of von Mises stress,
// accumulated equivalent creep strain and temperature, with its partial derivatives. It knows no tensor and no time step.
//
// # Laws and capabilities
//
// A Law is one method, Rate. What a law can do beyond that is found by type assertion, once, when a material is built:
//
//	Law          the rate and its partial derivatives     every law
//	Logarithmic  the logarithm of the rate                every law of this package; Log adapts any other
//	Explainer    why a point is outside the domain        laws with a limited domain
//	Evolving     internal variables and their evolution   damage, cavitation, deformation resistance
//	Parametric   its parameters, and the law from others  every law of this package that is built from numbers
//
// History enters through the accumulated creep strain (strain hardening) and through internal variables, never through a clock.
//
// A user's own law implements Law, or is a function made one by RateFunc (with derivatives) or ValueFunc (without). Package
// creeplaw/lawtest checks it in one line of a test.
//
// # Units
//
// Any consistent set. A prefactor carries its units: A in A σⁿ is in stress⁻ⁿ/time, so going from MPa to Pa multiplies it by
// 10⁻⁶ⁿ. Temperatures are absolute, activation energies in J/mol.
//
// Published parameters are starting points, never design data.
package creeplaw
