package main

import (
	"fmt"
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"example.com/holdtime/examples/figure"
)

// Colours and dashes, so that lines on top of each other show.
var (
	shade   = color.RGBA{240, 245, 250, 255}
	colours = []color.Color{figure.Blue, figure.Vermillion, figure.Green, figure.Purple, figure.Orange, figure.Sky, figure.Black}
	dashes  = [][]vg.Length{nil, {7, 3}, {2, 2}, {9, 2, 2, 2}, {5, 2}, {3, 3}, {1, 2}}
)

const (
	blockWidth  = 19 * vg.Centimeter
	panelHeight = 6.6 * vg.Centimeter
	entryHeight = 0.42 * vg.Centimeter
	titleHeight = 0.9 * vg.Centimeter
	gap         = 0.6 * vg.Centimeter
	margin      = 0.8 * vg.Centimeter
)

// block is one family: creep curves, rates over stress, names.
type block struct {
	family family
	rows   []*row
}

// draw writes the pictures as PNG and SVG into a folder, which it makes, and returns the paths.
func (s *study) draw(folder string) ([]string, error) {
	var paths []string
	for _, p := range []struct {
		name     string
		families []family
		title    string
	}{
		{"choose", families, fmt.Sprintf("The catalogue on an invented steel. Left: creep at %.4g MPa and %.4g °C. Right: rate over stress at "+
			"%.4g °C; what was audited is shaded", s.stress, s.celsius, s.celsius)},
		{"published", publishedFamilies, "Published sets, each over the range it is known for. Left: creep in the middle of that range. Right: " +
			"rate over stress there"},
	} {
		blocks := s.blocks(p.families)
		if len(blocks) == 0 {
			continue
		}
		files, err := writePicture(folder, p.name, p.title, blocks)
		if err != nil {
			return nil, err
		}
		paths = append(paths, files...)
	}
	return paths, nil
}

func (s *study) blocks(families []family) []block {
	var list []block
	for _, f := range families {
		b := block{family: f}
		for i := range s.rows {
			if s.rows[i].family == f {
				b.rows = append(b.rows, &s.rows[i])
			}
		}
		if len(b.rows) > 0 {
			list = append(list, b)
		}
	}
	return list
}

func writePicture(folder, name, title string, blocks []block) ([]string, error) {
	columns := min(2, len(blocks))
	lines := (len(blocks) + columns - 1) / columns
	entries := 0
	for _, b := range blocks {
		entries = max(entries, (len(b.rows)+1)/2)
	}
	height := titleHeight + panelHeight + vg.Length(entries)*entryHeight + gap
	size := vg.Point{X: vg.Length(columns)*(blockWidth+gap) + 2*margin - gap, Y: vg.Length(lines)*height + 2*margin + titleHeight}
	return figure.Save(folder, name, size.X, size.Y, func(c draw.Canvas) error {
		text(c, title, vg.Point{X: margin, Y: size.Y - margin}, 13, draw.YTop)
		for i, b := range blocks {
			left := margin + vg.Length(i%columns)*(blockWidth+gap)
			top := size.Y - margin - titleHeight - vg.Length(i/columns)*height
			area := draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{Min: vg.Point{X: left, Y: top - height + gap},
				Max: vg.Point{X: left + blockWidth, Y: top}}}
			if err := b.draw(area, entries); err != nil {
				return err
			}
		}
		return nil
	})
}

// draw puts the title on top, two panels below it, and the names at the foot.
func (b *block) draw(c draw.Canvas, entries int) error {
	text(c, string(b.family), vg.Point{X: c.Min.X, Y: c.Max.Y - 2*vg.Millimeter}, 12, draw.YTop)
	foot := c.Min.Y + vg.Length(entries)*entryHeight
	creep, err := b.creepPanel()
	if err != nil {
		return err
	}
	rates, err := b.ratePanel()
	if err != nil {
		return err
	}
	panels := draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{Min: vg.Point{X: c.Min.X, Y: foot},
		Max: vg.Point{X: c.Max.X, Y: c.Max.Y - titleHeight}}}
	tiles := draw.Tiles{Rows: 1, Cols: 2, PadX: gap}
	for i, canvas := range plot.Align([][]*plot.Plot{{creep, rates}}, tiles, panels)[0] {
		[]*plot.Plot{creep, rates}[i].Draw(canvas)
	}
	for i, r := range b.rows {
		x := c.Min.X + vg.Length(i%2)*(c.Max.X-c.Min.X)/2
		y := foot - (vg.Length(i/2)+0.6)*entryHeight
		c.StrokeLines(style(i), []vg.Point{{X: x, Y: y}, {X: x + 9*vg.Millimeter, Y: y}})
		text(c, r.label(), vg.Point{X: x + 10.5*vg.Millimeter, Y: y}, 9, draw.YCenter)
	}
	return nil
}

// label is the name, where the creep curve of a published set is drawn, and a mark if the audit found a fault.
func (r *row) label() string {
	name := r.shortName(44)
	if r.origin != inventedNumbers {
		name = fmt.Sprintf("%s (%.2g MPa, %.0f °C)", r.shortName(36), r.stress, r.temperature-zeroCelsius)
	}
	if r.report.Worst() == faulty {
		name += "  (!)"
	}
	return name
}

func style(i int) draw.LineStyle {
	return draw.LineStyle{Color: colours[i%len(colours)], Width: 1.5, Dashes: dashes[(i+i/len(colours))%len(dashes)]}
}

func text(c draw.Canvas, s string, at vg.Point, size vg.Length, align draw.YAlignment) {
	c.FillText(draw.TextStyle{Color: figure.Black, Font: figure.Sans(size), YAlign: align, Handler: plot.DefaultTextHandler}, at, s)
}

