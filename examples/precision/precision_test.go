package main

import (
	"bytes"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/require"
)

// TestWalksKeepTheirTolerance: against the closed forms every walk ends within three times its tolerance, and equal
// backward-Euler steps converge to the same answers at first order, more slowly from an infinite initial rate.
func TestWalksKeepTheirTolerance(t *testing.T) {
	lines, err := study()
	require.NoError(t, err)
	require.Len(t, lines, 5)
	for _, l := range lines {
		for _, r := range l.walks {
			require.LessOrEqual(t, r.err, 3*r.tolerance+1e-12, "%s at %v", l.name, r.tolerance) // closed forms to 1e-12
		}
		for i := 1; i < len(l.steps); i++ { // eight times the steps
			require.Less(t, l.steps[i].err, l.steps[i-1].err, l.name)
		}
	}
}

func TestCommandWritesItsPicture(t *testing.T) {
	folder := t.TempDir()
	var text bytes.Buffer
	require.NoError(t, command([]string{"-out", folder}, &text))
	require.Contains(t, text.String(), "Norton, n = 25")
	for _, name := range []string{"precision.png", "precision.svg"} {
		info, err := os.Stat(filepath.Join(folder, name))
		require.NoError(t, err)
		require.Greater(t, info.Size(), int64(10_000))
	}
	require.Error(t, command([]string{"-nonsense"}, &text))
}
