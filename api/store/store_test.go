package store

import (
	"bytes"
	"context"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"reflect"
	"slices"
	"strconv"
	"strings"
	"sync"
	"sync/atomic"
	"testing"
	"time"

	"pgregory.net/rapid"
)

var noon = time.Date(2026, 7, 30, 12, 0, 0, 0, time.UTC)

// open opens a store in a directory, closed when the test ends.
func open(t testing.TB, dir string) *SQL {
	t.Helper()
	s, err := OpenSQLite(context.Background(), dir)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		if err := s.Close(); err != nil {
			t.Error(err)
		}
	})
	return s
}

// numbered is a record whose id and texts follow from a number, made so many
// microseconds after noon.
func numbered(n int) *Record {
	canonical := fmt.Appendf(nil, `{"n":%d}`, n)
	sum := sha256.Sum256(canonical)
	return &Record{
		Head: Head{ID: hex.EncodeToString(sum[:]), Created: noon.Add(time.Duration(n) * time.Microsecond),
			Title: "Sluice " + strconv.Itoa(n), Author: "R. Ell", Tags: []string{"mill", "n" + strconv.Itoa(n%3)},
			Kind: []string{"plate", "cylinder"}[n%2], Class: []string{"added-mass", "two-way-implicit", "dry-structure"}[n%3],
			Engine: Engine{"0.1.0", strings.Repeat("ab", 32)}, Options: []byte(`{"samples":` + strconv.Itoa(n) + `}`)},
		Case: fmt.Appendf(nil, "{ \"n\" : %d }", n), Canonical: canonical, Answer: bytes.Repeat(fmt.Appendf(nil, `{"answer":%d}`, n), 20),
	}
}

func put(t testing.TB, s Store, r *Record) *Record {
	t.Helper()
	kept, _, err := s.Put(context.Background(), r)
	if err != nil {
		t.Fatal(err)
	}
	return kept
}

func get(t testing.TB, s Store, id string) *Record {
	t.Helper()
	r, err := s.Get(context.Background(), id)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func reasonIn(err error) string {
	var e *Error
	if errors.As(err, &e) {
		return e.Reason.String()
	}
	return fmt.Sprint(err)
}

// What was put comes back, all of it, also after the store was closed.
func TestRecordsComeBack(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "a b", "50%?#&")
	s := open(t, dir)
	odd := numbered(4)
	odd.Title, odd.Author, odd.Tags = "Ä % _ \\ ' \" <b> $1", "", nil
	odd.Options = nil
	odd.Created = time.Date(2026, 7, 30, 14, 0, 0, 123456789, time.FixedZone("", 7200))
	list := []*Record{numbered(1), numbered(2), odd}
	for _, r := range list {
		put(t, s, r)
	}
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	s = open(t, dir)
	for _, r := range list {
		got, want := get(t, s, r.ID), r.normal()
		if len(want.Tags) == 0 {
			want.Tags = got.Tags // no tags: an empty list
		}
		if !reflect.DeepEqual(got, want) || len(got.Tags) != len(r.Tags) {
			t.Errorf("got  %+v\nwant %+v", got, want)
		}
	}
	if got := get(t, s, odd.ID); string(got.Options) != "{}" || got.Created.Nanosecond() != 123456000 || got.Created.Location() != time.UTC {
		t.Errorf("options %s, made %v", got.Options, got.Created)
	}
}

// The first record of a case stays, whatever is put later.
func TestFirstRecordStays(t *testing.T) {
	s := open(t, t.TempDir())
	first := put(t, s, numbered(1))
	other := numbered(1)
	other.Title, other.Answer, other.Tags, other.Created = "Another", []byte(`{}`), []string{"other"}, noon.Add(time.Hour)
	kept, isNew, err := s.Put(context.Background(), other)
	if err != nil || isNew || !reflect.DeepEqual(kept, first) {
		t.Errorf("new %v, %v: %+v", isNew, err, kept)
	}
	page, err := s.List(context.Background(), Query{Tag: "other", Limit: 10})
	if err != nil || len(page.Records) != 0 {
		t.Errorf("%v: %+v", err, page)
	}
}

