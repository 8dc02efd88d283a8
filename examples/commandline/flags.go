// Package commandline is what the commands of the examples have in common: exit statuses, flags, and the folders their files go to.
package commandline

import (
	"errors"
	"flag"
	"fmt"
	"io"
)

// Exit statuses.
const (
	Done    = 0
	Failed  = 1
	Refused = 2 // flags or input files
)

// Usage is what a command says of itself.
type Usage struct {
	Name   string
	Help   string // what -h prints above the flags
	Shows  string // what -h shows, such as "its flags"
	Inputs string // continues the sentence that a word is not a flag: where input files are given, or that there are none
}

// Parse sets the flags that define declares and then calls check. A mistake is told on stderr; -h prints the help on stdout and
// returns flag.ErrHelp.
func (u Usage) Parse(args []string, stdout, stderr io.Writer, define func(*flag.FlagSet), check func() error) error {
	set := flag.NewFlagSet(u.Name, flag.ContinueOnError)
	set.SetOutput(stderr)
	set.Usage = func() {} // a mistyped flag is told in one line
	define(set)
	err := set.Parse(args)
	switch {
	case errors.Is(err, flag.ErrHelp):
		fmt.Fprint(stdout, u.Help)
		set.SetOutput(stdout)
		set.PrintDefaults()
		return err
	case err != nil:
		err = fmt.Errorf("run it with -h for %s", u.Shows) // the flag itself has been named
	case set.NArg() > 0:
		err = fmt.Errorf("%q is not a flag%s", set.Arg(0), u.Inputs)
	default:
		err = check()
	}
	if err != nil {
		fmt.Fprintf(stderr, "%s: %v\n", u.Name, err)
	}
	return err
}

// Status is the exit status for what Parse returned: Done after the help, otherwise Refused.
func Status(err error) int {
	if err == nil || errors.Is(err, flag.ErrHelp) {
		return Done
	}
	return Refused
}

// Fail prints a line and returns Failed.
func Fail(stderr io.Writer, format string, args ...any) int {
	fmt.Fprintf(stderr, format+"\n", args...)
	return Failed
}

// End prints the files that were written, each after its kind, and the caution.
func End(w io.Writer, kind string, paths []string, caution string) {
	fmt.Fprintln(w)
	for _, path := range paths {
		fmt.Fprintf(w, "%s: %s\n", kind, Relative(path))
	}
	fmt.Fprintf(w, "\n%s\n", caution)
}
