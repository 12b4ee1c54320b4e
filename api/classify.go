package api

import (
	"context"
	"errors"
	"fmt"
	"io"
	"mime"
	"net"
	"net/http"
	"strings"
	"sync"

	"github.com/labstack/echo/v4"

	"regimed/api/render"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// space is the room that one request needs for its body and its answer.
type space struct {
	body, answer []byte
}

// spacePool keeps spaces, since most requests need as much as the last one.
type spacePool struct{ pool sync.Pool }

// Sizes of a space: of a new one, and up to which one is kept.
const (
	usualBody   = 4 << 10
	usualAnswer = 32 << 10
	largestKept = 256 << 10
)

func (p *spacePool) get() *space {
	if s, ok := p.pool.Get().(*space); ok {
		return s
	}
	return &space{body: make([]byte, 0, usualBody), answer: make([]byte, 0, usualAnswer)}
}

func (p *spacePool) put(s *space) {
	if cap(s.body) <= largestKept && cap(s.answer) <= largestKept {
		p.pool.Put(s)
	}
}

// classify answers a case. Nothing here uses reflection, and both buffers are
// used again: decoding and rendering keep no reference to them.
func (s *Server) classify(c echo.Context) error {
	c.Response().Header()[echo.HeaderVary] = varyAccept
	only, form, options, err := classifyOptions(c, true)
	if err != nil {
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
	kase, violations, err := input.Decode(room.body, s.schema)
	if err != nil {
		return malformed(err)
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The case", violations)
	}
	ctx, cancel := s.computing(c)
	defer cancel()
	answer, violations, err := whatif.Classify(ctx, kase, options)
	if err != nil {
		return s.unfinished(err)
	}
	if len(violations) > 0 {
		return violated(invalidCase, "The case", violations)
	}
	if form != nil {
		return sendForm(c, form, answer)
	}
	room.answer = render.AppendJSON(room.answer[:0], answer, only)
	answer.Release()
	return send(c, http.StatusOK, typeJSON, room.answer)
}

// Of the time for writing an answer, so many parts of so many may go into
// computing it.
const computing, writing = 3, 4

// computing is the context of a request with the time that may go into its answer.
func (s *Server) computing(c echo.Context) (context.Context, context.CancelFunc) {
	return context.WithTimeout(c.Request().Context(), s.config.WriteTimeout*computing/writing)
}

// unfinished is the problem of an answer that was not computed to its end.
func (s *Server) unfinished(err error) *Problem {
	if errors.Is(err, context.DeadlineExceeded) {
		return problem(tooLong, fmt.Sprintf("The answer was not ready within %s. Fewer samples, what_if=false or fewer fields take less.", s.config.WriteTimeout*computing/writing))
	}
	return problem(badRequest, "The client went away before the answer was ready.")
}

// acceptsJSON refuses a body that is not announced as plain JSON in UTF-8.
func acceptsJSON(c echo.Context) error {
	h := c.Request().Header
	if coding := h.Get(echo.HeaderContentEncoding); coding != "" && !strings.EqualFold(coding, "identity") {
		c.Response().Header().Set(echo.HeaderAcceptEncoding, "identity")
		return problem(unsupportedMedia, "The body is compressed; send it as it is.")
	}
	if isJSON(h.Get(echo.HeaderContentType)) {
		return nil
	}
	c.Response().Header().Set("Accept-Post", echo.MIMEApplicationJSON)
	c.Response().Header().Set(echo.HeaderAccept, echo.MIMEApplicationJSON)
	return problem(unsupportedMedia, "The Content-Type must be application/json, in UTF-8.")
}

func isJSON(contentType string) bool {
	if contentType == echo.MIMEApplicationJSON || contentType == typeJSON {
		return true // the spellings that clients use; no need to take them apart
	}
	media, parameters, err := mime.ParseMediaType(contentType)
	if err != nil || media != echo.MIMEApplicationJSON {
		return false
	}
	for name, value := range parameters {
		if name != "charset" || !strings.EqualFold(value, "utf-8") {
			return false
		}
	}
	return true
}

// readBody reads the body into dst, up to the limit, whether its length was
// announced or not.
func (s *Server) readBody(c echo.Context, dst []byte) ([]byte, error) {
	r := c.Request()
	limit := s.config.BodyLimit
	if r.ContentLength > limit {
		return dst, s.bodyTooLarge(c)
	}
	// The reader of net/http also closes the connection of a caller who sends
	// more, rather than reading on.
	body := http.MaxBytesReader(c.Response().Writer, r.Body, limit)
	dst, err := appendAll(dst, body)
	if err == nil {
		return dst, nil
	}
	var tooMany *http.MaxBytesError
	if errors.As(err, &tooMany) {
		return dst, s.bodyTooLarge(c)
	}
	var network net.Error
	if errors.As(err, &network) && network.Timeout() {
		c.Response().Header().Set(echo.HeaderConnection, "close")
		return dst, problem(requestTimeout, "The body did not arrive in time.")
	}
	return dst, problem(badRequest, "The body broke off before its end.")
}

func (s *Server) bodyTooLarge(c echo.Context) error {
	c.Response().Header().Set(echo.HeaderConnection, "close")
	return largerThan(s.config.BodyLimit)
}

// appendAll reads to the end, into the room that dst has as far as it goes.
func appendAll(dst []byte, r io.Reader) ([]byte, error) {
	for {
		if len(dst) == cap(dst) {
			dst = append(dst, 0)[:len(dst)]
		}
		n, err := r.Read(dst[len(dst):cap(dst)])
		dst = dst[:len(dst)+n]
		if err == io.EOF {
			return dst, nil
		}
		if err != nil {
			return dst, err
		}
	}
}
