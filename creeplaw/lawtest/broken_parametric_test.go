package lawtest

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
)

// scaledLaw is the model times a, with the stress over s: ṗ = a f(σ/s, p, T), invented. Its functions can be spoilt.
type scaledLaw struct {
	a, s  float64
	names [2]string
	unit  float64 // power of stress in the dimension of s
	bend  func(values []float64) []float64
	mend  func(err error) error
}

func modelScaled() scaledLaw {
	return scaledLaw{a: 1.3, s: 0.7, names: [2]string{"prefactor", "stress scale"}, unit: 1,
		bend: func(v []float64) []float64 { return v }, mend: func(err error) error { return err }}
}

func (l scaledLaw) Rate(p creeplaw.Point) creeplaw.Rate {
	p.Stress /= l.s
	r := modelRate(p)
	return creeplaw.Rate{Value: l.a * r.Value, ByStress: l.a / l.s * r.ByStress, ByStrain: l.a * r.ByStrain,
		ByTemperature: l.a * r.ByTemperature}
}

func (l scaledLaw) Parameters() []creeplaw.Parameter {
	inf := math.Inf(1)
	return []creeplaw.Parameter{
		{Name: l.names[0], Value: l.a, High: inf, Dimension: creeplaw.Dimension{Time: -1}},
		{Name: l.names[1], Value: l.s, High: inf, Dimension: creeplaw.Dimension{Stress: l.unit}},
	}
}

func (l scaledLaw) WithParameters(v []float64) (creeplaw.Law, error) {
	if len(v) != 2 || !(v[0] > 0) || !(v[1] > 0) {
		if err := l.mend(assert.AnError); err != nil {
			return nil, err
		}
	}
	v = l.bend(append([]float64(nil), v...))
	l.a, l.s = v[0], v[1]
	return l, nil
}

func parametricFaults() []faulty {
	with := func(change func(l *scaledLaw)) scaledLaw {
		l := modelScaled()
		change(&l)
		return l
	}
	return []faulty{
		{"no Parameters", "claimed capability", plainLaw(modelRate), Parametric},
		{"two parameters of one name", "sound parameters", with(func(l *scaledLaw) { l.names[1] = "prefactor" }), Parametric},
		{"parameter without a name", "sound parameters", with(func(l *scaledLaw) { l.names[0] = "" }), Parametric},
		{"the last digits are lost", "rebuilt from its parameters", with(func(l *scaledLaw) {
			l.bend = func(v []float64) []float64 { return []float64{v[0], v[1] * (1 + 0x1p-50)} }
		}), Parametric},
		{"takes NaN", "rebuilt from its parameters", with(func(l *scaledLaw) {
			l.mend = func(error) error { return nil }
		}), Parametric},
		{"wrong unit", "units of the parameters", with(func(l *scaledLaw) { l.unit = -1 }), Parametric},
	}
}

func TestGoodParametricLawPasses(t *testing.T) {
	results := Run(t, modelScaled(), modelBox(Parametric))
	assert.Len(t, results, 14)
	for _, r := range results {
		assert.Positive(t, r.Checks, r.Rule)
		assert.Zero(t, r.Broken, r.Rule)
	}
}
