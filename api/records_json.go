package api

import (
	"time"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/store"
)

// recordHead is a record as it is sent, without its long parts.
type recordHead struct {
	ID      string         `json:"id"`
	Created string         `json:"created"`
	Title   string         `json:"title"`
	Author  string         `json:"author"`
	Tags    []string       `json:"tags"`
	Kind    string         `json:"kind"`
	Class   string         `json:"class"`
	Engine  EngineRecord   `json:"engine"`
	Options jsontext.Value `json:"options"`
}

func headRecord(h *store.Head) recordHead {
	return recordHead{ID: h.ID, Created: writtenTime(h.Created), Title: h.Title, Author: h.Author, Tags: h.Tags,
		Kind: h.Kind, Class: h.Class, Engine: EngineRecord(h.Engine), Options: jsontext.Value(h.Options)}
}

// writtenTime is a time as it is sent.
func writtenTime(t time.Time) string { return t.UTC().Format("2006-01-02T15:04:05.000000Z") }

// appendRecord writes a record. The case and the answer go in as they were
// written, byte for byte; today's answer may follow.
func appendRecord(dst []byte, r *store.Record, now *today) ([]byte, error) {
	head, err := json.Marshal(headRecord(&r.Head), jsontext.AllowInvalidUTF8(true))
	if err != nil {
		return nil, err
	}
	dst = append(dst, head[:len(head)-1]...)
	dst = append(append(dst, `,"case":`...), r.Case...)
	dst = append(append(dst, `,"canonical":`...), r.Canonical...)
	dst = append(append(dst, `,"answer":`...), r.Answer...)
	if now != nil {
		change, err := json.Marshal(now.change, json.Deterministic(true))
		if err != nil {
			return nil, err
		}
		engine, err := json.Marshal(EngineRecord(now.engine))
		if err != nil {
			return nil, err
		}
		dst = append(append(dst, `,"current":{"engine":`...), engine...)
		dst = append(append(append(dst, `,"answer":`...), now.body...), '}')
		dst = append(append(dst, `,"changed":`...), change...)
	}
	return append(dst, '}'), nil
}
