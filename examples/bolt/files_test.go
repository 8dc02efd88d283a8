package main

import (
	"errors"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/position"
)

// Both built-in files read, and mean what they say.
func TestBuiltInFiles(t *testing.T) {
	j := mustJoint(t, string(defaultJoint))
	assert.Equal(t, 24, j.count)
	assert.Equal(t, 10.8e6, j.preload)
	assert.Equal(t, 6.2e6, j.required)
	assert.Equal(t, []section{{"waisted shank", 220, 1520}, {"free thread", 80, 1900}}, j.sections)
	assert.Contains(t, j.title, "invented")
	h := mustHistory(t, string(defaultHistory))
	require.Len(t, h.rows, 17)
	assert.Equal(t, []int{6, 12}, h.retightenings())
	assert.Equal(t, 7990.0, h.rows[4].time)
	assert.Equal(t, 515+icePoint, h.rows[4].bolt)
	assert.Equal(t, 522+icePoint, h.rows[4].flange)
	assert.Equal(t, "shut-down begins", h.rows[4].remark)
}

// The same history in other units, another order of columns, with quotation marks, Windows line ends and a byte order mark.
func TestHistoryInOtherUnits(t *testing.T) {
	plain := mustHistory(t, "time [h],bolt [°C],flange [°C],retighten [kN],remark\n0,20,30,,a\n48,520,530,75,\"b, c\"\n")
	other := mustHistory(t, "\uFEFF# comment\r\nRemark, flange [K],Bolt [C] , TIME [d],retighten [kN]\r\n\r\na, 303.15,20,0,\r\n"+
		"\"b, c\",803.15,520,2,75\r\n")
	for i := range plain.rows {
		plain.rows[i].where, other.rows[i].where = nil, nil
	}
	assert.Equal(t, plain.rows, other.rows)
	share := mustHistory(t, "time [h],bolt [K],flange [K],retighten [%]\n0,300,300,\n1,300,300,75\n")
	assert.Equal(t, 150.0, share.rows[1].retighten.load(200))
}

// A joint whose temperatures are in kelvin is the same joint.
func TestJointInKelvin(t *testing.T) {
	kelvin := strings.NewReplacer(
		`"expansion_reference_C": 20`, `"expansion_reference_K": 293.15`,
		`"temperature_C": [20, 600]`, `"temperature_K": [293.15, 873.15]`).Replace(elasticJoint)
	require.NotContains(t, kelvin, "_C")
	h := mustHistory(t, "time [h],bolt [C],flange [°C]\n0,20,20\n9,480,500\n")
	a := mustRun(t, mustJoint(t, elasticJoint), h, settings{tolerance: 1e-4, only: -1}).last()
	b := mustRun(t, mustJoint(t, kelvin), h, settings{tolerance: 1e-4, only: -1}).last()
	assert.Equal(t, a.load, b.load)
}

// positioned reports whether an error names a line and a column that the text has.
func positioned(err error, src *position.Source) bool {
	var e *position.Error
	if !errors.As(err, &e) || e.File != src.Name || e.Text == "" {
		return false
	}
	lines := strings.Split(string(src.Text), "\n")
	return e.Line >= 1 && e.Line <= len(lines) && e.Column >= 1 && e.Column <= len([]rune(lines[e.Line-1]))+1
}

func FuzzJoint(f *testing.F) {
	f.Add(defaultJoint)
	f.Add([]byte(followUpJoint))
	f.Add([]byte(elasticJoint))
	for _, b := range brokenJoints {
		if b.old == "" {
			f.Add([]byte(b.new))
		}
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		src := position.NewSource("joint.json", text)
		j, err := readJoint(src)
		switch {
		case err != nil && !positioned(err, src):
			t.Errorf("no position in the file: %v", err)
		case err == nil && !(j.count >= 1 && len(j.sections) >= 1 && j.bolt != nil && j.length() > 0 && j.required > 0 &&
			j.required < j.preload && j.pitch > 0 && j.flange.gasket > 0):
			t.Errorf("accepted %+v", j)
		}
	})
}

func FuzzHistory(f *testing.F) {
	f.Add(defaultHistory)
	f.Add([]byte(hold(1000)))
	f.Add([]byte("# x\r\ntime [d],bolt [K],flange [C],retighten [%],remark\r\n0,300,20,,\"a\"\"b\"\r\n"))
	for _, b := range brokenHistories {
		if b.old == "" {
			f.Add([]byte(b.new))
		}
	}
	j, err := readJoint(position.NewSource("joint.json", defaultJoint))
	if err != nil {
		f.Fatal(err)
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		src := position.NewSource("history.csv", text)
		h, err := readHistory(src)
		if err == nil {
			for i, w := range h.rows {
				if !(w.time >= 0 && w.bolt > 0 && w.flange > 0 && w.retighten.amount >= 0) || i > 0 && !(w.time > h.rows[i-1].time) {
					t.Errorf("accepted row %d: %+v", i, w)
				}
			}
			err = match(j, h, src, "joint.json")
		}
		if err != nil && !positioned(err, src) {
			t.Errorf("no position in the file: %v", err)
		}
	})
}
