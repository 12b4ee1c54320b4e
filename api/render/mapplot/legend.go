package mapplot

import (
	"fmt"
	"image/color"
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"regimed/api/render"
	"regimed/regime/kind"
	"regimed/regime/whatif"
	"regimed/units"
)

type textStyle = text.Style

// padding is the ground under words that may stand on a border.
var padding = color.NRGBA{0xff, 0xff, 0xff, 0xc8}

const (
	sampleWidth = 8 * vg.Millimeter
	rowGap      = 0.7 * vg.Millimeter
)

// row is a line of the legend: entries beside each other.
type row struct{ entries []entry }

// entry is a sign and what it means.
type entry struct {
	sign  func(c draw.Canvas, middle vg.Point)
	words block
}

func (r *row) height() vg.Length {
	most := vg.Length(0)
	for i := range r.entries {
		most = max(most, r.entries[i].words.height())
	}
	return most
}

func (e *entry) width() vg.Length { return sampleWidth + gap + e.words.width() }

func (r *row) draw(c draw.Canvas, left, top vg.Length) vg.Length {
	for i := range r.entries {
		e := &r.entries[i]
		e.sign(c, vg.Point{X: left + sampleWidth/2, Y: top - e.words.pitch()/2})
		e.words.draw(c, left+sampleWidth+gap, top)
		left += e.width() + 2*gap
	}
	return top - r.height()
}

// legend says what the signs mean.
func (s *sheet) legend(room vg.Length) {
	words := style(smallSize, ink, xfont.WeightNormal)
	add := func(sign func(draw.Canvas, vg.Point), text string) {
		s.rows = append(s.rows, row{[]entry{{sign, wrap(words, text, room-sampleWidth-gap)}}})
	}
	add(mark, s.caseIs())
	if cloud := s.m.Cloud; cloud != nil {
		text := fmt.Sprintf("%d draws from the uncertainty of %s; from 5 to 95\u00a0%% framed", cloud.Draws, s.uncertain())
		if n := cloud.Draws - len(cloud.Points); n > 0 {
			text += fmt.Sprintf(". %d of the draws lie outside this map", n)
		}
		add(cloudSign, text+".")
	}
	if len(s.ruled) > 0 {
		add(ruledSign, "The assumption named along the line reaches its limit (utilisation 1). It rules a class out where it is invalid: beyond its limit by the model-form factor.")
	}
	var entries []entry
	for _, k := range s.placed.keys {
		entries = append(entries, entry{keySign(k), wrap(words, k.text, room-sampleWidth-gap)})
	}
	s.rows = append(s.rows, flow(entries, room)...)
}

// flow sets entries beside each other as far as there is room.
func flow(entries []entry, room vg.Length) []row {
	var rows []row
	left := vg.Length(0)
	for _, e := range entries {
		if len(rows) == 0 || left+e.width() > room {
			rows = append(rows, row{})
			left = 0
		}
		last := &rows[len(rows)-1]
		last.entries = append(last.entries, e)
		left += e.width() + 2*gap
	}
	return rows
}

func cloudSign(c draw.Canvas, middle vg.Point) {
	at := box{middle: middle, width: 5 * vg.Millimeter, high: 2.4 * vg.Millimeter}
	c.SetLineStyle(draw.LineStyle{Color: ink, Width: 0.7})
	c.Stroke(rectangle(at))
	c.SetColor(ink)
	for _, p := range [][2]vg.Length{{-4, 1}, {-1, -1.5}, {2, 1.6}, {4.5, -0.6}, {0.5, 0.4}} {
		c.Fill(disc(vg.Point{X: middle.X + p[0], Y: middle.Y + p[1]}, 0.7))
	}
}

func ruledSign(c draw.Canvas, middle vg.Point) {
	c.StrokeLine2(ruledStyle(), middle.X-sampleWidth/2, middle.Y, middle.X+sampleWidth/2, middle.Y)
}

