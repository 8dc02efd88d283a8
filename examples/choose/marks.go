package main

import (
	"image/color"
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg/draw"
)

func addLine(panel *plot.Plot, xy plotter.XYs, style draw.LineStyle) error {
	line, err := plotter.NewLine(xy)
	if err != nil {
		return err
	}
	line.LineStyle = style
	x, y := panel.X, panel.Y // adding a line widens the axes
	panel.Add(line)
	panel.X.Min, panel.X.Max, panel.Y.Min, panel.Y.Max = x.Min, x.Max, y.Min, y.Max
	return nil
}

// addMark puts a cross where a curve ends in rupture.
func addMark(panel *plot.Plot, at plotter.XY, c color.Color) error {
	mark, err := plotter.NewScatter(plotter.XYs{at})
	if err != nil {
		return err
	}
	mark.GlyphStyle = draw.GlyphStyle{Color: c, Radius: 3.5, Shape: draw.CrossGlyph{}}
	x, y := panel.X, panel.Y
	panel.Add(mark)
	panel.X.Min, panel.X.Max, panel.Y.Min, panel.Y.Max = x.Min, x.Max, y.Min, y.Max
	return nil
}

// addShade shades a range of the horizontal axis over the whole height.
func addShade(panel *plot.Plot, low, high float64) error {
	x, y := panel.X, panel.Y
	area, err := plotter.NewPolygon(plotter.XYs{{X: low, Y: y.Min}, {X: high, Y: y.Min}, {X: high, Y: y.Max}, {X: low, Y: y.Max}})
	if err != nil {
		return err
	}
	area.Color, area.LineStyle.Width = shade, 0
	panel.Add(area)
	panel.X.Min, panel.X.Max, panel.Y.Min, panel.Y.Max = x.Min, x.Max, y.Min, y.Max
	return nil
}

// logarithmicAxis has decades.
func logarithmicAxis(a *plot.Axis) {
	a.Scale = plot.LogScale{}
	a.Tick.Marker = decades{6}
}

// decades are ticks at powers of ten, labelled so that no more than a number of labels stand side by side.
type decades struct{ most int }

// Ticks implements plot.Ticker.
func (d decades) Ticks(low, high float64) []plot.Tick {
	first, last := int(math.Ceil(math.Log10(low)-1e-9)), int(math.Floor(math.Log10(high)+1e-9))
	if last-first < 2 {
		return withinDecades(low, high)
	}
	every := 1 + (last-first)/d.most
	var list []plot.Tick
	for e := first; e <= last; e++ {
		t := plot.Tick{Value: math.Pow(10, float64(e))}
		if e%every == 0 {
			t.Label = powerOfTen(e)
		}
		list = append(list, t)
	}
	return list
}

// withinDecades are 1, 2, 5 times powers of ten, for an axis that has few of these.
func withinDecades(low, high float64) (list []plot.Tick) {
	for e := int(math.Floor(math.Log10(low))); e <= int(math.Floor(math.Log10(high))); e++ {
		for _, m := range []float64{1, 2, 5} {
			if v := m * math.Pow(10, float64(e)); v >= low*(1-1e-9) && v <= high*(1+1e-9) {
				list = append(list, plot.Tick{Value: v, Label: strconv.FormatFloat(v, 'g', 4, 64)})
			}
		}
	}
	return list
}

func powerOfTen(e int) string {
	if e >= -3 && e <= 4 {
		return strconv.FormatFloat(math.Pow(10, float64(e)), 'f', max(0, -e), 64)
	}
	return "1e" + strconv.Itoa(e)
}

// ticks are round numbers.
type ticks struct{ most int }

// Ticks implements plot.Ticker.
func (t ticks) Ticks(low, high float64) []plot.Tick {
	power := math.Pow(10, math.Floor(math.Log10((high-low)/float64(t.most))))
	step := 10 * power
	for _, m := range []float64{1, 2, 5} {
		if m*power*float64(t.most) >= (high-low)*(1-1e-9) {
			step = m * power
			break
		}
	}
	var list []plot.Tick
	for i := math.Ceil(low / step); i*step <= high*(1+1e-9); i++ {
		list = append(list, plot.Tick{Value: i * step, Label: grouped(i * step)})
	}
	return list
}

// grouped writes a number with a blank between thousands.
func grouped(x float64) string {
	s := strconv.FormatFloat(x, 'f', -1, 64)
	if len(s) > 9 {
		s = strconv.FormatFloat(x, 'g', 4, 64)
	}
	whole, rest, _ := strings.Cut(s, ".")
	for i := len(whole) - 3; i > 0 && !strings.Contains(whole, "e"); i -= 3 {
		whole = whole[:i] + " " + whole[i:]
	}
	if rest != "" {
		whole += "." + rest
	}
	return whole
}
