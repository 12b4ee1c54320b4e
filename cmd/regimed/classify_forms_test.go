package main

import (
	"bytes"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"regimed/api"
)

// Each form of the service is one of the command line, and goes into a file.
func TestClassifyForms(t *testing.T) {
	begins := map[string]string{"text": "Recommended", "json": "{", "html": "<!doctype html>", "md": "# Ellerskar", "csv": "part,id,", "svg": "<svg ", "png": "\x89PNG", "strip": "<svg "}
	for _, name := range api.FormatNames() {
		if name != "txt" && !slices.Contains(formats, name) {
			t.Errorf("no form %s", name)
		}
	}
	for _, name := range formats {
		file := filepath.Join(t.TempDir(), "answer")
		var out, errs, same bytes.Buffer
		if status := run([]string{"classify", "../../testdata/cases/sluice-skin.json", "--format", name, "-o", file}, nil, &out, &errs); status != 0 || out.Len() > 0 {
			t.Fatalf("%s: status %d, %s, printed %q", name, status, &errs, &out)
		}
		body, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if begins[name] == "" || !strings.HasPrefix(string(body), begins[name]) {
			t.Errorf("%s begins with %.40q", name, body)
		}
		if status := run([]string{"classify", "../../testdata/cases/sluice-skin.json", "--format", name}, nil, &same, &errs); status != 0 || !bytes.Equal(same.Bytes(), body) {
			t.Errorf("%s: status %d; file and output differ", name, status)
		}
	}
	if len(formats) != 8 {
		t.Errorf("%d forms", len(formats))
	}
	var out, errs bytes.Buffer
	if status := run([]string{"classify", "../../testdata/cases/sluice-skin.json", "-o", t.TempDir()}, nil, &out, &errs); status == 0 {
		t.Error("an answer was written into a folder")
	}
}
