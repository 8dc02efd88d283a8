package main

import (
	"errors"
	"fmt"
	"math"
)

// course is the redistribution of stress as computed, from the elastic start to the steady state.
type course struct {
	samples  []sample // the start and the end of every accepted step
	repeated int      // steps done again shorter
	effort   effort
}

// sample is a moment.
type sample struct {
	*condition
	stop     bool    // at a round number of hours, see nextStop
	velocity float64 // of the bore over the step that ended here [mm/h]; not a number at the start
	elastic  float64 // largest share of elastic strain in the rate of any point, see elasticShare
	distance float64 // from the exact steady state: largest error of a stress at any point, over the exact von Mises stress
}

func (c *course) start() *sample { return &c.samples[0] }
func (c *course) end() *sample   { return &c.samples[len(c.samples)-1] }

// runner carries a wall to its steady state.
type runner struct {
	*balance
	tolerance   float64
	now, before *condition
	next        float64 // hours of the next step
	firstStop   float64 // [h]
	scale       float64 // von Mises stress that errors are relative to: the largest at the start [MPa]
	course      course
}

const (
	// steadyShare ends the run, at the next round number of hours: no more than this part of the strain rate is elastic at any
	// point. The stresses are then as far from steady, roughly.
	steadyShare = 1e-7
	mostSteps   = 20000
)

// run loads a wall elastically and lets it creep until the stresses are steady, in steps whose error estimate keeps the
// tolerance, a part of the largest von Mises stress at the start.
func run(w *wall, tolerance float64) (*course, error) {
	r := &runner{balance: newBalance(w), tolerance: tolerance}
	if err := r.load(); err != nil {
		return nil, err
	}
	for r.course.end().elastic > steadyShare || !r.course.end().stop {
		if len(r.course.samples) > mostSteps {
			return nil, fmt.Errorf("no steady state after %d steps, %.4g h", mostSteps, r.now.time)
		}
		if err := r.step(); err != nil {
			return nil, err
		}
	}
	r.measure()
	r.course.effort = r.effort
	return &r.course, nil
}

// load is the elastic start.
func (r *runner) load() error {
	virgin := r.virgin()
	c, err := r.solve(virgin, virgin, 0)
	if err != nil {
		return err
	}
	r.now, r.before = c, nil
	r.course.samples = []sample{{condition: c, stop: true, velocity: math.NaN(), elastic: 1}}
	fastest := 0.0 // relaxation rate E ε̇/σ of the start
	for i, s := range c.stress {
		mises := s.mises()
		r.scale = math.Max(r.scale, mises)
		fastest = math.Max(fastest, r.young*r.nortonAt(r.points[i].kelvin).RateAt(mises)/mises)
	}
	r.next = math.Sqrt(r.tolerance) / (r.exponent * fastest)
	r.firstStop = 0.01 / fastest
	return nil
}

// nextStop is the next round number of hours, 1, 2 or 5 times a power of ten, where every run has a sample.
func (r *runner) nextStop() float64 {
	beyond := math.Max(r.now.time*(1+1e-9), r.firstStop)
	for power := math.Floor(math.Log10(beyond)); ; power++ {
		for _, digit := range []float64{1, 2, 5} {
			if stop := digit * math.Pow(10, power); stop > beyond {
				return stop
			}
		}
	}
}

// step makes one step, after as many shorter tries as it takes, and chooses the length of the next.
func (r *runner) step() error {
	stop := r.nextStop()
	planned, left := r.next, stop-r.now.time
	hours := math.Min(planned, left)
	for {
		c, estimate, err := r.doubled(hours)
		var failed *stepFailed
		switch {
		case err == nil && estimate <= r.tolerance:
			r.next = hours * ratio(estimate/r.tolerance)
			landed := hours == left
			if landed { // a step cut short to land says little about the next
				c.time, r.next = stop, math.Max(r.next, planned)
			}
			r.accept(c, landed)
			return nil
		case err == nil:
			hours *= math.Min(ratio(estimate/r.tolerance), 0.8)
		case errors.As(err, &failed):
			hours /= 4
		default:
			return fmt.Errorf("at %.6g h: %w", r.now.time, err)
		}
		r.course.repeated++
		planned = hours
		if !(r.now.time+hours/2 > r.now.time) {
			return fmt.Errorf("no step from %.6g h is short enough: the last estimate was %.2g; %w", r.now.time, estimate, err)
		}
	}
}

// ratio is by how much the next step may be longer: the error of a backward-Euler step grows with its square.
func ratio(relative float64) float64 {
	return math.Min(math.Max(0.9/math.Sqrt(relative), 0.2), 3)
}

