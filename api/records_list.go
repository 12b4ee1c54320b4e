package api

import (
	"fmt"
	"net/http"
	"net/url"
	"slices"
	"strconv"
	"strings"
	"time"

	"github.com/labstack/echo/v4"

	"regimed/api/store"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
)

// Records on a page of the list.
const (
	usualPage = 50
	mostPage  = 200
)

// recordList is a page of the list.
type recordList struct {
	Records []recordHead `json:"records"`
	Next    string       `json:"next,omitzero"` // the cursor of the next page; absent on the last
}

// listParameters are what a list may be asked for.
var listParameters = []string{"kind", "class", "tag", "text", "from", "to", "limit", "cursor"}

// listRecords answers a page of records, the newest first.
func (s *Server) listRecords(c echo.Context) error {
	records, err := s.records()
	if err != nil {
		return err
	}
	values, violations, err := parameters(c, listParameters...)
	if err != nil {
		return err
	}
	q, more := readQuery(values)
	if violations = append(violations, more...); len(violations) > 0 {
		slices.SortStableFunc(violations, func(a, b input.Violation) int { return strings.Compare(a.Pointer, b.Pointer) })
		return violated(invalidQuery, "The query", violations)
	}
	page, err := records.List(c.Request().Context(), q)
	if err != nil {
		return s.storeProblem(c, err)
	}
	list := recordList{Records: []recordHead{}}
	for i := range page.Records {
		list.Records = append(list.Records, headRecord(&page.Records[i]))
	}
	if page.Next != nil {
		list.Next = page.Next.String()
	}
	body, err := encode(list)
	if err != nil {
		return err
	}
	tag := tagOf(body)
	h := c.Response().Header()
	h.Set(headerETag, tag)
	h.Set(echo.HeaderCacheControl, cacheAsking)
	if holds(c.Request().Header.Values("If-None-Match"), tag) {
		return c.NoContent(http.StatusNotModified)
	}
	return send(c, http.StatusOK, typeJSON, body)
}

// queryReader reads the parameters of a list, and collects what is wrong.
type queryReader struct {
	values url.Values
	bad    input.Violations
}

func readQuery(values url.Values) (store.Query, []input.Violation) {
	r := &queryReader{values: values}
	q := store.Query{
		Kind:  r.name("kind", kindNames()),
		Class: r.name("class", classNames()),
		Tag:   r.line("tag", maxTag),
		Text:  r.line("text", maxTitle),
		From:  r.time("from"),
		To:    r.time("to"),
		Limit: r.limit(),
		After: r.cursor(),
	}
	if !q.From.IsZero() && !q.To.IsZero() && !q.From.Before(q.To) {
		r.bad.Add("/to", input.Contradiction, "to must lie after from; a record made at from is listed, one made at to is not.", jsonString(values.Get("to")))
	}
	return q, r.bad.List()
}

func kindNames() []string {
	var names []string
	for _, k := range kind.All {
		names = append(names, k.Name)
	}
	return names
}

func classNames() []string {
	var names []string
	for i := range ladder.Classes {
		names = append(names, ladder.Classes[i].ID)
	}
	return names
}

// name reads one of the names that are known.
func (r *queryReader) name(parameter string, known []string) string {
	if !r.values.Has(parameter) {
		return ""
	}
	name := r.values.Get(parameter)
	if slices.Contains(known, name) {
		return name
	}
	hint := "known are " + strings.Join(known, ", ") + "."
	if near := input.Nearest(name, known); len(near) > 0 {
		hint = "did you mean " + strings.Join(near, " or ") + "?"
	}
	r.bad.Add("/"+parameter, input.UnknownChoice, fmt.Sprintf("No %s is called %s; %s", parameter, quoted(name), hint), jsonString(name))
	return ""
}

// line reads what people wrote.
func (r *queryReader) line(parameter string, most int) string {
	if !r.values.Has(parameter) {
		return ""
	}
	s := r.values.Get(parameter)
	fault := faultOf(strings.ToValidUTF8(s, "\uFFFD"), most)
	if fault == "" {
		return s
	}
	r.bad.Add("/"+parameter, input.OutOfRange, parameter+" "+fault, jsonString(clip(s, 200)))
	return ""
}

// time reads a time, or a day, which stands for its first moment in UTC.
func (r *queryReader) time(parameter string) time.Time {
	if !r.values.Has(parameter) {
		return time.Time{}
	}
	s := r.values.Get(parameter)
	for _, layout := range []string{time.RFC3339Nano, time.DateOnly} {
		if t, err := time.Parse(layout, s); err == nil && t.Year() >= 1970 {
			return t
		}
	}
	r.bad.Add("/"+parameter, input.BadQuantity, parameter+" is a time such as 2026-07-30T09:00:00Z, or a day such as 2026-07-30, from 1970 on.", jsonString(clip(s, 200)))
	return time.Time{}
}

func (r *queryReader) limit() int {
	if !r.values.Has("limit") {
		return usualPage
	}
	s := r.values.Get("limit")
	n, err := strconv.Atoi(s)
	switch {
	case err != nil:
		r.bad.Add("/limit", input.WrongType, "limit is a whole number.", jsonString(clip(s, 200)))
	case n < 1 || n > mostPage:
		r.bad.Add("/limit", input.OutOfRange, fmt.Sprintf("limit must lie within 1 and %d.", mostPage), jsonString(clip(s, 200)))
	}
	return n
}

func (r *queryReader) cursor() *store.Cursor {
	if !r.values.Has("cursor") {
		return nil
	}
	s := r.values.Get("cursor")
	cursor, err := store.ParseCursor(s)
	if err != nil {
		r.bad.Add("/cursor", input.BadQuantity, "cursor is what next was in the page before, unchanged.", jsonString(clip(s, 200)))
		return nil
	}
	return cursor
}
