package integrate

// Isotropic is isotropic linear elasticity, σ = C(T) : εₑ, by Young's modulus E [stress], positive, and Poisson's ratio
// ν [-], above -1 and below 0.5, each a constant or a table over absolute temperature.
type Isotropic struct {
	Young, Poisson Table
}

// NewIsotropic is the common case: constants E [stress] and ν [-]. They are checked by New.
func NewIsotropic(young, poisson float64) Isotropic {
	return Isotropic{Young: Constant(young), Poisson: Constant(poisson)}
}

// Expansion is free thermal strain, the same in all directions,
//
//	εₜ(T) = α(T) (T - T₀)
//
// with the mean coefficient α [1/K] between T₀ and T, a constant or a table, and the reference temperature T₀ [K] at which
// the unloaded material has no strain. The zero Expansion is none.
type Expansion struct {
	Mean      Table
	Reference float64
}

// At returns εₜ [-] and its derivative by temperature [1/K] at the absolute temperature T [K]; NaN outside a table.
func (x Expansion) At(temperature float64) (value, slope float64) {
	if x.none() {
		return 0, 0
	}
	alpha, byT := x.Mean.At(temperature)
	dT := temperature - x.Reference
	return alpha * dT, alpha + byT*dT
}

func (x Expansion) none() bool { return x.Mean.temperature == nil && x.Mean.constant == 0 }

// moduli are the elastic constants at one temperature with their derivatives.
type moduli struct {
	bulk, shear       float64 // K, G [stress]
	bulkByT, shearByT float64 // dK/dT, dG/dT [stress/K]
}

func moduliFrom(young, youngByT, poisson, poissonByT float64) moduli {
	k := 1 / (3 * (1 - 2*poisson))
	g := 1 / (2 * (1 + poisson))
	return moduli{
		bulk:     young * k,
		shear:    young * g,
		bulkByT:  youngByT*k + young*6*k*k*poissonByT,
		shearByT: youngByT*g - young*2*g*g*poissonByT,
	}
}

// at returns the moduli at a temperature; NaN outside a table.
func (e *Isotropic) at(temperature float64) moduli {
	young, youngByT := e.Young.At(temperature)
	poisson, poissonByT := e.Poisson.At(temperature)
	return moduliFrom(young, youngByT, poisson, poissonByT)
}

func (e *Isotropic) constant() bool {
	return e.Young.temperature == nil && e.Poisson.temperature == nil
}

// check reports a table value no stable elastic solid can have.
func (e *Isotropic) check() error {
	err := e.Young.each(func(temperature, v float64) error {
		if !(v > 0) || !finite(v) {
			return &MaterialError{"Young's modulus", v, temperature, "positive and finite"}
		}
		return nil
	})
	if err != nil {
		return err
	}
	return e.Poisson.each(func(temperature, v float64) error {
		if !(v > -1 && v < 0.5) {
			return &MaterialError{"Poisson's ratio", v, temperature, "above -1 and below 0.5"}
		}
		return nil
	})
}
