package figure

import (
	"strconv"
	"strings"
)

// Grouped writes a number with a blank between thousands.
func Grouped(x float64, decimals int) string {
	s := strconv.FormatFloat(x, 'f', decimals, 64)
	whole, rest, _ := strings.Cut(strings.TrimPrefix(s, "-"), ".")
	for i := len(whole) - 3; i > 0; i -= 3 {
		whole = whole[:i] + " " + whole[i:]
	}
	if rest != "" {
		whole += "." + rest
	}
	if strings.HasPrefix(s, "-") && strings.Trim(s, "-0.") != "" {
		return "-" + whole
	}
	return whole
}
