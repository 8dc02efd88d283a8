package integrate

import "math"

// What the walk asks of the curve between two of its points.

// bends reports whether the curve between here and y may have done something that the directions at both ends do not tell of,
// such as turning back and forth: when some coordinate did not change as they say over a length, or the softening by the creep
// strain changed much.
func (w *walker) bends(y *node, here, there *direction, length float64) bool {
	n := w.size()
	way := w.way(y)
	astray := func(i int, weight, free float64) bool {
		byEnds := 0.5 * length * (here[i] + there[i])
		return weight*math.Abs(way[i]-byEnds) > 0.2*weight*math.Abs(byEnds)+free
	}
	bent := astray(n, 1, 1e-3) || w.softens(y)
	if w.creeps {
		bent = bent || astray(w.count, 1, 0.1)
	}
	for i := range w.count {
		bent = bent || astray(i, w.weight(y, i), 0.1)
	}
	if bent || !(here[n] > 0 && there[n] > 0) {
		return bent
	}
	terms := math.Abs(y.logTime) + math.Abs(y.rate.LogRate)
	for i := range w.count {
		terms += w.weight(y, i) * math.Abs(y.v[i])
	}
	return dip(way[n], length*here[n], length*there[n]) > 64*epsilon*terms
}

// softens reports whether the softening by the creep strain, which no coordinate stands for, has changed much from here to y.
func (w *walker) softens(y *node) bool {
	before, after := w.at.share*w.at.rate.Creep.ByLogStrain, y.share*y.rate.Creep.ByLogStrain
	return math.Abs(after-before) > 0.3*(1+math.Abs(before)) && max(before, after) > 0
}

// turn is the weighted difference between the direction of the curve here and at y, both of length 1.
func (w *walker) turn(y *node, along *direction) float64 {
	scale := 1 / w.reach(y, along)
	var d direction
	for i := range d {
		d[i] = along[i]*scale - w.along[i]
	}
	return w.reach(y, &d)
}

// way is the change of the coordinates from here to y.
func (w *walker) way(y *node) (d direction) {
	for i := range w.count {
		d[i] = y.v[i] - w.at.v[i]
	}
	if w.creeps {
		d[w.count] = math.Log(y.odds / w.at.odds)
	}
	d[w.size()] = y.logTime - w.at.logTime
	return d
}

// dip is how far the cubic with the values 0 and b and the slopes da, db > 0 at the ends of [0, 1] falls on the way.
func dip(b, da, db float64) float64 {
	c2, c3 := 3*b-2*da-db, da+db-2*b
	root := c2*c2 - 3*c3*da
	if !(root > 0) {
		return max(0, -b)
	}
	at := func(s float64) float64 { return s * (da + s*(c2+s*c3)) }
	root = math.Sqrt(root)
	top, bottom := da/(root-c2), da/(-root-c2) // where the slope vanishes, in the form that does not cancel
	if !(top > 0 && bottom > top && bottom < 1) {
		return max(0, -b)
	}
	return at(top) - at(bottom)
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
	return max(max(a, b), a+s*(da+s*(c2+s*c3)))
}
