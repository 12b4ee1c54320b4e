package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// outcome is what a run of the program did.
type outcome struct {
	status      int
	out, errOut string
}

func regimed(stdin string, args ...string) outcome {
	var out, errOut bytes.Buffer
	code := run(args, strings.NewReader(stdin), &out, &errOut)
	return outcome{code, out.String(), errOut.String()}
}

// file writes a file into a folder of the test's own and returns its path.
func file(t *testing.T, name, content string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	if err := os.WriteFile(path, []byte(content), 0o600); err != nil {
		t.Fatal(err)
	}
	return path
}

// pile is a steel pile in still water, as JSON and as YAML.
const pileJSON = `{
  "title": "Steel pile in still water",
  "structure": {
    "kind": "cylinder",
    "diameter": "0.5 m",
    "length": "20 m",
    "mass_per_length": "250 kg/m",
    "frequency_dry": "2 Hz",
    "damping_ratio": 0.01
  },
  "fluid": {"name": "water", "temperature": "15 degC"},
  "motion": {"amplitude": "5 mm"}
}
`

const pileYAML = `# the same case
title: Steel pile in still water
structure:
  kind: cylinder
  diameter: 0.5 m
  length: 20 m
  mass_per_length: 250 kg/m
  frequency_dry: 2 Hz
  damping_ratio: .01
fluid: {name: water, temperature: 15 degC}
motion:
  amplitude: 5 mm
`
