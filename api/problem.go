package api

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"net/http"
	"strconv"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/labstack/echo/v4"

	"regimed/regime/input"
)

// Problem is the body of every answer that is not a success (RFC 9457). It is
// an error, so that a handler returns it like any other.
type Problem struct {
	Type       string          `json:"type"` // "/problems/invalid-case", which can be fetched
	Title      string          `json:"title"`
	Status     int             `json:"status"`
	Detail     string          `json:"detail"`
	Instance   string          `json:"instance,omitzero"` // the request, as a URN; none in a line of a batch
	Place      string          `json:"pointer,omitzero"`  // of malformed JSON: where reading stopped
	Offset     *int64          `json:"offset,omitzero"`   // of malformed JSON: after how many bytes
	Violations []ViolationItem `json:"violations,omitempty"`
	Candidates []string        `json:"candidates,omitempty"` // of an ambiguous id: the ids that begin so
}

// ViolationItem is one violation as it is sent.
type ViolationItem struct {
	Pointer string         `json:"pointer"`
	Code    input.Code     `json:"code"`
	Detail  string         `json:"detail"`
	Value   jsontext.Value `json:"value,omitzero"` // as received
}

func (p *Problem) Error() string { return p.Title + ": " + p.Detail }

// problem makes a problem of a type.
func problem(t *ProblemType, detail string) *Problem {
	return &Problem{Type: t.URI(), Title: t.Title, Status: t.Status, Detail: detail}
}

// violated makes a problem from violations.
func violated(t *ProblemType, what string, vs []input.Violation) *Problem {
	count := "1 violation"
	if n := len(vs); n != 1 {
		count = strconv.Itoa(n) + " violations"
	}
	p := problem(t, fmt.Sprintf("%s has %s.", what, count))
	for _, v := range vs {
		p.Violations = append(p.Violations, ViolationItem{Pointer: v.Pointer, Code: v.Code, Detail: v.Sentence, Value: received(v.Value)})
	}
	return p
}

// received is a value as it came. Where a reader of JSON could stumble over
// it, it comes as a string: duplicate names, and numbers beyond a double.
func received(text string) jsontext.Value {
	if text == "" {
		return nil
	}
	v := jsontext.Value(text)
	if v.IsValid() && numbersFit(v) {
		return v
	}
	return jsonString(text)
}

// numbersFit reports whether each number in a value fits a double.
func numbersFit(v jsontext.Value) bool {
	dec := jsontext.NewDecoder(bytes.NewReader(v))
	for {
		tok, err := dec.ReadToken()
		if err != nil {
			return true // the end
		}
		if tok.Kind() != '0' {
			continue
		}
		if x, err := strconv.ParseFloat(tok.String(), 64); err != nil || math.IsInf(x, 0) {
			return false
		}
	}
}

// malformed is the problem of a body that is no JSON.
func malformed(err error) *Problem {
	var syn *input.SyntaxError
	if !errors.As(err, &syn) {
		return problem(malformedJSON, "The body is no valid JSON.")
	}
	p := problem(malformedJSON, syn.Sentence)
	p.Place, p.Offset = syn.Pointer, &syn.Offset
	return p
}

// answerError writes the problem of an error. It is the only place where a
// failure becomes an answer.
func (s *Server) answerError(err error, c echo.Context) {
	if c.Response().Committed {
		return
	}
	p := s.problemOf(err, c)
	p.Instance = "urn:regimed:request:" + requestID(c)
	body, err := json.Marshal(p, jsontext.AllowInvalidUTF8(true))
	if err != nil {
		s.config.Logger.Error("problem", "cause", err.Error(), "request_id", requestID(c))
		p = problem(internal, "The server met a fault of its own.")
		body = fmt.Appendf(nil, `{"type":%q,"title":%q,"status":%d,"detail":%q}`, p.Type, p.Title, p.Status, p.Detail)
	}
	if err := send(c, p.Status, typeProblem, append(body, '\n')); err != nil {
		s.config.Logger.Debug("send", "request_id", requestID(c))
	}
}

// problemOf maps an error to a problem. What an unknown error says goes to the
// log only: it may name addresses and files.
func (s *Server) problemOf(err error, c echo.Context) *Problem {
	var p *Problem
	if errors.As(err, &p) {
		return p
	}
	var he *echo.HTTPError
	if errors.As(err, &he) {
		switch he.Code {
		case http.StatusNotFound:
			return problem(notFound, s.nothingAt(c.Request().URL.Path))
		case http.StatusMethodNotAllowed:
			return problem(methodNotAllowed, fmt.Sprintf("This path answers %s.", c.Response().Header().Get(echo.HeaderAllow)))
		}
	}
	s.config.Logger.Error("fault", "cause", err.Error(), "request_id", requestID(c))
	return problem(internal, "The server met a fault of its own. The request id finds it in the log.")
}

func (s *Server) nothingAt(path string) string {
	near := input.Nearest(path, s.paths())
	if len(path) > maxLoggedPath || len(near) == 0 {
		return "There is nothing at this path; /openapi.yaml lists what there is."
	}
	return fmt.Sprintf("There is nothing at this path. Did you mean %s?", near[0])
}

// problem answers what a problem type means.
func (s *Server) problem(c echo.Context) error {
	if d, ok := s.fixed.problems[c.Param("id")]; ok {
		return d.answer(c)
	}
	return problem(notFound, "No problem type has this name; /problems lists them.")
}
