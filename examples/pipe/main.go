// Pipe carries a thick-walled pipe under internal pressure, with or without a temperature gradient through its wall, from the
// elastic start through the redistribution of its stresses by creep to the steady state, and holds that against Bailey's
// closed form and an independent quadrature. The data it comes with are invented.
//
// It is an example of a finite-element host of package integrate, one-dimensional and axisymmetric: see assemble in balance.go
// for the loop over the points and course.go for time steps of controlled error. Run it with -h for the input file.
package main

import (
	_ "embed"
	"flag"
	"fmt"
	"io"
	"os"
	"path/filepath"

	"example.com/holdtime/examples/commandline"
)

//go:embed pipe.json
var builtIn []byte

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
	usage := commandline.Usage{Name: "pipe", Help: helpText, Shows: "its flags and file", Inputs: "; the input file is given with -pipe"}
	err := usage.Parse(args, stdout, stderr, o.define, o.check)
	return o, err
}

func (o *options) define(set *flag.FlagSet) {
	set.StringVar(&o.pipe, "pipe", "", "pipe `file` (JSON); the built-in example if empty")
	set.StringVar(&o.out, "out", "", "`folder` for pictures and CSV files; \"out\" beside the pipe file if empty")
	set.IntVar(&o.elements, "elements", 40, "`number` of elements through the wall, 4 to 400")
	set.Float64Var(&o.tolerance, "tolerance", 1e-4,
		"error estimate allowed in a time step, as a `share` of the largest von Mises stress at the start")
}

func (o *options) check() error {
	switch {
	case o.elements < 4 || o.elements > 400:
		return fmt.Errorf("-elements is %v, must be between 4 and 400", o.elements)
	case !(o.tolerance >= 1e-6 && o.tolerance <= 0.01):
		return fmt.Errorf("-tolerance is %v, must be between 1e-6 and 0.01", o.tolerance)
	}
	return nil
}

// command is the program but for its exit.
func command(args []string, stdout, stderr io.Writer) int {
	o, err := parse(args, stdout, stderr)
	if err != nil {
		return commandline.Status(err)
	}
	p, err := o.read()
	if err != nil {
		fmt.Fprintln(stderr, err)
		return commandline.Refused
	}
	r, err := newReport(p, o.settings)
	if err != nil {
		return commandline.Fail(stderr, "pipe: %v", err)
	}
	r.write(stdout)
	paths, err := r.files(commandline.OutputFolder(o.out, o.pipe, commandline.SourceFolder()))
	if err != nil {
		return commandline.Fail(stderr, "pipe: the files were not written: %v", err)
	}
	commandline.End(stdout, "file", paths, caution)
	if !r.checks.Passed() {
		return commandline.Fail(stderr, "pipe: a check failed, see the list")
	}
	return commandline.Done
}

func (o *options) read() (*pipe, error) {
	if o.pipe == "" {
		return readPipe(commandline.Relative(filepath.Join(commandline.SourceFolder(), "pipe.json")), builtIn)
	}
	text, err := os.ReadFile(o.pipe)
	if err != nil {
		return nil, fmt.Errorf("pipe: %w", err)
	}
	return readPipe(o.pipe, text)
}
