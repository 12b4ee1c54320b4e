package main

import (
	"bytes"
	"errors"
	"fmt"
	"net/http"
	"net/http/httptest"
	"os"
	"path/filepath"
	"slices"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api"
)

// example is a request to the server, and what of its answer is shown.
type example struct {
	name, summary string
	request       *http.Request
	status        int
	show          func(jsontext.Value) (jsontext.Value, error) // nil: the whole answer
	of            http.Handler                                 // nil: the usual server
	value         jsontext.Value                               // shown as it is; nothing is asked
}

// cases are the files of the request examples, with their summaries.
var cases = []struct{ name, file, summary string }{
	{"CaseMarineRiser", "marine-riser.json", "A steel riser across a current"},
	{"CaseWetModes", "wet-modes.json", "Modes of a plate in still water, fluid by values"},
	{"CaseUncertain", "uncertain.json", "Uncertain inputs and a tolerance of the caller's own"},
	{"SweepRequest", "sweep.json", "Speeds and diameters of a rod in a current"},
	{"SweepRequestText", "sweep-text.json", "Axes as texts, rows as CSV"},
	{"MapRequest", "map.json", "Guide rods over speed and diameter"},
	{"ComparisonRequest", "requests/compare.json", "A pile in two reaches of a river"},
	{"ScalingRequest", "scale.json", "A foil at 1:40 that keeps the Froude number, in a towing tank"},
	{"ScalingRequestExcluded", "scale-excluded.json", "Two groups that exclude each other"},
}

// drained is a server that is about to stop.
func drained() http.Handler {
	s := api.New(api.Config{})
	s.Drain()
	return s.Handler()
}

// examples are the examples of the contract, as YAML. An example without a name
// is asked for what it leaves behind, and not shown.
func examples(folder string) (text []byte, err error) {
	recording, cleanUp, err := keeping()
	if err != nil {
		return nil, err
	}
	defer func() { err = errors.Join(err, cleanUp()) }()
	list := object{}
	bodies := map[string][]byte{}
	for _, c := range cases {
		body, err := os.ReadFile(filepath.Join(folder, c.file))
		if err != nil {
			return nil, err
		}
		bodies[c.name] = body
		list = append(list, shown(c.name, c.summary, body))
	}
	for _, e := range append(requests(bodies), recordRequests(bodies)...) {
		value, err := e.answer(recording)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", e.name, err)
		}
		if e.name != "" {
			list = append(list, shown(e.name, e.summary, value))
		}
	}
	schema, err := head(api.CaseSchema(), "$schema", "$id", "title", "description", "type", "required", "additionalProperties")
	if err != nil {
		return nil, err
	}
	return toYAML(append(list,
		shown("BatchCases", "A case, a blank line, a case with an id, and two mistakes", asString(batchCases)),
		shown("CanonArguments", "The Stokes number", jsontext.Value(`{"R": 36}`)),
		shown("CaseSchemaHead", "The head of the schema", schema),
		shown("ContractHead", "The first line", jsontext.Value(`"openapi: 3.1.0\n"`)),
		shown("ContractJSONHead", "The head", jsontext.Value(`{"openapi": "3.1.0"}`)),
	))
}

func shown(name, summary string, value jsontext.Value) api.Member {
	return api.Member{Name: name, Value: object{{Name: "summary", Value: summary}, {Name: "value", Value: value}}}
}

