package lawcard_test

import (
	"encoding/json"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw/lawcard"
	"example.com/holdtime/creeplaw/published"
)

// validator knows the keywords of JSON Schema (draft 2020-12) that the schema of law cards uses. One it does not know is an
// error, so that none is passed over.
type validator struct {
	root map[string]any
	used map[string]int // how often each definition was asked for
}

func newValidator(t *testing.T) *validator {
	t.Helper()
	v := &validator{used: map[string]int{}}
	require.NoError(t, json.Unmarshal([]byte(lawcard.Schema()), &v.root))
	return v
}

// validate returns nil for a value that the schema allows.
func (v *validator) validate(s map[string]any, value any, path string) error {
	for keyword, rule := range s {
		check, known := map[string]func(rule, value any, s map[string]any, path string) error{
			"$ref": v.reference, "type": v.kindOf, "const": v.constant, "enum": v.enumerated, "oneOf": v.oneOf, "anyOf": v.anyOf,
			"properties": v.properties, "required": v.required, "additionalProperties": v.additional, "items": v.items,
			"minItems": v.count, "maxItems": v.count, "minimum": v.bounds, "maximum": v.bounds, "exclusiveMinimum": v.bounds,
			"exclusiveMaximum": v.bounds, "pattern": v.pattern,
		}[keyword]
		switch {
		case known:
			if err := check(rule, value, s, path); err != nil {
				return err
			}
		case keyword != "description" && keyword != "$schema" && keyword != "$id" && keyword != "title" && keyword != "$defs":
			return fmt.Errorf("the validator does not know the keyword %q", keyword)
		}
	}
	return nil
}

func (v *validator) reference(rule, value any, _ map[string]any, path string) error {
	name := strings.TrimPrefix(rule.(string), "#/$defs/")
	def, ok := v.root["$defs"].(map[string]any)[name].(map[string]any)
	if !ok {
		return fmt.Errorf("%s: no definition %s", path, name)
	}
	v.used[name]++
	return v.validate(def, value, path)
}

func (v *validator) kindOf(rule, value any, _ map[string]any, path string) error {
	is := map[bool]string{}
	switch value.(type) {
	case map[string]any:
		is[true] = "object"
	case []any:
		is[true] = "array"
	case string:
		is[true] = "string"
	case float64:
		is[true] = "number"
	}
	if is[true] != rule {
		return fmt.Errorf("%s: not of type %v", path, rule)
	}
	return nil
}

func (v *validator) constant(rule, value any, _ map[string]any, path string) error {
	if rule != value {
		return fmt.Errorf("%s: not %v", path, rule)
	}
	return nil
}

func (v *validator) enumerated(rule, value any, _ map[string]any, path string) error {
	for _, one := range rule.([]any) {
		if one == value {
			return nil
		}
	}
	return fmt.Errorf("%s: not one of %v", path, rule)
}

func (v *validator) matches(rule, value any, path string) (n int, last error) {
	for _, one := range rule.([]any) {
		if err := v.validate(one.(map[string]any), value, path); err == nil {
			n++
		} else {
			last = err
		}
	}
	return n, last
}

func (v *validator) oneOf(rule, value any, _ map[string]any, path string) error {
	if n, last := v.matches(rule, value, path); n != 1 {
		return fmt.Errorf("%s: matches %d of what it must match one (%w)", path, n, last)
	}
	return nil
}

func (v *validator) anyOf(rule, value any, _ map[string]any, path string) error {
	n, last := v.matches(rule, value, path)
	if n > 0 {
		return nil
	}
	return last
}

func (v *validator) properties(rule, value any, _ map[string]any, path string) error {
	object, _ := value.(map[string]any)
	for name, s := range rule.(map[string]any) {
		if x, ok := object[name]; ok {
			if err := v.validate(s.(map[string]any), x, path+"/"+name); err != nil {
				return err
			}
		}
	}
	return nil
}

func (v *validator) required(rule, value any, _ map[string]any, path string) error {
	object, _ := value.(map[string]any)
	for _, name := range rule.([]any) {
		if _, ok := object[name.(string)]; !ok {
			return fmt.Errorf("%s: no %v", path, name)
		}
	}
	return nil
}

