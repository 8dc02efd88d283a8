package main

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// sample is a point of a creep curve.
type sample struct{ time, strain float64 } // [h], [-]

// course is a creep curve at constant stress in tension, from zero strain.
type course struct {
	samples  []sample
	ruptured bool // it ends before the horizon
	stopped  bool // the law is undefined from there on
}

const (
	startStrain = 1e-12
	endStrain   = 0.5 // nobody looks further
)

// hold integrates a specimen at constant stress and temperature to the horizon.
func hold(b built, c conditions) course {
	at := creeplaw.Point{Stress: c.stress, Temperature: c.temperature}
	if b.clocked != nil {
		return holdClocked(b.clocked, at, c.horizon)
	}
	if e, ok := b.law.(creeplaw.Evolving); ok && len(e.Variables()) > 0 {
		return holdEvolving(e, at, c.horizon)
	}
	return holdPlain(b.law, at, c.horizon)
}

// holdPlain is a quadrature: without variables t = ∫ dp/ṗ(p), taken in ln p by Gauss's rule of three points. A power of strain
// below one, or a finite rate, is what it starts from.
func holdPlain(law creeplaw.Law, at creeplaw.Point, horizon float64) (c course) {
	logs := creeplaw.Log(law)
	rate := func(p float64) float64 {
		at.Strain = p
		return math.Exp(logs.LogRate(at).Value)
	}
	at.Strain = startStrain
	k := math.Min(0, logs.LogRate(at).ByLogStrain)
	time, p, stride := startStrain/(rate(startStrain)*(1-k)), startStrain, 0.02
	c.add(0, 0)
	switch {
	case math.IsNaN(time):
		c.stopped = true
		return c
	case time >= horizon: // no creep to speak of
		c.add(horizon, 0)
		return c
	}
	for c.add(time, p); time < horizon && p < endStrain; {
		next := p * math.Exp(stride)
		switch r := rate(next); {
		case math.IsNaN(r):
			c.stopped = true
			return c
		case r == 0: // a curve that comes to its end: close in on it, and wait
			if stride /= 2; stride < 1e-9 {
				c.add(horizon, p)
				return c
			}
			continue
		}
		dt := 0.0
		for i, node := range gaussNodes {
			q := p * math.Exp(stride*(1+node)/2)
			dt += gaussWeights[i] * stride / 2 * q / rate(q)
		}
		if time+dt > horizon { // straight over a last stride
			c.add(horizon, p+(next-p)*(horizon-time)/dt)
			return c
		}
		time, p = time+dt, next
		c.add(time, p)
	}
	c.ruptured = time < horizon
	return c
}

var (
	gaussNodes   = [...]float64{-0.7745966692414834, 0, 0.7745966692414834}
	gaussWeights = [...]float64{5.0 / 9, 8.0 / 9, 5.0 / 9}
)

func (c *course) add(time, strain float64) { c.samples = append(c.samples, sample{time, strain}) }

// holdClocked adds up the mean rates between the marks of the clock, exact for a curve.
func holdClocked(rate creeplaw.Clocked, at creeplaw.Point, horizon float64) (c course) {
	const marks = 400
	c.add(0, 0)
	strain, from := 0.0, 0.0
	for i := range marks + 1 {
		to := horizon * math.Pow(10, 6*(float64(i)/marks-1))
		strain += (to - from) * math.Exp(rate.MeanLogRate(at, from, to).Value)
		from = to
		c.add(to, strain)
	}
	return c
}

// state is creep strain and variables.
type state [1 + creeplaw.MaxVariables]float64

// holdEvolving integrates strain and variables by the Runge–Kutta pair of Bogacki and Shampine (Appl. Math. Lett. 2 (1989) 321,
// from memory) with steps of controlled error, until a variable is within a thousandth of its limit: rupture.
func holdEvolving(law creeplaw.Evolving, at creeplaw.Point, horizon float64) (c course) {
	variables := law.Variables()
	var y state
	for i, v := range variables {
		y[1+i] = v.Initial
	}
	time, dt := 0.0, horizon*1e-6
	c.add(time, 0)
	for time < horizon && y[0] < endStrain {
		dt = math.Min(dt, horizon-time)
		next, off := step(law, at, y, dt, variables)
		switch {
		case !(off <= 1) && dt < horizon*1e-12:
			c.ruptured = true
			return c
		case !(off <= 1):
			dt *= 0.4
			continue
		}
		time, y = time+dt, next
		c.add(time, y[0])
		for i, v := range variables {
			if (v.Limit-y[1+i])/(v.Limit-v.Initial) < 1e-3 {
				c.ruptured = true
				return c
			}
		}
		dt *= math.Min(2, 0.9*math.Pow(off+1e-6, -1.0/3))
	}
	c.ruptured = time < horizon
	return c
}

// step returns the state after dt and its estimated error over the tolerance; NaN where the law is undefined on the way.
func step(law creeplaw.Evolving, at creeplaw.Point, y state, dt float64, variables []creeplaw.Variable) (state, float64) {
	const tolerance = 1e-6
	k1 := slopes(law, at, y, len(variables))
	k2 := slopes(law, at, y.plus(dt/2, k1), len(variables))
	k3 := slopes(law, at, y.plus(3*dt/4, k2), len(variables))
	next := y.plus(2*dt/9, k1).plus(dt/3, k2).plus(4*dt/9, k3)
	k4 := slopes(law, at, next, len(variables))
	rough := y.plus(7*dt/24, k1).plus(dt/4, k2).plus(dt/3, k3).plus(dt/8, k4)
	off := math.Abs(next[0]-rough[0]) / (next[0] + 1e-6)
	for i := range variables {
		off = math.Max(off, math.Abs(next[1+i]-rough[1+i])/(math.Abs(next[1+i])+math.Abs(variables[i].Initial)+1e-3))
	}
	return next, off / tolerance
}

func (y state) plus(dt float64, k state) state {
	for i := range y {
		y[i] += dt * k[i]
	}
	return y
}

func slopes(law creeplaw.Evolving, at creeplaw.Point, y state, variables int) (k state) {
	at.Strain = y[0]
	e := law.Evolve(creeplaw.InTension(at, [creeplaw.MaxVariables]float64(y[1:])))
	k[0] = math.Exp(e.LogRate)
	for i := range variables {
		k[1+i] = e.Internal[i].Value * math.Exp(e.Internal[i].LogScale)
	}
	return k
}
