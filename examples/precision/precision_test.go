package main

import (
	"bytes"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/commandline"
	"example.com/holdtime/examples/commandline/commandtest"
	"example.com/holdtime/examples/figure/figuretest"
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

func TestFlags(t *testing.T) {
	commandtest.Helps(t, command, "usage: precision [flags]", "-out")
	commandtest.Refuses(t, command, [][2]string{{"-nonsense", "run it with -h"}, {"file.json", `"file.json" is not a flag`}})
}

func TestCommandWritesItsPicture(t *testing.T) {
	folder := filepath.Join(t.TempDir(), "new", "folder")
	var text, failure bytes.Buffer
	require.Equal(t, commandline.Done, command([]string{"-out", folder}, &text, &failure), failure.String())
	for _, words := range []string{"Norton, n = 25", "equal steps", "precision.svg", "governing code"} {
		require.Contains(t, text.String(), words)
	}
	figuretest.PNG(t, filepath.Join(folder, "precision.png"), 1000, 600)
	figuretest.SVG(t, filepath.Join(folder, "precision.svg"), "Norton, n = 25", "Tolerance asked for", "invented")
	commandtest.FolderThatCannotBeMade(t, command, nil, "the picture was not drawn", "Norton, n = 25")
}
