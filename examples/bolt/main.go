// Bolt follows the clamp load of a bolted flange joint at temperature through its service: the bolts creep, flange and gasket
// spring back, temperatures come and go, and now and then somebody retightens. The data it comes with are invented.
//
// Run it with -h for the input files. It is an example of a host of package integrate: see balance.go for the global Newton
// iteration on the library's tangent, and double.go for steps of controlled error.
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

//go:embed bolt.json
var defaultJoint []byte

//go:embed history.csv
var defaultHistory []byte

// Exit statuses.
const (
	done    = 0
	failed  = 1
	refused = 2 // flags or input files
)

func main() { os.Exit(command(os.Args[1:], os.Stdout, os.Stderr)) }

// options are the flags.
type options struct {
	joint, history, out string
	settings
}

func parse(args []string, stdout, stderr io.Writer) (options, error) {
	o := options{settings: settings{only: -1}}
	set := flag.NewFlagSet("bolt", flag.ContinueOnError)
	set.SetOutput(stderr)
	set.Usage = func() {} // a mistyped flag is told in one line
	set.StringVar(&o.joint, "joint", "", "joint `file` (JSON); the built-in example if empty")
	set.StringVar(&o.history, "history", "", "service history `file` (CSV); the built-in example if empty")
	set.StringVar(&o.out, "out", "", "`folder` for bolt.png and bolt.svg; \"out\" beside the joint file if empty")
	set.Float64Var(&o.every, "every", 2000, "`hours` between lines of the table besides the rows of the history; 0 for none")
	set.Float64Var(&o.tolerance, "tolerance", 1e-4, "error estimate allowed in a time step, as a `share` of the preload")
	err := set.Parse(args)
	switch {
	case errors.Is(err, flag.ErrHelp):
		fmt.Fprint(stdout, helpText)
		set.SetOutput(stdout)
		set.PrintDefaults()
		return o, err
	case err != nil:
		err = errors.New("bolt: run it with -h for its flags and files") // the flag itself has been named
	case set.NArg() > 0:
		err = fmt.Errorf("bolt: %q is not a flag; input files are given with -joint and -history", set.Arg(0))
	case !(o.tolerance >= 1e-8 && o.tolerance <= 0.1):
		err = fmt.Errorf("bolt: -tolerance is %v, must be between 1e-8 and 0.1", o.tolerance)
	case !(o.every == 0 || o.every >= 1 && o.every <= latest):
		err = fmt.Errorf("bolt: -every is %v, must be 0 or between 1 and %v", o.every, latest)
	}
	if err != nil {
		fmt.Fprintln(stderr, err)
	}
	return o, err
}

// mostLines of a table that anybody would read.
const mostLines = 10000

// command is the program but for its exit.
func command(args []string, stdout, stderr io.Writer) int {
	o, err := parse(args, stdout, stderr)
	if errors.Is(err, flag.ErrHelp) {
		return done
	}
	if err != nil {
		return refused
	}
	j, h, err := o.read()
	if err != nil {
		fmt.Fprintln(stderr, err)
		return refused
	}
	if lines := (h.end() - h.start()) / o.every; o.every > 0 && lines > mostLines {
		fmt.Fprintf(stderr, "bolt: -every %v makes more than %d lines; choose longer hours\n", o.every, mostLines)
		return refused
	}
	p, err := newReport(j, h, o.settings)
	if err != nil {
		fmt.Fprintf(stderr, "bolt: %v\n", err)
		return failed
	}
	p.write(stdout)
	paths, err := p.draw(o.folder())
	if err != nil {
		fmt.Fprintf(stderr, "bolt: the picture was not drawn: %v\n", err)
		return failed
	}
	fmt.Fprintln(stdout)
	for _, path := range paths {
		fmt.Fprintf(stdout, "picture: %s\n", relative(path))
	}
	fmt.Fprintf(stdout, "\n%s\n", caution)
	if p.opened != nil {
		fmt.Fprintf(stderr, "bolt: %v\n", p.opened)
		return failed
	}
	return done
}

// read reads both files and holds them against each other.
func (o *options) read() (*joint, *history, error) {
	jointSource, err := open(o.joint, "bolt.json", defaultJoint)
	if err != nil {
		return nil, nil, err
	}
	historySource, err := open(o.history, "history.csv", defaultHistory)
	if err != nil {
		return nil, nil, err
	}
	j, err := readJoint(jointSource)
	if err != nil {
		return nil, nil, err
	}
	h, err := readHistory(historySource)
	if err != nil {
		return nil, nil, err
	}
	return j, h, match(j, h, historySource, jointSource.name)
}

func open(path, builtIn string, text []byte) (*source, error) {
	if path == "" {
		return newSource(relative(filepath.Join(home(), builtIn)), text), nil
	}
	text, err := os.ReadFile(path)
	if err != nil {
		return nil, fmt.Errorf("bolt: %w", err)
	}
	return newSource(path, text), nil
}

// home is the folder of the built-in example where its source is at hand, as with go run; otherwise empty.
func home() string {
	if _, file, _, ok := runtime.Caller(0); ok {
		if _, err := os.Stat(file); err == nil && filepath.IsAbs(file) {
			return filepath.Dir(file)
		}
	}
	return ""
}

// folder is where the pictures go.
func (o *options) folder() string {
	switch {
	case o.out != "":
		return o.out
	case o.joint != "":
		return filepath.Join(filepath.Dir(o.joint), "out")
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
