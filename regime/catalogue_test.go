package regime_test

import (
	"slices"
	"testing"

	"pgregory.net/rapid"
	"regimed/regime/assumption"

	"regimed/regime/finding"
	"regimed/regime/group"
)

// neverInvalid are assumptions that no case can make invalid, with the reason.
var neverInvalid = map[string]string{}

// Drawn cases bring out every verdict of every assumption, and an assumption
// that is not applicable says why in words of its own.
func TestEveryAssumptionGetsEveryVerdict(t *testing.T) {
	seen := make([]map[finding.Verdict]int, len(assumption.Catalogue))
	for i := range seen {
		seen[i] = map[finding.Verdict]int{}
	}
	unsaid := map[string]int{}
	const drawn = 16000
	classified := 0
	all := rapid.OneOf(cases(), cases(), anyCases())
	for n := range drawn {
		a, _, _ := classify(all.Example(n).document(inSI))
		if a == nil {
			continue
		}
		classified++
		if len(a.Findings) != len(assumption.Catalogue) {
			t.Fatalf("%d findings of %d assumptions", len(a.Findings), len(assumption.Catalogue))
		}
		for i := range a.Findings {
			f := &a.Findings[i]
			seen[i][f.Verdict]++
			if f.Verdict != finding.NotApplicable {
				continue
			}
			if f.Reason == nil || f.Reason.Text == "" {
				t.Fatalf("%s is not applicable without a reason", assumption.Catalogue[i].ID)
			}
			if f.Reason.Text == "What this assumption leaves out does not arise in this case." {
				unsaid[assumption.Catalogue[i].ID]++
			}
		}
	}
	if classified < drawn*3/4 {
		t.Errorf("only %d of %d drawn cases classified", classified, drawn)
	}
	for i, e := range assumption.Catalogue {
		t.Logf("%-28s %v", e.ID, seen[i])
		if seen[i][finding.Valid]+seen[i][finding.Marginal] == 0 {
			t.Errorf("%s never holds in a drawn case", e.ID)
		}
		if _, never := neverInvalid[e.ID]; (seen[i][finding.Invalid] == 0) != never {
			t.Errorf("%s is invalid in %d drawn cases", e.ID, seen[i][finding.Invalid])
		}
	}
	for _, e := range assumption.Catalogue {
		if n := unsaid[e.ID]; n > 0 && !slices.Contains(mayBeUnsaid, e.ID) {
			t.Errorf("%s is not applicable in %d drawn cases without a reason of its own", e.ID, n)
		}
	}
}

// mayBeUnsaid are assumptions that no class rests on and that need no reason of
// their own where they don't arise.
var mayBeUnsaid = []string{"two-dimensional"}

// What is undetermined names an input that the case has not given and could.
func TestUndeterminedNamesAnInput(t *testing.T) {
	inputs := map[string]int{}
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		a := c.classify(rt, s, asAnalystsWrite)
		if a == nil {
			return
		}
		for i := range a.Findings {
			f := &a.Findings[i]
			waits := false
			for j := range f.Parts() {
				p := &f.Parts()[j]
				if !p.Waits {
					continue
				}
				waits = true
				n := a.Groups.Need(p.Wait)
				if a.Groups.State(p.Wait) != group.Missing || field(s.kind, n.Input) == nil || s.has(n.Input) {
					rt.Fatalf("%s waits for %s, which waits for %q", assumption.Catalogue[i].ID, group.Of(p.Wait).ID, n.Input)
				}
				inputs[n.Input]++
			}
			if (f.Verdict == finding.Undetermined) && !waits {
				rt.Fatalf("%s is undetermined and waits for nothing", assumption.Catalogue[i].ID)
			}
		}
	})
	t.Logf("inputs waited for: %v", inputs)
	if len(inputs) < 15 {
		t.Errorf("only %d inputs are ever waited for", len(inputs))
	}
}
