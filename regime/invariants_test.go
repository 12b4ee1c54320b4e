package regime_test

import (
	"maps"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/kind"
	"regimed/regime/ladder"
)

// tally counts what came up in a property test.
type tally struct {
	drawn, classified int
	classes           map[string]int
	violations        map[string]int
}

func newTally() *tally { return &tally{classes: map[string]int{}, violations: map[string]int{}} }

// classified decodes and classifies a sample, and counts the outcome.
func (c *tally) classify(t *rapid.T, s *sample, spell speller) *regime.Answer {
	c.drawn++
	doc := s.document(spell)
	a, bad, err := classify(doc)
	if err != nil {
		t.Fatalf("%v\n%s", err, pretty(doc))
	}
	if len(bad) > 0 {
		for _, v := range bad {
			c.violations[v.Pointer+" "+string(v.Code)]++
		}
		return nil
	}
	c.classified++
	c.classes[a.Recommendation.Class.ID]++
	return a
}

// require fails where fewer than a share of the drawn cases classified, or
// where fewer than a number of classes came up.
func (c *tally) require(t *testing.T, share float64, classes int) {
	t.Helper()
	t.Logf("%d of %d drawn cases classified", c.classified, c.drawn)
	for _, k := range ladder.Classes {
		t.Logf("%6d %s", c.classes[k.ID], k.ID)
	}
	if len(c.classes) < classes {
		t.Errorf("the drawn cases lead to %d classes, want %d", len(c.classes), classes)
	}
	for _, k := range slices.Sorted(maps.Keys(c.violations)) {
		t.Logf("%6d refused: %s", c.violations[k], k)
	}
	if float64(c.classified) < share*float64(c.drawn) {
		t.Errorf("only %d of %d drawn cases classified; want %g of them", c.classified, c.drawn, share)
	}
}

// check holds a property for cases drawn with care, most of which must classify,
// and for cases drawn field by field, of which many are refused.
func check(t *testing.T, property func(t *rapid.T, s *sample, c *tally)) {
	t.Helper()
	for _, g := range []struct {
		name    string
		cases   *rapid.Generator[*sample]
		share   float64
		classes int
	}{{"with care", cases(), 0.9, 14}, {"field by field", anyCases(), 0.15, 8}} {
		t.Run(g.name, func(t *testing.T) {
			c := newTally()
			rapid.Check(t, func(rt *rapid.T) { property(rt, g.cases.Draw(rt, "case"), c) })
			c.require(t, g.share, g.classes)
		})
	}
}

// row is the place of a class in the ladder.
func row(c *ladder.Class) int {
	for i := range ladder.Classes {
		if &ladder.Classes[i] == c {
			return i
		}
	}
	return -1
}

// ruledOut returns the assumptions of a class that are invalid and of interest,
// worked out from the verdicts alone.
func ruledOut(c *ladder.Class, fs []finding.Finding) []*assumption.Entry {
	var list []*assumption.Entry
	for _, e := range c.RestsOn {
		f := &fs[e.Index()]
		if f.Verdict == finding.Invalid && f.OfInterest {
			list = append(list, e)
		}
	}
	return list
}

// The recommended class rests on no invalid assumption; every cheaper candidate
// rests on one, which the answer names; and what is marginal or undetermined
// comes along as a condition.
func TestRecommendationIsTheCheapestThatHolds(t *testing.T) {
	rejected, classified := 0, 0
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		a := c.classify(rt, s, asAnalystsWrite)
		if a == nil {
			return
		}
		classified++
		r := &a.Recommendation
		if bad := ruledOut(r.Class, a.Findings); len(bad) > 0 {
			rt.Fatalf("%s rests on the invalid %s", r.Class.ID, bad[0].ID)
		}
		if !r.Class.Domain.Covers(a.Kind.Name, a.Groups.Traits) {
			rt.Fatalf("%s is outside its domain", r.Class.ID)
		}
		next := 0
		for i := range ladder.Classes[:row(r.Class)] {
			k := &ladder.Classes[i]
			if !k.Domain.Covers(a.Kind.Name, a.Groups.Traits) {
				continue
			}
			why := ruledOut(k, a.Findings)
			if len(why) == 0 {
				rt.Fatalf("%s is cheaper than %s and holds", k.ID, r.Class.ID)
			}
			if next >= len(r.Rejected) || r.Rejected[next].Class != k || !slices.Equal(r.Rejected[next].Because, why) {
				rt.Fatalf("the answer does not say that %s fell by %v", k.ID, why)
			}
			next++
			rejected++
		}
		if next != len(r.Rejected) {
			rt.Fatalf("%d classes are rejected, %d are cheaper candidates", len(r.Rejected), next)
		}
		requireConditions(rt, a)
	})
	if rejected < classified/2 {
		t.Errorf("only %d rejected candidates in %d answers: the drawn cases are too tame", rejected, classified)
	}
}

