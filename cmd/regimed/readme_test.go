package main

import (
	"bytes"
	"os"
	"strings"
	"testing"
)

// The page in the README is what the command above it prints.
func TestReadmeShowsARealAnswer(t *testing.T) {
	text, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	_, rest, found := strings.Cut(string(text), "go run ./cmd/regimed classify ")
	name, rest, _ := strings.Cut(rest, " ")
	if !found {
		t.Fatal("the README has no first command")
	}
	_, rest, _ = strings.Cut(rest, "begins like this")
	var shown []string
	for line := range strings.Lines(rest) {
		line = strings.TrimRight(line, "\n")
		if len(shown) > 0 && line != "" && !strings.HasPrefix(line, "    ") {
			break
		}
		if strings.HasPrefix(line, "    ") || len(shown) > 0 {
			shown = append(shown, strings.TrimPrefix(line, "    "))
		}
	}
	var out, errs bytes.Buffer
	if status := run([]string{"classify", "../../" + name}, strings.NewReader(""), &out, &errs); status != 0 {
		t.Fatalf("status %d: %s", status, &errs)
	}
	want := strings.TrimRight(strings.Join(shown, "\n"), "\n")
	if len(shown) < 20 || !strings.HasPrefix(out.String(), want) {
		t.Errorf("%d lines of the README are not what %s gives now:\n%s", len(shown), name, out.String())
	}
}
