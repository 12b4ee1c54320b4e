package api

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"mime"
	"net/http"
	"slices"
	"strings"

	"github.com/go-json-experiment/json/jsontext"
	"github.com/labstack/echo/v4"

	"regimed/api/render/mapplot"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// mapFormat is a form in which a map is answered.
type mapFormat struct{ name, mediaType string }

// mapFormats are the forms of a map; the first is the usual one.
var mapFormats = []mapFormat{{"svg", "image/svg+xml"}, {"png", "image/png"}, {"json", typeJSON}}

// regimeMap answers which class is recommended over two inputs of a case: as a
// picture or as polygons.
func (s *Server) regimeMap(c echo.Context) error {
	format, err := formatOfMap(c)
	if err != nil {
		return err
	}
	if err := acceptsJSON(c); err != nil {
		return err
	}
	body, err := s.readBody(c, make([]byte, 0, usualBody))
	if err != nil {
		return err
	}
	request, violations, err := ParseMapRequest(body, s.schema)
	if err != nil {
		return malformed(err)
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The request", violations)
	}
	ctx, cancel := context.WithTimeout(c.Request().Context(), s.config.WriteTimeout*computing/writing)
	defer cancel()
	m, violations, err := request.Map(ctx)
	if errors.Is(err, context.DeadlineExceeded) {
		return problem(tooLong, fmt.Sprintf("The map was not ready within %s. On the command line it may take as long as it needs: regimed map.", s.config.WriteTimeout*computing/writing))
	}
	if err != nil {
		return problem(badRequest, "The client went away before the map was ready.")
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The request", violations)
	}
	return sendMap(c, format, m, request.Width)
}

func sendMap(c echo.Context, format mapFormat, m *whatif.Map, width float64) error {
	c.Response().Header().Add(echo.HeaderVary, echo.HeaderAccept)
	if format.name == "json" {
		return sendRecord(c, NewMapRecord(m))
	}
	kind, err := mapplot.FormatOf("." + format.name)
	if err != nil {
		return err
	}
	var picture bytes.Buffer
	if err := mapplot.Draw(&picture, kind, m, width); err != nil {
		return err
	}
	return send(c, http.StatusOK, format.mediaType, picture.Bytes())
}

// formatOfMap is the form that is asked for: by the query, else by the header.
func formatOfMap(c echo.Context) (mapFormat, error) {
	values, violations, err := parameters(c, "format")
	if err != nil {
		return mapFormat{}, err
	}
	chosen := acceptedMap(c.Request().Header.Values(echo.HeaderAccept))
	if name := values.Get("format"); values.Has("format") {
		at := slices.IndexFunc(mapFormats, func(f mapFormat) bool { return f.name == name })
		if at < 0 {
			var bad input.Violations
			bad.Add("/format", input.UnknownChoice, "format is svg, png or json.", jsonString(name))
			violations = append(violations, bad.List()...)
		} else {
			chosen = mapFormats[at]
		}
	}
	if len(violations) > 0 {
		return mapFormat{}, violated(invalidQuery, "The query", violations)
	}
	return chosen, nil
}

// acceptedMap is the form that a client likes best; a picture as SVG where it
// names none.
func acceptedMap(accept []string) mapFormat {
	best, most := mapFormats[0], 0.0
	for item := range strings.SplitSeq(strings.Join(accept, ","), ",") {
		media, p, err := mime.ParseMediaType(item)
		if err != nil {
			continue
		}
		for _, f := range mapFormats {
			of, _, _ := strings.Cut(f.mediaType, ";")
			if q := quality("q=" + p["q"]); of == media && q > most {
				best, most = f, q
			}
		}
	}
	return best
}

// MapRequest is a request for a map.
type MapRequest struct {
	Case  *input.Case
	X, Y  whatif.MapAxis
	Width float64 // of the picture, in millimetres
}

// Map computes the map. Violations are at pointers into the request.
func (r *MapRequest) Map(ctx context.Context) (*whatif.Map, []input.Violation, error) {
	m, ofCase, err := whatif.NewMap(ctx, r.Case, r.X, r.Y)
	var bad input.Violations
	addWithin(&bad, "/case", ofCase)
	return m, bad.List(), err
}

// ParseMapRequest reads a request for a map:
//
//	{"case": {…},
//	 "x": {"input": "flow.speed", "from": "0.1 m/s", "to": "10 m/s", "spacing": "log"},
//	 "y": {"input": "structure.diameter"},
//	 "width": 160}
//
// It returns everything that is wrong with it at once, or an error where the body
// is no JSON.
func ParseMapRequest(body []byte, schema *input.Schema) (*MapRequest, []input.Violation, error) {
	members, bad, err := bodyMembers(body, schema, "case", "x", "y", "width")
	if err != nil || members == nil {
		return nil, bad.List(), err
	}
	r := &MapRequest{Width: readMapWidth(members, bad)}
	r.Case = readCase(members, "case", schema, bad)
	if bad.Any() {
		missingAxes(members, bad)
		return nil, bad.List(), nil
	}
	r.X, r.Y = whatif.ReadMapAxes(r.Case, members["x"], members["y"], bad)
	return r, bad.List(), nil
}

// missingAxes says which axis is not there, where what stands in the others can't be
// checked without a case.
func missingAxes(members map[string]jsontext.Value, bad *input.Violations) {
	for _, name := range []string{"x", "y"} {
		if _, given := members[name]; !given {
			bad.Add("/"+name, input.MissingField, "A map needs two axes, x and y.", nil)
		}
	}
}

func readMapWidth(members map[string]jsontext.Value, bad *input.Violations) float64 {
	raw, given := members["width"]
	if !given {
		return mapplot.UsualWidth
	}
	sentence := fmt.Sprintf("width is that of the picture in millimetres, from %d to %d.", mapplot.LeastWidth, mapplot.LargestWidth)
	x, ok := readNumber(raw)
	switch {
	case !ok:
		bad.Add("/width", input.WrongType, sentence, raw)
	case x < mapplot.LeastWidth || x > mapplot.LargestWidth:
		bad.Add("/width", input.OutOfRange, sentence, raw)
	}
	return x
}
