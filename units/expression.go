package units

import (
	"fmt"
	"hash/maphash"
	"strings"
	"sync/atomic"
	"unicode"
	"unicode/utf8"

	"gonum.org/v1/gonum/unit"
)

// Limits of a unit expression. They keep the recursion and the cache
// small whatever is sent.
const (
	maxExpression = 80
	maxDepth      = 6
)

// compiled is a unit expression that has been read once: what a number written
// with it has to be multiplied by, and which kinds it may be.
type compiled struct {
	text    string
	u       *unit.Unit
	si      scale // to the SI unit of every kind but salinity
	salt    scale // to g/kg
	offset  float64
	mark    mark
	accepts uint64 // kinds whose meaning it has
	alike   uint64 // kinds whose dimension it has
}

func (c *compiled) fits(k Kind) bool { return c.accepts>>k&1 == 1 }

func (c *compiled) sameDimension(k Kind) bool { return c.alike>>k&1 == 1 }

// scale is the one that leads to the SI unit of the kind.
func (c *compiled) scale(k Kind) scale {
	if k == Salinity {
		return c.salt
	}
	return c.si
}

// convert gives the SI value of the number x.
func (c *compiled) convert(x float64, k Kind) float64 {
	s := c.scale(k)
	return (x + c.offset) * s.mul / s.div
}

// difference gives the SI value of a difference of x units: scales with a zero
// of their own lose it.
func (c *compiled) difference(x float64, k Kind) float64 {
	s := c.scale(k)
	return x * s.mul / s.div
}

// The cache of compiled expressions is a table of fixed size in which every text
// has two places. It needs no lock, can't grow, and a flood of odd expressions
// only costs the others one more reading each.
const cacheSize = 2048

var (
	cacheSeed = maphash.MakeSeed()
	cache     [cacheSize]atomic.Pointer[compiled]
)

// compile reads a trimmed unit expression, or finds it in the cache.
func compile(text string) (*compiled, *fault) {
	h := maphash.String(cacheSeed, text)
	first, second := &cache[h%cacheSize], &cache[(h>>32)%cacheSize]
	if c := first.Load(); c != nil && c.text == text {
		return c, nil
	}
	if c := second.Load(); c != nil && c.text == text {
		return c, nil
	}
	c, f := read(text)
	if f != nil {
		return nil, f
	}
	if first.Load() != nil && second.Load() == nil {
		first = second
	}
	first.Store(c)
	return c, nil
}

// read compiles a unit expression.
func read(text string) (*compiled, *fault) {
	if len(text) > maxExpression {
		return nil, &fault{code: CodeSyntax, detail: "the unit expression is too long"}
	}
	p := parser{src: text}
	t, f := p.product()
	if f != nil {
		return nil, f
	}
	if p.pos < len(p.src) {
		return nil, p.unexpected()
	}
	return finish(strings.Clone(text), t, p.lone)
}

// finish works out what the product t means for every kind.
func finish(text string, t term, lone *entry) (*compiled, *fault) {
	c := &compiled{text: text, u: t.u}
	if lone != nil {
		c.offset, c.mark = lone.offset, lone.mark
	}
	for _, k := range Kinds() {
		if !k.matches(t.u) {
			continue
		}
		c.alike |= 1 << k
		if k.admits(c.mark) {
			c.accepts |= 1 << k
		}
	}
	// A frequency is counted in cycles, the angle of gonum in radians.
	if c.sameDimension(Frequency) {
		t.turns--
	}
	c.si = t.scale()
	t.dec += 3
	c.salt = t.scale()
	if !c.si.sound() || !c.salt.sound() {
		return nil, &fault{code: CodeNotFinite, detail: "the unit is outside the range of floating-point numbers"}
	}
	return c, nil
}

// fault is what is wrong with a unit expression, before it is known what the
// quantity was to be.
type fault struct {
	code       Code
	detail     string
	readings   []string // whole expressions that may have been meant
	start, end int      // the unknown symbol
}

