package lawcard_test

import (
	"encoding/binary"
	"encoding/json"
	"errors"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawcard"
)

// Whatever the text: no panic, an error with a place or a card; and a card that was read can be written, follows the schema,
// and comes back the same to the bit.
func FuzzRead(f *testing.F) {
	f.Add(withLaw(norton))
	for _, s := range everyLaw() {
		var b strings.Builder
		if err := lawcard.Write(&b, card(s)); err != nil {
			f.Fatal(err)
		}
		f.Add(b.String())
	}
	for _, b := range append(append(brokenTexts(), brokenFrames()...), brokenLaws()...) {
		if text, _, _ := unmarked(b.text); len(text) < 2000 {
			f.Add(text)
		}
	}
	var schema validator
	if err := json.Unmarshal([]byte(lawcard.Schema()), &schema.root); err != nil {
		f.Fatal(err)
	}
	f.Fuzz(func(t *testing.T, text string) {
		c, err := lawcard.Read(strings.NewReader(text), creeplaw.Units{})
		if err != nil {
			hasPlace(t, text, err)
			return
		}
		schema.used = map[string]int{}
		if err := schema.text(t, text); err != nil {
			t.Errorf("the reader takes what the schema refuses: %v", err)
		}
		first := written(t, c)
		again, err := lawcard.Read(strings.NewReader(first), creeplaw.Units{})
		if err != nil {
			t.Fatalf("a card that was written cannot be read: %v\n%s", err, first)
		}
		if second := written(t, again); first != second {
			t.Errorf("the second time it is another card:\n%s\n%s", first, second)
		}
		r := rand.New(rand.NewPCG(1, 1))
		for range 5 {
			at := somewhere(r)
			if a, b := c.Law.Rate(at), again.Law.Rate(at); bits(a.Value) != bits(b.Value) {
				t.Errorf("at %+v the rate is %v and then %v", at, a.Value, b.Value)
			}
		}
		if _, err := lawcard.Read(strings.NewReader(text), creeplaw.Units{Stress: creeplaw.KilopoundPerSquareInch, Time: 7}); err != nil {
			hasPlace(t, text, err)
		}
	})
}

// hasPlace holds an error to naming a place inside the text.
func hasPlace(t *testing.T, text string, err error) {
	t.Helper()
	var e *lawcard.CardError
	if !errors.As(err, &e) {
		t.Fatalf("no CardError: %v", err)
	}
	lines := strings.Split(text, "\n")
	inside := e.Line >= 1 && e.Line <= len(lines) && e.Column >= 1 && e.Column <= len([]rune(lines[e.Line-1]))+1
	if !inside || e.Reason == "" || e.Path != "" && e.Path[0] != '/' || strings.HasPrefix(e.Fault.String(), "fault") {
		t.Errorf("%d:%d is no place in the text, or something is missing: %+v", e.Line, e.Column, e)
	}
}

// Laws of any kind with any numbers their constructors take: the round trip is exact, to the bit, and a change of units either
// leaves the logarithm of the rate what it was or says that it cannot be made.
func FuzzNumbers(f *testing.F) {
	all := everyLaw()
	for i, s := range all {
		var raw []byte
		for _, p := range s.law.(creeplaw.Parametric).Parameters() {
			raw = binary.LittleEndian.AppendUint64(raw, bits(p.Value))
		}
		f.Add(uint16(i), raw)
	}
	f.Fuzz(func(t *testing.T, which uint16, raw []byte) {
		s := all[int(which)%len(all)]
		p := s.law.(creeplaw.Parametric)
		var values []float64
		for _, one := range p.Parameters() {
			if len(raw) >= 8 {
				one.Value, raw = math.Float64frombits(binary.LittleEndian.Uint64(raw)), raw[8:]
			}
			values = append(values, one.Value)
		}
		law, err := p.WithParameters(values)
		if err != nil {
			return
		}
		s.law = law
		c := card(s)
		again, err := lawcard.Read(strings.NewReader(written(t, c)), c.Units)
		if err != nil {
			t.Fatalf("%s: a card that was written cannot be read: %v", s.name, err)
		}
		same(t, s.name, law, again.Law, 1)
		there, err := c.In(creeplaw.Units{Stress: creeplaw.KilopoundPerSquareInch, Time: creeplaw.Year})
		var e *lawcard.CardError
		switch {
		case errors.As(err, &e) && e.Fault == lawcard.NotConvertible:
		case err != nil:
			t.Fatalf("%s: %v", s.name, err)
		default:
			if there.Law == nil || there.Law.Rate(somewhere(rand.New(rand.NewPCG(2, 2)))).Value < 0 {
				t.Errorf("%s: no law", s.name)
			}
		}
	})
}
