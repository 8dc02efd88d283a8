package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/commandline"
)

// broken is one slip in an otherwise good file. The message has to name the file, the line and the column, which is where
// the text at stands.
type broken struct {
	name     string
	old, new string // the slip; an empty old makes new the whole file
	where    string // line:column
	at       string // what stands there; empty for the end of the file
	says     string
}

var brokenJoints = []broken{
	{"empty file", "", "", "1:1", "", "ends too early"},
	{"not JSON", "", "clamp = 3", "1:1", "clamp", "not JSON"},
	{"a list", "", "[1]", "1:1", "[1]", "must be an object"},
	{"cut short", "", "{\n \"title\": \"x\",\n \"preload_kN\": 3", "3:17", "", "ends too early"},
	{"open text", "", "{\n \"title\": \"x", "2:11", "\"x", "no closing quotation mark"},
	{"comma missing", "10800,", "10800", "9:3", `"required_kN"`, "not JSON"},
	{"comma too many", `"poisson": 0.3,`, `"poisson": 0.3,,`, "21:20", ",\n", "not JSON"},
	{"colon missing", `"count": 24`, `"count" 24`, "11:13", "24", "not JSON"},
	{"something behind", `"gasket": {"stiffness_per_bolt_kN_per_mm": 16000}` + "\n}", `"gasket": {"stiffness_per_bolt_kN_per_mm": 16000}` + "\n}\n}",
		"63:1", "}", "after the end"},
	{"field twice", `"preload_kN": 10800`, `"preload_kN": 1, "preload_kN": 10800`, "8:20", `"preload_kN": 10800`, "given twice"},
	{"unknown field", `"required_kN"`, `"seating_kN"`, "9:3", `"seating_kN"`, `no field "seating_kN"`},
	{"unknown field inside", `"length_mm": 80`, `"lenght_mm": 80`, "15:31", `"lenght_mm"`, "bolts.sections[1] has no field"},
	{"field missing", `"count": 24,`, ``, "10:12", "{", `bolts: the field "count" is missing`},
	{"text for a number", "10800", `"10800"`, "8:17", `"10800"`, "preload_kN must be a number"},
	{"number for a text", `"waisted shank"`, "7", "14:16", "7", "sections[0].name must be a text"},
	{"null", "24", "null", "11:14", "null", "bolts.count must be a number, not null"},
	{"number out of range", "10800", "1e999", "8:17", "1e999", "outside the range"},
	{"negative preload", "10800", "-10800", "8:17", "-10800", "preload_kN is -10800, must be above 0"},
	{"required above preload", `: 6200`, `: 62000`, "9:18", "62000", "must be below preload_kN"},
	{"half a bolt", `"count": 24`, `"count": 24.5`, "11:14", "24.5", "whole number"},
	{"no section", `[
      {"name": "waisted shank", "length_mm": 220, "area_mm2": 1520},
      {"name": "free thread", "length_mm": 80, "area_mm2": 1900}
    ]`, "[]", "13:17", "[]", "bolts.sections is empty"},
	{"zero area", `"area_mm2": 1900`, `"area_mm2": 0`, "15:60", "0}", "area_mm2 is 0, must be above 0"},
	{"modulus in Pa", "[212e3,", "[212e9,", "19:17", "212e9", "young_MPa.value[0] is 212e9, must be between"},
	{"Poisson's ratio", `"poisson": 0.3`, `"poisson": 0.5`, "21:16", "0.5", "below 0.5"},
	{"expansion in 1e-6", "[11.1e-6,", "[11.1,", "24:17", "11.1", "12e-6 and not 12"},
	{"table not ascending", "[20, 100, 200, 300, 400, 500, 550, 600]", "[20, 100, 100, 300, 400, 500, 550, 600]", "18:34", "100",
		"temperature_C[2] is 100, must be above"},
	{"table uneven", "169e3, 162e3]", "169e3]", "17:18", "{", "8 temperatures and 7 values"},
	{"colder than cold", `"expansion_reference_C": 20`, `"expansion_reference_C": -300`, "7:28", "-300", "degrees Celsius"},
	{"two units", `"expansion_reference_C": 20`, `"expansion_reference_C": 20, "expansion_reference_K": 293`, "7:57", "293", "not both"},
	{"unknown law", `"kind": "norton"`, `"kind": "nortn"`, "46:27", `"nortn"`, "garofalo, norton, strain-hardening, sum"},
	{"parameter of another law", `"rate_per_h": 2.0e-9`, `"time_h": 3`, "46:37", `"time_h"`, "has no field"},
	{"exponent", `"stress_exponent": 5.5`, `"stress_exponent": -5.5`, "46:97", "-5.5", "stress exponent is -5.5"},
	{"time exponent", `"time_exponent": 0.4`, `"time_exponent": 1.4`, "39:30", "1.4", "time exponent is 1.4"},
	{"activation energy", "330e3", "-330e3", "44:42", "-330e3", "activation energy is -330000"},
	{"sum of nothing", "", `{"title": "x", "expansion_reference_C": 20, "preload_kN": 2, "required_kN": 1, "flange": {},
"bolts": {"count": 1, "thread_pitch_mm": 1, "sections": [{"name": "a", "length_mm": 1, "area_mm2": 1}],
"young_MPa": 2e5, "poisson": 0.3, "expansion_per_K": 0, "law": {"kind": "sum", "laws": []}}}`, "3:88", "[]", "laws is empty"},
	{"too deep", "", strings.Repeat("[", 60) + strings.Repeat("]", 60), "1:52", "[", "levels deep"},
}

