package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// memory is what a material keeps about the internal variables of its law, asked once. The solver works with deviations from
// the initial values over a unit of each, so that it sees numbers without dimension.
type memory struct {
	law           creeplaw.Evolving // nil for a law without
	count         int
	seesPrincipal bool
	initial, unit [creeplaw.MaxVariables]float64
	limit         [creeplaw.MaxVariables]float64 // as a deviation over the unit, ±Inf for none
	names         [creeplaw.MaxVariables]string
}

func newMemory(law creeplaw.Law) (m memory, err error) {
	e, ok := law.(creeplaw.Evolving)
	if !ok {
		return m, nil
	}
	variables := e.Variables()
	m.law, m.count, m.seesPrincipal = e, len(variables), e.SeesPrincipal()
	if m.count > creeplaw.MaxVariables {
		return m, &MaterialError{"number of internal variables", float64(m.count), 0, "at most 4"}
	}
	for i, v := range variables {
		if !finite(v.Initial) {
			return m, &MaterialError{"initial value of the " + v.Name, v.Initial, 0, "finite"}
		}
		room := v.Limit - v.Initial
		if room == 0 || math.IsNaN(room) {
			return m, &MaterialError{"limit of the " + v.Name, v.Limit, 0, "apart from the initial value"}
		}
		m.names[i], m.initial[i], m.unit[i] = v.Name, v.Initial, 1
		switch {
		case finite(room):
			m.unit[i] = math.Abs(room)
		case v.Initial != 0:
			m.unit[i] = math.Abs(v.Initial)
		}
		m.limit[i] = room / m.unit[i]
	}
	return m, nil
}

// unknowns of a coupled problem: four variables and z.
const unknowns = creeplaw.MaxVariables + 1

// coupled is the problem the 3-D step reduces to for a law with internal variables v. The unknowns are z = ln[u/(1-u)], as in
// relaxation, and the v, at the end of the step:
//
//	F  = ln u + ln(q/3G) - ln Δt - ln ṗ(σ, σm, σ1, p, T, v) = 0
//	Rᵢ = vᵢ - vᵢ(start) - Δt v̇ᵢ(σ, σm, σ1, p, T, v) = 0
//
// with σ = (1-u) q, σm that of the trial state and σ1 = σm + (1-u) s1, s1 the greatest principal value of the trial deviator.
// Such a system can have several solutions, and none. What continues the history is the curve of solutions that starts from
// Δt = 0; ln Δt is therefore carried along as one more coordinate, the last, and the wanted solution is where that curve first
// reaches the length of the step. Where it turns back before (dln Δt/ds = 0, a fold), rupture or instability lies within it.
type coupled struct {
	memory      *memory
	plain       creeplaw.Logarithmic // for a softening law without variables, instead of memory
	count       int                  // number of variables
	creeps      bool                 // whether z is an unknown: false where there is no creep
	trial       float64              // q
	elastic     float64              // q/3G
	logElastic  float64
	start       float64 // p at the start
	temperature float64
	mean        float64    // σm
	principal   float64    // s1; 0 for a law that does not see σ1
	projector   tensor.Sym // its derivative by the trial deviator
	logTime     float64    // ln Δt
	before      [creeplaw.MaxVariables]float64
	evaluations int
}

// size is the number of equations; the column of ln Δt has this index too.
func (c *coupled) size() int {
	if c.creeps {
		return c.count + 1
	}
	return c.count
}

// node is a point near the curve of solutions, with the law and the equations there.
type node struct {
	odds    float64                        // u/(1-u) = e^z
	v       [creeplaw.MaxVariables]float64 // deviations over their units
	logTime float64

	fraction, kept, strain, share float64 // u, 1-u, p, Δp/p
	rate                          creeplaw.Evolution
	increment                     [creeplaw.MaxVariables]float64 // Δt v̇ over the unit
	growth                        [creeplaw.MaxVariables]float64 // Δt e^LogScale over the unit
	sensitivity                   [creeplaw.MaxVariables]float64 // ∂ln ṗ/∂v
	residual                      [unknowns]float64              // R, then F
	jacobian                      [unknowns][unknowns + 1]float64
	rest                          float64 // bound on what the last correction has left
}

// verdict is what evaluating a node, or solving for one, came to.
type verdict int