// parser reads a unit expression from left to right.
type parser struct {
	src   string
	pos   int
	depth int
	lone  *entry // the whole text is this symbol
}

// part is a factor of a product as it was written.
type part struct {
	over bool // before it stands a division
	text string
}

// product reads factors up to the end of the text or of the parentheses.
func (p *parser) product() (term, *fault) {
	p.spaces()
	start := p.pos
	parts := make([]part, 0, 4)
	result := term{u: unit.New(1, dimNone)}
	divided, ambiguous, over := false, false, false
	for {
		from := p.pos
		t, f := p.factor(len(parts) == 0)
		if f != nil {
			return term{}, f
		}
		parts = append(parts, part{over, p.src[from:p.pos]})
		result.join(t, over)
		end := p.pos
		more := false
		if over, more, f = p.operator(); f != nil {
			return term{}, f
		}
		if !more {
			if ambiguous {
				return term{}, twoReadings(p.src, start, end, parts)
			}
			return result, nil
		}
		ambiguous = ambiguous || divided && !over
		divided = divided || over
	}
}

// join multiplies the term by t, or divides it.
func (a *term) join(t term, over bool) {
	if over {
		a.u.Div(t.u)
		a.dec -= t.dec
		a.turns -= t.turns
		return
	}
	a.u.Mul(t.u)
	a.dec += t.dec
	a.turns += t.turns
}

// raised is the n-th power of the term.
func (a term) raised(n int) term {
	if n == 1 {
		return a
	}
	result := term{u: unit.New(1, dimNone)}
	for range max(n, -n) {
		result.join(a, n < 0)
	}
	return result
}

// twoReadings is the fault of a product after a quotient.
func twoReadings(src string, start, end int, parts []part) *fault {
	in := func(s string) string { return src[:start] + s + src[end:] }
	return &fault{
		code: CodeAmbiguousUnit, detail: "a product after a division has two readings",
		readings: []string{in(grouped(parts)), in(leftToRight(parts))},
	}
}

// grouped reads everything between two divisions as one group: a/b c is a/(b c).
func grouped(parts []part) string {
	var b strings.Builder
	for i := 0; i < len(parts); {
		j := i + 1
		for j < len(parts) && !parts[j].over {
			j++
		}
		group := joined(parts[i:j])
		if parts[i].over {
			b.WriteByte('/')
			if j-i > 1 {
				group = "(" + group + ")"
			}
		}
		b.WriteString(group)
		i = j
	}
	return b.String()
}

// leftToRight lets every division reach one factor: a/b c is a c/b.
func leftToRight(parts []part) string {
	var over, under []part
	for _, q := range parts {
		if q.over {
			under = append(under, q)
			continue
		}
		if len(over) == 1 && over[0].text == "1" {
			over = over[:0]
		}
		over = append(over, q)
	}
	bottom := joined(under)
	if len(under) > 1 {
		bottom = "(" + bottom + ")"
	}
	return joined(over) + "/" + bottom
}

func joined(parts []part) string {
	texts := make([]string, len(parts))
	for i, q := range parts {
		texts[i] = q.text
	}
	return strings.Join(texts, " ")
}

// operator reads what stands between two factors. Nothing is between them at the
// end of the text or of the parentheses.
func (p *parser) operator() (over, more bool, f *fault) {
	gap := p.spaces()
	if p.pos == len(p.src) || p.src[p.pos] == ')' {
		return false, false, nil
	}
	if gap && p.per() {
		p.spaces()
		return true, true, nil
	}
	switch r, size := p.peek(); r {
	case '/', '÷':
		p.pos += size
		p.spaces()
		return true, true, nil
	case '*', '·', '⋅', '.', '×':
		p.pos += size
		p.spaces()
		return false, true, nil
	case '(':
		return false, true, nil
	}
	if !gap {
		return false, false, p.unexpected()
	}
	return false, true, nil
}

