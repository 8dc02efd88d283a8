package curve_test

import (
	"math"
	"testing"
	"time"

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

// BenchmarkLogRate times LogRate of the law made from each curve in turns with the closed form of Bailey and Norton, a
// logarithm of stress and one of strain: xclosed is the ratio, evaluations those of the curve in one call.
func BenchmarkLogRate(b *testing.B) {
	closed := must(creeplaw.NewBaileyNorton(1e-14, 5, 0.4))
	ps := points()
	sink := 0.0
	for _, e := range catalogue() {
		law := must(curve.NewStrainHardened(e.curve))
		b.Run(e.name, func(b *testing.B) {
			b.ReportAllocs()
			var low, high time.Duration
			passes := 0
			for b.Loop() {
				start := time.Now()
				for _, p := range ps {
					sink += closed.LogRate(p).ByLogStress
				}
				middle := time.Now()
				for _, p := range ps {
					sink += law.LogRate(p).ByLogStress
				}
				low += middle.Sub(start)
				high += time.Since(middle)
				passes++
			}
			evaluations := 0
			for _, p := range ps {
				evaluations += law.Evaluations(p)
			}
			b.ReportMetric(float64(high)/float64(low), "xclosed")
			b.ReportMetric(float64(high)/float64(passes*len(ps)), "ns/op")
			b.ReportMetric(float64(evaluations)/float64(len(ps)), "evaluations")
		})
	}
	if math.IsNaN(sink) {
		b.Fatal("NaN")
	}
}
