package api

import (
	"bufio"
	"errors"
	"io"
	"net/http"
	"sync/atomic"
	"time"

	"github.com/klauspost/compress/gzip"
	"github.com/labstack/echo/v4"
)

// A stream lasts as long as it likes. What it must not do is stand still: each
// read and each write has a deadline of its own, and a client who neither sends
// nor takes anything until then is cut off. The errors of setting a deadline are
// left alone: a writer that has none is one that can't stall, as in a test.

// streamBody is the body of a stream of unknown length.
type streamBody struct {
	from    io.Reader
	control *http.ResponseController
	idle    time.Duration
	atEnd   func()
	ended   bool
	over    atomic.Bool
}

var errStreamOver = errors.New("nothing more is wanted of the body")

func (b *streamBody) Read(p []byte) (int, error) {
	b.control.SetReadDeadline(time.Now().Add(b.idle))
	if b.over.Load() { // asked after the deadline was moved: unblock may have come between
		return 0, errStreamOver
	}
	n, err := b.from.Read(p)
	if errors.Is(err, io.EOF) && !b.ended {
		b.ended = true
		// From here on the server watches whether the client goes away, and
		// would take the deadline for that.
		b.control.SetReadDeadline(time.Time{})
		b.atEnd()
	}
	return n, err
}

// unblock makes a read that waits return.
func (b *streamBody) unblock() {
	b.over.Store(true)
	b.control.SetReadDeadline(time.Unix(1, 0))
}

// linger gives a client who still sends a while to notice that the answer has
// ended.
func (b *streamBody) linger() { b.control.SetReadDeadline(time.Now().Add(lingering)) }

// streamAnswer is where the lines of an answer go.
type streamAnswer struct {
	answer  *echo.Response
	control *http.ResponseController
	idle    time.Duration
	lines   *bufio.Writer
	packer  *gzip.Writer // nil where the client does not take gzip
	waits   bool         // the client waits to be told before it sends the body
}

// piece is how much is written under one deadline.
const piece = 16 << 10

func newStreamAnswer(c echo.Context, idle time.Duration, packed bool) *streamAnswer {
	control := http.NewResponseController(c.Response())
	a := &streamAnswer{answer: c.Response(), control: control, idle: idle, waits: c.Request().Header.Get("Expect") != ""}
	var to io.Writer = &streamPieces{c.Response(), control, idle}
	if packed {
		a.packer, _ = gzip.NewWriterLevel(to, gzip.BestSpeed) // its only error is a level that there is not
		to = a.packer
	}
	a.lines = bufio.NewWriterSize(to, piece)
	return a
}

// begin lets both directions flow at once, and sends the head of the answer: a
// client may wait for it before it sends a line. One who waits for leave to
// send gets that instead, at the first read.
func (a *streamAnswer) begin() error {
	if err := a.control.EnableFullDuplex(); err != nil && !errors.Is(err, http.ErrNotSupported) {
		return err
	}
	if a.waits {
		return nil
	}
	a.answer.WriteHeader(http.StatusOK)
	return a.send()
}

func (a *streamAnswer) Write(p []byte) (int, error) { return a.lines.Write(p) }

// Flush sends on what was written.
func (a *streamAnswer) Flush() error {
	if err := a.lines.Flush(); err != nil {
		return err
	}
	if a.packer != nil {
		if err := a.packer.Flush(); err != nil {
			return err
		}
	}
	return a.send()
}

func (a *streamAnswer) send() error {
	a.control.SetWriteDeadline(time.Now().Add(a.idle))
	if err := a.control.Flush(); err != nil && !errors.Is(err, http.ErrNotSupported) {
		return err
	}
	return nil
}

// close ends the answer.
func (a *streamAnswer) close() error {
	err := a.lines.Flush()
	if a.packer != nil {
		err = errors.Join(err, a.packer.Close())
	}
	return errors.Join(err, a.send())
}

// streamPieces writes to the client piece by piece, so that a slow one is not
// taken for one who stands still.
type streamPieces struct {
	to      io.Writer
	control *http.ResponseController
	idle    time.Duration
}

func (s *streamPieces) Write(p []byte) (int, error) {
	written := 0
	for written < len(p) {
		s.control.SetWriteDeadline(time.Now().Add(s.idle))
		n, err := s.to.Write(p[written:min(written+piece, len(p))])
		written += n
		if err != nil {
			return written, err
		}
	}
	return written, nil
}
