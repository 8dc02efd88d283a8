package batch

import (
	"fmt"

	"example.com/holdtime/integrate"
)

// SetupError says that a batch was asked for with materials or options it cannot have.
type SetupError struct {
	Quantity string // such as "number of workers"
	Value    int    // the value that was given
	Want     string // what it must be
}

func (e *SetupError) Error() string {
	return fmt.Sprintf("batch: %s is %d, must be %s", e.Quantity, e.Value, e.Want)
}

// IndexError says that a point names a material that does not exist. It is the first such point; nothing has been written.
type IndexError struct {
	Point     int // index of the point
	Index     int // the index of a material it gives
	Materials int // how many there are
}

func (e *IndexError) Error() string {
	return fmt.Sprintf("batch: point %d has the material index %d, must be at least 0 and below %d", e.Point, e.Index, e.Materials)
}

// Failure is a point that was refused.
type Failure struct {
	Point int            // index of the point
	Code  integrate.Code // why; Batch.Explain says more
}

// RefusedError says that some points of a call were refused. Their outputs are as they were; those of all others are complete.
//
// errors.Is finds every Code that refused a point. integrate.Recoverable is true when a smaller step can help each of them.
type RefusedError struct {
	Points int       // points stepped or refused in the call
	Total  int       // points refused
	First  []Failure // the first of them in the order of the points, at most Options.Listed
	counts *counts
}

// counts are the points refused for each code.
type counts [256]int

// Of returns how many points were refused for this reason.
func (e *RefusedError) Of(code integrate.Code) int { return e.counts[code] }

func (e *RefusedError) Error() string {
	return fmt.Sprintf("batch: %d of %d points refused, first point %d: %v", e.Total, e.Points, e.First[0].Point, e.First[0].Code)
}

// Is reports whether a point was refused for the reason target.
func (e *RefusedError) Is(target error) bool {
	code, ok := target.(integrate.Code)
	return ok && e.counts[code] > 0
}

// Unwrap returns a Code of a refused point: one that a smaller step cannot help, if there is any, and otherwise that of the
// first point.
func (e *RefusedError) Unwrap() error {
	for code, n := range e.counts {
		if c := integrate.Code(code); n > 0 && !integrate.Recoverable(c) {
			return c
		}
	}
	return e.First[0].Code
}

// InterruptedError says that the context ended before all points were stepped.
//
// The points before Done are complete, but for those in Refused; the outputs of the others are untouched. Step of the arrays
// from Done on finishes the work.
type InterruptedError struct {
	Done    int           // points stepped or refused: those with the indices 0 to Done-1
	Points  int           // points of the call
	Cause   error         // of the context: context.Canceled or context.DeadlineExceeded
	Refused *RefusedError // points refused among those done; nil if there are none
}

func (e *InterruptedError) Error() string {
	return fmt.Sprintf("batch: interrupted after %d of %d points: %v", e.Done, e.Points, e.Cause)
}

// Unwrap returns the cause, and what was refused.
func (e *InterruptedError) Unwrap() []error {
	if e.Refused == nil {
		return []error{e.Cause}
	}
	return []error{e.Cause, e.Refused}
}

// tally is what one worker was refused: the list ascends, because chunks are taken in order, and the first of all points
// refused are among the first of each worker's.
type tally struct {
	total  int
	list   []Failure
	counts *counts
}

func (t *tally) add(point int, err error, listed int) {
	if t.counts == nil {
		t.counts = new(counts)
	}
	code, _ := err.(integrate.Code) // Step returns nothing else
	t.total++
	t.counts[code]++
	if len(t.list) < listed {
		t.list = append(t.list, Failure{point, code})
	}
}

// merge makes one report of the workers' tallies; nil for none. The lists are consumed.
func merge(tallies []tally, points, listed int) *RefusedError {
	e := &RefusedError{Points: points}
	for i := range tallies {
		t := &tallies[i]
		if t.total == 0 {
			continue
		}
		if e.counts == nil {
			e.counts = new(counts)
		}
		e.Total += t.total
		for c, n := range t.counts {
			e.counts[c] += n
		}
	}
	if e.Total == 0 {
		return nil
	}
	e.First = make([]Failure, 0, min(listed, e.Total))
	for len(e.First) < cap(e.First) {
		var first *tally
		for i := range tallies {
			t := &tallies[i]
			if len(t.list) > 0 && (first == nil || t.list[0].Point < first.list[0].Point) {
				first = t
			}
		}
		e.First = append(e.First, first.list[0])
		first.list = first.list[1:]
	}
	return e
}