func (v *validator) additional(rule, value any, s map[string]any, path string) error {
	object, _ := value.(map[string]any)
	known, _ := s["properties"].(map[string]any)
	for name := range object {
		if _, ok := known[name]; !ok && rule == false {
			return fmt.Errorf("%s: %s is not known", path, name)
		}
	}
	return nil
}

func (v *validator) items(rule, value any, _ map[string]any, path string) error {
	all, _ := value.([]any)
	for i, x := range all {
		if err := v.validate(rule.(map[string]any), x, path+"/"+strconv.Itoa(i)); err != nil {
			return err
		}
	}
	return nil
}

func (v *validator) count(_, value any, s map[string]any, path string) error {
	all, ok := value.([]any)
	least, most := 0.0, math.Inf(1)
	if x, ok := s["minItems"]; ok {
		least = x.(float64)
	}
	if x, ok := s["maxItems"]; ok {
		most = x.(float64)
	}
	if n := float64(len(all)); ok && (n < least || n > most) {
		return fmt.Errorf("%s: %v entries", path, n)
	}
	return nil
}

func (v *validator) bounds(_, value any, s map[string]any, path string) error {
	x, ok := value.(float64)
	for keyword, inside := range map[string]func(bound float64) bool{
		"minimum": func(b float64) bool { return x >= b }, "exclusiveMinimum": func(b float64) bool { return x > b },
		"maximum": func(b float64) bool { return x <= b }, "exclusiveMaximum": func(b float64) bool { return x < b },
	} {
		if b, has := s[keyword]; has && ok && !inside(b.(float64)) {
			return fmt.Errorf("%s: %v is outside %s %v", path, x, keyword, b)
		}
	}
	return nil
}

func (v *validator) pattern(rule, value any, _ map[string]any, path string) error {
	if s, ok := value.(string); ok && !regexp.MustCompile(rule.(string)).MatchString(s) {
		return fmt.Errorf("%s: %q does not match %v", path, s, rule)
	}
	return nil
}

func (v *validator) text(t *testing.T, text string) error {
	t.Helper()
	var value any
	require.NoError(t, json.Unmarshal([]byte(text), &value), text)
	return v.validate(v.root, value, "")
}

// What Write writes the schema allows, and between them the laws of these tests use all of it.
func TestWrittenCardsFollowTheSchema(t *testing.T) {
	v := newValidator(t)
	cards := 0
	for _, s := range everyLaw() {
		assert.NoError(t, v.text(t, written(t, card(s))), s.name)
		cards++
	}
	for _, s := range append(published.Sets(), published.EvolvingSets()...) {
		assert.NoError(t, v.text(t, written(t, lawcard.Published(s))), s.Name)
		cards++
	}
	for name := range v.root["$defs"].(map[string]any) {
		assert.Positive(t, v.used[name], "no card of these tests uses %s", name)
	}
	t.Logf("%d cards, %d definitions", cards, len(v.used))
}

// Faults of structure and of single numbers the schema finds too. It cannot see the text, names given twice among them, nor
// what depends on two numbers or on the unit of temperature.
func TestSchemaRefusesBrokenCards(t *testing.T) {
	beyond := map[string]bool{
		"range falls": true, "range of nothing": true, "range below absolute zero": true, "shares of more than everything": true,
		"sum of damage": true, "rows out of order": true, "rows of one temperature": true, "temperature of zero": true,
		"below absolute zero": true, "numbers beyond a float64 in the units wanted, and no way round": true, "underflow": true,
		"too deep": true, "too large": true, "function of temperature in degC": true, "curve that never starts": true,
		"too many terms": true, "time exponent of matched regimes": true,
	}
	v := newValidator(t)
	refused := 0
	for _, b := range append(brokenFrames(), brokenLaws()...) {
		text, _, _ := unmarked(b.text)
		if !json.Valid([]byte(text)) || !utf8.ValidString(text) {
			continue
		}
		err := v.text(t, text)
		if beyond[b.name] {
			assert.NoError(t, err, b.name)
			continue
		}
		assert.Error(t, err, b.name)
		refused++
	}
	assert.Greater(t, refused, 60)
	t.Logf("%d broken cards refused by the schema", refused)
	assert.NoError(t, v.text(t, withLaw(norton)), "the card they differ from")
}
