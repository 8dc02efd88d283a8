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

// Colours that stay apart in the common forms of colour blindness (the palette of Okabe and Ito 2008, from memory).
var (
	blue       = color.RGBA{0, 114, 178, 255}
	vermillion = color.RGBA{213, 94, 0, 255}
	green      = color.RGBA{0, 158, 115, 255}
	purple     = color.RGBA{204, 121, 167, 255}
	grey       = color.RGBA{140, 140, 140, 255}
	pale       = color.RGBA{228, 228, 228, 255}
)

const (
	pictureWidth  = 22 * vg.Centimeter
	pictureHeight = 19 * vg.Centimeter
	pixelsPerInch = 150
)

// draw writes the picture as PNG and SVG into a folder, which it makes, and returns the paths.
func (p *report) draw(folder string) ([]string, error) {
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return nil, err
	}
	bitmap := vgimg.NewWith(vgimg.UseWH(pictureWidth, pictureHeight), vgimg.UseDPI(pixelsPerInch))
	vector := vgsvg.NewWith(vgsvg.UseWH(pictureWidth, pictureHeight), vgsvg.EmbedFonts(true))
	if err := p.panels(draw.New(bitmap)); err != nil {
		return nil, err
	}
	if err := p.panels(draw.New(vector)); err != nil {
		return nil, err
	}
	png, svg := filepath.Join(folder, "bolt.png"), filepath.Join(folder, "bolt.svg")
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

// panels draws clamp load above creep strain, with one time axis.
func (p *report) panels(canvas draw.Canvas) error {
	load, err := p.loadPanel()
	if err != nil {
		return err
	}
	creep, err := p.creepPanel()
	if err != nil {
		return err
	}
	canvas.FillPolygon(color.White, []vg.Point{{}, {X: pictureWidth}, {X: pictureWidth, Y: pictureHeight}, {Y: pictureHeight}})
	margin := 4 * vg.Millimeter
	tiles := draw.Tiles{Rows: 2, Cols: 1, PadTop: margin, PadBottom: margin, PadLeft: margin, PadRight: 2 * margin,
		PadY: 2 * margin}
	for i, c := range plot.Align([][]*plot.Plot{{load}, {creep}}, tiles, canvas) {
		[]*plot.Plot{load, creep}[i].Draw(c[0])
	}
	return nil
}

// newPanel is an empty panel with the time axis.
func (p *report) newPanel() *plot.Plot {
	panel := plot.New()
	sans := func(f *font.Font, size font.Length) { f.Typeface, f.Variant, f.Size = "Liberation", "Sans", size }
	sans(&panel.Title.TextStyle.Font, 13)
	sans(&panel.Legend.TextStyle.Font, 10)
	for _, axis := range []*plot.Axis{&panel.X, &panel.Y} {
		sans(&axis.Label.TextStyle.Font, 11)
		sans(&axis.Tick.Label.Font, 10)
		axis.Padding = 0
		axis.Label.Padding = 2 * vg.Millimeter
	}
	panel.Title.Padding = 3 * vg.Millimeter
	panel.X.Tick.Marker = ticks{most: 9}
	panel.Legend.ThumbnailWidth = 9 * vg.Millimeter
	panel.Legend.Padding = 1 * vg.Millimeter
	panel.Legend.XOffs, panel.Legend.YOffs = 3*vg.Millimeter, 3*vg.Millimeter
	panel.Legend.Left = true
	grid := plotter.NewGrid()
	grid.Vertical.Color, grid.Horizontal.Color = pale, pale
	panel.Add(grid)
	return panel
}

func (p *report) loadPanel() (*plot.Plot, error) {
	panel := p.newPanel()
	panel.Title.Text = p.joint.title
	panel.Y.Label.Text = "Clamp load [kN]"
	scale := float64(p.joint.count) / newtonPerKilonewton
	loads := func(c *course) plotter.XYs {
		return c.curve(func(s sample) float64 { return s.load * scale })
	}
	if len(p.without) > 0 { // below the others, in the legend after them
		bare, err := newLine("without retightening", loads(p.without[0]), grey, 1.2)
		if err != nil {
			return nil, err
		}
		panel.Add(bare)
		defer func() { panel.Legend.Add("without retightening", bare) }()
	}
	if err := addLine(panel, "clamp load", loads(p.course), blue, 1.6); err != nil {
		return nil, err
	}
	required := p.joint.required / newtonPerKilonewton
	limit := plotter.XYs{{X: p.history.start(), Y: required}, {X: p.history.end(), Y: required}}
	name := "required, " + p.kilonewton(p.joint.perBolt(p.joint.required)) + " kN"
	if err := addLine(panel, name, limit, vermillion, 1.4, 6, 3); err != nil {
		return nil, err
	}
	if err := p.addMarks(panel, scale); err != nil {
		return nil, err
	}
	p.setRange(panel, 0.04)
	return panel, nil
}

