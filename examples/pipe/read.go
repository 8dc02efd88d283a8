package main

import (
	"bytes"
	"strconv"

	"example.com/holdtime/examples/jsontree"
	"example.com/holdtime/examples/position"
)

// record is one flat JSON object of texts and numbers. Each field is asked for by name; the first fault is kept and makes every
// later one go unheard, so that a file is read in straight lines and asked once at the end.
type record struct {
	src    *position.Source
	fields []jsontree.Field
	asked  map[string]bool
	err    error
}

// readRecord splits a file into fields.
func readRecord(file string, text []byte) *record {
	r := &record{src: position.NewSource(file, text), asked: map[string]bool{}}
	if start := bytes.TrimLeft(r.src.Text, " \t\r\n"); bytes.HasPrefix(start, []byte("[")) { // whatever is in it
		r.fault(len(r.src.Text)-len(start), "the file must be an object {…}")
		return r
	}
	root, err := jsontree.Read(r.src)
	if err != nil {
		r.err = err
		return r
	}
	if root.Kind != jsontree.Object {
		r.fault(root.Offset, "the file must be an object {…}")
	}
	for _, f := range root.Fields {
		switch f.Value.Kind {
		case jsontree.Number, jsontree.Text:
		default:
			r.fault(f.Value.Offset, "%s must be a number or a text, not %s", f.Name, f.Value.Kind)
		}
	}
	r.fields = root.Fields
	return r
}

// fault keeps the first fault, at a byte offset.
func (r *record) fault(offset int, format string, args ...any) {
	if r.err == nil {
		r.err = r.src.Fault(offset, format, args...)
	}
}

// take finds the value of a field that must be there.
func (r *record) take(name string) *jsontree.Node {
	r.asked[name] = true
	for _, f := range r.fields {
		if f.Name == name {
			return f.Value
		}
	}
	r.fault(len(r.src.Text), "the field %q is missing", name)
	return &jsontree.Node{}
}

// title reads a text.
func (r *record) title(name string) string {
	n := r.take(name)
	if n.Kind != jsontree.Text {
		r.fault(n.Offset, "%s must be a text", name)
	}
	return n.Text
}

// number reads a number between two bounds, the lower one allowed or not.
func (r *record) number(name string, low float64, lowAllowed bool, high float64) float64 {
	n := r.take(name)
	if n.Kind != jsontree.Number {
		r.fault(n.Offset, "%s must be a number", name)
		return 0
	}
	x, err := strconv.ParseFloat(n.Text, 64)
	sense := "above"
	if lowAllowed {
		sense = "at least"
	}
	if err != nil || !((x > low || lowAllowed && x == low) && x <= high) {
		r.fault(n.Offset, "%s is %s, must be %s %v and at most %v", name, n.Text, sense, low, high)
		return 0
	}
	return x
}

// done returns the first fault; a field that nobody asked for is one.
func (r *record) done() error {
	for _, f := range r.fields {
		if !r.asked[f.Name] {
			r.fault(f.Value.Offset, "there is no field %q; run pipe with -h for the fields", f.Name)
		}
	}
	return r.err
}
