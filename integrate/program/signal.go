package program

import (
	"math"
	"sort"
)

// Signal is a value over the time of a segment, which starts at 0. The zero Signal is the constant zero. A Signal is never
// changed after it is made and may be shared.
type Signal struct {
	kind        signalKind
	first, last float64 // of a constant and a ramp
	time, value []float64
}

type signalKind uint8

const (
	constant signalKind = iota // zero Signal: the constant zero
	ramp                       // linear from first to last over the segment
	reached                    // what the segment before ended with
	linear                     // piecewise linear between points
	held                       // steps: each value from its time on
)

// Constant is the same value all the time.
func Constant(value float64) Signal { return Signal{first: value, last: value} }

// Ramp goes linearly from one value to another over the whole segment.
func Ramp(from, to float64) Signal { return Signal{kind: ramp, first: from, last: to} }

// Reached holds the value with which the segment before ended: a strain held after loading by stress, whatever it came to. In
// the first segment it is the value of the program's start.
func Reached() Signal { return Signal{kind: reached} }

// Linear goes straight from point to point. Times are from the start of the segment, begin with 0 and ascend strictly; after
// the last the value stays. A fault is a *SignalError; the slices are copied.
func Linear(time, value []float64) (Signal, error) { return tabulated(linear, time, value) }

// Held takes each value at its time and holds it until the next, in steps. Times as for Linear.
func Held(time, value []float64) (Signal, error) { return tabulated(held, time, value) }

func tabulated(kind signalKind, time, value []float64) (Signal, error) {
	if len(time) != len(value) || len(time) == 0 {
		return Signal{}, &SignalError{Row: min(len(time), len(value)), Quantity: "number of values", Value: float64(len(value)),
			Want: "that of the times, and at least one"}
	}
	for i, t := range time {
		switch {
		case i == 0 && t != 0:
			return Signal{}, &SignalError{i, "first time", t, "0, the start of the segment"}
		case i > 0 && !(t > time[i-1]) || math.IsInf(t, 1):
			return Signal{}, &SignalError{i, "time", t, "finite and above the one before it"}
		case !finite(value[i]):
			return Signal{}, &SignalError{i, "value", value[i], "finite"}
		}
	}
	return Signal{kind: kind, time: append([]float64(nil), time...), value: append([]float64(nil), value...)}, nil
}

// at returns the value at a time of a segment of the given length. before is the value reached when it began. At a step of a
// held signal, after chooses the value that comes, otherwise the one that was.
func (s *Signal) at(time, length, before float64, after bool) float64 {
	switch s.kind {
	case constant:
		return s.first
	case reached:
		return before
	case ramp:
		part := 1.0
		if length > 0 && time < length {
			part = time / length
		}
		return s.first + part*(s.last-s.first)
	}
	n := len(s.time)
	i := sort.Search(n, func(i int) bool { return s.time[i] > time }) - 1 // the last point at or before time
	if s.kind == held {
		if i > 0 && !after && s.time[i] == time {
			i--
		}
		return s.value[i]
	}
	if i == n-1 {
		return s.value[i]
	}
	part := (time - s.time[i]) / (s.time[i+1] - s.time[i])
	return s.value[i] + part*(s.value[i+1]-s.value[i])
}

// next returns the first time after the given one at which the signal bends or jumps, +Inf for none.
func (s *Signal) next(time float64) float64 {
	i := sort.Search(len(s.time), func(i int) bool { return s.time[i] > time })
	if i == len(s.time) {
		return math.Inf(1)
	}
	return s.time[i]
}

// check reports a constant or a ramp that is not finite.
func (s *Signal) check() error {
	for _, v := range []float64{s.first, s.last} {
		if !finite(v) {
			return &SignalError{Quantity: "value", Value: v, Want: "finite"}
		}
	}
	return nil
}

func finite(x float64) bool { return x-x == 0 }
