package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

var (
	pascalSecond   = creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second}
	megapascalHour = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}
)

// Common practice: A[MPa⁻ⁿ h⁻¹] = A[Pa⁻ⁿ s⁻¹] × 10⁶ⁿ × 3600.
func TestUnitsScaleAPrefactor(t *testing.T) {
	const n = 4.9
	own := must(creeplaw.NewNorton(5.79e-36, n))
	converted := must(creeplaw.InUnits(own, pascalSecond, megapascalHour))
	byHand := must(creeplaw.NewNorton(5.79e-36*math.Pow(10, 6*n)*3600, n))
	for _, s := range []float64{0, 1e-9, 3, 400} {
		p := creeplaw.Point{Stress: s, Strain: 0.01, Temperature: 300}
		got, want := converted.Rate(p), byHand.Rate(p)
		check.Rel(t, fmt.Sprintf("rate at %v", s), got.Value, want.Value, plainTolerance)
		check.Rel(t, fmt.Sprintf("slope at %v", s), got.ByStress, want.ByStress, plainTolerance)
	}
	l := converted.LogRate(creeplaw.Point{Stress: 1e100})
	checkLog(t, "1e100 MPa", l, math.Log(5.79e-36)+106*n*math.Ln10+math.Log(3600), n)
}

func TestUnitsKeepTheDerivativesByStrainAndTemperature(t *testing.T) {
	hardening := must(creeplaw.NewStrainHardeningAt(1e-4, 50e6, 1e-3, 5, -1.5))
	own := must(creeplaw.WithTemperature(hardening, must(creeplaw.NewArrheniusAt(2.8e5, 900))))
	converted := must(creeplaw.InUnits(own, pascalSecond, megapascalHour))
	a := own.Rate(creeplaw.Point{Stress: 30e6, Strain: 0.01, Temperature: 800})
	b := converted.Rate(creeplaw.Point{Stress: 30, Strain: 0.01, Temperature: 800})
	check.Rel(t, "rate", b.Value, 3600*a.Value, plainTolerance)
	check.Rel(t, "by stress", b.ByStress, 3600e6*a.ByStress, plainTolerance)
	check.Rel(t, "by strain", b.ByStrain, 3600*a.ByStrain, plainTolerance)
	check.Rel(t, "by temperature", b.ByTemperature, 3600*a.ByTemperature, plainTolerance)
	lawtest.Run(t, converted, lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1, 1000},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{700, 1200}})
}

// The sizes of units: 1 psi = 4.4482216152605 N over 0.0254² m² (international pound, standard gravity and inch, exact).
func TestSizesOfUnits(t *testing.T) {
	check.Rel(t, "psi", float64(creeplaw.PoundPerSquareInch), 4.4482216152605/(0.0254*0.0254), 1e-15)
	check.Rel(t, "ksi", float64(creeplaw.KilopoundPerSquareInch), 4448.2216152605/(0.0254*0.0254), 1e-15)
	check.Rel(t, "year", float64(creeplaw.Year), 365.25*24*3600, 0)
	check.Rel(t, "day", float64(creeplaw.Day), 24*3600, 0)
	for unit, name := range map[fmt.Stringer]string{
		creeplaw.Pascal: "Pa", creeplaw.Kilopascal: "kPa", creeplaw.Bar: "bar", creeplaw.Megapascal: "MPa",
		creeplaw.Gigapascal: "GPa", creeplaw.PoundPerSquareInch: "psi", creeplaw.KilopoundPerSquareInch: "ksi",
		creeplaw.StressUnit(7): "7 Pa", creeplaw.Second: "s", creeplaw.Minute: "min", creeplaw.Hour: "h",
		creeplaw.Day: "d", creeplaw.Year: "a", creeplaw.TimeUnit(0.5): "0.5 s", megapascalHour: "MPa, h",
	} {
		assert.Equal(t, name, unit.String())
	}
}

func TestUnitsRefuseBadSizes(t *testing.T) {
	law := must(creeplaw.NewNorton(1, 3))
	with := func(stress, time float64) creeplaw.Units {
		return creeplaw.Units{Stress: creeplaw.StressUnit(stress), Time: creeplaw.TimeUnit(time)}
	}
	checkRefused(t, []refused{
		{"unit of stress", func(x float64) error { return last(creeplaw.InUnits(law, with(x, 1), pascalSecond)) }, notPositive},
		{"unit of time", func(x float64) error { return last(creeplaw.InUnits(law, with(1, x), pascalSecond)) }, notPositive},
		{"unit of stress wanted", func(x float64) error { return last(creeplaw.InUnits(law, pascalSecond, with(x, 1))) }, notPositive},
		{"unit of time wanted", func(x float64) error { return last(creeplaw.InUnits(law, pascalSecond, with(1, x))) }, notPositive},
	})
	checkMissing(t, last(creeplaw.InUnits(nil, pascalSecond, megapascalHour)), "law")
}

// A law published in Pa and s, used in a code that works in MPa and h.
func ExampleInUnits() {
	published, err := creeplaw.NewNorton(1e-40, 5)
	if err != nil {
		fmt.Println(err)
		return
	}
	law, err := creeplaw.InUnits(published, creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second},
		creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.1e /s, %.1e /h\n", published.Rate(creeplaw.Point{Stress: 10e6}).Value, law.Rate(creeplaw.Point{Stress: 10}).Value)
	// Output:
	// 1.0e-05 /s, 3.6e-02 /h
}
