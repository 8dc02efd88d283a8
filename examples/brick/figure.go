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
	grey       = color.RGBA{140, 140, 140, 255}
	pale       = color.RGBA{228, 228, 228, 255}
)

const pixelsPerInch = 150

// picture writes rows of panels as PNG and SVG into a folder, which it makes, and returns the paths.
func picture(folder, name string, width, height vg.Length, panels [][]*plot.Plot) ([]string, error) {
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return nil, err
	}
	bitmap := vgimg.NewWith(vgimg.UseWH(width, height), vgimg.UseDPI(pixelsPerInch))
	vector := vgsvg.NewWith(vgsvg.UseWH(width, height), vgsvg.EmbedFonts(true))
	for _, canvas := range []draw.Canvas{draw.New(bitmap), draw.New(vector)} {
		canvas.FillPolygon(color.White, []vg.Point{{}, {X: width}, {X: width, Y: height}, {Y: height}})
		margin := 4 * vg.Millimeter
		tiles := draw.Tiles{Rows: len(panels), Cols: len(panels[0]), PadTop: margin, PadBottom: margin, PadLeft: margin,
			PadRight: 2 * margin, PadX: 3 * margin, PadY: 2 * margin}
		for i, row := range plot.Align(panels, tiles, canvas) {
			for j, c := range row {
				panels[i][j].Draw(c)
			}
		}
	}
	png, svg := filepath.Join(folder, name+".png"), filepath.Join(folder, name+".svg")
	if err := writeFile(png, vgimg.PngCanvas{Canvas: bitmap}); err != nil {
		return nil, err
	}
	return []string{png, svg}, writeFile(svg, vector)
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
	panel.Legend.ThumbnailWidth = 9 * vg.Millimeter
	panel.Legend.Padding = 1 * vg.Millimeter
	panel.Legend.XOffs, panel.Legend.YOffs = 3*vg.Millimeter, 3*vg.Millimeter
	panel.Legend.Left = true
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

// addLine adds a curve; an empty name keeps it out of the legend.
func addLine(panel *plot.Plot, name string, xy plotter.XYs, c color.Color, width vg.Length, dashes ...vg.Length) error {
	line, err := plotter.NewLine(xy)
	if err != nil {
		return fmt.Errorf("the curve %q of %q: %w", name, panel.Title.Text, err)
	}
	line.Color, line.Width, line.Dashes = c, width, dashes
	panel.Add(line)
	if name != "" {
		panel.Legend.Add(name, line)
	}
	return nil
}

// addMarks adds circles; an empty name keeps them out of the legend.
func addMarks(panel *plot.Plot, name string, xy plotter.XYs, c color.Color) error {
	marks, err := plotter.NewScatter(xy)
	if err != nil {
		return fmt.Errorf("the points %q of %q: %w", name, panel.Title.Text, err)
	}
	marks.GlyphStyle = draw.GlyphStyle{Color: c, Radius: 2.6, Shape: draw.CircleGlyph{}}
	panel.Add(marks)
	if name != "" {
		panel.Legend.Add(name, marks)
	}
	return nil
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
