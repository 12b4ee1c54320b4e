package batch

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/iotest"
)

// linesOf reads everything.
func linesOf(r io.Reader, limit int) ([]Line, error) {
	var list []Line
	from := NewLines(r, limit)
	for {
		l, err := from.Next(nil)
		if errors.Is(err, io.EOF) {
			return list, nil
		}
		if err != nil {
			return list, err
		}
		list = append(list, l)
	}
}

func texts(list []Line) []string {
	var all []string
	for _, l := range list {
		text := string(l.Text)
		if l.Limit > 0 {
			text += fmt.Sprintf("…>%d", l.Limit)
		}
		all = append(all, text)
	}
	return all
}

func TestLines(t *testing.T) {
	rows := []struct {
		name, in string
		want     []string
	}{
		{"nothing", "", nil},
		{"one", "a\n", []string{"a"}},
		{"torn", "a\nb", []string{"a", "b"}},
		{"blank", "\n\n a\n\n", []string{"", "", " a", ""}},
		{"carriage returns", "a\r\nb\r\n\r\nc\r", []string{"a", "b", "", "c"}},
		{"carriage return within", "a\rb\n", []string{"a\rb"}},
		{"only the last of two", "a\r\r\n", []string{"a\r"}},
		{"mark", "\uFEFFa\nb\n", []string{"a", "b"}},
		{"mark alone", "\uFEFF", nil},
		{"mark and an end", "\uFEFF\na", []string{"", "a"}},
		{"half a mark", "\xEF\xBBa\n", []string{"\xEF\xBBa"}},
		{"mark in a later line", "a\n\uFEFFb\n", []string{"a", "\uFEFFb"}},
		{"as long as may be", "12345678\nx\n", []string{"12345678", "x"}},
		{"as long, with a carriage return", "12345678\r\nx\n", []string{"12345678", "x"}},
		{"longer by one", "123456789\nx\n", []string{"12345678…>8", "x"}},
		{"longer by a carriage return", "12345678\r\r\nx\n", []string{"12345678…>8", "x"}},
		{"much longer", strings.Repeat("123456789", 50000) + "\nx\n", []string{"12345678…>8", "x"}},
		{"long and torn", "x\n" + strings.Repeat("y", 200000), []string{"x", "yyyyyyyy…>8"}},
		{"bytes that are no text", "\xff\x00\n\x80", []string{"\xff\x00", "\x80"}},
	}
	for _, row := range rows {
		for way, r := range map[string]io.Reader{
			"whole":   strings.NewReader(row.in),
			"bytes":   iotest.OneByteReader(strings.NewReader(row.in)),
			"halves":  iotest.HalfReader(strings.NewReader(row.in)),
			"end too": iotest.DataErrReader(strings.NewReader(row.in)),
		} {
			list, err := linesOf(r, 8)
			if got := texts(list); err != nil || fmt.Sprintf("%q", got) != fmt.Sprintf("%q", row.want) {
				t.Errorf("%s by %s: %q, %v; want %q", row.name, way, got, err, row.want)
			}
			for i, l := range list {
				if l.Number != int64(i+1) {
					t.Errorf("%s: line %d has the number %d", row.name, i+1, l.Number)
				}
			}
		}
	}
	if len(rows) != 19 {
		t.Errorf("%d rows", len(rows))
	}
}

// Where reading fails, what came of a line is no line.
func TestLinesOfAFailingReader(t *testing.T) {
	broken := errors.New("broken")
	for _, row := range []struct {
		in   string
		want int
	}{{"a\nb", 1}, {"a\nb\n", 2}, {"", 0}, {"\uFEFF", 0}} {
		list, err := linesOf(io.MultiReader(strings.NewReader(row.in), iotest.ErrReader(broken)), 8)
		if !errors.Is(err, broken) || len(list) != row.want {
			t.Errorf("%q: %d lines, %v", row.in, len(list), err)
		}
	}
}

// A line that is passed over counts.
func TestPass(t *testing.T) {
	from := NewLines(strings.NewReader("\uFEFFa\n"+strings.Repeat("b", 100000)+"\nc\nd"), 8)
	for range 2 {
		if err := from.Pass(); err != nil {
			t.Fatal(err)
		}
	}
	l, err := from.Next(nil)
	if err != nil || string(l.Text) != "c" || l.Number != 3 || from.Pass() != nil || from.Number() != 4 || !errors.Is(from.Pass(), io.EOF) {
		t.Errorf("%+v, %v, %d", l, err, from.Number())
	}
}

// The room of a line too long stays small.
func TestLongLineTakesNoRoom(t *testing.T) {
	from := NewLines(io.LimitReader(endless('x'), 50<<20), 100)
	room := make([]byte, 0, 101)
	if got := testing.AllocsPerRun(1, func() {
		if l, err := from.Next(room); err != nil && !errors.Is(err, io.EOF) || cap(l.Text) > 101 {
			t.Errorf("%v, room for %d", err, cap(l.Text))
		}
	}); got > 0 {
		t.Errorf("%v allocations", got)
	}
}

// endless is a reader of one byte without end.
type endless byte

func (e endless) Read(p []byte) (int, error) {
	for i := range p {
		p[i] = byte(e)
	}
	return len(p), nil
}

func TestShards(t *testing.T) {
	for of := int64(0); of <= 7; of++ {
		for line := int64(1); line <= 50; line++ {
			owners := 0
			for index := range max(of, 1) {
				s := Shard{index, of}
				if err := s.Check(); err != nil {
					t.Fatal(err)
				}
				if s.Has(line) {
					owners++
				}
			}
			if owners != 1 {
				t.Errorf("line %d has %d owners among %d", line, owners, of)
			}
		}
	}
	for _, s := range []Shard{{-1, 3}, {3, 3}, {1, 1}, {1, 0}, {0, -1}} {
		if s.Check() == nil {
			t.Errorf("%+v passes", s)
		}
	}
}

// FuzzLines holds the lines of any stream against those of its bytes as a whole.
func FuzzLines(f *testing.F) {
	for _, text := range []string{"", "a", "a\r\nb\n", "\uFEFF\n\n", "12345678\r\n123456789\n", "\xEF\xBB", "\r\r\n\r"} {
		f.Add([]byte(text), uint8(8))
	}
	f.Fuzz(func(t *testing.T, data []byte, size uint8) {
		limit := int(size)%20 + 1
		var want []string
		rest := bytes.TrimPrefix(data, utf8Mark)
		for len(rest) > 0 {
			text, behind, _ := bytes.Cut(rest, []byte{'\n'})
			rest = behind
			text = bytes.TrimSuffix(text, []byte{'\r'})
			if len(text) > limit {
				want = append(want, fmt.Sprintf("%s…>%d", text[:limit], limit))
				continue
			}
			want = append(want, string(text))
		}
		for _, r := range []io.Reader{bytes.NewReader(data), iotest.OneByteReader(bytes.NewReader(data)), iotest.DataErrReader(bytes.NewReader(data))} {
			list, err := linesOf(r, limit)
			if got := texts(list); err != nil || fmt.Sprintf("%q", got) != fmt.Sprintf("%q", want) {
				t.Fatalf("%q, %v; want %q", got, err, want)
			}
		}
	})
}
