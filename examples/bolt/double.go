package main

import (
	"errors"
	"math"
)

// doubled makes one step and, again from the start, two of half the length. The difference estimates the error; the
// combination 2·halves - whole is free of its first-order part and is what is returned. Equilibrium and compatibility are
// linear in strains, creep strains, load and nut position at given temperatures, so the combination satisfies them exactly.
func (r *runner) doubled(i int, length float64) (c condition, estimate float64, err error) {
	whole, err := r.euler(i, &r.now, &r.before, length)
	if err != nil {
		return condition{}, 0, err
	}
	half, err := r.euler(i, &r.now, &r.before, length/2)
	if err != nil {
		return condition{}, 0, err
	}
	halves, err := r.euler(i, &half, &r.now, length/2)
	if err != nil {
		return condition{}, 0, err
	}
	estimate = math.Abs(halves.load-whole.load) / r.force
	creep := 0.0
	for k, s := range r.sections {
		creep += s.length * (halves.points[k].state.Equivalent - whole.points[k].state.Equivalent)
	}
	estimate = math.Max(estimate, math.Abs(creep)/r.travel)
	halves.extrapolate(&whole)
	for k := range halves.points {
		if halves.points[k].state.Equivalent < r.now.points[k].state.Equivalent {
			return condition{}, 0, &stepFailed{errors.New("whole and halves are too far apart to extrapolate")}
		}
	}
	return halves, estimate, nil
}

// euler makes one backward Euler step, guessing its end from the trend since before.
func (r *runner) euler(i int, from, before *condition, length float64) (condition, error) {
	bolt, flange := r.history.at(i, from.time+length)
	guess := from.copyOf()
	if ratio := length / (from.time - before.time); ratio > 0 && ratio <= longestTrend {
		guess.towards(before, -ratio)
	}
	return r.solve(from, &guess, demand{duration: length, bolt: bolt, flange: flange})
}

// longestTrend is how many times the last step a trend is followed.
const longestTrend = 4

// towards moves strains, load and nut by a share x of the way to another condition; negative is away from it.
func (c *condition) towards(d *condition, x float64) {
	c.load += x * (d.load - c.load)
	c.nut += x * (d.nut - c.nut)
	for i := range c.points {
		p, q := &c.points[i], &d.points[i]
		p.axial += x * (q.axial - p.axial)
		p.lateral += x * (q.lateral - p.lateral)
	}
}

// extrapolate turns the result of two half steps into 2·halves - whole.
func (c *condition) extrapolate(whole *condition) {
	c.towards(whole, -1)
	for i := range c.points {
		p, q := &c.points[i], &whole.points[i]
		p.stress += p.stress - q.stress
		p.state.Creep = p.state.Creep.Scale(2).Sub(q.state.Creep)
		p.state.Equivalent += p.state.Equivalent - q.state.Equivalent
	}
}

// accept takes a step: it notes where the load crosses the requirement on the way, and ends where the joint opens.
func (r *runner) accept(i int, c condition, next float64) error {
	was, required := r.now, r.perBolt(r.required)
	opens := !(c.load > 0)
	if opens {
		c = r.crossing(i, c, 0)
	}
	if (was.load < required) != (c.load < required) {
		r.now = r.crossing(i, c, required)
		r.watch(c.load < required)
		r.record(crossingEvents[c.load < required], true)
	}
	r.before, r.now, r.next = was, c, next
	if opens {
		r.record("the joint opens", true)
		return &jointOpen{c.time}
	}
	return nil
}

var crossingEvents = map[bool]string{true: "falls under the required load", false: "is above the required load again"}

// watch opens or closes a spell under the required load.
func (r *runner) watch(under bool) {
	spells := &r.course.under
	last := len(*spells) - 1
	open := last >= 0 && math.IsNaN((*spells)[last].to)
	switch {
	case under && !open:
		*spells = append(*spells, spell{r.now.time, math.NaN()})
	case !under && open:
		(*spells)[last].to = r.now.time
	}
}

// crossing finds when, within a step that ended in c, the load equals the one required, by bisection on the length.
func (r *runner) crossing(i int, c condition, required float64) condition {
	kept := r.effort // the bisection is no part of what a run costs
	defer func() { r.effort = kept }()
	low, high := 0.0, c.time-r.now.time
	for range 40 { // 1e-12 of the step
		middle := low + (high-low)/2
		between, _, err := r.doubled(i, middle)
		if err != nil { // what a shorter step cannot tell is left at the end of the whole
			break
		}
		if (between.load < required) == (r.now.load < required) {
			low = middle
		} else {
			high, c = middle, between
		}
	}
	return c
}
