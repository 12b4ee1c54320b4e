package mapplot

import (
	"bytes"
	"fmt"
	"html"
	"io"
	"math"
	"path/filepath"
	"slices"
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgsvg"

	"regimed/regime/whatif"
)

// Format is a file format of a picture.
type Format int

// The formats.
const (
	SVG Format = iota
	PNG
)

// FormatOf tells the format by the end of a file name.
func FormatOf(path string) (Format, error) {
	switch end := filepath.Ext(path); strings.ToLower(end) {
	case ".svg":
		return SVG, nil
	case ".png":
		return PNG, nil
	default:
		return 0, fmt.Errorf("a picture ends in .svg or .png, not in %q", end)
	}
}

// Widths of a picture in millimetres.
const (
	LeastWidth   = 80
	UsualWidth   = 160
	LargestWidth = 400
)

// Draw draws a map, so many millimetres wide. The same map gives the same bytes.
func Draw(w io.Writer, f Format, m *whatif.Map, width float64) error {
	s := newSheet(m, vg.Length(min(max(width, LeastWidth), LargestWidth))*vg.Millimeter)
	if f == PNG {
		c := vgimg.NewWith(vgimg.UseWH(s.whole.X, s.whole.Y), vgimg.UseDPI(dotsPerInch))
		s.draw(draw.New(c))
		_, err := vgimg.PngCanvas{Canvas: c}.WriteTo(w)
		return err
	}
	c := vgsvg.New(s.whole.X, s.whole.Y)
	s.draw(draw.New(c))
	var b bytes.Buffer
	if _, err := c.WriteTo(&b); err != nil {
		return err
	}
	_, err := w.Write(s.described(b.Bytes()))
	return err
}

// described gives an SVG a title and a description for those who do not see it,
// and fonts that other systems have.
func (s *sheet) described(svg []byte) []byte {
	svg = bytes.ReplaceAll(svg, []byte("font-family:"+family+";"), []byte("font-family:"+family+",Arial,Helvetica,sans-serif;"))
	head := bytes.Index(svg, []byte("<svg"))
	end := head + bytes.IndexByte(svg[max(head, 0):], '>') + 1
	if head < 0 || end <= head {
		return svg
	}
	words := "\n<title>" + html.EscapeString(s.heading()) + "</title>\n<desc>" + html.EscapeString(s.description()) + "</desc>"
	return slices.Concat(svg[:head], []byte(`<svg role="img"`), svg[head+len("<svg"):end], []byte(words), svg[end:])
}

// Measures of the sheet.
const (
	margin      = 4 * vg.Millimeter
	gap         = 2.2 * vg.Millimeter
	strokeLong  = 1.6 * vg.Millimeter
	strokeShort = 0.9 * vg.Millimeter
	dotsPerInch = 300

	headSize  = 12.5
	textSize  = 10
	titleSize = 10
	smallSize = 9
	labelSize = 9
	lineSize  = 8.5
	footSize  = 8

	borderWidth = 0.9
	ruledWidth  = 0.65
	frameWidth  = 0.9
	markRadius  = 3.2
	badgeRadius = 5.2
)

// ruledDashes set lines of utilisation 1 apart from borders.
var ruledDashes = []vg.Length{3.2, 1.6}

// sheet is a picture: the map, its words and its measures.
type sheet struct {
	m             *whatif.Map
	x, y          axis
	whole         vg.Point // size of the sheet
	corner        vg.Point // lower left of the plot
	width, height vg.Length
	ruled         []ruled
	placed        *labels

	head, under    block
	xTitle, yTitle block
	xTicks, yTicks []tick
	rows           []row
	foot           block
}

func newSheet(m *whatif.Map, wide vg.Length) *sheet {
	s := &sheet{m: m, x: newAxis(&m.X), y: newAxis(&m.Y)}
	room := wide - 2*margin
	s.head = balanced(style(headSize, ink, xfont.WeightBold), s.heading(), room)
	s.under = balanced(style(smallSize, grey, xfont.WeightNormal), s.subject(), room)
	s.measure(wide)
	s.takeLines()
	s.placed = s.place()
	s.legend(room)
	s.foot = wrap(style(footSize, grey, xfont.WeightNormal), s.footing(), room)
	legend := vg.Length(0)
	for i := range s.rows {
		legend += s.rows[i].height() + rowGap
	}
	below := s.tickHeight() + gap + s.xTitle.height() + gap + legend + gap + s.foot.height() + margin
	s.corner.Y = below
	s.whole = vg.Point{X: wide, Y: below + s.height + 1.5*gap + s.under.height() + gap/2 + s.head.height() + margin}
	return s
}