// Of those who put the same record at once, one is told that it is new.
func TestOneOfManyIsFirst(t *testing.T) {
	s := open(t, t.TempDir())
	const rounds, writers = 20, 16
	for round := range rounds {
		var isFirst atomic.Int32
		var all sync.WaitGroup
		for w := range writers {
			all.Go(func() {
				r := numbered(round)
				r.Title = "by " + strconv.Itoa(w)
				kept, isNew, err := s.Put(context.Background(), r)
				if err != nil {
					t.Error(err)
					return
				}
				if isNew {
					isFirst.Add(1)
				}
				if isNew != (kept.Title == r.Title) {
					t.Errorf("new %v, and %q is kept of %q", isNew, kept.Title, r.Title)
				}
			})
		}
		all.Wait()
		if n := isFirst.Load(); n != 1 {
			t.Fatalf("%d were first", n)
		}
	}
}

// Two stores on one file, as two processes have them, do not lose each other's
// records.
func TestTwoStoresOnOneFile(t *testing.T) {
	dir := t.TempDir()
	both := []*SQL{open(t, dir), open(t, dir)}
	const each = 100
	var all sync.WaitGroup
	for which, s := range both {
		for w := range 4 {
			all.Go(func() {
				for i := range each / 4 {
					put(t, s, numbered(which*each+w*each/4+i))
				}
			})
		}
	}
	all.Wait()
	for n := range 2 * each {
		get(t, both[(n/each+1)%2], numbered(n).ID)
	}
}

func TestDelete(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	r := numbered(1)
	put(t, s, r)
	put(t, s, numbered(2))
	if err := s.Delete(ctx, r.ID); err != nil {
		t.Fatal(err)
	}
	if _, err := s.Get(ctx, r.ID); err != ErrNotFound {
		t.Errorf("after: %v", err)
	}
	if err := s.Delete(ctx, r.ID); err != ErrNotFound {
		t.Errorf("again: %v", err)
	}
	if page, err := s.List(ctx, Query{Tag: "n1", Limit: 10}); err != nil || len(page.Records) != 0 {
		t.Errorf("%v: its tag is left: %+v", err, page)
	}
	if _, isNew, err := s.Put(ctx, r); err != nil || !isNew {
		t.Errorf("put anew: %v, %v", isNew, err)
	}
	get(t, s, numbered(2).ID)
}

