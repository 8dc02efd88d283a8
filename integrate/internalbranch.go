package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// bearable is the feedback up to which a solution is taken to be the one connected to Δt → 0.
const bearable = 0.4

// contracts reports whether the solution at x is surely the one connected to Δt → 0.
//
// Along the curve of solutions from Δt = 0 the equations can only turn back, or have a second solution, where the feedback of
// the variables on themselves and on each other, directly and by way of the creep rate and the stress, comes to 1: where the
// determinant of the equations vanishes. What is bounded here is the sum of the terms that lower it; stable parts, such as
// saturation, are left out. A variable may be looked at per time (Rᵢ) or per creep strain (Rᵢ - Δvᵢ F), which has the same
// solutions; the better of the two counts.
//
// The terms grow along the curve with the increments of the variables. An increment Δt v̇ ~ u (1-u)^(χ-n), χ the stress
// exponent of v̇ and n that of ṗ, grows up to the end too if χ ≤ n, and otherwise passes through a maximum at u = 1/(1+χ-n).
// The bound is formed twice, from the law at the end of the step and from the law at the trial state, because the exponents
// need not be the same everywhere.
//
// All this is for a creep rate that rises with stress all the way. One that sees more than the von Mises stress need not: there
// only a small fraction relaxed is vouched for.
func (c *coupled) contracts(x *node, t *trialRates) bool {
	const little = 0.1
	if x.fraction > little && (t.seesMore || seesMore(&x.rate.Creep)) {
		return false
	}
	return c.feedbackAtEnd(x, t) <= bearable && c.feedbackFromTrial(x, t) <= bearable
}

func (c *coupled) feedbackAtEnd(x *node, t *trialRates) float64 {
	feedback, slope := 0.0, 1.0
	if c.creeps {
		slope = x.jacobian[c.count][c.count]
		if !(c.exponent(x, &x.rate.Creep) > 0 && slope > 0) {
			return math.Inf(1)
		}
		feedback = max(0, x.share*x.rate.Creep.ByLogStrain)
	}
	for i := range c.count {
		perTime, perStrain := 0.0, 0.0
		excess := c.excess(x, i)
		byCreep := x.sensitivity[i] * x.increment[i]
		if c.creeps {
			byZ := -x.sensitivity[i] * x.jacobian[i][c.count] / slope
			perTime = max(0, byZ)
			perStrain = max(0, byCreep+byZ)
			if excess > 0 { // this term changes its sign on the way: take its parts
				perStrain = math.Abs(byCreep) * max(1, excess)
			}
		}
		for j := range c.count {
			a := x.jacobian[i][j]
			if i == j {
				perTime += max(0, 1-a)
				perStrain += max(0, 1-a-byCreep)
				continue
			}
			b := x.jacobian[j][i]
			perTime += math.Sqrt(math.Abs(a * b))
			perStrain += math.Sqrt(math.Abs((a + x.increment[i]*x.sensitivity[j]) * (b + x.increment[j]*x.sensitivity[i])))
		}
		if !c.creeps {
			perStrain = perTime
		}
		f := min(perTime, perStrain)
		if more := peak(x.fraction, x.odds, excess); more > 1 && f > 0 {
			// An exponent says nothing where a rate passes through zero: no more than what the trial state makes of it.
			f *= min(more, max(1, c.scaleByStrain(x, t, i)/x.growth[i]))
		}
		feedback += f
	}
	return feedback
}

// excess is by how much the stress exponent of a variable's rate is larger than that of the creep rate, χ - n.
func (c *coupled) excess(x *node, i int) float64 {
	r := &x.rate.Internal[i]
	if !c.creeps || r.Value == 0 {
		return 0
	}
	return c.exponent(x, &r.Partials)/r.Value - c.exponent(x, &x.rate.Creep)
}

// peak is the largest increment of a variable on the curve up to the fraction u over the increment at its end.
func peak(fraction, odds, excess float64) float64 {
	if !(fraction*(1+excess) > 1) {
		return 1
	}
	top := 1 / (1 + excess)
	return top / fraction * math.Exp(excess*(math.Log1p(-top)+math.Log1p(odds)))
}

