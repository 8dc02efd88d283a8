package main

import (
	"bytes"
	"encoding/xml"
	"image/png"
	"io"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"example.com/holdtime/bench/check"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestFlags(t *testing.T) {
	cases := []struct {
		args   []string
		status int
		says   string
	}{
		{[]string{"-h"}, done, "retighten [kN]"},
		{[]string{"-help"}, done, "stress_coefficient_per_MPa"},
		{[]string{"-x"}, refused, "-h"},
		{[]string{"file.csv"}, refused, "file.csv"},
		{[]string{"-tolerance", "0"}, refused, "-tolerance is 0"},
		{[]string{"-tolerance", "NaN"}, refused, "-tolerance is NaN"},
		{[]string{"-every", "-1"}, refused, "-every is -1"},
		{[]string{"-every", "1"}, refused, "longer hours"},
		{[]string{"-joint", "not-there.json"}, refused, "not-there.json"},
		{[]string{"-history", "not-there.csv"}, refused, "not-there.csv"},
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

// The printed table of a case with a closed form, column by column, as an engineer would check it by hand.
func TestPrintedTable(t *testing.T) {
	folder := t.TempDir()
	jointPath, historyPath := filepath.Join(folder, "joint.json"), filepath.Join(folder, "history.csv")
	require.NoError(t, os.WriteFile(jointPath, []byte(followUpJoint), 0o666))
	require.NoError(t, os.WriteFile(historyPath, []byte(hold(1000)), 0o666))
	var out, err bytes.Buffer
	require.Equal(t, done, command([]string{"-joint", jointPath, "-history", historyPath, "-every", "100"}, &out, &err), err.String())
	rows := regexp.MustCompile(`(?m)^ +(\d[\d ]*)  +527  +527  +(\d+)  +([\d.]+)  +([\d.]+)  +([\d.]+)(.*)$`).
		FindAllStringSubmatch(out.String(), -1)
	require.Len(t, rows, 12, "11 hundreds of hours and the fall under 100 kN in\n%s", out.String())
	for _, row := range rows {
		number := func(i int) float64 {
			x, err := strconv.ParseFloat(strings.ReplaceAll(row[i], " ", ""), 64)
			require.NoError(t, err)
			return x
		}
		stress := relaxed(200, 5, 150e3/1.25*1e-16, number(1))
		if strings.Contains(row[6], "falls under") {
			stress = 100
			check.Abs(t, "hour of the fall", number(1), (math.Pow(100, -4)-math.Pow(200, -4))/(4*1.2e5*1e-16), 0.6) // 195.3, rounded
		}
		// Half a unit of the last printed digit, and the error of the run, 0.01 MPa.
		check.Abs(t, "clamp load", number(2), stress, 0.51)
		check.Abs(t, "percent", number(3), stress/2, 0.06)
		check.Abs(t, "stress", number(4), stress, 0.06)
		check.Abs(t, "creep strain", number(5), 100*(200-stress)*1.25/150e3, 1e-4)
	}
	assert.Contains(t, out.String(), "Z = 1.250")
	assert.Contains(t, out.String(), "governing code")
	assert.FileExists(t, filepath.Join(folder, "out", "bolt.png"), "pictures go beside the joint file")
}

func TestPictures(t *testing.T) {
	folder := filepath.Join(t.TempDir(), "new", "folder")
	var out, err bytes.Buffer
	require.Equal(t, done, command([]string{"-out", folder}, &out, &err), err.String())
	f, e := os.Open(filepath.Join(folder, "bolt.png"))
	require.NoError(t, e)
	defer f.Close()
	picture, e := png.Decode(f)
	require.NoError(t, e)
	bounds := picture.Bounds()
	assert.True(t, bounds.Dx() > 1000 && bounds.Dy() > 800, "%v", bounds)
	seen := map[[3]uint32]int{}
	for y := bounds.Min.Y; y < bounds.Max.Y; y++ {
		for x := bounds.Min.X; x < bounds.Max.X; x++ {
			r, g, b, _ := picture.At(x, y).RGBA()
			seen[[3]uint32{r >> 8, g >> 8, b >> 8}]++
		}
	}
	for name, c := range map[string][3]uint32{"curve": {0, 114, 178}, "required": {213, 94, 0}, "second section": {0, 158, 115},
		"without retightening": {140, 140, 140}} {
		assert.Greater(t, seen[c], 300, "pixels of the %s", name)
	}
	text, e := os.ReadFile(filepath.Join(folder, "bolt.svg"))
	require.NoError(t, e)
	for _, words := range []string{"Clamp load [kN]", "Creep strain of the bolts [%]", "Time [h]", "required, 6 200 kN", "24 000", "invented"} {
		assert.Contains(t, string(text), words)
	}
	d := xml.NewDecoder(bytes.NewReader(text))
	for {
		if _, e := d.Token(); e == io.EOF {
			break
		} else if e != nil {
			t.Fatalf("the SVG is not XML: %v", e)
		}
	}
}

// A folder that cannot be made is told, after the table.
func TestPictureThatCannotBeWritten(t *testing.T) {
	file := filepath.Join(t.TempDir(), "file")
	require.NoError(t, os.WriteFile(file, nil, 0o666))
	var out, err bytes.Buffer
	assert.Equal(t, failed, command([]string{"-out", filepath.Join(file, "out")}, &out, &err))
	assert.Contains(t, err.String(), "the picture was not drawn")
	assert.Contains(t, out.String(), "clamp load raised")
}

func TestTicks(t *testing.T) {
	labels := func(low, high float64) (list []string) {
		for _, tick := range (ticks{most: 8}).Ticks(low, high) {
			list = append(list, tick.Label)
		}
		return list
	}
	assert.Equal(t, []string{"0", "4 000", "8 000", "12 000", "16 000", "20 000", "24 000"}, labels(0, 24000))
	assert.Equal(t, []string{"0.00", "0.04", "0.08", "0.12", "0.16", "0.20", "0.24", "0.28"}, labels(0, 0.3))
	assert.Equal(t, []string{"0", "1", "2", "3", "4", "5", "6", "7", "8"}, labels(0, 8))
	assert.NotEmpty(t, labels(-3, 9))
	for _, high := range []float64{0, 5e-324, 1e308, math.Inf(1), math.NaN()} {
		assert.LessOrEqual(t, len(labels(0, high)), 12, "%v", high)
	}
	assert.Equal(t, "-1 234.5", grouped(-1234.5, 1))
	assert.Equal(t, "0.0", grouped(-0.01, 1))
	assert.Equal(t, "123", grouped(123.4, 0))
	assert.Equal(t, "1 000", grouped(999.6, 0))
}
