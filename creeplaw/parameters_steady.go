package creeplaw

var (
	_ Parametric = Norton{}
	_ Parametric = DoublePower{}
	_ Parametric = Garofalo{}
	_ Parametric = Exponential{}
	_ Parametric = Soderberg{}
	_ Parametric = PowerExponential{}
	_ Parametric = Diffusional{}
	_ Parametric = MukherjeeBirdDorn{}
	_ Parametric = DarveauxBanerji{}
	_ UnitBound  = Diffusional{}
	_ UnitBound  = MukherjeeBirdDorn{}
)

// Dimensions that several laws have.
var (
	perTime       = Dimension{Time: -1}
	inStress      = Dimension{Stress: 1}
	perStress     = Dimension{Stress: -1}
	dimensionless = Dimension{}
)

// perPower is the unit of a prefactor of a power of stress, stress⁻ⁿ/time.
func perPower(n float64) Dimension { return Dimension{Stress: -n, Time: -1} }

func nortonForm(v []float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", perPower(v[1])), positiveNumber("stress exponent", dimensionless)},
		func(v []float64) (Law, error) { return NewNorton(v[0], v[1]) },
	}
}

func nortonAtForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("rate", perTime), positiveNumber("stress", inStress),
			positiveNumber("stress exponent", dimensionless)},
		func(v []float64) (Law, error) { return NewNortonAt(v[0], v[1], v[2]) },
	}
}

func doublePowerForm(v []float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("first prefactor", perPower(v[1])), positiveNumber("first stress exponent", dimensionless),
			positiveNumber("second prefactor", perPower(v[3])), positiveNumber("second stress exponent", dimensionless)},
		func(v []float64) (Law, error) { return NewDoublePower(v[0], v[1], v[2], v[3]) },
	}
}

func doublePowerAtForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("rate", perTime), positiveNumber("transition stress", inStress),
			positiveNumber("first stress exponent", dimensionless), positiveNumber("second stress exponent", dimensionless)},
		func(v []float64) (Law, error) { return NewDoublePowerAt(v[0], v[1], v[2], v[3]) },
	}
}

func garofaloForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", perTime), positiveNumber("stress coefficient", perStress),
			positiveNumber("exponent", dimensionless)},
		func(v []float64) (Law, error) { return NewGarofalo(v[0], v[1], v[2]) },
	}
}

func exponentialForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", perTime), positiveNumber("stress scale", inStress)},
		func(v []float64) (Law, error) { return NewExponential(v[0], v[1]) },
	}
}

func soderbergForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", perTime), positiveNumber("stress scale", inStress)},
		func(v []float64) (Law, error) { return NewSoderberg(v[0], v[1]) },
	}
}

func powerExponentialForm(v []float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", perPower(v[1])), positiveNumber("stress exponent", dimensionless),
			positiveNumber("stress scale", inStress)},
		func(v []float64) (Law, error) { return NewPowerExponential(v[0], v[1], v[2]) },
	}
}

// fixed marks parameters as belonging to the law's own units.
func fixed(ps ...Parameter) []Parameter {
	for i := range ps {
		ps[i].Scale, ps[i].Dimension = FixedUnits, dimensionless
	}
	return ps
}

// ofDiffusivity are the parameters of a Diffusivity.
func ofDiffusivity(path string) []Parameter {
	return fixed(positiveNumber(path+" diffusivity", dimensionless), positiveNumber(path+" activation energy", dimensionless))
}

func (d Diffusivity) values() []float64 { return []float64{d.Prefactor, d.ActivationEnergy} }

func diffusivityFrom(v []float64) Diffusivity { return Diffusivity{v[0], v[1]} }

// ofGrain are the parameters that diffusion along either path needs.
func ofGrain() []Parameter {
	return fixed(positiveNumber("atomic volume", dimensionless), positiveNumber("grain size", dimensionless))
}

func diffusionalForm([]float64) form[Law] {
	return form[Law]{
		append(append(ofGrain(), ofDiffusivity("lattice")...), ofDiffusivity("boundary")...),
		func(v []float64) (Law, error) {
			return NewDiffusional(v[0], v[1], diffusivityFrom(v[2:4]), diffusivityFrom(v[4:6]))
		},
	}
}

