package main

import (
	"bytes"
	"encoding/csv"
	"errors"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/examples/commandline"
	"example.com/holdtime/examples/commandline/commandtest"
	"example.com/holdtime/examples/figure/figuretest"
	"example.com/holdtime/examples/position"
)

func TestFlags(t *testing.T) {
	commandtest.Helps(t, command, "creep_rate_per_h")
	commandtest.Refuses(t, command, [][2]string{
		{"-x", "-h"},
		{"pipe.json", "-pipe"},
		{"-elements 1", "-elements is 1"},
		{"-tolerance NaN", "-tolerance is NaN"},
		{"-tolerance 1", "-tolerance is 1"},
		{"-pipe not-there.json", "not-there.json"},
	})
}

// Every field of the file is read strictly, and a mistake is told with its place.
func TestBrokenFiles(t *testing.T) {
	good := string(builtIn)
	for _, c := range []struct{ old, new, says string }{
		{`"pressure_MPa": 30`, `"pressure_MPa": -30`, "p.json:5:19: pressure_MPa is -30, must be above 0"},
		{`"pressure_MPa": 30`, `"pressure_MPa": "30"`, "p.json:5:19: pressure_MPa must be a number"},
		{`"pressure_MPa": 30`, `"pressure_MPa": 1e999`, "p.json:5:19: pressure_MPa is 1e999"},
		{`"pressure_MPa": 30`, `"pressure_MPa": null`, "must be a number or a text, not null"},
		{`"pressure_MPa": 30`, `"pressure_MPa": [30]`, "pressure_MPa must be a number or a text"},
		{`"pressure_MPa": 30`, `"pressure_MPa": true`, "pressure_MPa must be a number or a text"},
		{`"pressure_MPa": 30`, `"pressure_MPa": 30, "pressure_MPa": 31`, `the field "pressure_MPa" is given twice`},
		{`"pressure_MPa": 30,`, ``, `the field "pressure_MPa" is missing`},
		{`"pressure_MPa"`, `"Pressure_MPa"`, `the field "pressure_MPa" is missing`},
		{`"pressure_MPa": 30`, `"pressure_MPa": 30, "presure": 3`, `there is no field "presure"`},
		{`"pressure_MPa": 30`, `"pressure_MPa": 30 30`, "not JSON"},
		{`"pressure_MPa": 30`, `"pressure_MPa": NaN`, "not JSON"},
		{`"outer_radius_mm": 100`, `"outer_radius_mm": 60`, "p.json:4:22: outer_radius_mm is 60, must be 1.05 to 10 times"},
		{`"bore_temperature_C": 540`, `"bore_temperature_C": -300`, "bore_temperature_C is -300"},
		{`"poisson": 0.3`, `"poisson": 0.5`, "poisson is 0.5, must be at least 0 and at most 0.49"},
		{`"stress_exponent": 5`, `"stress_exponent": 0.9`, "stress_exponent is 0.9, must be at least 1"},
		{`"title": "Tube heated from outside (invented data)"`, `"title": 3`, "title must be a text"},
		{"\n}", "\n} x", "something after the end"},
		{"\n}", "\n},", "something after the end"},
		{"\n}", ",\n}", "not JSON"},
		{`"pressure_MPa": 30,`, `"pressure_MPa": 30`, "not JSON"},
		{`"pressure_MPa": 30`, `"pressure_MPa" 30`, "not JSON"},
		{"\n}", "\n} {}", "something after the end"},
		{"\n}", "", "ends too early"},
		{"{\n", "[\n", "must be an object"},
	} {
		require.Contains(t, good, c.old)
		_, err := readPipe("p.json", []byte(strings.Replace(good, c.old, c.new, 1)))
		require.Error(t, err, c.new)
		assert.Contains(t, err.Error(), c.says, c.new)
		var wrong *position.Error
		assert.True(t, errors.As(err, &wrong) && wrong.Line > 0 && wrong.Column > 0, "%v", err)
	}
	for _, text := range []string{"", " ", "3", "null", `"x"`} {
		_, err := readPipe("p.json", []byte(text))
		assert.Error(t, err, "%q", text)
	}
	p, err := readPipe("p.json", append([]byte("\uFEFF"), builtIn...))
	require.NoError(t, err)
	assert.Equal(t, mustPipe(t), p)
}

// A file of the user's: tables, pictures and CSV go beside it.
func TestPrintedReportAndFiles(t *testing.T) {
	folder := t.TempDir()
	path := filepath.Join(folder, "own.json")
	text := strings.Replace(string(builtIn), `"pressure_MPa": 30`, `"pressure_MPa": 20`, 1)
	require.NoError(t, os.WriteFile(path, []byte(text), 0o666))
	var out, failure bytes.Buffer
	require.Equal(t, commandline.Done, command([]string{"-pipe", path, "-elements", "16", "-tolerance", "1e-3"}, &out, &failure), failure.String())
	assert.Equal(t, 17, strings.Count(out.String(), "   pass  "), out.String())
	assert.NotContains(t, out.String(), "FAIL")
	for _, words := range []string{"20 MPa inside", "Bailey's closed form", "NEWTON", "governing code", "approach.svg"} {
		assert.Contains(t, out.String(), words)
	}
	for name, words := range map[string]string{"uniform": "steady state, Bailey", "gradient": "bore at 540 °C, outside at 560 °C",
		"approach": "the way to the steady state"} {
		figuretest.PNG(t, filepath.Join(folder, "out", name+".png"), 1000, 1000)
		figuretest.SVG(t, filepath.Join(folder, "out", name+".svg"), words, "invented")
	}
	checkTable(t, filepath.Join(folder, "out", "uniform.csv"))
}

// checkTable holds the first and last lines of a CSV file against Lamé 1833 and Bailey 1935, for 20 MPa.
func checkTable(t *testing.T, path string) {
	f, err := os.Open(path)
	require.NoError(t, err)
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	assert.Equal(t, "hoop [MPa]", rows[0][3])
	number := func(row []string, i int) float64 {
		x, err := strconv.ParseFloat(row[i], 64)
		require.NoError(t, err)
		return x
	}
	first, last := rows[1], rows[len(rows)-1]
	r := number(first, 1)
	assert.Zero(t, number(first, 0))
	check.Rel(t, "Lamé", number(first, 3), 20*3600/(1e4-3600)*(1+1e4/(r*r)), 1e-4)
	r = number(last, 1)
	k := 2.0 / 5
	check.Rel(t, "Bailey", number(last, 3), 20*(1-(1-k)*math.Pow(100/r, k))/(math.Pow(100.0/60, k)-1), 1e-4)
}

func TestFilesThatCannotBeWritten(t *testing.T) {
	commandtest.FolderThatCannotBeMade(t, command, []string{"-elements", "8", "-tolerance", "1e-3"}, "the files were not written",
		"WHAT WAS CHECKED")
}

// A mesh that is too coarse for the pipe is told by the exit status.
func TestCoarseMeshFails(t *testing.T) {
	path := filepath.Join(t.TempDir(), "thick.json")
	text := strings.Replace(string(builtIn), `"outer_radius_mm": 100`, `"outer_radius_mm": 600`, 1)
	require.NoError(t, os.WriteFile(path, []byte(text), 0o666))
	var out, err bytes.Buffer
	assert.Equal(t, commandline.Failed, command([]string{"-pipe", path, "-elements", "4", "-tolerance", "1e-3"}, &out, &err))
	assert.Contains(t, out.String(), "FAIL")
	assert.Contains(t, err.String(), "a check failed")
}
