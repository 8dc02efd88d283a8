package creeplaw_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
)

// Tolerances of the closed-form checks of the steady laws. A plain rate is exp of a logarithm of up to a few hundred, each
// unit of which costs one rounding; a logarithm itself keeps nearly full precision.
const (
	plainTolerance = 1e-12
	logTolerance   = 1e-14
)

// refused is one set of parameters a constructor must refuse, and the parameter its error must name.
type refused struct {
	parameter string
	build     func(bad float64) error
	bad       []float64
}

var (
	notPositive = []float64{0, -1, math.NaN(), math.Inf(1), math.Inf(-1)}
	negative    = []float64{-1, math.NaN(), math.Inf(1), math.Inf(-1)}
)

func checkRefused(t *testing.T, rows []refused) {
	t.Helper()
	for _, row := range rows {
		for _, bad := range row.bad {
			err := row.build(bad)
			var p *creeplaw.ParameterError
			if !assert.ErrorAs(t, err, &p, "%s = %v", row.parameter, bad) {
				continue
			}
			assert.Equal(t, row.parameter, p.Parameter, "%s = %v", row.parameter, bad)
			assert.True(t, p.Value == bad || math.IsNaN(p.Value) && math.IsNaN(bad), "%s: the error names %v, not %v",
				row.parameter, p.Value, bad)
		}
	}
}

// last drops a constructor's law and keeps its error.
func last[L any](_ L, err error) error { return err }

// must is for parameters that a test knows to be good.
func must[L any](law L, err error) L {
	if err != nil {
		panic(err)
	}
	return law
}

// checkLog compares a logarithm on its own scale and the exponent of stress.
func checkLog(t *testing.T, label string, got creeplaw.LogRate, value, byLogStress float64) {
	t.Helper()
	check.Scaled(t, label+": ln rate", got.Value, value, 1+math.Abs(value), logTolerance)
	check.Rel(t, label+": stress exponent", got.ByLogStress, byLogStress, logTolerance)
}

func checkMissing(t *testing.T, err error, part string) {
	t.Helper()
	var m *creeplaw.MissingError
	if assert.ErrorAs(t, err, &m) {
		assert.Equal(t, part, m.Part)
	}
}

func checkOutside(t *testing.T, err error, quantity string, value float64) {
	t.Helper()
	var d *creeplaw.DomainError
	if !assert.True(t, errors.As(err, &d), "%v is not a DomainError", err) {
		return
	}
	assert.Equal(t, quantity, d.Quantity)
	assert.True(t, d.Value == value || math.IsNaN(value) && math.IsNaN(d.Value), "%v, not %v", d.Value, value)
}
