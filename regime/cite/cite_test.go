package cite

import "testing"

func TestSourcesAreNamedOnceAndComplete(t *testing.T) {
	seen := map[string]bool{}
	shorts := map[string]string{}
	for _, s := range All() {
		if s.ID == "" || s.Short == "" || s.Full == "" {
			t.Errorf("source %+v lacks id, short form or full form", s)
		}
		if seen[s.ID] {
			t.Errorf("source %q is named twice", s.ID)
		}
		seen[s.ID] = true
		if other, dup := shorts[s.Short]; dup {
			t.Errorf("sources %q and %q share the short form %q", other, s.ID, s.Short)
		}
		shorts[s.Short] = s.ID
	}
	t.Logf("checked %d sources", len(seen))
}
