package main

import (
	"bytes"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/commandline"
	"example.com/holdtime/examples/commandline/commandtest"
	"example.com/holdtime/examples/figure/figuretest"
)

func TestFlags(t *testing.T) {
	commandtest.Helps(t, command, "-distortion")
	commandtest.Refuses(t, command, [][2]string{
		{"-x", "-h"},
		{"file.json", "file.json"},
		{"-exponent 0", "-exponent is 0"},
		{"-exponent NaN", "-exponent is NaN"},
		{"-distortion 1.5", "-distortion is 1.5"},
		{"-steps 0", "-steps is 0"},
		{"-steps 1.5", "-h"},
	})
}

func TestPrintedReportAndPictures(t *testing.T) {
	folder := filepath.Join(t.TempDir(), "new", "folder")
	var out, failure bytes.Buffer
	require.Equal(t, commandline.Done, command([]string{"-steps", "8", "-out", folder}, &out, &failure), failure.String())
	text := out.String()
	assert.Equal(t, 18, strings.Count(text, "   pass  "), text)
	assert.NotContains(t, text, "FAIL")
	for _, words := range []string{"unload to 60 MPa", "Δt = 10000  h", "Invented", "governing code", "brick.svg"} {
		assert.Contains(t, text, words)
	}
	figuretest.PNG(t, filepath.Join(folder, "brick.png"), 1000, 600)
	figuretest.SVG(t, filepath.Join(folder, "brick.svg"), "closed form", "10 000 h", "Time [h]", "invented", "1e-14")
}

// A folder that cannot be made is told, after the tables.
func TestPictureThatCannotBeWritten(t *testing.T) {
	commandtest.FolderThatCannotBeMade(t, command, []string{"-steps", "8"}, "the picture was not drawn", "WHAT WAS CHECKED")
}