func nabarroHerringForm([]float64) form[Law] {
	return form[Law]{append(ofGrain(), ofDiffusivity("lattice")...),
		func(v []float64) (Law, error) { return NewNabarroHerring(v[0], v[1], diffusivityFrom(v[2:4])) }}
}

func cobleForm([]float64) form[Law] {
	return form[Law]{append(ofGrain(), ofDiffusivity("boundary")...),
		func(v []float64) (Law, error) { return NewCoble(v[0], v[1], diffusivityFrom(v[2:4])) }}
}

// OwnUnits returns Pa and s.
func (d Diffusional) OwnUnits() Units { return Units{Pascal, Second} }

// OwnUnits returns Pa and s.
func (m MukherjeeBirdDorn) OwnUnits() Units { return Units{Pascal, Second} }

// ofModulus are the parameters of a modulus that changes with temperature.
func ofModulus(quantity string, value Dimension) []Parameter {
	slope := value
	slope.Temperature--
	return []Parameter{positiveNumber(quantity, value), anyNumber("slope of the "+quantity, slope),
		temperatureNumber("reference temperature of the " + quantity)}
}

func (m ShearModulus) values() []float64 { return []float64{m.Value, m.Slope, m.Reference} }

func modulusFrom(v []float64) ShearModulus {
	return ShearModulus{Value: v[0], Slope: v[1], Reference: v[2]}
}

// given are the values of the parameters and the form they have: with or without core diffusion, with or without grain size.
func (c *DislocationCreep) given() given[Law] {
	hasCore, hasGrain := c.Core != (Diffusivity{}), c.GrainExponent != 0 || c.GrainSize != 0
	v := append([]float64{c.Prefactor, c.StressExponent, c.BurgersVector}, c.Modulus.values()...)
	v = append(v, c.Lattice.values()...)
	if hasCore {
		v = append(v, c.Core.values()...)
	}
	if hasGrain {
		v = append(v, c.GrainExponent, c.GrainSize)
	}
	return remember(func([]float64) form[Law] { return mukherjeeForm(hasCore, hasGrain) }, v...)
}

func mukherjeeForm(hasCore, hasGrain bool) form[Law] {
	ps := fixed(positiveNumber("prefactor", dimensionless), positiveNumber("stress exponent", dimensionless),
		positiveNumber("Burgers vector", dimensionless))
	modulus := ofModulus("shear modulus", dimensionless)
	fixed(modulus[:2]...) // the reference temperature is one in any units
	ps = append(append(ps, modulus...), ofDiffusivity("lattice")...)
	if hasCore {
		ps = append(ps, ofDiffusivity("core")...)
	}
	if hasGrain {
		ps = append(ps, fixed(positiveNumber("grain-size exponent", dimensionless), positiveNumber("grain size", dimensionless))...)
	}
	return form[Law]{ps, func(v []float64) (Law, error) {
		c := DislocationCreep{Prefactor: v[0], StressExponent: v[1], BurgersVector: v[2], Modulus: modulusFrom(v[3:6]),
			Lattice: diffusivityFrom(v[6:8])}
		v = v[8:]
		if hasCore {
			c.Core, v = diffusivityFrom(v), v[2:]
		}
		if hasGrain {
			c.GrainExponent, c.GrainSize = v[0], v[1]
		}
		return NewMukherjeeBirdDorn(c)
	}}
}

func darveauxForm([]float64) form[Law] {
	ps := []Parameter{positiveNumber("prefactor", Dimension{Time: -1, Temperature: 1}), positiveNumber("exponent", dimensionless)}
	ps = append(append(ps, ofModulus("modulus", dimensionless)...), ofModulus("stress scale", inStress)...)
	return form[Law]{append(ps, positiveNumber("activation energy", dimensionless)), func(v []float64) (Law, error) {
		return NewDarveauxBanerji(ModulusSinh{Prefactor: v[0], Exponent: v[1], Modulus: modulusFrom(v[2:5]),
			StressScale: modulusFrom(v[5:8]), ActivationEnergy: v[8]})
	}}
}
