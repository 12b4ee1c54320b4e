package render

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"golang.org/x/net/html"
	"pgregory.net/rapid"

	"regimed/regime"
)

// csvRecord is what of an answer in JSON a table repeats.
type csvRecord struct {
	Findings map[string]struct {
		Estimate, Limit, Utilisation, Factor, Margin *float64
		Quantiles                                    []*float64
		Probability                                  map[string]*float64
		StandardError                                map[string]*float64 `json:"standard_error"`
		Drivers                                      []struct {
			Input       string
			Sensitivity *float64
		}
	}
	Groups map[string]struct {
		Value     *float64
		Quantiles []*float64
	}
	Scales map[string]struct{ Value *float64 }
	Turns  []struct {
		Input, Direction, Unit, Class, Sentence string
		Gauge                                   bool
		Value, Factor                           *float64
		Finding, Verdict                        *string
	} `json:"turning_points"`
	Recommendation struct {
		Probability   map[string]*float64
		StandardError map[string]*float64 `json:"standard_error"`
	}
	Uncertainty *struct {
		Inputs []struct {
			Input, Form, Unit string
			Value, Spread     *float64
		}
		Samples, Outside *float64
	}
}

// cellOf finds a cell by the name of its column.
func cellOf(row []string, column string) string { return row[slices.Index(CSVColumns, column)] }

// comparer compares the number in a cell with that of the JSON.
type comparer func(where, cell string, want *float64)

func sameQuantiles(row []string, q []*float64, same comparer) {
	for i, column := range []string{"p05", "p50", "p95"} {
		var want *float64
		if q != nil {
			want = q[i]
		}
		same(row[1]+" "+column, cellOf(row, column), want)
	}
}

// checkVaried holds that a table has each turning point, driver, uncertain input
// and probability of the JSON, and no other.
func checkVaried(t rapid.TB, rows [][]string, record *csvRecord, same comparer) {
	t.Helper()
	parts := map[string][][]string{}
	for _, r := range rows[1:] {
		parts[r[0]] = append(parts[r[0]], r)
	}
	if len(parts["turn"]) != len(record.Turns) {
		t.Fatalf("%d turns, %d in JSON", len(parts["turn"]), len(record.Turns))
	}
	text := func(s *string) string {
		if s == nil {
			return ""
		}
		return *s
	}
	for i, r := range parts["turn"] {
		w := &record.Turns[i]
		same(r[1], r[3], w.Value)
		same(r[1], cellOf(r, "factor"), w.Factor)
		got := []string{r[1], r[4], cellOf(r, "direction"), cellOf(r, "class"), cellOf(r, "because"), cellOf(r, "finding"), cellOf(r, "verdict")}
		want := []string{w.Input, w.Unit, w.Direction, w.Class, w.Sentence, text(w.Finding), text(w.Verdict)}
		if !slices.Equal(got, want) || (cellOf(r, "basis") == "gauge") != w.Gauge {
			t.Fatalf("%q, and %q in JSON", got, want)
		}
	}
	drivers := 0
	for id, f := range record.Findings {
		at := slices.IndexFunc(parts["driver"], func(r []string) bool { return cellOf(r, "finding") == id })
		for j, d := range f.Drivers {
			r := parts["driver"][at+j]
			if same(id, r[3], d.Sensitivity); r[1] != d.Input || cellOf(r, "finding") != id {
				t.Fatalf("%q, and %s of %s in JSON", r, d.Input, id)
			}
			drivers++
		}
	}
	if drivers != len(parts["driver"]) {
		t.Fatalf("%d drivers, %d in JSON", len(parts["driver"]), drivers)
	}
	checkProbabilities(t, parts["probability"], record, same)
	if record.Uncertainty == nil {
		if len(parts["uncertain"]) > 0 {
			t.Fatal("uncertain inputs of a certain case")
		}
		return
	}
	for i, w := range record.Uncertainty.Inputs {
		r := parts["uncertain"][i]
		same(w.Input, r[3], w.Value)
		same(w.Input, cellOf(r, "spread"), w.Spread)
		if r[1] != w.Input || r[4] != w.Unit || cellOf(r, "basis") != w.Form {
			t.Fatalf("%q, and %+v in JSON", r, w)
		}
	}
	for _, r := range parts["answer"] {
		switch r[1] {
		case "samples":
			same(r[1], r[3], record.Uncertainty.Samples)
		case "outside":
			same(r[1], r[3], record.Uncertainty.Outside)
		}
	}
}

func checkProbabilities(t rapid.TB, rows [][]string, record *csvRecord, same comparer) {
	t.Helper()
	n := len(record.Recommendation.Probability)
	for _, f := range record.Findings {
		n += len(f.Probability)
	}
	if len(rows) != n {
		t.Fatalf("%d probabilities, %d in JSON", len(rows), n)
	}
	for _, r := range rows {
		share, deviation := record.Recommendation.Probability[r[1]], record.Recommendation.StandardError[r[1]]
		if v := cellOf(r, "verdict"); v != "" {
			share, deviation = record.Findings[r[1]].Probability[v], record.Findings[r[1]].StandardError[v]
		}
		if share == nil || deviation == nil {
			t.Fatalf("%q is not in JSON", r)
		}
		same(r[1], r[3], share)
		same(r[1], cellOf(r, "standard_error"), deviation)
	}
}

