package commandline

import (
	"os"
	"path/filepath"
	"runtime"
)

// SourceFolder is the folder of the caller's source file where that is at hand, as with go run; otherwise empty.
func SourceFolder() string {
	if _, file, _, ok := runtime.Caller(1); ok && filepath.IsAbs(file) {
		if _, err := os.Stat(file); err == nil {
			return filepath.Dir(file)
		}
	}
	return ""
}

// OutputFolder is where files go: the folder asked for; without one, "out" beside the input file; without that, "out" in home.
func OutputFolder(asked, input, home string) string {
	switch {
	case asked != "":
		return asked
	case input != "":
		return filepath.Join(filepath.Dir(input), "out")
	}
	return filepath.Join(home, "out")
}

// Relative is a path as seen from the current folder, where that can be said.
func Relative(path string) string {
	here, err := os.Getwd()
	if err != nil || !filepath.IsAbs(path) {
		return path
	}
	if short, err := filepath.Rel(here, path); err == nil {
		return short
	}
	return path
}
