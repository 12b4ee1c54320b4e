package regime_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
)

// extremes are numbers that are finite and no engineer's.
var extremes = []float64{0, math.Copysign(0, -1), 5e-324, 2.3e-308, 1e-300, 1e-150, 1e-100, 1e-40, 1e-16, 1e-8, 0.999, 1, 1.001, 2, 89.5,
	1e8, 1e16, 1e40, 1e100, 1e150, 1e300, math.MaxFloat64, -1e-300, -1, -1e300}

// No finite input makes a NaN, an infinity or a panic: it gives an answer, or
// violations that name the field.
func TestNoFiniteInputBreaks(t *testing.T) {
	c := newTally()
	some := rapid.OneOf(cases(), cases(), anyCases())
	rapid.Check(t, func(rt *rapid.T) {
		s := some.Draw(rt, "case")
		distort(rt, s)
		c.drawn++
		doc := s.document(inSI)
		a, bad, err := classify(doc)
		if err != nil {
			rt.Fatalf("%v\n%s", err, pretty(doc))
		}
		if a == nil {
			requireNamed(rt, s, bad)
			for _, v := range bad {
				c.violations[string(v.Code)]++
			}
			return
		}
		c.classified++
		c.classes[a.Recommendation.Class.ID]++
		if where := notFinite(a); where != "" {
			rt.Fatalf("%s\n%s", where, pretty(doc))
		}
	})
	c.require(t, 0.15, 10)
	if c.drawn-c.classified < c.drawn/5 {
		t.Errorf("only %d of %d distorted cases were refused", c.drawn-c.classified, c.drawn)
	}
}

// distort puts extreme numbers into one to four of the numbers of a sample.
func distort(t *rapid.T, s *sample) {
	var numeric []int
	for i := range s.given {
		switch s.given[i].f.Type {
		case input.Quantity, input.Number, input.Interval:
			numeric = append(numeric, i)
		}
	}
	n := rapid.IntRange(1, 4).Draw(t, "distorted")
	for range n {
		e := &s.given[rapid.SampledFrom(numeric).Draw(t, "field")]
		e.spread = 0
		e.x = rapid.SampledFrom(extremes).Draw(t, "extreme")
		if e.f.Type == input.Interval {
			e.ends[rapid.IntRange(0, 1).Draw(t, "end")] = e.x
		}
	}
}

// requireNamed checks that each violation names a field of the schema, or an
// end of an interval, and says something.
func requireNamed(t *rapid.T, s *sample, bad []input.Violation) {
	if len(bad) == 0 {
		t.Fatal("no answer and no violation")
	}
	for _, v := range bad {
		if v.Sentence == "" || v.Code == "" || !wholeNumbers(v.Sentence) {
			t.Fatalf("violation %+v", v)
		}
		path := strings.ReplaceAll(strings.TrimPrefix(v.Pointer, "/"), "/", ".")
		path = strings.TrimSuffix(strings.TrimSuffix(path, ".0"), ".1")
		if path == "fluid" && v.Code == input.MissingField {
			continue
		}
		if block, rest, _ := strings.Cut(path, "."); block == "structure" { // an object of a list
			path = block + "." + strings.Split(rest, ".")[0]
		}
		if !strings.HasPrefix(v.Pointer, "/") || field(s.kind, path) == nil {
			t.Fatalf("violation at %q names no field: %s", v.Pointer, v.Sentence)
		}
	}
}

func wholeNumbers(sentence string) bool {
	return !strings.Contains(sentence, "NaN") && !strings.Contains(sentence, "Inf")
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// notFinite names the first place of an answer where a number is missing that
// should be there, "" where all is well.
func notFinite(a *regime.Answer) string {
	for id := scale.ID(0); id < scale.Count; id++ {
		if a.Scales.Has(id) != finite(a.Scales.X(id)) {
			return "scale " + scale.Of(id).ID
		}
	}
	for id := group.ID(0); id < group.Count; id++ {
		if a.Groups.Has(id) != finite(a.Groups.Get(id)) {
			return "group " + group.Of(id).ID
		}
		if n := a.Groups.Need(id); a.Groups.State(id) == group.Missing && (n.Input == "" || !finite(n.Coefficient) || !finite(n.Power)) {
			return fmt.Sprintf("need of group %s: %+v", group.Of(id).ID, n)
		}
	}
	f := a.Groups.Factors
	for _, x := range []float64{f.Inertia, f.Viscous, f.Acoustic, f.Flow, f.Buckling, f.Flutter, f.Stiffening, f.StallPerRadian} {
		if !finite(x) {
			return "a model-form factor"
		}
	}
	for _, v := range a.Groups.Modes.V[:a.Groups.Modes.N] {
		if !finite(v) {
			return "a mode"
		}
	}
	for i := range a.Findings {
		if f := &a.Findings[i]; !soundFinding(f) {
			return fmt.Sprintf("finding %s: %s %+v", assumption.Catalogue[i].ID, f.Verdict, f.Parts())
		}
	}
	return notFiniteWords(a.Warnings)
}

func notFiniteWords(warnings []kind.Warning) string {
	for _, w := range warnings {
		if !wholeNumbers(w.Sentence) || w.Code == "" || w.Pointer == "" {
			return "warning " + w.Sentence
		}
	}
	return ""
}

// soundFinding checks that every part has a finite estimate, limit and factor,
// and a utilisation that is kept within its bounds.
func soundFinding(f *finding.Finding) bool {
	if (f.Verdict == finding.NotApplicable) != (f.Reason != nil) || (f.Verdict == finding.NotApplicable) != (len(f.Parts()) == 0) {
		return false
	}
	for i := range f.Parts() {
		p := &f.Parts()[i]
		if !(p.Limit > 0) || !(p.Factor >= 1) || !(p.Inner >= 1) || !finite(p.Limit*p.Factor*p.Inner) || p.Say == nil || p.Source == nil {
			return false
		}
		if p.Waits && (p.Hold <= 0 || math.IsInf(p.Hold, 0)) {
			return false
		}
		if !p.Waits && (!finite(p.Estimate) || p.Estimate < 0 || !(p.Utilisation >= 1e-6) || p.Utilisation > 1e6) {
			return false
		}
	}
	for _, p := range f.Published() {
		if !(p.Utilisation >= 1e-6) || p.Utilisation > 1e6 {
			return false
		}
	}
	return true
}

// The same of plain cases: nothing in an answer is short of a number.
func TestAnswersAreFinite(t *testing.T) {
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		if a := c.classify(rt, s, asAnalystsWrite); a != nil {
			if where := notFinite(a); where != "" {
				rt.Fatal(where)
			}
		}
	})
}
