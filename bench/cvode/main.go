// Cvode compares the library's error-controlled walk along an increment with a general-purpose stiff solver, SUNDIALS CVODE
// (BDF, dense matrix), on the same histories of one material point: how long each takes for the same achieved error.
//
// run.sh beside it builds the C side and calls this program. Both sides get the same numbers from one file; each is held
// against its own solution at the tightest tolerance, and those two against each other.
package main

import (
	"bufio"
	"bytes"
	"flag"
	"fmt"
	"io"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"text/tabwriter"
	"time"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// The material: Norton creep in MPa and h. The data are invented and have the size of a steel at temperature.
const (
	young, poisson = 150e3, 0.3
	prefactor      = 1e-16
	exponent       = 5
)

// knot is a point of a strain history; strain is linear between knots.
type knot struct {
	time   float64
	strain tensor.Sym
}

// history is a strain history from virgin material. scale is the stress by which errors are measured.
type history struct {
	name  string
	scale float64
	knots []knot
}

func histories() []history {
	shear := young / (2 * (1 + poisson))
	start := tensor.Sym{1, -0.6, -0.1, 0.35, 0, 0.6}.Deviator()
	start = start.Scale(200 / (3 * shear) / start.EquivalentStrain())
	cycle := []knot{{}}
	for k := range 10 { // strain-controlled cycles with holds, in a direction that turns
		t, turn := 200*float64(k), 0.3*float64(k)
		e := start.Scale(0.8).Add(tensor.Sym{tensor.XY: 4e-4 * math.Sin(turn), tensor.YZ: 4e-4 * math.Cos(turn)})
		cycle = append(cycle, knot{t + 1, e}, knot{t + 100, e}, knot{t + 101, e.Scale(-1)}, knot{t + 200, e.Scale(-1)})
	}
	return []history{
		{"relaxation", 200, []knot{{0, start}, {1000, start}}},
		{"ramp", 100, []knot{{0, tensor.Sym{}}, {500, tensor.Sym{5e-3, -2.5e-3, -2.5e-3, 0, 0, 1e-3}}}},
		{"cycles", 160, cycle},
	}
}

// point is one run: what it achieved and what it took.
type point struct{ err, nanoseconds float64 }

func main() {
	solver := flag.String("solver", "", "the built C program, see run.sh")
	flag.Parse()
	if err := compare(os.Stdout, *solver); err != nil {
		fmt.Fprintln(os.Stderr, "cvode:", err)
		os.Exit(1)
	}
}

func compare(w io.Writer, solver string) error {
	law, err := creeplaw.NewNorton(prefactor, exponent)
	if err != nil {
		return err
	}
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
	if err != nil {
		return err
	}
	dir, err := os.MkdirTemp("", "cvode")
	if err != nil {
		return err
	}
	defer os.RemoveAll(dir)
	file := filepath.Join(dir, "histories.txt")
	if err := os.WriteFile(file, []byte(encode(histories())), 0o600); err != nil {
		return err
	}
	if err := agree(w, m, solver, file); err != nil {
		return err
	}
	theirs, err := measureSolver(solver, file)
	if err != nil {
		return err
	}
	table := tabwriter.NewWriter(w, 0, 0, 2, ' ', tabwriter.AlignRight)
	fmt.Fprintln(table, "history\tachieved error\tlibrary µs\tCVODE µs, its differences\tCVODE µs, analytic Jacobian\tratio to the faster\t")
	for _, h := range histories() {
		ours, err := measureLibrary(m, h)
		if err != nil {
			return err
		}
		for _, target := range []float64{1e-4, 1e-6, 1e-8} {
			a := timeAt(ours, target)
			b, c := timeAt(theirs[h.name+" differences"], target), timeAt(theirs[h.name+" analytic"], target)
			fmt.Fprintf(table, "%s\t%.0e\t%.1f\t%.1f\t%.1f\t%.1f\t\n", h.name, target, a/1e3, b/1e3, c/1e3, math.Min(b, c)/a)
		}
	}
	return table.Flush()
}

// encode writes the histories as the C program reads them: with its own component order xx yy zz and three shears, tensor
// shear counted twice in both.
func encode(all []history) string {
	var b strings.Builder
	bulk, shear := young/(3*(1-2*poisson)), young/(2*(1+poisson))
	fmt.Fprintf(&b, "%.17g %.17g %.17g %d\n", bulk-2*shear/3, shear, prefactor, exponent)
	for _, h := range all {
		fmt.Fprintf(&b, "%s %d %.17g\n", h.name, len(h.knots), h.scale)
		for _, k := range h.knots {
			fmt.Fprintf(&b, "%.17g", k.time)
			for _, e := range k.strain {
				fmt.Fprintf(&b, " %.17g", e)
			}
			fmt.Fprintln(&b)
		}
	}
	return b.String()
}

// walk carries the library along a history and leaves the stress at every knot but the first.
func walk(m *integrate.Material, h *history, relative float64, stress []tensor.Sym) error {
	var state integrate.State
	tolerance := integrate.Tolerance{Relative: relative, Stress: h.scale}
	for k := 1; k < len(h.knots); k++ {
		from, to := &h.knots[k-1], &h.knots[k]
		_, err := m.FollowStress(&stress[k], &state, &state, integrate.Conditions{Strain: from.strain, Temperature: 800},
			integrate.Increment{Dt: to.time - from.time, Strain: to.strain, Temperature: 800}, tolerance, 0)
		if err != nil {
			return fmt.Errorf("%s, knot %d: %w", h.name, k, err)
		}
	}
	return nil
}

// measureLibrary runs a history at falling tolerances.
func measureLibrary(m *integrate.Material, h history) ([]point, error) {
	exact, out := make([]tensor.Sym, len(h.knots)), make([]tensor.Sym, len(h.knots))
	if err := walk(m, &h, 1e-13, exact); err != nil {
		return nil, err
	}
	var points []point
	for e := -1.0; e >= -11; e -= 0.5 {
		relative := math.Pow(10, e)
		if err := walk(m, &h, relative, out); err != nil {
			return nil, err
		}
		p := point{worst(&h, out, exact), math.Inf(1)}
		for range 7 { // best of batches, as on the C side
			const repeats = 20
			start := time.Now()
			for range repeats {
				if err := walk(m, &h, relative, out); err != nil {
					return nil, err
				}
			}
			p.nanoseconds = math.Min(p.nanoseconds, float64(time.Since(start).Nanoseconds())/repeats)
		}
		points = append(points, p)
	}
	return points, nil
}

// worst is the largest error of a stress component at any knot over the scale.
func worst(h *history, got, want []tensor.Sym) (largest float64) {
	for k := 1; k < len(h.knots); k++ {
		for i := range got[k] {
			largest = math.Max(largest, math.Abs(got[k][i]-want[k][i])/h.scale)
		}
	}
	return largest
}

// measureSolver runs the C program and sorts its table by history and Jacobian.
func measureSolver(solver, file string) (map[string][]point, error) {
	text, err := exec.Command(solver, file).Output()
	if err != nil {
		return nil, fmt.Errorf("the C program: %w", err)
	}
	points := map[string][]point{}
	lines := bufio.NewScanner(bytes.NewReader(text))
	for lines.Scan() {
		cells := strings.Split(lines.Text(), ",")
		if len(cells) != 6 || cells[0] == "history" {
			continue
		}
		achieved, err1 := strconv.ParseFloat(cells[3], 64)
		cost, err2 := strconv.ParseFloat(cells[4], 64)
		if err1 != nil || err2 != nil {
			return nil, fmt.Errorf("the C program printed %q", lines.Text())
		}
		name := cells[0] + " " + cells[1]
		points[name] = append(points[name], point{achieved, cost})
	}
	return points, lines.Err()
}

// timeAt is the least time in which a run achieved the target or better: the user tunes the tolerance to the error wanted.
func timeAt(points []point, target float64) float64 {
	best := math.Inf(1)
	for _, p := range points {
		if p.err <= target {
			best = math.Min(best, p.nanoseconds)
		}
	}
	return best
}

// agree holds the two codes against each other at tight tolerances.
func agree(w io.Writer, m *integrate.Material, solver, file string) error {
	text, err := exec.Command(solver, file, "1e-13").Output()
	if err != nil {
		return fmt.Errorf("the C program: %w", err)
	}
	theirs := strings.Split(strings.TrimSpace(string(text)), "\n")
	line := 0
	for _, h := range histories() {
		ours, other := make([]tensor.Sym, len(h.knots)), make([]tensor.Sym, len(h.knots))
		if err := walk(m, &h, 1e-13, ours); err != nil {
			return err
		}
		for k := 1; k < len(h.knots); k++ {
			var name string
			var knot int
			s := &other[k]
			if _, err := fmt.Sscan(theirs[line], &name, &knot, &s[0], &s[1], &s[2], &s[3], &s[4], &s[5]); err != nil || name != h.name ||
				knot != k {
				return fmt.Errorf("the C program printed %q where knot %d of %s was due", theirs[line], k, h.name)
			}
			line++
		}
		apart := worst(&h, ours, other)
		fmt.Fprintf(w, "%s: library and CVODE at tightest tolerance differ by %.1e of %g MPa\n", h.name, apart, h.scale)
		if !(apart <= 1e-9) {
			return fmt.Errorf("%s: the two codes do not solve the same problem", h.name)
		}
	}
	return nil
}
