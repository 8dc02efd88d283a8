package main

import (
	"fmt"
	"image/color"
	"io"
	"math"
	"os"
	"path/filepath"
	"strings"

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
	sky        = color.RGBA{86, 180, 233, 255}
	orange     = color.RGBA{230, 159, 0, 255}
	pale       = color.RGBA{228, 228, 228, 255}
)

const pixelsPerInch = 150

// figure is rows of panels under a title, with one legend for all below them.
type figure struct {
	title         string
	panels        [][]*plot.Plot
	legend        []entry
	columns       int // of the legend
	width, height vg.Length
}

// entry is a line of the legend.
type entry struct {
	name string
	mark plot.Thumbnailer
}

const (
	margin     = 4 * vg.Millimeter
	titleBand  = 11 * vg.Millimeter
	legendLine = 6 * vg.Millimeter
)

// write draws the figure as PNG and SVG into a folder, which it makes, and returns the paths.
func (f *figure) write(folder, name string) ([]string, error) {
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return nil, err
	}
	bitmap := vgimg.NewWith(vgimg.UseWH(f.width, f.height), vgimg.UseDPI(pixelsPerInch))
	vector := vgsvg.NewWith(vgsvg.UseWH(f.width, f.height), vgsvg.EmbedFonts(true))
	f.draw(draw.New(bitmap))
	f.draw(draw.New(vector))
	png, svg := filepath.Join(folder, name+".png"), filepath.Join(folder, name+".svg")
	if err := writeFile(png, vgimg.PngCanvas{Canvas: bitmap}); err != nil {
		return nil, err
	}
	return []string{png, svg}, writeFile(svg, vector)
}

func (f *figure) draw(canvas draw.Canvas) {
	canvas.FillPolygon(color.White, []vg.Point{{}, {X: f.width}, {X: f.width, Y: f.height}, {Y: f.height}})
	style := f.panels[0][0].Title.TextStyle
	style.XAlign, style.YAlign = draw.XCenter, draw.YCenter
	heading := style
	heading.Font.Size = 14
	canvas.FillText(heading, vg.Point{X: f.width / 2, Y: f.height - titleBand/2 - margin/2}, f.title)

	rows := (len(f.legend) + f.columns - 1) / f.columns
	band := vg.Length(rows)*legendLine + margin
	f.drawLegend(draw.Crop(canvas, 3*margin, -margin, margin, band-f.height), rows)

	tiles := draw.Tiles{Rows: len(f.panels), Cols: len(f.panels[0]), PadTop: margin, PadBottom: margin, PadLeft: margin,
		PadRight: 3 * margin, PadX: 3 * margin, PadY: 2 * margin}
	for i, row := range plot.Align(f.panels, tiles, draw.Crop(canvas, 0, 0, band, -titleBand)) {
		for j, c := range row {
			f.panels[i][j].Draw(c)
		}
	}
}

// drawLegend fills the columns from left to right, each from above.
func (f *figure) drawLegend(c draw.Canvas, rows int) {
	style := f.panels[0][0].Legend.TextStyle
	style.XAlign, style.YAlign = draw.XLeft, draw.YCenter
	const thumb = 11 * vg.Millimeter
	across := (c.Max.X - c.Min.X) / vg.Length(f.columns)
	for i, e := range f.legend {
		x := c.Min.X + across*vg.Length(i/rows)
		y := c.Max.Y - legendLine*(vg.Length(i%rows)+0.5)
		box := draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{
			Min: vg.Point{X: x, Y: y - legendLine/2}, Max: vg.Point{X: x + thumb, Y: y + legendLine/2}}}
		e.mark.Thumbnail(&box)
		c.FillText(style, vg.Point{X: x + thumb + margin/2, Y: y}, e.name)
	}
}

func writeFile(path string, content io.WriterTo) error {
	f, err := os.Create(path)
	if err != nil {
		return err
	}
	if _, err := content.WriteTo(f); err != nil {
		f.Close()
		return err
	}
	return f.Close()
}

