package figure

import (
	"fmt"
	"image/color"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// Sans is the font of all text.
func Sans(size vg.Length) font.Font {
	f := plot.DefaultFont
	f.Typeface, f.Variant, f.Size = "Liberation", "Sans", size
	return f
}

// NewPanel is an empty panel with round ticks and a grid; its own legend, if it gets one, stands at the lower left.
func NewPanel(title, x, y string) *plot.Plot {
	panel := plot.New()
	panel.Title.Text, panel.X.Label.Text, panel.Y.Label.Text = title, x, y
	panel.Title.TextStyle.Font = Sans(12)
	panel.Legend.TextStyle.Font = Sans(10)
	for _, axis := range []*plot.Axis{&panel.X, &panel.Y} {
		axis.Label.TextStyle.Font, axis.Tick.Label.Font = Sans(11), Sans(10)
		axis.Padding = 0
		axis.Label.Padding = 2 * vg.Millimeter
		axis.Tick.Marker = Round{Most: 8}
	}
	panel.Legend.ThumbnailWidth = 9 * vg.Millimeter
	panel.Legend.Padding = 1 * vg.Millimeter
	panel.Legend.XOffs, panel.Legend.YOffs = 3*vg.Millimeter, 3*vg.Millimeter
	panel.Legend.Left = true
	grid := plotter.NewGrid()
	grid.Vertical.Color, grid.Horizontal.Color = Pale, Pale
	panel.Add(grid)
	return panel
}

// Pairs are the points of a curve.
func Pairs(x, y []float64) plotter.XYs {
	xy := make(plotter.XYs, len(x))
	for i := range x {
		xy[i] = plotter.XY{X: x[i], Y: y[i]}
	}
	return xy
}

// AddLine adds a curve and returns it.
func AddLine(panel *plot.Plot, xy plotter.XYs, c color.Color, width vg.Length, dashes ...vg.Length) (*plotter.Line, error) {
	line, err := plotter.NewLine(xy)
	if err != nil {
		return nil, fmt.Errorf("a curve of %q over %q: %w", panel.Y.Label.Text, panel.X.Label.Text, err)
	}
	line.Color, line.Width, line.Dashes = c, width, dashes
	panel.Add(line)
	return line, nil
}

// AddMarks adds circles and returns them.
func AddMarks(panel *plot.Plot, xy plotter.XYs, c color.Color) (*plotter.Scatter, error) {
	return AddGlyphs(panel, xy, draw.GlyphStyle{Color: c, Radius: 2.6, Shape: draw.CircleGlyph{}})
}

// AddGlyphs adds marks of any shape and returns them.
func AddGlyphs(panel *plot.Plot, xy plotter.XYs, style draw.GlyphStyle) (*plotter.Scatter, error) {
	marks, err := plotter.NewScatter(xy)
	if err != nil {
		return nil, fmt.Errorf("points of %q over %q: %w", panel.Y.Label.Text, panel.X.Label.Text, err)
	}
	marks.GlyphStyle = style
	panel.Add(marks)
	return marks, nil
}
