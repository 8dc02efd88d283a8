package newton_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/examples/newton"
)

const rounding = 1e-13

func TestOrder(t *testing.T) {
	o, ok := newton.Order([]float64{1, 1e-2, 1e-4, 1e-8, 1e-16}, rounding)
	require.True(t, ok)
	check.Abs(t, "quadratic", o, 2, 1e-12)
	o, ok = newton.Order([]float64{1e-2, 1e-3, 1e-4, 1e-5}, rounding)
	require.True(t, ok)
	check.Abs(t, "linear", o, 1, 1e-12)
	_, ok = newton.Order([]float64{1, 1e-16}, rounding)
	assert.False(t, ok)
}

func TestConstant(t *testing.T) {
	assert.True(t, newton.Constant([]float64{1e-2, 5e-3, 2e-3, 1e-3, 5e-6}, rounding) > 100)
	assert.True(t, newton.Constant([]float64{5e-3, 5e-4, 5e-5, 5e-6, 5e-7}, 1e-12) > 1e3, "a linear sequence must be seen")
	assert.Zero(t, newton.Constant([]float64{1, 0.5, 1e-14}, rounding))
}

func TestText(t *testing.T) {
	assert.Equal(t, "1.0e+00, 2.5e-03", newton.Text([]float64{1, 2.5e-3}, ", "))
}
