package api

import (
	"fmt"
	"net/http"
	"slices"

	"github.com/go-json-experiment/json/jsontext"
	"github.com/labstack/echo/v4"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/similar"
)

// compare answers two cases, one against the other.
func (s *Server) compare(c echo.Context) error {
	body, err := s.requestBody(c)
	if err != nil {
		return err
	}
	comparison, violations, err := ParseComparison(body, s.schema)
	if err != nil {
		return malformed(err)
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The request", violations)
	}
	return sendRecord(c, NewComparisonRecord(comparison))
}

// requestBody reads the body of a request that has no parameters.
func (s *Server) requestBody(c echo.Context) ([]byte, error) {
	if err := noParameters(c); err != nil {
		return nil, err
	}
	if err := acceptsJSON(c); err != nil {
		return nil, err
	}
	return s.readBody(c, make([]byte, 0, usualBody))
}

// sendRecord sends a record as JSON.
func sendRecord(c echo.Context, record any) error {
	body, err := encode(record)
	if err != nil {
		return err
	}
	return send(c, http.StatusOK, typeJSON, body)
}

// ParseComparison reads a request to compare two cases, and compares them. It
// returns everything that is wrong with it at once, or an error where the body is
// no JSON.
func ParseComparison(body []byte, schema *input.Schema) (*similar.Comparison, []input.Violation, error) {
	members, bad, err := bodyMembers(body, schema, "a", "b", "tolerance")
	if err != nil || members == nil {
		return nil, bad.List(), err
	}
	tolerance := readTolerance(members, bad)
	var answers [2]*regime.Answer
	for i, name := range []string{"a", "b"} {
		if c := readCase(members, name, schema, bad); c != nil {
			answers[i] = judged(c, name, bad)
		}
	}
	if bad.Any() {
		return nil, bad.List(), nil
	}
	return similar.Compare(answers[0], answers[1], tolerance), nil, nil
}

// judged answers a case that stands in a member of the body.
func judged(c *input.Case, name string, bad *input.Violations) *regime.Answer {
	a, violations := regime.Classify(c)
	addWithin(bad, "/"+name, violations)
	return a
}

// addWithin adds violations of a part of the body.
func addWithin(bad *input.Violations, pointer string, violations []input.Violation) {
	for _, v := range violations {
		bad.Add(pointer+v.Pointer, v.Code, v.Sentence, []byte(v.Value))
	}
}

// readCase reads the case in a member of the body; nil where there is none that
// can be read.
func readCase(members map[string]jsontext.Value, name string, schema *input.Schema, bad *input.Violations) *input.Case {
	raw, given := members[name]
	if !given {
		bad.Add("/"+name, input.MissingField, name+" is needed: a case.", nil)
		return nil
	}
	c, violations, err := input.Decode(raw, schema)
	if err != nil { // the body as a whole was read before
		bad.Add("/"+name, input.WrongType, name+" is a case.", nil)
		return nil
	}
	addWithin(bad, "/"+name, violations)
	return c
}

// readTolerance reads up to which relative difference a group counts as kept.
func readTolerance(members map[string]jsontext.Value, bad *input.Violations) float64 {
	raw, given := members["tolerance"]
	if !given {
		return similar.Kept
	}
	x, ok := readNumber(raw)
	switch {
	case !ok:
		bad.Add("/tolerance", input.WrongType, "tolerance is a number between 0 and 1, such as 0.02.", raw)
	case x < 0 || x > 1:
		bad.Add("/tolerance", input.OutOfRange, "tolerance is a number between 0 and 1, such as 0.02.", raw)
	}
	return x
}

// bodyMembers takes an object apart. Unknown and repeated names are violations.
func bodyMembers(body []byte, schema *input.Schema, known ...string) (map[string]jsontext.Value, *input.Violations, error) {
	bad := &input.Violations{}
	if err := syntaxOf(body, schema); err != nil {
		return nil, bad, err
	}
	whole := jsontext.Value(body)
	if whole.Kind() != '{' {
		bad.Add("", input.WrongType, "The body is a JSON object.", body)
		return nil, bad, nil
	}
	members := map[string]jsontext.Value{}
	for name, value := range input.Members(whole) {
		pointer := "/" + escapePointer(name)
		if _, again := members[name]; again {
			bad.Add(pointer, input.Duplicate, fmt.Sprintf("%s is given twice.", quoted(name)), value)
			continue
		}
		members[name] = value
		if !slices.Contains(known, name) {
			bad.Add(pointer, input.UnknownField, unknownMember(name, known), value)
		}
	}
	return members, bad, nil
}

// syntaxOf reads a whole body as JSON, and says where it is none.
func syntaxOf(body []byte, schema *input.Schema) error {
	if jsontext.Value(body).IsValid(jsontext.AllowDuplicateNames(true)) {
		return nil
	}
	if _, _, err := input.Decode(body, schema); err != nil {
		return err
	}
	return &input.SyntaxError{Sentence: "The document is no valid JSON."}
}

func unknownMember(name string, known []string) string {
	if near := input.Nearest(clip(name, 60), known); len(near) > 0 {
		return fmt.Sprintf("The body has no member %s. Did you mean %s?", quoted(name), input.OrList(near))
	}
	return fmt.Sprintf("The body has no member %s; it has %s.", quoted(name), input.OrList(known))
}
