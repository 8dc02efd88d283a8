package lawcard

import (
	"fmt"
	"strconv"
	"strings"
	"unicode/utf8"
)

// CardError says what is wrong with a card and where. Read returns it for every fault of the text, found with errors.As; so
// does Write for what a card cannot hold, then without line and column.
type CardError struct {
	Path         string // JSON Pointer (RFC 6901) to the place, such as "/law/parameters/stress exponent"; "" is the whole card
	Line, Column int    // of the place, counted from 1, columns in characters; 0 where there is no text yet
	Fault        Fault
	Reason       string // what is wrong there
	Err          error  // what a constructor said, such as a *creeplaw.ParameterError; nil for faults of the text
}

func (e *CardError) Error() string {
	place := e.Path
	if place == "" {
		place = "the card"
	}
	if e.Line == 0 {
		return fmt.Sprintf("lawcard: %s %s", place, e.Reason)
	}
	return fmt.Sprintf("lawcard: %d:%d: %s %s", e.Line, e.Column, place, e.Reason)
}

// Unwrap returns what a constructor said.
func (e *CardError) Unwrap() error { return e.Err }

// Fault is the kind of a fault, for programs; Reason is for people.
type Fault int

// The faults a card may have.
const (
	BadSyntax          Fault = iota + 1 // not JSON (RFC 8259): NaN, comments, trailing commas, bad UTF-8, …
	TrailingData                        // something after the card
	TooLarge                            // more than MaxSize bytes, or nested deeper than MaxDepth
	Duplicate                           // a name twice in one object
	Unknown                             // a name, a kind or a choice that is not known here
	Missing                             // something that must be there
	WrongType                           // a text where a number must be, and the like
	BadNumber                           // beyond the range of a float64
	BadText                             // empty where something must be said
	BadUnit                             // a unit that is not known, or not one of that quantity
	BadParameter                        // a value that a constructor refuses
	BadRange                            // a tested range that is none
	UnsupportedVersion                  // a version of the format that this package does not know
	NotConvertible                      // cannot be put in the units asked for
	Unwritable                          // a law that no kind describes, as a user's function
)

// String names the fault.
func (f Fault) String() string {
	names := [...]string{"", "bad syntax", "trailing data", "too large", "duplicate", "unknown", "missing", "wrong type",
		"bad number", "bad text", "bad unit", "bad parameter", "bad range", "unsupported version", "not convertible", "unwritable"}
	if f < 1 || int(f) >= len(names) {
		return "fault " + strconv.Itoa(int(f))
	}
	return names[f]
}

// KindError says that a kind handed in with Kinds cannot be used.
type KindError struct{ Kind, Reason string }

func (e *KindError) Error() string { return fmt.Sprintf("lawcard: kind %q %s", e.Kind, e.Reason) }

// place is line and column of an offset.
func place(text string, offset int) (line, column int) {
	before := text[:offset]
	start := strings.LastIndexByte(before, '\n') + 1
	return strings.Count(before, "\n") + 1, utf8.RuneCountInString(before[start:]) + 1
}

// under is the JSON Pointer to a member.
func under(path, name string) string {
	return path + "/" + strings.NewReplacer("~", "~0", "/", "~1").Replace(name)
}

// quoted is a name or text for a message, cut when it is long.
func quoted(s string) string {
	const most = 60
	if utf8.RuneCountInString(s) > most {
		s = string([]rune(s)[:most]) + "…"
	}
	return strconv.Quote(s)
}

// listed joins names for a message.
func listed(names []string) string {
	q := make([]string, len(names))
	for i, n := range names {
		q[i] = strconv.Quote(n)
	}
	return strings.Join(q, ", ")
}
