package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// Evaluations is the number of times LogRate evaluates the curve at a point: 0 for a closed form.
func (h StrainHardened) Evaluations(p creeplaw.Point) int { return h.find(p).evaluations }

// Robust is LogRate and LogTime by the search in logarithms alone, with its evaluations; ok is false for a curve that is no
// sum.
func (h StrainHardened) Robust(p creeplaw.Point) (rate creeplaw.LogRate, logTime float64, evaluations int, ok bool) {
	if h.terms == nil {
		return creeplaw.LogRate{}, 0, 0, false
	}
	r := findInMany(h.terms, p)
	if r.time > 0 {
		r.logTime = math.Log(r.time)
	}
	return r.rate, r.logTime, r.evaluations, true
}
