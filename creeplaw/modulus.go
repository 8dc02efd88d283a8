package creeplaw

import "math"

// BoltzmannConstant is k in J/K (SI, exact since 2019).
const BoltzmannConstant = 1.380649e-23

// ShearModulus is a shear modulus that changes linearly with temperature,
//
//	μ(T) = Value + Slope (T - Reference)
//
// Units are Pa and K unless the law says otherwise. A slope of zero makes it a constant, whatever the reference. Where μ is not positive, the laws that use it are undefined.
type ShearModulus struct {
	Value     float64 // μ at the reference temperature [Pa], > 0
	Reference float64 // T₀ [K]; 300 K in Frost and Ashby
	Slope     float64 // dμ/dT [Pa/K], negative as a rule
}

// At returns the shear modulus [Pa] at the absolute temperature T [K].
func (m ShearModulus) At(temperature float64) float64 {
	return math.FMA(m.Slope, temperature-m.Reference, m.Value)
}

func (m ShearModulus) check(law, quantity string) error {
	if err := positive(law, parameter{quantity, m.Value}); err != nil {
		return err
	}
	if !finite(m.Slope) {
		return &ParameterError{law, "slope of the " + quantity, m.Slope, "finite"}
	}
	if !finite(m.Reference) || m.Slope != 0 && !(m.Reference > 0) {
		return &ParameterError{law, "reference temperature of the " + quantity, m.Reference, "positive and finite"}
	}
	return nil
}

// bounds is the range of temperature in which the modulus is positive.
func (m ShearModulus) bounds() (low, high float64) {
	zero := m.Reference - m.Value/m.Slope
	switch {
	case m.Slope < 0:
		return 0, zero
	case m.Slope > 0:
		return math.Max(zero, 0), math.Inf(1)
	}
	return 0, math.Inf(1)
}

// Diffusivity is a coefficient of diffusion that follows Arrhenius,
//
//	D(T) = Prefactor · exp(-Q/RT)
//
// The zero Diffusivity is no diffusion on that path.
type Diffusivity struct {
	// Prefactor is D₀. Its unit depends on the path: [m²/s] through the lattice; [m³/s] along grain boundaries, where it is
	// δD₀ with the boundary's width δ; [m⁴/s] along dislocation cores, where it is a_c D₀ with the core's cross-section a_c.
	Prefactor        float64
	ActivationEnergy float64 // Q [J/mol], >= 0
}

func (d Diffusivity) check(law, path string) error {
	if err := positive(law, parameter{path + " diffusivity", d.Prefactor}); err != nil {
		return err
	}
	if !(d.ActivationEnergy >= 0) || math.IsInf(d.ActivationEnergy, 1) {
		return &ParameterError{law, path + " activation energy", d.ActivationEnergy, "at least 0 and finite"}
	}
	return nil
}
