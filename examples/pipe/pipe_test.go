package main

import (
	"math"
	"sync"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/examples/newton"
)

func mustPipe(t *testing.T) *pipe {
	t.Helper()
	p, err := readPipe("pipe.json", builtIn)
	require.NoError(t, err)
	return p
}

// standard is the report that the program makes without flags, made once for all tests.
var standard = sync.OnceValues(func() (*report, error) {
	p, err := readPipe("pipe.json", builtIn)
	if err != nil {
		return nil, err
	}
	return newReport(p, settings{40, 1e-4})
})

func mustReport(t *testing.T) *report {
	t.Helper()
	r, err := standard()
	require.NoError(t, err)
	return r
}

// The figures of the issue: stresses and rates within 0.1 % through the wall. With 40 elements they are far better, and the
// limits here say so: measured 6e-8 to 3e-7, 4e-8, 3e-5, 1.3e-7 and 1.4e-9.
func TestSteadyState(t *testing.T) {
	for _, h := range mustReport(t).cases {
		check.Abs(t, h.name+": elastic start", h.startError, 0, 1e-6)
		check.Abs(t, h.name+": stresses at the points", h.end.points, 0, 1e-6)
		check.Abs(t, h.name+": stresses at the surfaces", h.end.surfaces, 0, 1e-4)
		check.Abs(t, h.name+": strain rates", h.end.rate, 0, 1e-6)
		check.Abs(t, h.name+": velocity of the bore", h.end.bore, 0, 1e-7)
		check.Abs(t, h.name+": error of the steps on the way", h.timeError, 0, 2e-4) // measured 4e-5 at a tolerance of 1e-4
		assert.True(t, h.course.start().distance > 0.3, "%s: nothing was redistributed", h.name)
		assert.Less(t, len(h.course.samples), 200, "%s: steps", h.name)
	}
	assert.True(t, mustReport(t).checks.Passed())
}

// With two points per element the errors fall with the third, second and fourth power of the element's length, and 8 elements
// keep 0.1 % through the wall, surfaces included. With three points the same mesh is off by half of the stress.
func TestMeshConvergesAndDoesNotLock(t *testing.T) {
	r := mustReport(t)
	for i, e := range r.reduced[1:] {
		c := r.reduced[i]
		check.Abs(t, "order, points", order(c.points, e.points), 3, 0.1)
		check.Abs(t, "order, surfaces", order(c.surfaces, e.surfaces), 2, 0.1)
		check.Abs(t, "order, strain rates", order(c.rate, e.rate), 3, 0.2)
		check.Abs(t, "order, bore", order(c.bore, e.bore), 4, 0.1)
	}
	eight, locked := r.reduced[2], r.full[2]
	require.Equal(t, 8, eight.elements)
	require.Equal(t, 8, locked.elements)
	check.Abs(t, "8 elements, points", eight.points, 0, 1e-5)
	check.Abs(t, "8 elements, surfaces", eight.surfaces, 0, 1e-3)
	check.Abs(t, "8 elements, strain rates", eight.rate, 0, 1e-4)
	assert.True(t, locked.points > 0.1 && locked.bore > 100*eight.bore, "three points: %+v", locked)
}

// Published-value list of the project, thick-walled cylinder of R. W. Bailey 1935 (derived there and checked in 30 digits):
// radii 100 and 200, pressure 50, n, radius, radial, hoop and axial stress. n = 1 is the elastic state of an incompressible
// cylinder.
var published = []struct{ n, radius, radial, hoop, axial float64 }{
	{1, 100, -50, 83.33333333, 16.66666667}, {1, 150, -12.96296296, 46.29629630, 16.66666667}, {1, 200, 0, 33.33333333, 16.66666667},
	{3, 100, -50, 40.08047946, -4.959760268}, {3, 150, -17.99568862, 50.74858326, 16.37644732}, {3, 200, 0, 56.74714613, 28.37357307},
	{5, 100, -50, 32.59625920, -8.701870399}, {5, 150, -19.08483974, 51.14535536, 16.03025781}, {5, 200, 0, 62.59625920, 31.29812960},
	{8, 100, -50, 28.56516885, -10.71741558}, {8, 150, -19.70590055, 51.28574344, 15.78992144}, {8, 200, 0, 66.06516885, 33.03258442},
}

