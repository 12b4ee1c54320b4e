package main

import (
	"context"
	"net/http"
	"strings"
	"testing"

	"regimed/api/store"
)

// What record keeps is what the service answers, and a second time is no
// second record.
func TestRecord(t *testing.T) {
	dir := t.TempDir()
	first := regimed(pileYAML, "record", "--data", dir, "--tag", "pile", "--tag", "mill", "--author", "M. Vane", "-")
	if first.status != statusMet || first.errOut != "" {
		t.Fatalf("%+v", first)
	}
	again := regimed("", "record", "--data", dir, "--title", "Another title", file(t, "pile.json", pileJSON))
	if again.status != statusMet || again.out != first.out || !strings.Contains(again.errOut, "stays as it is") {
		t.Errorf("again: %+v", again)
	}
	records, err := store.OpenSQLite(context.Background(), dir)
	if err != nil {
		t.Fatal(err)
	}
	defer records.Close()
	r, err := records.Get(context.Background(), strings.TrimSpace(first.out))
	if err != nil {
		t.Fatal(err)
	}
	if want := served(t, http.MethodPost, "/v1/classify", pileJSON); string(r.Answer) != want {
		t.Errorf("kept %.300s\nwant %.300s", r.Answer, want)
	}
	if r.Title != "Steel pile in still water" || r.Author != "M. Vane" || strings.Join(r.Tags, ",") != "pile,mill" {
		t.Errorf("%+v", r.Head)
	}
}

// The options of classify are those of record, and are kept.
func TestRecordWithOptions(t *testing.T) {
	dir := t.TempDir()
	uncertain := strings.Replace(pileJSON, `"0.5 m"`, `"0.5 m +- 5 %"`, 1)
	made := regimed(uncertain, "record", "--data", dir, "--samples", "64", "--what-if=false", "-")
	if made.status != statusMet || made.errOut != "" {
		t.Fatalf("%+v", made)
	}
	records, err := store.OpenSQLite(context.Background(), dir)
	if err != nil {
		t.Fatal(err)
	}
	defer records.Close()
	r, err := records.Get(context.Background(), strings.TrimSpace(made.out))
	if err != nil {
		t.Fatal(err)
	}
	if want := served(t, http.MethodPost, "/v1/classify?samples=64&what_if=false", uncertain); string(r.Answer) != want {
		t.Errorf("kept %.300s\nwant %.300s", r.Answer, want)
	}
	if string(r.Options) != `{"samples":64,"what_if":false}` {
		t.Errorf("%s", r.Options)
	}
	if bad := regimed(uncertain, "record", "--data", dir, "--samples", "1", "-"); bad.status != statusRefuse || bad.out != "" {
		t.Errorf("%+v", bad)
	}
}

func TestRecordOfABadCase(t *testing.T) {
	dir := t.TempDir()
	got := regimed("", "record", "--data", dir, file(t, "bad.json", strings.Replace(pileJSON, "0.5 m", "0.5 kg", 1)))
	if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, "bad.json:5: /structure/diameter: wrong-dimension") {
		t.Errorf("%+v", got)
	}
	got = regimed("", "record", "--data", dir, "--tag", "a\nb", "--tag", strings.Repeat("x", 65), file(t, "pile.json", pileJSON))
	if got.status != statusRefuse || got.out != "" || strings.Count(got.errOut, "/tags/") != 2 {
		t.Errorf("%+v", got)
	}
}
