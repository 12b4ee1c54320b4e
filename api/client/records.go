package client

import (
	"context"
	"encoding/json"
	"iter"
	"net/http"
	"net/url"
	"strconv"
	"time"
)

// RecordRequest is what a record is made of. Title, tags and author are for
// people; the title of the case stands in for a missing one.
type RecordRequest struct {
	Case   any // as for [Client.Classify]
	Title  string
	Tags   []string
	Author string

	Samples  int  // of an uncertain case; 0: the service's default
	NoWhatIf bool // keep no drivers and turning points
}

// RecordHead is a record without its long parts.
type RecordHead struct {
	ID      string    `json:"id"` // the digest of the case
	Created time.Time `json:"created"`
	Title   string    `json:"title"`
	Author  string    `json:"author"`
	Tags    []string  `json:"tags"`
	Kind    string    `json:"kind"`
	Class   string    `json:"class"`
	Engine  Engine    `json:"engine"`
	Options Options   `json:"options"`
}

// Options are what an answer was made with.
type Options struct {
	Samples int  `json:"samples"`
	WhatIf  bool `json:"what_if"`
}

// Engine says who answered.
type Engine struct {
	Version   string `json:"version"`
	Catalogue string `json:"catalogue"`
}

// Record is an answer that is kept, and what it was made from.
type Record struct {
	RecordHead
	Case   json.RawMessage // as it was sent
	Answer *Answer
}

// UnmarshalJSON reads a record as the service sends it.
func (r *Record) UnmarshalJSON(raw []byte) error {
	var parts struct {
		Case   json.RawMessage `json:"case"`
		Answer json.RawMessage `json:"answer"`
	}
	if err := json.Unmarshal(raw, &r.RecordHead); err != nil {
		return err
	}
	if err := json.Unmarshal(raw, &parts); err != nil {
		return err
	}
	var err error
	r.Case = parts.Case
	r.Answer, err = answerIn(parts.Answer)
	return err
}

const recordsPath = "/v1/records"

// CreateRecord answers a case and has the answer kept. A case has one record:
// where it has one already, that one comes back as it is, and isNew is false.
func (c *Client) CreateRecord(ctx context.Context, wanted RecordRequest) (record *Record, isNew bool, err error) {
	kase, err := encoded(wanted.Case)
	if err != nil {
		return nil, false, err
	}
	body, err := json.Marshal(struct {
		Case   json.RawMessage `json:"case"`
		Title  string          `json:"title,omitempty"`
		Tags   []string        `json:"tags,omitempty"`
		Author string          `json:"author,omitempty"`
	}{kase, wanted.Title, wanted.Tags, wanted.Author})
	if err != nil {
		return nil, false, err
	}
	p := Parameters{Samples: wanted.Samples, NoWhatIf: wanted.NoWhatIf}
	raw, status, err := c.ask(ctx, http.MethodPost, recordsPath+p.query(), body)
	if err != nil {
		return nil, false, err
	}
	record = &Record{}
	return record, status == http.StatusCreated, read(raw, record)
}

// Record returns a record by its id, or by the first twelve digits of it or more.
func (c *Client) Record(ctx context.Context, id string) (*Record, error) {
	raw, _, err := c.ask(ctx, http.MethodGet, recordsPath+"/"+url.PathEscape(id), nil)
	if err != nil {
		return nil, err
	}
	r := &Record{}
	return r, read(raw, r)
}

// RecordAs returns the answer of a record in a form: "json", "txt" and the
// others that the service draws.
func (c *Client) RecordAs(ctx context.Context, id, form string) ([]byte, error) {
	raw, _, err := c.ask(ctx, http.MethodGet, recordsPath+"/"+url.PathEscape(id+"."+form), nil)
	return raw, err
}

// DeleteRecord removes a record by its whole id.
func (c *Client) DeleteRecord(ctx context.Context, id string) error {
	_, _, err := c.ask(ctx, http.MethodDelete, recordsPath+"/"+url.PathEscape(id), nil)
	return err
}

// RecordQuery says which records are wanted. What is empty does not restrict it.
type RecordQuery struct {
	Kind, Class, Tag string
	Text             string    // stands in the title or in the author
	From, To         time.Time // From ≤ created < To
	PageSize         int       // records a request; 0: the service's default
}

func (q RecordQuery) values() url.Values {
	v := url.Values{}
	for name, text := range map[string]string{"kind": q.Kind, "class": q.Class, "tag": q.Tag, "text": q.Text} {
		if text != "" {
			v.Set(name, text)
		}
	}
	for name, at := range map[string]time.Time{"from": q.From, "to": q.To} {
		if !at.IsZero() {
			v.Set(name, at.UTC().Format(time.RFC3339Nano))
		}
	}
	if q.PageSize > 0 {
		v.Set("limit", strconv.Itoa(q.PageSize))
	}
	return v
}

// Records goes through the records, the newest first, and asks for a page when
// it is needed. After an error it ends.
func (c *Client) Records(ctx context.Context, q RecordQuery) iter.Seq2[RecordHead, error] {
	return func(yield func(RecordHead, error) bool) {
		values := q.values()
		for {
			var page struct {
				Records []RecordHead `json:"records"`
				Next    string       `json:"next"`
			}
			raw, _, err := c.ask(ctx, http.MethodGet, recordsPath+"?"+values.Encode(), nil)
			if err == nil {
				err = read(raw, &page)
			}
			if err != nil {
				yield(RecordHead{}, err)
				return
			}
			for _, head := range page.Records {
				if !yield(head, nil) {
					return
				}
			}
			if page.Next == "" {
				return
			}
			values.Set("cursor", page.Next)
		}
	}
}
