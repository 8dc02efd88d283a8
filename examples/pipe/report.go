package main

import (
	"fmt"
	"math"

	"example.com/holdtime/examples/checklist"
	"example.com/holdtime/examples/newton"
)

// settings of a run.
type settings struct {
	elements  int
	tolerance float64 // error estimate of a time step, over the largest von Mises stress at the start
}

// report is everything that is printed and drawn.
type report struct {
	*pipe
	settings
	cases   []*history
	reduced []meshError // the mesh study at one temperature, two points per element
	full    []meshError // and three points, which lock
	checks  checklist.List
}

// history is the pipe at one distribution of temperature.
type history struct {
	name, against string
	wall          *wall
	course        *course
	exact         steady
	leaps         []leap
	startError    float64   // of the elastic start at the points, over the von Mises stress there
	end           meshError // of the last sample
	timeError     float64   // largest change of a stress at the round hours with a tenth of the tolerance, over the stress scale
}

// newReport computes everything.
func newReport(p *pipe, s settings) (*report, error) {
	r := &report{pipe: p, settings: s}
	for _, c := range []struct {
		pipe          *pipe
		name, against string
	}{{p.uniform(), "one temperature", "Bailey"}, {p, "temperature gradient", "quadrature"}} {
		h, err := newHistory(c.pipe, s)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", c.name, err)
		}
		h.name, h.against = c.name, c.against
		r.cases = append(r.cases, h)
	}
	u := r.cases[0]
	meshes, latest := []int{2, 4, 8, 16, 32, 64}, 20*u.course.end().time
	var err error
	if r.reduced, err = study(u.wall.pipe, 2, meshes, latest); err != nil {
		return nil, err
	}
	if r.full, err = study(u.wall.pipe, 3, meshes, latest); err != nil {
		return nil, err
	}
	r.judge()
	return r, nil
}

func newHistory(p *pipe, s settings) (*history, error) {
	w, err := newWall(p, s.elements, 2)
	if err != nil {
		return nil, err
	}
	h := &history{wall: w, exact: p.steady()}
	if h.course, err = run(w, s.tolerance); err != nil {
		return nil, err
	}
	if h.leaps, err = leaps(w, h.course); err != nil {
		return nil, err
	}
	finer, err := run(w, s.tolerance/10)
	if err != nil {
		return nil, err
	}
	h.timeError = h.course.change(finer)
	for i := range w.points {
		h.startError = math.Max(h.startError, h.course.start().stress[i].from(p.elastic(w.points[i].radius)))
	}
	h.end = w.meshError(h.course.rates(), &h.exact)
	return h, nil
}

// change is the largest von Mises stress of the difference of two courses at the same round hours, over the largest at the
// start.
func (c *course) change(d *course) (largest float64) {
	scale := 0.0
	for _, s := range c.start().stress {
		scale = math.Max(scale, s.mises())
	}
	next := 0
	for k := range c.samples {
		s := &c.samples[k]
		for next < len(d.samples) && d.samples[next].time < s.time {
			next++
		}
		if !s.stop || next == len(d.samples) || d.samples[next].time != s.time {
			continue
		}
		for i := range s.stress {
			largest = math.Max(largest, s.stress[i].minus(d.samples[next].stress[i]).mises()/scale)
		}
	}
	return largest
}

const permille = 1e-3 // what is asked of stresses and rates

// judge holds the numbers against their limits.
func (r *report) judge() {
	for _, h := range r.cases {
		r.checks.AtMost(h.name+": elastic start at the points, from Lamé and Timoshenko", h.startError, permille)
		r.checks.AtMost(h.name+": steady stresses at the points, from "+h.against, h.end.points, permille)
		r.checks.AtMost(h.name+": steady stresses at both surfaces, from "+h.against, h.end.surfaces, permille)
		r.checks.AtMost(h.name+": steady strain rates at the points, from "+h.against, h.end.rate, permille)
		r.checks.AtMost(h.name+": steady velocity of the bore, from "+h.against, h.end.bore, permille)
		r.checks.AtMost(h.name+": stresses at round hours, change with a tenth of the tolerance", h.timeError, 10*r.tolerance)
	}
	r.checks.AtMost("quadrature at one temperature, from Bailey", r.quadratureError(), 1e-10)
	c, f := r.reduced[1], r.reduced[2]
	for _, o := range []struct {
		name         string
		coarse, fine float64
		least        float64
	}{{"stresses at the points", c.points, f.points, 2.8}, {"stresses at the surfaces", c.surfaces, f.surfaces, 1.9},
		{"velocity of the bore", c.bore, f.bore, 3.7}} {
		if o.fine > 1e-9 { // else it is rounding, as for a thin wall
			name := fmt.Sprintf("mesh: order of the %s, %d to %d elements", o.name, c.elements, f.elements)
			r.checks.AtLeast(name, order(o.coarse, o.fine), o.least)
		}
	}
	largest := 0.0
	for _, h := range r.cases {
		for _, l := range h.leaps {
			largest = math.Max(largest, newton.Constant(l.residuals, l.rounding))
		}
	}
	r.checks.AtMost("Newton: largest r(k+1)/r(k)² below 1e-2, all leaps", largest, 100)
}

// quadratureError holds the two solutions of the steady state at one temperature against each other.
func (r *report) quadratureError() (largest float64) {
	h := r.cases[0]
	cylinder := h.wall.bailey()
	for _, radius := range h.wall.nodes {
		want := wallStress{cylinder.RadialAt(radius), cylinder.HoopAt(radius), cylinder.AxialAt(radius)}
		largest = math.Max(largest, h.exact.at(radius).from(want))
	}
	return math.Max(largest, math.Abs(h.exact.velocity/(cylinder.VelocityAt(h.wall.inner)*h.wall.inner)-1))
}
