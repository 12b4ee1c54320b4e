package page_test

import (
	"context"
	"fmt"
	"net/http/httptest"
	"os"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/browser"
	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/log"
	"github.com/chromedp/cdproto/network"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"
	"github.com/chromedp/chromedp/kb"

	"regimed/api"
	"regimed/api/browsertest"
)

// chromium is one browser for all tests; it ends with them.
var chromium = struct {
	start sync.Once
	ctx   context.Context
	end   func()
	err   error
}{}

func TestMain(m *testing.M) {
	status := m.Run()
	if chromium.end != nil {
		chromium.end()
	}
	os.Exit(status)
}

// tab is a page in the browser, with what went wrong on it.
type tab struct {
	t    *testing.T
	ctx  context.Context
	base string // address of the service

	lock     sync.Mutex
	mistakes []string
	asked    []string
}

// open starts a service and a tab on its page, wide or narrow.
func open(t *testing.T, path string, width int64) *tab {
	t.Helper()
	program := browsertest.Program(t)
	chromium.start.Do(func() { chromium.ctx, chromium.end, chromium.err = browsertest.Start(program) })
	if chromium.err != nil {
		t.Fatal(chromium.err)
	}
	server := httptest.NewServer(api.New(api.Config{}).Handler())
	t.Cleanup(server.Close)
	return newTab(t, server.URL, path, width)
}

func newTab(t *testing.T, base, path string, width int64) *tab {
	t.Helper()
	p := &tab{t: t, base: base}
	ctx, cancel := chromedp.NewContext(chromium.ctx, chromedp.WithNewBrowserContext())
	t.Cleanup(cancel)
	ctx, cancel = context.WithTimeout(ctx, 5*time.Minute)
	t.Cleanup(cancel)
	p.ctx = ctx
	p.must(chromedp.Listen(ctx, p.listen))
	p.must(chromedp.Do(ctx, chromedp.EmulateViewport(width, 900), chromedp.Navigate(base+path)))
	p.until(`document.documentElement.dataset.ready === "yes"`)
	t.Cleanup(p.check)
	return p
}

// listen keeps what a page must not do. An answer of 422 to a case that is wrong
// is what the page asks for, though the browser logs it.
func (p *tab) listen(event any) {
	p.lock.Lock()
	defer p.lock.Unlock()
	switch e := event.(type) {
	case *runtime.EventExceptionThrown:
		what := e.ExceptionDetails.Text
		if thrown := e.ExceptionDetails.Exception; thrown != nil {
			what += ": " + thrown.Description
		}
		p.mistakes = append(p.mistakes, what)
	case *runtime.EventConsoleAPICalled:
		if e.Type == "error" || e.Type == "warning" {
			p.mistakes = append(p.mistakes, fmt.Sprint("console: ", e.Args))
		}
	case *log.EventEntryAdded:
		refused := e.Entry.Source == log.EntrySourceNetwork && strings.Contains(e.Entry.Text, "status of 422")
		if e.Entry.Level == log.EntryLevelError && !refused {
			p.mistakes = append(p.mistakes, e.Entry.Text+" "+e.Entry.URL)
		}
	case *network.EventRequestWillBeSent:
		p.asked = append(p.asked, e.Request.URL)
	}
}

// check ends each test: no mistake, and no request to another origin.
func (p *tab) check() {
	p.lock.Lock()
	defer p.lock.Unlock()
	for _, m := range p.mistakes {
		p.t.Error(m)
	}
	for _, address := range p.asked {
		if strings.HasPrefix(address, "data:image/") || strings.HasPrefix(address, "blob:"+p.base+"/") {
			continue // what the page holds already
		}
		if !strings.HasPrefix(address, p.base+"/") {
			p.t.Errorf("a request to %s", address)
		}
	}
	if len(p.asked) < 10 {
		p.t.Errorf("only %d requests seen", len(p.asked))
	}
}

