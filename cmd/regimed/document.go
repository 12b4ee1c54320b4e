package main

import (
	"bytes"
	"cmp"
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// document is a file that was read: a case, or a situation that holds a case
// and what is expected of its answer.
//
//	{"structure": …, "fluid": …}                      a case
//	{"case": {…}, "expect": ["class=added-mass"], …}  a situation
//
// A case is refused by the service if it carries anything else; so expectations
// stand beside the case, never in it.
type document struct {
	name   string // of the file, for messages
	at     lines
	within string // pointer of the case inside the document: "" or "/case"
	raw    []byte // the case as JSON, exactly as a client would send it
	whole  bool   // it is no situation, even with a case in it
	expect []string
	bad    []input.Violation // pointers into the document
}

// situationMembers are what a situation may contain.
var situationMembers = []string{"title", "source", "case", "expect"}

// problem is what is wrong with a file: sentences with their places.
type problem struct{ sentences []string }

func (p *problem) Error() string { return strings.Join(p.sentences, "\n") }

// refuse makes a problem of one sentence; line 0 is unknown.
func refuse(file string, line int, sentence string) error {
	d := document{name: file}
	return &problem{[]string{d.place(line) + ": " + sentence}}
}

// refuseAll makes a problem of violations, one a line, in the order of the file:
// file, line, pointer, code, sentence.
func (d *document) refuseAll(violations []input.Violation) error {
	type placed struct {
		line int
		text string
	}
	var list []placed
	times := map[string]int{}
	for _, v := range violations {
		if v.Code == input.Duplicate {
			times[v.Pointer]++
		}
		line := d.at.find(v.Pointer, times[v.Pointer])
		list = append(list, placed{line, d.place(line) + ": " + cmp.Or(v.Pointer, "(whole)") + ": " + string(v.Code) + ": " + v.Sentence})
	}
	slices.SortStableFunc(list, func(a, b placed) int { return cmp.Compare(a.line, b.line) })
	p := &problem{}
	for _, v := range list {
		p.sentences = append(p.sentences, v.text)
	}
	return p
}

// place names the file and, where it is known, the line.
func (d *document) place(line int) string {
	if line > 0 {
		return fmt.Sprintf("%s:%d", d.name, line)
	}
	return d.name
}

// readDocument reads a file, or standard input for "-".
func readDocument(file string, stdin io.Reader) (*document, error) {
	return readInto(&document{}, file, stdin)
}

func readInto(d *document, file string, stdin io.Reader) (*document, error) {
	name := file
	if file == "-" {
		name = "(standard input)"
	}
	data, err := readAll(file, stdin)
	if err != nil {
		return nil, refuse(name, 0, plainError(err))
	}
	d.name = name
	if err := d.parse(data, strings.ToLower(filepath.Ext(file))); err != nil {
		return nil, err
	}
	return d, nil
}

// plainError leaves the name of the file out, which the message carries already.
func plainError(err error) string {
	var at *os.PathError
	if errors.As(err, &at) {
		return at.Err.Error()
	}
	return err.Error()
}

func readAll(file string, stdin io.Reader) ([]byte, error) {
	from := stdin
	if file != "-" {
		f, err := os.Open(file)
		if err != nil {
			return nil, err
		}
		defer f.Close()
		from = f
	}
	data, err := io.ReadAll(io.LimitReader(from, maxDocument+1))
	if err != nil {
		return nil, err
	}
	if len(data) > maxDocument {
		return nil, errTooLarge
	}
	return data, nil
}

// parse reads JSON or YAML: by the ending of the name where it has one of
// theirs, and else by the first letter. A document in braces that is no JSON
// may still be YAML.
func (d *document) parse(data []byte, ending string) error {
	switch ending {
	case ".json":
		return d.json(data)
	case ".yaml", ".yml":
		return d.yaml(data)
	}
	if !bytes.HasPrefix(bytes.TrimLeft(data, " \t\r\n"), []byte("{")) {
		return d.yaml(data)
	}
	if _, err := linesOfJSON(data); err == nil {
		return d.json(data)
	}
	if _, err := parseYAML(data); err == nil {
		return d.yaml(data)
	}
	return d.json(data)
}

func (d *document) json(data []byte) error {
	at, err := linesOfJSON(data)
	d.at = at
	if err != nil {
		return d.noJSON(data)
	}
	return d.split(data)
}

// noJSON says why data is no JSON, in the words of the decoder of cases.
func (d *document) noJSON(data []byte) error {
	_, _, err := input.Decode(data, kind.Schema())
	var syntax *input.SyntaxError
	if errors.As(err, &syntax) {
		return refuse(d.name, lineOfOffset(data, syntax.Offset), syntax.Sentence)
	}
	return refuse(d.name, 0, "The document is no valid JSON.")
}

func (d *document) yaml(data []byte) error {
	made, at, bad, err := yamlToJSON(data)
	if err != nil {
		return refuse(d.name, 0, "The document is no valid YAML: "+strings.TrimPrefix(err.Error(), "yaml: ")+".")
	}
	d.at, d.bad = at, bad
	return d.split(made)
}

// split takes a situation apart. Any other document is a case as it stands.
func (d *document) split(data []byte) error {
	d.raw = data
	dec := jsontext.NewDecoder(bytes.NewBuffer(data), jsontext.AllowDuplicateNames(true))
	if d.whole || dec.PeekKind() != '{' || !hasCase(data) {
		return nil
	}
	if _, err := dec.ReadToken(); err != nil {
		return d.noJSON(data)
	}
	var bad input.Violations
	var seen []string
	for dec.PeekKind() == '"' {
		token, err := dec.ReadToken()
		if err != nil {
			return d.noJSON(data)
		}
		name := token.String()
		value, err := dec.ReadValue()
		if err != nil {
			return d.noJSON(data)
		}
		if slices.Contains(seen, name) {
			bad.Add("/"+escapePointer(name), input.Duplicate, fmt.Sprintf("%q is given twice.", name), value)
			continue
		}
		seen = append(seen, name)
		d.member(name, bytes.Clone(value), &bad)
	}
	if _, err := dec.ReadToken(); err != nil {
		return d.noJSON(data)
	}
	if _, err := dec.ReadToken(); !errors.Is(err, io.EOF) {
		return d.noJSON(data) // more data follows: the decoder of cases says so
	}
	d.bad = append(d.bad, bad.List()...)
	return nil
}

// member takes one member of a situation.
func (d *document) member(name string, value jsontext.Value, bad *input.Violations) {
	switch name {
	case "case":
		d.within, d.raw = "/case", value
	case "expect":
		d.expect = stringList(value, bad)
	case "title", "source":
		if value.Kind() != '"' {
			bad.Add("/"+name, input.WrongType, name+" is a string.", value)
		}
	default:
		bad.Add("/"+escapePointer(name), input.UnknownField, fmt.Sprintf("A file with a case in it has no field %q.%s", name, didYouMean(name, situationMembers)), value)
	}
}

// stringList reads the expectations.
func stringList(raw jsontext.Value, bad *input.Violations) []string {
	const want = "expect is a list of strings, as \"class=added-mass\"."
	if raw.Kind() != '[' {
		bad.Add("/expect", input.WrongType, want, raw)
		return nil
	}
	var list []string
	dec := jsontext.NewDecoder(bytes.NewBuffer(raw))
	for depth := 0; ; {
		token, err := dec.ReadToken()
		if err != nil {
			return list
		}
		switch kind := token.Kind(); {
		case kind == '[' && depth == 0:
			depth = 1
		case kind == ']':
			return list
		case kind == '"':
			list = append(list, token.String())
		default:
			bad.Add("/expect", input.WrongType, want, raw)
			return nil
		}
	}
}

// hasCase reports whether a JSON object has a member "case".
func hasCase(data []byte) bool {
	dec := jsontext.NewDecoder(bytes.NewBuffer(data), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return false
	}
	for dec.PeekKind() == '"' {
		token, err := dec.ReadToken()
		if err != nil {
			return false
		}
		if token.String() == "case" {
			return true
		}
		if err := dec.SkipValue(); err != nil {
			return false
		}
	}
	return false
}

// didYouMean names the known names that are nearest to one, as a sentence with
// a space before it; it is empty where none is near.
func didYouMean(name string, known []string) string {
	near := input.Nearest(name, known)
	if len(near) == 0 {
		return ""
	}
	if n := len(near); n > 1 {
		return " Did you mean " + strings.Join(near[:n-1], ", ") + " or " + near[n-1] + "?"
	}
	return " Did you mean " + near[0] + "?"
}

// decode reads the case of a document, or returns everything that is wrong with it.
func (d *document) decode() (*input.Case, error) {
	c, violations, err := input.Decode(d.raw, kind.Schema())
	var syntax *input.SyntaxError
	if errors.As(err, &syntax) {
		return nil, refuse(d.name, lineOfOffset(d.raw, syntax.Offset), syntax.Sentence)
	}
	if err != nil {
		return nil, refuse(d.name, 0, err.Error())
	}
	if bad := d.merge(violations); len(bad) > 0 {
		return nil, d.refuseAll(bad)
	}
	return c, nil
}

// classify answers the case of a document, or returns everything that is wrong
// with it.
func (d *document) classify() (*regime.Answer, error) {
	c, err := d.decode()
	if err != nil {
		return nil, err
	}
	a, violations := regime.Classify(c)
	if len(violations) > 0 {
		return nil, d.refuseAll(d.merge(violations))
	}
	return a, nil
}

// explore is classify with what varying the inputs adds.
func (d *document) explore(ctx context.Context, o whatif.Options) (*regime.Answer, error) {
	c, err := d.decode()
	if err != nil {
		return nil, err
	}
	a, violations, err := whatif.Classify(ctx, c, o)
	if err != nil {
		return nil, refuse(d.name, 0, "The answer was not computed to its end: "+err.Error()+".")
	}
	if len(violations) > 0 {
		return nil, d.refuseAll(d.merge(violations))
	}
	return a, nil
}

// merge adds violations of the case to those of the document. A value that was
// refused already reached the case as null: that null is no violation of its own.
func (d *document) merge(ofCase []input.Violation) []input.Violation {
	all := slices.Clone(d.bad)
	for _, v := range ofCase {
		v.Pointer = d.within + v.Pointer
		refused := func(b input.Violation) bool { return b.Pointer == v.Pointer }
		if v.Value == "null" && v.Code == input.WrongType && slices.ContainsFunc(d.bad, refused) {
			continue
		}
		all = append(all, v)
	}
	return all
}
