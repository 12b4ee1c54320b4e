package api

import (
	"bufio"
	"bytes"
	"context"
	"fmt"
	"log/slog"
	"net"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"
	"time"

	"github.com/go-json-experiment/json"
	"github.com/labstack/echo/v4"
)

func TestRequestIDs(t *testing.T) {
	kept := []string{"a", "batch-7.12", "0123:abc_DEF", strings.Repeat("x", 128), "550e8400-e29b-41d4-a716-446655440000"}
	for _, id := range kept {
		if got := call(t, http.MethodGet, "/healthz", "", "X-Request-ID", id).Header.Get("X-Request-ID"); got != id {
			t.Errorf("%q came back as %q", id, got)
		}
	}
	replaced := []string{"", "a b", "a\tb", "ä", "a/b", `a"b`, "<x>", strings.Repeat("x", 129)}
	seen := map[string]bool{}
	for _, id := range replaced {
		got := call(t, http.MethodGet, "/healthz", "", "X-Request-ID", id).Header.Get("X-Request-ID")
		if len(got) != 32 || got == id || seen[got] {
			t.Errorf("%q came back as %q", id, got)
		}
		seen[got] = true
	}
	if len(kept)+len(replaced) != 13 {
		t.Errorf("%d rows", len(kept)+len(replaced))
	}
}

// The log has a line a request, with what helps and without what is private.
func TestAccessLog(t *testing.T) {
	var out bytes.Buffer
	s := New(Config{Logger: slog.New(slog.NewJSONHandler(&out, nil))})
	r := httptest.NewRequest(http.MethodPost, "/v1/classify?fields=kind", strings.NewReader(`{"structure": {"kind": "secret"}}`))
	r.Header.Set("Content-Type", "application/json")
	r.Header.Set("X-Request-ID", "named")
	answer := serve(t, s.Handler(), r)
	var line struct {
		Level    string
		Msg      string
		Method   string
		Path     string
		Status   int
		Bytes    int64
		Duration float64
		ID       string `json:"request_id"`
	}
	if err := json.Unmarshal(out.Bytes(), &line, json.MatchCaseInsensitiveNames(true)); err != nil {
		t.Fatalf("%v: %s", err, out.Bytes())
	}
	if line.Method != "POST" || line.Path != "/v1/classify" || line.Status != 422 || line.Bytes != answer.ContentLength || line.ID != "named" || line.Level != "INFO" {
		t.Errorf("line %+v", line)
	}
	for _, private := range []string{"secret", "192.0.2.1", "fields"} {
		if strings.Contains(out.String(), private) {
			t.Errorf("the log tells %q: %s", private, out.String())
		}
	}
}

// A panic is a problem for the caller, and a trace in the log.
func TestPanicIsAProblem(t *testing.T) {
	var out bytes.Buffer
	s := New(Config{Logger: slog.New(slog.NewJSONHandler(&out, nil))})
	s.echo.GET("/panic", func(echo.Context) error { panic("the cause") })
	s.echo.GET("/fault", func(echo.Context) error { return fmt.Errorf("dial tcp 127.0.0.1:5432: refused") })
	for _, path := range []string{"/panic", "/fault"} {
		out.Reset()
		p := problemIn(t, serve(t, s.Handler(), httptest.NewRequest(http.MethodGet, path, nil)))
		if p.Status != http.StatusInternalServerError || p.Type != "/problems/internal" {
			t.Errorf("%s: %+v", path, p)
		}
		if n := strings.Count(out.String(), `"level":"ERROR"`); n != 2 {
			t.Errorf("%s: %d lines of errors: %s", path, n, out.String())
		}
	}
	if strings.Contains(out.String(), "trace") || !strings.Contains(out.String(), "5432") {
		t.Errorf("the log of a fault: %s", out.String())
	}
}

func TestPanicAfterTheAnswerBegan(t *testing.T) {
	s := New(Config{})
	s.echo.GET("/late", func(c echo.Context) error {
		if err := c.String(http.StatusOK, "begun"); err != nil {
			return err
		}
		panic("late")
	})
	r := serve(t, s.Handler(), httptest.NewRequest(http.MethodGet, "/late", nil))
	if body := bodyOf(t, r); r.StatusCode != http.StatusOK || string(body) != "begun" {
		t.Errorf("status %d: %s", r.StatusCode, body)
	}
}

func TestTimeoutsAreSet(t *testing.T) {
	h := New(Config{}).HTTPServer()
	if h.ReadHeaderTimeout != 5*time.Second || h.ReadTimeout != 15*time.Second || h.WriteTimeout != 30*time.Second || h.IdleTimeout != 2*time.Minute || h.MaxHeaderBytes != maxHeaderBytes {
		t.Errorf("%+v", h)
	}
	h = New(Config{ReadTimeout: time.Minute, WriteTimeout: time.Hour}).HTTPServer()
	if h.ReadTimeout != time.Minute || h.WriteTimeout != time.Hour {
		t.Errorf("%v, %v", h.ReadTimeout, h.WriteTimeout)
	}
}