func (p *tab) must(err error) {
	p.t.Helper()
	if err != nil {
		p.t.Fatal(err)
	}
}

// until waits for an expression to be true.
func (p *tab) until(expression string) {
	p.t.Helper()
	if _, err := chromedp.Run(p.ctx, chromedp.Poll[bool]("!!("+expression+")", chromedp.WithPollingTimeout(time.Minute))); err != nil {
		p.t.Fatalf("waiting for %s: %v; the page says %q", expression, err, p.text(`document.querySelector("#case").innerText.slice(0, 600) + "\n---\n" + document.querySelector("#answer").innerText.slice(0, 600)`))
	}
}

// text evaluates an expression, or a promise, to a text.
func (p *tab) text(expression string) string {
	p.t.Helper()
	s, err := chromedp.Run(p.ctx, chromedp.Evaluate[string]("Promise.resolve("+expression+").then(String)", chromedp.EvalAwaitPromise))
	p.must(err)
	return s
}

func (p *tab) keys(keys string) {
	p.t.Helper()
	p.must(chromedp.Do(p.ctx, chromedp.KeyEvent(keys)))
}

// tabTo presses the tab key until the focus is on what a selector names.
func (p *tab) tabTo(selector string) {
	p.t.Helper()
	for range 200 {
		if p.text(fmt.Sprintf("!!document.activeElement?.matches(%q)", selector)) == "true" {
			return
		}
		p.keys(kb.Tab)
	}
	p.t.Fatalf("no way to %s by the tab key; the focus is on %s", selector, p.text(`document.activeElement.outerHTML.slice(0, 200)`))
}

// fill types into the input with an id, in place of what it holds.
func (p *tab) fill(id, text string) {
	p.t.Helper()
	p.tabTo("#" + id)
	p.must(chromedp.Do(p.ctx, chromedp.KeyEvent("a", chromedp.KeyModifiers(chromedp.ModifierCtrl)), chromedp.KeyEvent(kb.Backspace+text)))
}

// state waits until the page has come to a state.
func (p *tab) state(name string) {
	p.t.Helper()
	p.until(fmt.Sprintf("document.documentElement.dataset.state === %q", name))
}

// answered waits for the answer to the case as it stands in the address, where
// the page keeps it, and for what would change it.
func (p *tab) answered() {
	p.t.Helper()
	p.state("answered")
	p.until(`!document.querySelector("#answer [aria-busy], #answer-body[aria-busy]")`)
}

// example opens a demo case.
func (p *tab) example(name string) {
	p.t.Helper()
	p.text(fmt.Sprintf(`(() => { const s = document.querySelector("#example"); s.value = %q; s.dispatchEvent(new Event("change")); })()`, name))
	p.answered()
}

// dark asks for dark colours as a system would.
func (p *tab) dark() {
	p.t.Helper()
	_, err := chromedp.Call(p.ctx, emulation.SetEmulatedMedia, emulation.SetEmulatedMediaParams{
		Features: []*emulation.MediaFeature{{Name: "prefers-color-scheme", Value: "dark"}}})
	p.must(err)
}

// saveTo lets the tab save files in a folder.
func (p *tab) saveTo(folder string) {
	p.t.Helper()
	_, err := chromedp.Call(p.ctx, browser.SetDownloadBehavior, browser.SetDownloadBehaviorParams{
		Behavior: browser.SetDownloadBehaviorBehaviorAllow, BrowserContextID: chromedp.FromContext(p.ctx).BrowserContextID, DownloadPath: folder})
	p.must(err)
}

// saved waits for a file that the browser saves, and returns what it holds. The
// browser gives a file its name once it is whole.
func (p *tab) saved(name string) []byte {
	p.t.Helper()
	for range 400 {
		if body, err := os.ReadFile(name); err == nil && len(body) > 0 {
			return body
		}
		p.text(`new Promise((go) => setTimeout(go, 25))`)
	}
	p.t.Fatalf("no file %s", name)
	return nil
}