// newPanel is an empty panel with small letters.
func newPanel(x, y string) *plot.Plot {
	panel := figure.NewPanel("", x, y)
	for _, axis := range []*plot.Axis{&panel.X, &panel.Y} {
		axis.Label.TextStyle.Font, axis.Tick.Label.Font = figure.Sans(9.5), figure.Sans(8.5)
		axis.Label.Padding = 1 * vg.Millimeter
		axis.Tick.Marker = figure.Round{Most: 6}
	}
	return panel
}

// creepPanel has linear axes where the curves of a family are of one size, and logarithmic ones where they are not: at the start
// of primary creep, and among published sets.
func (b *block) creepPanel() (*plot.Plot, error) {
	logarithmic := b.family == primary || b.rows[0].origin != inventedNumbers
	panel := newPanel("Time [h]", "Creep strain [%]")
	b.creepRange(panel, logarithmic)
	for i, r := range b.rows {
		var xy plotter.XYs
		for _, s := range r.course.samples {
			at := plotter.XY{X: s.time, Y: 100 * s.strain}
			if logarithmic {
				at = plotter.XY{X: math.Log10(at.X), Y: math.Log10(at.Y)}
			}
			if !logarithmic || s.time > 0 && at.Y > panel.Y.Min-1 {
				xy = append(xy, at)
			}
		}
		if len(xy) == 0 {
			continue
		}
		if err := addLine(panel, xy, style(i)); err != nil {
			return nil, fmt.Errorf("%s: %w", r.name, err)
		}
		if last := xy[len(xy)-1]; r.course.ruptured && last.Y < panel.Y.Max {
			if err := addMark(panel, last, style(i).Color); err != nil {
				return nil, err
			}
		}
	}
	return panel, nil
}

func (b *block) creepRange(panel *plot.Plot, logarithmic bool) {
	shortest, longest, highest := math.Inf(1), 0.0, 0.0
	for _, r := range b.rows {
		shortest, longest = math.Min(shortest, r.horizon), math.Max(longest, r.horizon)
		for _, s := range r.course.samples {
			highest = math.Max(highest, 100*s.strain)
		}
	}
	panel.X.Min, panel.X.Max = 0, longest
	panel.Y.Min, panel.Y.Max = 0, math.Min(1.05*highest, mostStrain)
	if !logarithmic {
		return
	}
	panel.X.Min, panel.X.Max = math.Log10(shortest)-3, math.Log10(longest)
	if shortest == longest {
		panel.X.Min = panel.X.Max - 5
	}
	panel.Y.Min, panel.Y.Max = -3, math.Max(math.Log10(panel.Y.Max), 0)
	panel.X.Tick.Marker, panel.Y.Tick.Marker = figure.Decades{Most: 6}, figure.Decades{Most: 6}
}

// mostStrain is the highest creep strain shown [%].
const mostStrain = 8

// ratePanel is the rate over stress, both logarithmic, a decade beyond the audited domain to either side.
func (b *block) ratePanel() (*plot.Plot, error) {
	low, high := math.Inf(1), 0.0
	within := [2]float64{math.Inf(1), math.Inf(-1)}
	for _, r := range b.rows {
		low, high = math.Min(low, r.domain.Stress.Low), math.Max(high, r.domain.Stress.High)
		for _, s := range []float64{r.domain.Stress.Low, r.domain.Stress.High} {
			if l := r.logRateAt(s) / math.Ln10; !math.IsNaN(l) && !math.IsInf(l, 0) {
				within[0], within[1] = math.Min(within[0], l), math.Max(within[1], l)
			}
		}
	}
	if within[0] > within[1] { // no law of the family is defined here
		within = [2]float64{-6, -6}
	}
	panel := newPanel("Stress [MPa]", "Rate [1/h]")
	if b.rows[0].origin == inventedNumbers { // with what lies beyond the domain
		panel.X.Min, panel.X.Max = math.Log10(low)-1, math.Log10(high)+1
		panel.Y.Min, panel.Y.Max = math.Max(within[0]-4, -22), math.Min(within[1]+4, 10)
		if err := addShade(panel, math.Log10(low), math.Log10(high)); err != nil {
			return nil, err
		}
	} else {
		panel.X.Min, panel.X.Max = math.Log10(low/1.2), math.Log10(high*1.2)
		panel.Y.Min, panel.Y.Max = math.Floor(within[0]), math.Ceil(within[1])
	}
	for i, r := range b.rows {
		xy := r.rates(math.Pow(10, panel.X.Min), math.Pow(10, panel.X.Max))
		if len(xy) == 0 {
			continue
		}
		if err := addLine(panel, xy, style(i)); err != nil {
			return nil, fmt.Errorf("%s: %w", r.name, err)
		}
	}
	panel.X.Tick.Marker, panel.Y.Tick.Marker = figure.Decades{Most: 6}, figure.Decades{Most: 6}
	return panel, nil
}

// rates are the decimal logarithms of the finite rates over those of stress; published sets keep to the range they are known for.
func (r *row) rates(low, high float64) (xy plotter.XYs) {
	if r.origin != inventedNumbers {
		low, high = r.domain.Stress.Low, r.domain.Stress.High
	}
	const points = 240
	for i := range points + 1 {
		s := low * math.Pow(high/low, float64(i)/points)
		if l := r.logRateAt(s); l > -700 && l < 700 {
			xy = append(xy, plotter.XY{X: math.Log10(s), Y: l / math.Ln10})
		}
	}
	return xy
}
