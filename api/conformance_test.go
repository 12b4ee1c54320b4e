package api

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"maps"
	"net/http"
	"net/http/httptest"
	"net/url"
	"slices"
	"strings"
	"testing"

	"github.com/getkin/kin-openapi/openapi3"
	"github.com/getkin/kin-openapi/openapi3filter"
	"github.com/getkin/kin-openapi/routers"
	"github.com/getkin/kin-openapi/routers/legacy"
	"github.com/go-json-experiment/json"
	"github.com/santhosh-tekuri/jsonschema/v6"

	"regimed/openapi"
)

// contract is the document as a validator takes it, and the way from a request
// to its operation.
func contract(t testing.TB) (*openapi3.T, routers.Router) {
	t.Helper()
	doc, err := openapi3.NewLoader().LoadFromData(openapi.YAML())
	if err != nil {
		t.Fatal(err)
	}
	router, err := legacy.NewRouter(doc, openapi3.EnableExamplesValidation())
	if err != nil {
		t.Fatal(err)
	}
	return doc, router
}

func init() {
	// Documents that the validator reads as text: what they hold is checked by
	// tests of their own.
	text := func(body io.Reader, _ http.Header, _ *openapi3.SchemaRef, _ openapi3filter.EncodingFn) (any, error) {
		data, err := io.ReadAll(body)
		return string(data), err
	}
	for _, media := range []string{typeYAML, "text/html", "text/css", "text/javascript", "text/xml", "image/svg+xml", "text/markdown", "text/csv", "image/png"} {
		openapi3filter.RegisterBodyDecoder(media, text)
	}
	openapi3filter.RegisterBodyDecoder(typeSchema, openapi3filter.JSONBodyDecoder)
	openapi3filter.RegisterBodyDecoder(typeLines, text)
	openapi3filter.RegisterBodyDecoder("text/csv", text)
	openapi3filter.RegisterBodyDecoder("image/svg+xml", text)
}

// The contract holds against OpenAPI 3.1, its examples against its schemas.
func TestContractIsValid(t *testing.T) {
	doc, _ := contract(t)
	if err := doc.Validate(context.Background(), openapi3.EnableExamplesValidation()); err != nil {
		t.Error(err)
	}
	if doc.OpenAPI != "3.1.0" {
		t.Errorf("version %s", doc.OpenAPI)
	}
}

func TestContractAsJSON(t *testing.T) {
	doc, err := openapi3.NewLoader().LoadFromData(openapi.JSON())
	if err != nil {
		t.Fatal(err)
	}
	fromYAML, _ := contract(t)
	one, err := doc.MarshalJSON()
	if err != nil {
		t.Fatal(err)
	}
	two, err := fromYAML.MarshalJSON()
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(one, two) {
		t.Error("the two forms of the contract differ")
	}
}

// Every route has an operation, every operation a route, and every GET a HEAD.
func TestRoutesAndOperations(t *testing.T) {
	doc, _ := contract(t)
	operations, routes := map[string]bool{}, map[string]bool{}
	for path, item := range doc.Paths.Map() {
		for method := range item.Operations() {
			operations[method+" "+path] = true
		}
	}
	for _, r := range New(Config{}).echo.Routes() {
		routes[r.Method+" "+bracketed(r.Path)] = true
	}
	for r := range routes {
		get, isHead := strings.CutPrefix(r, "HEAD ")
		if isHead && !routes["GET "+get] {
			t.Errorf("%s without a GET", r)
		}
		if !isHead && !operations[r] {
			t.Errorf("the route %s has no operation", r)
		}
	}
	for o := range operations {
		if !routes[o] {
			t.Errorf("the operation %s has no route", o)
		}
		if path, isGet := strings.CutPrefix(o, "GET "); isGet && !routes["HEAD "+path] {
			t.Errorf("%s has no HEAD", o)
		}
	}
	if len(operations) != 37 {
		t.Errorf("%d operations", len(operations))
	}
}

// bracketed writes the parameters of a path as OpenAPI does.
func bracketed(path string) string {
	parts := strings.Split(path, "/")
	for i, p := range parts {
		if name, ok := strings.CutPrefix(p, ":"); ok {
			parts[i] = "{" + name + "}"
		}
	}
	return strings.Join(parts, "/")
}

// Every example of a request gives the documented success, and an answer that
// holds against the contract.
func TestExamplesOfTheContract(t *testing.T) {
	doc, router := contract(t)
	strict := strictSchemas(t)
	ran := 0
	for _, path := range slices.Sorted(maps.Keys(doc.Paths.Map())) {
		for method, op := range doc.Paths.Value(path).Operations() {
			for _, r := range exampleRequests(t, method, path, op) {
				ran++
				prepareRecord(t, r)
				answer := checkAgainst(t, router, r)
				if answer.StatusCode/100 != 2 {
					t.Errorf("%s %s: status %d", method, r.URL, answer.StatusCode)
				}
				strict.check(t, op, answer)
			}
		}
	}
	if ran < 25 {
		t.Errorf("%d examples", ran)
	}
}

