package api

import (
	"context"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"net/http"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/api/render"
	"regimed/api/store"
	"regimed/regime/input"
)

// Headers and values of what a record answers.
const (
	recordsPath = "/v1/records"

	headerETag    = "Etag"
	headerEngine  = "Regimed-Engine"   // of the record: version and catalogue
	headerDrawnBy = "Regimed-Drawn-By" // of what was drawn anew

	// A record never changes, so most of what its full id answers need not be asked for twice.
	cacheForever = "max-age=31536000, immutable"
	cacheAsking  = "no-cache"

	// What is drawn may load nothing and run nothing.
	recordPolicy = "default-src 'none'; style-src 'unsafe-inline'; img-src data:"
)

func (s *Server) recordRoutes() {
	s.echo.POST(recordsPath, s.makeRecord)
	s.get(recordsPath, s.listRecords)
	s.get(recordsPath+"/:id", s.getRecord)
	s.echo.DELETE(recordsPath+"/:id", s.deleteRecord)
}

// records returns the store, or the problem that there is none.
func (s *Server) records() (store.Store, error) {
	if s.config.Records == nil {
		return nil, problem(recordsOff, "This server keeps no records. Start it with --data DIR to switch them on.")
	}
	return s.config.Records, nil
}

// mayWrite asks the operator's rule whether a caller may make and delete records.
func (s *Server) mayWrite(c echo.Context) error {
	if s.config.MayWrite == nil {
		return nil
	}
	return s.config.MayWrite(c.Request())
}

// makeRecord answers a case and keeps the answer: 201, or 200 where the case
// has a record already.
func (s *Server) makeRecord(c echo.Context) error {
	records, err := s.records()
	if err != nil {
		return err
	}
	ask, err := answerOptions(c)
	if err != nil {
		return err
	}
	if err := s.mayWrite(c); err != nil {
		return err
	}
	if err := acceptsJSON(c); err != nil {
		return err
	}
	room := s.spaces.get()
	defer s.spaces.put(room)
	if room.body, err = s.readBody(c, room.body[:0]); err != nil {
		return err
	}
	wanted, violations, err := ReadSubmission(room.body, s.schema)
	if err != nil {
		return malformed(err)
	}
	if len(violations) > 0 {
		return violated(invalidRecord, "The request", violations)
	}
	wanted.Ask = ask
	ctx, cancel := s.computing(c)
	defer cancel()
	kept, isNew, violations, err := Keep(ctx, records, wanted, s.config.Clock())
	if len(violations) > 0 {
		return violated(invalidRecord, "The request", violations)
	}
	if err != nil {
		return s.storeProblem(c, err)
	}
	body, err := appendRecord(nil, kept, nil)
	if err != nil {
		return err
	}
	status := http.StatusOK
	if isNew {
		status = http.StatusCreated
	}
	h := c.Response().Header()
	h.Set(echo.HeaderLocation, recordPath(kept.ID))
	h.Set(headerETag, tagOf(body))
	h.Set(headerEngine, engineText(kept.Engine))
	return send(c, status, typeJSON, body)
}

func recordPath(id string) string { return recordsPath + "/" + id }

// getRecord answers a record, or its answer in a form: /v1/records/ID.txt.
func (s *Server) getRecord(c echo.Context) error {
	records, err := s.records()
	if err != nil {
		return err
	}
	id, form, err := recordName(c.Param("id"))
	if err != nil {
		return err
	}
	now, err := currentEngine(c)
	if err != nil {
		return err
	}
	r, err := s.findRecord(c, records, id)
	if err != nil {
		return err
	}
	ctx, cancel := s.computing(c)
	defer cancel()
	v, err := s.view(ctx, r, form, now)
	if err != nil {
		return s.storeProblem(c, err)
	}
	s.discovery(c, r, v)
	s.guard(c, v)
	return answerView(c, r, v, len(id) == store.IDDigits)
}

// view is a representation of a record.
type view struct {
	mediaType string
	body      []byte
	lasting   bool   // a cache may keep it without asking
	drawnBy   string // the engine in force, where it made this
}

func (s *Server) view(ctx context.Context, r *store.Record, form *format, now bool) (*view, error) {
	if form == nil {
		return s.recordView(ctx, r, now)
	}
	if form.name == "json" && !now {
		return &view{mediaType: typeJSON, body: r.Answer, lasting: true}, nil
	}
	return drawnView(ctx, r, form, now)
}

// recordView is the record as JSON; where it is asked for, with today's answer
// beside it.
func (s *Server) recordView(ctx context.Context, r *store.Record, now bool) (*view, error) {
	v := &view{mediaType: typeJSON, lasting: !now}
	var today *today
	if now {
		again, err := reanswer(ctx, r)
		if err != nil {
			return nil, err
		}
		again.answer.Release() // it is written already
		today, v.drawnBy = again, engineText(again.engine)
	}
	var err error
	v.body, err = appendRecord(nil, r, today)
	return v, err
}

