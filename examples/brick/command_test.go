package main

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image/png"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestFlags(t *testing.T) {
	cases := []struct {
		args   []string
		status int
		says   string
	}{
		{[]string{"-h"}, done, "-distortion"},
		{[]string{"-x"}, refused, "-h"},
		{[]string{"file.json"}, refused, "file.json"},
		{[]string{"-exponent", "0"}, refused, "-exponent is 0"},
		{[]string{"-exponent", "NaN"}, refused, "-exponent is NaN"},
		{[]string{"-distortion", "1.5"}, refused, "-distortion is 1.5"},
		{[]string{"-steps", "0"}, refused, "-steps is 0"},
		{[]string{"-steps", "1.5"}, refused, "-h"},
	}
	for _, c := range cases {
		var out, err bytes.Buffer
		assert.Equal(t, c.status, command(c.args, &out, &err), "%v", c.args)
		if c.status == done {
			assert.Contains(t, out.String(), c.says)
			assert.Contains(t, out.String(), "governing code")
			assert.Empty(t, err.String())
		} else {
			assert.Contains(t, err.String(), c.says, "%v", c.args)
			assert.Empty(t, out.String(), "%v", c.args)
		}
	}
}

func TestPrintedReportAndPictures(t *testing.T) {
	folder := filepath.Join(t.TempDir(), "new", "folder")
	var out, failure bytes.Buffer
	require.Equal(t, done, command([]string{"-steps", "8", "-out", folder}, &out, &failure), failure.String())
	text := out.String()
	assert.Equal(t, 18, strings.Count(text, "   pass  "), text)
	assert.NotContains(t, text, "FAIL")
	for _, words := range []string{"unload to 60 MPa", "Δt = 10000  h", "Invented", "governing code", "brick.svg"} {
		assert.Contains(t, text, words)
	}
	f, err := os.Open(filepath.Join(folder, "brick.png"))
	require.NoError(t, err)
	defer f.Close()
	picture, err := png.Decode(f)
	require.NoError(t, err)
	assert.True(t, picture.Bounds().Dx() > 1000 && picture.Bounds().Dy() > 600, "%v", picture.Bounds())
	vector, err := os.ReadFile(filepath.Join(folder, "brick.svg"))
	require.NoError(t, err)
	for _, words := range []string{"closed form", "10 000 h", "Time [h]", "invented", "1e-14"} {
		assert.Contains(t, string(vector), words)
	}
	d := xml.NewDecoder(bytes.NewReader(vector))
	for err = nil; err == nil; {
		_, err = d.Token()
	}
	assert.True(t, errors.Is(err, io.EOF), "the SVG is not XML: %v", err)
}

// A folder that cannot be made is told, after the tables.
func TestPictureThatCannotBeWritten(t *testing.T) {
	file := filepath.Join(t.TempDir(), "file")
	require.NoError(t, os.WriteFile(file, nil, 0o666))
	var out, err bytes.Buffer
	assert.Equal(t, failed, command([]string{"-steps", "8", "-out", filepath.Join(file, "out")}, &out, &err))
	assert.Contains(t, err.String(), "the picture was not drawn")
	assert.Contains(t, out.String(), "WHAT WAS CHECKED")
}
