package input

import (
	"cmp"
	"slices"
)

// Code is the kind of a violation. The list is append-only.
type Code string

// The kinds of violation.
const (
	UnknownField   Code = "unknown-field"
	UnknownKind    Code = "unknown-kind"
	UnknownChoice  Code = "unknown-choice"
	MissingField   Code = "missing"
	WrongType      Code = "wrong-type"
	UnknownUnit    Code = "unknown-unit"
	WrongDimension Code = "wrong-dimension"
	WrongMeaning   Code = "wrong-kind"
	MissingUnit    Code = "missing-unit"
	BadQuantity    Code = "syntax"
	NotFinite      Code = "not-finite"
	AmbiguousUnit  Code = "ambiguous-unit"
	BelowZero      Code = "below-absolute-zero"
	BadRange       Code = "bad-range"
	NegativeSpread Code = "negative-uncertainty"
	OutOfRange     Code = "out-of-range"
	Contradiction  Code = "contradiction"
	Duplicate      Code = "duplicate"
	TooMany        Code = "too-many"
)

// Violation says what is wrong in a case, where, and what would be right.
type Violation struct {
	Pointer  string // JSON Pointer into the case
	Code     Code
	Sentence string
	Value    string // the value as received, as JSON; empty where there is none
}

// Violations collects what is wrong in a case.
type Violations struct {
	list []Violation
	full bool
}

const maxViolations = 100

// Add records a violation. After a hundred one more says that there are others.
func (v *Violations) Add(pointer string, code Code, sentence string, raw []byte) {
	if v.full {
		return
	}
	if len(v.list) == maxViolations {
		v.full = true
		v.list = append(v.list, Violation{Code: TooMany, Sentence: "More than 100 violations; the rest is not listed."})
		return
	}
	v.list = append(v.list, Violation{Pointer: pointer, Code: code, Sentence: sentence, Value: excerpt(raw)})
}

// List returns the violations, ordered by place.
func (v *Violations) List() []Violation {
	slices.SortStableFunc(v.list, func(a, b Violation) int {
		if (a.Code == TooMany) != (b.Code == TooMany) {
			if a.Code == TooMany {
				return 1
			}
			return -1
		}
		return cmp.Compare(a.Pointer, b.Pointer)
	})
	return v.list
}

// Any reports whether there are violations.
func (v *Violations) Any() bool { return len(v.list) > 0 }

// excerpt keeps a received value short enough to be read, and valid JSON.
func excerpt(raw []byte) string {
	const most = 200
	if len(raw) <= most {
		return string(raw)
	}
	return `"(a value of more than 200 bytes)"`
}
