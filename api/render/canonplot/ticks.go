package canonplot

import (
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot"
)

// decades are the ticks of a logarithmic axis: labels at the powers of ten, all of
// them or every second or more, as there is room, and strokes between them.
type decades struct{ labels int }

func (d decades) Ticks(low, high float64) []plot.Tick {
	first, last := int(math.Floor(math.Log10(low)+1e-9)), int(math.Ceil(math.Log10(high)-1e-9))
	every := 1 + (last-first)/(d.labels+1)
	plain := first >= -3 && last <= 4
	var ticks []plot.Tick
	for n := first; n <= last; n++ {
		at := math.Pow(10, float64(n))
		if at >= low*(1-1e-9) && at <= high*(1+1e-9) {
			label := ""
			if n%every == 0 {
				label = power(n, plain)
			}
			ticks = append(ticks, plot.Tick{Value: at, Label: label})
		}
		if every > 1 {
			continue
		}
		for k := 2.0; k < 10; k++ {
			if minor := k * at; minor >= low && minor <= high {
				ticks = append(ticks, plot.Tick{Value: minor})
			}
		}
	}
	return ticks
}

// power writes 10ⁿ: in digits where all of them are short, else with an exponent
// on the line, since not every font has the raised ones.
func power(n int, plain bool) string {
	if plain || n == 0 || n == 1 {
		return strconv.FormatFloat(math.Pow(10, float64(n)), 'f', -1, 64)
	}
	return shortExponent("1e" + strconv.Itoa(n))
}

// shortExponent writes 1e+06 as 1e6 and 1e-06 as 1e−6.
func shortExponent(s string) string {
	mantissa, exponent, found := strings.Cut(s, "e")
	mantissa = strings.Replace(mantissa, "-", "−", 1)
	n, err := strconv.Atoi(exponent)
	if !found || err != nil {
		return mantissa
	}
	return mantissa + "e" + strings.Replace(strconv.Itoa(n), "-", "−", 1)
}

// even are the ticks of a linear axis, at 1, 2 or 5 times a power of ten.
type even struct{ labels int }

func (e even) Ticks(low, high float64) []plot.Tick {
	step := niceStep((high - low) / float64(e.labels))
	digits := max(0, -int(math.Floor(math.Log10(step)+1e-9)))
	large := math.Max(math.Abs(low), math.Abs(high)) >= 1e5
	var ticks []plot.Tick
	for n := math.Ceil(low/step - 1e-9); n*step <= high+1e-9*step; n++ {
		label := strconv.FormatFloat(n*step, 'f', digits, 64)
		switch {
		case n == 0:
			label = "0"
		case large:
			label = strconv.FormatFloat(n*step, 'e', -1, 64)
			if len(label) > 8 { // rounding
				label = strconv.FormatFloat(n*step, 'e', 2, 64)
			}
		}
		ticks = append(ticks, plot.Tick{Value: n * step, Label: shortExponent(label)})
	}
	return ticks
}

// niceStep is the next 1, 2 or 5 times a power of ten.
func niceStep(least float64) float64 {
	unit := math.Pow(10, math.Floor(math.Log10(least)))
	for _, k := range []float64{1, 2, 5} {
		if k*unit >= least*(1-1e-9) {
			return k * unit
		}
	}
	return 10 * unit
}
