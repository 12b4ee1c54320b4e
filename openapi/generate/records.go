package main

import (
	"context"
	"errors"
	"net/http"
	"net/url"
	"os"
	"time"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api"
	"regimed/api/store"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// keeping is a server that keeps records in a folder of its own, until it is
// told to clean up.
func keeping() (handler http.Handler, cleanUp func() error, err error) {
	dir, err := os.MkdirTemp("", "regimed-examples")
	if err != nil {
		return nil, nil, err
	}
	records, err := store.OpenSQLite(context.Background(), dir)
	if err != nil {
		return nil, nil, errors.Join(err, os.RemoveAll(dir))
	}
	at := time.Date(2026, 7, 30, 9, 0, 0, 0, time.UTC)
	clock := func() time.Time { at = at.Add(time.Minute); return at }
	handler = api.New(api.Config{Records: records, Clock: clock, FrameAncestors: []string{"https://wiki.example"}}).Handler()
	return handler, func() error { return errors.Join(records.Close(), os.RemoveAll(dir)) }, nil
}

// failing is a store in which everything fails alike.
type failing struct {
	store.Store
	err error
}

func (f failing) Get(context.Context, string) (*store.Record, error) { return nil, f.err }

// broken is a server whose records fail for a reason.
func broken(reason store.Reason) http.Handler {
	return api.New(api.Config{Records: failing{err: &store.Error{Op: "get", Reason: reason, Cause: errors.New("an example")}}}).Handler()
}

// outdated is a server with a record whose case is not accepted any more.
func outdated() http.Handler { return api.New(api.Config{Records: oldCase{}}).Handler() }

type oldCase struct{ store.Store }

func (oldCase) Get(context.Context, string) (*store.Record, error) {
	return &store.Record{Case: []byte(`{"structure": {"kind": "cylinder", "diameter": "0.3 m", "support": "hinged"}}`)}, nil
}

// recordBody asks for a record of a case.
func recordBody(kase []byte, rest string) []byte {
	return append(append([]byte(`{"case": `), kase...), (rest + "}")...)
}

const (
	riserTexts = `, "title": "Riser, rev. B", "tags": ["riser", "current"], "author": "M. Vane"`
	someID     = "/v1/records/0000000000000000000000000000000000000000000000000000000000000000"
)

// recordRequests are the examples of records. The first one makes a record that
// the list shows as older.
func recordRequests(bodies map[string][]byte) []example {
	riser := recordBody(bodies["CaseMarineRiser"], riserTexts)
	return []example{
		{name: "RecordRequest", summary: "A riser, with title, tags and author", value: riser},
		{request: post("/v1/records", recordBody(bodies["CaseWetModes"], "")), status: 201},
		{name: "Record", summary: "The answer is shortened here", request: post("/v1/records", riser), status: 201, show: shortAnswer},
		{name: "RecordList", summary: "The newest one; there is a next page", request: get("/v1/records?limit=1"), status: 200},
		{name: "RecordText", summary: "The first line of a page of text", value: []byte(`"Recommended: Two-way, implicit (two-way-implicit)\n"`)},
		{name: "ProblemInvalidRecord", summary: "Mistakes in the case and beside it",
			request: post("/v1/records", []byte(`{"case": {"structure": {"kind": "cylinder", "diameter": "0.3 kg"}}, "titel": "Riser", "tags": ["riser", ""]}`)), status: 422},
		{name: "OEmbed", summary: "A server that other pages may frame", request: get(oembedOf(bodies["CaseMarineRiser"])), status: 200},
		{name: "ProblemEmbedFormat", summary: "A format that is neither json nor xml", request: get("/oembed?format=yaml"), status: 501},
		{name: "ProblemUnknownRecord", summary: "An id that no record has", request: get(someID), status: 404},
		{name: "ProblemRecordsOff", summary: "A server without records", request: get(someID), status: 404, of: api.New(api.Config{}).Handler()},
		{name: "ProblemRecordsUnavailable", summary: "A store that is closed", request: get(someID), status: 503, of: broken(store.Unavailable)},
		{name: "ProblemRecordsFull", summary: "A full disk", request: post("/v1/records", riser), status: 507, of: broken(store.Full)},
		{name: "ProblemOutdatedCase", summary: "A name that the engine no longer knows", request: get(someID + ".txt"), status: 409, of: outdated()},
	}
}

// oembedOf asks how the record of a case is shown.
func oembedOf(text []byte) string {
	const base = "http://127.0.0.1:8610"
	kase, _, err := input.Decode(text, kind.Schema())
	if err != nil || kase == nil {
		return base // a case that is wrong: the request before it fails already
	}
	return base + "/oembed?maxwidth=600&url=" + url.QueryEscape(base+"/v1/records/"+kase.Digest())
}

// shortAnswer keeps the head of the answer in a record.
func shortAnswer(v jsontext.Value) (jsontext.Value, error) {
	members, err := parse(v)
	if err != nil {
		return nil, err
	}
	for i := range members {
		if members[i].Name != "answer" {
			continue
		}
		if members[i].Value, err = head(members[i].Value.(jsontext.Value), "digest", "engine", "title", "kind"); err != nil {
			return nil, err
		}
	}
	return json.Marshal(members)
}
