package render

import (
	"regexp"
	"strings"
	"testing"
	"unicode/utf8"

	"pgregory.net/rapid"

	"regimed/regime/assumption"
)

var escapes = regexp.MustCompile("\x1b\\[[0-9]*m")

func TestTextBeginsWithTheRecommendation(t *testing.T) {
	for name, a := range answers(t) {
		top := strings.Join(strings.SplitN(string(AppendText(nil, a, TextOptions{})), "\n", 4)[:3], "\n")
		c := a.Recommendation.Class
		if !strings.Contains(top, c.Title) || !strings.Contains(top, c.ID) || !strings.Contains(top, c.Solves) {
			t.Errorf("%s: begins with\n%s", name, top)
		}
	}
}

func TestTextKeepsTheWidth(t *testing.T) {
	lines := 0
	for name, a := range answers(t) {
		for _, width := range []int{0, 80, 81, 96, 100, 160} {
			most := width
			if width == 0 {
				most = usualWidth
			}
			out := string(AppendText([]byte("before\n"), a, TextOptions{Width: width}))
			if !strings.HasPrefix(out, "before\nRecommended") {
				t.Fatalf("%s: does not append", name)
			}
			for line := range strings.Lines(out) {
				lines++
				if n := utf8.RuneCountInString(strings.TrimSuffix(line, "\n")); n > most {
					t.Errorf("%s at %d: %d columns: %s", name, width, n, line)
				}
			}
			if i := strings.IndexFunc(out, func(r rune) bool { return r != '\n' && harmless(r) != r }); i >= 0 {
				t.Errorf("%s: control character in %q", name, out[max(0, i-20):i+5])
			}
			for _, bad := range []string{"NaN", "undefined", "infinite", "unknown", "{", "  .\n"} {
				if strings.Contains(out, bad) {
					t.Errorf("%s: contains %q", name, bad)
				}
			}
		}
	}
	if lines < 1500 {
		t.Errorf("only %d lines", lines)
	}
}

func TestColoursChangeNoText(t *testing.T) {
	for name, a := range answers(t) {
		bare, coloured := string(AppendText(nil, a, TextOptions{})), string(AppendText(nil, a, TextOptions{Colour: true}))
		if bare == coloured || escapes.ReplaceAllString(coloured, "") != bare {
			t.Errorf("%s: colours change the text", name)
		}
	}
}

func TestTextShowsTheLadder(t *testing.T) {
	out := string(AppendText(nil, riser(t), TextOptions{}))
	for _, want := range []string{
		" x  1 Dry structure (dry-structure)\n         fluid-absent: frequency 22.5 % (limit 5 %)",
		" >  6 Wake oscillator (wake-model) ", "  recommended\n",
		" . 10 Two-way, implicit (two-way-implicit) ", "not needed",
		"\nHazards\n x no-lock-in ", "\n  ! Vortex-induced vibration", "circle has no transverse force",
		"vortex shedding of the fixed body", "1.02 × wet", "assumed, standard gravity",
	} {
		if !strings.Contains(out, want) {
			t.Errorf("no %q in\n%s", want, out)
		}
	}
	if strings.Contains(out, "conveying-beam") {
		t.Error("a class that the case cannot ask for is on the ladder")
	}
}

// TestConditionsAreGrouped looks for one line a missing input, the bound that
// is hardest to keep first.
func TestConditionsAreGrouped(t *testing.T) {
	out := string(AppendText(nil, panel(t), TextOptions{Width: 120}))
	if !strings.Contains(out, "motion.amplitude not given: small-displacement holds up to 4.116 mm; small-stroke holds up to 66.67 mm.") {
		t.Errorf("conditions in\n%s", out)
	}
	if strings.Count(out, "motion.amplitude not given") != 1 || strings.Count(out, "turns out not to hold") != 1 {
		t.Errorf("not grouped:\n%s", out)
	}
}

func TestBar(t *testing.T) {
	b := newTable(96)
	rows := []struct {
		u, phi float64
		want   string
	}{
		{1e-6, 1, "············|············"},
		{0.5, 1, "===========·|············"},
		{1, 1, "============|············"},
		{1, 2, "===========-|--··········"},
		{0.1, 3, "=======---··|············"},
		{0.9, 1.15, "============|-···········"},
		{30, 1.15, "============|======-·····"},
		{1e6, 3, "============|============"},
	}
	for _, r := range rows {
		if got := string(b.bar(nil, r.u, r.phi, r.phi)); got != r.want {
			t.Errorf("u = %v, φ = %v:\n%s\n%s", r.u, r.phi, got, r.want)
		}
	}
	if len(rows) != 8 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestWrap(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		width := rapid.IntRange(20, 60).Draw(t, "width")
		words := rapid.SliceOf(rapid.StringMatching(`[a-zμζ=%0-9]{1,30}`)).Draw(t, "words")
		lead := strings.Repeat(" ", rapid.IntRange(0, 8).Draw(t, "indent"))
		p := &page{width: width}
		p.wrap(plain, lead, []byte(strings.Join(words, " ")))
		for line := range strings.Lines(string(p.dst)) {
			if n := utf8.RuneCountInString(strings.TrimSuffix(line, "\n")); n > width {
				t.Fatalf("%d columns of %d: %q", n, width, line)
			}
		}
		if got, want := squeeze(string(p.dst)), strings.Join(words, ""); got != want {
			t.Fatalf("%q became %q", want, got)
		}
	})
}

func squeeze(s string) string { return strings.Join(strings.Fields(s), "") }

func TestWrapKeepsUnits(t *testing.T) {
	p := &page{width: 20}
	p.wrap(plain, "", []byte("the limit was set 5 % and L = 300 mm"))
	if got := string(p.dst); got != "the limit was set\n5 % and L = 300 mm\n" {
		t.Errorf("%q", got)
	}
}

func TestJudgedComesWorstFirst(t *testing.T) {
	a := riser(t)
	ordinary, hazards := judged(a)
	if len(ordinary)+len(hazards) < 15 || len(hazards) != 1 || hazards[0] != assumption.NoLockIn {
		t.Fatalf("%d and %d", len(ordinary), len(hazards))
	}
	for i := 1; i < len(ordinary); i++ {
		if severity(&a.Findings[ordinary[i].Index()]) > severity(&a.Findings[ordinary[i-1].Index()]) {
			t.Errorf("%s comes too late", ordinary[i].ID)
		}
	}
}