func keySign(k key) func(draw.Canvas, vg.Point) {
	return func(c draw.Canvas, middle vg.Point) {
		if k.zone == nil {
			b := block{style: style(lineSize, ink, xfont.WeightNormal), lines: []string{k.sign}}
			at := box{middle: middle, width: b.width() + 4, high: b.height()}
			for _, piece := range gaps([]vg.Point{{X: middle.X - sampleWidth/2, Y: middle.Y}, {X: middle.X + sampleWidth/2, Y: middle.Y}}, []box{at}) {
				c.StrokeLines(ruledStyle(), piece)
			}
			b.drawMiddle(c, at)
			return
		}
		swatch := rectangle(box{middle: middle, width: sampleWidth, high: 3.8 * vg.Millimeter})
		c.SetColor(colourOf(k.zone))
		c.Fill(swatch)
		c.SetLineStyle(draw.LineStyle{Color: ink, Width: 0.5})
		c.Stroke(swatch)
		drawBadge(c, middle, k.sign)
	}
}

// heading is the title of the case.
func (s *sheet) heading() string {
	if v := s.m.Case.Lookup(kind.Title); v != nil {
		return v.Text
	}
	return "Map of a " + strings.ToLower(kind.Find(s.m.Case.Kind).Title)
}

// subject says what the picture shows.
func (s *sheet) subject() string {
	text := kind.Find(s.m.Case.Kind).Title
	if v := s.m.Case.Lookup(kind.Reference); v != nil {
		text += ", " + v.Text
	}
	return text + ". The cheapest class of model that holds; all other inputs as in the case."
}

func (s *sheet) coordinates() string {
	m := s.m
	return s.x.amount(m.Case.At(m.X.Place).Value) + ", " + s.y.amount(m.Case.At(m.Y.Place).Value)
}

// caseIs says where the case stands and what holds there.
func (s *sheet) caseIs() string {
	m := s.m
	var inputs []string
	for _, a := range []*axis{&s.x, &s.y} {
		if q := m.Case.At(a.Place); q != nil {
			inputs = append(inputs, a.Name()+" "+a.amount(q.Value))
		} else {
			inputs = append(inputs, a.Name()+" not given")
		}
	}
	text := "The case: " + strings.Join(inputs, ", ")
	if m.Here == nil {
		return text + ". It has no place on this map."
	}
	return text + ": " + titleOf(m.Zone) + "."
}

// uncertain names the inputs of the axes that are uncertain.
func (s *sheet) uncertain() string {
	var names []string
	for _, a := range []*axis{&s.x, &s.y} {
		if q := s.m.Case.At(a.Place); q != nil && q.Form != units.Certain {
			names = append(names, a.Name())
		}
	}
	return strings.Join(names, " and ")
}

// footing says what the picture rests on.
func (s *sheet) footing() string {
	var others []string
	for _, p := range s.m.Case.Places() {
		if q := s.m.Case.At(p); q.Form != units.Certain && p != s.m.X.Place && p != s.m.Y.Place {
			others = append(others, p.Path())
		}
	}
	text := ""
	if len(others) > 0 {
		text = "At the middle of their uncertainty: " + strings.Join(others, ", ") + ". "
	}
	return text + fmt.Sprintf("Screening, not a design verification. regimed\u00a0%s, catalogue\u00a0%.12s, case\u00a0%.12s.", render.Version, render.Catalogue(), s.m.Case.Digest())
}

// description says in words what the picture shows.
func (s *sheet) description() string {
	var b strings.Builder
	fmt.Fprintf(&b, "Recommended class of model over %s from %s to %s (%s) and %s from %s to %s (%s).",
		s.x.Name(), s.x.amount(s.x.From), s.x.amount(s.x.To), spacing(&s.m.X), s.y.Name(), s.y.amount(s.y.From), s.y.amount(s.y.To), spacing(&s.m.Y))
	b.WriteString(" Shares of the area:")
	var order []*whatif.Zone
	shares := map[*whatif.Zone]float64{}
	for _, r := range s.m.Regions {
		if _, known := shares[r.Zone]; !known {
			order = append(order, r.Zone)
		}
		shares[r.Zone] += r.Area
	}
	for i, z := range order {
		if i > 0 {
			b.WriteByte(',')
		}
		fmt.Fprintf(&b, " %s %s %%", titleOf(z), units.AppendNumber(nil, 100*shares[z], 2))
	}
	b.WriteString(". " + s.caseIs())
	return b.String()
}

func spacing(a *whatif.MapAxis) string {
	if a.Log {
		return "logarithmic"
	}
	return "linear"
}
