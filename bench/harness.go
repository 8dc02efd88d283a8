package bench

import (
	"fmt"
	"math"
	"strings"
)

// Study is what a routine made of a problem with a known answer at halved steps. Row i belongs to Steps[i].
type Study struct {
	Steps  []int       // number of steps
	Values [][]float64 // what the routine returned
	Exact  []float64   // the answer
	Scale  float64     // the size that errors are relative to
}

// StudyError says why a study could not be made.
type StudyError struct {
	Steps  int    // number of steps asked for, 0 if the fault is in the arguments of Halve
	Reason string // what is wrong
	Err    error  // what the routine returned, nil if it did not fail
}

func (e *StudyError) Error() string {
	text := "bench: study"
	if e.Steps > 0 {
		text = fmt.Sprintf("bench: study with %d steps", e.Steps)
	}
	if e.Err != nil {
		return text + ": " + e.Reason + ": " + e.Err.Error()
	}
	return text + ": " + e.Reason
}

// Unwrap returns the error of the routine.
func (e *StudyError) Unwrap() error { return e.Err }

// Halve runs a routine of the caller's with first, 2·first, 4·first … steps, halvings+1 times, and holds what it returns
// against the exact values; scale, positive, is the size that errors are relative to, such as the stress at the start. The
// routine returns as many values as exact has. A bad argument, a routine that fails or returns another number of values is a
// *StudyError; a NaN it returns stays in the study and makes its error NaN.
func Halve(exact []float64, scale float64, first, halvings int, routine func(steps int) ([]float64, error)) (Study, error) {
	switch {
	case len(exact) == 0:
		return Study{}, &StudyError{Reason: "no exact value is given"}
	case !(scale > 0) || math.IsInf(scale, 1):
		return Study{}, &StudyError{Reason: fmt.Sprintf("the scale is %v, must be positive and finite", scale)}
	case first < 1 || halvings < 0 || halvings > 30 || first > math.MaxInt>>halvings:
		return Study{}, &StudyError{Reason: fmt.Sprintf("%d first steps and %d halvings", first, halvings)}
	}
	s := Study{Exact: append([]float64(nil), exact...), Scale: scale}
	for i := 0; i <= halvings; i++ {
		steps := first << i
		got, err := routine(steps)
		if err != nil {
			return Study{}, &StudyError{steps, "the routine failed", err}
		}
		if len(got) != len(exact) {
			return Study{}, &StudyError{Steps: steps, Reason: fmt.Sprintf("%d values, want %d", len(got), len(exact))}
		}
		s.Steps = append(s.Steps, steps)
		s.Values = append(s.Values, append([]float64(nil), got...))
	}
	return s, nil
}

// Errors returns the greatest |value - exact|/scale of each row; NaN if a value is.
func (s Study) Errors() []float64 {
	e := make([]float64, len(s.Values))
	for i, row := range s.Values {
		e[i] = s.distance(row)
	}
	return e
}

func (s Study) distance(row []float64) float64 {
	worst := 0.0
	for j, v := range row {
		worst = max(worst, math.Abs(v-s.Exact[j])/s.Scale) // max keeps a NaN
	}
	return worst
}

// Orders returns the observed order log₂(error/next error) of each halving, one fewer than rows. Backward Euler shows 1.
func (s Study) Orders() []float64 {
	e := s.Errors()
	var orders []float64
	for i := 1; i < len(e); i++ {
		orders = append(orders, math.Log2(e[i-1]/e[i]))
	}
	return orders
}

// Extrapolated returns the limit of vanishing steps that the rows point to, by repeated Richardson extrapolation (L. F.
// Richardson 1911; W. Romberg 1955). It takes the error to be a series in whole powers of the step, as it is for a one-step
// method and a smooth solution. ExtrapolatedError compares it with the exact values.
func (s Study) Extrapolated() []float64 {
	if len(s.Values) == 0 {
		return nil
	}
	table := make([][]float64, len(s.Values))
	for i, row := range s.Values {
		table[i] = append([]float64(nil), row...)
	}
	for power := 1; power < len(table); power++ {
		weight := 1 / (math.Exp2(float64(power)) - 1)
		for i := len(table) - 1; i >= power; i-- {
			for j := range table[i] {
				table[i][j] += (table[i][j] - table[i-1][j]) * weight
			}
		}
	}
	return table[len(table)-1]
}

// ExtrapolatedError returns the greatest |extrapolated - exact|/scale; NaN for an empty study.
func (s Study) ExtrapolatedError() float64 {
	if len(s.Values) == 0 {
		return math.NaN()
	}
	return s.distance(s.Extrapolated())
}

// String returns the study as a table of steps, errors and observed orders, with the error of the extrapolated result.
func (s Study) String() string {
	var b strings.Builder
	fmt.Fprintf(&b, "%8s  %9s  %5s\n", "steps", "error", "order")
	e, o := s.Errors(), s.Orders()
	for i, steps := range s.Steps {
		fmt.Fprintf(&b, "%8d  %9.3e", steps, e[i])
		if i > 0 {
			fmt.Fprintf(&b, "  %5.3f", o[i-1])
		}
		b.WriteByte('\n')
	}
	fmt.Fprintf(&b, "%8s  %9.3e\n", "limit", s.ExtrapolatedError())
	return b.String()
}
