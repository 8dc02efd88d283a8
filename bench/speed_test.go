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

// The speed benchmarks time a step against a yardstick of the same run: a batch of the yardstick, a batch of the case on the
// same points, and so on in turn through the mix, each batch shorter than a slice of the scheduler. A batch costs the median
// of its visits, the mix the sum of its batches. What else the machine does falls on both alike or out of the median.
// ns/op is per step, of the case alone.
//
//	go test ./bench -run '^$' -bench . -count 6 > bench/results/DATE.txt
//
// writes a file that benchstat reads; TestMain adds toolchain and settings to it.

const mostVisits = 1 << 12 // of a batch; beyond, the oldest is replaced

// lane keeps what the visits of each batch cost.
type lane struct{ visits [][]float64 }

func newLane(batches int) *lane {
	l := &lane{make([][]float64, batches)}
	for i := range l.visits {
		l.visits[i] = make([]float64, 0, mostVisits)
	}
	return l
}

func (l *lane) time(batch, turn int, points []mixPoint, f func(*mixPoint)) {
	start := time.Now()
	for i := range points {
		f(&points[i])
	}
	cost := float64(time.Since(start).Nanoseconds())
	if v := l.visits[batch]; len(v) < mostVisits {
		l.visits[batch] = append(v, cost)
	} else {
		v[turn%mostVisits] = cost
	}
}

// total is the cost of the mix.
func (l *lane) total() (sum float64) {
	for _, v := range l.visits {
		slices.Sort(v)
		sum += v[len(v)/2]
	}
	return sum
}

// race takes turns and reports.
func race(b *testing.B, unit string, points []mixPoint, batch int, yardstick, contestant func(*mixPoint)) {
	batches := len(points) / batch
	low, high := newLane(batches), newLane(batches)
	turn := 0
	for b.Loop() {
		for i := range batches {
			part := points[i*batch : (i+1)*batch]
			low.time(i, turn, part, yardstick)
			high.time(i, turn, part, contestant)
		}
		turn++
	}
	n := float64(len(points))
	b.ReportAllocs()
	b.ReportMetric(high.total()/low.total(), unit)
	b.ReportMetric(high.total()/n, "ns/op")
	b.ReportMetric(low.total()/n, "yardstick-ns")
	count, bytes := allocations(func() {
		for i := range points {
			contestant(&points[i])
		}
	})
	b.ReportMetric(count/n, "allocs/op")
	b.ReportMetric(bytes/n, "B/op")
}

// allocations counts what one call of f allocates, and its bytes.
func allocations(f func()) (count, bytes float64) {
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	f()
	runtime.ReadMemStats(&after)
	return float64(after.Mallocs - before.Mallocs), float64(after.TotalAlloc - before.TotalAlloc)
}

// BenchmarkStep is the full step with tangent against the floor: xfloor says how many floors it costs.
func BenchmarkStep(b *testing.B) {
	for _, c := range speedCases(b) {
		b.Run(c.name, func(b *testing.B) {
			f := newFloor()
			var low, out integrate.Result
			iterations, steps := 0, 0
			race(b, "xfloor", c.points, 256, func(p *mixPoint) { f.step(&low, &p.start, &p.increment) }, func(p *mixPoint) {
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
			race(b, "xstep", c.points, 32, func(p *mixPoint) {
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
