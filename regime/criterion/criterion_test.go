package criterion

import "testing"

// Every criterion names its standard, clause, formula and source, and is there once.
func TestCriteriaAreComplete(t *testing.T) {
	seen := map[string]bool{}
	for _, c := range All {
		if c.ID == "" || c.Standard == "" || c.Clause == "" || c.Formula == "" || c.Source == nil || c.Say == nil || seen[c.ID] {
			t.Errorf("criterion %q lacks something, or is there twice", c.ID)
		}
		seen[c.ID] = true
	}
	if len(seen) < 10 {
		t.Errorf("%d criteria", len(seen))
	}
}
