package mapplot

import (
	"math"
	"strconv"
	"strings"

	"regimed/regime/input"
	"regimed/regime/whatif"
	"regimed/units"
)

// axis is an axis of the map in the unit that it is drawn in: SI = factor x + zero.
type axis struct {
	*whatif.MapAxis
	unit         string
	factor, zero float64
}

// newAxis takes the unit in which the range was written, or else the one in which
// the trade would write a value from the middle of it.
func newAxis(a *whatif.MapAxis) axis {
	k := a.Place.Kind()
	spoken := strings.TrimLeft(units.Format(a.At(0.5), k), "0123456789.-e")
	for _, name := range []string{a.Unit, strings.TrimSpace(spoken), k.SI()} {
		if x, ok := inUnit(a, name); ok {
			return x
		}
	}
	return axis{a, k.SI(), 1, 0}
}

func inUnit(a *whatif.MapAxis, name string) (axis, bool) {
	k := a.Place.Kind()
	one, err := units.FromValueUnit(1, name, k)
	if err != nil {
		return axis{}, false
	}
	zero, err := units.FromValueUnit(0, name, k)
	if err != nil || one.Value == zero.Value {
		return axis{}, false
	}
	return axis{a, printed(name), one.Value - zero.Value, zero.Value}, true
}

// printed writes a unit as print does: m/s2 as m/s².
func printed(name string) string {
	switch name {
	case "degC", "Cel":
		return "°C"
	case "degF":
		return "°F"
	case "deg":
		return "°"
	case "um":
		return "µm"
	}
	return strings.NewReplacer("^", "", "**", "", "2", "²", "3", "³", "*", "·").Replace(name)
}

// of is an input in SI in the unit of the axis.
func (a *axis) of(si float64) float64 { return (si - a.zero) / a.factor }

// position is where a value in the unit of the axis stands on it.
func (a *axis) position(x float64) float64 { return a.Position(a.factor*x + a.zero) }

// amount writes an input in SI in the unit of the axis, with four digits.
func (a *axis) amount(si float64) string {
	text := dashed(string(units.AppendNumber(nil, a.of(si), 4)))
	if a.unit == "" || a.unit == "°" || a.unit == "%" {
		return text + a.unit
	}
	return text + " " + a.unit
}

// title is what the axis shows: in words, if possible not more than fit, and by its
// path with the unit.
func (a *axis) title(fits func(string) bool) (inWords, path string) {
	doc := a.Place.Field.Doc
	if a.Place.Field.Type == input.Interval {
		doc = strings.Replace(doc, "lowest and highest", [2]string{"lowest", "highest"}[a.Place.End], 1)
	}
	path = a.Name()
	if a.unit != "" {
		path += " (" + a.unit + ")"
	}
	for _, end := range []string{";", ","} {
		doc, _, _ = strings.Cut(doc, end)
		if fits(doc) {
			break
		}
	}
	return capital(doc), path
}

func capital(s string) string {
	if s == "" || s[0] >= 0x80 {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// tick is a stroke on an axis, with or without a number.
type tick struct {
	at    float64 // position
	label string
}

// ticks are the strokes of an axis with as many numbers as there is room: room
// tells whether a set of numbers fits.
func (a *axis) ticks(room func([]tick) bool) []tick {
	low, high := a.of(a.From), a.of(a.To)
	if !a.Log {
		return a.even(low, high, room)
	}
	if high/low < 2.5 {
		return a.even(low, high, room)
	}
	return a.decades(low, high, room)
}

// decades are numbers at 1, 2 and 5 times the powers of ten, or at every digit of
// a short axis, or at the powers alone, or at some of them; and strokes between.
func (a *axis) decades(low, high float64, room func([]tick) bool) []tick {
	first, last := int(math.Floor(math.Log10(low)+1e-9)), int(math.Ceil(math.Log10(high)-1e-9))
	short := high/low < 12
	var chosen []tick
	for _, numbered := range []func(n, digit int) bool{
		func(_, digit int) bool { return short && digit != 7 && digit != 9 },
		func(_, digit int) bool { return digit == 1 || digit == 2 || digit == 5 },
		func(_, digit int) bool { return digit == 1 },
		func(n, digit int) bool { return digit == 1 && n%2 == 0 },
		func(n, digit int) bool { return digit == 1 && n%3 == 0 },
		func(n, digit int) bool { return digit == 1 && n%(1+(last-first)/4) == 0 },
	} {
		chosen = a.digits(first, last, numbered)
		if labelled(chosen) && room(chosen) {
			break
		}
	}
	return chosen
}

// labelled reports whether at least two ticks have a number.
func labelled(list []tick) bool {
	n := 0
	for _, t := range list {
		if t.label != "" {
			n++
		}
	}
	return n > 1
}

func (a *axis) digits(first, last int, numbered func(n, digit int) bool) []tick {
	plain := first >= -4 && last <= 5
	var list []tick
	for n := first; n <= last; n++ {
		for digit := 1; digit < 10; digit++ {
			if last-first > 8 && digit > 1 {
				continue
			}
			x := float64(digit) * math.Pow(10, float64(n))
			at := a.position(x)
			if !(at > -1e-9 && at < 1+1e-9) {
				continue
			}
			t := tick{at: at}
			if numbered(n, digit) {
				t.label = numeral(digit, n, plain)
			}
			list = append(list, t)
		}
	}
	return list
}

// numeral writes digit·10ⁿ: in full where all numbers of the axis are short, else
// with an exponent on the line, since not every font has the raised ones.
func numeral(digit, n int, plain bool) string {
	if plain {
		return strconv.FormatFloat(float64(digit)*math.Pow(10, float64(n)), 'f', max(0, -n), 64)
	}
	return dashed(strconv.Itoa(digit) + "e" + strconv.Itoa(n))
}

// dashed writes a minus as print does.
func dashed(s string) string { return strings.ReplaceAll(s, "-", "−") }

// even are numbers at equal distances, 1, 2 or 5 times a power of ten apart.
func (a *axis) even(low, high float64, room func([]tick) bool) []tick {
	var chosen []tick
	for _, most := range []float64{10, 8, 6, 5, 4, 3, 2} {
		chosen = a.evenly(low, high, step((high-low)/most))
		if room(chosen) {
			break
		}
	}
	return chosen
}

func (a *axis) evenly(low, high, step float64) []tick {
	digits := max(0, -int(math.Floor(math.Log10(step)+1e-9)))
	large := math.Max(math.Abs(low), math.Abs(high)) >= 1e5 || digits > 4
	var list []tick
	for n := math.Ceil(low/step - 1e-9); n*step <= high+1e-9*step && len(list) < 50; n++ {
		label := strconv.FormatFloat(n*step, 'f', digits, 64)
		switch {
		case n == 0:
			label = "0"
		case large:
			label = string(units.AppendNumber(nil, n*step, 6))
		}
		list = append(list, tick{a.position(n * step), dashed(label)})
	}
	return list
}

// step is the next 1, 2 or 5 times a power of ten.
func step(least float64) float64 {
	unit := math.Pow(10, math.Floor(math.Log10(least)))
	for _, k := range []float64{1, 2, 5} {
		if k*unit >= least*(1-1e-9) {
			return k * unit
		}
	}
	return 10 * unit
}
