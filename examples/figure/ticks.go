package figure

import (
	"fmt"
	"math"

	"gonum.org/v1/plot"
)

// Decades marks the powers of ten of a logarithmic axis and writes one in so many.
type Decades struct{ Every int }

var _ plot.Ticker = Decades{}

// Ticks returns a mark per power of ten in the range, with a label where the exponent is a multiple of Every (0: each).
func (d Decades) Ticks(low, high float64) []plot.Tick {
	var ticks []plot.Tick
	every := max(d.Every, 1)
	for e := int(math.Ceil(math.Log10(low) - 1e-9)); float64(e) <= math.Log10(high)+1e-9; e++ {
		t := plot.Tick{Value: math.Pow(10, float64(e))}
		if e%every == 0 {
			t.Label = fmt.Sprintf("1e%d", e)
			if e >= 0 && e <= 4 {
				t.Label = fmt.Sprintf("%.0f", t.Value)
			}
		}
		ticks = append(ticks, t)
	}
	return ticks
}
