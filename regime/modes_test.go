package regime_test

import (
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// A case with several modes: each finding is that of its worst mode, and the
// class holds for all of them.
func TestSeveralModes(t *testing.T) {
	const rest = `"fluid":"air","flow":{"speed":"6 m/s"}`
	const body = `"kind":"cylinder","diameter":"0.2 m","length":"8 m","mass_per_length":"40 kg/m","support":"clamped-free","strouhal":0.2`
	one := func(mode string) *regime.Answer { return answer(t, `{"structure":{`+body+`,`+mode+`},`+rest+`}`) }
	both := answer(t, `{"structure":{`+body+`,"modes":[{"frequency_dry":"40 Hz","damping_ratio":"1 %"},{"frequency_dry":"6 Hz","damping_ratio":"0.1 %"}]},`+rest+`}`)
	high := one(`"frequency_dry":"40 Hz","damping_ratio":"1 %"`)
	low := one(`"frequency_dry":"6 Hz","damping_ratio":"0.1 %"`) // St U/(fD) = 1: locked in
	if high.Recommendation.Class.ID != "dry-structure" || low.Recommendation.Class.ID != "wake-model" {
		t.Fatalf("single modes give %s and %s", high.Recommendation.Class.ID, low.Recommendation.Class.ID)
	}
	if both.Recommendation.Class != low.Recommendation.Class || len(both.Modes) != 2 || both.Modes[0].Class != high.Recommendation.Class {
		t.Errorf("both modes give %s, by themselves %v", both.Recommendation.Class.ID, both.Modes)
	}
	if f := &both.Findings[assumption.NoLockIn.Index()]; f.Mode != 2 {
		t.Errorf("lock-in is judged for mode %d", f.Mode)
	}
	for i := range both.Findings {
		for _, a := range []*regime.Answer{high, low} {
			if a.Findings[i].WorseThan(&both.Findings[i]) {
				t.Errorf("%s is worse in a single mode", assumption.Catalogue[i].ID)
			}
		}
	}
}

// What is wrong in a mode is located there, and a frequency beside the modes
// has no mode to belong to.
func TestModesAreChecked(t *testing.T) {
	_, violations, err := input.Decode([]byte(`{"structure":{"kind":"cylinder","diameter":"1 m","modes":[{"frequency_dry":"1 Hz"},{"frequency_dri":"2 Hz","damping_ratio":-1}]}}`), kind.Schema())
	if err != nil || len(violations) != 2 || violations[0].Pointer != "/structure/modes/1/damping_ratio" || violations[1].Pointer != "/structure/modes/1/frequency_dri" {
		t.Errorf("%v %v", violations, err)
	}
	c, violations, err := input.Decode([]byte(`{"structure":{"kind":"cylinder","diameter":"1 m","frequency_dry":"3 Hz","modes":[{"frequency_dry":"1 Hz"}]}}`), kind.Schema())
	if err != nil || len(violations) > 0 {
		t.Fatal(violations, err)
	}
	if _, violations = regime.Classify(c); len(violations) != 1 || violations[0].Pointer != "/structure/frequency_dry" {
		t.Errorf("%v", violations)
	}
}

// A speed that is a range of operation is the field of its own.
func TestSpeedAsARangeOfOperation(t *testing.T) {
	const body = `{"structure":{"kind":"cylinder","diameter":"0.2 m","length":"8 m","mass_per_length":"40 kg/m","support":"clamped-free","frequency_dry":"6 Hz","damping_ratio":"0.1 %"},"fluid":"air","flow":`
	marked := answer(t, body+`{"speed":{"low":0,"high":12,"unit":"m/s","as":"range"}}}`)
	plain := answer(t, body+`{"operating":["0 m/s","12 m/s"]}}`)
	if marked.Case.Digest() != plain.Case.Digest() {
		t.Error("the two spellings are two cases")
	}
	if v := marked.Findings[assumption.NoLockIn.Index()].Verdict; v != finding.Invalid {
		t.Errorf("lock-in on the way to 12 m/s is %s", v)
	}
	for text, code := range map[string]input.Code{
		`{"speed":{"low":0,"high":12,"unit":"m/s","as":"band"}}`:                                input.UnknownChoice,
		`{"speed":{"low":12,"high":0,"unit":"m/s","as":"range"}}`:                               input.Contradiction,
		`{"speed":{"low":0,"unit":"m/s","as":"range"}}`:                                         input.MissingField,
		`{"speed":{"low":0,"high":12,"unit":"kg","as":"range"}}`:                                input.WrongDimension,
		`{"speed":{"low":0,"high":12,"unit":"m/s","as":"range"},"operating":["0 m/s","9 m/s"]}`: input.Duplicate,
	} {
		_, violations, err := input.Decode([]byte(body+text+`}`), kind.Schema())
		if err != nil || len(violations) != 1 || violations[0].Code != code {
			t.Errorf("%s: %v %v, want %s", text, violations, err, code)
		}
	}
}
