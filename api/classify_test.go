package api

import (
	"bytes"
	"context"
	"log/slog"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
	"time"

	"github.com/go-json-experiment/json"

	"regimed/regime/whatif"
)

// uncertainRiser has a speed that is not known well.
var uncertainRiser = strings.Replace(riser, `"1.1 m/s"`, `"1.1 m/s +- 20 %"`, 1)

// members reads an answer.
func members(t *testing.T, r *http.Response) map[string]any {
	t.Helper()
	body := bodyOf(t, r)
	var doc map[string]any
	if err := json.Unmarshal(body, &doc); err != nil || r.StatusCode != http.StatusOK {
		t.Fatalf("status %d, %v: %.300s", r.StatusCode, err, body)
	}
	return doc
}

func TestUncertainCase(t *testing.T) {
	whole := members(t, call(t, http.MethodPost, "/v1/classify", uncertainRiser))
	usual := bodyOf(t, call(t, http.MethodPost, "/v1/classify?fields=recommendation,uncertainty", uncertainRiser))
	explicit := bodyOf(t, call(t, http.MethodPost, "/v1/classify?fields=recommendation,uncertainty&samples=1024", uncertainRiser))
	if !bytes.Equal(usual, explicit) || whole["uncertainty"] == nil || whole["turning_points"] == nil {
		t.Errorf("%.300s\n%.300s", usual, explicit)
	}
	few := members(t, call(t, http.MethodPost, "/v1/classify?samples=64&what_if=false", uncertainRiser))
	u := few["uncertainty"].(map[string]any)
	if n := u["samples"].(float64) + u["outside"].(float64); n != 64 || few["turning_points"] != nil {
		t.Errorf("%v", u)
	}
	if doc := members(t, call(t, http.MethodPost, "/v1/classify", riser)); doc["uncertainty"] != nil || doc["recommendation"].(map[string]any)["probability"] != nil {
		t.Error("a certain case spreads")
	}
}

// What would change an answer is said unless it is not wanted.
func TestWhatIf(t *testing.T) {
	rows := []struct {
		query   string
		drivers bool
		turns   bool
	}{{"", true, true}, {"?what_if=true", true, true}, {"?what_if=false", false, false}, {"?fields=findings", true, false}, {"?fields=turning_points", false, true},
		{"?fields=findings&what_if=false", false, false}, {"?fields=recommendation", false, false}}
	for _, row := range rows {
		body := string(bodyOf(t, call(t, http.MethodPost, "/v1/classify"+row.query, riser)))
		if strings.Contains(body, `"drivers":[`) != row.drivers || strings.Contains(body, `"turning_points":[`) != row.turns {
			t.Errorf("%s: %.200s", row.query, body)
		}
	}
	if len(rows) != 7 {
		t.Errorf("%d rows", len(rows))
	}
}

// The bounds that the query is checked against are those of the sampling.
func TestBoundsOfSamples(t *testing.T) {
	for samples, good := range map[int]bool{whatif.MinSamples: true, whatif.MinSamples - 1: false, whatif.MaxSamples: true, whatif.MaxSamples + 1: false} {
		q := classifyQuery{Samples: &samples}
		if bad := check(&q, nil); (len(bad) == 0) != good {
			t.Errorf("%d: %+v", samples, bad)
		}
	}
}

// An answer that takes longer than the server has time for is a problem that says
// what would take less.
func TestAnswerThatTakesTooLong(t *testing.T) {
	hasty := New(Config{WriteTimeout: time.Nanosecond}).Handler()
	ask := func(path, body string) *http.Response {
		r := httptest.NewRequest(http.MethodPost, path, strings.NewReader(body))
		r.Header.Set("Content-Type", "application/json")
		return serve(t, hasty, r)
	}
	for _, body := range []string{riser, uncertainRiser} {
		p := problemIn(t, ask("/v1/classify", body))
		if p.Status != http.StatusServiceUnavailable || p.Type != tooLong.URI() || !strings.Contains(p.Detail, "what_if=false") {
			t.Errorf("%+v", p)
		}
	}
	if r := ask("/v1/classify?what_if=false", riser); r.StatusCode != http.StatusOK {
		t.Errorf("status %d of an answer that takes no time", r.StatusCode)
	}
}

// A client who goes away is no fault of the server.
func TestClientWhoGoesAway(t *testing.T) {
	var log bytes.Buffer
	h := New(Config{Logger: slog.New(slog.NewTextHandler(&log, nil))}).Handler()
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	r := httptest.NewRequestWithContext(ctx, http.MethodPost, "/v1/classify", strings.NewReader(uncertainRiser))
	r.Header.Set("Content-Type", "application/json")
	if p := problemIn(t, serve(t, h, r)); p.Status != http.StatusBadRequest {
		t.Errorf("%+v", p)
	}
	if strings.Contains(log.String(), "ERROR") || !strings.Contains(log.String(), "status=400") {
		t.Errorf("%s", log.String())
	}
}
