package api

import (
	"bytes"
	"io"
	"log/slog"
	"net"
	"net/http"
	"strconv"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/labstack/echo/v4"

	"regimed/regime/input"
	"regimed/regime/kind"
)

// served serves a handler on the loopback interface and returns the address. Both
// sides of a comparison are asked with what_if=false: what is measured is the
// service around one classification. What the exploration costs on top is
// measured by itself, in BenchmarkExploration.
func served(b *testing.B, h http.Handler) string {
	b.Helper()
	l, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		b.Fatal(err)
	}
	server := &http.Server{Handler: h}
	go server.Serve(l)
	b.Cleanup(func() { server.Close() })
	return "http://" + l.Addr().String() + "/v1/classify?what_if=false"
}

// explored is the same address without the parameter.
func explored(url string) string { return strings.TrimSuffix(url, "?what_if=false") }

// classifying is the whole server, with a log that is written and thrown away.
func classifying() http.Handler {
	return New(Config{Logger: slog.New(slog.NewJSONHandler(io.Discard, nil))}).Handler()
}

// bare is what a service costs that computes nothing: the same framework, the
// same decoding of the same request, a constant answer of the same length.
func bare(length int) http.Handler {
	answer := bytes.Repeat([]byte{' '}, length)
	e := echo.New()
	e.POST("/v1/classify", func(c echo.Context) error {
		body, err := io.ReadAll(c.Request().Body)
		if err != nil {
			return err
		}
		if _, violations, err := input.Decode(body, kind.Schema()); err != nil || len(violations) > 0 {
			return echo.ErrBadRequest
		}
		c.Response().Header().Set("Content-Length", strconv.Itoa(length))
		return c.Blob(http.StatusOK, typeJSON, answer)
	})
	return e
}

var client = &http.Client{Transport: &http.Transport{MaxIdleConnsPerHost: 64}}

// ask sends the case once and returns the length of the answer.
func ask(b *testing.B, url string) int { return askFor(b, url, riser) }

func askFor(b *testing.B, url, body string) int {
	r, err := client.Post(url, "application/json", strings.NewReader(body))
	if err != nil {
		b.Error(err)
		return 0
	}
	defer r.Body.Close()
	n, err := io.Copy(io.Discard, r.Body)
	if err != nil || r.StatusCode != http.StatusOK {
		b.Errorf("status %d, %v", r.StatusCode, err)
	}
	return int(n)
}

func benchmark(b *testing.B, h http.Handler) {
	url := served(b, h)
	b.SetBytes(int64(ask(b, url)))
	b.ReportAllocs()
	b.ResetTimer()
	b.RunParallel(func(pb *testing.PB) {
		for pb.Next() {
			ask(b, url)
		}
	})
}

func BenchmarkClassifyHTTP(b *testing.B) { benchmark(b, classifying()) }

func BenchmarkBareHTTP(b *testing.B) {
	benchmark(b, bare(ask(b, served(b, classifying()))))
}

// BenchmarkThroughputRatio reports the throughput of the service over that of
// the bare one, each asked by several clients at once. The two take turns, so
// that a busy machine slows both.
func BenchmarkThroughputRatio(b *testing.B) {
	whole := served(b, classifying())
	plain := served(b, bare(ask(b, whole)))
	urls := []string{whole, plain}
	block(b, whole)
	block(b, plain)
	var spent [2]time.Duration
	b.ResetTimer()
	for i := range b.N {
		for j := range 2 {
			which := (i + j) % 2
			start := time.Now()
			block(b, urls[which])
			spent[which] += time.Since(start)
		}
	}
	b.ReportMetric(spent[1].Seconds()/spent[0].Seconds(), "ratio")
	b.ReportMetric(float64(b.N*clients*each)/spent[0].Seconds(), "answers/s")
}

// A block of the ratio: so many clients, so many requests of each.
const clients, each = 8, 25

func block(b *testing.B, url string) {
	var all sync.WaitGroup
	for range clients {
		all.Go(func() {
			for range each {
				ask(b, url)
			}
		})
	}
	all.Wait()
}

// BenchmarkExploration reports how many times as long an answer takes that says
// what would change it, and one of a case with an uncertain speed. All take turns,
// one client.
func BenchmarkExploration(b *testing.B) {
	url := served(b, classifying())
	uncertain := strings.Replace(riser, `"1.1 m/s"`, `"1.1 m/s +- 20 %"`, 1)
	if uncertain == riser {
		b.Fatal("the riser has another speed")
	}
	asked := []struct{ url, body string }{{url, riser}, {explored(url), riser}, {url, uncertain}}
	var spent [3]time.Duration
	for i := range b.N {
		for j := range asked {
			which := (i + j) % len(asked)
			start := time.Now()
			askFor(b, asked[which].url, asked[which].body)
			spent[which] += time.Since(start)
		}
	}
	b.ReportMetric(spent[1].Seconds()/spent[0].Seconds(), "with-what-if/plain")
	b.ReportMetric(spent[2].Seconds()/spent[0].Seconds(), "uncertain/plain")
	b.ReportMetric(spent[1].Seconds()/float64(b.N)*1e3, "ms/exploration")
	b.ReportMetric(spent[2].Seconds()/float64(b.N)*1e3, "ms/spread")
}

// BenchmarkClassifyHandler is the service without the network.
func BenchmarkClassifyHandler(b *testing.B) {
	h := classifying()
	w := &discarded{header: http.Header{}}
	b.ReportAllocs()
	for b.Loop() {
		r, err := http.NewRequest(http.MethodPost, "/v1/classify?what_if=false", bytes.NewReader([]byte(riser)))
		if err != nil {
			b.Fatal(err)
		}
		r.Header.Set("Content-Type", "application/json")
		clear(w.header)
		h.ServeHTTP(w, r)
	}
}

// discarded is a writer of answers that keeps nothing.
type discarded struct{ header http.Header }

func (d *discarded) Header() http.Header         { return d.header }
func (d *discarded) Write(p []byte) (int, error) { return len(p), nil }
func (d *discarded) WriteHeader(int)             {}
