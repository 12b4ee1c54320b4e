package mapplot

import (
	"cmp"
	"math"
	"slices"
	"strconv"
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot/vg"

	"regimed/regime/whatif"
)

// word is text at its place on the plot.
type word struct {
	block
	at  box
	pad bool // on a pale ground of its own
}

// badge is a number that stands for what has no room for words; it may stand
// beside what it means, with a line that leads there.
type badge struct {
	text     string
	at, from vg.Point
	led      bool
}

// labels places all words on the plot so that none covers another.
type labels struct {
	*sheet
	*raster
	words  []word
	badges []badge
	boxes  []box // where lines leave a gap
	keys   []key
}

// key is a line of the legend for what has a number or a letter only.
type key struct {
	sign string
	zone *whatif.Zone // nil for a line
	text string
}

func (s *sheet) place() *labels {
	l := &labels{sheet: s, raster: newRaster(s.m, s.width, s.height)}
	for i := range s.ruled {
		for _, t := range s.ruled[i].tracks {
			l.rule(t, s.ruled[i].bit)
		}
	}
	l.here()
	l.regions()
	l.lines()
	return l
}

// add puts words at a place, and keeps it free of others.
func (l *labels) add(w word) {
	l.words = append(l.words, w)
	l.boxes = append(l.boxes, w.at)
	l.block(w.at)
}

// block marks a box as taken.
func (l *labels) block(b box) {
	b.width, b.high = b.width+grain, b.high+grain
	for _, p := range b.grid() {
		if at := l.at(p); at >= 0 {
			l.taken[at] = 1
		}
	}
}

// here marks the case and writes its two inputs beside it.
func (l *labels) here() {
	if l.m.Here == nil {
		return
	}
	p := l.point(*l.m.Here)
	defer l.block(box{middle: p, width: 4 * markRadius, high: 4 * markRadius})
	b := block{style: style(labelSize, ink, xfont.WeightBold), lines: []string{l.coordinates()}}
	size := vg.Point{X: b.width() + 4, Y: b.height() + 1}
	best, found := box{}, false
	least := math.Inf(1)
	for i, d := range []vg.Point{{X: 1, Y: 0.6}, {X: 1, Y: -0.6}, {X: -1, Y: 0.6}, {X: -1, Y: -0.6}, {X: 0, Y: 1}, {X: 0, Y: -1}, {X: 1, Y: 0}, {X: -1, Y: 0}} {
		at := box{middle: vg.Point{X: p.X + d.X*(size.X/2+2*markRadius), Y: p.Y + d.Y*(size.Y/2+2*markRadius)}, width: size.X, high: size.Y}
		others, borders, taken := l.under(at, 0)
		if taken {
			continue
		}
		if cost := float64(10*borders+4*others) + float64(i); cost < least {
			best, least, found = at, cost, true
		}
	}
	if found {
		l.add(word{b, best, true})
	}
}

// under counts what a box would cover: points of lines other than those of a mask,
// and points of other regions than that of its middle. taken is true where it
// covers words or reaches beyond the plot.
func (l *labels) under(b box, mask uint64) (others, borders int, taken bool) {
	middle := l.at(b.middle)
	if middle < 0 {
		return 0, 0, true
	}
	for _, p := range b.grid() {
		i := l.at(p)
		if i < 0 || l.taken[i] != 0 {
			return others, borders, true
		}
		if l.lined[i]&^mask != 0 {
			others++
		}
		if l.region[i] != l.region[middle] {
			borders++
		}
	}
	return others, borders, false
}

// regions writes the title of its class into each region; where there is no room a
// number stands for it.
func (l *labels) regions() {
	named := map[*whatif.Zone]bool{}
	for i := range l.m.Regions {
		r := &l.m.Regions[i]
		if r.Area < 0.001 || named[r.Zone] && r.Area < 0.03 {
			continue
		}
		if l.title(i, titleOf(r.Zone)) {
			named[r.Zone] = true
		}
	}
	numbers := map[*whatif.Zone]string{}
	for i := range l.m.Regions {
		r := &l.m.Regions[i]
		if named[r.Zone] {
			continue
		}
		text, again := numbers[r.Zone]
		if !again {
			text = strconv.Itoa(len(numbers) + 1)
			numbers[r.Zone] = text
			l.keys = append(l.keys, key{text, r.Zone, titleOf(r.Zone)})
		} else if r.Area < 0.002 {
			continue
		}
		l.number(i, text)
	}
}

