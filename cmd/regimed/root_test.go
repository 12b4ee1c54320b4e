package main

import (
	"strings"
	"testing"

	"regimed/api/render"
)

func TestHelpHasExamples(t *testing.T) {
	ran := 0
	for _, cmd := range newRoot().Commands() {
		if cmd.Short == "" || cmd.Long == "" || cmd.Example == "" {
			t.Errorf("%s lacks a help text or an example", cmd.Name())
		}
		got := regimed("", cmd.Name(), "--help")
		if got.status != statusMet || !strings.Contains(got.out, "Examples:\n") || !strings.Contains(got.out, "regimed "+cmd.Name()) {
			t.Errorf("%s --help: status %d\n%s%s", cmd.Name(), got.status, got.out, got.errOut)
		}
		ran++
	}
	if ran != 13 {
		t.Errorf("saw %d commands", ran)
	}
	if got := regimed(""); got.status != statusMet || !strings.Contains(got.out, "Examples:\n") {
		t.Errorf("without arguments: %+v", got)
	}
}

func TestWrongUse(t *testing.T) {
	path := file(t, "pile.yaml", pileYAML)
	rows := []struct {
		args []string
		says string
	}{
		{[]string{"clasify"}, "classify"},
		{[]string{"--nonsense"}, "unknown flag"},
		{[]string{"classify"}, "name one file, or -"},
		{[]string{"classify", path, path}, "got 2 arguments"},
		{[]string{"classify", "--format", "xml", path}, `no format is called "xml"`},
		{[]string{"classify", "--fields", "recomendation", "--format", "json", path}, "did you mean recommendation?"},
		{[]string{"classify", "--fields", "digest", path}, "--fields needs --format json"},
		{[]string{"classify", path + ".not"}, "no such file"},
		{[]string{"check"}, "name one file or more"},
		{[]string{"canon"}, "which canonical solution?"},
		{[]string{"canon", "OscilatingCylinder", "36"}, "Did you mean OscillatingCylinder?"},
		{[]string{"catalog", "kind"}, "Did you mean kinds?"},
		{[]string{"catalog", "kinds", "cylindre"}, "Did you mean cylinder?"},
		{[]string{"schema", "more"}, "takes none"},
		{[]string{"serve", "--listen", "nowhere"}, "nowhere"},
		{[]string{"serve", "--listen", "127.0.0.1:0", "--data", path}, "not a directory"},
		{[]string{"serve", "--frame-ancestors", "wiki.example"}, "--frame-ancestors: \"wiki.example\" is no origin"},
		{[]string{"serve", "--public-url", "regimed.example"}, "--public-url: \"regimed.example\" is no address"},
		{[]string{"record"}, "name one file, or -"},
		{[]string{"record", path}, "--data"},
		{[]string{"record", path, "--data", path}, "not a directory"},
		{[]string{"record", path, "--data", t.TempDir(), "--tag", "a", "--tag", "a", "--title", " "}, "given twice"},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", row.args...)
		if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, row.says) {
			t.Errorf("%v: status %d, says %q, want %q in it; prints %q", row.args, got.status, got.errOut, row.says, got.out)
		}
		ran++
	}
	if ran != 22 {
		t.Errorf("ran %d rows", ran)
	}
}

func TestVersion(t *testing.T) {
	got := regimed("", "version")
	for _, want := range []string{"regimed " + render.Version + "\n", "catalogue " + render.Catalogue() + "\n", "built with go1."} {
		if got.status != statusMet || !strings.Contains(got.out, want) {
			t.Errorf("got %+v, want %q in it", got, want)
		}
	}
}

func TestCompletion(t *testing.T) {
	rows := []struct {
		args []string
		want string
	}{
		{[]string{"catalog", ""}, "assumptions"},
		{[]string{"catalog", "kinds", ""}, "cylinder"},
		{[]string{"canon", "Osc"}, "OscillatingCylinder"},
		{[]string{"canon", "ConveyingPipe", "--s"}, "--support"},
		{[]string{"canon", "ConveyingPipe", "--support", ""}, "clamped-pinned"},
		{[]string{"check", "--expect", "cla"}, "class"},
		{[]string{"check", "--expect", "one-way="}, "one-way=marginal"},
		{[]string{"check", "--expect", "axis.coupling="}, "axis.coupling=one-way"},
		{[]string{"classify", "--format", ""}, "json"},
		{[]string{"classify", "--fields", ""}, "recommendation"},
		{[]string{"classify", ""}, "yaml"},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"__complete"}, row.args...)...)
		if got.status != statusMet || !strings.Contains("\n"+got.out, "\n"+row.want+"\n") {
			t.Errorf("%v: got %q, want %q in it", row.args, got.out, row.want)
		}
		ran++
	}
	if ran != 11 {
		t.Errorf("ran %d rows", ran)
	}
	for _, shell := range []string{"bash", "zsh", "fish", "powershell"} {
		if got := regimed("", "completion", shell); got.status != statusMet || len(got.out) < 1000 {
			t.Errorf("completion %s: status %d, %d bytes", shell, got.status, len(got.out))
		}
	}
}
