package input

import (
	"crypto/sha256"
	"encoding/hex"
	"strconv"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/units"
)

// Canonical appends the case as canonical JSON (RFC 8785): what was given, in
// SI, names sorted, numbers in the shortest form.
func (c *Case) Canonical(dst []byte) []byte {
	start := len(dst)
	dst = append(dst, '{')
	block, open := "", false
	wroteKind := false
	for _, v := range c.sorted() {
		if open && v.Field.Of != block {
			dst = append(dst, '}')
			open = false
		}
		if !open && v.Field.Of == "" {
			dst = comma(dst, start)
		}
		if v.Field.Of != "" && !open {
			dst = comma(dst, start)
			dst = appendName(dst, v.Field.Of)
			dst = append(dst, '{')
			block, open = v.Field.Of, true
			if block == "structure" {
				dst = appendName(dst, "kind")
				dst = appendString(dst, c.Kind)
				wroteKind = true
				dst = append(dst, ',')
			}
		} else if open {
			dst = append(dst, ',')
		}
		dst = appendName(dst, v.Field.Name)
		dst = v.append(dst)
	}
	if open {
		dst = append(dst, '}')
	}
	if !wroteKind {
		dst = comma(dst, start)
		dst = appendName(dst, "structure")
		dst = append(dst, '{')
		dst = appendName(dst, "kind")
		dst = appendString(dst, c.Kind)
		dst = append(dst, '}')
	}
	dst = append(dst, '}')
	doc := jsontext.Value(dst[start:])
	if err := doc.Canonicalize(); err != nil {
		return dst // only for text that is no valid UTF-8, which the decoder refuses
	}
	return append(dst[:start], doc...)
}

// Digest is the SHA-256 of the canonical case, in hexadecimal.
func (c *Case) Digest() string {
	var room [2048]byte
	sum := sha256.Sum256(c.Canonical(room[:0]))
	return hex.EncodeToString(sum[:])
}

func comma(dst []byte, start int) []byte {
	if len(dst) > start+1 {
		return append(dst, ',')
	}
	return dst
}

func appendName(dst []byte, name string) []byte {
	return append(appendString(dst, name), ':')
}

func appendString(dst []byte, s string) []byte {
	out, err := jsontext.AppendQuote(dst, s)
	if err != nil {
		return append(dst, `""`...)
	}
	return out
}

func appendFloat(dst []byte, x float64) []byte {
	return strconv.AppendFloat(dst, x, 'g', -1, 64)
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
	return append(dst, "null"...)
}

func appendQuantity(dst []byte, q *units.Quantity, k units.Kind) []byte {
	dst = append(dst, `{"unit":`...)
	dst = appendString(dst, k.SI())
	dst = append(dst, `,"value":`...)
	dst = appendFloat(dst, q.Value)
	if q.Gauge {
		dst = append(dst, `,"gauge":true`...)
	}
	switch q.Form {
	case units.Normal:
		dst = append(dst, `,"std":`...)
		dst = appendFloat(dst, q.Spread)
	case units.Uniform:
		dst = append(dst, `,"half_width":`...)
		dst = appendFloat(dst, q.Spread)
	}
	return append(dst, '}')
}
