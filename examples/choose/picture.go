package main

import (
	"fmt"
	"image/color"
	"io"
	"math"
	"os"
	"path/filepath"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgsvg"
)

// Colours that stay apart in the common forms of colour blindness (the palette of Okabe and Ito 2008, from memory), and dashes,
// so that lines on top of each other show.
var (
	black      = color.RGBA{0, 0, 0, 255}
	blue       = color.RGBA{0, 114, 178, 255}
	vermillion = color.RGBA{213, 94, 0, 255}
	green      = color.RGBA{0, 158, 115, 255}
	purple     = color.RGBA{204, 121, 167, 255}
	orange     = color.RGBA{230, 159, 0, 255}
	sky        = color.RGBA{86, 180, 233, 255}
	pale       = color.RGBA{228, 228, 228, 255}
	shade      = color.RGBA{240, 245, 250, 255}

	colours = []color.Color{blue, vermillion, green, purple, orange, sky, black}
	dashes  = [][]vg.Length{nil, {7, 3}, {2, 2}, {9, 2, 2, 2}, {5, 2}, {3, 3}, {1, 2}}
)

const (
	pixelsPerInch = 150
	blockWidth    = 19 * vg.Centimeter
	panelHeight   = 6.6 * vg.Centimeter
	entryHeight   = 0.42 * vg.Centimeter
	titleHeight   = 0.9 * vg.Centimeter
	gap           = 0.6 * vg.Centimeter
	margin        = 0.8 * vg.Centimeter
)

// block is one family: creep curves, rates over stress, names.
type block struct {
	family family
	rows   []*row
}

// draw writes the pictures as PNG and SVG into a folder, which it makes, and returns the paths.
func (s *study) draw(folder string) ([]string, error) {
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return nil, err
	}
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
		files, err := writePicture(filepath.Join(folder, p.name), p.title, blocks)
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

func writePicture(path, title string, blocks []block) ([]string, error) {
	columns := min(2, len(blocks))
	lines := (len(blocks) + columns - 1) / columns
	entries := 0
	for _, b := range blocks {
		entries = max(entries, (len(b.rows)+1)/2)
	}
	height := titleHeight + panelHeight + vg.Length(entries)*entryHeight + gap
	size := vg.Point{X: vg.Length(columns)*(blockWidth+gap) + 2*margin - gap, Y: vg.Length(lines)*height + 2*margin + titleHeight}
	bitmap := vgimg.NewWith(vgimg.UseWH(size.X, size.Y), vgimg.UseDPI(pixelsPerInch))
	vector := vgsvg.NewWith(vgsvg.UseWH(size.X, size.Y), vgsvg.EmbedFonts(true))
	for _, c := range []draw.Canvas{draw.New(bitmap), draw.New(vector)} {
		c.FillPolygon(color.White, []vg.Point{{}, {X: size.X}, size, {Y: size.Y}})
		text(c, title, vg.Point{X: margin, Y: size.Y - margin}, 13, draw.YTop)
		for i, b := range blocks {
			left := margin + vg.Length(i%columns)*(blockWidth+gap)
			top := size.Y - margin - titleHeight - vg.Length(i/columns)*height
			area := draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{Min: vg.Point{X: left, Y: top - height + gap},
				Max: vg.Point{X: left + blockWidth, Y: top}}}
			if err := b.draw(area, entries); err != nil {
				return nil, err
			}
		}
	}
	png, svg := path+".png", path+".svg"
	if err := writeFile(png, vgimg.PngCanvas{Canvas: bitmap}); err != nil {
		return nil, err
	}
	return []string{png, svg}, writeFile(svg, vector)
}

func writeFile(path string, picture io.WriterTo) error {
	f, err := os.Create(path)
	if err != nil {
		return err
	}
	if _, err := picture.WriteTo(f); err != nil {
		f.Close()
		return err
	}
	return f.Close()
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
		c.StrokeLines(style(i), []vg.Point{{X: x, Y: y}, {X: x + 11*vg.Millimeter, Y: y}})
		text(c, r.label(), vg.Point{X: x + 13*vg.Millimeter, Y: y}, 9, draw.YCenter)
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
	c.FillText(draw.TextStyle{Color: black, Font: sans(size), YAlign: align, Handler: plot.DefaultTextHandler}, at, s)
}

func sans(size vg.Length) font.Font {
	f := plot.DefaultFont
	f.Typeface, f.Variant, f.Size = "Liberation", "Sans", size
	return f
}

// newPanel is an empty panel.
func newPanel(x, y string) *plot.Plot {
	panel := plot.New()
	for i, axis := range []*plot.Axis{&panel.X, &panel.Y} {
		axis.Label.Text = []string{x, y}[i]
		axis.Label.TextStyle.Font = sans(9.5)
		axis.Tick.Label.Font = sans(8.5)
		axis.Padding = 0
		axis.Label.Padding = 1 * vg.Millimeter
	}
	grid := plotter.NewGrid()
	grid.Vertical.Color, grid.Horizontal.Color = pale, pale
	panel.Add(grid)
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
			if !logarithmic || s.time > 0 && 100*s.strain > panel.Y.Min/10 {
				xy = append(xy, plotter.XY{X: s.time, Y: 100 * s.strain})
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
		panel.X.Tick.Marker, panel.Y.Tick.Marker = ticks{6}, ticks{6}
		return
	}
	panel.X.Min = shortest * 1e-3
	if shortest == longest {
		panel.X.Min = longest * 1e-5
	}
	panel.Y.Min, panel.Y.Max = 1e-3, math.Max(panel.Y.Max, 1)
	logarithmicAxis(&panel.X)
	logarithmicAxis(&panel.Y)
}

// mostStrain is the highest creep strain shown [%].
const mostStrain = 8

// ratePanel is the rate over stress, a decade beyond the audited domain to either side.
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
		panel.X.Min, panel.X.Max = low/10, high*10
		panel.Y.Min, panel.Y.Max = math.Pow(10, math.Max(within[0]-4, -22)), math.Pow(10, math.Min(within[1]+4, 10))
		if err := addShade(panel, low, high); err != nil {
			return nil, err
		}
	} else {
		panel.X.Min, panel.X.Max = low/1.2, high*1.2
		panel.Y.Min, panel.Y.Max = math.Pow(10, math.Floor(within[0])), math.Pow(10, math.Ceil(within[1]))
	}
	for i, r := range b.rows {
		xy := r.rates(panel.X.Min, panel.X.Max)
		if len(xy) == 0 {
			continue
		}
		if err := addLine(panel, xy, style(i)); err != nil {
			return nil, fmt.Errorf("%s: %w", r.name, err)
		}
	}
	logarithmicAxis(&panel.X)
	logarithmicAxis(&panel.Y)
	return panel, nil
}

// rates are the finite rates over stress; published sets keep to the range they are known for.
func (r *row) rates(low, high float64) (xy plotter.XYs) {
	if r.origin != inventedNumbers {
		low, high = r.domain.Stress.Low, r.domain.Stress.High
	}
	const points = 240
	for i := range points + 1 {
		s := low * math.Pow(high/low, float64(i)/points)
		if l := r.logRateAt(s); l > -700 && l < 700 {
			xy = append(xy, plotter.XY{X: s, Y: math.Exp(l)})
		}
	}
	return xy
}
