package batch

import (
	"bufio"
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"runtime"
	"strings"
	"sync/atomic"
	"testing"
	"testing/iotest"
)

// echoing answers a line with its text, and refuses those that begin with an
// exclamation mark, or are too long.
func echoing(_ context.Context, dst []byte, l Line) ([]byte, bool) {
	if l.Limit > 0 {
		return fmt.Appendf(dst, `,"problem":"longer than %d"`, l.Limit), false
	}
	if text, refused := bytes.CutPrefix(l.Text, []byte{'!'}); refused {
		return fmt.Appendf(dst, `,"problem":%q`, text), false
	}
	return fmt.Appendf(dst, `,"id":"%d","answer":%q`, l.Number, l.Text), true
}

// ran runs a batch to its end and returns the output.
func ran(t testing.TB, in string, o Options) (string, End) {
	t.Helper()
	var out bytes.Buffer
	o.Answer = echoing
	end, err := Run(context.Background(), strings.NewReader(in), bufio.NewWriter(&out), o)
	if err != nil {
		t.Fatal(err)
	}
	return out.String(), end
}

func TestRun(t *testing.T) {
	got, end := ran(t, "\uFEFFa\r\n\n \t\nb\n!c\n"+strings.Repeat("d", 30)+"\ne", Options{Limit: 20, Workers: 3})
	want := `{"line":1,"id":"1","answer":"a"}
{"line":4,"id":"4","answer":"b"}
{"line":5,"problem":"c"}
{"line":6,"problem":"longer than 20"}
{"line":7,"id":"7","answer":"e"}
{"end":{"state":"complete","lines":7,"answers":3,"problems":2}}
`
	if got != want {
		t.Errorf("got\n%swant\n%s", got, want)
	}
	if !end.Complete || end.Tally != (Tally{7, 3, 2}) {
		t.Errorf("%+v", end)
	}
}

func TestRunOfNothing(t *testing.T) {
	for in, lines := range map[string]int{"": 0, "\n\n": 2, "\uFEFF": 0} {
		got, _ := ran(t, in, Options{})
		if want := fmt.Sprintf(`{"end":{"state":"complete","lines":%d,"answers":0,"problems":0}}`+"\n", lines); got != want {
			t.Errorf("%q: %s", in, got)
		}
	}
}

// numbered is an input of so many lines, some blank, some refused.
func numbered(n int) string {
	var text strings.Builder
	for i := 1; i <= n; i++ {
		switch {
		case i%11 == 0:
			text.WriteString("\n")
		case i%7 == 0:
			fmt.Fprintf(&text, "!%d\n", i)
		default:
			fmt.Fprintf(&text, "%d\n", i)
		}
	}
	return text.String()
}

func TestOrder(t *testing.T) {
	in := numbered(5000)
	one, _ := ran(t, in, Options{Workers: 1})
	for _, workers := range []int{2, 5, 0} {
		if got, _ := ran(t, in, Options{Workers: workers}); got != one {
			t.Errorf("%d workers give another output", workers)
		}
	}
}

// tallyReader counts what is read.
type tallyReader struct {
	from io.Reader
	read atomic.Int64
}

func (r *tallyReader) Read(p []byte) (int, error) {
	n, err := r.from.Read(p)
	r.read.Add(int64(n))
	return n, err
}

// receiver is a writer that says of each line that it comes.
type receiver struct {
	line    func([]byte) error
	flushed func()
}

func (r *receiver) Write(p []byte) (int, error) { return len(p), r.line(p) }

func (r *receiver) Flush() error {
	if r.flushed != nil {
		r.flushed()
	}
	return nil
}

