package main

import (
	"errors"
	"fmt"
	"math"

	"example.com/holdtime/examples/jsontree"
	"example.com/holdtime/examples/position"
	"example.com/holdtime/integrate"
)

// Bounds that catch a slip of units rather than an unusual bolt.
var (
	youngLimit     = limit{1e3, 2e6, false, "between 1e3 and 2e6 (MPa)"}
	poissonLimit   = limit{-1, math.Nextafter(0.5, 0), true, "above -1 and below 0.5"}
	expansionLimit = limit{-1e-3, 1e-3, false, "between -1e-3 and 1e-3 (per kelvin, so 12e-6 and not 12)"}
	lengthLimit    = limit{0, 1e5, true, "above 0 and at most 1e5 (mm)"}
	areaLimit      = limit{0, 1e7, true, "above 0 and at most 1e7 (mm²)"}
	stiffnessLimit = limit{0, 1e9, true, "above 0 and at most 1e9 (kN/mm)"}
	loadLimit      = limit{0, 1e9, true, "above 0 and at most 1e9 (kN)"}
	countLimit     = limit{1, 1e4, false, "a whole number from 1 to 10000"}
)

const newtonPerKilonewton = 1000

// readJoint reads the joint file. Its faults are of type *position.Error.
func readJoint(src *position.Source) (*joint, error) {
	root, err := jsontree.Read(src)
	if err != nil {
		return nil, err
	}
	r := &reading{src: src}
	o := r.object(root, wholeFile, "title", "remarks", "expansion_reference_C", "expansion_reference_K", "preload_kN",
		"required_kN", "bolts", "flange", "gasket")
	j := &joint{title: o.text("title", false)}
	o.remarks()
	reference := o.temperature("expansion_reference")
	j.preload = o.number("preload_kN", loadLimit) * newtonPerKilonewton
	j.required = o.number("required_kN", loadLimit) * newtonPerKilonewton
	j.readBolts(r, o.must("bolts"), reference)
	j.readFlange(r, o.must("flange"), reference)
	j.flange.gasket = math.Inf(1)
	if n := o.find("gasket"); n != nil {
		g := r.object(n, "gasket", "stiffness_per_bolt_kN_per_mm")
		j.flange.gasket = g.number("stiffness_per_bolt_kN_per_mm", stiffnessLimit) * newtonPerKilonewton
	}
	if r.err == nil && !(j.required < j.preload) {
		r.fault(o.find("required_kN").Offset, "required_kN is %v, must be below preload_kN, %v",
			j.required/newtonPerKilonewton, j.preload/newtonPerKilonewton)
	}
	if r.err != nil {
		return nil, r.err
	}
	return j, nil
}

// remarks checks that free text, which nothing reads, is text.
func (o object) remarks() {
	if o.find("remarks") == nil {
		return
	}
	for i, n := range o.list("remarks") {
		if n.Kind != jsontree.Text {
			o.fault(n.Offset, "remarks[%d] must be %s, not %s", i, jsontree.Text, n.Kind)
		}
	}
}

func (j *joint) readBolts(r *reading, n *jsontree.Node, reference float64) {
	o := r.object(n, "bolts", "count", "thread_pitch_mm", "sections", "young_MPa", "poisson", "expansion_per_K", "law")
	count := o.number("count", countLimit)
	if j.count = int(count); r.err == nil && float64(j.count) != count {
		r.fault(o.find("count").Offset, "bolts.count is %v, must be %s", count, countLimit.want)
	}
	j.pitch = o.number("thread_pitch_mm", lengthLimit)
	for i, item := range o.list("sections") {
		s := r.object(item, fmt.Sprintf("bolts.sections[%d]", i), "name", "length_mm", "area_mm2")
		j.sections = append(j.sections, section{s.text("name", false), s.number("length_mm", lengthLimit),
			s.number("area_mm2", areaLimit)})
	}
	j.young = o.property("young_MPa", youngLimit, 1)
	j.poisson = o.property("poisson", poissonLimit, 1)
	j.growth = integrate.Expansion{Mean: o.property("expansion_per_K", expansionLimit, 1), Reference: reference}
	law := readLaw(r, o.must("law"), "bolts.law")
	if r.err != nil {
		return
	}
	var err error
	j.bolt, err = integrate.New(integrate.Isotropic{Young: j.young, Poisson: j.poisson}, law,
		integrate.Options{Expansion: j.growth})
	if err != nil { // everything has been checked above, so this names the whole
		r.fault(n.Offset, "bolts: %v", err)
	}
}

func (j *joint) readFlange(r *reading, n *jsontree.Node, reference float64) {
	o := r.object(n, "flange", "stiffness_per_bolt_kN_per_mm", "expansion_per_K")
	j.flange.stiffness = o.property("stiffness_per_bolt_kN_per_mm", stiffnessLimit, newtonPerKilonewton)
	j.flange.growth = integrate.Expansion{Mean: o.property("expansion_per_K", expansionLimit, 1), Reference: reference}
}

// property reads a constant, or a table {"temperature_C": […], "value": […]}, and multiplies it by scale.
func (o object) property(name string, l limit, scale float64) integrate.Table {
	n := o.must(name)
	if n == nil {
		return integrate.Table{}
	}
	path := o.path + "." + name
	if n.Kind != jsontree.Object {
		return integrate.Constant(o.value(n, path, l) * scale)
	}
	t := o.object(n, path, "temperature_C", "temperature_K", "value")
	axis, shift, tl := "temperature_C", icePoint, celsiusLimit
	if t.find("temperature_K") != nil {
		axis, shift, tl = "temperature_K", 0, kelvinLimit
		if c := t.find("temperature_C"); c != nil {
			o.fault(c.Offset, "%s: give temperature_C or temperature_K, not both", path)
		}
	}
	at, temperatures := t.numbers(axis, tl)
	_, values := t.numbers("value", l)
	for i := range temperatures {
		temperatures[i] += shift
	}
	for i := range values {
		values[i] *= scale
	}
	if o.err != nil {
		return integrate.Table{}
	}
	if len(at) != len(values) || len(at) < 2 {
		o.fault(n.Offset, "%s has %d temperatures and %d values, must have as many of both, at least two", path, len(at),
			len(values))
		return integrate.Table{}
	}
	table, err := integrate.NewTable(temperatures, values)
	var wrong *integrate.TableError
	if errors.As(err, &wrong) { // lengths and values are in order, so it is a temperature
		row := at[wrong.Row]
		o.fault(row.Offset, "%s.%s[%d] is %s, must be above the one before it", path, axis, wrong.Row, row.Text)
	}
	return table
}

// numbers reads a list of numbers.
func (o object) numbers(name string, l limit) ([]*jsontree.Node, []float64) {
	items := o.list(name)
	values := make([]float64, len(items))
	for i, n := range items {
		values[i] = o.value(n, fmt.Sprintf("%s.%s[%d]", o.path, name, i), l)
	}
	return items, values
}
