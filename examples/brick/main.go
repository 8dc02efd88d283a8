// Brick carries an eight-node brick of distorted shape, and a patch of seven such bricks, through load programs of creep:
// tension by tractions with heating, relaxation between plates, a boundary that moves with a uniform strain. Every point must
// have the stress of a single material point, closed forms say which, and the global Newton iteration must be quadratic.
//
// It is an example of a finite-element host of package integrate with its own order of components and engineering shear: see
// assemble in body.go. The data are invented. Run it with -h for the flags.
package main

import (
	"flag"
	"fmt"
	"io"
	"os"

	"example.com/holdtime/examples/commandline"
)

func main() { os.Exit(command(os.Args[1:], os.Stdout, os.Stderr)) }

const helpText = `brick carries an eight-node brick of distorted shape, and seven of them in a patch, through load programs of creep with
the material point of the library, and checks uniformity, closed forms and the global Newton iteration.

usage: brick [flags]

It prints tables and a list of checks, each with its value and its limit, and draws brick.png and brick.svg. Units are mm, N,
MPa, h, K. The exit status is 1 when a check, the computation or the picture fails, 2 for a wrong flag and 0 otherwise.

` + caution + `

flags:
`

const caution = `The data are invented. This is a demonstration of a library, not a design tool: parts are designed and assessed to the
governing code by qualified engineers, and published creep parameters are starting points, never design data.`

// options are the flags.
type options struct {
	out string
	settings
}

func parse(args []string, stdout, stderr io.Writer) (options, error) {
	var o options
	usage := commandline.Usage{Name: "brick", Help: helpText, Shows: "its flags", Inputs: ", and there are no input files"}
	err := usage.Parse(args, stdout, stderr, o.define, o.check)
	return o, err
}

func (o *options) define(set *flag.FlagSet) {
	set.StringVar(&o.out, "out", "", "`folder` for brick.png and brick.svg; out beside the source of the example if empty")
	set.Float64Var(&o.exponent, "exponent", 5, "stress `exponent` of Norton's law, 1 to 8")
	set.Float64Var(&o.distortion, "distortion", 1, "`share` of the built-in distortion, 0 (a cube) to 1")
	set.IntVar(&o.steps, "steps", 16,
		"time `steps` in a hold or in the heating, 8 to 64; studies of the error double it several times")
}

func (o *options) check() error {
	switch {
	case !(o.exponent >= 1 && o.exponent <= 8):
		return fmt.Errorf("-exponent is %v, must be between 1 and 8", o.exponent)
	case !(o.distortion >= 0 && o.distortion <= 1):
		return fmt.Errorf("-distortion is %v, must be between 0 and 1", o.distortion)
	case o.steps < 8 || o.steps > 64:
		return fmt.Errorf("-steps is %v, must be between 8 and 64", o.steps)
	}
	return nil
}

// command is the program but for its exit.
func command(args []string, stdout, stderr io.Writer) int {
	o, err := parse(args, stdout, stderr)
	if err != nil {
		return commandline.Status(err)
	}
	r, err := newReport(o.settings)
	if err != nil {
		return commandline.Fail(stderr, "brick: %v", err)
	}
	r.write(stdout)
	paths, err := r.draw(commandline.OutputFolder(o.out, "", commandline.SourceFolder()))
	if err != nil {
		return commandline.Fail(stderr, "brick: the picture was not drawn: %v", err)
	}
	commandline.End(stdout, "picture", paths, caution)
	if !r.checks.Passed() {
		return commandline.Fail(stderr, "brick: a check failed, see the list")
	}
	return commandline.Done
}
