package main

import (
	"encoding/csv"
	"fmt"
	"image/color"
	"math"
	"os"
	"path/filepath"
	"strconv"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"

	"example.com/holdtime/examples/figure"
)

const (
	figureWidth  = 28 * vg.Centimeter
	figureHeight = 23 * vg.Centimeter
)

// files writes the pictures and the tables of stresses into a folder, and returns the paths.
func (r *report) files(folder string) (paths []string, err error) {
	for i, name := range []string{"uniform", "gradient"} {
		h := r.cases[i]
		f, err := h.wallFigure()
		if err != nil {
			return paths, err
		}
		f.Title = fmt.Sprintf("%s: %s", r.title, h.describe())
		written, err := f.Save(folder, name)
		if err != nil {
			return paths, err
		}
		path := filepath.Join(folder, name+".csv")
		if err := h.table(path); err != nil {
			return paths, err
		}
		paths = append(append(paths, written...), path)
	}
	f, err := r.approachFigure()
	if err != nil {
		return paths, err
	}
	f.Title = r.title + ": the way to the steady state"
	written, err := f.Save(folder, "approach")
	return append(paths, written...), err
}

// describe says what temperatures a case has.
func (h *history) describe() string {
	bore, outside := h.wall.boreKelvin-icePoint, h.wall.outerKelvin-icePoint
	if bore == outside {
		return fmt.Sprintf("all at %.0f °C", bore)
	}
	return fmt.Sprintf("bore at %.0f °C, outside at %.0f °C", bore, outside)
}

// moments are samples from the start to the end, at round hours, about evenly spaced on the way to the steady state.
func (h *history) moments() (list []*sample) {
	start := h.course.start()
	list = []*sample{start}
	shares := []float64{0.8, 0.6, 0.4, 0.2, 0.05}
	for k := range h.course.samples {
		s := &h.course.samples[k]
		if !s.stop || len(shares) == 0 || s.distance > shares[0]*start.distance {
			continue
		}
		list = append(list, s)
		for len(shares) > 0 && s.distance <= shares[0]*start.distance {
			shares = shares[1:]
		}
	}
	return append(list, h.course.end())
}

// wallFigure draws the stresses through the wall.
func (h *history) wallFigure() (*figure.Sheet, error) {
	f := &figure.Sheet{Columns: 4, Width: figureWidth, Height: figureHeight}
	var panels []*plot.Plot
	for _, c := range []struct {
		title string
		value func(wallStress) float64
	}{
		{"Hoop stress", func(s wallStress) float64 { return s.hoop }},
		{"Axial stress", func(s wallStress) float64 { return s.axial }},
		{"Radial stress", func(s wallStress) float64 { return s.radial }},
		{"Von Mises stress", wallStress.mises},
	} {
		panel := figure.NewPanel(c.title, "Radius [mm]", "Stress [MPa]")
		var err error
		if f.Legend, err = h.wallLines(panel, c.value); err != nil {
			return nil, err
		}
		panels = append(panels, panel)
	}
	pad(panels...)
	f.Panels = [][]*plot.Plot{panels[:2], panels[2:]}
	return f, nil
}

// wallLines are the profiles of one stress.
func (h *history) wallLines(panel *plot.Plot, value func(wallStress) float64) (legend []figure.Entry, err error) {
	colours := []color.Color{figure.Purple, figure.Blue, figure.Sky, figure.Green, figure.Orange, figure.Vermillion}
	list := h.moments()
	for i, s := range list[:len(list)-1] {
		bore, outside := h.wall.surface(s.condition)
		x, y := []float64{h.wall.inner}, []float64{value(bore)}
		for k := range h.wall.points {
			x, y = append(x, h.wall.points[k].radius), append(y, value(s.stress[k]))
		}
		line, err := figure.AddLine(panel, figure.Pairs(append(x, h.wall.outer), append(y, value(outside))), colours[i%len(colours)], 1.5)
		if err != nil {
			return nil, err
		}
		name := figure.Grouped(s.time, 0) + " h"
		if i == 0 {
			name = "elastic start"
		}
		legend = append(legend, figure.NewEntry(name, line))
	}
	end := list[len(list)-1]
	var x, y []float64
	for k := 0; k < len(h.wall.points); k += max(1, len(h.wall.points)/16) {
		x, y = append(x, h.wall.points[k].radius), append(y, value(end.stress[k]))
	}
	marks, err := figure.AddMarks(panel, figure.Pairs(x, y), figure.Black)
	if err != nil {
		return nil, err
	}
	x, y = nil, nil
	for _, radius := range h.wall.nodes {
		x, y = append(x, radius), append(y, value(h.exact.at(radius)))
	}
	line, err := figure.AddLine(panel, figure.Pairs(x, y), figure.Black, 1.2, 5, 3)
	if err != nil {
		return nil, err
	}
	panel.X.Min, panel.X.Max = h.wall.inner, h.wall.outer
	return append(legend, figure.NewEntry(figure.Grouped(end.time, 0)+" h", marks), figure.NewEntry("steady state, "+h.against, line)), nil
}

