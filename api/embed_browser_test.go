package api_test

import (
	"context"
	"fmt"
	"net/http"
	"net/http/httptest"
	"os"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/cdp"
	"github.com/chromedp/cdproto/log"
	"github.com/chromedp/cdproto/network"
	"github.com/chromedp/cdproto/page"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"

	"regimed/api"
	"regimed/api/browsertest"
	"regimed/api/store"
)

// browser is a tab, with what went wrong in it and what it asked for.
type browser struct {
	t   *testing.T
	ctx context.Context

	lock     sync.Mutex
	mistakes []string
	asked    []string
}

// newBrowser starts a browser that ends with the test.
func newBrowser(t *testing.T) *browser {
	t.Helper()
	ctx, end := context.WithTimeout(browsertest.Open(t), 3*time.Minute)
	t.Cleanup(end)
	b := &browser{t: t, ctx: ctx}
	b.must(chromedp.Do(ctx, chromedp.EmulateViewport(1200, 900)))
	b.must(chromedp.Listen(ctx, b.listen))
	return b
}

func (b *browser) listen(event any) {
	b.lock.Lock()
	defer b.lock.Unlock()
	switch e := event.(type) {
	case *runtime.EventExceptionThrown:
		b.mistakes = append(b.mistakes, e.ExceptionDetails.Text)
	case *runtime.EventConsoleAPICalled:
		if e.Type == "error" || e.Type == "warning" {
			b.mistakes = append(b.mistakes, fmt.Sprint("console: ", e.Args))
		}
	case *log.EventEntryAdded:
		if e.Entry.Level == log.EntryLevelError {
			b.mistakes = append(b.mistakes, e.Entry.Text+" "+e.Entry.URL)
		}
	case *network.EventRequestWillBeSent:
		b.asked = append(b.asked, e.Request.URL)
	}
}

func (b *browser) must(err error) {
	b.t.Helper()
	if err != nil {
		b.t.Fatal(err)
	}
}

// text evaluates an expression or a promise to a text.
func (b *browser) text(expression string) string {
	b.t.Helper()
	s, err := chromedp.Run(b.ctx, chromedp.Evaluate[string]("Promise.resolve("+expression+").then(String)", chromedp.EvalAwaitPromise))
	b.must(err)
	return s
}

func (b *browser) until(expression string) {
	b.t.Helper()
	if _, err := chromedp.Run(b.ctx, chromedp.Poll[bool]("!!("+expression+")", chromedp.WithPollingTimeout(time.Minute))); err != nil {
		b.t.Fatalf("waiting for %s: %v; %q", expression, err, b.text("document.body.innerText.slice(0, 500)"))
	}
}

// found returns what went wrong and what was asked for.
func (b *browser) found() (mistakes, asked []string) {
	b.lock.Lock()
	defer b.lock.Unlock()
	return append([]string(nil), b.mistakes...), append([]string(nil), b.asked...)
}

// The page of operations shows them all, without a mistake and without a request
// to anybody else.
func TestDocsInBrowser(t *testing.T) {
	b := newBrowser(t)
	server := httptest.NewServer(api.New(api.Config{}).Handler())
	defer server.Close()
	b.must(chromedp.Do(b.ctx, chromedp.Navigate(server.URL+"/docs")))
	b.until(`document.querySelectorAll(".opblock").length > 0`)
	if n := b.text(`document.querySelectorAll(".opblock").length`); n != b.text(`fetch("/openapi.json").then(r => r.json()).then(d => Object.values(d.paths).reduce((n, p) => n + Object.keys(p).length, 0))`) {
		t.Errorf("%s operations are shown", n)
	}
	b.text(`document.querySelector("[id$=classify] .opblock-summary-control, [id$=classify] button").click()`)
	b.until(`document.querySelector("[id$=classify] .opblock-body")?.innerText.includes("The body is one case")`)
	mistakes, asked := b.found()
	for _, m := range mistakes {
		t.Error(m)
	}
	for _, address := range asked {
		if !strings.HasPrefix(address, server.URL+"/") && !strings.HasPrefix(address, "data:") {
			t.Errorf("a request to %s", address)
		}
	}
	if len(asked) < 6 {
		t.Errorf("only %d requests seen", len(asked))
	}
}