// per reads the word of that name.
func (p *parser) per() bool {
	rest, found := strings.CutPrefix(p.src[p.pos:], "per")
	if !found || rest == "" {
		return false
	}
	if r, _ := utf8.DecodeRuneInString(rest); r != '(' && !unicode.IsSpace(r) {
		return false
	}
	p.pos += len("per")
	return true
}

// factor reads a symbol or a group in parentheses, with its power.
func (p *parser) factor(first bool) (term, *fault) {
	if p.pos < len(p.src) && p.src[p.pos] == '(' {
		t, f := p.group()
		if f != nil {
			return term{}, f
		}
		return p.powered(t)
	}
	start := p.pos
	run := p.run()
	switch {
	case run == "":
		return term{}, p.unexpected()
	case run == "1" && first:
		return term{u: unit.New(1, dimNone)}, nil
	case '0' <= run[0] && run[0] <= '9':
		return term{}, &fault{code: CodeSyntax, detail: fmt.Sprintf("there is a number, %s, inside the unit", clip(run))}
	}
	return p.symbol(run, start)
}

// group reads a product in parentheses.
func (p *parser) group() (term, *fault) {
	if p.depth == maxDepth {
		return term{}, &fault{code: CodeSyntax, detail: "too many parentheses"}
	}
	p.pos++
	p.depth++
	t, f := p.product()
	if f != nil {
		return term{}, f
	}
	if p.pos == len(p.src) {
		return term{}, &fault{code: CodeSyntax, detail: "a parenthesis is not closed"}
	}
	p.pos++
	p.depth--
	return t, nil
}

// symbol turns the run of letters and digits that begins at start into a term.
// Digits at its end are a power, unless they belong to the symbol (mmH2O, g0).
func (p *parser) symbol(run string, start int) (term, *fault) {
	e, dec, ok := lookup(run)
	if !ok {
		base := strings.TrimRight(run, "0123456789")
		p.pos = start + len(base)
		if e, dec, ok = lookup(base); !ok {
			return term{}, &fault{
				code: CodeUnknownUnit, detail: "unknown unit " + clip(base), start: start, end: p.pos,
			}
		}
	}
	if alone := p.pos == len(p.src) && start == 0; alone {
		p.lone = e
	} else if e.offset != 0 || e.mark != plain {
		return term{}, loneOnly(p.src, start, p.pos, e)
	}
	t := term{u: e.term.u.Copy(), dec: e.term.dec + dec, turns: e.term.turns}
	return p.powered(t)
}

// loneOnly is the fault of a unit that has a meaning only by itself.
func loneOnly(src string, start, end int, e *entry) *fault {
	written := src[start:end]
	instead := written[:len(written)-1] // barg, psia: without the suffix
	detail := "in a product " + written + " has no clear meaning"
	switch {
	case e.symbol == "degC":
		instead, detail = "K", "in a product a degree Celsius is a difference, which is written K"
	case e.symbol == "degF":
		instead, detail = "degR", "in a product a degree Fahrenheit is a difference, which is written degR"
	case e.mark == saline:
		instead = "g/kg"
	}
	return &fault{
		code: CodeAmbiguousUnit, detail: detail,
		readings: []string{substitute(src, start, end, instead)},
	}
}

// powered reads the power that follows the term.
func (p *parser) powered(t term) (term, *fault) {
	n, found, f := p.power()
	if f != nil {
		return term{}, f
	}
	if !found {
		return t, nil
	}
	if n == 0 {
		return term{}, &fault{code: CodeSyntax, detail: "a power of zero"}
	}
	if _, again, _ := p.power(); again {
		return term{}, &fault{code: CodeSyntax, detail: "a power of a power"}
	}
	return t.raised(n), nil
}

