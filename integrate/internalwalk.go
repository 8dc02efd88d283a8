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
	mostWalkSteps  = 20000
	mostStarts     = 30
	firstWalkStep  = 0.5
	shortestStep   = 1e-9
	bearableError  = 0.05 // of a prediction, in the logarithms of the rates
	bearableTurn   = 0.5  // between the directions at both ends of a step
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
		done := onTheWay
		w.length = min(w.length, w.foresight())
		switch rest := w.target - w.at.logTime; {
		case w.atLimit(&w.at):
			w.end, done = w.at.logTime, ended
		case w.locate && rest < -1:
			return NoConvergence
		case w.length < shortestStep:
			var found bool
			if done, found = w.roundCorner(); !found {
				return w.stuck()
			}
		case !w.locate && w.length*w.along[w.size()] >= rest:
			done = w.arrive(rest)
		default:
			done = w.step()
		}
		switch done {
		case arrived:
			if w.atLimit(&w.at) {
				return BeyondRupture
			}
			return 0
		case ended:
			return BeyondRupture
		}
	}
	return NoConvergence
}

// begin finds a point of the curve where the rates have hardly changed.
func (w *walker) begin() Code {
	x := &w.at
	x.v, x.logTime = w.before, w.target
	if w.creeps {
		x.odds = 0x1p-60
		if w.start == 0 {
			x.odds = 0x1p-20 // where hardening starts from zero strain its exponents are of use only further on
		}
	}
	if w.evaluate(x) == undefined {
		return LawUndefined
	}
	shrink := min(w.startShrink(x), 0.5)
	for range mostStarts {
		switch w.beginAt(shrink) {
		case fine:
			return 0
		case undefined:
			return LawUndefined
		}
		shrink *= 1e-3
	}
	return NoConvergence
}

// foresight is the longest step within sight. No increment of a variable that grows now may come to matter more than can be
// seen from here, if it goes on as an exponential: as it grows now, or as it will where little stress is left, n - χ; what looks
// like faster growth than that of the time is a passage through zero. And while the stress falls from nearly all to little, which
// is where the variables do most and where the curve may turn back and forth, z goes by small steps.
func (w *walker) foresight() float64 {
	const matters, least = 0.1, 0.7
	longest := math.Inf(1)
	x, n := &w.at, w.size()
	byZ := 0.0
	if w.creeps {
		byZ = math.Abs(w.along[w.count])
	}
	for i := range w.count {
		growth := min(max(w.along[i]/x.increment[i], -w.excess(x, i)*byZ), w.along[n])
		if !(growth > 0) {
			continue
		}
		effect := math.Abs(x.increment[i]) * w.weight(x, i)
		longest = min(longest, max(math.Log(matters/effect), least)/growth)
	}
	const from, to, small = -3, 6, 1
	if byZ > 0 && x.odds < math.MaxFloat64 {
		if z := math.Log(x.odds); z < from {
			longest = min(longest, (from-z+small)/byZ)
		} else if z < to {
			longest = min(longest, small/byZ)
		}
	}
	return longest
}

// beginAt tries to begin where a fraction u has relaxed, or, without creep, after that fraction of the step.
func (w *walker) beginAt(fraction float64) verdict {
	x := &w.at
	x.v = w.before
	held := w.size()
	if w.creeps {
		held = w.count
		x.odds = fraction
		if v := w.evaluate(x); v == undefined {
			return v
		}
		x.logTime = math.Log(x.fraction) + w.logElastic - x.rate.LogRate
	} else {
		x.logTime = w.target + math.Log(fraction)
		if v := w.evaluate(x); v == undefined {
			return v
		}
	}
	for i := range w.count {
		r := &x.rate.Internal[i]
		x.v[i] += r.Value * math.Exp(x.logTime+r.LogScale) / w.memory.unit[i]
	}
	if x.logTime > w.target {
		x.odds *= math.Exp(w.target - x.logTime)
		x.logTime, held = w.target, w.size()
	}
	e := exact
	e.first = bearableError
	if v := w.newton(x, held, e); v != fine {
		return v
	}
	var d direction
	if v := w.evaluate(x); v != fine {
		return v
	}
	if !w.linear(x, w.size(), &d, &w.along) {
		return tooFar
	}
	for i := range w.count {
		if math.Abs(x.v[i]-w.before[i])*w.weight(x, i) > 2*bearableError {
			return tooFar // the rates change faster than could be seen from the start
		}
	}
	if w.creeps && !(w.along[w.count] > 0 && x.share*x.rate.Creep.ByLogStrain <= 2*bearableError) {
		return tooFar
	}
	w.normalise(&w.along)
	return fine
}

