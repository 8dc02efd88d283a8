package main

import (
	"fmt"
	"io"
	"strings"

	"example.com/holdtime/examples/figure"
	"example.com/holdtime/examples/newton"
)

// write prints the report.
func (r *report) write(w io.Writer) {
	fmt.Fprintf(w, `pipe: %s

Radii %v and %v mm, closed ends, %v MPa inside, bore at %.0f °C, outside at %.0f °C, E = %v MPa, ν = %v, expansion %v 1/K.
Creep rate %v·(σ/%v MPa)^%v 1/h at %.0f °C, activation energy %v J/mol. Pressure and temperature come at once and elastically;
then the pipe creeps until at most %.0e of the strain rate of any point is elastic.
%d elements with two points each. Time steps keep an error estimate of %g of the largest von Mises stress at the start.
`, r.title, r.inner, r.outer, r.pressure, r.boreKelvin-icePoint, r.outerKelvin-icePoint, r.young, r.poisson, r.expansion, r.rate,
		r.stress, r.exponent, r.atKelvin-icePoint, r.activation, steadyShare, r.elements, r.tolerance)
	for i, h := range r.cases {
		fmt.Fprintf(w, "\n%d. %s: bore %.0f °C, outside %.0f °C\n", i+1, strings.ToUpper(h.name), h.wall.boreKelvin-icePoint,
			h.wall.outerKelvin-icePoint)
		h.writeCourse(w)
		h.writeSteady(w)
	}
	r.writeMeshes(w)
	r.writeNewton(w)
	r.checks.Write(w)
}

func (h *history) writeCourse(w io.Writer) {
	fmt.Fprint(w, `                bore [MPa]                     outside [MPa]                 bore velocity   farthest from the
      hours     hoop     axial  von Mises      hoop     axial  von Mises     [µm/1000 h]     steady state
`)
	for k := range h.course.samples {
		s := &h.course.samples[k]
		if !s.stop && k < len(h.course.samples)-1 {
			continue
		}
		bore, outside := h.wall.surface(s.condition)
		velocity := "elastic"
		if k > 0 {
			velocity = fmt.Sprintf("%.4f", 1e6*s.velocity)
		}
		fmt.Fprintf(w, "%11s %8.2f  %8.2f   %8.2f  %8.2f  %8.2f   %8.2f %15s     %12.1e\n", figure.Grouped(s.time, 0), bore.hoop,
			bore.axial, bore.mises(), outside.hoop, outside.axial, outside.mises(), velocity, s.distance)
	}
	e := h.course.effort
	fmt.Fprintf(w, "   %d steps, %d done again shorter, %d Newton solves with %.1f iterations on average, %d at most\n",
		len(h.course.samples)-1, h.course.repeated, e.solves, float64(e.iterations)/float64(e.solves), len(e.longest)-1)
}

func (h *history) writeSteady(w io.Writer) {
	fmt.Fprintf(w, `   Steady state, this program and %s:
        radius    radial               hoop                 axial                von Mises
`, map[bool]string{true: "Bailey's closed form", false: "an independent quadrature"}[h.against == "Bailey"])
	end := h.course.end()
	bore, outside := h.wall.surface(end.condition)
	line := func(radius float64, got wallStress) {
		want := h.exact.at(radius)
		fmt.Fprintf(w, "      %8.2f  %8.3f %8.3f    %8.3f %8.3f    %8.3f %8.3f    %8.3f %8.3f\n", radius, got.radial+0, want.radial+0,
			got.hoop, want.hoop, got.axial, want.axial, got.mises(), want.mises())
	}
	line(h.wall.inner, bore)
	const rows = 6
	for k := 1; k < rows; k++ {
		i := k * len(h.wall.points) / rows
		line(h.wall.points[i].radius, end.stress[i])
	}
	line(h.wall.outer, outside)
	if h.against != "Bailey" {
		power := h.wall.power(h.wall.inner)
		fmt.Fprintf(w, "   (With the factor of temperature taken as a power of the radius, Bailey's form has %.2f hoop and "+
			"%.2f axial at the bore.)\n", power.hoop, power.axial)
	}
}

func (r *report) writeMeshes(w io.Writer) {
	fmt.Fprint(w, `
3. MESH, one temperature: error of the steady state, of stresses over the exact von Mises stress, with its order. Elements with
   two points do not lock. With three they do: their mean stress never settles; errors after as many hours, for comparison.
                two points per element                                                  three points
   elements     at the points    at the surfaces    strain rates     bore velocity      at the points    bore velocity
`)
	for i, e := range r.reduced {
		fmt.Fprintf(w, "   %8d  ", e.elements)
		for _, value := range []func(meshError) float64{
			func(e meshError) float64 { return e.points }, func(e meshError) float64 { return e.surfaces },
			func(e meshError) float64 { return e.rate }, func(e meshError) float64 { return e.bore }} {
			text := ""
			if i > 0 {
				text = fmt.Sprintf("%.2f", order(value(r.reduced[i-1]), value(e)))
			}
			fmt.Fprintf(w, "   %.1e %-5s ", value(e), text)
		}
		fmt.Fprintf(w, "      %.1e          %.1e\n", r.full[i].points, r.full[i].bore)
	}
}

func (r *report) writeNewton(w io.Writer) {
	fmt.Fprint(w, `
4. NEWTON'S METHOD in one step from the elastic start, far too long for accuracy. Residual before each correction and after the
   last, over the load:
`)
	for _, h := range r.cases {
		fmt.Fprintf(w, "   %s\n", h.name)
		for _, l := range h.leaps {
			text := newton.Text(l.residuals, "  ")
			if l.residuals == nil {
				text = "no equilibrium found from so far: a shorter step is needed"
			}
			fmt.Fprintf(w, "   %11s h  %s\n", figure.Grouped(l.hours, 0), text)
		}
	}
}
