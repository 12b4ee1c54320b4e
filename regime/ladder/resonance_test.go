package ladder_test

import (
	"testing"

	"regimed/regime/assumption"
	"regimed/regime/ladder"
)

// Standing sound is beyond the classes that follow steady coefficients: no
// class below the resolved ones may stand in its presence.
func TestSoundAcrossADuct(t *testing.T) {
	const rows = 3
	ran := 0
	for _, id := range []string{"quasi-steady", "static-aeroelastic", "quasi-static-array"} {
		found := false
		for _, e := range ladder.Find(id).RestsOn {
			found = found || e == assumption.NoAcousticResonance
		}
		if !found {
			t.Errorf("%s does not rest on %s", id, assumption.NoAcousticResonance.ID)
		}
		ran++
	}
	if ran != rows {
		t.Errorf("ran %d rows, want %d", ran, rows)
	}
}
