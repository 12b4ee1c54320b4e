package main

import (
	"strconv"
	"strings"
	"testing"

	"github.com/go-json-experiment/json/jsontext"
	"pgregory.net/rapid"

	"regimed/regime/input"
)

func TestYAMLScalars(t *testing.T) {
	rows := []struct{ yaml, json string }{
		{`2 m`, `"2 m"`},
		{`yes`, `"yes"`},
		{`on`, `"on"`},
		{`Off`, `"Off"`},
		{`true`, `true`},
		{`False`, `false`},
		{`null`, `null`},
		{`~`, `null`},
		{``, `null`},
		{`"3"`, `"3"`},
		{`'true'`, `"true"`},
		{`!!str 12`, `"12"`},
		{`!!float 12`, `12`},
		{`12`, `12`},
		{`+12`, `12`},
		{`-0`, `-0`},
		{`.5`, `0.5`},
		{`-.5e3`, `-0.5e3`},
		{`1.`, `1`},
		{`1.e5`, `1e5`},
		{`01.50`, `1.50`},
		{`0.30000000000000004`, `0.30000000000000004`},
		{`1.2E+6`, `1.2E+6`},
		{`123456789012345678901234567890`, `123456789012345678901234567890`},
		{`0x10`, `16`},
		{`0o17`, `15`},
		{`1_000`, `"1_000"`},
		{`0b11`, `"0b11"`},
		{`2024-01-01`, `"2024-01-01"`},
		{`12:30:00`, `"12:30:00"`},
		{`1e`, `"1e"`},
		{`-`, `[null]`},
		{`µm, ζ`, `"µm, ζ"`},
		{`"a\tb"`, `"a\tb"`},
		{"|\n  two\n  lines\n", `"two\nlines\n"`},
	}
	ran := 0
	for _, row := range rows {
		got, _, bad, err := yamlToJSON([]byte("k: " + inBlock(row.yaml) + "\n"))
		if err != nil || len(bad) > 0 {
			t.Errorf("%s: %v, %v", row.yaml, bad, err)
			continue
		}
		if want := `{"k":` + row.json + `}`; string(got) != want {
			t.Errorf("%s: got %s, want %s", row.yaml, got, want)
		}
		ran++
	}
	if ran != len(rows) || ran < 35 {
		t.Errorf("ran %d of %d rows", ran, len(rows))
	}
}

// inBlock puts a list on a line of its own, as YAML wants it.
func inBlock(s string) string {
	if s == "-" {
		return "\n- "
	}
	return s
}

func TestYAMLRefusesInPlace(t *testing.T) {
	rows := []struct {
		yaml, pointer string
		code          input.Code
		line          int
	}{
		{"a:\n  b: .nan\n", "/a/b", input.NotFinite, 2},
		{"a: [1, -.inf]\n", "/a/1", input.NotFinite, 1},
		{"a: 010\n", "/a", input.BadQuantity, 1},
		{"x: 1\na/b: !metre 3\n", "/a~1b", input.WrongType, 2},
		{"a: 0xffffffffffffffffff\n", "/a", input.NotFinite, 1},
		{"a: !!binary aGk=\n", "/a", input.WrongType, 1},
	}
	ran := 0
	for _, row := range rows {
		made, at, bad, err := yamlToJSON([]byte(row.yaml))
		if err != nil || len(bad) != 1 {
			t.Errorf("%q: %v, %v", row.yaml, bad, err)
			continue
		}
		if !jsontext.Value(made).IsValid() {
			t.Errorf("%q: made %s", row.yaml, made)
		}
		if bad[0].Pointer != row.pointer || bad[0].Code != row.code || at.find(row.pointer, 0) != row.line {
			t.Errorf("%q: got %+v on line %d", row.yaml, bad[0], at.find(row.pointer, 0))
		}
		ran++
	}
	if ran != 6 {
		t.Errorf("ran %d rows", ran)
	}
}

func TestYAMLRefusesDocuments(t *testing.T) {
	bomb := "a: &a [x, x, x, x, x, x, x, x, x]\n"
	for c := 'b'; c < 'k'; c++ {
		bomb += string(c) + ": &" + string(c) + " [" + strings.Repeat("*"+string(c-1)+", ", 8) + "*" + string(c-1) + "]\n"
	}
	rows := []struct{ name, yaml, want string }{
		{"empty", "", "empty"},
		{"only a comment", "# nothing\n", "empty"},
		{"two documents", "a: 1\n---\nb: 2\n", "second document"},
		{"bad indentation", "a: 1\n  b: 2\n", "line 2"},
		{"a name that is a list", "? [a, b]\n: 1\n", "name must be a word"},
		{"a list that contains itself", "a: &a [*a]\n", "contains itself"},
		{"an unknown alias", "a: *b\n", "unknown anchor"},
		{"aliases of aliases", bomb, "larger than 1 MiB"},
		{"deep", "a: " + strings.Repeat("[", 200) + strings.Repeat("]", 200) + "\n", "levels deep"},
	}
	ran := 0
	for _, row := range rows {
		_, _, _, err := yamlToJSON([]byte(row.yaml))
		if err == nil || !strings.Contains(err.Error(), row.want) {
			t.Errorf("%s: got %v, want %q in it", row.name, err, row.want)
		}
		ran++
	}
	if ran != 9 {
		t.Errorf("ran %d rows", ran)
	}
}

