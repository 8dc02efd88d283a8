// Package checklist holds numbers against limits and prints the list.
package checklist

import (
	"fmt"
	"io"
	"unicode/utf8"
)

// Check is a number held against its limit.
type Check struct {
	Name         string
	Value, Limit float64
	AtLeast      bool // the value must not be below the limit; otherwise not above it
}

// Passed reports whether the number keeps its limit; no number never does.
func (c Check) Passed() bool {
	if c.AtLeast {
		return c.Value >= c.Limit
	}
	return c.Value <= c.Limit
}

// List is checks in the order in which they were added.
type List []Check

// AtMost adds a number that must not be above its limit.
func (l *List) AtMost(name string, value, limit float64) {
	*l = append(*l, Check{Name: name, Value: value, Limit: limit})
}

// AtLeast adds a number that must not be below its limit.
func (l *List) AtLeast(name string, value, limit float64) {
	*l = append(*l, Check{Name: name, Value: value, Limit: limit, AtLeast: true})
}

// Passed reports whether every number keeps its limit.
func (l List) Passed() bool {
	for _, c := range l {
		if !c.Passed() {
			return false
		}
	}
	return true
}

// Write prints a line for each check: verdict, name, value, limit.
func (l List) Write(w io.Writer) {
	width := 0
	for _, c := range l {
		width = max(width, utf8.RuneCountInString(c.Name))
	}
	fmt.Fprintf(w, "\n%-*s   value     limit\n", width+len("   pass  "), "WHAT WAS CHECKED")
	for _, c := range l {
		verdict, sense := "pass", "≤"
		if !c.Passed() {
			verdict = "FAIL"
		}
		if c.AtLeast {
			sense = "≥"
		}
		fmt.Fprintf(w, "   %s  %-*s   %-9.2g %s %g\n", verdict, width, c.Name, c.Value, sense, c.Limit)
	}
}
