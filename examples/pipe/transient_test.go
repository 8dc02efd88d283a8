package main

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/integrate/quad"

	"example.com/holdtime/bench/check"
)

// The way between start and steady state, held against another way to compute it: for an elastically incompressible pipe in
// plane strain everything follows from q = σθ - σr. With the hoop strain W/r²
//
//	dq/dt = (4/3)E [Ẇ/r² - (√3/2) ε̇(σₑ)],   σₑ = (√3/2) q,   ∫ q dr/r = p   gives Ẇ
//
// which is solved here at fixed radii by the classical Runge–Kutta method, with Gauss–Legendre quadrature in ln r. There are no
// elements in it, no backward Euler and nothing of the library.
type incompressible struct {
	*pipe
	radii, weights []float64 // the last two radii are the surfaces, of weight zero
}

func newIncompressible(p *pipe) *incompressible {
	const n = 24
	s := &incompressible{p, make([]float64, n), make([]float64, n)}
	quad.Legendre{}.FixedLocations(s.radii, s.weights, math.Log(p.inner), math.Log(p.outer))
	for i := range s.radii {
		s.radii[i] = math.Exp(s.radii[i])
	}
	s.radii, s.weights = append(s.radii, p.inner, p.outer), append(s.weights, 0, 0)
	return s
}

// start is the elastic state, q = p (2/r²)/(1/a² - 1/b²).
func (s *incompressible) start() (q []float64) {
	for _, r := range s.radii {
		q = append(q, 2*s.pressure/(r*r)/(1/(s.inner*s.inner)-1/(s.outer*s.outer)))
	}
	return q
}

func (s *incompressible) rate(q []float64) []float64 {
	creep, all := make([]float64, len(q)), 0.0
	for i, r := range s.radii {
		creep[i] = math.Sqrt(3) / 2 * s.rateAt(math.Sqrt(3)/2*q[i], s.kelvinAt(r))
		all += s.weights[i] * creep[i]
	}
	speed := all / ((1/(s.inner*s.inner) - 1/(s.outer*s.outer)) / 2)
	for i, r := range s.radii {
		creep[i] = 4 * s.young / 3 * (speed/(r*r) - creep[i])
	}
	return creep
}

func (s *incompressible) rateAt(mises, kelvin float64) float64 {
	return s.nortonAt(kelvin).RateAt(mises)
}

// advance makes steps of some hours.
func (s *incompressible) advance(q []float64, hours float64, steps int) {
	moved := func(k []float64, h float64) []float64 {
		x := make([]float64, len(q))
		for i := range q {
			x[i] = q[i] + h*k[i]
		}
		return x
	}
	for range steps {
		a := s.rate(q)
		b := s.rate(moved(a, hours/2))
		c := s.rate(moved(b, hours/2))
		d := s.rate(moved(c, hours))
		for i := range q {
			q[i] += hours / 6 * (a[i] + 2*b[i] + 2*c[i] + d[i])
		}
	}
}

func TestTransient(t *testing.T) {
	for _, outside := range []float64{813.15, 823.15, 833.15} {
		p := mustPipe(t)
		p.expansion = 0 // thermal stresses are no part of the other way
		p.boreKelvin, p.outerKelvin = 823.15, outside
		p.poisson = 0.4999 // changes stresses by 2e-5 from 0.5
		w, err := newWall(p, 24, 2)
		require.NoError(t, err)
		course, err := run(w, 1e-5)
		require.NoError(t, err)
		s := newIncompressible(p)
		q, time := s.start(), 0.0
		seen := 0
		for k := range course.samples {
			m := &course.samples[k]
			if !m.stop || m.time > 10000 {
				continue
			}
			const step = 10 // hours; half of it changes the tenth digit
			s.advance(q, step, int(math.Round((m.time-time)/step)))
			time = m.time
			bore, outer := w.surface(m.condition)
			last := len(q) - 1
			// Measured 2.3e-4, nearly all of it from extrapolation to the surface: 6e-5 and 2.5e-5 with 48 and 96 elements.
			check.Rel(t, "bore", bore.hoop-bore.radial, q[last-1], 4e-4)
			check.Rel(t, "outside", outer.hoop-outer.radial, q[last], 4e-4)
			seen++
		}
		require.Greater(t, seen, 7)
		end := q[len(q)-2]
		require.True(t, math.Abs(end/s.start()[len(q)-2]-1) > 0.2, "little was redistributed: %v", end)
	}
}
