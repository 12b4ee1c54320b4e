package api

import (
	"math"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"
)

// escapePointer writes a name as part of a JSON Pointer (RFC 6901).
func escapePointer(name string) string {
	return strings.NewReplacer("~", "~0", "/", "~1").Replace(clip(name, 60))
}

// quoted is a value as it may stand in a sentence: short, and in quotes.
func quoted(s string) string { return strconv.Quote(clip(s, 60)) }

// clip shortens a text of the caller's.
func clip(s string, most int) string {
	if len(s) <= most {
		return s
	}
	return strings.ToValidUTF8(s[:most], "") + "…"
}

// jsonString is a text as JSON. What is no UTF-8 in it comes as U+FFFD.
func jsonString(s string) jsontext.Value {
	v, err := jsontext.AppendQuote(nil, strings.ToValidUTF8(s, "\uFFFD"))
	if err != nil {
		return jsontext.Value(`""`)
	}
	return v
}

// number is a number of a record: nil, and null in JSON, where it is not finite.
func number(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	return &x
}
