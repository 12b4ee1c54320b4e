package client

import (
	"bufio"
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"iter"
	"net/http"
)

// Line is what a batch says of one of its cases.
type Line struct {
	Number  int64           // of the line of the input, from 1
	ID      json.RawMessage // that the line gave itself, if it did
	Answer  *Answer         // nil: there is a problem
	Problem *Problem
}

// ErrUnfinished says that a batch ended before all its lines were dealt with.
var ErrUnfinished = errors.New("the batch ended before all lines were answered")

// maxLine bounds a line of a batch.
const maxLine = 16 << 20

// Batch answers many cases: one a line, in JSON. The answers come while the
// lines are still being read, in their order. A line that is no good has a
// problem and the batch goes on; after an error it ends. The batch ends also
// where the loop over it does.
func (c *Client) Batch(ctx context.Context, lines io.Reader, p Parameters) iter.Seq2[Line, error] {
	return func(yield func(Line, error) bool) {
		ctx, cancel := context.WithCancel(ctx)
		defer cancel()
		r, err := http.NewRequestWithContext(ctx, http.MethodPost, c.base+"/v1/batch"+p.query(), lines)
		if err != nil {
			yield(Line{}, err)
			return
		}
		r.Header.Set("Content-Type", "application/x-ndjson")
		answer, err := c.send(r)
		if err != nil {
			yield(Line{}, err)
			return
		}
		defer answer.Body.Close()
		if err := eachLine(answer.Body, yield); err != nil {
			yield(Line{}, err)
		}
	}
}

// eachLine yields the lines of a batch. It returns nil after the last one, and
// where the caller has enough.
func eachLine(body io.Reader, yield func(Line, error) bool) error {
	scanner := bufio.NewScanner(body)
	scanner.Buffer(make([]byte, 0, 64<<10), maxLine)
	for scanner.Scan() {
		text := bytes.Clone(scanner.Bytes())
		if len(bytes.TrimSpace(text)) == 0 {
			continue
		}
		line, end, err := lineIn(text)
		if err != nil || end {
			return err
		}
		if !yield(line, nil) {
			return nil
		}
	}
	if err := scanner.Err(); err != nil {
		return err
	}
	return ErrUnfinished
}

// lineIn reads a line, or the end.
func lineIn(text []byte) (line Line, end bool, err error) {
	var parts struct {
		Line    int64           `json:"line"`
		ID      json.RawMessage `json:"id"`
		Answer  json.RawMessage `json:"answer"`
		Problem *Problem        `json:"problem"`
		End     *struct {
			State string `json:"state"`
			Lines int64  `json:"lines"`
		} `json:"end"`
	}
	if err := read(text, &parts); err != nil {
		return Line{}, false, err
	}
	switch {
	case parts.End != nil && parts.End.State != "complete":
		return Line{}, true, fmt.Errorf("%w: %s after %d lines", ErrUnfinished, parts.End.State, parts.End.Lines)
	case parts.End != nil:
		return Line{}, true, nil
	case parts.Answer == nil && parts.Problem == nil:
		return Line{}, false, fmt.Errorf("line %d has neither an answer nor a problem", parts.Line)
	}
	line = Line{Number: parts.Line, ID: parts.ID, Problem: parts.Problem}
	if parts.Answer != nil {
		line.Answer, err = answerIn(parts.Answer)
	}
	return line, false, err
}

// Lines writes cases as the lines of a batch: JSON as bytes or text, or anything
// that encoding/json makes a case of.
func Lines(cases ...any) (io.Reader, error) {
	var b bytes.Buffer
	for i, kase := range cases {
		text, err := encoded(kase)
		if err == nil {
			err = json.Compact(&b, text)
		}
		if err != nil {
			return nil, fmt.Errorf("case %d: %w", i+1, err)
		}
		b.WriteByte('\n')
	}
	return &b, nil
}
