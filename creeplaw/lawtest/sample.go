package lawtest

import (
	"math"
	"math/rand/v2"

	"example.com/holdtime/creeplaw"
)

// sample returns the corners of the box and log-uniform points in it.
func (b Box) sample(stress Range) []creeplaw.Point {
	points := make([]creeplaw.Point, 0, 8+b.Points)
	for _, s := range stress {
		for _, e := range b.Strain {
			for _, t := range b.Temperature {
				points = append(points, creeplaw.Point{Stress: s, Strain: e, Temperature: t})
			}
		}
	}
	rng := rand.New(rand.NewPCG(b.Seed, 0x6c617774657374))
	for range b.Points {
		points = append(points, creeplaw.Point{Stress: stress.draw(rng), Strain: b.Strain.draw(rng), Temperature: b.Temperature.draw(rng)})
	}
	return points
}

// draw is log-uniform in the range.
func (r Range) draw(rng *rand.Rand) float64 {
	x := r[0] * math.Exp(rng.Float64()*math.Log(r[1]/r[0]))
	return math.Min(math.Max(x, r[0]), r[1])
}

// argument is one of the three arguments of a law, with the derivatives that belong to it.
type argument struct {
	name     string
	of       func(*creeplaw.Point) *float64
	rangeIn  func(*Box) Range
	partial  func(*creeplaw.Rate) float64
	exponent func(*creeplaw.LogRate) float64
}

var (
	stress = argument{"stress", func(p *creeplaw.Point) *float64 { return &p.Stress },
		func(b *Box) Range { return b.Stress },
		func(r *creeplaw.Rate) float64 { return r.ByStress },
		func(l *creeplaw.LogRate) float64 { return l.ByLogStress }}
	strain = argument{"strain", func(p *creeplaw.Point) *float64 { return &p.Strain },
		func(b *Box) Range { return b.Strain },
		func(r *creeplaw.Rate) float64 { return r.ByStrain },
		func(l *creeplaw.LogRate) float64 { return l.ByLogStrain }}
	temperature = argument{"temperature", func(p *creeplaw.Point) *float64 { return &p.Temperature },
		func(b *Box) Range { return b.Temperature },
		func(r *creeplaw.Rate) float64 { return r.ByTemperature },
		func(l *creeplaw.LogRate) float64 { return l.ByLogTemperature }}
)
