package lawcard

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
)

// reading turns nodes into what they stand for. It keeps the first fault; after that everything it returns is empty, so that
// callers need look at err only before they build something.
type reading struct {
	text  string
	kinds kinds
	err   *CardError
}

// value is a node and the path to it.
type value struct {
	*node
	path string
}

func (r *reading) fail(v value, kind Fault, format string, a ...any) {
	r.failWith(nil, v, kind, format, a...)
}

func (r *reading) failWith(err error, v value, kind Fault, format string, a ...any) {
	if r.err != nil {
		return
	}
	line, column := place(r.text, v.offset)
	r.err = &CardError{v.path, line, column, kind, fmt.Sprintf(format, a...), err}
}

// is tells whether a value has the shape wanted, and fails if not.
func (r *reading) is(v value, want shape) bool {
	if r.err != nil {
		return false
	}
	if v.shape != want {
		r.fail(v, WrongType, "is %v, must be %v", v.shape, want)
		return false
	}
	return true
}

// fields checks that a value is an object with just the members named; what is optional may be left out.
func (r *reading) fields(v value, required []string, optional ...string) map[string]value {
	if !r.is(v, object) {
		return nil
	}
	allowed := slices.Concat(required, optional)
	found := map[string]value{}
	for _, m := range v.members {
		here := value{m.value, under(v.path, m.name)}
		if !slices.Contains(allowed, m.name) {
			name := here
			name.node = &node{offset: m.offset}
			r.fail(name, Unknown, "is not known here; known are %s", listed(allowed))
			return nil
		}
		found[m.name] = here
	}
	for _, name := range required {
		if _, ok := found[name]; !ok {
			r.fail(v, Missing, "has no %q", name)
			return nil
		}
	}
	return found
}

// member returns one member of an object whatever its others, as a kind is read before the rest is known.
func (r *reading) member(v value, name string) value {
	if !r.is(v, object) {
		return value{}
	}
	for _, m := range v.members {
		if m.name == name {
			return value{m.value, under(v.path, name)}
		}
	}
	r.fail(v, Missing, "has no %q", name)
	return value{}
}

func (r *reading) items(v value, atLeast int) []value {
	if !r.is(v, array) {
		return nil
	}
	if len(v.items) < atLeast {
		r.fail(v, Missing, "has too few entries: %d, must be at least %d", len(v.items), atLeast)
		return nil
	}
	all := make([]value, len(v.items))
	for i, n := range v.items {
		all[i] = value{n, under(v.path, strconv.Itoa(i))}
	}
	return all
}

// word is a text that must not be blank.
func (r *reading) word(v value) string {
	if !r.is(v, text) {
		return ""
	}
	if strings.TrimSpace(v.text) == "" {
		r.fail(v, BadText, "is empty; it must say something")
	}
	return v.text
}

// choice is a text out of a few.
func (r *reading) choice(v value, from ...string) int {
	if !r.is(v, text) {
		return 0
	}
	i := slices.Index(from, v.text)
	if i < 0 {
		r.fail(v, Unknown, "is %s, must be one of %s", quoted(v.text), listed(from))
		return 0
	}
	return i
}

// number is a number in the range of a float64.
func (r *reading) number(v value) float64 {
	if !r.is(v, number) {
		return 0
	}
	x, err := strconv.ParseFloat(v.text, 64)
	switch {
	case err != nil || math.IsInf(x, 0):
		r.fail(v, BadNumber, "is %s, beyond the range of a float64", quoted(v.text))
	case x == 0 && strings.ContainsAny(mantissa(v.text), "123456789"):
		r.fail(v, BadNumber, "is %s, so small that a float64 makes it zero", quoted(v.text))
	}
	return x
}

func mantissa(s string) string {
	if i := strings.IndexAny(s, "eE"); i >= 0 {
		return s[:i]
	}
	return s
}