func TestPublishedValues(t *testing.T) {
	settledWalls := map[float64]*settled{}
	walls := map[float64]*wall{}
	for _, v := range published {
		p := &pipe{inner: 100, outer: 200, pressure: 50, boreKelvin: 800, outerKelvin: 800, young: 150e3, poisson: 0.3, rate: 1e-15,
			stress: 1, atKelvin: 800, exponent: v.n}
		if walls[v.n] == nil {
			var err error
			walls[v.n], err = newWall(p, 64, 2)
			require.NoError(t, err)
			settledWalls[v.n], err = settle(walls[v.n], math.Inf(1))
			require.NoError(t, err)
		}
		got := walls[v.n].at(settledWalls[v.n].condition, v.radius)
		want := wallStress{v.radial, v.hoop, v.axial}
		// The line between points is off by a part (h/r)²/12 of the stress, 1e-5 with 64 elements, times (k+1)(k+2) ≤ 12.
		check.Abs(t, "stress", got.from(want), 0, 2e-4)
	}
	five := settledWalls[5]
	check.Rel(t, "velocity of the bore, n = 5", five.velocity[0], 1.621756632e-4, 1e-8)
	check.Rel(t, "velocity outside, n = 5", five.velocity[len(five.velocity)-1], 8.108783161e-5, 1e-7)
}

// at is the stress at a radius, on the line through the two nearest points.
func (w *wall) at(c *condition, radius float64) wallStress {
	i := 0
	for i+2 < len(w.points) && w.points[i+1].radius < radius {
		i++
	}
	x := (radius - w.points[i].radius) / (w.points[i+1].radius - w.points[i].radius)
	a, b := c.stress[i], c.stress[i+1]
	return wallStress{a.radial + x*(b.radial-a.radial), a.hoop + x*(b.hoop-a.hoop), a.axial + x*(b.axial-a.axial)}
}

// Where the factor of temperature is a power of the radius, rᵐ, Bailey's solution holds with (2+m)/n in place of 2/n. The
// temperature is made so: 1/T linear in ln r.
func TestGradientWithClosedForm(t *testing.T) {
	for _, kelvins := range [][2]float64{{813, 833}, {840, 800}} {
		p := mustPipe(t)
		p.boreKelvin, p.outerKelvin = kelvins[0], kelvins[1]
		inverse := func(radius float64) float64 {
			part := math.Log(radius/p.inner) / math.Log(p.outer/p.inner)
			return 1 / (1/p.boreKelvin + part*(1/p.outerKelvin-1/p.boreKelvin))
		}
		w, err := newWall(p, 32, 2)
		require.NoError(t, err)
		for i := range w.points {
			w.points[i].kelvin = inverse(w.points[i].radius)
		}
		s, err := settle(w, math.Inf(1))
		require.NoError(t, err)
		exact := steady{inner: p.inner, outer: p.outer, stress: p.stress, rate: p.rate, n: p.exponent, velocity: 1,
			factor: func(radius float64) float64 { return p.activated(inverse(radius)) }}
		exact.velocity = math.Pow(p.pressure/-exact.radialAt(p.inner), p.exponent)
		for i, at := range w.points {
			want := p.power(at.radius)
			check.Abs(t, "pipe", s.stress[i].from(want), 0, 1e-6)                // 32 elements: 1e-7
			check.Abs(t, "quadrature", exact.at(at.radius).from(want), 0, 1e-12) // rounding
		}
		check.Rel(t, "velocity", s.velocity[0], exact.velocity/p.inner, 1e-7)
	}
}

// On the whole way the stresses balance the pressure, in section along the axis and across it.
func TestBalanceOnTheWay(t *testing.T) {
	for _, h := range mustReport(t).cases {
		w := h.wall
		for k := range h.course.samples {
			s := &h.course.samples[k]
			hoop, axial := 0.0, 0.0
			for i, at := range w.points {
				hoop += at.weight / at.radius * s.stress[i].hoop
				axial += at.weight * s.stress[i].axial
			}
			check.Rel(t, "∫σθ dr", hoop, w.pressure*w.inner, 1e-10)
			check.Rel(t, "∫σz r dr", axial, w.pressure*w.inner*w.inner/2, 1e-10)
		}
	}
}

