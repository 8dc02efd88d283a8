package bench_test

import (
	"math"
	"testing"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// floor is the least a 3-D creep step with tangent can cost: the elastic predictor with its one square root, one logarithm
// and one exponential, stress, and a 6×6 tangent filled. It is a step only in what it costs: the creep of the increment is
// the explicit estimate, taken from the trial stress.
type floor struct {
	bulk, shear         float64
	exponent, logFactor float64 // of an explicit Norton rate
}

//go:noinline
func (f *floor) step(out *integrate.Result, old *integrate.State, inc *integrate.Increment) {
	e := inc.Strain.Sub(old.Creep)
	volumetric := e[0] + e[1] + e[2]
	mean := volumetric / 3
	e[0] -= mean
	e[1] -= mean
	e[2] -= mean
	equivalent := math.Sqrt((2.0 / 3) * e.Dot(e))
	spent := inc.Dt * math.Exp(f.logFactor+f.exponent*math.Log(equivalent)) // of the equivalent elastic strain
	kept := 1 / (1 + spent)
	keep := 2 * f.shear * kept
	pressure := f.bulk * volumetric
	for i := range e {
		out.Stress[i] = keep * e[i]
	}
	out.Stress[0] += pressure
	out.Stress[1] += pressure
	out.Stress[2] += pressure
	along := -keep * spent * kept / (equivalent * equivalent)
	fill(&out.Tangent, f.bulk-keep/3, keep, along, &e)
}

// fill writes λ I⊗I + keep·I + along·e⊗e. Written out, each product formed once, it takes half the time of loops.
func fill(c *tensor.Tangent, lame, keep, along float64, e *tensor.Sym) {
	e0, e1, e2, e3, e4, e5 := e[0], e[1], e[2], e[3], e[4], e[5]
	a, diagonal, half := along*e0, lame+keep, keep/2
	c01, c02, c03, c04, c05 := a*e1+lame, a*e2+lame, a*e3, a*e4, a*e5
	c[0][0], c[0][1], c[0][2], c[0][3], c[0][4], c[0][5] = a*e0+diagonal, c01, c02, c03, c04, c05
	a = along * e1
	c12, c13, c14, c15 := a*e2+lame, a*e3, a*e4, a*e5
	c[1][0], c[1][1], c[1][2], c[1][3], c[1][4], c[1][5] = c01, a*e1+diagonal, c12, c13, c14, c15
	a = along * e2
	c23, c24, c25 := a*e3, a*e4, a*e5
	c[2][0], c[2][1], c[2][2], c[2][3], c[2][4], c[2][5] = c02, c12, a*e2+diagonal, c23, c24, c25
	a = along * e3
	c34, c35 := a*e4, a*e5
	c[3][0], c[3][1], c[3][2], c[3][3], c[3][4], c[3][5] = c03, c13, c23, a*e3+half, c34, c35
	a = along * e4
	c45 := a * e5
	c[4][0], c[4][1], c[4][2], c[4][3], c[4][4], c[4][5] = c04, c14, c24, c34, a*e4+half, c45
	c[5][0], c[5][1], c[5][2], c[5][3], c[5][4], c[5][5] = c05, c15, c25, c35, c45, along*e5*e5+half
}

func newFloor() *floor {
	return &floor{bulk: mixYoung / (3 * (1 - 2*mixNu)), shear: mixYoung / (2 * (1 + mixNu)), exponent: 4, logFactor: 20}
}

// TestFloorDoesItsWork: a floor that skipped a part would flatter nobody but us.
func TestFloorDoesItsWork(t *testing.T) {
	f := newFloor()
	p := speedCases(t)[0].points[0]
	var out integrate.Result
	p.increment.Dt = 0 // elastic
	f.step(&out, &p.start, &p.increment)
	elastic := p.increment.Strain.Sub(p.start.Creep)
	want := stressOf(mixYoung, mixNu, elastic)
	check.Slice(t, "stress", slice(out.Stress), slice(want), want.Norm(), 1e-14)
	check.Slice(t, "tangent", slice(out.Tangent.Contract(elastic)), slice(want), want.Norm(), 1e-14)
	p.increment.Dt = 1e-4
	f.step(&out, &p.start, &p.increment)
	d := elastic.Deviator()
	spent := 1e-4 * math.Exp(20) * math.Pow(d.EquivalentStrain(), 4)
	check.Rel(t, "Mises", out.Stress.Mises(), want.Mises()/(1+spent), 1e-12)
	if !(spent > 1e-12) {
		t.Errorf("the creep part of the floor is nothing: %v", spent)
	}
}