// measure sets the size of the plot: as wide as the numbers beside it leave room.
func (s *sheet) measure(wide vg.Length) {
	words := style(textSize, ink, xfont.WeightNormal)
	s.height = 0.68 * (wide - 2*margin - 14*vg.Millimeter)
	s.yTitle = titleBlock(&s.y, words, s.height)
	s.yTicks = s.y.ticks(func(list []tick) bool {
		return s.fits(list, s.height, func(string) vg.Length { return 1.7 * s.tickStyle().FontExtents().Height })
	})
	widest := vg.Length(0)
	for _, t := range s.yTicks {
		widest = max(widest, s.tickStyle().Width(t.label))
	}
	s.corner.X = margin + s.yTitle.height() + gap/2 + widest + strokeLong + 0.8*vg.Millimeter
	s.width = wide - s.corner.X - margin - 2*vg.Millimeter
	s.xTitle = titleBlock(&s.x, words, s.width)
	s.xTicks = s.x.ticks(func(list []tick) bool {
		return s.fits(list, s.width, func(l string) vg.Length { return s.tickStyle().Width(l) + 5 })
	})
}

func titleBlock(a *axis, st textStyle, width vg.Length) block {
	inWords, path := a.title(func(doc string) bool { return st.Width(doc) <= width })
	return inOneOrTwo(st, inWords, path, width)
}

func (s *sheet) tickStyle() textStyle { return style(smallSize, ink, xfont.WeightNormal) }

func (s *sheet) tickHeight() vg.Length {
	return strokeLong + 0.8*vg.Millimeter + s.tickStyle().FontExtents().Height
}

// fits reports whether numbers, each of a size, stand clear of each other.
func (s *sheet) fits(list []tick, length vg.Length, size func(label string) vg.Length) bool {
	end := vg.Length(math.Inf(-1))
	for _, t := range list {
		if t.label == "" {
			continue
		}
		at, half := length*vg.Length(t.at), size(t.label)/2
		if at-half < end {
			return false
		}
		end = at + half
	}
	return true
}

// point is a position of the map on the plot.
func (s *sheet) point(p whatif.Point) vg.Point {
	return vg.Point{X: s.width * vg.Length(p.X), Y: s.height * vg.Length(p.Y)}
}

// draw puts everything on the sheet.
func (s *sheet) draw(c draw.Canvas) {
	c.SetColor(white)
	c.Fill(c.Rectangle.Path())
	top := s.head.draw(c, margin, s.whole.Y-margin) - gap/2
	s.under.draw(c, margin, top)
	s.drawRegions(c)
	s.drawLines(c)
	s.drawFrame(c)
	s.drawCase(c)
	s.drawWords(c)
	s.drawAxes(c)
	top = s.corner.Y - s.tickHeight() - gap - s.xTitle.height() - gap
	for i := range s.rows {
		top = s.rows[i].draw(c, margin, top) - rowGap
	}
	s.foot.draw(c, margin, margin+s.foot.height())
}

// on is a place of the plot on the sheet.
func (s *sheet) on(p vg.Point) vg.Point { return vg.Point{X: s.corner.X + p.X, Y: s.corner.Y + p.Y} }

func (s *sheet) path(points []vg.Point, closed bool) vg.Path {
	var p vg.Path
	for i, q := range points {
		if i == 0 {
			p.Move(s.on(q))
		} else {
			p.Line(s.on(q))
		}
	}
	if closed {
		p.Close()
	}
	return p
}

func (s *sheet) outline(points []whatif.Point) vg.Path {
	list := make([]vg.Point, len(points))
	for i, p := range points {
		list[i] = s.point(p)
	}
	return s.path(list, true)
}

// drawRegions fills the regions, the largest first: what a region surrounds comes
// after it, so that no hole has to be cut.
func (s *sheet) drawRegions(c draw.Canvas) {
	order := make([]*whatif.Region, len(s.m.Regions))
	for i := range s.m.Regions {
		order[i] = &s.m.Regions[i]
	}
	slices.SortStableFunc(order, func(a, b *whatif.Region) int { return compareOutlines(b, a) })
	for _, r := range order {
		c.SetColor(colourOf(r.Zone))
		c.Fill(s.outline(r.Rings[0]))
	}
	for _, r := range order {
		if r.Class == nil {
			s.hatch(c, r)
		}
	}
}

