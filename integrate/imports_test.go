package integrate_test

import (
	"os/exec"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

// TestArrowsRunOneWay: what an importer gets with the hot packages is the standard library and the packages below them in the
// house, nothing else.
func TestArrowsRunOneWay(t *testing.T) {
	const module = "example.com/holdtime/"
	allowed := map[string][]string{
		"tensor":                  {"tensor"},
		"creeplaw":                {"creeplaw"},
		"creeplaw/curve":          {"creeplaw"},
		"creeplaw/audit":          {"creeplaw"},
		"creeplaw/lawcard":        {"creeplaw"},
		"creeplaw/lawtest":        {"creeplaw"},
		"creeplaw/published":      {"creeplaw"},
		"integrate":               {"tensor", "creeplaw", "integrate"},
		"integrate/batch":         {"tensor", "creeplaw", "integrate"},
		"integrate/program":       {"tensor", "creeplaw", "integrate"},
		"integrate/internal/dirk": {"integrate"},
		"bench/check":             {"bench/check"},
		"bench":                   {"bench", "tensor"},
	}
	for name, rooms := range allowed {
		out, err := exec.Command("go", "list", "-deps", "-f", "{{if not .Standard}}{{.ImportPath}}{{end}}", module+name).Output()
		require.NoError(t, err, name)
		for _, path := range strings.Fields(string(out)) {
			inside := false
			for _, room := range rooms {
				inside = inside || path == module+room || strings.HasPrefix(path, module+room+"/")
			}
			require.True(t, inside, "%s imports %s", name, path)
		}
	}
}