var brokenHistories = []broken{
	{"empty file", "", "", "1:1", "", "no header"},
	{"comments only", "", "# nothing\n", "2:1", "", "no header"},
	{"no rows", "", "time [h], bolt [C], flange [C]\n", "2:1", "", "0 rows"},
	{"semicolons", "", "time [h]; bolt [C]; flange [C]\n0;1;2\n", "1:1", "time", "not semicolons"},
	{"unknown column", "retighten [kN]", "load [kN]", "2:35", "load", `no column is called "load"`},
	{"column twice", "flange [°C]", "bolt [°C]", "2:22", "bolt", "given twice"},
	{"column missing", "", "time [h], bolt [K]\n0,1\n", "1:1", "time", `column "flange" is missing`},
	{"no unit", "time [h]", "time", "2:1", "time", "needs a unit"},
	{"unknown unit", "bolt [°C]", "bolt [°F]", "2:11", "bolt", `it has "°F"`},
	{"unit of a text", "remark", "remark [h]", "2:51", "remark", "needs a unit it can have"},
	{"cell missing", "24,       515, 522,       , steady service", "24,       515", "6:11", "515", "2 cells, the header has 5"},
	{"cell too many", "assembled cold", "assembled, cold", "3:40", "cold", "6 cells, the header has 5"},
	{"decimal comma", "480, 505,       ,\n24", "480,5, 505,       ,\n24", "5:30", "\n", "6 cells"},
	{"word for a number", "190, 225,       , warming up: ", "hot, 225,       , warming up: ", "4:11", "hot", `bolt: "hot" is not a number`},
	{"NaN", "24,       515, 522", "24,       515, NaN", "6:16", "NaN", `flange: "NaN" is not a number`},
	{"infinite", "24000,", "1e999,", "19:1", "1e999", "is not a number"},
	{"negative time", "0,         20", "-1,         20", "3:1", "-1", "not between"},
	{"time in seconds", "24000,", "86400000,", "19:1", "86400000", "not between 0 and 1e+07 h"},
	{"time goes back", "7990,", "23,", "7:1", "23", "not after the row before"},
	{"time stands still", "8014,", "7990,", "8:1", "7990", "not after the row before"},
	{"below absolute zero", "8014,      20,  20", "8014,      20, -400", "8:16", "-400", "flange: -400 °C is not above 0"},
	{"negative load", "20,  20,  10800,\n8084", "20,  20, -10800,\n8084", "9:21", "-10800", "not above 0"},
	{"retightened at once", "0,         20,  20,       ,", "0,         20,  20,  10000,", "3:22", "10000", "first row is the assembly"},
	{"open quotation", "assembled cold", `"assembled`, "3:1", "0, ", "not closed"},
	{"quotation inside", "assembled cold", `assembled "cold"`, "3:39", `"cold"`, "not CSV"},
	{"hotter than the tables", "15990,    515, 522", "15990,    615, 522", "13:11", "615", "615 °C is outside the table bolts.young_MPa of bolt.json"},
	{"flange hotter", "15990,    515, 522", "15990,    515, 622", "13:16", "622", "flange.stiffness_per_bolt_kN_per_mm"},
	{"load in N", "20,  20,  10800,\n8084", "20,  20,  10800000,\n8084", "9:22", "10800000", "elastic strain"},
}

// apply makes the slip.
func (b broken) apply(t *testing.T, good []byte) []byte {
	if b.old == "" {
		return []byte(b.new)
	}
	require.Equal(t, 1, bytes.Count(good, []byte(b.old)), "%s: the slip must be made in one place", b.name)
	return bytes.Replace(good, []byte(b.old), []byte(b.new), 1)
}

func TestBrokenFilesAreToldByLineAndColumn(t *testing.T) {
	for file, list := range map[string][]broken{"bolt.json": brokenJoints, "history.csv": brokenHistories} {
		for _, b := range list {
			t.Run(file+"/"+b.name, func(t *testing.T) {
				folder := t.TempDir()
				files := map[string][]byte{"bolt.json": defaultJoint, "history.csv": defaultHistory}
				files[file] = b.apply(t, files[file])
				for name, text := range files {
					require.NoError(t, os.WriteFile(filepath.Join(folder, name), text, 0o666))
				}
				var out, err bytes.Buffer
				status := command([]string{"-joint", filepath.Join(folder, "bolt.json"), "-history",
					filepath.Join(folder, "history.csv")}, &out, &err)
				message := strings.ReplaceAll(err.String(), folder+string(filepath.Separator), "")
				assert.Equal(t, commandline.Refused, status)
				assert.Empty(t, out.String())
				assert.True(t, strings.HasPrefix(message, file+":"+b.where+": "), "the message is %q, want it to begin with %s:%s",
					message, file, b.where)
				assert.Contains(t, message, b.says)
				assert.Equal(t, 1, strings.Count(message, "\n"), "one line: %q", message)
				checkPointsAt(t, files[file], b)
			})
		}
	}
}

// checkPointsAt holds the table itself against the file: the text must stand at the place the table claims.
func checkPointsAt(t *testing.T, text []byte, b broken) {
	line, column := 1, 1
	rest := []rune(string(text))
	for len(rest) > 0 && pair(line, column) != b.where {
		if rest[0] == '\n' {
			line, column = line+1, 0
		}
		column++
		rest = rest[1:]
	}
	require.Equal(t, b.where, pair(line, column), "no such place in the file")
	if b.at == "" {
		assert.Empty(t, strings.TrimSpace(string(rest)))
	}
	assert.True(t, strings.HasPrefix(string(rest), b.at), "%q stands there", string(rest[:min(len(rest), 20)]))
}

func pair(line, column int) string {
	return strconv.Itoa(line) + ":" + strconv.Itoa(column)
}
