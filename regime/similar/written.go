package similar

import (
	"strconv"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/input"
	"regimed/units"
)

// AppendCase appends a case as JSON that can be classified again: blocks and
// fields in the order of the schema, quantities in SI with their units.
func AppendCase(dst []byte, c *input.Case) []byte {
	dst = append(dst, '{')
	for _, f := range c.Schema.Top.Fields {
		if v := c.Lookup(f); v != nil {
			dst = appendField(dst, v)
		}
	}
	dst = appendBlock(dst, c, "structure", c.Schema.Kind(c.Kind).Fields)
	for _, b := range c.Schema.Blocks {
		if c.HasBlock(b.Name) {
			dst = appendBlock(dst, c, b.Name, b.Fields)
		}
	}
	return append(dst, '}')
}

func appendBlock(dst []byte, c *input.Case, name string, fields []*input.Field) []byte {
	dst = append(appendName(dst, name), '{')
	if name == "structure" {
		dst = appendText(appendName(dst, "kind"), c.Kind)
	}
	for _, f := range fields {
		if v := c.Lookup(f); v != nil {
			dst = appendField(dst, v)
		}
	}
	return append(dst, '}')
}

func appendField(dst []byte, v *input.Value) []byte {
	return appendValue(appendName(dst, v.Field.Name), v)
}

func appendValue(dst []byte, v *input.Value) []byte {
	switch v.Field.Type {
	case input.Quantity:
		return appendQuantity(dst, &v.Q, v.Field.Kind)
	case input.Number, input.Integer:
		return appendQuantity(dst, &v.Q, units.Dimensionless)
	case input.Flag:
		return strconv.AppendBool(dst, v.Flag)
	case input.Choices:
		dst = append(dst, '[')
		for _, s := range v.List {
			dst = appendText(comma(dst), s)
		}
		return append(dst, ']')
	case input.Interval:
		dst = appendQuantity(append(dst, '['), &v.Ends[0], v.Field.Kind)
		return append(appendQuantity(append(dst, ','), &v.Ends[1], v.Field.Kind), ']')
	case input.Rows:
		return appendRows(dst, v)
	default:
		return appendText(dst, v.Text)
	}
}

func appendRows(dst []byte, v *input.Value) []byte {
	dst = append(dst, '[')
	for _, row := range v.Rows {
		dst = append(comma(dst), '{')
		for i := range row {
			dst = appendField(dst, &row[i])
		}
		dst = append(dst, '}')
	}
	return append(dst, ']')
}

// appendQuantity writes a value with its unit as a string, and an uncertain one
// as an object. A pure number stands by itself.
func appendQuantity(dst []byte, q *units.Quantity, k units.Kind) []byte {
	unit := k.SI()
	if q.Gauge {
		unit = "Pag" // above the pressure of the surroundings
	}
	switch {
	case q.Form == units.Uniform:
		dst = appendNumber(append(dst, `{"low":`...), rounded(q.Low()))
		dst = appendNumber(append(dst, `,"high":`...), rounded(q.High()))
	case q.Form == units.Normal:
		dst = appendNumber(append(dst, `{"value":`...), q.Value)
		dst = appendNumber(append(dst, `,"std":`...), q.Spread)
	case unit == "1":
		return appendNumber(dst, q.Value)
	default:
		dst = appendNumber(append(dst, '"'), q.Value)
		return append(append(append(dst, ' '), unit...), '"')
	}
	if unit != "1" {
		dst = append(append(append(dst, `,"unit":"`...), unit...), '"')
	}
	return append(dst, '}')
}

func appendNumber(dst []byte, x float64) []byte {
	if x != 0 && (x < 1e-4 && x > -1e-4 || x >= 1e9 || x <= -1e9) {
		return strconv.AppendFloat(dst, x, 'e', -1, 64)
	}
	return strconv.AppendFloat(dst, x, 'f', -1, 64)
}

func appendName(dst []byte, s string) []byte { return append(appendText(comma(dst), s), ':') }

func appendText(dst []byte, s string) []byte {
	out, err := jsontext.AppendQuote(dst, s)
	if err != nil {
		return append(dst, `""`...) // no text that was decoded
	}
	return out
}

// comma separates from what stands before, unless that opens an object or list.
func comma(dst []byte) []byte {
	if last := dst[len(dst)-1]; last == '{' || last == '[' {
		return dst
	}
	return append(dst, ',')
}
