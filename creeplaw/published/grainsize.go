package published

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

func checkGrainSize(set string, d float64) error {
	if !(d > 0) || math.IsInf(d, 1) {
		return &creeplaw.ParameterError{Law: set, Parameter: "grain size", Value: d, Want: "positive and finite"}
	}
	return nil
}

// sizeText prints a grain size given in m.
func sizeText(d float64) string { return fmt.Sprintf("grain size %.4g µm", d*1e6) }