const (
	fine      verdict = iota
	undefined         // the law said NaN
	tooFar            // a rate that is zero or infinite, or a correction that leads nowhere
)

// evaluate asks the law at a node and forms the equations and their derivatives by v, z and ln Δt.
func (c *coupled) evaluate(x *node) verdict {
	c.evaluations++
	c.place(x)
	at := creeplaw.Point{Stress: x.kept * c.trial, Strain: x.strain, Temperature: c.temperature}
	if c.plain != nil {
		l := c.plain.LogRate(at)
		x.rate.LogRate = l.Value
		x.rate.Creep.ByLogStress, x.rate.Creep.ByLogStrain, x.rate.Creep.ByLogTemperature =
			l.ByLogStress, l.ByLogStrain, l.ByLogTemperature
	} else {
		c.ask(x, at)
	}
	bad := c.variableRows(x)
	if c.creeps {
		bad += c.creepRow(x)
	}
	if bad-bad == 0 {
		return fine
	}
	return x.blame(c.count)
}

func (c *coupled) ask(x *node, at creeplaw.Point) {
	m := c.memory
	p := creeplaw.EvolvingPoint{Point: at, MeanStress: c.mean, PrincipalStress: math.NaN()}
	if m.seesPrincipal {
		p.PrincipalStress = c.mean + x.kept*c.principal
	}
	for i := range c.count {
		p.Internal[i] = m.initial[i] + m.unit[i]*x.v[i]
	}
	x.rate = m.law.Evolve(p)
}

// place sets what follows from u/(1-u).
func (c *coupled) place(x *node) {
	x.kept = 1 / (1 + x.odds)
	x.fraction = x.odds * x.kept
	if x.odds > 1e300 {
		x.fraction = 1
	}
	x.strain = c.start + x.fraction*c.elastic
	x.share = 1
	if c.start > 0 {
		x.share = x.fraction * c.elastic / x.strain
	}
}

// variableRows forms R and its derivatives. It returns a number that is not finite if any of them is not.
func (c *coupled) variableRows(x *node) (check float64) {
	for i := range c.count {
		r := &x.rate.Internal[i]
		g := math.Exp(x.logTime+r.LogScale) / c.memory.unit[i]
		x.growth[i] = g
		x.increment[i] = g * r.Value
		x.residual[i] = x.v[i] - c.before[i] - x.increment[i]
		row := &x.jacobian[i]
		for j := range c.count {
			row[j] = -g * r.ByInternal[j] * c.memory.unit[j]
			check += row[j]
		}
		row[i]++
		if c.creeps {
			row[c.count] = g * (x.fraction*c.exponent(x, &r.Partials) - x.kept*x.share*r.ByLogStrain)
			check += row[c.count]
		}
		row[c.size()] = -x.increment[i]
		check += x.residual[i]
	}
	return check
}

// creepRow forms F and its derivatives, like variableRows.
func (c *coupled) creepRow(x *node) (check float64) {
	l := &x.rate.Creep
	row := &x.jacobian[c.count]
	f := math.Log(x.fraction) + c.logElastic - x.logTime - x.rate.LogRate
	x.residual[c.count] = f
	check = f
	for j := range c.count {
		a := l.ByInternal[j] * c.memory.unit[j]
		x.sensitivity[j] = a
		row[j] = -a
		check += a
	}
	row[c.count] = x.kept*(1-x.share*l.ByLogStrain) + x.fraction*c.exponent(x, l)
	row[c.count+1] = -1
	return check + row[c.count]
}

// exponent is the derivative by ln(1-u): that by ln σ, and that by σ1, which moves with it.
func (c *coupled) exponent(x *node, by *creeplaw.Partials) float64 {
	if c.principal == 0 {
		return by.ByLogStress
	}
	return by.ByLogStress + by.ByPrincipalStress*(x.kept*c.principal)
}

// blame tells a law that is undefined from a rate that is only zero or infinite.
func (x *node) blame(count int) verdict {
	bad := math.IsNaN(x.rate.LogRate)
	for i := range count {
		bad = bad || math.IsNaN(x.rate.Internal[i].LogScale) || math.IsNaN(x.rate.Internal[i].Value)
	}
	if bad {
		return undefined
	}
	return tooFar
}
