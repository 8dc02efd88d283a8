package lawtest

import (
	"fmt"
	"math"
	"math/rand/v2"
	"runtime"

	"example.com/holdtime/creeplaw"
)

// variablesSound looks at what the law says of itself.
func variablesSound(x *examination, y *tally) {
	variables := x.evolving.Variables()
	y.overall(len(variables) <= creeplaw.MaxVariables, func() string {
		return fmt.Sprintf("%d variables, at most %d are possible", len(variables), creeplaw.MaxVariables)
	})
	y.overall(len(variables) == len(x.box.Internal), func() string {
		return fmt.Sprintf("the law has %d internal variables, the box ranges for %d", len(variables), len(x.box.Internal))
	})
	for _, v := range variables {
		y.overall(v.Name != "" && finite(v.Initial) && v.Limit != v.Initial && !math.IsNaN(v.Limit), func() string {
			return fmt.Sprintf("variable %+v must have a name, a finite initial value, and a limit apart from it", v)
		})
	}
}

// initialRate compares the plain rate with the evolution of virgin material in tension.
func initialRate(x *examination, y *tally) {
	y.due = len(x.points) / 2
	y.lacking = ": the plain rate has underflowed at the others"
	var initial [creeplaw.MaxVariables]float64
	for i, v := range x.evolving.Variables() {
		initial[i] = v.Initial
	}
	for _, p := range x.points {
		plain := x.law.Rate(p).Value
		if plain < 0x1p-1022 || !finite(plain) {
			continue
		}
		e := x.evolving.Evolve(creeplaw.InTension(p, initial))
		y.within(math.Abs(e.LogRate-math.Log(plain)), logTolerance*(1+math.Abs(e.LogRate)+math.Abs(e.Creep.ByLogStress)), p,
			func() string { return fmt.Sprintf("the rate is %g, Evolve says e^%.9g", plain, e.LogRate) })
	}
}

func evolutionFinite(x *examination, y *tally) {
	y.due = len(x.evolvingPoints)
	count := len(x.evolving.Variables())
	for _, p := range x.evolvingPoints {
		e := x.evolving.Evolve(p)
		ok := finite(e.LogRate) && partialsFinite(&e.Creep)
		for i := range e.Internal {
			r := &e.Internal[i]
			if i < count {
				ok = ok && (finite(r.LogScale) || math.IsInf(r.LogScale, -1)) && finite(r.Value) && partialsFinite(&r.Partials)
			} else {
				ok = ok && *r == creeplaw.InternalRate{}
			}
		}
		y.that(ok, p.Point, func() string {
			return fmt.Sprintf("%s gives %+v: finite, and nothing for variables the law has not", describe(&p), e)
		})
	}
}

func partialsFinite(p *creeplaw.Partials) bool {
	s := p.ByLogStress + p.ByMeanStress + p.ByPrincipalStress + p.ByLogStrain + p.ByLogTemperature
	for _, v := range p.ByInternal {
		s += v
	}
	return finite(s)
}

func describe(p *creeplaw.EvolvingPoint) string {
	return fmt.Sprintf("mean stress %.9g, principal stress %.9g, variables %.9g", p.MeanStress, p.PrincipalStress, p.Internal)
}

// coordinate is one argument of Evolve.
type coordinate struct {
	name    string
	of      func(*creeplaw.EvolvingPoint) *float64
	partial func(*creeplaw.Partials) float64
	log     bool  // whether the partial is by the logarithm
	within  Range // of the argument; for the two stresses, over the von Mises stress
	scaled  bool  // with the von Mises stress
}

func (x *examination) coordinates() []coordinate {
	all := []coordinate{
		{"stress", func(p *creeplaw.EvolvingPoint) *float64 { return &p.Stress },
			func(d *creeplaw.Partials) float64 { return d.ByLogStress }, true, x.box.Stress, false},
		{"strain", func(p *creeplaw.EvolvingPoint) *float64 { return &p.Strain },
			func(d *creeplaw.Partials) float64 { return d.ByLogStrain }, true, x.box.Strain, false},
		{"temperature", func(p *creeplaw.EvolvingPoint) *float64 { return &p.Temperature },
			func(d *creeplaw.Partials) float64 { return d.ByLogTemperature }, true, x.box.Temperature, false},
		{"mean stress", func(p *creeplaw.EvolvingPoint) *float64 { return &p.MeanStress },
			func(d *creeplaw.Partials) float64 { return d.ByMeanStress }, false, Range{-4, 4}, true},
	}
	if x.evolving.SeesPrincipal() {
		all = append(all, coordinate{"principal stress", func(p *creeplaw.EvolvingPoint) *float64 { return &p.PrincipalStress },
			func(d *creeplaw.Partials) float64 { return d.ByPrincipalStress }, false, Range{-4, 5}, true})
	}
	for i, r := range x.box.Internal {
		all = append(all, coordinate{fmt.Sprintf("variable %d", i),
			func(p *creeplaw.EvolvingPoint) *float64 { return &p.Internal[i] },
			func(d *creeplaw.Partials) float64 { return d.ByInternal[i] }, false, r, false})
	}
	return all
}