func TestMatch(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	ids := []string{"a0", "a0f", "a0ff", "a1", "9f", "b0"}
	for i, head := range ids {
		r := numbered(i)
		ids[i] = head + strings.Repeat("0", IDDigits-len(head))
		r.ID = ids[i]
		put(t, s, r)
	}
	rows := []struct {
		prefix string
		most   int
		want   []string
	}{
		{"a", 10, []string{ids[0], ids[1], ids[2], ids[3]}},
		{"a0", 10, []string{ids[0], ids[1], ids[2]}},
		{"a0", 2, []string{ids[0], ids[1]}},
		{"a0f", 10, []string{ids[1], ids[2]}},
		{"a0ff", 10, []string{ids[2]}},
		{"b", 10, []string{ids[5]}},
		{"c", 10, nil},
		{ids[3], 10, []string{ids[3]}},
	}
	for _, row := range rows {
		got, err := s.Match(ctx, row.prefix, row.most)
		if err != nil || !slices.Equal(got, row.want) {
			t.Errorf("%s: %v, %v", row.prefix, got, err)
		}
	}
	if len(rows) != 8 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestListFilters(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	for n := range 12 {
		r := numbered(n)
		switch n {
		case 3:
			r.Title = "ÜBER 100% of_it"
		case 4:
			r.Author = `Back\slash`
		}
		put(t, s, r)
	}
	at := func(n int) time.Time { return numbered(n).Created }
	rows := []struct {
		name string
		q    Query
		want []int // newest first
	}{
		{"all", Query{}, []int{11, 10, 9, 8, 7, 6, 5, 4, 3, 2, 1, 0}},
		{"kind", Query{Kind: "cylinder"}, []int{11, 9, 7, 5, 3, 1}},
		{"class", Query{Class: "dry-structure"}, []int{11, 8, 5, 2}},
		{"tag", Query{Tag: "n0"}, []int{9, 6, 3, 0}},
		{"tag in other letters", Query{Tag: "N0"}, nil},
		{"part of a tag", Query{Tag: "n"}, nil},
		{"text in a title", Query{Text: "sluice 1"}, []int{11, 10, 1}},
		{"text in other letters", Query{Text: "über"}, []int{3}},
		{"per cent", Query{Text: "0%"}, []int{3}},
		{"underscore", Query{Text: "of_it"}, []int{3}},
		{"underscore is no joker", Query{Text: "1_0"}, nil},
		{"backslash", Query{Text: `k\s`}, []int{4}},
		{"text in an author", Query{Text: "R. ELL"}, []int{11, 10, 9, 8, 7, 6, 5, 3, 2, 1, 0}},
		{"from", Query{From: at(9)}, []int{11, 10, 9}},
		{"to", Query{To: at(2)}, []int{1, 0}},
		{"from and to", Query{From: at(4), To: at(7)}, []int{6, 5, 4}},
		{"all at once", Query{Kind: "plate", Class: "added-mass", Tag: "n0", Text: "sluice", From: at(1), To: at(9)}, []int{6}},
		{"quotes", Query{Tag: "' OR 1=1 --", Text: "'"}, nil},
	}
	for _, row := range rows {
		t.Run(row.name, func(t *testing.T) {
			row.q.Limit = 100
			page, err := s.List(ctx, row.q)
			if err != nil || page.Next != nil {
				t.Fatalf("%v, next %v", err, page.Next)
			}
			var want, got []string
			for _, n := range row.want {
				want = append(want, numbered(n).ID)
			}
			for _, h := range page.Records {
				got = append(got, h.ID)
			}
			if !slices.Equal(got, want) {
				t.Errorf("got %d of %d: %v", len(got), len(want), page.Records)
			}
		})
	}
	if len(rows) != 18 {
		t.Errorf("%d rows", len(rows))
	}
}

// A list that is read page by page has every record once that was there when it
// was begun and still is at its end, and none twice, whatever is put and
// deleted between two pages, and whatever the clock did.
func TestPagesAreStable(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	next, lists := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		next += 1000 // other records than those of the runs before
		tag := "run" + strconv.Itoa(next)
		made := map[string]bool{} // id → still there
		add := func() {
			r := numbered(next)
			next++
			r.Tags = []string{tag}
			r.Created = noon.Add(time.Duration(rapid.IntRange(0, 8).Draw(rt, "when")) * time.Second) // many at the same time
			put(t, s, r)
			made[r.ID] = true
		}
		for range rapid.IntRange(0, 30).Draw(rt, "before") {
			add()
		}
		atStart := make(map[string]bool, len(made))
		for id := range made {
			atStart[id] = true
		}
		q := Query{Tag: tag, Limit: rapid.IntRange(1, 7).Draw(rt, "limit")}
		seen := map[string]int{}
		var last *Head
		for {
			page, err := s.List(ctx, q)
			if err != nil {
				rt.Fatal(err)
			}
			if len(page.Records) > q.Limit || page.Next != nil && len(page.Records) < q.Limit {
				rt.Fatalf("%d records on a page of %d, next %v", len(page.Records), q.Limit, page.Next)
			}
			for i := range page.Records {
				h := &page.Records[i]
				seen[h.ID]++
				if last != nil && !(h.Created.Before(last.Created) || h.Created.Equal(last.Created) && h.ID < last.ID) {
					rt.Fatalf("%v after %v", h, last)
				}
				last = h
			}
			if page.Next == nil {
				break
			}
			if q.After, err = ParseCursor(page.Next.String()); err != nil {
				rt.Fatal(err)
			}
			for range rapid.IntRange(0, 3).Draw(rt, "between") {
				add()
			}
			if rapid.Bool().Draw(rt, "delete") {
				id := page.Records[rapid.IntRange(0, len(page.Records)-1).Draw(rt, "which")].ID
				if err := s.Delete(ctx, id); err != nil {
					rt.Fatal(err)
				}
				made[id] = false
			}
		}
		lists++
		for id, n := range seen {
			if _, mine := made[id]; n != 1 || !mine {
				rt.Errorf("%s was listed %d times", id, n)
			}
		}
		for id := range atStart {
			if made[id] && seen[id] != 1 {
				rt.Errorf("%s was listed %d times", id, seen[id])
			}
		}
	})
	if lists < 50 {
		t.Errorf("%d lists", lists)
	}
}

