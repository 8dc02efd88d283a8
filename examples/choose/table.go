package main

import (
	"fmt"
	"io"
	"math"
	"strings"
	"unicode/utf8"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

// column is one of the table: its title and what stands there for a row.
type column struct {
	title string
	cell  func(*row) string
}

// columns of the table. To show more, add a line.
var columns = []column{
	{"law", func(r *row) string { return r.shortName(44) }},
	{"zero stress", zeroStress},
	{"history", history},
	{"exponent n", func(r *row) string { return between(r.report.Measures.StressExponent, "%.3g") }},
	{"n at ×10", tenTimes},
	{"softens", softens},
	{"Q [kJ/mol]", temperature},
	{"corners, jumps", continuous},
	{"largest step", largestStep},
	{"F/W/R", func(r *row) string {
		return fmt.Sprintf("%d/%d/%d", r.report.Count(audit.Fault), r.report.Count(audit.Warning), r.report.Count(audit.Remark))
	}},
}

const legend = `zero stress     none: no creep under no stress; creeps: there is, and the law drifts for ever
history         what the law remembers under load steps: nothing; the creep strain, by which it hardens or softens; internal
                variables, some of which age without load; or a clock, under which a part left unloaded on the bench creeps
                differently afterwards
exponent n      local stress exponent over the domain
n at ×10        the same at ten times the highest stress; "explodes" or "stalls" if the rate leaves the power law by more than a
                factor of 1000 or hardly rises any more, "undefined" if there is no number
softens         tertiary creep, and from which creep strain
Q               apparent activation energy over the domain; "one T" if the law is for one temperature
corners, jumps  of the rate, and along which argument
largest step    of backward Euler at constant stress from virgin material in the middle of the domain [h]
F/W/R           faults, warnings and remarks of the audit
`

func (s *study) writeTable(w io.Writer) {
	for first := 0; first < len(s.rows); {
		last := first
		for last < len(s.rows) && s.rows[last].family == s.rows[first].family {
			last++
		}
		fmt.Fprintf(w, "\n%s\n", s.groupTitle(&s.rows[first]))
		writeGroup(w, s.rows[first:last])
		first = last
	}
	fmt.Fprintf(w, "\n%s", legend)
}

func writeGroup(w io.Writer, rows []row) {
	cells := make([][]string, 1, len(rows)+1)
	widths := make([]int, len(columns))
	for j, c := range columns {
		cells[0] = append(cells[0], c.title)
		widths[j] = utf8.RuneCountInString(c.title)
	}
	for i := range rows {
		line := make([]string, len(columns))
		for j, c := range columns {
			line[j] = c.cell(&rows[i])
			widths[j] = max(widths[j], utf8.RuneCountInString(line[j]))
		}
		cells = append(cells, line)
	}
	for _, line := range cells {
		writeLine(w, line, widths)
	}
}

func (s *study) groupTitle(r *row) string {
	if r.origin != inventedNumbers {
		return strings.ToUpper(string(r.family)) + ", each over the range it is known for"
	}
	return fmt.Sprintf("%s, invented numbers, %.4g to %.4g MPa, %.0f to %.0f °C", strings.ToUpper(string(r.family)), r.domain.Stress.Low,
		r.domain.Stress.High, r.domain.Temperature.Low-zeroCelsius, r.domain.Temperature.High-zeroCelsius)
}

func writeLine(w io.Writer, cells []string, widths []int) {
	var b strings.Builder
	for j, c := range cells {
		fmt.Fprintf(&b, "%s%s  ", c, strings.Repeat(" ", widths[j]-utf8.RuneCountInString(c)))
	}
	fmt.Fprintln(w, strings.TrimRight(b.String(), " "))
}

// shortName keeps the table narrow: no more characters than that.
func (r *row) shortName(most int) string {
	name := r.name
	for _, w := range [][2]string{{", Frost and Ashby", ""}, {" stainless", ""}, {"glacier ", ""}, {", minimum rate", ""},
		{" and others", ""}, {" law", ""}, {"grain-boundary sliding", "sliding"}, {", grain size ", ", d = "},
		{"dislocation and diffusion creep", "both paths"}} {
		name = strings.ReplaceAll(name, w[0], w[1])
	}
	if runes := []rune(name); len(runes) > most {
		return string(runes[:most-1]) + "…"
	}
	return name
}

func (r *row) has(k audit.Kind) bool {
	_, ok := r.report.Find(k)
	return ok
}

func zeroStress(r *row) string {
	switch {
	case r.has(audit.CreepAtZeroStress):
		return "creeps"
	case r.has(audit.UndefinedAtZeroStress):
		return "undefined"
	}
	return "none"
}

func history(r *row) string {
	if r.clocked != nil {
		return "clock"
	}
	if e, ok := r.law.(creeplaw.Evolving); ok && len(e.Variables()) > 0 {
		s := fmt.Sprintf("%d variables", len(e.Variables()))
		if len(e.Variables()) == 1 {
			s = e.Variables()[0].Name
		}
		if r.has(audit.ClockDependence) {
			s += ", ages"
		}
		return s
	}
	switch m := r.report.Measures.StrainExponent; {
	case m.Low == 0 && m.High == 0:
		return "nothing"
	case m.Low < 0 && m.High > 0:
		return "hardens, softens"
	case m.High > 0:
		return "softens"
	}
	return "hardens"
}

func tenTimes(r *row) string {
	m := r.report.Measures
	switch {
	case r.has(audit.UndefinedBeyond):
		return "undefined"
	case r.has(audit.ExplodesBeyond):
		return fmt.Sprintf("%.3g explodes", m.TenfoldExponent)
	case r.has(audit.StallsBeyond):
		return fmt.Sprintf("%.3g stalls", m.TenfoldExponent)
	case math.IsNaN(m.TenfoldExponent):
		return "-"
	}
	return fmt.Sprintf("%.3g", m.TenfoldExponent)
}

func softens(r *row) string {
	f, ok := r.report.Find(audit.Softening)
	if !ok {
		return "no"
	}
	onset, ok := f.Number("softens from creep strain")
	switch {
	case !ok:
		return "by variables"
	case onset < 1.1*r.domain.Strain.Low:
		return "always"
	}
	return fmt.Sprintf("from %.2g %%", 100*onset)
}

func temperature(r *row) string {
	m := r.report.Measures.ActivationEnergy
	switch {
	case r.domain.Temperature.Low == r.domain.Temperature.High:
		return "one T"
	case m.Low == 0 && m.High == 0:
		return "none"
	}
	return between(audit.Range{Low: m.Low / 1000, High: m.High / 1000}, "%.3g")
}

func continuous(r *row) string {
	var jumps, corners []string
	for _, f := range r.report.Findings {
		switch f.Kind {
		case audit.RateJump:
			jumps = append(jumps, short(f.By))
		case audit.SlopeJump:
			corners = append(corners, short(f.By))
		}
	}
	switch {
	case len(jumps) > 0:
		return "jump: " + strings.Join(unique(jumps), ", ")
	case len(corners) > 0:
		return "corner: " + strings.Join(unique(corners), ", ")
	}
	return "none"
}

// short is an argument by its letter.
func short(a audit.Argument) string {
	return map[audit.Argument]string{audit.Stress: "σ", audit.Strain: "p", audit.Temperature: "T"}[a]
}

func unique(list []string) []string {
	var kept []string
	seen := map[string]bool{}
	for _, s := range list {
		if !seen[s] {
			kept = append(kept, s)
		}
		seen[s] = true
	}
	return kept
}

func largestStep(r *row) string {
	switch dt := r.report.Measures.LargestFirstStep; {
	case math.IsInf(dt, 1):
		return "any"
	case math.IsNaN(dt):
		return "-"
	default:
		return fmt.Sprintf("%.3g", dt)
	}
}

// between writes a range, or the one value it has as far as it is written.
func between(r audit.Range, format string) string {
	low, high := fmt.Sprintf(format, r.Low), fmt.Sprintf(format, r.High)
	switch {
	case math.IsNaN(r.Low):
		return "-"
	case low == high:
		return low
	}
	return low + " … " + high
}
