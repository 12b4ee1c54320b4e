package api

import (
	"context"
	"errors"
	"fmt"
	"io"
	"log/slog"
	"mime"
	"net"
	"net/http"
	"slices"
	"strconv"
	"strings"
	"time"

	"github.com/klauspost/compress/gzip"
	"github.com/labstack/echo/v4"

	"regimed/api/batch"
)

// typeLines is the media type of a stream of lines, each of them JSON.
const typeLines = "application/x-ndjson"

// lineTypes are the media types under which clients announce such a stream.
var lineTypes = []string{typeLines, "application/jsonl", "application/json-lines", "application/ndjson"}

// batch answers a stream of cases while it arrives. The answers begin before
// the cases end, and a client who does not read them is not read any further.
func (s *Server) batch(c echo.Context) error {
	o, err := s.batchOptions(c)
	if err != nil {
		return err
	}
	coding, err := acceptsLines(c)
	if err != nil {
		return err
	}
	if s.streams.Err() != nil {
		return problem(unavailable, "The server is about to stop; ask another one.")
	}
	ctx, cancel := context.WithCancelCause(context.WithoutCancel(c.Request().Context()))
	defer cancel(nil)
	in := s.streamIn(c, cancel)
	cases, err := decoded(in, coding)
	if err != nil {
		in.linger()
		return unreadable(c, err)
	}
	out := s.streamOut(c)
	defer in.linger()
	if err := out.begin(); err != nil {
		return nil // the client is gone
	}
	end, err := batch.Run(ctx, cases, out, batch.Options{
		Answer:  BatchAnswerer(o),
		Limit:   int(s.config.BodyLimit),
		Stop:    s.streams.Done(),
		Unblock: in.unblock,
	})
	if err := out.close(); err != nil {
		s.config.Logger.Debug("send", "request_id", requestID(c))
	}
	s.logBatch(c, end, err)
	return nil
}

// batchOptions reads the parameters of a batch.
func (s *Server) batchOptions(c echo.Context) (BatchOptions, error) {
	fields, _, ask, err := caseOptions(c, false, nil)
	if err != nil {
		return BatchOptions{}, err
	}
	id := requestID(c)
	return BatchOptions{Fields: fields, Ask: ask, Fault: func(line int64, cause any, trace []byte) {
		s.config.Logger.Error("panic", "cause", fmt.Sprint(cause), "request_id", id, "line", line, "trace", string(trace))
	}}, nil
}

// logBatch says what became of a stream; that of the request says only that it
// was begun well.
func (s *Server) logBatch(c echo.Context, end batch.End, err error) {
	cause := slog.Attr{}
	if err != nil {
		cause = slog.String("cause", err.Error())
	}
	s.config.Logger.LogAttrs(context.Background(), slog.LevelInfo, "batch",
		slog.String("state", end.State()),
		slog.Int64("lines", end.Lines),
		slog.Int64("answers", end.Answers),
		slog.Int64("problems", end.Problems),
		slog.String("request_id", requestID(c)),
		cause)
}

// acceptsLines refuses a body that is not announced as lines of JSON in UTF-8.
// It returns how the body is encoded: "" or "gzip".
func acceptsLines(c echo.Context) (coding string, err error) {
	h := c.Request().Header
	switch coding = strings.ToLower(strings.TrimSpace(h.Get(echo.HeaderContentEncoding))); coding {
	case "", "identity":
		coding = ""
	case "gzip", "x-gzip":
		coding = "gzip"
	default:
		c.Response().Header().Set(echo.HeaderAcceptEncoding, "gzip, identity")
		return "", problem(unsupportedMedia, "The Content-Encoding must be gzip or none.")
	}
	if isLines(h.Get(echo.HeaderContentType)) {
		return coding, nil
	}
	c.Response().Header().Set("Accept-Post", strings.Join(lineTypes, ", "))
	c.Response().Header().Set(echo.HeaderAccept, strings.Join(lineTypes, ", "))
	return "", problem(unsupportedMedia, "The Content-Type must be application/x-ndjson, in UTF-8.")
}

func isLines(contentType string) bool {
	media, parameters, err := mime.ParseMediaType(contentType)
	if err != nil || !slices.Contains(lineTypes, media) {
		return false
	}
	for name, value := range parameters {
		if name != "charset" || !strings.EqualFold(value, "utf-8") {
			return false
		}
	}
	return true
}

// decoded undoes the encoding of a body. However much comes out of a small
// body, it is read line by line and no line beyond its limit.
func decoded(body io.Reader, coding string) (io.Reader, error) {
	if coding == "" {
		return body, nil
	}
	return gzip.NewReader(body)
}

// unreadable is the problem of a body of which not even the beginning came.
func unreadable(c echo.Context, err error) *Problem {
	c.Response().Header().Set(echo.HeaderConnection, "close")
	var network net.Error
	switch {
	case errors.As(err, &network) && network.Timeout():
		return problem(requestTimeout, "The body did not arrive in time.")
	case errors.Is(err, gzip.ErrHeader):
		return problem(badRequest, "The body is announced as gzip and is none.")
	}
	return problem(badRequest, "The body broke off before its end.")
}

// streamIn is the body of a stream, with the deadline moved on at every read.
// cancel ends the work on it.
//
// The context of the request says that the client is gone. But it also ends
// with any failure to read the body, a deadline included, and then the client
// may still be there to be told how far the batch came. So it counts only from
// the end of the body on; before, whether he is there shows when writing.
func (s *Server) streamIn(c echo.Context, cancel context.CancelCauseFunc) *streamBody {
	request := c.Request().Context()
	return &streamBody{
		from: c.Request().Body, control: http.NewResponseController(c.Response()), idle: s.config.StreamIdleTimeout,
		atEnd: func() { context.AfterFunc(request, func() { cancel(errClientGone) }) },
	}
}

var errClientGone = errors.New("the client is gone")

// streamOut is where the answers of a stream go.
func (s *Server) streamOut(c echo.Context) *streamAnswer {
	h := c.Response().Header()
	h.Set(echo.HeaderContentType, typeLines)
	h.Add(echo.HeaderVary, echo.HeaderAcceptEncoding)
	// The answer may end before the body does; what then remains of the body must
	// not be read as the next request.
	h.Set(echo.HeaderConnection, "close")
	packed := acceptsGzip(c.Request().Header.Values(echo.HeaderAcceptEncoding))
	if packed {
		h.Set(echo.HeaderContentEncoding, "gzip")
	}
	return newStreamAnswer(c, s.config.StreamIdleTimeout, packed)
}

// acceptsGzip reads whether a client takes an answer in gzip: by name, or by *,
// and not with the quality 0.
func acceptsGzip(headers []string) bool {
	named, any := -1.0, -1.0 // qualities; negative where it is not listed
	for item := range strings.SplitSeq(strings.Join(headers, ","), ",") {
		coding, parameters, _ := strings.Cut(item, ";")
		switch strings.ToLower(strings.TrimSpace(coding)) {
		case "gzip", "x-gzip":
			named = max(named, quality(parameters))
		case "*":
			any = quality(parameters)
		}
	}
	if named >= 0 {
		return named > 0
	}
	return any > 0
}

// quality reads "q=0.5"; 1 where there is none that can be read.
func quality(parameters string) float64 {
	text, found := strings.CutPrefix(strings.ReplaceAll(strings.ToLower(parameters), " ", ""), "q=")
	if q, err := strconv.ParseFloat(text, 64); found && err == nil && q >= 0 {
		return q
	}
	return 1
}

// lingering is for how long a server goes on reading what a client still sends
// behind the end of the answer, so that the client gets to read that end.
const lingering = time.Second
