package render

import (
	"context"
	"os"
	"path/filepath"
	"regexp"
	"testing"
	"time"

	cdppage "github.com/chromedp/cdproto/page"
	"github.com/chromedp/chromedp"

	"regimed/api/browsertest"
	"regimed/regime"
)

// browser starts a browser for one test; it ends with it.
func browser(t *testing.T) context.Context {
	t.Helper()
	ctx, cancel := context.WithTimeout(browsertest.Open(t), 5*time.Minute)
	t.Cleanup(cancel)
	return ctx
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
