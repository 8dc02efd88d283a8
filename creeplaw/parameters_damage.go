package creeplaw

var (
	_ Parametric = KachanovRabotnov{}
	_ Parametric = LiuMurakami{}
	_ Parametric = PerrinHayhurst{}
	_ Parametric = KowalewskiHayhurstDyson{}
	_ Parametric = Anand{}
)

// Arguments returns the parameters the law was built from.
func (k KachanovRabotnov) Arguments() KachanovRabotnovParameters { return orZero(k.arguments) }

// Arguments returns the parameters the law was built from.
func (l LiuMurakami) Arguments() LiuMurakamiParameters { return orZero(l.arguments) }

// Arguments returns the parameters the law was built from.
func (l PerrinHayhurst) Arguments() CavitationParameters { return orZero(l.arguments) }

// Arguments returns the parameters the law was built from.
func (l KowalewskiHayhurstDyson) Arguments() CavitationParameters { return orZero(l.arguments) }

func orZero[T any](p *T) (zero T) {
	if p == nil {
		return zero
	}
	return *p
}

// The names of the temperature factors in those of their parameters.
const (
	creepFactor  = "temperature factor of creep"
	damageFactor = "temperature factor of damage"
	ageingFactor = "temperature factor of ageing"
)

// Parameters returns the numbers, the reference stress only if there is one, and those of the temperature factors.
func (k KachanovRabotnov) Parameters() []Parameter {
	if k.arguments == nil {
		return nil
	}
	return damageNumbers(k.arguments)
}

// WithParameters rebuilds the law with other numbers and rebuilt temperature factors.
func (k KachanovRabotnov) WithParameters(values []float64) (Law, error) {
	p, err := k.arguments.rebuilt("Kachanov–Rabotnov", values)
	if err != nil {
		return nil, err
	}
	return orNil(NewKachanovRabotnov(p))
}

// Parameters returns the numbers, the reference stress only if there is one, and those of the temperature factors.
func (l LiuMurakami) Parameters() []Parameter {
	if l.arguments == nil {
		return nil
	}
	return damageNumbers((*KachanovRabotnovParameters)(l.arguments))
}

// WithParameters rebuilds the law with other numbers and rebuilt temperature factors.
func (l LiuMurakami) WithParameters(values []float64) (Law, error) {
	p, err := (*KachanovRabotnovParameters)(l.arguments).rebuilt("Liu–Murakami", values)
	if err != nil {
		return nil, err
	}
	return orNil(NewLiuMurakami(LiuMurakamiParameters(p)))
}

// damageNumbers serve both laws, whose parameters are alike.
func damageNumbers(p *KachanovRabotnovParameters) []Parameter {
	creep, damage := perTime, perTime
	if p.ReferenceStress == 0 {
		creep, damage = perPower(p.StressExponent), perPower(p.DamageStressExponent)
	}
	all := partly{parameters: []Parameter{
		positiveNumber("prefactor", creep).of(p.Prefactor),
		positiveNumber("stress exponent", dimensionless).of(p.StressExponent),
		positiveNumber("damage prefactor", damage).of(p.DamagePrefactor),
		positiveNumber("damage stress exponent", dimensionless).of(p.DamageStressExponent),
		positiveNumber("damage exponent", dimensionless).of(p.DamageExponent),
		shareNumber("share of the greatest principal stress in the rupture stress").of(p.RuptureStress.Principal),
		shareNumber("share of the mean stress in the rupture stress").of(p.RuptureStress.Mean),
	}}
	if p.ReferenceStress != 0 {
		all.parameters = append(all.parameters, positiveNumber("reference stress", inStress).of(p.ReferenceStress))
	}
	all.factor(creepFactor, p.CreepTemperature)
	all.factor(damageFactor, p.DamageTemperature)
	return all.list()
}

func shareNumber(name string) Parameter { return Parameter{Name: name, High: 1} }

// of is the parameter with its value.
func (p Parameter) of(value float64) Parameter {
	p.Value = value
	return p
}

// rebuilt is p with other numbers, in the order of damageNumbers.
func (p *KachanovRabotnovParameters) rebuilt(name string, values []float64) (q KachanovRabotnovParameters, err error) {
	if p == nil {
		return q, wrongNumber(len(values))
	}
	r := rebuilding{name: name, rest: values}
	q = KachanovRabotnovParameters{Prefactor: r.one(), StressExponent: r.one(), DamagePrefactor: r.one(),
		DamageStressExponent: r.one(), DamageExponent: r.one(), RuptureStress: RuptureStress{r.one(), r.one()}}
	if p.ReferenceStress != 0 {
		q.ReferenceStress = r.one()
		if r.err == nil {
			r.err = positive(name, parameter{"reference stress", q.ReferenceStress}) // zero would change its meaning
		}
	}
	q.CreepTemperature = rebuilt(&r, creepFactor, p.CreepTemperature)
	q.DamageTemperature = rebuilt(&r, damageFactor, p.DamageTemperature)
	return q, r.done()
}

