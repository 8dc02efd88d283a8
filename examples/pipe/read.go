package main

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"
	"strconv"
	"strings"
	"unicode/utf8"
)

// inputError says what is wrong in an input file, and where.
type inputError struct {
	File         string
	Line, Column int // counted from 1; the column counts characters
	Text         string
}

func (e *inputError) Error() string {
	return fmt.Sprintf("%s:%d:%d: %s", e.File, e.Line, e.Column, e.Text)
}

// record is one flat JSON object of texts and numbers. Each field is asked for by name; the first fault is kept and makes
// every later reading return zero, so that a file is read in straight lines and asked once at the end.
type record struct {
	file   string
	text   []byte
	fields []*field
	err    error
}

// field is one name and value.
type field struct {
	name  string
	at    int // offset of the value
	value json.Token
	asked bool
}

// readRecord splits a file into fields: a flat object and nothing after it, every name once.
func readRecord(file string, text []byte) *record {
	r := &record{file: file, text: bytes.TrimPrefix(text, []byte("\uFEFF"))}
	d := json.NewDecoder(bytes.NewReader(r.text))
	d.UseNumber()
	if open := r.next(d); r.err == nil && open.value != json.Delim('{') {
		r.fault(open.at, "the file must be an object {…}")
	}
	for r.err == nil && d.More() {
		name := r.next(d)
		word, ok := name.value.(string)
		if r.err == nil && !ok {
			r.fault(name.at, "the name of a field must be a text in quotation marks")
		}
		if r.err == nil && r.find(word) != nil {
			r.fault(name.at, "the field %q is given twice", word)
		}
		value := r.next(d)
		switch value.value.(type) {
		case string, json.Number, nil:
		default:
			r.fault(value.at, "%s must be a number or a text", word)
		}
		if value.value == nil && r.err == nil {
			r.fault(value.at, "%s must be a number or a text, not null", word)
		}
		r.fields = append(r.fields, &field{word, value.at, value.value, false})
	}
	r.next(d) // the closing bracket
	if after := bytes.TrimLeft(r.text[d.InputOffset():], " \t\r\n"); r.err == nil && len(after) > 0 {
		r.fault(len(r.text)-len(after), "there is something after the end of the object")
	}
	return r
}

// next reads one token.
func (r *record) next(d *json.Decoder) field {
	if r.err != nil {
		return field{}
	}
	at := r.start(d)
	token, err := d.Token()
	if err == io.EOF || err == io.ErrUnexpectedEOF {
		r.fault(len(r.text), "the file ends too early")
	} else if err != nil {
		r.fault(at, "not JSON: %v", err)
	}
	return field{at: at, value: token}
}

// start is where the next token begins: after blanks and a separator.
func (r *record) start(d *json.Decoder) int {
	at := int(d.InputOffset())
	for at < len(r.text) && strings.IndexByte(" \t\r\n,:", r.text[at]) >= 0 {
		at++
	}
	return at
}

// fault keeps the first inputError, at a byte offset.
func (r *record) fault(offset int, format string, args ...any) {
	if r.err != nil {
		return
	}
	before := r.text[:min(max(offset, 0), len(r.text))]
	line := bytes.LastIndexByte(before, '\n') + 1
	r.err = &inputError{r.file, 1 + bytes.Count(before, []byte("\n")), 1 + utf8.RuneCount(before[line:]), fmt.Sprintf(format, args...)}
}

func (r *record) find(name string) *field {
	for _, f := range r.fields {
		if f.name == name {
			return f
		}
	}
	return nil
}

// take finds a field that must be there.
func (r *record) take(name string) *field {
	f := r.find(name)
	if f == nil {
		r.fault(len(r.text), "the field %q is missing", name)
		return &field{}
	}
	f.asked = true
	return f
}

// title reads a text.
func (r *record) title(name string) string {
	f := r.take(name)
	s, ok := f.value.(string)
	if !ok {
		r.fault(f.at, "%s must be a text", name)
	}
	return s
}

// number reads a number between two bounds, the lower one allowed or not.
func (r *record) number(name string, low float64, lowAllowed bool, high float64) float64 {
	f := r.take(name)
	n, ok := f.value.(json.Number)
	if !ok {
		r.fault(f.at, "%s must be a number", name)
		return 0
	}
	x, err := strconv.ParseFloat(string(n), 64)
	sense := "above"
	if lowAllowed {
		sense = "at least"
	}
	if err != nil || !((x > low || lowAllowed && x == low) && x <= high) {
		r.fault(f.at, "%s is %s, must be %s %v and at most %v", name, n, sense, low, high)
		return 0
	}
	return x
}

// done returns the first fault; a field that nobody asked for is one.
func (r *record) done() error {
	for _, f := range r.fields {
		if !f.asked {
			r.fault(f.at, "there is no field %q; run pipe with -h for the fields", f.name)
		}
	}
	return r.err
}
