package main

import (
	"bytes"
	"fmt"
	"unicode/utf8"
)

// inputError says what is wrong in an input file, and where.
type inputError struct {
	File         string
	Line, Column int // counted from 1; the column counts characters, a tab is one
	Text         string
}

func (e *inputError) Error() string {
	return fmt.Sprintf("%s:%d:%d: %s", e.File, e.Line, e.Column, e.Text)
}

// source is a named input text in which byte offsets can be turned into lines and columns.
type source struct {
	name string
	text []byte
}

// newSource drops the byte order mark that some editors write.
func newSource(name string, text []byte) *source {
	return &source{name, bytes.TrimPrefix(text, []byte("\uFEFF"))}
}

// fault is an inputError at a byte offset.
func (s *source) fault(offset int, format string, args ...any) error {
	before := s.text[:min(max(offset, 0), len(s.text))]
	start := bytes.LastIndexByte(before, '\n') + 1
	return &inputError{
		File:   s.name,
		Line:   1 + bytes.Count(before, []byte("\n")),
		Column: 1 + utf8.RuneCount(before[start:]),
		Text:   fmt.Sprintf(format, args...),
	}
}
