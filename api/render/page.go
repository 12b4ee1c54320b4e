package render

import (
	"bytes"
	"unicode/utf8"
)

// page lays out lines of text in a given number of columns.
type page struct {
	dst    []byte
	room   []byte // for the sentence in hand
	width  int
	colour bool
}

// style is a way to set a line apart, where colours are wanted.
type style string

// The styles, as terminals know them.
const (
	plain  style = ""
	strong style = "\x1b[1m"
	dim    style = "\x1b[2m"
	red    style = "\x1b[31m"
	yellow style = "\x1b[33m"
	green  style = "\x1b[32m"

	endOfStyle = "\x1b[0m"
)

func (p *page) begin(s style) {
	if p.colour && s != plain {
		p.dst = append(p.dst, s...)
	}
}

func (p *page) end(s style) {
	if p.colour && s != plain {
		p.dst = append(p.dst, endOfStyle...)
	}
	p.dst = append(p.dst, '\n')
}

func (p *page) blank() { p.dst = append(p.dst, '\n') }

// heading begins a section.
func (p *page) heading(s string) {
	p.blank()
	p.line(strong, s)
}

func (p *page) line(s style, text string) {
	p.begin(s)
	p.dst = append(p.dst, text...)
	p.end(s)
}

// wrap appends a paragraph: its first line is set off by lead, the others by
// as many blanks as lead has columns.
func (p *page) wrap(s style, lead string, text []byte) {
	p.begin(s)
	p.dst = append(p.dst, lead...)
	indent := columns(lead)
	at, first := indent, true
	for rest := text; len(rest) > 0; {
		var word []byte
		word, rest = nextWord(rest)
		if len(word) == 0 {
			continue
		}
		n := utf8.RuneCount(word)
		switch {
		case first:
		case at+1+n > p.width:
			p.dst = pad(append(p.dst, '\n'), indent)
			at = indent
		default:
			p.dst = append(p.dst, ' ')
			at++
		}
		p.word(word, &at, indent)
		first = false
	}
	p.end(s)
}

// word appends a word, and breaks one that is longer than a line.
func (p *page) word(word []byte, at *int, indent int) {
	for len(word) > 0 {
		r, n := utf8.DecodeRune(word)
		if *at >= p.width && *at > indent {
			p.dst = pad(append(p.dst, '\n'), indent)
			*at = indent
		}
		p.dst = utf8.AppendRune(p.dst, harmless(r))
		*at++
		word = word[n:]
	}
}

// harmless replaces control characters, which a terminal would obey.
func harmless(r rune) rune {
	if r < ' ' || r >= 0x7f && r < 0xa0 {
		return '\uFFFD'
	}
	return r
}

// nextWord cuts off what may not be parted: a number stays with its unit, and
// with the symbol that it is the value of.
func nextWord(text []byte) (word, rest []byte) {
	from := 0
	for {
		i := from
		for i < len(text) && !isBlank(text[i]) {
			i++
		}
		if i == len(text) {
			return text, nil
		}
		if i > 0 && (isDigit(text[i-1]) && isUnit(text[i+1:]) || joins(text[:i], text[i+1:])) {
			from = i + 1
			continue
		}
		return text[:i], text[i+1:]
	}
}

func isBlank(c byte) bool { return c == ' ' || c == '\n' || c == '\t' || c == '\r' }

func isDigit(c byte) bool { return c >= '0' && c <= '9' }

// isUnit reports whether a text begins with a word as short as a unit.
func isUnit(text []byte) bool {
	const longest = 6
	n := 0
	for n < len(text) && !isBlank(text[n]) {
		n++
	}
	return n > 0 && n <= longest && !isDigit(text[0])
}

// joins reports whether an equals sign stands on either side of a blank.
func joins(before, after []byte) bool {
	return bytes.HasSuffix(before, []byte(" =")) || bytes.HasPrefix(after, []byte("= "))
}

func columns(s string) int { return utf8.RuneCountInString(s) }

// pad appends n blanks.
func pad(dst []byte, n int) []byte {
	for range n {
		dst = append(dst, ' ')
	}
	return dst
}

// left appends a text in a column of n, and at least one blank.
func left(dst []byte, s string, n int) []byte {
	return pad(append(dst, s...), max(n-columns(s), 1))
}

// right appends a text at the right of a column of n.
func right(dst []byte, s string, n int) []byte {
	return append(pad(dst, n-columns(s)), s...)
}
