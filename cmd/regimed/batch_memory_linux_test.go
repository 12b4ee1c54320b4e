package main

import (
	"bufio"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"testing"

	"regimed/api/batch/batchtest"
)

// The memory of the program does not grow with the length of the batch: at
// 100 000 lines its peak is that at 20 000.
func TestBatchMemory(t *testing.T) {
	program := filepath.Join(t.TempDir(), "regimed")
	if out, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	short, long := peakOf(t, program, 20_000), peakOf(t, program, 100_000)
	t.Logf("peak at 20 000 lines %d KiB, at 100 000 lines %d KiB", short, long)
	if long > short*5/4 || long > 128<<10 {
		t.Errorf("%d KiB at 20 000 lines, %d KiB at 100 000", short, long)
	}
}

// peakOf runs a batch and returns the largest resident memory of the process
// in KiB. It asks when every line is answered and the input still open: of a
// process that has ended nothing can be learnt but mixed with its parent's.
func peakOf(t *testing.T, program string, lines int64) int64 {
	t.Helper()
	child := exec.Command(program, "batch", "--fields", "title,kind", "--line-limit", strconv.Itoa(batchtest.Limit))
	child.Stderr = io.Discard
	in, err := child.StdinPipe()
	if err != nil {
		t.Fatal(err)
	}
	out, err := child.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := child.Start(); err != nil {
		t.Fatal(err)
	}
	cases, sent := source(t).Reader(lines), make(chan error, 1)
	go func() {
		_, err := io.Copy(in, cases)
		sent <- err
	}()
	answers := bufio.NewReader(out)
	for n := range lines {
		if _, err := answers.ReadSlice('\n'); err != nil {
			t.Fatalf("answer %d: %v", n+1, err)
		}
	}
	peak := highWater(t, child.Process.Pid)
	if err := <-sent; err != nil {
		t.Error(err)
	}
	in.Close()
	mark, err := io.ReadAll(answers)
	if want := fmt.Sprintf(`{"end":{"state":"complete","lines":%d,"answers":%d,"problems":%d}}`+"\n", lines, lines-lines/100, lines/100); err != nil || string(mark) != want {
		t.Errorf("%v: %s", err, mark)
	}
	if err := child.Wait(); err == nil || child.ProcessState.ExitCode() != statusUnmet {
		t.Error(err)
	}
	return peak
}

var highWaterMark = regexp.MustCompile(`VmHWM:\s+(\d+) kB`)

func highWater(t testing.TB, pid int) int64 {
	t.Helper()
	text, err := os.ReadFile(fmt.Sprintf("/proc/%d/status", pid))
	if err != nil {
		t.Fatal(err)
	}
	found := highWaterMark.FindSubmatch(text)
	if found == nil {
		t.Fatalf("no peak in %s", text)
	}
	n, err := strconv.ParseInt(string(found[1]), 10, 64)
	if err != nil {
		t.Fatal(err)
	}
	return n
}
