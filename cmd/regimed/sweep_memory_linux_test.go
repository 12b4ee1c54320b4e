package main

import (
	"bufio"
	"fmt"
	"io"
	"os/exec"
	"path/filepath"
	"testing"
)

// The memory of the program does not grow with the number of points: at 300 000
// its peak is that at 100 000.
func TestSweepMemory(t *testing.T) {
	program := builtProgram(t)
	short, long := peakOfSweep(t, program, 100_000), peakOfSweep(t, program, 300_000)
	t.Logf("peak at 100 000 points %d KiB, at 300 000 points %d KiB", short, long)
	if long > short*5/4 || long > 128<<10 {
		t.Errorf("%d KiB at 100 000 points, %d KiB at 300 000", short, long)
	}
}

// BenchmarkSweepMemory shows the peak at a million points beside that at a tenth
// of it.
func BenchmarkSweepMemory(b *testing.B) {
	program := builtProgram(b)
	for b.Loop() {
		b.ReportMetric(float64(peakOfSweep(b, program, 100_000)), "KiB/100k")
		b.ReportMetric(float64(peakOfSweep(b, program, 1_000_000)), "KiB/1M")
	}
}

func builtProgram(t testing.TB) string {
	t.Helper()
	program := filepath.Join(t.TempDir(), "regimed")
	if out, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		t.Fatalf("%v: %s", err, out)
	}
	return program
}

// peakOfSweep runs a sweep with six columns and returns the largest resident
// memory of the process in KiB. It asks some thousand rows before the end, which
// are more than a pipe holds: the process is then still there.
func peakOfSweep(t testing.TB, program string, points int64) int64 {
	t.Helper()
	args := []string{"sweep", "-", "--axis", fmt.Sprintf("motion.amplitude=0.1..50 mm:%d:log", points/10), "--axis", "structure.diameter=0.3..0.6 m:10"}
	for _, column := range []string{"class", "keulegan_carpenter", "one-way", "small-stroke.utilisation", "scale.frequency_wet", "fluid-absent.utilisation"} {
		args = append(args, "--column", column)
	}
	child := exec.Command(program, args...)
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
	if _, err := io.WriteString(in, pileJSON); err != nil {
		t.Fatal(err)
	}
	in.Close()
	lines := bufio.NewReader(out)
	for n := range points - 5000 {
		if _, err := lines.ReadSlice('\n'); err != nil {
			t.Fatalf("line %d: %v", n+1, err)
		}
	}
	peak := highWater(t, child.Process.Pid)
	rest, err := io.ReadAll(lines)
	if err != nil {
		t.Fatal(err)
	}
	want := fmt.Sprintf(`{"end":{"state":"complete","points":%d,"problems":0}}`+"\n", points)
	if n := len(rest) - len(want); n < 64<<10 || string(rest[n:]) != want {
		t.Fatalf("%d bytes before the end, which is %s", n, rest[max(n, 0):])
	}
	if err := child.Wait(); err != nil {
		t.Fatal(err)
	}
	return peak
}
