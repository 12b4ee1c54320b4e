package render

import (
	"bytes"
	"context"
	"encoding/json"
	"encoding/xml"
	"errors"
	"io"
	"os"
	"path/filepath"
	"testing"

	"go.yaml.in/yaml/v3"
	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// shipped answers every demo case, by the name of its file.
func shipped(t testing.TB) map[string]*regime.Answer {
	t.Helper()
	const folder = "../../testdata/cases/"
	entries, err := os.ReadDir(folder)
	if err != nil {
		t.Fatal(err)
	}
	all := map[string]*regime.Answer{}
	for _, e := range entries {
		end := filepath.Ext(e.Name())
		if end != ".json" && end != ".yaml" {
			continue
		}
		text, err := os.ReadFile(folder + e.Name())
		if err != nil {
			t.Fatal(err)
		}
		if end == ".yaml" {
			var tree any
			if err := yaml.Unmarshal(text, &tree); err != nil {
				t.Fatal(err)
			}
			if text, err = json.Marshal(tree); err != nil {
				t.Fatal(err)
			}
		}
		all[e.Name()] = classifyAll(t, string(text))
	}
	return all
}

// classifyAll answers a case with all that varying its inputs adds, from as few
// draws as are allowed.
func classifyAll(t testing.TB, doc string) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(doc), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%s\n%v %+v", doc, err, bad)
	}
	a, bad, err := whatif.Classify(t.Context(), c, whatif.Options{Samples: whatif.MinSamples, Explore: true})
	if err != nil || len(bad) > 0 {
		t.Fatalf("%s\n%v %+v", doc, err, bad)
	}
	return a
}

// classifyRapid answers a case in a property test, with all that varying its
// inputs adds.
func classifyRapid(t *rapid.T, doc string) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(doc), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%s\n%v %+v", doc, err, bad)
	}
	a, bad, err := whatif.Classify(context.Background(), c, whatif.Options{Samples: whatif.MinSamples, Explore: true})
	if err != nil || len(bad) > 0 {
		t.Fatalf("%v %+v", err, bad)
	}
	return a
}

// checkXML reads a document to its end.
func checkXML(t rapid.TB, doc []byte) {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(doc))
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			return
		}
		if err != nil {
			t.Fatalf("%v in %s", err, doc)
		}
		if e, ok := token.(xml.StartElement); ok && (e.Name.Local == "script" || e.Name.Local == "foreignObject") {
			t.Fatalf("an element %s", e.Name.Local)
		}
	}
}
