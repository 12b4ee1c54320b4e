package ladder_test

import (
	"regexp"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/ladder"
)

// row is the place of a class in the ladder, −1 where it is no row.
func row(c *ladder.Class) int {
	for i := range ladder.Classes {
		if &ladder.Classes[i] == c {
			return i
		}
	}
	return -1
}

// all gives every assumption the same verdict.
func all(v finding.Verdict) []finding.Finding {
	fs := make([]finding.Finding, len(assumption.Catalogue))
	for i := range fs {
		fs[i].Verdict, fs[i].OfInterest, fs[i].Governing = v, true, -1
	}
	return fs
}

var (
	kebab  = regexp.MustCompile(`^[a-z0-9]+(-[a-z0-9]+)*$`)
	states = []group.Traits{group.Still, group.Cross, group.Axial, group.Grazing, group.Internal, group.Waves, group.Contained}
)

func kinds() []string {
	var names []string
	for _, k := range kind.All {
		names = append(names, k.Name)
	}
	return names
}

// cases are kinds in every fluid state and in none, with the traits that
// domains ask for.
func cases() []where {
	extra := []group.Traits{0, group.Film, group.NearSurface, group.ViscousSolved, group.ViscousSolved | group.NearSurface}
	for _, c := range ladder.Classes {
		for _, t := range []group.Traits{c.Domain.Needs, c.Domain.Bars} {
			if t != 0 && !slices.Contains(extra, t) {
				extra = append(extra, t)
			}
		}
	}
	var list []where
	for _, k := range kinds() {
		list = append(list, where{k, 0})
		for _, s := range states {
			for _, e := range extra {
				list = append(list, where{k, group.Fluid | s | e})
			}
		}
	}
	return list
}

// where is a kind of structure and the traits of a case.
type where struct {
	kind   string
	traits group.Traits
}

func (w where) choose(fs []finding.Finding) ladder.Recommendation {
	g := group.New()
	g.Traits = w.traits
	return ladder.Choose(w.kind, g, fs)
}

// The rows are in order, named, and rest on assumptions of the catalogue, each
// once; the last rests on nothing and can be asked anywhere.
func TestRows(t *testing.T) {
	seen := map[string]bool{}
	rank := 0
	for _, c := range ladder.Classes {
		if !kebab.MatchString(c.ID) || seen[c.ID] || c.Title == "" || c.Solves == "" {
			t.Errorf("class %q is named %q and solves %q", c.ID, c.Title, c.Solves)
		}
		seen[c.ID] = true
		if c.Rank < rank {
			t.Errorf("%s, of rank %d, stands after rank %d", c.ID, c.Rank, rank)
		}
		rank = c.Rank
		if found := ladder.Find(c.ID); found == nil || found.ID != c.ID {
			t.Errorf("%s is not found", c.ID)
		}
		requireRests(t, &c)
		for _, name := range c.Domain.Kinds {
			if kind.Find(name) == nil {
				t.Errorf("%s is for the kind %q, which there is not", c.ID, name)
			}
		}
		for _, axis := range ladder.AxisList {
			if v := *axis.Of(&c.Axes); v != "" && !slices.Contains(axis.Values, v) {
				t.Errorf("%s fixes %s at %q", c.ID, axis.ID, v)
			}
		}
		if c.Axes.Fluid == "" || c.Axes.Coupling == "" {
			t.Errorf("%s leaves fluid or coupling open", c.ID)
		}
	}
	last := &ladder.Classes[len(ladder.Classes)-1]
	if len(last.RestsOn) > 0 {
		t.Errorf("the last class rests on %v", last.RestsOn)
	}
	for _, w := range cases() {
		if !last.Domain.Covers(w.kind, w.traits) {
			t.Errorf("the last class does not cover a %s with traits %b", w.kind, w.traits)
		}
	}
	if ladder.Find("no-such-class") != nil {
		t.Error("a class is found that is none")
	}
}

func requireRests(t *testing.T, c *ladder.Class) {
	t.Helper()
	seen := map[*assumption.Entry]bool{}
	for _, e := range c.RestsOn {
		if e == nil || assumption.Catalogue[e.Index()] != e {
			t.Errorf("%s rests on %v, which is not in the catalogue", c.ID, e)
			continue
		}
		if seen[e] {
			t.Errorf("%s rests on %s twice", c.ID, e.ID)
		}
		seen[e] = true
	}
}

