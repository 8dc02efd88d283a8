package integrate_test

import (
	"math"
	"slices"
	"testing"
	"time"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// benchPoint is the same material point for every entry point: strains of one size, the same state, time and temperature.
type benchPoint struct {
	old    integrate.State
	strain tensor.Sym
	dt     float64
}

// benchMix draws points like those of a structure under way: elastic strains over a decade and a half, Δt from a hundredth to
// a hundred times the time in which the law would use them up.
func benchMix(law creeplaw.Law, count int) []benchPoint {
	s := newSource(300)
	points := make([]benchPoint, count)
	for i := range points {
		p := &points[i]
		p.old = integrate.State{Creep: s.deviator().Scale(1e-4), Equivalent: s.decades(-5, -2)}
		e := s.decades(-4, -2.5)
		p.strain = p.old.Creep.Add(s.deviator().Scale(e))
		at := creeplaw.Point{Stress: 3 * shear * e, Strain: p.old.Equivalent, Temperature: 800}
		p.dt = s.decades(-2, 2) * e / law.Rate(at).Value
	}
	return points
}

// ratio times a contestant against a yardstick on the same points in short turns, and returns the quotient of the medians, and
// the medians in ns per step: what else the machine does falls on both alike.
func ratio(b *testing.B, points []benchPoint, yardstick, contestant func(*benchPoint)) {
	b.Helper()
	var low, high []float64
	visit := func(f func(*benchPoint)) float64 {
		start := time.Now()
		for i := range points {
			f(&points[i])
		}
		return float64(time.Since(start).Nanoseconds()) / float64(len(points))
	}
	visit(yardstick)
	visit(contestant)
	for b.Loop() {
		low = append(low, visit(yardstick))
		high = append(high, visit(contestant))
	}
	slices.Sort(low)
	slices.Sort(high)
	l, h := low[len(low)/2], high[len(high)/2]
	b.ReportMetric(h/l, "xstep")
	b.ReportMetric(h, "ns/op")
	b.ReportMetric(l, "step-ns")
}

// BenchmarkControl measures the entry points against the 3-D step (xstep: how many of it they cost), on the same sizes of
// strain:
//
//	go test ./integrate -run '^$' -bench Control
func BenchmarkControl(b *testing.B) {
	norton, _ := creeplaw.NewNortonAt(1e-6, 100, 5)
	steep, _ := creeplaw.NewNortonAt(1e-6, 100, 25)
	sinh, _ := creeplaw.NewGarofalo(1e-9, 0.03, 3)
	primary, _ := creeplaw.NewBaileyNortonAt(1e-3, 100, 100, 5, 0.4)
	for _, c := range []struct {
		name string
		law  creeplaw.Law
	}{{"Norton", norton}, {"Norton25", steep}, {"Garofalo", sinh}, {"BaileyNorton", primary}} {
		m := material(b, c.law)
		points := benchMix(c.law, 256)
		var step integrate.Result
		var bar integrate.UniaxialResult
		var sheet integrate.PlaneStressResult
		var mixed integrate.MixedResult
		check := func(err error) {
			if err != nil {
				b.Fatal(err)
			}
		}
		yardstick := func(p *benchPoint) {
			check(m.Step(&step, &p.old, integrate.Increment{Dt: p.dt, Strain: p.strain, Temperature: 800}))
		}
		run := func(name string, f func(*benchPoint)) {
			b.Run(c.name+"/"+name, func(b *testing.B) { ratio(b, points, yardstick, f) })
		}
		run("uniaxial", func(p *benchPoint) {
			e := p.strain[0] - p.old.Creep[0]
			size := p.strain.Sub(p.old.Creep).EquivalentStrain()
			check(m.StepUniaxial(&bar, &p.old, integrate.UniaxialIncrement{Dt: p.dt,
				Strain: p.old.Creep[0] + math.Copysign(size, e), Temperature: 800}))
		})
		run("uniaxialStress", func(p *benchPoint) {
			size := p.strain.Sub(p.old.Creep).EquivalentStrain()
			check(m.StepUniaxialStress(&bar, &p.old, integrate.UniaxialLoad{Dt: p.dt, Stress: 3 * shear * size,
				Temperature: 800}))
		})
		run("planeStress", func(p *benchPoint) {
			check(m.StepPlaneStress(&sheet, &p.old, integrate.PlaneStressIncrement{Dt: p.dt, Strain: p.strain, Temperature: 800}))
		})
		control := integrate.PlaneStress()
		run("mixedPlaneStress", func(p *benchPoint) {
			prescribed := tensor.Sym{p.strain[0], p.strain[1], 0, 0, 0, p.strain[5]}
			check(m.StepMixed(&mixed, &p.old, integrate.MixedIncrement{Control: control, Dt: p.dt, Prescribed: prescribed,
				Temperature: 800}))
		})
	}
}
