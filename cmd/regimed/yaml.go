package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"
	"go.yaml.in/yaml/v3"

	"regimed/regime/input"
)

// Limits of a document that is written in YAML. Aliases are written out, so
// that a few lines could otherwise grow without end.
const (
	maxDocument = 1 << 20 // bytes, before and after
	maxDepth    = 100
)

// errTooLarge says that a document exceeds maxDocument.
var errTooLarge = errors.New("the document is larger than 1 MiB")

// The plain scalars of the core schema of YAML 1.2, section 10.3.2: yes, no,
// on and off are strings there, 0o17 is octal, and 1_000 is no number.
var (
	yamlInteger = regexp.MustCompile(`^[-+]?[0-9]+$`)
	yamlOctal   = regexp.MustCompile(`^0o[0-7]+$`)
	yamlHex     = regexp.MustCompile(`^0x[0-9a-fA-F]+$`)
	yamlFloat   = regexp.MustCompile(`^[-+]?(\.[0-9]+|[0-9]+(\.[0-9]*)?)([eE][-+]?[0-9]+)?$`)
	yamlNoReal  = regexp.MustCompile(`^([-+]?(\.inf|\.Inf|\.INF)|\.nan|\.NaN|\.NAN)$`)
	leadingZero = regexp.MustCompile(`^[-+]?0[0-9]`)
)

// yamlToJSON writes a YAML document as JSON. Numbers keep their digits,
// a name that is given twice stays twice. What JSON cannot say becomes null and
// a violation at its place.
func yamlToJSON(data []byte) ([]byte, lines, []input.Violation, error) {
	node, err := parseYAML(data)
	if err != nil {
		return nil, nil, nil, err
	}
	w := &yamlWriter{at: lines{}}
	if err := w.value(node, "", 0); err != nil {
		return nil, nil, nil, err
	}
	return w.out, w.at, w.bad.List(), nil
}

func parseYAML(data []byte) (*yaml.Node, error) {
	dec := yaml.NewDecoder(bytes.NewReader(data))
	var doc, more yaml.Node
	if err := dec.Decode(&doc); err != nil {
		if errors.Is(err, io.EOF) {
			return nil, errors.New("the document is empty")
		}
		return nil, err
	}
	if err := dec.Decode(&more); err == nil {
		return nil, fmt.Errorf("line %d: a second document follows", more.Line)
	} else if !errors.Is(err, io.EOF) {
		return nil, err
	}
	if len(doc.Content) != 1 {
		return nil, errors.New("the document is empty")
	}
	return doc.Content[0], nil
}

type yamlWriter struct {
	out []byte
	at  lines
	bad input.Violations
}

// refuse writes null, and a violation.
func (w *yamlWriter) refuse(pointer string, code input.Code, sentence, received string) {
	raw, err := jsontext.AppendQuote(nil, received)
	if err != nil {
		raw = nil
	}
	w.bad.Add(pointer, code, sentence, raw)
	w.out = append(w.out, "null"...)
}

func (w *yamlWriter) value(n *yaml.Node, pointer string, depth int) error {
	if len(w.out) > maxDocument {
		return errTooLarge
	}
	if depth > maxDepth {
		return fmt.Errorf("line %d: the document is nested more than %d levels deep, or contains itself", n.Line, maxDepth)
	}
	switch n.Kind {
	case yaml.AliasNode:
		return w.value(n.Alias, pointer, depth+1)
	case yaml.MappingNode:
		return w.mapping(n, pointer, depth)
	case yaml.SequenceNode:
		return w.sequence(n, pointer, depth)
	}
	w.scalar(n, pointer)
	return nil
}

func (w *yamlWriter) mapping(n *yaml.Node, pointer string, depth int) error {
	w.out = append(w.out, '{')
	for i := 0; i+1 < len(n.Content); i += 2 {
		if i > 0 {
			w.out = append(w.out, ',')
		}
		key := n.Content[i]
		for key.Kind == yaml.AliasNode {
			key = key.Alias
		}
		if key.Kind != yaml.ScalarNode {
			return fmt.Errorf("line %d: a name must be a word", key.Line)
		}
		quoted, err := jsontext.AppendQuote(nil, key.Value)
		if err != nil {
			return fmt.Errorf("line %d: %w", key.Line, err)
		}
		inner := pointer + "/" + escapePointer(key.Value)
		w.at.add(inner, n.Content[i].Line)
		w.out = append(append(w.out, quoted...), ':')
		if err := w.value(n.Content[i+1], inner, depth+1); err != nil {
			return err
		}
	}
	w.out = append(w.out, '}')
	return nil
}

