package main

import (
	"bytes"
	"slices"
	"strings"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"go.yaml.in/yaml/v3"
)

// indent is where the generated parts stand in the document.
const indent = "    "

// toYAML writes an object as YAML, members in order, indented to its place.
func toYAML(o object) ([]byte, error) {
	data, err := json.Marshal(o, jsontext.AllowInvalidUTF8(true))
	if err != nil {
		return nil, err
	}
	node, err := read(jsontext.NewDecoder(bytes.NewReader(data)))
	if err != nil {
		return nil, err
	}
	var out bytes.Buffer
	enc := yaml.NewEncoder(&out)
	enc.SetIndent(2)
	if err := enc.Encode(node); err != nil {
		return nil, err
	}
	return indented(out.Bytes()), nil
}

func indented(text []byte) []byte {
	var out []byte
	for line := range bytes.Lines(text) {
		if len(line) > 1 {
			out = append(out, indent...)
		}
		out = append(out, line...)
	}
	return out
}

// read turns the next value of JSON into a node of YAML.
func read(dec *jsontext.Decoder) (*yaml.Node, error) {
	token, err := dec.ReadToken()
	if err != nil {
		return nil, err
	}
	switch token.Kind() {
	case '{':
		return readAll(dec, yaml.MappingNode, "!!map", '}')
	case '[':
		return readAll(dec, yaml.SequenceNode, "!!seq", ']')
	}
	return scalar(token), nil
}

func scalar(token jsontext.Token) *yaml.Node {
	n := &yaml.Node{Kind: yaml.ScalarNode, Tag: "!!str", Value: token.String()}
	switch token.Kind() {
	case 'n':
		n.Tag = "!!null"
	case 't', 'f':
		n.Tag = "!!bool"
	case '0':
		n.Tag = "!!int"
		if strings.ContainsAny(n.Value, ".eE") {
			n.Tag = "!!float"
		}
	default:
		if slices.Contains(olderBooleans, strings.ToLower(n.Value)) {
			n.Style = yaml.DoubleQuotedStyle
		}
	}
	return n
}

// olderBooleans are words that readers of YAML 1.1 take for true and false.
var olderBooleans = []string{"yes", "no", "on", "off", "y", "n"}

func readAll(dec *jsontext.Decoder, kind yaml.Kind, tag string, end jsontext.Kind) (*yaml.Node, error) {
	n := &yaml.Node{Kind: kind, Tag: tag}
	for dec.PeekKind() != end {
		child, err := read(dec)
		if err != nil {
			return nil, err
		}
		n.Content = append(n.Content, child)
	}
	_, err := dec.ReadToken()
	return n, err
}
