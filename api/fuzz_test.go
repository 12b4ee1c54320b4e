package api

import (
	"net/http"
	"os"
	"testing"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
)

// FuzzClassify sends any body: the answer is JSON, and never a fault of the
// server.
func FuzzClassify(f *testing.F) {
	f.Add([]byte(riser))
	for _, row := range badCases {
		f.Add([]byte(row.body))
	}
	for _, row := range badBodies {
		f.Add([]byte(row.body))
	}
	for _, file := range shippedCases(f) {
		body, err := os.ReadFile(file)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(body)
	}
	f.Fuzz(func(t *testing.T, body []byte) {
		r := call(t, http.MethodPost, "/v1/classify", string(body))
		answer := jsontext.Value(bodyOf(t, r))
		if !answer.IsValid() {
			t.Fatalf("status %d with a body that is no JSON: %s", r.StatusCode, answer)
		}
		switch r.StatusCode {
		case http.StatusOK:
		case http.StatusBadRequest, http.StatusUnprocessableEntity, http.StatusRequestEntityTooLarge:
			var p Problem
			if err := json.Unmarshal(answer, &p); err != nil || p.Status != r.StatusCode {
				t.Fatalf("status %d: %v: %s", r.StatusCode, err, answer)
			}
			if p.Type == invalidCase.URI() && len(p.Violations) == 0 {
				t.Fatalf("an invalid case without violations: %s", answer)
			}
		default:
			t.Fatalf("status %d: %s", r.StatusCode, answer)
		}
	})
}

// FuzzCanon asks for any solution with any query.
func FuzzCanon(f *testing.F) {
	f.Add("OscillatingCylinder", "R=36")
	f.Add("oscillatingcylinder", "R=1e-300&x=%00")
	f.Add("Strouhal", "re=nan")
	f.Add("..", "%zz")
	f.Fuzz(func(t *testing.T, name, query string) {
		r, err := http.NewRequest(http.MethodGet, "/v1/canon/x", nil)
		if err != nil {
			t.Fatal(err)
		}
		r.URL.Path, r.URL.RawQuery = "/v1/canon/"+name, query
		answer := serve(t, handler, r)
		if body := jsontext.Value(bodyOf(t, answer)); answer.StatusCode >= 500 || !body.IsValid() {
			t.Fatalf("status %d: %s", answer.StatusCode, body)
		}
	})
}