func (p *report) creepPanel() (*plot.Plot, error) {
	panel := p.newPanel()
	panel.Y.Label.Text = "Creep strain of the bolts [%]"
	panel.X.Label.Text = "Time [h]"
	colours := []color.Color{blue, green, purple, vermillion, grey}
	for i, s := range p.joint.sections {
		curve := p.course.curve(func(m sample) float64 { return 100 * m.points[i].state.Equivalent })
		if err := addLine(panel, s.name, curve, colours[i%len(colours)], 1.6); err != nil {
			return nil, err
		}
	}
	panel.Legend.Top = true
	panel.Legend.YOffs = -panel.Legend.YOffs
	p.setRange(panel, 0.08)
	return panel, nil
}

// setRange shows the whole history and starts at zero.
func (p *report) setRange(panel *plot.Plot, headroom float64) {
	panel.X.Min, panel.X.Max = p.history.start(), p.history.end()
	panel.Y.Min = math.Min(0, panel.Y.Min)
	panel.Y.Max += headroom * (panel.Y.Max - panel.Y.Min)
	if !(panel.Y.Max > panel.Y.Min) {
		panel.Y.Max = panel.Y.Min + 1
	}
	panel.Y.Tick.Marker = ticks{most: 8}
}

func (c *course) curve(value func(sample) float64) plotter.XYs {
	var xy plotter.XYs
	for _, s := range c.samples {
		xy = append(xy, plotter.XY{X: s.time, Y: value(s)})
	}
	return xy
}

func addLine(panel *plot.Plot, name string, xy plotter.XYs, c color.Color, width vg.Length, dashes ...vg.Length) error {
	line, err := newLine(name, xy, c, width, dashes...)
	if err == nil {
		panel.Add(line)
		panel.Legend.Add(name, line)
	}
	return err
}

func newLine(name string, xy plotter.XYs, c color.Color, width vg.Length, dashes ...vg.Length) (*plotter.Line, error) {
	line, err := plotter.NewLine(xy)
	if err != nil {
		return nil, fmt.Errorf("the curve %q: %w", name, err)
	}
	line.Color, line.Width, line.Dashes = c, width, dashes
	return line, nil
}

// addMarks puts a triangle where each retightening ended.
func (p *report) addMarks(panel *plot.Plot, scale float64) error {
	var xy plotter.XYs
	for _, done := range p.course.retightened {
		if !done.needless {
			xy = append(xy, plotter.XY{X: done.time, Y: done.after * scale})
		}
	}
	if len(xy) == 0 {
		return nil
	}
	marks, err := plotter.NewScatter(xy)
	if err != nil {
		return err
	}
	marks.GlyphStyle = draw.GlyphStyle{Color: vermillion, Radius: 4, Shape: draw.PyramidGlyph{}}
	panel.Add(marks)
	panel.Legend.Add("retightened", marks)
	return nil
}

// ticks places round numbers and groups their thousands.
type ticks struct{ most int }

// Ticks implements plot.Ticker.
func (t ticks) Ticks(low, high float64) []plot.Tick {
	step, decimals := roundStep((high-low)/float64(t.most), high)
	var list []plot.Tick
	for i := math.Ceil(low / step); i*step <= high*(1+1e-9); i++ {
		list = append(list, plot.Tick{Value: i * step, Label: grouped(i*step, decimals)})
	}
	return list
}

// roundStep is the least of 1, 2, 4, 5 times a power of ten that is at least x, with the decimals it needs. A step lost in
// the rounding of high, or no number at all, becomes one that draws no more than a tick or two.
func roundStep(x, high float64) (step float64, decimals int) {
	if !(x > math.Abs(high)*1e-9) {
		return math.Max(1, math.Abs(high)), 0
	}
	power := math.Floor(math.Log10(x))
	for _, m := range []float64{1, 2, 4, 5, 10} {
		if step = m * math.Pow(10, power); step >= x*(1-1e-9) {
			if m == 10 {
				power++
			}
			break
		}
	}
	return step, max(0, -int(power))
}
