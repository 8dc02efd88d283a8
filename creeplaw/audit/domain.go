package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// Range is an interval. Low and High may be equal where a quantity is fixed.
type Range struct{ Low, High float64 }

// at is the value a fraction of the way up, on a logarithmic scale; exact at the ends.
func (r Range) at(fraction float64) float64 {
	switch fraction {
	case 0:
		return r.Low
	case 1:
		return r.High
	}
	return r.Low * math.Pow(r.High/r.Low, fraction)
}

// middle is the geometric mean.
func (r Range) middle() float64 { return r.at(0.5) }

func (r Range) fixed() bool { return r.Low == r.High }

// Domain is where a law is meant to be used: the audit samples it log-uniformly, faces and corners included.
type Domain struct {
	Stress      Range // von Mises stress, > 0 [stress]
	Strain      Range // accumulated creep strain, > 0 [-]
	Temperature Range // absolute, > 0 [K]

	// Time is the span of a service life, from the shortest hold of interest to the longest wait [time]. The history with an
	// unloaded wait holds the stress for the geometric mean of the two and waits for the longer. RunClocked needs it; for
	// other laws the zero Range leaves it to the audit, which takes the time the law itself needs from the middle of the domain.
	Time Range
}

// Breakpoint is a place where a formula changes, or a node of a table.
type Breakpoint struct {
	By    Argument // Stress, Strain or Temperature
	Value float64
}

// StressBreaks is the optional capability of a law to name the stresses at which its formula changes. The audit looks there
// besides where its own search leads it; so with the other two.
type StressBreaks interface{ StressBreakpoints() []float64 }

// StrainBreaks names creep strains.
type StrainBreaks interface{ StrainBreakpoints() []float64 }

// TemperatureBreaks names temperatures, such as the nodes of a table.
type TemperatureBreaks interface{ TemperatureBreakpoints() []float64 }

// Settings are the choices of an audit. The zero Settings are the documented defaults.
type Settings struct {
	Name  string         // of the law in the report; empty is its Go type
	Units creeplaw.Units // printed beside stresses and rates; zero prints "stress" and "time"

	// Stiffness is that of whatever holds the strain: Young's modulus for a bar, 3G for a hold of all components [stress]. With
	// it a finding on uniqueness states the largest step at fixed strain. Zero is unknown: only the stiffness that would do is
	// stated.
	Stiffness float64

	Points    int // scattered through the domain, besides its corners and its middle; zero is 400
	Lines     int // scanned along each of stress, strain and temperature; zero is 13, at least 5
	Intervals int // of each line; zero is 256, at least 32

	// DerivativeTolerance is the relative error allowed to a partial derivative. Zero is 1e-6.
	DerivativeTolerance float64

	// Activation bounds the apparent activation energy [J/mol]. Zero is 20 to 1000 kJ/mol: the lowest published for creep are
	// those of solders at low stress and of ice, the highest those of tungsten and of 9–12 % chromium steels near the limit of
	// their use (common practice).
	Activation Range

	// WideTemperature is the width of a temperature range over which a law without temperature is a finding [K]. Zero is 25 K,
	// across which 250 kJ/mol make a factor of three at 550 °C.
	WideTemperature float64

	Breakpoints []Breakpoint // places to look at, besides those the law names itself

	// SetClock moves the clock of a law that reads one, such as a variable of the host program. The audit calls it with the
	// time [time] of each evaluation of its histories. Nil for a law without.
	SetClock func(time float64)
}

// InputError says that an audit was asked for with a domain or a setting it cannot use.
type InputError struct {
	Quantity string  // such as "lowest stress"
	Value    float64 // the value that was given
	Want     string  // what it must be
}

func (e *InputError) Error() string {
	return fmt.Sprintf("audit: %s is %v, must be %s", e.Quantity, e.Value, e.Want)
}

func (d Domain) check(needTime bool) error {
	ranges := []struct {
		name string
		Range
	}{{"stress", d.Stress}, {"creep strain", d.Strain}, {"temperature", d.Temperature}, {"time", d.Time}}
	if !needTime && d.Time == (Range{}) {
		ranges = ranges[:3]
	}
	for _, r := range ranges {
		if !(r.Low > 0) || math.IsInf(r.Low, 1) {
			return &InputError{"lowest " + r.name, r.Low, "positive and finite"}
		}
		if !(r.High >= r.Low) || math.IsInf(r.High, 1) {
			return &InputError{"highest " + r.name, r.High, "finite and at least the lowest"}
		}
	}
	return nil
}

// complete fills in the defaults and says what is wrong with the settings.
func (s Settings) complete(subject any) (Settings, error) {
	if s.Name == "" {
		s.Name = fmt.Sprintf("%T", subject)
	}
	for _, n := range []struct {
		name            string
		value           *int
		standard, least int
	}{{"number of points", &s.Points, 400, 50}, {"number of lines", &s.Lines, 13, 5}, {"number of intervals", &s.Intervals, 256, 32}} {
		if *n.value == 0 {
			*n.value = n.standard
		}
		if *n.value < n.least {
			return s, &InputError{n.name, float64(*n.value), fmt.Sprintf("%d or more", n.least)}
		}
	}
	if s.DerivativeTolerance == 0 {
		s.DerivativeTolerance = 1e-6
	}
	if s.Activation == (Range{}) {
		s.Activation = Range{20e3, 1000e3}
	}
	if s.WideTemperature == 0 {
		s.WideTemperature = 25
	}
	return s, s.check()
}

func (s Settings) check() error {
	switch {
	case !(s.DerivativeTolerance >= 1e-10 && s.DerivativeTolerance <= 0.1):
		return &InputError{"derivative tolerance", s.DerivativeTolerance, "from 1e-10 to 0.1"}
	case !(s.Stiffness >= 0) || math.IsInf(s.Stiffness, 1):
		return &InputError{"stiffness", s.Stiffness, "at least 0 and finite"}
	case !(s.Activation.Low >= 0 && s.Activation.High > s.Activation.Low):
		return &InputError{"highest activation energy", s.Activation.High, "above the lowest, which is at least 0"}
	case !(s.WideTemperature > 0):
		return &InputError{"wide temperature range", s.WideTemperature, "positive"}
	case !(float64(s.Units.Stress) >= 0 && float64(s.Units.Time) >= 0):
		return &InputError{"unit", math.Min(float64(s.Units.Stress), float64(s.Units.Time)), "one of package creeplaw"}
	}
	for _, b := range s.Breakpoints {
		if b.By != Stress && b.By != Strain && b.By != Temperature {
			return &InputError{"argument of a breakpoint", float64(b.By), "stress, strain or temperature"}
		}
		if !(b.Value > 0) || math.IsInf(b.Value, 1) {
			return &InputError{"breakpoint", b.Value, "positive and finite"}
		}
	}
	return nil
}

// stressUnit and timeUnit are what is printed behind numbers.
func (s *Settings) stressUnit() string {
	if s.Units.Stress == 0 {
		return "stress"
	}
	return s.Units.Stress.String()
}

func (s *Settings) timeUnit() string {
	if s.Units.Time == 0 {
		return "time"
	}
	return s.Units.Time.String()
}
