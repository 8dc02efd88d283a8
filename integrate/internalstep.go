package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// stepInternal is step for a law with internal variables, from a trial state and an increment that have been judged.
func (m *Material) stepInternal(out *Result, old *State, inc *Increment, t *trial) Code {
	if !m.memory.holds(old) {
		return BadState
	}
	var x node
	c := m.coupledProblem(old, inc, t)
	if inc.Dt > 0 {
		if code := c.solve(&x); code != 0 {
			return code
		}
	} else {
		x.v = c.before
	}
	if !x.finish(&c) {
		return BeyondRupture
	}
	m.writeInternal(out, old, inc, t, &c, &x)
	return 0
}

func (m *Material) coupledProblem(old *State, inc *Increment, t *trial) coupled {
	c := coupled{
		memory:      &m.memory,
		count:       m.memory.count,
		trial:       3 * t.shear * t.equivalent,
		elastic:     t.equivalent,
		logElastic:  math.Log(t.equivalent),
		start:       old.Equivalent,
		temperature: inc.Temperature,
		mean:        t.bulk * t.volumetric,
		logTime:     math.Log(inc.Dt),
	}
	for i := range c.count {
		c.before[i] = old.Internal[i] / m.memory.unit[i]
	}
	if m.memory.seesPrincipal {
		c.principal, c.projector = greatest(t.deviator)
		c.principal *= 2 * t.shear
	}
	return c
}

// holds reports whether the internal variables of a state are what the material can have: finite, and short of their limits.
func (m *memory) holds(s *State) bool {
	for i := range m.count {
		v := s.Internal[i] / m.unit[i]
		if !finite(v) || v/m.limit[i] >= 1 {
			return false
		}
	}
	return true
}

// finish sets what belongs to the last correction, and reports false where the increments are no numbers.
func (x *node) finish(c *coupled) bool {
	if !c.creeps {
		x.odds = 0
	}
	c.place(x)
	ok := x.kept >= 0
	for i := range c.count {
		ok = ok && finite(x.v[i])
	}
	return ok
}

// greatest returns the greatest principal value of a deviator and its derivative by the tensor, the projector on the principal
// direction. Where the two greatest values coincide the value has a corner, and the projector is the mean of those on the
// directions, which is the derivative that favours none.
func greatest(s tensor.Sym) (float64, tensor.Sym) {
	values, d := s.Principal()
	p := square(d[0])
	if values[0]-values[1] <= 64*epsilon*(values[0]-values[2]) {
		p = p.Add(square(d[1])).Scale(0.5)
	}
	return values[0], p
}

func square(d [3]float64) tensor.Sym {
	return tensor.Sym{d[0] * d[0], d[1] * d[1], d[2] * d[2], d[1] * d[2], d[0] * d[2], d[0] * d[1]}
}

// nudge is a change of the data of a coupled problem: what it does to the arguments of the law and to the equations with the
// unknowns held.
type nudge struct {
	logStress, mean, principal, logStrain, logTemperature float64 // of the law's arguments
	logElastic, logTime                                   float64 // of q/3G in F, of Δt
	before                                                [creeplaw.MaxVariables]float64
}

// through is the change of a rate whose partial derivatives are given.
func (d *nudge) through(by *creeplaw.Partials) float64 {
	s := by.ByLogStress*d.logStress + by.ByLogStrain*d.logStrain + by.ByLogTemperature*d.logTemperature
	if d.mean != 0 {
		s += by.ByMeanStress * d.mean
	}
	if d.principal != 0 {
		s += by.ByPrincipalStress * d.principal
	}
	return s
}

// answer is the change of the solution: of z, and of the variables over their units.
type answer struct {
	z float64
	v [creeplaw.MaxVariables]float64
}

// respond differentiates the solution by each of the nudges, implicitly. It reports false where the solution turns back.
func (c *coupled) respond(x *node, nudges []nudge, answers []answer) bool {
	if c.creeps && c.count == 1 {
		return c.respond2(x, nudges, answers)
	}
	n := c.size()
	var w dense
	for i := range n {
		copy(w[i][:n], x.jacobian[i][:n])
	}
	for k := range nudges {
		for i := range c.count {
			w[i][n+k] = c.pushVariable(x, i, &nudges[k])
		}
		if c.creeps {
			w[c.count][n+k] = x.pushCreep(&nudges[k])
		}
	}
	if n > 0 && !w.eliminate(n, n+len(nudges)) {
		return false
	}
	for k := range answers[:len(nudges)] {
		answers[k] = answer{}
		for i := range c.count {
			answers[k].v[i] = w[i][n+k]
		}
		if c.creeps {
			answers[k].z = w[c.count][n+k]
		}
	}
	return true
}

