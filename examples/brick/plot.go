package main

import (
	"fmt"
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"

	"example.com/holdtime/examples/figure"
)

// draw writes brick.png and brick.svg.
func (r *report) draw(folder string) ([]string, error) {
	creep, err := r.creepPanel()
	if err != nil {
		return nil, err
	}
	newton, err := r.newtonPanel()
	if err != nil {
		return nil, err
	}
	sheet := figure.Sheet{Panels: [][]*plot.Plot{{creep, newton}}, Width: 28 * vg.Centimeter, Height: 13 * vg.Centimeter}
	return sheet.Save(folder, "brick")
}

func (r *report) creepPanel() (*plot.Plot, error) {
	panel := figure.NewPanel("Creep strain of the brick in the tension program (invented data)", "Time [h]",
		"Creep strain along the tension [%]")
	var x, y []float64
	begun, total, above := 0.0, 0.0, 0.0
	for _, s := range tensionProgram(r.steps) {
		const fine = 40
		for i := 0; i <= fine && s.hours > 0; i++ {
			hours := s.hours * float64(i) / fine
			x, y = append(x, begun+hours), append(y, 100*(total+tensionCreep(s, above, hours, r.exponent)))
		}
		total += tensionCreep(s, above, s.hours, r.exponent)
		begun, above = begun+s.hours, s.above
	}
	line, err := figure.AddLine(panel, figure.Pairs(x, y), figure.Blue, 1.6)
	if err != nil {
		return nil, err
	}
	panel.Legend.Add("closed form", line)
	var percent []float64
	for _, e := range r.tension[0].strain {
		percent = append(percent, 100*e)
	}
	marks, err := figure.AddMarks(panel, figure.Pairs(r.tension[0].hours, percent), figure.Vermillion)
	if err != nil {
		return nil, err
	}
	panel.Legend.Add("brick, end of each step", marks)
	panel.Legend.Top = true
	panel.Legend.YOffs = -panel.Legend.YOffs
	panel.X.Min, panel.Y.Min = 0, 0
	panel.Y.Max *= 1.25
	return panel, nil
}

func (r *report) newtonPanel() (*plot.Plot, error) {
	panel := figure.NewPanel("Residuals of the brick pulled askew", "Corrections of the global Newton iteration", "Residual, relative")
	colours := []color.Color{figure.Grey, figure.Green, figure.Blue, figure.Vermillion}
	for i, residuals := range r.askew {
		var xy plotter.XYs
		for k, x := range residuals {
			if x > 0 {
				xy = append(xy, plotter.XY{X: float64(k), Y: math.Log10(x)})
			}
		}
		name := fmt.Sprintf("Δt = %s h", figure.Grouped(askewHours[i], 0))
		if askewHours[i] == 0 {
			name = "elastic"
		}
		line, err := figure.AddLine(panel, xy, colours[i], 1.6)
		if err != nil {
			return nil, err
		}
		if _, err := figure.AddMarks(panel, xy, colours[i]); err != nil {
			return nil, err
		}
		panel.Legend.Add(name, line)
	}
	panel.Y.Tick.Marker = figure.Decades{Most: 8}
	panel.X.Tick.Marker = whole{}
	panel.X.Min, panel.Y.Max = 0, 0
	panel.Legend.Top, panel.Legend.Left = true, false
	panel.Legend.XOffs, panel.Legend.YOffs = -panel.Legend.XOffs, -panel.Legend.YOffs
	return panel, nil
}

// whole places every integer.
type whole struct{}

// Ticks implements plot.Ticker.
func (whole) Ticks(low, high float64) (list []plot.Tick) {
	for i := math.Ceil(low); i <= high; i++ {
		list = append(list, plot.Tick{Value: i, Label: fmt.Sprintf("%.0f", i)})
	}
	return list
}
