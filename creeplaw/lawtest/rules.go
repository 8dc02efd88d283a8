package lawtest

import (
	"fmt"
	"math"
	"runtime"
	"sync"
	"testing"

	"example.com/holdtime/creeplaw"
)

// rule is one thing a law must do. A rule of a capability is examined on the laws that have it.
type rule struct {
	name    string
	of      Capability // 0: of every law
	examine func(*examination, *tally)
}

// rules is the list to extend. The package comment says the same in words.
var rules = []rule{
	{"finite in the box", 0, finiteInTheBox},
	{"rate not negative", 0, notNegative},
	{"derivative by stress", 0, partialBy(stress)},
	{"derivative by strain", 0, partialBy(strain)},
	{"derivative by temperature", 0, partialBy(temperature)},
	{"zero stress", 0, zeroStress},
	{"zero strain", 0, zeroStrain},
	{"NaN stress gives NaN", 0, notANumber},
	{"same input, same bits", 0, sameBits},
	{"no allocation", 0, noAllocation},
	{"claimed capability", 0, claimed},
	{"logarithm of the rate", Logarithmic, logValue},
	{"log exponent of stress", Logarithmic, exponentOf(stress)},
	{"log exponent of strain", Logarithmic, exponentOf(strain)},
	{"log exponent of temperature", Logarithmic, exponentOf(temperature)},
	{"logarithm at zero", Logarithmic, logAtZero},
	{"explains what is undefined", Explainer, explains},
	{"sound variables", Evolving, variablesSound},
	{"evolution at the start", Evolving, initialRate},
	{"evolution finite", Evolving, evolutionFinite},
	{"derivatives of the evolution", Evolving, evolutionDerivatives},
	{"evolution of NaN is NaN", Evolving, evolutionNotANumber},
	{"blind to the principal stress", Evolving, blindToPrincipal},
	{"evolution has the same bits", Evolving, evolutionSameBits},
	{"evolution without allocation", Evolving, evolutionNoAllocation},
	{"sound parameters", Parametric, parametersSound},
	{"rebuilt from its parameters", Parametric, rebuilds},
	{"units of the parameters", Parametric, unitsOfParameters},
}

func finiteInTheBox(x *examination, y *tally) {
	y.due = len(x.points)
	for _, p := range x.points {
		r := x.law.Rate(p)
		y.that(finite(r.Value) && finite(r.ByStress) && finite(r.ByStrain) && finite(r.ByTemperature), p, func() string {
			return fmt.Sprintf("%+v", r)
		})
	}
}

func notNegative(x *examination, y *tally) {
	y.due = len(x.points)
	for _, p := range x.points {
		if v := x.law.Rate(p).Value; v < 0 {
			y.breaks(-v, p, func() string { return fmt.Sprintf("the rate is %g", v) })
		} else {
			y.checks++ // also of a NaN, which breaks another rule
		}
	}
}

// partialBy compares a partial derivative, times its argument, with the differences of the rate by the logarithm of it.
func partialBy(a argument) func(*examination, *tally) {
	return func(x *examination, y *tally) {
		y.due = len(x.points) * 4 / 5
		y.lacking = ": differences of the rate cannot resolve the derivative at the others"
		for _, p := range x.points {
			r := x.law.Rate(p)
			if !finite(r.Value) {
				continue // that breaks another rule
			}
			along := func(v float64) float64 {
				q := p
				*a.of(&q) = v
				return x.law.Rate(q).Value
			}
			at := *a.of(&p)
			d := logSlope(along, at, a.rangeIn(&x.box), roundingOfRate)
			given := a.partial(&r)
			y.derivative(x.box.DerivativeTolerance, given*at, d, math.Abs(r.Value), p, func() string {
				return fmt.Sprintf("the rate is %g, its derivative by %s %.12g, by differences %.12g ± %.1g",
					r.Value, a.name, given, d.value/at, d.bound/at)
			})
		}
	}
}

// derivative notes a comparison if the differences resolve the derivative at this point to the tolerance, on the scale of the
// derivative or of the function itself.
func (y *tally) derivative(tolerance, given float64, d slope, scale float64, p creeplaw.Point, what func() string) {
	if d.bound <= tolerance*math.Max(math.Abs(d.value), scale) {
		y.within(math.Abs(given-d.value), tolerance*math.Abs(d.value)+4*d.bound, p, what)
	}
}

// approaches are the values at which a limit at zero is looked for, the last one as near as numbers allow in any units.
var approaches = []float64{0x1p-300, 0x1p-500, 0x1p-1000}

// reached is how near to its limit a quantity must be at the last approach, as a part of its size in the box.
const reached = 0.01

func zeroStress(x *examination, y *tally) {
	y.due = 2 * len(x.points)
	if x.box.CreepsAtZeroStress {
		declaredAtZeroStress(x, y)
		return
	}
	for _, p := range x.points {
		if inBox := x.law.Rate(p).Value; finite(inBox) {
			p.Stress = approaches[len(approaches)-1]
			near := x.law.Rate(p).Value
			y.that(math.Abs(near) <= reached*math.Abs(inBox), p, func() string {
				return fmt.Sprintf("the rate, %g in the box, is still %g", inBox, near)
			})
		}
		p.Stress = 0
		for _, p.Strain = range []float64{p.Strain, 0} {
			r := x.law.Rate(p)
			y.that(r.Value == 0 && r.ByStrain == 0 && r.ByTemperature == 0 && !math.IsNaN(r.ByStress), p, func() string {
				return fmt.Sprintf("%+v, must be zero for every strain and temperature", r)
			})
		}
	}
}

