package input

import (
	"crypto/sha256"
	"encoding/hex"
	"math"
	"slices"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/units"
)

// Canonical appends the case as canonical JSON (RFC 8785): what was given, in
// SI, names sorted, numbers as ECMAScript writes them.
func (c *Case) Canonical(dst []byte) []byte {
	dst = append(dst, '{')
	block, first := "", true
	for _, v := range c.canonicalOrder() {
		name := topName(v.field)
		if block != "" && name != block {
			dst = append(dst, '}')
			block = ""
		}
		if !first && (block == "" || name != block) {
			dst = append(dst, ',')
		}
		first = false
		switch {
		case v.field.Of == "":
			dst = appendName(dst, v.field.Name)
			dst = v.value.append(dst)
			continue
		case block == "":
			block = name
			dst = append(appendName(dst, name), '{')
		default:
			dst = append(dst, ',')
		}
		dst = appendName(dst, v.field.Name)
		if v.value == nil {
			dst = appendString(dst, c.Kind)
			continue
		}
		dst = v.value.append(dst)
	}
	if block != "" {
		dst = append(dst, '}')
	}
	return append(dst, '}')
}

// kindField stands for the kind of the structure in the canonical order.
var kindField = &Field{Name: "kind", Of: "structure"}

type ordered struct {
	field *Field
	value *Value // nil: the kind
}

// canonicalOrder sorts what was given, and the kind, by the names of the case
// itself and of its blocks together, then by the names inside a block.
func (c *Case) canonicalOrder() []ordered {
	list := make([]ordered, 0, len(c.given)+1)
	list = append(list, ordered{field: kindField})
	for i := range c.given {
		list = append(list, ordered{c.given[i].Field, &c.given[i]})
	}
	slices.SortFunc(list, func(a, b ordered) int {
		if d := strings.Compare(topName(a.field), topName(b.field)); d != 0 {
			return d
		}
		return strings.Compare(a.field.Name, b.field.Name)
	})
	return list
}

// Digest is the SHA-256 of the canonical case, in hexadecimal.
func (c *Case) Digest() string {
	var room [2048]byte
	sum := sha256.Sum256(c.Canonical(room[:0]))
	return hex.EncodeToString(sum[:])
}

// appendName writes the name of a field, which needs no escape.
func appendName(dst []byte, name string) []byte {
	return append(append(append(dst, '"'), name...), '"', ':')
}

func appendString(dst []byte, s string) []byte {
	out, err := jsontext.AppendQuote(dst, s)
	if err != nil {
		return append(dst, `""`...)
	}
	return out
}

// appendFloat writes a number as ECMAScript does: plain between 1e-6 and 1e21,
// with the shortest exponent beyond.
func appendFloat(dst []byte, x float64) []byte {
	a := math.Abs(x)
	if a == 0 {
		return append(dst, '0')
	}
	if a >= 1e-6 && a < 1e21 {
		return strconv.AppendFloat(dst, x, 'f', -1, 64)
	}
	start := len(dst)
	dst = strconv.AppendFloat(dst, x, 'e', -1, 64)
	if n := len(dst); n-start >= 4 && dst[n-2] == '0' && (dst[n-3] == '-' || dst[n-3] == '+') { // e-07
		dst[n-2] = dst[n-1]
		dst = dst[:n-1]
	}
	return dst
}

func (v *Value) append(dst []byte) []byte {
	switch v.Field.Type {
	case Quantity:
		return appendQuantity(dst, &v.Q, v.Field.Kind)
	case Number, Integer:
		if v.Q.Form != units.Certain {
			return appendQuantity(dst, &v.Q, units.Dimensionless)
		}
		return appendFloat(dst, v.Q.Value)
	case Flag:
		return strconv.AppendBool(dst, v.Flag)
	case Text, Choice:
		return appendString(dst, v.Text)
	case Interval:
		dst = append(dst, '[')
		dst = appendQuantity(dst, &v.Ends[0], v.Field.Kind)
		dst = append(dst, ',')
		dst = appendQuantity(dst, &v.Ends[1], v.Field.Kind)
		return append(dst, ']')
	case Choices:
		dst = append(dst, '[')
		for i, s := range v.List {
			if i > 0 {
				dst = append(dst, ',')
			}
			dst = appendString(dst, s)
		}
		return append(dst, ']')
	}
	if v.Field.Type == Rows {
		return v.appendRows(dst)
	}
	return append(dst, "null"...)
}

// appendRows writes a list of objects, the names of each sorted.
func (v *Value) appendRows(dst []byte) []byte {
	dst = append(dst, '[')
	for i, row := range v.Rows {
		if i > 0 {
			dst = append(dst, ',')
		}
		sorted := slices.Clone(row)
		slices.SortFunc(sorted, func(a, b Value) int { return strings.Compare(a.Field.Name, b.Field.Name) })
		dst = append(dst, '{')
		for j := range sorted {
			if j > 0 {
				dst = append(dst, ',')
			}
			dst = appendName(dst, sorted[j].Field.Name)
			dst = sorted[j].append(dst)
		}
		dst = append(dst, '}')
	}
	return append(dst, ']')
}

func appendQuantity(dst []byte, q *units.Quantity, k units.Kind) []byte {
	dst = append(dst, '{')
	if q.Gauge {
		dst = append(dst, `"gauge":true,`...)
	}
	switch q.Form {
	case units.Uniform:
		dst = append(dst, `"half_width":`...)
		dst = append(appendFloat(dst, q.Spread), ',')
	case units.Normal:
		dst = append(dst, `"std":`...)
		dst = append(appendFloat(dst, q.Spread), ',')
	}
	dst = append(dst, `"unit":"`...)
	dst = append(dst, k.SI()...)
	dst = append(dst, `","value":`...)
	return append(appendFloat(dst, q.Value), '}')
}
