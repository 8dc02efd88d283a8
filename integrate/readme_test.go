package integrate_test

import (
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

// TestReadmeShowsCompiledCode: the lines by which the README embeds the library are those of host.update, which the examples
// of this package compile and run.
func TestReadmeShowsCompiledCode(t *testing.T) {
	readme, err := os.ReadFile("../README.md")
	require.NoError(t, err)
	code, err := os.ReadFile("example_test.go")
	require.NoError(t, err)
	_, rest, found := strings.Cut(string(code), "func (h *host) update(")
	require.True(t, found)
	_, body, found := strings.Cut(rest, "\n")
	require.True(t, found)
	body, _, found = strings.Cut(body, "\n}\n")
	require.True(t, found)
	for _, line := range strings.Split(body, "\n") {
		require.Contains(t, string(readme), strings.TrimSpace(line))
	}
	require.Greater(t, strings.Count(body, "\n"), 8)
}
