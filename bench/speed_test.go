package bench_test

import (
	"flag"
	"fmt"
	"maps"
	"os"
	"runtime"
	"runtime/debug"
	"slices"
	"testing"
	"time"

	"example.com/holdtime/integrate"
)

// The speed benchmarks time a step against a yardstick of the same run: a batch of the yardstick, a batch of the case, and so
// on in turn. The ratio is the median over the pairs, so that what else the machine does cancels. ns/op is the median per
// step, also of the case alone.
//
//	go test ./bench -run '^$' -bench . -count 6 > bench/results/DATE.txt
//
// writes a file that benchstat reads; TestMain adds toolchain and settings to it.

// race takes turns and reports.
func race(b *testing.B, unit string, points []mixPoint, yardstick, contestant func(*mixPoint)) {
	batch := func(f func(*mixPoint)) float64 {
		start := time.Now()
		for i := range points {
			f(&points[i])
		}
		return float64(time.Since(start).Nanoseconds()) / float64(len(points))
	}
	batch(yardstick) // warm
	batch(contestant)
	const most = 1 << 14 // beyond, the oldest pair is replaced
	ratios, costs, floors := make([]float64, 0, most), make([]float64, 0, most), make([]float64, 0, most)
	turn := 0
	for b.Loop() {
		floor := batch(yardstick)
		cost := batch(contestant)
		if len(ratios) < most {
			ratios, costs, floors = append(ratios, 0), append(costs, 0), append(floors, 0)
		}
		ratios[turn%most], costs[turn%most], floors[turn%most] = cost/floor, cost, floor
		turn++
	}
	b.ReportAllocs()
	b.ReportMetric(median(ratios), unit)
	b.ReportMetric(median(costs), "ns/op")
	b.ReportMetric(median(floors), "yardstick-ns")
	count, bytes := allocations(func() { batch(contestant) })
	b.ReportMetric(count/float64(len(points)), "allocs/op")
	b.ReportMetric(bytes/float64(len(points)), "B/op")
}

// allocations counts what one call of f allocates, and its bytes.
func allocations(f func()) (count, bytes float64) {
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	f()
	runtime.ReadMemStats(&after)
	return float64(after.Mallocs - before.Mallocs), float64(after.TotalAlloc - before.TotalAlloc)
}

func median(x []float64) float64 {
	sorted := slices.Sorted(slices.Values(x))
	return sorted[len(sorted)/2]
}

// BenchmarkStep is the full step with tangent against the floor: xfloor says how many floors it costs.
func BenchmarkStep(b *testing.B) {
	for _, c := range speedCases(b) {
		b.Run(c.name, func(b *testing.B) {
			f := newFloor()
			var low, out integrate.Result
			iterations, steps := 0, 0
			race(b, "xfloor", c.points, func(p *mixPoint) { f.step(&low, &p.start, &p.increment) }, func(p *mixPoint) {
				if err := c.material.Step(&out, &p.start, p.increment); err != nil {
					b.Fatal(err)
				}
				iterations, steps = iterations+out.Iterations, steps+1
			})
			b.ReportMetric(float64(iterations)/float64(steps), "iterations")
		})
	}
}

// BenchmarkDenseNewton is the Norton step with seven unknowns and LU factors against the library's: xstep says how many of
// the library's steps it costs, with gonum's LU type, and with its two LAPACK routines alone.
func BenchmarkDenseNewton(b *testing.B) {
	c := speedCases(b)[0]
	lus := denseFactors()
	for _, name := range slices.Sorted(maps.Keys(lus)) {
		b.Run(name, func(b *testing.B) {
			dense := newDenseNewton(mixYoung, mixNu, 1e-15, 5, lus[name])
			var low, out integrate.Result
			race(b, "xstep", c.points, func(p *mixPoint) {
				if err := c.material.Step(&low, &p.start, p.increment); err != nil {
					b.Fatal(err)
				}
			}, func(p *mixPoint) {
				if err := dense.step(&out, &p.start, &p.increment); err != nil {
					b.Fatal(err)
				}
			})
		})
	}
}

// TestMain writes, when benchmarks are asked for, how they were run, as configuration lines that benchstat keeps.
func TestMain(m *testing.M) {
	flag.Parse()
	if f := flag.Lookup("test.bench"); f != nil && f.Value.String() != "" {
		fmt.Printf("toolchain: %s %s\n", runtime.Version(), compileSettings())
		fmt.Printf("cores: %d, GOMAXPROCS %d\n", runtime.NumCPU(), runtime.GOMAXPROCS(0))
		for _, name := range []string{"test.bench", "test.count", "test.benchtime", "test.cpu"} {
			if f := flag.Lookup(name); f.Value.String() != "" {
				fmt.Printf("%s: %s\n", name, f.Value)
			}
		}
	}
	os.Exit(m.Run())
}

// compileSettings names the settings that change the machine code.
func compileSettings() (settings string) {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return ""
	}
	for _, s := range info.Settings {
		switch s.Key {
		case "GOAMD64", "GOARM64", "-gcflags", "-race", "-cover":
			settings += s.Key + "=" + s.Value + " "
		}
	}
	return settings
}
