package units

import (
	"strconv"
	"strings"
	"unicode/utf8"
)

// maxText is the longest text that is read as a quantity.
const maxText = 300

// Parse reads a quantity of kind k: a number, a unit and, where it is uncertain, a
// standard deviation or a range.
func Parse(s string, k Kind) (Quantity, error) {
	return result(parse(s, k))
}

func parse(s string, k Kind) (Quantity, *Error) {
	if len(s) > maxText {
		return Quantity{}, newError(CodeSyntax, s, k, "too long for a quantity")
	}
	text := strings.TrimSpace(s)
	if text == "" {
		return Quantity{}, newError(CodeSyntax, s, k, "there is no number")
	}
	n := number(text)
	rest := strings.TrimSpace(text[n:])
	if text[0] == '(' || hasMark(rest) {
		return uncertain(text, k)
	}
	if n == 0 {
		return Quantity{}, noNumber(text, text, k)
	}
	x, e := value(text[:n], text, k)
	if e != nil {
		return Quantity{}, e
	}
	q, e := measured(x, rest, k, text)
	if e != nil && e.Code == CodeSyntax {
		return Quantity{}, misspelt(e, text, n)
	}
	return q, e
}

// number is the length of the decimal number with which s begins, or 0. A full
// stop belongs to it only if a digit or nothing of a range follows.
func number(s string) int {
	i := sign(s)
	digits := 0
	for i < len(s) && isDigit(s[i]) {
		i++
		digits++
	}
	if i < len(s) && s[i] == '.' && !strings.HasPrefix(s[i+1:], ".") {
		j := i + 1
		for j < len(s) && isDigit(s[j]) {
			j++
		}
		decimals := j - i - 1
		if digits+decimals > 0 {
			i, digits = j, digits+decimals
		}
	}
	if digits == 0 {
		return 0
	}
	return i + exponent(s[i:])
}

// exponent is the length of the power of ten with which s begins, or 0.
func exponent(s string) int {
	if s == "" || s[0] != 'e' && s[0] != 'E' {
		return 0
	}
	i := 1 + sign(s[1:])
	start := i
	for i < len(s) && isDigit(s[i]) {
		i++
	}
	if i == start {
		return 0
	}
	return i
}

// sign is the length of the sign with which s begins, or 0.
func sign(s string) int {
	switch {
	case s == "":
		return 0
	case s[0] == '-' || s[0] == '+':
		return 1
	case strings.HasPrefix(s, minus):
		return len(minus)
	}
	return 0
}

func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// value converts a decimal number. One that is too large or too small for a
// double is refused, and not rounded to infinity or zero.
func value(digits, got string, k Kind) (float64, *Error) {
	if strings.Contains(digits, minus) {
		digits = strings.ReplaceAll(digits, minus, "-")
	}
	x, err := strconv.ParseFloat(digits, 64)
	if err != nil || !representable(x) || x == 0 && !isZero(digits) {
		return 0, notFinite(got, k)
	}
	return x, nil
}

// isZero says whether a number is written with no digit other than 0.
func isZero(digits string) bool {
	mantissa, _, _ := strings.Cut(strings.ToLower(digits), "e")
	return !strings.ContainsAny(mantissa, "123456789")
}

// noNumber explains why a text, received within got, has no number at its beginning.
func noNumber(text, got string, k Kind) *Error {
	word := strings.ToLower(strings.TrimLeft(text, "+-"))
	if strings.HasPrefix(word, "nan") || strings.HasPrefix(word, "inf") {
		return notFinite(got, k)
	}
	e := newError(CodeSyntax, got, k, "there is no number")
	if c, f := compile(text); f == nil && c.fits(k) {
		e.Detail = "there is a unit without a number"
	}
	return e
}

// misspelt improves the error about a number of n bytes that is followed by
// something that is no unit: the number itself is often the cause.
func misspelt(e *Error, text string, n int) *Error {
	after := text[n:]
	tail := strings.TrimSpace(after)
	r, size := utf8.DecodeRuneInString(tail)
	if size == 0 {
		return e
	}
	digitsNext := number(strings.TrimSpace(tail[size:])) > 0
	switch {
	case r == ',' && digitsNext:
		e.Detail = "a comma in the number"
		return e.suggest(comma(text, n))
	case (r == '-' || r == '–' || r == '−') && digitsNext:
		e.Detail = "a range is written with two full stops"
		return e.suggest(clip(text[:n] + " .. " + strings.TrimSpace(tail[size:])))
	case isDigit(tail[0]) && tail != after:
		e.Detail = "a space inside the number"
		return e.suggest(clip(text[:n] + tail))
	}
	return e
}

// comma offers the readings of a number whose n-th byte is a comma: a decimal
// sign, or also a separator of thousands if three digits follow.
func comma(text string, n int) string {
	at := n + strings.IndexByte(text[n:], ',')
	before, after := text[:at], text[at+1:]
	decimal := clip(before + "." + after)
	digits := 0
	for digits < len(after) && isDigit(after[digits]) {
		digits++
	}
	if digits != 3 {
		return decimal
	}
	return decimal + either + clip(before+after)
}
