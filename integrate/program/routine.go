package program

import (
	"fmt"
	"iter"
	"math"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// Routine is a material routine of a host code: from a start state of its own kind it carries stress and state through an
// increment. It must not keep the start state; its unit set is that of the material it is compared with.
type Routine[S any] func(start S, from integrate.Conditions, inc integrate.Increment) (stress tensor.Sym, end S, err error)

// Comparison is how far a host's routine was from the library at one record.
type Comparison struct {
	Record Record
	Stress tensor.Sym // of the routine
	Error  float64    // von Mises stress of the difference plus its mean, over the largest von Mises stress so far
}

// Compare runs a material through a program, and a host's own routine along the same path of strain and temperature: between
// two records the routine is given the strain and temperature that the library found at them, in the given number of equal
// steps, at least 1. It yields a comparison per record of the run, so a test harness sees where two codes part.
//
// Whatever the control of the program, the routine is driven by strain: that is what a host's routine takes. Records at steps
// make the path fine; with Options.TimesOnly it is as coarse as the requested times, and the routine sees straight lines
// between them. The routine's own order of accuracy shows when steps is raised.
//
// A failure of the run or of the routine ends the sequence with a last comparison that carries it.
func Compare[S any](run *Run, start S, routine Routine[S], steps int) iter.Seq2[Comparison, error] {
	return func(yield func(Comparison, error) bool) {
		if steps < 1 {
			yield(Comparison{}, &SetupError{Place: Place{Name: "comparison"}, Quantity: "number of steps", Value: float64(steps),
				Want: "at least 1"})
			return
		}
		state, largest := start, 0.0
		var before Record
		begun, left := false, false
		for r := range run.Records() {
			c := Comparison{Record: r}
			if begun {
				var err error
				if c.Stress, state, err = carry(state, &before, &r, routine, steps); err != nil {
					left = true
					yield(c, fmt.Errorf("program: the routine, at time %v: %w", r.Time, err))
					break
				}
			} else {
				c.Stress = r.Stress // the routine has not been asked yet
			}
			largest = math.Max(largest, r.Stress.Mises())
			if apart := c.Stress.Sub(r.Stress); largest > 0 {
				c.Error = (apart.Mises() + math.Abs(apart.Mean())) / largest
			}
			if !yield(c, nil) {
				left = true
				break
			}
			before, begun = r, true
		}
		if err := run.Err(); err != nil && !left {
			yield(Comparison{Record: run.Last()}, err)
		}
	}
}

// carry takes a routine from one record to the next.
func carry[S any](state S, from, to *Record, routine Routine[S], steps int) (stress tensor.Sym, end S, err error) {
	at := integrate.Conditions{Strain: from.Strain, Temperature: from.Temperature}
	for k := 1; k <= steps; k++ {
		part := float64(k) / float64(steps)
		inc := integrate.Increment{
			Dt:          (to.Time - from.Time) / float64(steps),
			Strain:      from.Strain.Add(to.Strain.Sub(from.Strain).Scale(part)),
			Temperature: from.Temperature + part*(to.Temperature-from.Temperature),
		}
		if k == steps {
			inc.Strain, inc.Temperature = to.Strain, to.Temperature
		}
		if stress, state, err = routine(state, at, inc); err != nil {
			return stress, state, err
		}
		at = integrate.Conditions{Strain: inc.Strain, Temperature: inc.Temperature}
	}
	return stress, state, nil
}
