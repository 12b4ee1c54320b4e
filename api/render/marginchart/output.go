package marginchart

import (
	"bytes"
	"encoding/xml"
	"fmt"
	"image/color"
	"strconv"
	"strings"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
)

// family of the letters in SVG; those after the first are as wide.
const family = "Liberation Sans, Arial, Helvetica, sans-serif"

// AppendSVG appends the chart as SVG that stands alone or inside a page: its
// colours are attributes, which the style of a page may override by class.
func (c *Chart) AppendSVG(dst []byte) []byte {
	p := c.lay()
	var b bytes.Buffer
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" class="margins" width="%d" height="%s" viewBox="0 0 %d %s" role="img" aria-label="%s" font-family="%s">`,
		width*4/3, short(p.height*4/3), width, short(p.height), Escape(c.Words()), family)
	fmt.Fprintf(&b, `<rect class="paper" width="%d" height="%s" fill="%s"/>`, width, short(p.height), colours[paper])
	for i := range p.shapes {
		p.shapes[i].svg(&b)
	}
	b.WriteString("</svg>\n")
	return append(dst, b.Bytes()...)
}

// short writes a length in hundredths of a point.
func short(x float64) string {
	s := strings.TrimRight(strconv.FormatFloat(x, 'f', 2, 64), "0")
	return strings.TrimSuffix(s, ".")
}

// Escape makes a text fit for XML. Characters that XML doesn't know become U+FFFD.
func Escape(s string) string {
	var b strings.Builder
	if err := xml.EscapeText(&b, []byte(s)); err != nil {
		return "" // a strings.Builder never fails
	}
	return b.String()
}

func (s *shape) svg(b *bytes.Buffer) {
	class, colour := roleNames[s.role], colours[s.role]
	if s.part != "" {
		class += " " + s.part
	}
	switch s.form {
	case area:
		opacity := ""
		if s.faint {
			opacity = ` fill-opacity="0.35"`
		}
		fmt.Fprintf(b, `<rect class="%s" x="%s" y="%s" width="%s" height="%s" fill="%s"%s/>`, class, short(s.x), short(s.y), short(s.dx), short(s.dy), colour, opacity)
	case stroke:
		fmt.Fprintf(b, `<line class="%s" x1="%s" y1="%s" x2="%s" y2="%s" stroke="%s" stroke-width="%s"/>`, class, short(s.x), short(s.y), short(s.x+s.dx), short(s.y+s.dy), colour, short(s.thick))
	case disc:
		fmt.Fprintf(b, `<circle class="%s" cx="%s" cy="%s" r="%s" fill="%s"/>`, class, short(s.x), short(s.y), short(s.dx), colour)
	case polygon:
		var points []string
		for _, q := range s.points {
			points = append(points, short(q[0])+","+short(q[1]))
		}
		fmt.Fprintf(b, `<polygon class="%s" points="%s" fill="%s"/>`, class, strings.Join(points, " "), colour)
	case words:
		s.svgWords(b, class, colour)
	}
}

func (s *shape) svgWords(b *bytes.Buffer, class, colour string) {
	extra := [...]string{"", ` text-anchor="middle"`, ` text-anchor="end"`}[s.anchor]
	if s.bold {
		extra += ` font-weight="bold"`
	}
	fmt.Fprintf(b, `<text class="%s" x="%s" y="%s" font-size="%s" fill="%s"%s>%s</text>`, class, short(s.x), short(s.y), short(s.size), colour, extra, Escape(s.text))
}

// dotsPerInch of the PNG: sharp in print at its own width.
const dotsPerInch = 200

// PNG returns the chart as an image.
func (c *Chart) PNG() ([]byte, error) {
	p := c.lay()
	img := vgimg.NewWith(vgimg.UseWH(width, vg.Length(p.height)), vgimg.UseDPI(dotsPerInch))
	canvas := draw.New(img)
	canvas.SetColor(paint(paper, false))
	canvas.Fill(canvas.Rectangle.Path())
	for i := range p.shapes {
		p.shapes[i].draw(canvas, p.height)
	}
	var b bytes.Buffer
	_, err := vgimg.PngCanvas{Canvas: img}.WriteTo(&b)
	return b.Bytes(), err
}

// paint is the colour of a role.
func paint(r role, faint bool) color.Color {
	x, err := strconv.ParseUint(colours[r][1:], 16, 32)
	if err != nil {
		return color.Black // a test reads every colour
	}
	c := color.NRGBA{R: uint8(x >> 16), G: uint8(x >> 8), B: uint8(x), A: 255}
	if faint {
		c.A = 89
	}
	return c
}

func (s *shape) draw(c draw.Canvas, height float64) {
	at := func(x, y float64) vg.Point { return vg.Point{X: vg.Length(x), Y: vg.Length(height - y)} }
	colour := paint(s.role, s.faint)
	c.SetColor(colour)
	switch s.form {
	case area:
		c.FillPolygon(colour, []vg.Point{at(s.x, s.y), at(s.x+s.dx, s.y), at(s.x+s.dx, s.y+s.dy), at(s.x, s.y+s.dy)})
	case stroke:
		c.StrokeLine2(draw.LineStyle{Color: colour, Width: vg.Length(s.thick)}, at(s.x, s.y).X, at(s.x, s.y).Y, at(s.x+s.dx, s.y+s.dy).X, at(s.x+s.dx, s.y+s.dy).Y)
	case disc:
		c.DrawGlyphNoClip(draw.GlyphStyle{Color: colour, Radius: vg.Length(s.dx), Shape: draw.CircleGlyph{}}, at(s.x, s.y))
	case polygon:
		var points []vg.Point
		for _, q := range s.points {
			points = append(points, at(q[0], q[1]))
		}
		c.FillPolygon(colour, points)
	case words:
		letters := face(s.size, s.bold)
		said := drawable(s.text)
		p := at(s.x, s.y)
		p.X -= letters.Width(said) * vg.Length(s.anchor) / 2
		c.FillString(font.DefaultCache.Lookup(letters.Font, letters.Font.Size), p, said)
	}
}

// drawable replaces what the typeface has no glyph for where a sign is near.
func drawable(s string) string { return arrows.Replace(s) }

var arrows = strings.NewReplacer("◂", "◄", "▸", "►")

// Size returns width and height of the chart in points.
func (c *Chart) Size() (wide, high float64) { return width, c.lay().height }
