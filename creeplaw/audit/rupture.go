package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// evolutionSense looks at the direction in which the internal variables go and at the step they allow.
func evolutionSense(x *examination) answer {
	if x.evolving == nil {
		return skipped("the law has none")
	}
	growth := newSpread()
	worst := softState{largestStep: math.Inf(1)}
	for _, p := range x.reached() {
		e := x.evolve(p)
		if math.IsNaN(e.LogRate) {
			continue
		}
		x.recovers(p, &e)
		x.fallsInState(p)
		g := x.growth(p, &e)
		growth.add(g)
		if !(g > 1e-9) { // of the rate per time the rate takes
			continue
		}
		worst.seen++
		if dt := x.implicitLimit(p); dt < worst.largestStep || worst.seen == 1 {
			worst.largestStep, worst.at, worst.growth = dt, p, g
		}
	}
	if worst.seen > 0 {
		x.noteSoftState(worst)
	}
	if growth.Low > growth.High {
		return skipped("no state could be reached")
	}
	return inOrder("the variables go towards their limits and the creep rate does not grow with them")
}

// recovers notes a variable that moves away from its limit.
func (x *examination) recovers(p creeplaw.EvolvingPoint, e *creeplaw.Evolution) {
	for i, v := range x.evolving.Variables() {
		speed := e.Internal[i].Value * math.Exp(e.Internal[i].LogScale)
		if math.IsInf(v.Limit, 0) || !(speed*(v.Limit-v.Initial) < 0) {
			continue
		}
		f := Finding{Kind: VariableRecovers, Severity: Remark, By: Variable, Variable: v.Name, At: p}
		f.Numbers = []Number{x.rateNumber("its rate", speed)}
		f.Sentence = fmt.Sprintf("The %s moves away from its limit of %.4g under load, which is hardening if it is a resistance; damage "+
			"that heals by creeping would want a reason.", v.Name, v.Limit)
		x.note(f, math.Abs(speed), "")
	}
}

// fallsInState notes a creep rate that falls as all stresses rise in proportion.
func (x *examination) fallsInState(p creeplaw.EvolvingPoint) {
	const aside = 1e-4
	n := (x.evolve(scaled(p, 1+aside)).LogRate - x.evolve(scaled(p, 1-aside)).LogRate) / (2 * aside)
	if !(n < -1e-6) {
		return
	}
	f := Finding{Kind: FallsWithStress, Severity: Fault, By: Stress, At: p, Numbers: []Number{{"stress exponent", n, ""}}}
	f.Sentence = fmt.Sprintf("More stress gives less creep in this state, with a local exponent of %.3g: a step at fixed strain may have "+
		"several solutions.", n)
	x.note(f, -n, "state")
}

// growth is d ln ṗ/dt at constant stress over the rate of the fastest thing that changes: positive in tertiary creep.
func (x *examination) growth(p creeplaw.EvolvingPoint, e *creeplaw.Evolution) float64 {
	creep := math.Exp(e.LogRate) / p.Strain
	sum, fastest := e.Creep.ByLogStrain*creep, creep
	for i := range x.evolving.Variables() {
		speed := e.Internal[i].Value * math.Exp(e.Internal[i].LogScale)
		sum += e.Creep.ByInternal[i] * speed
		fastest = math.Max(fastest, math.Abs(e.Creep.ByInternal[i]*speed))
	}
	if !(fastest > 0) {
		return 0
	}
	return sum / fastest
}

// softState is the state with the least of the largest steps.
type softState struct {
	seen        int
	at          creeplaw.EvolvingPoint
	largestStep float64
	growth      float64
}

func (x *examination) noteSoftState(worst softState) {
	unit := x.settings.timeUnit()
	virgin := stressed(x.domain.at(0.5, 0, 0.5), 0, x.initial())
	fromVirgin := x.implicitLimit(virgin)
	f := Finding{Kind: Softening, Severity: Warning, By: Variable, At: worst.at, Seen: worst.seen}
	f.Numbers = []Number{{"largest step at fixed stress", worst.largestStep, unit},
		{firstStep, fromVirgin, unit}}
	f.Sentence = fmt.Sprintf("The creep rate grows with the internal variables, which is tertiary creep if it is meant: a backward-Euler "+
		"step at fixed stress has a solution connected to the start only while det(1-Δt·J) > 0 at its end, J being the derivatives of "+
		"the rates by creep strain and variables, here %.3g %s from the state worst off and %.3g %s from virgin material in the middle of "+
		"the domain.", worst.largestStep, unit, fromVirgin, unit)
	x.measures.LargestStep = math.Min(x.measures.LargestStep, worst.largestStep)
	x.measures.LargestFirstStep = math.Min(x.measures.LargestFirstStep, fromVirgin)
	x.measures.LargestStepAtFixedStrain, x.measures.SufficientStiffness = math.NaN(), math.NaN()
	x.note(f, 0, "state")
}

const unknowns = 1 + creeplaw.MaxVariables