// doubled makes one step and, again from the start, two of half the length. The difference estimates the error; the combination
// 2·halves - whole is free of its first-order part and is what is returned. The wall's equations are linear in displacements,
// stresses and creep strains, so the combination satisfies them exactly.
func (r *runner) doubled(hours float64) (*condition, float64, error) {
	whole, err := r.euler(r.now, r.before, hours)
	if err != nil {
		return nil, 0, err
	}
	half, err := r.euler(r.now, r.before, hours/2)
	if err != nil {
		return nil, 0, err
	}
	halves, err := r.euler(half, r.now, hours/2)
	if err != nil {
		return nil, 0, err
	}
	estimate := 0.0
	for i := range halves.stress {
		estimate = math.Max(estimate, halves.stress[i].minus(whole.stress[i]).mises()/r.scale)
	}
	start := r.course.start().condition
	travel := math.Max(r.scale/r.young*r.inner, math.Abs(halves.displacement[0]-start.displacement[0]))
	estimate = math.Max(estimate, math.Abs(halves.displacement[0]-whole.displacement[0])/travel)
	halves.extrapolate(whole)
	for i := range halves.states {
		if halves.states[i].Equivalent < r.now.states[i].Equivalent {
			return nil, estimate, &stepFailed{errors.New("whole and halves are too far apart to extrapolate")}
		}
	}
	return halves, estimate, nil
}

func (s wallStress) minus(t wallStress) wallStress {
	return wallStress{s.radial - t.radial, s.hoop - t.hoop, s.axial - t.axial}
}

// euler makes one backward-Euler step, guessing its end from the trend since before.
func (r *runner) euler(from, before *condition, hours float64) (*condition, error) {
	guess := from.copyOf()
	if before != nil {
		if trend := hours / (from.time - before.time); trend > 0 && trend <= longestTrend {
			guess.towards(before, -trend)
		}
	}
	return r.solve(from, guess, hours)
}

// longestTrend is how many times the last step a trend is followed.
const longestTrend = 4

func (c *condition) copyOf() *condition {
	d := *c
	d.displacement = append([]float64(nil), c.displacement...)
	return &d
}

// towards moves the displacements by a share x of the way to another condition; negative is away from it.
func (c *condition) towards(d *condition, x float64) {
	c.axial += x * (d.axial - c.axial)
	for i := range c.displacement {
		c.displacement[i] += x * (d.displacement[i] - c.displacement[i])
	}
}

// extrapolate turns the result of two half steps into 2·halves - whole.
func (c *condition) extrapolate(whole *condition) {
	c.towards(whole, -1)
	for i := range c.stress {
		s, t := &c.stress[i], &whole.stress[i]
		s.radial += s.radial - t.radial
		s.hoop += s.hoop - t.hoop
		s.axial += s.axial - t.axial
		p, q := &c.states[i], &whole.states[i]
		p.Creep = p.Creep.Scale(2).Sub(q.Creep)
		p.Equivalent += p.Equivalent - q.Equivalent
	}
}

func (r *runner) accept(c *condition, stop bool) {
	velocity := (c.displacement[0] - r.now.displacement[0]) / (c.time - r.now.time)
	r.course.samples = append(r.course.samples, sample{c, stop, velocity, r.elasticShare(r.now, c), 0})
	r.before, r.now = r.now, c
}

// elasticShare is the largest ratio, over the points, of the elastic strain to the creep strain that a step has added.
func (w *wall) elasticShare(from, to *condition) float64 {
	share := 0.0
	for i := range to.stress {
		elastic := to.stress[i].minus(from.stress[i]).mises() / w.young
		share = math.Max(share, elastic/(to.states[i].Equivalent-from.states[i].Equivalent))
	}
	return share
}

// measure says of every sample how far it is from the exact steady state.
func (r *runner) measure() {
	exact := r.steady()
	for i := range r.points {
		want := exact.at(r.points[i].radius)
		for k := range r.course.samples {
			s := &r.course.samples[k]
			s.distance = math.Max(s.distance, s.stress[i].from(want))
		}
	}
}

// rates are those of the last step.
func (c *course) rates() *settled {
	last, before := c.end(), &c.samples[len(c.samples)-2]
	hours := last.time - before.time
	s := &settled{condition: last.condition, axialRate: (last.axial - before.axial) / hours, share: last.elastic}
	for i := range last.displacement {
		s.velocity = append(s.velocity, (last.displacement[i]-before.displacement[i])/hours)
	}
	return s
}

// leap is one step from the elastic start, far too long for accuracy: it shows the global iteration.
type leap struct {
	hours     float64
	residuals []float64 // before each correction and after the last; nil if no equilibrium was found
	rounding  float64   // part of them that may be rounding
}

// leaps makes steps of a thousandth of the time to the steady state, ten times that, and so on.
func leaps(w *wall, c *course) (list []leap, err error) {
	hours := math.Pow(10, math.Round(math.Log10(c.end().time))-3)
	for range 4 {
		b := newBalance(w)
		start := c.start().condition
		var failed *stepFailed
		if _, err := b.solve(start, start, hours); err != nil && !errors.As(err, &failed) {
			return nil, err
		}
		list = append(list, leap{hours, b.effort.longest, b.effort.rounding})
		hours *= 10
	}
	return list, nil
}
