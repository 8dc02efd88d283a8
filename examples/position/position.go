// Package position says where in an input file something is wrong, by line and column.
package position

import (
	"bytes"
	"fmt"
	"unicode/utf8"
)

// Error says what is wrong in an input file, and where.
type Error struct {
	File string
	Place
	Text string
}

// Place is a line and a column, both counted from 1; the column counts characters, a tab is one.
type Place struct{ Line, Column int }

func (e *Error) Error() string {
	return fmt.Sprintf("%s:%d:%d: %s", e.File, e.Line, e.Column, e.Text)
}

// Source is a named input text in which byte offsets can be turned into lines and columns.
type Source struct {
	Name string
	Text []byte
}

// NewSource drops the byte order mark that some editors write.
func NewSource(name string, text []byte) *Source {
	return &Source{name, bytes.TrimPrefix(text, []byte("\uFEFF"))}
}

// Fault is an Error at a byte offset.
func (s *Source) Fault(offset int, format string, args ...any) error {
	before := s.Text[:min(max(offset, 0), len(s.Text))]
	start := bytes.LastIndexByte(before, '\n') + 1
	return s.FaultAt(Place{1 + bytes.Count(before, []byte("\n")), 1 + utf8.RuneCount(before[start:])}, format, args...)
}

// FaultAt is an Error at a line and column.
func (s *Source) FaultAt(p Place, format string, args ...any) error {
	return &Error{s.Name, p, fmt.Sprintf(format, args...)}
}
