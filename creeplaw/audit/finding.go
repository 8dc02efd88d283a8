package audit

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"example.com/holdtime/creeplaw"
)

// Argument is what a rate depends on.
type Argument int

// The arguments of a rate.
const (
	None Argument = iota
	Stress
	Strain
	Temperature
	MeanStress
	PrincipalStress
	Time
	Variable // an internal variable; Finding.Variable names it
)

// String is the argument in words.
func (a Argument) String() string {
	names := [...]string{"", "stress", "creep strain", "temperature", "mean stress", "greatest principal stress", "time",
		"internal variable"}
	if a < 0 || int(a) >= len(names) {
		return fmt.Sprintf("argument %d", int(a))
	}
	return names[a]
}

// Number is a named figure of a finding.
type Number struct {
	Name  string
	Value float64
	Unit  string // empty for a pure number
}

// String is such as "rate 1.2e-09 1/h".
func (n Number) String() string {
	if n.Unit == "" {
		return fmt.Sprintf("%s %.4g", n.Name, n.Value)
	}
	return fmt.Sprintf("%s %.4g %s", n.Name, n.Value, n.Unit)
}

// Finding is one thing a reviewer would write down.
type Finding struct {
	Kind     Kind
	Severity Severity
	By       Argument // the argument it is about, None where there is none in particular
	Variable string   // name of the internal variable it is about, if any

	// At is where it was seen, at its worst. The stresses of a law that is not creeplaw.Evolving are those of tension.
	At   creeplaw.EvolvingPoint
	Time float64 // on the clock, for a clocked rate; 0 otherwise

	Seen     int      // how many of the places looked at show it
	Numbers  []Number // what was found there
	Sentence string   // what a reviewer would write
}

// Number returns a figure by its name.
func (f Finding) Number(name string) (value float64, ok bool) {
	for _, n := range f.Numbers {
		if n.Name == name {
			return n.Value, true
		}
	}
	return 0, false
}

// String is the severity, the kind and the sentence.
func (f Finding) String() string { return fmt.Sprintf("%v: %v: %s", f.Severity, f.Kind, f.Sentence) }

// Check is one question of the audit and how it came out.
type Check struct {
	Name     string
	Found    int    // findings it led to
	Examined bool   // false where the question does not arise or could not be put
	Remark   string // what was seen to be in order, or why it was not examined
}

// Measures are what an audit read off the law over the domain. Ranges that could not be read are NaN.
type Measures struct {
	ZeroStressRate   float64 // greatest rate at no stress [1/time]
	StressExponent   Range   // local, ∂ln ṗ/∂ln σ [-]
	StrainExponent   Range   // local, ∂ln ṗ/∂ln p [-], negative for hardening
	ActivationEnergy Range   // apparent, R T ∂ln ṗ/∂ln T [J/mol]

	// LargestStep is the largest Δt for which a backward-Euler step at fixed stress has a solution connected to Δt → 0: the
	// least over the domain, or over the states that creep at constant stress leads to [time]; +Inf where any step has.
	LargestStep float64
	// LargestFirstStep is that from virgin material at the middle stress and temperature.
	LargestFirstStep float64
	// LargestStepAtFixedStrain is the same with the strain fixed through Settings.Stiffness; NaN if that is unknown and the
	// law softens.
	LargestStepAtFixedStrain float64
	// SufficientStiffness makes every step at fixed strain unique at the points looked at [stress]; 0 where any does.
	SufficientStiffness float64

	// TenfoldExponent and TenthExponent are the local stress exponents at ten times the highest stress and at a tenth of the
	// lowest, at the middle of the domain.
	TenfoldExponent, TenthExponent float64
	// TenfoldExcess is how far the rate at ten times the highest stress is above the power law the domain ends with, in
	// decades; negative below.
	TenfoldExcess float64
}

// Report is what an audit found. The same law, domain and settings give the same report.
type Report struct {
	Law         string // name or Go type
	Domain      Domain
	Settings    Settings  // with the defaults filled in
	Findings    []Finding // faults first, then warnings, then remarks
	Checks      []Check   // every question, in the order it was put
	Measures    Measures
	Evaluations int // of the law
}

// Worst is the greatest severity among the findings; 0 if there is none.
func (r *Report) Worst() Severity {
	worst := Severity(0)
	for _, f := range r.Findings {
		worst = max(worst, f.Severity)
	}
	return worst
}

// Count is the number of findings of a severity.
func (r *Report) Count(s Severity) int {
	n := 0
	for _, f := range r.Findings {
		if f.Severity == s {
			n++
		}
	}
	return n
}

// Find returns the most severe finding of a kind.
func (r *Report) Find(k Kind) (Finding, bool) {
	for _, f := range r.Findings {
		if f.Kind == k {
			return f, true
		}
	}
	return Finding{}, false
}

// collected gathers findings: of those about the same thing at the same place it keeps the worst.
type collected struct {
	findings []Finding
	keys     []string
	badness  []float64
}

// note takes a finding. The key says what is the same thing; the larger badness is the worse.
func (c *collected) note(f Finding, badness float64, place string) {
	key := fmt.Sprint(f.Kind, f.By, f.Variable, place)
	i := slices.Index(c.keys, key)
	if i < 0 {
		f.Seen = max(f.Seen, 1)
		c.findings, c.keys, c.badness = append(c.findings, f), append(c.keys, key), append(c.badness, badness)
		return
	}
	seen := c.findings[i].Seen + max(f.Seen, 1)
	const rounding = 1e-9 // among equals the first stays, on every machine
	if badness > c.badness[i]+rounding*math.Abs(c.badness[i]) {
		c.findings[i], c.badness[i] = f, badness
	}
	c.findings[i].Seen = seen
}

// sorted is the order of a report.
func (c *collected) sorted() []Finding {
	slices.SortStableFunc(c.findings, func(a, b Finding) int {
		return cmp.Or(cmp.Compare(b.Severity, a.Severity), cmp.Compare(a.Kind, b.Kind), cmp.Compare(a.By, b.By),
			cmp.Compare(a.Variable, b.Variable), cmp.Compare(a.At.Stress, b.At.Stress), cmp.Compare(a.At.Strain, b.At.Strain),
			cmp.Compare(a.At.Temperature, b.At.Temperature), cmp.Compare(a.Time, b.Time))
	})
	return c.findings
}
