package creeplaw

import "math"

// DarveauxBanerji is the hyperbolic-sine law of solder with its modulus written out, in the form after Darveaux and Banerji
//
//	ṗ = A [μ(T)/T] sinhⁿ[σ/s(T)] exp(-Q/RT)
//
// Symbols: σ von Mises stress [stress]; T absolute temperature [K]; A prefactor [K/(unit of μ · time)]; μ(T) a modulus; n
// exponent [-]; s(T) the stress at which the hyperbolic sine takes over [stress]; Q activation energy [J/mol]; R gas
// constant. Both μ and s are linear in T. In the source s is μ over a constant; published constants are rounded apart, so
// both are given here.
//
// At zero stress the rate is zero, with a finite slope for n = 1, 0 for n > 1 and +Inf for n < 1. At low stress it is a power
// law, at high stress an exponential; the logarithm is exact in both limits. No creep strain enters. Temperatures at which T,
// μ or s is not positive give NaN and are explained by CheckPoint; so is negative or NaN stress.
//
// Source: R. Darveaux, K. Banerji, IEEE Trans. CHMT 15 (1992) 1013–1024 (from memory).
type DarveauxBanerji struct {
	logPrefactor   float64
	exponent       float64
	activation     float64 // Q/R [K]
	modulus, scale ShearModulus
	given[Law]
}

var (
	_ Logarithmic = DarveauxBanerji{}
	_ Explainer   = DarveauxBanerji{}
)

// ModulusSinh holds the parameters of a DarveauxBanerji law.
type ModulusSinh struct {
	Prefactor        float64      // A [K/(unit of Modulus · time)], > 0
	Modulus          ShearModulus // μ(T), in any unit that A is given for
	StressScale      ShearModulus // s(T) [stress]
	Exponent         float64      // n [-], > 0
	ActivationEnergy float64      // Q [J/mol], >= 0
}

const darveauxName = "Darveaux–Banerji"

// NewDarveauxBanerji builds the law. A parameter out of the bounds stated beside it is a *ParameterError.
func NewDarveauxBanerji(c ModulusSinh) (DarveauxBanerji, error) {
	if err := positive(darveauxName, parameter{"prefactor", c.Prefactor}, parameter{"exponent", c.Exponent}); err != nil {
		return DarveauxBanerji{}, err
	}
	if err := c.Modulus.check(darveauxName, "modulus"); err != nil {
		return DarveauxBanerji{}, err
	}
	if err := c.StressScale.check(darveauxName, "stress scale"); err != nil {
		return DarveauxBanerji{}, err
	}
	arrhenius, err := NewArrhenius(c.ActivationEnergy)
	if err != nil {
		return DarveauxBanerji{}, &ParameterError{darveauxName, "activation energy", c.ActivationEnergy, "at least 0 and finite"}
	}
	v := append([]float64{c.Prefactor, c.Exponent}, c.Modulus.values()...)
	v = append(append(v, c.StressScale.values()...), c.ActivationEnergy)
	return DarveauxBanerji{math.Log(c.Prefactor), c.Exponent, arrhenius.activation, c.Modulus, c.StressScale,
		remember(darveauxForm, v...)}, nil
}

// LogRate returns the logarithm and the local exponents.
func (d DarveauxBanerji) LogRate(p Point) LogRate {
	modulus, scale := d.modulus.At(p.Temperature), d.scale.At(p.Temperature)
	if !(p.Temperature > 0 && modulus > 0 && scale > 0) {
		return undefinedLog()
	}
	l := Garofalo{coefficient: 1 / scale, exponent: d.exponent}.LogRate(p)
	activation := d.activation / p.Temperature
	l.Value += d.logPrefactor + math.Log(modulus/p.Temperature) - activation
	l.ByLogTemperature = activation - 1 + p.Temperature*(d.modulus.Slope/modulus-l.ByLogStress*d.scale.Slope/scale)
	return l
}

// Rate returns ṗ and its derivatives by stress and temperature.
func (d DarveauxBanerji) Rate(p Point) Rate {
	l := d.LogRate(p)
	if p.Stress == 0 && !math.IsNaN(l.Value) {
		modulus, scale := d.modulus.At(p.Temperature), d.scale.At(p.Temperature)
		return Rate{ByStress: slopeOfPower(d.exponent,
			d.logPrefactor+math.Log(modulus/p.Temperature)-d.activation/p.Temperature-math.Log(scale))}
	}
	return rateOf(p, l)
}

// CheckPoint says whether temperature or stress is out of bounds.
func (d DarveauxBanerji) CheckPoint(p Point) error {
	low, high := d.modulus.bounds()
	l, h := d.scale.bounds()
	low, high = math.Max(low, l), math.Min(high, h)
	if !math.IsNaN(d.LogRate(p).Value) || !(p.Stress >= 0) || p.Temperature > low && p.Temperature < high {
		return reason(darveauxName, d, p)
	}
	return &DomainError{darveauxName, "temperature", p.Temperature, low, high}
}
