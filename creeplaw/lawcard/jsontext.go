package lawcard

import (
	"fmt"
	"strconv"
	"strings"
	"unicode/utf16"
	"unicode/utf8"
)

// encoding/json does not tell where a value stood, takes the last of two equal names and mends bad UTF-8. A card is read
// strictly, so it has a parser of its own, for RFC 8259 to the letter.

type shape int

const (
	object shape = iota + 1
	array
	text
	number
	boolean
	null
)

func (s shape) String() string {
	return [...]string{"", "an object", "an array", "a text", "a number", "a truth value", "null"}[s]
}

// node is a JSON value and where it stands.
type node struct {
	shape   shape
	offset  int
	text    string // of a text, decoded; of a number, as it stands
	members []member
	items   []*node
}

type member struct {
	name   string
	offset int
	value  *node
}

// parser reads one JSON text.
type parser struct {
	text  string
	at    int
	depth int
}

// fault is a fault on its way to a CardError.
type fault struct {
	offset int
	path   string
	kind   Fault
	reason string
}

func (p *parser) fail(offset int, path string, kind Fault, format string, a ...any) *fault {
	return &fault{offset, path, kind, fmt.Sprintf(format, a...)}
}

// document parses the whole text.
func (p *parser) document() (*node, *fault) {
	if i := invalidUTF8(p.text); i >= 0 {
		return nil, p.fail(i, "", BadSyntax, "is not UTF-8 here")
	}
	p.space()
	n, f := p.value("")
	if f != nil {
		return nil, f
	}
	p.space()
	if p.at < len(p.text) {
		return nil, p.fail(p.at, "", TrailingData, "is followed by %s; nothing may be", p.found())
	}
	return n, nil
}

func invalidUTF8(s string) int {
	for i := 0; i < len(s); {
		r, n := utf8.DecodeRuneInString(s[i:])
		if r == utf8.RuneError && n == 1 {
			return i
		}
		i += n
	}
	return -1
}

func (p *parser) space() {
	for p.at < len(p.text) && strings.IndexByte(" \t\r\n", p.text[p.at]) >= 0 {
		p.at++
	}
}

// next is the next byte, 0 at the end.
func (p *parser) next() byte {
	if p.at < len(p.text) {
		return p.text[p.at]
	}
	return 0
}

// found describes what stands here, for a message.
func (p *parser) found() string {
	if p.at >= len(p.text) {
		return "the end of the text"
	}
	rest := p.text[p.at:]
	word := rest[:len(rest)-len(strings.TrimLeftFunc(rest, isWord))]
	if word == "" {
		_, n := utf8.DecodeRuneInString(rest)
		word = rest[:n]
	}
	return quoted(word)
}

func isWord(r rune) bool {
	return r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z' || r >= '0' && r <= '9' || strings.ContainsRune("+-._", r)
}

func (p *parser) value(path string) (*node, *fault) {
	if p.depth++; p.depth > MaxDepth {
		return nil, p.fail(p.at, path, TooLarge, "is nested deeper than %d", MaxDepth)
	}
	defer func() { p.depth-- }()
	n := &node{offset: p.at}
	switch c := p.next(); {
	case c == '{':
		return n, p.object(n, path)
	case c == '[':
		return n, p.array(n, path)
	case c == '"':
		n.shape = text
		var f *fault
		n.text, f = p.string(path)
		return n, f
	case c == '-' || c >= '0' && c <= '9':
		return n, p.number(n, path)
	}
	for _, literal := range []struct {
		text  string
		shape shape
	}{{"true", boolean}, {"false", boolean}, {"null", null}} {
		if rest, ok := strings.CutPrefix(p.text[p.at:], literal.text); ok && (rest == "" || !isWord(rune(rest[0]))) {
			n.shape, n.text = literal.shape, literal.text
			p.at += len(literal.text)
			return n, nil
		}
	}
	return nil, p.fail(p.at, path, BadSyntax, "has %s where a JSON value must be", p.found())
}

