package openapi

import (
	"testing"

	"github.com/go-json-experiment/json"
	"go.yaml.in/yaml/v3"
)

// Both forms say the same.
func TestJSONIsTheYAML(t *testing.T) {
	var fromYAML, fromJSON any
	if err := yaml.Unmarshal(YAML(), &fromYAML); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(JSON(), &fromJSON); err != nil {
		t.Fatal(err)
	}
	one, err := json.Marshal(fromYAML, json.Deterministic(true))
	if err != nil {
		t.Fatal(err)
	}
	two, err := json.Marshal(fromJSON, json.Deterministic(true))
	if err != nil {
		t.Fatal(err)
	}
	if string(one) != string(two) {
		t.Error("the two forms differ")
	}
}

// What is handed out is a copy.
func TestCopies(t *testing.T) {
	YAML()[0], JSON()[0] = 'x', 'x'
	if YAML()[0] == 'x' || JSON()[0] == 'x' {
		t.Error("a caller can change the contract")
	}
}
