package integrate

import "math"

// walk follows the curve of solutions from a short time to the end of the step, in x, and returns BeyondRupture where it turns
// back before. It is the method for the steps that contracts does not vouch for: predictor along the curve, corrector with the
// fastest coordinate held, step length by the error of the prediction and the turning of the curve.
func (c *coupled) walk(x *node) Code {
	w := walker{coupled: c, target: c.logTime}
	code := w.run()
	*x = w.at
	return code
}

// walker is a walk along the curve.
type walker struct {
	*coupled
	target float64 // ln of the time to reach
	locate bool    // look for the end of the curve only, as closely as can be
	at     node
	along  direction // of the curve, towards longer times at first; largest weighted component 1
	length float64   // of the next step
	end    float64   // ln of the time at which the curve ended
}

const (
	mostWalkSteps  = 2000
	firstWalkStep  = 0.5
	shortestStep   = 1e-9
	bearableError  = 0.1  // of a prediction, in the logarithms of the rates
	bearableTurn   = 0.7  // between the directions at both ends of a step
	startFeedback  = 0.02 // what the first point may change in the logarithms of the rates
	timeWeight     = 0.1  // of ln Δt among the coordinates
	longestStretch = 4.0  // growth of a step
)

func (w *walker) run() Code {
	if code := w.begin(); code != 0 {
		return code
	}
	w.length = firstWalkStep
	for range mostWalkSteps {
		if w.atLimit(&w.at) {
			w.end = w.at.logTime
			return BeyondRupture
		}
		if w.length < shortestStep {
			if !w.roundCorner() {
				return w.stuck()
			}
			continue
		}
		if rest := w.target - w.at.logTime; !w.locate && w.length*w.along[w.size()] >= rest {
			if w.arrive(rest) {
				return 0
			}
			continue
		}
		if w.step() {
			return BeyondRupture
		}
	}
	return NoConvergence
}

// begin finds a point of the curve where the variables have hardly moved.
func (w *walker) begin() Code {
	x := &w.at
	x.v, x.logTime = w.before, w.target
	held := w.size()
	if w.creeps {
		held = w.count
		x.odds = 0x1p-60
		if w.start == 0 {
			x.odds = 0x1p-10 // where hardening starts from zero strain its exponents are of use only further on
		}
	}
	if v := w.evaluate(x); v == undefined {
		return LawUndefined
	}
	shrink := w.startShrink(x)
	if w.creeps {
		x.odds = math.Min(shrink, 0.5)
		if w.evaluate(x) == undefined {
			return LawUndefined
		}
		x.logTime = math.Log(x.fraction) + w.logElastic - x.rate.LogRate
		for i := range w.count {
			r := &x.rate.Internal[i]
			x.v[i] += r.Value * math.Exp(x.logTime+r.LogScale) / w.memory.unit[i]
		}
	} else {
		x.logTime += math.Log(math.Min(shrink, 1))
	}
	if x.logTime > w.target {
		x.odds *= math.Exp(w.target - x.logTime)
		x.logTime, held = w.target, w.size()
	}
	if w.newton(x, held, exact) != fine {
		return w.fault(x)
	}
	var d direction
	if w.evaluate(x) != fine || !w.linear(x, w.size(), &d, &w.along) {
		return w.fault(x)
	}
	w.normalise(&w.along)
	return 0
}

// startShrink is the fraction relaxed (or, without creep, the fraction of the step) at which the rates change by startFeedback.
func (w *walker) startShrink(x *node) float64 {
	most := math.Inf(-1) // ln of the change of the rates per fraction relaxed, or per step
	raise := func(factor, log float64) {
		if factor != 0 {
			most = math.Max(most, math.Log(math.Abs(factor))+log)
		}
	}
	base := w.target // of increments per step
	if w.creeps {
		base = w.logElastic - x.rate.LogRate
		raise(1+math.Abs(w.exponent(x, &x.rate.Creep))+math.Abs(x.rate.Creep.ByLogStrain)*w.strainShare(), 0)
	}
	for i := range w.count {
		r := &x.rate.Internal[i]
		log := base + r.LogScale - math.Log(w.memory.unit[i])
		raise(r.Value*w.weight(x, i), log)
		if w.creeps && r.Value != 0 {
			raise(w.exponent(x, &r.Partials)/r.Value, 0)
		}
		for j := range w.count {
			raise(r.ByInternal[j]*w.memory.unit[j], log)
		}
	}
	return startFeedback * math.Exp(-most)
}

// strainShare is what a fraction relaxed adds to ln p, per fraction.
func (w *walker) strainShare() float64 {
	if w.start == 0 {
		return 1
	}
	return w.elastic / w.start
}

// fault is the reason why a first point could not be found.
func (w *walker) fault(x *node) Code {
	if w.evaluate(x) == undefined {
		return LawUndefined
	}
	return NoConvergence
}

// normalise scales a direction to the largest weighted component 1.
func (w *walker) normalise(d *direction) {
	s := 1 / w.reach(&w.at, d)
	for i := range d {
		d[i] *= s
	}
}

// reach is the weighted length of a change of the coordinates.
func (w *walker) reach(x *node, d *direction) float64 {
	most := timeWeight * math.Abs(d[w.size()])
	if w.creeps {
		most = math.Max(most, math.Abs(d[w.count]))
	}
	for i := range w.count {
		most = math.Max(most, math.Abs(d[i])*w.weight(x, i))
	}
	return most
}

// fastest is the coordinate that changes most along the curve.
func (w *walker) fastest() (held int) {
	held, most := w.size(), timeWeight*math.Abs(w.along[w.size()])
	if w.creeps && math.Abs(w.along[w.count]) > most {
		held, most = w.count, math.Abs(w.along[w.count])
	}
	for i := range w.count {
		if s := math.Abs(w.along[i]) * w.weight(&w.at, i); s > most {
			held, most = i, s
		}
	}
	return held
}

