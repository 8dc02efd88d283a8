package figure

import (
	"math"
	"strconv"

	"gonum.org/v1/plot"
)

// Round places at most about so many round numbers, with their thousands apart.
type Round struct{ Most int }

// Decades places the powers of ten of an axis that shows decimal logarithms, and labels them so that no more than about Most labels
// stand side by side; on an axis shorter than two decades it places 1, 2, 5 times powers of ten. (A scale of the plotting package
// that takes the logarithm itself would leave room for the axis label where it is not drawn.)
type Decades struct{ Most int }

var _ = []plot.Ticker{Round{}, Decades{}}

// Ticks implements plot.Ticker.
func (r Round) Ticks(low, high float64) (list []plot.Tick) {
	step, decimals := roundStep((high-low)/float64(r.Most), math.Max(math.Abs(low), math.Abs(high)))
	for i := math.Ceil(low/step - 1e-9); i*step <= high+1e-9*step; i++ {
		label := Grouped(i*step, decimals)
		if len(label) > longestLabel {
			label = strconv.FormatFloat(i*step, 'g', 4, 64)
		}
		list = append(list, plot.Tick{Value: i * step, Label: label})
	}
	return list
}

const longestLabel = 11 // "100 000 000"

// roundStep is the least of 1, 2, 4, 5 times a power of ten that is at least x, with the decimals it needs. A step lost in the
// rounding of the largest number, or no number at all, becomes one that draws no more than a tick or two.
func roundStep(x, largest float64) (step float64, decimals int) {
	if !(x > largest*1e-9) || math.IsInf(x, 0) {
		return math.Max(1, largest), 0
	}
	power := math.Floor(math.Log10(x))
	for _, m := range []float64{1, 2, 4, 5, 10} {
		if step = m * math.Pow(10, power); step >= x*(1-1e-9) {
			if m == 10 {
				power++
			}
			break
		}
	}
	return step, max(0, -int(power))
}

// Ticks implements plot.Ticker.
func (d Decades) Ticks(low, high float64) (list []plot.Tick) {
	first, last := int(math.Ceil(low-1e-9)), int(math.Floor(high+1e-9))
	if last-first < 2 {
		return withinDecades(low, high)
	}
	every := 1 + (last-first)/d.Most
	for e := first; e <= last; e++ {
		t := plot.Tick{Value: float64(e)}
		if e%every == 0 {
			t.Label = powerOfTen(e)
		}
		list = append(list, t)
	}
	return list
}

func withinDecades(low, high float64) (list []plot.Tick) {
	for e := math.Floor(low); e <= high; e++ {
		for _, m := range []float64{1, 2, 5} {
			if v := e + math.Log10(m); v >= low-1e-9 && v <= high+1e-9 {
				list = append(list, plot.Tick{Value: v, Label: strconv.FormatFloat(m*math.Pow(10, e), 'g', 4, 64)})
			}
		}
	}
	return list
}

func powerOfTen(exponent int) string {
	if exponent >= -3 && exponent <= 4 {
		return strconv.FormatFloat(math.Pow(10, float64(exponent)), 'f', max(0, -exponent), 64)
	}
	return "1e" + strconv.Itoa(exponent)
}
