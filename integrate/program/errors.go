package program

import "fmt"

// SignalError says which point of a signal is at fault.
type SignalError struct {
	Row      int     // counted from 0
	Quantity string  // such as "time"
	Value    float64 // what it was
	Want     string  // what it must be
}

func (e *SignalError) Error() string {
	return fmt.Sprintf("program: signal point %d: %s is %v, must be %s", e.Row, e.Quantity, e.Value, e.Want)
}

// Place is where in a program something happened.
type Place struct {
	Block, Cycle, Segment int    // counted from 0
	Name                  string // of the segment, if it has one
}

func (p Place) String() string {
	name := ""
	if p.Name != "" {
		name = fmt.Sprintf(" (%s)", p.Name)
	}
	return fmt.Sprintf("block %d, cycle %d, segment %d%s", p.Block, p.Cycle, p.Segment, name)
}

// SetupError says that a program or its options cannot be run. Err, if not nil, is the reason found deeper down.
type SetupError struct {
	Place    Place
	Quantity string
	Value    float64
	Want     string
	Err      error
}

func (e *SetupError) Error() string {
	if e.Err != nil {
		return fmt.Sprintf("program: %v: %s: %v", e.Place, e.Quantity, e.Err)
	}
	return fmt.Sprintf("program: %v: %s is %v, must be %s", e.Place, e.Quantity, e.Value, e.Want)
}

// Unwrap returns the deeper reason.
func (e *SetupError) Unwrap() error { return e.Err }

// StopError says where and when a run ended before its program did, and why: an integrate.Code (errors.Is finds it), among
// them integrate.BeyondRupture, or the error of the context. The records up to the last accepted step are complete.
type StopError struct {
	Place Place
	Time  float64 // the last accepted time; for a rupture it is its time, to the tolerance
	Err   error
}

func (e *StopError) Error() string {
	return fmt.Sprintf("program: %v, at time %v: %v", e.Place, e.Time, e.Err)
}

// Unwrap returns the reason.
func (e *StopError) Unwrap() error { return e.Err }
