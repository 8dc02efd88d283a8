// Package figuretest checks that pictures can be opened and say what they should.
package figuretest

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image"
	"image/png"
	"io"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// PNG decodes a picture, which must be wider and higher than so many pixels.
func PNG(t *testing.T, path string, width, height int) image.Image {
	t.Helper()
	f, err := os.Open(path)
	require.NoError(t, err)
	defer f.Close()
	picture, err := png.Decode(f)
	require.NoError(t, err, path)
	assert.True(t, picture.Bounds().Dx() > width && picture.Bounds().Dy() > height, "%s: %v", path, picture.Bounds())
	return picture
}

// SVG requires a picture to be well-formed XML with the words in it.
func SVG(t *testing.T, path string, words ...string) {
	t.Helper()
	text, err := os.ReadFile(path)
	require.NoError(t, err)
	for _, w := range words {
		assert.Contains(t, string(text), w)
	}
	d := xml.NewDecoder(bytes.NewReader(text))
	for err = nil; err == nil; {
		_, err = d.Token()
	}
	assert.True(t, errors.Is(err, io.EOF), "%s is not XML: %v", path, err)
}