// variedWords are what a page has to show of what varying the inputs added.
func variedWords(a *regime.Answer) []string {
	var want []string
	if a.Turns != nil {
		want = append(want, whatWouldChange)
		if len(a.Turns) == 0 {
			want = append(want, noTurn)
		}
	}
	for i := range a.Turns {
		want = append(want, a.Turns[i].Place.Path(), string(appendWhatTurns(nil, &a.Turns[i])), string(appendTurnValue(nil, a, &a.Turns[i])))
	}
	if a.Spread == nil {
		return want
	}
	for _, at := range a.Spread.Inputs {
		want = append(want, at.Path()+" "+string(appendUncertain(nil, a.Case.At(at), at)))
	}
	want = append(want, string(appendDraws(nil, a.Spread)))
	for _, c := range a.Spread.Classes {
		want = append(want, c.Class.Title, percentage(c.Share), percentage(c.StandardError))
	}
	if a.Spread.Samples == 0 {
		return want
	}
	for _, e := range unsure(a) {
		want = append(want, string(appendOdds(nil, a, e)))
	}
	for id, q := range a.Spread.Groups {
		if q[0] != q[2] && a.Groups.Has(id) {
			want = append(want, "90 % of draws "+groupSpread(a, id))
		}
	}
	return want
}

// rowsOf counts the rows of the table of turning points on a page, and those of
// them that paper leaves out.
func rowsOf(page string) (all, further int) {
	_, rest, _ := strings.Cut(page, "<h2>"+whatWouldChange+"</h2>")
	section, _, _ := strings.Cut(rest, "<h2>")
	_, body, _ := strings.Cut(section, "<tbody>")
	return strings.Count(body, "<tr"), strings.Count(body, `<tr class="further"`)
}

// All turning points are on screen. Paper shows the nearest, and says how many
// more there are.
func TestTurnsOnPaper(t *testing.T) {
	more := 0
	for name, a := range shipped(t) {
		body, err := HTML(a)
		if err != nil {
			t.Fatal(err)
		}
		page := string(body)
		all, further := rowsOf(page)
		shown := all - further
		if all != len(a.Turns) || shown > mostTurns || shown < min(all, fewestTurns) {
			t.Errorf("%s: %d rows, %d of them further, of %d turning points", name, all, further, len(a.Turns))
		}
		if said := strings.Contains(page, "And "+strconv.Itoa(further)+" further off"); said != (further > 0) {
			t.Errorf("%s: %d further", name, further)
		}
		if further > 0 {
			more++
		}
	}
	if more < 5 {
		t.Errorf("only %d cases have more turning points than paper shows", more)
	}
}

// What was not asked is not said, and of a case that nothing turns it is said so.
func TestPagesWithoutTurns(t *testing.T) {
	a := classify(t, classified["riser"])
	for explored, want := range map[bool]int{false: 0, true: 1} {
		if explored {
			a.Turns, a.Drivers = []regime.Turn{}, make([][]regime.Driver, len(a.Findings))
		}
		page, err := HTML(a)
		if err != nil {
			t.Fatal(err)
		}
		text, err := Markdown(a)
		if err != nil {
			t.Fatal(err)
		}
		for _, body := range []string{checkHTML(t, page), string(text)} {
			if strings.Count(body, whatWouldChange) != want || strings.Count(body, noTurn) != want || strings.Contains(body, driversRule) || strings.Contains(body, "Uncertain inputs") {
				t.Errorf("explored: %v\n%s", explored, body)
			}
		}
		a = classify(t, classified["riser"])
	}
}

// barsShown are the widths of the bars of the classes, in per cent.
func barsShown(t *testing.T, page []byte) []float64 {
	t.Helper()
	var widths []float64
	inside := false
	z := html.NewTokenizer(strings.NewReader(string(page)))
	for z.Next() != html.ErrorToken {
		token := z.Token()
		attributes := map[string]string{}
		for _, x := range token.Attr {
			attributes[x.Key] = x.Val
		}
		if token.Data == "svg" {
			inside = attributes["class"] == "share"
		}
		if !inside || token.Data != "rect" || attributes["class"] != "valid" {
			continue
		}
		x, err := strconv.ParseFloat(attributes["width"], 64)
		if err != nil {
			t.Fatal(err)
		}
		widths = append(widths, x)
	}
	return widths
}

// A shipped case with an uncertain input, and an invented one with several, show
// how likely each class is.
func TestLikelyClassesOnPages(t *testing.T) {
	rows := 0
	for name, a := range map[string]*regime.Answer{"rod": shipped(t)["oil-rod-viscometer.json"], "pile": spread(t)} {
		page, err := HTML(a)
		if err != nil {
			t.Fatal(err)
		}
		widths := barsShown(t, page)
		if len(widths) != len(a.Spread.Classes) || len(widths) == 0 {
			t.Fatalf("%s: bars %v of %d classes", name, widths, len(a.Spread.Classes))
		}
		text, err := Markdown(a)
		if err != nil {
			t.Fatal(err)
		}
		checkMarkdown(t, string(text))
		for i, c := range a.Spread.Classes {
			if math.Abs(widths[i]-100*c.Share) > 0.051 {
				t.Errorf("%s: a bar of %v for a share of %v", name, widths[i], c.Share)
			}
			if line := "(" + code(c.Class.ID) + ") | " + percentage(c.Share) + " | " + percentage(c.StandardError) + " |"; !strings.Contains(string(text), line) {
				t.Errorf("%s: no %q in\n%s", name, line, text)
			}
		}
		if !strings.Contains(string(text), "| 90 % of draws |") {
			t.Errorf("%s: no quantiles of groups in\n%s", name, text)
		}
		rows++
	}
	if rows != 2 {
		t.Errorf("%d rows", rows)
	}
}
