package main

import (
	"fmt"
	"math"
)

// settled is the steady state of a mesh and its rates.
type settled struct {
	*condition
	velocity  []float64 // of the nodes [mm/h]
	axialRate float64   // [1/h]
	share     float64   // of elastic strain in the rate, see elasticShare
}

// settle lets a wall creep until its stresses are steady, in backward-Euler steps that double each time, without an eye to the
// way there: the steady state does not depend on it. It stops before the hours of latest in any case.
func settle(w *wall, latest float64) (*settled, error) {
	r := &runner{balance: newBalance(w), tolerance: 1e-2}
	if err := r.load(); err != nil {
		return nil, err
	}
	s := &settled{share: math.Inf(1)}
	for hours := r.next; s.share > settledShare; hours *= 2 {
		c, err := r.euler(r.now, r.before, hours)
		if err != nil {
			return nil, fmt.Errorf("step of %.3g h from %.3g h: %w", hours, r.now.time, err)
		}
		s.condition, s.share, s.axialRate = c, w.elasticShare(r.now, c), (c.axial-r.now.axial)/hours
		s.velocity = nil
		for i := range c.displacement {
			s.velocity = append(s.velocity, (c.displacement[i]-r.now.displacement[i])/hours)
		}
		r.before, r.now = r.now, c
		if 2*hours > latest-c.time {
			break
		}
	}
	return s, nil
}

const settledShare = 1e-9

// meshError is how far the steady state of a mesh is from the exact one.
type meshError struct {
	elements int
	time     float64 // [h]
	share    float64 // of elastic strain in the rate
	points   float64 // largest error of any stress at the integration points, over the exact von Mises stress there
	surfaces float64 // the same at the two surfaces, extrapolated from the points
	rate     float64 // largest error of the hoop strain rate at the points, relative
	bore     float64 // error of the radial velocity of the bore, relative
}

// study settles meshes of the given numbers of elements with so many points each, up to so many hours.
func study(p *pipe, perElement int, elements []int, latest float64) (rows []meshError, err error) {
	exact := p.steady()
	for _, n := range elements {
		w, err := newWall(p, n, perElement)
		if err != nil {
			return nil, err
		}
		s, err := settle(w, latest)
		if err != nil {
			return nil, fmt.Errorf("%d elements: %w", n, err)
		}
		row := w.meshError(s, &exact)
		row.elements = n
		rows = append(rows, row)
	}
	return rows, nil
}

// meshError holds a steady state against the exact one.
func (w *wall) meshError(s *settled, exact *steady) meshError {
	e := meshError{time: s.time, share: s.share, bore: math.Abs(s.velocity[0]*w.inner/exact.velocity - 1)}
	for i := range w.points {
		at := &w.points[i]
		e.points = math.Max(e.points, s.stress[i].from(exact.at(at.radius)))
		// Radial, hoop and axial rate are -V/r², V/r² and 0.
		rate, want := at.strain(s.velocity, s.axialRate), exact.velocity/(at.radius*at.radius)
		e.rate = math.Max(e.rate, math.Max(math.Abs(rate[0]+want), math.Max(math.Abs(rate[1]-want), math.Abs(rate[2])))/want)
	}
	bore, outside := w.surface(s.condition)
	e.surfaces = math.Max(bore.from(exact.at(w.inner)), outside.from(exact.at(w.outer)))
	return e
}

// from is the largest difference of a stress from the exact one, over the exact von Mises stress.
func (s wallStress) from(exact wallStress) float64 {
	d := s.minus(exact)
	return math.Max(math.Abs(d.radial), math.Max(math.Abs(d.hoop), math.Abs(d.axial))) / exact.mises()
}

// order is the observed order of an error from one mesh to one with twice the elements.
func order(coarse, fine float64) float64 { return math.Log2(coarse / fine) }
