package main

import (
	"fmt"
	"io"
	"strings"

	"example.com/holdtime/bench"
	"example.com/holdtime/examples/newton"
)

// write prints the report.
func (r *report) write(w io.Writer) {
	fmt.Fprintf(w, `brick: an eight-node brick of distorted shape on the library's material point

Invented steel at 550 °C: E = %.0f MPa, ν = %v, creep rate %v·(σ/%v MPa)^%v 1/h times exp[-(Q/R)(1/T - 1/T₀)] with
Q = %.0f kJ/mol, expansion %v 1/K. One point of the brick stands for %.0f to %.0f mm³; a cube has %.0f mm³ for each.
The host's components are %q with engineering shear. "Newton" is the most iterations in a step.
`, young, poisson, rateAt, stressAt, r.exponent, activation/1e3, expansion, r.volumes[0], r.volumes[1], 125.0, hostOrder)
	r.writeTension(w)
	fmt.Fprintf(w, `
2. THE BRICK BETWEEN RIGID PLATES, sides free, stretched to %d MPa along x and held for %d h. Error of the stress over the
   first stress, from Norton's relaxation of a bar, by number of equal steps:
%s`, barStress, barHours, indented(r.relaxation))
	r.writeStrained(w)
	r.writeAskew(w)
	r.checks.Write(w)
}

func (r *report) writeTension(w io.Writer) {
	fmt.Fprintf(w, `
1. TENSION along (1, 2, 2)/3 by tractions on all faces, supports without strain
                      hours    MPa     °C   creep strain %%               one brick: spread of                 seven bricks:
   stage                                    brick        closed form     stress    creep    Newton    stress    creep    Newton
`)
	for i, row := range r.tension[0].rows {
		seven := r.tension[1].rows[i]
		fmt.Fprintf(w, "   %-18s %6.0f %6.0f %6.0f   %-12.8f %-12.8f %9.1e %9.1e %5d %12.1e %9.1e %5d\n", row.name, row.time, row.load,
			reference+row.above-273.15, 100*row.creep, 100*row.closed, row.spread, row.side, row.iterations,
			seven.spread, seven.side, seven.iterations)
	}
	fmt.Fprintf(w, `
   A step under constant stress is exact for this law. While the temperature rises the step takes the rate at its end: error of
   the creep strain at the end of the program, by number of steps in that stage:
%s`, indented(r.heating))
}

func (r *report) writeStrained(w io.Writer) {
	fmt.Fprintf(w, `
3. PATCH: the brick cut into seven around an inner one. The outer nodes move with a uniform strain, the inner ones are free and
   start every iteration from where the unloaded mesh had them.
                      hours  strain    °C   von Mises MPa   spread of stress   inner nodes off the
   stage                                    single point    about the point    linear field          Newton
`)
	for _, row := range r.strainedRows {
		fmt.Fprintf(w, "   %-18s %6.0f %6.0f%% %6.0f %14.4f %16.1e %18.1e %13d\n", row.name, row.time, 100*row.load,
			reference+row.above-273.15, row.mises, row.spread, row.inner, row.iterations)
	}
	fmt.Fprintf(w, `
   Error of the six stresses after the first hold over the first von Mises stress, from the closed form of a point whose strains
   are all held, by number of steps:
%s`, indented(r.hold))
}

func (r *report) writeAskew(w io.Writer) {
	fmt.Fprintf(w, `
4. NEWTON'S METHOD of the brick, lower face clamped, pulled askew by three corners with %d N: no two points are alike.
   Residual before each correction and after the last, over the load's size:
`, askewLoad)
	for i, residuals := range r.askew {
		fmt.Fprintf(w, "   Δt = %-6g h  %s\n", askewHours[i], newton.Text(residuals, "  "))
	}
	fmt.Fprintf(w, "   the longest of the patch   %s\n", newton.Text(r.strainedWorst, "  "))
	fmt.Fprintf(w, "   the longest of the tension %s\n", newton.Text(r.tension[0].worst, "  "))
}

func indented(s bench.Study) string {
	var b strings.Builder
	for _, line := range strings.Split(strings.TrimRight(s.String(), "\n"), "\n") {
		b.WriteString("   " + line + "\n")
	}
	return b.String()
}
