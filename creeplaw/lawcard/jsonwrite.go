package lawcard

import (
	"encoding/json"
	"strconv"
	"strings"
)

// What a card is written from: ordered, so that a card always looks the same.
type (
	members []named
	named   struct {
		name  string
		value any // members, list, short, string or float64
	}
	list  []any
	short []float64 // on one line
)

// jsonText lays a value out, indented by two spaces a level.
func jsonText(b *strings.Builder, v any, indent string) {
	switch v := v.(type) {
	case members:
		inner := indent + "  "
		for i, m := range v {
			b.WriteString(opening(i, "{"))
			b.WriteString(inner + quote(m.name) + ": ")
			jsonText(b, m.value, inner)
		}
		b.WriteString("\n" + indent + "}")
	case list:
		inner := indent + "  "
		for i, item := range v {
			b.WriteString(opening(i, "[") + inner)
			jsonText(b, item, inner)
		}
		b.WriteString("\n" + indent + "]")
	case short:
		for i, x := range v {
			b.WriteString([]string{"[", ", "}[min(i, 1)] + digits(x))
		}
		b.WriteString("]")
	case string:
		b.WriteString(quote(v))
	case float64:
		b.WriteString(digits(v))
	}
}

func opening(i int, bracket string) string {
	if i == 0 {
		return bracket + "\n"
	}
	return ",\n"
}

// digits are the fewest that give the same float64 back.
func digits(x float64) string { return strconv.FormatFloat(x, 'g', -1, 64) }

func quote(s string) string {
	var b strings.Builder
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	_ = e.Encode(s) // a text always can be
	return strings.TrimSuffix(b.String(), "\n")
}
