package main

import (
	"net/http"
	"strings"
	"testing"

	"github.com/go-json-experiment/json/jsontext"
	"go.yaml.in/yaml/v3"

	"regimed/api"
)

func TestCatalogs(t *testing.T) {
	ran := 0
	for _, name := range api.CatalogNames() {
		records, err := catalogRecords(name)
		if err != nil || len(records) == 0 {
			t.Fatalf("%s: %d records, %v", name, len(records), err)
		}
		asJSON := regimed("", "catalog", name, "--format", "json")
		if want := served(t, http.MethodGet, "/v1/catalog/"+name, ""); asJSON.status != statusMet || asJSON.out != want {
			t.Errorf("%s: got %.300s, want %.300s", name, asJSON.out, want)
		}
		text := regimed("", "catalog", name)
		if n := strings.Count(text.out, "\n"); text.status != statusMet || n != len(records) {
			t.Errorf("%s: %d lines for %d records", name, n, len(records))
		}
		seen := map[string]bool{}
		for i, key := range keysOf(records) {
			if key == "" || seen[key] {
				t.Errorf("%s: key %q", name, key)
			}
			seen[key] = true
			if titleOf(members(records[i])[1:]) == "" {
				t.Errorf("%s: %s has no title", name, key)
			}
		}
		ran++
	}
	if ran < 10 {
		t.Errorf("saw %d catalogues", ran)
	}
}

func TestCatalogIndex(t *testing.T) {
	if got, want := regimed("", "catalog", "--format", "json").out, served(t, http.MethodGet, "/v1/catalog", ""); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
	text := regimed("", "catalog").out
	if strings.Count(text, "\n") != len(api.CatalogNames()) || !strings.Contains(text, "\nassumptions ") {
		t.Errorf("got %s", text)
	}
}

// An entry in full is YAML, and says what the JSON says.
func TestCatalogInFull(t *testing.T) {
	ran := 0
	for _, name := range api.CatalogNames() {
		records, err := catalogRecords(name)
		if err != nil {
			t.Fatal(err)
		}
		for i, key := range keysOf(records) {
			if i%10 != 0 {
				continue
			}
			full := regimed("", "catalog", name, "--", key)
			again, _, bad, err := yamlToJSON([]byte(full.out))
			if full.status != statusMet || err != nil || len(bad) > 0 {
				t.Errorf("%s %s: %v, %v\n%s%s", name, key, bad, err, full.out, full.errOut)
				continue
			}
			got, want := jsontext.Value(again), records[i]
			if got.Canonicalize() != nil || want.Canonicalize() != nil || string(got) != string(want) {
				t.Errorf("%s %s: got %s, want %s", name, key, got, want)
			}
			ran++
		}
	}
	if ran < 20 {
		t.Errorf("ran %d entries", ran)
	}
	two := regimed("", "catalog", "kinds", "plate", "cylinder")
	var first struct{ Name string }
	if err := yaml.Unmarshal([]byte(two.out), &first); err != nil || first.Name != "plate" || !strings.Contains(two.out, "\nname: cylinder\n") {
		t.Errorf("%v, got %.300s", err, two.out)
	}
	page := regimed("", "catalog", "kinds", "cylinder", "--format", "json")
	if !strings.HasPrefix(page.out, `{"name":"kinds",`) || !strings.Contains(page.out, `"count":1,`) {
		t.Errorf("got %.300s", page.out)
	}
}

func TestSchemaIsWhatTheServiceAnswers(t *testing.T) {
	got := regimed("", "schema")
	if want := served(t, http.MethodGet, "/v1/schema/case", ""); got.status != statusMet || got.out != want || !jsontext.Value(got.out).IsValid() {
		t.Errorf("got %.300s, want %.300s", got.out, want)
	}
}