// respond2 is respond for one variable and creep.
func (c *coupled) respond2(x *node, nudges []nudge, answers []answer) bool {
	a, b := &x.jacobian[0], &x.jacobian[1]
	det := a[0]*b[1] - a[1]*b[0]
	if det == 0 || det-det != 0 {
		return false
	}
	for k := range nudges {
		r, f := c.pushVariable(x, 0, &nudges[k]), x.pushCreep(&nudges[k])
		answers[k] = answer{z: (a[0]*f - b[0]*r) / det}
		answers[k].v[0] = (r*b[1] - a[1]*f) / det
	}
	return true
}

// pushVariable and pushCreep are what a nudge does to the equations, on their right-hand side.
func (c *coupled) pushVariable(x *node, i int, d *nudge) float64 {
	return d.before[i] + x.increment[i]*d.logTime + x.growth[i]*d.through(&x.rate.Internal[i].Partials)
}

func (x *node) pushCreep(d *nudge) float64 {
	return d.through(&x.rate.Creep) + d.logTime - d.logElastic
}

// The data a solution depends on, each as a nudge of 1.

// byTrial is by ln q, the elastic strain growing with it.
func (c *coupled) byTrial(x *node) nudge {
	return nudge{logStress: 1, logStrain: x.share, logElastic: 1}
}

// byMean is by σm, and byPrincipal by s1.
func (c *coupled) byMean() nudge             { return nudge{mean: 1, principal: 1} }
func (c *coupled) byPrincipal(x *node) nudge { return nudge{principal: x.kept} }

// byStrain is by p at the start.
func (c *coupled) byStrain(x *node) nudge { return nudge{logStrain: 1 / x.strain} }

// byVariable is by variable i at the start, over its unit.
func (c *coupled) byVariable(i int) (d nudge) {
	d.before[i] = 1
	return d
}

// byTemperature is by T at fixed strain.
func (c *coupled) byTemperature(x *node, t *trial) nudge {
	g, m := t.shearByT/t.shear, t.meanByTemperature()
	return nudge{logTemperature: 1 / c.temperature, logStress: g, mean: m, principal: m + x.kept*c.principal*g}
}

func (t *trial) meanByTemperature() float64 { return t.bulkByT*t.volumetric - 3*t.bulk*t.expansion }

// feelsMean reports whether any rate depends on the mean stress here.
func (c *coupled) feelsMean(x *node) bool {
	for i := range c.count {
		if x.rate.Internal[i].ByMeanStress != 0 {
			return true
		}
	}
	return x.rate.Creep.ByMeanStress != 0
}

// writeInternal fills the result. Everything read from old has been read before its first line, so old may be &out.State.
func (m *Material) writeInternal(out *Result, old *State, inc *Increment, t *trial, c *coupled, x *node) {
	nudges := [4]nudge{c.byTrial(x), c.byTemperature(x, t), c.byMean(), c.byPrincipal(x)}
	var answers [4]answer
	count := 4
	if !m.memory.seesPrincipal {
		if count = 3; !c.feelsMean(x) {
			count = 2
		}
	}
	if x.fraction > 0 && !c.respond(x, nudges[:count], answers[:count]) {
		answers = [4]answer{}
	}
	fall := -x.kept * x.fraction // dr/dz
	keep := 2 * t.shear * x.kept
	var n tensor.Sym
	if t.equivalent > 0 {
		n = t.deviator.Scale((2.0 / 3) / t.equivalent)
	}
	t.write(&out.Stress, &out.State, old, x.fraction, x.kept)
	out.CreepStep = x.fraction * t.equivalent
	for i := range c.count {
		out.State.Internal[i] = x.v[i] * m.memory.unit[i]
	}
	out.Iterations, out.Residual = max(c.evaluations-1, 0), x.rest

	fillTangent(&out.Tangent, t.bulk, keep, 3*t.shear*fall*answers[0].z, &n)
	byMean, byPrincipal := c.trial*fall*answers[2].z*t.bulk, c.trial*fall*answers[3].z*2*t.shear
	if byMean != 0 || byPrincipal != 0 {
		side := c.projector.Scale(byPrincipal)
		addMean(&side, byMean-byPrincipal/3)
		out.Tangent.AddDyad(1, n, side)
	}
	byT := c.trial * (x.kept*t.shearByT/t.shear + fall*answers[1].z)
	out.ByTemperature = n.Scale(byT)
	addMean(&out.ByTemperature, t.meanByTemperature())
}

func addMean(s *tensor.Sym, mean float64) {
	s[tensor.XX] += mean
	s[tensor.YY] += mean
	s[tensor.ZZ] += mean
}
