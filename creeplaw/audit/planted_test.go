package audit_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

// plant is a law with one fault and where it must be found.
type plant struct {
	name     string
	law      creeplaw.Law
	kind     audit.Kind
	severity audit.Severity
	by       audit.Argument
	near     func(f audit.Finding) bool // the place
	with     []audit.Kind               // what else of weight the planted fault brings along
	domain   func(*audit.Domain)
	settings func(*audit.Settings)
}

func anywhere(audit.Finding) bool { return true }

func stressBetween(low, high float64) func(audit.Finding) bool {
	return func(f audit.Finding) bool { return f.At.Stress >= low && f.At.Stress <= high }
}

func strainBetween(low, high float64) func(audit.Finding) bool {
	return func(f audit.Finding) bool { return f.At.Strain >= low && f.At.Strain <= high }
}

func temperatureBetween(low, high float64) func(audit.Finding) bool {
	return func(f audit.Finding) bool { return f.At.Temperature >= low && f.At.Temperature <= high }
}

// about is a place to one part in 10⁹: jumps are bisected down to neighbouring numbers.
func about(v float64) (low, high float64) { return v * (1 - 1e-9), v * (1 + 1e-9) }

func plants() []plant {
	const fault, warning, remark = audit.Fault, audit.Warning, audit.Remark
	atZeroStress, atZeroStrain := stressBetween(0, 0), strainBetween(0, 0)
	clock := new(float64)
	*clock = 1
	return []plant{
		{name: "exponential of stress", law: rawExponential(), kind: audit.CreepAtZeroStress, severity: fault, near: atZeroStress,
			with: []audit.Kind{audit.ExplodesBeyond}},
		{name: "saturating and steady with exponentials of stress", law: saturatingExponential(), kind: audit.CreepAtZeroStress,
			severity: fault, near: atZeroStress, with: []audit.Kind{audit.ExplodesBeyond}},
		{name: "zero patched in", law: rateOf(patched), kind: audit.CreepAtZeroStress, severity: fault, near: stressBetween(0, 1e-50),
			with: []audit.Kind{audit.ExplodesBeyond}},
		{name: "0/0 under no stress", law: rateOf(ratioOfZeros), kind: audit.UndefinedAtZeroStress, severity: fault, near: atZeroStress},
		{name: "0/0 as the slope", law: rateOf(slopeOfZeros), kind: audit.UndefinedAtZeroStress, severity: warning, near: atZeroStress},
		{name: "negative above 2 % strain", law: rateOf(negativeAtLargeStrain), kind: audit.NegativeRate, severity: fault,
			near: strainBetween(0.02, 0.1)},
		{name: "NaN above 210 MPa and 880 K", law: rateOf(undefinedWhenHotAndHigh), kind: audit.NotFinite, severity: fault,
			near: func(f audit.Finding) bool { return f.At.Stress > 210 && f.At.Temperature > 880 }},
		{name: "overflow above 236 MPa", law: rateOf(overflowing), kind: audit.NotFinite, severity: fault, near: stressBetween(235, 300)},
		{name: "hump at 150 MPa", law: rateOf(hump), kind: audit.FallsWithStress, severity: fault, by: audit.Stress,
			near: stressBetween(140, 160)},
		{name: "derivative by stress doubled", law: rateOf(doubledDerivative), kind: audit.WrongDerivative, severity: fault,
			by: audit.Stress, near: anywhere},
		{name: "derivative by strain forgotten", law: rateOf(forgottenStrain), kind: audit.WrongDerivative, severity: fault,
			by: audit.Strain, near: strainBetween(1e-3, 0.1)},
		{name: "derivative by temperature without its square", law: rateOf(forgottenSquare), kind: audit.WrongDerivative,
			severity: fault, by: audit.Temperature, near: anywhere},
		{name: "derivative off by 1e-4", law: rateOf(slightlyOff), kind: audit.WrongDerivative, severity: warning, by: audit.Stress,
			near: anywhere},
		{name: "decimal logarithm", law: logged{sound, decimal}, kind: audit.LogContradictsRate, severity: fault, near: anywhere},
		{name: "exponent of the slope", law: logged{sound, exponentOfSlope}, kind: audit.WrongLogDerivative, severity: fault,
			by: audit.Stress, near: anywhere},
		{name: "Omega", law: rateOf(omega), kind: audit.Softening, severity: warning, by: audit.Strain, near: anywhere},
		{name: "softening from 2 % strain", law: rateOf(lateSoftening), kind: audit.Softening, severity: warning, by: audit.Strain,
			near: func(f audit.Finding) bool {
				onset, ok := f.Number("softens from creep strain")
				return ok && onset > 0.02 && onset < 0.022
			}},
		{name: "clock of the host", law: timed{clock}, kind: audit.ClockDependence, severity: fault, by: audit.Time, near: anywhere,
			domain:   func(d *audit.Domain) { d.Time = audit.Range{Low: 1, High: 1e4} },
			settings: func(s *audit.Settings) { s.SetClock = func(t float64) { *clock = t } }},
		{name: "clocked rate for one interval", law: creeplaw.During{Clocked: timeHardening(), Start: 10, End: 20},
			kind: audit.ClockDependence, severity: fault, by: audit.Time, near: anywhere,
			domain: func(d *audit.Domain) { d.Temperature, d.Time = isothermalRange, audit.Range{Low: 1, High: 1e4} }},
		{name: "doubles at 137 MPa", law: rateOf(regime(audit.Stress, 137, 2)), kind: audit.RateJump, severity: fault,
			by: audit.Stress, near: stressBetween(about(137))},
		{name: "halves at 137 MPa", law: rateOf(regime(audit.Stress, 137, 0.5)), kind: audit.RateJump, severity: fault,
			by: audit.Stress, near: stressBetween(about(137))},
		{name: "one part in 10⁴ at 0.3 % strain", law: rateOf(regime(audit.Strain, 0.003, 1.0001)), kind: audit.RateJump,
			severity: fault, by: audit.Strain, near: strainBetween(about(0.003))},
		{name: "trebles at 851 K", law: rateOf(regime(audit.Temperature, 851, 3)), kind: audit.RateJump, severity: fault,
			by: audit.Temperature, near: temperatureBetween(about(851))},
		{name: "two per cent at 851 K", law: rateOf(regime(audit.Temperature, 851, 1.02)), kind: audit.RateJump, severity: warning,
			by: audit.Temperature, near: temperatureBetween(about(851))},
		{name: "jump on a corner at 851 K", law: rateOf(jumpOnACorner), kind: audit.RateJump, severity: warning,
			by: audit.Temperature, near: temperatureBetween(about(851))},
		{name: "jump on a curve at 137 MPa", law: rateOf(jumpOnACurve), kind: audit.RateJump, severity: fault, by: audit.Stress,
			near: stressBetween(about(137)), with: []audit.Kind{audit.ExplodesBeyond}},
		{name: "wrong at its node only", law: newMisread(), kind: audit.RateJump, severity: fault, by: audit.Temperature,
			near: temperatureBetween(about(851))},
		{name: "switches on at 45 MPa", law: rateOf(startsFromNowhere), kind: audit.RateJump, severity: fault, by: audit.Stress,
			near: stressBetween(about(45))},
		{name: "corner at 90 MPa", law: rateOf(twoSlopes), kind: audit.SlopeJump, severity: remark, by: audit.Stress,
			near: stressBetween(90*(1-1e-6), 90*(1+1e-6))},
		{name: "sign of the activation energy", law: rateOf(signSlip), kind: audit.NegativeActivation, severity: fault,
			by: audit.Temperature, near: anywhere},
		{name: "joules for kilojoules", law: rateOf(kiloSlip), kind: audit.UnusualActivation, severity: warning,
			by: audit.Temperature, near: anywhere},
		{name: "no temperature", law: rateOf(isothermal), kind: audit.NoTemperature, severity: warning, by: audit.Temperature,
			near: anywhere},
		{name: "undefined above 1 GPa", law: rateOf(endsAtOneGigapascal), kind: audit.UndefinedBeyond, severity: warning,
			near: stressBetween(1000, 3000)},
		{name: "exponential on top", law: rateOf(explosive), kind: audit.ExplodesBeyond, severity: warning,
			near: stressBetween(3000, 3000)},
		{name: "levels off", law: rateOf(levelling), kind: audit.StallsBeyond, severity: warning, near: stressBetween(3000, 3000)},
		{name: "needs strain to start", law: rateOf(inert), kind: audit.NeverStarts, severity: fault, near: atZeroStrain,
			with: []audit.Kind{audit.Softening}},
		{name: "0·∞ in virgin material", law: rateOf(zeroTimesInfinity), kind: audit.UndefinedAtZeroStrain, severity: fault,
			near: atZeroStrain},
		{name: "guarded virgin material", law: rateOf(guarded), kind: audit.UndefinedAtZeroStrain, severity: fault, near: atZeroStrain},
		{name: "0/0 as the slope of virgin material", law: rateOf(slopeOfVirgin), kind: audit.UndefinedAtZeroStrain,
			severity: warning, near: atZeroStrain},
		{name: "counts its calls", law: counting{new(int)}, kind: audit.NotRepeatable, severity: fault, near: anywhere},
		{name: "NaN swallowed", law: rateOf(swallowing), kind: audit.AcceptsNaN, severity: warning,
			near: func(f audit.Finding) bool { return math.IsNaN(f.At.Stress) }},
		{name: "runs off its table", law: rateOf(shortTable), kind: audit.Panics, severity: fault, near: temperatureBetween(890, 923)},
	}
}