// A receiver who takes his time holds the reader back: what is read ahead of a
// written line is bounded by the buffer and the lines that workers hold.
func TestRunHoldsBack(t *testing.T) {
	const workers, size, lines = 2, 1000, 3000
	in := &tallyReader{from: strings.NewReader(strings.Repeat(strings.Repeat("x", size-1)+"\n", lines))}
	written, most := int64(0), int64(0)
	out := &receiver{line: func([]byte) error {
		runtime.Gosched()
		most = max(most, in.read.Load()-written*size)
		written++
		return nil
	}}
	if _, err := Run(context.Background(), in, out, Options{Answer: echoing, Workers: workers}); err != nil {
		t.Fatal(err)
	}
	if bound := int64(2*readBuffer + 10*workers*size); most > bound || written != lines+1 {
		t.Errorf("%d bytes ahead, bound %d; %d lines written", most, bound, written)
	}
}

// A sender who waits for the answer to a line before he sends the next one gets
// it.
func TestRunAnswersAtOnce(t *testing.T) {
	in, send := io.Pipe()
	flushed := make(chan string)
	held := ""
	out := &receiver{
		line:    func(p []byte) error { held += string(p); return nil },
		flushed: func() { flushed <- held; held = "" },
	}
	ended := make(chan error, 1)
	go func() {
		_, err := Run(context.Background(), in, out, Options{Answer: echoing})
		ended <- err
		close(flushed)
	}()
	for i := 1; i <= 20; i++ {
		fmt.Fprintf(send, "%d\n", i)
		if got, want := <-flushed, fmt.Sprintf("{\"line\":%d,\"id\":\"%d\",\"answer\":\"%d\"}\n", i, i, i); got != want {
			t.Fatalf("got %q, want %q", got, want)
		}
	}
	send.Close()
	if got := <-flushed; !strings.HasPrefix(got, `{"end":{"state":"complete","lines":20,`) {
		t.Errorf("at the end: %q", got)
	}
	if err := <-ended; err != nil {
		t.Error(err)
	}
}

// After a stop, what was read is answered and the output says how far it goes,
// though the input never ends.
func TestStop(t *testing.T) {
	in, send := io.Pipe()
	stop := make(chan struct{})
	var got strings.Builder
	answered := make(chan struct{}, 100)
	out := &receiver{line: func(p []byte) error { got.Write(p); answered <- struct{}{}; return nil }}
	type result struct {
		end End
		err error
	}
	ended := make(chan result)
	go func() {
		end, err := Run(context.Background(), in, out, Options{Answer: echoing, Stop: stop, Unblock: func() { in.CloseWithError(io.ErrClosedPipe) }})
		ended <- result{end, err}
	}()
	fmt.Fprint(send, "a\n\nb\n!c\nd")
	for range 3 {
		<-answered
	}
	close(stop)
	r := <-ended
	want := "{\"line\":4,\"problem\":\"c\"}\n{\"end\":{\"state\":\"interrupted\",\"lines\":4,\"answers\":2,\"problems\":1}}\n"
	if r.err != nil || r.end.Complete || r.end.Lines != 4 || !strings.HasSuffix(got.String(), want) {
		t.Errorf("%+v, %v: %s", r.end, r.err, got.String())
	}
}

// A stop before the first line reads nothing.
func TestStopAtOnce(t *testing.T) {
	stop := make(chan struct{})
	close(stop)
	if got, _ := ran(t, "a\nb\n", Options{Stop: stop}); got != `{"end":{"state":"interrupted","lines":0,"answers":0,"problems":0}}`+"\n" {
		t.Error(got)
	}
}

// The lines before a failure of the input are answered, and it is told.
func TestFailingInput(t *testing.T) {
	broken := errors.New("broken")
	var out bytes.Buffer
	end, err := Run(context.Background(), io.MultiReader(strings.NewReader("a\nb\nc"), iotest.ErrReader(broken)), bufio.NewWriter(&out), Options{Answer: echoing})
	var failed *ReadError
	if !errors.As(err, &failed) || failed.Line != 2 || !errors.Is(err, broken) || end.Complete {
		t.Errorf("%+v, %v", end, err)
	}
	if !strings.HasSuffix(out.String(), "\"b\"}\n{\"end\":{\"state\":\"interrupted\",\"lines\":2,\"answers\":2,\"problems\":0}}\n") {
		t.Error(out.String())
	}
}

