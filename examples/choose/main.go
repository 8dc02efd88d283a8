// Choose helps to choose a creep law: it runs the audit of package creeplaw/audit over the whole catalogue, prints a table in which
// the laws can be compared, and draws the creep curve and the rate of each.
//
// The laws of the catalogue are given invented numbers, those of one steel; the sets of package published are as published.
// Run it with -h for the flags. To add a law, add a line to one of the lists in steel.go.
package main

import (
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"strings"
	"time"
	"unicode/utf8"

	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/examples/commandline"
)

const zeroCelsius = 273.15

func main() {
	os.Exit(command(os.Args[1:], time.Now().Format("2 January 2006"), os.Stdout, os.Stderr))
}

// options are the flags.
type options struct {
	stress, celsius float64
	law, report     string
	out             string
}

func (o *options) kelvin() float64 { return o.celsius + zeroCelsius }

func parse(args []string, stdout, stderr io.Writer) (options, error) {
	var o options
	usage := commandline.Usage{Name: "choose", Help: helpText, Shows: "its flags", Inputs: ", and there are no input files"}
	err := usage.Parse(args, stdout, stderr, o.define, o.check)
	return o, err
}

func (o *options) define(set *flag.FlagSet) {
	set.Float64Var(&o.stress, "stress", 130, "stress in `MPa` of the creep curves of the invented steel, 1 to 1000")
	set.Float64Var(&o.celsius, "temperature", 600, "its temperature in `°C`, 300 to 900")
	set.StringVar(&o.law, "law", "", "only laws with this `text` in their name or family")
	set.StringVar(&o.report, "report", "", "write the full text of every audit to this `file`; - for the standard output")
	set.StringVar(&o.out, "out", "", "`folder` for the pictures; out beside the source of the example if empty")
}

func (o *options) check() error {
	switch {
	case !(o.stress >= 1 && o.stress <= 1000):
		return fmt.Errorf("-stress is %v, must be between 1 and 1000 MPa", o.stress)
	case !(o.celsius >= 300 && o.celsius <= 900):
		return fmt.Errorf("-temperature is %v, must be between 300 and 900 °C", o.celsius)
	}
	return nil
}

// command is the program but for its exit and its date.
func command(args []string, date string, stdout, stderr io.Writer) int {
	o, err := parse(args, stdout, stderr)
	if err != nil {
		return commandline.Status(err)
	}
	s, err := newStudy(o)
	if err != nil {
		return commandline.Fail(stderr, "choose: %v", err)
	}
	fmt.Fprintf(stdout, "Creep laws compared by their audits, %s\n", date)
	s.writeTable(stdout)
	s.writeFaults(stdout)
	if err := s.writeReports(stdout, date); err != nil {
		return commandline.Fail(stderr, "choose: the report was not written: %v", err)
	}
	paths, err := s.draw(commandline.OutputFolder(o.out, "", commandline.SourceFolder()))
	if err != nil {
		return commandline.Fail(stderr, "choose: the picture was not drawn: %v", err)
	}
	commandline.End(stdout, "picture", paths, caution)
	return commandline.Done
}

// writeFaults says in a sentence each what makes a law faulty.
func (s *study) writeFaults(w io.Writer) {
	fmt.Fprintln(w, "\nFAULTS")
	none := true
	for i := range s.rows {
		for _, f := range s.rows[i].report.Findings {
			if f.Severity == audit.Fault {
				fmt.Fprintln(w, wrapped(fmt.Sprintf("%s: %v. %s", s.rows[i].name, f.Kind, f.Sentence)))
				none = false
			}
		}
	}
	if none {
		fmt.Fprintln(w, "none")
	}
}

// wrapped breaks a text into lines of the table's width, the later ones set in.
func wrapped(text string) string {
	const most = 130
	var b strings.Builder
	length := 0
	for i, word := range strings.Fields(text) {
		n := utf8.RuneCountInString(word)
		switch {
		case i == 0:
		case length+1+n > most:
			b.WriteString("\n  ")
			length = 2
		default:
			b.WriteString(" ")
			length++
		}
		b.WriteString(word)
		length += n
	}
	return b.String()
}

// writeReports writes the audits in full, if they were asked for.
func (s *study) writeReports(stdout io.Writer, date string) (err error) {
	if s.report == "" {
		return nil
	}
	w := stdout
	if s.report != "-" {
		file, err := os.Create(s.report)
		if err != nil {
			return err
		}
		defer func() { err = errors.Join(err, file.Close()) }()
		w = file
	}
	for i := range s.rows {
		if _, err := fmt.Fprintf(w, "\n%s\n", rule); err != nil {
			return err
		}
		if err := s.rows[i].report.Write(w, date); err != nil {
			return err
		}
	}
	if s.report != "-" {
		fmt.Fprintf(stdout, "\nreport: %s\n", s.report)
	}
	return nil
}