// The global iteration is quadratic, at steps up to the whole way in one.
func TestGlobalNewtonIsQuadratic(t *testing.T) {
	seen := 0
	for _, h := range mustReport(t).cases {
		for _, l := range h.leaps {
			require.NotNil(t, l.residuals, "%s, %g h", h.name, l.hours)
			assert.LessOrEqual(t, len(l.residuals)-1, 9, "%s, %g h: %.1e", h.name, l.hours, l.residuals)
			c := newton.Constant(l.residuals, l.rounding)
			assert.True(t, c < 10, "%s, %g h: r(k+1)/r(k)² = %v", h.name, l.hours, c) // measured 1.3
			if o, ok := newton.Order(l.residuals, 100*l.rounding); ok {
				seen++
				assert.True(t, o > 1.7, "%s, %g h: order %v of %.1e", h.name, l.hours, o, l.residuals)
			}
		}
		e := h.course.effort
		assert.LessOrEqual(t, len(e.longest)-1, 4, "%s: %.1e", h.name, e.longest)
		assert.Greater(t, e.solves, 200)
	}
	assert.Greater(t, seen, 2, "no sequence was long enough")
	assert.True(t, newton.Constant([]float64{5e-3, 5e-4, 5e-5, 5e-6, 5e-7}, 1e-12) > 1e3, "a linear sequence must be seen")
}

// Another pipe: thin or thick, any exponent, either sense of the gradient.
func TestOtherPipes(t *testing.T) {
	for _, c := range []struct{ ratio, exponent, poisson, outside float64 }{
		{1.1, 1, 0.3, 820}, {1.1, 12, 0.49, 800}, {4, 3, 0, 840}, {2, 8, 0.3, 813.15},
	} {
		p := mustPipe(t)
		p.outer, p.exponent, p.poisson, p.outerKelvin = c.ratio*p.inner, c.exponent, c.poisson, c.outside
		w, err := newWall(p, 24, 2)
		require.NoError(t, err)
		course, err := run(w, 1e-3)
		require.NoError(t, err, "%+v", c)
		exact := p.steady()
		e := w.meshError(course.rates(), &exact)
		check.Abs(t, "points", e.points, 0, 1e-4)
		check.Abs(t, "strain rates", e.rate, 0, 1e-4)
	}
}

// The stiffness against central differences of the residual, in a step with creep.
func TestStiffnessIsTheDerivative(t *testing.T) {
	w, err := newWall(mustPipe(t), 3, 2)
	require.NoError(t, err)
	from, c := w.virgin(), w.virgin()
	for i, r := range w.nodes {
		c.displacement[i] = 0.05*w.inner/r + 0.002*math.Sin(float64(i)) // strains of 1e-3, creep of the same size in 1000 h
	}
	c.axial = 2e-4
	n := len(w.nodes)
	residual := func(j int, h float64) []float64 {
		d := c.copyOf()
		d.states, d.stress = w.virgin().states, w.virgin().stress
		if j < n {
			d.displacement[j] += h
		} else {
			d.axial += h
		}
		b := newBalance(w)
		_, err := b.assemble(d, from, 1000)
		require.NoError(t, err)
		var r []float64
		for i := range n {
			r = append(r, b.coupling.At(i, 0))
		}
		return append(r, b.end)
	}
	b := newBalance(w)
	_, err = b.assemble(c, from, 1000)
	require.NoError(t, err)
	require.True(t, c.states[0].Equivalent > 1e-4, "creep strain %v", c.states[0].Equivalent)
	for j := range n + 1 {
		h := 1e-6 // mm: truncation 1e-8 of the stiffness, rounding 1e-9
		if j == n {
			h /= w.inner
		}
		above, below := residual(j, h), residual(j, -h)
		for i := range n + 1 {
			got, scale := 0.0, b.band.At(1, 1)
			switch {
			case i < n && j < n:
				got = b.band.At(i, j)
			case i < n:
				got, scale = b.coupling.At(i, 1), scale*w.inner
			case j < n:
				got, scale = b.row[j], scale*w.inner
			default:
				got, scale = b.corner, scale*w.inner*w.inner
			}
			check.Scaled(t, "stiffness", got, (above[i]-below[i])/(2*h), scale, 1e-6)
		}
	}
}