// hatch draws slanting lines across a region.
func (s *sheet) hatch(c draw.Canvas, r *whatif.Region) {
	c.SetLineStyle(draw.LineStyle{Color: pale, Width: 0.5})
	const pitch = 2.2 * vg.Millimeter
	for offset := -s.height; offset < s.width; offset += pitch {
		p, q := vg.Point{X: offset}, vg.Point{X: offset + s.height, Y: s.height}
		for _, part := range s.inside(r, p, q) {
			for _, piece := range gaps([]vg.Point{mix(p, q, part[0]), mix(p, q, part[1])}, s.placed.boxes) {
				c.Stroke(s.path(piece, false))
			}
		}
	}
}

// inside lists the parts of a straight line that lie in a region.
func (s *sheet) inside(r *whatif.Region, p, q vg.Point) [][2]float64 {
	n := vg.Point{X: -(q.Y - p.Y), Y: q.X - p.X}
	side := func(a vg.Point) float64 { return float64((a.X-p.X)*n.X + (a.Y-p.Y)*n.Y) }
	size := float64((q.X-p.X)*(q.X-p.X) + (q.Y-p.Y)*(q.Y-p.Y))
	var at []float64
	for _, ring := range r.Rings {
		for i := range ring {
			a, b := s.point(ring[i]), s.point(ring[(i+1)%len(ring)])
			if da, db := side(a), side(b); (da > 0) != (db > 0) {
				x := mix(a, b, da/(da-db))
				at = append(at, float64((x.X-p.X)*(q.X-p.X)+(x.Y-p.Y)*(q.Y-p.Y))/size)
			}
		}
	}
	slices.Sort(at)
	var parts [][2]float64
	for i := 0; i+1 < len(at); i += 2 {
		parts = append(parts, [2]float64{at[i], at[i+1]})
	}
	return parts
}

func compareOutlines(a, b *whatif.Region) int {
	x, y := area(a.Rings[0]), area(b.Rings[0])
	switch {
	case x < y:
		return -1
	case x > y:
		return 1
	}
	return 0
}

func area(ring []whatif.Point) float64 {
	sum := 0.0
	for i, p := range ring {
		q := ring[(i+1)%len(ring)]
		sum += p.X*q.Y - q.X*p.Y
	}
	return sum / 2
}

// drawLines draws the lines of utilisation 1, with gaps for words, and the borders.
func (s *sheet) drawLines(c draw.Canvas) {
	c.SetLineStyle(ruledStyle())
	for i := range s.ruled {
		for _, t := range s.ruled[i].tracks {
			for _, piece := range gaps(t.points, s.placed.boxes) {
				c.Stroke(s.path(piece, false))
			}
		}
	}
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: borderWidth})
	for i := range s.m.Borders {
		b := &s.m.Borders[i]
		list := make([]vg.Point, len(b.Points))
		for k, p := range b.Points {
			list[k] = s.point(p)
		}
		c.Stroke(s.path(list, b.Closed))
	}
}

func ruledStyle() draw.LineStyle {
	return draw.LineStyle{Color: ink, Width: ruledWidth, Dashes: ruledDashes}
}

func (s *sheet) drawFrame(c draw.Canvas) {
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: frameWidth})
	c.Stroke(s.path([]vg.Point{{}, {X: s.width}, {X: s.width, Y: s.height}, {Y: s.height}}, true))
}

// drawCase draws where the case stands, and may stand.
func (s *sheet) drawCase(c draw.Canvas) {
	if cloud := s.m.Cloud; cloud != nil {
		c.SetColor(ink)
		for _, p := range cloud.Points {
			c.Fill(disc(s.on(s.point(p)), 0.7))
		}
		s.drawBox(c, cloud)
	}
	if s.m.Here != nil {
		mark(c, s.on(s.point(*s.m.Here)))
	}
}