var isothermalRange = audit.Range{Low: reference, High: reference}

// TestPlantedFaults holds the audit to find each fault, of the right kind and weight, at the place where it was planted, and to
// say nothing else of weight about a law that has nothing else.
func TestPlantedFaults(t *testing.T) {
	kinds := map[audit.Kind]bool{}
	for _, p := range append(plants(), evolvingPlants()...) {
		t.Run(p.name, func(t *testing.T) {
			d, s := domain, audit.Settings{Units: megapascalHour}
			if p.domain != nil {
				p.domain(&d)
			}
			if p.settings != nil {
				p.settings(&s)
			}
			report, err := audit.Run(p.law, d, s)
			require.NoError(t, err)
			holdToPlant(t, p, report)
		})
		kinds[p.kind] = true
	}
	require.GreaterOrEqual(t, len(kinds), 16, "kinds of faults planted")
	t.Logf("%d laws with a planted fault, of %d kinds", len(plants())+len(evolvingPlants()), len(kinds))
}

func holdToPlant(t *testing.T, p plant, report audit.Report) {
	t.Helper()
	found := false
	for _, f := range report.Findings {
		expected := f.Kind == p.kind
		for _, k := range p.with {
			expected = expected || f.Kind == k && f.Severity < audit.Fault
		}
		if f.Severity > audit.Remark && !expected {
			t.Errorf("not planted: %v, at %+v", f, f.At)
		}
		if f.Kind != p.kind {
			continue
		}
		if f.Severity == p.severity && f.By == p.by && p.near(f) && f.Sentence != "" {
			found = true
		} else {
			t.Errorf("found as %v by %v at %+v with %v, planted as %v by %v", f, f.By, f.At, f.Numbers, p.severity, p.by)
		}
	}
	if !found {
		t.Errorf("%v was not found as planted among %s", p.kind, listed(report.Findings))
	}
}

func listed(findings []audit.Finding) string {
	s := fmt.Sprintf("%d findings", len(findings))
	for _, f := range findings {
		s += fmt.Sprintf("\n  %v, at %+v", f, f.At)
	}
	return s
}
