package lawtest

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// tally counts the checks of one rule and keeps the worst failure.
type tally struct {
	checks, due int // made; and how many there must be at the least
	lacking     string
	broken      int
	worst       float64 // largest finite deviation, passed or not
	badness     float64 // deviation of the failure kept
	where, what string
}

// within notes one comparison: a deviation against what is allowed for it. A NaN in either breaks the rule.
func (y *tally) within(deviation, allowed float64, p creeplaw.Point, what func() string) {
	ratio := deviation / allowed
	if deviation <= allowed { // also 0 of 0
		if ratio > y.worst {
			y.worst = ratio
		}
		y.checks++
		return
	}
	if math.IsNaN(ratio) {
		ratio = math.Inf(1)
	}
	if !math.IsInf(ratio, 1) && ratio > y.worst {
		y.worst = ratio
	}
	y.breaks(ratio, p, what)
}

// that notes one yes or no.
func (y *tally) that(ok bool, p creeplaw.Point, what func() string) {
	if ok {
		y.checks++
		return
	}
	y.breaks(1, p, what)
}

// overall notes a yes or no about the law as a whole.
func (y *tally) overall(ok bool, what func() string) {
	y.checks++
	if !ok {
		y.broken++
		y.badness, y.where, y.what = math.Inf(1), "", what()
	}
}

func (y *tally) breaks(badness float64, p creeplaw.Point, what func() string) {
	y.checks++
	y.broken++
	if y.what == "" || badness > y.badness {
		y.badness, y.what = badness, what()
		y.where = fmt.Sprintf(", the worst at stress %.9g, strain %.9g, temperature %.9g", p.Stress, p.Strain, p.Temperature)
	}
}

// report makes at most two failures of a rule: broken, and examined too little.
func (y *tally) report(t TB, rule, law string, seed uint64) {
	t.Helper()
	if y.broken > 0 {
		t.Errorf("lawtest: %s breaks the rule %q in %d of %d checks (seed %d)%s: %s", law, rule, y.broken, y.checks, seed,
			y.where, y.what)
	}
	if due := max(y.due, 1); y.checks < due {
		t.Errorf("lawtest: %s leaves the rule %q with %d checks, fewer than the %d due (seed %d)%s",
			law, rule, y.checks, due, seed, y.lacking)
	}
}
