package audit

import (
	"fmt"
	"math"
	"slices"
)

const (
	// leastJump is the relative change of a rate between neighbouring numbers that counts as a jump.
	leastJump = 1e-6
	// leastCorner is the change of a local exponent that counts as a corner, as a part of one plus the exponent.
	leastCorner = 0.01
	// suspects of a line are examined, the most conspicuous ones.
	suspects = 12
	// samePlace is the distance in the logarithm of an argument within which two lines have the same breakpoint.
	samePlace = 1e-5
)

// brk is a jump or a corner on a line.
type brk struct {
	line         *line
	u            float64
	jump         float64 // change of ln ṗ
	corner       float64 // change of the local exponent
	below, above float64 // the two values, or exponents
}

// continuity looks for jumps and corners on every line and at every breakpoint named.
func continuity(x *examination) answer {
	intervals := 0
	for _, along := range axes {
		var found []brk
		for _, l := range x.scan(along) {
			intervals += len(l.u) - 1
			found = append(found, x.breaksOf(l)...)
			found = append(found, x.namedBreaksOf(l)...)
			x.onsets(l)
		}
		x.noteBreaks(along, found)
	}
	if intervals == 0 {
		return skipped("the domain is a single point")
	}
	return inOrder("no jump and no corner found in %d intervals; %d breakpoints were named", intervals, len(x.breakpoints))
}

// breaksOf examines the places of a line where the fourth difference of ln ṗ sticks out from its surroundings.
func (x *examination) breaksOf(l *line) (found []brk) {
	rough := fourthDifferences(l.f)
	for _, i := range conspicuous(rough, l.f) {
		b, ok := findBreak(func(u float64) float64 { return x.value(l, u) }, l.u[i-2], l.u[i+2])
		if !ok || slices.ContainsFunc(found, func(c brk) bool { return math.Abs(c.u-b.u) < samePlace }) {
			continue
		}
		b.line = l
		found = append(found, b)
		if b.jump != 0 {
			l.jumps = append(l.jumps, b.u)
		}
	}
	return found
}

// fourthDifferences is NaN where one of the five values is not finite.
func fourthDifferences(f []float64) []float64 {
	d := make([]float64, len(f))
	for i := range d {
		d[i] = math.NaN()
		if i >= 2 && i+2 < len(f) {
			d[i] = math.Abs(f[i-2] - 4*f[i-1] + 6*f[i] - 4*f[i+1] + f[i+2])
		}
		if math.IsInf(d[i], 0) {
			d[i] = math.NaN()
		}
	}
	return d
}

// conspicuous are the places whose fourth difference is the greatest around, far above that of the surroundings and above
// rounding; the greatest first, so many as will be examined.
func conspicuous(rough, f []float64) []int {
	const near, around, times = 4, 20, 8
	var list []int
	for i, d := range rough {
		floor := 16*rounding(f[i]) + leastJump/4
		if !(d > floor) {
			continue
		}
		var surroundings []float64
		greatest := true
		for j := max(0, i-around); j < min(len(rough), i+around+1); j++ {
			switch distance := max(i-j, j-i); {
			case math.IsNaN(rough[j]):
			case distance > near:
				surroundings = append(surroundings, rough[j])
			case rough[j] > d:
				greatest = false
			}
		}
		slices.Sort(surroundings)
		if greatest && (len(surroundings) < 4 || d > times*surroundings[len(surroundings)/2]) {
			list = append(list, i)
		}
	}
	slices.SortStableFunc(list, func(a, b int) int { return int(math.Copysign(1, rough[b]-rough[a])) })
	return list[:min(len(list), suspects)]
}

