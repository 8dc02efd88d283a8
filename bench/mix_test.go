package bench_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// The speed benchmarks step one mix of mild and stiff points, drawn once from a fixed seed: trial von Mises stress q from 20
// to 400 MPa and stiffness n·D from 1e-4 to 1e4, both even in the logarithm, in random directions with a random mean stress,
// from a random creep strain tensor. D = 3G Δt ṗ(q, p)/q is the creep of an explicit step over the elastic strain, n the local
// stress exponent; both at the accumulated creep strain of the start, or at the elastic strain for virgin material, whose rate
// is infinite. Most of an explicit step is allowed for n·D < 1 only.
const (
	mixPoints = 1024 // enough that a branch predictor cannot learn them
	mixSeed   = 20261201
	mixYoung  = 156e3 // MPa
	mixNu     = 0.3
)

// mixPoint is one point of the mix: what a host hands to a step.
type mixPoint struct {
	start     integrate.State
	increment integrate.Increment
}

// history is the accumulated creep strain that the points start from.
type history int

const (
	virgin   history = iota // zero
	hardened                // 1e-5 to 1e-2, even in the logarithm
)

func mix(law creeplaw.Logarithmic, from history) []mixPoint {
	d := draw{rand.New(rand.NewPCG(mixSeed, 1))}
	points := make([]mixPoint, mixPoints)
	const threeG = 3 * mixYoung / (2 * (1 + mixNu))
	for i := range points {
		p := &points[i]
		var direction tensor.Sym
		for j := range direction {
			direction[j] = d.NormFloat64()
		}
		q, stiffness, prior := d.log(20, 400), d.log(1e-4, 1e4), d.log(1e-5, 1e-2)
		elastic := q / threeG
		direction = direction.Deviator()
		elasticStrain := direction.Scale(elastic / direction.EquivalentStrain()).
			Add(tensor.Identity().Scale(elastic * d.between(-0.5, 0.5)))
		for j := range p.start.Creep {
			p.start.Creep[j] = prior * d.NormFloat64()
		}
		p.start.Creep = p.start.Creep.Deviator()
		at := creeplaw.Point{Stress: q, Strain: elastic, Temperature: 800}
		if from == hardened {
			p.start.Equivalent, at.Strain = prior, prior
		}
		rate := law.LogRate(at)
		p.increment = integrate.Increment{
			Dt:          stiffness / rate.ByLogStress * elastic / math.Exp(rate.Value),
			Strain:      p.start.Creep.Add(elasticStrain),
			Temperature: 800,
		}
	}
	return points
}

// speedCase is one material with its mix.
type speedCase struct {
	name     string
	law      creeplaw.Logarithmic
	from     history
	material *integrate.Material
	points   []mixPoint
}

// speedCases are the laws whose steps are timed.
func speedCases(t testing.TB) []speedCase {
	t.Helper()
	norton, err := creeplaw.NewNorton(1e-15, 5)
	require.NoError(t, err)
	steep, err := creeplaw.NewNortonAt(1e-5, 100, 12)
	require.NoError(t, err)
	sinh, err := creeplaw.NewGarofalo(1e-8, 0.03, 3)
	require.NoError(t, err)
	curve, err := creeplaw.NewBaileyNorton(1e-14, 5, 0.4)
	require.NoError(t, err)
	cases := []speedCase{
		{name: "Norton", law: norton, from: hardened},
		{name: "NortonSteep", law: steep, from: hardened},
		{name: "Garofalo", law: sinh, from: hardened},
		{name: "BaileyNortonVirgin", law: curve, from: virgin},
		{name: "BaileyNortonHardened", law: curve, from: hardened},
	}
	for i := range cases {
		c := &cases[i]
		c.material, err = integrate.New(integrate.NewIsotropic(mixYoung, mixNu), c.law, integrate.Options{})
		require.NoError(t, err)
		c.points = mix(c.law, c.from)
	}
	return cases
}

// TestMixIsWhatItSays holds the mix against its description.
func TestMixIsWhatItSays(t *testing.T) {
	for _, c := range speedCases(t) {
		var out integrate.Result
		mild, stiff := 0, 0
		for i := range c.points {
			p := &c.points[i]
			require.NoError(t, c.material.Step(&out, &p.start, p.increment))
			elastic := p.increment.Strain.Sub(p.start.Creep).EquivalentStrain()
			switch spent := out.CreepStep / elastic; {
			case spent < 0.1:
				mild++
			case spent > 0.2:
				stiff++
			}
		}
		t.Logf("%-20s %4d points lose under a tenth of the trial stress, %4d more than a fifth", c.name, mild, stiff)
		require.Greater(t, mild, mixPoints/10)
		require.Greater(t, stiff, mixPoints/10)
	}
}