// Parameters returns the numbers, zeros included, and those of the temperature factors.
func (c *cavitating) parameters() []Parameter {
	p := c.arguments
	if p == nil {
		return nil
	}
	all := partly{parameters: []Parameter{
		positiveNumber("prefactor", perTime).of(p.Prefactor),
		positiveNumber("stress coefficient", perStress).of(p.StressCoefficient),
		positiveNumber("hardening", inStress).of(p.Hardening),
		shareNumber("hardening saturation").of(p.HardeningSaturation),
		positiveNumber("ageing", perTime).of(p.Ageing),
		positiveNumber("cavitation", dimensionless).of(p.Cavitation),
		positiveNumber("triaxiality exponent", dimensionless).of(p.TriaxialityExponent),
		shareNumber("cavitation at rupture").of(p.RuptureCavitation),
	}}
	all.factor(creepFactor, p.CreepTemperature)
	all.factor(ageingFactor, p.AgeingTemperature)
	return all.list()
}

func (c *cavitating) rebuilt(name string, values []float64) (q CavitationParameters, err error) {
	p := c.arguments
	if p == nil {
		return q, wrongNumber(len(values))
	}
	r := rebuilding{name: name, rest: values}
	q = CavitationParameters{Prefactor: r.one(), StressCoefficient: r.one(), Hardening: r.one(),
		HardeningSaturation: r.one(), Ageing: r.one(), Cavitation: r.one(), TriaxialityExponent: r.one(),
		RuptureCavitation: r.one()}
	q.CreepTemperature = rebuilt(&r, creepFactor, p.CreepTemperature)
	q.AgeingTemperature = rebuilt(&r, ageingFactor, p.AgeingTemperature)
	return q, r.done()
}

// Parameters returns the numbers, zeros included, and those of the temperature factors.
func (l PerrinHayhurst) Parameters() []Parameter { return l.parameters() }

// WithParameters rebuilds the law with other numbers and rebuilt temperature factors.
func (l PerrinHayhurst) WithParameters(values []float64) (Law, error) {
	p, err := l.rebuilt("Perrin–Hayhurst", values)
	if err != nil {
		return nil, err
	}
	return orNil(NewPerrinHayhurst(p))
}

// Parameters returns the numbers, zeros included, and those of the temperature factors.
func (l KowalewskiHayhurstDyson) Parameters() []Parameter { return l.parameters() }

// WithParameters rebuilds the law with other numbers and rebuilt temperature factors.
func (l KowalewskiHayhurstDyson) WithParameters(values []float64) (Law, error) {
	p, err := l.rebuilt("Kowalewski–Hayhurst–Dyson", values)
	if err != nil {
		return nil, err
	}
	return orNil(NewKowalewskiHayhurstDyson(p))
}

func (p *AnandParameters) given() given[Law] {
	return remember(anandForm, p.InitialResistance, p.ActivationEnergy, p.Prefactor, p.StressMultiplier, p.RateSensitivity,
		p.Hardening, p.SaturationCoefficient, p.SaturationExponent, p.HardeningExponent)
}

func anandForm([]float64) form[Law] {
	exponent := positiveNumber("hardening exponent", dimensionless)
	exponent.Low = 1
	return form[Law]{
		[]Parameter{positiveNumber("initial resistance", inStress), positiveNumber("activation energy", dimensionless),
			positiveNumber("prefactor", perTime), positiveNumber("stress multiplier", dimensionless),
			positiveNumber("rate sensitivity", dimensionless), positiveNumber("hardening", inStress),
			positiveNumber("saturation coefficient", inStress), positiveNumber("saturation exponent", dimensionless),
			exponent},
		func(v []float64) (Law, error) {
			return NewAnand(AnandParameters{InitialResistance: v[0], ActivationEnergy: v[1], Prefactor: v[2],
				StressMultiplier: v[3], RateSensitivity: v[4], Hardening: v[5], SaturationCoefficient: v[6],
				SaturationExponent: v[7], HardeningExponent: v[8]})
		},
	}
}
