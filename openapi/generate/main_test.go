package main

import (
	"fmt"
	"math"
	"os"
	"reflect"
	"testing"

	"go.yaml.in/yaml/v3"
)

// The contract in the repository is what the generator makes of it: schemas
// are those of the engine, examples what the server answers. Numbers may differ
// in their last digits, since processors round differently.
func TestContractIsUpToDate(t *testing.T) {
	old, err := os.ReadFile("../openapi.yaml")
	if err != nil {
		t.Fatal(err)
	}
	made, err := generate(old, "../examples")
	if err != nil {
		t.Fatal(err)
	}
	if string(old) == string(made) {
		return
	}
	var was, is any
	if err := yaml.Unmarshal(old, &was); err != nil {
		t.Fatal(err)
	}
	if err := yaml.Unmarshal(made, &is); err != nil {
		t.Fatal(err)
	}
	if at := difference("", was, is); at != "" {
		t.Errorf("openapi.yaml is out of date at %s: run go generate ./openapi", at)
	}
}

// difference is the place where two documents first differ, empty where none.
func difference(at string, a, b any) string {
	if x, ok := asNumber(a); ok {
		if y, isNumber := asNumber(b); isNumber && math.Abs(x-y) <= 1e-9*math.Max(math.Abs(x), math.Abs(y)) {
			return ""
		}
	}
	switch x := a.(type) {
	case map[string]any:
		y, ok := b.(map[string]any)
		if !ok || len(x) != len(y) {
			return at + "/"
		}
		for name := range x {
			if d := difference(at+"/"+name, x[name], y[name]); d != "" {
				return d
			}
		}
		return ""
	case []any:
		y, ok := b.([]any)
		if !ok || len(x) != len(y) {
			return at + "/"
		}
		for i := range x {
			if d := difference(fmt.Sprintf("%s/%d", at, i), x[i], y[i]); d != "" {
				return d
			}
		}
		return ""
	}
	if reflect.DeepEqual(a, b) {
		return ""
	}
	return at
}

func asNumber(v any) (float64, bool) {
	switch x := v.(type) {
	case int:
		return float64(x), true
	case float64:
		return x, true
	}
	return 0, false
}

func TestDifference(t *testing.T) {
	rows := []struct {
		a, b any
		want string
	}{
		{1, 1.0, ""},
		{1.0, 1 + 1e-12, ""},
		{1.0, 1.001, "."},
		{"a", "b", "."},
		{map[string]any{"x": []any{1, 2}}, map[string]any{"x": []any{1, 3}}, "./x/1"},
		{map[string]any{"x": 1}, map[string]any{"y": 1}, "./x"},
		{[]any{1}, []any{1, 2}, "./"},
		{nil, nil, ""},
		{"1", 1, "."},
	}
	for _, row := range rows {
		if got := difference(".", row.a, row.b); got != row.want {
			t.Errorf("%v and %v differ at %q, wanted %q", row.a, row.b, got, row.want)
		}
	}
	if len(rows) != 9 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestMarksAreNeeded(t *testing.T) {
	if _, err := replace([]byte("nothing"), "schemas", nil); err == nil {
		t.Error("no error")
	}
	made, err := replace([]byte("    # generated x: begin\nold\n    # generated x: end\n"), "x", []byte("new\n"))
	if want := "    # generated x: begin\nnew\n    # generated x: end\n"; err != nil || string(made) != want {
		t.Errorf("%v: %s", err, made)
	}
}
