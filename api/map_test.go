package api

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image/png"
	"io"
	"math"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
	"time"

	"github.com/go-json-experiment/json"
)

// rodMap is a request for a map of a rod in a wind whose speed is uncertain.
const rodMap = `{"case": {"title": "Rod", "structure": {"kind": "cylinder", "diameter": "0.2 m", "length": "5 m", "mass_per_length": "20 kg/m", "frequency_dry": "3 Hz", "damping_ratio": 0.0005},
	"fluid": "air", "flow": {"speed": "3 m/s +- 0.3 m/s", "direction": "cross"}},
	"x": {"input": "flow.speed", "from": "1 m/s", "to": "10 m/s", "spacing": "log"}, "y": "structure.frequency_dry=0.5..20 Hz:log", "width": 120}`

// A map comes in the form that the query names, else in the one that the client
// likes best, else as SVG.
func TestFormsOfAMap(t *testing.T) {
	rows := []struct{ query, accept, want string }{
		{"", "", "image/svg+xml"},
		{"", "*/*", "image/svg+xml"},
		{"", "image/png", "image/png"},
		{"", "image/svg+xml;q=0.5, image/png;q=0.9", "image/png"},
		{"", "application/json", typeJSON},
		{"", "text/html", "image/svg+xml"},
		{"?format=png", "application/json", "image/png"},
		{"?format=svg", "image/png", "image/svg+xml"},
		{"?format=json", "", typeJSON},
	}
	for _, r := range rows {
		answer := call(t, http.MethodPost, "/v1/map"+r.query, rodMap, "Accept", r.accept)
		body := bodyOf(t, answer)
		if answer.StatusCode != http.StatusOK || answer.Header.Get("Content-Type") != r.want || answer.Header.Get("Vary") != "Accept" {
			t.Errorf("%s, Accept %s: status %d, %s", r.query, r.accept, answer.StatusCode, answer.Header.Get("Content-Type"))
		}
		if err := decodes(r.want, body); err != nil {
			t.Errorf("%s, Accept %s: %v", r.query, r.accept, err)
		}
	}
	if len(rows) != 9 {
		t.Errorf("ran %d rows", len(rows))
	}
}

// decodes reads a body as what it says that it is.
func decodes(mediaType string, body []byte) error {
	switch mediaType {
	case "image/png":
		_, err := png.Decode(bytes.NewReader(body))
		return err
	case "image/svg+xml":
		d := xml.NewDecoder(bytes.NewReader(body))
		for {
			if _, err := d.Token(); errors.Is(err, io.EOF) {
				return nil
			} else if err != nil {
				return err
			}
		}
	}
	return json.Unmarshal(body, new(MapRecord))
}

func TestMapAsPolygons(t *testing.T) {
	var m MapRecord
	if err := json.Unmarshal(bodyOf(t, call(t, http.MethodPost, "/v1/map?format=json", rodMap)), &m); err != nil {
		t.Fatal(err)
	}
	if m.Title != "Rod" || m.Kind != "cylinder" || m.X != (MapAxisRecord{"flow.speed", 1, 10, "m/s", "log"}) || m.Y.Input != "structure.frequency_dry" || m.Y.To != 20 {
		t.Errorf("%q, %q, x %v, y %v", m.Title, m.Kind, m.X, m.Y)
	}
	if m.Point == nil || m.Point.X != 3 || m.Point.Y != 3 || m.Point.Class == nil {
		t.Errorf("point %v", m.Point)
	}
	share, points := 0.0, 0
	for _, r := range m.Regions {
		share += r.Share
		for _, ring := range r.Rings {
			for _, p := range ring {
				points++
				if len(p) != 2 || p[0] < 1 || p[0] > 10 || p[1] < 0.5 || p[1] > 20 {
					t.Errorf("vertex %v", p)
				}
			}
		}
		if r.Class == nil || r.Title == "" {
			t.Errorf("region %v, %q", r.Class, r.Title)
		}
	}
	if math.Abs(share-1) > 1e-9 || points < 8 || len(m.Regions) < 2 || len(m.Lines) == 0 {
		t.Errorf("%d regions with %d points cover %v; %d lines", len(m.Regions), points, share, len(m.Lines))
	}
	if m.Cloud == nil || m.Cloud.Draws != 200 || len(m.Cloud.Points) < 190 || math.Abs(*m.Cloud.Box["x"][0]-(3-1.6448536*0.3)) > 1e-6 {
		t.Errorf("cloud %v", m.Cloud)
	}
}

