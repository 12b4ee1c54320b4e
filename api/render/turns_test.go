package render

import (
	"context"
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/whatif"
)

// pressed is a tank whose pressure and temperature turn the class, one of them
// given as a gauge pressure.
const pressed = `{"structure":{"kind":"pipe","inner_diameter":"0.1 m","wall_thickness":"5 mm","length":"200 m","material":"steel","closure_time":"0.1 s","speed_change":"1 m/s"},
	"fluid":{"name":"water","temperature":"20 degC","pressure":"3 barg"},"flow":{"speed":"1 m/s","direction":"internal"},"surroundings":{"ambient_pressure":"1 bar"}}`

// foil has angles and a whole number.
const foil = `{"structure":{"kind":"wing","chord":"0.4 m","span":"1.5 m","mass_per_length":"8 kg/m","frequency_bending":"6 Hz","frequency_torsion":"30 Hz","inertia_per_length":"0.1 kg m","elastic_axis":0.35,"centre_of_gravity":0.4,"damping_ratio":0.01},
	"fluid":"air","flow":{"speed":"25 m/s","incidence":"2 deg"},"motion":{"amplitude":"10 mm"}}`

// exploredAnswers are classified cases with what would change them.
func exploredAnswers(t testing.TB) map[string]*regime.Answer {
	t.Helper()
	docs := map[string]string{"pressed": pressed, "foil": foil}
	for name, doc := range classified {
		docs[name] = doc
	}
	all := map[string]*regime.Answer{}
	for name, doc := range docs {
		a := classify(t, doc)
		if err := whatif.Explore(context.Background(), a); err != nil {
			t.Fatal(err)
		}
		all[name] = a
	}
	return all
}

// sectionOf cuts a section out of a page.
func sectionOf(page, heading string) string {
	_, rest, found := strings.Cut(page, "\n"+heading+"\n")
	if !found {
		return ""
	}
	section, _, _ := strings.Cut(rest, "\n\n")
	return section
}

const whatWouldChange = "What would change the answer"

// What would change the answer is said where it was asked, and only there.
func TestTurnsAreSaidWhereAsked(t *testing.T) {
	rows, turns := 0, 0
	for name, a := range exploredAnswers(t) {
		page, doc := string(AppendText(nil, a, TextOptions{})), decode(t, a)
		list, asked := doc["turning_points"].([]any)
		if !asked || len(list) != len(a.Turns) || sectionOf(page, whatWouldChange) == "" {
			t.Errorf("%s: %d turning points of %d in\n%s", name, len(list), len(a.Turns), page)
		}
		turns += len(list)
		for _, e := range assumption.Catalogue {
			f := doc["findings"].(map[string]any)[e.ID].(map[string]any)
			_, driven := f["drivers"].([]any)
			if u, judged := f["utilisation"].(float64); driven != (judged && u > 0) {
				t.Errorf("%s, %s: drivers %v, utilisation %v", name, e.ID, f["drivers"], f["utilisation"])
			}
		}
		keys := map[string]bool{}
		keysOf(keys, "", doc)
		for k := range keys {
			if !slices.Contains(contract, k) && !slices.Contains(seldom, k) {
				t.Errorf("%s: %s is no part of the contract", name, k)
			}
		}
		a.Turns, a.Drivers = nil, nil
		if page := string(AppendText(nil, a, TextOptions{})); strings.Contains(page, whatWouldChange) {
			t.Errorf("%s: said without being asked", name)
		}
		if s := string(AppendJSON(nil, a, All)); strings.Contains(s, "turning_points") || strings.Contains(s, `"drivers"`) {
			t.Errorf("%s: in the JSON without being asked", name)
		}
		rows++
	}
	if rows != len(classified)+2 || turns < 40 {
		t.Errorf("%d rows, %d turning points", rows, turns)
	}
}

func TestPageOfTurnsKeepsTheWidth(t *testing.T) {
	lines := 0
	for name, a := range exploredAnswers(t) {
		for _, width := range []int{80, 96, 160} {
			section := sectionOf(string(AppendText(nil, a, TextOptions{Width: width})), whatWouldChange)
			arrows := strings.Count(section, "→")
			if arrows != min(len(a.Turns), mostTurns) {
				t.Errorf("%s: %d lines of %d turning points", name, arrows, len(a.Turns))
			}
			if more := len(a.Turns) > mostTurns; more != strings.Contains(section, "further off.") {
				t.Errorf("%s: %d turning points in\n%s", name, len(a.Turns), section)
			}
			for line := range strings.Lines(section) {
				lines++
				if n := utf8.RuneCountInString(strings.TrimSuffix(line, "\n")); n > width {
					t.Errorf("%s at %d: %d columns: %s", name, width, n, line)
				}
			}
			for _, bad := range []string{"NaN", "undefined", "infinite", "-0 "} {
				if strings.Contains(section, bad) {
					t.Errorf("%s: %q in\n%s", name, bad, section)
				}
			}
		}
	}
	if lines < 150 {
		t.Errorf("%d lines", lines)
	}
}

