package page_test

import (
	"bytes"
	"regexp"
	"strings"
	"testing"

	"regimed/api/page"
	"regimed/regime/kind"
)

// largest is how many bytes the whole page may have, uncompressed.
const largest = 300_000

func TestSize(t *testing.T) {
	total := len(page.Examples().Body)
	for name, f := range page.Files() {
		total += len(f.Body)
		if f.MediaType == "" || f.Name != name {
			t.Errorf("%s: media type %q", name, f.MediaType)
		}
	}
	if total > largest {
		t.Errorf("%d bytes", total)
	}
}

// Every kind of structure has a pictogram.
func TestPictograms(t *testing.T) {
	index := string(page.Index().Body)
	for _, k := range kind.All {
		if strings.Count(index, `<symbol id="kind-`+k.Name+`"`) != 1 {
			t.Errorf("no pictogram of %s", k.Name)
		}
	}
}

// Nothing in the page needs what its policy forbids: scripts or styles written
// into it, text taken for HTML, or an address elsewhere.
func TestNothingInline(t *testing.T) {
	forbidden := map[string]*regexp.Regexp{
		".html": regexp.MustCompile(`<style|\sstyle=|\son[a-z]+=|<script[^>]*>[^<]|https?://|javascript:`),
		".js":   regexp.MustCompile(`innerHTML|outerHTML|insertAdjacentHTML|document\.write|\beval\(|new Function|https?://(?:[^w]|w[^w])`),
		".css":  regexp.MustCompile(`url\(|@import|https?://`),
		".svg":  regexp.MustCompile(`<script|\son[a-z]+=`),
	}
	ran := 0
	for name, f := range page.Files() {
		rule := forbidden[name[strings.LastIndex(name, "."):]]
		if found := rule.Find(f.Body); found != nil {
			t.Errorf("%s: %q", name, found)
		}
		ran++
	}
	if ran < 13 {
		t.Errorf("%d files", ran)
	}
}

// What the page refers to is there.
func TestReferences(t *testing.T) {
	files := page.Files()
	reference := regexp.MustCompile(`(?:/sheet/|from '\./)([a-z.]+)`)
	seen := map[string]bool{"index.html": true}
	for _, f := range files {
		for _, m := range reference.FindAllSubmatch(f.Body, -1) {
			seen[string(m[1])] = true
			if _, ok := files[string(m[1])]; !ok {
				t.Errorf("%s refers to %s", f.Name, m[1])
			}
		}
	}
	for name := range files {
		if !seen[name] {
			t.Errorf("nothing refers to %s", name)
		}
	}
}

// A tag says whether a body is another.
func TestTags(t *testing.T) {
	tags := map[string]string{}
	for name, f := range page.Files() {
		if other, twice := tags[f.Tag]; twice {
			t.Errorf("%s and %s have one tag", name, other)
		}
		tags[f.Tag] = name
	}
	if bytes.Equal(page.Index().Body, page.Examples().Body) || page.Index().Tag == page.Examples().Tag {
		t.Error("the page and its examples are one")
	}
}