// findBreak looks for a jump or a corner between low and high. Curvature is neither: the change of slope that it makes shrinks
// with the interval.
func findBreak(g func(float64) float64, low, high float64) (brk, bool) {
	const corners, jumps = 2e-6, 1e-9 // widths at which they are judged
	a, b, ok := closeIn(g, low, high, corners)
	if margin := (high - low) / 20; !ok || a < low+margin || b > high-margin {
		return brk{}, false // or on its way to something outside
	}
	ga, gb := g(a), g(b)
	sides := func(h float64) (left, right float64) {
		return (3*ga - 4*g(a-h) + g(a-2*h)) / (2 * h), (-3*gb + 4*g(b+h) - g(b+2*h)) / (2 * h)
	}
	h := (high - low) / 64
	left, right := sides(h / 16)
	steepest := math.Max(math.Abs(left), math.Abs(right))
	if c, d, ok := closeIn(g, a, b, jumps); ok {
		if size := math.Abs(g(d) - g(c)); size > leastJump+16*rounding(ga)+4*steepest*(d-c) {
			return bisectJump(g, c, d), true
		}
	}
	farLeft, farRight := sides(h)
	change := right - left
	if !(math.Abs(change) > leastCorner*(1+steepest)) || !(math.Abs(change) > 0.8*math.Abs(farRight-farLeft)) {
		return brk{}, false
	}
	u := (ga - gb + right*b - left*a) / change // where the tangents meet
	u = math.Max(a, math.Min(b, u))
	return brk{u: u, corner: change, below: left, above: right}, true
}

// closeIn narrows an interval to a width, towards the second difference that sticks out most. False where g is not finite.
func closeIn(g func(float64) float64, a, b, width float64) (float64, float64, bool) {
	var v [9]float64
	var bend [9]float64 // second differences at the inner nodes
	for b-a > width {
		h := (b - a) / 8
		for j := range v {
			if v[j] = g(a + float64(j)*h); !finite(v[j]) {
				return a, b, false
			}
		}
		for j := 1; j <= 7; j++ {
			bend[j] = v[j-1] - 2*v[j] + v[j+1]
		}
		usual := slices.Clone(bend[1:8])
		slices.Sort(usual)
		best, most := 1, -1.0
		for j := 1; j <= 6; j++ { // between nodes j and j+1
			if m := math.Max(math.Abs(bend[j]-usual[3]), math.Abs(bend[j+1]-usual[3])); m > most {
				best, most = j, m
			}
		}
		// A corner between the nodes bends at both, a jump with both signs; one at a node bends there and at neither neighbour.
		if best < 6 && math.Abs(bend[best+1]-usual[3]) >= most && math.Abs(bend[best+2]-usual[3]) > math.Abs(bend[best]-usual[3]) {
			best++
		}
		a, b = a+float64(best-1)*h, a+float64(best+2)*h
	}
	return a, b, true
}

// bisectJump traces a jump to neighbouring numbers.
func bisectJump(g func(float64) float64, a, b float64) brk {
	fa, fb := g(a), g(b)
	for range 60 {
		m := a + (b-a)/2
		fm := g(m)
		if m == a || m == b || !finite(fm) {
			break
		}
		if math.Abs(fm-fa) >= math.Abs(fb-fm) {
			b, fb = m, fm
		} else {
			a, fa = m, fm
		}
	}
	return brk{u: b, jump: fb - fa, below: fa, above: fb}
}

// namedBreaksOf looks at the breakpoints that the law or the caller named, from either side and at the number itself.
func (x *examination) namedBreaksOf(l *line) (found []brk) {
	const beside, apart = 1e-9, 1e-4
	for _, named := range x.breakpoints {
		u := math.Log(named.Value)
		if named.By != l.along || !(u-3*apart > l.u[0] && u+3*apart < l.u[len(l.u)-1]) {
			continue
		}
		p := l.at
		*l.along.of(&p) = named.Value
		below, at, above := x.value(l, u-beside), x.ln(p), x.value(l, u+beside)
		slopes := [2]float64{(x.value(l, u-apart) - x.value(l, u-2*apart)) / apart,
			(x.value(l, u+2*apart) - x.value(l, u+apart)) / apart}
		steepest := math.Max(math.Abs(slopes[0]), math.Abs(slopes[1]))
		allowed := leastJump + 4*beside*steepest + 16*rounding(at)
		b := brk{line: l, u: u, jump: above - below, below: below, above: above}
		if off := at - below; math.Abs(off) > math.Abs(b.jump) {
			b.jump, b.above = off, at
		}
		if off := at - above; math.Abs(off) > math.Abs(b.jump) {
			b.jump, b.below = off, at
		}
		switch change := slopes[1] - slopes[0]; {
		case math.Abs(b.jump) > allowed:
			l.jumps = append(l.jumps, u)
			found = append(found, b)
		case math.Abs(change) > leastCorner*(1+steepest):
			found = append(found, brk{line: l, u: u, corner: change, below: slopes[0], above: slopes[1]})
		}
	}
	return found
}

