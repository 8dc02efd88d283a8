package audit

import (
	"fmt"
	"io"
	"math"
	"strings"
	"unicode/utf8"

	"example.com/holdtime/creeplaw"
)

// width of the text report, in characters.
const width = 78

// Text is the report as plain text to paste into a document. The date is printed as it is given; the audit asks no clock.
func (r *Report) Text(date string) string {
	var b strings.Builder
	r.Write(&b, date) // a strings.Builder does not fail
	return b.String()
}

// Write writes the report as plain text, no line longer than 78 characters.
func (r *Report) Write(w io.Writer, date string) error {
	t := &text{}
	t.head(r, date)
	for _, s := range []Severity{Fault, Warning, Remark} {
		t.group(r, s)
	}
	t.checks(r)
	t.measures(r)
	t.paragraph("Limits of this audit", "")
	t.wrap("  ", "  ", "It samples, and proves nothing between its points: a law that passes is consistent, not right. Published parameters "+
		"are starting points, never design data. Whether numbers describe a material, and what a life or a strength may be, is for "+
		"tests, for the governing code and for qualified engineers to say.")
	_, err := io.WriteString(w, strings.Join(t.lines, "\n")+"\n")
	return err
}

type text struct{ lines []string }

func (t *text) add(format string, args ...any) {
	t.lines = append(t.lines, fmt.Sprintf(format, args...))
}

func (t *text) paragraph(title, value string) {
	t.lines = append(t.lines, "")
	t.add("%s", strings.TrimRight(title+" "+value, " "))
}

// wrap breaks a sentence into lines, the first with a prefix of its own.
func (t *text) wrap(first, rest, sentence string) {
	line := first
	empty := true
	for _, word := range strings.Fields(sentence) {
		if !empty && utf8.RuneCountInString(line)+1+utf8.RuneCountInString(word) > width {
			t.lines = append(t.lines, line)
			line, empty = rest, true
		}
		if !empty {
			line += " "
		}
		line += word
		empty = false
	}
	t.lines = append(t.lines, line)
}

func (t *text) head(r *Report, date string) {
	t.wrap("Audit of a creep law: ", "  ", r.Law)
	if date != "" {
		t.wrap("Date: ", "  ", date)
	}
	t.add("Verdict: %s, %s, %s", count(r.Count(Fault), "fault"), count(r.Count(Warning), "warning"), count(r.Count(Remark), "remark"))
	s, d := &r.Settings, &r.Domain
	t.paragraph("Domain", "(log-uniform)")
	t.add("  stress        %.4g … %.4g %s", d.Stress.Low, d.Stress.High, s.stressUnit())
	t.add("  creep strain  %.4g … %.4g", d.Strain.Low, d.Strain.High)
	t.add("  temperature   %.4g … %.4g K", d.Temperature.Low, d.Temperature.High)
	if d.Time != (Range{}) {
		t.add("  time          %.4g … %.4g %s", d.Time.Low, d.Time.High, s.timeUnit())
	}
	t.paragraph("Settings", "")
	t.wrap("  ", "  ", fmt.Sprintf("%d scattered points, %d lines of %d intervals along each argument, %d evaluations in all; derivative "+
		"tolerance %.0e; activation %.4g to %.4g kJ/mol; wide temperature range above %.4g K; stiffness %s.", s.Points, s.Lines,
		s.Intervals, r.Evaluations, s.DerivativeTolerance, s.Activation.Low/1000, s.Activation.High/1000, s.WideTemperature,
		stated(s.Stiffness, s.stressUnit())))
}

func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

func stated(v float64, unit string) string {
	if v == 0 {
		return "not given"
	}
	return fmt.Sprintf("%.4g %s", v, unit)
}