// exampleRequests are the requests that the examples of an operation describe:
// one for each example of a body or of a parameter, and one with none of the
// optional parameters.
func exampleRequests(t *testing.T, method, path string, op *openapi3.Operation) []*http.Request {
	t.Helper()
	var paths []string
	queries := []string{""}
	for _, ref := range op.Parameters {
		p := ref.Value
		for _, value := range exampleValues(p) {
			switch {
			case p.In == "path":
				paths = append(paths, strings.ReplaceAll(path, "{"+p.Name+"}", fmt.Sprint(value)))
			case p.In == "query" && p.Explode != nil && *p.Explode:
				queries = []string{"?" + exploded(value.(map[string]any))}
			case p.In == "query":
				queries = append(queries, "?"+p.Name+"="+url.QueryEscape(commas(value)))
			}
		}
	}
	if len(paths) == 0 {
		paths = []string{path}
	}
	var list []*http.Request
	for _, p := range paths {
		for _, q := range queries {
			for _, body := range exampleBodies(t, op) {
				r := httptest.NewRequest(method, "http://127.0.0.1:8610"+p+q, bytes.NewReader(body))
				if method == http.MethodPost {
					r.Header.Set("Content-Type", "application/json")
				}
				r.Header.Set("X-Request-ID", "batch-7.12")
				list = append(list, r)
			}
		}
	}
	return list
}

func exampleValues(p *openapi3.Parameter) []any {
	var list []any
	if p.Example != nil {
		list = append(list, p.Example)
	}
	for _, e := range p.Examples {
		list = append(list, e.Value.Value)
	}
	return list
}

func exploded(arguments map[string]any) string {
	query := url.Values{}
	for name, value := range arguments {
		query.Set(name, fmt.Sprint(value))
	}
	return query.Encode()
}

// commas writes a list as OpenAPI does that does not explode it, and a single
// value as it is.
func commas(value any) string {
	list, isList := value.([]any)
	if !isList {
		return fmt.Sprint(value)
	}
	var parts []string
	for _, x := range list {
		parts = append(parts, fmt.Sprint(x))
	}
	return strings.Join(parts, ",")
}

func exampleBodies(t *testing.T, op *openapi3.Operation) [][]byte {
	t.Helper()
	if op.RequestBody == nil {
		return [][]byte{nil}
	}
	content := op.RequestBody.Value.Content["application/json"]
	if content == nil {
		return nil // a stream, which has a test of its own
	}
	var list [][]byte
	for _, e := range content.Examples {
		body, err := json.Marshal(e.Value.Value)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, body)
	}
	return list
}

// checkAgainst sends a request and holds its answer against the contract.
func checkAgainst(t testing.TB, router routers.Router, r *http.Request) *http.Response {
	t.Helper()
	route, parameters, err := router.FindRoute(r)
	if err != nil {
		t.Fatalf("%s %s: %v", r.Method, r.URL, err)
	}
	answer := serve(t, handler, r)
	body := bodyOf(t, answer)
	answer.Body = io.NopCloser(bytes.NewReader(body))
	input := &openapi3filter.ResponseValidationInput{
		RequestValidationInput: &openapi3filter.RequestValidationInput{Request: r, PathParams: parameters, Route: route},
		Status:                 answer.StatusCode, Header: answer.Header,
		Options: &openapi3filter.Options{IncludeResponseStatus: true},
	}
	input.SetBodyBytes(body)
	if err := openapi3filter.ValidateResponse(context.Background(), input); err != nil {
		t.Errorf("%s %s: %v", r.Method, r.URL, err)
	}
	return answer
}

// Answers to cases of many kinds, good and bad, hold against the contract, and
// say nothing that it does not document.
func TestAnswersHoldAgainstTheContract(t *testing.T) {
	doc, router := contract(t)
	strict := strictSchemas(t)
	op := doc.Paths.Value("/v1/classify").Post
	bodies := []string{riser, `{"structure": {"kind": "cylinder", "diameter": "1 in"}}`, cylinderWith(""), caseWith(`, "fluid": "air", "flow": {"speed": "30 m/s"}`),
		caseWith(`, "reference": "A-1", "fluid": "water", "flow": {"speed": "0.01 m/s", "direction": "axial"}, "interest": ["sound"]`)}
	good := len(bodies)
	for _, file := range shippedCases(t) {
		bodies, good = append(bodies, string(caseIn(t, file))), good+1
	}
	for _, row := range badCases {
		bodies = append(bodies, row.body)
	}
	for _, row := range badBodies {
		bodies = append(bodies, row.body)
	}
	bodies = append(bodies, strings.Repeat(" ", 2<<20))
	for i, body := range bodies {
		r := httptest.NewRequest(http.MethodPost, "http://127.0.0.1:8610/v1/classify", strings.NewReader(body))
		r.Header.Set("Content-Type", "application/json")
		answer := checkAgainst(t, router, r)
		if (answer.StatusCode == http.StatusOK) != (i < good) {
			t.Errorf("status %d of %.200s", answer.StatusCode, body)
		}
		strict.check(t, op, answer)
	}
	if len(bodies) < 90 {
		t.Errorf("%d bodies", len(bodies))
	}
}

