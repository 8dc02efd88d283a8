package lawcard_test

import (
	"flag"
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawcard"
	"example.com/holdtime/creeplaw/published"
)

const samplesDir = "../../testdata/lawcards"

func updating() bool {
	f := flag.Lookup("update") // declared by the test of the schema
	return f != nil && f.Value.String() == "true"
}

// The published samples are what Write makes of the sets.
func TestPublishedSamples(t *testing.T) {
	for file, set := range map[string]published.Set{
		"steel-316-600C":          published.Steel316At600C(),
		"glacier-ice":             published.IceCuffeyPaterson(),
		"rock-salt":               published.SaltMunsonDawson(),
		"nickel":                  made(published.Nickel().PowerLaw()),
		"tin-lead-solder":         published.SolderTinLead(),
		"steel-p91-650C":          published.P91At650C(),
		"tin-lead-solder-unified": published.SolderTinLeadAnand(),
	} {
		path := filepath.Join(samplesDir, file+".json")
		text := written(t, lawcard.Published(set))
		if updating() {
			require.NoError(t, os.WriteFile(path, []byte(text), 0o644))
		}
		stored, err := os.ReadFile(path)
		require.NoError(t, err)
		assert.Equal(t, text, string(stored), "%s: go test ./creeplaw/lawcard -run Samples -update", file)
		c := read(t, string(stored), set.Units)
		assert.Equal(t, [4]string{set.Name, set.Citation, set.Status.String(), set.Caution},
			[4]string{c.Name, c.Source, c.Status, c.Caution})
		same(t, file, set.Law, c.Law, 21)
	}
}

func sampleCard(t *testing.T, file string, wanted creeplaw.Units) lawcard.Card {
	t.Helper()
	text, err := os.ReadFile(filepath.Join(samplesDir, file))
	require.NoError(t, err)
	return read(t, string(text), wanted)
}

// The invented samples against their formulas, written out by hand.
func TestInventedSamples(t *testing.T) {
	si := creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second}
	const r = creeplaw.GasConstant

	bolt := sampleCard(t, "demo-flange-bolt.json", si)
	const p, sigma, temperature = 1e-4, 120.0, 800.0
	factor := math.Exp(-320000 / r * (1/temperature - 1/773.15))
	// ε = c tᵐ with c = 4e-4 (σ/150)^3.5/1000^0.35: rate m c^(1/m) ε^(1-1/m), Bailey and Norton in strain hardening.
	c := 4e-4 * math.Pow(sigma/150, 3.5) / math.Pow(1000, 0.35)
	primary := 0.35 * math.Pow(c, 1/0.35) * math.Pow(p, 1-1/0.35)
	steady := 2.5e-8 * math.Pow(sigma/150, 7)
	check.Rel(t, "bolt", bolt.Law.Rate(creeplaw.Point{Stress: sigma * 1e6, Strain: p, Temperature: temperature}).Value,
		factor*(primary+steady)/3600, 1e-13)
	assert.Equal(t, lawcard.Interval{Low: 748.15, High: 823.15}, bolt.Tested.Temperature)
	check.Rel(t, "longest test", bolt.Tested.Time.High, 20000*3600, 1e-15)

	table := sampleCard(t, "demo-temperature-table.json", creeplaw.Units{})
	at := func(fahrenheit float64) float64 { return (fahrenheit + 459.67) * 5 / 9 }
	low, high := 3e-8*math.Pow(math.Sinh(0.11*20), 3), 4e-7*math.Pow(math.Sinh(0.12*20), 2.9)
	w := (1/at(1050) - 1/at(1000)) / (1/at(1100) - 1/at(1000))
	check.Rel(t, "table, between rows", table.Law.Rate(creeplaw.Point{Stress: 20, Temperature: at(1050)}).Value,
		math.Pow(low, 1-w)*math.Pow(high, w), 1e-12)
	assert.True(t, math.IsNaN(table.Law.Rate(creeplaw.Point{Stress: 20, Temperature: at(1101)}).Value))

	// ε = εt (1 - e^(-rt)) + ṡt with r = 2000 ṡ: the rate is ṡ (1 + 2000 εt e^(-rt)).
	transient := sampleCard(t, "demo-transient-curve.json", creeplaw.Units{})
	rate := 1e-6 * math.Pow(100.0/150, 6)
	limit := 0.002 * math.Pow(100.0/150, 2)
	const hours = 700
	gone := math.Exp(-2000 * rate * hours)
	strain := limit*(1-gone) + rate*hours
	check.Rel(t, "curve", transient.Law.Rate(creeplaw.Point{Stress: 100, Strain: strain, Temperature: 873}).Value,
		rate*(1+2000*limit*gone), 1e-9) // the acceptance of curves: 1e-9

	omega := sampleCard(t, "demo-omega.json", si)
	ksi := 80e6 / 6894757.293168361
	check.Rel(t, "Omega", omega.Law.Rate(creeplaw.Point{Stress: 80e6, Strain: 0.01, Temperature: 873.15}).Value,
		2e-11*math.Pow(ksi, 4)*math.Exp(ksi/8)*math.Exp(0.4)/3600, 1e-13)
}

// Every file of the folder is a card and follows the schema.
func TestEverySampleFollowsTheSchema(t *testing.T) {
	files, err := filepath.Glob(filepath.Join(samplesDir, "*.json"))
	require.NoError(t, err)
	assert.Len(t, files, 11)
	v := newValidator(t)
	for _, file := range files {
		text, err := os.ReadFile(file)
		require.NoError(t, err)
		assert.NoError(t, v.text(t, string(text)), file)
		c := read(t, string(text), creeplaw.Units{})
		again := written(t, c)
		assert.Equal(t, again, written(t, read(t, again, c.Units)), file)
	}
}