// startShrink is the fraction relaxed (or, without creep, the fraction of the step) at which the rates change by startFeedback.
func (w *walker) startShrink(x *node) float64 {
	most := math.Inf(-1) // ln of the change of the rates per fraction relaxed, or per step
	raise := func(factor, log float64) {
		if factor != 0 {
			most = max(most, math.Log(math.Abs(factor))+log)
		}
	}
	base := w.target // of increments per step
	if w.creeps {
		base = w.logElastic - x.rate.LogRate
		raise(1+math.Abs(w.exponent(x, &x.rate.Creep))+math.Abs(x.rate.Creep.ByLogStrain)*w.strainShare(x), 0)
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

// strainShare is what a fraction relaxed adds to ln p, per fraction; hardening from zero strain follows it as a power.
func (w *walker) strainShare(x *node) float64 {
	if w.start == 0 && x.rate.Creep.ByLogStrain <= 0 {
		return 1
	}
	return w.elastic / x.strain
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
		most = max(most, math.Abs(d[w.count]))
	}
	for i := range w.count {
		most = max(most, math.Abs(d[i])*w.weight(x, i))
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
func (w *walker) arrive(rest float64) progress {
	y := w.at
	length := rest / w.along[w.size()]
	if length > 0 {
		w.move(&y, &w.along, w.leash(&y, scaled(w.along, length), 0)*length)
	}
	y.logTime = w.target
	e := exact
	e.first = 0.5
	if w.newton(&y, w.size(), e) == fine && w.connected(&y, rest) {
		w.at = y
		return arrived
	}
	w.length = min(w.length, length) / 2
	return onTheWay
}

// connected reports whether y, a time rest later, is the next point of the curve: its direction has not turned much and still
// leads to longer times, and the way there is what the directions at both ends tell of.
func (w *walker) connected(y *node, rest float64) bool {
	var d, along direction
	n := w.size()
	if !w.linear(y, n, &d, &along) || w.turn(y, &along) > bearableTurn {
		return false
	}
	here := *scaled(w.along, 1/w.along[n])
	return !w.bends(y, &here, &along, rest)
}

// progress is what a step of the walk came to.
type progress int

const (
	onTheWay progress = iota // the current point moved on, or the next step is shorter
	arrived                  // the current point is the solution at the target
	ended                    // the curve turns back before the target
)

// step goes on by one step of at most the current length.
func (w *walker) step() progress {
	y := w.at
	held := w.fastest()
	length := w.length * w.leash(&y, scaled(w.along, w.length), 0)
	w.move(&y, &w.along, length)
	v, first := w.correct(&y, held, rough)
	var d, along direction
	if v != fine || !(first <= 2*bearableError) || !w.linear(&y, held, &d, &along) {
		w.length = length / 3
		return onTheWay
	}
	if along[held]*w.along[held] < 0 {
		along = *scaled(along, -1)
	}
	if w.turn(&y, &along) > bearableTurn {
		w.length = length / 2
		return onTheWay
	}
	along = *scaled(along, 1/w.reach(&y, &along))
	if w.bends(&y, &w.along, &along, length) {
		w.length = length / 2
		return onTheWay
	}
	return w.accept(&y, &along, length, first)
}

// roundCorner gets past a corner of the curve, as where the rupture stress passes through zero and damage stops: a small
// step with another coordinate held, whose end is near enough to be on the curve whatever its direction.
func (w *walker) roundCorner() (done progress, found bool) {
	const small, near = 1e-6, 0.05
	for held := w.size(); held >= 0; held-- {
		if w.along[held] == 0 {
			continue
		}
		y := w.at
		w.move(&y, &w.along, small)
		v, first := w.correct(&y, held, rough)
		var d, along direction
		if v != fine || !(first <= near) || !w.linear(&y, held, &d, &along) {
			continue
		}
		if way := w.way(&y); w.reach(&y, &way) > near {
			continue
		}
		if along[held]*w.along[held] < 0 {
			along = *scaled(along, -1)
		}
		along = *scaled(along, 1/w.reach(&y, &along))
		if !(along[w.size()] > 0) {
			continue
		}
		if !w.locate && y.logTime > w.target {
			if w.between(&y) {
				return arrived, true
			}
			continue
		}
		w.at, w.along, w.length = y, along, small
		return onTheWay, true
	}
	return onTheWay, false
}

// accept moves to y, unless the target lies on the way there, or the curve turned back: then the step is shortened until it is
// clear whether it reaches the target before.
func (w *walker) accept(y *node, along *direction, length, first float64) progress {
	n := w.size()
	switch {
	case along[n] <= 0:
		top := crest(w.at.logTime, y.logTime, w.along[n]*length, along[n]*length)
		doubt := (top - max(w.at.logTime, y.logTime)) + 4*epsilon*math.Abs(top)
		sharp := length * (math.Abs(w.along[n]) + math.Abs(along[n])) // at a smooth fold both vanish with the length
		if length < 1e-6 && (sharp < 1e-10 || length < 4*shortestStep) || !w.locate && top+doubt < w.target {
			w.end = top
			return ended
		}
		w.length = length / 2
		return onTheWay
	case w.locate && w.atLimit(y) && length > 1e-8:
		w.length = length / 2
		return onTheWay
	case !w.locate && y.logTime > w.target:
		if w.between(y) {
			return arrived
		}
		w.length = length / 2
		return onTheWay
	}
	w.at, w.along = *y, *along
	w.length = length * min(longestStretch, math.Sqrt(bearableError/max(first, 1e-6)))
	return onTheWay
}

// between solves at the target time, which lies between the current point and y.
func (w *walker) between(y *node) bool {
	f := (w.target - w.at.logTime) / (y.logTime - w.at.logTime)
	x := w.at
	for i := range w.count {
		x.v[i] += f * (y.v[i] - x.v[i])
	}
	if w.creeps {
		x.odds *= math.Pow(y.odds/x.odds, f)
	}
	x.logTime = w.target
	e := exact
	e.first = 1
	var d, along direction
	if w.newton(&x, w.size(), e) != fine || !w.linear(&x, w.size(), &d, &along) || w.turn(&x, &along) > bearableTurn {
		return false
	}
	w.at = x
	return true
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