// requests are the examples of answers.
func requests(bodies map[string][]byte) []example {
	list := []example{
		{name: "AnswerMarineRiser", summary: "The whole answer", request: post("/v1/classify", bodies["CaseMarineRiser"]), status: 200},
		{name: "AnswerWetModes", summary: "Trimmed by ?fields=recommendation", request: post("/v1/classify?fields=recommendation", bodies["CaseWetModes"]), status: 200},
		{name: "AnswerUncertain", summary: "How sure the recommendation is, ?fields=recommendation,uncertainty", request: post("/v1/classify?fields=recommendation,uncertainty", bodies["CaseUncertain"]), status: 200},
		{name: "SweepLines", summary: "Rows as NDJSON", request: post("/v1/sweeps", bodies["SweepRequest"]), status: 200, show: asText},
		{name: "SweepCSV", summary: "Rows as CSV", request: post("/v1/sweeps", bodies["SweepRequestText"]), status: 200, show: asText},
		{name: "ProblemInvalidSweep", summary: "Several mistakes at once", request: post("/v1/sweeps", []byte(mistakenSweep)), status: 422},
		{name: "ProblemTooManyPoints", summary: "Ten million points", request: post("/v1/sweeps", []byte(endlessSweep)), status: 422},
		{name: "RegimeMap", summary: "The largest region, and the first line", request: post("/v1/map?format=json", bodies["MapRequest"]), status: 200, show: firstOf("regions", "lines")},
		{name: "ProblemInvalidMap", summary: "A misspelt input, and an end in a wrong unit", request: post("/v1/map", []byte(mistakenMap)), status: 422},
		{name: "Comparison", summary: "A pile in two reaches of a river", request: post("/v1/compare", bodies["ComparisonRequest"]), status: 200},
		{name: "Scaling", summary: "A foil at 1:40 that keeps the Froude number, in a towing tank", request: post("/v1/scale", bodies["ScalingRequest"]), status: 200},
		{name: "ScalingExcluded", summary: "Two groups that exclude each other", request: post("/v1/scale", bodies["ScalingRequestExcluded"]), status: 200},
		{name: "ProblemInvalidComparison", summary: "Only one case, with a wrong unit", request: post("/v1/compare", []byte(`{"a": {"structure": {"kind": "cylinder", "diameter": "0.3 kg"}}}`)), status: 422},
		{name: "ProblemInvalidScaling", summary: "A misspelt group, and a scale below zero", request: post("/v1/scale", []byte(mistakenScale)), status: 422},
		{name: "BatchAnswers", summary: "Answers trimmed by ?fields=title,kind", request: batch("?fields=title,kind"), status: 200, show: asText},
		{name: "CatalogIndex", summary: "All catalogues", request: get("/v1/catalog"), status: 200},
		{name: "CanonResult", summary: "A cylinder at a Stokes number of 36", request: get("/v1/canon/OscillatingCylinder?R=36"), status: 200},
		{name: "ProblemIndex", summary: "The first type", request: get("/problems"), status: 200, show: firstOf("problems")},
		{name: "ProblemType", summary: "Invalid case", request: get("/problems/invalid-case"), status: 200},
		{name: "DemoCases", summary: "The first case", request: get("/examples.json"), status: 200, show: firstOf("examples")},
		{name: "Health", summary: "It lives", request: get("/healthz"), status: 200},
		{name: "Ready", summary: "It is ready", request: get("/readyz"), status: 200},
		{name: "Version", summary: "Engine and rules", request: get("/version"), status: 200},
		{name: "ProblemInvalidCase", summary: "Several mistakes at once", request: post("/v1/classify", []byte(mistaken)), status: 422},
		{name: "ProblemInvalidQuery", summary: "An argument that is no number", request: get("/v1/canon/OscillatingCylinder?R=many"), status: 422},
		{name: "ProblemMalformedJSON", summary: "A body that ends too early", request: post("/v1/classify", []byte(`{"structure": {"kind": "cylinder"`)), status: 400},
		{name: "ProblemNotFound", summary: "A name that is not known", request: get("/v1/canon/OscillatingCilinder"), status: 404},
		{name: "ProblemMethodNotAllowed", summary: "A method that the path does not answer", request: request(http.MethodDelete, "/v1/catalog", nil), status: 405},
		{name: "ProblemNotAcceptable", summary: "A page asked for as JSON", request: accepting("application/json", get("/")), status: 406},
		{name: "ProblemNotAcceptableForm", summary: "An answer asked for as a film", request: accepting("video/*", post("/v1/classify", bodies["CaseMarineRiser"])), status: 406},
		{name: "ProblemRequestTimeout", summary: "A body that did not arrive", request: late(), status: 408},
		{name: "ProblemPayloadTooLarge", summary: "A body of two megabytes", request: post("/v1/classify", make([]byte, 2<<20)), status: 413},
		{name: "ProblemUnsupportedMediaType", summary: "A form", request: form(), status: 415},
		{name: "ProblemUnavailable", summary: "A server that is about to stop", request: get("/readyz"), status: 503, of: drained()},
	}
	for _, name := range api.CatalogNames() {
		list = append(list, example{name: "Catalog" + titled(name), summary: "The first record", request: get("/v1/catalog/" + name), status: 200, show: firstOf("records")})
	}
	return list
}

// mistaken has a wrong dimension, an unknown name, a number without unit and a
// unit that is not known.
const mistaken = `{"structure": {"kind": "cylinder", "diameter": "0.3 kg", "lenght": "40 m", "frequency_dry": 1.2},
	"fluid": "seawater", "flow": {"speed": "2 knotts"}}`

// mistakenScale names a group that does not exist, and a scale below zero.
const mistakenScale = `{"case": {"structure": {"kind": "cylinder", "diameter": "0.3 m"}, "fluid": "water", "flow": {"speed": "1 m/s"}},
	"length": "1:-40", "keep": ["froude", "reynold"]}`

// mistakenSweep has a misspelt input, an end of an axis in a wrong unit and an
// unknown column.
const mistakenSweep = `{"case": ` + rod + `,
	"axes": [{"input": "flow.sped", "values": ["1 m/s"]}, {"input": "structure.diameter", "from": "1 kg", "to": "2 m", "points": 3}],
	"columns": ["class", "reynold"]}`

