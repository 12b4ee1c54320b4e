package main

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"

	"regimed/api"
)

const mapShipped = "../../testdata/cases/outfall-span.json"

// The ending of the file says what is written; its name is printed.
func TestMapIsWritten(t *testing.T) {
	rows := map[string]string{"map.svg": "<?xml", "map.PNG": "\x89PNG", "map.json": `{"engine"`}
	for name, begins := range rows {
		path := filepath.Join(t.TempDir(), name)
		got := regimed("", "map", mapShipped, "--x", "flow.speed=0.2..2 m/s:log", "-y", "structure.length=10..60 m", "-o", path, "--width", "120")
		if got.status != statusMet || got.out != path+"\n" || got.errOut != "" {
			t.Fatalf("status %d: %s%s", got.status, got.out, got.errOut)
		}
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		if !strings.HasPrefix(string(data), begins) {
			t.Errorf("%s begins with %.20q", name, data)
		}
		if name != "map.json" {
			continue
		}
		var m api.MapRecord
		if err := json.Unmarshal(data, &m); err != nil || len(m.Regions) == 0 || m.Y.To != 60 {
			t.Errorf("%d regions, y to %v: %v", len(m.Regions), m.Y.To, err)
		}
	}
	if len(rows) != 3 {
		t.Errorf("ran %d rows", len(rows))
	}
}

func TestMapRefuses(t *testing.T) {
	none := filepath.Join(t.TempDir(), "none.svg")
	good := []string{"--x", "flow.speed=0.2..2 m/s", "--y", "structure.length"}
	rows := []struct {
		args []string
		want []string
	}{
		{[]string{mapShipped, "-o", none}, []string{"a map needs --x and --y"}},
		{append([]string{mapShipped}, good...), []string{"--output names the file"}},
		{append([]string{mapShipped, "-o", "map.pdf"}, good...), []string{`not in ".pdf"`}},
		{append([]string{mapShipped, "-o", none, "--width", "12"}, good...), []string{"--width is from 80 to 400"}},
		{append([]string{"no-such-file.json", "-o", none}, good...), []string{"no-such-file.json"}},
		{[]string{mapShipped, "-o", none, "--x", "flow.sped=0.2..2 m/s", "--y", "structure.length=1..2 kg"}, []string{"flow.speed?", "--y \"structure.length=1..2 kg\": wrong-dimension"}},
		{[]string{mapShipped, "-o", none, "--x", "flow.speed", "--y", "flow.speed"}, []string{"--y \"flow.speed\": contradiction"}},
		{[]string{mapShipped, "-o", none, "--x", "flow.speed=1..2 m/s", "--y", "fluid.temperature=90..150 degC"}, []string{"outfall-span.json:16: /fluid/temperature: out-of-range"}},
	}
	for _, r := range rows {
		got := regimed("", append([]string{"map"}, r.args...)...)
		if got.status != statusRefuse || got.out != "" {
			t.Errorf("%v: status %d, %s", r.args, got.status, got.out)
		}
		for _, w := range r.want {
			if !strings.Contains(got.errOut, w) {
				t.Errorf("%v: %q is not in %q", r.args, w, got.errOut)
			}
		}
		if _, err := os.Stat(none); err == nil {
			t.Fatalf("%v wrote a file", r.args)
		}
	}
	if len(rows) != 8 {
		t.Errorf("ran %d rows", len(rows))
	}
}

// Standard input will do, and what the service answers is what the file holds.
func TestMapIsThatOfTheService(t *testing.T) {
	text, err := os.ReadFile(mapShipped)
	if err != nil {
		t.Fatal(err)
	}
	path := filepath.Join(t.TempDir(), "map.json")
	got := regimed(string(text), "map", "-", "--x", "flow.speed=0.2..2 m/s:log", "--y", "structure.length=10..60 m", "-o", path)
	if got.status != statusMet {
		t.Fatal(got.errOut)
	}
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	body := `{"case": ` + string(text) + `, "x": "flow.speed=0.2..2 m/s:log", "y": {"input": "structure.length", "from": "10 m", "to": "60 m"}}`
	if answer := served(t, "POST", "/v1/map?format=json", body); answer != string(data) {
		t.Errorf("the service answers %.300s, the file holds %.300s", answer, data)
	}
}
