package marginchart

import (
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg/draw"

	"regimed/regime/finding"
)

// Measures in points. The letters stay legible when the chart is printed 12 cm
// wide.
const (
	width      = 454 // 16 cm
	margin     = 8
	nameWidth  = 112
	scaleLeft  = margin + nameWidth + 6
	scaleWidth = 186
	scaleRight = scaleLeft + scaleWidth
	verdictX   = scaleRight + 20
	figureX    = width - margin
	rowHeight  = 11.5
	barHeight  = 6.5
	lineHeight = 10
	titleSize  = 9.5
	textSize   = 7.8
	smallSize  = 7
	markSize   = 3
)

// role is what a shape stands for; it decides the colour.
type role uint8

const (
	paper role = iota
	ink
	grey
	grid
	stripe
	valid
	marginal
	invalid
	undetermined
)

// roleNames are the classes of the shapes in SVG, so that a page around it can
// give them other colours.
var roleNames = [...]string{"paper", "ink", "grey", "grid", "stripe", "valid", "marginal", "invalid", "undetermined"}

// colours on white. Those of the verdicts stay apart without red or green, and
// all that letters are set in have a contrast of 4.5 and more.
var colours = [...]string{"#ffffff", "#1c1f23", "#5a6068", "#c9ced4", "#f2f4f6", "#0b5fa5", "#8f5f00", "#b3261e", "#5a6068"}

func roleOf(v finding.Verdict) role {
	switch v {
	case finding.Valid:
		return valid
	case finding.Marginal:
		return marginal
	case finding.Invalid:
		return invalid
	}
	return undetermined
}

// form is what a shape is.
type form uint8

const (
	area form = iota // x, y: upper left corner; dx, dy: size
	stroke
	words   // x, y: of the base line; anchor
	polygon // points
	disc    // x, y: centre; dx: radius
)

// anchor says which end of words their place is.
type anchor uint8

const (
	start anchor = iota
	middle
	end
)

// shape is a part of the picture, y downward from its upper edge.
type shape struct {
	form         form
	role         role
	x, y, dx, dy float64
	faint        bool // half transparent
	thick        float64
	text         string
	size         float64
	bold         bool
	anchor       anchor
	points       [][2]float64
	part         string // class of a shape that a test looks for
}

// picture is a laid out chart.
type picture struct {
	height float64
	shapes []shape
}

func (p *picture) add(s shape) { p.shapes = append(p.shapes, s) }

func (p *picture) say(x, y float64, s string, r role, size float64, at anchor) {
	p.add(shape{form: words, role: r, x: x, y: y, text: s, size: size, anchor: at})
}

// column is the place of a utilisation on the scale.
func column(u float64) float64 {
	return scaleLeft + scaleWidth*(Position(u)+Decades)/(2*Decades)
}

// lay lays the chart out, from the top down.
func (c *Chart) lay() *picture {
	p := &picture{}
	y := float64(margin)
	if c.Title != "" {
		for _, line := range fold(c.Title, titleSize, true, width-2*margin) {
			y += titleSize + 2
			p.add(shape{form: words, role: ink, x: margin, y: y, text: line, size: titleSize, bold: true})
		}
		y += 5
	}
	bars := c.sorted()
	if len(bars) > 0 {
		y = p.scale(bars, y)
	} else {
		y += lineHeight
		p.say(margin, y, "No assumption has an estimate.", grey, textSize, start)
	}
	for i := range c.Waiting {
		y = p.waiting(&c.Waiting[i], i == 0, y)
	}
	if len(c.Moot) > 0 {
		y = p.paragraph("Cannot occur here: "+strings.Join(c.Moot, ", ")+".", y+3)
	}
	if c.Foot != "" {
		y = p.paragraph(c.Foot, y+3)
	}
	p.height = y + margin
	return p
}

// paragraph sets small words below each other and returns where they end.
func (p *picture) paragraph(s string, y float64) float64 {
	for _, line := range fold(s, smallSize, false, width-2*margin) {
		y += lineHeight - 1
		p.say(margin, y, line, grey, smallSize, start)
	}
	return y
}

// scale draws the bars on their scale, with its numbers below, and returns where
// they end.
func (p *picture) scale(bars []Bar, y float64) float64 {
	p.say(scaleLeft+scaleWidth/2, y+smallSize, "within the limit ◂ 1 ▸ beyond it", grey, smallSize, middle)
	p.say(figureX, y+smallSize, "estimate / limit", grey, smallSize, end)
	top := y + smallSize + 4
	bottom := top + rowHeight*float64(len(bars))
	for i := range bars {
		if i%2 == 1 {
			p.add(shape{form: area, role: stripe, x: margin, y: top + rowHeight*float64(i), dx: width - 2*margin, dy: rowHeight})
		}
	}
	for i := -Decades; i <= Decades; i++ {
		x := scaleLeft + scaleWidth*float64(i+Decades)/(2*Decades)
		if i != 0 {
			p.add(shape{form: stroke, role: grid, x: x, y: top, dy: bottom - top, thick: 0.6})
		}
		p.say(x, bottom+smallSize+2, [...]string{"0.001", "0.01", "0.1", "1", "10", "100", "1000"}[i+Decades], grey, smallSize, middle)
	}
	for i := range bars {
		p.bar(&bars[i], top+rowHeight*float64(i))
	}
	limit := column(1)
	p.add(shape{form: stroke, role: ink, x: limit, y: top - 2, dy: bottom - top + 4, thick: 1.2, part: "limit"})
	return p.paragraph("Bar and mark: utilisation u = estimate / limit. Bracket: from u/φ to u·φ, φ the model-form factor; where it holds the limit 1, the verdict is marginal. An arrow: beyond the scale.", bottom+smallSize+5)
}

