package main

import (
	"errors"
	"fmt"
	"math"
)

// course is the life of the joint as computed.
type course struct {
	samples     []sample // every accepted step, and each side of a retightening
	retightened []retightening
	under       []spell // times with less than the required load
	hot         condition
	accepted    int // steps
	repeated    int // steps done again shorter
	effort      effort
	single      singleStep
}

// sample is a moment for tables and pictures.
type sample struct {
	condition
	event string
	stop  bool // belongs to the table
}

// retightening is one that was done, or that was asked for and not needed.
type retightening struct {
	row           int
	time          float64
	before, after float64 // load of one bolt [N]
	travel        float64 // of the nut [mm]
	needless      bool    // the load was above the target: a nut is not loosened
}

// spell is a span of time [h].
type spell struct{ from, to float64 }

// singleStep is the longest stretch between two rows of the history done in one Newton solve: nothing uses its result, it
// shows how the iteration behaves at a step far beyond any accuracy.
type singleStep struct {
	from, to  float64   // [h]
	residuals []float64 // the largest before each iteration and after the last
}

// hoursUnder sums the spells under the required load.
func (c *course) hoursUnder() float64 {
	sum := 0.0
	for _, s := range c.under {
		sum += s.to - s.from
	}
	return sum
}

// settings of a run.
type settings struct {
	tolerance float64 // error estimate allowed in a step, as a share of the preload
	every     float64 // hours between lines of the table; 0 for none but the rows of the history
	only      int     // retightenings that are done; later ones are left out. Negative for all
}

// jointOpen says that no clamp load is left: the model ends there.
type jointOpen struct{ time float64 }

func (e *jointOpen) Error() string {
	return fmt.Sprintf("the joint opens: no clamp load is left at %.6g h", e.time)
}

// runner carries one joint through one history.
type runner struct {
	*balance
	history *history
	settings
	now    condition
	before condition // one step back, to extrapolate the next guess from; time NaN when there is none
	next   float64   // length of the next step [h]
	course course
}

// run computes the course of a joint. On a jointOpen the course up to that moment comes with the error.
func run(j *joint, h *history, s settings) (*course, error) {
	first := h.rows[0]
	r := &runner{balance: newBalance(j, first.bolt), history: h, settings: s}
	bare := condition{time: first.time, bolt: first.bolt, flange: first.flange, points: make([]point, len(j.sections))}
	var err error
	r.now, err = r.solve(&bare, &bare, demand{bolt: first.bolt, flange: first.flange, tighten: true, load: r.force})
	if err != nil {
		return nil, err
	}
	r.forget()
	r.course.hot = r.now
	r.record(fmt.Sprintf("tightened, nut turned %s", r.turn(r.now.nut-r.unloadedNut())), true)
	err = r.through()
	r.watch(false) // ends a spell that lasts
	r.course.effort = r.effort
	return &r.course, err
}

// unloadedNut is the nut's position when it just touches: the free strains of bolt and flange differ.
func (r *runner) unloadedNut() float64 {
	bolt, _ := freeStrain(&r.growth, r.now.bolt)
	flange, _ := freeStrain(&r.flange.growth, r.now.flange)
	return r.length() * (bolt - flange)
}

// turn is a travel of the nut as an angle.
func (j *joint) turn(travel float64) string { return fmt.Sprintf("%.0f°", travel/j.pitch*360) }

func (r *runner) record(event string, stop bool) {
	r.course.samples = append(r.course.samples, sample{r.now.copyOf(), event, stop})
}

// forget drops the previous step: after a kink in the history it says nothing about the next.
func (r *runner) forget() { r.before.time = math.NaN() }

// through walks the rows of the history.
func (r *runner) through() error {
	done := 0
	for i := range r.history.rows[1:] {
		if err := r.segment(i); err != nil {
			return err
		}
		w := &r.history.rows[i+1]
		event := w.remark
		if w.retighten.wanted() && (r.only < 0 || done < r.only) {
			done++
			r.record(event, true)
			var err error
			if event, err = r.tighten(i+1, r.perBolt(w.retighten.load(r.preload))); err != nil {
				return err
			}
		}
		r.record(event, true)
		if w.bolt >= r.course.hot.bolt { // sensitivity is told where the bolts are hottest, as late as possible
			r.course.hot = r.now
		}
		r.forget()
	}
	return nil
}

