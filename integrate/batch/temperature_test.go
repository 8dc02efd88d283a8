package batch_test

import (
	"fmt"
	"math"
	"testing"
	"time"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// BenchmarkTemperature tells how much there would be to gain from forming what depends only on temperature once for all points
// of one temperature: xconstant is the time of Material.Step for a material with tables and a law with a temperature, over
// that for a material of constants that takes the same step. No way of keeping constants can gain more.
func BenchmarkTemperature(b *testing.B) {
	const temperature = 812.0
	norton, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(b, err)
	arrhenius, err := creeplaw.NewArrheniusAt(3e5, 800)
	require.NoError(b, err)
	activated, err := creeplaw.WithTemperature(norton, arrhenius)
	require.NoError(b, err)
	var laws []creeplaw.Law
	rows := []float64{700, 750, 800, 850, 900}
	for i := range rows {
		law, err := creeplaw.NewNortonAt(1e-8*math.Pow(10, float64(i)), 100, 5)
		require.NoError(b, err)
		laws = append(laws, law)
	}
	tabulated, err := creeplaw.NewTabulated(rows, laws, creeplaw.TableOptions{})
	require.NoError(b, err)
	elastic, expansion := tables(b)
	for _, law := range []creeplaw.Logarithmic{activated, tabulated} {
		full, err := integrate.New(elastic, law, integrate.Options{Expansion: expansion})
		require.NoError(b, err)
		young, _ := elastic.Young.At(temperature)
		poisson, _ := elastic.Poisson.At(temperature)
		rate := math.Exp(law.LogRate(creeplaw.Point{Stress: 100, Temperature: temperature}).Value)
		frozen, err := creeplaw.NewNortonAt(rate, 100, 5)
		require.NoError(b, err)
		mean, _ := expansion.Mean.At(temperature)
		bare, err := integrate.New(integrate.NewIsotropic(young, poisson), frozen, integrate.Options{
			Expansion: integrate.Expansion{Mean: integrate.Constant(mean), Reference: expansion.Reference}})
		require.NoError(b, err)
		b.Run(fmt.Sprintf("%T", law), func(b *testing.B) { compare(b, full, bare, temperature) })
	}
}

// compare steps the same points with two materials that must agree on them, in turn.
func compare(b *testing.B, full, bare *integrate.Material, temperature float64) {
	h := newPlant(b, "xx yy zz yz xz xy", tensor.TensorShear)
	p := h.draw(1024)
	steps := make([]integrate.Increment, 1024)
	for i := range steps {
		steps[i] = integrate.Increment{Dt: p.Dt, Temperature: temperature, Strain: tensor.Sym(p.Strain[6*i : 6*i+6])}
		if !steps[i].Strain.IsFinite() {
			steps[i].Strain = tensor.Sym{}
		}
	}
	var old integrate.State
	var a, c integrate.Result
	for i := range steps {
		require.NoError(b, full.Step(&a, &old, steps[i]))
		require.NoError(b, bare.Step(&c, &old, steps[i]))
		require.LessOrEqual(b, a.Stress.Sub(c.Stress).Norm(), 1e-9*c.Stress.Norm())
	}
	visits := [2][][]float64{make([][]float64, 1), make([][]float64, 1)}
	for b.Loop() {
		for k, m := range []*integrate.Material{full, bare} {
			start := time.Now()
			for i := range steps {
				_ = m.Step(&a, &old, steps[i])
			}
			visits[k][0] = append(visits[k][0], time.Since(start).Seconds())
		}
	}
	b.ReportMetric(total(visits[0], 0.5)/total(visits[1], 0.5), "xconstant")
	b.ReportMetric(total(visits[1], 0.5)/1024*1e9, "ns/step-constants")
	b.ReportMetric(0, "ns/op")
}
