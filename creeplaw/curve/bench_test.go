package curve_test

import (
	"math"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// points is a mix of stresses and of creep strains over eight decades.
func points() (ps []creeplaw.Point) {
	for i := range 64 {
		ps = append(ps, creeplaw.Point{
			Stress:      100 + 20*float64(i%8),
			Strain:      math.Pow(10, -8+float64(i/8)),
			Temperature: 873,
		})
	}
	return ps
}

// BenchmarkLogRate compares a law made from a curve with the closed form of Bailey and Norton: ns/op in the same run.
func BenchmarkLogRate(b *testing.B) {
	closed, err := creeplaw.NewBaileyNorton(1e-14, 5, 0.4)
	if err != nil {
		b.Fatal(err)
	}
	b.Run("closed form", func(b *testing.B) { benchmarkLogRate(b, closed) })
	for _, c := range catalogue() {
		law, err := curve.NewStrainHardened(c.curve)
		if err != nil {
			b.Fatal(err)
		}
		b.Run(c.name, func(b *testing.B) { benchmarkLogRate(b, law) })
	}
}

func benchmarkLogRate(b *testing.B, law creeplaw.Logarithmic) {
	ps := points()
	sink := 0.0
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		sink += law.LogRate(ps[i&63]).ByLogStress
	}
	if math.IsNaN(sink) {
		b.Fatal("NaN")
	}
}
