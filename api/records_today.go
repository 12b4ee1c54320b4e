package api

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"math"
	"strings"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/render"
	"regimed/api/store"
	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// today is the answer of the engine in force to the case of a record.
type today struct {
	engine store.Engine
	answer *regime.Answer // until it is released
	body   []byte         // the answer as JSON
	same   bool           // it is the answer of the record, but for the engine's name
	change *Change
}

// Change is what differs between the answer of a record and today's.
type Change struct {
	Answer   bool                   `json:"answer"` // anything at all but the name of the engine
	Class    *Words                 `json:"class,omitempty"`
	Verdicts map[string]Words       `json:"verdicts"`
	Groups   map[string]GroupChange `json:"groups"`
}

// Words are two words, the first nil where there was none.
type Words struct {
	Before *string `json:"before"`
	After  *string `json:"after"`
}

// GroupChange is a group that has another value; nil: it had or has none.
type GroupChange struct {
	Before *float64 `json:"before"`
	After  *float64 `json:"after"`
}

// sameNumber is how far two values of a group may differ, of the larger one, and
// still be the same: processors round differently.
const sameNumber = 1e-9

// reanswer answers the case of a record anew, with the options that it had. Whoever calls it releases the
// answer.
func reanswer(ctx context.Context, r *store.Record) (*today, error) {
	kase, violations, err := input.Decode(r.Case, kind.Schema())
	if err != nil {
		return nil, fmt.Errorf("the case of the record %s: %w", r.ID, err)
	}
	if len(violations) > 0 {
		return nil, outdated(violations)
	}
	answer, violations, err := whatif.Classify(ctx, kase, optionsOf(r))
	if err != nil {
		return nil, err
	}
	if len(violations) > 0 {
		return nil, outdated(violations)
	}
	t := &today{engine: engineInForce(), answer: answer, body: render.AppendJSON(nil, answer, render.All)}
	was, err := summaryOf(r.Answer)
	if err != nil {
		return nil, fmt.Errorf("the answer of the record %s: %w", r.ID, err)
	}
	is, err := summaryOf(t.body)
	if err != nil {
		return nil, err
	}
	t.same = bytes.Equal(withoutEngine(r.Answer, r.Engine), withoutEngine(t.body, t.engine))
	t.change = changeOf(was, is)
	t.change.Answer = !t.same
	return t, nil
}

func outdated(violations []input.Violation) error {
	return violated(outdatedCase, "The case of the record, to the engine in force,", inCase(violations))
}

// withoutEngine cuts the engine's name out of an answer.
func withoutEngine(answer []byte, e store.Engine) []byte {
	name, err := json.Marshal(EngineRecord(e))
	if err != nil {
		return answer
	}
	before, after, found := bytes.Cut(answer, append([]byte(`"engine":`), name...))
	if !found {
		return answer
	}
	return append(bytes.Clone(before), after...)
}

// summary is what of an answer is compared.
type summary struct {
	Recommendation struct {
		Class string `json:"class"`
	} `json:"recommendation"`
	Findings map[string]struct {
		Verdict string `json:"verdict"`
	} `json:"findings"`
	Groups map[string]struct {
		Value *float64 `json:"value"`
	} `json:"groups"`
}

func summaryOf(answer []byte) (*summary, error) {
	var s summary
	if err := json.Unmarshal(answer, &s, jsontext.AllowInvalidUTF8(true)); err != nil {
		var at *json.SemanticError
		if errors.As(err, &at) {
			return nil, fmt.Errorf("no answer can be read at %s", at.JSONPointer)
		}
		return nil, err
	}
	return &s, nil
}

func changeOf(was, is *summary) *Change {
	c := &Change{Verdicts: map[string]Words{}, Groups: map[string]GroupChange{}}
	if a, b := was.Recommendation.Class, is.Recommendation.Class; a != b {
		c.Class = &Words{&a, &b}
	}
	for id := range union(was.Findings, is.Findings) {
		a, b := wordOf(was.Findings[id].Verdict), wordOf(is.Findings[id].Verdict)
		if was.Findings[id] != is.Findings[id] {
			c.Verdicts[id] = Words{a, b}
		}
	}
	for id := range union(was.Groups, is.Groups) {
		if a, b := was.Groups[id].Value, is.Groups[id].Value; !sameValue(a, b) {
			c.Groups[id] = GroupChange{a, b}
		}
	}
	return c
}

// union is every name of two maps.
func union[V any](a, b map[string]V) map[string]bool {
	names := map[string]bool{}
	for name := range a {
		names[name] = true
	}
	for name := range b {
		names[name] = true
	}
	return names
}

func wordOf(s string) *string {
	if s == "" {
		return nil
	}
	return &s
}

func sameValue(a, b *float64) bool {
	if a == nil || b == nil {
		return a == b
	}
	return *a == *b || math.Abs(*a-*b) <= sameNumber*math.Max(math.Abs(*a), math.Abs(*b))
}

// note says who drew the answer of a record, where it was not who gave it, or
// where today's answer is another. Empty: nothing is to be said.
func (t *today) note(r *store.Record) string {
	if t.same && t.engine == r.Engine {
		return ""
	}
	given := fmt.Sprintf("Answered by regimed %s on %s; drawn by regimed %s", shortEngine(r.Engine), r.Created.Format("2006-01-02"), shortEngine(t.engine))
	if t.same {
		return given + ", whose answer is the same."
	}
	return fmt.Sprintf("%s, whose answer differs: %s. The answer as it was: %s.json", given, t.change.words(), recordPath(r.ID))
}

func shortEngine(e store.Engine) string {
	return e.Version + " (catalogue " + e.Catalogue[:min(12, len(e.Catalogue))] + ")"
}

// words says in short what changed.
func (c *Change) words() string {
	var parts []string
	if c.Class != nil {
		parts = append(parts, "class "+*c.Class.Before+" then, "+*c.Class.After+" now")
	}
	if n := len(c.Verdicts); n > 0 {
		parts = append(parts, counted(n, "verdict"))
	}
	if n := len(c.Groups); n > 0 {
		parts = append(parts, counted(n, "group"))
	}
	if len(parts) == 0 {
		return "in no class, verdict or group, but elsewhere"
	}
	return strings.Join(parts, "; ")
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}
