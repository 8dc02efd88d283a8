package lawcard

import (
	"bytes"
	_ "embed"
	"io"
	"math"
	"strings"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/published"
)

// Card is a law and what must be known to use it.
type Card struct {
	Name    string         // of the material and the law
	Source  string         // where the numbers come from: publication, report, fit
	Status  string         // how far they may be trusted, such as "invented", "fitted to tests", "from memory, confidence high"
	Caution string         // what to know before use; may be empty
	Units   creeplaw.Units // of stress and time in Law and Tested; temperatures are in K
	Tested  Range          // where the tests were made
	Law     creeplaw.Law
}

// Limits of a card as a text.
const (
	Version  = 1       // of the format, which cards state
	MaxSize  = 1 << 20 // bytes
	MaxDepth = 100     // objects and arrays inside one another
)

const format = "holdtime law card"

//go:embed schema.json
var schema string

// Schema returns the JSON Schema (draft 2020-12) of the format. It holds the structure and the bounds of single numbers; what
// depends on two numbers, and what a constructor refuses, is for Read to find.
func Schema() string { return schema }

// Read reads a card and puts its law and tested range into the units wanted. The zero Units leave them as the card declares
// them. Parameters are converted one by one (a prefactor scales with its stress exponent) and rounded once each; where that
// would leave the range of a float64 the law is put in a form about a stress of one unit of the card, or kept in the card's
// units behind creeplaw.InUnits.
//
// Every fault of the text is a *CardError and no card is returned. What the reader r returns as an error comes back as it is.
func Read(r io.Reader, wanted creeplaw.Units) (Card, error) { return Kinds(nil).Read(r, wanted) }

// Read is the function Read with further kinds of law. Kinds that clash with those of this package are a *KindError.
func (k Kinds) Read(r io.Reader, wanted creeplaw.Units) (Card, error) {
	all, err := known(k)
	if err != nil {
		return Card{}, err
	}
	if wanted != (creeplaw.Units{}) && !usable(wanted) {
		return Card{}, &creeplaw.ParameterError{Law: "law card", Parameter: "unit wanted", Value: badUnit(wanted),
			Want: "positive and finite"}
	}
	raw, err := io.ReadAll(io.LimitReader(r, MaxSize+1))
	if err != nil {
		return Card{}, err
	}
	if len(raw) > MaxSize {
		return Card{}, &CardError{Line: 1, Column: 1, Fault: TooLarge, Reason: "has more than 1048576 bytes"}
	}
	read := reading{text: string(raw), kinds: all}
	p := parser{text: read.text}
	n, f := p.document()
	if f != nil {
		line, column := place(read.text, f.offset)
		return Card{}, &CardError{f.path, line, column, f.kind, f.reason, nil}
	}
	card := read.card(value{n, ""}, wanted)
	if read.err != nil {
		return Card{}, read.err
	}
	return card, nil
}

func usable(u creeplaw.Units) bool {
	return u.Stress > 0 && u.Time > 0 && finite(float64(u.Stress)) && finite(float64(u.Time))
}

func badUnit(u creeplaw.Units) float64 {
	if s := float64(u.Stress); !(s > 0 && finite(s)) {
		return s
	}
	return float64(u.Time)
}

func (r *reading) card(v value, wanted creeplaw.Units) (c Card) {
	if r.choice(r.member(v, "format"), format); r.err != nil {
		return c
	}
	version := r.member(v, "version")
	if x := r.number(version); r.err == nil && x != Version {
		r.fail(version, UnsupportedVersion, "is %s; supported is version %d only", quoted(version.text), Version)
	}
	f := r.fields(v, []string{"format", "version", "name", "source", "status", "units", "tested range", "law"}, "caution")
	if r.err != nil {
		return c
	}
	c.Name, c.Source, c.Status = r.word(f["name"]), r.word(f["source"]), r.word(f["status"])
	if caution, ok := f["caution"]; ok {
		c.Caution = r.word(caution)
	}
	to := conversion{from: r.unitsOf(f["units"], "stress", "time", "temperature"), to: wanted}
	if wanted == (creeplaw.Units{}) {
		to.to = to.from.Units
	}
	c.Units = to.to
	c.Tested = r.tested(f["tested range"], to)
	c.Law = r.law(f["law"], to)
	return c
}

