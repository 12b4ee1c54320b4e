package regime_test

import (
	"go/parser"
	"go/token"
	"io/fs"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
)

const module = "regimed/"

// allowed is the graph of imports of the core: for each package those of the
// module that it may import. A new edge has to be decided here.
//
// Data flows one way, from input over scales and groups to findings and the
// recommendation; and what judges knows no unit.
var allowed = map[string][]string{
	"units":             {},
	"regime/cite":       {},
	"regime/group":      {},
	"regime/canon":      {"regime/cite"},
	"regime/fluid":      {"regime/cite"},
	"regime/solid":      {"regime/cite"},
	"regime/input":      {"units"},
	"regime/scale":      {"units"},
	"regime/finding":    {"regime/cite", "regime/group"},
	"regime/criterion":  {"regime/canon", "regime/cite", "regime/finding", "regime/group"},
	"regime/assumption": {"regime/canon", "regime/cite", "regime/criterion", "regime/finding", "regime/group"},
	"regime/ladder":     {"regime/assumption", "regime/finding", "regime/group"},
	"regime/kind": {"regime/canon", "regime/criterion", "regime/finding", "regime/fluid", "regime/group", "regime/input",
		"regime/scale", "regime/solid", "units"},
	"regime/setup": {"regime/canon", "regime/cite", "regime/group", "regime/ladder", "regime/scale", "units"},
	"regime": {"regime/assumption", "regime/finding", "regime/group", "regime/input", "regime/kind", "regime/ladder",
		"regime/scale", "regime/setup"},
	"regime/similar": {"regime", "regime/assumption", "regime/finding", "regime/group", "regime/input", "regime/kind", "regime/ladder",
		"regime/scale", "units"},
	"regime/whatif": {"regime", "regime/assumption", "regime/finding", "regime/group", "regime/input", "regime/kind",
		"regime/ladder", "regime/scale", "regime/setup", "units"},
}

// outside are modules of others that the core may import, by package.
var outside = map[string][]string{
	"units":          {"gonum.org/v1/gonum/"},
	"regime/canon":   {"gonum.org/v1/gonum/"},
	"regime/input":   {"github.com/go-json-experiment/json", "github.com/go-playground/validator/"},
	"regime/similar": {"github.com/go-json-experiment/json"},
	"regime/whatif":  {"github.com/go-json-experiment/json", "gonum.org/v1/gonum/"},
}

// unitless are the packages that judge: none of them may reach, over however
// many imports, one that knows a unit or a case.
var unitless = []string{"regime/group", "regime/canon", "regime/cite", "regime/finding", "regime/criterion", "regime/assumption", "regime/ladder"}

var knowsUnits = []string{"units", "regime/input", "regime/scale", "regime/fluid", "regime/solid", "regime/kind", "regime/setup", "regime"}

// imports reads the imports of every package of the module, tests left out.
func imports(t *testing.T) map[string]map[string]bool {
	t.Helper()
	root, err := filepath.Abs("..")
	if err != nil {
		t.Fatal(err)
	}
	graph := map[string]map[string]bool{}
	err = filepath.WalkDir(root, func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && (strings.HasPrefix(d.Name(), ".") || d.Name() == "testdata" || d.Name() == "node_modules") && name != root {
			return filepath.SkipDir
		}
		if d.IsDir() || !strings.HasSuffix(name, ".go") || strings.HasSuffix(name, "_test.go") {
			return nil
		}
		dir, err := filepath.Rel(root, filepath.Dir(name))
		if err != nil {
			return err
		}
		dir = filepath.ToSlash(dir)
		if graph[dir] == nil {
			graph[dir] = map[string]bool{}
		}
		return importsOf(name, graph[dir])
	})
	if err != nil {
		t.Fatal(err)
	}
	return graph
}

func importsOf(name string, into map[string]bool) error {
	src, err := os.ReadFile(name)
	if err != nil {
		return err
	}
	f, err := parser.ParseFile(token.NewFileSet(), name, src, parser.ImportsOnly)
	if err != nil {
		return err
	}
	for _, s := range f.Imports {
		p, err := strconv.Unquote(s.Path.Value)
		if err != nil {
			return err
		}
		into[p] = true
	}
	return nil
}

// own returns the imports that belong to the module, sorted.
func own(imports map[string]bool) []string {
	list := []string{}
	for p := range imports {
		if inner, ok := strings.CutPrefix(p, module); ok {
			list = append(list, inner)
		}
	}
	slices.Sort(list)
	return list
}

func isCore(dir string) bool {
	return dir == "units" || dir == "regime" || strings.HasPrefix(dir, "regime/")
}

// The core imports what the table says, and nothing else.
func TestImportsOfTheCore(t *testing.T) {
	graph := imports(t)
	rows := 0
	for dir, list := range graph {
		if !isCore(dir) {
			continue
		}
		want, known := allowed[dir]
		if !known {
			t.Errorf("package %s is not in the table of imports", dir)
			continue
		}
		rows++
		if got := own(list); !slices.Equal(got, want) {
			t.Errorf("%s imports %v; the table says %v", dir, got, want)
		}
		for p := range list {
			if strings.Contains(p, ".") && !hasPrefix(p, outside[dir]) {
				t.Errorf("%s imports %s", dir, p)
			}
		}
	}
	if rows != len(allowed) {
		t.Errorf("%d packages of the core read, %d in the table", rows, len(allowed))
	}
}

func hasPrefix(p string, prefixes []string) bool {
	return slices.ContainsFunc(prefixes, func(prefix string) bool { return strings.HasPrefix(p, prefix) })
}

// What judges cannot reach a unit: Buckingham's theorem as a rule of imports.
func TestWhatJudgesKnowsNoUnit(t *testing.T) {
	graph := imports(t)
	for _, dir := range unitless {
		if graph[dir] == nil {
			t.Errorf("no package %s", dir)
			continue
		}
		for reached := range reach(graph, dir) {
			if slices.Contains(knowsUnits, reached) {
				t.Errorf("%s reaches %s", dir, reached)
			}
		}
	}
}

// reach returns every package of the module that one imports, over others too.
func reach(graph map[string]map[string]bool, dir string) map[string]bool {
	seen := map[string]bool{}
	next := own(graph[dir])
	for len(next) > 0 {
		p := next[0]
		next = next[1:]
		if !seen[p] {
			seen[p] = true
			next = append(next, own(graph[p])...)
		}
	}
	return seen
}

// The core knows nothing of transport, of a format or of the command line; and
// only the command line imports what it is made of.
func TestLayers(t *testing.T) {
	graph := imports(t)
	for _, dir := range slices.Sorted(maps.Keys(graph)) {
		for reached := range reach(graph, dir) {
			top, _, _ := strings.Cut(reached, "/")
			if isCore(dir) && !isCore(reached) {
				t.Errorf("%s, of the core, reaches %s", dir, reached)
			}
			if top == "cmd" {
				t.Errorf("%s imports the command %s", dir, reached)
			}
		}
	}
	if len(graph) < len(allowed)+3 {
		t.Errorf("only %d packages read", len(graph))
	}
}
