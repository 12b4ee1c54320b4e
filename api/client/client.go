// Package client asks a regimed service from a Go program. It knows the members
// of an answer that programs branch on; everything else is in Raw.
//
//	c := client.New("http://127.0.0.1:8610")
//	a, err := c.Classify(ctx, kase, client.Parameters{Fields: []string{"recommendation"}})
//
// It stands on the standard library alone. Names in answers only ever grow in
// number, so that a client reads what newer services answer.
package client

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"net/http"
	"net/url"
	"strconv"
	"strings"
)

// Client asks one service. It is safe for concurrent use.
type Client struct {
	base  string
	http  *http.Client
	token string
}

// Option sets something about a client.
type Option func(*Client)

// WithHTTP asks through an HTTP client of the caller's own, for its timeouts,
// proxies and certificates.
func WithHTTP(h *http.Client) Option { return func(c *Client) { c.http = h } }

// WithToken sends a bearer token with every request.
func WithToken(token string) Option { return func(c *Client) { c.token = token } }

// New returns a client of the service at a base URL, "http://127.0.0.1:8610".
func New(base string, options ...Option) *Client {
	c := &Client{base: strings.TrimRight(base, "/"), http: http.DefaultClient}
	for _, o := range options {
		o(c)
	}
	return c
}

// Parameters are those of a classification. The zero value asks for what the
// service gives unless told otherwise, which is everything, but for drivers and
// turning points in a batch.
type Parameters struct {
	Fields   []string // members of the answer; empty: all
	Samples  int      // of an uncertain case; 0: the service's default
	NoWhatIf bool     // leave out drivers and turning points
	WhatIf   bool     // with them, in a batch too; not together with NoWhatIf
}

func (p Parameters) query() string {
	q := url.Values{}
	if len(p.Fields) > 0 {
		q.Set("fields", strings.Join(p.Fields, ","))
	}
	if p.Samples > 0 {
		q.Set("samples", strconv.Itoa(p.Samples))
	}
	if p.WhatIf {
		q.Set("what_if", "true")
	}
	if p.NoWhatIf {
		q.Set("what_if", "false")
	}
	if len(q) == 0 {
		return ""
	}
	return "?" + q.Encode()
}

// Answer is the answer to a case. Members that were not asked for are empty.
type Answer struct {
	Digest         string             `json:"digest"`
	Title          string             `json:"title"`
	Kind           string             `json:"kind"`
	Groups         map[string]Group   `json:"groups"`
	Findings       map[string]Finding `json:"findings"`
	Recommendation Recommendation     `json:"recommendation"`
	Setup          map[string]Figure  `json:"setup"`
	TurningPoints  []TurningPoint     `json:"turning_points"`
	Warnings       []Warning          `json:"warnings"`
	Cautions       []string           `json:"cautions"`

	Raw json.RawMessage `json:"-"` // the answer as it came
}

// Group is a dimensionless group; Value is nil where an input is missing.
type Group struct {
	Symbol     string   `json:"symbol"`
	Value      *float64 `json:"value"`
	Definition string   `json:"definition"`
	Because    string   `json:"because"`
}

// Finding is the judgement of one assumption.
type Finding struct {
	Title       string             `json:"title"`
	Measure     string             `json:"measure"`
	Verdict     string             `json:"verdict"`
	Estimate    *float64           `json:"estimate"`
	Limit       *float64           `json:"limit"`
	Utilisation *float64           `json:"utilisation"`
	Margin      *float64           `json:"margin"`
	Because     string             `json:"because"`
	Needs       []string           `json:"needs"`
	Probability map[string]float64 `json:"probability"`
}

// Recommendation is the cheapest model class that holds.
type Recommendation struct {
	Class         string             `json:"class"`
	Title         string             `json:"title"`
	Axes          map[string]string  `json:"axes"`
	Justification []string           `json:"justification"`
	Conditions    []string           `json:"conditions"`
	Rejected      []Rejected         `json:"rejected"`
	Probability   map[string]float64 `json:"probability"`
}

// Rejected is a cheaper class and the assumptions that ruled it out.
type Rejected struct {
	Class    string   `json:"class"`
	Title    string   `json:"title"`
	Because  []string `json:"because"`
	Sentence string   `json:"sentence"`
}

// Figure is a figure for setting the model up.
type Figure struct {
	Title   string   `json:"title"`
	Value   *float64 `json:"value"`
	Unit    string   `json:"unit"`
	Governs bool     `json:"governs"`
}

