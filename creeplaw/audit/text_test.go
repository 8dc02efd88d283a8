package audit_test

import (
	"errors"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

var update = flag.Bool("update", false, "write the reports in testdata anew")

// TestTextReport holds the text of two reports to the files a reviewer has read: a sound law and one with several faults.
func TestTextReport(t *testing.T) {
	factor := must(creeplaw.NewArrheniusAt(300e3, reference))
	garofalo := must(creeplaw.WithTemperature(must(creeplaw.NewGarofalo(1e-6, 0.02, 3)), factor))
	bad := rateOf(func(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
		return signSlip(p, regime(audit.Stress, 137, 2)(p, doubledDerivative(p, r)))
	})
	for name, law := range map[string]creeplaw.Law{"sound": garofalo, "faulty": bad, "damage": damaged()} {
		report := run(t, law, domain, audit.Settings{Name: "invented law, " + name})
		text := report.Text("1 May 2025")
		for _, line := range strings.Split(text, "\n") {
			require.LessOrEqual(t, utf8.RuneCountInString(line), 78, "%s: %q", name, line)
			require.Equal(t, strings.TrimRight(line, " "), line, name)
		}
		path := filepath.Join("testdata", name+".txt")
		if *update {
			require.NoError(t, os.WriteFile(path, []byte(text), 0o666))
		}
		want, err := os.ReadFile(path)
		require.NoError(t, err)
		require.Equal(t, uncounted(string(want)), uncounted(text), name)
	}
}

// uncounted takes the number of evaluations out of a report: how often a search halves depends on the last bit, which differs
// between machines that fuse multiplication and addition and those that do not.
func uncounted(text string) string {
	return regexp.MustCompile(`\d+\s+evaluations`).ReplaceAllString(text, "many evaluations")
}

// TestTextNamesEverything: whatever was found or asked is in the text, and the date is that of the caller.
func TestTextNamesEverything(t *testing.T) {
	for _, p := range append(plants(), evolvingPlants()...)[:20] {
		d := domain
		if p.domain != nil {
			p.domain(&d)
		}
		report := run(t, p.law, d, audit.Settings{})
		text := unwrapped(report.Text("some day"))
		require.Contains(t, text, "Date: some day")
		for _, f := range report.Findings {
			require.Contains(t, text, f.Kind.String())
			require.Contains(t, text, unwrapped(f.Sentence))
		}
		for _, c := range report.Checks {
			if c.Found == 0 {
				require.Contains(t, text, unwrapped(c.Name+": "+c.Remark))
			}
		}
	}
	report := run(t, rateOf(isothermal), domain, audit.Settings{})
	require.NotContains(t, report.Text(""), "Date")
}

func unwrapped(s string) string { return strings.Join(strings.Fields(s), " ") }

// broken is a place that cannot be written to.
type broken struct{}

var errFull = errors.New("full")

func (broken) Write([]byte) (int, error) { return 0, errFull }

func TestWriteHandsTheErrorOn(t *testing.T) {
	report := run(t, rateOf(isothermal), domain, audit.Settings{})
	require.ErrorIs(t, report.Write(broken{}, ""), errFull)
}

// TestSameReport: the same input gives the same report, NaN and all.
func TestSameReport(t *testing.T) {
	for _, p := range append(plants(), evolvingPlants()...) {
		if p.kind == audit.NotRepeatable || p.settings != nil {
			continue // these laws change as they are asked
		}
		d := domain
		if p.domain != nil {
			p.domain(&d)
		}
		one, two := run(t, p.law, d, audit.Settings{}), run(t, p.law, d, audit.Settings{})
		require.Equal(t, fmt.Sprintf("%#v", one), fmt.Sprintf("%#v", two), p.name)
	}
}

func TestNamesOfKinds(t *testing.T) {
	seen := map[string]bool{}
	for _, k := range audit.Kinds() {
		name := k.String()
		require.NotEmpty(t, name)
		require.NotContains(t, name, "kind ")
		require.False(t, seen[name], name)
		seen[name] = true
	}
	require.Equal(t, "kind 0", audit.Kind(0).String())
	require.Equal(t, "kind 99", audit.Kind(99).String())
	require.Equal(t, "severity 7", audit.Severity(7).String())
	require.Equal(t, "argument 77", audit.Argument(77).String())
}
