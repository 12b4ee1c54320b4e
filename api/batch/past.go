package batch

import (
	"bufio"
	"bytes"
	"errors"
	"fmt"
	"io"

	"github.com/go-json-experiment/json/jsontext"
)

// Past is what a former run wrote, as far as it is whole.
type Past struct {
	Line     int64  // the last one that has an answer or a problem
	Text     []byte // what is written to it, with its end
	Length   int64  // of everything up to there, in bytes
	Answers  int64
	Problems int64
}

// longestPast is the longest line of an output that is read: many times what an
// answer takes.
const longestPast = 64 << 20

// ReadPast reads what a former run over the same batch and shard wrote, up to
// the last whole line. What follows there, a torn line or the line at the end,
// a run that goes on writes anew. keep gets each line that stays; it may be nil.
//
// An output that is no output of a batch, or of another shard, is refused.
func ReadPast(r io.Reader, s Shard, keep func(line []byte) error) (*Past, error) {
	if err := s.Check(); err != nil {
		return nil, err
	}
	p := &Past{}
	from := bufio.NewReaderSize(r, readBuffer)
	for text, err := wholeLine(from, nil); ; text, err = wholeLine(from, text) {
		if errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF) {
			return p, nil
		}
		if err != nil {
			return nil, err
		}
		last, err := p.add(text, s)
		if err != nil || last {
			return p, err
		}
		if keep == nil {
			continue
		}
		if err := keep(text); err != nil {
			return nil, err
		}
	}
}

// add reads the head of one line. It reports whether it was the last one.
func (p *Past) add(text []byte, s Shard) (last bool, err error) {
	h, err := headOf(text)
	switch {
	case err != nil:
		return false, fmt.Errorf("line %d of the output there is: %w", p.Answers+p.Problems+1, err)
	case h.end:
		return true, nil
	case h.line <= p.Line:
		return false, fmt.Errorf("the output there is has line %d behind line %d", h.line, p.Line)
	case !s.Has(h.line):
		return false, fmt.Errorf("the output there is has line %d, which is none of this shard", h.line)
	case h.answered:
		p.Answers++
	default:
		p.Problems++
	}
	p.Line, p.Text = h.line, append(p.Text[:0], text...)
	p.Length += int64(len(text))
	return false, nil
}

// head is how a line of an output begins.
type head struct {
	line     int64
	answered bool
	end      bool
}

var errForeign = errors.New("it is no line of a batch")

// headOf reads a line up to its answer or problem.
func headOf(text []byte) (head, error) {
	var h head
	dec := jsontext.NewDecoder(bytes.NewBuffer(text))
	if t, err := dec.ReadToken(); err != nil || t.Kind() != '{' {
		return h, errForeign
	}
	for {
		t, err := dec.ReadToken()
		if err != nil {
			return h, errForeign
		}
		switch name := t.String(); {
		case name == "end" && h.line == 0:
			h.end = true
			return h, nil
		case name == "line" && h.line == 0:
			if h.line, err = lineNumber(dec); err != nil {
				return h, err
			}
		case name == "id" && h.line > 0:
			if err := dec.SkipValue(); err != nil {
				return h, errForeign
			}
		case (name == "answer" || name == "problem") && h.line > 0:
			h.answered = name == "answer"
			return h, nil
		default:
			return h, errForeign
		}
	}
}

func lineNumber(dec *jsontext.Decoder) (int64, error) {
	t, err := dec.ReadToken()
	if err != nil || t.Kind() != '0' {
		return 0, errForeign
	}
	n, err := t.Int()
	if err != nil || n < 1 {
		return 0, errForeign
	}
	return n, nil
}

// wholeLine reads a line with its end into the room. The error is io.EOF where
// none is left.
func wholeLine(from *bufio.Reader, room []byte) ([]byte, error) {
	room = room[:0]
	for {
		part, err := from.ReadSlice('\n')
		room = append(room, part...)
		switch {
		case err == nil:
			return room, nil
		case !errors.Is(err, bufio.ErrBufferFull):
			return room, err
		case len(room) > longestPast:
			return room, errForeign
		}
	}
}
