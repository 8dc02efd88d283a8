// Precision shows what accuracy costs: histories of one material point whose answers are known in closed form, taken with the
// error-controlled walk at tolerances from 1e-2 to 1e-10 and with equal backward-Euler steps. It prints the error achieved for
// each tolerance and the scalar problems it took, and draws work against precision. The data are invented.
package main

import (
	"flag"
	"fmt"
	"io"
	"math"
	"os"
	"time"

	"example.com/holdtime/examples/commandline"
	"example.com/holdtime/integrate"
)

func main() { os.Exit(command(os.Args[1:], os.Stdout, os.Stderr)) }

const helpText = `precision shows what accuracy costs at one material point: five histories with answers in closed form, taken with the
error-controlled walk at tolerances from 1e-2 to 1e-10, and with equal backward-Euler steps.

usage: precision [flags]

It prints the errors achieved and the scalar problems solved, and draws precision.png and precision.svg: time taken over error
achieved, and error achieved over tolerance. The exit status is 1 when the computation or the picture fails, 2 for a wrong flag
and 0 otherwise.

` + caution + `

flags:
`

const caution = `The data are invented. This is a demonstration of a library, not a design tool: parts are designed and assessed to the
governing code by qualified engineers, and published creep parameters are starting points, never design data.`

// command is the program but for its exit.
func command(args []string, stdout, stderr io.Writer) int {
	var out string
	usage := commandline.Usage{Name: "precision", Help: helpText, Shows: "its flags", Inputs: ", and there are no input files"}
	err := usage.Parse(args, stdout, stderr, func(set *flag.FlagSet) {
		set.StringVar(&out, "out", "", "`folder` for the pictures; out beside the source of the example if empty")
	}, func() error { return nil })
	if err != nil {
		return commandline.Status(err)
	}
	lines, err := study()
	if err != nil {
		return commandline.Fail(stderr, "precision: %v", err)
	}
	if err := table(stdout, lines); err != nil {
		return commandline.Fail(stderr, "precision: %v", err)
	}
	paths, err := draw(commandline.OutputFolder(out, "", commandline.SourceFolder()), lines)
	if err != nil {
		return commandline.Fail(stderr, "precision: the picture was not drawn: %v", err)
	}
	commandline.End(stdout, "picture", paths, caution)
	return commandline.Done
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