// system is the rates of creep strain and variables at fixed stress, and their derivatives by them.
type system struct {
	rate     [unknowns]float64
	jacobian [unknowns][unknowns]float64
	size     int
}

func (x *examination) systemAt(p creeplaw.EvolvingPoint) (s system) {
	e := x.evolve(p)
	s.size = 1 + len(x.evolving.Variables())
	fill := func(row int, scale, value float64, d *creeplaw.Partials) {
		s.rate[row] = value * scale
		s.jacobian[row][0] = scale * d.ByLogStrain / p.Strain
		for j := 1; j < s.size; j++ {
			s.jacobian[row][j] = scale * d.ByInternal[j-1]
		}
	}
	fill(0, math.Exp(e.LogRate), 1, &e.Creep)
	for i := 1; i < s.size; i++ {
		r := &e.Internal[i-1]
		fill(i, math.Exp(r.LogScale), r.Value, &r.Partials)
	}
	return s
}

// implicitLimit is the largest Δt for which backward Euler at fixed stress has a solution connected to Δt → 0: the branch is
// followed as Δt grows until det(1 - Δt J) at its end turns negative. +Inf where it does not before the strain is thirty times
// the greatest of the domain.
func (x *examination) implicitLimit(start creeplaw.EvolvingPoint) float64 {
	const growth, most, far = 1.15, 400, 30
	s := x.systemAt(start)
	norm := 0.0
	for i := range s.size {
		norm = math.Max(norm, math.Abs(s.rate[i])/math.Max(math.Abs(coordinateOf(&start, i)), 1e-3))
		for j := range s.size {
			norm = math.Max(norm, math.Abs(s.jacobian[i][j]))
		}
	}
	if !(norm > 0) || math.IsInf(norm, 1) {
		return math.Inf(1)
	}
	good, bad := 0.0, math.Inf(1)
	end := start
	for dt, n := 1e-3/norm, 0; n < most; n++ {
		next, ok := x.implicitStep(start, end, dt)
		switch {
		case !ok:
			bad = dt
		case next.Strain > far*x.domain.Strain.High:
			return math.Inf(1)
		default:
			good, end = dt, next
		}
		if math.IsInf(bad, 1) {
			dt *= growth
			continue
		}
		if bad-good < 1e-9*bad {
			return good
		}
		dt = good + (bad-good)/2
	}
	if math.IsInf(bad, 1) {
		return math.Inf(1)
	}
	return good
}

// coordinateOf is the creep strain or a variable.
func coordinateOf(p *creeplaw.EvolvingPoint, i int) float64 {
	if i == 0 {
		return p.Strain
	}
	return p.Internal[i-1]
}

// implicitStep solves y = y₀ + Δt f(y) by Newton's method from a guess. It fails where the determinant is not positive.
func (x *examination) implicitStep(start, guess creeplaw.EvolvingPoint, dt float64) (creeplaw.EvolvingPoint, bool) {
	p := guess
	for range 40 {
		s := x.systemAt(p)
		var residual [unknowns]float64
		size := 0.0
		for i := range s.size {
			residual[i] = coordinateOf(&start, i) + dt*s.rate[i] - coordinateOf(&p, i)
			size = math.Max(size, math.Abs(residual[i])/(math.Abs(dt*s.rate[i])+0x1p-40*math.Abs(coordinateOf(&p, i))+0x1p-1000))
		}
		correction, determinant := s.solve(dt, residual)
		if !(determinant > 0) || !finite(size) {
			return p, false
		}
		if size < 1e-11 {
			return p, true
		}
		p.Strain += correction[0]
		for i := 1; i < s.size; i++ {
			p.Internal[i-1] += correction[i]
		}
	}
	return p, false
}

// solve returns (1 - Δt J)⁻¹ b and the determinant, by elimination with pivots.
func (s *system) solve(dt float64, b [unknowns]float64) (y [unknowns]float64, determinant float64) {
	var a [unknowns][unknowns]float64
	for i := range s.size {
		for j := range s.size {
			a[i][j] = -dt * s.jacobian[i][j]
		}
		a[i][i]++
	}
	determinant = 1
	for k := range s.size {
		pivot := k
		for i := k + 1; i < s.size; i++ {
			if math.Abs(a[i][k]) > math.Abs(a[pivot][k]) {
				pivot = i
			}
		}
		if pivot != k {
			a[k], a[pivot], b[k], b[pivot] = a[pivot], a[k], b[pivot], b[k]
			determinant = -determinant
		}
		determinant *= a[k][k]
		for i := k + 1; i < s.size; i++ {
			f := a[i][k] / a[k][k]
			for j := k; j < s.size; j++ {
				a[i][j] -= f * a[k][j]
			}
			b[i] -= f * b[k]
		}
	}
	for k := s.size - 1; k >= 0; k-- {
		y[k] = b[k]
		for j := k + 1; j < s.size; j++ {
			y[k] -= a[k][j] * y[j]
		}
		y[k] /= a[k][k]
	}
	return y, determinant
}
