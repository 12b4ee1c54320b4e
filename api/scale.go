package api

import (
	"bytes"
	"fmt"
	"math"
	"slices"
	"strconv"

	"github.com/go-json-experiment/json/jsontext"
	"github.com/labstack/echo/v4"

	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/similar"
)

// scale scales a case to a model of it.
func (s *Server) scale(c echo.Context) error {
	body, err := s.requestBody(c)
	if err != nil {
		return err
	}
	request, violations, err := ParseScaling(body, s.schema)
	if err != nil {
		return malformed(err)
	}
	var scaling *similar.Scaling
	if len(violations) == 0 {
		scaling, violations = similar.Scale(request)
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The request", violations)
	}
	return sendRecord(c, NewScalingRecord(scaling))
}

// ParseScaling reads a request to scale a case. It returns everything that is wrong
// with it at once, or an error where the body is no JSON.
func ParseScaling(body []byte, schema *input.Schema) (*similar.Request, []input.Violation, error) {
	known := append([]string{"case", "keep", "fluid", "free", "tolerance"}, similar.FactorNames()...)
	members, bad, err := bodyMembers(body, schema, known...)
	if err != nil || members == nil {
		return nil, bad.List(), err
	}
	r := similar.NewRequest(readCase(members, "case", schema, bad))
	r.Tolerance = readTolerance(members, bad)
	for f := range similar.FactorCount {
		if name := similar.FactorOf(f).ID; members[name] != nil && slices.Contains(similar.FactorNames(), name) {
			r.Given[f] = readRatio(name, members[name], bad)
		}
	}
	r.Keep = readKeep(members["keep"], bad)
	r.Free = readFree(members["free"], bad)
	if raw := members["fluid"]; raw != nil {
		r.Fluid = readFluid(raw, schema, bad)
	}
	if !bad.Any() {
		return r, nil, nil
	}
	return nil, bad.List(), nil
}

// readRatio reads a scale factor: 0.025, or a text such as "1:40".
func readRatio(name string, raw jsontext.Value, bad *input.Violations) float64 {
	x, ok := math.NaN(), false
	switch raw.Kind() {
	case '0':
		x, ok = readNumber(raw)
		ok = ok && x > 0
	case '"':
		x, ok = similar.ParseRatio(textOf(raw))
	}
	if !ok {
		bad.Add("/"+name, input.WrongType, fmt.Sprintf("%s is a scale above zero, model over prototype: 0.025 or \"1:40\".", name), raw)
	}
	return x
}

// readKeep reads the groups that are to be kept.
func readKeep(raw jsontext.Value, bad *input.Violations) []group.ID {
	var list []group.ID
	for i, name := range readNames("keep", "groups to keep", raw, bad) {
		id, known := group.Find(name)
		if !known || !slices.Contains(similar.GroupNames(), name) {
			bad.Add(fmt.Sprintf("/keep/%d", i), input.UnknownChoice, similar.NotKeepable(name), jsonString(name))
			continue
		}
		list = append(list, id)
	}
	return list
}

// readFree reads the factors that may change as needed.
func readFree(raw jsontext.Value, bad *input.Violations) []similar.Factor {
	var list []similar.Factor
	for i, name := range readNames("free", "properties that may change", raw, bad) {
		if name == "fluid" {
			for _, of := range similar.FreeNames() {
				if f, known := similar.FindFactor(of); known && f != similar.Gravity && !slices.Contains(list, f) {
					list = append(list, f)
				}
			}
			continue
		}
		f, known := similar.FindFactor(name)
		if !known || !slices.Contains(similar.FreeNames(), name) {
			bad.Add(fmt.Sprintf("/free/%d", i), input.UnknownChoice, notFree(name), jsonString(name))
			continue
		}
		if !slices.Contains(list, f) {
			list = append(list, f)
		}
	}
	return list
}

func notFree(name string) string {
	if near := input.Nearest(clip(name, 60), similar.FreeNames()); len(near) > 0 {
		return fmt.Sprintf("Nothing that can be left free is called %s. Did you mean %s?", quoted(name), input.OrList(near))
	}
	return fmt.Sprintf("Nothing that can be left free is called %s: %s can; everything else is free unless it is given.", quoted(name), input.OrList(similar.FreeNames()))
}

// mostNames is the most names that a list may have.
const mostNames = 64

// readNames reads a list of names. What is no name stands in it as "", once its
// violation was recorded.
func readNames(member, what string, raw jsontext.Value, bad *input.Violations) []string {
	if raw == nil {
		return nil
	}
	var list []string
	want := fmt.Sprintf("%s is a list of the names of %s, at most %d.", member, what, mostNames)
	dec := newDecoder(raw)
	if raw.Kind() != '[' {
		bad.Add("/"+member, input.WrongType, want, raw)
		return nil
	}
	if _, err := dec.ReadToken(); err != nil {
		return nil
	}
	for dec.PeekKind() != ']' {
		value, err := dec.ReadValue()
		if err != nil {
			return nil
		}
		if value.Kind() != '"' || len(list) == mostNames {
			bad.Add("/"+member, input.WrongType, want, raw)
			return nil
		}
		list = append(list, textOf(value))
	}
	return list
}

// readFluid reads a fluid by itself, as it would stand in a case.
func readFluid(raw jsontext.Value, schema *input.Schema, bad *input.Violations) []input.Value {
	whole := append(append([]byte(`{"structure":{"kind":"generic","length":"1 m"},"fluid":`), raw...), '}')
	c, violations, err := input.Decode(whole, schema)
	if err != nil {
		bad.Add("/fluid", input.WrongType, "fluid is a fluid, by name or by values.", raw)
		return nil
	}
	addWithin(bad, "", violations)
	if len(violations) > 0 {
		return nil
	}
	list := []input.Value{}
	for _, v := range c.Given() {
		if v.Field.Of == "fluid" {
			list = append(list, v)
		}
	}
	if len(list) == 0 {
		bad.Add("/fluid", input.MissingField, "The fluid of the model has a name or values.", raw)
	}
	return list
}

// readNumber reads a number that can be computed with.
func readNumber(raw jsontext.Value) (float64, bool) {
	if raw.Kind() != '0' {
		return math.NaN(), false
	}
	x, err := strconv.ParseFloat(string(raw), 64)
	return x, err == nil
}

// newDecoder reads JSON that is known to be valid, repeated names included.
func newDecoder(raw jsontext.Value) *jsontext.Decoder {
	return jsontext.NewDecoder(bytes.NewBuffer(raw), jsontext.AllowDuplicateNames(true))
}

// textOf unquotes a JSON string.
func textOf(raw jsontext.Value) string {
	s, err := jsontext.AppendUnquote(nil, raw)
	if err != nil {
		return ""
	}
	return string(s)
}
