package main

import (
	"image/color"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg/draw"

	"example.com/holdtime/examples/figure"
)

// keepingAxes adds something to a panel, which would widen its axes.
func keepingAxes(panel *plot.Plot, add func() error) error {
	x, y := panel.X, panel.Y
	err := add()
	panel.X.Min, panel.X.Max, panel.Y.Min, panel.Y.Max = x.Min, x.Max, y.Min, y.Max
	return err
}

func addLine(panel *plot.Plot, xy plotter.XYs, style draw.LineStyle) error {
	return keepingAxes(panel, func() error {
		_, err := figure.AddLine(panel, xy, style.Color, style.Width, style.Dashes...)
		return err
	})
}

// addMark puts a cross where a curve ends in rupture.
func addMark(panel *plot.Plot, at plotter.XY, c color.Color) error {
	return keepingAxes(panel, func() error {
		_, err := figure.AddGlyphs(panel, plotter.XYs{at}, draw.GlyphStyle{Color: c, Radius: 3.5, Shape: draw.CrossGlyph{}})
		return err
	})
}

// addShade shades a range of the horizontal axis over the whole height.
func addShade(panel *plot.Plot, low, high float64) error {
	y := panel.Y
	area, err := plotter.NewPolygon(plotter.XYs{{X: low, Y: y.Min}, {X: high, Y: y.Min}, {X: high, Y: y.Max}, {X: low, Y: y.Max}})
	if err != nil {
		return err
	}
	area.Color, area.LineStyle.Width = shade, 0
	return keepingAxes(panel, func() error {
		panel.Add(area)
		return nil
	})
}
