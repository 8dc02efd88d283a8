// Brick carries an eight-node brick of distorted shape, and a patch of seven such bricks, through load programs of creep:
// tension by tractions with heating, relaxation between plates, a boundary that moves with a uniform strain. Every point must
// have the stress of a single material point, closed forms say which, and the global Newton iteration must be quadratic.
//
// It is an example of a finite-element host of package integrate with its own order of components and engineering shear: see
// assemble in body.go. The data are invented. Run it with -h for the flags.
package main

import (
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"runtime"
)

// Exit statuses.
const (
	done    = 0
	failed  = 1
	refused = 2 // flags
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
	set := flag.NewFlagSet("brick", flag.ContinueOnError)
	set.SetOutput(stderr)
	set.Usage = func() {} // a mistyped flag is told in one line
	set.StringVar(&o.out, "out", "", "`folder` for brick.png and brick.svg; out beside the source of the example if empty")
	set.Float64Var(&o.exponent, "exponent", 5, "stress `exponent` of Norton's law, 1 to 8")
	set.Float64Var(&o.distortion, "distortion", 1, "`share` of the built-in distortion, 0 (a cube) to 1")
	set.IntVar(&o.steps, "steps", 16,
		"time `steps` in a hold or in the heating, 8 to 64; studies of the error double it several times")
	err := set.Parse(args)
	switch {
	case errors.Is(err, flag.ErrHelp):
		fmt.Fprint(stdout, helpText)
		set.SetOutput(stdout)
		set.PrintDefaults()
		return o, err
	case err != nil:
		err = errors.New("brick: run it with -h for its flags") // the flag itself has been named
	case set.NArg() > 0:
		err = fmt.Errorf("brick: %q is not a flag, and there are no input files", set.Arg(0))
	case !(o.exponent >= 1 && o.exponent <= 8):
		err = fmt.Errorf("brick: -exponent is %v, must be between 1 and 8", o.exponent)
	case !(o.distortion >= 0 && o.distortion <= 1):
		err = fmt.Errorf("brick: -distortion is %v, must be between 0 and 1", o.distortion)
	case o.steps < 8 || o.steps > 64:
		err = fmt.Errorf("brick: -steps is %v, must be between 8 and 64", o.steps)
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
	r, err := newReport(o.settings)
	if err != nil {
		fmt.Fprintf(stderr, "brick: %v\n", err)
		return failed
	}
	r.write(stdout)
	paths, err := r.draw(o.folder())
	if err != nil {
		fmt.Fprintf(stderr, "brick: the picture was not drawn: %v\n", err)
		return failed
	}
	fmt.Fprintln(stdout)
	for _, path := range paths {
		fmt.Fprintf(stdout, "picture: %s\n", relative(path))
	}
	fmt.Fprintf(stdout, "\n%s\n", caution)
	if !r.passed() {
		fmt.Fprintln(stderr, "brick: a check failed, see the list")
		return failed
	}
	return done
}

// folder is where the pictures go: by default beside the source where that is at hand, as with go run.
func (o *options) folder() string {
	if o.out != "" {
		return o.out
	}
	if _, file, _, ok := runtime.Caller(0); ok && filepath.IsAbs(file) {
		if _, err := os.Stat(file); err == nil {
			return filepath.Join(filepath.Dir(file), "out")
		}
	}
	return "out"
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
