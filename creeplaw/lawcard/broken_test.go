package lawcard_test

import (
	"errors"
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawcard"
)

// good is a card without a fault; the broken ones below differ from it in one place.
const good = `{
  "format": "holdtime law card",
  "version": 1,
  "name": "demonstration",
  "source": "invented",
  "status": "invented",
  "units": {"stress": "MPa", "time": "h", "temperature": "K"},
  "tested range": {"stress": [60, 200], "basis": "invented"},
  "law": LAW
}
`

const norton = `{"kind": "Norton", "parameters": {"prefactor": 1e-15, "stress exponent": 5}}`

func withLaw(law string) string { return strings.Replace(good, "LAW", law, 1) }

// in replaces one text of the good card.
func in(old, new string) string {
	text := withLaw(norton)
	if strings.Count(text, old) != 1 {
		panic(old)
	}
	return strings.Replace(text, old, new, 1)
}

var pascalSecond = creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second}

// broken is a card with one fault. The place where the fault is to be reported is marked in the text by §, which is taken
// out before the card is read.
type broken struct {
	name  string
	text  string
	path  string
	fault lawcard.Fault
	says  string
}

func TestBrokenCards(t *testing.T) {
	all := append(append(brokenTexts(), brokenFrames()...), brokenLaws()...)
	assert.GreaterOrEqual(t, len(all), 80)
	seen := map[string]string{}
	for _, b := range all {
		text, line, column := unmarked(b.text)
		c, err := lawcard.Read(strings.NewReader(text), pascalSecond)
		var e *lawcard.CardError
		if !assert.True(t, errors.As(err, &e), "%s: %v", b.name, err) {
			continue
		}
		assert.Equal(t, b.path, e.Path, b.name)
		assert.Equal(t, [2]int{line, column}, [2]int{e.Line, e.Column}, "%s: line and column", b.name)
		assert.Equal(t, b.fault, e.Fault, "%s: %v", b.name, e.Fault)
		assert.Equal(t, b.says, e.Reason, b.name)
		assert.Zero(t, c, b.name)
		place := b.path
		if place == "" {
			place = "the card"
		}
		assert.EqualError(t, err, fmt.Sprintf("lawcard: %d:%d: %s %s", line, column, place, b.says), b.name)
		assert.Empty(t, seen[err.Error()], "%s has the error of another", b.name)
		seen[err.Error()] = b.name
	}
	t.Logf("%d broken cards", len(all))
}

// unmarked takes § out and tells where it stood, counting characters.
func unmarked(marked string) (text string, line, column int) {
	line, column = 1, 1
	at := strings.Index(marked, "§")
	if at < 0 {
		panic("no place marked in " + marked)
	}
	for _, r := range strings.ToValidUTF8(marked[:at], "?") {
		column++
		if r == '\n' {
			line, column = line+1, 1
		}
	}
	return marked[:at] + marked[at+len("§"):], line, column
}

