package lawcard_test

import (
	"math"
	"sync"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawcard"
	"example.com/holdtime/creeplaw/lawtest"
)

// noted keeps what it is told.
type noted struct{ all []lawcard.Excursion }

func (n *noted) Outside(x lawcard.Excursion) { n.all = append(n.all, x) }

func TestWatchTellsOfEveryEvaluationOutside(t *testing.T) {
	c := card(steady()[0])
	var told noted
	law := c.Watch(&told)
	inside := creeplaw.Point{Stress: 100, Strain: 0.001, Temperature: 800}
	assert.Equal(t, c.Law.Rate(inside), law.Rate(inside))
	assert.Empty(t, told.all)
	outside := creeplaw.Point{Stress: 300, Strain: 0.5, Temperature: 800}
	assert.Equal(t, c.Law.Rate(outside), law.Rate(outside), "the number is that of the law all the same")
	assert.Equal(t, []lawcard.Excursion{
		{Quantity: lawcard.Stress, Value: 300, Tested: c.Tested.Stress, Point: outside},
		{Quantity: lawcard.Strain, Value: 0.5, Tested: c.Tested.Strain, Point: outside},
	}, told.all)
	told.all = nil
	cold := creeplaw.Point{Stress: 100, Strain: 0.001, Temperature: 300}
	assert.Equal(t, c.Law.(creeplaw.Logarithmic).LogRate(cold), law.(creeplaw.Logarithmic).LogRate(cold))
	assert.Equal(t, []lawcard.Excursion{{Quantity: lawcard.Temperature, Value: 300, Tested: c.Tested.Temperature, Point: cold}},
		told.all)
	_, evolves := law.(creeplaw.Evolving)
	assert.False(t, evolves)
	assert.Equal(t, c.Law, c.Watch(nil), "nobody to tell")
	assert.Nil(t, lawcard.Card{}.Watch(&told))
}

// Watched, an evolving law still is one, and to the bit the same.
func TestWatchKeepsInternalVariables(t *testing.T) {
	for _, s := range damaged() {
		e, ok := s.law.(creeplaw.Evolving)
		if !ok {
			continue
		}
		var told lawcard.Tally
		w, ok := card(s).Watch(&told).(creeplaw.Evolving)
		require.True(t, ok, s.name)
		assert.Equal(t, e.Variables(), w.Variables())
		assert.Equal(t, e.SeesPrincipal(), w.SeesPrincipal())
		p := creeplaw.Point{Stress: 230, Strain: 0.001, Temperature: 800}
		assert.Equal(t, evolved(e, p), evolved(w, p), s.name)
		assert.Equal(t, e.Rate(p), w.Rate(p), s.name)
		assert.Equal(t, uint64(2), told.Count(lawcard.Stress), s.name)
	}
}

func TestTallyCountsAndRemembers(t *testing.T) {
	c := card(steady()[0])
	var told lawcard.Tally
	law := c.Watch(&told)
	_, seen := told.Lowest(lawcard.Stress)
	assert.False(t, seen)
	for _, stress := range []float64{5, 0, 100, 250, 1e3, 240, math.NaN(), -3} {
		law.Rate(creeplaw.Point{Stress: stress, Strain: 0.001, Temperature: 800})
	}
	assert.Equal(t, uint64(7), told.Count(lawcard.Stress))
	low, seen := told.Lowest(lawcard.Stress)
	assert.True(t, seen)
	assert.Equal(t, 0.0, low)
	high, seen := told.Highest(lawcard.Stress)
	assert.True(t, seen)
	assert.Equal(t, 1e3, high)
	for _, q := range []lawcard.Quantity{lawcard.Strain, lawcard.Temperature, lawcard.Time} {
		assert.Zero(t, told.Count(q))
		_, seen = told.Highest(q)
		assert.False(t, seen)
	}
}

func TestTallyFromManyGoroutines(t *testing.T) {
	c := card(steady()[0])
	var told lawcard.Tally
	law := c.Watch(&told)
	var all sync.WaitGroup
	const workers, each = 8, 1000
	for w := range workers {
		all.Go(func() {
			for i := range each {
				law.Rate(creeplaw.Point{Stress: 300 + float64(i*workers+w), Strain: 0.001, Temperature: 800})
				law.Rate(creeplaw.Point{Stress: 13 / float64(1+i*workers+w), Strain: 0.001, Temperature: 800})
			}
		})
	}
	all.Wait()
	assert.Equal(t, uint64(2*workers*each), told.Count(lawcard.Stress))
	high, _ := told.Highest(lawcard.Stress)
	low, _ := told.Lowest(lawcard.Stress)
	assert.Equal(t, [2]float64{300 + workers*each - 1, 13.0 / (workers * each)}, [2]float64{high, low})
}

// A watched law keeps to the rules of every law: derivatives, bits, no allocation, explanations.
func TestWatchedLawConforms(t *testing.T) {
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1, 300},
		Strain: lawtest.Range{1e-6, 0.1}, Temperature: lawtest.Range{600, 1000}, Points: 200}
	lawtest.Run(t, card(steady()[0]).Watch(&lawcard.Tally{}), box)
	lawtest.Run(t, card(composed()[3]).Watch(&lawcard.Tally{}), box)
}
