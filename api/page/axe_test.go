package page_test

import (
	"archive/tar"
	"compress/gzip"
	"crypto/sha512"
	"encoding/base64"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"regimed/api/browsertest"
)

// The checker of accessibility, fetched from the npm registry and never kept in
// the repository. Its integrity is that which the registry states.
const (
	axeVersion   = "4.14.1"
	axeIntegrity = "sha512-FHfa+lmNjQZfJz1q8wKqIDwC6DExcHt/pkjNQb09a3NPjCKg2rhu5qb2S4r76ASyFNNtuFooJpZe37OgudVGtQ=="
)

// axe is the script of the checker.
func axe(t *testing.T) string {
	t.Helper()
	kept := filepath.Join(os.TempDir(), "axe-core-"+axeVersion+".tgz")
	if data, err := os.ReadFile(kept); err != nil || integrity(data) != axeIntegrity {
		fetchAxe(t, kept)
	}
	data, err := os.ReadFile(kept)
	if err != nil {
		t.Fatal(err)
	}
	if got := integrity(data); got != axeIntegrity {
		t.Fatalf("axe-core %s has the integrity %s", axeVersion, got)
	}
	script, err := unpack(string(data), "package/axe.min.js")
	if err != nil {
		t.Fatal(err)
	}
	return script
}

// fetchAxe puts the package at a place, in one move: other tests may look there.
func fetchAxe(t *testing.T, place string) {
	t.Helper()
	folder := t.TempDir()
	cmd := exec.Command("npm", "pack", "axe-core@"+axeVersion, "--pack-destination", folder)
	if out, err := cmd.CombinedOutput(); err != nil {
		browsertest.Missing(t, fmt.Sprintf("npm pack axe-core@%s: %v: %s", axeVersion, err, out))
	}
	data, err := os.ReadFile(filepath.Join(folder, "axe-core-"+axeVersion+".tgz"))
	if err != nil {
		t.Fatal(err)
	}
	part := place + fmt.Sprintf(".%d", os.Getpid())
	if err := errors.Join(os.WriteFile(part, data, 0o600), os.Rename(part, place)); err != nil {
		t.Fatal(err)
	}
}

func integrity(data []byte) string {
	sum := sha512.Sum512(data)
	return "sha512-" + base64.StdEncoding.EncodeToString(sum[:])
}

// unpack returns one file of a compressed archive.
func unpack(archive, name string) (string, error) {
	z, err := gzip.NewReader(strings.NewReader(archive))
	if err != nil {
		return "", err
	}
	for r := tar.NewReader(z); ; {
		h, err := r.Next()
		if err != nil {
			return "", err
		}
		if h.Name == name {
			data, err := io.ReadAll(r)
			return string(data), err
		}
	}
}

// runAxe reports what the checker finds: every rule that it has, that of the size
// of targets included.
const runAxe = `axe.run(document, {resultTypes: ["violations"], rules: {"target-size": {enabled: true}}}).then((r) => {
	const list = r.violations.flatMap((v) => v.nodes.map((n) => v.id + ": " + n.html.slice(0, 160) + " " + n.failureSummary.replaceAll("\n", " ")));
	return [r.passes.length, ...list].join("\n");
})`

// accessible holds the page as it stands against the rules.
func (p *tab) accessible(name string) {
	p.t.Helper()
	found := strings.Split(p.text(runAxe), "\n")
	for _, f := range found[1:] {
		p.t.Errorf("%s: %s", name, f)
	}
	if len(found[0]) < 2 { // under ten rules
		p.t.Errorf("%s: only %s rules passed", name, found[0])
	}
}

// No rule of the checker is broken: on the empty page, with a case, with all
// folds open, with what an answer may hold, and with violations; in light and in
// dark colours, on a screen and on a phone.
func TestAccessible(t *testing.T) {
	script := axe(t)
	for _, row := range []struct {
		name  string
		width int64
		dark  bool
	}{{"light", wide, false}, {"dark", wide, true}, {"phone", 360, false}} {
		p := open(t, "/", row.width)
		if row.dark {
			p.dark()
		}
		p.text("(() => { " + script + " })()")
		p.state("empty")
		p.accessible(row.name + ", empty")
		p.text(uncertain)
		p.until(`document.querySelector(".chances")`)
		p.answered()
		p.text(`document.querySelector("#map-draw").click()`)
		p.until(`document.querySelector(".map img")?.complete`)
		p.accessible(row.name + ", answered")
		p.text(`document.querySelector("#copy-markdown").click()`)
		p.until(`document.querySelector("#copied").value`)
		p.text(`document.querySelectorAll("details").forEach((d) => { d.open = true; })`)
		p.accessible(row.name + ", unfolded")
		p.text(`[["f-structure-diameter", "3 kg"], ["f-structure-length", "many"]].forEach(([id, value]) => {
			const input = document.getElementById(id);
			input.value = value;
			input.dispatchEvent(new Event("input"));
		})`)
		p.state("refused")
		p.until(`document.querySelectorAll("[aria-invalid]").length === 2`)
		p.text(`document.querySelectorAll("#answer details, .more").forEach((d) => { d.open = false; })`)
		p.accessible(row.name + ", with violations")
	}
}
