package audit

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// axes are the arguments of a plain law.
var axes = [3]Argument{Stress, Strain, Temperature}

// of is the coordinate of a point that an argument means.
func (a Argument) of(p *creeplaw.Point) *float64 {
	switch a {
	case Stress:
		return &p.Stress
	case Strain:
		return &p.Strain
	}
	return &p.Temperature
}

func (a Argument) unit(s *Settings) string {
	switch a {
	case Stress, MeanStress, PrincipalStress:
		return s.stressUnit()
	case Temperature:
		return "K"
	case Time:
		return s.timeUnit()
	}
	return ""
}

func (d *Domain) along(a Argument) Range {
	switch a {
	case Stress:
		return d.Stress
	case Strain:
		return d.Strain
	}
	return d.Temperature
}

// at is the point at three fractions of the way through the domain.
func (d *Domain) at(stress, strain, temperature float64) creeplaw.Point {
	return creeplaw.Point{Stress: d.Stress.at(stress), Strain: d.Strain.at(strain), Temperature: d.Temperature.at(temperature)}
}

// scattered is the i-th point of Halton's sequence: even, without chance, never on a face.
func (d *Domain) scattered(i int) creeplaw.Point {
	return d.at(mirrored(i+1, 2), mirrored(i+1, 3), mirrored(i+1, 5))
}

// mirrored is the radical inverse of i to a base.
func mirrored(i, base int) float64 {
	v, scale := 0.0, 1.0
	for ; i > 0; i /= base {
		scale /= float64(base)
		v += scale * float64(i%base)
	}
	return v
}

// sample is the corners and the middle of the domain and the points scattered through it.
func (x *examination) sample() []creeplaw.Point {
	d := &x.domain
	points := []creeplaw.Point{d.at(0.5, 0.5, 0.5)}
	for corner := range 8 {
		points = append(points, d.at(float64(corner&1), float64(corner>>1&1), float64(corner>>2)))
	}
	for i := range x.settings.Points {
		points = append(points, d.scattered(i))
	}
	return points
}

// stations are where lines along an argument cross the other two: their middle, their corners, and scattered.
func (x *examination) stations() []creeplaw.Point {
	stations := append([]creeplaw.Point{}, x.points[:9]...)
	for i := range x.settings.Lines {
		stations = append(stations, x.domain.scattered(i))
	}
	return stations
}

// across are the stations that differ in the other two arguments, as many as there are lines.
func (x *examination) across(along Argument) []creeplaw.Point {
	var list []creeplaw.Point
	seen := map[creeplaw.Point]bool{}
	for _, p := range x.stations() {
		*along.of(&p) = 0
		if !seen[p] && len(list) < x.settings.Lines {
			seen[p] = true
			list = append(list, p)
		}
	}
	return list
}

// inTension is a plain point as findings carry it.
func inTension(p creeplaw.Point) creeplaw.EvolvingPoint {
	return creeplaw.InTension(p, [creeplaw.MaxVariables]float64{})
}

// found starts a finding at a point.
func (x *examination) found(k Kind, s Severity, p creeplaw.Point) Finding {
	f := Finding{Kind: k, Severity: s, At: inTension(p), Time: x.time}
	if x.evolving != nil {
		f.At.Internal = x.initial()
	}
	return f
}

// initial are the variables of virgin material.
func (x *examination) initial() (v [creeplaw.MaxVariables]float64) {
	for i, variable := range x.evolving.Variables() {
		if i < len(v) {
			v[i] = variable.Initial
		}
	}
	return v
}

func (x *examination) rate(p creeplaw.Point) creeplaw.Rate {
	x.last = inTension(p)
	x.evaluations++
	return x.law.Rate(p)
}

func (x *examination) logRate(p creeplaw.Point) creeplaw.LogRate {
	x.last = inTension(p)
	x.evaluations++
	return x.logs.LogRate(p)
}

// ln is ln ṗ, from the law's own logarithm as long as that can be trusted; NaN where there is none.
func (x *examination) ln(p creeplaw.Point) float64 {
	if x.trustLogs {
		return x.logRate(p).Value
	}
	return math.Log(x.rate(p).Value)
}

func finite(v float64) bool { return v-v == 0 }

func hasNaN(r creeplaw.Rate) bool {
	return math.IsNaN(r.Value) || math.IsNaN(r.ByStress) || math.IsNaN(r.ByStrain) || math.IsNaN(r.ByTemperature)
}
