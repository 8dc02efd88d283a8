package lawcard

import (
	"math"
	"sync/atomic"

	"example.com/holdtime/creeplaw"
)

// Observer is told of every evaluation of a watched law outside its tested range. It is called from wherever the law is, by
// many goroutines at once, several times per material point and step: it must be safe for that and must not allocate.
type Observer interface{ Outside(Excursion) }

// Excursion is one evaluation outside the tested range, in one quantity.
type Excursion struct {
	Quantity Quantity
	Value    float64
	Tested   Interval
	Point    creeplaw.Point
}

// Watch returns the law of the card, with the same numbers, which tells the observer of every evaluation outside the tested
// range. It is Logarithmic and an Explainer, and Evolving if the law is; it does not allocate. A nil observer is told nothing.
//
// An implicit step evaluates the law also where it does not end, at trial stresses above and, on its way, below the solution,
// and at zero stress where a part is unloaded: excursions are to be read as "the law was asked there". What a host accepts as
// the state of the material it holds to Check.
func (c Card) Watch(o Observer) creeplaw.Law {
	if c.Law == nil || o == nil {
		return c.Law
	}
	w := watched{law: creeplaw.Log(c.Law), tested: c.Tested, name: c.Name, observer: o}
	if e, ok := c.Law.(creeplaw.Evolving); ok {
		return &watchedEvolving{w, e}
	}
	return &w
}

// watched is used by pointer: it is large, and never changes.
type watched struct {
	law      creeplaw.Logarithmic
	tested   Range
	name     string
	observer Observer
}

// watchedEvolving is a watched law with internal variables.
type watchedEvolving struct {
	watched
	evolving creeplaw.Evolving
}

var (
	_ creeplaw.Logarithmic = (*watched)(nil)
	_ creeplaw.Explainer   = (*watched)(nil)
	_ creeplaw.Logarithmic = (*watchedEvolving)(nil)
	_ creeplaw.Explainer   = (*watchedEvolving)(nil)
	_ creeplaw.Evolving    = (*watchedEvolving)(nil)
)

func (w *watched) look(p creeplaw.Point) {
	for q, x := range coordinates(p) {
		if i := w.tested.of(Quantity(q)); !i.Contains(x) {
			w.observer.Outside(Excursion{Quantity(q), x, i, p})
		}
	}
}

// Rate is that of the law.
func (w *watched) Rate(p creeplaw.Point) creeplaw.Rate {
	w.look(p)
	return w.law.Rate(p)
}

// LogRate is that of the law.
func (w *watched) LogRate(p creeplaw.Point) creeplaw.LogRate {
	w.look(p)
	return w.law.LogRate(p)
}

// CheckPoint says why the law is undefined at a point. A point outside the tested range is not for that reason.
func (w *watched) CheckPoint(p creeplaw.Point) error {
	if x, ok := w.law.(creeplaw.Explainer); ok {
		return x.CheckPoint(p)
	}
	if math.IsNaN(w.law.LogRate(p).Value) {
		return &creeplaw.UndefinedError{Law: w.name, Point: p}
	}
	return nil
}

// Variables are those of the law.
func (w *watchedEvolving) Variables() []creeplaw.Variable { return w.evolving.Variables() }

// SeesPrincipal is that of the law.
func (w *watchedEvolving) SeesPrincipal() bool { return w.evolving.SeesPrincipal() }

// Evolve is that of the law.
func (w *watchedEvolving) Evolve(p creeplaw.EvolvingPoint) creeplaw.Evolution {
	w.look(p.Point)
	return w.evolving.Evolve(p)
}

// Tally is an Observer that counts excursions and remembers how far they went. The zero Tally is ready. It must not be copied.
type Tally struct{ of [quantities]tally }

type tally struct {
	count atomic.Uint64
	// Bits of the lowest value below the range and of the highest above it, plus one; zero for none. The bits of numbers that
	// are not negative are in the order of the numbers.
	lowest, highest atomic.Uint64
}

var _ Observer = (*Tally)(nil)

// Outside counts an excursion.
func (t *Tally) Outside(x Excursion) {
	one := &t.of[x.Quantity]
	one.count.Add(1)
	if !(x.Value >= 0) {
		return // no number to remember
	}
	bits := math.Float64bits(x.Value) + 1
	if x.Value > x.Tested.High {
		extend(&one.highest, bits, func(old uint64) bool { return bits > old })
	} else {
		extend(&one.lowest, bits, func(old uint64) bool { return old == 0 || bits < old })
	}
}

func extend(to *atomic.Uint64, bits uint64, further func(old uint64) bool) {
	for old := to.Load(); further(old); old = to.Load() {
		if to.CompareAndSwap(old, bits) {
			return
		}
	}
}

// Count is the number of excursions in a quantity so far.
func (t *Tally) Count(q Quantity) uint64 { return t.of[q].count.Load() }

// Lowest is the lowest value seen below the tested range; false if there was none.
func (t *Tally) Lowest(q Quantity) (float64, bool) { return remembered(&t.of[q].lowest) }

// Highest is the highest value seen above the tested range; false if there was none.
func (t *Tally) Highest(q Quantity) (float64, bool) { return remembered(&t.of[q].highest) }

func remembered(bits *atomic.Uint64) (float64, bool) {
	b := bits.Load()
	return math.Float64frombits(b - min(b, 1)), b != 0
}