// The same, while writers put records all the time.
func TestPagesWhileWriting(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	const before = 300
	for n := range before {
		put(t, s, numbered(n))
	}
	stop := make(chan struct{})
	var writers sync.WaitGroup
	var written atomic.Int32
	for w := range 2 {
		writers.Go(func() {
			for i := 0; ; i++ {
				select {
				case <-stop:
					return
				default:
				}
				r := numbered(1000 + 100000*w + i)
				r.Created = noon.Add(time.Duration(i%before) * time.Microsecond) // in the midst of the others
				put(t, s, r)
				written.Add(1)
			}
		})
	}
	for round := range 10 {
		seen := map[string]int{}
		q := Query{Limit: 17}
		for {
			page, err := s.List(ctx, q)
			if err != nil {
				t.Fatal(err)
			}
			for _, h := range page.Records {
				seen[h.ID]++
			}
			if page.Next == nil {
				break
			}
			q.After = page.Next
		}
		for id, n := range seen {
			if n != 1 {
				t.Errorf("round %d: %s was listed %d times", round, id, n)
			}
		}
		for n := range before {
			if id := numbered(n).ID; seen[id] != 1 {
				t.Errorf("round %d: record %d was listed %d times", round, n, seen[id])
			}
		}
	}
	close(stop)
	writers.Wait()
	if written.Load() == 0 {
		t.Error("nothing was written meanwhile")
	}
}

func TestClosedStore(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	put(t, s, numbered(1))
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	if err := s.Close(); err != nil {
		t.Errorf("again: %v", err)
	}
	for op, err := range allOf(ctx, s) {
		if reasonIn(err) != "unavailable" {
			t.Errorf("%s: %v", op, err)
		}
	}
}

// allOf asks for everything, and returns the errors by name.
func allOf(ctx context.Context, s Store) map[string]error {
	_, _, errPut := s.Put(ctx, numbered(77))
	_, errGet := s.Get(ctx, numbered(1).ID)
	_, errMatch := s.Match(ctx, "a", 1)
	_, errList := s.List(ctx, Query{Limit: 1})
	return map[string]error{"put": errPut, "get": errGet, "match": errMatch, "list": errList, "delete": s.Delete(ctx, numbered(1).ID)}
}

// Close waits for writes that have begun, and those that come too late know it:
// none is acknowledged and lost.
func TestCloseWhileWriting(t *testing.T) {
	dir := t.TempDir()
	s := open(t, dir)
	var all sync.WaitGroup
	var mutex sync.Mutex
	var acknowledged []string
	begun := make(chan struct{}, 400)
	for w := range 8 {
		all.Go(func() {
			for i := range 50 {
				r := numbered(w*50 + i)
				_, _, err := s.Put(context.Background(), r)
				begun <- struct{}{}
				if err != nil {
					continue
				}
				mutex.Lock()
				acknowledged = append(acknowledged, r.ID)
				mutex.Unlock()
			}
		})
	}
	for range 20 {
		<-begun
	}
	if err := s.Close(); err != nil {
		t.Error(err)
	}
	all.Wait()
	s = open(t, dir)
	for _, id := range acknowledged {
		get(t, s, id)
	}
	if len(acknowledged) == 0 {
		t.Error("nothing was acknowledged")
	}
}

