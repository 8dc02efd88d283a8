package main

import (
	"fmt"
	"io"
	"math"
	"strings"

	"example.com/holdtime/examples/figure"
	"example.com/holdtime/examples/newton"
)

// kilonewton writes the clamp load of the joint for a load of one bolt.
func (p *report) kilonewton(perBolt float64) string {
	return figure.Grouped(perBolt*float64(p.joint.count)/newtonPerKilonewton, 0)
}

// hours writes a time, with decimals where the history is short.
func (p *report) hours(time float64) string {
	decimals := 0
	if p.history.end()-p.history.start() < 1000 {
		decimals = 2
	}
	return figure.Grouped(time, decimals)
}

// percent of the preload.
func (p *report) percent(perBolt float64) float64 {
	return 100 * perBolt / p.joint.perBolt(p.joint.preload)
}

func (p *report) write(w io.Writer) {
	p.writeJoint(w)
	p.writeTable(w)
	p.writeSpells(w)
	p.writeGains(w)
	if p.opened == nil {
		p.writeThermal(w)
	}
	p.writeEffort(w)
}

func (p *report) writeJoint(w io.Writer) {
	j := p.joint
	required := j.perBolt(j.required)
	fmt.Fprintf(w, "%s\n\n", j.title)
	fmt.Fprintf(w, "%d bolts, preload %s kN, required clamp load %s kN (%.1f %%)\n", j.count,
		p.kilonewton(j.perBolt(j.preload)), p.kilonewton(required), p.percent(required))
	p.writeStiffness(w, "at the assembly", p.course.samples[0].condition)
	if p.opened == nil {
		p.writeStiffness(w, "at its hottest", p.course.hot)
	}
}

func (p *report) writeStiffness(w io.Writer, when string, c condition) {
	k, _ := p.joint.flange.compliance(c.flange)
	fmt.Fprintf(w, "%s: one bolt %s kN/mm, its share of the joint %s kN/mm, elastic follow-up Z = %.3f\n", when,
		figure.Grouped(1/p.joint.boltCompliance(c.bolt)/newtonPerKilonewton, 0), figure.Grouped(1/k/newtonPerKilonewton, 0),
		p.joint.followUp(c.bolt, c.flange))
}

func (p *report) writeTable(w io.Writer) {
	const line = "%9s %7s %7s %9s %6s %11s %12s  %s\n"
	thin := p.joint.thinnest()
	fmt.Fprintf(w, "\nBolt stress and creep strain are those of the section %q.\n\n", p.joint.sections[thin].name)
	writeLine(w, line, "time", "bolt", "flange", "clamp", "of", "bolt", "creep", "")
	writeLine(w, line, "", "", "", "load", "init.", "stress", "strain", "")
	writeLine(w, line, "h", "°C", "°C", "kN", "%", "MPa", "%", "")
	for _, s := range p.course.samples {
		if !s.stop {
			continue
		}
		writeLine(w, line, p.hours(s.time), figure.Grouped(s.bolt-icePoint, 0), figure.Grouped(s.flange-icePoint, 0),
			p.kilonewton(s.load), figure.Grouped(p.percent(s.load), 1), figure.Grouped(s.points[thin].stress, 1),
			figure.Grouped(100*s.points[thin].state.Equivalent, 4), s.event)
	}
	peak := p.peak(thin)
	fmt.Fprintf(w, "\nHighest bolt stress %s MPa at %s h. The model has no plasticity: hold it against the yield strength.\n",
		figure.Grouped(peak.points[thin].stress, 0), p.hours(peak.time))
	if p.opened != nil {
		fmt.Fprintf(w, "\n%v. The table ends there.\n", p.opened)
	}
}

// writeLine leaves no blanks at the end of a line.
func writeLine(w io.Writer, format string, cells ...any) {
	fmt.Fprintln(w, strings.TrimRight(fmt.Sprintf(format, cells...), " \n"))
}

