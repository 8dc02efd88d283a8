// Precision shows what accuracy costs: histories of one material point whose answers are known in closed form, taken with the
// error-controlled walk at tolerances from 1e-2 to 1e-10 and with equal backward-Euler steps. It prints the error achieved for
// each tolerance and the scalar problems and time it took, and draws work against precision.
package main

import (
	"errors"
	"flag"
	"fmt"
	"io"
	"math"
	"os"
	"path/filepath"
	"text/tabwriter"
	"time"

	"example.com/holdtime/integrate"
)

func main() {
	if err := command(os.Args[1:], os.Stdout); err != nil && !errors.Is(err, flag.ErrHelp) {
		fmt.Fprintln(os.Stderr, "precision:", err)
		os.Exit(1)
	}
}

func command(args []string, w io.Writer) error {
	flags := flag.NewFlagSet("precision", flag.ContinueOnError)
	flags.SetOutput(w)
	out := flags.String("out", filepath.Join("examples", "precision", "out"), "folder for the pictures, made if need be")
	flags.Usage = func() {
		fmt.Fprintln(w, "precision: what accuracy costs at one material point (invented material, closed-form answers).")
		fmt.Fprintln(w, "\nFlags:")
		flags.PrintDefaults()
	}
	if err := flags.Parse(args); err != nil {
		return err
	}
	lines, err := study()
	if err != nil {
		return err
	}
	if err := table(w, lines); err != nil {
		return err
	}
	paths, err := picture(*out, lines)
	if err != nil {
		return err
	}
	for _, p := range paths {
		fmt.Fprintln(w, "picture:", filepath.ToSlash(p))
	}
	return nil
}

// run is one way to take a problem.
type run struct {
	tolerance float64 // of the walk; 0 for equal steps
	err       float64 // achieved, over the largest stress
	solves    int
	cost      time.Duration
}

// line is a problem taken at all tolerances, and with equal steps.
type line struct {
	name         string
	walks, steps []run
}

func study() ([]line, error) {
	all, err := problems()
	if err != nil {
		return nil, err
	}
	var lines []line
	for i := range all {
		p := &all[i]
		m, err := p.material()
		if err != nil {
			return nil, err
		}
		l := line{name: p.name}
		for e := -2; e >= -10; e-- {
			r, err := p.walked(m, math.Pow(10, float64(e)))
			if err != nil {
				return nil, fmt.Errorf("%s: %w", p.name, err)
			}
			l.walks = append(l.walks, r)
		}
		for count := 8; count <= 1<<15; count *= 8 {
			r, err := p.stepped(m, count)
			if err != nil {
				return nil, fmt.Errorf("%s: %w", p.name, err)
			}
			l.steps = append(l.steps, r)
		}
		lines = append(lines, l)
	}
	return lines, nil
}

func (p *problem) walked(m *integrate.Material, tolerance float64) (run, error) {
	r := run{tolerance: tolerance}
	mises, solves, err := p.follow(m, tolerance)
	if err != nil {
		return r, err
	}
	r.err, r.solves = math.Abs(mises-p.exact)/p.scale, solves
	r.cost = fastest(func() { _, _, err = p.follow(m, tolerance) })
	return r, err
}

func (p *problem) stepped(m *integrate.Material, count int) (run, error) {
	r := run{solves: count}
	mises, err := p.steps(m, count)
	if err != nil {
		return r, err
	}
	r.err = math.Abs(mises-p.exact) / p.scale
	r.cost = fastest(func() { _, err = p.steps(m, count) })
	return r, err
}

// fastest is the least of several timings: what the work takes when the machine does nothing else.
func fastest(f func()) time.Duration {
	best := time.Duration(math.MaxInt64)
	for range 5 {
		start := time.Now()
		f()
		best = min(best, time.Since(start))
	}
	return best
}

func table(w io.Writer, lines []line) error {
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', tabwriter.AlignRight)
	fmt.Fprintln(w, "Error achieved by the walk for the tolerance asked for, over the largest stress, with the scalar problems solved:")
	fmt.Fprint(t, "tolerance\t")
	for _, l := range lines {
		fmt.Fprintf(t, "%s\t\t", l.name)
	}
	fmt.Fprintln(t)
	for i := range lines[0].walks {
		fmt.Fprintf(t, "%.0e\t", lines[0].walks[i].tolerance)
		for _, l := range lines {
			fmt.Fprintf(t, "%.1e\t%d\t", l.walks[i].err, l.walks[i].solves)
		}
		fmt.Fprintln(t)
	}
	fmt.Fprintln(t)
	fmt.Fprint(t, "equal steps\t")
	for _, l := range lines {
		fmt.Fprintf(t, "%s\t\t", l.name)
	}
	fmt.Fprintln(t)
	for i := range lines[0].steps {
		fmt.Fprintf(t, "%d\t", lines[0].steps[i].solves)
		for _, l := range lines {
			fmt.Fprintf(t, "%.1e\t%d\t", l.steps[i].err, l.steps[i].solves)
		}
		fmt.Fprintln(t)
	}
	return t.Flush()
}