// trialRates is what the law says at the trial state, kept to judge the solution by.
type trialRates struct {
	perTime     [creeplaw.MaxVariables]float64 // scale of the increments: Δt e^LogScale
	perStrain   [creeplaw.MaxVariables]float64 // the logarithm of the other: q/3G e^(LogScale - LogRate)
	value       [creeplaw.MaxVariables]float64 // v̇ in that scale
	by          [creeplaw.MaxVariables][creeplaw.MaxVariables]float64
	excess      [creeplaw.MaxVariables]float64
	sensitivity [creeplaw.MaxVariables]float64
	exponent    float64 // n
	softening   float64 // ∂ln ṗ/∂u by the strain
	seesMore    bool
}

// seesMore reports whether a rate depends on stress by more than the von Mises stress.
func seesMore(by *creeplaw.Partials) bool { return by.ByMeanStress != 0 || by.ByPrincipalStress != 0 }

// keep takes what the law says from x. All is over the units of the variables.
func (c *coupled) keep(t *trialRates, x *node) {
	m := c.memory
	t.exponent = c.exponent(x, &x.rate.Creep)
	t.seesMore = c.creeps && seesMore(&x.rate.Creep)
	if x.strain > 0 {
		t.softening = x.rate.Creep.ByLogStrain * (c.elastic / x.strain)
	}
	for i := range c.count {
		r := &x.rate.Internal[i]
		t.perTime[i] = x.growth[i]
		t.perStrain[i] = c.logElastic + r.LogScale - x.rate.LogRate
		t.value[i] = r.Value
		t.excess[i] = c.excess(x, i)
		t.sensitivity[i] = x.rate.Creep.ByInternal[i] * m.unit[i]
		for j := range c.count {
			t.by[i][j] = r.ByInternal[j] * m.unit[j]
		}
	}
}

// feedbackFromTrial takes the increments as no larger than they would be at the trial stress all the time, or, if that is too
// much, than what the creep strain can make of them.
func (c *coupled) feedbackFromTrial(x *node, t *trialRates) float64 {
	softening := 0.0
	if c.creeps {
		if !(t.exponent > 0) {
			return math.Inf(1)
		}
		softening = max(0, t.softening*x.fraction)
	}
	scale := t.perTime
	if f := softening + c.feedbackOf(&scale, t); f <= bearable || !c.creeps {
		return f
	}
	for i := range c.count {
		scale[i] = min(scale[i], c.scaleByStrain(x, t, i))
	}
	return softening + c.feedbackOf(&scale, t)
}

// scaleByStrain is the largest scale of the increments of a variable that the creep strain can make at the trial state.
func (c *coupled) scaleByStrain(x *node, t *trialRates, i int) float64 {
	return math.Exp(t.perStrain[i]) / c.memory.unit[i] * x.fraction * crestUpTo(x.fraction, x.odds, t.excess[i])
}

// feedbackOf is the destabilising feedback at the trial state for increments of a scale.
func (c *coupled) feedbackOf(scale *[creeplaw.MaxVariables]float64, t *trialRates) (feedback float64) {
	for i := range c.count {
		a := t.sensitivity[i]
		increment := scale[i] * t.value[i]
		perTime, perStrain := 0.0, 0.0
		if byCreep := a * increment; byCreep > 0 {
			perStrain = byCreep
		} else if c.creeps {
			perTime = -byCreep * max(0, 1+t.excess[i]/t.exponent)
			perStrain = -byCreep * max(0, t.excess[i])
		}
		for j := range c.count {
			own := scale[i] * t.by[i][j]
			if i == j {
				perTime += max(0, own)
				perStrain += max(0, own-a*increment)
				continue
			}
			back := scale[j] * t.by[j][i]
			perTime += math.Sqrt(math.Abs(own * back))
			perStrain += math.Sqrt(math.Abs((own - increment*t.sensitivity[j]) * (back - scale[j]*t.value[j]*a)))
		}
		if !c.creeps {
			perStrain = perTime
		}
		feedback += min(perTime, perStrain)
	}
	return feedback
}

// crestUpTo is the largest value of u (1-u)^excess up to the fraction, over the fraction, or more.
func crestUpTo(fraction, odds, excess float64) float64 {
	switch {
	case excess < 0: // rising to the end
		return math.Exp(-excess * math.Log1p(odds))
	case !(fraction*(1+excess) > 1):
		return 1
	}
	top := 1 / (1 + excess)
	return top / fraction * math.Exp(excess*math.Log1p(-top))
}