func declaredAtZeroStress(x *examination, y *tally) {
	creeps := false
	for _, p := range x.points {
		p.Stress = 0
		for _, p.Strain = range []float64{p.Strain, 0} {
			v := x.law.Rate(p).Value
			creeps = creeps || v > 0
			y.that(v >= 0 && (finite(v) || p.Strain == 0), p, func() string { return fmt.Sprintf("the rate is %g", v) })
		}
	}
	y.overall(creeps, func() string { return "the box declares creep at zero stress, and there is none" })
}

func zeroStrain(x *examination, y *tally) {
	y.due = 2 * len(x.points)
	for _, p := range x.points {
		var path []float64
		if inBox := x.law.Rate(p).Value; finite(inBox) {
			path = append(path, inBox)
		}
		for _, p.Strain = range approaches {
			path = append(path, x.law.Rate(p).Value)
		}
		p.Strain = 0
		r := x.law.Rate(p)
		y.that(r.Value >= 0 && !math.IsNaN(r.ByStress) && !math.IsNaN(r.ByStrain) && !math.IsNaN(r.ByTemperature), p,
			func() string { return fmt.Sprintf("%+v, must be zero, positive or +Inf, its derivatives not NaN", r) })
		y.that(leadsTo(path, r.Value), p, func() string {
			return fmt.Sprintf("the rate is %g, but as the strain falls from the box to %.3g it is %.6g", r.Value, approaches, path)
		})
	}
}

// leadsTo tells whether the rates on a path to zero strain have come near a finite limit, or keep growing to an infinite one.
func leadsTo(path []float64, limit float64) bool {
	last := len(path) - 1
	if !math.IsInf(limit, 1) {
		return math.Abs(path[last]-limit) <= reached*math.Max(math.Abs(path[0]), math.Abs(limit))
	}
	for i := range last {
		if !(path[i+1] > path[i] || math.IsInf(path[i+1], 1)) {
			return false
		}
	}
	return true
}

func notANumber(x *examination, y *tally) {
	y.due = len(x.points)
	for _, p := range x.points {
		p.Stress = math.NaN()
		v := x.law.Rate(p).Value
		y.that(math.IsNaN(v), p, func() string { return fmt.Sprintf("the rate is %g", v) })
	}
}

// sameBits asks for every point once more, in the opposite order, and then from several goroutines at once, each in an
// order of its own.
func sameBits(x *examination, y *tally) {
	n := len(x.points)
	y.due = n * (1 + workers)
	first := make([]answers, n)
	for i := range first {
		first[i] = x.ask(i)
	}
	again := make([][]answers, 1+workers)
	for w := range again {
		again[w] = make([]answers, n)
	}
	for i := n - 1; i >= 0; i-- {
		again[0][i] = x.ask(i)
	}
	var group sync.WaitGroup
	for w := 1; w <= workers; w++ {
		group.Go(func() {
			for i := range n {
				at := (i + w*n/workers) % n
				again[w][at] = x.ask(at)
			}
		})
	}
	group.Wait()
	for w := range again {
		for i, p := range x.points {
			y.that(bits(again[w][i]) == bits(first[i]), p, func() string {
				who := fmt.Sprintf("goroutine %d", w)
				if w == 0 {
					who = "the second time"
				}
				return fmt.Sprintf("first %+v, %s %+v", first[i], who, again[w][i])
			})
		}
	}
}

const workers = 4

type answers struct {
	rate creeplaw.Rate
	log  creeplaw.LogRate
}

func (x *examination) ask(i int) (a answers) {
	a.rate = x.law.Rate(x.points[i])
	if x.logarithmic != nil {
		a.log = x.logarithmic.LogRate(x.logPoints[i])
	}
	return a
}

func bits(a answers) [8]uint64 {
	f := math.Float64bits
	r, l := a.rate, a.log
	return [8]uint64{f(r.Value), f(r.ByStress), f(r.ByStrain), f(r.ByTemperature),
		f(l.Value), f(l.ByLogStress), f(l.ByLogStrain), f(l.ByLogTemperature)}
}

// noAllocation counts over all points at once: what is allocated at some of them only would vanish in an average. Other
// goroutines of the test program may allocate meanwhile, so the least of several counts is taken.
func noAllocation(x *examination, y *tally) {
	special := append([]creeplaw.Point{{}, {Stress: math.NaN()}}, x.points...)
	for i, p := range x.points[:8] {
		special = append(special, creeplaw.Point{Strain: p.Strain, Temperature: p.Temperature})
		special = append(special, creeplaw.Point{Stress: x.points[i].Stress, Temperature: p.Temperature})
	}
	least, err := math.Inf(1), error(nil)
	for range 5 {
		n, e := allocations(func() {
			for _, p := range special {
				runtime.KeepAlive(x.law.Rate(p).Value)
			}
			if x.logarithmic != nil {
				for _, p := range x.logPoints {
					runtime.KeepAlive(x.logarithmic.LogRate(p).Value)
				}
			}
		})
		least, err = math.Min(least, n), e
	}
	y.overall(err == nil, func() string { return err.Error() })
	y.overall(!(least > 0), func() string {
		return fmt.Sprintf("%.0f allocations over %d points of the box", least, len(special))
	})
}

// allocations is testing.AllocsPerRun, which panics in a parallel test.
func allocations(f func()) (n float64, err error) {
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("allocations cannot be counted: %v", r)
		}
	}()
	return testing.AllocsPerRun(3, f), nil
}

func claimed(x *examination, y *tally) {
	y.overall(true, nil) // a creeplaw.Law it is, or it would not have come here
	held := x.capabilities()
	for _, c := range capabilities {
		if x.box.Claims&c.claim != 0 {
			y.overall(held&c.claim != 0, func() string {
				return "the law is not a " + c.name + ": is the method missing, or its signature another?"
			})
		}
	}
}

func finite(x float64) bool { return x-x == 0 }