func listen(t testing.TB) net.Listener {
	t.Helper()
	l, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	return l
}

// run serves on a listener of its own and returns its address, a function that
// asks it to stop, and what Run returned.
func run(t testing.TB, config Config) (address string, stop func(), stopped <-chan error) {
	t.Helper()
	l := listen(t)
	ctx, cancel := context.WithCancel(context.Background())
	t.Cleanup(cancel)
	done := make(chan error, 1)
	go func() { done <- New(config).Run(ctx, l) }()
	return l.Addr().String(), cancel, done
}

// A body that does not arrive is given up, and told so without an address.
func TestSlowBody(t *testing.T) {
	address, _, _ := run(t, Config{ReadTimeout: 400 * time.Millisecond})
	conn, err := net.Dial("tcp", address)
	if err != nil {
		t.Fatal(err)
	}
	defer conn.Close()
	fmt.Fprintf(conn, "POST /v1/classify HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\nContent-Length: 1000\r\n\r\n{\"structure\"")
	r, err := http.ReadResponse(bufio.NewReader(conn), nil)
	if err != nil {
		t.Fatal(err)
	}
	if p := problemIn(t, r); p.Status != http.StatusRequestTimeout || !r.Close {
		t.Errorf("status %d, close %v", p.Status, r.Close)
	}
}

// A body that breaks off is a bad request.
func TestBrokenBody(t *testing.T) {
	address, _, _ := run(t, Config{})
	conn, err := net.Dial("tcp", address)
	if err != nil {
		t.Fatal(err)
	}
	defer conn.Close()
	fmt.Fprintf(conn, "POST /v1/classify HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\nContent-Length: 1000\r\n\r\n{\"structure\"")
	if err := conn.(*net.TCPConn).CloseWrite(); err != nil {
		t.Fatal(err)
	}
	r, err := http.ReadResponse(bufio.NewReader(conn), nil)
	if err != nil {
		t.Fatal(err)
	}
	if p := problemIn(t, r); p.Status != http.StatusBadRequest || p.Type != "/problems/bad-request" {
		t.Errorf("%+v", p)
	}
}

// A large chunked body is cut off over a real connection too.
func TestLargeBodyOverTheWire(t *testing.T) {
	address, _, _ := run(t, Config{BodyLimit: 1000})
	conn, err := net.Dial("tcp", address)
	if err != nil {
		t.Fatal(err)
	}
	defer conn.Close()
	fmt.Fprintf(conn, "POST /v1/classify HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\nTransfer-Encoding: chunked\r\n\r\n800\r\n%s\r\n", strings.Repeat(" ", 0x800))
	r, err := http.ReadResponse(bufio.NewReader(conn), nil)
	if err != nil {
		t.Fatal(err)
	}
	if p := problemIn(t, r); p.Status != http.StatusRequestEntityTooLarge || !r.Close {
		t.Errorf("status %d, close %v", p.Status, r.Close)
	}
}

// A server that is about to stop says so, and closes connections after their
// answer, but goes on answering.
func TestDrain(t *testing.T) {
	s := New(Config{})
	ask := func(path string) *http.Response {
		return serve(t, s.Handler(), httptest.NewRequest(http.MethodGet, path, nil))
	}
	if r := ask("/readyz"); r.StatusCode != http.StatusOK || r.Header.Get("Connection") != "" {
		t.Errorf("before: status %d, Connection %q", r.StatusCode, r.Header.Get("Connection"))
	}
	s.Drain()
	if r := ask("/readyz"); r.StatusCode != http.StatusServiceUnavailable || problemIn(t, r).Type != "/problems/unavailable" {
		t.Errorf("draining: status %d", r.StatusCode)
	}
	if r := ask("/healthz"); r.StatusCode != http.StatusOK || r.Header.Get("Connection") != "close" {
		t.Errorf("draining: status %d, Connection %q", r.StatusCode, r.Header.Get("Connection"))
	}
}

// Run ends when its context does, without an error, and no longer listens then.
func TestRunStops(t *testing.T) {
	for _, delay := range []time.Duration{0, time.Millisecond} {
		address, stop, stopped := run(t, Config{DrainDelay: delay})
		r, err := http.Get("http://" + address + "/healthz")
		if err != nil {
			t.Fatal(err)
		}
		bodyOf(t, r)
		stop()
		if err := <-stopped; err != nil {
			t.Error(err)
		}
		if conn, err := net.Dial("tcp", address); err == nil {
			conn.Close()
			t.Error("it still listens")
		}
	}
}

// A listener that fails ends the server with its error.
func TestRunFails(t *testing.T) {
	l := listen(t)
	l.Close()
	if err := New(Config{}).Run(context.Background(), l); err == nil {
		t.Error("no error")
	}
}