// record starts a service with a record on a port of its own.
func record(t *testing.T, origins []string) (address, id string) {
	t.Helper()
	records, err := store.OpenSQLite(context.Background(), t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	server := httptest.NewServer(api.New(api.Config{Records: records, FrameAncestors: origins}).Handler())
	t.Cleanup(func() {
		server.Close()
		if err := records.Close(); err != nil {
			t.Error(err)
		}
	})
	kase, err := os.ReadFile("../testdata/cases/sluice-skin.json")
	if err != nil {
		t.Fatal(err)
	}
	made, err := http.Post(server.URL+"/v1/records", "application/json", strings.NewReader(`{"case": `+string(kase)+`}`))
	if err != nil {
		t.Fatal(err)
	}
	defer made.Body.Close()
	if made.StatusCode != http.StatusCreated {
		t.Fatal(made.Status)
	}
	return server.URL, strings.TrimPrefix(made.Header.Get("Location"), "/v1/records/")
}

// A page of another origin shows a record in a frame where the operator lets it,
// and not otherwise; a picture it always shows.
func TestEmbeddingInBrowser(t *testing.T) {
	b := newBrowser(t)
	wiki := "" // its page
	other := httptest.NewServer(http.HandlerFunc(func(w http.ResponseWriter, _ *http.Request) {
		w.Header().Set("Content-Type", "text/html; charset=utf-8")
		w.Header().Set("Cross-Origin-Embedder-Policy", "require-corp")
		fmt.Fprint(w, wiki)
	}))
	defer other.Close()
	for _, row := range []struct {
		name    string
		allowed []string
		shown   bool
	}{
		{"nobody", nil, false},
		{"another", []string{"https://wiki.example"}, false},
		{"this one", []string{other.URL}, true},
		{"everybody", []string{"*"}, true},
	} {
		address, id := record(t, row.allowed)
		wiki = fmt.Sprintf(`<!doctype html><title>Wiki</title><link rel="icon" href="data:,"><p>Gate</p>
<img id="picture" src="%[1]s/embed/%[2]s.svg" alt="strip">
<iframe id="frame" src="%[1]s/embed/%[2]s?theme=light" width="640" height="420"></iframe>`, address, id)
		b.must(chromedp.Do(b.ctx, chromedp.Navigate(other.URL)))
		b.until(`document.querySelector("#picture").complete && document.readyState === "complete"`)
		if width := b.text(`document.querySelector("#picture").naturalWidth`); width != "640" {
			t.Errorf("%s: the picture is %s wide", row.name, width)
		}
		mistakes, _ := b.found()
		for _, m := range mistakes {
			// A frame that is refused is logged, and may be so a page later.
			if !strings.Contains(m, "frame-ancestors") {
				t.Errorf("%s: %s", row.name, m)
			}
		}
		if got := b.frame(address); got != row.shown {
			t.Errorf("%s: shown %t", row.name, got)
		}
	}
}

// The page has its colours by its theme, loads nothing, and fits a frame.
func TestEmbeddedPageInBrowser(t *testing.T) {
	b := newBrowser(t)
	address, id := record(t, nil)
	for theme, back := range map[string]string{"dark": "rgb(21, 25, 30)", "light": "rgb(255, 255, 255)", "auto": "rgb(255, 255, 255)"} {
		b.must(chromedp.Do(b.ctx, chromedp.EmulateViewport(640, 400), chromedp.Navigate(address+"/embed/"+id+"?theme="+theme)))
		if got := b.text(`getComputedStyle(document.body).backgroundColor`); got != back {
			t.Errorf("%s: %s", theme, got)
		}
		if wide := b.text(`document.documentElement.scrollWidth`); wide != "640" {
			t.Errorf("%s: %s pixels wide", theme, wide)
		}
		if high := b.text(`document.documentElement.scrollHeight <= 400`); high != "true" {
			t.Errorf("%s: too high for the frame of oEmbed: %s", theme, b.text(`document.documentElement.scrollHeight`))
		}
	}
	mistakes, asked := b.found()
	for _, m := range mistakes {
		t.Error(m)
	}
	for _, at := range asked {
		if !strings.Contains(at, "/embed/") && !strings.HasSuffix(at, "/favicon.ico") {
			t.Errorf("a request to %s", at)
		}
	}
}

// frame reports whether the frame of a page shows what lies at an address, once
// it shows that or the browser's page that it was refused.
func (b *browser) frame(address string) bool {
	b.t.Helper()
	for b.ctx.Err() == nil {
		tree, err := chromedp.Call(b.ctx, page.GetFrameTree, cdp.Empty{})
		b.must(err)
		for _, child := range tree.FrameTree.ChildFrames {
			switch at := child.Frame.URL; {
			case strings.HasPrefix(at, address+"/embed/"):
				return true
			case strings.HasPrefix(at, "chrome-error:"):
				return false
			}
		}
	}
	b.t.Fatal("the frame shows nothing")
	return false
}
