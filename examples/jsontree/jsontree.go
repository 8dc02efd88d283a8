// Package jsontree reads JSON strictly and remembers where every value stands: no field twice, nothing after the end, and every
// fault with line and column.
package jsontree

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"

	"example.com/holdtime/examples/position"
)

// Kind is what a JSON value is; its text is used in messages.
type Kind string

// Kinds of values.
const (
	Object  Kind = "an object {…}"
	List    Kind = "a list […]"
	Number  Kind = "a number"
	Text    Kind = "a text"
	Boolean Kind = "true or false"
	Null    Kind = "null"
)

// Node is one JSON value that remembers where it stands, so that a nonsensical number can be pointed at long after it was
// read.
type Node struct {
	Offset int // in the text of the source
	Kind   Kind
	Text   string  // a text, or the digits of a number
	Fields []Field // of an object, in the order of the file
	Items  []*Node // of a list
}

// Field is one name and value of an object.
type Field struct {
	Name   string
	Offset int // of the name
	Value  *Node
}

// deepest nesting that is followed; an input file needs about six.
const deepest = 50

// Read reads one JSON value and nothing after it. Its faults are of type *position.Error.
func Read(src *position.Source) (*Node, error) {
	r := treeReader{src: src, decoder: json.NewDecoder(bytes.NewReader(src.Text))}
	r.decoder.UseNumber()
	root, err := r.value(0)
	if err != nil {
		return nil, err
	}
	if start := r.blanks(int(r.decoder.InputOffset())); start < len(src.Text) {
		return nil, src.Fault(start, "there is something after the end of the JSON object")
	}
	return root, nil
}

type treeReader struct {
	src     *position.Source
	decoder *json.Decoder
}

// start is the offset at which the next token begins: after blanks and at most one separator, which the decoder passes in
// silence where it is allowed.
func (r *treeReader) start() int {
	i := r.blanks(int(r.decoder.InputOffset()))
	if i < len(r.src.Text) && (r.src.Text[i] == ',' || r.src.Text[i] == ':') {
		return r.blanks(i + 1)
	}
	return i
}

func (r *treeReader) blanks(i int) int {
	for i < len(r.src.Text) && bytes.IndexByte([]byte(" \t\r\n"), r.src.Text[i]) >= 0 {
		i++
	}
	return i
}

// next returns the next token and where it begins.
func (r *treeReader) next() (json.Token, int, error) {
	start := r.start()
	token, err := r.decoder.Token()
	var syntax *json.SyntaxError
	switch {
	case err == nil:
		return token, start, nil
	case errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF):
		if start < len(r.src.Text) && r.src.Text[start] == '"' {
			return nil, start, r.src.Fault(start, "this text has no closing quotation mark")
		}
		return nil, start, r.src.Fault(len(r.src.Text), "the file ends too early: a closing bracket or a value is missing")
	case errors.As(err, &syntax):
		return nil, start, r.src.Fault(start, "not JSON: %v", syntax)
	}
	return nil, start, r.src.Fault(start, "not JSON: %v", err)
}

func (r *treeReader) value(depth int) (*Node, error) {
	token, start, err := r.next()
	if err != nil {
		return nil, err
	}
	if depth > deepest {
		return nil, r.src.Fault(start, "nested more than %d levels deep", deepest)
	}
	n := &Node{Offset: start}
	switch t := token.(type) {
	case json.Delim:
		if t == '{' {
			n.Kind = Object
			return n, r.object(n, depth)
		}
		if t == '[' {
			n.Kind = List
			return n, r.array(n, depth)
		}
		return nil, r.src.Fault(start, "%q closes nothing here", t.String())
	case json.Number:
		n.Kind, n.Text = Number, t.String()
	case string:
		n.Kind, n.Text = Text, t
	case bool:
		n.Kind = Boolean
	default:
		n.Kind = Null
	}
	return n, nil
}

func (r *treeReader) object(n *Node, depth int) error {
	seen := map[string]bool{}
	for {
		if !r.decoder.More() {
			_, _, err := r.next() // the closing bracket, or what stands in its place
			return err
		}
		token, start, err := r.next()
		if err != nil {
			return err
		}
		name, ok := token.(string)
		if !ok {
			return r.src.Fault(start, "the name of a field must be a text in quotation marks")
		}
		if seen[name] {
			return r.src.Fault(start, "the field %q is given twice", name)
		}
		seen[name] = true
		value, err := r.value(depth + 1)
		if err != nil {
			return err
		}
		n.Fields = append(n.Fields, Field{name, start, value})
	}
}

func (r *treeReader) array(n *Node, depth int) error {
	for {
		if !r.decoder.More() {
			_, _, err := r.next()
			return err
		}
		item, err := r.value(depth + 1)
		if err != nil {
			return err
		}
		n.Items = append(n.Items, item)
	}
}