// place finds an input of a case.
func place(t *testing.T, a *regime.Answer, path string) input.Place {
	t.Helper()
	p, err := a.Case.FindPlace(path)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// Each turning point is a sentence that can be pasted into a report, and a line
// of the page.
func TestTurnSentences(t *testing.T) {
	tube, wing, riser := classify(t, pressed), classify(t, foil), classify(t, classified["riser"])
	implicit := ladder.Find("two-way-implicit")
	none := math.NaN()
	rows := 0
	for _, r := range []struct {
		a             *regime.Answer
		path          string
		up            bool
		value, factor float64
		entry         *assumption.Entry
		verdict       finding.Verdict
		sentence      string
		line          string
	}{
		{riser, "flow.speed", true, 1.12, 1.12, assumption.NoLockIn, finding.Invalid,
			"Above flow.speed = 1.12 m/s (+12 %), no-lock-in turns invalid and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   flow.speed    +12 %  to 1.12 m/s   → two-way-implicit: no-lock-in invalid"},
		{riser, "flow.speed", false, 0.25, 0.25, assumption.NoLockIn, finding.NotApplicable,
			"Below flow.speed = 0.250 m/s (÷4), no-lock-in no longer applies and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   flow.speed       ÷4  to 0.250 m/s  → two-way-implicit: no-lock-in not-applicable"},
		{riser, "tolerance.load", true, 0.3, 3, assumption.SteadyFlow, finding.Marginal,
			"Above tolerance.load = 30 % (×3), steady-flow turns marginal and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   tolerance.load       ×3  to 30 %       → two-way-implicit: steady-flow marginal"},
		{riser, "structure.damping_ratio", true, 0, none, nil, 0,
			"Above structure.damping_ratio = 0, other classes come into question and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   structure.damping_ratio           from 0          → two-way-implicit"},
		{tube, "fluid.temperature", true, 353.15, 353.15 / 293.15, assumption.NoCavitation, finding.Invalid,
			"Above fluid.temperature = 80.0 °C (+60 K), no-cavitation turns invalid and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   fluid.temperature    +60 K  to 80.0 °C    → two-way-implicit: no-cavitation invalid"},
		{tube, "fluid.pressure", false, -20e3, 0.2, assumption.NoCavitation, finding.Invalid,
			"Below fluid.pressure = -20.0 kPa gauge (÷5), no-cavitation turns invalid and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   fluid.pressure       ÷5  to -20.0 kPa gauge → two-way-implicit: no-cavitation invalid"},
		{wing, "flow.incidence", false, -math.Pi / 45, -2, assumption.NoStall, finding.Invalid,
			"Below flow.incidence = -4.00° (-6.00°), no-stall turns invalid and the recommended class becomes Two-way, implicit (two-way-implicit).",
			"   flow.incidence   -6.00°  to -4.00°     → two-way-implicit: no-stall invalid"},
	} {
		turn := regime.Turn{Place: place(t, r.a, r.path), Up: r.up, Value: r.value, Factor: r.factor, Entry: r.entry, Verdict: r.verdict, Class: implicit}
		if got := string(appendTurnSentence(nil, r.a, &turn)); got != r.sentence {
			t.Errorf("%s\nwant %s", got, r.sentence)
		}
		p := &page{width: 100}
		p.turn(r.a, &turn, len(r.path))
		if got := strings.TrimSuffix(string(p.dst), "\n"); got != r.line {
			t.Errorf("%q\nwant %q", got, r.line)
		}
		rows++
	}
	if rows != 7 {
		t.Errorf("%d rows", rows)
	}
}

// A turning point without a finding or a factor has nulls in their place.
func TestTurnWithoutFinding(t *testing.T) {
	a := classify(t, classified["riser"])
	a.Turns = []regime.Turn{{Place: place(t, a, "structure.damping_ratio"), Up: true, Factor: math.NaN(), Class: ladder.Find("two-way-implicit")}}
	a.Drivers = make([][]regime.Driver, len(a.Findings))
	var doc struct {
		Turns []map[string]any `json:"turning_points"`
	}
	if err := json.Unmarshal(AppendJSON(nil, a, TurningPoints), &doc); err != nil {
		t.Fatal(err)
	}
	if len(doc.Turns) != 1 {
		t.Fatalf("%+v", doc)
	}
	for _, name := range []string{"factor", "finding", "verdict"} {
		if x, there := doc.Turns[0][name]; !there || x != nil {
			t.Errorf("%s is %v", name, x)
		}
	}
	if doc.Turns[0]["direction"] != "up" || doc.Turns[0]["pointer"] != "/structure/damping_ratio" {
		t.Errorf("%v", doc.Turns[0])
	}
	a.Turns = []regime.Turn{}
	if s := string(AppendJSON(nil, a, TurningPoints)); s != `{"turning_points":[]}` {
		t.Error(s)
	}
	if s := sectionOf(string(AppendText(nil, a, TextOptions{})), whatWouldChange); !strings.Contains(s, "No input by itself") {
		t.Error(s)
	}
}

// A pressure that was given as a gauge pressure comes back as one.
func TestGaugeTurns(t *testing.T) {
	a := classify(t, pressed)
	if err := whatif.Explore(context.Background(), a); err != nil {
		t.Fatal(err)
	}
	rows := 0
	for _, raw := range decode(t, a)["turning_points"].([]any) {
		point := raw.(map[string]any)
		if gauge, there := point["gauge"]; there != (point["input"] == "fluid.pressure") || there && gauge != true {
			t.Errorf("%v", point)
		}
		rows++
	}
	if rows == 0 || kind.Find("pipe") == nil {
		t.Errorf("%d turning points", rows)
	}
}
