package whatif

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/units"
)

// planOf makes a plan from a case and axes as texts.
func planOf(t testing.TB, c *input.Case, columns []string, axes ...string) *Plan {
	t.Helper()
	p, violations := NewPlan(c, axesOf(t, c, axes...), columnsOf(t, columns...))
	if len(violations) > 0 {
		t.Fatal(violations)
	}
	return p
}

func axesOf(t testing.TB, c *input.Case, texts ...string) []Axis {
	t.Helper()
	var list []Axis
	for _, text := range texts {
		a, err := ParseAxis(c, text)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, a)
	}
	return list
}

func columnsOf(t testing.TB, names ...string) []Column {
	t.Helper()
	var list []Column
	for _, name := range names {
		c, err := FindColumn(name)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, c)
	}
	return list
}

// rowsOf runs part of a plan and keeps its rows.
func rowsOf(t testing.TB, p *Plan, from, to int64) []Row {
	t.Helper()
	var all []Row
	err := p.Run(context.Background(), from, to, func(rows []Row) error {
		for _, r := range rows {
			r.Axes, r.Cells = slices.Clone(r.Axes), slices.Clone(r.Cells)
			all = append(all, r)
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	return all
}

func sameCell(a, b Cell) bool {
	return a.Text == b.Text && (a.Number == b.Number || math.IsNaN(a.Number) && math.IsNaN(b.Number))
}

func sameRow(a, b Row) bool {
	return a.Index == b.Index && a.Problem == b.Problem && slices.EqualFunc(a.Axes, b.Axes, sameCell) && slices.EqualFunc(a.Cells, b.Cells, sameCell)
}

// shipped are the demo cases, as JSON.
func shipped(t testing.TB) map[string][]byte {
	t.Helper()
	files, err := filepath.Glob("../../testdata/cases/*.json")
	if err != nil || len(files) < 40 {
		t.Fatalf("%d files: %v", len(files), err)
	}
	all := map[string][]byte{}
	for _, file := range files {
		data, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		all[filepath.Base(file)] = data
	}
	return all
}

// substitute writes a case anew with other quantities at some places, the way a
// caller would: in JSON.
func substitute(t *rapid.T, data []byte, axes []Axis, row *Row) []byte {
	var doc map[string]any
	if err := json.Unmarshal(data, &doc); err != nil {
		t.Fatal(err)
	}
	for k := range axes {
		p := axes[k].Place
		steps := strings.Split(p.Path(), ".")
		var value any = row.Axes[k].Number
		if p.Kind() != units.Dimensionless && p.Field.Type != input.Number {
			value = map[string]any{"value": value, "unit": p.Kind().SI()}
		}
		put(doc, steps, value)
	}
	out, err := json.Marshal(doc)
	if err != nil {
		t.Fatal(err)
	}
	return out
}

func put(node any, steps []string, value any) {
	last := len(steps) == 1
	switch n := node.(type) {
	case map[string]any:
		if last {
			n[steps[0]] = value
			return
		}
		put(n[steps[0]], steps[1:], value)
	case []any:
		i, _ := strconv.Atoi(steps[0])
		if last {
			n[i] = value
			return
		}
		put(n[i], steps[1:], value)
	}
}

// stands reports whether a place stands where its path says: a range in service
// can be written elsewhere.
func stands(data []byte, p input.Place) bool {
	var node any
	if json.Unmarshal(data, &node) != nil {
		return false
	}
	for _, step := range strings.Split(p.Path(), ".") {
		switch n := node.(type) {
		case map[string]any:
			node = n[step]
		case []any:
			i, err := strconv.Atoi(step)
			if err != nil || i >= len(n) {
				return false
			}
			node = n[i]
		}
	}
	return node != nil
}

// Each row of a sweep is what the engine says to the case written anew with the
// values of that row.
func TestRowsAreWhatClassifySays(t *testing.T) {
	cases := shipped(t)
	files := make([]string, 0, len(cases))
	for f := range cases {
		files = append(files, f)
	}
	slices.Sort(files)
	names := slices.DeleteFunc(ColumnNames(), func(name string) bool { return strings.HasPrefix(name, "probability.") })
	judged, problems := 0, 0
	rapid.Check(t, func(t *rapid.T) {
		data := cases[rapid.SampledFrom(files).Draw(t, "case")]
		c, _, err := input.Decode(data, kind.Schema())
		if err != nil || c == nil {
			t.Fatal(err)
		}
		axes := drawAxes(t, data, c)
		var columns []Column
		for _, name := range rapid.SliceOfNDistinct(rapid.SampledFrom(names), 1, 12, rapid.ID).Draw(t, "columns") {
			column, err := FindColumn(name)
			if err != nil {
				t.Fatal(err)
			}
			columns = append(columns, column)
		}
		p, violations := NewPlan(c, axes, columns)
		if len(violations) > 0 {
			t.Fatal(violations)
		}
		from := rapid.Int64Range(0, p.Total()-1).Draw(t, "from")
		err = p.Run(context.Background(), from, min(from+3, p.Total()), func(rows []Row) error {
			for i := range rows {
				judged++
				if rows[i].Problem != "" {
					problems++
				}
				checkRow(t, p, substitute(t, data, axes, &rows[i]), &rows[i])
			}
			return nil
		})
		if err != nil {
			t.Fatal(err)
		}
	})
	if judged < 100 || problems > judged/2 {
		t.Errorf("%d rows, %d with a problem", judged, problems)
	}
}

// drawAxes varies some of the numbers that a case gives around their values.
func drawAxes(t *rapid.T, data []byte, c *input.Case) []Axis {
	places := slices.DeleteFunc(c.Places(), func(p input.Place) bool {
		return p.Field.Type == input.Integer || c.At(p).Value == 0 || c.At(p).Gauge || !stands(data, p)
	})
	var axes []Axis
	for _, at := range rapid.SliceOfNDistinct(rapid.IntRange(0, len(places)-1), 1, min(len(places), MaxAxes), rapid.ID).Draw(t, "places") {
		x := c.At(places[at]).Value
		a := Axis{Place: places[at], points: rapid.Int64Range(2, 5).Draw(t, "points"), log: x > 0 && rapid.Bool().Draw(t, "log"),
			from: x * rapid.Float64Range(0.5, 1).Draw(t, "from"), to: x * rapid.Float64Range(1, 2).Draw(t, "to")}
		axes = append(axes, a)
	}
	return axes
}

// checkRow compares a row with the answer to a case.
func checkRow(t *rapid.T, p *Plan, data []byte, row *Row) {
	c, bad, err := input.Decode(data, kind.Schema())
	if err != nil {
		t.Fatal(err)
	}
	var a *regime.Answer
	if len(bad) == 0 {
		a, bad = regime.Classify(c)
	}
	if (len(bad) > 0) != (row.Problem != "") {
		t.Fatalf("%s: %v, and the row %q", data, bad, row.Problem)
	}
	for k := range p.Columns {
		want := Cell{Number: math.NaN()}
		switch col := &p.Columns[k]; {
		case len(bad) > 0:
		case col.Text != nil:
			want.Text = col.Text(a)
		default:
			want.Number, _ = col.Number(a)
		}
		if !sameCell(row.Cells[k], want) {
			t.Fatalf("%s: %s is %v, want %v", data, p.Columns[k].Name, row.Cells[k], want)
		}
	}
}

// The last axis varies fastest, and the shards in order are the whole.
func TestShardsAreTheWhole(t *testing.T) {
	c := decoded(t, rod)
	p := planOf(t, c, []string{"class", "reynolds", "one-way.utilisation"}, "fluid.name=water,air,seawater", "flow.speed=0.5..2 m/s:20", "structure.diameter=0.02..0.05 m:7:log")
	whole := rowsOf(t, p, 0, p.Total())
	if len(whole) != 3*20*7 {
		t.Fatalf("%d rows", len(whole))
	}
	for i, r := range whole {
		if r.Index != int64(i) || r.Axes[0].Text != p.Axes[0].Text(int64(i/140)) || r.Axes[1].Number != p.Axes[1].X(int64(i/7%20)) || r.Axes[2].Number != p.Axes[2].X(int64(i%7)) {
			t.Fatalf("row %d is %+v", i, r)
		}
	}
	for _, n := range []int64{1, 2, 3, 7, 64, 419, 420, 1000} {
		var parts []Row
		for index := range n {
			from, to := p.Shard(n, index)
			if size := to - from; size < p.Total()/n || size > p.Total()/n+1 {
				t.Errorf("shard %d of %d has %d rows", index, n, size)
			}
			parts = append(parts, rowsOf(t, p, from, to)...)
		}
		if !slices.EqualFunc(whole, parts, sameRow) {
			t.Errorf("%d shards are not the whole", n)
		}
	}
}

// Shards of the largest sweep neither overlap nor leave a gap.
func TestShardsOfManyPoints(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		total := rapid.Int64Range(0, MaxPoints).Draw(t, "total")
		n := rapid.Int64Range(1, MaxPoints).Draw(t, "n")
		i := rapid.Int64Range(0, n-1).Draw(t, "i")
		p := &Plan{total: total}
		from, to := p.Shard(n, i)
		if from > to || to-from > total/n+1 || i == 0 && from != 0 || i == n-1 && to != total {
			t.Fatalf("%d to %d", from, to)
		}
		if i > 0 {
			if _, before := p.Shard(n, i-1); before != from {
				t.Fatalf("%d after %d", from, before)
			}
		}
	})
}

// A point that can't be computed is a row that says why, and the others are
// there.
func TestProblemsAreRows(t *testing.T) {
	c := decoded(t, rod)
	rows := []struct {
		axes []string
		want []string // part of the problem of each row; "": none
	}{
		{[]string{"fluid.temperature=-30..60 degC:4"}, []string{"/fluid/temperature: ", "", "", "/fluid/temperature: "}},
		{[]string{"flow.operating.0=1..3 m/s:3"}, []string{"", "", "lowest value is above the highest"}},
		{[]string{"flow.operating.0=1..3 m/s:2", "flow.operating.1=2..4 m/s:2"}, []string{"", "", "lowest value is above the highest", ""}},
		{[]string{"structure.modes.0.frequency_dry=10..20 Hz:2"}, []string{"", ""}},
	}
	for _, row := range rows {
		p := planOf(t, c, []string{"class", "reynolds"}, row.axes...)
		got := rowsOf(t, p, 0, p.Total())
		if len(got) != len(row.want) {
			t.Errorf("%v: %d rows", row.axes, len(got))
			continue
		}
		for i, want := range row.want {
			r := got[i]
			if (want == "") != (r.Problem == "") || !strings.Contains(r.Problem, want) {
				t.Errorf("%v: row %d has the problem %q", row.axes, i, r.Problem)
			}
			if r.Problem != "" && !(r.Cells[0].Null() && r.Cells[1].Null()) || r.Problem == "" && r.Cells[0].Null() {
				t.Errorf("%v: row %d has %v", row.axes, i, r.Cells)
			}
		}
	}
	if len(rows) != 4 {
		t.Errorf("%d rows", len(rows))
	}
}

// A fault of the engine at one point is a row with a problem.
func TestFaultsAreRows(t *testing.T) {
	column := Column{Name: "fault", Number: func(a *regime.Answer) (float64, string) {
		if a.Scales.X(0) > 0.03 { // the diameter
			panic("out of\nreach")
		}
		return 1, ""
	}}
	c := decoded(t, rod)
	p := &Plan{Case: c, Axes: axesOf(t, c, "structure.diameter=0.02..0.04 m:3"), Columns: []Column{column}, total: 3}
	for i, r := range rowsOf(t, p, 0, 3) {
		if (i == 2) != (r.Problem == "the engine has a fault here: out of reach") || (i == 2) != r.Cells[0].Null() {
			t.Errorf("row %d: %+v", i, r)
		}
	}
}

// The work ends with the context, and with the receiver.
func TestRunEnds(t *testing.T) {
	c := decoded(t, rod)
	p := planOf(t, c, []string{"class"}, "flow.speed=0.5..2 m/s:1000000", "structure.diameter=0.02..0.05 m:100000")
	gone := errors.New("gone")
	ctx, cancel := context.WithCancelCause(context.Background())
	seen := int64(0)
	err := p.Run(ctx, 0, p.Total(), func(rows []Row) error {
		for _, r := range rows {
			if r.Index != seen {
				t.Fatalf("row %d after %d", r.Index, seen)
			}
			seen++
		}
		if seen >= 200 {
			cancel(gone)
		}
		return nil
	})
	if !errors.Is(err, gone) || seen > 1e5 {
		t.Errorf("%v after %d", err, seen)
	}
	if err := p.Run(context.Background(), 7, p.Total(), func([]Row) error { return gone }); !errors.Is(err, gone) {
		t.Error(err)
	}
	if err := p.Run(context.Background(), p.Total(), p.Total()+5, func([]Row) error { return gone }); err != nil {
		t.Error(err)
	}
}

// The units of the columns are known before the first row, also where the base
// case has no such scale; and uncertain inputs are named.
func TestUnitsOfColumns(t *testing.T) {
	c := decoded(t, `{"structure": {"kind": "section", "shape": "square", "depth": "0.3 m +- 1 mm", "mass_per_length": "9 kg/m", "frequency_bending": "2 Hz +- 1 %", "strouhal": 0.13}, "fluid": "air"}`)
	columns := []string{"class", "reynolds", "scale.speed", "scale.speed_critical", "scale.wave_height", "setup.time_step_structure", "one-way.utilisation"}
	p := planOf(t, c, columns, "flow.speed=0..2 m/s:3", "structure.depth=0.1..0.3 m:2")
	var got []string
	for i := range columns {
		got = append(got, p.Unit(i))
	}
	if want := []string{"", "1", "m/s", "m/s", "", "s", "1"}; !slices.Equal(got, want) {
		t.Errorf("units %q, want %q", got, want)
	}
	if got := p.Uncertain(); !slices.Equal(got, []string{"structure.frequency_bending"}) {
		t.Errorf("uncertain: %v", got)
	}
}

// Without columns a plan asks for the class and what decides it.
func TestDefaultColumns(t *testing.T) {
	p := planOf(t, decoded(t, rod), nil, "flow.speed=0.1..5 m/s:20")
	var names []string
	for i := range p.Columns {
		names = append(names, p.Columns[i].Name)
	}
	if names[0] != "class" || !slices.Contains(names, "fluid-absent.utilisation") || !slices.Contains(names, "no-lock-in.utilisation") || len(names) > 25 {
		t.Errorf("columns %v", names)
	}
}

const aRod = `{"structure": {"kind": "cylinder", "diameter": "40 mm"}, "fluid": "water"}`

// Everything that is wrong with a request is said at once, each at its place.
func TestBadRequests(t *testing.T) {
	rows := []struct {
		body string
		want []string // pointer and code
	}{
		{`[]`, []string{" wrong-type"}},
		{`{}`, []string{"/axes missing", "/case missing"}},
		{`{"cases": {}, "case": 1, "axes": 2, "columns": "class", "format": "xml", "progress": 1, "shards": 0, "index": 1.5, "case": {}}`,
			[]string{"/axes wrong-type", "/case duplicate", "/case wrong-type", "/cases unknown-field", "/columns wrong-type", "/format unknown-choice", "/index wrong-type", "/progress wrong-type", "/shards out-of-range"}},
		{`{"case": ` + aRod + `, "axes": []}`, []string{"/axes out-of-range"}},
		{`{"case": ` + aRod + `, "axes": ["flow.speed=1,2", "flow.speed=1 m/s", 3, {"inputs": "x"}, {}]}`,
			[]string{"/axes out-of-range", "/axes/0 missing-unit", "/axes/0 missing-unit", "/axes/2 wrong-type", "/axes/3/input missing", "/axes/3/inputs unknown-field", "/axes/4/input missing"}},
		{`{"case": ` + aRod + `, "axes": [{"input": 3, "values": ["1 m"]}, {"input": "flow.speed", "values": "1 m/s"}, {"input": "fluid.density", "values": []}, {"input": "flow.speed", "from": "1 m/s", "from": "2 m/s"}]}`,
			[]string{"/axes/0/input wrong-type", "/axes/1/values wrong-type", "/axes/2/values out-of-range", "/axes/3/from duplicate", "/axes/3/input duplicate", "/axes/3/points missing", "/axes/3/to missing"}},
		{`{"case": ` + aRod + `, "axes": [{"input": "flow.speed", "from": "1 kg", "to": -1, "points": 2.5, "spacing": "cubic"}, {"input": "structure.diameter", "values": ["1 m", "0 m", "2 s"], "points": 3, "step": "1 m"}]}`,
			[]string{"/axes/0/from wrong-dimension", "/axes/0/points wrong-type", "/axes/0/spacing unknown-choice", "/axes/0/to missing-unit", "/axes/1/points contradiction", "/axes/1/step contradiction", "/axes/1/values/1 out-of-range", "/axes/1/values/2 wrong-dimension"}},
		{`{"case": ` + aRod + `, "axes": ["flow.speed=1..2 m/s:2"], "columns": ["clas", "class", 3, "class", "scale.sped"], "shards": 3, "index": 3}`,
			[]string{"/columns/0 unknown-choice", "/columns/2 wrong-type", "/columns/3 duplicate", "/columns/4 unknown-choice", "/index out-of-range"}},
		{`{"case": ` + aRod + `, "axes": ["flow.speed=1..2 m/s:2"], "columns": ["class", "class"]}`, []string{"/columns/1 duplicate"}},
		{`{"case": ` + aRod + `, "axes": ["flow.speed=1..2 m/s:2"], "columns": []}`, []string{"/columns out-of-range"}},
		{`{"case": ` + aRod + `, "axes": ["flow.speed=1..2 m/s:2"], "columns": ["class", "probability.added-mass"]}`, []string{"/columns/1 contradiction"}},
		{`{"case": ` + aRod + `, "axes": ["flow.speed=1..2 m/s:1000000", "structure.diameter=1..2 m:1000001"]}`, []string{"/axes out-of-range"}},
		{`{"case": ` + aRod + `, "axes": [{"input": "fluid.temperature", "from": "1 degC", "to": "2 degC", "step": {"value": 1, "unit": "K"}}, {"input": "fluid.name", "from": "air"}]}`,
			[]string{"/axes/0/step wrong-type", "/axes/1/values missing"}},
		// A case that is wrong does not hide what is wrong with the rest.
		{`{"case": {"structure": {"kind": "cylinder", "diameter": "40 kg"}, "fluid": "watter"}, "axes": ["flow.sped=1,2", {"input": "structure.modes.0.frequency_dry", "values": ["1 Hz"]}], "columns": ["x"]}`,
			[]string{"/axes/0 unknown-field", "/case/fluid unknown-choice", "/case/structure/diameter wrong-dimension", "/columns/0 unknown-choice"}},
		{`{"case": {"structure": {"kind": "cilinder"}}, "axes": ["flow.sped=1,2"], "columns": ["x"]}`, []string{"/case/structure/kind unknown-kind", "/columns/0 unknown-choice"}},
		// What is wrong at every point, and not with an axis, is wrong with the case.
		{`{"case": {"structure": {"kind": "cylinder", "diameter": "40 mm"}}, "axes": ["flow.speed=1..2 m/s:2"]}`, []string{"/case/fluid missing"}},
		{`{"case": {"structure": {"kind": "cylinder", "diameter": "40 mm", "damping_ratio": 0.01, "log_decrement": 3}, "fluid": "air"}, "axes": ["flow.speed=1..2 m/s:2"]}`, []string{"/case/structure/log_decrement contradiction"}},
	}
	for _, row := range rows {
		r, violations, err := DecodeRequest([]byte(row.body), kind.Schema(), []string{"ndjson", "csv"})
		if err != nil || r != nil {
			t.Errorf("%s: %v", row.body, err)
			continue
		}
		var got []string
		for _, v := range violations {
			got = append(got, v.Pointer+" "+string(v.Code))
			if v.Sentence == "" || !strings.HasSuffix(v.Sentence, ".") && !strings.HasSuffix(v.Sentence, "?") && !strings.Contains(v.Sentence, ";") {
				t.Errorf("%s: %q", row.body, v.Sentence)
			}
		}
		slices.Sort(got)
		if !slices.Equal(got, row.want) {
			t.Errorf("%s:\n got %q\nwant %q", row.body, got, row.want)
		}
	}
	if len(rows) != 17 {
		t.Errorf("%d rows", len(rows))
	}
	for _, body := range []string{"", "{", `{"case": }`, `{} {}`, "\xff", `{"case": "\x"}`} {
		var syntax *input.SyntaxError
		if _, _, err := DecodeRequest([]byte(body), kind.Schema(), nil); !errors.As(err, &syntax) || !strings.Contains(syntax.Sentence, "no valid JSON") {
			t.Errorf("%q: %v", body, err)
		}
	}
}

func TestDecodeRequest(t *testing.T) {
	body := `{"index": 2, "shards": 4, "progress": true, "format": "csv", "columns": ["class", "reynolds"],
		"axes": [{"input": "flow.speed", "from": "0.1 m/s", "to": {"value": 10, "unit": "m/s"}, "points": 3, "spacing": "log"}, "structure.diameter=10..20 mm:step 5 mm",
			{"input": "/structure/damping_ratio", "values": [0.01, "2 %"]}], "case": ` + aRod + `}`
	r, violations, err := DecodeRequest([]byte(body), kind.Schema(), []string{"csv"})
	if err != nil || len(violations) > 0 {
		t.Fatal(violations, err)
	}
	if r.Total() != 18 || r.Format != "csv" || !r.Progress || r.Shards != 4 || r.Index != 2 || len(r.Columns) != 2 || !r.Chosen {
		t.Errorf("%+v", r)
	}
	if first := rowsOf(t, r.Plan, 7, 8)[0]; fmt.Sprint(first.Axes) != "[{ 1} { 0.01} { 0.02}]" {
		t.Errorf("%+v", first)
	}
}

// The decoder never panics; what it takes can be run.
func FuzzDecodeRequest(f *testing.F) {
	f.Add(`{"case": ` + aRod + `, "axes": ["flow.speed=1..2 m/s:2"], "columns": ["class"]}`)
	f.Add(`{"case": ` + aRod + `, "axes": [{"input": "flow.speed", "from": "1 m/s", "to": "2 m/s", "step": "0.5 m/s"}, {"input": "fluid.name", "values": ["air"]}], "shards": 2, "index": 1}`)
	f.Add(`{"case": {"structure": {"kind": "plate"}}, "axes": [{}, {"input": ""}], "columns": [1]}`)
	f.Add(`{"case": {"structure": {"kind": 1}}, "axes": [[]], "format": null}`)
	f.Fuzz(func(t *testing.T, body string) {
		r, violations, err := DecodeRequest([]byte(body), kind.Schema(), []string{"ndjson"})
		if err != nil || len(violations) > 0 {
			return
		}
		from, to := r.Shard(r.Shards, r.Index)
		if from < 0 || to > r.Total() || from > to {
			t.Fatalf("rows %d to %d of %d", from, to, r.Total())
		}
		if err := r.Run(context.Background(), from, min(to, from+2), func([]Row) error { return nil }); err != nil {
			t.Fatal(err)
		}
	})
}
