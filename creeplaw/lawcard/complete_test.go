package lawcard_test

import (
	"go/ast"
	"go/parser"
	"go/token"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// constructors are the exported functions of a package that make a law, a temperature factor or a curve: New…, With… and
// InUnits.
func constructors(t *testing.T, dir string) []string {
	t.Helper()
	files, err := filepath.Glob(filepath.Join(dir, "*.go"))
	require.NoError(t, err)
	var names []string
	for _, file := range files {
		if strings.HasSuffix(file, "_test.go") {
			continue
		}
		source, err := os.ReadFile(file)
		require.NoError(t, err)
		parsed, err := parser.ParseFile(token.NewFileSet(), file, source, parser.SkipObjectResolution)
		require.NoError(t, err)
		for _, d := range parsed.Decls {
			f, ok := d.(*ast.FuncDecl)
			if !ok || f.Recv != nil {
				continue
			}
			if name := f.Name.Name; strings.HasPrefix(name, "New") || strings.HasPrefix(name, "With") || name == "InUnits" {
				names = append(names, name)
			}
		}
	}
	require.NotEmpty(t, names, dir)
	return names
}

// No constructor is forgotten: whoever adds a law finds here that a card must hold it. Clocked rates are no laws.
func TestEveryConstructorIsCovered(t *testing.T) {
	covered := map[string]bool{"curve.NewStrainHardened": true, "curve.NewTimeHardened": true}
	for _, s := range everyLaw() {
		covered[s.makes] = true
	}
	for name := range factors() {
		covered[name] = true
	}
	for _, name := range constructors(t, "..") {
		assert.True(t, covered[name], "no round trip of a law made by creeplaw.%s", name)
	}
	for _, name := range constructors(t, "../curve") {
		assert.True(t, covered["curve."+name], "no round trip of a curve made by curve.%s", name)
	}
}
