package main

import (
	"bytes"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/examples/commandline"
	"example.com/holdtime/examples/commandline/commandtest"
	"example.com/holdtime/examples/figure/figuretest"
)

func TestFlags(t *testing.T) {
	commandtest.Helps(t, command, "retighten [kN]", "stress_coefficient_per_MPa")
	commandtest.Refuses(t, command, [][2]string{
		{"-x", "-h"},
		{"file.csv", "file.csv"},
		{"-tolerance 0", "-tolerance is 0"},
		{"-tolerance NaN", "-tolerance is NaN"},
		{"-every -1", "-every is -1"},
		{"-every 1", "longer hours"},
		{"-joint not-there.json", "not-there.json"},
		{"-history not-there.csv", "not-there.csv"},
	})
}

// The printed table of a case with a closed form, column by column, as an engineer would check it by hand.
func TestPrintedTable(t *testing.T) {
	folder := t.TempDir()
	jointPath, historyPath := filepath.Join(folder, "joint.json"), filepath.Join(folder, "history.csv")
	require.NoError(t, os.WriteFile(jointPath, []byte(followUpJoint), 0o666))
	require.NoError(t, os.WriteFile(historyPath, []byte(hold(1000)), 0o666))
	var out, err bytes.Buffer
	require.Equal(t, commandline.Done, command([]string{"-joint", jointPath, "-history", historyPath, "-every", "100"}, &out, &err), err.String())
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
	require.Equal(t, commandline.Done, command([]string{"-out", folder}, &out, &err), err.String())
	picture := figuretest.PNG(t, filepath.Join(folder, "bolt.png"), 1000, 800)
	bounds := picture.Bounds()
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
	figuretest.SVG(t, filepath.Join(folder, "bolt.svg"), "Clamp load [kN]", "Creep strain of the bolts [%]", "Time [h]",
		"required, 6 200 kN", "24 000", "invented")
}

// A folder that cannot be made is told, after the table.
func TestPictureThatCannotBeWritten(t *testing.T) {
	commandtest.FolderThatCannotBeMade(t, command, nil, "the picture was not drawn", "clamp load raised")
}
