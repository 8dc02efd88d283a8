package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// variables looks at what a law says of its internal variables, and whether Rate is Evolve of virgin material in tension.
func variables(x *examination) answer {
	if x.evolving == nil {
		return skipped("the law has none")
	}
	list := x.evolving.Variables()
	if problem := faultOf(list); problem != "" {
		f := Finding{Kind: BadVariables, Severity: Fault, At: inTension(x.points[0]), Time: x.time, Sentence: problem}
		x.note(f, 0, "")
		x.evolving = nil
		return skipped("the variables are not usable")
	}
	x.hidesPrincipal = !x.evolving.SeesPrincipal()
	x.undeclaredPrincipal(creeplaw.InTension(x.points[0], x.initial()))
	for i, p := range x.points {
		plain := math.Log(x.rates[i].Value)
		whole := x.evolve(creeplaw.InTension(p, x.initial())).LogRate
		if finite(plain) && !(math.Abs(whole-plain) <= 1e-10*(1+math.Abs(plain))) {
			f := x.found(EvolutionContradictsRate, Fault, p)
			f.Numbers = []Number{x.rateNumber("Rate", math.Exp(plain)), x.rateNumber("Evolve", math.Exp(whole))}
			f.Sentence = fmt.Sprintf("Evolve of virgin material in tension gives the rate %.6g where Rate gives %.6g: curves drawn from one "+
				"are not those integrated from the other.", math.Exp(whole), math.Exp(plain))
			x.note(f, ifNaN(math.Abs(whole-plain), math.Inf(1)), "")
		}
	}
	return inOrder("%d of them, well declared; Rate is that of virgin material in tension", len(list))
}

// faultOf says what is wrong with a list of variables; empty if nothing is.
func faultOf(list []creeplaw.Variable) string {
	if len(list) > creeplaw.MaxVariables {
		return fmt.Sprintf("The law has %d internal variables; the step carries %d.", len(list), creeplaw.MaxVariables)
	}
	for _, v := range list {
		switch {
		case !finite(v.Initial):
			return fmt.Sprintf("The variable %q starts at %v, which is not a state a material can be in.", v.Name, v.Initial)
		case math.IsNaN(v.Limit) || v.Limit == v.Initial:
			return fmt.Sprintf("The variable %q has the limit %v with the initial value %v: it is ruptured before it starts, or never.",
				v.Name, v.Limit, v.Initial)
		}
	}
	return ""
}

// evolve asks the law, hiding the greatest principal stress from one that does not see it.
func (x *examination) evolve(p creeplaw.EvolvingPoint) creeplaw.Evolution {
	x.last = p
	x.evaluations++
	if x.hidesPrincipal {
		p.PrincipalStress = math.NaN()
	}
	return x.evolving.Evolve(p)
}

// undeclaredPrincipal finds a law that uses the greatest principal stress without saying so, and hands it over from then on.
func (x *examination) undeclaredPrincipal(p creeplaw.EvolvingPoint) {
	if !x.hidesPrincipal {
		return
	}
	hidden := x.evolve(p)
	x.hidesPrincipal = false
	whole := x.evolve(p)
	if x.finiteParts(&hidden) == "" || x.finiteParts(&whole) != "" {
		x.hidesPrincipal = true
		return
	}
	f := Finding{Kind: UndeclaredPrincipal, Severity: Fault, By: PrincipalStress, At: p}
	f.Sentence = "The law says that it does not see the greatest principal stress, and is not a number without it: a host that saves " +
		"itself the eigenvalue fails every step."
	x.note(f, 0, "")
}

// stressed is a point under a stress state of the same von Mises stress: tension, torsion or equal biaxial tension.
func stressed(p creeplaw.Point, state int, internal [creeplaw.MaxVariables]float64) creeplaw.EvolvingPoint {
	e := creeplaw.InTension(p, internal)
	switch state {
	case 1:
		e.MeanStress, e.PrincipalStress = 0, p.Stress/math.Sqrt(3)
	case 2:
		e.MeanStress, e.PrincipalStress = 2*p.Stress/3, p.Stress
	}
	return e
}

// scaled is the same stress state at another size.
func scaled(p creeplaw.EvolvingPoint, factor float64) creeplaw.EvolvingPoint {
	p.Stress *= factor
	p.MeanStress *= factor
	p.PrincipalStress *= factor
	return p
}

// reached are states that a material comes to: along histories at constant stress from virgin material.
func (x *examination) reached() []creeplaw.EvolvingPoint {
	if x.states != nil {
		return x.states
	}
	const kept = 8 // of each history
	var states []creeplaw.EvolvingPoint
	for i, at := range [][2]float64{{0.5, 0.5}, {0, 0}, {1, 1}, {1, 0}, {0, 1}} {
		for state := range 3 {
			if i > 0 && state != i%3 {
				continue
			}
			history := x.history(stressed(x.domain.at(at[0], 0, at[1]), state, x.initial()))
			for k := range kept {
				states = append(states, history[k*(len(history)-1)/(kept-1)])
			}
		}
	}
	x.states = states
	return states
}

