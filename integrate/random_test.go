package integrate_test

import (
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// campaign runs the long random campaigns instead of their short forms: go test ./integrate -campaign
var campaign = flag.Bool("campaign", false, "run the long random campaigns")

// seed makes every random test repeatable; failures print it.
const seed = 20261201

const (
	young   = 160e3 // MPa
	poisson = 0.3
	shear   = young / (2 * (1 + poisson))
)

// source draws laws, states and increments, logarithmically uniform over wide boxes.
type source struct{ *rand.Rand }

func newSource(stream uint64) source { return source{rand.New(rand.NewPCG(seed, stream))} }

func (s source) uniform(low, high float64) float64 { return low + (high-low)*s.Float64() }

func (s source) decades(low, high float64) float64 { return math.Pow(10, s.uniform(low, high)) }

// deviator returns a random direction with √(⅔ e:e) = 1 and a trace that is zero to the bit.
func (s source) deviator() tensor.Sym {
	x := s.NormFloat64()
	e := tensor.Sym{x, -x, 0, s.NormFloat64(), s.NormFloat64(), s.NormFloat64()}
	return e.Scale(1 / e.EquivalentStrain())
}

// lawKind draws a law of one kind with random exponents; anchored at 1e-6 /h or 1e-3 under 100 MPa.
type lawKind struct {
	name string
	draw func(s source) (creeplaw.Law, error)
}

func lawKinds() []lawKind {
	exponent := func(s source) float64 { return s.decades(0, math.Log10(50)) }
	norton := func(s source) (creeplaw.Law, error) { return creeplaw.NewNortonAt(1e-6, 100, exponent(s)) }
	garofalo := func(s source) (creeplaw.Law, error) {
		return creeplaw.NewGarofalo(s.decades(-12, -6), s.decades(-2.5, -1), s.uniform(1, 10))
	}
	bailey := func(s source) (creeplaw.Law, error) {
		return creeplaw.NewBaileyNortonAt(1e-3, 100, 100, exponent(s), s.uniform(0.2, 1))
	}
	hardening := func(s source) (creeplaw.Law, error) {
		return creeplaw.NewStrainHardeningAt(1e-6, 100, 1e-3, exponent(s), s.uniform(-5, 0))
	}
	thermal := func(inner func(source) (creeplaw.Law, error)) func(source) (creeplaw.Law, error) {
		return func(s source) (creeplaw.Law, error) {
			law, err := inner(s)
			if err != nil {
				return nil, err
			}
			factor, err := creeplaw.NewArrheniusAt(s.uniform(1e5, 6e5), 800)
			if err != nil {
				return nil, err
			}
			return creeplaw.WithTemperature(law, factor)
		}
	}
	sum := func(parts ...func(source) (creeplaw.Law, error)) func(source) (creeplaw.Law, error) {
		return func(s source) (creeplaw.Law, error) {
			var laws []creeplaw.Law
			for _, part := range parts {
				law, err := part(s)
				if err != nil {
					return nil, err
				}
				laws = append(laws, law)
			}
			return creeplaw.NewSum(laws...)
		}
	}
	return []lawKind{
		{"Norton", norton},
		{"Garofalo", garofalo},
		{"Bailey–Norton", bailey},
		{"strain hardening", hardening},
		{"thermal Norton", thermal(norton)},
		{"primary and secondary", sum(bailey, norton)},
		{"diffusion and dislocation", sum(garofalo, func(s source) (creeplaw.Law, error) {
			return creeplaw.NewNortonAt(1e-8, 100, 1)
		})},
		{"two primaries and a sinh", sum(bailey, thermal(hardening), garofalo)},
	}
}

func material(t testing.TB, law creeplaw.Law) *integrate.Material {
	t.Helper()
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
	require.NoError(t, err)
	return m
}
