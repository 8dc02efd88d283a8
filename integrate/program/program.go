package program

import (
	"fmt"
	"math"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// Program is a load history: blocks of segments from a start.
type Program struct {
	State       integrate.State // the state at the start; zero is virgin material
	Strain      tensor.Sym      // the total strain at the start [-], tensor shear components; zero is usual
	Temperature float64         // the absolute temperature at the start [K], > 0
	Blocks      []Block
}

// Block is a sequence of segments, run once or several times. Repeats cost no memory.
type Block struct {
	Repeat   int // how often; 0 and 1 are once
	Segments []Segment
}

// Segment is a stretch of time under one kind of control.
type Segment struct {
	Name        string            // for messages and records; may be empty
	Duration    float64           // [time], >= 0; in no time the material answers elastically
	Control     integrate.Control // what is prescribed of each component; zero: all strains
	Prescribed  [6]Signal         // per component xx yy zz yz xz xy: strain (tensor shear), stress, or right side of a relation
	Temperature Signal            // absolute temperature [K], > 0 throughout
}

// check reports the first segment that cannot be run.
func (p *Program) check() error {
	start := Place{Name: "start"}
	if !(p.Temperature > 0) || !finite(p.Temperature) {
		return &SetupError{Place: start, Quantity: "temperature", Value: p.Temperature, Want: "positive and finite"}
	}
	if !p.Strain.IsFinite() {
		return &SetupError{Place: start, Quantity: "strain", Value: math.NaN(), Want: "finite"}
	}
	for b := range p.Blocks {
		if r := p.Blocks[b].Repeat; r < 0 {
			return &SetupError{Place: Place{Block: b}, Quantity: "number of repeats", Value: float64(r), Want: "at least 0"}
		}
		for s := range p.Blocks[b].Segments {
			segment := &p.Blocks[b].Segments[s]
			if err := segment.check(Place{Block: b, Segment: s, Name: segment.Name}); err != nil {
				return err
			}
		}
	}
	return nil
}

var componentNames = [6]string{"xx", "yy", "zz", "yz", "xz", "xy"}

func (s *Segment) check(at Place) error {
	if !(s.Duration >= 0) || !finite(s.Duration) {
		return &SetupError{Place: at, Quantity: "duration", Value: s.Duration, Want: "at least 0 and finite"}
	}
	for i := range s.Prescribed {
		if err := s.Prescribed[i].check(); err != nil {
			return &SetupError{Place: at, Quantity: "prescribed " + componentNames[i], Err: err}
		}
	}
	if err := s.Temperature.check(); err != nil {
		return &SetupError{Place: at, Quantity: "temperature", Err: err}
	}
	if s.Temperature.kind != reached {
		for _, v := range append([]float64{s.Temperature.at(0, s.Duration, 1, true), s.Temperature.at(s.Duration, s.Duration, 1, true)},
			s.Temperature.value...) {
			if !(v > 0) {
				return &SetupError{Place: at, Quantity: "temperature", Value: v, Want: "positive"}
			}
		}
	}
	return nil
}

// duration is that of the whole program.
func (p *Program) duration() (sum float64) {
	for _, b := range p.Blocks {
		once := 0.0
		for _, s := range b.Segments {
			once += s.Duration
		}
		sum += once * math.Max(1, float64(b.Repeat))
	}
	return sum
}

// places calls f for every segment in the order of time, until it returns false.
func (p *Program) places(f func(Place, *Segment) bool) {
	for b := range p.Blocks {
		for cycle := range max(1, p.Blocks[b].Repeat) {
			for s := range p.Blocks[b].Segments {
				segment := &p.Blocks[b].Segments[s]
				if !f(Place{Block: b, Cycle: cycle, Segment: s, Name: segment.Name}, segment) {
					return
				}
			}
		}
	}
}

// Options say how closely a program is followed and what is put out. The zero Options lack a tolerance and are refused.
type Options struct {
	// Tolerance is that of integrate.Material.Follow for every step, but the error of the stress is judged as the control lets
	// it show: a prescribed stress has none.
	Tolerance integrate.Tolerance

	// Times are program times at which a record is wanted, ascending; steps are made to end there.
	Times []float64

	// TimesOnly leaves out the records of steps that nobody asked for: what remains are the start, the Times, the events and
	// the end.
	TimesOnly bool

	// Events are watched for; see Event.
	Events []Event

	// Observe, if not nil, is called after every accepted step, whatever is put out: for progress of long runs. It must not
	// keep the run from ending; cancel the context for that.
	Observe func(Record)

	// FirstStep is the length of the first step to try in every segment [time]; 0 lets the walk choose.
	FirstStep float64
}

func (o *Options) check(p *Program) error {
	fault := func(quantity string, value float64, want string) error {
		return &SetupError{Place: Place{Name: "options"}, Quantity: quantity, Value: value, Want: want}
	}
	t := o.Tolerance
	switch {
	case !(t.Relative > 0 && t.Relative <= 0.1):
		return fault("relative tolerance", t.Relative, "above 0 and at most 0.1")
	case !(t.Stress >= 0) || !finite(t.Stress):
		return fault("stress floor of the tolerance", t.Stress, "at least 0 and finite")
	case !(t.Creep >= 0) || !finite(t.Creep):
		return fault("creep floor of the tolerance", t.Creep, "at least 0 and finite")
	case !(o.FirstStep >= 0) || !finite(o.FirstStep):
		return fault("first step", o.FirstStep, "at least 0 and finite")
	}
	total := p.duration()
	for i, v := range o.Times {
		if !(v >= 0 && v <= total*(1+1e-12)) {
			return fault(fmt.Sprintf("requested time %d", i), v, "within the program")
		}
		if i > 0 && !(v > o.Times[i-1]) {
			return fault(fmt.Sprintf("requested time %d", i), v, "above the one before it")
		}
	}
	for i := range o.Events {
		e := &o.Events[i]
		if e.Of == nil {
			return fault("quantity of event "+e.Name, math.NaN(), "given")
		}
		if !finite(e.Limit) {
			return fault("limit of event "+e.Name, e.Limit, "finite")
		}
	}
	return nil
}
