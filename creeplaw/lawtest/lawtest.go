package lawtest

import (
	"fmt"
	"math"
	"strings"

	"example.com/holdtime/creeplaw"
)

// TB is the part of testing.TB that the kit needs. A *testing.T is one.
type TB interface {
	Helper()
	Errorf(format string, args ...any)
}

// Range is an interval from its first value to its second.
type Range [2]float64

// Box says where a law is to be examined and what it claims to be. Stress, Strain, Temperature and Claims must be given.
type Box struct {
	Claims Capability // what the law must be able to do besides Rate; RateOnly if nothing

	Stress      Range // above zero [stress]; where the plain rate is neither too large nor too small for a float64
	Strain      Range // above zero [-]
	Temperature Range // above zero [K]; any, if the law does not depend on it

	// LogStress is the range of stress for the rules of the capability Logarithmic. The zero Range is Stress widened by ten
	// decades at either end, where most plain rates have left the range of a float64.
	LogStress Range

	// Internal are the ranges of the internal variables of an Evolving law, in its order; they may include 0 and negative
	// values.
	Internal []Range

	// CreepsAtZeroStress declares that the law creeps under no stress, as an exponential of stress does. Zero stress must
	// then give a finite rate, and above zero somewhere, or the declaration itself is a failure.
	CreepsAtZeroStress bool

	// DerivativeTolerance is the relative error allowed to a derivative. Zero is 1e-8.
	DerivativeTolerance float64

	Points int    // random points besides the corners; zero is 1000, fewer than 50 are refused
	Seed   uint64 // of the random points; the same seed gives the same points
}

// Capability is a set of optional capabilities of a law.
type Capability uint

// The capabilities of package creeplaw that the kit exercises.
const (
	RateOnly    Capability = 1 << iota // none: the law is just a creeplaw.Law
	Logarithmic                        // creeplaw.Logarithmic
	Explainer                          // creeplaw.Explainer
	Evolving                           // creeplaw.Evolving
	Parametric                         // creeplaw.Parametric
)

// capabilities is the list to extend when package creeplaw gains one; the rules that exercise it go to the list of rules.
var capabilities = []struct {
	claim Capability
	name  string
	has   func(creeplaw.Law) bool
}{
	{Logarithmic, "creeplaw.Logarithmic", func(l creeplaw.Law) bool { _, ok := l.(creeplaw.Logarithmic); return ok }},
	{Explainer, "creeplaw.Explainer", func(l creeplaw.Law) bool { _, ok := l.(creeplaw.Explainer); return ok }},
	{Evolving, "creeplaw.Evolving", func(l creeplaw.Law) bool { _, ok := l.(creeplaw.Evolving); return ok }},
	{Parametric, "creeplaw.Parametric", func(l creeplaw.Law) bool { _, ok := l.(creeplaw.Parametric); return ok }},
}

// Result tells how one rule fared.
type Result struct {
	Rule   string
	Checks int     // comparisons made
	Broken int     // of those, not passed
	Worst  float64 // largest deviation found, as a multiple of the allowed one; 0 where a rule knows only yes and no
}

// Run holds the law to every rule that applies to it and reports each broken one through t.Errorf. It returns what it did,
// rule by rule, for printing. Do not call it from a parallel test: allocations cannot be counted there, which is a failure.
func Run(t TB, law creeplaw.Law, box Box) []Result {
	t.Helper()
	if law == nil {
		t.Errorf("lawtest: there is no law")
		return nil
	}
	box, err := box.complete()
	if err != nil {
		t.Errorf("lawtest: the box: %v", err)
		return nil
	}
	x := &examination{law: law, box: box, points: box.sample(box.Stress)}
	x.logarithmic, _ = law.(creeplaw.Logarithmic)
	x.explainer, _ = law.(creeplaw.Explainer)
	x.parametric, _ = law.(creeplaw.Parametric)
	if x.logarithmic != nil {
		x.logPoints = box.sample(box.LogStress)
	}
	if x.evolving, _ = law.(creeplaw.Evolving); x.evolving != nil {
		x.evolvingPoints = box.sampleEvolving(x.points)
	}
	held := x.capabilities()
	var results []Result
	for _, r := range rules {
		if r.of != 0 && held&r.of == 0 {
			continue // "claimed capability" fails when it ought to be there
		}
		y := &tally{}
		r.examine(x, y)
		y.report(t, r.name, fmt.Sprintf("%T", law), box.Seed)
		results = append(results, Result{r.name, y.checks, y.broken, y.worst})
	}
	return results
}

// examination is a law and where to look at it.
type examination struct {
	law         creeplaw.Law
	logarithmic creeplaw.Logarithmic // nil if the law is not
	explainer   creeplaw.Explainer   // nil if the law is not
	parametric  creeplaw.Parametric  // nil if the law is not
	box         Box
	points      []creeplaw.Point // in the box
	logPoints   []creeplaw.Point // in the box, over LogStress

	evolving       creeplaw.Evolving // nil if the law is not
	evolvingPoints []creeplaw.EvolvingPoint
}

func (x *examination) capabilities() (held Capability) {
	for _, c := range capabilities {
		if c.has(x.law) {
			held |= c.claim
		}
	}
	return held
}

// complete fills in the defaults and says what is wrong with a box.
func (b Box) complete() (Box, error) {
	if b.LogStress == (Range{}) {
		b.LogStress = Range{b.Stress[0] * 1e-10, b.Stress[1] * 1e10}
	}
	if b.DerivativeTolerance == 0 {
		b.DerivativeTolerance = 1e-8
	}
	if b.Points == 0 {
		b.Points = 1000
	}
	for _, r := range []struct {
		name string
		Range
	}{{"Stress", b.Stress}, {"Strain", b.Strain}, {"Temperature", b.Temperature}, {"LogStress", b.LogStress}} {
		if !(r.Range[0] > 0 && r.Range[0] < r.Range[1] && !math.IsInf(r.Range[1], 1)) {
			return b, fmt.Errorf("%s is from %v to %v, must rise between positive finite numbers", r.name, r.Range[0], r.Range[1])
		}
	}
	for i, r := range b.Internal {
		if !(r[0] < r[1]) || math.IsInf(r[1]-r[0], 1) {
			return b, fmt.Errorf("the range of Internal %d is from %v to %v, must rise between finite numbers", i, r[0], r[1])
		}
	}
	if !(b.DerivativeTolerance > 0 && b.DerivativeTolerance <= 1e-2) {
		return b, fmt.Errorf("DerivativeTolerance is %v, must be above 0 and at most 0.01", b.DerivativeTolerance)
	}
	if b.Points < 50 {
		return b, fmt.Errorf("number of Points is %d, must be 50 or more", b.Points)
	}
	return b, b.Claims.check()
}

func (c Capability) check() error {
	known, names := RateOnly, []string{"RateOnly"}
	for _, k := range capabilities {
		known |= k.claim
		names = append(names, strings.TrimPrefix(k.name, "creeplaw."))
	}
	if c == 0 || c&^known != 0 || c&RateOnly != 0 && c != RateOnly {
		return fmt.Errorf("set of Claims is %b, must be RateOnly or a union of the others: %s", c, strings.Join(names, ", "))
	}
	return nil
}
