package creeplaw

import "math"

// Omega is tertiary creep that softens with its own strain,
//
//	ṗ = ε̇₀(σ, T) exp(Ω(σ, T) p)
//
// Symbols: σ von Mises stress [stress]; T absolute temperature [K]; p accumulated equivalent creep strain [-]; ε̇₀ initial rate
// [1/time]; Ω coefficient of acceleration [-]. Under constant stress in tension p = -ln(1 - Ω ε̇₀ t)/Ω: the life is
// 1/(Ω ε̇₀), and at any time the life left is 1/(Ω ṗ).
//
// It is the law of the Omega method with the von Mises stress. The method's corrections of Ω for triaxial stress and for the
// shape of a part are rules of assessment, for the code that uses it to make; this law does not make them.
//
// Because the rate grows with creep strain a long step may have no solution: it then ends as beyond rupture, see package
// integrate. Zero stress, the limits and what is undefined are those of the initial rate.
//
// Source: M. Prager, J. Pressure Vessel Technol. 117 (1995) 95–103; API 579-1/ASME FFS-1, part 10 and material annex (from
// memory).
type Omega struct {
	initial Logarithmic // nil for polynomials
	omega   float64
	poly    *omegaPolynomials
}

const omegaName = "Omega"

var (
	_ Logarithmic = Omega{}
	_ Explainer   = Omega{}
)

// NewOmega builds the law from the initial rate as a law of stress and temperature and a constant Ω, positive and finite. A
// nil initial rate is a *MissingError, one with internal variables a *CompositionError.
func NewOmega(initial Law, omega float64) (Omega, error) {
	if initial == nil {
		return Omega{}, &MissingError{omegaName, "initial rate"}
	}
	if err := withoutVariables(omegaName, initial); err != nil {
		return Omega{}, err
	}
	if err := positive(omegaName, parameter{"coefficient of acceleration", omega}); err != nil {
		return Omega{}, err
	}
	return Omega{initial: Log(initial), omega: omega}, nil
}

// OmegaPolynomials are the coefficients of the form in the material annex of API 579-1/ASME FFS-1, in its own units: stress in
// ksi, time in h, temperature in °F,
//
//	log10 ε̇₀ = -[A0 + (A1 + A2 S + A3 S² + A4 S³)/(T_F + 460)]
//	log10 Ω  =   B0 + (B1 + B2 S + B3 S² + B4 S³)/(T_F + 460),   S = log10 σ
//
// The temperature given to the law is absolute [K] all the same: T_F + 460 = 1.8 T + 0.33.
//
// Polynomials go astray outside the data they were fitted to. Outside the range of stress the law therefore goes on as a
// straight line in log ε̇₀ over log σ, with Ω held: that is an extrapolation, kept so that unloaded material creeps at no rate
// and a trial stress beyond the range does no harm. Outside the range of temperature the law is undefined (NaN).
type OmegaPolynomials struct {
	Rate         [5]float64 // A0 … A4
	Acceleration [5]float64 // B0 … B4
	Stress       [2]float64 // lowest and highest stress [ksi]
	Temperature  [2]float64 // lowest and highest absolute temperature [K]
}

// NewOmegaFromPolynomials builds the law in ksi, h and K; InUnits turns it into the units of a host. The coefficients must be
// finite, the ranges ascend between positive finite numbers, and the stress exponent be positive at both ends of the range of
// stress, at the ends of the range of temperature: otherwise a *ParameterError.
func NewOmegaFromPolynomials(p OmegaPolynomials) (Omega, error) {
	for _, c := range append(p.Rate[:], p.Acceleration[:]...) {
		if !finite(c) {
			return Omega{}, &ParameterError{omegaName, "coefficient", c, "finite"}
		}
	}
	for _, r := range []struct {
		name string
		in   [2]float64
	}{{"stress", p.Stress}, {"temperature", p.Temperature}} {
		if err := positive(omegaName, parameter{"lowest " + r.name, r.in[0]}, parameter{"highest " + r.name, r.in[1]}); err != nil {
			return Omega{}, err
		}
		if !(r.in[1] > r.in[0]) {
			return Omega{}, &ParameterError{omegaName, "highest " + r.name, r.in[1], "above the lowest"}
		}
	}
	w := &omegaPolynomials{given: p, rate: p.Rate, acceleration: p.Acceleration, temperature: p.Temperature,
		low: math.Log10(p.Stress[0]), high: math.Log10(p.Stress[1])}
	for _, t := range p.Temperature {
		for _, s := range []float64{w.low, w.high} {
			if _, slope := cubic(&w.rate, s); !(-slope/rankine(t) > 0) {
				return Omega{}, &ParameterError{omegaName, "stress exponent at an end of the range", -slope / rankine(t), "positive"}
			}
		}
	}
	return Omega{poly: w}, nil
}

