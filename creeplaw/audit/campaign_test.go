package audit_test

import (
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

var campaign = flag.Bool("campaign", false, "run the long campaigns")

const seed = 20250501

// rounds are those of the ordinary suite, or of the campaign.
func rounds(ordinary, long int) int {
	if *campaign {
		return long
	}
	return ordinary
}

// anyLaw is a sound law under random parameters.
func anyLaw(r *rand.Rand) creeplaw.Law {
	uniform := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	factor := must(creeplaw.NewArrheniusAt(uniform(60e3, 600e3), uniform(750, 950)))
	rate, n := math.Exp(uniform(-25, -8)), uniform(1, 12)
	var law creeplaw.Law
	switch r.IntN(7) {
	case 0:
		law = must(creeplaw.NewNortonAt(rate, 100, n))
	case 1:
		law = must(creeplaw.NewGarofalo(rate, uniform(0.003, 0.05), uniform(1, 6)))
	case 2:
		law = must(creeplaw.NewSoderberg(rate, uniform(8, 100)))
	case 3:
		law = must(creeplaw.NewDoublePowerAt(rate, uniform(50, 200), uniform(1, 4), uniform(5, 12)))
	case 4:
		m := uniform(0.2, 0.9)
		law = must(creeplaw.NewBaileyNortonAt(uniform(1e-4, 1e-2), 100, 1000, n, m))
	case 5:
		law = must(creeplaw.NewOmega(must(creeplaw.NewNortonAt(rate, 100, n)), uniform(1, 100)))
	default:
		law = must(creeplaw.NewSum(must(creeplaw.NewNortonAt(rate, 100, n)),
			must(creeplaw.NewStrainHardeningAt(rate, 100, 0.01, n+2, uniform(-2, -0.1)))))
	}
	return must(creeplaw.WithTemperature(law, factor))
}

// TestNoFaultInRandomLaws: no fault, jump or corner is made up, whatever the parameters.
func TestNoFaultInRandomLaws(t *testing.T) {
	r := rand.New(rand.NewPCG(seed, 1))
	n := rounds(60, 3000)
	for i := range n {
		law := anyLaw(r)
		report := run(t, law, domain, audit.Settings{})
		_, corner := report.Find(audit.SlopeJump)
		if report.Worst() == audit.Fault || corner {
			t.Fatalf("seed %d, law %d: %+v: %s", seed, i, law, listed(report.Findings))
		}
	}
	t.Logf("%d laws without a fault", n)
}

// bent is a law that jumps or bends where one argument passes a value.
type bent struct {
	creeplaw.Law
	by           audit.Argument
	at           float64
	jump, corner float64
}

func (l bent) Rate(p creeplaw.Point) creeplaw.Rate {
	v := map[audit.Argument]float64{audit.Stress: p.Stress, audit.Strain: p.Strain, audit.Temperature: p.Temperature}[l.by]
	r := l.Law.Rate(p)
	if v <= l.at {
		return r
	}
	f := math.Exp(l.jump + l.corner*math.Log(v/l.at))
	slope := l.corner * f / v
	switch l.by {
	case audit.Stress:
		return times(r, f, slope, 0, 0)
	case audit.Strain:
		return times(r, f, 0, slope, 0)
	}
	return times(r, f, 0, 0, slope)
}

// TestRandomBreaksAreFound: a jump of 1e-4 to a factor of ten, or a corner of 0.2 to 5 times one plus the exponent, is found where
// it is, and nowhere else.
func TestRandomBreaksAreFound(t *testing.T) {
	r := rand.New(rand.NewPCG(seed, 2))
	n := rounds(60, 3000)
	for i := range n {
		inner := anyLaw(r)
		l := bent{Law: inner, by: audit.Stress + audit.Argument(r.IntN(3))}
		span := map[audit.Argument]audit.Range{audit.Stress: domain.Stress, audit.Strain: domain.Strain,
			audit.Temperature: domain.Temperature}[l.by]
		l.at = span.Low * math.Pow(span.High/span.Low, 0.05+0.9*r.Float64())
		kind, tolerance := audit.RateJump, 1e-9
		if r.IntN(2) == 0 {
			l.jump = math.Exp(math.Log(1e-4) + r.Float64()*math.Log(2.3e4))
		} else {
			kind, tolerance = audit.SlopeJump, 1e-5
			l.corner = (0.2 + 4.8*r.Float64()) * cornerScale(inner, l)
		}
		report := run(t, l, domain, audit.Settings{})
		found := 0
		for _, f := range report.Findings {
			if f.Kind != audit.RateJump && f.Kind != audit.SlopeJump {
				continue
			}
			place := map[audit.Argument]float64{audit.Stress: f.At.Stress, audit.Strain: f.At.Strain,
				audit.Temperature: f.At.Temperature}[l.by]
			require.True(t, f.Kind == kind && f.By == l.by && math.Abs(place/l.at-1) < tolerance,
				"seed %d, law %d: %+v: made up: %v at %+v", seed, i, l, f, f.At)
			found++
		}
		require.Equal(t, 1, found, "seed %d, law %d: %+v: %s", seed, i, l, listed(report.Findings))
	}
	t.Logf("%d breaks found where they are", n)
}

// cornerScale is one plus the local exponent of the law at the place of a corner.
func cornerScale(law creeplaw.Law, l bent) float64 {
	p := creeplaw.Point{Stress: 100, Strain: 1e-3, Temperature: reference}
	switch l.by {
	case audit.Stress:
		p.Stress = l.at
		return 1 + math.Abs(creeplaw.Log(law).LogRate(p).ByLogStress)
	case audit.Strain:
		p.Strain = l.at
		return 1 + math.Abs(creeplaw.Log(law).LogRate(p).ByLogStrain)
	}
	p.Temperature = l.at
	return 1 + math.Abs(creeplaw.Log(law).LogRate(p).ByLogTemperature)
}
