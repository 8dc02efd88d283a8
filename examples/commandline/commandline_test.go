package commandline_test

import (
	"bytes"
	"errors"
	"flag"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/commandline"
)

func TestParse(t *testing.T) {
	u := commandline.Usage{Name: "sample", Help: "what it is for\n", Shows: "its flags", Inputs: ", and there are no input files"}
	for _, c := range []struct {
		args           []string
		status         int
		stdout, stderr string
	}{
		{nil, commandline.Done, "", ""},
		{[]string{"-n", "2"}, commandline.Done, "", ""},
		{[]string{"-h"}, commandline.Done, "what it is for\n  -n number\n    \ta number (default 1)\n", ""},
		{[]string{"-x"}, commandline.Refused, "", "flag provided but not defined: -x\nsample: run it with -h for its flags\n"},
		{[]string{"word"}, commandline.Refused, "", "sample: \"word\" is not a flag, and there are no input files\n"},
		{[]string{"-n", "0"}, commandline.Refused, "", "sample: -n is 0\n"},
	} {
		var out, failure bytes.Buffer
		var n int
		err := u.Parse(c.args, &out, &failure, func(set *flag.FlagSet) { set.IntVar(&n, "n", 1, "a `number`") }, func() error {
			if n == 0 {
				return errors.New("-n is 0")
			}
			return nil
		})
		assert.Equal(t, c.status, commandline.Status(err), "%v", c.args)
		assert.Equal(t, c.stdout, out.String(), "%v", c.args)
		assert.Equal(t, c.stderr, failure.String(), "%v", c.args)
	}
}

func TestFolders(t *testing.T) {
	home := commandline.SourceFolder()
	require.FileExists(t, filepath.Join(home, "commandline_test.go"))
	assert.Equal(t, "here", commandline.OutputFolder("here", filepath.Join("there", "file"), home))
	assert.Equal(t, filepath.Join("there", "out"), commandline.OutputFolder("", filepath.Join("there", "file"), home))
	assert.Equal(t, filepath.Join(home, "out"), commandline.OutputFolder("", "", home))
	assert.Equal(t, "out", commandline.OutputFolder("", "", ""))
	here, err := os.Getwd()
	require.NoError(t, err)
	assert.Equal(t, filepath.Join("a", "b"), commandline.Relative(filepath.Join(here, "a", "b")))
	assert.Equal(t, "..", commandline.Relative(filepath.Dir(here)))
	assert.Equal(t, "a", commandline.Relative("a"))
}
