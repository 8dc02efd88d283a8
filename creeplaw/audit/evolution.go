package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// evolution looks at the rates of creep and of the internal variables at the states that histories pass: finite, and with the
// derivatives that differences show.
func evolution(x *examination) answer {
	if x.evolving == nil {
		return skipped("the law has none")
	}
	states := x.reached()
	compared := 0
	for _, p := range states {
		e := x.evolve(p)
		if !x.finiteEvolution(p, &e) {
			continue
		}
		for _, c := range coordinates(x, p) {
			compared += x.evolutionDerivative(p, &e, c)
		}
	}
	return inOrder("finite at %d states reached by creep at constant stress in tension, torsion and biaxial tension; %d derivatives "+
		"agree with differences to %.0e", len(states), compared, x.settings.DerivativeTolerance)
}

// creepRate is what finiteParts calls the rate of creep.
const creepRate = "creep rate"

// finiteParts names the first rate that is not a number, or has a derivative that is not; empty if there is none.
func (x *examination) finiteParts(e *creeplaw.Evolution) string {
	if math.IsNaN(e.LogRate) || math.IsInf(e.LogRate, 1) || !finitePartials(&e.Creep) {
		return creepRate
	}
	for i, v := range x.evolving.Variables() {
		r := &e.Internal[i]
		if !finite(r.Value) || math.IsNaN(r.LogScale) || math.IsInf(r.LogScale, 1) || !finitePartials(&r.Partials) {
			return v.Name
		}
	}
	return ""
}

func (x *examination) finiteEvolution(p creeplaw.EvolvingPoint, e *creeplaw.Evolution) bool {
	name := x.finiteParts(e)
	if name == "" {
		return true
	}
	f := Finding{Kind: NotFinite, Severity: Fault, At: p}
	what := creepRate
	if name != creepRate {
		f.Variable, what = name, "rate of the "+name
	}
	f.Sentence = fmt.Sprintf("The %s, or a derivative of it, is not finite in a state that creep at constant stress leads to: every step "+
		"that comes here fails.", what)
	x.note(f, 0, "")
	return false
}

func finitePartials(p *creeplaw.Partials) bool {
	sum := p.ByLogStress + p.ByMeanStress + p.ByPrincipalStress + p.ByLogStrain + p.ByLogTemperature
	for _, v := range p.ByInternal {
		sum += v
	}
	return finite(sum)
}

// coordinate is one argument of an evolution, moved by u: in its logarithm where Partials has it so, else in parts of a scale.
type coordinate struct {
	by    Argument
	index int // of a variable
	name  string
	scale float64
	reach float64
	move  func(p *creeplaw.EvolvingPoint, u float64)
	of    func(d *creeplaw.Partials) float64
}

func coordinates(x *examination, p creeplaw.EvolvingPoint) []coordinate {
	const free = 0x1p-4
	list := []coordinate{
		{by: Stress, scale: 1, reach: free, move: func(p *creeplaw.EvolvingPoint, u float64) { p.Stress *= math.Exp(u) },
			of: func(d *creeplaw.Partials) float64 { return d.ByLogStress }},
		{by: MeanStress, scale: p.Stress, reach: free,
			move: func(p *creeplaw.EvolvingPoint, u float64) { p.MeanStress += u * p.Stress },
			of:   func(d *creeplaw.Partials) float64 { return d.ByMeanStress }},
		{by: Strain, scale: 1, reach: free, move: func(p *creeplaw.EvolvingPoint, u float64) { p.Strain *= math.Exp(u) },
			of: func(d *creeplaw.Partials) float64 { return d.ByLogStrain }},
	}
	if !x.hidesPrincipal {
		list = append(list, coordinate{by: PrincipalStress, scale: p.Stress, reach: free,
			move: func(p *creeplaw.EvolvingPoint, u float64) { p.PrincipalStress += u * p.Stress },
			of:   func(d *creeplaw.Partials) float64 { return d.ByPrincipalStress }})
	}
	if reach := x.reach(Temperature, p.Temperature); reach > 0x1p-12 {
		list = append(list, coordinate{by: Temperature, scale: 1, reach: reach,
			move: func(p *creeplaw.EvolvingPoint, u float64) { p.Temperature *= math.Exp(u) },
			of:   func(d *creeplaw.Partials) float64 { return d.ByLogTemperature }})
	}
	for i, v := range x.evolving.Variables() {
		scale := math.Max(math.Abs(p.Internal[i]), math.Abs(p.Internal[i]-v.Initial))
		if room := math.Abs(v.Limit - p.Internal[i]); finite(room) {
			scale = room
		}
		if scale == 0 {
			scale = 1
		}
		list = append(list, coordinate{by: Variable, index: i, name: v.Name, scale: scale, reach: free,
			move: func(p *creeplaw.EvolvingPoint, u float64) { p.Internal[i] += u * scale },
			of:   func(d *creeplaw.Partials) float64 { return d.ByInternal[i] }})
	}
	return list
}

// evolutionDerivative compares the derivatives of all rates by one argument and returns how many differences could resolve.
func (x *examination) evolutionDerivative(p creeplaw.EvolvingPoint, e *creeplaw.Evolution, c coordinate) (compared int) {
	moved := func(u float64) creeplaw.Evolution {
		q := p
		c.move(&q, u)
		return x.evolve(q)
	}
	if finite(e.LogRate) {
		d := differentiate(func(u float64) float64 { return moved(u).LogRate }, 0, c.reach)
		if x.compareEvolution(p, c, "", c.of(&e.Creep)*c.scale, d, 1) {
			compared++
		}
	}
	for i, v := range x.evolving.Variables() {
		r := e.Internal[i]
		if !finite(r.LogScale) {
			continue
		}
		d := differentiate(func(u float64) float64 {
			m := moved(u).Internal[i]
			return m.Value * math.Exp(m.LogScale-r.LogScale)
		}, 0, c.reach)
		if x.compareEvolution(p, c, v.Name, c.of(&r.Partials)*c.scale, d, math.Abs(r.Value)) {
			compared++
		}
	}
	return compared
}

func (x *examination) compareEvolution(p creeplaw.EvolvingPoint, c coordinate, variable string, given float64, d slope,
	size float64) bool {
	tolerance := x.settings.DerivativeTolerance
	scale := math.Max(math.Abs(d.value), size)
	if !(d.bound <= tolerance/4*scale) || scale == 0 {
		return false
	}
	off := math.Abs(given - d.value)
	if off <= tolerance*scale+4*d.bound {
		return true
	}
	what, by := creepRate, c.by.String()
	if variable != "" {
		what = "rate of the " + variable
	}
	if c.by == Variable {
		by = c.name
	}
	f := Finding{Kind: WrongLogDerivative, Severity: Fault, By: c.by, Variable: variable, At: p}
	if off < 1e-3*scale {
		f.Severity = Warning
	}
	f.Numbers = []Number{{"derivative given", given / c.scale, ""}, {"by differences", d.value / c.scale, ""}}
	f.Sentence = fmt.Sprintf("The derivative of the %s by the %s is given as %.6g where the values show %.6g: the step and its tangent "+
		"are not those of the law.", what, by, given/c.scale, d.value/c.scale)
	x.note(f, ifNaN(off/scale, math.Inf(1)), "")
	return true
}