func brokenTexts() []broken {
	const syntax = lawcard.BadSyntax
	value := func(s string) string { return in("1e-15", s) }
	const prefactor = "/law/parameters/prefactor"
	return []broken{
		{"empty", "§", "", syntax, "has the end of the text where a JSON value must be"},
		{"blank", "\n \t\n§", "", syntax, "has the end of the text where a JSON value must be"},
		{"prose", "§Norton's law", "", syntax, `has "Norton" where a JSON value must be`},
		{"byte order mark", "§\ufeff" + withLaw(norton), "", syntax, `has "\ufeff" where a JSON value must be`},
		{"not UTF-8", in(`"demonstration"`, "\"demo§\xff\""), "", syntax, "is not UTF-8 here"},
		{"two cards", withLaw(norton) + "§" + withLaw(norton), "", lawcard.TrailingData, `is followed by "{"; nothing may be`},
		{"a brace too many", withLaw(norton) + "§}", "", lawcard.TrailingData, `is followed by "}"; nothing may be`},
		{"a brace too few", strings.TrimSuffix(withLaw(norton), "}\n") + "§", "", syntax,
			`has the end of the text where a comma or "}" must be`},
		{"comment", in(`"law":`, `§// a remark`+"\n"+`"law":`), "", syntax, `has "/" where a name in quotes must be`},
		{"comma at the end of an object", in(`"stress exponent": 5}`, `"stress exponent": 5,§}`), "/law/parameters", syntax,
			`has "}" where a name in quotes must be`},
		{"comma at the end of an array", in("[60, 200]", "[60, 200, §]"), "/tested range/stress/2", syntax,
			`has "]" where a JSON value must be`},
		{"no comma", in(`1e-15, "s`, `1e-15 §"s`), "/law/parameters", syntax, `has "\"" where a comma or "}" must be`},
		{"no colon", in(`"prefactor":`, `"prefactor" §=`), prefactor, syntax, `has "=" where a colon must be`},
		{"name without quotes", in(`"prefactor":`, `§prefactor:`), "/law/parameters", syntax,
			`has "prefactor" where a name in quotes must be`},
		{"other quotes", in(`"kind"`, `§'kind'`), "/law", syntax, `has "'" where a name in quotes must be`},
		{"text without an end", `{"format": §"holdtime law card}`, "/format", syntax, "has a text without its closing quote"},
		{"line break in a text", in(`"demonstration"`, "\"demon§\nstration\""), "/name", syntax,
			"has a control character in a text"},
		{"escape", in(`"demonstration"`, `"demo§\x41"`), "/name", syntax, "has a bad escape in a text"},
		{"half a pair of surrogates", in(`"demonstration"`, `"a demo§\ud83d\u0041"`), "/name", syntax,
			"has a bad escape in a text"},
		{"surrogates without the second backslash", in(`"demonstration"`, `"demonstration§\ud83dude00"`), "/name", syntax,
			"has a bad escape in a text"},
		{"NaN", value("§NaN"), prefactor, syntax, `has "NaN" where a JSON value must be`},
		{"nan", value("§nan"), prefactor, syntax, `has "nan" where a JSON value must be`},
		{"Infinity", value("§Infinity"), prefactor, syntax, `has "Infinity" where a JSON value must be`},
		{"-Infinity", value("§-Infinity"), prefactor, syntax, `is "-Infinity", not a JSON number`},
		{"plus sign", value("§+1e-15"), prefactor, syntax, `has "+1e-15" where a JSON value must be`},
		{"leading zero", value("§01e-15"), prefactor, syntax, `is "01e-15", not a JSON number`},
		{"leading point", value("§.1e-14"), prefactor, syntax, `has ".1e-14" where a JSON value must be`},
		{"point without digits", value("§1.e-15"), prefactor, syntax, `is "1.e-15", not a JSON number`},
		{"exponent without digits", value("§1e-"), prefactor, syntax, `is "1e-", not a JSON number`},
		{"hexadecimal", value("§0x1p-50"), prefactor, syntax, `is "0x1p-50", not a JSON number`},
		{"decimal comma", value("1,§5e-15"), "/law/parameters", syntax, `has "5e-15" where a name in quotes must be`},
		{"overflow", value("§1e999"), prefactor, lawcard.BadNumber, `is "1e999", beyond the range of a float64`},
		{"underflow", value("§1e-999"), prefactor, lawcard.BadNumber,
			`is "1e-999", so small that a float64 makes it zero`},
		{"a name twice", in(`"status"`, `§"source"`), "/source", lawcard.Duplicate, "is there twice, first at 5:3"},
		{"a parameter twice", in(`"stress exponent": 5`, `"stress exponent": 5, §"prefactor": 1e-15`), prefactor,
			lawcard.Duplicate, "is there twice, first at 9:44"},
		{"twice behind an escape", in(`"stress exponent": 5`, `"stress exponent": 5, §"stress\u0020exponent": 6`),
			"/law/parameters/stress exponent", lawcard.Duplicate, "is there twice, first at 9:64"},
		{"too deep", in(`"demonstration"`, strings.Repeat("[", 99)+"§[]"+strings.Repeat("]", 99)),
			"/name" + strings.Repeat("/0", 99), lawcard.TooLarge, "is nested deeper than 100"},
		{"too large", "§" + withLaw(norton) + strings.Repeat(" ", 1<<20), "", lawcard.TooLarge, "has more than 1048576 bytes"},
	}
}

