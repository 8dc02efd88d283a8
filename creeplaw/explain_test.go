package creeplaw_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
)

// own is a user's law with an explanation, without a logarithm: defined below 1000 K.
type own struct{ creeplaw.Norton }

type ownReason struct{}

func (ownReason) Error() string { return "too hot" }

func (o own) Rate(p creeplaw.Point) creeplaw.Rate {
	if p.Temperature > 1000 {
		return creeplaw.Rate{Value: math.NaN()}
	}
	return o.Norton.Rate(p)
}

func (o own) LogRate() {} // hides the logarithm of the law within

func (o own) CheckPoint(p creeplaw.Point) error {
	if p.Temperature > 1000 {
		return ownReason{}
	}
	return nil
}

// Whatever a user's law is put into, its own reason comes out.
func TestReasonsReachThroughCompositions(t *testing.T) {
	law := own{must(creeplaw.NewNorton(1e-10, 4))}
	_, isLogarithmic := creeplaw.Law(law).(creeplaw.Logarithmic)
	assert.False(t, isLogarithmic)
	arrhenius := must(creeplaw.NewArrhenius(2e5))
	for _, composed := range []creeplaw.Law{
		must(creeplaw.NewSum(law)),
		must(creeplaw.NewSeries(must(creeplaw.NewNorton(1, 3)), law)),
		must(creeplaw.WithTemperature(law, arrhenius)),
		must(creeplaw.WithThreshold(law, 5)),
		must(creeplaw.InUnits(law, pascalSecond, megapascalHour)),
		must(creeplaw.NewSum(must(creeplaw.WithTemperature(must(creeplaw.WithThreshold(law, 5)), arrhenius)))),
	} {
		explainer, ok := composed.(creeplaw.Explainer)
		if !assert.True(t, ok, "%T", composed) {
			continue
		}
		hot := creeplaw.Point{Stress: 100, Strain: 0.01, Temperature: 1200}
		assert.True(t, math.IsNaN(composed.Rate(hot).Value), "%T", composed)
		assert.ErrorIs(t, explainer.CheckPoint(hot), ownReason{}, "%T", composed)
		good := creeplaw.Point{Stress: 100, Strain: 0.01, Temperature: 900}
		assert.NoError(t, explainer.CheckPoint(good), "%T", composed)
		bad := good
		bad.Stress = math.NaN()
		checkOutside(t, explainer.CheckPoint(bad), "stress", math.NaN())
	}
	tabulated := must(creeplaw.NewTabulated([]float64{900, 1100}, []creeplaw.Law{law, law}, creeplaw.TableOptions{}))
	assert.ErrorIs(t, tabulated.CheckPoint(creeplaw.Point{Stress: 100, Temperature: 1000}), ownReason{})
}

func TestReasonsOfLastResort(t *testing.T) {
	hardening := must(creeplaw.NewSum(must(creeplaw.NewBaileyNorton(1e-12, 4, 0.4))))
	checkOutside(t, hardening.CheckPoint(creeplaw.Point{Stress: 1, Strain: -1, Temperature: 900}), "creep strain", -1)
	thermal := must(creeplaw.WithTemperature(hardening, must(creeplaw.NewArrhenius(2e5))))
	checkOutside(t, thermal.CheckPoint(creeplaw.Point{Stress: 1, Strain: 1, Temperature: 0}), "temperature", 0)
	silent := must(creeplaw.NewSum(creeplaw.ValueFunc(nil)))
	var undefined *creeplaw.UndefinedError
	p := creeplaw.Point{Stress: 1, Strain: 1, Temperature: 900}
	if assert.ErrorAs(t, silent.CheckPoint(p), &undefined) {
		assert.Equal(t, p, undefined.Point)
		assert.ErrorContains(t, undefined, "creeplaw.ValueFunc is undefined")
	}
}