// arrive tries to solve at the target time from the current point. If that fails the next step is half as long.
func (w *walker) arrive(rest float64) bool {
	y := w.at
	length := rest / w.along[w.size()]
	if length > 0 {
		w.move(&y, &w.along, w.leash(&y, scaled(w.along, length), 0)*length)
	}
	y.logTime = w.target
	e := exact
	e.first = 0.5
	if w.newton(&y, w.size(), e) == fine && w.connected(&y, length) {
		w.at = y
		return true
	}
	w.length = math.Min(w.length, length) / 2
	return false
}

// connected reports whether y is the next point of the curve: near where the direction led, and with a direction of its own
// that has not turned much and still leads to longer times.
func (w *walker) connected(y *node, length float64) bool {
	var d, along direction
	if !w.linear(y, w.size(), &d, &along) {
		return false
	}
	return w.turn(y, &along) <= bearableTurn && w.distance(y, length) <= 0.5*math.Max(length, 0.1)
}

// step goes on by one step of at most the current length. It reports whether the curve has been found to end.
func (w *walker) step() (ended bool) {
	y := w.at
	held := w.fastest()
	length := w.length * w.leash(&y, scaled(w.along, w.length), 0)
	w.move(&y, &w.along, length)
	v, first := w.correct(&y, held, rough)
	var d, along direction
	if v != fine || !(first <= 2*bearableError) || !w.linear(&y, held, &d, &along) {
		w.length = length / 3
		return false
	}
	if dot := along[held] * w.along[held]; dot < 0 {
		for i := range along {
			along[i] = -along[i]
		}
	}
	if w.turn(&y, &along) > bearableTurn {
		w.length = length / 2
		return false
	}
	return w.accept(&y, &along, length, first)
}

// roundCorner gets past a corner of the curve, as where the rupture stress passes through zero and damage stops: a small
// step with another coordinate held, whose end is near enough to be on the curve whatever its direction.
func (w *walker) roundCorner() bool {
	const small, near = 1e-6, 1e-4
	for held := w.size(); held >= 0; held-- {
		if w.along[held] == 0 {
			continue
		}
		y := w.at
		w.move(&y, &w.along, small)
		v, first := w.correct(&y, held, rough)
		var d, along direction
		if v != fine || !(first <= near) || !w.linear(&y, held, &d, &along) || w.distance(&y, 0) > near {
			continue
		}
		if along[held]*w.along[held] < 0 {
			along = *scaled(along, -1)
		}
		along = *scaled(along, 1/w.reach(&y, &along))
		if along[w.size()] > 0 {
			w.at, w.along, w.length = y, along, small
			return true
		}
	}
	return false
}

// accept moves to y, unless the curve turned back on the way: then the step is shortened until it is clear whether it reaches
// the target before, and the end reported.
func (w *walker) accept(y *node, along *direction, length, first float64) (ended bool) {
	n := w.size()
	scale := 1 / w.reach(y, along)
	for i := range along {
		along[i] *= scale
	}
	if along[n] <= 0 {
		top := crest(w.at.logTime, y.logTime, w.along[n]*length, along[n]*length)
		doubt := (top - math.Max(w.at.logTime, y.logTime)) + 4*epsilon*math.Abs(top)
		if length < 1e-6 || !w.locate && top+doubt < w.target {
			w.end = top
			return true
		}
		w.length = length / 2
		return false
	}
	w.at, w.along = *y, *along
	w.length = length * math.Min(longestStretch, math.Sqrt(bearableError/math.Max(first, 1e-6)))
	return false
}

// turn is the weighted difference between the direction of the curve here and at y, both of length 1.
func (w *walker) turn(y *node, along *direction) float64 {
	scale := 1 / w.reach(y, along)
	var d direction
	for i := range d {
		d[i] = along[i]*scale - w.along[i]
	}
	d[w.size()] *= 1 // ln Δt counts with its weight
	return w.reach(y, &d)
}

// distance is how far y is from the point a length along the direction from here.
func (w *walker) distance(y *node, length float64) float64 {
	var d direction
	for i := range w.count {
		d[i] = y.v[i] - w.at.v[i] - length*w.along[i]
	}
	if w.creeps {
		d[w.count] = math.Log(y.odds/w.at.odds) - length*w.along[w.count]
	}
	return w.reach(y, &d)
}

// stuck is the reason why no step is short enough: the curve leads out of the domain of the law, or to infinite rates.
func (w *walker) stuck() Code {
	y := w.at
	w.end = y.logTime
	w.move(&y, &w.along, 1e-6)
	if w.evaluate(&y) == undefined {
		return LawUndefined
	}
	return NoConvergence
}

func scaled(d direction, by float64) *direction {
	for i := range d {
		d[i] *= by
	}
	return &d
}

// crest is the largest value on [0, 1] of the cubic with the values a, b and the slopes da > 0, db ≤ 0 at the ends.
func crest(a, b, da, db float64) float64 {
	// p(s) = a + da s + c2 s² + c3 s³
	c2 := 3*(b-a) - 2*da - db
	c3 := da + db - 2*(b-a)
	s := 1.0
	if root := c2*c2 - 3*c3*da; root >= 0 {
		// the maximum, in the form that does not cancel
		s = da / (math.Sqrt(root) - c2)
		if !(s >= 0 && s <= 1) {
			s = 1
		}
	}
	return math.Max(math.Max(a, b), a+s*(da+s*(c2+s*c3)))
}
