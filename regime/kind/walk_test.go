package kind_test

import (
	"encoding/json"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
)

// The walk in DEVELOPERS.md adds a kind by one file and one line. It is built
// here exactly as it stands there, and a case is run through it.
func TestWalkAddsAKind(t *testing.T) {
	paper, err := os.ReadFile("../../DEVELOPERS.md")
	if err != nil {
		t.Fatal(err)
	}
	_, rest, found := strings.Cut(string(paper), "```go\npackage kind")
	code, _, closed := strings.Cut(rest, "```")
	if !found || !closed {
		t.Fatal("DEVELOPERS.md has no walk")
	}
	list, err := os.ReadFile("kinds.go")
	if err != nil {
		t.Fatal(err)
	}
	extended := strings.Replace(string(list), "	Plate,\n", "	Plate,\n	Slab,\n", 1)
	if extended == string(list) {
		t.Fatal("the list of kinds has no place for a line")
	}
	dir := t.TempDir()
	overlay := map[string]map[string]string{"Replace": {
		absolute(t, "slab.go"):  write(t, dir, "slab.go", "package kind"+code),
		absolute(t, "kinds.go"): write(t, dir, "kinds.go", extended),
	}}
	text, err := json.Marshal(overlay)
	if err != nil {
		t.Fatal(err)
	}
	cmd := exec.Command("go", "run", "-overlay", write(t, dir, "overlay.json", string(text)), "../../cmd/regimed", "classify", "--format", "json", "-")
	cmd.Stdin = strings.NewReader(`{"structure":{"kind":"slab","width":"20 mm","mass_per_length":"0.5 kg/m","frequency_dry":"3 Hz"},"fluid":"water"}`)
	out, err := cmd.Output()
	if err != nil {
		t.Fatalf("the walk does not run: %v %s", err, stderr(err))
	}
	var answer struct {
		Groups map[string]struct {
			Value float64 `json:"value"`
		} `json:"groups"`
		Recommendation struct {
			Class string `json:"class"`
		} `json:"recommendation"`
	}
	if err := json.Unmarshal(out, &answer); err != nil {
		t.Fatal(err)
	}
	// ρπb²/4 over 0.5 kg/m in water at 20 °C
	if mu := answer.Groups["added_mass_ratio"].Value; mu < 0.6265 || mu > 0.6275 {
		t.Errorf("added mass ratio %g of the slab, want 0.627", mu)
	}
	if answer.Recommendation.Class != "added-mass" {
		t.Errorf("class %s of the slab", answer.Recommendation.Class)
	}
}

func absolute(t *testing.T, name string) string {
	t.Helper()
	path, err := filepath.Abs(name)
	if err != nil {
		t.Fatal(err)
	}
	return path
}

func write(t *testing.T, dir, name, text string) string {
	t.Helper()
	path := filepath.Join(dir, name)
	if err := os.WriteFile(path, []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
	return path
}

func stderr(err error) string {
	if e, ok := err.(*exec.ExitError); ok {
		return string(e.Stderr)
	}
	return ""
}
