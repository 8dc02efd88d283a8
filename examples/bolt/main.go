// Bolt follows the clamp load of a bolted flange joint at temperature through its service: the bolts creep, flange and gasket
// spring back, temperatures come and go, and now and then somebody retightens. The data it comes with are invented.
//
// Run it with -h for the input files. It is an example of a host of package integrate: see balance.go for the global Newton
// iteration on the library's tangent, and double.go for steps of controlled error.
package main

import (
	_ "embed"
	"flag"
	"fmt"
	"io"
	"os"
	"path/filepath"

	"example.com/holdtime/examples/commandline"
	"example.com/holdtime/examples/position"
)

//go:embed bolt.json
var defaultJoint []byte

//go:embed history.csv
var defaultHistory []byte

func main() { os.Exit(command(os.Args[1:], os.Stdout, os.Stderr)) }

// options are the flags.
type options struct {
	joint, history, out string
	settings
}

func parse(args []string, stdout, stderr io.Writer) (options, error) {
	o := options{settings: settings{only: -1}}
	usage := commandline.Usage{Name: "bolt", Help: helpText, Shows: "its flags and files",
		Inputs: "; input files are given with -joint and -history"}
	err := usage.Parse(args, stdout, stderr, o.define, o.check)
	return o, err
}

func (o *options) define(set *flag.FlagSet) {
	set.StringVar(&o.joint, "joint", "", "joint `file` (JSON); the built-in example if empty")
	set.StringVar(&o.history, "history", "", "service history `file` (CSV); the built-in example if empty")
	set.StringVar(&o.out, "out", "", "`folder` for bolt.png and bolt.svg; \"out\" beside the joint file if empty")
	set.Float64Var(&o.every, "every", 2000, "`hours` between lines of the table besides the rows of the history; 0 for none")
	set.Float64Var(&o.tolerance, "tolerance", 1e-4, "error estimate allowed in a time step, as a `share` of the preload")
}

func (o *options) check() error {
	switch {
	case !(o.tolerance >= 1e-8 && o.tolerance <= 0.1):
		return fmt.Errorf("-tolerance is %v, must be between 1e-8 and 0.1", o.tolerance)
	case !(o.every == 0 || o.every >= 1 && o.every <= latest):
		return fmt.Errorf("-every is %v, must be 0 or between 1 and %v", o.every, latest)
	}
	return nil
}

// mostLines of a table that anybody would read.
const mostLines = 10000

// command is the program but for its exit.
func command(args []string, stdout, stderr io.Writer) int {
	o, err := parse(args, stdout, stderr)
	if err != nil {
		return commandline.Status(err)
	}
	j, h, err := o.read()
	if err != nil {
		fmt.Fprintln(stderr, err)
		return commandline.Refused
	}
	if lines := (h.end() - h.start()) / o.every; o.every > 0 && lines > mostLines {
		fmt.Fprintf(stderr, "bolt: -every %v makes more than %d lines; choose longer hours\n", o.every, mostLines)
		return commandline.Refused
	}
	p, err := newReport(j, h, o.settings)
	if err != nil {
		return commandline.Fail(stderr, "bolt: %v", err)
	}
	p.write(stdout)
	paths, err := p.draw(commandline.OutputFolder(o.out, o.joint, commandline.SourceFolder()))
	if err != nil {
		return commandline.Fail(stderr, "bolt: the picture was not drawn: %v", err)
	}
	commandline.End(stdout, "picture", paths, caution)
	if p.opened != nil {
		return commandline.Fail(stderr, "bolt: %v", p.opened)
	}
	return commandline.Done
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
	return j, h, match(j, h, historySource, jointSource.Name)
}

func open(path, builtIn string, text []byte) (*position.Source, error) {
	if path == "" {
		return position.NewSource(commandline.Relative(filepath.Join(commandline.SourceFolder(), builtIn)), text), nil
	}
	text, err := os.ReadFile(path)
	if err != nil {
		return nil, fmt.Errorf("bolt: %w", err)
	}
	return position.NewSource(path, text), nil
}