// TurningPoint is the nearest value of an input, one way, at which the class changes.
type TurningPoint struct {
	Input     string   `json:"input"`
	Direction string   `json:"direction"`
	Value     float64  `json:"value"`
	Unit      string   `json:"unit"`
	Factor    *float64 `json:"factor"`
	Finding   *string  `json:"finding"`
	Class     string   `json:"class"`
}

// Warning is a plausible mistake, or something that the answer rests on.
type Warning struct {
	Pointer  string `json:"pointer"`
	Code     string `json:"code"`
	Sentence string `json:"sentence"`
}

// Problem is what the service answers where it can't answer (RFC 9457).
type Problem struct {
	Type       string      `json:"type"`
	Title      string      `json:"title"`
	Status     int         `json:"status"`
	Detail     string      `json:"detail"`
	Instance   string      `json:"instance"`
	Violations []Violation `json:"violations"`
	Candidates []string    `json:"candidates"` // of an ambiguous id: the ids that begin so
}

// Violation is one thing that is wrong with a case, and where.
type Violation struct {
	Pointer string          `json:"pointer"`
	Code    string          `json:"code"`
	Detail  string          `json:"detail"`
	Value   json.RawMessage `json:"value"` // as received
}

func (p *Problem) Error() string {
	text := fmt.Sprintf("%s (%d): %s", p.Title, p.Status, p.Detail)
	for _, v := range p.Violations {
		text += fmt.Sprintf("\n%s %s: %s", v.Pointer, v.Code, v.Detail)
	}
	return text
}

// Classify answers a case: JSON as bytes, or anything that encoding/json makes
// a case of. An error is a [*Problem] where the service said what is wrong.
func (c *Client) Classify(ctx context.Context, kase any, p Parameters) (*Answer, error) {
	body, err := encoded(kase)
	if err != nil {
		return nil, err
	}
	raw, _, err := c.ask(ctx, http.MethodPost, "/v1/classify"+p.query(), body)
	if err != nil {
		return nil, err
	}
	return answerIn(raw)
}

func answerIn(raw []byte) (*Answer, error) {
	a := &Answer{Raw: raw}
	return a, read(raw, a)
}

// read reads what the service sent.
func read(raw []byte, into any) error {
	if err := json.Unmarshal(raw, into); err != nil {
		return fmt.Errorf("the answer can't be read: %w", err)
	}
	return nil
}

func encoded(kase any) ([]byte, error) {
	switch k := kase.(type) {
	case []byte:
		return k, nil
	case json.RawMessage:
		return k, nil
	case string:
		return []byte(k), nil
	}
	return json.Marshal(kase)
}

// maxAnswer bounds what is read of one answer.
const maxAnswer = 64 << 20

// ask sends a request, with a body of JSON where there is one, and returns the
// body and the status of a success.
func (c *Client) ask(ctx context.Context, method, path string, body []byte) ([]byte, int, error) {
	r, err := http.NewRequestWithContext(ctx, method, c.base+path, bytes.NewReader(body))
	if err != nil {
		return nil, 0, err
	}
	if body != nil {
		r.Header.Set("Content-Type", "application/json")
	}
	answer, err := c.send(r)
	if err != nil {
		return nil, 0, err
	}
	defer answer.Body.Close()
	raw, err := whole(answer.Body)
	return raw, answer.StatusCode, err
}

// send sends a request. What is no success is an error, and its body is closed.
func (c *Client) send(r *http.Request) (*http.Response, error) {
	if c.token != "" {
		r.Header.Set("Authorization", "Bearer "+c.token)
	}
	answer, err := c.http.Do(r)
	if err != nil || answer.StatusCode/100 == 2 {
		return answer, err
	}
	defer answer.Body.Close()
	raw, err := whole(answer.Body)
	if err != nil {
		return nil, err
	}
	return nil, problemIn(answer, raw)
}

// whole reads a body that has a bound.
func whole(body io.Reader) ([]byte, error) {
	raw, err := io.ReadAll(io.LimitReader(body, maxAnswer+1))
	if err == nil && len(raw) > maxAnswer {
		return nil, errors.New("the answer is longer than 64 MiB")
	}
	return raw, err
}

// problemIn reads the problem of an answer; what is none, as from a proxy, keeps
// its status.
func problemIn(answer *http.Response, raw []byte) error {
	p := &Problem{}
	if strings.HasPrefix(answer.Header.Get("Content-Type"), "application/problem+json") && json.Unmarshal(raw, p) == nil {
		return p
	}
	return &Problem{Title: http.StatusText(answer.StatusCode), Status: answer.StatusCode, Detail: "The answer is no problem document."}
}
