package creeplaw

import "math"

// MukherjeeBirdDorn is the power law of dislocation creep with the modulus and diffusivity of the metal written out, after
// Mukherjee, Bird and Dorn, in tension
//
//	ṗ = A (D μ b/kT) (σ/μ)ⁿ (b/d)^q
//
// and, with diffusion along dislocation cores as Frost and Ashby add it,
//
//	D = D_v [1 + (10 a_c D_c/(b² D_v)) (σₛ/μ)²],   σₛ = σ/√3
//
// Symbols: σ von Mises stress [Pa]; σₛ the shear stress of the same state [Pa]; T absolute temperature [K]; A prefactor [-];
// n stress exponent [-]; μ(T) shear modulus [Pa]; D_v = D₀ exp(-Q/RT) lattice diffusivity [m²/s]; a_c D_c core diffusivity
// times the core's cross-section [m⁴/s]; b length of the Burgers vector [m]; d grain size [m]; q inverse grain-size
// exponent [-]; k Boltzmann's constant [J/K]; R gas constant.
//
// The law is in Pa, s and K; see InUnits for others. Frost and Ashby write it for shear, γ̇ = A₂ (Dμb/kT)(σₛ/μ)ⁿ, with
// A₂ = 3^((n+1)/2) A.
//
// At zero stress the rate is zero, with a finite slope for n = 1, 0 above and +Inf below. Core diffusion raises the exponent
// from n to n + 2 at high stress and low temperature; the logarithm is exact far to either side. No creep strain enters.
// Temperatures that are not positive, or at which the shear modulus is not, give NaN and are explained by CheckPoint; so is
// negative or NaN stress.
//
// Source: A. K. Mukherjee, J. E. Bird, J. E. Dorn, Trans. ASM 62 (1969) 155–179; H. J. Frost, M. F. Ashby,
// Deformation-Mechanism Maps, Pergamon 1982, equations 2.18–2.21 (both from memory).
type MukherjeeBirdDorn struct {
	logConstant float64 // ln of A D₀ b/k (b/d)^q
	exponent    float64
	activation  float64 // Q/R of the lattice [K]
	modulus     ShearModulus
	hasCore     bool
	logCore     float64 // ln of (10/3) a_c D₀c/(b² D₀)
	coreExcess  float64 // (Q_c - Q)/R [K]
	given[Law]
}

var (
	_ Logarithmic = MukherjeeBirdDorn{}
	_ Explainer   = MukherjeeBirdDorn{}
)

// DislocationCreep holds the parameters of a MukherjeeBirdDorn law.
type DislocationCreep struct {
	Prefactor      float64      // A, fitted to tension [-], > 0
	StressExponent float64      // n [-], > 0
	Modulus        ShearModulus // μ(T)
	Lattice        Diffusivity  // D₀ [m²/s] and Q
	BurgersVector  float64      // b [m], > 0
	Core           Diffusivity  // a_c D₀c [m⁴/s] and Q_c; the zero value leaves core diffusion out
	GrainSize      float64      // d [m], > 0; not used and may be zero when GrainExponent is zero
	GrainExponent  float64      // q [-], >= 0
}

const mukherjeeName = "Mukherjee–Bird–Dorn"

// NewMukherjeeBirdDorn builds the law. A parameter out of the bounds stated beside it is a *ParameterError.
func NewMukherjeeBirdDorn(c DislocationCreep) (MukherjeeBirdDorn, error) {
	if err := c.check(); err != nil {
		return MukherjeeBirdDorn{}, err
	}
	m := MukherjeeBirdDorn{
		logConstant: math.Log(c.Prefactor) + math.Log(c.Lattice.Prefactor) + math.Log(c.BurgersVector/BoltzmannConstant),
		exponent:    c.StressExponent,
		activation:  c.Lattice.ActivationEnergy / GasConstant,
		modulus:     c.Modulus,
		given:       c.given(),
	}
	if c.GrainExponent != 0 {
		m.logConstant += c.GrainExponent * math.Log(c.BurgersVector/c.GrainSize)
	}
	if c.Core != (Diffusivity{}) {
		m.hasCore = true
		m.logCore = math.Log(10.0/3) + math.Log(c.Core.Prefactor/c.Lattice.Prefactor) - 2*math.Log(c.BurgersVector)
		m.coreExcess = (c.Core.ActivationEnergy - c.Lattice.ActivationEnergy) / GasConstant
	}
	return m, nil
}