// slopeOf differentiates g by a coordinate at a point, in the unit that is returned: by the logarithm, or by the argument over
// a width about as large as its range.
func (c *coordinate) slopeOf(g func(creeplaw.EvolvingPoint) float64, p creeplaw.EvolvingPoint,
	rounding func(float64) float64) (d slope, unit float64) {
	at := *c.of(&p)
	if c.log {
		return logSlope(func(v float64) float64 {
			q := p
			*c.of(&q) = v
			return g(q)
		}, at, c.within, rounding), 1
	}
	within := c.within
	if c.scaled {
		within = Range{within[0] * p.Stress, within[1] * p.Stress}
	}
	unit = 2 * (within[1] - within[0])
	along := func(t float64) float64 {
		q := p
		*c.of(&q) = at + (t-1)*unit
		return g(q)
	}
	return logSlope(along, 1, Range{1 + (within[0]-at)/unit, 1 + (within[1]-at)/unit}, rounding), unit
}

// evolutionDerivatives compares all partial derivatives with differences: of ln ṗ, and of the rate of each variable in the
// scale it has at the point.
func evolutionDerivatives(x *examination, y *tally) {
	count, coordinates := len(x.evolving.Variables()), x.coordinates()
	y.due = len(x.evolvingPoints) * (1 + count) * len(coordinates) * 4 / 5
	y.lacking = ": differences cannot resolve the derivative at the others"
	for _, p := range x.evolvingPoints {
		e := x.evolving.Evolve(p)
		for k := range coordinates {
			c := &coordinates[k]
			d, unit := c.slopeOf(func(q creeplaw.EvolvingPoint) float64 { return x.evolving.Evolve(q).LogRate }, p, roundingOfLog)
			y.evolution(x, c, p, "the logarithm of the creep rate", e.LogRate, 1, c.partial(&e.Creep)*unit, d, unit)
			for i := range count {
				r := e.Internal[i]
				scale := r.LogScale
				if math.IsInf(scale, -1) {
					scale = 0
				}
				rate := func(q creeplaw.EvolvingPoint) float64 {
					at := x.evolving.Evolve(q).Internal[i]
					return at.Value * math.Exp(at.LogScale-scale)
				}
				rounding := func(v float64) float64 { return epsilon * (4 + math.Abs(scale)) * math.Abs(v) }
				given := c.partial(&r.Partials) * unit
				if math.IsInf(r.LogScale, -1) {
					given = 0
				}
				d, _ := c.slopeOf(rate, p, rounding)
				y.evolution(x, c, p, fmt.Sprintf("the rate of variable %d over e^%.9g", i, scale), r.Value, math.Abs(r.Value), given, d, unit)
			}
		}
	}
}

func (y *tally) evolution(x *examination, c *coordinate, p creeplaw.EvolvingPoint, what string, value, scale, given float64,
	d slope, unit float64) {
	y.derivative(x.box.DerivativeTolerance, given, d, scale, p.Point, func() string {
		return fmt.Sprintf("%s: %s is %.9g, its derivative by %s %.12g, by differences %.12g ± %.1g", describe(&p), what, value,
			c.name, given/unit, d.value/unit, d.bound/unit)
	})
}

func evolutionNotANumber(x *examination, y *tally) {
	y.due = len(x.evolvingPoints)
	for _, p := range x.evolvingPoints {
		p.Stress = math.NaN()
		v := x.evolving.Evolve(p).LogRate
		y.that(math.IsNaN(v), p.Point, func() string { return fmt.Sprintf("LogRate is %g at a stress that is NaN", v) })
	}
}

// blindToPrincipal holds a law that says it does not see the greatest principal stress to its word.
func blindToPrincipal(x *examination, y *tally) {
	y.due = len(x.evolvingPoints)
	for _, p := range x.evolvingPoints {
		if x.evolving.SeesPrincipal() {
			y.checks++
			continue
		}
		q := p
		q.PrincipalStress = math.NaN()
		y.that(x.evolving.Evolve(p) == x.evolving.Evolve(q), p.Point, func() string {
			return "the law says that it does not see the greatest principal stress, and it does"
		})
	}
}

func evolutionSameBits(x *examination, y *tally) {
	y.due = len(x.evolvingPoints)
	first := make([]creeplaw.Evolution, len(x.evolvingPoints))
	for i, p := range x.evolvingPoints {
		first[i] = x.evolving.Evolve(p)
	}
	for i := len(first) - 1; i >= 0; i-- {
		again := x.evolving.Evolve(x.evolvingPoints[i])
		y.that(again == first[i], x.evolvingPoints[i].Point, func() string {
			return fmt.Sprintf("first %+v, then %+v", first[i], again)
		})
	}
}

func evolutionNoAllocation(x *examination, y *tally) {
	least, err := math.Inf(1), error(nil)
	for range 5 {
		n, e := allocations(func() {
			for _, p := range x.evolvingPoints {
				runtime.KeepAlive(x.evolving.Evolve(p).LogRate)
			}
		})
		least, err = math.Min(least, n), e
	}
	y.overall(err == nil, func() string { return err.Error() })
	y.overall(!(least > 0), func() string { return fmt.Sprintf("%.0f allocations over the box", least) })
}

// sampleEvolving adds to points in the box random values of the variables, a mean stress between minus and plus twice the von
// Mises stress, and a greatest principal stress that can go with both.
func (b Box) sampleEvolving(points []creeplaw.Point) []creeplaw.EvolvingPoint {
	rng := rand.New(rand.NewPCG(b.Seed, 0x65766f6c7665))
	out := make([]creeplaw.EvolvingPoint, len(points))
	for i, p := range points {
		q := creeplaw.EvolvingPoint{Point: p, MeanStress: p.Stress * (4*rng.Float64() - 2)}
		q.PrincipalStress = q.MeanStress + p.Stress*(1+rng.Float64())/3
		for j, r := range b.Internal {
			if j < len(q.Internal) {
				q.Internal[j] = r[0] + (r[1]-r[0])*rng.Float64()
			}
		}
		out[i] = q
	}
	return out
}
