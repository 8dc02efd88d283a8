package main

import (
	"fmt"
	"io"
	"text/tabwriter"
)

// table prints the error achieved and the scalar problems solved, by tolerance and by number of equal steps.
func table(w io.Writer, lines []line) error {
	fmt.Fprintln(w, "Error achieved by the walk for the tolerance asked for, over the largest stress, with the scalar problems solved:")
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', tabwriter.AlignRight)
	part(t, lines, "tolerance", func(l *line) []run { return l.walks }, func(r run) string { return fmt.Sprintf("%.0e", r.tolerance) })
	fmt.Fprintln(t)
	part(t, lines, "equal steps", func(l *line) []run { return l.steps }, func(r run) string { return fmt.Sprint(r.solves) })
	return t.Flush()
}

// part is a row for each run, with two cells for each line; errors are kept by the writer and told when it is flushed.
func part(w io.Writer, lines []line, title string, runs func(*line) []run, name func(run) string) {
	fmt.Fprint(w, title, "\t")
	for i := range lines {
		fmt.Fprintf(w, "%s\t\t", lines[i].name)
	}
	fmt.Fprintln(w)
	for k, r := range runs(&lines[0]) {
		fmt.Fprint(w, name(r), "\t")
		for i := range lines {
			r := runs(&lines[i])[k]
			fmt.Fprintf(w, "%.1e\t%d\t", r.err, r.solves)
		}
		fmt.Fprintln(w)
	}
}