func (c *DislocationCreep) check() error {
	err := positive(mukherjeeName, parameter{"prefactor", c.Prefactor}, parameter{"stress exponent", c.StressExponent},
		parameter{"Burgers vector", c.BurgersVector})
	if err != nil {
		return err
	}
	if err := c.Modulus.check(mukherjeeName, "shear modulus"); err != nil {
		return err
	}
	if err := c.Lattice.check(mukherjeeName, "lattice"); err != nil {
		return err
	}
	if c.Core != (Diffusivity{}) {
		if err := c.Core.check(mukherjeeName, "core"); err != nil {
			return err
		}
	}
	if !(c.GrainExponent >= 0) || math.IsInf(c.GrainExponent, 1) {
		return &ParameterError{mukherjeeName, "grain-size exponent", c.GrainExponent, "at least 0 and finite"}
	}
	if c.GrainExponent != 0 {
		return positive(mukherjeeName, parameter{"grain size", c.GrainSize})
	}
	return nil
}

// at returns the modulus at T, ln of the rate at σ = μ without core diffusion, and its derivative by ln T at fixed σ/μ.
func (m MukherjeeBirdDorn) at(temperature float64) (modulus, logRate, byLogTemperature float64) {
	modulus = m.modulus.At(temperature)
	activation := m.activation / temperature
	logRate = m.logConstant + math.Log(modulus/temperature) - activation
	byLogTemperature = activation - 1 + temperature*m.modulus.Slope/modulus
	return modulus, logRate, byLogTemperature
}

// LogRate returns the logarithm and the local exponents; that of stress lies between n and n + 2.
func (m MukherjeeBirdDorn) LogRate(p Point) LogRate {
	modulus, logRate, byLogTemperature := m.at(p.Temperature)
	switch {
	case !(p.Stress >= 0 && p.Temperature > 0 && modulus > 0):
		return undefinedLog()
	case p.Stress == 0:
		return LogRate{Value: math.Inf(-1), ByLogStress: m.exponent}
	}
	logRatio := math.Log(p.Stress / modulus)
	l := LogRate{Value: logRate + m.exponent*logRatio, ByLogStress: m.exponent, ByLogTemperature: byLogTemperature}
	if m.hasCore {
		excess := m.coreExcess / p.Temperature
		core := m.logCore - excess + 2*logRatio // ln of the core's part over the lattice's
		share := 1 / (1 + math.Exp(-core))
		l.Value += log1pExp(core)
		l.ByLogStress += 2 * share
		l.ByLogTemperature += share * excess
	}
	l.ByLogTemperature -= l.ByLogStress * p.Temperature * m.modulus.Slope / modulus
	return l
}

// Rate returns ṗ and its derivatives by stress and temperature.
func (m MukherjeeBirdDorn) Rate(p Point) Rate {
	l := m.LogRate(p)
	if p.Stress == 0 && !math.IsNaN(l.Value) {
		modulus, logRate, _ := m.at(p.Temperature)
		return Rate{ByStress: slopeOfPower(m.exponent, logRate-math.Log(modulus))}
	}
	return rateOf(p, l)
}

// CheckPoint says whether temperature or stress is out of bounds.
func (m MukherjeeBirdDorn) CheckPoint(p Point) error {
	low, high := m.modulus.bounds()
	if !math.IsNaN(m.LogRate(p).Value) || !(p.Stress >= 0) || p.Temperature > low && p.Temperature < high {
		return reason(mukherjeeName, m, p)
	}
	return &DomainError{mukherjeeName, "temperature", p.Temperature, low, high}
}

// log1pExp is ln(1 + eˣ) without overflow.
func log1pExp(x float64) float64 {
	if x > 0 {
		return x + math.Log1p(math.Exp(-x))
	}
	return math.Log1p(math.Exp(x))
}

// slopeOfPower is the slope of C σⁿ at zero stress, given ln C.
func slopeOfPower(n, logPrefactor float64) float64 {
	switch {
	case n > 1:
		return 0
	case n < 1:
		return math.Inf(1)
	}
	return math.Exp(logPrefactor)
}
