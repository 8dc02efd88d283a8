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

// draw writes bolt.png and bolt.svg: clamp load above creep strain, with one time axis.
func (p *report) draw(folder string) ([]string, error) {
	load, err := p.loadPanel()
	if err != nil {
		return nil, err
	}
	creep, err := p.creepPanel()
	if err != nil {
		return nil, err
	}
	sheet := figure.Sheet{Title: p.joint.title, Panels: [][]*plot.Plot{{load}, {creep}}, Width: 22 * vg.Centimeter,
		Height: 19 * vg.Centimeter}
	return sheet.Save(folder, "bolt")
}

func (p *report) loadPanel() (*plot.Plot, error) {
	panel := figure.NewPanel("", "", "Clamp load [kN]")
	scale := float64(p.joint.count) / newtonPerKilonewton
	loads := func(c *course) plotter.XYs {
		return c.curve(func(s sample) float64 { return s.load * scale })
	}
	if len(p.without) > 0 { // below the others, in the legend after them
		bare, err := figure.AddLine(panel, loads(p.without[0]), figure.Grey, 1.2)
		if err != nil {
			return nil, err
		}
		defer func() { panel.Legend.Add("without retightening", bare) }()
	}
	if err := addLine(panel, "clamp load", loads(p.course), figure.Blue, 1.6); err != nil {
		return nil, err
	}
	required := p.joint.required / newtonPerKilonewton
	limit := plotter.XYs{{X: p.history.start(), Y: required}, {X: p.history.end(), Y: required}}
	name := "required, " + p.kilonewton(p.joint.perBolt(p.joint.required)) + " kN"
	if err := addLine(panel, name, limit, figure.Vermillion, 1.4, 6, 3); err != nil {
		return nil, err
	}
	if err := p.addMarks(panel, scale); err != nil {
		return nil, err
	}
	p.setRange(panel, 0.04)
	return panel, nil
}

func (p *report) creepPanel() (*plot.Plot, error) {
	panel := figure.NewPanel("", "Time [h]", "Creep strain of the bolts [%]")
	colours := []color.Color{figure.Blue, figure.Green, figure.Purple, figure.Vermillion, figure.Grey}
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
	panel.X.Tick.Marker = figure.Round{Most: 9}
}

func (c *course) curve(value func(sample) float64) plotter.XYs {
	var xy plotter.XYs
	for _, s := range c.samples {
		xy = append(xy, plotter.XY{X: s.time, Y: value(s)})
	}
	return xy
}

// addLine adds a curve with its name in the legend.
func addLine(panel *plot.Plot, name string, xy plotter.XYs, c color.Color, width vg.Length, dashes ...vg.Length) error {
	line, err := figure.AddLine(panel, xy, c, width, dashes...)
	if err == nil {
		panel.Legend.Add(name, line)
	}
	return err
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
	marks, err := figure.AddGlyphs(panel, xy, draw.GlyphStyle{Color: figure.Vermillion, Radius: 4, Shape: draw.PyramidGlyph{}})
	if err == nil {
		panel.Legend.Add("retightened", marks)
	}
	return err
}
