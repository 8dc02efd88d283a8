package creeplaw

import (
	"fmt"
	"math"
)

// ParameterError says that a law was given a parameter it cannot have. Every constructor of this package returns it, found
// with errors.As; no law is made.
type ParameterError struct {
	Law       string  // the law that was asked for, such as "Norton"
	Parameter string  // the parameter's name, such as "stress exponent"
	Value     float64 // the value that was given
	Want      string  // what it must be, such as "positive and finite"
}

func (e *ParameterError) Error() string {
	return fmt.Sprintf("creeplaw: %s: %s is %v, must be %s", e.Law, e.Parameter, e.Value, e.Want)
}

// parameter is one named value on its way through a constructor.
type parameter struct {
	name  string
	value float64
}

func positive(law string, ps ...parameter) error {
	for _, p := range ps {
		if !(p.value > 0) || math.IsInf(p.value, 1) {
			return &ParameterError{law, p.name, p.value, "positive and finite"}
		}
	}
	return nil
}

// MissingError says that a composed law was given no part where it needs one.
type MissingError struct {
	Law  string // the law that was asked for
	Part string // what is missing
}

func (e *MissingError) Error() string {
	return fmt.Sprintf("creeplaw: %s: the %s is missing", e.Law, e.Part)
}
