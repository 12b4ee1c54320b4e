package api

import (
	"net/http"
	"strconv"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/labstack/echo/v4"

	"regimed/openapi"
)

// Media types of what is sent.
const (
	typeJSON    = "application/json; charset=utf-8"
	typeProblem = "application/problem+json"
	typeSchema  = "application/schema+json"
	typeYAML    = "application/yaml"
)

// document is an answer that never changes while the server runs.
type document struct {
	mediaType string
	body      []byte
}

func (d document) answer(c echo.Context) error {
	return send(c, http.StatusOK, d.mediaType, d.body)
}

// plainQuery answers with a document, and refuses query parameters: there a
// misspelt name would otherwise pass unnoticed.
func plainQuery(d document) echo.HandlerFunc {
	return func(c echo.Context) error {
		if err := noParameters(c); err != nil {
			return err
		}
		return d.answer(c)
	}
}

// documents are the answers that are written once.
type documents struct {
	index, schema, problemIndex document
	health, ready, version      document
	specYAML, specJSON          document
	catalogs                    map[string]document
	problems                    map[string]document
}

func newDocuments() documents {
	d := documents{
		index:        jsonDocument(catalogIndex()),
		schema:       document{typeSchema, CaseSchema()},
		problemIndex: jsonDocument(problemIndex()),
		health:       jsonDocument(state{"ok"}),
		ready:        jsonDocument(state{"ready"}),
		version:      jsonDocument(version()),
		specYAML:     document{typeYAML, openapi.YAML()},
		specJSON:     document{typeJSON, openapi.JSON()},
		catalogs:     map[string]document{},
		problems:     map[string]document{},
	}
	for _, name := range CatalogNames() {
		d.catalogs[name] = jsonDocument(catalogPage(name))
	}
	for _, p := range problemTypes {
		d.problems[p.ID] = jsonDocument(p.record())
	}
	return d
}

// state is the answer of the probes.
type state struct {
	Status string `json:"status"`
}

// jsonDocument writes a record of this package once, at start. The records hold
// no number that JSON has no word for, which is the only way to fail; any test
// that makes a server would find it.
func jsonDocument(v any) document {
	data, err := encode(v)
	if err != nil {
		panic("api: a record is no JSON: " + err.Error())
	}
	return document{typeJSON, data}
}

// encode writes a record as JSON, a line of its own.
func encode(v any) ([]byte, error) {
	data, err := json.Marshal(v, json.Deterministic(true), jsontext.AllowInvalidUTF8(true))
	if err != nil {
		return nil, err
	}
	return append(data, '\n'), nil
}

// send writes a whole answer with its length.
func send(c echo.Context, status int, mediaType string, body []byte) error {
	r := c.Response()
	h := r.Header()
	h.Set(echo.HeaderContentType, mediaType)
	h.Set(echo.HeaderContentLength, strconv.Itoa(len(body)))
	r.WriteHeader(status)
	if c.Request().Method == http.MethodHead {
		return nil
	}
	_, err := r.Write(body)
	return err
}