func (p *report) peak(section int) sample {
	peak := p.course.samples[0]
	for _, s := range p.course.samples {
		if s.points[section].stress > peak.points[section].stress {
			peak = s
		}
	}
	return peak
}

func (p *report) writeSpells(w io.Writer) {
	fmt.Fprintf(w, "\nClamp load under the required %s kN:\n", p.kilonewton(p.joint.perBolt(p.joint.required)))
	if len(p.course.under) == 0 {
		fmt.Fprintf(w, "  never\n")
	}
	for i, s := range p.course.under {
		first := ""
		if i == 0 {
			first = "  the first time"
		}
		fmt.Fprintf(w, "  from %s h to %s h (%s h)%s\n", p.hours(s.from), p.hours(s.to), p.hours(s.to-s.from), first)
	}
}

// writeGains compares runs with none, one, two … of the retightenings.
func (p *report) writeGains(w io.Writer) {
	if len(p.without) == 0 {
		return
	}
	const line = "  %-20s %22s %9s %15s %13s %9s\n"
	span := p.history.end() - p.history.start()
	fmt.Fprintf(w, "\nWhat each retightening buys, in hours at or above the required load (of %s h):\n", p.hours(span))
	writeLine(w, line, "retightened", "clamp load raised, kN", "nut turn", "first under, h", "hours above", "gained, h")
	before := 0.0
	for k, c := range append(p.without[:len(p.without):len(p.without)], p.course) {
		above := span - c.hoursUnder()
		name, raised, turn, gained := "not at all", "", "", ""
		if k > 0 && k <= len(c.retightened) {
			done := c.retightened[k-1]
			name = "and at " + p.hours(done.time) + " h"
			if k == 1 {
				name = "at " + p.hours(done.time) + " h"
			}
			raised, turn = p.kilonewton(done.before)+" to "+p.kilonewton(done.after), p.joint.turn(done.travel)
			if done.needless {
				raised, turn = p.kilonewton(done.before)+", not needed", ""
			}
			gained = p.hours(above - before)
		}
		first := "never"
		if len(c.under) > 0 {
			first = p.hours(c.under[0].from)
		}
		writeLine(w, line, name, raised, turn, first, p.hours(above), gained)
		before = above
	}
}

func (p *report) writeThermal(w io.Writer) {
	hot := p.course.hot
	n := float64(p.joint.count) / newtonPerKilonewton
	fmt.Fprintf(w, "\nAt %s h (bolt %.0f °C, flange %.0f °C) a bolt warmer by 1 K changes the clamp load by %+.1f kN, a flange "+
		"warmer by 1 K by %+.1f kN.\n", p.hours(hot.time), hot.bolt-icePoint, hot.flange-icePoint, p.byBolt*n, p.byFlange*n)
}

func (p *report) writeEffort(w io.Writer) {
	c, e := p.course, p.course.effort
	fmt.Fprintf(w, "\nTime steps: %d, each also done in two halves; %d were repeated shorter. At a tenth of the tolerance the "+
		"loads above change by at most %.2f kN (%.4f %% of the preload).\n", c.accepted, c.repeated,
		p.uncertainty*float64(p.joint.count)/newtonPerKilonewton, p.percent(p.uncertainty))
	fmt.Fprintf(w, "Global Newton with the library's tangent, %d unknowns: %d solves, %.2f iterations in the mean, %d at worst; "+
		"largest scaled residual there: %s\n", 2*len(p.joint.sections)+2, e.solves,
		float64(e.iterations)/math.Max(1, float64(e.solves)), len(e.worst)-1, newton.Text(e.worst, ", "))
	if s := c.single; s.residuals != nil {
		fmt.Fprintf(w, "All of %s h to %s h as one single step, to show the iteration: %s\n", p.hours(s.from), p.hours(s.to),
			newton.Text(s.residuals, ", "))
	}
}
