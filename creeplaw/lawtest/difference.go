package lawtest

import "math"

const (
	epsilon  = 0x1p-52
	smallest = 0x1p-1074 // spacing of the numbers near zero
	nodes    = 7
	coarsest = 2 // exponents of the largest and the smallest step, 2⁻²
	finest   = 22
	fine     = 16 // from this step on the truncation is negligible, for exponents up to some thousand
)

// slope is a derivative by the logarithm of an argument with a bound on its error.
type slope struct{ value, bound float64 }

// logSlope differentiates g by ln x with seven points inside the range and the step that its own results show to be the best.
// rounding is the least error of a value of g.
func logSlope(g func(float64) float64, x float64, within Range, rounding func(float64) float64) slope {
	var ladder []slope // with the least bounds that rounding allows
	scatter := 0.0     // error of a value of g as the finest steps show it, several of them, lest two agree by chance
	for k := coarsest; k <= finest; k++ {
		h := math.Ldexp(1, -k)
		first, fits := firstNode(x, h, within)
		if !fits {
			continue
		}
		ladder = append(ladder, sevenPoint(g, x, h, first, rounding))
		if n := len(ladder); n > 1 && k >= fine {
			scatter = math.Max(scatter, h*math.Abs(ladder[n-1].value-ladder[n-2].value))
		}
	}
	best := slope{math.NaN(), math.Inf(1)}
	for i := 1; i < len(ladder)-1; i++ { // both neighbours are needed to trust a result
		v := ladder[i].value
		h := math.Ldexp(1, -finest+len(ladder)-1-i)
		bound := math.Max(math.Abs(v-ladder[i-1].value), math.Abs(v-ladder[i+1].value)) + ladder[i].bound + scatter/h
		if bound < best.bound {
			best = slope{v, bound}
		}
	}
	return best
}

// firstNode places seven points x·exp(jh), j = first … first+6, in the range, about x as nearly as possible.
func firstNode(x, h float64, within Range) (first int, fits bool) {
	// The factor allows for the rounding of the logarithm, so that a point on a face of the box keeps to its own side.
	const slack = 1 - 1e-9
	below := int(math.Log(x/within[0]) / h * slack)
	above := int(math.Log(within[1]/x) / h * slack)
	if below+above < nodes-1 {
		return 0, false
	}
	first = -nodes / 2
	if below < -first {
		first = -below
	}
	if above < first+nodes-1 {
		first = above - (nodes - 1)
	}
	return first, true
}

// sevenPoint is the derivative of the polynomial through the seven points, and the least error that rounding leaves in it.
func sevenPoint(g func(float64) float64, x, h float64, first int, rounding func(float64) float64) slope {
	value, floor := 0.0, 0.0
	weights := 0.0
	for j := range nodes {
		w := weight(j, -first) / h
		v := g(x * math.Exp(h*float64(first+j)))
		value += w * v
		floor += math.Abs(w) * rounding(v)
		weights += math.Abs(w)
	}
	return slope{value, floor + weights*epsilon*math.Abs(value)} // the argument, too, is rounded
}

// weight is the derivative at node m of Lagrange's polynomial that is one at node j and zero at the other nodes.
func weight(j, m int) float64 {
	if j == m {
		w := 0.0
		for k := range nodes {
			if k != m {
				w += 1 / float64(m-k)
			}
		}
		return w
	}
	w := 1 / float64(j-m)
	for k := range nodes {
		if k != j && k != m {
			w *= float64(m-k) / float64(j-k)
		}
	}
	return w
}

// roundingOfRate is what a rate loses at the least: a few units in the last place, and those of the logarithm it is likely
// to have been formed from.
func roundingOfRate(v float64) float64 {
	if v == 0 {
		return 0
	}
	return epsilon*math.Abs(v)*(4+math.Abs(math.Log(math.Abs(v)))) + smallest
}

// roundingOfLog is the same for a logarithm.
func roundingOfLog(l float64) float64 { return epsilon * (4 + math.Abs(l)) }
