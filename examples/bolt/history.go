package main

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

	"example.com/holdtime/examples/position"
)

// history is what the joint goes through: rows in the order of time, temperatures linear in time between them.
type history struct {
	rows []row
}

// row is one line of the history file.
type row struct {
	time         float64 // [h]
	bolt, flange float64 // [K]
	retighten    target
	remark       string
	where        map[string]position.Place // of each cell, for faults found later
}

// target is the clamp load of the joint that a retightening restores.
type target struct {
	amount float64 // [N], or a share of the preload; 0 for no retightening
	share  bool
}

func (t target) wanted() bool { return t.amount > 0 }

func (t target) load(preload float64) float64 {
	if t.share {
		return t.amount * preload
	}
	return t.amount
}

// at returns the temperatures at a time between rows i and i+1.
func (h *history) at(i int, time float64) (bolt, flange float64) {
	a, b := &h.rows[i], &h.rows[i+1]
	x := (time - a.time) / (b.time - a.time)
	if x >= 1 {
		return b.bolt, b.flange
	}
	return a.bolt + x*(b.bolt-a.bolt), a.flange + x*(b.flange-a.flange)
}

func (h *history) start() float64 { return h.rows[0].time }
func (h *history) end() float64   { return h.rows[len(h.rows)-1].time }

// retightenings lists the rows with one.
func (h *history) retightenings() []int {
	var list []int
	for i := range h.rows {
		if h.rows[i].retighten.wanted() {
			list = append(list, i)
		}
	}
	return list
}

// unit turns the number of a cell into the program's units: add, then multiply.
type unit struct{ add, multiply float64 }

// column is a kind of column with the units it may be in.
type column struct {
	units    map[string]unit // nil for text
	required bool
}

var columns = map[string]column{
	"time":      {map[string]unit{"h": {0, 1}, "d": {0, 24}}, true},
	"bolt":      {temperatureUnits, true},
	"flange":    {temperatureUnits, true},
	"retighten": {map[string]unit{"kN": {0, newtonPerKilonewton}, "%": {0, 0.01}}, false},
	"remark":    {nil, false},
}

var temperatureUnits = map[string]unit{"°C": {icePoint, 1}, "C": {icePoint, 1}, "K": {0, 1}}

const columnsWanted = "time [h], bolt [°C], flange [°C], retighten [kN], remark"

// header is what the first line declared, column by column.
type header struct {
	name []string
	unit []string
}

// readHistory reads the history file. Its faults are of type *position.Error.
func readHistory(src *position.Source) (*history, error) {
	r := &historyReader{src: src, csv: csv.NewReader(bytes.NewReader(src.Text)), lines: lineStarts(src.Text)}
	r.csv.Comment, r.csv.FieldsPerRecord, r.csv.TrimLeadingSpace = '#', -1, true
	cells, err := r.next()
	if err == io.EOF {
		return nil, src.Fault(len(src.Text), "no header; expected the columns %s", columnsWanted)
	}
	if err != nil {
		return nil, err
	}
	if err := r.readHeader(cells); err != nil {
		return nil, err
	}
	h := &history{}
	for {
		cells, err := r.next()
		if err == io.EOF {
			break
		}
		if err != nil {
			return nil, err
		}
		next, err := r.readRow(cells, h)
		if err != nil {
			return nil, err
		}
		h.rows = append(h.rows, next)
	}
	if len(h.rows) < 2 {
		return nil, src.Fault(len(src.Text), "the history has %d rows, must have at least 2", len(h.rows))
	}
	return h, nil
}

type historyReader struct {
	src   *position.Source
	csv   *csv.Reader
	lines []int // byte offset of each line
	header
}

func lineStarts(text []byte) []int {
	starts := []int{0}
	for i, b := range text {
		if b == '\n' {
			starts = append(starts, i+1)
		}
	}
	return starts
}

// next returns the cells of the next line that is neither blank nor a comment, io.EOF after the last.
func (r *historyReader) next() ([]string, error) {
	cells, err := r.csv.Read()
	var wrong *csv.ParseError
	if errors.As(err, &wrong) {
		if wrong.StartLine < wrong.Line {
			return nil, r.src.FaultAt(position.Place{Line: wrong.StartLine, Column: 1}, "a quotation mark opened in this line is not closed")
		}
		return nil, r.src.FaultAt(r.characters(wrong.Line, wrong.Column), "not CSV: %v", wrong.Err)
	}
	return cells, err
}

// characters turns the reader's byte column into a column of characters, no further than the end of the line: the reader
// also counts what it looked for behind it.
func (r *historyReader) characters(line, column int) position.Place {
	text := r.src.Text[r.lines[min(line, len(r.lines))-1]:]
	if end := bytes.IndexByte(text, '\n'); end >= 0 {
		text = text[:end]
	}
	return position.Place{Line: line, Column: 1 + utf8.RuneCount(text[:min(column-1, len(text))])}
}

func (r *historyReader) place(i int) position.Place { return r.characters(r.csv.FieldPos(i)) }

