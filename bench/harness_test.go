package bench_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
)

// TestStudyOfSeries gives the harness errors that are known series in the step.
func TestStudyOfSeries(t *testing.T) {
	exact := []float64{3, -2}
	series := func(steps int) ([]float64, error) {
		h := 1 / float64(steps)
		return []float64{3 + 5*h - 7*h*h + 2*h*h*h, -2 + h*h}, nil
	}
	s, err := bench.Halve(exact, 10, 8, 3, series)
	require.NoError(t, err)
	assert.Equal(t, []int{8, 16, 32, 64}, s.Steps)
	first := func(h float64) float64 { return (5*h - 7*h*h + 2*h*h*h) / 10 }  // the greater of the two errors
	check.Rel(t, "error of the last row", s.Errors()[3], first(1./64), 1e-13) // rounding of 3 over the error
	check.Rel(t, "order", s.Orders()[2], math.Log2(first(1./32)/first(1./64)), 1e-13)
	// Four rows remove the powers 1 to 3, all there are.
	check.Slice(t, "extrapolated", s.Extrapolated(), exact, 1, 1e-14)
	check.Abs(t, "extrapolated error", s.ExtrapolatedError(), 0, 1e-15)

	second, err := bench.Halve([]float64{1}, 1, 2, 4, func(n int) ([]float64, error) {
		return []float64{1 + 1/float64(n*n)}, nil
	})
	require.NoError(t, err)
	for _, order := range second.Orders() {
		check.Abs(t, "second order", order, 2, 1e-10)
	}
}

func TestStudyFaults(t *testing.T) {
	fine := func(int) ([]float64, error) { return []float64{1}, nil }
	broken := errors.New("diverged")
	var fault *bench.StudyError
	for _, run := range []func() (bench.Study, error){
		func() (bench.Study, error) { return bench.Halve(nil, 1, 1, 1, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, 0, 1, 1, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, math.NaN(), 1, 1, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, math.Inf(1), 1, 1, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, 1, 0, 1, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, 1, 1, -1, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, 1, 1, 31, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1}, 1, math.MaxInt/2, 2, fine) },
		func() (bench.Study, error) { return bench.Halve([]float64{1, 2}, 1, 4, 1, fine) },
	} {
		_, err := run()
		require.ErrorAs(t, err, &fault)
	}
	assert.Equal(t, "bench: study with 4 steps: 1 values, want 2", fault.Error())

	_, err := bench.Halve([]float64{1}, 1, 4, 1, func(n int) ([]float64, error) { return nil, broken })
	require.ErrorIs(t, err, broken)
	require.ErrorAs(t, err, &fault)
	assert.Equal(t, 4, fault.Steps)

	nan, err := bench.Halve([]float64{1, 1}, 1, 1, 2, func(int) ([]float64, error) { return []float64{math.NaN(), 1}, nil })
	require.NoError(t, err)
	assert.True(t, math.IsNaN(nan.Errors()[0]) && math.IsNaN(nan.Orders()[0]) && math.IsNaN(nan.ExtrapolatedError()))
	assert.True(t, math.IsNaN(bench.Study{}.ExtrapolatedError()))
}

// TestStudyKeepsItsOwnValues: a routine may hand out the same slice every time.
func TestStudyKeepsItsOwnValues(t *testing.T) {
	buffer := []float64{0}
	s, err := bench.Halve([]float64{0}, 1, 1, 1, func(n int) ([]float64, error) {
		buffer[0] = float64(n)
		return buffer, nil
	})
	require.NoError(t, err)
	assert.Equal(t, [][]float64{{1}, {2}}, s.Values)
}
