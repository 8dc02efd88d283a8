package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// solve finds the solution at the end of the step that is connected to Δt → 0, in x. Most steps are short of the trouble that
// internal variables can make: Newton's iteration from a good guess finds a solution, and a bound on the feedback between
// variables and creep proves that it is the only one in reach (see contracts). The rest is left to walk, which follows the
// curve of solutions from its beginning.
func (c *coupled) solve(x *node) Code {
	x.v, x.logTime, x.odds = c.before, c.logTime, 0
	if c.start == 0 && c.trial > 0 {
		x.odds = 0x1p-20 // where hardening starts from zero strain the rate is infinite, and no exponent can be seen
	}
	if v := c.evaluate(x); v == undefined {
		return LawUndefined
	}
	level := c.logTime - c.logElastic + x.rate.LogRate
	c.creeps = c.trial > 0 && level >= negligible
	if !c.creeps && c.count == 0 {
		return 0
	}
	var t trialRates
	c.keep(&t, x)
	found := c.guess(x) && c.newton(x, c.size(), exact) == fine
	if !found && c.creeps && c.relax(x) {
		found = c.newton(x, c.size(), exact) == fine
	}
	if found && !c.atLimit(x) && c.contracts(x, &t) {
		return 0
	}
	return c.walk(x)
}

// relax sets x nearer the solution where the guess was too far from it, as for an exponential of stress: it solves F alone with
// the variables as they were, inside a bracket, and then lets the variables follow.
func (c *coupled) relax(x *node) bool {
	const enough, most = 0.1, 40
	x.v, x.logTime = c.before, c.logTime
	if !(x.odds > 0x1p-1000 && x.odds < 0x1p1000) {
		x.odds = 1
	}
	low, high := 0.0, math.Inf(1)
	for range most {
		if c.evaluate(x) == undefined {
			return false
		}
		f := x.residual[c.count]
		switch {
		case math.Abs(f) <= enough:
			c.follow(x)
			return true
		case f < 0:
			low = x.odds
		case f > 0:
			high = x.odds
		default:
			return false
		}
		next := advance(x.odds, -f/x.jacobian[c.count][c.count], low, high)
		if !(next > 0 && next != x.odds) {
			return false
		}
		x.odds = next
	}
	return false
}

// follow moves the variables by what their rates at x make of the step.
func (c *coupled) follow(x *node) {
	for i := range c.count {
		increment := x.increment[i] / max(x.jacobian[i][i], 0.5)
		if room := c.memory.limit[i] - x.v[i]; increment/room > 0.5 {
			increment = 0.5 * room
		}
		if finite(increment) {
			x.v[i] += increment
		}
	}
}

// guess sets x near the solution from the law at the trial state, as if it were a power law in stress. It reports false where
// that leads nowhere. What it only aims at is computed roughly.
func (c *coupled) guess(x *node) bool {
	logKept := 0.0
	if c.creeps {
		c.guessCreep(x)
		if logKept = -doubleArtanh(x.odds / (2 + x.odds)); x.odds > 1 {
			logKept = -math.Log1p(x.odds)
		}
	}
	shift := 0.0
	for i := range c.count {
		r := &x.rate.Internal[i]
		increment := x.increment[i]
		if increment == 0 {
			continue
		}
		if c.creeps {
			if fall := c.exponent(x, &r.Partials) / r.Value * logKept; fall > -0.5 {
				increment *= exponential(fall)
			} else {
				increment = r.Value * math.Exp(c.logTime+r.LogScale+fall) / c.memory.unit[i]
			}
		}
		// The variable's own feedback, to second order.
		feedback := increment * r.ByInternal[i] * c.memory.unit[i] / r.Value
		increment /= 1 - min(feedback, 0.5)
		if room := c.memory.limit[i] - x.v[i]; increment/room > 0.5 {
			increment = 0.5 * room
		}
		if !finite(increment) {
			return false
		}
		x.v[i] += increment
		shift += increment * x.rate.Creep.ByInternal[i] * c.memory.unit[i]
	}
	if c.creeps && shift != 0 {
		u := x.odds / (1 + x.odds)
		shift /= 1 - u + u*max(x.rate.Creep.ByLogStress, 0)
		x.odds *= exponential(max(-1, min(1, shift)))
	}
	return true
}

// guessCreep sets z as relaxation.solve does, with the variables as they were.
func (c *coupled) guessCreep(x *node) {
	l := &x.rate.Creep
	level, slope := c.logTime-c.logElastic+x.rate.LogRate, 1.0
	if hardening := -l.ByLogStrain; hardening > 0 && x.strain < c.elastic {
		if l := (level - hardening*math.Log(c.elastic/x.strain)) / (1 + hardening); l < level {
			level, slope = l, 1+hardening
		}
	}
	x.odds = firstGuess(level, max(c.exponent(x, l), 0)/slope)
}

// effort is how far an iteration goes.
type effort struct {
	corrections int
	done        float64 // size of what is left
	first       float64 // largest first correction that is trusted
	increments  bool    // whether increments of the variables count for themselves, not only by what they do to the rates
}

var (
	exact = effort{corrections: 9, done: 1e-13, first: math.Inf(1), increments: true}
	rough = effort{corrections: 4, done: 1e-6, first: 0.5}
)

// newton corrects x with one coordinate held: ln Δt for the solution at a given time, another to follow the curve.
func (c *coupled) newton(x *node, held int, e effort) verdict {
	v, _ := c.correct(x, held, e)
	return v
}

