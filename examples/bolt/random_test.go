package main

import (
	"bytes"
	"errors"
	"flag"
	"math"
	"math/rand/v2"
	"regexp"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/position"
)

var campaign = flag.Bool("campaign", false, "run the long random tests")

var anyNumber = regexp.MustCompile(`(": |\[|, )(\d[\de.+-]*)`)

// The built-in joint with every number changed by a random factor goes through the built-in history and must end in
// equilibrium, or say that it opened or could not go on. The factors reach far beyond any bolt.
func TestRandomJoints(t *testing.T) {
	const seed = 20
	rng := rand.New(rand.NewPCG(seed, seed))
	runs, ran, opened, stopped := 60, 0, 0, 0
	if *campaign {
		runs = 5000
	}
	for i := range runs {
		decades := 0.02 * math.Pow(100, rng.Float64()) // 5 % … two decades
		text := disturbed(t, rng, decades)
		j, err := readJoint(position.NewSource("joint.json", text))
		src := position.NewSource("history.csv", defaultHistory)
		h := mustHistory(t, string(defaultHistory))
		if err != nil || match(j, h, src, "joint.json") != nil {
			continue // refused, which the fuzz target looks after
		}
		c, err := run(j, h, settings{tolerance: 1e-3, every: 2000, only: -1})
		var open *jointOpen
		switch {
		case errors.As(err, &open):
			opened++
			continue
		case err != nil:
			stopped++
			t.Logf("seed %d, run %d: %v", seed, i, err)
			continue
		}
		ran++
		for _, s := range c.samples {
			if !inEquilibrium(j, &s.condition) {
				t.Fatalf("seed %d, run %d: not in equilibrium at %g h: %+v\n%s", seed, i, s.time, s, text)
			}
		}
	}
	assert.Greater(t, ran, runs/5, "too few ran to the end")
	assert.LessOrEqual(t, stopped, runs/100, "too many could not go on")
	t.Logf("%d of %d ran to the end, %d opened, %d stopped", ran, runs, opened, stopped)
}

// disturbed is the built-in joint with most of its numbers changed, those that would only be refused left alone.
func disturbed(t *testing.T, rng *rand.Rand, decades float64) []byte {
	var text []byte
	for line := range bytes.Lines(defaultJoint) {
		if bytes.Contains(line, []byte("temperature_C")) || bytes.Contains(line, []byte("poisson")) ||
			bytes.Contains(line, []byte("count")) {
			text = append(text, line...)
			continue
		}
		text = append(text, anyNumber.ReplaceAllFunc(line, func(found []byte) []byte {
			m := anyNumber.FindSubmatch(found)
			x, err := strconv.ParseFloat(string(m[2]), 64)
			require.NoError(t, err)
			if rng.IntN(3) > 0 {
				x *= math.Pow(10, decades*(2*rng.Float64()-1))
			}
			return append(m[1], strconv.FormatFloat(x, 'g', -1, 64)...)
		})...)
	}
	return text
}

// inEquilibrium checks the equations of a joint (see balance) by their own meaning; the nut is where it is.
func inEquilibrium(j *joint, c *condition) bool {
	free, _ := freeStrain(&j.flange.growth, c.flange)
	compliance, _ := j.flange.compliance(c.flange)
	gap := c.load*compliance - c.nut - j.length()*free
	scale := math.Abs(c.nut) + j.length()*math.Abs(free)
	for i, s := range j.sections {
		gap += s.length * c.points[i].axial
		if !(math.Abs(c.points[i].stress*s.area-c.load) <= 1e-9*j.perBolt(j.preload)) {
			return false
		}
	}
	return math.Abs(gap) <= 1e-9*scale
}