// approachFigure draws how both cases come to rest.
func (r *report) approachFigure() (*figure.Sheet, error) {
	hoop := figure.NewPanel("Hoop stress at both surfaces", "Time [h]", "Stress [MPa]")
	mises := figure.NewPanel("Von Mises stress at both surfaces", "Time [h]", "Stress [MPa]")
	velocity := figure.NewPanel("Radial velocity of the bore", "Time [h]", "Velocity [µm per 1000 h]")
	rest := figure.NewPanel("Largest distance of any stress from the steady state", "Time [h]", "Distance, over the von Mises stress")
	rest.Y.Tick.Marker = figure.Decades{Most: 8}
	f := &figure.Sheet{Columns: 3, Width: figureWidth, Height: figureHeight, Panels: [][]*plot.Plot{{hoop, mises}, {velocity, rest}}}
	first := math.Inf(-1)
	for i, h := range r.cases {
		colour := []color.Color{figure.Blue, figure.Vermillion}[i]
		first = math.Max(first, math.Log10(h.course.samples[1].time))
		if _, err := h.surfaceLines(hoop, colour, func(s wallStress) float64 { return s.hoop }); err != nil {
			return nil, err
		}
		legend, err := h.surfaceLines(mises, colour, wallStress.mises)
		if err != nil {
			return nil, err
		}
		if err := h.restLines(velocity, rest, colour); err != nil {
			return nil, err
		}
		f.Legend = append(f.Legend, legend...)
	}
	f.Legend = append(f.Legend[:2], append(f.Legend[3:5], f.Legend[5])...) // the steady state once
	for _, panel := range []*plot.Plot{hoop, mises, velocity, rest} {
		panel.X.Tick.Marker = figure.Decades{Most: 8}
		panel.X.Min = first
	}
	pad(hoop, mises, velocity, rest)
	return f, nil
}

// surfaceLines are a stress at the bore (full) and outside (dashed) over the logarithm of time, and where it is going.
func (h *history) surfaceLines(panel *plot.Plot, colour color.Color, value func(wallStress) float64) ([]figure.Entry, error) {
	var x, inside, outside []float64
	for k := range h.course.samples[1:] {
		s := &h.course.samples[k+1]
		bore, outer := h.wall.surface(s.condition)
		x, inside, outside = append(x, math.Log10(s.time)), append(inside, value(bore)), append(outside, value(outer))
	}
	full, err := figure.AddLine(panel, figure.Pairs(x, inside), colour, 1.6)
	if err != nil {
		return nil, err
	}
	dashed, err := figure.AddLine(panel, figure.Pairs(x, outside), colour, 1.6, 6, 3)
	if err != nil {
		return nil, err
	}
	last := x[len(x)-1]
	marks, err := figure.AddMarks(panel, plotter.XYs{{X: last, Y: value(h.exact.at(h.wall.inner))},
		{X: last, Y: value(h.exact.at(h.wall.outer))}}, figure.Black)
	if err != nil {
		return nil, err
	}
	return []figure.Entry{figure.NewEntry("bore, "+h.name, full), figure.NewEntry("outside, "+h.name, dashed),
		figure.NewEntry("steady state: Bailey, quadrature", marks)}, nil
}

// restLines are the velocity of the bore and the distance from the steady state over the logarithm of time.
func (h *history) restLines(velocity, rest *plot.Plot, colour color.Color) error {
	var x, middle, v, d []float64
	for k := range h.course.samples[1:] {
		s := &h.course.samples[k+1]
		x, d = append(x, math.Log10(s.time)), append(d, math.Log10(s.distance))
		middle, v = append(middle, math.Log10((s.time+h.course.samples[k].time)/2)), append(v, 1e6*s.velocity)
	}
	if _, err := figure.AddLine(velocity, figure.Pairs(middle, v), colour, 1.6); err != nil {
		return err
	}
	exact := 1e6 * h.exact.velocity / h.wall.inner
	if _, err := figure.AddMarks(velocity, plotter.XYs{{X: middle[len(middle)-1], Y: exact}}, figure.Black); err != nil {
		return err
	}
	_, err := figure.AddLine(rest, figure.Pairs(x, d), colour, 1.6)
	return err
}

// pad leaves some room above and below the curves.
func pad(panels ...*plot.Plot) {
	for _, p := range panels {
		room := 0.04 * (p.Y.Max - p.Y.Min)
		p.Y.Min, p.Y.Max = p.Y.Min-room, p.Y.Max+room
	}
}

// table writes the stresses at the round hours as CSV.
func (h *history) table(path string) error {
	f, err := os.Create(path)
	if err != nil {
		return err
	}
	w := csv.NewWriter(f)
	w.Write([]string{"time [h]", "radius [mm]", "radial [MPa]", "hoop [MPa]", "axial [MPa]", "von Mises [MPa]"})
	for k := range h.course.samples {
		s := &h.course.samples[k]
		if !s.stop && k < len(h.course.samples)-1 {
			continue
		}
		for i, at := range h.wall.points {
			t := s.stress[i]
			var row []string
			for _, x := range []float64{s.time, at.radius, t.radial, t.hoop, t.axial, t.mises()} {
				row = append(row, strconv.FormatFloat(x, 'g', 8, 64))
			}
			w.Write(row) // an error is kept and told by w.Error
		}
	}
	w.Flush()
	if err := w.Error(); err != nil {
		f.Close()
		return fmt.Errorf("%s: %w", path, err)
	}
	return f.Close()
}
