// Package figure is the house style of the examples' pictures: colours, fonts, panels, ticks, sheets of panels with a legend, and
// saving the same drawing as PNG and SVG.
package figure

import (
	"image/color"
	"io"
	"os"
	"path/filepath"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgsvg"
)

// Colours that stay apart in the common forms of colour blindness (the palette of Okabe and Ito 2008, from memory), and greys.
var (
	Blue       = color.RGBA{0, 114, 178, 255}
	Vermillion = color.RGBA{213, 94, 0, 255}
	Green      = color.RGBA{0, 158, 115, 255}
	Purple     = color.RGBA{204, 121, 167, 255}
	Orange     = color.RGBA{230, 159, 0, 255}
	Sky        = color.RGBA{86, 180, 233, 255}
	Black      = color.RGBA{0, 0, 0, 255}
	Grey       = color.RGBA{140, 140, 140, 255}
	Pale       = color.RGBA{228, 228, 228, 255}
)

const pixelsPerInch = 150

// Save paints on white into folder/name.png and folder/name.svg, making the folder if need be, and returns the paths.
func Save(folder, name string, width, height vg.Length, paint func(draw.Canvas) error) ([]string, error) {
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return nil, err
	}
	bitmap := vgimg.NewWith(vgimg.UseWH(width, height), vgimg.UseDPI(pixelsPerInch))
	vector := vgsvg.NewWith(vgsvg.UseWH(width, height), vgsvg.EmbedFonts(true))
	for _, c := range []draw.Canvas{draw.New(bitmap), draw.New(vector)} {
		c.FillPolygon(color.White, []vg.Point{{}, {X: width}, {X: width, Y: height}, {Y: height}})
		if err := paint(c); err != nil {
			return nil, err
		}
	}
	paths := []string{filepath.Join(folder, name+".png"), filepath.Join(folder, name+".svg")}
	for i, picture := range []io.WriterTo{vgimg.PngCanvas{Canvas: bitmap}, vector} {
		if err := writeFile(paths[i], picture); err != nil {
			return nil, err
		}
	}
	return paths, nil
}

func writeFile(path string, picture io.WriterTo) error {
	f, err := os.Create(path)
	if err != nil {
		return err
	}
	if _, err := picture.WriteTo(f); err != nil {
		f.Close()
		return err
	}
	return f.Close()
}
