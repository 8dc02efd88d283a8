package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// Run audits a law over a domain. The law may be anybody's and needs no registration; what it can do beyond Rate is found by
// type assertion. The report is the same for the same input.
//
// The error is an *InputError for a domain or a setting that cannot be used, and a *creeplaw.MissingError for a nil law;
// whatever is wrong with the law is a finding.
func Run(law creeplaw.Law, domain Domain, settings Settings) (Report, error) {
	if law == nil {
		return Report{}, &creeplaw.MissingError{Law: "audit", Part: "law"}
	}
	x, err := newExamination(law, domain, settings, false)
	if err != nil {
		return Report{}, err
	}
	x.setLaw(law)
	if during, ok := law.(creeplaw.During); ok && during.Clocked != nil {
		x.clock = during.Clocked
	} else if clock, ok := law.(creeplaw.Clocked); ok {
		x.clock = clock
	}
	x.examine()
	return x.report(), nil
}

// RunClocked audits a rate that depends on a clock: the questions about a law are put at the earliest, the latest and the
// middle time of the domain, and the history with an unloaded wait is followed. Errors are those of Run.
func RunClocked(rate creeplaw.Clocked, domain Domain, settings Settings) (Report, error) {
	if rate == nil {
		return Report{}, &creeplaw.MissingError{Law: "audit", Part: "clocked rate"}
	}
	x, err := newExamination(rate, domain, settings, true)
	if err != nil {
		return Report{}, err
	}
	x.clock = rate
	for _, x.time = range []float64{domain.Time.Low, domain.Time.High, domain.Time.middle()} {
		x.setLaw(creeplaw.During{Clocked: rate, Start: x.time, End: x.time})
		x.examine()
	}
	return x.report(), nil
}

// examination is a law on its way through the questions.
type examination struct {
	collected
	law       creeplaw.Law
	logs      creeplaw.Logarithmic // the law's own, or an adapter
	ownLogs   bool
	trustLogs bool // ln ṗ is taken from LogRate
	evolving  creeplaw.Evolving
	// hidesPrincipal: the greatest principal stress is NaN for a law that does not see it.
	hidesPrincipal bool

	clock creeplaw.Clocked
	time  float64 // of a clocked rate

	domain      Domain
	settings    Settings
	breakpoints []Breakpoint
	points      []creeplaw.Point   // middle, corners, scattered
	rates       []creeplaw.Rate    // at the points
	logRates    []creeplaw.LogRate // at the points, if the law has its own
	lines       [3][]*line         // along stress, strain, temperature
	states      []creeplaw.EvolvingPoint

	checks      []Check
	measures    Measures
	evaluations int
	last        creeplaw.EvolvingPoint // the point of the last evaluation
}

func newExamination(subject any, domain Domain, settings Settings, needTime bool) (*examination, error) {
	if err := domain.check(needTime); err != nil {
		return nil, err
	}
	settings, err := settings.complete(subject)
	if err != nil {
		return nil, err
	}
	x := &examination{domain: domain, settings: settings}
	x.points = x.sample()
	x.breakpoints = append(x.breakpoints, settings.Breakpoints...)
	x.nameBreakpoints(subject)
	return x, nil
}

func (x *examination) nameBreakpoints(subject any) {
	var named [3][]float64
	if s, ok := subject.(StressBreaks); ok {
		named[0] = s.StressBreakpoints()
	}
	if s, ok := subject.(StrainBreaks); ok {
		named[1] = s.StrainBreakpoints()
	}
	if s, ok := subject.(TemperatureBreaks); ok {
		named[2] = s.TemperatureBreakpoints()
	}
	for i, by := range axes {
		for _, v := range named[i] {
			x.breakpoints = append(x.breakpoints, Breakpoint{by, v})
		}
	}
}

// setLaw looks up what the law can do.
func (x *examination) setLaw(law creeplaw.Law) {
	x.law, x.logs = law, creeplaw.Log(law)
	_, x.ownLogs = law.(creeplaw.Logarithmic)
	x.trustLogs = x.ownLogs
	x.evolving, _ = law.(creeplaw.Evolving)
	nan := math.NaN()
	unknown := Range{nan, nan}
	x.measures = Measures{ZeroStressRate: nan, StressExponent: unknown, StrainExponent: unknown, ActivationEnergy: unknown,
		LargestStep: nan, LargestFirstStep: nan, LargestStepAtFixedStrain: nan, SufficientStiffness: nan, TenfoldExponent: nan, TenthExponent: nan,
		TenfoldExcess: nan}
}

// question is one check: it notes findings, and says what was in order or why there was nothing to examine.
type question struct {
	name string
	put  func(*examination) answer
}

type answer struct {
	remark  string
	skipped bool
}

func inOrder(format string, args ...any) answer { return answer{remark: fmt.Sprintf(format, args...)} }
func skipped(format string, args ...any) answer {
	return answer{remark: fmt.Sprintf(format, args...), skipped: true}
}

// questions is the list to extend. The first decides whether the others make sense.
var questions = []question{
	{"same input, same bits", repeatable},
	{"internal variables", variables},
	{"logarithm of the rate", logarithm},
	{"sign and finiteness", signAndFiniteness},
	{"a stress that is not a number", notANumber},
	{"zero stress", zeroStress},
	{"zero creep strain", zeroStrain},
	{"derivatives against differences", derivatives},
	{"continuity", continuity},
	{"rise with stress", monotone},
	{"hardening, softening and the step", softening},
	{"unloaded wait", unloadedWait},
	{"activation", activation},
	{"ten times the stress and a tenth", beyond},
	{"internal variables: finite, differentiated", evolution},
	{"internal variables: direction and step", evolutionSense},
}

func (x *examination) examine() {
	x.lines, x.states = [3][]*line{}, nil
	stopped := false
	for i, q := range questions {
		c := Check{Name: q.name}
		before := len(x.findings)
		if stopped {
			c.Remark = "the law is not repeatable: nothing can be concluded from its values"
		} else {
			a := x.ask(q)
			c.Found, c.Examined, c.Remark = len(x.findings)-before, !a.skipped, a.remark
		}
		if i == 0 && c.Found > 0 {
			stopped = true
		}
		x.record(c)
	}
}

// record adds a check, or adds to it where the questions are put more than once.
func (x *examination) record(c Check) {
	for i := range x.checks {
		if old := &x.checks[i]; old.Name == c.Name {
			old.Found += c.Found
			old.Examined = old.Examined || c.Examined
			old.Remark = c.Remark
			return
		}
	}
	x.checks = append(x.checks, c)
}

// ask puts a question and survives a law that panics.
func (x *examination) ask(q question) (a answer) {
	defer func() {
		if reason := recover(); reason != nil {
			x.note(Finding{Kind: Panics, Severity: Fault, At: x.last, Time: x.time,
				Sentence: fmt.Sprintf("The law panics (%v) at a point of the audit: whatever the point, it must return a number or NaN.",
					reason)}, 0, "")
			a = skipped("the law panicked")
		}
	}()
	return q.put(x)
}

func (x *examination) report() Report {
	return Report{Law: x.settings.Name, Domain: x.domain, Settings: x.settings, Findings: x.sorted(), Checks: x.checks,
		Measures: x.measures, Evaluations: x.evaluations}
}