// bar draws one assumption: its name, a bar to u, a bracket for the band, a mark
// whose form says the verdict, and the verdict in words.
func (p *picture) bar(b *Bar, top float64) {
	r, centre := roleOf(b.Verdict), top+rowHeight/2
	base := centre + textSize*0.36
	p.say(margin, base, b.Name, ink, textSize, start)
	at := column(b.Utilisation)
	p.add(shape{form: area, role: r, x: scaleLeft, y: centre - barHeight/2, dx: at - scaleLeft, dy: barHeight, faint: true, part: "bar"})
	low, high := column(b.Utilisation/b.Inner), column(b.Utilisation*b.Factor)
	if high > low {
		p.add(shape{form: stroke, role: r, x: low, y: centre, dx: high - low, thick: 1.1, part: "band"})
		for _, x := range [...]float64{low, high} {
			p.add(shape{form: stroke, role: r, x: x, y: centre - barHeight/2, dy: barHeight, thick: 1.1})
		}
	}
	p.mark(b, r, at, centre)
	p.add(shape{form: words, role: r, x: verdictX, y: base, text: b.verdictWords(), size: textSize, bold: !b.Aside && b.Verdict != finding.Valid})
	p.symbol(b.Verdict, r, verdictX-8, centre)
	p.say(figureX, base, b.Figure, ink, textSize, end)
}

// mark draws the value: an arrow where it lies beyond the scale.
func (p *picture) mark(b *Bar, r role, x, y float64) {
	const m = markSize
	switch side := float64(beyond(b.Utilisation)); side {
	case 0:
		p.symbol(b.Verdict, r, x, y)
	default:
		p.add(shape{form: polygon, role: r, part: "arrow", points: [][2]float64{{x + side*(m+1.5), y}, {x - side*1.5, y - m}, {x - side*1.5, y + m}}})
	}
}

// symbol draws the form of a verdict: valid a disc, marginal a rhomb, invalid a
// square, undetermined a triangle.
func (p *picture) symbol(v finding.Verdict, r role, x, y float64) {
	const m = markSize
	switch v {
	case finding.Valid:
		p.add(shape{form: disc, role: r, x: x, y: y, dx: 0.85 * m})
	case finding.Marginal:
		p.add(shape{form: polygon, role: r, points: [][2]float64{{x - 1.2*m, y}, {x, y - 1.2*m}, {x + 1.2*m, y}, {x, y + 1.2*m}}})
	case finding.Invalid:
		p.add(shape{form: area, role: r, x: x - 0.9*m, y: y - 0.9*m, dx: 1.8 * m, dy: 1.8 * m})
	default:
		p.add(shape{form: polygon, role: r, points: [][2]float64{{x - m, y + 0.8*m}, {x + m, y + 0.8*m}, {x, y - m}}})
	}
}

// waiting lists an assumption that waits, and returns where its lines end.
func (p *picture) waiting(w *Waiting, first bool, y float64) float64 {
	if first {
		y += 3
	}
	const lead = 10
	p.symbol(finding.Undetermined, undetermined, margin+markSize, y+lineHeight-textSize*0.36)
	p.add(shape{form: words, role: ink, x: margin + lead, y: y + lineHeight, text: w.Name, size: textSize})
	for _, line := range fold("undetermined: "+w.Needs, textSize, false, width-margin-scaleLeft) {
		y += lineHeight
		p.say(scaleLeft, y, line, undetermined, textSize, start)
	}
	return y + 1
}

// face is a typeface whose letters are as wide as those of Arial and Helvetica.
func face(size float64, bold bool) text.Style {
	weight := xfont.WeightNormal
	if bold {
		weight = xfont.WeightBold
	}
	return text.Style{Handler: plot.DefaultTextHandler, YAlign: draw.YBottom,
		Font: font.Font{Typeface: "Liberation", Variant: "Sans", Weight: weight, Size: font.Length(size)}}
}

// fold breaks words into lines that fit, also inside a word that is too long.
func fold(s string, size float64, bold bool, room float64) []string {
	st := face(size, bold)
	fits := func(s string) bool { return float64(st.Width(s)) <= room }
	var lines []string
	line := ""
	for word := range strings.FieldsSeq(s) {
		if longer := strings.TrimPrefix(line+" "+word, " "); fits(longer) {
			line = longer
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		for !fits(word) {
			n := fitting(word, fits)
			lines, word = append(lines, word[:n]), word[n:]
		}
		line = word
	}
	if line != "" {
		lines = append(lines, line)
	}
	return lines
}

// fitting is how many bytes of a word fit: at least one letter.
func fitting(word string, fits func(string) bool) int {
	n := 0
	for i := range word {
		if i > 0 && !fits(word[:i]) {
			break
		}
		n = i
	}
	if n == 0 {
		for i := range word {
			if i > 0 {
				return i
			}
		}
		return len(word)
	}
	return n
}

// Clip shortens words to a width in the letters of the chart; what was cut off
// shows as an ellipsis.
func Clip(s string, size float64, bold bool, room float64) string {
	st := face(size, bold)
	if float64(st.Width(s)) <= room {
		return s
	}
	n := fitting(s, func(part string) bool { return float64(st.Width(part+"…")) <= room })
	return s[:n] + "…"
}

// Colour is that of a verdict on white paper, as SVG writes it.
func Colour(v finding.Verdict) string { return colours[roleOf(v)] }
