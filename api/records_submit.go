package api

import (
	"bytes"
	"cmp"
	"context"
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"
	"time"
	"unicode"
	"unicode/utf8"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/render"
	"regimed/api/store"
	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// Submission is what a caller wants a record of.
type Submission struct {
	Case   *input.Case
	Sent   []byte // the case as it was written
	Title  string // empty: that of the case
	Author string
	Tags   []string
	Ask    whatif.Options // what its answer is made with
}

// Bounds of what people write beside a case, in characters.
const (
	maxTitle  = 200
	maxAuthor = 100
	maxTag    = 64
	maxTags   = 20
)

var submissionNames = []string{"case", "title", "tags", "author"}

// ReadSubmission reads {"case": {…}, "title": "…", "tags": […], "author": "…"}
// as strictly as a case. It returns everything that is wrong with it at once, or
// an [input.SyntaxError] where it is no JSON. What it returns does not refer to
// the text.
func ReadSubmission(data []byte, schema *input.Schema) (*Submission, []input.Violation, error) {
	r := &submissionReader{schema: schema, seen: map[string]bool{}}
	if err := r.read(data); err != nil {
		// Whatever is no JSON here is none as a case, and that reader says where.
		if _, _, err := input.Decode(data, schema); err != nil {
			return nil, nil, err
		}
		return nil, nil, err
	}
	if r.bad.Any() {
		return nil, r.bad.List(), nil
	}
	return &r.made, nil, nil
}

type submissionReader struct {
	schema *input.Schema
	seen   map[string]bool
	made   Submission
	bad    input.Violations
}

func (r *submissionReader) read(data []byte) error {
	dec := jsontext.NewDecoder(bytes.NewBuffer(data), jsontext.AllowDuplicateNames(true))
	whole, err := dec.ReadValue()
	if err != nil {
		return err
	}
	if rest := bytes.TrimLeft(data[dec.InputOffset():], " \t\r\n"); len(rest) > 0 {
		return errors.New("more data after the request")
	}
	if whole.Kind() != '{' {
		r.bad.Add("", input.WrongType, "A record is asked for with an object that has a case.", whole)
		return nil
	}
	return r.object(bytes.Clone(whole))
}

func (r *submissionReader) object(whole jsontext.Value) error {
	dec := jsontext.NewDecoder(bytes.NewBuffer(whole), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return err
	}
	for dec.PeekKind() == '"' {
		token, err := dec.ReadToken()
		if err != nil {
			return err
		}
		name := token.String()
		value, err := dec.ReadValue()
		if err != nil {
			return err
		}
		if err := r.member(name, value); err != nil {
			return err
		}
	}
	if !r.seen["case"] {
		r.bad.Add("/case", input.MissingField, "A record needs a case.", nil)
	}
	return nil
}

func (r *submissionReader) member(name string, value jsontext.Value) error {
	at := "/" + escapePointer(name)
	if r.seen[name] {
		r.bad.Add(at, input.Duplicate, fmt.Sprintf("%s is given twice.", quoted(name)), value)
		return nil
	}
	r.seen[name] = true
	switch name {
	case "case":
		return r.readCase(value)
	case "title":
		r.made.Title, _ = r.text("title", at, value, maxTitle)
	case "author":
		r.made.Author, _ = r.text("author", at, value, maxAuthor)
	case "tags":
		r.tags(at, value)
	default:
		r.bad.Add(at, input.UnknownField, unknownMember(name, submissionNames), value)
	}
	return nil
}

func (r *submissionReader) readCase(value jsontext.Value) error {
	kase, violations, err := input.Decode(value, r.schema)
	if err != nil {
		return err
	}
	for _, v := range inCase(violations) {
		r.bad.Add(v.Pointer, v.Code, v.Sentence, []byte(v.Value))
	}
	r.made.Case, r.made.Sent = kase, bytes.Clone(value)
	return nil
}

// inCase moves the pointers of violations from a case to what contains it.
func inCase(violations []input.Violation) []input.Violation {
	moved := slices.Clone(violations)
	for i := range moved {
		if moved[i].Code != input.TooMany {
			moved[i].Pointer = "/case" + moved[i].Pointer
		}
	}
	return moved
}

// text reads a line that people wrote.
func (r *submissionReader) text(what, at string, value jsontext.Value, most int) (string, bool) {
	if value.Kind() != '"' {
		r.bad.Add(at, input.WrongType, fmt.Sprintf("%s is a string.", what), value)
		return "", false
	}
	raw, err := jsontext.AppendUnquote(nil, value)
	if err != nil {
		r.bad.Add(at, input.WrongType, fmt.Sprintf("%s is a string of Unicode characters.", what), value)
		return "", false
	}
	s := string(raw)
	if fault := faultOf(s, most); fault != "" {
		r.bad.Add(at, input.OutOfRange, what+" "+fault, value)
		return "", false
	}
	return s, true
}

// faultOf says why a line can't be kept; empty: it can.
func faultOf(s string, most int) string {
	switch {
	case strings.TrimSpace(s) == "":
		return "is empty; leave it out instead."
	case utf8.RuneCountInString(s) > most:
		return fmt.Sprintf("has more than %d characters.", most)
	case strings.ContainsFunc(s, unicode.IsControl):
		return "has a control character, such as a line break; it is one line."
	}
	return ""
}

func (r *submissionReader) tags(at string, value jsontext.Value) {
	if value.Kind() != '[' {
		r.bad.Add(at, input.WrongType, "tags is a list of strings.", value)
		return
	}
	dec := jsontext.NewDecoder(bytes.NewBuffer(value), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return
	}
	for i := 0; dec.PeekKind() != ']'; i++ {
		v, err := dec.ReadValue()
		if err != nil {
			return
		}
		if i == maxTags {
			r.bad.Add(at, input.OutOfRange, fmt.Sprintf("tags has more than %d elements.", maxTags), value)
			return
		}
		place := at + "/" + strconv.Itoa(i)
		tag, ok := r.text("a tag", place, v, maxTag)
		switch {
		case !ok:
		case slices.Contains(r.made.Tags, tag):
			r.bad.Add(place, input.Duplicate, fmt.Sprintf("The tag %s is given twice.", quoted(tag)), v)
		default:
			r.made.Tags = append(r.made.Tags, tag)
		}
	}
}

// Keep answers a case and keeps the answer, unless the case has a record
// already; it returns the record that is kept, and whether it is new. Violations
// are those of the case, with pointers below /case.
func Keep(ctx context.Context, records store.Store, sub *Submission, now time.Time) (*store.Record, bool, []input.Violation, error) {
	kept, err := records.Get(ctx, sub.Case.Digest())
	if !errors.Is(err, store.ErrNotFound) {
		return kept, false, nil, err
	}
	answer, violations, err := whatif.Classify(ctx, sub.Case, sub.Ask)
	if err != nil || len(violations) > 0 {
		return nil, false, inCase(violations), err
	}
	kept, isNew, err := records.Put(ctx, recordOf(sub, answer, now))
	answer.Release()
	return kept, isNew, nil, err
}

// appendOptions writes what an answer is made with, for a record.
func appendOptions(dst []byte, o whatif.Options) []byte {
	return fmt.Appendf(dst, `{"samples":%d,"what_if":%t}`, cmp.Or(o.Samples, whatif.DefaultSamples), o.Explore)
}

// optionsOf reads what the answer of a record was made with.
func optionsOf(r *store.Record) whatif.Options {
	var made struct {
		Samples int  `json:"samples"`
		WhatIf  bool `json:"what_if"`
	}
	if err := json.Unmarshal(r.Options, &made); err != nil {
		return whatif.Options{}
	}
	return whatif.Options{Samples: made.Samples, Explore: made.WhatIf}
}

func recordOf(sub *Submission, a *regime.Answer, now time.Time) *store.Record {
	title := sub.Title
	if v := sub.Case.Lookup(kind.Title); title == "" && v != nil {
		title = v.Text
	}
	return &store.Record{
		Head: store.Head{
			ID: sub.Case.Digest(), Created: now, Title: title, Author: sub.Author, Tags: slices.Clone(sub.Tags),
			Kind: a.Kind.Name, Class: a.Recommendation.Class.ID, Engine: engineInForce(), Options: appendOptions(nil, sub.Ask),
		},
		Case:      bytes.Clone(sub.Sent),
		Canonical: sub.Case.Canonical(nil),
		Answer:    render.AppendJSON(nil, a, render.All),
	}
}