// tighten restores a load at once and returns what was done, in words.
func (r *runner) tighten(row int, load float64) (string, error) {
	done := retightening{row: row, time: r.now.time, before: r.now.load, after: r.now.load}
	if done.needless = !(load > r.now.load); done.needless {
		r.course.retightened = append(r.course.retightened, done)
		return "retightening not needed", nil
	}
	nut := r.now.nut
	c, err := r.solve(&r.now, &r.now, demand{bolt: r.now.bolt, flange: r.now.flange, tighten: true, load: load})
	if err != nil {
		return "", fmt.Errorf("retightening at %.6g h: %w", r.now.time, err)
	}
	r.now = c
	done.after, done.travel = c.load, c.nut-nut
	r.course.retightened = append(r.course.retightened, done)
	r.watch(c.load < r.perBolt(r.required))
	return fmt.Sprintf("retightened, nut turned %s", r.turn(done.travel)), nil
}

// segment walks from row i to row i+1 in steps of controlled error, stopping at the hours of the table.
func (r *runner) segment(i int) error {
	end := r.history.rows[i+1].time
	r.trySingleStep(i, end)
	if i == 0 || r.next > end-r.now.time || !(r.next > 0) {
		r.next = (end - r.now.time) / 16
	}
	for r.now.time < end {
		stop, planned := r.nextStop(end), r.next
		left := stop - r.now.time
		length := math.Min(planned, left)
		if planned > left*(1-1e-9) {
			length = left
		}
		done, err := r.step(i, length)
		if err != nil {
			return err
		}
		landed := done == left
		if landed { // a step cut short to land says little about the one after it
			r.now.time, r.next = stop, math.Max(r.next, planned)
		}
		if r.now.time < end {
			r.record("", landed)
		}
	}
	return nil
}

func (r *runner) trySingleStep(i int, end float64) {
	if longest := &r.course.single; end-r.now.time > longest.to-longest.from {
		kept := r.effort
		r.effort = effort{}
		if _, err := r.euler(i, &r.now, &r.before, end-r.now.time); err == nil {
			*longest = singleStep{r.now.time, end, r.effort.worst}
		}
		r.effort = kept
	}
}

// nextStop is the next hour of the table, or the end of the segment when that comes first.
func (r *runner) nextStop(end float64) float64 {
	if !(r.every > 0) {
		return end
	}
	start := r.history.start()
	n := math.Floor((r.now.time-start)/r.every*(1+1e-12)) + 1
	if stop := start + n*r.every; stop > r.now.time && stop < end {
		return stop
	}
	return end
}

// mostRepeats of a step before the run gives up: enough to find the beginning of primary creep, whose rate starts infinite,
// anywhere above the smallest float64.
const mostRepeats = 1000

// step makes one step of at most the given length, returns the length made and chooses the next.
func (r *runner) step(i int, length float64) (done float64, err error) {
	for repeats := 0; ; repeats++ {
		c, estimate, err := r.doubled(i, length)
		var failed *stepFailed
		switch {
		case err == nil && estimate <= r.tolerance:
			r.course.accepted++
			return length, r.accept(i, c, length*stepRatio(estimate/r.tolerance))
		case err == nil:
			length *= math.Min(stepRatio(estimate/r.tolerance), 0.8)
		case errors.As(err, &failed):
			length /= 4
		default:
			return 0, fmt.Errorf("at %.6g h: %w", r.now.time, err)
		}
		r.course.repeated++
		if repeats == mostRepeats || !(r.now.time+length/2 > r.now.time) {
			if err == nil {
				err = fmt.Errorf("the tolerance %g cannot be met", r.tolerance)
			}
			return 0, fmt.Errorf("no step from %.6g h is short enough: %w", r.now.time, err)
		}
	}
}

// stepRatio is by how much the next step may be longer: the error of a backward Euler step grows with its square.
func stepRatio(relative float64) float64 {
	return math.Min(math.Max(0.9/math.Sqrt(relative), 0.2), 3)
}
