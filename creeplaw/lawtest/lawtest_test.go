package lawtest

import (
	"fmt"
	"math"
	"os"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
)

// recorder stands in for a test, so that a kit that must fail can itself be tested.
type recorder struct{ failures []string }

func (r *recorder) Helper() {}
func (r *recorder) Errorf(format string, args ...any) {
	r.failures = append(r.failures, fmt.Sprintf(format, args...))
}

var quoted = regexp.MustCompile(`the rule "([^"]+)"`)

// rules are the names of the rules that failed, in order.
func (r *recorder) rules() (names []string) {
	for _, f := range r.failures {
		if m := quoted.FindStringSubmatch(f); m != nil {
			names = append(names, m[1])
		} else {
			names = append(names, f)
		}
	}
	return names
}

// The model is a law written here in full, ṗ = A σ⁴ p^-½ exp(-B/T), invented numbers: the kit is tested on something that
// does not come from package creeplaw.
const (
	prefactor   = 1e-6
	activation  = 3e4
	stressPower = 4.0
	strainPower = -0.5
	edge        = 960.0 // K, beyond which the model with an explanation is undefined
)

func modelRate(p creeplaw.Point) creeplaw.Rate {
	if p.Stress == 0 {
		return creeplaw.Rate{}
	}
	if p.Strain == 0 {
		return creeplaw.Rate{Value: math.Inf(1), ByStress: math.Inf(1), ByStrain: math.Inf(-1), ByTemperature: math.Inf(1)}
	}
	v := prefactor * math.Pow(p.Stress, stressPower) * math.Pow(p.Strain, strainPower) * math.Exp(-activation/p.Temperature)
	return creeplaw.Rate{
		Value:         v,
		ByStress:      stressPower * v / p.Stress,
		ByStrain:      strainPower * v / p.Strain,
		ByTemperature: v * activation / (p.Temperature * p.Temperature),
	}
}

func modelLog(p creeplaw.Point) creeplaw.LogRate {
	l := math.Log(prefactor) + stressPower*math.Log(p.Stress) + strainPower*math.Log(p.Strain) - activation/p.Temperature
	if p.Stress == 0 {
		l = math.Inf(-1)
	}
	return creeplaw.LogRate{Value: l, ByLogStress: stressPower, ByLogStrain: strainPower, ByLogTemperature: activation / p.Temperature}
}

func defined(p creeplaw.Point) bool { return p.Temperature <= edge && p.Stress >= 0 && p.Strain >= 0 }

func modelCheck(p creeplaw.Point) error {
	if defined(p) {
		return nil
	}
	return fmt.Errorf("%+v: the temperature is above %g, or a value impossible", p, edge)
}

// edged is the model, undefined where modelCheck says so.
func edged(p creeplaw.Point) creeplaw.Rate {
	if !defined(p) {
		return creeplaw.Rate{Value: math.NaN()}
	}
	return modelRate(p)
}

// The types carry exactly the capabilities that their names say.
type (
	plainLaw func(creeplaw.Point) creeplaw.Rate
	logLaw   struct {
		plainLaw
		log func(creeplaw.Point) creeplaw.LogRate
	}
	explainingLaw struct {
		plainLaw
		check func(creeplaw.Point) error
	}
	driftedLaw struct{ plainLaw } // its LogRate has lost its signature
)

func (f plainLaw) Rate(p creeplaw.Point) creeplaw.Rate       { return f(p) }
func (l logLaw) LogRate(p creeplaw.Point) creeplaw.LogRate   { return l.log(p) }
func (l explainingLaw) CheckPoint(p creeplaw.Point) error    { return l.check(p) }
func (l driftedLaw) LogRate(p creeplaw.Point, _ int) float64 { return modelLog(p).Value }

var (
	_ creeplaw.Law         = plainLaw(nil)
	_ creeplaw.Logarithmic = logLaw{}
	_ creeplaw.Explainer   = explainingLaw{}
)

func modelBox(claims Capability) Box {
	return Box{Claims: claims, Stress: Range{1, 300}, Strain: Range{1e-8, 0.1}, Temperature: Range{700, 950}, Seed: 7}
}

func TestGoodLawsPass(t *testing.T) {
	cases := []struct {
		name  string
		law   creeplaw.Law
		box   Box
		rules int // that must have run
	}{
		{"plain", plainLaw(modelRate), modelBox(RateOnly), 11},
		{"logarithmic", logLaw{modelRate, modelLog}, modelBox(Logarithmic), 16},
		{"logarithmic, not said", logLaw{modelRate, modelLog}, modelBox(RateOnly), 16},
		{"with an edge, explained", explainingLaw{edged, modelCheck}, modelBox(Explainer), 12},
		{"exponential, declared", plainLaw(exponential), Box{Claims: RateOnly, Stress: Range{1, 300}, Strain: Range{1e-8, 0.1},
			Temperature: Range{700, 950}, CreepsAtZeroStress: true}, 11},
		{"softening, finite at zero strain", plainLaw(softening), modelBox(RateOnly), 11},
		{"threshold", plainLaw(threshold), modelBox(RateOnly), 11},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			results := Run(t, c.law, c.box)
			assert.Len(t, results, c.rules)
			for _, r := range results {
				assert.Positive(t, r.Checks, r.Rule)
				assert.Zero(t, r.Broken, r.Rule)
				assert.LessOrEqual(t, r.Worst, 1.0, r.Rule)
			}
		})
	}
}

// Under the race detector this shows that the kit shares nothing between its own goroutines.
func TestGoroutinesOfTheKit(t *testing.T) {
	Run(t, logLaw{modelRate, modelLog}, modelBox(Logarithmic))
}

