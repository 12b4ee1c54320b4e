package batch

import (
	"bufio"
	"bytes"
	"errors"
	"io"
)

// Line is one line of the input.
type Line struct {
	Number int64  // from 1, blank lines counted
	Text   []byte // without its end; only the beginning where the line is too long
	Limit  int    // what it is longer than; 0 where it is short enough
}

// Lines takes a stream apart into lines. It holds one buffer and never more of
// a line than the limit: the rest of a longer one is passed over.
//
// A line ends with \n or \r\n, and the last one where the stream ends. A mark of
// UTF-8 before the first line is no part of it.
type Lines struct {
	from   *bufio.Reader
	limit  int
	number int64
	begun  bool
}

const readBuffer = 64 << 10

var utf8Mark = []byte("\uFEFF")

// NewLines reads lines of up to so many bytes.
func NewLines(r io.Reader, limit int) *Lines {
	return &Lines{from: bufio.NewReaderSize(r, readBuffer), limit: limit}
}

// Number is that of the last line that was read or passed over.
func (l *Lines) Number() int64 { return l.number }

// Next reads a line into the room, which grows where it must. The error is
// io.EOF behind the last line. Where reading fails, what came of a line is no
// line.
func (l *Lines) Next(room []byte) (Line, error) {
	text, limit := room[:0], 0
	err := l.read(func(part []byte) {
		free := l.limit + 1 - len(text) // one more than the limit: it may be the \r of the end
		if len(part) > free {
			part, limit = part[:free], l.limit
		}
		text = append(text, part...)
	})
	if err != nil {
		return Line{Text: text}, err
	}
	if limit == 0 {
		text = bytes.TrimSuffix(text, []byte{'\r'})
	}
	if len(text) > l.limit {
		text, limit = text[:l.limit], l.limit
	}
	return Line{l.number, text, limit}, nil
}

// Pass passes over a line.
func (l *Lines) Pass() error { return l.read(func([]byte) {}) }

// read hands on a line without its \n, part by part.
func (l *Lines) read(take func(part []byte)) error {
	if !l.begun {
		l.begun = true
		l.passMark()
	}
	for some := false; ; {
		part, err := l.from.ReadSlice('\n')
		some = some || len(part) > 0
		switch {
		case err == nil:
			take(part[:len(part)-1])
			l.number++
			return nil
		case errors.Is(err, bufio.ErrBufferFull):
			take(part)
		case errors.Is(err, io.EOF) && some:
			take(part)
			l.number++
			return nil
		default:
			return err
		}
	}
}

// passMark passes over the mark of UTF-8. It looks at no more than it needs: a
// first line of one byte may be all that comes for a while.
func (l *Lines) passMark() {
	for n := 1; n <= len(utf8Mark); n++ {
		head, err := l.from.Peek(n)
		if err != nil || !bytes.HasPrefix(utf8Mark, head) {
			return
		}
	}
	l.from.Discard(len(utf8Mark)) // what was just looked at
}

// isBlank reports whether nothing but blanks of JSON stands in a line.
func isBlank(text []byte) bool { return len(bytes.Trim(text, " \t\r")) == 0 }