// history follows the law at constant stress in short steps until the greatest strain of the domain, or nearly the limit of a
// variable. It need not be accurate: any state it passes will do.
func (x *examination) history(p creeplaw.EvolvingPoint) []creeplaw.EvolvingPoint {
	const most = 600
	history := []creeplaw.EvolvingPoint{p}
	for len(history) < most && p.Strain < x.domain.Strain.High {
		e := x.evolve(p)
		dt := x.shortStep(p, &e)
		if !finite(dt) {
			break
		}
		p.Strain += dt * math.Exp(e.LogRate)
		for i := range x.evolving.Variables() {
			p.Internal[i] += relaxed(dt, &e, i)
		}
		if x.nearLimit(p) || !finite(x.evolve(p).LogRate) {
			break
		}
		history = append(history, p)
	}
	return history
}

// relaxed is the change of a variable, implicit in itself where it is drawn back.
func relaxed(dt float64, e *creeplaw.Evolution, i int) float64 {
	scale := math.Exp(e.Internal[i].LogScale)
	return dt * e.Internal[i].Value * scale / (1 - dt*scale*math.Min(0, e.Internal[i].ByInternal[i]))
}

// shortStep lets neither strain nor variables change by much; not finite where nothing changes.
func (x *examination) shortStep(p creeplaw.EvolvingPoint, e *creeplaw.Evolution) float64 {
	const part = 0.05
	dt := part * p.Strain / math.Exp(e.LogRate)
	for i, v := range x.evolving.Variables() {
		speed := math.Abs(e.Internal[i].Value) * math.Exp(e.Internal[i].LogScale)
		room := math.Abs(v.Limit - p.Internal[i])
		if math.IsInf(room, 1) {
			room = 2 * math.Abs(p.Internal[i])
		}
		if speed > 0 && room > 0 {
			dt = math.Min(dt, part*room/speed)
		}
	}
	return dt
}

func (x *examination) nearLimit(p creeplaw.EvolvingPoint) bool {
	const near = 0.05
	for i, v := range x.evolving.Variables() {
		left := (v.Limit - p.Internal[i]) / (v.Limit - v.Initial) // NaN without a limit
		if left < near {
			return true
		}
	}
	return false
}

// waitOfVariables lets the internal variables change without load and compares the creep rate before and after.
func (x *examination) waitOfVariables(b bench) answer {
	if len(x.evolving.Variables()) == 0 {
		return inOrder("the law has no internal variable that could change meanwhile")
	}
	history := x.history(stressed(b.at, 0, x.initial()))
	before := history[len(history)/2]
	after, change := before, [creeplaw.MaxVariables]float64{}
	const steps = 64
	for range steps {
		unloaded := scaled(after, 0)
		e := x.evolve(unloaded)
		for i := range x.evolving.Variables() {
			d := relaxed(b.wait/steps, &e, i)
			if math.IsNaN(d) {
				f := x.found(UndefinedAtZeroStress, Fault, unloaded.Point)
				f.At, f.Variable = unloaded, x.evolving.Variables()[i].Name
				f.Sentence = fmt.Sprintf("The rate of the %s under no stress is not a number: an unloaded point fails.", f.Variable)
				x.note(f, 0, "")
				return skipped("the law is undefined under no stress")
			}
			change[i] += d
			after.Internal[i] += d
		}
	}
	x.judgeVariables(b, before, after, change)
	return inOrder("no internal variable changes in an unloaded wait of %.3g %s", b.wait, x.settings.timeUnit())
}

func (x *examination) judgeVariables(b bench, before, after creeplaw.EvolvingPoint, change [creeplaw.MaxVariables]float64) {
	e := x.evolve(before)
	factor := math.Exp(x.evolve(after).LogRate - e.LogRate)
	if math.Abs(factor-1) <= agreement {
		return
	}
	most, name := -1.0, ""
	for i, v := range x.evolving.Variables() {
		if effect := math.Abs(e.Creep.ByInternal[i] * change[i]); effect > most {
			most, name = effect, v.Name
		}
	}
	f := x.found(ClockDependence, Warning, before.Point)
	f.At, f.By, f.Variable = before, Variable, name
	f.Numbers = []Number{{"factor on the creep rate", factor, ""}, {"wait", b.wait, x.settings.timeUnit()}}
	f.Sentence = fmt.Sprintf("The %s changes without load: after an unloaded wait of %.3g %s at %.4g K the creep rate is %.4g times what it "+
		"was before. Right for ageing at temperature, wrong for damage done by stress.", name, b.wait, x.settings.timeUnit(),
		before.Temperature, factor)
	x.note(f, math.Abs(factor-1), "")
}