// correct is newton that also tells the size of its first correction, which is the error of the prediction. An iteration that
// contracts is taken as done when what it is going to leave is negligible; the law is not asked again there.
func (c *coupled) correct(x *node, held int, e effort) (v verdict, first float64) {
	before := 1.0
	for i := range e.corrections {
		if v := c.evaluate(x); v != fine {
			return v, first
		}
		var d direction
		if !c.linear(x, held, &d, nil) {
			return tooFar, first
		}
		size, relative := c.measure(x, &d, e.increments)
		if i == 0 {
			if first = size; !(size <= e.first) {
				return tooFar, first
			}
		}
		c.move(x, &d, c.leash(x, &d, size))
		contraction := min(1, relative/before)
		x.rest = relative * contraction // the next correction would be smaller
		switch {
		case x.rest <= e.done && size < 2e-10+e.done:
			return fine, first
		case contraction > 0.1 && relative < 1e-3 && i > 0 && c.atRounding(x):
			return fine, first
		}
		before = relative
	}
	return tooFar, first
}

// atRounding reports whether what is left of the equations at x is rounding of their own terms. Corrections then no longer
// shrink, however large the nearness of a fold or of a limit makes them.
func (c *coupled) atRounding(x *node) bool {
	const units = 8 * epsilon
	argument := func(by *creeplaw.Partials) float64 { // rounding of the arguments of a rate
		s := math.Abs(by.ByLogStress) + math.Abs(by.ByLogStrain) + math.Abs(by.ByMeanStress*c.mean) +
			math.Abs(by.ByPrincipalStress*(c.mean+c.principal))
		for i := range c.count {
			own := c.memory.unit[i]*math.Abs(x.v[i]) + math.Abs(c.memory.initial[i])
			s += math.Abs(by.ByInternal[i]) * own
		}
		return s
	}
	for i := range c.count {
		r := &x.rate.Internal[i]
		terms := math.Abs(x.v[i]) + math.Abs(c.before[i]) + math.Abs(x.increment[i])*(1+math.Abs(x.logTime)+math.Abs(r.LogScale)) +
			x.growth[i]*argument(&r.Partials)
		if !(math.Abs(x.residual[i]) <= units*terms) {
			return false
		}
	}
	if !c.creeps {
		return true
	}
	terms := math.Abs(x.logTime) + math.Abs(c.logElastic) + math.Abs(x.rate.LogRate) + math.Abs(math.Log(x.fraction)) +
		argument(&x.rate.Creep)
	return math.Abs(x.residual[c.count]) <= units*terms
}

// direction is a change of the coordinates: the variables, z where there is creep, ln Δt.
type direction [unknowns + 1]float64

// measure is the size of a correction by what it does to the rates; and the size that must vanish, of every coordinate and,
// if asked for, relative to the increments of the variables in this step.
func (c *coupled) measure(x *node, d *direction, increments bool) (size, rest float64) {
	if c.creeps {
		size = math.Abs(d[c.count]) * (1 + x.fraction*math.Abs(x.rate.Creep.ByLogStress))
	}
	rest = math.Abs(d[c.size()])
	grown := 0.0 // what the time alone adds to an increment, relative to it
	if rest > 0 {
		grown = math.Expm1(min(rest, 700))
	}
	for i := range c.count {
		dv, weight := math.Abs(d[i]), c.weight(x, i)
		if grown > 0 {
			size = max(size, grown*math.Abs(x.increment[i])*weight/max(1, math.Abs(x.jacobian[i][i])))
		}
		if dv == 0 {
			continue
		}
		size = max(size, dv*weight)
		if increments {
			rest = max(rest, dv/(math.Abs(x.increment[i])+1e-4*math.Abs(x.v[i])+negligibleIncrement))
		}
	}
	return size, max(size, rest)
}

// negligibleIncrement is an increment of a variable over its unit that would not show after 1e6 steps.
const negligibleIncrement = 1e-22

// weight is the change of a variable that matters, inverted: what moves the creep rate by a factor e, or the variable's own rate
// where it feeds on itself, or the way to the limit.
func (c *coupled) weight(x *node, i int) float64 {
	weight := math.Abs(x.sensitivity[i]) + 1/math.Abs(c.memory.limit[i]-x.v[i])
	if r := &x.rate.Internal[i]; r.ByInternal[i] > 0 && r.Value != 0 {
		weight += r.ByInternal[i] * c.memory.unit[i] / math.Abs(r.Value)
	}
	return weight
}

// leash is the fraction of a correction that is safe: no further than a factor of e³ in the rates, nor half way to a limit.
func (c *coupled) leash(x *node, d *direction, size float64) float64 {
	fraction := 1.0
	if size > 3 {
		fraction = 3 / size
	}
	for i := range c.count {
		if room := c.memory.limit[i] - x.v[i]; fraction*d[i]/room > 0.5 {
			fraction = 0.5 * room / d[i]
		}
	}
	return fraction
}

// move goes a fraction of a direction.
func (c *coupled) move(x *node, d *direction, fraction float64) {
	for i := range c.count {
		x.v[i] += fraction * d[i]
	}
	if c.creeps {
		x.odds *= exponential(fraction * d[c.count])
	}
	x.logTime += fraction * d[c.size()]
}

// brink is the part of the way from the initial value to a limit at which the material is taken as ruptured: nearer, the
// rounding of the variable itself shows in the rates.
const brink = 0x1p-20

func (c *coupled) atLimit(x *node) bool {
	for i := range c.count {
		if l := c.memory.limit[i]; !math.IsInf(l, 0) && math.Abs(l-x.v[i]) <= brink {
			return true
		}
	}
	return false
}
