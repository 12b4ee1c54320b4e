package units

import (
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Code says what is wrong with a quantity. Values are append-only.
type Code string

// The codes.
const (
	CodeSyntax         Code = "syntax"               // not a number and a unit
	CodeUnknownUnit    Code = "unknown-unit"         // no such symbol
	CodeAmbiguousUnit  Code = "ambiguous-unit"       // two readings
	CodeWrongDimension Code = "wrong-dimension"      // a unit of something else
	CodeWrongKind      Code = "wrong-kind"           // the right dimension with the wrong meaning
	CodeMissingUnit    Code = "missing-unit"         // a bare number where a unit is needed
	CodeNotFinite      Code = "not-finite"           // NaN, infinite, or outside the range of a double
	CodeBelowZero      Code = "below-absolute-zero"  // a temperature that can't be
	CodeBadRange       Code = "bad-range"            // the lower end lies above the upper
	CodeNegativeSpread Code = "negative-uncertainty" // a standard deviation below zero
	CodeRange          Code = "out-of-range"         // a number without meaning for the form of damping
)

// Error is a quantity that can't be read: what was got, what is wanted, and,
// where there is one, the likely correction.
type Error struct {
	Code       Code
	Got        string // as received, shortened
	Want       string // "a speed, such as 4.2 m/s"
	Suggestion string // "Hz", "lbm (mass) or lbf (force)"; empty if nothing is likely
	Detail     string // what is wrong, a clause
}

// Error is one sentence: what was wrong and what would be right.
func (e *Error) Error() string {
	s := strconv.Quote(e.Got) + ": " + e.Detail
	if e.Suggestion != "" {
		return s + "; did you mean " + e.Suggestion + "?"
	}
	return s + "; wanted is " + e.Want
}

// want describes a quantity of the kind.
func (k Kind) want() string {
	return k.info().phrase + ", such as " + k.Example()
}

// newError makes an error about the text got, which was to be of kind k.
func newError(code Code, got string, k Kind, detail string) *Error {
	return &Error{Code: code, Got: clip(got), Want: k.want(), Detail: printable(detail)}
}

func (e *Error) suggest(s string) *Error {
	e.Suggestion = printable(s)
	return e
}

// printable replaces what would break a line or show nothing.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case unicode.IsSpace(r):
			return ' '
		case !unicode.IsPrint(r):
			return '\uFFFD'
		}
		return r
	}, s)
}

// clip makes a received text fit for a sentence: valid, printable and short.
func clip(s string) string {
	const most = 60
	if len(s) > 4*most {
		s = s[:4*most]
	}
	s = printable(strings.ToValidUTF8(s, "\uFFFD"))
	if utf8.RuneCountInString(s) <= most {
		return s
	}
	return string([]rune(s)[:most]) + "…"
}
