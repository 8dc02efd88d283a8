package curve

// Transient is a part of creep that comes to an end, c (1 - e^(-rt)): its limit of strain c [-] and its rate constant r
// [1/time], functions of stress and temperature.
type Transient struct{ Strain, Rate Coefficient }

func (t Transient) part(name string) part {
	return part{Saturating(t.Strain, t.Rate), name + " strain", name + " rate constant"}
}

// LogarithmicCreep is creep at low temperature, which slows down without end and never stops,
//
//	ε = α(σ, T) ln(1 + γ(σ, T) t)
//
// Symbols: σ von Mises stress [stress]; T absolute temperature [K]; t time [time]; α [-] and γ [1/time] functions of stress and
// temperature.
//
// Zero at zero time, with the rate αγ; no bound at large time, where the rate falls as α/t. At zero stress it is zero if α
// or γ is. The law made from it is ṗ = αγ e^(-p/α).
//
// Source: F. Phillips, Phil. Mag. 9 (1905) 513; O. H. Wyatt, Proc. Phys. Soc. B 66 (1953) 459 (both from memory).
type LogarithmicCreep struct{ sum }

var _ Logarithmic = LogarithmicCreep{}

// NewLogarithmicCreep builds the curve from α [-] and γ [1/time]. A missing one is a *creeplaw.MissingError, a parameter of
// them out of bounds a *creeplaw.ParameterError.
func NewLogarithmicCreep(strain, rate Coefficient) (LogarithmicCreep, error) {
	s, err := newSum("logarithmic creep", part{LogOfTime(strain, rate), "strain", "rate constant"})
	return LogarithmicCreep{s}, err
}

// McVetty is an exponentially decaying rate over a steady one,
//
//	dε/dt = ṡ(σ) + q G(σ) e^(-qt),   ε = G(σ) (1 - e^(-qt)) + ṡ(σ) t
//
// Symbols: σ von Mises stress [stress]; t time [time]; G limit of the transient strain [-] and ṡ steady rate [1/time],
// functions of stress (hyperbolic sines, as McVetty found) and, if wanted, of temperature; q decay constant [1/time], which
// does not depend on stress.
//
// Zero at zero time, with the rate qG + ṡ; at large time the rate falls to ṡ. At zero stress it is zero if G and ṡ are: with
// hyperbolic sines it is.
//
// Source: P. G. McVetty, Mech. Eng. 56 (1934) 149–154; Trans. ASME 65 (1943) 761–769 (both from memory).
type McVetty struct{ sum }

var _ Logarithmic = McVetty{}

// NewMcVetty builds the curve from G [-], q [1/time], positive and finite, and ṡ [1/time]. A missing coefficient is a
// *creeplaw.MissingError, a parameter out of bounds a *creeplaw.ParameterError.
func NewMcVetty(transientStrain Coefficient, decay float64, steadyRate Coefficient) (McVetty, error) {
	s, err := newSum("McVetty", Transient{transientStrain, Constant(decay)}.part("transient"),
		part{Steady(steadyRate), "steady rate", ""})
	return McVetty{s}, err
}

// GarofaloTransient is a transient of first order beside steady creep,
//
//	ε = εₜ(σ, T) (1 - e^(-rt)) + ṡ(σ, T) t,   r = r(σ, T)
//
// Symbols: σ von Mises stress [stress]; T absolute temperature [K]; t time [time]; εₜ limit of the transient strain [-]; r
// rate constant [1/time], often in proportion to the steady rate (Product); ṡ steady rate [1/time].
//
// Zero at zero time, with the rate r εₜ + ṡ; at large time the rate falls to ṡ. At zero stress it is zero if εₜ or r is and ṡ
// is: exponentials of stress in both of a pair make it creep under no stress.
//
// Source: F. Garofalo, Fundamentals of Creep and Creep-Rupture in Metals, Macmillan 1965; first-order kinetics after
// G. A. Webster, A. P. D. Cox, J. E. Dorn, Metal Sci. J. 3 (1969) 221 (both from memory).
type GarofaloTransient struct{ sum }

var _ Logarithmic = GarofaloTransient{}

// NewGarofaloTransient builds the curve. A missing coefficient is a *creeplaw.MissingError, a parameter of one out of bounds
// a *creeplaw.ParameterError.
func NewGarofaloTransient(transient Transient, steadyRate Coefficient) (GarofaloTransient, error) {
	s, err := newSum("Garofalo's transient", transient.part("transient"), part{Steady(steadyRate), "steady rate", ""})
	return GarofaloTransient{s}, err
}

// Blackburn is two transients, a fast and a slow one, beside steady creep, as used for austenitic steels,
//
//	ε = εₓ (1 - e^(-st)) + εₜ (1 - e^(-rt)) + ṡₘ t
//
// Symbols: t time [time]; εₓ, εₜ limits of the fast and of the slow transient [-] and s, r their rate constants [1/time]; ṡₘ
// steady rate [1/time]; all of them functions of von Mises stress σ [stress] and absolute temperature T [K].
//
// Zero at zero time, with the rate s εₓ + r εₜ + ṡₘ; at large time the rate falls to ṡₘ. At zero stress it is zero if the limits
// and the steady rate are. Published fits often have exponentials of stress: where both coefficients of a transient, or the
// steady rate, are such, the curve creeps under no stress, and so does the law made from it.
//
// Source: L. D. Blackburn, Isochronous stress-strain curves for austenitic stainless steels, in: The Generation of
// Isochronous Stress-Strain Curves, ASME 1972 (from memory).
type Blackburn struct{ sum }

var _ Logarithmic = Blackburn{}

// NewBlackburn builds the curve. A missing coefficient is a *creeplaw.MissingError, a parameter of one out of bounds a
// *creeplaw.ParameterError.
func NewBlackburn(fast, slow Transient, steadyRate Coefficient) (Blackburn, error) {
	s, err := newSum("Blackburn", fast.part("fast transient"), slow.part("slow transient"),
		part{Steady(steadyRate), "steady rate", ""})
	return Blackburn{s}, err
}
