package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
)

// kind is what a JSON value is; its text is used in messages.
type kind string

const (
	isObject  kind = "an object {…}"
	isArray   kind = "a list […]"
	isNumber  kind = "a number"
	isText    kind = "a text"
	isBoolean kind = "true or false"
	isNull    kind = "null"
)

// node is one JSON value that remembers where it stands, so that a nonsensical number can be pointed at long after it was
// read.
type node struct {
	offset int
	kind   kind
	text   string  // a text, or the digits of a number
	fields []field // of an object, in the order of the file
	items  []*node // of a list
}

// field is one name and value of an object.
type field struct {
	name   string
	offset int
	value  *node
}

// deepest nesting that is followed; a joint file needs about six.
const deepest = 50

// tree reads one JSON value and nothing after it.
func tree(src *source) (*node, error) {
	r := treeReader{src: src, decoder: json.NewDecoder(bytes.NewReader(src.text))}
	r.decoder.UseNumber()
	root, err := r.value(0)
	if err != nil {
		return nil, err
	}
	if start := r.start(); start < len(src.text) {
		return nil, src.fault(start, "there is something after the end of the JSON object")
	}
	return root, nil
}

type treeReader struct {
	src     *source
	decoder *json.Decoder
}

// start is the offset at which the next token begins: after blanks and at most one separator, which the decoder passes in
// silence where it is allowed.
func (r *treeReader) start() int {
	i := r.blanks(int(r.decoder.InputOffset()))
	if i < len(r.src.text) && (r.src.text[i] == ',' || r.src.text[i] == ':') {
		return r.blanks(i + 1)
	}
	return i
}

func (r *treeReader) blanks(i int) int {
	for i < len(r.src.text) && bytes.IndexByte([]byte(" \t\r\n"), r.src.text[i]) >= 0 {
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
		if start < len(r.src.text) && r.src.text[start] == '"' {
			return nil, start, r.src.fault(start, "this text has no closing quotation mark")
		}
		return nil, start, r.src.fault(len(r.src.text), "the file ends too early: a closing bracket or a value is missing")
	case errors.As(err, &syntax):
		return nil, start, r.src.fault(start, "not JSON: %v", syntax)
	}
	return nil, start, r.src.fault(start, "not JSON: %v", err)
}

func (r *treeReader) value(depth int) (*node, error) {
	token, start, err := r.next()
	if err != nil {
		return nil, err
	}
	if depth > deepest {
		return nil, r.src.fault(start, "nested more than %d levels deep", deepest)
	}
	n := &node{offset: start}
	switch t := token.(type) {
	case json.Delim:
		if t == '{' {
			n.kind = isObject
			return n, r.object(n, depth)
		}
		if t == '[' {
			n.kind = isArray
			return n, r.array(n, depth)
		}
		return nil, r.src.fault(start, "%q closes nothing here", t.String())
	case json.Number:
		n.kind, n.text = isNumber, t.String()
	case string:
		n.kind, n.text = isText, t
	case bool:
		n.kind = isBoolean
	default:
		n.kind = isNull
	}
	return n, nil
}

func (r *treeReader) object(n *node, depth int) error {
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
			return r.src.fault(start, "the name of a field must be a text in quotation marks")
		}
		if seen[name] {
			return r.src.fault(start, "the field %q is given twice", name)
		}
		seen[name] = true
		value, err := r.value(depth + 1)
		if err != nil {
			return err
		}
		n.fields = append(n.fields, field{name, start, value})
	}
}

func (r *treeReader) array(n *node, depth int) error {
	for {
		if !r.decoder.More() {
			_, _, err := r.next()
			return err
		}
		item, err := r.value(depth + 1)
		if err != nil {
			return err
		}
		n.items = append(n.items, item)
	}
}