func (p *parser) object(n *node, path string) *fault {
	n.shape = object
	p.at++
	p.space()
	if p.next() == '}' {
		p.at++
		return nil
	}
	first := map[string]int{}
	for {
		m := member{offset: p.at}
		if p.next() != '"' {
			return p.fail(p.at, path, BadSyntax, "has %s where a name in quotes must be", p.found())
		}
		var f *fault
		if m.name, f = p.string(path); f != nil {
			return f
		}
		here := under(path, m.name)
		if other, twice := first[m.name]; twice {
			line, column := place(p.text, other)
			return p.fail(m.offset, here, Duplicate, "is there twice, first at %d:%d", line, column)
		}
		first[m.name] = m.offset
		p.space()
		if p.next() != ':' {
			return p.fail(p.at, here, BadSyntax, "has %s where a colon must be", p.found())
		}
		p.at++
		p.space()
		if m.value, f = p.value(here); f != nil {
			return f
		}
		n.members = append(n.members, m)
		if more, f := p.more('}', path); !more {
			return f
		}
	}
}

func (p *parser) array(n *node, path string) *fault {
	n.shape = array
	p.at++
	p.space()
	if p.next() == ']' {
		p.at++
		return nil
	}
	for {
		item, f := p.value(under(path, strconv.Itoa(len(n.items))))
		if f != nil {
			return f
		}
		n.items = append(n.items, item)
		if more, f := p.more(']', path); !more {
			return f
		}
	}
}

// more tells whether a comma follows, or the end of the object or array.
func (p *parser) more(end byte, path string) (bool, *fault) {
	p.space()
	switch p.next() {
	case end:
		p.at++
		return false, nil
	case ',':
		p.at++
		p.space()
		return true, nil
	}
	return false, p.fail(p.at, path, BadSyntax, "has %s where a comma or %q must be", p.found(), string(end))
}

// number checks the grammar; its value is for whoever wants it.
func (p *parser) number(n *node, path string) *fault {
	n.shape = number
	start := p.at
	p.at += len(p.text[p.at:]) - len(strings.TrimLeftFunc(p.text[p.at:], isWord))
	n.text = p.text[start:p.at]
	if !isNumber(n.text) {
		return p.fail(start, path, BadSyntax, "is %s, not a JSON number", quoted(n.text))
	}
	return nil
}

// isNumber is the grammar of RFC 8259, section 6.
func isNumber(s string) bool {
	s = strings.TrimPrefix(s, "-")
	digits := func() bool {
		rest := strings.TrimLeft(s, "0123456789")
		some := len(rest) < len(s)
		s = rest
		return some
	}
	if zero, ok := strings.CutPrefix(s, "0"); ok {
		s = zero
	} else if !digits() {
		return false
	}
	if fraction, ok := strings.CutPrefix(s, "."); ok {
		s = fraction
		if !digits() {
			return false
		}
	}
	if s != "" && (s[0] == 'e' || s[0] == 'E') {
		s = s[1:]
		if s != "" && (s[0] == '+' || s[0] == '-') {
			s = s[1:]
		}
		if !digits() {
			return false
		}
	}
	return s == ""
}

// string reads a text in quotes.
func (p *parser) string(path string) (string, *fault) {
	start := p.at
	p.at++
	var b strings.Builder
	for {
		switch c := p.next(); {
		case p.at >= len(p.text):
			return "", p.fail(start, path, BadSyntax, "has a text without its closing quote")
		case c < 0x20:
			return "", p.fail(p.at, path, BadSyntax, "has a control character in a text")
		case c == '"':
			p.at++
			return b.String(), nil
		case c == '\\':
			r, ok := p.escape()
			if !ok {
				return "", p.fail(p.at, path, BadSyntax, "has a bad escape in a text")
			}
			b.WriteRune(r)
		default:
			b.WriteByte(c)
			p.at++
		}
	}
}

// escape reads a backslash and what it stands for.
func (p *parser) escape() (rune, bool) {
	rest := p.text[p.at+1:]
	if rest == "" {
		return 0, false
	}
	if i := strings.IndexByte(`"\/bfnrt`, rest[0]); i >= 0 {
		p.at += 2
		return rune("\"\\/\b\f\n\r\t"[i]), true
	}
	first, ok := hex4(rest)
	if !ok {
		return 0, false
	}
	if !utf16.IsSurrogate(first) {
		p.at += 6
		return first, true
	}
	rest, ok = strings.CutPrefix(rest[5:], `\`)
	second, hex := hex4(rest)
	r := utf16.DecodeRune(first, second)
	if !ok || !hex || r == utf8.RuneError {
		return 0, false
	}
	p.at += 12
	return r, true
}

// hex4 reads "uXXXX".
func hex4(s string) (rune, bool) {
	if len(s) < 5 || s[0] != 'u' {
		return 0, false
	}
	v, err := strconv.ParseUint(s[1:5], 16, 16)
	return rune(v), err == nil
}