// A failure of the output ends the run, also while the reader waits.
func TestFailingOutput(t *testing.T) {
	in, send := io.Pipe()
	full := errors.New("full")
	ended := make(chan error, 1)
	go func() {
		out := &receiver{line: func([]byte) error { return full }}
		_, err := Run(context.Background(), in, out, Options{Answer: echoing, Unblock: func() { in.Close() }})
		ended <- err
	}()
	fmt.Fprint(send, "a\n")
	if err := <-ended; !errors.Is(err, full) {
		t.Error(err)
	}
}

// The end of the context ends everything, and cancels work that is going on.
func TestCancelledRun(t *testing.T) {
	gone := errors.New("gone away")
	ctx, cancel := context.WithCancelCause(context.Background())
	in, send := io.Pipe()
	begun := make(chan struct{})
	waiting := func(ctx context.Context, dst []byte, _ Line) ([]byte, bool) {
		begun <- struct{}{}
		<-ctx.Done()
		return append(dst, `,"problem":null`...), false
	}
	ended := make(chan error, 1)
	out := &receiver{line: func(p []byte) error { t.Errorf("written: %s", p); return nil }}
	go func() {
		_, err := Run(ctx, in, out, Options{Answer: waiting, Workers: 1, Unblock: func() { in.Close() }})
		ended <- err
	}()
	fmt.Fprint(send, "a\n")
	<-begun
	cancel(gone)
	if err := <-ended; !errors.Is(err, gone) {
		t.Error(err)
	}
}

// A stretch without an answer, here of blank lines without end, is left too.
func TestCancelledOverBlankLines(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	in := &tallyReader{from: endless('\n')}
	ended := make(chan error, 1)
	go func() {
		_, err := Run(ctx, in, bufio.NewWriter(io.Discard), Options{Answer: echoing})
		ended <- err
	}()
	for in.read.Load() < 10*readBuffer {
		runtime.Gosched()
	}
	cancel()
	if err := <-ended; !errors.Is(err, context.Canceled) {
		t.Error(err)
	}
}

// The shards of a batch together have each line of it once, as the whole has it.
func TestShardsMakeTheWhole(t *testing.T) {
	in := numbered(500)
	whole, _ := ran(t, in, Options{})
	for _, of := range []int64{1, 2, 3, 7, 600} {
		merged := map[string]int{}
		for index := range of {
			part, end := ran(t, in, Options{Shard: Shard{index, of}})
			lines := strings.SplitAfter(part, "\n")
			for _, line := range lines[:len(lines)-2] {
				merged[line]++
			}
			last := lines[len(lines)-2]
			if named := strings.Contains(last, fmt.Sprintf(`"shard":{"index":%d,"of":%d}}}`, index, of)); named != (of > 1) || end.Lines != 500 {
				t.Errorf("shard %d of %d ends with %s", index, of, last)
			}
		}
		lines := strings.SplitAfter(whole, "\n")
		for _, line := range lines[:len(lines)-2] {
			if merged[line] != 1 {
				t.Errorf("%d shards have %d times %s", of, merged[line], line)
			}
		}
		if want := len(lines) - 2; len(merged) != want {
			t.Errorf("%d shards have %d lines, want %d", of, len(merged), want)
		}
	}
	if _, err := Run(context.Background(), strings.NewReader(in), bufio.NewWriter(io.Discard), Options{Answer: echoing, Shard: Shard{3, 3}}); err == nil {
		t.Error("a shard that there is not")
	}
}

// Wherever an output was cut off, a run that goes on completes it to the same
// bytes; also one that ended as interrupted.
func TestGoingOnFromAnyByte(t *testing.T) {
	in := numbered(60)
	for _, shard := range []Shard{{}, {1, 3}} {
		whole, _ := ran(t, in, Options{Shard: shard})
		for cut := range len(whole) + 1 {
			former := whole[:cut]
			for _, behind := range []string{"", `{"end":{"state":"interrupted","lines":3}}` + "\n"} {
				if behind != "" && (cut == 0 || cut == len(whole) || former[cut-1] != '\n') {
					continue
				}
				if got := goneOn(t, former+behind, in, shard); got != whole {
					t.Fatalf("from byte %d: %s", cut, got)
				}
			}
		}
	}
}

