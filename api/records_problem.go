package api

import (
	"context"
	"errors"
	"fmt"
	"net/http"
	"strconv"

	"github.com/labstack/echo/v4"

	"regimed/api/store"
)

// The problem types of records.
var (
	recordsOff = &ProblemType{ID: "records-off", Title: "No records are kept here", Status: http.StatusNotFound,
		Doc: "The server was started without a directory for records, so it keeps none. An operator switches them on with regimed serve --data DIR; classification works either way."}
	recordsUnavailable = &ProblemType{ID: "records-unavailable", Title: "The records are out of reach", Status: http.StatusServiceUnavailable,
		Doc: "The records can't be read or written now: the store is busy, closed, or may only be read. What was acknowledged is not lost. Ask again after the seconds in the header Retry-After; classification goes on."}
	recordsFull = &ProblemType{ID: "records-full", Title: "No room for a record", Status: http.StatusInsufficientStorage,
		Doc: "The disk of the records is full. Nothing of this request was stored, and nothing that was stored before is lost; records can still be read. The operator has to make room."}
	recordsDamaged = &ProblemType{ID: "records-damaged", Title: "The record can't be read", Status: http.StatusInternalServerError,
		Doc: "What the disk holds can't be read, or is not what was written. The server shows nothing rather than a wrong answer, and changes nothing: the operator finds the cause in the log, and has to bring back a copy."}
	invalidRecord = &ProblemType{ID: "invalid-record", Title: "Invalid record", Status: http.StatusUnprocessableEntity, Codes: true,
		Doc: "The body is JSON, but no record can be made of it: its case is invalid, or its title, tags or author are. Every violation is listed, those of the case with pointers that begin with /case."}
	ambiguousRecord = &ProblemType{ID: "ambiguous-record", Title: "Several records begin so", Status: http.StatusNotFound,
		Doc: "The first digits of an id are those of more than one record. The candidates are listed, up to ten; ask for one of them, or with more digits."}
	outdatedCase = &ProblemType{ID: "outdated-case", Title: "The case is no longer accepted", Status: http.StatusConflict, Codes: true,
		Doc: "The case of the record was accepted when it was answered, and is not by the engine in force, so nothing can be drawn or compared. The violations say why. The answer as it was is at the path that ends with .json."}
)

// Seconds until it is worth to ask again.
const (
	retryBusy     = 2
	retryReadOnly = 60
)

// storeProblem maps an error of the store to a problem. The cause goes to the
// log only: it names files.
func (s *Server) storeProblem(c echo.Context, err error) error {
	if errors.Is(err, store.ErrNotFound) {
		return problem(notFound, "No record has this id.")
	}
	var e *store.Error
	switch {
	case errors.As(err, &e):
	case errors.Is(err, context.Canceled), errors.Is(err, context.DeadlineExceeded):
		return s.unfinished(err)
	default:
		return err
	}
	if !errors.Is(err, context.Canceled) { // a caller who left is no fault
		s.config.Logger.Error("records", "cause", err.Error(), "request_id", requestID(c))
	}
	switch e.Reason {
	case store.Full:
		return problem(recordsFull, "The disk of the records is full; nothing was stored.")
	case store.Damaged:
		return problem(recordsDamaged, "The record can't be read, or is not what was written. The request id finds the cause in the log.")
	case store.ReadOnly:
		return retryLater(c, retryReadOnly, "The records can be read and not written now; nothing was stored.")
	}
	return retryLater(c, retryBusy, "The records are out of reach for the moment; nothing is lost.")
}

func retryLater(c echo.Context, seconds int, detail string) error {
	c.Response().Header().Set(echo.HeaderRetryAfter, strconv.Itoa(seconds))
	return problem(recordsUnavailable, detail)
}

// mostCandidates is how many ids a problem lists.
const mostCandidates = 10

// ambiguous lists the ids that begin so.
func ambiguous(prefix string, ids []string) error {
	more := ""
	if len(ids) > mostCandidates {
		ids, more = ids[:mostCandidates], " and more"
	}
	p := problem(ambiguousRecord, fmt.Sprintf("The ids of %d%s records begin with %s.", len(ids), more, prefix))
	p.Candidates = ids
	return p
}
