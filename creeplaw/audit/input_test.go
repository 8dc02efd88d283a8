package audit_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

// TestBadInput: each impossible domain or setting is an error that names it; no report is made.
func TestBadInput(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		quantity string
		change   func(*audit.Domain, *audit.Settings)
	}{
		{"lowest stress", func(d *audit.Domain, _ *audit.Settings) { d.Stress.Low = 0 }},
		{"lowest stress", func(d *audit.Domain, _ *audit.Settings) { d.Stress.Low = nan }},
		{"lowest stress", func(d *audit.Domain, _ *audit.Settings) { d.Stress.Low = inf }},
		{"highest stress", func(d *audit.Domain, _ *audit.Settings) { d.Stress.High = inf }},
		{"highest stress", func(d *audit.Domain, _ *audit.Settings) { d.Stress.High = nan }},
		{"highest stress", func(d *audit.Domain, _ *audit.Settings) { d.Stress.High = 1 }},
		{"lowest creep strain", func(d *audit.Domain, _ *audit.Settings) { d.Strain.Low = -1 }},
		{"highest creep strain", func(d *audit.Domain, _ *audit.Settings) { d.Strain.High = 0 }},
		{"lowest temperature", func(d *audit.Domain, _ *audit.Settings) { d.Temperature = audit.Range{} }},
		{"highest temperature", func(d *audit.Domain, _ *audit.Settings) { d.Temperature.High = 700 }},
		{"lowest time", func(d *audit.Domain, _ *audit.Settings) { d.Time = audit.Range{Low: 0, High: 1} }},
		{"highest time", func(d *audit.Domain, _ *audit.Settings) { d.Time = audit.Range{Low: 2, High: 1} }},
		{"number of points", func(_ *audit.Domain, s *audit.Settings) { s.Points = 10 }},
		{"number of lines", func(_ *audit.Domain, s *audit.Settings) { s.Lines = 1 }},
		{"number of intervals", func(_ *audit.Domain, s *audit.Settings) { s.Intervals = -3 }},
		{"derivative tolerance", func(_ *audit.Domain, s *audit.Settings) { s.DerivativeTolerance = nan }},
		{"derivative tolerance", func(_ *audit.Domain, s *audit.Settings) { s.DerivativeTolerance = 1e-15 }},
		{"stiffness", func(_ *audit.Domain, s *audit.Settings) { s.Stiffness = -1 }},
		{"stiffness", func(_ *audit.Domain, s *audit.Settings) { s.Stiffness = nan }},
		{"highest activation energy", func(_ *audit.Domain, s *audit.Settings) { s.Activation = audit.Range{Low: 2, High: 1} }},
		{"wide temperature range", func(_ *audit.Domain, s *audit.Settings) { s.WideTemperature = nan }},
		{"unit", func(_ *audit.Domain, s *audit.Settings) { s.Units.Time = -1 }},
		{"argument of a breakpoint", func(_ *audit.Domain, s *audit.Settings) {
			s.Breakpoints = []audit.Breakpoint{{By: audit.Time, Value: 1}}
		}},
		{"breakpoint", func(_ *audit.Domain, s *audit.Settings) {
			s.Breakpoints = []audit.Breakpoint{{By: audit.Stress, Value: nan}}
		}},
	} {
		d, s := domain, audit.Settings{}
		c.change(&d, &s)
		report, err := audit.Run(creeplaw.RateFunc(sound), d, s)
		var bad *audit.InputError
		require.ErrorAs(t, err, &bad, c.quantity)
		require.Equal(t, c.quantity, bad.Quantity)
		require.NotEmpty(t, bad.Want)
		require.Contains(t, err.Error(), c.quantity)
		require.Zero(t, report.Evaluations)
		require.Empty(t, report.Findings)
	}
	var missing *creeplaw.MissingError
	_, err := audit.Run(nil, domain, audit.Settings{})
	require.ErrorAs(t, err, &missing)
	_, err = audit.RunClocked(nil, domain, audit.Settings{})
	require.ErrorAs(t, err, &missing)
	var bad *audit.InputError
	_, err = audit.RunClocked(timeHardening(), domain, audit.Settings{}) // without a span of time
	require.ErrorAs(t, err, &bad)
	require.Equal(t, "lowest time", bad.Quantity)
}

// TestFixedArguments: a domain may have one value of any argument; what cannot be asked there is said not to have been.
func TestFixedArguments(t *testing.T) {
	d := domain
	d.Temperature = audit.Range{Low: 873, High: 873}
	report := run(t, creeplaw.RateFunc(sound), d, audit.Settings{})
	require.Empty(t, report.Findings, "%s", listed(report.Findings))
	require.False(t, examined(report, "activation"))
	require.True(t, examined(report, "rise with stress"))

	d = audit.Domain{Stress: audit.Range{Low: 100, High: 100}, Strain: audit.Range{Low: 1e-3, High: 1e-3},
		Temperature: audit.Range{Low: 873, High: 873}}
	report = run(t, creeplaw.RateFunc(sound), d, audit.Settings{})
	require.Empty(t, report.Findings, "%s", listed(report.Findings))
	require.False(t, examined(report, "continuity"))
	require.False(t, examined(report, "rise with stress"))
	require.True(t, examined(report, "zero stress"))
}

// TestNamedByTheCaller: a wrong value at one number only, which no scan would meet, is found if the caller names the place.
func TestNamedByTheCaller(t *testing.T) {
	law := rateOf(func(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
		if p.Stress == 150 {
			return times(r, 3, 0, 0, 0)
		}
		return r
	})
	report := run(t, law, domain, audit.Settings{})
	require.Empty(t, report.Findings)
	report = run(t, law, domain, audit.Settings{Breakpoints: []audit.Breakpoint{{By: audit.Stress, Value: 150}}})
	f, ok := report.Find(audit.RateJump)
	require.True(t, ok)
	require.Equal(t, audit.Fault, report.Worst())
	require.Equal(t, audit.Stress, f.By)
}

// TestUndefinedEverywhere and a law that never creeps must not confuse the audit.
func TestUndefinedEverywhere(t *testing.T) {
	report := run(t, creeplaw.RateFunc(nil), domain, audit.Settings{})
	_, ok := report.Find(audit.NotFinite)
	require.True(t, ok)
	require.Equal(t, 1, report.Count(audit.Fault), "%s", listed(report.Findings))

	report = run(t, rateOf(func(creeplaw.Point, creeplaw.Rate) creeplaw.Rate { return creeplaw.Rate{} }), domain, audit.Settings{})
	require.Zero(t, report.Count(audit.Fault), "%s", listed(report.Findings))
	require.False(t, examined(report, "rise with stress"))
}
