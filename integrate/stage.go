package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// stage is one implicit stage of a higher-order step: a backward-Euler step without the result a host would want, but with
// its derivatives by everything it starts from, when they are asked for.
type stage struct {
	trial
	fraction   float64 // u: Δεc = u times the trial deviator
	internal   [variables]float64
	mean       float64 // σm
	principal  float64 // s1, for a law that sees it
	projector  tensor.Sym
	iterations int
	slope      stageSlope
}

// stageSlope holds the derivatives of z = ln[u/(1-u)] and of the variables at the end.
type stageSlope struct {
	z        datum
	internal [variables]datum
}

// datum is a derivative by the data of a stage.
type datum struct {
	logTrial    float64            // by ln q, the elastic strain growing with it
	strain      float64            // by p at the start
	temperature float64            // by T at fixed strain
	mean        float64            // by σm with σ1
	principal   float64            // by s1
	internal    [variables]float64 // by the variables at the start
}

// mises is the von Mises stress at the end of the stage.
func (s *stage) mises() float64 { return 3 * s.shear * s.equivalent * (1 - s.fraction) }

// solve takes the backward-Euler step dt from start to the strain and temperature given, and with slopes also its derivatives.
func (s *stage) solve(m *Material, start *State, inc *Increment, slopes bool) Code {
	if ok := s.trial.set(m, start, inc); !ok || !(start.Equivalent >= 0) {
		return refusal(start, inc)
	}
	if m.memory.law != nil {
		return s.solveInternal(m, start, inc, slopes)
	}
	p := relaxation{law: m.law, trial: 3 * s.shear * s.equivalent, elastic: s.equivalent, start: start.Equivalent,
		temperature: inc.Temperature}
	x := relaxed{kept: 1, strain: start.Equivalent}
	if s.equivalent > 0 {
		p.logTime = math.Log(inc.Dt / s.equivalent)
		if code := p.solve(&x); code != 0 {
			return code
		}
	}
	s.fraction, s.iterations = x.fraction, x.iterations
	if slopes {
		s.slope.z = p.slopes(&x, s.shearByT/s.shear)
	}
	return 0
}

// slopes differentiates z implicitly: F(z) = 0 by ln q, p at the start, and T.
func (a *relaxation) slopes(x *relaxed, shearByT float64) datum {
	if x.fraction == 0 {
		return datum{}
	}
	f := a.slope(x)
	if !(f > 0) {
		return datum{}
	}
	l := &x.rate
	return datum{
		logTrial:    -(a.stiffening(x) - l.ByLogStress) / f,
		strain:      l.ByLogStrain / x.strain / f,
		temperature: (l.ByLogStress*shearByT + l.ByLogTemperature/a.temperature) / f,
	}
}

func (s *stage) solveInternal(m *Material, start *State, inc *Increment, slopes bool) Code {
	if !m.memory.holds(start) {
		return BadState
	}
	var x node
	c := m.coupledProblem(start, inc, &s.trial)
	if code := c.solve(&x); code != 0 {
		return code
	}
	if !x.finish(&c) {
		return BeyondRupture
	}
	s.fraction, s.iterations = x.fraction, c.evaluations
	s.mean, s.principal, s.projector = c.mean, c.principal, c.projector
	for i := range c.count {
		s.internal[i] = x.v[i] * m.memory.unit[i]
	}
	if slopes {
		s.slopesInternal(m, &c, &x)
	}
	return 0
}

func (s *stage) slopesInternal(m *Material, c *coupled, x *node) {
	var nudges [5 + variables]nudge
	var answers [5 + variables]answer
	nudges[0], nudges[1], nudges[2] = c.byTrial(x), c.byTemperature(x, &s.trial), c.byStrain(x)
	nudges[3], nudges[4] = c.byMean(), c.byPrincipal(x)
	for i := range c.count {
		nudges[5+i] = c.byVariable(i)
	}
	n := 5 + c.count
	if !c.respond(x, nudges[:n], answers[:n]) {
		answers = [5 + variables]answer{}
	}
	unit := &m.memory.unit
	var z, v [5 + variables]float64
	for k := range n {
		z[k] = answers[k].z
	}
	s.slope.z = datumOf(&z, unit, c.count)
	for i := range c.count {
		for k := range n {
			v[k] = answers[k].v[i] * unit[i]
		}
		s.slope.internal[i] = datumOf(&v, unit, c.count)
	}
}

// datumOf sorts derivatives from the order of the nudges into a datum.
func datumOf(d *[5 + variables]float64, unit *[variables]float64, count int) datum {
	sorted := datum{logTrial: d[0], temperature: d[1], strain: d[2], mean: d[3], principal: d[4]}
	for j := range count {
		sorted.internal[j] = d[5+j] / unit[j]
	}
	return sorted
}

// rates writes the time derivatives the stage stands for, from a start state and dt.
func (s *stage) rates(f *rates, start *State, dt float64, count int) {
	per := s.fraction / dt
	for i := range f.creep {
		f.creep[i] = per * s.deviator[i]
	}
	f.equivalent = per * s.equivalent
	for i := range count {
		f.internal[i] = (s.internal[i] - start.Internal[i]) / dt
	}
}

// ratesAt are the time derivatives of a state under a given strain and temperature: what an explicit stage sees. They are
// infinite or NaN where hardening starts from zero strain, and where the law is undefined.
func (m *Material) ratesAt(f *rates, y *State, at *Conditions) (mises float64, code Code) {
	inc := Increment{Strain: at.Strain, Temperature: at.Temperature}
	t, ok := m.trialState(y, &inc)
	if !ok {
		return 0, refusal(y, &inc)
	}
	*f = rates{}
	mises = 3 * t.shear * t.equivalent
	point := creeplaw.Point{Stress: mises, Strain: y.Equivalent, Temperature: at.Temperature}
	if m.memory.law == nil {
		f.equivalent = math.Exp(m.law.LogRate(point).Value)
	} else {
		c := m.coupledProblem(y, &inc, &t)
		x := node{}
		for i := range c.count {
			x.v[i] = c.before[i]
		}
		x.kept = 1
		c.ask(&x, point)
		f.equivalent = math.Exp(x.rate.LogRate)
		for i := range c.count {
			f.internal[i] = x.rate.Internal[i].Value * math.Exp(x.rate.Internal[i].LogScale)
		}
	}
	if t.equivalent > 0 {
		f.creep = t.deviator.Scale(f.equivalent / t.equivalent)
	} else {
		f.equivalent = 0
	}
	return mises, 0
}
