// Package commandtest checks what every command of the examples promises of its flags and its folder.
package commandtest

import (
	"bytes"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/commandline"
)

// Command is a program but for its exit.
type Command func(args []string, stdout, stderr io.Writer) int

// Helps asks for help in both ways: it must go to the standard output with the words in it and the caution, and nothing to the
// standard error.
func Helps(t *testing.T, command Command, words ...string) {
	t.Helper()
	for _, flag := range []string{"-h", "-help"} {
		var out, err bytes.Buffer
		assert.Equal(t, commandline.Done, command([]string{flag}, &out, &err), flag)
		for _, w := range append(words, "governing code") {
			assert.Contains(t, out.String(), w)
		}
		assert.Empty(t, err.String())
	}
}

// Refuses runs command lines, flags and values between blanks, that must be refused: with what is said on the standard error, and
// nothing printed.
func Refuses(t *testing.T, command Command, cases [][2]string) {
	t.Helper()
	for _, c := range cases {
		var out, err bytes.Buffer
		assert.Equal(t, commandline.Refused, command(strings.Fields(c[0]), &out, &err), c[0])
		assert.Contains(t, err.String(), c[1], c[0])
		assert.Empty(t, out.String(), c[0])
	}
}

// FolderThatCannotBeMade runs a command with such an output folder: it must fail and say so, after it has printed its tables.
func FolderThatCannotBeMade(t *testing.T, command Command, args []string, says, printed string) {
	t.Helper()
	file := filepath.Join(t.TempDir(), "file")
	require.NoError(t, os.WriteFile(file, nil, 0o666))
	var out, err bytes.Buffer
	assert.Equal(t, commandline.Failed, command(append(args, "-out", filepath.Join(file, "out")), &out, &err))
	assert.Contains(t, err.String(), says)
	assert.Contains(t, out.String(), printed)
}