func TestCallerWhoLeft(t *testing.T) {
	s := open(t, t.TempDir())
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	for op, err := range allOf(ctx, s) {
		if reasonIn(err) != "unavailable" || !errors.Is(err, context.Canceled) {
			t.Errorf("%s: %v", op, err)
		}
	}
	put(t, s, numbered(3))
}

// A store that may not write reads on, and says what it is.
func TestReadOnlyStore(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	put(t, s, numbered(1))
	exec(t, s, "PRAGMA query_only = 1")
	for op, err := range allOf(ctx, s) {
		if want := map[bool]string{true: "read-only", false: "<nil>"}[op == "put" || op == "delete"]; reasonIn(err) != want {
			t.Errorf("%s: %v", op, err)
		}
	}
	exec(t, s, "PRAGMA query_only = 0")
	put(t, s, numbered(2))
}

func exec(t *testing.T, s *SQL, statement string) {
	t.Helper()
	if _, err := s.writes.Exec(statement); err != nil {
		t.Fatal(err)
	}
}

// On a full disk nothing is stored and nothing is lost.
func TestFullDisk(t *testing.T) {
	s, ctx := open(t, t.TempDir()), context.Background()
	put(t, s, numbered(1))
	exec(t, s, "PRAGMA max_page_count = 1") // at least as many as there are
	large := numbered(2)
	large.Answer = bytes.Repeat([]byte("x"), 1<<20)
	if _, _, err := s.Put(ctx, large); reasonIn(err) != "full" {
		t.Errorf("put: %v", err)
	}
	if _, err := s.Get(ctx, large.ID); err != ErrNotFound {
		t.Errorf("get: %v", err)
	}
	get(t, s, numbered(1).ID)
	exec(t, s, "PRAGMA max_page_count = 1000000")
	put(t, s, large)
	if got := get(t, s, large.ID); !bytes.Equal(got.Answer, large.Answer) {
		t.Error("another answer")
	}
}

// A file that is no store is left as it is.
func TestFileThatIsNoStore(t *testing.T) {
	rows := map[string][]byte{
		"a text":               bytes.Repeat([]byte("no records here\n"), 600),
		"half a header":        []byte("SQLite format 3\x00and then something else entirely, for a page and more" + strings.Repeat(".", 5000)),
		"zeros behind the end": append([]byte("SQLite format 3\x00"), make([]byte, 8192)...),
	}
	for name, content := range rows {
		file := filepath.Join(t.TempDir(), FileName)
		if err := os.WriteFile(file, content, 0o640); err != nil {
			t.Fatal(err)
		}
		_, err := OpenSQLite(context.Background(), filepath.Dir(file))
		if reasonIn(err) != "damaged" || !strings.Contains(fmt.Sprint(err), file) {
			t.Errorf("%s: %v", name, err)
		}
		if left, err := os.ReadFile(file); err != nil || !bytes.Equal(left, content) {
			t.Errorf("%s: %v: the file was changed", name, err)
		}
	}
	if len(rows) != 3 {
		t.Errorf("%d rows", len(rows))
	}
}

// A byte that the disk changed is noticed, and the other records are not lost.
func TestChangedByte(t *testing.T) {
	dir := t.TempDir()
	s := open(t, dir)
	for n := range 20 {
		put(t, s, numbered(n))
	}
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	file := filepath.Join(dir, FileName)
	content, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	at := bytes.Index(content, numbered(7).Answer)
	if at < 0 {
		t.Fatal("the answer is not in the file")
	}
	content[at+12] ^= 1
	if err := os.WriteFile(file, content, 0o640); err != nil {
		t.Fatal(err)
	}
	s = open(t, dir)
	for n := range 20 {
		_, err := s.Get(context.Background(), numbered(n).ID)
		if (err != nil) != (n == 7) {
			t.Errorf("record %d: %v", n, err)
		}
		if n == 7 && reasonIn(err) != "damaged" {
			t.Errorf("%v", err)
		}
	}
}

