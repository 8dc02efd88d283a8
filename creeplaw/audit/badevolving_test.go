package audit_test

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

// damaged is a sound law with damage: Kachanov–Rabotnov with temperature, the creep and the damage rate about right for a life
// of ten thousand hours at 100 MPa and 873 K (invented).
func damaged() creeplaw.Evolving {
	creep, err := creeplaw.NewArrheniusAt(300e3, reference)
	if err != nil {
		panic(err)
	}
	law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{
		Prefactor: 1e-6, StressExponent: 5, DamagePrefactor: 1e-5, DamageStressExponent: 4, DamageExponent: 6,
		ReferenceStress: 100, CreepTemperature: creep, DamageTemperature: creep})
	if err != nil {
		panic(err)
	}
	return law
}

// altered changes what the law with damage says.
type altered struct {
	creeplaw.Evolving
	evolve    func(creeplaw.EvolvingPoint, creeplaw.Evolution) creeplaw.Evolution
	variables func() []creeplaw.Variable
	sees      bool
}

func (l altered) Evolve(p creeplaw.EvolvingPoint) creeplaw.Evolution {
	e := l.Evolving.Evolve(p)
	if l.evolve != nil {
		return l.evolve(p, e)
	}
	return e
}

func (l altered) Variables() []creeplaw.Variable {
	if l.variables != nil {
		return l.variables()
	}
	return l.Evolving.Variables()
}

func (l altered) SeesPrincipal() bool { return l.sees }

// forgottenDamage leaves the derivative of the creep rate by damage out.
func forgottenDamage(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	e.Creep.ByInternal[0] = 0
	return e
}

// forgottenExponent leaves the derivative of the damage rate by stress out.
func forgottenExponent(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	e.Internal[0].ByLogStress = 0
	return e
}

// healing turns the sign of the damage rate; its derivatives turn with it.
func healing(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	r := &e.Internal[0]
	r.Value, r.ByLogStress, r.ByLogTemperature, r.ByInternal[0] = -r.Value, -r.ByLogStress, -r.ByLogTemperature, -r.ByInternal[0]
	return e
}

// ageing lets damage grow at a constant rate, load or not.
func ageing(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	e.Internal[0] = creeplaw.InternalRate{LogScale: math.Log(1e-5), Value: 1}
	return e
}

// brokenDamage is not a number once damage has passed a fifth.
func brokenDamage(p creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	if p.Internal[0] > 0.2 {
		e.Internal[0].Value = math.NaN()
	}
	return e
}

// twice creeps twice as fast as its Rate says.
func twice(_ creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	e.LogRate += math.Ln2
	return e
}

// secretPrincipal multiplies the creep rate by the ratio of principal to von Mises stress, one in tension.
func secretPrincipal(p creeplaw.EvolvingPoint, e creeplaw.Evolution) creeplaw.Evolution {
	e.LogRate += math.Log(p.PrincipalStress / p.Stress)
	e.Creep.ByLogStress--
	e.Creep.ByPrincipalStress = 1 / p.PrincipalStress
	return e
}

func fiveVariables() []creeplaw.Variable {
	return make([]creeplaw.Variable, creeplaw.MaxVariables+1)
}

func startsNowhere() []creeplaw.Variable {
	return []creeplaw.Variable{{Name: "damage", Initial: math.NaN(), Limit: 1}}
}

func startsRuptured() []creeplaw.Variable {
	return []creeplaw.Variable{{Name: "damage", Initial: 1, Limit: 1}}
}

func evolvingPlants() []plant {
	softens := []audit.Kind{audit.Softening} // which a law with damage is meant to do
	change := func(f func(creeplaw.EvolvingPoint, creeplaw.Evolution) creeplaw.Evolution) creeplaw.Law {
		return altered{Evolving: damaged(), evolve: f}
	}
	declare := func(v func() []creeplaw.Variable) creeplaw.Law { return altered{Evolving: damaged(), variables: v} }
	const fault = audit.Fault
	return []plant{
		{name: "damage itself", law: damaged(), kind: audit.Softening, severity: audit.Warning, by: audit.Variable, near: anywhere},
		{name: "creep rate by damage forgotten", law: change(forgottenDamage), kind: audit.WrongLogDerivative, severity: fault,
			by: audit.Variable, near: anywhere, with: softens},
		{name: "damage rate by stress forgotten", law: change(forgottenExponent), kind: audit.WrongLogDerivative, severity: fault,
			by: audit.Stress, near: func(f audit.Finding) bool { return f.Variable == "damage" }, with: softens},
		{name: "damage heals", law: change(healing), kind: audit.VariableRecovers, severity: audit.Remark, by: audit.Variable,
			near: func(f audit.Finding) bool { return f.Variable == "damage" }},
		{name: "damage grows on the shelf", law: change(ageing), kind: audit.ClockDependence, severity: audit.Warning,
			by: audit.Variable, near: func(f audit.Finding) bool { return f.Variable == "damage" }, with: softens},
		{name: "damage rate undefined above a fifth", law: change(brokenDamage), kind: audit.NotFinite, severity: fault,
			near: func(f audit.Finding) bool { return f.Variable == "damage" && f.At.Internal[0] > 0.2 }, with: softens},
		{name: "Rate is not Evolve", law: change(twice), kind: audit.EvolutionContradictsRate, severity: fault, near: anywhere,
			with: softens},
		{name: "principal stress not declared", law: altered{Evolving: damaged(), evolve: secretPrincipal},
			kind: audit.UndeclaredPrincipal, severity: fault, by: audit.PrincipalStress, near: anywhere, with: softens},
		{name: "too many variables", law: declare(fiveVariables), kind: audit.BadVariables, severity: fault, near: anywhere},
		{name: "variable without a start", law: declare(startsNowhere), kind: audit.BadVariables, severity: fault, near: anywhere},
		{name: "ruptured from the start", law: declare(startsRuptured), kind: audit.BadVariables, severity: fault, near: anywhere},
	}
}