// What is wrong with a request for a map is located in it, all at once.
func TestMapsRefused(t *testing.T) {
	rod, _, _ := strings.Cut(rodMap, `"x":`)
	axis := func(x string) string { return rod + `"x": ` + x + `, "y": {"input": "structure.diameter"}}` }
	rows := []struct{ body, at string }{
		{`{}`, "/case /x /y"},
		{`{"case": {"structure": {"kind": "cylinder", "diameter": "1 kg"}}, "x": {"input": "flow.speed"}}`, "/case/structure/diameter /y"},
		{axis(`{"input": "flow.speed", "from": "1 kg", "to": "2 s"}`), "/x/from /x/to"},
		{axis(`{"input": "flow.sped"}`), "/x/input"},
		{axis(`{"input": "flow.speed", "points": 3}`), "/x/points"},
		{axis(`{"input": "structure.diameter"}`), "/y"},
		{axis(`"flow.speed=1..2 m/s:cubic"`), "/x"},
		{axis(`{"input": "flow.speed"}, "width": 5`), "/width"},
		{axis(`{"input": "flow.speed"}, "width": "12 cm"`), "/width"},
		{axis(`{"input": "flow.speed"}, "hight": 5`), "/hight"},
		{axis(`{"input": "fluid.temperature", "from": "-200 degC", "to": "-190 degC"}`), "/case/fluid/temperature"},
	}
	for _, r := range rows {
		answer := call(t, http.MethodPost, "/v1/map", r.body)
		p := problemIn(t, answer)
		var at []string
		for _, v := range p.Violations {
			at = append(at, v.Pointer)
		}
		if answer.StatusCode != http.StatusUnprocessableEntity || p.Type != "/problems/invalid-case" || strings.Join(at, " ") != r.at {
			t.Errorf("%s: status %d, %s at %s, want %s", r.body, answer.StatusCode, p.Type, at, r.at)
		}
	}
	if len(rows) != 11 {
		t.Errorf("ran %d rows", len(rows))
	}
	if p := problemIn(t, call(t, http.MethodPost, "/v1/map?format=pdf&widht=3", rodMap)); p.Type != "/problems/invalid-query" || len(p.Violations) != 2 {
		t.Errorf("query: %s, %v", p.Type, p.Violations)
	}
	if answer := call(t, http.MethodPost, "/v1/map", `{"case": `); answer.StatusCode != http.StatusBadRequest {
		t.Errorf("no JSON: status %d", answer.StatusCode)
	}
}

// A map that is not ready in time is a problem that says so.
func TestMapTakesTooLong(t *testing.T) {
	server := New(Config{WriteTimeout: time.Nanosecond}).Handler()
	r := httptest.NewRequest(http.MethodPost, "http://127.0.0.1:8610/v1/map", strings.NewReader(rodMap))
	r.Header.Set("Content-Type", "application/json")
	answer := serve(t, server, r)
	if p := problemIn(t, answer); answer.StatusCode != http.StatusServiceUnavailable || p.Type != "/problems/answer-took-too-long" {
		t.Errorf("status %d, %s", answer.StatusCode, p.Type)
	}
}

// Maps and their problems hold against the contract.
func TestMapsHoldAgainstTheContract(t *testing.T) {
	doc, router := contract(t)
	strict := strictSchemas(t)
	op := doc.Paths.Value("/v1/map").Post
	for _, row := range []struct{ query, body string }{{"", rodMap}, {"?format=json", rodMap}, {"", `{}`}, {"?format=pdf", rodMap}} {
		r := httptest.NewRequest(http.MethodPost, "http://127.0.0.1:8610/v1/map"+row.query, strings.NewReader(row.body))
		r.Header.Set("Content-Type", "application/json")
		strict.check(t, op, checkAgainst(t, router, r))
	}
}