func (r *reading) tested(v value, c conversion) (tested Range) {
	f := r.fields(v, []string{"basis"}, "stress", "strain", "temperature", "time")
	tested.Basis = r.word(f["basis"])
	for _, one := range []struct {
		name string
		into *Interval
		dim  creeplaw.Dimension
	}{
		{"stress", &tested.Stress, creeplaw.Dimension{Stress: 1}},
		{"strain", &tested.Strain, creeplaw.Dimension{}},
		{"temperature", &tested.Temperature, creeplaw.Dimension{}},
		{"time", &tested.Time, creeplaw.Dimension{Time: 1}},
	} {
		at, ok := f[one.name]
		if !ok || r.err != nil {
			continue
		}
		ends := r.items(at, 2)
		if r.err == nil && len(ends) != 2 {
			r.fail(at, BadRange, "has %d entries, must be a lowest and a highest value", len(ends))
		}
		if r.err != nil {
			return tested
		}
		var low, high float64
		if one.name == "temperature" {
			low, high = r.temperature(ends[0], c), r.temperature(ends[1], c)
		} else {
			low, _ = c.quantity(r.number(ends[0]), one.dim)
			high, _ = c.quantity(r.number(ends[1]), one.dim)
		}
		if r.err == nil && !(low >= 0 && high >= low && high > 0 && finite(high)) {
			r.fail(at, BadRange, "is from %s to %s, must ascend from zero or more", ends[0].text, ends[1].text)
		}
		*one.into = Interval{low, high}
	}
	return tested
}

// Write writes a card in its own units, temperatures in K, every number with the digits that give it back to the bit. A law
// that no kind describes, as a user's function, and a card without name, source, status, units or basis is a *CardError, and
// nothing is written.
func Write(w io.Writer, c Card) error { return Kinds(nil).Write(w, c) }

// Write is the function Write with further kinds of law.
func (k Kinds) Write(w io.Writer, c Card) error {
	text, err := k.text(c)
	if err != nil {
		return err
	}
	_, err = io.WriteString(w, text)
	return err
}

func (k Kinds) text(c Card) (string, error) {
	all, err := known(k)
	if err != nil {
		return "", err
	}
	out := writing{kinds: all}
	m := out.card(c)
	if out.err != nil {
		return "", out.err
	}
	var b strings.Builder
	jsonText(&b, m, "")
	b.WriteByte('\n')
	return b.String(), nil
}

func (w *writing) card(c Card) members {
	if !usable(c.Units) {
		return w.fail("/units", BadUnit, "are %v, must be positive and finite", c.Units)
	}
	m := members{{"format", format}, {"version", float64(Version)}}
	for _, one := range []struct{ name, text string }{
		{"name", c.Name}, {"source", c.Source}, {"status", c.Status}, {"caution", c.Caution},
	} {
		if one.name == "caution" && one.text == "" {
			continue
		}
		m = append(m, named{one.name, w.word(one.text, "/"+one.name)})
	}
	return append(m,
		named{"units", members{{"stress", c.Units.Stress.String()}, {"time", c.Units.Time.String()}, {"temperature", "K"}}},
		named{"tested range", w.tested(c.Tested)},
		named{"law", w.law(c.Law, "/law", c.Units)})
}

// word is a text that must say something, in UTF-8.
func (w *writing) word(s, path string) string {
	if strings.TrimSpace(s) == "" {
		w.fail(path, BadText, "is empty; it must say something")
	}
	if invalidUTF8(s) >= 0 {
		w.fail(path, BadText, "is not UTF-8")
	}
	return s
}

func (w *writing) tested(r Range) members {
	const path = "/tested range"
	var m members
	for _, one := range []struct {
		name string
		i    Interval
	}{{"stress", r.Stress}, {"strain", r.Strain}, {"temperature", r.Temperature}, {"time", r.Time}} {
		if one.i == (Interval{}) {
			continue
		}
		if !(one.i.Low >= 0 && one.i.High >= one.i.Low && one.i.High > 0) || math.IsInf(one.i.High, 1) {
			w.fail(under(path, one.name), BadRange, "is from %v to %v, must ascend from zero or more", one.i.Low, one.i.High)
		}
		m = append(m, named{one.name, short{one.i.Low, one.i.High}})
	}
	return append(m, named{"basis", w.word(r.Basis, path+"/basis")})
}

// In returns the card in other units: what Read makes of it when they are wanted. Errors are those of Write.
func (c Card) In(wanted creeplaw.Units) (Card, error) { return Kinds(nil).In(c, wanted) }

// In is the method In of Card with further kinds of law.
func (k Kinds) In(c Card, wanted creeplaw.Units) (Card, error) {
	text, err := k.text(c)
	if err != nil {
		return Card{}, err
	}
	return k.Read(bytes.NewReader([]byte(text)), wanted)
}

// Published makes a card of a published set.
func Published(s published.Set) Card {
	return Card{Name: s.Name, Source: s.Citation, Status: s.Status.String(), Caution: s.Caution, Units: s.Units, Law: s.Law,
		Tested: Range{Stress: Interval(s.Range.Stress), Temperature: Interval(s.Range.Temperature), Basis: s.Range.Basis}}
}
