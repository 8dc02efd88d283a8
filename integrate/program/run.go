package program

import (
	"context"
	"errors"
	"iter"
	"math"

	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/internal/dirk"
)

// Run is a program on its way. It is used by one goroutine; many runs may share a Material.
type Run struct {
	context context.Context
	program Program
	options Options
	walker  walker
	err     error
	stopped string
	begun   bool

	offset float64 // program time at the start of the segment
	place  Place
	asked  int // requested times met
	last   Record
	yield  func(Record) bool
	ended  bool // the consumer has had enough, or a stopping event happened
	worst  float64
	passed []bool // per event: whether its quantity is above the limit
}

// Start prepares a run of a material through a program. Nothing is computed before the records are read. A program or options
// that cannot be run show as a *SetupError in Err, and no records; a nil context or material is a caller's bug and panics.
func Start(ctx context.Context, m *integrate.Material, p Program, o Options) *Run {
	if ctx == nil || m == nil {
		panic("program: Start needs a context and a material")
	}
	r := &Run{context: ctx, program: p, options: o, walker: newWalker(m, o.Tolerance)}
	if r.err = p.check(); r.err == nil {
		r.err = o.check(&p)
	}
	return r
}

// Records runs the program and yields its records. It can be ranged over once; a loop that is left ends the run. Afterwards
// Err says whether the program was carried through.
func (r *Run) Records() iter.Seq[Record] {
	return func(yield func(Record) bool) {
		if r.err != nil || r.begun {
			return
		}
		r.begun, r.yield = true, yield
		if err := r.run(); err != nil {
			r.err = &StopError{Place: r.place, Time: r.offset + r.walker.now.time, Err: err}
		}
	}
}

// Err returns nil when the program was carried through, or was ended by the reader or by an event that stops; a *SetupError;
// or a *StopError.
func (r *Run) Err() error { return r.err }

// Stopped returns the name of the event that ended the run, empty for none.
func (r *Run) Stopped() string { return r.stopped }

// Last returns the record of the last accepted moment.
func (r *Run) Last() Record { return r.last }

// LargestError returns the largest estimated error of an accepted step, over what the tolerance allows.
func (r *Run) LargestError() float64 { return r.worst }

func (r *Run) run() (err error) {
	w := &r.walker
	w.now = point{state: r.program.State, strain: r.program.Strain, warmth: r.program.Temperature}
	r.place = Place{Name: "start"}
	w.segment = &Segment{Temperature: Reached(), Prescribed: [6]Signal{}}
	for i := range w.segment.Prescribed {
		w.segment.Prescribed[i] = Reached()
	}
	w.enter(w.segment)
	if _, err := w.jump(); err != nil { // the stress of the start
		return err
	}
	r.passed = make([]bool, len(r.options.Events))
	for i := range r.passed {
		r.passed[i] = r.excess(i, r.record(AtStart, "", 0, 0)) > 0
	}
	if !r.emit(AtStart, "", 0, 0) {
		return nil
	}
	r.program.places(func(at Place, s *Segment) bool {
		r.place = at
		w.enter(s)
		if err = r.segment(); err != nil || r.ended {
			return false
		}
		r.offset += s.Duration
		w.now.time = 0
		return true
	})
	if err == nil {
		w.now.time = 0
	}
	return err
}

// segment walks one segment, from breakpoint to breakpoint of its signals.
func (r *Run) segment() error {
	w := &r.walker
	for first := true; ; first = false {
		moved, err := w.jump()
		if err != nil {
			return err
		}
		if moved && (!r.emit(AtJump, "", 0, 0) || r.jumped()) {
			return nil
		}
		if w.now.time >= w.segment.Duration {
			return nil
		}
		w.refresh()
		if first || moved {
			w.length(r.options.FirstStep)
		}
		if err := r.walk(w.breakpoint()); err != nil || r.ended {
			return err
		}
	}
}

// walk goes on to the time limit of the segment.
func (r *Run) walk(limit float64) error {
	w := &r.walker
	for w.now.time < limit {
		if err := r.context.Err(); err != nil {
			return err
		}
		until, asked := limit, false
		if r.asked < len(r.options.Times) {
			if t := r.options.Times[r.asked] - r.offset; t <= limit {
				until, asked = math.Max(t, w.now.time), true
			}
		}
		start := w.now
		if until > w.now.time {
			if err := r.advance(until); err != nil {
				return err
			}
			if r.ended {
				return nil
			}
		}
		reason := AtStep
		if w.now.time >= w.segment.Duration {
			reason = AtSegment
		}
		if asked && w.now.time >= until {
			r.asked++
			reason = AtTime
		}
		if r.last.Reason == AtEvent && r.last.Time == r.offset+w.now.time && reason == AtStep {
			continue // its record has been made
		}
		if !r.emit(reason, "", w.now.time-start.time, r.last.Error) {
			return nil
		}
	}
	return nil
}

// A step is given up when it is shorter than this part of the time of the run, or was cut this often in a row.
const (
	least    = 1e-10
	mostCuts = 40
)

// advance takes one accepted step, not past the time until, and ends it at the first event on its way.
func (r *Run) advance(until float64) error {
	w := &r.walker
	if !finite(w.rates[0].equivalent) && !w.plastic {
		return w.singular(until)
	}
	var failure error = integrate.BeyondRupture // rates that grow without bound leave no step long enough
	for range mostCuts {
		h := until - w.now.time
		if w.next < 0.999*h { // no crumb for the end
			h = w.next
		}
		if !(h > least*(r.offset+w.now.time)) {
			break
		}
		end, worst, err := w.attempt(h)
		switch {
		case err != nil && !integrate.Recoverable(err) && !errors.Is(err, integrate.BadState):
			return w.explain(err, w.increment(w.now.time+h, h, false))
		case err != nil || math.IsNaN(worst):
			w.next = h / 4
		default:
			w.next = h * w.factor(worst)
		}
		if err == nil && worst <= 1 {
			r.accept(end, h, until, worst)
			return nil
		}
		w.count.Rejected++
		if err != nil {
			failure = err
		}
	}
	return r.giveUp(failure)
}

