package bench

import (
	"fmt"
	"math"
)

// ParameterError says that a problem was given a parameter it cannot have.
type ParameterError struct {
	Problem   string  // the type of the problem, such as "BarRelaxation"
	Parameter string  // the field, such as "Young"
	Value     float64 // the value that was given
	Want      string  // what it must be
}

func (e *ParameterError) Error() string {
	return fmt.Sprintf("bench: %s: %s is %v, must be %s", e.Problem, e.Parameter, e.Value, e.Want)
}

// checker collects the first fault of a problem's parameters.
type checker struct {
	problem string
	err     error
}

func (c *checker) require(ok bool, parameter string, value float64, want string) {
	if c.err == nil && !ok {
		c.err = &ParameterError{c.problem, parameter, value, want}
	}
}

func (c *checker) positive(parameter string, value float64) {
	c.require(value > 0 && !math.IsInf(value, 1), parameter, value, "positive and finite")
}

func (c *checker) finite(parameter string, value float64) {
	c.require(value-value == 0, parameter, value, "finite")
}

func (c *checker) poisson(value float64) {
	c.require(value > -1 && value < 0.5, "Poisson", value, "above -1 and below 0.5")
}
