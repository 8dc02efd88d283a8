package batch_test

import (
	"context"
	"flag"
	"fmt"
	"slices"
	"testing"
	"time"

	"example.com/holdtime/integrate/batch"
	"example.com/holdtime/tensor"
)

// campaign asks for benchmarks and a comparison of a million points, about half a gigabyte of arrays, instead of a few thousand.
var campaign = flag.Bool("campaign", false, "a million points")

const million = 1_000_000

// contestant is one way to step the points of a slice of the arrays.
type contestant struct {
	name       string
	step       func(batch.Points)
	wall, busy [][]float64 // seconds of each visit of each slice: elapsed, and spent by all threads
}

func (c *contestant) visit(slice int, p batch.Points) {
	start, spent := time.Now(), processTime()
	c.step(p)
	c.wall[slice] = append(c.wall[slice], time.Since(start).Seconds())
	c.busy[slice] = append(c.busy[slice], processTime()-spent)
}

// total sums over the slices a quantile of the visits of each.
func total(visits [][]float64, quantile float64) (sum float64) {
	for _, v := range visits {
		v = slices.Sorted(slices.Values(v))
		sum += v[int(quantile*float64(len(v)-1))]
	}
	return sum
}

// BenchmarkBatch steps points of one material, and of all five, by one worker and two, with tangent and without, and by a
// plain loop of Material.Step, all in turn, in slices of the arrays. What else the machine does falls on all alike, or out of
// the quantile:
//
//	xloop-…     elapsed time of one worker over that of the plain loop with tangent, medians
//	eff-…       elapsed time of one worker over twice that of two: from the fastest visit of each slice, which is the nearest to
//	            an idle machine, and from the medians, which are what this machine gave
//	cpu-…       processor time of one worker over that of two: 1 if the second core costs the first nothing
//
//	go test ./integrate/batch -run '^$' -bench Batch -benchtime 20x -campaign -timeout 1h
//
// takes 10⁶ points, in slices of 8000 points and in whole calls.
func BenchmarkBatch(b *testing.B) {
	points, cuts := 8192, []int{1}
	if *campaign {
		points, cuts = million, []int{128, 1}
	}
	for _, cut := range cuts {
		b.Run(fmt.Sprintf("Norton/slices=%d", cut), func(b *testing.B) { benchmark(b, true, points, cut) })
		b.Run(fmt.Sprintf("Mixed/slices=%d", cut), func(b *testing.B) { benchmark(b, false, points, cut) })
	}
}

func benchmark(b *testing.B, single bool, points, cut int) {
	h := newPlant(b, "xx yy zz xy yz xz", tensor.EngineeringShear)
	p := h.sound(h.draw(points))
	if single {
		h.materials, p.Material = h.materials[:1], nil
	}
	p = h.outputs(p, true)
	ctx := context.Background()
	call := func(workers int) func(batch.Points) {
		step := h.batch(b, batch.Options{Workers: workers})
		return func(p batch.Points) { requireStepped(b, step.Step(ctx, p)) }
	}
	stressOnly := func(f func(batch.Points)) func(batch.Points) {
		return func(p batch.Points) {
			p.Tangent = nil
			f(p)
		}
	}
	p.ByTemperature = nil
	names := []string{"loop", "tangent1", "stress1", "tangent2", "stress2"}
	steps := []func(batch.Points){func(p batch.Points) { h.loop(p) }, call(1), stressOnly(call(1)), call(2), stressOnly(call(2))}
	var field []*contestant
	for i, name := range names {
		field = append(field, &contestant{name: name, step: steps[i], wall: make([][]float64, cut), busy: make([][]float64, cut)})
	}
	for b.Loop() {
		for slice := range cut {
			part := h.slice(p, slice*points/cut, (slice+1)*points/cut)
			for _, c := range field {
				c.visit(slice, part)
			}
		}
	}
	report(b, field, points)
}

func requireStepped(b *testing.B, err error) {
	if err != nil {
		b.Fatal(err)
	}
}

func report(b *testing.B, field []*contestant, points int) {
	const fastest, middle = 0, 0.5
	loop, tangent1, stress1, tangent2, stress2 := field[0], field[1], field[2], field[3], field[4]
	for _, c := range field {
		b.ReportMetric(total(c.wall, middle)*1e9/float64(points), "ns/point-"+c.name)
	}
	b.ReportMetric(total(tangent1.wall, middle)/total(loop.wall, middle), "xloop-tangent1")
	b.ReportMetric(total(stress1.wall, middle)/total(loop.wall, middle), "xloop-stress1")
	for _, pair := range [][2]*contestant{{tangent1, tangent2}, {stress1, stress2}} {
		name := pair[0].name[:len(pair[0].name)-1]
		for quantile, label := range map[float64]string{fastest: "fastest", middle: "median"} {
			b.ReportMetric(total(pair[0].wall, quantile)/(2*total(pair[1].wall, quantile)), "eff-"+name+"-"+label)
		}
		b.ReportMetric(total(pair[0].busy, middle)/total(pair[1].busy, middle), "cpu-"+name)
	}
	b.ReportMetric(0, "ns/op")
}

// sound makes every point one that is not refused: a refusal ends early and would flatter.
func (h *plant) sound(p batch.Points) batch.Points {
	p = h.outputs(p, false)
	for _, f := range h.loop(p) {
		i := f.Point
		p.Material[i], p.Temperature[i] = 0, 800
		clear(p.Old[i*h.stride : (i+1)*h.stride])
		for j := range h.layout.Len() {
			p.Strain[i*h.layout.Len()+j] = 1e-4 * float64(j)
		}
	}
	return p
}

// slice is a part of all arrays.
func (h *plant) slice(p batch.Points, from, to int) batch.Points {
	part := func(a []float64, size int) []float64 {
		if a == nil {
			return nil
		}
		return a[from*size : to*size]
	}
	size := h.layout.Len()
	q := p
	q.Strain, q.Stress, q.ByTemperature = part(p.Strain, size), part(p.Stress, size), part(p.ByTemperature, size)
	q.Tangent = part(p.Tangent, size*size)
	q.Old, q.State = part(p.Old, h.stride), part(p.State, h.stride)
	if len(p.Temperature) > 1 {
		q.Temperature = part(p.Temperature, 1)
	}
	if p.Material != nil {
		q.Material = p.Material[from:to]
	}
	return q
}
