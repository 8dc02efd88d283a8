package main

import (
	"fmt"
	"math"

	"example.com/holdtime/bench"
	"example.com/holdtime/tensor"
)

// stage is a part of a load program in which load and temperature change evenly.
type stage struct {
	name  string
	hours float64 // 0 for an elastic change
	steps int
	load  float64 // at its end: stress [MPa], or share of a strain
	above float64 // temperature at its end, above the reference [K]
}

// tensionProgram loads by tractions.
func tensionProgram(steps int) []stage {
	return []stage{
		{"load", 0, 1, 100, 0},
		{"hold", 1000, 4, 100, 0},
		{"unload to 60 MPa", 0, 1, 60, 0},
		{"heat", 200, steps, 60, hotter},
		{"hold", 1000, 4, 60, hotter},
		{"unload", 0, 1, 0, hotter},
	}
}

// walk takes a body through a program. impose says what a load and a temperature demand; start gives the displacements that
// the iteration of a step starts from. seen is called at the end of every step.
type walk struct {
	body   *body
	impose func(load, temperature float64) demand
	start  func(now *condition, load float64) []float64
	seen   func(s stage, last bool, now *condition, load float64, residuals []float64)
}

func (w *walk) through(program []stage) error {
	now := w.body.virgin(reference)
	load, above := 0.0, 0.0
	for _, s := range program {
		begun, loadBefore, aboveBefore := now.time, load, above
		for i := 1; i <= s.steps; i++ {
			part := float64(i) / float64(s.steps)
			load, above = loadBefore+part*(s.load-loadBefore), aboveBefore+part*(s.above-aboveBefore)
			d := w.impose(load, reference+above)
			d.duration = s.hours / float64(s.steps)
			next, residuals, err := w.body.solve(now, w.start(now, load), d)
			if err != nil {
				return fmt.Errorf("stage %q, step %d: %w; residuals %.1e", s.name, i, err, residuals)
			}
			next.time = begun + part*s.hours
			now = next
			w.seen(s, i == s.steps, now, load, residuals)
		}
	}
	return nil
}

// axis is the direction of the tension: oblique, so that all six components take part.
var axis = vector{1.0 / 3, 2.0 / 3, 2.0 / 3}

// along is the tensor n⊗n of the axis.
func along() tensor.Sym {
	return tensor.SymFromMatrix([3][3]float64{axis.times(axis[0]), axis.times(axis[1]), axis.times(axis[2])})
}

func (v vector) times(x float64) vector { return vector{v[0] * x, v[1] * x, v[2] * x} }

// tensionRow is the body at the end of a stage.
type tensionRow struct {
	stage
	time       float64
	creep      float64 // along the axis, mean of the points
	closed     float64 // A σⁿ ∫f(T) dt
	spread     float64 // largest deviation of any stress component of any point from the stress applied, over stressAt
	side       float64 // the same for creep: from c[n⊗n - (1 - n⊗n)/2], over c
	iterations int     // most in a step
}

// tensionCourse is what a body did in the tension program.
type tensionCourse struct {
	rows          []tensionRow
	hours, strain []float64 // creep strain along the axis at the end of every step
	worst         []float64 // longest sequence of residuals
}

// tension runs the program on a body under the tractions of a uniform oblique tension.
func tension(b *body, exponent float64, program []stage) (course tensionCourse, err error) {
	direction := along()
	row := tensionRow{}
	closed, above := 0.0, 0.0
	w := walk{body: b,
		impose: func(load, temperature float64) demand {
			return demand{temperature: temperature, force: b.tractions(direction.Scale(load)), held: b.supports()}
		},
		start: func(now *condition, _ float64) []float64 { return now.displacement },
	}
	w.seen = func(s stage, last bool, now *condition, load float64, residuals []float64) {
		if len(residuals) > len(course.worst) {
			course.worst = residuals
		}
		row.iterations = max(row.iterations, len(residuals)-1)
		row.spread = math.Max(row.spread, b.spread(now, direction.Scale(load))/stressAt)
		creep, side := axialCreep(now, direction)
		row.side = math.Max(row.side, side)
		course.hours, course.strain = append(course.hours, now.time), append(course.strain, creep)
		if last {
			closed += tensionCreep(s, above, s.hours, exponent)
			row.stage, row.time, row.creep, row.closed = s, now.time, creep, closed
			course.rows = append(course.rows, row)
			row, above = tensionRow{}, s.above
		}
	}
	return course, w.through(program)
}

// tensionCreep is the closed form of the creep strain that the first hours of a stage of constant load add: A σⁿ ∫f(T) dt,
// with the temperature above the reference rising evenly from a value to that of the stage.
func tensionCreep(s stage, above, hours, exponent float64) float64 {
	if s.hours == 0 || s.load == 0 || hours == 0 {
		return 0
	}
	norton := bench.NortonCreep{Stress: s.load, Law: closedNorton(exponent, 0)}
	end := above + (s.above-above)*hours/s.hours
	return norton.CreepAt(hours) * meanActivated(reference+above, reference+end)
}

// spread is the largest deviation of a stress component at any integration point from a wanted stress.
func (b *body) spread(c *condition, want tensor.Sym) (largest float64) {
	var host [6]float64
	b.layout.StressOut(host[:], want)
	for i := range c.stress {
		for k, s := range c.stress[i] {
			largest = math.Max(largest, math.Abs(s-host[k]))
		}
	}
	return largest
}

// axialCreep is the mean creep strain along a direction n⊗n and how far the points are from being all in that tension.
func axialCreep(c *condition, direction tensor.Sym) (mean, spread float64) {
	for i := range c.states {
		mean += c.states[i].Creep.Dot(direction) / float64(len(c.states))
	}
	want := direction.Scale(1.5 * mean).Sub(tensor.Identity().Scale(mean / 2))
	for i := range c.states {
		for k, e := range c.states[i].Creep {
			spread = math.Max(spread, math.Abs(e-want[k]))
		}
	}
	if mean > 0 {
		spread /= mean
	}
	return mean, spread
}
