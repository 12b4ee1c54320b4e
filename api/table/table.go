// Package table writes the rows of a sweep as they come: as NDJSON, as CSV or as
// Parquet. Each file says what it is about, and ends with a mark that says
// whether it is whole.
//
// Numbers are SI, with their unit in the head, in the shortest form that reads
// back as the same number. What has no value, or none that is finite, is null:
// null in NDJSON and Parquet, an empty field in CSV. A point that can't be
// computed has null in every column but problem, which says why.
package table

import (
	"context"
	"fmt"
	"io"

	"regimed/regime/whatif"
)

// The formats.
const (
	NDJSON  = "ndjson"
	CSV     = "csv"
	Parquet = "parquet"
)

// Formats lists all formats; Streams those that can be read while they are
// written.
var (
	Formats = []string{NDJSON, CSV, Parquet}
	Streams = []string{NDJSON, CSV}
)

// State says how a file ended.
type State string

// The states.
const (
	Complete    State = "complete"
	Interrupted State = "interrupted"
)

// Tally counts rows, and those among them that have a problem.
type Tally struct {
	Points   int64 `json:"points"`
	Problems int64 `json:"problems"`
}

// End is the mark at the end of a file.
type End struct {
	State State `json:"state"`
	Tally
}

// Sheet is the rows from, inclusive, to, exclusive, of a sweep as one file.
type Sheet struct {
	*whatif.Plan
	From, To int64
}

// Rows is the number of rows.
func (s *Sheet) Rows() int64 { return s.To - s.From }

// Writer writes one sheet: its beginning, some rows at a time, and its end.
type Writer interface {
	Begin() error
	Rows(rows []whatif.Row) error
	End(e End) error
}

// New returns the writer of a format.
func New(format string, w io.Writer, s *Sheet) (Writer, error) {
	switch format {
	case NDJSON:
		return &objectWriter{lineWriter{to: w, form: newObjects(s)}}, nil
	case CSV:
		return &lineWriter{to: w, form: newRecords(s)}, nil
	case Parquet:
		return newParquet(w, s)
	}
	return nil, fmt.Errorf("no form of rows is called %q", format)
}

// Write writes the rows of a sheet that are not yet there, and its end. after is
// called after each few rows, with what is there by then. Where the context ends
// first, the end says that the sheet was interrupted, and that is no error.
func (s *Sheet) Write(ctx context.Context, w Writer, there Tally, after func(Tally) error) (End, error) {
	end := End{State: Complete, Tally: there}
	err := s.Run(ctx, s.From+there.Points, s.To, func(rows []whatif.Row) error {
		if err := w.Rows(rows); err != nil {
			return err
		}
		end.add(rows)
		return after(end.Tally)
	})
	if err != nil && ctx.Err() == nil {
		return end, err
	}
	if end.Points < s.Rows() {
		end.State = Interrupted
	}
	return end, w.End(end)
}

func (t *Tally) add(rows []whatif.Row) {
	t.Points += int64(len(rows))
	for i := range rows {
		if rows[i].Problem != "" {
			t.Problems++
		}
	}
}
