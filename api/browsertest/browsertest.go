// Package browsertest starts the browser of tests. Without one on the path such
// a test is skipped, and says so, unless REGIMED_BROWSER=required.
package browsertest

import (
	"context"
	"os"
	"os/exec"
	"testing"

	"github.com/chromedp/chromedp"
)

// required makes it a failure that something outside this module is not there:
// set in the environment where every check has to run.
const required = "REGIMED_BROWSER"

// Missing ends a test for which something outside this module is not there.
func Missing(t testing.TB, what string) {
	t.Helper()
	if os.Getenv(required) == "required" {
		t.Fatal(what)
	}
	t.Skipf("%s; with %s=required this is a failure", what, required)
}

// Program is the browser on the path; a test without one ends here.
func Program(t testing.TB) string {
	t.Helper()
	for _, name := range []string{"chromium", "chromium-browser", "google-chrome"} {
		if program, err := exec.LookPath(name); err == nil {
			return program
		}
	}
	Missing(t, "no chromium on the path (apt-get install chromium)")
	return ""
}

// Start starts a browser, and returns what ends it. One that breaks down before
// it has shown anything says nothing about a page: it is started again, twice at
// most.
func Start(program string) (ctx context.Context, end func(), err error) {
	for range 3 {
		if ctx, end, err = try(program); err == nil {
			return ctx, end, nil
		}
	}
	return nil, nil, err
}

func try(program string) (context.Context, func(), error) {
	folder, err := os.MkdirTemp("", "regimed-browser-")
	if err != nil {
		return nil, nil, err
	}
	options := append(chromedp.DefaultExecAllocatorOptions[:], chromedp.ExecPath(program), chromedp.UserDataDir(folder),
		chromedp.NoSandbox, chromedp.DisableGPU, chromedp.Flag("disable-quic", true), chromedp.Flag("disable-component-update", true))
	allocator, stop := chromedp.NewExecAllocator(context.Background(), options...)
	ctx, closed := chromedp.NewContext(allocator)
	end := func() {
		closed()
		stop()
		os.RemoveAll(folder)
	}
	if err := chromedp.Do(ctx); err != nil {
		end()
		return nil, nil, err
	}
	return ctx, end, nil
}

// Open starts a browser that ends with the test.
func Open(t testing.TB) context.Context {
	t.Helper()
	ctx, end, err := Start(Program(t))
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(end)
	return ctx
}
