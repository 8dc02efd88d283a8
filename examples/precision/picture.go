package main

import (
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"example.com/holdtime/examples/figure"
)

var palette = []color.Color{figure.Blue, figure.Vermillion, figure.Green, figure.Purple, figure.Orange}

// picture draws work against precision, and the error achieved against the tolerance asked for.
func picture(folder string, lines []line) ([]string, error) {
	return figure.Save(folder, "precision", 26*vg.Centimeter, 12*vg.Centimeter, func(c draw.Canvas) error {
		work, err := workPanel(lines)
		if err != nil {
			return err
		}
		kept, err := tolerancePanel(lines)
		if err != nil {
			return err
		}
		tiles := draw.Tiles{Rows: 1, Cols: 2, PadX: 10 * vg.Millimeter, PadTop: 3 * vg.Millimeter, PadBottom: 2 * vg.Millimeter,
			PadLeft: 2 * vg.Millimeter, PadRight: 4 * vg.Millimeter}
		work.Draw(tiles.At(c, 0, 0))
		kept.Draw(tiles.At(c, 1, 0))
		return nil
	})
}

func logarithmic(p *plot.Plot) {
	p.X.Scale, p.Y.Scale = plot.LogScale{}, plot.LogScale{}
	p.X.Tick.Marker, p.Y.Tick.Marker = figure.Decades{Every: 2}, figure.Decades{}
}

func workPanel(lines []line) (*plot.Plot, error) {
	p := plot.New()
	p.Title.Text = "Work for an error"
	p.X.Label.Text = "error achieved / largest stress"
	p.Y.Label.Text = "time [µs]"
	logarithmic(p)
	p.X.Min, p.X.Max, p.Y.Min, p.Y.Max = 1e-13, 1, 0.1, 1e5
	p.Add(plotter.NewGrid())
	for i, l := range lines {
		walk, points, err := plotter.NewLinePoints(costs(l.walks))
		if err != nil {
			return nil, err
		}
		walk.Color, points.Color = palette[i], palette[i]
		walk.Width = vg.Points(1.5)
		points.Shape = draw.CircleGlyph{}
		steps, err := plotter.NewLine(costs(l.steps))
		if err != nil {
			return nil, err
		}
		steps.Color, steps.Dashes = palette[i], []vg.Length{vg.Points(4), vg.Points(3)}
		p.Add(walk, points, steps)
		p.Legend.Add(l.name, walk, points)
		if i == len(lines)-1 {
			p.Legend.Add("the same, equal backward-Euler steps", steps)
		}
	}
	p.Legend.Left = true
	p.Legend.Padding = vg.Points(2)
	p.Legend.XOffs, p.Legend.YOffs = vg.Points(6), vg.Points(4)
	return p, nil
}

func tolerancePanel(lines []line) (*plot.Plot, error) {
	p := plot.New()
	p.Title.Text = "Error for a tolerance (grey: equal)"
	p.X.Label.Text = "tolerance asked for"
	p.Y.Label.Text = "error achieved / largest stress"
	logarithmic(p)
	p.X.Min, p.X.Max, p.Y.Min, p.Y.Max = 1e-11, 1e-1, 1e-14, 1
	p.Y.Tick.Marker = figure.Decades{Every: 2}
	p.Add(plotter.NewGrid())
	equal, err := plotter.NewLine(plotter.XYs{{X: 1e-10, Y: 1e-10}, {X: 1e-2, Y: 1e-2}})
	if err != nil {
		return nil, err
	}
	equal.Color = figure.Grey
	p.Add(equal)
	for i, l := range lines {
		var at plotter.XYs
		for _, r := range l.walks {
			at = append(at, plotter.XY{X: r.tolerance, Y: math.Max(r.err, 1e-16)})
		}
		walk, points, err := plotter.NewLinePoints(at)
		if err != nil {
			return nil, err
		}
		walk.Color, points.Color = palette[i], palette[i]
		points.Shape = draw.CircleGlyph{}
		p.Add(walk, points)
	}
	return p, nil
}

func costs(runs []run) (at plotter.XYs) {
	for _, r := range runs {
		at = append(at, plotter.XY{X: math.Max(r.err, 1e-13), Y: float64(r.cost.Nanoseconds()) / 1e3})
	}
	return at
}
