package batch

import (
	"bytes"
	"cmp"
	"context"
	"errors"
	"fmt"
	"io"
	"runtime"
	"strconv"
	"sync"
	"sync/atomic"
	"time"

	"regimed/regime/whatif"
)

// Answerer answers a line: it appends the members of the object that follow the
// number of the line, as `,"answer":{…}` or `,"problem":{…}`, and reports
// whether it is an answer. Several workers call it at once. It keeps no
// reference to the line.
type Answerer func(ctx context.Context, dst []byte, l Line) ([]byte, bool)

// Writer takes the output. Run flushes it whenever everything that has arrived
// is answered, so that a sender who waits for an answer gets it.
type Writer interface {
	io.Writer
	Flush() error
}

// Options say how a batch is run.
type Options struct {
	Answer   Answerer
	Workers  int             // 0: one a processor
	Limit    int             // longest line in bytes; 0: DefaultLimit
	Shard    Shard           // zero: the whole batch
	Past     *Past           // what a former run wrote; nil: nothing
	Stop     <-chan struct{} // once closed no line is read any more; what was read is answered
	Unblock  func()          // makes the reader return that waits for input; called when nothing more is wanted. nil: it never waits for long
	Progress func(Tally)     // after each line that was written; may be nil
}

// DefaultLimit is the longest line unless another is set.
const DefaultLimit = 1 << 20

// ReadError says that reading the input failed, and behind which line.
type ReadError struct {
	Line int64
	Err  error
}

func (e *ReadError) Error() string { return fmt.Sprintf("after line %d: %v", e.Line, e.Err) }

// Unwrap returns the cause.
func (e *ReadError) Unwrap() error { return e.Err }

// ErrOther says that a former output does not belong to the input and the
// options of this run.
var ErrOther = errors.New("what it holds is of another input, of other options or of another version: its last line is not what this run would write")

// Run answers the lines of a stream, or of a shard of it, in order. It holds a
// few lines a worker: a slow receiver holds the reader back.
//
// A failure of the input, or a stop, is an end of the state interrupted, and
// every line that was read before is answered; the failure is a *ReadError. With
// a failure of the output, or the end of the context, nothing more is written.
func Run(ctx context.Context, in io.Reader, out Writer, o Options) (End, error) {
	if err := o.Shard.Check(); err != nil {
		return End{}, err
	}
	inner, cancel := context.WithCancel(ctx)
	defer cancel()
	r := &runner{Options: o, ctx: inner, out: out, flushed: time.Now()}
	r.lines = NewLines(&attentive{in, inner}, cmp.Or(o.Limit, DefaultLimit))
	if r.Past == nil {
		r.Past = &Past{}
	}
	r.done = Tally{r.Past.Line, r.Past.Answers, r.Past.Problems}
	r.proved = r.Past.Line == 0
	letGo := r.unblock()
	err := whatif.InOrder(inner, cmp.Or(max(o.Workers, 0), runtime.GOMAXPROCS(0)), r.next, r.work, func(s *space) error {
		err := r.emit(s)
		if err != nil {
			cancel() // nobody waits for the other answers any more
		}
		return err
	})
	letGo()
	if err != nil {
		return r.end(), err
	}
	return r.finish()
}

// unblock lets a waiting reader return when nothing more is wanted of it, until
// the function that it returns is called.
func (r *runner) unblock() func() {
	if r.Unblock == nil {
		return func() {}
	}
	var watch sync.WaitGroup
	over := make(chan struct{})
	watch.Go(func() {
		select {
		case <-r.Stop:
			r.Unblock()
		case <-r.ctx.Done():
			r.Unblock()
		case <-over:
		}
	})
	return func() {
		close(over)
		watch.Wait()
	}
}

// runner is a run at work.
type runner struct {
	Options
	ctx      context.Context
	lines    *Lines
	out      Writer
	spaces   sync.Pool
	underway atomic.Int64 // lines read and not yet written
	done     Tally
	proved   bool // the last line of the former run came out the same
	flushed  time.Time

	// Of the reader; read by others only when it has ended.
	failed  error
	stopped bool
}

// space is a line on its way, with the room that it needs.
type space struct {
	Line
	out      []byte
	answered bool
	lost     bool // the run ended before it was answered
}

// Sizes of a space: of a new one, and up to which one is kept.
const (
	usualLine   = 4 << 10
	usualOut    = 32 << 10
	largestKept = 256 << 10
)

