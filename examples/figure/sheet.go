package figure

import (
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// Sheet is rows of aligned panels, if wanted under a title and with one legend for all below them.
type Sheet struct {
	Title         string
	Panels        [][]*plot.Plot // rows of the same length
	Legend        []Entry
	Columns       int // of the legend
	Width, Height vg.Length
}

// Entry is a line of the legend.
type Entry struct {
	name  string
	marks []plot.Thumbnailer
}

// NewEntry is a name with the marks that are drawn beside it, on each other.
func NewEntry(name string, marks ...plot.Thumbnailer) Entry { return Entry{name, marks} }

const (
	margin     = 4 * vg.Millimeter
	titleBand  = 11 * vg.Millimeter // of the sheet
	headBand   = 8 * vg.Millimeter  // of a panel
	legendLine = 6 * vg.Millimeter
)

// Save draws the sheet into folder/name.png and folder/name.svg and returns the paths.
func (s *Sheet) Save(folder, name string) ([]string, error) {
	return Save(folder, name, s.Width, s.Height, func(c draw.Canvas) error {
		s.draw(c)
		return nil
	})
}

func (s *Sheet) draw(c draw.Canvas) {
	var top, bottom vg.Length
	if s.Title != "" {
		top = titleBand
		write(c, s.Title, 14, vg.Point{X: s.Width / 2, Y: s.Height - titleBand/2 - margin/2}, draw.XCenter)
	}
	if len(s.Legend) > 0 {
		rows := (len(s.Legend) + s.Columns - 1) / s.Columns
		bottom = vg.Length(rows)*legendLine + margin
		s.drawLegend(draw.Crop(c, 3*margin, -margin, margin, bottom-s.Height), rows)
	}
	s.drawPanels(draw.Crop(c, 0, 0, bottom, -top))
}

// write puts the middle of capital letters at a point, whether or not others reach below the line.
func write(c draw.Canvas, text string, size vg.Length, at vg.Point, align draw.XAlignment) {
	style := draw.TextStyle{Color: Black, Font: Sans(size), XAlign: align, YAlign: draw.YBottom, Handler: plot.DefaultTextHandler}
	at.Y -= 0.45 * size
	c.FillText(style, at, text)
}

// drawLegend fills the columns from left to right, each from above.
func (s *Sheet) drawLegend(c draw.Canvas, rows int) {
	const thumb = 11 * vg.Millimeter
	across := (c.Max.X - c.Min.X) / vg.Length(s.Columns)
	for i, e := range s.Legend {
		x := c.Min.X + across*vg.Length(i/rows)
		y := c.Max.Y - legendLine*(vg.Length(i%rows)+0.5)
		box := draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{
			Min: vg.Point{X: x, Y: y - legendLine/2}, Max: vg.Point{X: x + thumb, Y: y + legendLine/2}}}
		for _, mark := range e.marks {
			mark.Thumbnail(&box)
		}
		write(c, e.name, 10, vg.Point{X: x + thumb + margin/2, Y: y}, draw.XLeft)
	}
}

// drawPanels sets the titles of a row on one line, which the panels would not do themselves.
func (s *Sheet) drawPanels(c draw.Canvas) {
	heads := make([][]string, len(s.Panels))
	var first, others vg.Length
	for i, row := range s.Panels {
		for _, panel := range row {
			heads[i] = append(heads[i], panel.Title.Text)
			if panel.Title.Text != "" && i == 0 {
				first = headBand
			} else if panel.Title.Text != "" {
				others = headBand
			}
			panel.Title.Text = ""
		}
	}
	tiles := draw.Tiles{Rows: len(s.Panels), Cols: len(s.Panels[0]), PadTop: margin + first, PadBottom: margin, PadLeft: margin,
		PadRight: 3 * margin, PadX: 3 * margin, PadY: 2*margin + others}
	for i, row := range plot.Align(s.Panels, tiles, c) {
		for j, area := range row {
			panel := s.Panels[i][j]
			panel.Draw(area)
			above := panel.DataCanvas(area).Max.Y // the same along the row, which the area with its labels is not
			write(c, heads[i][j], 12, vg.Point{X: area.Center().X, Y: above + 0.7*headBand}, draw.XCenter)
			panel.Title.Text = heads[i][j]
		}
	}
}