// newPanel is an empty panel.
func newPanel(title, x, y string) *plot.Plot {
	panel := plot.New()
	panel.Title.Text, panel.X.Label.Text, panel.Y.Label.Text = title, x, y
	sans := func(f *font.Font, size font.Length) { f.Typeface, f.Variant, f.Size = "Liberation", "Sans", size }
	sans(&panel.Title.TextStyle.Font, 12)
	sans(&panel.Legend.TextStyle.Font, 10)
	for _, axis := range []*plot.Axis{&panel.X, &panel.Y} {
		sans(&axis.Label.TextStyle.Font, 11)
		sans(&axis.Tick.Label.Font, 10)
		axis.Padding = 0
		axis.Label.Padding = 2 * vg.Millimeter
	}
	panel.Title.Padding = 3 * vg.Millimeter
	panel.X.Tick.Marker, panel.Y.Tick.Marker = ticks{most: 8}, ticks{most: 8}
	grid := plotter.NewGrid()
	grid.Vertical.Color, grid.Horizontal.Color = pale, pale
	panel.Add(grid)
	return panel
}

// pairs are the points of a curve.
func pairs(x, y []float64) plotter.XYs {
	xy := make(plotter.XYs, len(x))
	for i := range x {
		xy[i] = plotter.XY{X: x[i], Y: y[i]}
	}
	return xy
}

// addLine adds a curve and returns it.
func addLine(panel *plot.Plot, xy plotter.XYs, c color.Color, width vg.Length, dashes ...vg.Length) (*plotter.Line, error) {
	line, err := plotter.NewLine(xy)
	if err != nil {
		return nil, fmt.Errorf("a curve of %q: %w", panel.Title.Text, err)
	}
	line.Color, line.Width, line.Dashes = c, width, dashes
	panel.Add(line)
	return line, nil
}

// addMarks adds circles and returns them.
func addMarks(panel *plot.Plot, xy plotter.XYs, c color.Color) (*plotter.Scatter, error) {
	marks, err := plotter.NewScatter(xy)
	if err != nil {
		return nil, fmt.Errorf("points of %q: %w", panel.Title.Text, err)
	}
	marks.GlyphStyle = draw.GlyphStyle{Color: c, Radius: 2.6, Shape: draw.CircleGlyph{}}
	panel.Add(marks)
	return marks, nil
}

// pad leaves some room above and below the curves.
func pad(panels ...*plot.Plot) {
	for _, p := range panels {
		room := 0.04 * (p.Y.Max - p.Y.Min)
		p.Y.Min, p.Y.Max = p.Y.Min-room, p.Y.Max+room
	}
}

// ticks places round numbers and groups their thousands.
type ticks struct{ most int }

// Ticks implements plot.Ticker.
func (t ticks) Ticks(low, high float64) (list []plot.Tick) {
	step, decimals := roundStep((high-low)/float64(t.most), math.Max(math.Abs(low), math.Abs(high)))
	for i := math.Ceil(low/step - 1e-9); i*step <= high+1e-9*step; i++ {
		list = append(list, plot.Tick{Value: i * step, Label: grouped(i*step, decimals)})
	}
	return list
}

// roundStep is the least of 1, 2, 5 times a power of ten that is at least x, with the decimals it needs. A step lost in the
// rounding of the largest number, or no number at all, becomes one that draws no more than a tick or two.
func roundStep(x, largest float64) (step float64, decimals int) {
	if !(x > largest*1e-9) || math.IsInf(x, 0) {
		return math.Max(1, largest), 0
	}
	power := math.Floor(math.Log10(x))
	for _, m := range []float64{1, 2, 5, 10} {
		if step = m * math.Pow(10, power); step >= x*(1-1e-9) {
			if m == 10 {
				power++
			}
			break
		}
	}
	return step, max(0, -int(power))
}

// grouped writes a number with its thousands apart.
func grouped(x float64, decimals int) string {
	text := fmt.Sprintf("%.*f", decimals, math.Abs(x))
	whole, rest, _ := strings.Cut(text, ".")
	if len(whole) > 4 {
		for i := len(whole) - 3; i > 0; i -= 3 {
			whole = whole[:i] + " " + whole[i:]
		}
	}
	if decimals > 0 {
		whole += "." + rest
	}
	if x < 0 && strings.Trim(text, "0.") != "" {
		return "-" + whole
	}
	return whole
}

// decades places powers of ten of an axis that shows decimal logarithms, one in every so many.
type decades struct{ every int }

// Ticks implements plot.Ticker.
func (d decades) Ticks(low, high float64) (list []plot.Tick) {
	for i := math.Ceil(low - 1e-9); i <= high+1e-9; i++ {
		tick := plot.Tick{Value: i}
		if int(i)%d.every == 0 {
			tick.Label = fmt.Sprintf("1e%d", int(i))
		}
		list = append(list, tick)
	}
	return list
}
