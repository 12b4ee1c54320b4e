package canonplot

import (
	"bytes"
	"fmt"
	"image/color"
	"io"
	"math"
	"path/filepath"
	"slices"
	"strconv"
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgsvg"

	"regimed/regime/canon"
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

// Draw draws a canonical solution over the argument that its entry names for it.
// args are the others, in their order, NaN for what is not given: its usual value. A
// given value of the argument that is drawn over is marked on the curves. A
// RangeError says that the solution holds nowhere with these arguments.
func Draw(w io.Writer, f Format, e *canon.Entry, args []float64) error {
	p, err := sample(e, args)
	if err != nil {
		return err
	}
	s := newSheet(p)
	if f == PNG {
		c := vgimg.NewWith(vgimg.UseWH(s.width, s.height), vgimg.UseDPI(dotsPerInch))
		s.draw(draw.New(c))
		_, err = vgimg.PngCanvas{Canvas: c}.WriteTo(w)
		return err
	}
	c := vgsvg.New(s.width, s.height)
	s.draw(draw.New(c))
	var b bytes.Buffer
	if _, err = c.WriteTo(&b); err != nil {
		return err
	}
	_, err = w.Write(bytes.ReplaceAll(b.Bytes(), []byte("font-family:"+family+";"), []byte("font-family:"+family+",Arial,Helvetica,sans-serif;")))
	return err
}

// Measures of the sheet.
const (
	sheetWidth   = 18 * vg.Centimeter
	plotHeight   = 9.5 * vg.Centimeter
	sheetMargin  = 0.45 * vg.Centimeter
	sampleWidth  = 1.1 * vg.Centimeter // of a line in the legend
	rowGap       = 0.09 * vg.Centimeter
	blockGap     = 0.22 * vg.Centimeter
	dotsPerInch  = 150
	titleSize    = 12
	textSize     = 9.5
	smallSize    = 8.5
	family       = "Liberation Sans"
	curveWidth   = 1.6
	firstWidth   = 2.4
	limitWidth   = 1.1
	markerRadius = 2.6
)

var (
	ink  = color.RGBA{0x22, 0x22, 0x22, 0xff}
	grey = color.RGBA{0x60, 0x60, 0x60, 0xff}
	pale = color.RGBA{0xdd, 0xdd, 0xdd, 0xff}
	// Five colours that remain apart without red or green.
	palette = []color.Color{
		color.RGBA{0x00, 0x72, 0xb2, 0xff}, color.RGBA{0xd5, 0x5e, 0x00, 0xff}, color.RGBA{0x00, 0x9e, 0x73, 0xff},
		color.RGBA{0xcc, 0x79, 0xa7, 0xff}, color.RGBA{0xe6, 0x9f, 0x00, 0xff},
	}
	// The dashes of the limits.
	dashes = [][]vg.Length{{6, 3}, {2, 2}, {8, 2, 2, 2}, {4, 1.5}, {1, 2}, {10, 3}}
)

func style(size float64, c color.Color, weight xfont.Weight) text.Style {
	return text.Style{
		Color: c, Handler: plot.DefaultTextHandler, XAlign: draw.XLeft, YAlign: draw.YTop,
		Font: font.Font{Typeface: "Liberation", Variant: "Sans", Weight: weight, Size: font.Length(size)},
	}
}

// sheet is a picture with its words, broken into lines, and its measures.
type sheet struct {
	*picture
	width, height vg.Length
	title, under  block
	rows          []row
	source        block
	// The labels of the axes.
	abscissa, ordinate block
}

// block is text that fits a width.
type block struct {
	style text.Style
	lines []string
}

// row is a line of the legend: a stroke or a dot, and what it means.
type row struct {
	stroke draw.LineStyle
	dot    bool
	words  block
}

func newSheet(p *picture) *sheet {
	s := &sheet{picture: p, width: sheetWidth}
	room := sheetWidth - 2*sheetMargin
	s.title = wrap(style(titleSize, ink, xfont.WeightBold), capital(p.entry.Problem), room)
	s.under = wrap(style(smallSize, grey, xfont.WeightNormal), p.setting(), room)
	s.labels(room)
	s.legend(room - sampleWidth - 2*rowGap)
	s.source = wrap(style(smallSize, grey, xfont.WeightNormal), p.sources(), room)
	s.height = 2*sheetMargin + s.title.height() + s.under.height() + plotHeight + s.abscissa.height() + s.source.height() + 3*blockGap + rowGap
	for _, r := range s.rows {
		s.height += r.words.height() + rowGap
	}
	return s
}

// labels says what the axes show: symbol and meaning of the argument, and the
// symbols of the values, whose meaning the legend gives.
func (s *sheet) labels(room vg.Length) {
	words := style(textSize, ink, xfont.WeightNormal)
	over := &s.entry.Args[s.over]
	s.abscissa = wrap(words, argSymbol(over)+" ("+over.Doc+")", room-2*vg.Centimeter)
	var symbols []string
	for _, c := range s.curves {
		if symbol := symbolOf(c.output); !slices.Contains(symbols, symbol) {
			symbols = append(symbols, symbol)
		}
	}
	s.ordinate = block{style: words, lines: []string{strings.Join(symbols, ", ")}}
}

func (s *sheet) legend(room vg.Length) {
	words := style(smallSize, ink, xfont.WeightNormal)
	for i, c := range s.curves {
		s.rows = append(s.rows, row{stroke: s.curveStyle(i), words: wrap(words, symbolOf(c.output)+": "+c.output.Doc, room)})
	}
	for i, a := range s.limits {
		name := a.limit.Name
		if len(s.curves) > 1 {
			name = symbolOf(s.curveOf(a.limit.Output).output) + ", " + name
		}
		s.rows = append(s.rows, row{stroke: limitStyle(i), words: wrap(words, name, room)})
	}
	if s.given {
		s.rows = append(s.rows, row{dot: true, words: wrap(words, s.reading(), room)})
	}
}

// symbolOf is what an output is called in a formula, or else by its id.
func symbolOf(o *canon.Output) string {
	if o.Symbol == "" {
		return o.ID
	}
	return o.Symbol
}

// setting names the solution and the arguments that stay as they are.
func (p *picture) setting() string {
	var parts []string
	for i := range p.entry.Args {
		a := &p.entry.Args[i]
		switch {
		case i == p.over:
		case len(a.Choices) > 0:
			parts = append(parts, a.Name+" "+a.Choices[int(p.args[i])])
		default:
			parts = append(parts, argSymbol(a)+" = "+number(p.args[i]))
		}
	}
	if len(parts) == 0 {
		return p.entry.Name
	}
	return p.entry.Name + " at " + strings.Join(parts, ", ")
}

func argSymbol(a *canon.Arg) string {
	if a.Symbol == "" {
		return a.Name
	}
	return a.Symbol
}

// reading is the values at the given argument.
func (p *picture) reading() string {
	var parts []string
	for i := range p.entry.Outputs {
		o := &p.entry.Outputs[i]
		if o.ID != canon.UncertaintyID {
			parts = append(parts, symbolOf(o)+" = "+number(p.marked[i]))
		}
	}
	return argSymbol(&p.entry.Args[p.over]) + " = " + number(p.args[p.over]) + ": " + strings.Join(parts, ", ")
}

// number writes six digits; what is unbounded has a sign of its own.
func number(x float64) string {
	if math.IsInf(x, 1) {
		return "∞"
	}
	return shortExponent(strconv.FormatFloat(x, 'g', 6, 64))
}

// sources is the line below: where the solution comes from.
func (p *picture) sources() string {
	var parts []string
	for _, s := range p.entry.Sources {
		short := s.Short
		if s.Memory {
			short += " (from memory)"
		}
		parts = append(parts, short)
	}
	return "Source: " + strings.Join(parts, "; ")
}

// curveStyle is the stroke of a curve. The first of several is wider, so that it
// shows under another that it falls together with.
func (s *sheet) curveStyle(i int) draw.LineStyle {
	style := draw.LineStyle{Color: palette[i%len(palette)], Width: curveWidth}
	if i == 0 && len(s.curves) > 1 {
		style.Width = firstWidth
	}
	return style
}

func limitStyle(i int) draw.LineStyle {
	return draw.LineStyle{Color: ink, Width: limitWidth, Dashes: dashes[i%len(dashes)]}
}

// draw puts everything on the sheet, from the top down.
func (s *sheet) draw(c draw.Canvas) {
	c.SetColor(color.White)
	c.Fill(c.Rectangle.Path())
	left, top := c.Min.X+sheetMargin, c.Max.Y-sheetMargin
	top = s.title.draw(c, left, top) - rowGap
	top = s.under.draw(c, left, top) - blockGap
	s.drawPlot(c, left, top)
	top -= plotHeight
	top = s.abscissa.draw(c, left+(sheetWidth-2*sheetMargin-s.abscissa.width())/2, top) - blockGap
	for i := range s.rows {
		top = s.rows[i].draw(c, left, top) - rowGap
	}
	s.source.draw(c, left, top-blockGap)
}

// drawPlot draws axes and lines, and the symbols of the values up the left side.
// The labels of the axes are drawn apart from them, so that no long one takes
// room from the lines.
func (s *sheet) drawPlot(c draw.Canvas, left, top vg.Length) {
	side := 1.7 * s.ordinate.style.FontExtents().Height
	s.plot().Draw(draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{
		Min: vg.Point{X: left + side, Y: top - plotHeight}, Max: vg.Point{X: c.Max.X - sheetMargin, Y: top},
	}})
	upright := s.ordinate.style
	upright.Rotation, upright.XAlign, upright.YAlign = math.Pi/2, draw.XCenter, draw.YTop
	c.FillText(upright, vg.Point{X: left, Y: top - plotHeight/2}, strings.Join(s.ordinate.lines, " "))
}

