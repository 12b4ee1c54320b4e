package api

import (
	"bytes"
	"net/http"
	"net/http/httptest"
	"slices"
	"strings"
	"testing"
)

// accepting posts the riser with what a caller accepts.
func accepting(s *Server, query string, accept ...string) *httptest.ResponseRecorder {
	r := httptest.NewRequest(http.MethodPost, "/v1/classify"+query, strings.NewReader(riser))
	r.Header.Set("Content-Type", "application/json")
	for _, a := range accept {
		r.Header.Add("Accept", a)
	}
	w := httptest.NewRecorder()
	s.Handler().ServeHTTP(w, r)
	return w
}

func TestNegotiation(t *testing.T) {
	s := New(Config{})
	const problemType = "application/problem+json"
	rows := []struct {
		query  string
		accept []string
		status int
		media  string
	}{
		{"", nil, 200, "application/json"},
		{"", []string{""}, 200, "application/json"},
		{"", []string{"*/*"}, 200, "application/json"},
		{"", []string{"application/*"}, 200, "application/json"},
		{"", []string{"no type, neither / this"}, 200, "application/json"},
		{"", []string{"text/html"}, 200, "text/html"},
		{"", []string{"text/html,application/xhtml+xml,application/xml;q=0.9,*/*;q=0.8"}, 200, "text/html"},
		{"", []string{"text/html;q=0.2, application/json;q=0.9"}, 200, "application/json"},
		{"", []string{"application/json;q=0.1, text/csv;q=0.5", "text/markdown;q=0.7"}, 200, "text/markdown"},
		{"", []string{"text/*"}, 200, "text/plain"},
		{"", []string{"text/*, text/plain;q=0"}, 200, "text/html"},
		{"", []string{"image/*"}, 200, "image/svg+xml"},
		{"", []string{"image/png"}, 200, "image/png"},
		{"", []string{"TEXT/CSV; charset=utf-8"}, 200, "text/csv"},
		{"", []string{"application/json;q=0, */*;q=0.5"}, 200, "text/plain"},
		{"", []string{"video/*"}, 406, problemType},
		{"", []string{"*/*;q=0"}, 406, problemType},
		{"?format=csv", []string{"text/html"}, 200, "text/csv"},
		{"?format=text", nil, 200, "text/plain"},
		{"?format=txt", nil, 200, "text/plain"},
		{"?format=md", nil, 200, "text/markdown"},
		{"?format=html", nil, 200, "text/html"},
		{"?format=svg", nil, 200, "image/svg+xml"},
		{"?format=png", nil, 200, "image/png"},
		{"?format=strip", nil, 200, "image/svg+xml"},
		{"?format=json", []string{"text/html"}, 200, "application/json"},
		{"?format=pdf", nil, 422, problemType},
		{"?format=", nil, 422, problemType},
		{"?format=html&format=csv", nil, 422, problemType},
		{"?format=html&fields=groups", nil, 422, problemType},
		{"?format=json&fields=groups", nil, 200, "application/json"},
		{"?fields=groups", []string{"text/html, */*;q=0.1"}, 200, "application/json"},
		{"?fields=groups", []string{"text/html"}, 406, problemType},
	}
	for _, row := range rows {
		w := accepting(s, row.query, row.accept...)
		media, _, _ := strings.Cut(w.Header().Get("Content-Type"), ";")
		if w.Code != row.status || media != row.media {
			t.Errorf("%s %q: %d, %s; want %d, %s", row.query, row.accept, w.Code, media, row.status, row.media)
		}
		if vary := w.Header().Values("Vary"); !slices.Equal(vary, []string{"Accept"}) {
			t.Errorf("%s %q: Vary %q", row.query, row.accept, vary)
		}
	}
	if len(rows) != 33 {
		t.Errorf("%d rows", len(rows))
	}
}

// JSON is the same however it was asked for, and a drawn form may run nothing.
func TestFormsOfClassify(t *testing.T) {
	s := New(Config{})
	usual := accepting(s, "").Body.Bytes()
	for _, w := range []*httptest.ResponseRecorder{accepting(s, "?format=json", "text/html"), accepting(s, "", "application/json;q=0.5, text/html;q=0.4")} {
		if !bytes.Equal(w.Body.Bytes(), usual) {
			t.Error("JSON differs")
		}
	}
	ran := 0
	for _, name := range FormatNames() {
		w := accepting(s, "?format="+name)
		if name != "json" && w.Header().Get("Content-Security-Policy") != recordPolicy {
			t.Errorf("%s: no policy", name)
		}
		if w.Code != http.StatusOK || w.Body.Len() == 0 {
			t.Errorf("%s: %d", name, w.Code)
		}
		ran++
	}
	if ran != 8 {
		t.Errorf("%d forms", ran)
	}
	if _, err := Draw("pdf", nil); err == nil {
		t.Error("a form pdf")
	}
}

// What a browser sends, taken apart; the usual wish for JSON is found without.
func BenchmarkNegotiate(b *testing.B) {
	accept := []string{"text/html,application/xhtml+xml,application/xml;q=0.9,*/*;q=0.8"}
	for b.Loop() {
		negotiate(accept, answerFormats)
	}
}