// exponential creeps under no stress.
func exponential(p creeplaw.Point) creeplaw.Rate {
	v := 1e-9 * math.Exp(0.05*p.Stress)
	return creeplaw.Rate{Value: v, ByStress: 0.05 * v}
}

func softening(p creeplaw.Point) creeplaw.Rate {
	v := 1e-12 * p.Stress * p.Stress * p.Stress * math.Exp(50*p.Strain)
	return creeplaw.Rate{Value: v, ByStress: 3e-12 * p.Stress * p.Stress * math.Exp(50*p.Strain), ByStrain: 50 * v}
}

// threshold rises as the fourth power from 2 on, so that the kit meets a region without creep and a breakpoint in it.
func threshold(p creeplaw.Point) creeplaw.Rate {
	over := p.Stress - 2
	if over <= 0 {
		return creeplaw.Rate{}
	}
	return creeplaw.Rate{Value: 1e-12 * math.Pow(over, 4), ByStress: 4e-12 * math.Pow(over, 3)}
}

// The failure says what a person needs: rule, point, numbers, seed. The fault is in one corner only.
func TestFailureNamesRulePointAndNumbers(t *testing.T) {
	var r recorder
	Run(&r, plainLaw(wrongInOneCorner), modelBox(RateOnly))
	require.Len(t, r.failures, 1)
	for _, part := range []string{
		`lawtest: lawtest.plainLaw breaks the rule "derivative by stress" in 1 of `, "(seed 7)",
		"worst at stress 300, strain 0.1, temperature 950: ",
		"the rate is 4.94222", "its derivative by stress 6.59029", "by differences 6.58963",
	} {
		assert.Contains(t, r.failures[0], part)
	}
}

func wrongInOneCorner(p creeplaw.Point) creeplaw.Rate {
	r := modelRate(p)
	if p.Stress >= 300 && p.Strain >= 0.1 && p.Temperature >= 950 {
		r.ByStress *= 1.0001
	}
	return r
}

func TestNoLaw(t *testing.T) {
	var r recorder
	assert.Nil(t, Run(&r, nil, modelBox(RateOnly)))
	assert.Equal(t, []string{"lawtest: there is no law"}, r.failures)
}

func TestUnusableBoxIsAFailure(t *testing.T) {
	cases := []struct {
		want  string
		spoil func(*Box)
	}{
		{"Stress is from 0 to 0, must rise between positive finite numbers", func(b *Box) { b.Stress = Range{} }},
		{"Stress is from 0 to 1, must", func(b *Box) { b.Stress = Range{0, 1} }},
		{"Strain is from 1 to 1, must", func(b *Box) { b.Strain = Range{1, 1} }},
		{"Strain is from NaN to 1, must", func(b *Box) { b.Strain = Range{math.NaN(), 1} }},
		{"Temperature is from 900 to 800, must", func(b *Box) { b.Temperature = Range{900, 800} }},
		{"Temperature is from 900 to +Inf, must", func(b *Box) { b.Temperature = Range{900, math.Inf(1)} }},
		{"LogStress is from -1 to 3, must", func(b *Box) { b.LogStress = Range{-1, 3} }},
		{"DerivativeTolerance is NaN, must be above 0 and at most 0.01", func(b *Box) { b.DerivativeTolerance = math.NaN() }},
		{"DerivativeTolerance is 0.1, must", func(b *Box) { b.DerivativeTolerance = 0.1 }},
		{"number of Points is 49, must be 50 or more", func(b *Box) { b.Points = 49 }},
		{"set of Claims is 0, must be RateOnly or a union of the others: RateOnly, Logarithmic, Explainer, Evolving", func(b *Box) { b.Claims = 0 }},
		{"set of Claims is 11, must", func(b *Box) { b.Claims = RateOnly | Logarithmic }},
		{"set of Claims is 1000000, must", func(b *Box) { b.Claims = 64 }},
	}
	for _, c := range cases {
		box := modelBox(RateOnly)
		c.spoil(&box)
		var r recorder
		assert.Nil(t, Run(&r, plainLaw(modelRate), box), c.want)
		require.Len(t, r.failures, 1, c.want)
		assert.True(t, strings.HasPrefix(r.failures[0], "lawtest: the box: "+c.want), r.failures[0])
	}
}

func TestSameSeedSamePoints(t *testing.T) {
	a, err := modelBox(RateOnly).complete()
	require.NoError(t, err)
	assert.Equal(t, a.sample(a.Stress), a.sample(a.Stress))
	b := a
	b.Seed++
	assert.NotEqual(t, a.sample(a.Stress)[8:], b.sample(b.Stress)[8:])
	for i, p := range a.sample(a.Stress) {
		assert.Truef(t, p.Stress >= 1 && p.Stress <= 300 && p.Strain >= 1e-8 && p.Strain <= 0.1 &&
			p.Temperature >= 700 && p.Temperature <= 950, "seed %d, point %d: %+v", a.Seed, i, p)
	}
}

// In a parallel test allocations cannot be counted; the rule then fails, and says why.
func TestParallelTestIsAFailure(t *testing.T) {
	t.Run("parallel", func(t *testing.T) {
		t.Parallel()
		var r recorder
		Run(&r, plainLaw(modelRate), modelBox(RateOnly))
		assert.Equal(t, []string{"no allocation"}, r.rules())
		assert.Contains(t, strings.Join(r.failures, ""), "allocations cannot be counted")
	})
}

// The package comment names every rule, and each has a name of its own.
func TestPackageCommentNamesEveryRule(t *testing.T) {
	comment, err := os.ReadFile("doc.go")
	require.NoError(t, err)
	seen := map[string]bool{}
	for _, r := range rules {
		assert.False(t, seen[r.name], r.name)
		seen[r.name] = true
		assert.Contains(t, string(comment), "\n//\t"+r.name, "the package comment")
	}
}
