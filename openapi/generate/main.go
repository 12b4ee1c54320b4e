// Command generate writes those parts of openapi.yaml that follow from the
// engine: the schemas of a case, lists of names, and the examples, which are
// what the server really answers. Everything outside the marks is written by
// hand.
//
//	go generate ./openapi
package main

import (
	"bytes"
	"fmt"
	"os"
)

// file is the contract, seen from the folder of go:generate.
const file = "openapi.yaml"

func main() {
	if err := run(file); err != nil {
		fmt.Fprintln(os.Stderr, "generate:", err)
		os.Exit(1)
	}
}

func run(name string) error {
	old, err := os.ReadFile(name)
	if err != nil {
		return err
	}
	made, err := generate(old, "examples")
	if err != nil {
		return err
	}
	if bytes.Equal(old, made) {
		return nil
	}
	return os.WriteFile(name, made, 0o644)
}

// generate returns the contract with its generated parts made anew. The cases
// of the examples are read from a folder.
func generate(old []byte, folder string) ([]byte, error) {
	schemas, err := schemas()
	if err != nil {
		return nil, err
	}
	examples, err := examples(folder)
	if err != nil {
		return nil, err
	}
	made, err := replace(old, "schemas", schemas)
	if err != nil {
		return nil, err
	}
	return replace(made, "examples", examples)
}

// replace puts text between the two marks of a name.
func replace(doc []byte, name string, text []byte) ([]byte, error) {
	begin := []byte("    # generated " + name + ": begin\n")
	end := []byte("    # generated " + name + ": end\n")
	from, to := bytes.Index(doc, begin), bytes.Index(doc, end)
	if from < 0 || to < from {
		return nil, fmt.Errorf("the marks of %q are missing", name)
	}
	from += len(begin)
	return bytes.Join([][]byte{doc[:from], text, doc[to:]}, nil), nil
}