func (w *yamlWriter) sequence(n *yaml.Node, pointer string, depth int) error {
	w.out = append(w.out, '[')
	for i, item := range n.Content {
		if i > 0 {
			w.out = append(w.out, ',')
		}
		inner := pointer + "/" + strconv.Itoa(i)
		w.at.add(inner, item.Line)
		if err := w.value(item, inner, depth+1); err != nil {
			return err
		}
	}
	w.out = append(w.out, ']')
	return nil
}

// scalar writes a string, a number, true, false or null.
func (w *yamlWriter) scalar(n *yaml.Node, pointer string) {
	text := n.Value
	quoted := n.Style&(yaml.SingleQuotedStyle|yaml.DoubleQuotedStyle|yaml.LiteralStyle|yaml.FoldedStyle) != 0
	if n.Style&yaml.TaggedStyle != 0 {
		w.tagged(n, pointer)
		return
	}
	if quoted {
		w.text(text, pointer)
		return
	}
	w.plain(text, pointer)
}

// tagged writes a scalar whose type is stated: a string where it says so, and
// else what the text is, if that is the type stated.
func (w *yamlWriter) tagged(n *yaml.Node, pointer string) {
	switch n.ShortTag() {
	case "!!str":
		w.text(n.Value, pointer)
	case "!!int", "!!float", "!!bool", "!!null":
		w.plain(n.Value, pointer)
	default:
		w.refuse(pointer, input.WrongType, fmt.Sprintf("The type %q has no meaning in a case.", n.Tag), n.Value)
	}
}

func (w *yamlWriter) text(s, pointer string) {
	out, err := jsontext.AppendQuote(w.out, s)
	if err != nil {
		w.refuse(pointer, input.WrongType, "A string must be valid UTF-8.", "")
		return
	}
	w.out = out
}

// plain writes a scalar without quotes, by the core schema.
func (w *yamlWriter) plain(s, pointer string) {
	switch s {
	case "", "~", "null", "Null", "NULL":
		w.out = append(w.out, "null"...)
		return
	case "true", "True", "TRUE":
		w.out = append(w.out, "true"...)
		return
	case "false", "False", "FALSE":
		w.out = append(w.out, "false"...)
		return
	}
	switch {
	case yamlNoReal.MatchString(s):
		w.refuse(pointer, input.NotFinite, fmt.Sprintf("%s is no number that can be computed with.", s), s)
	case leadingZero.MatchString(s) && yamlInteger.MatchString(s):
		w.refuse(pointer, input.BadQuantity, fmt.Sprintf("%s could be octal or decimal: write it without the leading zero.", s), s)
	case yamlOctal.MatchString(s), yamlHex.MatchString(s):
		w.based(s, pointer)
	case yamlInteger.MatchString(s), yamlFloat.MatchString(s):
		w.out = append(w.out, jsonNumber(s)...)
	default:
		w.text(s, pointer)
	}
}

// based writes an octal or hexadecimal integer in decimal.
func (w *yamlWriter) based(s, pointer string) {
	x, err := strconv.ParseUint(s, 0, 63)
	if err != nil {
		w.refuse(pointer, input.NotFinite, fmt.Sprintf("%s is too large.", s), s)
		return
	}
	w.out = strconv.AppendUint(w.out, x, 10)
}

// jsonNumber spells a decimal number as JSON wants it, with the same digits:
// +1 is 1, .5 is 0.5, 1. is 1, 01.5 is 1.5.
func jsonNumber(s string) string {
	sign := ""
	switch s[0] {
	case '-':
		sign, s = "-", s[1:]
	case '+':
		s = s[1:]
	}
	mantissa, exponent := s, ""
	if i := strings.IndexAny(s, "eE"); i >= 0 {
		mantissa, exponent = s[:i], s[i:]
	}
	whole, fraction, _ := strings.Cut(mantissa, ".")
	whole = strings.TrimLeft(whole, "0")
	if whole == "" {
		whole = "0"
	}
	if fraction != "" {
		fraction = "." + fraction
	}
	return sign + whole + fraction + exponent
}