// titleOf says what holds in a zone.
func titleOf(z *whatif.Zone) string {
	if z.Class == nil {
		return "Outside the range of " + strings.Join(z.Outside, ", ")
	}
	return z.Class.Title
}

// title writes a title into a region, in as many lines as it takes to keep clear of
// borders and, if that can be, of lines.
func (l *labels) title(region int, title string) bool {
	type place struct {
		block
		at      box
		crossed int
	}
	var best *place
	o := l.room()
	for _, size := range []float64{titleSize, smallSize} {
		for lines := 1; lines <= 5; lines++ {
			b := inLines(style(size, ink, xfont.WeightNormal), title, lines)
			if len(b.lines) < lines {
				break
			}
			width, high := b.width()+6, b.height()+4
			col, row, crossed, ok := o.best(region, points(width), points(high))
			if ok && (best == nil || crossed < best.crossed) {
				middle := vg.Point{X: grain * (vg.Length(col) + 0.5), Y: grain * (vg.Length(row) + 0.5)}
				best = &place{b, box{middle: middle, width: width - 2, high: high - 2}, crossed}
			}
		}
		if best != nil {
			l.add(word{best.block, best.at, false})
			return true
		}
	}
	return false
}

// number puts a number into a region, or beside it with a line that leads there.
func (l *labels) number(region int, text string) {
	side := vg.Length(2*badgeRadius + 2)
	o := l.room()
	if col, row, _, ok := o.best(region, points(side), points(side)); ok {
		p := vg.Point{X: grain * (vg.Length(col) + 0.5), Y: grain * (vg.Length(row) + 0.5)}
		l.badge(badge{text: text, at: p})
		return
	}
	from := l.inside(region)
	best, least := badge{}, math.Inf(1)
	for _, far := range []vg.Length{14, 20, 28, 38, 50} {
		for k := range 16 {
			sin, cos := math.Sincos(math.Pi / 8 * float64(k))
			p := vg.Point{X: from.X + far*vg.Length(cos), Y: from.Y + far*vg.Length(sin)}
			others, borders, taken := l.under(box{middle: p, width: side, high: side}, 0)
			if taken || l.barred(from, p) {
				continue
			}
			if cost := float64(far) + 3*float64(others) + 3*float64(borders); cost < least {
				best, least = badge{text, p, from, true}, cost
			}
		}
	}
	if !math.IsInf(least, 1) {
		l.badge(best)
	}
}

// barred reports whether words stand between two points.
func (l *labels) barred(from, to vg.Point) bool {
	for i := range 41 {
		if at := l.at(mix(from, to, float64(i)/40)); at >= 0 && l.taken[at] != 0 {
			return true
		}
	}
	return false
}

func (l *labels) badge(b badge) {
	l.badges = append(l.badges, b)
	for i := 0; b.led && i <= 40; i++ {
		if at := l.at(mix(b.from, b.at, float64(i)/40)); at >= 0 {
			l.taken[at] = 1
		}
	}
	at := box{middle: b.at, width: 2*badgeRadius + 2, high: 2*badgeRadius + 2}
	l.boxes = append(l.boxes, at)
	l.block(at)
}

// inside is a point of a region, as far from its border as the raster knows one,
// else on its outline.
func (l *labels) inside(region int) vg.Point {
	best, most := -1, 0
	for i, r := range l.region {
		if r == region && l.clear[i] > most {
			best, most = i, l.clear[i]
		}
	}
	if best >= 0 {
		return vg.Point{X: grain * (vg.Length(best%l.cols) + 0.5), Y: grain * (vg.Length(best/l.cols) + 0.5)}
	}
	return l.point(l.m.Regions[region].Rings[0][0])
}

