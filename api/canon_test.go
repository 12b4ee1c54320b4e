package api

import (
	"math"
	"net/http"
	"net/url"
	"slices"
	"strconv"
	"testing"

	"github.com/go-json-experiment/json"

	"regimed/regime/canon"
)

// canonAnswer is the result of a canonical solution as a client reads it.
type canonAnswer struct {
	Name      string         `json:"name"`
	Arguments map[string]any `json:"arguments"`
	Values    []CanonValue   `json:"values"`
}

// middling are arguments inside the range of an entry: each optional one left
// out, choices by their first name, numbers at the middle of their decade.
func middling(e *canon.Entry) (url.Values, []float64) {
	query, args := url.Values{}, []float64{}
	for _, a := range e.Args {
		switch {
		case a.Optional:
			args = append(args, a.Default)
		case len(a.Choices) > 0:
			query.Set(a.Name, a.Choices[0])
			args = append(args, 0)
		default:
			x := middle(a.Min, a.Max)
			query.Set(a.Name, strconv.FormatFloat(x, 'g', -1, 64))
			args = append(args, x)
		}
	}
	return query, args
}

func middle(lo, hi float64) float64 {
	lo, hi = math.Max(lo, -1e6), math.Min(hi, 1e6)
	if lo > 0 {
		return math.Sqrt(lo * hi)
	}
	return lo + (hi-lo)/3
}

// Each solution gives over HTTP what it gives in the program, to the last bit,
// or is refused for the same reason.
func TestEveryCanonicalSolution(t *testing.T) {
	answered := 0
	for _, e := range canon.All() {
		query, args := middling(e)
		r := call(t, http.MethodGet, "/v1/canon/"+e.Name+"?"+query.Encode(), "")
		want, err := e.Evaluate(args)
		if err != nil {
			if p := problemIn(t, r); p.Status != http.StatusUnprocessableEntity || len(p.Violations) != 1 || p.Violations[0].Code != "out-of-range" {
				t.Errorf("%s: %v, and %+v", e.Name, err, p)
			}
			continue
		}
		var got canonAnswer
		if err := json.Unmarshal(bodyOf(t, r), &got); err != nil || r.StatusCode != http.StatusOK {
			t.Errorf("%s: status %d, %v", e.Name, r.StatusCode, err)
			continue
		}
		answered++
		checkCanon(t, e, got, want)
	}
	if n := len(canon.All()); answered < n*2/3 || answered < 1 {
		t.Errorf("%d of %d answered", answered, n)
	}
}

func checkCanon(t *testing.T, e *canon.Entry, got canonAnswer, want []float64) {
	t.Helper()
	if got.Name != e.Name || len(got.Arguments) != len(e.Args) || len(got.Values) != len(want) {
		t.Errorf("%s: %+v", e.Name, got)
		return
	}
	for i, v := range got.Values {
		finite := !math.IsNaN(want[i]) && !math.IsInf(want[i], 0)
		if v.ID != e.Outputs[i].ID || (v.Value != nil) != finite || finite && *v.Value != want[i] {
			t.Errorf("%s: %s = %v, wanted %v", e.Name, v.ID, v.Value, want[i])
		}
	}
	for _, a := range e.Args {
		if got.Arguments[a.Name] == nil && !a.Optional {
			t.Errorf("%s: the argument %s did not come back", e.Name, a.Name)
		}
	}
}

// Every argument out of its range is refused by name, with the range in the
// sentence; several at once.
func TestCanonicalRanges(t *testing.T) {
	ran := 0
	for _, e := range canon.All() {
		query, _ := middling(e)
		var want []string
		for _, a := range e.Args {
			switch {
			case len(a.Choices) > 0:
				query.Set(a.Name, "no-such-name")
				want = append(want, "/"+a.Name+" unknown-choice")
			case a.Max < math.MaxFloat64/4:
				query.Set(a.Name, strconv.FormatFloat(a.Max+math.Abs(a.Max)+1, 'g', -1, 64))
				want = append(want, "/"+a.Name+" out-of-range")
			}
		}
		if want == nil {
			continue
		}
		slices.Sort(want)
		p := problemIn(t, call(t, http.MethodGet, "/v1/canon/"+e.Name+"?"+query.Encode(), ""))
		if got := found(p); p.Status != http.StatusUnprocessableEntity || !slices.Equal(got, want) {
			t.Errorf("%s: found %q, wanted %q", e.Name, got, want)
		}
		checkViolations(t, p)
		ran++
	}
	if ran < 1 {
		t.Errorf("%d solutions", ran)
	}
}

func TestCanonNameInAnyLetters(t *testing.T) {
	var got canonAnswer
	if err := json.Unmarshal(bodyOf(t, call(t, http.MethodGet, "/v1/canon/oscillatingcylinder?R=36", "")), &got); err != nil {
		t.Fatal(err)
	}
	if got.Name != "OscillatingCylinder" || got.Arguments["R"] != 36.0 {
		t.Errorf("%+v", got)
	}
}