// noteBreaks makes findings of the jumps and corners along one argument: one for each place if the lines agree on it, and one
// for all if the place moves with the other arguments.
func (x *examination) noteBreaks(along Argument, found []brk) {
	for _, jumps := range []bool{true, false} {
		var places []float64
		ofLine := map[*line]int{}
		most := 0 // on one line
		for _, b := range found {
			if (b.jump != 0) != jumps {
				continue
			}
			ofLine[b.line]++
			most = max(most, ofLine[b.line])
			if !slices.ContainsFunc(places, b.near) {
				places = append(places, b.u)
			}
		}
		slices.Sort(places)
		for _, b := range found {
			if (b.jump != 0) != jumps {
				continue
			}
			f := x.describeBreak(along, b)
			place := fmt.Sprint(slices.IndexFunc(places, b.near))
			if len(places) > most {
				place = ""
				f.Sentence += fmt.Sprintf(" The place moves with the other arguments, here between %.4g and %.4g.",
					math.Exp(places[0]), math.Exp(places[len(places)-1]))
			}
			x.note(f, math.Abs(b.jump)+math.Abs(b.corner), place)
		}
	}
}

func (b *brk) near(u float64) bool { return math.Abs(u-b.u) < samePlace }

func (x *examination) describeBreak(along Argument, b brk) Finding {
	p := b.line.point(b.u)
	at := fmt.Sprintf("%v %.6g", along, math.Exp(b.u))
	if unit := along.unit(&x.settings); unit != "" {
		at += " " + unit
	}
	if b.jump == 0 {
		f := x.found(SlopeJump, Remark, p)
		f.By = along
		f.Numbers = []Number{{"exponent below", b.below, ""}, {"exponent above", b.above, ""}}
		f.Sentence = fmt.Sprintf("The rate has a corner at %s, where its local exponent changes from %.4g to %.4g: the tangent there "+
			"is that of one side, and a Newton iteration across it may lose a step.", at, b.below, b.above)
		return f
	}
	f := x.found(RateJump, Fault, p)
	f.By = along
	f.Numbers = []Number{{"factor", math.Exp(b.jump), ""}}
	f.Sentence = fmt.Sprintf("The rate jumps by a factor of %.6g at %s: a step that would end there has no solution, or several.",
		math.Exp(b.jump), at)
	if along == Temperature {
		f.Sentence = fmt.Sprintf("The rate jumps by a factor of %.6g at %s: results depend on which side of it a temperature field "+
			"is rounded to.", math.Exp(b.jump), at)
		if math.Abs(b.jump) < 0.1 {
			f.Severity = Warning
		}
	}
	return f
}

// onsets are where the rate of a line becomes zero: continuously, as a threshold or a saturated strain does, or by a jump.
func (x *examination) onsets(l *line) {
	for i := 1; i < len(l.f); i++ {
		creeping, dead := i-1, i
		if math.IsInf(l.f[i-1], -1) {
			creeping, dead = i, i-1
		}
		if !finite(l.f[creeping]) || !math.IsInf(l.f[dead], -1) {
			continue
		}
		u, _ := edge(l.u[creeping], l.u[dead], func(u float64) bool { return math.IsInf(x.value(l, u), -1) })
		p := l.point(u)
		if x.ln(p)-l.f[creeping] > math.Log(1e-3) {
			f := x.found(RateJump, Fault, p)
			f.By = l.along
			f.Numbers = []Number{x.rateNumber("rate", math.Exp(x.ln(p)))}
			f.Sentence = fmt.Sprintf("The rate jumps between zero and %.4g at %v %.6g %s: a step that would end there has no solution, or several.",
				math.Exp(x.ln(p)), l.along, math.Exp(u), l.along.unit(&x.settings))
			l.jumps = append(l.jumps, u)
			x.note(f, math.Inf(1), "onset")
			continue
		}
		f := x.found(NoCreep, Remark, p)
		f.By = l.along
		f.Numbers = []Number{{l.along.String() + " at the edge", math.Exp(u), l.along.unit(&x.settings)}}
		f.Sentence = fmt.Sprintf("The rate is zero under stress in a part of the domain, as below a threshold or beyond the end of a "+
			"saturating curve: here at %v %.4g %s. A part there keeps its stress for ever.", l.along, math.Exp(u),
			l.along.unit(&x.settings))
		x.note(f, 0, "")
	}
}