// lines writes along each line which assumption it belongs to, the longest first:
// its name, or where that has no room a letter. One that hugs the frame goes without
// where its name has no room.
func (l *labels) lines() {
	type stretch struct {
		*ruled
		*track
	}
	var order []stretch
	for i := range l.ruled {
		for _, t := range l.ruled[i].tracks {
			if half := t.length() / 2; t.turns() {
				order = append(order, stretch{&l.ruled[i], t.part(0, half)}, stretch{&l.ruled[i], t.part(half, 2*half)})
			} else {
				order = append(order, stretch{&l.ruled[i], t})
			}
		}
	}
	slices.SortStableFunc(order, func(a, b stretch) int { return cmp.Compare(b.track.length(), a.track.length()) })
	letters, named := map[*ruled]string{}, map[*ruled]bool{}
	for _, s := range order {
		if named[s.ruled] && s.track.length() < worthAName {
			continue
		}
		named[s.ruled] = true
		b := block{style: style(lineSize, ink, xfont.WeightNormal), lines: []string{s.name()}}
		if l.along(s.track, s.bit, b, false) || l.hugs(s.track) {
			continue
		}
		letter := letters[s.ruled]
		if letter == "" {
			letter = string(rune('a' + len(letters)%26))
			letters[s.ruled] = letter
			l.keys = append(l.keys, key{sign: letter, text: s.name()})
		}
		b.lines = []string{letter}
		if !l.along(s.track, s.bit, b, false) && !l.lead(s.track, letter) {
			l.along(s.track, s.bit, b, true)
		}
	}
}

// hugs reports whether a line runs along one side of the frame, where nothing could
// be told apart.
func (l *labels) hugs(t *track) bool {
	const narrow = 2.5 * vg.Millimeter
	all := func(near func(p vg.Point) bool) bool {
		return !slices.ContainsFunc(t.points, func(p vg.Point) bool { return !near(p) })
	}
	return all(func(p vg.Point) bool { return p.X < narrow }) || all(func(p vg.Point) bool { return p.X > l.width-narrow }) ||
		all(func(p vg.Point) bool { return p.Y < narrow }) || all(func(p vg.Point) bool { return p.Y > l.height-narrow })
}

// along writes words along a line, where it runs straight and nothing else is;
// anywhere allows borders and other lines under them.
func (l *labels) along(t *track, bit uint64, b block, anywhere bool) bool {
	width, high := b.width()+4, 0.9*b.style.Font.Size
	best, least := box{}, math.Inf(1)
	total := t.length()
	for s := width/2 + 4; s <= total-width/2-4; s += 2 {
		at, bent := t.boxAt(s, width, high)
		if bent > 1.6 {
			continue
		}
		others, borders, taken := l.under(at, bit)
		if taken || !anywhere && others+borders > 0 {
			continue
		}
		cost := 4*bent + float64(others+2*borders) + 0.01*math.Abs(float64(s-total/2)) + 2*math.Abs(at.angle)
		if cost < least {
			best, least = at, cost
		}
	}
	if math.IsInf(least, 1) {
		return false
	}
	l.add(word{b, best, false})
	return true
}

// boxAt is a box along a track around the point after a way, and how far the track
// strays from its middle line.
func (t *track) boxAt(s, width, high vg.Length) (box, float64) {
	p, q := t.at(s-width/2), t.at(s+width/2)
	angle := math.Atan2(float64(q.Y-p.Y), float64(q.X-p.X))
	switch {
	case angle > math.Pi/2+1e-9:
		angle -= math.Pi
	case angle <= -math.Pi/2+1e-9:
		angle += math.Pi
	}
	b := box{mix(p, q, 0.5), width, high, angle}
	bent := 0.0
	for i := range 9 {
		bent = max(bent, math.Abs(float64(b.local(t.at(s+width*(vg.Length(i)/8-0.5))).Y)))
	}
	return b, bent
}

// lead puts a letter beside a line that has no room for it, with a line that leads
// there.
func (l *labels) lead(t *track, letter string) bool {
	side := vg.Length(2*badgeRadius + 2)
	for _, far := range []vg.Length{12, 18, 26, 36} {
		for _, part := range []vg.Length{0.5, 0.3, 0.7} {
			from := t.at(part * t.length())
			for k := range 12 {
				sin, cos := math.Sincos(math.Pi / 6 * float64(k))
				p := vg.Point{X: from.X + far*vg.Length(cos), Y: from.Y + far*vg.Length(sin)}
				if others, borders, taken := l.under(box{middle: p, width: side, high: side}, 0); !taken && others+borders == 0 && !l.barred(from, p) {
					l.badge(badge{letter, p, from, true})
					return true
				}
			}
		}
	}
	return false
}