func (t *text) group(r *Report, s Severity) {
	title := map[Severity]string{Fault: "Faults", Warning: "Warnings", Remark: "Remarks"}[s]
	if r.Count(s) == 0 {
		t.paragraph(title+":", "none")
		return
	}
	t.paragraph(title, "")
	n := 0
	for _, f := range r.Findings {
		if f.Severity != s {
			continue
		}
		n++
		number := fmt.Sprintf("  %d. ", n)
		indent := strings.Repeat(" ", utf8.RuneCountInString(number))
		t.wrap(number, indent, heading(f))
		t.wrap(indent, indent, f.Sentence)
		t.wrap(indent+"at ", indent+"   ", r.place(f))
		for _, number := range f.Numbers {
			t.wrap(indent+"- ", indent+"  ", number.String())
		}
	}
}

// heading is the first line of a finding.
func heading(f Finding) string {
	title := f.Kind.String()
	switch {
	case f.Variable != "" && f.By != Variable && f.By != None:
		title += ", " + f.Variable + " by " + f.By.String()
	case f.Variable != "":
		title += ", " + f.Variable
	case f.By != None:
		title += ", by " + f.By.String()
	}
	if f.Seen > 1 {
		title += fmt.Sprintf(" (seen at %d places; the worst:)", f.Seen)
	}
	return title
}

// place names the point of a finding.
func (r *Report) place(f Finding) string {
	p := f.At
	s := fmt.Sprintf("stress %.6g %s, creep strain %.4g, temperature %.6g K", p.Stress, r.Settings.stressUnit(), p.Strain, p.Temperature)
	if p.MeanStress != p.Stress/3 {
		s += fmt.Sprintf(", mean stress %.4g, greatest principal stress %.4g", p.MeanStress, p.PrincipalStress)
	}
	if p.Internal != [creeplaw.MaxVariables]float64{} {
		s += fmt.Sprintf(", internal variables %.4g", p.Internal)
	}
	if f.Time != 0 {
		s += fmt.Sprintf(", time %.4g %s", f.Time, r.Settings.timeUnit())
	}
	return s
}

func (t *text) checks(r *Report) {
	t.paragraph("Checked and found in order", "")
	some := false
	for _, c := range r.Checks {
		if c.Examined && c.Found == 0 {
			t.wrap("  - ", "    ", c.Name+": "+c.Remark+".")
			some = true
		}
	}
	if !some {
		t.add("  nothing")
	}
	first := true
	for _, c := range r.Checks {
		if c.Examined || c.Found > 0 {
			continue
		}
		if first {
			t.paragraph("Not examined", "")
			first = false
		}
		t.wrap("  - ", "    ", c.Name+": "+c.Remark+".")
	}
}

func (t *text) measures(r *Report) {
	m, s := &r.Measures, &r.Settings
	t.paragraph("Read off the law over the domain", "")
	t.add("  local stress exponent         %s", between(m.StressExponent, 1, ""))
	t.add("    at ten times the stress     %s", known(fmt.Sprintf("%.4g", m.TenfoldExponent)))
	t.add("    at a tenth of it            %s", known(fmt.Sprintf("%.4g", m.TenthExponent)))
	t.add("  local strain exponent         %s", between(m.StrainExponent, 1, ""))
	t.add("  apparent activation energy    %s", between(m.ActivationEnergy, 1e-3, " kJ/mol"))
	t.add("  rate under no stress          %s", step(m.ZeroStressRate, "1/"+s.timeUnit()))
	t.add("  largest step, fixed stress    %s", step(m.LargestStep, s.timeUnit()))
	t.add("    from virgin material        %s", step(m.LargestFirstStep, s.timeUnit()))
	t.add("  largest step, fixed strain    %s", step(m.LargestStepAtFixedStrain, s.timeUnit()))
}

func between(r Range, scale float64, unit string) string {
	low, high := fmt.Sprintf("%.4g", r.Low*scale), fmt.Sprintf("%.4g", r.High*scale)
	if low == high {
		return known(low) + unit
	}
	return low + " … " + high + unit
}

// step is a largest step in words.
func step(dt float64, unit string) string {
	if math.IsInf(dt, 1) {
		return "any"
	}
	return known(fmt.Sprintf("%.4g", dt)) + " " + unit
}

// known replaces what could not be read.
func known(number string) string {
	if number == "NaN" {
		return "not known"
	}
	return number
}
