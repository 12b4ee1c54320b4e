package table

import (
	"bytes"
	"context"
	"encoding/csv"
	"errors"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"
	"github.com/parquet-go/parquet-go"
	"pgregory.net/rapid"

	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

const rod = `{"structure": {"kind": "cylinder", "diameter": "40 mm", "frequency_dry": "12 Hz +- 1 %"}, "fluid": {"name": "water"}}`

// sheetOf makes a sheet from a request.
func sheetOf(t testing.TB, axes, columns string) *Sheet {
	t.Helper()
	body := `{"case": ` + rod + `, "axes": [` + axes + `], "columns": [` + columns + `]}`
	r, violations, err := whatif.DecodeRequest([]byte(body), kind.Schema(), nil)
	if err != nil || len(violations) > 0 {
		t.Fatal(violations, err)
	}
	return &Sheet{Plan: r.Plan, From: 0, To: r.Total()}
}

// mixed has texts, numbers, numbers that are not there, and points with a problem.
func mixed(t testing.TB) *Sheet {
	return sheetOf(t, `"fluid.name=water,air", "fluid.temperature=-20..60 degC:9", "flow.speed=0..2 m/s:20"`,
		`"class", "reynolds", "one-way", "one-way.utilisation", "setup.time_step_structure", "scale.frequency_dry"`)
}

func nothing(Tally) error { return nil }

// written writes a sheet from its beginning.
func written(t testing.TB, ctx context.Context, format string, s *Sheet, after func(Tally) error) ([]byte, End) {
	t.Helper()
	var out bytes.Buffer
	w, err := New(format, &out, s)
	if err != nil {
		t.Fatal(err)
	}
	if err := w.Begin(); err != nil {
		t.Fatal(err)
	}
	end, err := s.Write(ctx, w, Tally{}, after)
	if err != nil {
		t.Fatal(err)
	}
	return out.Bytes(), end
}

// stopAfter returns a context that ends once some rows were written.
func stopAfter(points int64) (context.Context, func(Tally) error) {
	ctx, cancel := context.WithCancel(context.Background())
	return ctx, func(t Tally) error {
		if t.Points >= points {
			cancel()
		}
		return nil
	}
}

// read is what a reader gets from a file of any form.
type read struct {
	names []string // with units where the form has them
	rows  [][]any  // string, float64 or nil
	end   End
}

func readNDJSON(t testing.TB, data []byte) read {
	t.Helper()
	lines := strings.Split(strings.TrimSuffix(string(data), "\n"), "\n")
	var first struct {
		Sweep head `json:"sweep"`
	}
	if err := json.Unmarshal([]byte(lines[0]), &first); err != nil {
		t.Fatal(err)
	}
	var r read
	for _, a := range first.Sweep.Axes {
		r.names = append(r.names, withUnit(a.Input, a.Unit))
	}
	for _, c := range first.Sweep.Columns {
		r.names = append(r.names, withUnit(c.Name, c.Unit))
	}
	for _, line := range lines[1 : len(lines)-1] {
		var members map[string]any
		if err := json.Unmarshal([]byte(line), &members); err != nil {
			t.Fatal(err)
		}
		var row []any
		for _, name := range append(slices.Clone(r.names), problemName) {
			name, _, _ = strings.Cut(name, " ")
			row = append(row, members[name])
		}
		r.rows = append(r.rows, row)
	}
	var last struct {
		End End `json:"end"`
	}
	if err := json.Unmarshal([]byte(lines[len(lines)-1]), &last); err != nil {
		t.Fatal(err)
	}
	r.end = last.End
	return r
}

func readCSV(t testing.TB, data []byte) read {
	t.Helper()
	text, last, _ := strings.Cut(string(data), "# state=")
	records, err := csv.NewReader(strings.NewReader(text)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var r read
	r.names = records[0][:len(records[0])-1]
	for _, record := range records[1:] {
		var row []any
		for _, f := range record {
			x, err := strconv.ParseFloat(f, 64)
			switch {
			case f == "":
				row = append(row, nil)
			case err == nil:
				row = append(row, x)
			default:
				row = append(row, f)
			}
		}
		r.rows = append(r.rows, row)
	}
	if _, err := fmt.Sscanf(last, "%s points=%d problems=%d", &r.end.State, &r.end.Points, &r.end.Problems); err != nil {
		t.Fatal(err)
	}
	return r
}

func readParquet(t testing.TB, data []byte) read {
	t.Helper()
	f, err := parquet.OpenFile(bytes.NewReader(data), int64(len(data)))
	if err != nil {
		t.Fatal(err)
	}
	var r read
	about, _ := f.Lookup(headKey)
	var h head
	if err := json.Unmarshal([]byte(about), &h); err != nil {
		t.Fatal(err)
	}
	units := map[string]*string{}
	for _, a := range h.Axes {
		units[a.Input] = a.Unit
	}
	for _, c := range h.Columns {
		units[c.Name] = c.Unit
	}
	for _, field := range f.Schema().Fields() {
		if field.Name() != problemName {
			r.names = append(r.names, withUnit(field.Name(), units[field.Name()]))
		}
	}
	for _, group := range f.RowGroups() {
		rows := group.Rows()
		room := make([]parquet.Row, group.NumRows())
		n, _ := rows.ReadRows(room)
		for _, row := range room[:n] {
			r.rows = append(r.rows, valuesOf(row))
		}
		if err := rows.Close(); err != nil {
			t.Fatal(err)
		}
	}
	mark, _ := f.Lookup(endKey)
	if err := json.Unmarshal([]byte(mark), &r.end); err != nil {
		t.Fatal(err)
	}
	return r
}

func valuesOf(row parquet.Row) []any {
	var list []any
	for _, v := range row {
		switch {
		case v.IsNull():
			list = append(list, nil)
		case v.Kind() == parquet.Double:
			list = append(list, v.Double())
		default:
			list = append(list, string(v.ByteArray()))
		}
	}
	return list
}

var readers = map[string]func(testing.TB, []byte) read{NDJSON: readNDJSON, CSV: readCSV, Parquet: readParquet}

// want is what every form has to say about a sheet.
func want(t testing.TB, s *Sheet) [][]any {
	t.Helper()
	var all [][]any
	err := s.Run(context.Background(), s.From, s.To, func(rows []whatif.Row) error {
		for _, r := range rows {
			var row []any
			for _, c := range append(slices.Clone(r.Axes), r.Cells...) {
				row = append(row, valueOf(c))
			}
			all = append(all, append(row, valueOf(whatif.Cell{Text: r.Problem, Number: math.NaN()})))
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	return all
}

func valueOf(c whatif.Cell) any {
	switch {
	case c.Text != "":
		return c.Text
	case c.Null():
		return nil
	}
	return c.Number
}

// All forms say the same: names, units, every digit of every number, what is
// null and why, and that the rows are complete.
func TestFormsSayTheSame(t *testing.T) {
	s := mixed(t)
	rows := want(t, s)
	problems := int64(0)
	for _, row := range rows {
		if row[len(row)-1] != nil {
			problems++
		}
	}
	if problems == 0 || problems == s.Rows() {
		t.Fatalf("%d problems", problems)
	}
	names := []string{"fluid.name", "fluid.temperature [K]", "flow.speed [m/s]", "class", "reynolds", "one-way", "one-way.utilisation", "setup.time_step_structure [s]", "scale.frequency_dry [Hz]"}
	ran := 0
	for format, read := range readers {
		data, end := written(t, context.Background(), format, s, nothing)
		got := read(t, data)
		if !slices.Equal(got.names, names) {
			t.Errorf("%s: names %q", format, got.names)
		}
		if len(got.rows) != len(rows) {
			t.Fatalf("%s: %d rows of %d", format, len(got.rows), len(rows))
		}
		for i := range rows {
			if !slices.Equal(got.rows[i], rows[i]) {
				t.Fatalf("%s: row %d is %v, want %v", format, i, got.rows[i], rows[i])
			}
		}
		if wantEnd := (End{Complete, Tally{s.Rows(), problems}}); got.end != wantEnd || end != wantEnd {
			t.Errorf("%s: end %+v and %+v, want %+v", format, got.end, end, wantEnd)
		}
		ran++
	}
	if ran != len(Formats) {
		t.Errorf("%d forms", ran)
	}
}

// The head says what the rows are about.
func TestHead(t *testing.T) {
	s := sheetOf(t, `"fluid.name=water,air", "flow.speed=0.1..10 m/s:3:log", "structure.diameter=10..50 mm:step 20 mm"`, `"class", "reynolds", "scale.wave_height"`)
	s.From, s.To = s.Shard(2, 1)
	h := s.head()
	got, err := json.Marshal(&h)
	if err != nil {
		t.Fatal(err)
	}
	c, _, _ := input.Decode([]byte(rod), kind.Schema())
	for _, part := range []string{
		`"digest":"` + c.Digest() + `"`,
		`"axes":[{"input":"fluid.name","unit":null,"points":2,"spacing":"list","values":["water","air"]},`,
		`{"input":"flow.speed","unit":"m/s","points":3,"spacing":"log","from":0.1,"to":10},`,
		`{"input":"structure.diameter","unit":"m","points":3,"spacing":"linear","from":0.01,"to":0.05,"step":0.02}],`,
		`"columns":[{"name":"class","unit":null},{"name":"reynolds","unit":"1"},{"name":"scale.wave_height","unit":null}],`,
		`"points":18,"from":9,"to":18,"taken_at_middle":["structure.frequency_dry"]`,
	} {
		if !strings.Contains(string(got), part) {
			t.Errorf("%s\nis not in %s", part, got)
		}
	}
}

// The rows of the shards in order are those of the whole, in every form of lines
// to the byte.
func TestShardsConcatenated(t *testing.T) {
	s := mixed(t)
	for _, format := range Streams {
		whole, _ := written(t, context.Background(), format, s, nothing)
		var parts []byte
		for i := range int64(7) {
			shard := &Sheet{Plan: s.Plan}
			shard.From, shard.To = s.Shard(7, i)
			data, _ := written(t, context.Background(), format, shard, nothing)
			parts = append(parts, inner(data)...)
		}
		if !bytes.Equal(inner(whole), parts) {
			t.Errorf("%s: the shards differ from the whole", format)
		}
	}
}

// inner leaves the first and the last line out.
func inner(data []byte) []byte {
	from := bytes.IndexByte(data, '\n') + 1
	to := bytes.LastIndexByte(data[:len(data)-1], '\n') + 1
	return data[from:to]
}

// A sheet that is interrupted can be read, and says so.
func TestInterruption(t *testing.T) {
	s := sheetOf(t, `"flow.speed=0.1..2 m/s:100000"`, `"class", "reynolds"`)
	ran := 0
	for format, read := range readers {
		ctx, after := stopAfter(500)
		data, end := written(t, ctx, format, s, after)
		got := read(t, data)
		if end.State != Interrupted || got.end != end || int64(len(got.rows)) != end.Points || end.Points < 500 || end.Points > 5000 {
			t.Errorf("%s: %+v, %d rows read, the file says %+v", format, end, len(got.rows), got.end)
		}
		if last := got.rows[len(got.rows)-1]; last[1] == nil || last[2] == nil {
			t.Errorf("%s: the last row is %v", format, last)
		}
		ran++
	}
	if ran != 3 {
		t.Errorf("%d forms", ran)
	}
}

// goOn resumes a file that holds some bytes, and returns the whole.
func goOn(t testing.TB, format string, s *Sheet, had []byte) ([]byte, error) {
	t.Helper()
	there, err := s.Resume(context.Background(), format, bytes.NewReader(had))
	if err != nil {
		return nil, err
	}
	out := bytes.NewBuffer(slices.Clone(had[:there.Size]))
	w, err := New(format, out, s)
	if err != nil {
		t.Fatal(err)
	}
	if there.Size == 0 {
		if err := w.Begin(); err != nil {
			t.Fatal(err)
		}
	}
	if _, err := s.Write(context.Background(), w, there.Tally, nothing); err != nil {
		t.Fatal(err)
	}
	return out.Bytes(), nil
}

// Wherever a file was cut, and however it was stopped, it goes on to the bytes
// of one that was not.
func TestResume(t *testing.T) {
	s := mixed(t)
	s.From, s.To = 100, 200
	for _, format := range Streams {
		whole, _ := written(t, context.Background(), format, s, nothing)
		rapid.Check(t, func(r *rapid.T) {
			had := whole[:rapid.IntRange(0, len(whole)).Draw(r, "size")]
			if got, err := goOn(t, format, s, had); err != nil || !bytes.Equal(got, whole) {
				r.Fatalf("%s cut at %d: %v", format, len(had), err)
			}
		})
		ctx, after := stopAfter(1)
		stopped, end := written(t, ctx, format, s, after)
		if got, err := goOn(t, format, s, stopped); err != nil || !bytes.Equal(got, whole) || end.State != Interrupted {
			t.Fatalf("%s: %v, %+v", format, err, end)
		}
	}
}

// A file of another sweep is refused.
func TestResumeRefuses(t *testing.T) {
	s := mixed(t)
	other := func(axes, columns string) *Sheet { return sheetOf(t, axes, columns) }
	axes := `"fluid.name=water,air", "fluid.temperature=-20..60 degC:9", "flow.speed=0..2 m/s:20"`
	columns := `"class", "reynolds", "one-way", "one-way.utilisation", "setup.time_step_structure", "scale.frequency_dry"`
	part := &Sheet{Plan: s.Plan, From: 5, To: 360}
	heavier := other(axes, columns)
	heavier.Case = heavier.Case.Clone()
	p, err := heavier.Case.FindPlace("structure.frequency_dry")
	if err != nil || !heavier.Case.Set(p, 7) {
		t.Fatal(err)
	}
	rows := []struct {
		what string
		from *Sheet
	}{
		{"another axis", other(strings.Replace(axes, "2 m/s:20", "2 m/s:21", 1), columns)},
		{"another list", other(strings.Replace(axes, "water,air", "air,water", 1), columns)},
		{"another column", other(axes, strings.Replace(columns, "one-way.utilisation", "steady-flow.utilisation", 1))},
		{"another case", heavier},
		{"another shard", part},
	}
	for _, format := range Streams {
		for _, row := range rows {
			data, _ := written(t, context.Background(), format, row.from, nothing)
			var differs *OtherError
			if _, err := goOn(t, format, s, data); !errors.As(err, &differs) {
				t.Errorf("%s: %s: %v", format, row.what, err)
			}
		}
		// A row too many, and a file that is no sweep at all.
		whole, _ := written(t, context.Background(), format, s, nothing)
		short := &Sheet{Plan: s.Plan, From: 0, To: s.To - 1}
		if _, err := goOn(t, format, short, whole); err == nil {
			t.Errorf("%s: a row too many", format)
		}
		if _, err := goOn(t, format, s, []byte("hello\n")); err == nil {
			t.Errorf("%s: no sweep at all", format)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
	if _, err := s.Resume(context.Background(), Parquet, strings.NewReader("")); err == nil {
		t.Error("Parquet goes on")
	}
}

// A writer that fails ends the work with its error.
func TestFailingWriter(t *testing.T) {
	s := mixed(t)
	full := errors.New("no space left")
	for _, format := range Streams {
		w, err := New(format, failing{full}, s)
		if err != nil {
			t.Fatal(err)
		}
		if err := w.Begin(); !errors.Is(err, full) {
			t.Error(err)
		}
		if _, err := s.Write(context.Background(), w, Tally{}, nothing); !errors.Is(err, full) {
			t.Error(err)
		}
	}
	if _, err := New("xml", failing{full}, s); err == nil {
		t.Error("xml is a form")
	}
}

type failing struct{ err error }

func (f failing) Write([]byte) (int, error) { return 0, f.err }

// Fields are quoted as RFC 4180 wants it, and read back as they were.
func TestFields(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		fields := rapid.SliceOfN(rapid.StringMatching(`[a-c", \n;#']*`), 2, 5).Draw(t, "fields")
		var line []byte
		for i, f := range fields {
			if i > 0 {
				line = append(line, ',')
			}
			line = appendField(line, f)
		}
		got, err := csv.NewReader(bytes.NewReader(append(line, crlf...))).Read()
		if err != nil || !slices.Equal(got, fields) {
			t.Fatalf("%q: %q, %v", line, got, err)
		}
	})
}

// Numbers read back as the same number.
func TestNumbers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64().Draw(t, "x")
		text := string(appendNumber(nil, x))
		if y, err := strconv.ParseFloat(text, 64); err != nil || y != x || strings.HasPrefix(text, "-0") && x == 0 {
			t.Fatalf("%v is written %s", x, text)
		}
	})
}
