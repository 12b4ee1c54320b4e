package table

import (
	"bufio"
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"regimed/regime/whatif"
)

// There is what a file that was begun holds already.
type There struct {
	Tally
	Size int64 // bytes up to the end of the last whole row; 0: not even a beginning
}

// OtherError says that a file is not one of the sheet, and where it differs.
type OtherError struct {
	Line int64 // from 1
	Why  string
}

func (e *OtherError) Error() string { return fmt.Sprintf("line %d %s", e.Line, e.Why) }

// Resume reads a file that a sheet was written to and that broke off, or was
// stopped, anywhere. A line that is cut and the mark at the end do not count.
//
// The first line, and the values of the axes in every row, must be what the sheet
// would write. So must whole rows, which are judged anew: all where they are few,
// otherwise some hundreds, equally spaced, and the last. Where something differs
// the error is an [OtherError].
// Only forms in which each row is a line can be resumed.
func (s *Sheet) Resume(ctx context.Context, format string, file io.Reader) (There, error) {
	r := &resumer{sheet: s, from: bufio.NewReaderSize(file, 1<<16)}
	switch format {
	case NDJSON:
		r.form = newObjects(s)
	case CSV:
		r.form = newRecords(s)
	default:
		return There{}, fmt.Errorf("rows as %s can't be gone on with; only %s can", format, strings.Join(Streams, " and "))
	}
	if err := r.read(ctx); err != nil {
		return There{}, err
	}
	return r.there, nil
}

// resumer reads what is there.
type resumer struct {
	sheet *Sheet
	form  lineForm
	from  *bufio.Reader
	there There
	room  []byte
	point whatif.Row

	kept   []line // to be judged anew: one row in every stride
	stride int64
	last   line // the last whole row
}

// line is the n-th row, from 0.
type line struct {
	n    int64
	text []byte
}

// mostKept is the most rows that are judged anew.
const mostKept = 512

func (r *resumer) read(ctx context.Context) error {
	if begun, err := r.beginning(); !begun || err != nil {
		return err
	}
	for {
		line, err := r.line()
		if err != nil {
			return err
		}
		if line == nil || r.form.isEnd(line) {
			return r.judge(ctx)
		}
		if err := r.row(line); err != nil {
			return err
		}
	}
}

// line returns the next whole line; nil where there is none.
func (r *resumer) line() ([]byte, error) {
	line, err := r.from.ReadBytes('\n')
	if errors.Is(err, io.EOF) {
		return nil, nil
	}
	return line, err
}

// beginning reads the first line. A file that ends within it was not begun.
func (r *resumer) beginning() (bool, error) {
	want := r.form.begin()
	got, err := r.from.ReadBytes('\n')
	if err != nil && !errors.Is(err, io.EOF) {
		return false, err
	}
	if err == nil && bytes.Equal(got, want) {
		r.there.Size = int64(len(got))
		return true, nil
	}
	if err != nil && bytes.HasPrefix(want, got) {
		return false, nil
	}
	return false, &OtherError{1, "is not the beginning of this sweep: the case, the axes, the columns or the engine differ"}
}

// row checks one row, and counts it.
func (r *resumer) row(text []byte) error {
	n := r.there.Points
	if n >= r.sheet.Rows() {
		return &OtherError{n + 2, "is one row more than this sweep has"}
	}
	r.sheet.Point(r.sheet.From+n, &r.point)
	r.room = r.form.start(r.room[:0], &r.point)
	if !bytes.HasPrefix(text, r.room) {
		return &OtherError{n + 2, "has other values of the axes than this sweep"}
	}
	r.there.Points++
	r.there.Size += int64(len(text))
	if r.form.hasProblem(text) {
		r.there.Problems++
	}
	r.keep(line{n, text})
	return nil
}

// keep keeps one row in every stride, and doubles the stride when that becomes
// too many.
func (r *resumer) keep(l line) {
	r.last = l
	if r.stride == 0 {
		r.stride = 1
	}
	if l.n%r.stride != 0 {
		return
	}
	if len(r.kept) == mostKept {
		r.stride *= 2
		r.kept = slices.DeleteFunc(r.kept, func(k line) bool { return k.n%r.stride != 0 })
	}
	if l.n%r.stride == 0 {
		r.kept = append(r.kept, l)
	}
}

// judge compares the rows that were kept with those of the sheet.
func (r *resumer) judge(ctx context.Context) error {
	if r.last.text == nil {
		return nil
	}
	for _, l := range append(r.kept, r.last) {
		at := r.sheet.From + l.n
		err := r.sheet.Run(ctx, at, at+1, func(rows []whatif.Row) error {
			if bytes.Equal(r.form.row(nil, &rows[0]), l.text) {
				return nil
			}
			return &OtherError{l.n + 2, "is another answer than this engine gives to this sweep"}
		})
		if err != nil {
			return err
		}
	}
	return nil
}
