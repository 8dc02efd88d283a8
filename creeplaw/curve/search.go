package curve

import "math"

// search finds the logarithm s of the time at which a curve reaches a creep strain p. The caller evaluates the curve at s,
// hands over what it found to advance, and does so again until done. Forty decades of time and a thousand are the same to
// it: it works in the logarithm, keeps a bracket, and halves that where no step can be trusted.
//
// The step is the root of a local model that meets value, slope and curvature of the curve, so the iteration is of third
// order. The model is a power of time with an offset, a + b tᵏ, where the rate falls like a power (exact for primary creep,
// for steady creep, for both of them apart, and for logarithmic creep), and an exponential, a + b e^(κt), where it falls or
// rises faster than that (exact for a saturating or growing exponential). Where the model ends below the strain that is looked
// for, something else still grows there, and the step goes to where the model has nothing more to give; where the model was
// above it from the start, the step is a guess to the left.
type search struct {
	s           float64 // ln t
	low, high   float64 // bracket of s
	evaluations int
	rest        float64 // correction of s left out by the last evaluation, when done
	done        bool
	lost        bool    // the last step was a guess: the strain is less than the model had even at zero time
	stride      float64 // of such guesses, doubled each time
}

const (
	maxEvaluations = 80
	// finished is the step, relative to what bends the curve, whose third power and square are lost in rounding: the value is
	// corrected for the step to first order, the exponents are left.
	finished = 1e-10
	longest  = 200 // step in ln t
)

func newSearch(logTime float64) search {
	return search{s: logTime, low: math.Inf(-1), high: math.Inf(1), stride: math.Ln2}
}

// move is a change of time by the factor 1 + change = e^step.
type move struct{ change, step float64 }

// advance takes v = ε/p, m = t (∂ε/∂t)/p and k = ∂ln(∂ε/∂t)/∂ln t at s, and moves s by the move it returns.
func (z *search) advance(v, m, k float64) move {
	z.evaluations++
	if v < 1 {
		z.low = max(z.low, z.s)
	} else {
		z.high = min(z.high, z.s)
	}
	if math.Abs(v-1) <= 0x1p-51 { // that near rounding decides
		z.done = true
		return move{}
	}
	next := modelMove((1-v)/m, k)
	z.lost = !(next.change > -1)
	if z.lost {
		next = moveBy(-z.stride)
		z.stride *= 2
	}
	if math.Abs(next.step)*(1+math.Abs(k)) <= finished {
		z.rest, z.done = next.step, true
		return move{}
	}
	next = z.inside(next)
	if s := z.s + next.step; s == z.s || s == z.low || s == z.high || z.evaluations >= maxEvaluations {
		z.done = true // neighbouring numbers bracket the root
		return move{}
	}
	z.s += next.step
	return next
}

// inside keeps a move within the bracket.
func (z *search) inside(next move) move {
	if math.Abs(next.step) > longest {
		next = moveBy(math.Copysign(longest, next.step))
	}
	s := z.s + next.step
	switch {
	case s > z.low && s < z.high:
		return next
	case math.IsInf(z.low, -1):
		return moveBy(z.high - 2 - z.s)
	case math.IsInf(z.high, 1):
		return moveBy(z.low + 2 - z.s)
	}
	return moveBy(z.low + (z.high-z.low)/2 - z.s)
}

func moveBy(step float64) move { return move{math.Expm1(step), step} }

// modelMove is the change of time in which the model grows by d, in units of t times the rate; NaN where it never does.
func modelMove(d, k float64) move {
	size := math.Abs(d) * (1 + math.Abs(k))
	switch power := 1 + k; {
	case size < 0.01: // the models agree with Halley's step to the order that counts
		u := d / (1 + 0.5*k*d)
		return move{u, logOnePlus(u)}
	case math.Abs(power) < 1e-9:
		return moveBy(d)
	case k >= -2 && k <= 0:
		if ends := power < 0; ends && power*d <= -1 {
			return moveBy(math.Log(beyond(-1-power*d, 1e-3)) / power)
		}
		return moveBy(math.Log1p(power*d) / power)
	default:
		var u float64
		if ends := k < 0; ends && k*d <= -1 {
			u = math.Log(beyond(-1-k*d, rounding)) / k
		} else {
			u = math.Log1p(k*d) / k
		}
		return move{u, math.Log1p(u)}
	}
}

// beyond is for a strain above the end of a model that closes in on it: go to where the model is as near to its end from below
// as the strain is from above, or, if that is nowhere near, to where it has nothing more to give.
func beyond(above, nothing float64) float64 {
	if above < 0.5 {
		return max(above, nothing)
	}
	return nothing
}

// At rt = spent, e^(-rt) is beneath rounding.
const (
	spent    = 37
	rounding = 1e-16
)