// drawnView is the answer to the case of a record, drawn by the engine in
// force. Where that is not the one that answered, or answers otherwise, what is
// drawn says so.
func drawnView(ctx context.Context, r *store.Record, form *format, now bool) (*view, error) {
	again, err := reanswer(ctx, r)
	if err != nil {
		return nil, err
	}
	defer again.answer.Release()
	v := &view{mediaType: form.mediaType, drawnBy: engineText(again.engine)}
	if v.body, err = form.draw(again.answer); err != nil {
		return nil, err
	}
	note := again.note(r)
	// Who may frame a page stands in its headers, and an operator may change that.
	v.lasting = note == "" && !now && form.mediaType != typeHTML
	if note != "" && form.mark != nil {
		v.body, err = form.mark(v.body, note)
	}
	return v, err
}

// answerView sends a representation with its tag, or says that the caller's
// still holds.
func answerView(c echo.Context, r *store.Record, v *view, fullID bool) error {
	h := c.Response().Header()
	tag := tagOf(v.body)
	h.Set(headerETag, tag)
	h.Set(headerEngine, engineText(r.Engine))
	if v.drawnBy != "" {
		h.Set(headerDrawnBy, v.drawnBy)
	}
	if v.lasting && fullID {
		h.Set(echo.HeaderCacheControl, cacheForever)
	} else {
		h.Set(echo.HeaderCacheControl, cacheAsking)
	}
	if !fullID { // its first digits may be those of two records tomorrow
		h.Set("Content-Location", recordPath(r.ID)+strings.TrimLeft(c.Param("id"), hexDigits))
	}
	if holds(c.Request().Header.Values("If-None-Match"), tag) {
		return c.NoContent(http.StatusNotModified)
	}
	return send(c, http.StatusOK, v.mediaType, v.body)
}

// tagOf is a strong tag: the same bytes have the same, others another.
func tagOf(body []byte) string {
	sum := sha256.Sum256(body)
	return `"` + hex.EncodeToString(sum[:16]) + `"`
}

// engineText names an engine in a header.
func engineText(e store.Engine) string { return e.Version + " " + e.Catalogue }

// engineInForce is the engine that answers now.
func engineInForce() store.Engine {
	return store.Engine{Version: render.Version, Catalogue: render.Catalogue()}
}

const hexDigits = "0123456789abcdef"

// recordName takes the last part of a path apart: an id or its first digits,
// and the form behind a dot.
func recordName(name string) (id string, form *format, err error) {
	id, suffix, dotted := strings.Cut(name, ".")
	if len(id) < store.PrefixDigits || len(id) > store.IDDigits || strings.Trim(id, hexDigits) != "" {
		return "", nil, problem(notFound, fmt.Sprintf("A record is named by %d hexadecimal digits in lower case, or by its first %d or more.", store.IDDigits, store.PrefixDigits))
	}
	if !dotted {
		return id, nil, nil
	}
	form, hint := formatNamed(suffix)
	if form == nil {
		return "", nil, problem(notFound, fmt.Sprintf("An answer has no form %s. %s", quoted("."+suffix), hint))
	}
	return id, form, nil
}

// currentEngine reads whether today's engine is asked, ?engine=current.
func currentEngine(c echo.Context) (bool, error) {
	if c.Request().URL.RawQuery == "" {
		return false, nil
	}
	values, violations, err := parameters(c, "engine")
	if err != nil {
		return false, err
	}
	engine := values.Get("engine")
	if values.Has("engine") && engine != "current" {
		var bad input.Violations
		bad.Add("/engine", input.UnknownChoice, "engine is \"current\"; without it the record is as it was made.", jsonString(engine))
		violations = append(violations, bad.List()...)
	}
	if len(violations) > 0 {
		return false, violated(invalidQuery, "The query", violations)
	}
	return engine == "current", nil
}

// findRecord reads a record by its id, or by the first digits of one.
func (s *Server) findRecord(c echo.Context, records store.Store, id string) (*store.Record, error) {
	ctx := c.Request().Context()
	if len(id) < store.IDDigits {
		ids, err := records.Match(ctx, id, mostCandidates+1)
		if err != nil {
			return nil, s.storeProblem(c, err)
		}
		switch len(ids) {
		case 0:
			return nil, problem(notFound, "No record begins with these digits.")
		case 1:
			id = ids[0]
		default:
			return nil, ambiguous(id, ids)
		}
	}
	r, err := records.Get(ctx, id)
	if err != nil {
		return nil, s.storeProblem(c, err)
	}
	return r, nil
}

// deleteRecord removes a record. It wants the whole id: what is gone can't be
// brought back.
func (s *Server) deleteRecord(c echo.Context) error {
	records, err := s.records()
	if err != nil {
		return err
	}
	if err := noParameters(c); err != nil {
		return err
	}
	if err := s.mayWrite(c); err != nil {
		return err
	}
	id := c.Param("id")
	if len(id) != store.IDDigits || strings.Trim(id, hexDigits) != "" {
		return problem(notFound, fmt.Sprintf("A record is deleted by all %d digits of its id.", store.IDDigits))
	}
	if err := records.Delete(c.Request().Context(), id); err != nil {
		return s.storeProblem(c, err)
	}
	return c.NoContent(http.StatusNoContent)
}