// Problems of other paths hold against the contract too.
func TestProblemsHoldAgainstTheContract(t *testing.T) {
	doc, router := contract(t)
	strict := strictSchemas(t)
	ran := 0
	for _, row := range badRequests {
		r := httptest.NewRequest(row.method, "http://127.0.0.1:8610"+row.path, strings.NewReader(riser))
		route, _, err := router.FindRoute(r)
		if err != nil || row.status == http.StatusMethodNotAllowed {
			continue // there is no operation to hold it against
		}
		if row.method == http.MethodPost {
			r.Header.Set("Content-Type", "application/json")
		}
		strict.check(t, doc.Paths.Value(route.Path).GetOperation(row.method), checkAgainst(t, router, r))
		ran++
	}
	if ran < 15 {
		t.Errorf("%d requests", ran)
	}
}

// The contract checks requests as the server does: what is wrong in shape
// fails by its schema.
func TestContractRefusesBadBodies(t *testing.T) {
	_, router := contract(t)
	for body, good := range map[string]bool{
		riser:                                       true,
		`{"structure": {"kind": "cilinder"}}`:       false,
		cylinderWith(`, "lenght": "1 m"`):           false,
		caseWith(`, "tolerance": {"load": 2}`):      false,
		caseWith(`, "interest": ["everything"]`):    false,
		cylinderWith(`, "length": 12`):              false,
		`{"fluid": "water"}`:                        false,
		caseWith(`, "fluid": {"name": "seawater"}`): true,
	} {
		r := httptest.NewRequest(http.MethodPost, "http://127.0.0.1:8610/v1/classify", strings.NewReader(body))
		r.Header.Set("Content-Type", "application/json")
		route, parameters, err := router.FindRoute(r)
		if err != nil {
			t.Fatal(err)
		}
		err = openapi3filter.ValidateRequest(context.Background(), &openapi3filter.RequestValidationInput{Request: r, PathParams: parameters, Route: route})
		if (err == nil) != good {
			t.Errorf("%s: %v", body, err)
		}
	}
}

// strict are the schemas of the contract, closed: a member that is not
// documented fails. Clients must ignore such members, the server must not send
// them.
type strict struct{ compiler *jsonschema.Compiler }

const strictURL = "urn:regimed:contract"

func strictSchemas(t testing.TB) strict {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(openapi.JSON()))
	if err != nil {
		t.Fatal(err)
	}
	shut(doc.(map[string]any)["components"].(map[string]any)["schemas"])
	c := jsonschema.NewCompiler()
	c.DefaultDraft(jsonschema.Draft2020)
	if err := c.AddResource(strictURL, doc); err != nil {
		t.Fatal(err)
	}
	return strict{c}
}

// shut closes every object that lists its members.
func shut(node any) {
	switch n := node.(type) {
	case map[string]any:
		if _, isOpen := n["additionalProperties"]; n["type"] == "object" && n["properties"] != nil && !isOpen {
			n["additionalProperties"] = false
		}
		for _, child := range n {
			shut(child)
		}
	case []any:
		for _, child := range n {
			shut(child)
		}
	}
}

// check holds the body of an answer against the closed schema of its status.
func (s strict) check(t testing.TB, op *openapi3.Operation, answer *http.Response) {
	t.Helper()
	if answer.StatusCode == http.StatusNoContent {
		return
	}
	response := op.Responses.Status(answer.StatusCode)
	if response == nil {
		response = op.Responses.Default()
	}
	media, _, _ := strings.Cut(answer.Header.Get("Content-Type"), ";")
	content := response.Value.Content[media]
	if content == nil {
		t.Errorf("%s: %d with the media type %s is not documented", op.OperationID, answer.StatusCode, media)
		return
	}
	ref := content.Schema.Ref
	if ref == "" {
		return // a text
	}
	schema, err := s.compiler.Compile(strictURL + ref)
	if err != nil {
		t.Fatal(err)
	}
	body, err := jsonschema.UnmarshalJSON(bytes.NewReader(bodyOf(t, answer)))
	if err != nil {
		t.Fatal(err)
	}
	if err := schema.Validate(body); err != nil {
		t.Errorf("%s: %d: %v", op.OperationID, answer.StatusCode, err)
	}
}
