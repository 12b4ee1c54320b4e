package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"regimed/regime/kind"
	"regimed/regime/ladder"
)

// Every shipped case gets the class that expect.csv gives it, with the reason
// beside it, and every case of the folder stands there.
func TestShippedCases(t *testing.T) {
	const dir = "../../testdata/cases"
	file, err := os.Open(filepath.Join(dir, "expect.csv"))
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	rows, err := csv.NewReader(file).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	listed, classes := map[string]bool{}, map[string]bool{}
	for _, row := range rows[1:] {
		name, class, more, reason := row[0], row[1], row[2], row[3]
		if reason == "" {
			t.Errorf("%s has no reason", name)
		}
		listed[name], classes[class] = true, true
		args := []string{"check", "--quiet", filepath.Join(dir, name), "--expect", "class=" + class}
		for e := range strings.SplitSeq(more, ";") {
			if e = strings.TrimSpace(e); e != "" {
				args = append(args, "--expect", e)
			}
		}
		met(t, args)
	}
	for _, name := range caseFiles(t, dir) {
		if !listed[filepath.Base(name)] {
			t.Errorf("%s is expected of nothing", name)
		}
	}
	if len(listed) < 12 {
		t.Errorf("%d shipped cases", len(listed))
	}
	for _, class := range reachable(t) {
		if !classes[class] {
			t.Errorf("no shipped case gets the class %s", class)
		}
	}
	t.Logf("%d cases, %d classes", len(listed), len(classes))
}

// Published situations keep the facts that their sources state.
func TestPublishedSituations(t *testing.T) {
	kinds, expectations := map[string]int{}, 0
	for _, name := range caseFiles(t, "../../testdata/published") {
		text, err := os.ReadFile(name)
		if err != nil {
			t.Fatal(err)
		}
		var situation struct {
			Source string
			Case   struct{ Structure struct{ Kind string } }
			Expect []string
		}
		if err := json.Unmarshal(text, &situation); err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		if situation.Source == "" || len(situation.Expect) == 0 {
			t.Errorf("%s has no source, or expects nothing", name)
		}
		kinds[situation.Case.Structure.Kind]++
		expectations += len(situation.Expect)
		met(t, []string{"check", "--quiet", name})
	}
	for _, kind := range kindNames() {
		if kinds[kind] < 3 {
			t.Errorf("%d published situations of the kind %s", kinds[kind], kind)
		}
	}
	t.Logf("%d expectations met; by kind %v", expectations, kinds)
}

func met(t *testing.T, args []string) {
	t.Helper()
	var out, errs bytes.Buffer
	if status := run(args, strings.NewReader(""), &out, &errs); status != 0 {
		t.Errorf("status %d\n%s%s", status, &out, &errs)
	}
}

func caseFiles(t *testing.T, dir string) []string {
	t.Helper()
	var all []string
	for _, pattern := range []string{"*.json", "*.yaml"} {
		names, err := filepath.Glob(filepath.Join(dir, pattern))
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, names...)
	}
	return all
}

func kindNames() []string {
	var names []string
	for _, k := range kind.All {
		names = append(names, k.Name)
	}
	return names
}

// reachable lists the classes: every one must be met by a case.
func reachable(t *testing.T) []string {
	t.Helper()
	var ids []string
	for i := range ladder.Classes {
		ids = append(ids, ladder.Classes[i].ID)
	}
	if len(ids) < 16 {
		t.Errorf("%d classes", len(ids))
	}
	return ids
}
