package creeplaw_test

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
)

// A constructor with good arguments, each of which is spoiled in turn.
type constructor struct {
	name       string // as the error gives the law
	arguments  []float64
	parameters []string // as the error gives them
	build      func(x []float64) (law any, err error)
}

func constructors() []constructor {
	two := func(f func(_, _ float64) (any, error)) func([]float64) (any, error) {
		return func(x []float64) (any, error) { return f(x[0], x[1]) }
	}
	return []constructor{
		{"Norton", []float64{1e-15, 5}, []string{"prefactor", "stress exponent"},
			two(func(a, b float64) (any, error) { return creeplaw.NewNorton(a, b) })},
		{"Norton", []float64{1e-6, 100, 5}, []string{"rate", "stress", "stress exponent"},
			func(x []float64) (any, error) { return creeplaw.NewNortonAt(x[0], x[1], x[2]) }},
		{"Garofalo", []float64{1e-9, 0.05, 3}, []string{"prefactor", "stress coefficient", "exponent"},
			func(x []float64) (any, error) { return creeplaw.NewGarofalo(x[0], x[1], x[2]) }},
		{"Bailey–Norton", []float64{1e-15, 5, 0.4}, []string{"prefactor", "stress exponent", "time exponent"},
			func(x []float64) (any, error) { return creeplaw.NewBaileyNorton(x[0], x[1], x[2]) }},
		{"Bailey–Norton", []float64{1e-3, 100, 1e3, 5, 0.4}, []string{"strain", "stress", "time", "stress exponent", "time exponent"},
			func(x []float64) (any, error) { return creeplaw.NewBaileyNortonAt(x[0], x[1], x[2], x[3], x[4]) }},
		{"strain hardening", []float64{1e-18, 4, -1.5}, []string{"prefactor", "stress exponent", "strain exponent"},
			func(x []float64) (any, error) { return creeplaw.NewStrainHardening(x[0], x[1], x[2]) }},
		{"strain hardening", []float64{1e-6, 100, 1e-3, 4, -1.5}, []string{"rate", "stress", "strain", "stress exponent", "strain exponent"},
			func(x []float64) (any, error) { return creeplaw.NewStrainHardeningAt(x[0], x[1], x[2], x[3], x[4]) }},
		{"Arrhenius", []float64{300e3}, []string{"activation energy"},
			func(x []float64) (any, error) { return creeplaw.NewArrhenius(x[0]) }},
		{"Arrhenius", []float64{300e3, 800}, []string{"activation energy", "reference temperature"},
			two(func(a, b float64) (any, error) { return creeplaw.NewArrheniusAt(a, b) })},
	}
}

// What a parameter may not be, and what the error says it must be, by its name; by default the first line.
var limits = map[string]struct {
	bad  []float64
	want string
}{
	"":                  {[]float64{0, math.Copysign(0, -1), -1, math.NaN(), math.Inf(1), math.Inf(-1)}, "positive and finite"},
	"time exponent":     {[]float64{0, -0.4, 1 + epsilon, 2, math.NaN(), math.Inf(1)}, "above 0 and at most 1"},
	"strain exponent":   {[]float64{5e-324, 1, math.NaN(), math.Inf(1), math.Inf(-1)}, "at most 0 and finite"},
	"activation energy": {[]float64{-1, math.NaN(), math.Inf(1), math.Inf(-1)}, "at least 0 and finite"},
}

func TestConstructorsRefuseBadParameters(t *testing.T) {
	rows := 0
	for _, c := range constructors() {
		_, err := c.build(c.arguments)
		require.NoError(t, err, "%s %v", c.name, c.arguments)
		require.Len(t, c.parameters, len(c.arguments))
		for i, parameter := range c.parameters {
			limit, special := limits[parameter]
			if !special {
				limit = limits[""]
			}
			for _, bad := range limit.bad {
				spoiled := append([]float64(nil), c.arguments...)
				spoiled[i] = bad
				law, err := c.build(spoiled)
				rows++
				var p *creeplaw.ParameterError
				if !assert.True(t, errors.As(err, &p), "%s, %s = %v: %v", c.name, parameter, bad, err) {
					continue
				}
				assert.Equal(t, [3]string{c.name, parameter, limit.want}, [3]string{p.Law, p.Parameter, p.Want})
				assert.Equal(t, math.Float64bits(bad), math.Float64bits(p.Value), "%s, %s", c.name, parameter)
				assert.EqualError(t, err, fmt.Sprintf("creeplaw: %s: %s is %v, must be %s", c.name, parameter, bad, limit.want))
				assert.Zero(t, law, "no law is made")
			}
		}
	}
	assert.Greater(t, rows, 100)
}

// The edges that are allowed.
func TestConstructorsAcceptTheirEdges(t *testing.T) {
	for _, c := range constructors() {
		for i, parameter := range c.parameters {
			edges := map[string][]float64{
				"":                  {5e-324, math.MaxFloat64},
				"time exponent":     {1, 0.01},
				"strain exponent":   {0, math.Copysign(0, -1), -1e6},
				"activation energy": {0, 1e7},
			}
			at, special := edges[parameter]
			if !special {
				at = edges[""]
			}
			for _, x := range at {
				edge := append([]float64(nil), c.arguments...)
				edge[i] = x
				_, err := c.build(edge)
				assert.NoError(t, err, "%s, %s = %v", c.name, parameter, x)
			}
		}
	}
}

// The first bad parameter is the one named.
func TestConstructorNamesTheFirstBadParameter(t *testing.T) {
	_, err := creeplaw.NewBaileyNortonAt(1e-3, -1, 0, 5, 7)
	assert.EqualError(t, err, "creeplaw: Bailey–Norton: stress is -1, must be positive and finite")
}

func TestComposedLawsNeedTheirParts(t *testing.T) {
	norton, factor := made(creeplaw.NewNorton(1e-15, 5)), creeplaw.Arrhenius{}
	for _, c := range []struct {
		build func() (any, error)
		part  string
		text  string
	}{
		{func() (any, error) { return creeplaw.NewSum() }, "law", "creeplaw: sum of laws: the law is missing"},
		{func() (any, error) { return creeplaw.NewSum(norton, nil) }, "law", "creeplaw: sum of laws: the law is missing"},
		{func() (any, error) { return creeplaw.WithTemperature(nil, factor) }, "law",
			"creeplaw: temperature-dependent law: the law is missing"},
		{func() (any, error) { return creeplaw.WithTemperature(norton, nil) }, "temperature factor",
			"creeplaw: temperature-dependent law: the temperature factor is missing"},
	} {
		law, err := c.build()
		var m *creeplaw.MissingError
		if assert.True(t, errors.As(err, &m), "%v", err) {
			assert.Equal(t, c.part, m.Part)
			assert.EqualError(t, err, c.text)
		}
		assert.Zero(t, law)
	}
}
