package api

import (
	"bytes"
	"context"
	"fmt"
	"runtime/debug"
	"strconv"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/batch"
	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// BatchOptions say how the lines of a batch are answered.
type BatchOptions struct {
	Fields render.Fields  // members of the answers
	Ask    whatif.Options // about each case besides its answer
	Fault  func(line int64, cause any, trace []byte)
}

// BatchAnswerer returns what answers the lines of a batch, over HTTP and on the
// command line alike. A line is a case, or a case with an id that comes back:
//
//	{"structure": …, "fluid": …}
//	{"id": "a7", "case": {"structure": …, "fluid": …}}
//
// A line that can't be answered gets the problem that the service gives to a
// body with the same text. Pointers and offsets count from the line: those of a
// case with an id begin with /case.
func BatchAnswerer(o BatchOptions) batch.Answerer {
	b := &batchAnswerer{o, kind.Schema()}
	return b.answer
}

type batchAnswerer struct {
	BatchOptions
	schema *input.Schema
}

func (b *batchAnswerer) answer(ctx context.Context, dst []byte, l batch.Line) (out []byte, answered bool) {
	head := dst
	defer func() {
		// A worker has nobody above it who would hold a panic back from the
		// other lines.
		if cause := recover(); cause != nil {
			b.fault(l.Number, cause)
			out, answered = appendProblem(head, problem(internal, "The engine met a fault of its own on this line; the other lines are not touched by it.")), false
		}
	}()
	m := memberOf(l.Text)
	if m.id != nil {
		head = append(append(head, `,"id":`...), m.id...)
	}
	a, err := b.classify(ctx, l, m)
	if err != nil {
		return appendProblem(head, err), false
	}
	out = render.AppendJSON(append(head, `,"answer":`...), a, b.Fields)
	a.Release()
	return out, true
}

func (b *batchAnswerer) fault(line int64, cause any) {
	if b.Fault != nil {
		b.Fault(line, cause, debug.Stack())
	}
}

// classify answers the case of a line.
func (b *batchAnswerer) classify(ctx context.Context, l batch.Line, m batchMember) (*regime.Answer, *Problem) {
	if l.Limit > 0 {
		return nil, largerThan(int64(l.Limit))
	}
	kase, violations, err := input.Decode(m.kase, b.schema)
	if err != nil {
		return nil, malformed(err)
	}
	if p := m.refusal(violations); p != nil {
		return nil, p
	}
	answer, violations, err := whatif.Classify(ctx, kase, b.Ask)
	if err != nil { // the batch has ended, and nobody reads what is said of its lines
		return nil, problem(unavailable, "The batch ended before this line was answered.")
	}
	return answer, m.refusal(violations)
}

// largerThan is the problem of a case that is too long.
func largerThan(limit int64) *Problem {
	return problem(tooLarge, "The body is larger than "+strconv.FormatInt(limit, 10)+" bytes.")
}

func appendProblem(dst []byte, p *Problem) []byte {
	text, err := json.Marshal(p, jsontext.AllowInvalidUTF8(true))
	if err != nil {
		text = fmt.Appendf(nil, `{"type":%q,"title":%q,"status":%d,"detail":%q}`, p.Type, p.Title, p.Status, p.Detail)
	}
	return append(append(dst, `,"problem":`...), text...)
}

// batchMember is a line taken apart.
type batchMember struct {
	id     jsontext.Value // as received; nil where there is none that comes back
	kase   []byte
	within string            // pointer of the case in the line: "" or "/case"
	bad    []input.Violation // of what stands around the case
}

// memberOf takes a line apart. It is a case as it stands unless it is an object
// with a member "case". Its id comes back as far as one can be read.
func memberOf(line []byte) batchMember {
	m := batchMember{kase: line}
	if !mayHaveMembers(line) {
		return m
	}
	var bad input.Violations
	seen := map[string]bool{}
	var kase jsontext.Value
	for name, value := range input.Members(line) {
		pointer := "/" + escapePointer(name)
		switch {
		case seen[name]:
			bad.Add(pointer, input.Duplicate, fmt.Sprintf("%s is given twice.", quoted(name)), value)
		case name == "id":
			m.id = identifier(value, &bad)
		case name == "case":
			kase = value
		default:
			bad.Add(pointer, input.UnknownField, fmt.Sprintf("A line with a case in it has no member %s; it has id and case.", quoted(name)), value)
		}
		seen[name] = true
	}
	if seen["case"] && jsontext.Value(line).IsValid(jsontext.AllowDuplicateNames(true)) {
		m.kase, m.within, m.bad = kase, "/case", bad.List()
	}
	return m
}

// mayHaveMembers reports whether a line may have one of the members that a case
// does not have. Most lines are cases, and need no second look.
func mayHaveMembers(line []byte) bool {
	return bytes.Contains(line, []byte(`"case"`)) || bytes.Contains(line, []byte(`"id"`)) || bytes.Contains(line, []byte(`\u`))
}

// Bounds of an id.
const (
	longestID = 200     // bytes of its JSON
	largestID = 1 << 53 // as far as every reader of JSON counts
)

// identifier returns an id as it comes back: a short text, or an integer.
func identifier(value jsontext.Value, bad *input.Violations) jsontext.Value {
	switch n, err := strconv.ParseInt(string(value), 10, 64); {
	case value.Kind() == '"' && len(value) <= longestID, err == nil && n >= -largestID && n <= largestID:
		return value
	case value.Kind() == '"':
		bad.Add("/id", input.OutOfRange, fmt.Sprintf("The id is too long: at most %d bytes come back.", longestID), value)
	default:
		bad.Add("/id", input.WrongType, "The id is a text, or an integer up to 2^53.", value)
	}
	return nil
}

// refusal is the problem of violations of the case, and of what stands around
// it; nil where there are none.
func (m *batchMember) refusal(ofCase []input.Violation) *Problem {
	if len(m.bad)+len(ofCase) == 0 {
		return nil
	}
	what := "The case"
	if len(m.bad) > 0 {
		what = "The line"
	}
	var all input.Violations
	addWithin(&all, "", m.bad)
	addWithin(&all, m.within, ofCase)
	return violated(invalidCase, what, all.List())
}