func (r *row) draw(c draw.Canvas, left, top vg.Length) vg.Length {
	middle := top - r.words.style.FontExtents().Height/2
	if r.dot {
		c.DrawGlyphNoClip(marker(ink), vg.Point{X: left + sampleWidth/2, Y: middle})
	} else {
		c.StrokeLine2(r.stroke, left, middle, left+sampleWidth, middle)
	}
	return r.words.draw(c, left+sampleWidth+2*rowGap, top)
}

func marker(c color.Color) draw.GlyphStyle {
	return draw.GlyphStyle{Color: c, Radius: markerRadius, Shape: draw.CircleGlyph{}}
}

// plot makes the axes and the lines.
func (s *sheet) plot() *plot.Plot {
	p := plot.New()
	p.BackgroundColor = color.White
	over := &s.entry.Args[s.over]
	setAxis(&p.X, s.logX, 10)
	setAxis(&p.Y, s.logY, 7)
	grid := plotter.NewGrid()
	grid.Vertical.Color, grid.Horizontal.Color = pale, pale
	p.Add(grid)
	for i, c := range s.curves {
		s.addLine(p, c.y, s.curveStyle(i))
		if over.Whole {
			s.addDots(p, c.y, palette[i%len(palette)])
		}
	}
	for i, a := range s.limits {
		s.addLine(p, a.y, limitStyle(i))
	}
	s.addMarks(p)
	p.X.Min, p.X.Max = s.x[0], s.x[len(s.x)-1]
	p.Y.Min, p.Y.Max = s.low, s.high
	return p
}

