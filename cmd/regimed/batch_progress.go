package main

import (
	"fmt"
	"io"
	"time"

	"regimed/api/batch"
)

// batchProgress says how far a batch is: on a terminal in one line that is
// written over, elsewhere in a line now and then.
type batchProgress struct {
	to       io.Writer // nil: silent
	terminal bool
	every    time.Duration
	in       *batchInput

	start, last time.Time
	from        int64 // bytes that had been read at the first line: those of a former run
	lines       int64 // that were written
}

// newBatchProgress is silent unless it is wanted or goes to a terminal.
func newBatchProgress(to io.Writer, wanted bool, in *batchInput) *batchProgress {
	p := &batchProgress{terminal: isTerminal(to), in: in, every: 5 * time.Second, start: time.Now()}
	p.last = p.start
	if p.terminal {
		p.every = 200 * time.Millisecond
	}
	if wanted || p.terminal {
		p.to = to
	}
	return p
}

// line is told of each line that was written.
func (p *batchProgress) line(t batch.Tally) {
	if p.to == nil {
		return
	}
	now := time.Now()
	if p.lines == 0 {
		p.from = p.in.read.Load()
	}
	p.lines++
	if now.Sub(p.last) < p.every {
		return
	}
	p.last = now
	text := progressText(t, p.lines, now.Sub(p.start), p.from, p.in.read.Load(), p.in.size)
	if p.terminal {
		fmt.Fprintf(p.to, "\r%-78s", text)
		return
	}
	fmt.Fprintln(p.to, text)
}

// progressText tells lines, their rate and, where the size of the input is
// known, the time that is left; from and read are bytes of the input.
func progressText(t batch.Tally, lines int64, since time.Duration, from, read, size int64) string {
	text := fmt.Sprintf("line %d, %.0f lines/s", t.Lines, float64(lines)/max(since.Seconds(), 1e-9))
	if t.Problems > 0 {
		text += fmt.Sprintf(", %d with a problem", t.Problems)
	}
	if size <= 0 {
		return text
	}
	text += fmt.Sprintf(", %.1f %% of the input", 100*float64(read)/float64(size))
	if read > from {
		left := time.Duration(float64(since) * float64(size-read) / float64(read-from))
		text += fmt.Sprintf(", about %s left", max(left, 0).Round(time.Second))
	}
	return text
}

// finish says what was done in all.
func (p *batchProgress) finish(end batch.End) {
	if p.to == nil {
		return
	}
	if p.terminal && p.lines > 0 {
		fmt.Fprintf(p.to, "\r%-78s\r", "")
	}
	since := time.Since(p.start)
	fmt.Fprintf(p.to, "%s: %d answered, %d with a problem; %s in %s, %.0f lines/s\n",
		end.State(), end.Answers, end.Problems, count(int(p.lines), "line"), since.Round(time.Millisecond), float64(p.lines)/max(since.Seconds(), 1e-9))
}