// A name that is given twice must reach the decoder of cases, which refuses it.
func TestYAMLKeepsDuplicates(t *testing.T) {
	got, at, bad, err := yamlToJSON([]byte("a: 1\nb: 2\na: 3\n"))
	if err != nil || len(bad) > 0 || string(got) != `{"a":1,"b":2,"a":3}` {
		t.Fatalf("got %s, %v, %v", got, bad, err)
	}
	if at.find("/a", 0) != 1 || at.find("/a", 1) != 3 {
		t.Errorf("lines of /a: %v", at["/a"])
	}
}

func TestYAMLAliasesAreWrittenOut(t *testing.T) {
	got, _, bad, err := yamlToJSON([]byte("a: &x {v: 1}\nb: *x\n"))
	if err != nil || len(bad) > 0 || string(got) != `{"a":{"v":1},"b":{"v":1}}` {
		t.Errorf("got %s, %v, %v", got, bad, err)
	}
}

// JSON is YAML: read either way it says the same, on the same lines.
func TestJSONIsYAML(t *testing.T) {
	fromYAML, atYAML, bad, err := yamlToJSON([]byte(pileJSON))
	if err != nil || len(bad) > 0 {
		t.Fatal(bad, err)
	}
	compact := jsontext.Value(pileJSON)
	if err := compact.Compact(); err != nil {
		t.Fatal(err)
	}
	if string(fromYAML) != string(compact) {
		t.Errorf("got  %s\nwant %s", fromYAML, compact)
	}
	atJSON, err := linesOfJSON([]byte(pileJSON))
	if err != nil {
		t.Fatal(err)
	}
	ran := 0
	for pointer := range atYAML {
		if got, want := atJSON.find(pointer, 0), atYAML.find(pointer, 0); got != want {
			t.Errorf("%s: line %d as JSON, %d as YAML", pointer, got, want)
		}
		ran++
	}
	if ran != 13 {
		t.Errorf("compared %d pointers", ran)
	}
}

func TestLinesOfJSON(t *testing.T) {
	at, err := linesOfJSON([]byte("{\n\"a\":\n [1,\n {\"b\": 2}],\n\"a\": {}, \"c~/d\": null}"))
	if err != nil {
		t.Fatal(err)
	}
	rows := []struct {
		pointer   string
		nth, line int
	}{{"/a", 0, 2}, {"/a/0", 0, 3}, {"/a/1", 0, 4}, {"/a/1/b", 0, 4}, {"/a", 1, 5}, {"/c~0~1d", 0, 5}, {"/a/1/missing", 0, 4}, {"", 0, 1}}
	ran := 0
	for _, row := range rows {
		if got := at.find(row.pointer, row.nth); got != row.line {
			t.Errorf("%q (%d): line %d, want %d", row.pointer, row.nth, got, row.line)
		}
		ran++
	}
	if ran != 8 {
		t.Errorf("ran %d rows", ran)
	}
}

// Whatever is read as YAML comes out as valid JSON, or is refused; a number
// keeps its value.
func TestYAMLNumbersKeepTheirValue(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.StringMatching(`[-+]?(\.[0-9]{1,5}|[0-9]{1,5}(\.[0-9]{0,5})?)([eE][-+]?[0-9]{1,2})?`).Draw(t, "number")
		w := &yamlWriter{at: lines{}}
		w.plain(s, "")
		if w.bad.Any() {
			if !leadingZero.MatchString(s) {
				t.Fatalf("%s refused: %v", s, w.bad.List())
			}
			return
		}
		want, got := parse(t, s), parse(t, string(w.out))
		if !jsontext.Value(w.out).IsValid() || want != got {
			t.Fatalf("%s became %s", s, w.out)
		}
	})
}

func parse(t *rapid.T, s string) float64 {
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

func TestYAMLMakesValidJSON(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		made, _, _, err := yamlToJSON([]byte(rapid.StringOfN(rapid.RuneFrom([]rune("ab:-#&*!|>'\"[]{}, \n~.0x1e%@?")), 0, 60, -1).Draw(t, "document")))
		if err != nil {
			return
		}
		if v := jsontext.Value(made); !v.IsValid(jsontext.AllowDuplicateNames(true)) {
			t.Fatalf("made %s", made)
		}
	})
}