// giveUp names the reason why no step is short enough. A stage that starts beyond the limit of an internal variable has passed
// the rupture as much as one that finds no solution.
func (r *Run) giveUp(failure error) error {
	if errors.Is(failure, integrate.BadState) && len(r.walker.variables) > 0 {
		return integrate.BeyondRupture
	}
	return failure
}

// accept ends the step, at the first event within it if there is one.
func (r *Run) accept(end point, h, until, worst float64) {
	w := &r.walker
	w.count.Steps++
	r.worst = math.Max(r.worst, worst)
	r.last.Error, w.last = worst, worst
	if math.Abs(until-end.time) <= 4*0x1p-52*until {
		end.time = until
	}
	if event, at := r.firstEvent(end, h); event >= 0 {
		start := w.now.time
		r.take(at)
		r.happen(event, at.time-start, worst)
		return
	}
	r.take(end)
}

// excess is how far the quantity of an event is above its limit.
func (r *Run) excess(event int, record Record) float64 {
	e := &r.options.Events[event]
	return e.Of(record) - e.Limit
}

// happen makes the record of an event at this moment, and ends the run if it is one that stops.
func (r *Run) happen(event int, step, worst float64) {
	e := &r.options.Events[event]
	r.passed[event] = !r.passed[event]
	if !e.wants(r.passed[event]) {
		return
	}
	r.emit(AtEvent, e.Name, step, worst)
	if e.Stop {
		r.ended, r.stopped = true, e.Name
	}
}

// jumped makes the records of the events that a jump passed, and reports whether one of them ended the run.
func (r *Run) jumped() bool {
	for i := range r.options.Events {
		if d := r.excess(i, r.record(AtJump, "", 0, 0)); d != 0 && (d > 0) != r.passed[i] {
			r.happen(i, 0, 0)
		}
		if r.ended {
			return true
		}
	}
	return false
}

func (r *Run) take(end point) {
	w := &r.walker
	w.now, w.rates[0], w.fresh = end, w.rates[dirk.Stages-1], true
	w.meet(&w.now)
	if r.options.Observe != nil {
		r.options.Observe(r.record(AtStep, "", 0, r.last.Error))
	}
}

// record is now.
func (r *Run) record(reason Reason, event string, step, worst float64) Record {
	return r.recordOf(&r.walker.now, reason, event, step, worst)
}

func (r *Run) recordOf(p *point, reason Reason, event string, step, worst float64) Record {
	return Record{Time: r.offset + p.time, Place: r.place, Reason: reason, Event: event, Temperature: p.warmth, Stress: p.stress,
		Strain: p.strain, State: p.state, Dissipated: p.dissipated, Step: step, Error: worst, Count: r.walker.count}
}

// emit hands a record to the reader, unless nobody asked for its kind. It reports whether to go on.
func (r *Run) emit(reason Reason, event string, step, worst float64) bool {
	r.last = r.record(reason, event, step, worst)
	last := reason == AtSegment && r.offset+r.walker.now.time >= r.program.duration()*(1-1e-14)
	if r.options.TimesOnly && !(reason == AtStart || reason == AtTime || reason == AtEvent || last) {
		return true
	}
	if !r.yield(r.last) {
		r.ended = true
	}
	return !r.ended
}

// firstEvent looks for the first event between now and the end of the step just tried, and for the point where it happens. It
// returns -1 for none.
func (r *Run) firstEvent(end point, h float64) (first int, at point) {
	w := &r.walker
	first, at = -1, end
	if len(r.options.Events) == 0 {
		return first, at
	}
	before, after := r.record(AtStep, "", 0, 0), r.recordOf(&end, AtStep, "", h, 0)
	shortest, kept := h, w.rates
	for i := range r.options.Events {
		b := r.excess(i, after)
		if b == 0 || math.IsNaN(b) || (b > 0) == r.passed[i] {
			continue
		}
		if !r.options.Events[i].wants(b > 0) {
			r.passed[i] = b > 0
			continue
		}
		p, length, ok := r.locate(i, r.excess(i, before), b, h)
		if ok && (first < 0 || length < shortest) {
			first, at, shortest, kept = i, p, length, w.rates
		}
	}
	w.rates = kept
	return first, at
}

// locate finds the length of the step that ends where an event's quantity passes its limit, by the Illinois variant of the
// secant rule on steps from now. a and b are the distances from the limit at lengths 0 and h.
func (r *Run) locate(event int, a, b, h float64) (at point, length float64, ok bool) {
	w := &r.walker
	low, high := 0.0, h
	for range 80 {
		length = high - b*(high-low)/(b-a)
		if !(length > low && length < high) {
			length = low + (high-low)/2
		}
		p, _, err := w.attempt(length)
		if err != nil {
			return p, 0, false
		}
		at = p
		c := r.excess(event, r.recordOf(&p, AtStep, "", length, 0))
		if c == 0 || !(length > low && length < high) || high-low <= 1e-14*(r.offset+w.now.time+h) {
			break
		}
		if (c > 0) == (b > 0) {
			high, b = length, c
			a /= 2
		} else {
			low, a = length, c
			b /= 2
		}
	}
	return at, length, true
}