// Whatever pages are destroyed, a store answers with an error or with what was
// put, and never with anything else.
func TestDestroyedPages(t *testing.T) {
	dir := t.TempDir()
	s := open(t, dir)
	for n := range 60 {
		put(t, s, numbered(n))
	}
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	good, err := os.ReadFile(filepath.Join(dir, FileName))
	if err != nil {
		t.Fatal(err)
	}
	const page = 4096
	damaged, ran := 0, 0
	for p := range len(good) / page {
		dir := t.TempDir()
		content := slices.Clone(good)
		copy(content[p*page:(p+1)*page], bytes.Repeat([]byte{0xa5}, page))
		if err := os.WriteFile(filepath.Join(dir, FileName), content, 0o640); err != nil {
			t.Fatal(err)
		}
		ran++
		s, err := OpenSQLite(context.Background(), dir)
		if err != nil {
			damaged++
			if reasonIn(err) != "damaged" {
				t.Errorf("page %d: %v", p, err)
			}
			continue
		}
		found := 0
		for n := range 60 {
			got, err := s.Get(context.Background(), numbered(n).ID)
			switch {
			case err == nil && !reflect.DeepEqual(got, numbered(n)):
				t.Errorf("page %d: record %d is another", p, n)
			case err == nil:
				found++
			case err != ErrNotFound && reasonIn(err) != "damaged":
				t.Errorf("page %d: record %d: %v", p, n, err)
			}
		}
		if found < 60 {
			damaged++
		}
		if err := s.Close(); err != nil {
			t.Errorf("page %d: %v", p, err)
		}
	}
	if ran < 10 || damaged < 5 {
		t.Errorf("%d pages, %d of which mattered", ran, damaged)
	}
}

// What stands in the way of a directory is said as the system says it.
func TestNoDirectory(t *testing.T) {
	file := filepath.Join(t.TempDir(), "file")
	if err := os.WriteFile(file, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	occupied := filepath.Join(t.TempDir(), FileName)
	if err := os.Mkdir(occupied, 0o700); err != nil {
		t.Fatal(err)
	}
	for _, dir := range []string{file, filepath.Join(file, "below"), filepath.Dir(occupied)} {
		_, err := OpenSQLite(context.Background(), dir)
		if reasonIn(err) != "unavailable" || !strings.Contains(fmt.Sprint(err), "directory") {
			t.Errorf("%s: %v", dir, err)
		}
	}
}

func TestCursors(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		sum := sha256.Sum256(rapid.SliceOf(rapid.Byte()).Draw(rt, "of"))
		h := &Head{ID: hex.EncodeToString(sum[:]), Created: time.UnixMicro(rapid.Int64Range(0, math.MaxInt64).Draw(rt, "created"))}
		c := CursorAfter(h)
		back, err := ParseCursor(c.String())
		if err != nil || *back != *c || back.created != h.Created.UnixMicro() {
			rt.Errorf("%v came back as %v: %v", c, back, err)
		}
	})
	good := CursorAfter(&numbered(1).Head).String()
	bad := []string{"", "x", good[1:], good + "A", good[:len(good)-1], " " + good, good + "\n", good[:9] + "\n" + good[9:], good + "=", "Ag" + good[2:],
		"AY" + good[2:], strings.Repeat("A", 1<<16)}
	for _, s := range bad {
		if c, err := ParseCursor(s); err == nil {
			t.Errorf("%.80q was read as %v", s, c)
		}
	}
	if len(bad) != 12 {
		t.Errorf("%d rows", len(bad))
	}
}

// Whatever comes as a cursor is refused or is the one way to write it.
func FuzzCursor(f *testing.F) {
	f.Add("")
	f.Add(CursorAfter(&numbered(1).Head).String())
	f.Add(CursorAfter(&Head{ID: strings.Repeat("f", IDDigits), Created: time.UnixMicro(math.MaxInt64)}).String())
	f.Fuzz(func(t *testing.T, s string) {
		c, err := ParseCursor(s)
		if err != nil {
			return
		}
		if c.String() != s || len(c.id) != IDDigits || c.created < 0 {
			t.Errorf("%q was read as %v", s, c)
		}
	})
}
