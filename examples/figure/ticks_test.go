package figure

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"gonum.org/v1/plot"
)

func labels(t plot.Ticker, low, high float64) (list []string) {
	for _, tick := range t.Ticks(low, high) {
		list = append(list, tick.Label)
	}
	return list
}

func TestRound(t *testing.T) {
	r := Round{Most: 8}
	assert.Equal(t, []string{"0", "4 000", "8 000", "12 000", "16 000", "20 000", "24 000"}, labels(r, 0, 24000))
	assert.Equal(t, []string{"0.00", "0.04", "0.08", "0.12", "0.16", "0.20", "0.24", "0.28"}, labels(r, 0, 0.3))
	assert.Equal(t, []string{"0", "1", "2", "3", "4", "5", "6", "7", "8"}, labels(r, 0, 8))
	assert.Equal(t, []string{"0", "4e+12", "8e+12"}, labels(Round{Most: 3}, 0, 1e13))
	assert.NotEmpty(t, labels(r, -3, 9))
	for _, high := range []float64{0, 5e-324, 1e308, math.Inf(1), math.NaN()} {
		assert.LessOrEqual(t, len(labels(r, 0, high)), 12, "%v", high)
	}
}

func TestPowersOfTen(t *testing.T) {
	assert.Equal(t, []string{"1e-4", "0.001", "0.01", "0.1", "1"}, labels(Decades{Most: 8}, -4, 0))
	assert.Equal(t, []string{"1e-4", "", "0.01", "", "1"}, labels(Decades{Most: 4}, -4, 0))
	assert.Equal(t, []string{"", "1e-4", "", "0.01", "", "1"}, labels(Decades{Most: 5}, -5.3, 0))
	assert.Equal(t, []string{"50", "100", "200", "500"}, labels(Decades{Most: 8}, math.Log10(30), math.Log10(700)))
}

func TestGrouped(t *testing.T) {
	assert.Equal(t, "-1 234.5", Grouped(-1234.5, 1))
	assert.Equal(t, "0.0", Grouped(-0.01, 1))
	assert.Equal(t, "123", Grouped(123.4, 0))
	assert.Equal(t, "1 000", Grouped(999.6, 0))
}