// Every axis of every recommendation has one of its values.
func requireAxes(t *testing.T, r *ladder.Recommendation) {
	t.Helper()
	for _, axis := range ladder.AxisList {
		if v := *axis.Of(&r.Axes); !slices.Contains(axis.Values, v) {
			t.Fatalf("%s has %s = %q, which is none of %v", r.Class.ID, axis.ID, v, axis.Values)
		}
	}
}

func TestAxisList(t *testing.T) {
	var a ladder.Axes
	seen := map[*string]bool{}
	for _, axis := range ladder.AxisList {
		p := axis.Of(&a)
		if seen[p] || len(axis.Values) < 2 || axis.ID == "" {
			t.Errorf("axis %s", axis.ID)
		}
		seen[p] = true
		sorted := slices.Compact(slices.Sorted(slices.Values(axis.Values)))
		if len(sorted) != len(axis.Values) {
			t.Errorf("%s has a value twice", axis.ID)
		}
	}
	if len(seen) != 11 {
		t.Errorf("%d axes", len(seen))
	}
}

// Where everything holds the cheapest candidate stands; where nothing does, the last class.
func TestBothEnds(t *testing.T) {
	rows := 0
	for _, w := range cases() {
		rows++
		best, worst := w.choose(all(finding.Valid)), w.choose(all(finding.Invalid))
		for i := range ladder.Classes[:row(best.Class)] {
			if ladder.Classes[i].Domain.Covers(w.kind, w.traits) {
				t.Errorf("%s is passed over although all holds", ladder.Classes[i].ID)
			}
		}
		if len(best.Rejected)+len(best.Conditions)+len(best.IfSettled) != 0 {
			t.Errorf("all holds, and %d classes fell, %d conditions", len(best.Rejected), len(best.Conditions))
		}
		if worst.Class != &ladder.Classes[len(ladder.Classes)-1] {
			t.Errorf("nothing holds, and %s is recommended", worst.Class.ID)
		}
		requireAxes(t, &best)
		requireAxes(t, &worst)
	}
	if rows < 100 {
		t.Errorf("%d rows", rows)
	}
}

// One assumption, and two, made invalid: a class stands, and none that rests on them.
func TestOneAndTwoInvalid(t *testing.T) {
	rows := 0
	list := cases()
	n := len(assumption.Catalogue)
	for i := range n {
		for j := i; j < n; j++ {
			fs := all(finding.Valid)
			fs[i].Verdict, fs[j].Verdict = finding.Invalid, finding.Invalid
			w := list[(i*n+j)%len(list)]
			r := w.choose(fs)
			rows++
			if slices.ContainsFunc(r.Class.RestsOn, func(e *assumption.Entry) bool { return e.Index() == i || e.Index() == j }) {
				t.Errorf("%s rests on %s or %s", r.Class.ID, assumption.Catalogue[i].ID, assumption.Catalogue[j].ID)
			}
			for _, out := range r.Rejected {
				if len(out.Because) == 0 {
					t.Errorf("%s is rejected for nothing", out.Class.ID)
				}
			}
			requireAxes(t, &r)
		}
	}
	if rows != n*(n+1)/2 {
		t.Errorf("%d rows", rows)
	}
}

// Each assumption that a class rests on can by itself make the answer dearer.
func TestEveryRestDecidesSomewhere(t *testing.T) {
	decides := make([]bool, len(assumption.Catalogue))
	for _, w := range cases() {
		best := w.choose(all(finding.Valid))
		for _, e := range best.Class.RestsOn {
			fs := all(finding.Valid)
			fs[e.Index()].Verdict = finding.Invalid
			if r := w.choose(fs); row(r.Class) <= row(best.Class) {
				t.Errorf("%s is invalid, and %s stays", e.ID, best.Class.ID)
			}
			decides[e.Index()] = true
		}
	}
	count := 0
	for _, d := range decides {
		if d {
			count++
		}
	}
	if count < 10 {
		t.Errorf("only %d assumptions ever decide by themselves", count)
	}
}

var verdicts = []finding.Verdict{finding.NotApplicable, finding.Valid, finding.Valid, finding.Valid, finding.Valid, finding.Marginal, finding.Undetermined, finding.Invalid}

