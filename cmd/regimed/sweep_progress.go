package main

import (
	"fmt"
	"io"
	"os"
	"time"
)

// progress says how far long work is: on a terminal in one line that is written
// over, elsewhere in a line now and then.
type progress struct {
	to        io.Writer // nil: silent
	terminal  bool
	every     time.Duration
	start     time.Time
	last      time.Time
	done, all int64 // done: what was there at the start
	said      bool
}

// newProgress is silent unless it is wanted or goes to a terminal.
func newProgress(to io.Writer, wanted bool, done, all int64) *progress {
	p := &progress{terminal: isTerminal(to), start: time.Now(), done: done, all: all}
	p.last, p.every = p.start, 5*time.Second
	if p.terminal {
		p.every = 200 * time.Millisecond
	}
	if wanted || p.terminal {
		p.to = to
	}
	return p
}

func isTerminal(w io.Writer) bool {
	f, ok := w.(*os.File)
	if !ok {
		return false
	}
	info, err := f.Stat()
	return err == nil && info.Mode()&os.ModeCharDevice != 0
}

// say says that some points are done, unless it said so a moment ago; the last
// point is always said.
func (p *progress) say(done, problems int64) {
	now := time.Now()
	if p.to == nil || done < p.all && now.Sub(p.last) < p.every {
		return
	}
	p.last, p.said = now, true
	line := p.line(done, problems, now.Sub(p.start))
	if p.terminal {
		fmt.Fprintf(p.to, "\r%-78s", line)
		return
	}
	fmt.Fprintln(p.to, line)
}

func (p *progress) line(done, problems int64, since time.Duration) string {
	text := fmt.Sprintf("%5.1f %%  %d of %d points", 100*float64(done)/float64(p.all), done, p.all)
	if problems > 0 {
		text += fmt.Sprintf(", %d with a problem", problems)
	}
	if fresh := done - p.done; fresh > 0 && done < p.all {
		left := time.Duration(float64(since) / float64(fresh) * float64(p.all-done))
		text += fmt.Sprintf(", about %s left", left.Round(time.Second))
	}
	return text
}

// finish ends the line.
func (p *progress) finish() {
	if p.terminal && p.said {
		fmt.Fprintln(p.to)
	}
}
