package main

import (
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"

	"example.com/holdtime/examples/figure"
)

var palette = []color.Color{figure.Blue, figure.Vermillion, figure.Green, figure.Purple, figure.Orange}

// draw draws work against precision, and the error achieved against the tolerance asked for.
func draw(folder string, lines []line) ([]string, error) {
	work := logarithmic("Work for an error", "Error achieved, over the largest stress", "Time [µs]")
	kept := logarithmic("Error for a tolerance", "Tolerance asked for", "Error achieved, over the largest stress")
	sheet := figure.Sheet{Title: "What accuracy costs at one material point (invented data)", Panels: [][]*plot.Plot{{work, kept}},
		Columns: 3, Width: 28 * vg.Centimeter, Height: 15 * vg.Centimeter}
	for i, l := range lines {
		walk, err := figure.AddLine(work, costs(l.walks), palette[i], 1.5)
		if err != nil {
			return nil, err
		}
		marks, err := figure.AddMarks(work, costs(l.walks), palette[i])
		if err != nil {
			return nil, err
		}
		if _, err := figure.AddLine(work, costs(l.steps), palette[i], 1.5, dashed...); err != nil {
			return nil, err
		}
		if _, err := figure.AddLine(kept, tolerances(l.walks), palette[i], 1.5); err != nil {
			return nil, err
		}
		if _, err := figure.AddMarks(kept, tolerances(l.walks), palette[i]); err != nil {
			return nil, err
		}
		sheet.Legend = append(sheet.Legend, figure.NewEntry(l.name, walk, marks))
	}
	equal, err := figure.AddLine(kept, plotter.XYs{{X: -10, Y: -10}, {X: -2, Y: -2}}, figure.Grey, 1.5)
	if err != nil {
		return nil, err
	}
	steps := &plotter.Line{LineStyle: plotter.DefaultLineStyle}
	steps.Color, steps.Width, steps.Dashes = figure.Black, 1.5, dashed
	sheet.Legend = append(sheet.Legend, figure.NewEntry("equal backward-Euler steps, same colours", steps),
		figure.NewEntry("error equal to the tolerance", equal))
	work.X.Min, work.X.Max, work.Y.Min, work.Y.Max = -13, 0, 0, 5
	kept.X.Min, kept.X.Max, kept.Y.Min, kept.Y.Max = -11, -1, -14, 0
	return sheet.Save(folder, "precision")
}

var dashed = []vg.Length{5, 3}

// logarithmic is a panel of decimal logarithms.
func logarithmic(title, x, y string) *plot.Plot {
	panel := figure.NewPanel(title, x, y)
	for _, axis := range []*plot.Axis{&panel.X, &panel.Y} {
		axis.Tick.Marker = figure.Decades{Most: 8}
	}
	return panel
}

// costs are the decimal logarithms of the times over those of the errors, which are shown down to 1e-13.
func costs(runs []run) (at plotter.XYs) {
	for _, r := range runs {
		at = append(at, plotter.XY{X: math.Max(math.Log10(r.err), -13), Y: math.Log10(float64(r.cost.Nanoseconds()) / 1e3)})
	}
	return at
}

// tolerances are the decimal logarithms of the errors, shown down to 1e-14, over those of the tolerances.
func tolerances(runs []run) (at plotter.XYs) {
	for _, r := range runs {
		at = append(at, plotter.XY{X: math.Log10(r.tolerance), Y: math.Max(math.Log10(r.err), -14)})
	}
	return at
}
