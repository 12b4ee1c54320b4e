package render

import (
	"context"
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"testing"
	"time"

	cdppage "github.com/chromedp/cdproto/page"
	"github.com/chromedp/chromedp"

	"regimed/regime"
)

// browser starts a browser for one test; it ends with it.
func browser(t *testing.T) context.Context {
	t.Helper()
	program, err := onPath()
	if err != nil {
		const missing = "no chromium on the path (apt-get install chromium)"
		if os.Getenv("REGIMED_BROWSER") == "required" {
			t.Fatal(missing)
		}
		t.Skip(missing + "; with REGIMED_BROWSER=required this is a failure")
	}
	options := append(chromedp.DefaultExecAllocatorOptions[:], chromedp.ExecPath(program), chromedp.UserDataDir(t.TempDir()),
		chromedp.NoSandbox, chromedp.DisableGPU, chromedp.Flag("disable-quic", true), chromedp.Flag("disable-component-update", true))
	allocator, end := chromedp.NewExecAllocator(t.Context(), options...)
	t.Cleanup(end)
	ctx, closed := chromedp.NewContext(allocator)
	t.Cleanup(closed)
	ctx, cancel := context.WithTimeout(ctx, 5*time.Minute)
	t.Cleanup(cancel)
	if err := chromedp.Do(ctx); err != nil {
		t.Fatal(err)
	}
	return ctx
}

func onPath() (string, error) {
	for _, name := range []string{"chromium", "chromium-browser", "google-chrome"} {
		if program, err := exec.LookPath(name); err == nil {
			return program, nil
		}
	}
	return "", errors.New("no browser")
}

var (
	aPage   = regexp.MustCompile(`/Type\s*/Page\b`)
	sizeOfA = regexp.MustCompile(`/MediaBox\s*\[0 0 59[45][.\d]* 84[12][.\d]*\]`)
)

// printed is the page of an answer as PDF.
func printed(t *testing.T, ctx context.Context, folder string, a *regime.Answer) []byte {
	t.Helper()
	html, err := HTML(a)
	if err != nil {
		t.Fatal(err)
	}
	file := filepath.Join(folder, "answer.html")
	if err := os.WriteFile(file, html, 0o600); err != nil {
		t.Fatal(err)
	}
	if err := chromedp.Do(ctx, chromedp.Navigate("file://"+file)); err != nil {
		t.Fatal(err)
	}
	yes := true
	made, err := chromedp.Call(ctx, cdppage.PrintToPDF, cdppage.PrintToPDFParams{PreferCSSPageSize: &yes, PrintBackground: &yes})
	if err != nil {
		t.Fatal(err)
	}
	return made.Data
}

// Every shipped case prints on two sheets of A4.
func TestPrintsOnTwoSheets(t *testing.T) {
	ctx := browser(t)
	folder := t.TempDir()
	files := shipped(t)
	for name, a := range files {
		pdf := printed(t, ctx, folder, a)
		if n := len(aPage.FindAll(pdf, -1)); n != 2 {
			t.Errorf("%s takes %d sheets", name, n)
		}
		if n := len(sizeOfA.FindAll(pdf, -1)); n == 0 {
			t.Errorf("%s is not on A4", name)
		}
	}
	if len(files) < 50 {
		t.Errorf("printed %d cases", len(files))
	}
}