// mistakenMap has a misspelt input, and an end of an axis in a wrong unit.
const mistakenMap = `{"case": ` + rod + `, "x": {"input": "flow.sped"}, "y": {"input": "structure.diameter", "from": "1 kg", "to": "2 m"}}`

const endlessSweep = `{"case": ` + rod + `, "axes": ["flow.speed=0..5 m/s:10000000"]}`

const rod = `{"structure": {"kind": "cylinder", "diameter": "40 mm", "frequency_dry": "12 Hz"}, "fluid": "seawater"}`

// batchCases are lines of a batch.
const batchCases = `{"title": "Pile", "structure": {"kind": "cylinder", "diameter": "0.5 m", "frequency_dry": "2 Hz"}, "fluid": "water"}

{"id": "a7", "case": {"title": "Rod", "structure": {"kind": "cylinder", "diameter": "40 mm", "frequency_dry": "12 Hz"}, "fluid": "seawater"}}
{"id": "a8", "case": {"structure": {"kind": "cylinder", "diameter": "40 kg"}, "fluid": "seawater"}}
{"structure": {"kind": "cylinder"
`

func batch(query string) *http.Request {
	r := post("/v1/batch"+query, []byte(batchCases))
	r.Header.Set("Content-Type", "application/x-ndjson")
	return r
}

// asString is a text as a value of JSON.
func asString(text string) jsontext.Value {
	v, err := jsontext.AppendQuote(nil, text)
	if err != nil {
		panic("generate: " + err.Error()) // a text of this file that is no UTF-8
	}
	return v
}

func titled(name string) string { return string(name[0]-'a'+'A') + name[1:] }

func get(path string) *http.Request { return request(http.MethodGet, path, nil) }

func post(path string, body []byte) *http.Request { return request(http.MethodPost, path, body) }

func request(method, path string, body []byte) *http.Request {
	r := httptest.NewRequest(method, path, bytes.NewReader(body))
	r.Header.Set("Content-Type", "application/json")
	r.Header.Set("X-Request-ID", "example")
	return r
}

func form() *http.Request {
	r := post("/v1/classify", []byte("kind=cylinder"))
	r.Header.Set("Content-Type", "application/x-www-form-urlencoded")
	return r
}

func accepting(media string, r *http.Request) *http.Request {
	r.Header.Set("Accept", media)
	return r
}

// late is a request whose body does not arrive.
func late() *http.Request {
	r := post("/v1/classify", nil)
	r.Body, r.ContentLength = overdue{}, 100
	return r
}

type overdue struct{}

func (overdue) Read([]byte) (int, error) { return 0, os.ErrDeadlineExceeded }
func (overdue) Close() error             { return nil }

// answer asks the server.
func (e *example) answer(usual http.Handler) (jsontext.Value, error) {
	if e.value != nil {
		return e.value, nil
	}
	handler := usual
	if e.of != nil {
		handler = e.of
	}
	w := httptest.NewRecorder()
	handler.ServeHTTP(w, e.request)
	if w.Code != e.status {
		return nil, fmt.Errorf("status %d, wanted %d: %s", w.Code, e.status, w.Body)
	}
	if e.show == nil {
		return w.Body.Bytes(), nil
	}
	return e.show(w.Body.Bytes())
}

// asText shows an answer that is no JSON.
func asText(v jsontext.Value) (jsontext.Value, error) { return jsontext.AppendQuote(nil, v) }

// firstOf keeps the first element of each of some lists in an answer.
func firstOf(lists ...string) func(jsontext.Value) (jsontext.Value, error) {
	return func(v jsontext.Value) (jsontext.Value, error) {
		members, err := parse(v)
		if err != nil {
			return nil, err
		}
		for i := range members {
			if !slices.Contains(lists, members[i].Name) {
				continue
			}
			var elements []jsontext.Value
			if err := json.Unmarshal(members[i].Value.(jsontext.Value), &elements); err != nil {
				return nil, err
			}
			members[i].Value = elements[:min(1, len(elements))]
		}
		return json.Marshal(members)
	}
}

// head keeps some members of an object.
func head(v jsontext.Value, names ...string) (jsontext.Value, error) {
	members, err := parse(v)
	if err != nil {
		return nil, err
	}
	members = slices.DeleteFunc(members, func(m api.Member) bool { return !slices.Contains(names, m.Name) })
	return json.Marshal(members)
}

// parse takes an object apart into its members, in order.
func parse(v jsontext.Value) (object, error) {
	dec := jsontext.NewDecoder(bytes.NewReader(v))
	if _, err := dec.ReadToken(); err != nil {
		return nil, err
	}
	var members object
	for dec.PeekKind() == '"' {
		name, err := dec.ReadToken()
		if err != nil {
			return nil, err
		}
		key := name.String()
		value, err := dec.ReadValue()
		if err != nil {
			return nil, err
		}
		members = append(members, api.Member{Name: key, Value: value.Clone()})
	}
	return members, nil
}
