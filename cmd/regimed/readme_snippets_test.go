package main

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"net/http"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"time"
)

// snippet is a block of the README that has to run: its comment names the
// program and the block.
type snippet struct{ program, name, text string }

var snippetBlock = regexp.MustCompile("(?s)<!-- tested: (\\S+) (\\S+) -->\n```[a-z]*\n(.*?)```\n")

func snippets(t *testing.T) []snippet {
	t.Helper()
	text, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	var list []snippet
	for _, m := range snippetBlock.FindAllSubmatch(text, -1) {
		list = append(list, snippet{string(m[1]), string(m[2]), string(m[3])})
	}
	if marks := bytes.Count(text, []byte("<!-- tested:")); marks != len(list) {
		t.Fatalf("%d marks and %d blocks", marks, len(list))
	}
	return list
}

// prints is what each snippet prints, the whole of it.
var prints = map[string]string{
	"gate":     `^added-mass: no flow solver needed\n$`,
	"findings": `^added-mass\nfluid-absent invalid -1\.23\nsingle-mode marginal -0\.06\nexplicit-coupling invalid -0\.69\n$`,
	"client":   `^added-mass analytic\n\d{4}-\d\d-\d\d [0-9a-f]{12} Skin plate, rev\. B\n$`,
	"check":    `(?s)^.*no-cavitation.*$`,
	"wiki":     `^\[!\[Skin plate: model class\]\((http://127\.0\.0\.1:\d+/embed/[0-9a-f]{64}\.svg)\)\]\((http://127\.0\.0\.1:\d+/v1/records/[0-9a-f]{64}\.html)\)\n$`,
}

// needs are the programs that a snippet asks for beside its own.
var needs = map[string][]string{"gate": {"curl", "jq"}, "wiki": {"curl", "jq"}}

// What the README shows runs against a real service, and prints what it should.
func TestReadmeSnippets(t *testing.T) {
	list := snippets(t)
	if len(list) != len(prints) {
		t.Errorf("%d snippets, and %d are known", len(list), len(prints))
	}
	ran := 0
	for _, s := range list {
		t.Run(s.name, func(t *testing.T) {
			demand(t, append(needs[s.name], s.program)...)
			want, known := prints[s.name]
			if !known {
				t.Fatal("nothing is known of what it prints")
			}
			out := s.run(t, serviceFor(t))
			found := regexp.MustCompile(want).FindStringSubmatch(out)
			if found == nil {
				t.Fatalf("printed %q", out)
			}
			for _, address := range found[1:] {
				if status, body := ask(t, http.MethodGet, address, ""); status != http.StatusOK || !strings.Contains(body, "skin plate of the sluice gate") {
					t.Errorf("%s: %d %.300s", address, status, body)
				}
			}
			ran++
		})
	}
	t.Logf("%d of %d snippets ran", ran, len(list))
}

// demand skips a test whose programs are not there, or fails it where the
// environment says that all have to run.
func demand(t *testing.T, programs ...string) {
	t.Helper()
	const required = "REGIMED_SNIPPETS"
	for _, program := range programs {
		if _, err := exec.LookPath(program); err == nil {
			continue
		}
		if os.Getenv(required) == "required" {
			t.Fatalf("no %s on the path", program)
		}
		t.Skipf("no %s on the path; with %s=required this is a failure", program, required)
	}
}

// serviceFor runs a service with records of its own, and returns its address.
func serviceFor(t *testing.T) string {
	t.Helper()
	ctx, stop := context.WithCancel(context.Background())
	printed, out := io.Pipe()
	ended := make(chan int, 1)
	dir := t.TempDir()
	go func() {
		ended <- runContext(ctx, []string{"serve", "--listen", "127.0.0.1:0", "--drain", "0s", "--data", dir}, strings.NewReader(""), out, io.Discard)
		out.Close()
	}()
	t.Cleanup(func() {
		stop()
		if status := <-ended; status != statusMet {
			t.Errorf("the service ended with %d", status)
		}
	})
	line := make([]byte, 200)
	n, err := printed.Read(line)
	address, found := strings.CutPrefix(strings.TrimSpace(string(line[:n])), "listening on ")
	if err != nil || !found {
		t.Fatalf("printed %q: %v", line[:n], err)
	}
	return address
}

// run runs a snippet in a folder of its own, against a service, with the case
// and the program that the README speaks of.
func (s snippet) run(t *testing.T, address string) string {
	t.Helper()
	const usual = "http://127.0.0.1:8610"
	if s.name != "check" && !strings.Contains(s.text, usual) {
		t.Fatalf("it does not ask %s", usual)
	}
	dir := t.TempDir()
	kase, err := os.ReadFile("../../testdata/cases/sluice-skin.json")
	if err != nil {
		t.Fatal(err)
	}
	source := filepath.Join(dir, "snippet"+map[string]string{"sh": ".sh", "python3": ".py", "go": ".go"}[s.program])
	text := strings.ReplaceAll(s.text, usual, address)
	folder, arguments := dir, []string{source}
	if s.program == "go" { // it is built in this module, and finds its case where it is told to look
		folder, arguments = ".", []string{"run", source}
		text = strings.ReplaceAll(text, `"case.json"`, fmt.Sprintf("%q", filepath.Join(dir, "case.json")))
	}
	for name, content := range map[string]string{source: text, filepath.Join(dir, "case.json"): string(kase)} {
		if err := os.WriteFile(name, []byte(content), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	ctx, cancel := context.WithTimeout(t.Context(), 4*time.Minute)
	defer cancel()
	p := exec.CommandContext(ctx, s.program, arguments...)
	p.Dir = folder
	p.Env = append(os.Environ(), "PATH="+programFolder(t)+string(os.PathListSeparator)+os.Getenv("PATH"))
	var errs bytes.Buffer
	p.Stderr = &errs
	out, err := p.Output()
	if err != nil {
		t.Fatalf("%v: %s%s", err, out, &errs)
	}
	return string(out)
}

// programFolder has the program as it would be installed: a script that runs
// the test's own binary as such.
func programFolder(t *testing.T) string {
	t.Helper()
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	script := fmt.Sprintf("#!/bin/sh\n%s=$(printf '%%s\\n' \"$@\") exec '%s'\n", asProgram, self)
	if err := os.WriteFile(filepath.Join(dir, "regimed"), []byte(script), 0o700); err != nil {
		t.Fatal(err)
	}
	return dir
}