// setAxis sets up an axis without its label.
func setAxis(a *plot.Axis, log bool, labels int) {
	ticks := style(smallSize, ink, xfont.WeightNormal)
	ticks.XAlign, ticks.YAlign = a.Tick.Label.XAlign, a.Tick.Label.YAlign
	a.Tick.Label = ticks
	a.Color, a.Tick.Color = grey, grey
	a.Tick.Marker = even{labels}
	if log {
		a.Scale, a.Tick.Marker = plot.LogScale{}, decades{labels}
	}
}

func (s *sheet) points(y line, piece []int) plotter.XYs {
	xy := make(plotter.XYs, 0, len(piece))
	for _, i := range piece {
		xy = append(xy, plotter.XY{X: s.x[i], Y: y[i]})
	}
	return xy
}

func (s *sheet) addLine(p *plot.Plot, y line, style draw.LineStyle) {
	for _, piece := range s.pieces(y) {
		p.Add(&plotter.Line{XYs: s.points(y, piece), LineStyle: style})
	}
}

func (s *sheet) addDots(p *plot.Plot, y line, c color.Color) {
	var all []int
	for i, v := range y {
		if h := s.picture.height(v); h >= 0 && h <= 1 {
			all = append(all, i)
		}
	}
	p.Add(&plotter.Scatter{XYs: s.points(y, all), GlyphStyle: draw.GlyphStyle{Color: c, Radius: 2, Shape: draw.CircleGlyph{}}})
}

// addMarks puts a dot on each curve at the given argument.
func (s *sheet) addMarks(p *plot.Plot) {
	for i := range s.entry.Outputs {
		if !s.given || s.entry.Outputs[i].ID == canon.UncertaintyID {
			continue
		}
		if h := s.picture.height(s.marked[i]); h >= 0 && h <= 1 {
			p.Add(&plotter.Scatter{XYs: plotter.XYs{{X: s.args[s.over], Y: s.marked[i]}}, GlyphStyle: marker(ink)})
		}
	}
}

// wrap breaks words into lines that fit the room.
func wrap(st text.Style, words string, room vg.Length) block {
	b := block{style: st}
	line := ""
	for _, word := range strings.Fields(words) {
		longer := word
		if line != "" {
			longer = line + " " + word
		}
		if line != "" && st.Width(longer) > room {
			b.lines = append(b.lines, line)
			longer = word
		}
		line = longer
	}
	if line != "" {
		b.lines = append(b.lines, line)
	}
	return b
}

func (b *block) width() vg.Length {
	widest := vg.Length(0)
	for _, l := range b.lines {
		widest = max(widest, b.style.Width(l))
	}
	return widest
}

func (b *block) height() vg.Length {
	return vg.Length(len(b.lines)) * b.style.FontExtents().Height
}

// draw writes the lines and returns where they end.
func (b *block) draw(c draw.Canvas, left, top vg.Length) vg.Length {
	for _, l := range b.lines {
		c.FillText(b.style, vg.Point{X: left, Y: top}, l)
		top -= b.style.FontExtents().Height
	}
	return top
}

// capital writes the first letter of a sentence large.
func capital(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}
