package program

import (
	"encoding/csv"
	"fmt"
	"io"
	"iter"
	"strconv"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// Reason is why a record was made.
type Reason uint8

// The reasons, in the order in which they are preferred where several apply.
const (
	AtStart   Reason = iota // of the program, before anything is applied
	AtJump                  // after a signal jumped
	AtStep                  // after an accepted step
	AtSegment               // at the end of a segment
	AtTime                  // at a requested time
	AtEvent                 // where an event happened
)

var reasonNames = [...]string{"start", "jump", "step", "segment", "time", "event"}

func (r Reason) String() string {
	if int(r) < len(reasonNames) {
		return reasonNames[r]
	}
	return fmt.Sprintf("Reason(%d)", uint8(r))
}

// Record is the material point at a time of the program.
type Record struct {
	Time        float64 // from the start of the program [time]
	Place       Place
	Reason      Reason
	Event       string  // name of the event, for AtEvent
	Temperature float64 // [K]
	Stress      tensor.Sym
	Strain      tensor.Sym // total strain [-], tensor shear components
	State       integrate.State
	Dissipated  float64 // ∫ σ:(dεc + dεp) per volume since the start [stress]
	Step        float64 // length of the step that led here [time]
	Error       float64 // its estimated error over what the tolerance allows
	Count       Count   // the work so far
}

// Count is work done.
type Count struct {
	Steps, Rejected int // of the fourth-order method
	Solves          int // steps of the material
	Iterations      int // in the scalar problems of all solves
}

// header of the CSV file, without the internal variables.
var header = []string{"time", "reason", "block", "cycle", "segment", "name", "event", "temperature",
	"stress_xx", "stress_yy", "stress_zz", "stress_yz", "stress_xz", "stress_xy", "mises",
	"strain_xx", "strain_yy", "strain_zz", "strain_yz", "strain_xz", "strain_xy",
	"creep_xx", "creep_yy", "creep_zz", "creep_yz", "creep_xz", "creep_xy", "equivalent_creep",
	"equivalent_plastic", "dissipated", "step", "error", "steps", "rejected", "solves", "iterations"}

// WriteCSV writes records as comma-separated values with a header line, in the units of the material, strains with tensor shear,
// numbers in full precision. variables are those of the material (Material.Variables); each adds a column of its value.
func WriteCSV(w io.Writer, records iter.Seq[Record], variables []creeplaw.Variable) error {
	out := csv.NewWriter(w)
	names := append([]string(nil), header...)
	for _, v := range variables {
		names = append(names, v.Name)
	}
	if err := out.Write(names); err != nil {
		return err
	}
	for r := range records {
		if err := out.Write(r.cells(variables)); err != nil {
			return err
		}
	}
	out.Flush()
	return out.Error()
}

func (r *Record) cells(variables []creeplaw.Variable) []string {
	f := func(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }
	cells := []string{f(r.Time), r.Reason.String(), strconv.Itoa(r.Place.Block), strconv.Itoa(r.Place.Cycle),
		strconv.Itoa(r.Place.Segment), r.Place.Name, r.Event, f(r.Temperature)}
	for _, v := range r.Stress {
		cells = append(cells, f(v))
	}
	cells = append(cells, f(r.Stress.Mises()))
	for _, v := range r.Strain {
		cells = append(cells, f(v))
	}
	for _, v := range r.State.Creep {
		cells = append(cells, f(v))
	}
	cells = append(cells, f(r.State.Equivalent), f(r.State.EquivalentPlastic), f(r.Dissipated), f(r.Step), f(r.Error), strconv.Itoa(r.Count.Steps),
		strconv.Itoa(r.Count.Rejected), strconv.Itoa(r.Count.Solves), strconv.Itoa(r.Count.Iterations))
	for i, v := range variables {
		cells = append(cells, f(v.Initial+r.State.Internal[i]))
	}
	return cells
}