func (r *runner) space() *space {
	if s, ok := r.spaces.Get().(*space); ok {
		return s
	}
	return &space{Line: Line{Text: make([]byte, 0, usualLine)}, out: make([]byte, 0, usualOut)}
}

func (r *runner) giveBack(s *space) {
	if cap(s.Text) <= largestKept && cap(s.out) <= largestKept {
		r.spaces.Put(s)
	}
}

// next reads the next line that is to be answered.
func (r *runner) next() (*space, bool, error) {
	s := r.space()
	for !r.isStopped() {
		var err error
		wanted := r.wants(r.lines.Number() + 1)
		if wanted {
			s.Line, err = r.lines.Next(s.Text)
		} else {
			err = r.lines.Pass()
		}
		switch {
		case errors.Is(err, io.EOF):
			return nil, false, nil
		case err != nil && r.isStopped():
			return nil, false, nil
		case err != nil:
			r.failed = &ReadError{r.lines.Number(), err}
			return nil, false, nil
		case wanted && (s.Limit > 0 || !isBlank(s.Text)):
			r.underway.Add(1)
			return s, true, nil
		}
	}
	return nil, false, nil
}

// wants reports whether a line is to be answered. The last one of a former run
// is answered again, as a proof that it was the same batch.
func (r *runner) wants(line int64) bool { return line >= r.Past.Line && r.Shard.Has(line) }

func (r *runner) isStopped() bool {
	select {
	case <-r.Stop:
		r.stopped = true
	default:
	}
	return r.stopped
}

func (r *runner) work(s *space) *space {
	s.out = strconv.AppendInt(append(s.out[:0], `{"line":`...), s.Number, 10)
	s.out, s.answered = r.Answer(r.ctx, s.out, s.Line)
	s.out = append(s.out, "}\n"...)
	s.lost = r.ctx.Err() != nil
	return s
}

func (r *runner) emit(s *space) error {
	defer r.giveBack(s)
	left := r.underway.Add(-1)
	if s.lost {
		return context.Cause(r.ctx)
	}
	if !r.proved {
		return r.prove(s)
	}
	if _, err := r.out.Write(s.out); err != nil {
		return err
	}
	r.count(s)
	if r.Progress != nil {
		r.Progress(r.done)
	}
	return r.flush(left)
}

// prove compares the first line that is answered with the last one of the
// former run.
func (r *runner) prove(s *space) error {
	if s.Number != r.Past.Line || !bytes.Equal(s.out, r.Past.Text) {
		return fmt.Errorf("line %d: %w", r.Past.Line, ErrOther)
	}
	r.proved = true
	return nil
}

func (r *runner) count(s *space) {
	r.done.Lines = s.Number
	if s.answered {
		r.done.Answers++
	} else {
		r.done.Problems++
	}
}

// longestHeld is how long a written line may lie in a buffer while others are
// being answered.
const longestHeld = 250 * time.Millisecond

// flush sends on what was written where nothing else is underway, or where it
// has waited for long.
func (r *runner) flush(underway int64) error {
	if underway > 0 && time.Since(r.flushed) < longestHeld {
		return nil
	}
	err := r.out.Flush()
	r.flushed = time.Now()
	return err
}

// end is how far the run came.
func (r *runner) end() End { return End{Tally: r.done, Shard: r.Shard} }

// finish writes the last line.
func (r *runner) finish() (End, error) {
	e := r.end()
	e.Complete = r.failed == nil && !r.stopped
	switch {
	case !r.proved && e.Complete:
		return r.end(), fmt.Errorf("the input ends with line %d: %w", r.lines.Number(), ErrOther)
	case !r.proved:
		return e, r.failed // the former output stays as it is
	}
	e.Lines = max(e.Lines, r.lines.Number())
	if _, err := r.out.Write(e.appendTo(nil)); err != nil {
		return e, err
	}
	return e, errors.Join(r.failed, r.out.Flush())
}

// attentive is a reader that ends with the context: passing over a long stretch
// of blank lines asks nobody else.
type attentive struct {
	from io.Reader
	ctx  context.Context
}

func (a *attentive) Read(p []byte) (int, error) {
	if a.ctx.Err() != nil {
		return 0, context.Cause(a.ctx)
	}
	return a.from.Read(p)
}