// LogRate returns ln ε̇₀ + Ω p with its exponents.
func (o Omega) LogRate(p Point) LogRate {
	if !(p.Stress >= 0 && p.Strain >= 0) {
		return undefinedLog()
	}
	if o.poly != nil {
		return o.poly.logRate(p)
	}
	l := o.initial.LogRate(p)
	l.Value += o.omega * p.Strain
	l.ByLogStrain += o.omega * p.Strain
	return l
}

// Rate returns ṗ; its derivative by strain is Ω ṗ.
func (o Omega) Rate(p Point) Rate {
	if o.poly == nil && (p.Stress == 0 || p.Strain == 0) { // the limits are those of the initial rate
		r := o.initial.Rate(p)
		grown := math.Exp(o.omega * p.Strain)
		byStrain := r.ByStrain
		if finite(r.Value) {
			byStrain += o.omega * r.Value
		}
		return Rate{scale(r.Value, grown), scale(r.ByStress, grown), scale(byStrain, grown), scale(r.ByTemperature, grown)}
	}
	l := o.LogRate(p)
	if p.Stress == 0 && !math.IsNaN(l.Value) {
		p.Stress = faint
		return Rate{ByStress: slopeAtZero(o.LogRate(p), p.Stress)}
	}
	r := rateOf(p, l)
	if p.Strain == 0 && !math.IsNaN(l.Value) {
		omega, _, _ := o.poly.at(p)
		r.ByStrain = omega * r.Value
	}
	return r
}

// CheckPoint tells which bound a point is outside of.
func (o Omega) CheckPoint(p Point) error {
	if o.poly == nil {
		return reason(omegaName, o, p, o.initial)
	}
	if t := o.poly.temperature; p.Stress >= 0 && p.Strain >= 0 && !(p.Temperature >= t[0] && p.Temperature <= t[1]) {
		return &DomainError{omegaName, "temperature", p.Temperature, t[0], t[1]}
	}
	return reason(omegaName, o, p)
}

type omegaPolynomials struct {
	rate, acceleration [5]float64
	low, high          float64 // log10 of the range of stress
	temperature        [2]float64
	given              OmegaPolynomials
}

// rankine is T_F + 460 at an absolute temperature in K: not quite the temperature in °R.
func rankine(temperature float64) float64 { return 1.8*temperature + 0.33 }

// cubic is c1 + c2 S + c3 S² + c4 S³ and its slope.
func cubic(c *[5]float64, s float64) (value, slope float64) {
	return c[1] + s*(c[2]+s*(c[3]+s*c[4])), c[2] + s*(2*c[3]+s*3*c[4])
}

// at returns Ω and its logarithmic derivatives.
func (w *omegaPolynomials) at(p Point) (omega, byLogStress, byLogTemperature float64) {
	s, t := math.Log10(p.Stress), rankine(p.Temperature)
	held := math.Min(math.Max(s, w.low), w.high)
	value, slope := cubic(&w.acceleration, held)
	omega = math.Exp(math.Ln10 * (w.acceleration[0] + value/t))
	if held == s {
		byLogStress = slope / t
	}
	return omega, byLogStress, -math.Ln10 * value / t * (1.8 * p.Temperature / t)
}

func (w *omegaPolynomials) logRate(p Point) LogRate {
	if !(p.Temperature >= w.temperature[0] && p.Temperature <= w.temperature[1]) {
		return undefinedLog()
	}
	if p.Stress == 0 {
		return LogRate{Value: math.Inf(-1)}
	}
	s, t := math.Log10(p.Stress), rankine(p.Temperature)
	held := math.Min(math.Max(s, w.low), w.high)
	value, slope := cubic(&w.rate, held)
	value += slope * (s - held)
	omega, byLogStress, byLogTemperature := w.at(p)
	grown := omega * p.Strain
	return LogRate{
		Value:            -math.Ln10*(w.rate[0]+value/t) + grown,
		ByLogStress:      -slope/t + grown*byLogStress,
		ByLogStrain:      grown,
		ByLogTemperature: math.Ln10*value/t*(1.8*p.Temperature/t) + grown*byLogTemperature,
	}
}
