package main

import (
	"context"
	"math"
	"path/filepath"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// At every turning point of every shipped case the class is that of the case just
// before, and the one that was said just beyond, where the finding has the
// verdict that was said.
func TestTurningPointsTurn(t *testing.T) {
	cases, turns, domains := 0, 0, 0
	for _, file := range caseFiles(t, "../../testdata/cases") {
		d, err := readDocument(file, strings.NewReader(""))
		if err != nil {
			t.Fatal(err)
		}
		a, err := d.classify()
		if err != nil {
			t.Fatal(err)
		}
		if err := whatif.Explore(context.Background(), a); err != nil {
			t.Fatal(err)
		}
		for i := range a.Turns {
			turn := &a.Turns[i]
			turns++
			if turn.Entry == nil {
				domains++
			}
			verifyTurn(t, filepath.Base(file), a, turn)
		}
		cases++
	}
	t.Logf("%d cases, %d turning points, %d of them of the domain", cases, turns, domains)
	if cases < 51 || turns < 400 {
		t.Errorf("%d cases, %d turning points", cases, turns)
	}
}

func verifyTurn(t *testing.T, file string, a *regime.Answer, turn *regime.Turn) {
	t.Helper()
	name := file + ", " + turn.Place.Path()
	beyond := at(a.Case, turn, 1e-6)
	if beyond == nil { // an edge lies there: as near as it can be
		beyond = at(a.Case, turn, 0)
	}
	if beyond == nil || beyond.Recommendation.Class != turn.Class {
		t.Errorf("%s: beyond %v not %s", name, turn.Value, turn.Class.ID)
		return
	}
	if e := turn.Entry; e != nil && beyond.Findings[e.Index()].Verdict != turn.Verdict {
		t.Errorf("%s: beyond %v %s is %v, not %v", name, turn.Value, e.ID, beyond.Findings[e.Index()].Verdict, turn.Verdict)
	}
	if turn.Value == 0 {
		return
	}
	if before := at(a.Case, turn, -1e-6); before == nil || before.Recommendation.Class != a.Recommendation.Class {
		t.Errorf("%s: before %v not %s", name, turn.Value, a.Recommendation.Class.ID)
	}
}

// at is the answer a share of the value beyond a turning point, or before it; a
// whole number goes by one. Nil: the case is refused there.
func at(c *input.Case, turn *regime.Turn, by float64) *regime.Answer {
	d := c.Clone()
	for _, p := range d.Places() {
		d.Set(p, d.At(p).Value) // certain
	}
	side := -1.0
	if turn.Up {
		side = 1
	}
	x := turn.Value + side*by*math.Abs(turn.Value)
	if turn.Place.Field.Type == input.Integer && by < 0 {
		x = turn.Value - side
	}
	if !d.Set(turn.Place, x) {
		return nil
	}
	a, bad := regime.Judge(d)
	if len(bad) > 0 {
		return nil
	}
	return a
}
