package api

import (
	"context"
	"fmt"
	"log/slog"
	"mime"
	"strings"
	"time"

	"github.com/labstack/echo/v4"

	"regimed/api/table"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// typeCSV is the media type of rows as CSV (RFC 4180), with a header.
const typeCSV = "text/csv; charset=utf-8; header=present"

// flushEvery is how long rows may wait until they are sent on.
const flushEvery = 250 * time.Millisecond

// sweep answers a sweep while it is computed.
func (s *Server) sweep(c echo.Context) error {
	body, err := s.requestBody(c)
	if err != nil {
		return err
	}
	request, violations, err := whatif.DecodeRequest(body, s.schema, table.Streams)
	if err != nil {
		return malformed(err)
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The request", violations)
	}
	format := request.Format
	if format == "" {
		format = rowsFormat(c.Request().Header.Values(echo.HeaderAccept))
	}
	if request.Progress && format == table.CSV {
		return violated(invalidCase, "The request", []input.Violation{{Pointer: "/progress", Code: input.Contradiction,
			Sentence: "Rows as CSV have no room for progress; ask for ndjson.", Value: "true"}})
	}
	sheet := &table.Sheet{Plan: request.Plan}
	sheet.From, sheet.To = request.Shard(request.Shards, request.Index)
	if limit := s.config.SweepLimit; sheet.Rows() > limit {
		return problem(tooManyPoints, fmt.Sprintf("The request asks for %d points; this server computes up to %d in one. "+
			"Ask for a part of them, with shards and index, or use the command line: regimed sweep --plan.", sheet.Rows(), limit))
	}
	if s.streams.Err() != nil {
		return problem(unavailable, "The server is about to stop; ask another one.")
	}
	return s.sendSheet(c, sheet, format, request.Progress)
}

// rowsFormat is the form of rows that a client likes better; NDJSON where it
// says nothing or names neither.
func rowsFormat(accept []string) string {
	csv, lines := 0.0, 0.0
	for item := range strings.SplitSeq(strings.Join(accept, ","), ",") {
		media, parameters, err := mime.ParseMediaType(item)
		if err != nil {
			continue
		}
		q := quality("q=" + parameters["q"])
		switch media {
		case "text/csv":
			csv = q
		case typeLines:
			lines = q
		}
	}
	if csv > lines {
		return table.CSV
	}
	return table.NDJSON
}

// sendSheet streams the rows. They end early, with a mark that says so, where the
// server stops; a client who goes away ends the work.
func (s *Server) sendSheet(c echo.Context, sheet *table.Sheet, format string, progress bool) error {
	ctx, cancel := context.WithCancel(c.Request().Context())
	defer cancel()
	defer context.AfterFunc(s.streams, cancel)()
	out := s.rowsOut(c, format)
	w, err := table.New(format, out, sheet)
	if err != nil {
		return err
	}
	if err := w.Begin(); err != nil {
		return nil // the client is gone
	}
	if err := out.Flush(); err != nil {
		return nil
	}
	teller := &teller{to: w, all: sheet.Rows(), flush: out.Flush, flushed: time.Now(), asked: progress}
	end, err := sheet.Write(ctx, w, table.Tally{}, teller.after)
	if err == nil {
		err = out.close()
	}
	s.logSweep(c, end, err)
	return nil
}

// rowsOut is where the rows go.
func (s *Server) rowsOut(c echo.Context, format string) *streamAnswer {
	h := c.Response().Header()
	h.Set(echo.HeaderContentType, map[string]string{table.NDJSON: typeLines, table.CSV: typeCSV}[format])
	h.Add(echo.HeaderVary, echo.HeaderAccept)
	h.Add(echo.HeaderVary, echo.HeaderAcceptEncoding)
	packed := acceptsGzip(c.Request().Header.Values(echo.HeaderAcceptEncoding))
	if packed {
		h.Set(echo.HeaderContentEncoding, "gzip")
	}
	return newStreamAnswer(c, s.config.StreamIdleTimeout, packed)
}

// teller sends on what was written, and says how far it is.
type teller struct {
	to      table.Writer
	all     int64
	percent int64
	asked   bool
	flush   func() error
	flushed time.Time
}

func (t *teller) after(done table.Tally) error {
	if percent := 100 * done.Points / t.all; t.asked && percent > t.percent {
		t.percent = percent
		if p, ok := t.to.(table.ProgressWriter); ok {
			if err := p.Progress(done, t.all); err != nil {
				return err
			}
		}
	}
	if time.Since(t.flushed) < flushEvery {
		return nil
	}
	t.flushed = time.Now()
	return t.flush()
}

// logSweep says what became of the rows; the line of the request says only that
// they were begun well.
func (s *Server) logSweep(c echo.Context, end table.End, err error) {
	state, cause := string(end.State), slog.Attr{}
	if err != nil {
		state, cause = "broken off", slog.String("cause", err.Error())
	}
	s.config.Logger.LogAttrs(context.Background(), slog.LevelInfo, "sweep",
		slog.String("state", state),
		slog.Int64("points", end.Points),
		slog.Int64("problems", end.Problems),
		slog.String("request_id", requestID(c)),
		cause)
}
