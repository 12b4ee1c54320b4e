// Package openapi holds the contract of the HTTP interface, openapi.yaml: paths
// and answers written by hand, the parts that follow from the engine's own
// lists (schemas of a case, names, examples) written by the generator between
// two marks.
package openapi

import (
	"bytes"
	_ "embed"
	"slices"
	"strconv"
	"sync"

	"github.com/go-json-experiment/json/jsontext"
	"go.yaml.in/yaml/v3"
)

//go:generate go run ./generate

//go:embed openapi.yaml
var document []byte

// YAML returns the contract as it is written.
func YAML() []byte { return slices.Clone(document) }

// JSON returns the contract as JSON, members in the same order.
func JSON() []byte { return slices.Clone(asJSON()) }

var asJSON = sync.OnceValue(func() []byte {
	var root yaml.Node
	if err := yaml.Unmarshal(document, &root); err != nil {
		panic("openapi: " + err.Error()) // the file is part of the program
	}
	var out bytes.Buffer
	enc := jsontext.NewEncoder(&out, jsontext.WithIndent("  "))
	if err := write(enc, &root); err != nil {
		panic("openapi: " + err.Error())
	}
	return out.Bytes()
})

// write writes a node of YAML as JSON.
func write(enc *jsontext.Encoder, n *yaml.Node) error {
	switch n.Kind {
	case yaml.DocumentNode:
		return write(enc, n.Content[0])
	case yaml.AliasNode:
		return write(enc, n.Alias)
	case yaml.MappingNode:
		return writeAll(enc, n, jsontext.BeginObject, jsontext.EndObject)
	case yaml.SequenceNode:
		return writeAll(enc, n, jsontext.BeginArray, jsontext.EndArray)
	}
	return enc.WriteToken(scalar(n))
}

func writeAll(enc *jsontext.Encoder, n *yaml.Node, open, end jsontext.Token) error {
	if err := enc.WriteToken(open); err != nil {
		return err
	}
	for i, child := range n.Content {
		if n.Kind == yaml.MappingNode && i%2 == 0 {
			if err := enc.WriteToken(jsontext.String(child.Value)); err != nil {
				return err
			}
			continue
		}
		if err := write(enc, child); err != nil {
			return err
		}
	}
	return enc.WriteToken(end)
}

func scalar(n *yaml.Node) jsontext.Token {
	switch n.Tag {
	case "!!null":
		return jsontext.Null
	case "!!bool":
		return jsontext.Bool(n.Value == "true")
	case "!!int", "!!float":
		if x, err := strconv.ParseFloat(n.Value, 64); err == nil {
			return jsontext.Float(x)
		}
	}
	return jsontext.String(n.Value)
}