// power reads ^2, **2, ^(-1), 2, -1, ² or ⁻¹.
func (p *parser) power() (n int, found bool, f *fault) {
	rest := p.src[p.pos:]
	switch {
	case strings.HasPrefix(rest, "^"):
		p.pos++
		n, f = p.whole()
		return n, true, f
	case strings.HasPrefix(rest, "**"):
		p.pos += 2
		n, f = p.whole()
		return n, true, f
	}
	if n, size := superscript(rest); size > 0 {
		p.pos += size
		if _, more := superscript(p.src[p.pos:]); more > 0 {
			return 0, true, wholePower
		}
		return n, true, nil
	}
	if n, size := integer(rest); size > 0 {
		n, f = p.checked(n, size)
		return n, true, f
	}
	return 0, false, nil
}

var wholePower = &fault{code: CodeSyntax, detail: "a power is a whole number from -9 to 9"}

// whole reads the integer after ^, which may stand in parentheses.
func (p *parser) whole() (int, *fault) {
	rest := p.src[p.pos:]
	inner, open := strings.CutPrefix(rest, "(")
	if !open {
		n, size := integer(rest)
		return p.checked(n, size)
	}
	n, size := integer(inner)
	if size == 0 || !strings.HasPrefix(inner[size:], ")") {
		return 0, wholePower
	}
	return p.checked(n, size+2)
}

// checked accepts the integer n of the given length, if the number ends there.
func (p *parser) checked(n, size int) (int, *fault) {
	if size == 0 {
		return 0, wholePower
	}
	p.pos += size
	rest := strings.TrimPrefix(p.src[p.pos:], ".")
	if rest != "" && '0' <= rest[0] && rest[0] <= '9' {
		return 0, wholePower
	}
	return n, nil
}

// integer reads an optional sign and one digit.
func integer(s string) (n, size int) {
	sign := 1
	switch {
	case strings.HasPrefix(s, "-"):
		sign, size = -1, 1
	case strings.HasPrefix(s, minus):
		sign, size = -1, len(minus)
	case strings.HasPrefix(s, "+"):
		size = 1
	}
	if size == len(s) || s[size] < '0' || s[size] > '9' {
		return 0, 0
	}
	return sign * int(s[size]-'0'), size + 1
}

const minus = "\u2212"

// superscript reads an optional raised sign and one raised digit.
func superscript(s string) (n, size int) {
	const digits = "⁰¹²³⁴⁵⁶⁷⁸⁹"
	sign := 1
	rest, negative := strings.CutPrefix(s, "⁻")
	if negative {
		sign = -1
	}
	r, width := utf8.DecodeRuneInString(rest)
	if width == 0 || r == utf8.RuneError {
		return 0, 0
	}
	at := strings.IndexRune(digits, r)
	if at < 0 {
		return 0, 0
	}
	return sign * utf8.RuneCountInString(digits[:at]), len(s) - len(rest) + width
}

// run reads the longest piece that can be a symbol.
func (p *parser) run() string {
	start := p.pos
	if r, size := p.peek(); r == '%' || r == '‰' {
		p.pos += size
		return p.src[start:p.pos]
	}
	for p.pos < len(p.src) {
		r, size := p.peek()
		if !symbolRune(r) {
			break
		}
		p.pos += size
	}
	return p.src[start:p.pos]
}

func (p *parser) peek() (rune, int) { return utf8.DecodeRuneInString(p.src[p.pos:]) }

// spaces skips white space and says whether there was any.
func (p *parser) spaces() bool {
	start := p.pos
	for p.pos < len(p.src) {
		r, size := p.peek()
		if !unicode.IsSpace(r) {
			break
		}
		p.pos += size
	}
	return p.pos > start
}

// unexpected is the fault of a character that can't be where it is.
func (p *parser) unexpected() *fault {
	if p.pos >= len(p.src) {
		return &fault{code: CodeSyntax, detail: "a unit is missing"}
	}
	r, _ := p.peek()
	return &fault{code: CodeSyntax, detail: fmt.Sprintf("unexpected %q in the unit", r)}
}
