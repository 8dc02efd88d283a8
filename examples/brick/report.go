package main

import (
	"fmt"
	"math"

	"example.com/holdtime/bench"
	"example.com/holdtime/examples/checklist"
	"example.com/holdtime/examples/newton"
	"example.com/holdtime/integrate"
)

// settings of a run.
type settings struct {
	exponent   float64
	distortion float64
	steps      int
}

// report is everything that is printed and drawn.
type report struct {
	settings
	volumes       [2]float64       // least and greatest volume of an integration point of the brick [mm³]
	tension       [2]tensionCourse // of one brick and of seven
	heating       bench.Study
	relaxation    bench.Study
	barSpread     float64
	strainedRows  []strainedRow
	strainedWorst []float64
	hold          bench.Study
	askew         [][]float64
	imbalance     float64
	checks        checklist.List
}

// newReport computes everything.
func newReport(s settings) (*report, error) {
	r := &report{settings: s}
	material, err := newMaterial(s.exponent)
	if err != nil {
		return nil, err
	}
	for _, part := range []func(*integrate.Material) error{r.pull, r.bar, r.strain, r.bend} {
		if err := part(material); err != nil {
			return nil, err
		}
	}
	r.judge()
	return r, nil
}

// pull runs the tension on one brick and on seven, and again on the one with finer heating.
func (r *report) pull(material *integrate.Material) error {
	one, err := oneBrick(material, r.distortion, stressAt)
	if err != nil {
		return err
	}
	seven, err := sevenBricks(material, r.distortion, stressAt)
	if err != nil {
		return err
	}
	r.volumes = [2]float64{math.Inf(1), 0}
	for i := range one.bricks[0].points {
		v := one.bricks[0].points[i].volume
		r.volumes = [2]float64{math.Min(r.volumes[0], v), math.Max(r.volumes[1], v)}
	}
	for i, b := range []*body{one, seven} {
		if r.tension[i], err = tension(b, r.exponent, tensionProgram(r.steps)); err != nil {
			return err
		}
	}
	last := r.tension[0].rows[len(r.tension[0].rows)-1]
	r.heating, err = bench.Halve([]float64{last.closed}, last.closed, r.steps, 3, func(n int) ([]float64, error) {
		c, err := tension(one, r.exponent, tensionProgram(n))
		if err != nil {
			return nil, err
		}
		return []float64{c.rows[len(c.rows)-1].creep}, nil
	})
	return err
}

// bar is the relaxation between plates.
func (r *report) bar(material *integrate.Material) error {
	b, err := oneBrick(material, r.distortion, barStress)
	if err != nil {
		return err
	}
	bar := bench.BarRelaxation{Young: young, Stress: barStress, Law: closedNorton(r.exponent, 0)}
	r.relaxation, err = bench.Halve([]float64{bar.StressAt(barHours)}, barStress, r.steps, 4, func(n int) ([]float64, error) {
		stress, spread, err := relax(b, n)
		r.barSpread = math.Max(r.barSpread, spread)
		return []float64{stress}, err
	})
	return err
}

// strain is the patch whose boundary is moved.
func (r *report) strain(material *integrate.Material) error {
	solid := solidRelaxation(r.exponent)
	b, err := sevenBricks(material, r.distortion, solid.Stress.Mises())
	if err != nil {
		return err
	}
	if r.strainedRows, r.strainedWorst, err = strained(b, r.exponent, strainProgram(r.steps)); err != nil {
		return err
	}
	held := strainProgram(1)[1].hours
	exact := solid.StressAt(held)
	r.hold, err = bench.Halve(exact[:], solid.Stress.Mises(), 2*r.steps, 3, func(n int) ([]float64, error) {
		rows, _, err := strained(b, r.exponent, strainProgram(n)[:2])
		if err != nil {
			return nil, err
		}
		return rows[1].mean[:], nil
	})
	return err
}

func (r *report) bend(material *integrate.Material) error {
	b, err := oneBrick(material, r.distortion, stressAt)
	if err != nil {
		return err
	}
	if r.askew, r.imbalance, err = askew(b); err != nil {
		return fmt.Errorf("the brick pulled askew: %w; residuals %.1e", err, r.askew)
	}
	return nil
}

// The limits leave room for other exponents and distortions: the numbers themselves are at rounding.
const (
	uniform = 1e-11
	known   = 1e-11
	limit   = 1e-4 // of a Richardson extrapolation over three or four halvings
)

// judge holds the numbers against their limits.
func (r *report) judge() {
	for i, name := range []string{"one brick", "seven bricks"} {
		spread, side, creep := 0.0, 0.0, 0.0
		for _, row := range r.tension[i].rows {
			spread, side = math.Max(spread, row.spread), math.Max(side, row.side)
			if row.name == "hold" && row.above == 0 {
				creep = math.Abs(row.creep/row.closed - 1)
			}
		}
		r.checks.AtMost(name+" under tractions: stress of every point, from the stress applied", spread, uniform)
		r.checks.AtMost(name+" under tractions: creep tensor of every point, from the tension's", side, uniform)
		r.checks.AtMost(name+" under tractions: creep strain of the first hold, from A σⁿ t", creep, known)
	}
	r.checks.AtMost("heating under load: order of the error is 1, off by", offOne(r.heating), 0.05)
	r.checks.AtMost("heating under load: extrapolated creep strain, from the quadrature", r.heating.ExtrapolatedError(), limit)
	r.checks.AtMost("brick between plates: stress of every point, from uniaxial", r.barSpread, uniform)
	r.checks.AtMost("brick between plates: order of the error is 1, off by", offOne(r.relaxation), 0.05)
	r.checks.AtMost("brick between plates: extrapolated stress, from the closed form", r.relaxation.ExtrapolatedError(), limit)
	spread, moved := 0.0, 0.0
	for _, row := range r.strainedRows {
		spread, moved = math.Max(spread, row.spread), math.Max(moved, row.inner)
	}
	r.checks.AtMost("patch: stress of every point, from one material point", spread, uniform)
	r.checks.AtMost("patch: inner nodes, from the linear field", moved, uniform)
	r.checks.AtMost("patch: order of the error is 1, off by", offOne(r.hold), 0.05)
	r.checks.AtMost("patch: extrapolated stress of the hold, from the closed form", r.hold.ExtrapolatedError(), limit)
	r.checks.AtMost("brick pulled askew: forces and moments of the supports, from the loads", r.imbalance, uniform)
	r.checks.AtMost("all Newton iterations: largest r(k+1)/r(k)² below 1e-2", r.constant(), 100)
	if least, ok := r.order(); ok {
		r.checks.AtLeast("brick pulled askew: least order of a Newton iteration", least, 1.8)
	}
}

// offOne is how far the last observed order of a study is from one.
func offOne(s bench.Study) float64 {
	orders := s.Orders()
	return math.Abs(orders[len(orders)-1] - 1)
}

// constant is the largest over the sequences that are kept.
func (r *report) constant() float64 {
	largest := 0.0
	for _, residuals := range append(r.askew[:len(r.askew):len(r.askew)], r.strainedWorst, r.tension[0].worst, r.tension[1].worst) {
		largest = math.Max(largest, newton.Constant(residuals, solved))
	}
	return largest
}

// order is the least over the sequences that are long enough.
func (r *report) order() (least float64, any bool) {
	least = math.Inf(1)
	for _, residuals := range r.askew {
		if o, ok := newton.Order(residuals, solved); ok {
			least, any = math.Min(least, o), true
		}
	}
	return least, any
}