// drawn draws a vector of verdicts: mostly good, so that cheap classes stand too.
func drawn(t *rapid.T) []finding.Finding {
	fs := all(finding.Valid)
	good := rapid.IntRange(0, len(verdicts)).Draw(t, "good")
	for i := range fs {
		fs[i].Verdict = rapid.SampledFrom(verdicts).Draw(t, "verdict")
		if fs[i].Verdict == finding.Invalid && rapid.IntRange(0, len(verdicts)-1).Draw(t, "spared") < good {
			fs[i].Verdict = finding.Marginal
		}
		fs[i].OfInterest = rapid.IntRange(0, 5).Draw(t, "of interest") > 0
	}
	return fs
}

// For any verdicts a class stands that rests on none that is invalid; worsening
// one of them never gives a cheaper class, and no class is dearer for a finding
// that is not of interest.
func TestAnyVerdicts(t *testing.T) {
	list := cases()
	stands := map[string]int{}
	rapid.Check(t, func(rt *rapid.T) {
		w := rapid.SampledFrom(list).Draw(rt, "where")
		fs := drawn(rt)
		r := w.choose(fs)
		if row(r.Class) < 0 || !r.Class.Domain.Covers(w.kind, w.traits) {
			rt.Fatalf("%v is recommended outside its domain", r.Class)
		}
		stands[r.Class.ID]++
		for _, e := range r.Class.RestsOn {
			if f := &fs[e.Index()]; f.Verdict == finding.Invalid && f.OfInterest {
				rt.Fatalf("%s rests on the invalid %s", r.Class.ID, e.ID)
			}
		}
		requireAxes(t, &r)
		requireSettled(rt, w, fs, &r)

		i := rapid.IntRange(0, len(fs)-1).Draw(rt, "worsened")
		worse := slices.Clone(fs)
		worse[i].Verdict = finding.Verdict(rapid.IntRange(int(fs[i].Verdict), int(finding.Invalid)).Draw(rt, "to"))
		if d := w.choose(worse); row(d.Class) < row(r.Class) || !fs[i].OfInterest && d.Class != r.Class {
			rt.Fatalf("%s turns from %s to %s (of interest: %v), and %s becomes %s", assumption.Catalogue[i].ID, fs[i].Verdict, worse[i].Verdict,
				fs[i].OfInterest, r.Class.ID, d.Class.ID)
		}
	})
	t.Logf("%v", stands)
	if len(stands) < len(ladder.Classes)*2/3 {
		t.Errorf("only %d of %d classes ever stand", len(stands), len(ladder.Classes))
	}
}

// requireSettled checks that an undetermined assumption leads to the class that
// is chosen once it is invalid, and is named exactly where that is another one.
func requireSettled(t *rapid.T, w where, fs []finding.Finding, r *ladder.Recommendation) {
	named := map[*assumption.Entry]*ladder.Class{}
	for _, s := range r.IfSettled {
		named[s.Entry] = s.Class
	}
	for _, e := range r.Class.RestsOn {
		f := &fs[e.Index()]
		if f.Verdict != finding.Undetermined || !f.OfInterest {
			if named[e] != nil {
				t.Fatalf("%s is %s and is named as what could change the answer", e.ID, f.Verdict)
			}
			continue
		}
		settled := slices.Clone(fs)
		settled[e.Index()].Verdict = finding.Invalid
		next := w.choose(settled)
		if next.Class == r.Class || named[e] != next.Class {
			t.Fatalf("were %s invalid, %s would stand; named is %v", e.ID, next.Class.ID, named[e])
		}
		delete(named, e)
	}
	if len(named) > 0 {
		t.Fatalf("%v do not decide", named)
	}
}

// A class is a candidate where its domain covers all fluid states of the case.
func TestDomainCoversAllStates(t *testing.T) {
	rows := 0
	for i := range ladder.Classes {
		d := &ladder.Classes[i].Domain
		for _, a := range states {
			for _, b := range states {
				rows++
				name := kinds()[0]
				if len(d.Kinds) > 0 {
					name = d.Kinds[0]
				}
				t0 := group.Fluid | d.Needs
				one, two := d.Covers(name, t0|a), d.Covers(name, t0|b)
				if both := d.Covers(name, t0|a|b); both != (one && two) && !t0.Any(d.Bars) {
					t.Errorf("%s covers %b and %b: %v, %v; together: %v", ladder.Classes[i].ID, a, b, one, two, both)
				}
			}
		}
		if d.Covers("no-such-kind", group.Fluid) && len(d.Kinds) > 0 {
			t.Errorf("%s covers any kind", ladder.Classes[i].ID)
		}
	}
	if rows != len(ladder.Classes)*49 {
		t.Errorf("%d rows", rows)
	}
}
