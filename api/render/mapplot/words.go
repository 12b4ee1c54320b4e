package mapplot

import (
	"image/color"
	"slices"
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

const family = "Liberation Sans"

func style(size float64, c color.Color, weight xfont.Weight) text.Style {
	return text.Style{
		Color: c, Handler: plot.DefaultTextHandler, XAlign: draw.XLeft, YAlign: draw.YTop,
		Font: font.Font{Typeface: "Liberation", Variant: "Sans", Weight: weight, Size: font.Length(size)},
	}
}

// lift raises letters by a part of their size: the eye takes the middle of the
// small ones, not of the room under the line too.
const lift = 0.07

// block is text in lines.
type block struct {
	style text.Style
	lines []string
}

// words cuts a text where a line may break: at spaces, and after the dots and
// underscores of a long name.
func words(s string) []string {
	var list []string
	for word := range strings.SplitSeq(s, " ") {
		if word == "" {
			continue
		}
		if len(word) < 16 {
			list = append(list, word+" ")
			continue
		}
		from := 0
		for i := range word {
			if (word[i] == '.' || word[i] == '_' || word[i] == '-') && i-from > 4 && len(word)-i > 4 {
				list = append(list, word[from:i+1])
				from = i + 1
			}
		}
		list = append(list, word[from:]+" ")
	}
	return list
}

// wrap breaks a text into lines that fit a width.
func wrap(st text.Style, s string, width vg.Length) block {
	b := block{style: st}
	line := ""
	for _, word := range words(s) {
		if line != "" && st.Width(strings.TrimSpace(line+word)) > width {
			b.lines = append(b.lines, strings.TrimSpace(line))
			line = ""
		}
		line += word
	}
	if line = strings.TrimSpace(line); line != "" {
		b.lines = append(b.lines, line)
	}
	return b
}

// inLines breaks a text into a number of lines, or less, as narrow as that can be.
func inLines(st text.Style, s string, lines int) block {
	low, high := vg.Length(0), st.Width(s)+1
	for range 20 {
		middle := (low + high) / 2
		if len(wrap(st, s, middle).lines) > lines {
			low = middle
		} else {
			high = middle
		}
	}
	return wrap(st, s, high)
}

func (b *block) width() vg.Length {
	widest := vg.Length(0)
	for _, l := range b.lines {
		widest = max(widest, b.style.Width(l))
	}
	return widest
}

// pitch is the distance of lines.
func (b *block) pitch() vg.Length { return 1.08 * b.style.FontExtents().Height }

func (b *block) height() vg.Length { return vg.Length(len(b.lines)) * b.pitch() }

// draw writes the lines from the top left, and returns where they end.
func (b *block) draw(c draw.Canvas, left, top vg.Length) vg.Length {
	for _, l := range b.lines {
		c.FillText(b.style, vg.Point{X: left, Y: top}, l)
		top -= b.pitch()
	}
	return top
}

// inOneOrTwo sets two texts on one line where they fit, else each on lines of its own.
func inOneOrTwo(st text.Style, first, second string, width vg.Length) block {
	if whole := first + ", " + second; st.Width(whole) <= width {
		return block{st, []string{whole}}
	}
	return block{st, slices.Concat(balanced(st, first, width).lines, balanced(st, second, width).lines)}
}

// balanced breaks a text into as few lines as fit a width, of about equal length.
func balanced(st text.Style, s string, width vg.Length) block {
	return inLines(st, s, len(wrap(st, s, width).lines))
}

// drawMiddle writes the lines around a middle, turned by an angle.
func (b *block) drawMiddle(c draw.Canvas, at box) {
	st := b.style
	st.XAlign, st.YAlign, st.Rotation = draw.XCenter, draw.YCenter, at.angle
	for i, l := range b.lines {
		up := lift*st.Font.Size + b.pitch()*(vg.Length(len(b.lines)-1)/2-vg.Length(i))
		c.FillText(st, at.global(vg.Point{Y: up}), l)
	}
}