func (r *historyReader) readHeader(cells []string) error {
	for i, cell := range cells {
		name, rest, bracketed := strings.Cut(cell, "[")
		name = strings.ToLower(strings.TrimSpace(name))
		unit := strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(rest), "]"))
		kind, known := columns[name]
		if strings.Contains(cell, ";") {
			return r.src.FaultAt(r.place(i), "the columns must be separated by commas, not semicolons")
		}
		if !known {
			return r.src.FaultAt(r.place(i), "no column is called %q; expected %s", name, columnsWanted)
		}
		if slices.Contains(r.name, name) {
			return r.src.FaultAt(r.place(i), "the column %q is given twice", name)
		}
		if _, ok := kind.units[unit]; !ok && kind.units != nil || bracketed && kind.units == nil {
			return r.src.FaultAt(r.place(i), "the column %q needs a unit it can have, as in %s; it has %q", name, columnsWanted,
				unit)
		}
		r.name, r.unit = append(r.name, name), append(r.unit, unit)
	}
	for _, name := range []string{"time", "bolt", "flange"} {
		if !slices.Contains(r.name, name) {
			return r.src.FaultAt(r.place(0), "the column %q is missing; expected %s", name, columnsWanted)
		}
	}
	return nil
}

func (r *historyReader) readRow(cells []string, h *history) (row, error) {
	if len(cells) != len(r.name) {
		return row{}, r.src.FaultAt(r.place(min(len(cells), len(r.name)+1)-1), "%d cells, the header has %d columns; "+
			"cells are separated by commas, decimals by points", len(cells), len(r.name))
	}
	next := row{where: make(map[string]position.Place, len(cells))}
	for i, cell := range cells {
		cell = strings.TrimSpace(cell)
		next.where[r.name[i]] = r.place(i)
		if err := next.set(r.name[i], r.unit[i], cell); err != nil {
			return row{}, r.src.FaultAt(r.place(i), "%s: %v", r.name[i], err)
		}
	}
	if n := len(h.rows); n > 0 && !(next.time > h.rows[n-1].time) {
		return row{}, r.src.FaultAt(next.where["time"], "time: %v h is not after the row before, %v h", next.time,
			h.rows[n-1].time)
	}
	if len(h.rows) == 0 && next.retighten.wanted() {
		return row{}, r.src.FaultAt(next.where["retighten"],
			"retighten: the first row is the assembly, which is tightened to the preload of the joint file")
	}
	return next, nil
}

// latest is the longest history in hours: 1100 years, so that a time in seconds is noticed.
const latest = 1e7

func (w *row) set(name, unit, cell string) error {
	if name == "remark" {
		w.remark = cell
		return nil
	}
	if name == "retighten" && cell == "" {
		return nil
	}
	x, err := strconv.ParseFloat(cell, 64)
	if err != nil || x-x != 0 { // not a number, NaN or infinite
		return fmt.Errorf("%q is not a number", cell)
	}
	u := columns[name].units[unit]
	y := (x + u.add) * u.multiply
	switch name {
	case "time":
		w.time = y
		if !(y >= 0 && y <= latest) {
			return fmt.Errorf("%v %s is not between 0 and %v h", x, unit, latest)
		}
	case "bolt", "flange":
		if !kelvinLimit.holds(y) {
			return fmt.Errorf("%v %s is not %s", x, unit, kelvinLimit.want)
		}
		if name == "bolt" {
			w.bolt = y
		} else {
			w.flange = y
		}
	case "retighten":
		w.retighten = target{y, unit == "%"}
		if !(y > 0) || math.IsInf(y, 1) {
			return fmt.Errorf("%v %s is not above 0; leave the cell empty for no retightening", x, unit)
		}
	}
	return nil
}

// match holds the history against the joint: every temperature must be covered by the tables, every load be one that bolts
// can carry without leaving small strains.
func match(j *joint, h *history, src *position.Source, jointName string) error {
	for i := range h.rows {
		w := &h.rows[i]
		bolt, flange := j.untabulated(w.bolt, w.flange)
		if bolt != "" {
			return src.FaultAt(w.where["bolt"], "bolt: %.6g °C is outside the table %s of %s", w.bolt-icePoint, bolt, jointName)
		}
		if flange != "" {
			return src.FaultAt(w.where["flange"], "flange: %.6g °C is outside the table %s of %s", w.flange-icePoint, flange,
				jointName)
		}
		load, cell := j.preload, "bolt" // the assembly is judged in the first row
		if w.retighten.wanted() {
			load, cell = w.retighten.load(j.preload), "retighten"
		} else if i > 0 {
			continue
		}
		if stress, name, over := j.overstressed(load, w.bolt); over {
			return src.FaultAt(w.where[cell], "a clamp load of %.6g kN makes %.4g MPa in the section %q: more than %v of elastic "+
				"strain", load/newtonPerKilonewton, stress, name, largestElasticStrain)
		}
	}
	return nil
}