// goneOn completes a former output.
func goneOn(t *testing.T, former, in string, shard Shard) string {
	t.Helper()
	var kept strings.Builder
	past, err := ReadPast(strings.NewReader(former), shard, func(line []byte) error { kept.Write(line); return nil })
	if err != nil {
		t.Fatal(err)
	}
	if kept.String() != former[:past.Length] {
		t.Fatalf("kept %q of %q", kept.String(), former)
	}
	behind, _ := ran(t, in, Options{Shard: shard, Past: past})
	return kept.String() + behind
}

// A run does not go on with the output of another batch.
func TestGoingOnWithAnotherBatch(t *testing.T) {
	whole, _ := ran(t, "a\nb\nc\n", Options{})
	past, err := ReadPast(strings.NewReader(whole), Shard{}, nil)
	if err != nil {
		t.Fatal(err)
	}
	for in, same := range map[string]bool{"a\nb\nc\nd\n": true, "a\nb\nx\n": false, "a\nb\n": false, "": false, "a\nb\n\nc\n": false} {
		var out bytes.Buffer
		_, err := Run(context.Background(), strings.NewReader(in), bufio.NewWriter(&out), Options{Answer: echoing, Past: past})
		if errors.Is(err, ErrOther) == same {
			t.Errorf("%q: %v", in, err)
		}
		if !same && out.Len() > 0 {
			t.Errorf("%q: written %s", in, out.String())
		}
	}
}

func TestForeignOutputs(t *testing.T) {
	rows := []struct {
		name, text string
		shard      Shard
	}{
		{"a text", "Dear Sir or Madam\n", Shard{}},
		{"a table", "line,answer\n1,2\n", Shard{}},
		{"a list", "[1]\n", Shard{}},
		{"a case", `{"structure":{"kind":"cylinder"}}` + "\n", Shard{}},
		{"no number", `{"line":"1","answer":{}}` + "\n", Shard{}},
		{"number 0", `{"line":0,"answer":{}}` + "\n", Shard{}},
		{"broken number", `{"line":1.5,"answer":{}}` + "\n", Shard{}},
		{"a number alone", `{"line":1}` + "\n", Shard{}},
		{"something else", `{"line":1,"result":{}}` + "\n", Shard{}},
		{"out of order", `{"line":2,"answer":{}}` + "\n" + `{"line":1,"answer":{}}` + "\n", Shard{}},
		{"twice", `{"line":2,"answer":{}}` + "\n" + `{"line":2,"answer":{}}` + "\n", Shard{}},
		{"of another shard", `{"line":2,"answer":{}}` + "\n", Shard{0, 2}},
		{"a blank line", "\n", Shard{}},
	}
	for _, row := range rows {
		if p, err := ReadPast(strings.NewReader(row.text), row.shard, nil); err == nil {
			t.Errorf("%s: %+v", row.name, p)
		}
	}
	if len(rows) != 13 {
		t.Errorf("%d rows", len(rows))
	}
	if _, err := ReadPast(strings.NewReader(""), Shard{2, 2}, nil); err == nil {
		t.Error("a shard that there is not")
	}
	if _, err := ReadPast(endless('x'), Shard{}, nil); err == nil {
		t.Error("a line without end")
	}
}

// Progress is told of each line that was written.
func TestProgress(t *testing.T) {
	var told []Tally
	ran(t, "a\n\n!b\nc\n", Options{Workers: 1, Progress: func(p Tally) { told = append(told, p) }})
	if got := fmt.Sprint(told); got != "[{1 1 0} {3 1 1} {4 2 1}]" {
		t.Error(got)
	}
}