func brokenFrames() []broken {
	const unknown, missing, wrong = lawcard.Unknown, lawcard.Missing, lawcard.WrongType
	return []broken{
		{"an array", "§[]", "", wrong, "is an array, must be an object"},
		{"a number", "§1", "", wrong, "is a number, must be an object"},
		{"no format", "§" + in(`"format": "holdtime law card",`, ""), "", missing, `has no "format"`},
		{"another format", in(`"holdtime law card"`, `§"material"`), "/format", unknown,
			`is "material", must be one of "holdtime law card"`},
		{"no version", "§" + in(`"version": 1,`, ""), "", missing, `has no "version"`},
		{"version 2", in(`"version": 1`, `"version": §2, "new in version 2": true`), "/version", lawcard.UnsupportedVersion,
			`is "2"; supported is version 1 only`},
		{"version 1.5", in(`"version": 1`, `"version": §1.5`), "/version", lawcard.UnsupportedVersion,
			`is "1.5"; supported is version 1 only`},
		{"version as a text", in(`"version": 1`, `"version": §"1"`), "/version", wrong, "is a text, must be a number"},
		{"no name", "§" + in(`"name": "demonstration",`, ""), "", missing, `has no "name"`},
		{"no source", "§" + in(`"source": "invented",`, ""), "", missing, `has no "source"`},
		{"no law", "§" + in(",\n  \"law\": "+norton, ""), "", missing, `has no "law"`},
		{"empty name", in(`"demonstration"`, `§" "`), "/name", lawcard.BadText, "is empty; it must say something"},
		{"name is a number", in(`"demonstration"`, `§316`), "/name", wrong, "is a number, must be a text"},
		{"empty caution", in(`"status"`, `"caution": §"", "status"`), "/caution", lawcard.BadText,
			"is empty; it must say something"},
		{"unknown member", in(`"status"`, `§"heat/cast": 7, "status"`), "/heat~1cast", unknown,
			`is not known here; known are "format", "version", "name", "source", "status", "units", "tested range", "law", ` +
				`"caution"`},
		{"no unit of time", in(`{"stress": "MPa", "time": "h",`, `§{"stress": "MPa",`), "/units", missing, `has no "time"`},
		{"unit that is none", in(`"MPa"`, `§"MPA"`), "/units/stress", lawcard.BadUnit, `is "MPA", no unit of stress known here; ` +
			`known are "Pa", "kPa", "bar", "MPa", "GPa", "psi", "ksi" and a size such as "1000 Pa"`},
		{"unit of another quantity", in(`"MPa"`, `§"h"`), "/units/stress", lawcard.BadUnit, `is "h", no unit of stress known ` +
			`here; known are "Pa", "kPa", "bar", "MPa", "GPa", "psi", "ksi" and a size such as "1000 Pa"`},
		{"unit of negative size", in(`"h"`, `§"-3600 s"`), "/units/time", lawcard.BadUnit, `is "-3600 s", no unit of time known ` +
			`here; known are "s", "min", "h", "d", "a" and a size such as "1000 s"`},
		{"unit of infinite size", in(`"h"`, `§"Inf s"`), "/units/time", lawcard.BadUnit, `is "Inf s", no unit of time known ` +
			`here; known are "s", "min", "h", "d", "a" and a size such as "1000 s"`},
		{"unit of temperature", in(`"K"`, `§"C"`), "/units/temperature", lawcard.BadUnit,
			`is "C", no unit of temperature known here; known are "K", "degC", "degF"`},
		{"unit is a number", in(`"MPa"`, `§1000000`), "/units/stress", wrong, "is a number, must be a text"},
		{"no basis", in(`{"stress": [60, 200], "basis": "invented"}`, `§{"stress": [60, 200]}`), "/tested range", missing,
			`has no "basis"`},
		{"range falls", in("[60, 200]", "§[200, 60]"), "/tested range/stress", lawcard.BadRange,
			"is from 200 to 60, must ascend from zero or more"},
		{"range below zero", in("[60, 200]", "§[-60, 200]"), "/tested range/stress", lawcard.BadRange,
			"is from -60 to 200, must ascend from zero or more"},
		{"range of nothing", in("[60, 200]", "§[0, 0]"), "/tested range/stress", lawcard.BadRange,
			"is from 0 to 0, must ascend from zero or more"},
		{"half a range", in("[60, 200]", "§[60]"), "/tested range/stress", missing, "has too few entries: 1, must be at least 2"},
		{"range of three", in("[60, 200]", "§[60, 100, 200]"), "/tested range/stress", lawcard.BadRange,
			"has 3 entries, must be a lowest and a highest value"},
		{"range of texts", in("[60, 200]", `[60, §"200"]`), "/tested range/stress/1", wrong, "is a text, must be a number"},
		{"range is a number", in("[60, 200]", "§200"), "/tested range/stress", wrong, "is a number, must be an array"},
		{"range of an unknown quantity", in(`"stress": [60, 200]`, `§"strain rate": [1e-9, 1e-5]`), "/tested range/strain rate",
			unknown, `is not known here; known are "basis", "stress", "strain", "temperature", "time"`},
		{"range below absolute zero", in(`"temperature": "K"},`+"\n"+`  "tested range": {"stress": [60, 200]`,
			`"temperature": "degC"},`+"\n"+`  "tested range": {"temperature": §[-300, 20]`), "/tested range/temperature",
			lawcard.BadRange, "is from -300 to 20, must ascend from zero or more"},
	}
}