// drawBox draws the 5 to 95 % of both inputs, as far as the map goes.
func (s *sheet) drawBox(c draw.Canvas, cloud *whatif.Cloud) {
	low, high := s.point(cloud.Low), s.point(cloud.High)
	const least = 2.5 // half the height of the box of one that is certain
	if low.X == high.X {
		low.X, high.X = low.X-least, high.X+least
	}
	if low.Y == high.Y {
		low.Y, high.Y = low.Y-least, high.Y+least
	}
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: 0.7})
	view := box{middle: vg.Point{X: s.width / 2, Y: s.height / 2}, width: s.width, high: s.height}
	for _, side := range [][2]vg.Point{
		{low, {X: high.X, Y: low.Y}}, {{X: high.X, Y: low.Y}, high}, {high, {X: low.X, Y: high.Y}}, {{X: low.X, Y: high.Y}, low},
	} {
		if from, to := view.covers(side[0], side[1]); from < to {
			c.Stroke(s.path([]vg.Point{mix(side[0], side[1], from), mix(side[0], side[1], to)}, false))
		}
	}
}

func disc(at vg.Point, radius vg.Length) vg.Path {
	var p vg.Path
	p.Move(vg.Point{X: at.X + radius, Y: at.Y})
	p.Arc(at, radius, 0, 2*math.Pi)
	p.Close()
	return p
}

// mark draws the case: a ring with a dot, on white.
func mark(c draw.Canvas, at vg.Point) {
	c.SetColor(white)
	c.Fill(disc(at, markRadius+1.4))
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: 1.3})
	c.Stroke(disc(at, markRadius))
	c.SetColor(ink)
	c.Fill(disc(at, 1.2))
}

func (s *sheet) drawWords(c draw.Canvas) {
	for _, b := range s.placed.badges {
		if b.led {
			c.SetLineStyle(draw.LineStyle{Color: ink, Width: 0.5})
			c.Stroke(s.path([]vg.Point{b.from, b.at}, false))
			c.SetColor(ink)
			c.Fill(disc(s.on(b.from), 0.9))
		}
		drawBadge(c, s.on(b.at), b.text)
	}
	for i := range s.placed.words {
		w := &s.placed.words[i]
		at := w.at
		at.middle = s.on(at.middle)
		if w.pad {
			c.SetColor(padding)
			c.Fill(rectangle(at))
		}
		w.drawMiddle(c, at)
	}
}

func rectangle(b box) vg.Path {
	var p vg.Path
	p.Move(b.global(vg.Point{X: -b.width / 2, Y: -b.high / 2}))
	p.Line(b.global(vg.Point{X: b.width / 2, Y: -b.high / 2}))
	p.Line(b.global(vg.Point{X: b.width / 2, Y: b.high / 2}))
	p.Line(b.global(vg.Point{X: -b.width / 2, Y: b.high / 2}))
	p.Close()
	return p
}

func drawBadge(c draw.Canvas, at vg.Point, text string) {
	c.SetColor(white)
	c.Fill(disc(at, badgeRadius))
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: 0.6})
	c.Stroke(disc(at, badgeRadius))
	b := block{style: style(footSize, ink, xfont.WeightNormal), lines: []string{text}}
	b.drawMiddle(c, box{middle: at})
}

func (s *sheet) drawAxes(c draw.Canvas) {
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: 0.6})
	for _, t := range s.xTicks {
		x := s.width * vg.Length(t.at)
		c.Stroke(s.path([]vg.Point{{X: x}, {X: x, Y: -t.stroke()}}, false))
		st := s.tickStyle()
		st.XAlign = draw.XCenter
		if t.label != "" {
			c.FillText(st, s.on(vg.Point{X: x, Y: -strokeLong - 0.8*vg.Millimeter}), t.label)
		}
	}
	for _, t := range s.yTicks {
		y := s.height * vg.Length(t.at)
		c.Stroke(s.path([]vg.Point{{Y: y}, {X: -t.stroke(), Y: y}}, false))
		st := s.tickStyle()
		st.XAlign, st.YAlign = draw.XRight, draw.YCenter
		if t.label != "" {
			c.FillText(st, s.on(vg.Point{X: -strokeLong - 0.8*vg.Millimeter, Y: y + lift*st.Font.Size}), t.label)
		}
	}
	s.xTitle.drawMiddle(c, box{middle: vg.Point{X: s.corner.X + s.width/2, Y: s.corner.Y - s.tickHeight() - gap - s.xTitle.height()/2}})
	s.yTitle.drawMiddle(c, box{middle: vg.Point{X: margin + s.yTitle.height()/2, Y: s.corner.Y + s.height/2}, angle: math.Pi / 2})
}

func (t *tick) stroke() vg.Length {
	if t.label == "" {
		return strokeShort
	}
	return strokeLong
}