func requireConditions(t *rapid.T, a *regime.Answer) {
	var want []*assumption.Entry
	for _, e := range a.Recommendation.Class.RestsOn {
		f := &a.Findings[e.Index()]
		if f.OfInterest && (f.Verdict == finding.Marginal || f.Verdict == finding.Undetermined) {
			want = append(want, e)
		}
	}
	if !slices.Equal(want, a.Recommendation.Conditions) {
		t.Fatalf("conditions %v, want %v", a.Recommendation.Conditions, want)
	}
	for _, s := range a.Recommendation.IfSettled {
		if a.Findings[s.Entry.Index()].Verdict != finding.Undetermined || row(s.Class) <= row(a.Recommendation.Class) {
			t.Fatalf("were %s invalid, the class would be %s: no dearer than %s", s.Entry.ID, s.Class.ID, a.Recommendation.Class.ID)
		}
	}
}

// resolve returns a case with the study it asks for, nil where it is refused.
func resolve(t *rapid.T, s *sample, c *tally) (*kind.Resolved, finding.Study) {
	a := c.classify(t, s, asAnalystsWrite)
	if a == nil {
		return nil, finding.Study{}
	}
	r, _, bad := kind.Resolve(a.Case)
	if len(bad) > 0 {
		t.Fatalf("the same case resolves once and not again: %v", bad)
	}
	return r, kind.StudyOf(a.Case)
}

// Loosening a tolerance never makes the recommended class dearer, and no
// verdict worse.
func TestLooserToleranceIsNeverDearer(t *testing.T) {
	cheaper, classified := 0, 0
	factor := rapid.SampledFrom([]float64{1, 1, 1.01, 1.5, 3, 10, 1000})
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		r, study := resolve(rt, s, c)
		if r == nil {
			return
		}
		classified++
		tight := regime.Decide(r, study)
		study.Tolerance.Frequency *= factor.Draw(rt, "frequency")
		study.Tolerance.Load *= factor.Draw(rt, "load")
		study.Tolerance.Response *= factor.Draw(rt, "response")
		loose := regime.Decide(r, study)
		requireNoDearer(rt, tight, loose)
		for i := range tight.Findings {
			if before, now := tight.Findings[i].Verdict, loose.Findings[i].Verdict; now > before {
				rt.Fatalf("%s turns from %s to %s", assumption.Catalogue[i].ID, before, now)
			}
		}
		if row(loose.Recommendation.Class) < row(tight.Recommendation.Class) {
			cheaper++
		}
	})
	t.Logf("%d cases got a cheaper class", cheaper)
	if cheaper < classified/50 {
		t.Errorf("only %d of %d cases got a cheaper class: the drawn tolerances decide too little", cheaper, classified)
	}
}

func requireNoDearer(t *rapid.T, before, after *regime.Answer) {
	b, a := before.Recommendation.Class, after.Recommendation.Class
	if a.Rank > b.Rank || row(a) > row(b) {
		t.Fatalf("%s (rank %d) becomes %s (rank %d)", b.ID, b.Rank, a.ID, a.Rank)
	}
}

// Asking for fewer measures never makes the recommended class dearer.
func TestNarrowerInterestIsNeverDearer(t *testing.T) {
	cheaper, classified := 0, 0
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		r, study := resolve(rt, s, c)
		if r == nil {
			return
		}
		classified++
		wide := regime.Decide(r, study)
		study.Interest &= finding.Interest(rapid.Uint8().Draw(rt, "interest"))
		narrow := regime.Decide(r, study) // of the same scales: only what counts has changed
		requireNoDearer(rt, wide, narrow)
		if row(narrow.Recommendation.Class) < row(wide.Recommendation.Class) {
			cheaper++
		}
	})
	if cheaper < classified/50 {
		t.Errorf("only %d of %d cases got a cheaper class", cheaper, classified)
	}
}

// Classifying twice gives the same record: no order of a map and no memory of
// an earlier case shows.
func TestClassifyIsRepeatable(t *testing.T) {
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		doc := s.document(asAnalystsWrite)
		c.classify(rt, s, asAnalystsWrite)
		one, bad1, _ := classify(doc)
		two, bad2, _ := classify(doc)
		if !slices.Equal(bad1, bad2) {
			rt.Fatalf("violations differ: %v and %v", bad1, bad2)
		}
		if one == nil {
			return
		}
		if d := (comparison{relative: 0}).answers(one, two); d != "" {
			rt.Fatal(d)
		}
		if one.Case.Digest() != two.Case.Digest() {
			rt.Fatal("the digest differs")
		}
	})
}
