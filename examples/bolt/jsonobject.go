package main

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"example.com/holdtime/examples/jsontree"
	"example.com/holdtime/examples/position"
)

// object takes the fields out of one JSON object. The first fault is kept in report and makes every later reading return
// zero, so that a file is read in straight lines and asked once at the end.
type object struct {
	*reading
	path string // what the object is called in messages, such as "bolts.law"
	node *jsontree.Node
}

// reading is what all objects of one file share.
type reading struct {
	src *position.Source
	err error
}

func (r *reading) fault(offset int, format string, args ...any) {
	if r.err == nil {
		r.err = r.src.Fault(offset, format, args...)
	}
}

// object opens a node as an object with the given fields and no others.
func (r *reading) object(n *jsontree.Node, path string, known ...string) object {
	o := object{r, path, n}
	if n == nil { // an earlier fault
		return object{r, path, &jsontree.Node{}}
	}
	if n.Kind != jsontree.Object {
		r.fault(n.Offset, "%s must be %s, not %s", path, jsontree.Object, n.Kind)
		return object{r, path, &jsontree.Node{}}
	}
	for _, f := range n.Fields {
		if !slices.Contains(known, f.Name) {
			r.fault(f.Offset, "%s has no field %q; its fields are %s", path, f.Name, strings.Join(known, ", "))
		}
	}
	return o
}

// called is a field's name in messages.
func (o object) called(name string) string {
	if o.path == wholeFile {
		return name
	}
	return o.path + "." + name
}

// wholeFile is the path of the outermost object.
const wholeFile = "the joint"

// find returns a field's value, nil if it is not there.
func (o object) find(name string) *jsontree.Node {
	for _, f := range o.node.Fields {
		if f.Name == name {
			return f.Value
		}
	}
	return nil
}

// must returns a field's value, which has to be there.
func (o object) must(name string) *jsontree.Node {
	n := o.find(name)
	if n == nil {
		o.fault(o.node.Offset, "%s: the field %q is missing", o.path, name)
	}
	return n
}

// text reads a text, empty if the field may be left out and is.
func (o object) text(name string, optional bool) string {
	n := o.find(name)
	if n == nil && optional {
		return ""
	}
	if n = o.must(name); n == nil {
		return ""
	}
	if n.Kind != jsontree.Text {
		o.fault(n.Offset, "%s must be %s, not %s", o.called(name), jsontree.Text, n.Kind)
	}
	return n.Text
}

// list reads a list with at least one item.
func (o object) list(name string) []*jsontree.Node {
	n := o.must(name)
	if n == nil {
		return nil
	}
	if n.Kind != jsontree.List {
		o.fault(n.Offset, "%s must be %s, not %s", o.called(name), jsontree.List, n.Kind)
	} else if len(n.Items) == 0 {
		o.fault(n.Offset, "%s is empty", o.called(name))
	}
	return n.Items
}

// limit is what a number must be: above (or at) low and below (or at) high, and why.
type limit struct {
	low, high float64
	open      bool // low itself is not allowed
	want      string
}

func (l limit) holds(x float64) bool {
	return (x > l.low || x == l.low && !l.open) && x <= l.high
}

var anything = limit{-math.MaxFloat64, math.MaxFloat64, false, "a number"}

// number reads one number.
func (o object) number(name string, l limit) float64 {
	return o.value(o.must(name), o.called(name), l)
}

// value reads a node as a number within a limit.
func (r *reading) value(n *jsontree.Node, path string, l limit) float64 {
	if n == nil || r.err != nil {
		return 0
	}
	if n.Kind != jsontree.Number {
		r.fault(n.Offset, "%s must be %s, not %s", path, jsontree.Number, n.Kind)
		return 0
	}
	x, err := strconv.ParseFloat(n.Text, 64)
	if err != nil {
		r.fault(n.Offset, "%s is %s, which is outside the range of floating-point numbers", path, n.Text)
		return 0
	}
	if !l.holds(x) {
		r.fault(n.Offset, "%s is %s, must be %s", path, n.Text, l.want)
		return 0
	}
	return x
}

// temperature reads the field NAME_C (degrees Celsius) or NAME_K (kelvin), whichever is there, in kelvin.
func (o object) temperature(name string) float64 {
	c, k := o.find(name+"_C"), o.find(name+"_K")
	switch {
	case c != nil && k != nil:
		o.fault(k.Offset, "%s: give %s_C or %s_K, not both", o.path, name, name)
	case c != nil:
		return o.value(c, o.called(name+"_C"), celsiusLimit) + icePoint
	case k != nil:
		return o.value(k, o.called(name+"_K"), kelvinLimit)
	default:
		o.fault(o.node.Offset, "%s: the field %q or %q is missing", o.path, name+"_C", name+"_K")
	}
	return 0
}

const icePoint = 273.15 // 0 °C in kelvin, exact by definition of the degree Celsius

const hottest = 3000 // K: beyond it nobody bolts anything

var (
	kelvinLimit  = limit{0, hottest, true, fmt.Sprintf("above 0 and at most %d (kelvin)", hottest)}
	celsiusLimit = limit{-icePoint, hottest - icePoint, true,
		fmt.Sprintf("above %v and at most %v (degrees Celsius)", -icePoint, hottest-icePoint)}
)
