// Pipe carries a thick-walled pipe under internal pressure, with or without a temperature gradient through its wall, from the
// elastic start through the redistribution of its stresses by creep to the steady state, and holds that against Bailey's
// closed form and an independent quadrature. The data it comes with are invented.
//
// It is an example of a finite-element host of package integrate, one-dimensional and axisymmetric: see assemble in balance.go
// for the loop over the points and course.go for time steps of controlled error. Run it with -h for the input file.
package main

import (
	_ "embed"
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"runtime"
)

//go:embed pipe.json
var builtIn []byte

// Exit statuses.
const (
	done    = 0
	failed  = 1
	refused = 2 // flags or input file
)

func main() { os.Exit(command(os.Args[1:], os.Stdout, os.Stderr)) }

const helpText = `pipe follows the stresses in a thick-walled pipe under internal pressure from the elastic start through their redistribution by
creep to the steady state: once at one temperature, the mean of those of both surfaces, where Bailey's closed form is known,
and once with the gradient of steady conduction between them, where a quadrature serves.

usage: pipe [flags]

Without flags it runs the built-in example, examples/pipe/pipe.json, whose data are invented. It prints tables and a list of
checks, each with its value and its limit, and writes pictures (PNG and SVG) and CSV files of the stresses.

THE PIPE, a flat JSON object. Every field must be there:
  title                          text
  inner_radius_mm, outer_radius_mm
  pressure_MPa                   inside; the ends are closed
  bore_temperature_C, outside_temperature_C
  young_MPa, poisson             0 to 0.49
  expansion_per_K                coefficient of thermal expansion
  creep_rate_per_h, at_stress_MPa, at_temperature_C, stress_exponent
                                 Norton's law through one point, exponent 1 to 12
  activation_energy_J_per_mol    of the creep rate

A mistake in the file is told with file, line and column; the exit status is then 2. It is 1 when a check, the computation or
the output fails, and 0 otherwise. A check of the stresses that fails usually wants more elements.

` + caution + `

flags:
`

const caution = `This is a demonstration of a library, not a design tool. Piping under pressure is designed and assessed to the governing code
by qualified engineers; published creep parameters are starting points, never design data.`

// options are the flags.
type options struct {
	pipe, out string
	settings
}

func parse(args []string, stdout, stderr io.Writer) (options, error) {
	var o options
	set := flag.NewFlagSet("pipe", flag.ContinueOnError)
	set.SetOutput(stderr)
	set.Usage = func() {} // a mistyped flag is told in one line
	set.StringVar(&o.pipe, "pipe", "", "pipe `file` (JSON); the built-in example if empty")
	set.StringVar(&o.out, "out", "", "`folder` for pictures and CSV files; \"out\" beside the pipe file if empty")
	set.IntVar(&o.elements, "elements", 40, "`number` of elements through the wall, 4 to 400")
	set.Float64Var(&o.tolerance, "tolerance", 1e-4,
		"error estimate allowed in a time step, as a `share` of the largest von Mises stress at the start")
	err := set.Parse(args)
	switch {
	case errors.Is(err, flag.ErrHelp):
		fmt.Fprint(stdout, helpText)
		set.SetOutput(stdout)
		set.PrintDefaults()
		return o, err
	case err != nil:
		err = errors.New("pipe: run it with -h for its flags and file") // the flag itself has been named
	case set.NArg() > 0:
		err = fmt.Errorf("pipe: %q is not a flag; the input file is given with -pipe", set.Arg(0))
	case o.elements < 4 || o.elements > 400:
		err = fmt.Errorf("pipe: -elements is %v, must be between 4 and 400", o.elements)
	case !(o.tolerance >= 1e-6 && o.tolerance <= 0.01):
		err = fmt.Errorf("pipe: -tolerance is %v, must be between 1e-6 and 0.01", o.tolerance)
	}
	if err != nil {
		fmt.Fprintln(stderr, err)
	}
	return o, err
}

// command is the program but for its exit.
func command(args []string, stdout, stderr io.Writer) int {
	o, err := parse(args, stdout, stderr)
	if errors.Is(err, flag.ErrHelp) {
		return done
	}
	if err != nil {
		return refused
	}
	p, err := o.read()
	if err != nil {
		fmt.Fprintln(stderr, err)
		return refused
	}
	r, err := newReport(p, o.settings)
	if err != nil {
		fmt.Fprintf(stderr, "pipe: %v\n", err)
		return failed
	}
	r.write(stdout)
	paths, err := r.files(o.folder())
	if err != nil {
		fmt.Fprintf(stderr, "pipe: the files were not written: %v\n", err)
		return failed
	}
	fmt.Fprintln(stdout)
	for _, path := range paths {
		fmt.Fprintf(stdout, "file: %s\n", relative(path))
	}
	fmt.Fprintf(stdout, "\n%s\n", caution)
	if !r.passed() {
		fmt.Fprintln(stderr, "pipe: a check failed, see the list")
		return failed
	}
	return done
}

func (o *options) read() (*pipe, error) {
	if o.pipe == "" {
		return readPipe(relative(filepath.Join(home(), "pipe.json")), builtIn)
	}
	text, err := os.ReadFile(o.pipe)
	if err != nil {
		return nil, fmt.Errorf("pipe: %w", err)
	}
	return readPipe(o.pipe, text)
}

// home is the folder of the built-in example where its source is at hand, as with go run; otherwise empty.
func home() string {
	if _, file, _, ok := runtime.Caller(0); ok && filepath.IsAbs(file) {
		if _, err := os.Stat(file); err == nil {
			return filepath.Dir(file)
		}
	}
	return ""
}

// folder is where the files go.
func (o *options) folder() string {
	switch {
	case o.out != "":
		return o.out
	case o.pipe != "":
		return filepath.Join(filepath.Dir(o.pipe), "out")
	}
	return filepath.Join(home(), "out")
}

// relative is a path as seen from the current folder, where that can be said.
func relative(path string) string {
	here, err := os.Getwd()
	if err != nil || !filepath.IsAbs(path) {
		return path
	}
	if short, err := filepath.Rel(here, path); err == nil {
		return short
	}
	return path
}
