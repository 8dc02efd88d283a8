package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// Material is an elastic, creeping solid: elasticity, a creep law, thermal expansion. It is validated once by New, never
// changed afterwards, and used by any number of goroutines at the same time.
type Material struct {
	elastic    Isotropic
	constant   moduli // when isConstant
	isConstant bool
	expansion  Expansion
	expands    bool
	law        creeplaw.Logarithmic
	given      creeplaw.Law
	memory     memory // internal variables of the law
	plastic    *plasticity
}

// Options are what a material may have besides elasticity and a law. The zero Options are the documented defaults.
type Options struct {
	Expansion  Expansion  // free thermal strain; none by default
	Plasticity Plasticity // rate-independent plasticity beside creep; none by default
}

// New builds a material. A nil law, an impossible elastic constant, expansion or hardening, or a law with impossible internal
// variables is an error that names the quantity and its value (*MaterialError); no material is made. Plasticity beside a law
// with internal variables is a *CombinationError.
func New(elastic Isotropic, law creeplaw.Law, options Options) (*Material, error) {
	if law == nil {
		return nil, &MaterialError{"creep law", math.NaN(), 0, "given"}
	}
	if _, ok := law.(creeplaw.During); ok {
		return nil, &MaterialError{"creep law on a clock", math.NaN(), 0, "asked for by name, with NewTimeHardening"}
	}
	if err := elastic.check(); err != nil {
		return nil, err
	}
	if err := options.Expansion.check(); err != nil {
		return nil, err
	}
	m := &Material{
		elastic:   elastic,
		expansion: options.Expansion,
		expands:   !options.Expansion.none(),
		law:       creeplaw.Log(law),
		given:     law,
	}
	var err error
	if m.memory, err = newMemory(law); err != nil {
		return nil, err
	}
	if m.plastic, err = newPlasticity(options.Plasticity, law); err != nil {
		return nil, err
	}
	if elastic.constant() {
		m.isConstant, m.constant = true, elastic.at(1)
		if !(finite(m.constant.bulk) && m.constant.bulk > 0 && m.constant.shear > 0) {
			return nil, &MaterialError{"bulk modulus", m.constant.bulk, 0, "positive and finite"}
		}
	}
	return m, nil
}

// Law returns the creep law the material was built with.
func (m *Material) Law() creeplaw.Law { return m.given }

// Variables returns the internal variables of the law, in the order of State.Internal; none for most laws.
func (m *Material) Variables() []creeplaw.Variable {
	if m.memory.law == nil {
		return nil
	}
	return append([]creeplaw.Variable(nil), m.memory.law.Variables()...)
}

// moduliAt returns the elastic constants at a temperature; NaN outside a table.
func (m *Material) moduliAt(temperature float64) moduli {
	if m.isConstant {
		return m.constant
	}
	return m.elastic.at(temperature)
}

func (x *Expansion) check() error {
	if x.none() {
		return nil
	}
	if !(x.Reference > 0) || !finite(x.Reference) {
		return &MaterialError{"reference temperature of the expansion", x.Reference, 0, "positive and finite"}
	}
	return x.Mean.each(func(temperature, v float64) error {
		if !finite(v) {
			return &MaterialError{"mean expansion coefficient", v, temperature, "finite"}
		}
		return nil
	})
}
