package table

import (
	"fmt"
	"io"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/whatif"
)

// problemName is the name of the last column.
const problemName = "problem"

// lineForm is a form in which each row is a line.
type lineForm interface {
	begin() []byte
	// start appends the values of the axes, with which a row begins.
	start(dst []byte, r *whatif.Row) []byte
	row(dst []byte, r *whatif.Row) []byte
	end(e End) []byte
	isEnd(line []byte) bool
	hasProblem(line []byte) bool
}

// lineWriter writes a form of lines, some rows in one go.
type lineWriter struct {
	to   io.Writer
	form lineForm
	room []byte
}

func (w *lineWriter) Begin() error { return w.write(w.form.begin()) }

func (w *lineWriter) Rows(rows []whatif.Row) error {
	w.room = w.room[:0]
	for i := range rows {
		w.room = w.form.row(w.room, &rows[i])
	}
	return w.write(w.room)
}

func (w *lineWriter) End(e End) error { return w.write(w.form.end(e)) }

// ProgressWriter is a writer whose form has a place for progress between the
// rows.
type ProgressWriter interface {
	Writer
	Progress(done Tally, all int64) error
}

// Progress writes a line that says how far the sheet is. A sheet with such lines
// can't be resumed.
func (w *objectWriter) Progress(done Tally, all int64) error {
	return w.write(fmt.Appendf(nil, "{\"progress\":{\"points\":%d,\"problems\":%d,\"of\":%d}}\n", done.Points, done.Problems, all))
}

// objectWriter writes NDJSON.
type objectWriter struct{ lineWriter }

func (w *lineWriter) write(data []byte) error {
	_, err := w.to.Write(data)
	return err
}

// objects is NDJSON: an object a line.
type objects struct {
	head  []byte
	names []string // of axes and columns, as members: `"reynolds":`
}

func newObjects(s *Sheet) *objects {
	o := &objects{head: s.headJSON()}
	for _, name := range s.names() {
		o.names = append(o.names, strconv.Quote(name)+":") // names are plain ASCII
	}
	return o
}

// names lists the names of the axes and of the columns.
func (s *Sheet) names() []string {
	var list []string
	for i := range s.Axes {
		list = append(list, s.Axes[i].Name())
	}
	for i := range s.Columns {
		list = append(list, s.Columns[i].Name)
	}
	return list
}

func (o *objects) begin() []byte {
	return append(append([]byte(`{"sweep":`), o.head...), "}\n"...)
}

func (o *objects) start(dst []byte, r *whatif.Row) []byte {
	dst = append(dst, '{')
	for i := range r.Axes {
		if i > 0 {
			dst = append(dst, ',')
		}
		dst = appendJSON(append(dst, o.names[i]...), &r.Axes[i])
	}
	return append(dst, ',')
}

func (o *objects) row(dst []byte, r *whatif.Row) []byte {
	dst = o.start(dst, r)
	for i := range r.Cells {
		if i > 0 {
			dst = append(dst, ',')
		}
		dst = appendJSON(append(dst, o.names[len(r.Axes)+i]...), &r.Cells[i])
	}
	if r.Problem != "" {
		dst = append(dst, `,"`+problemName+`":`...)
		dst = appendQuoted(dst, r.Problem)
	}
	return append(dst, "}\n"...)
}

func (o *objects) end(e End) []byte {
	return fmt.Appendf(nil, "{\"end\":{\"state\":%q,\"points\":%d,\"problems\":%d}}\n", e.State, e.Points, e.Problems)
}

func (o *objects) isEnd(line []byte) bool { return strings.HasPrefix(string(line), `{"end":`) }

// hasProblem looks for the member: inside a string its quotes would be escaped.
func (o *objects) hasProblem(line []byte) bool {
	return strings.Contains(string(line), `,"`+problemName+`":"`)
}

func appendJSON(dst []byte, c *whatif.Cell) []byte {
	switch {
	case c.Text != "":
		return appendQuoted(dst, c.Text)
	case c.Null():
		return append(dst, "null"...)
	}
	return appendNumber(dst, c.Number)
}

func appendQuoted(dst []byte, s string) []byte {
	out, err := jsontext.AppendQuote(dst, s)
	if err != nil { // no UTF-8, which no text of the engine is
		return append(dst, `""`...)
	}
	return out
}

// appendNumber writes a number in the shortest form that reads back as the same
// one, plainly between 1e-6 and 1e15.
func appendNumber(dst []byte, x float64) []byte {
	if x == 0 {
		return append(dst, '0') // never −0
	}
	if a := max(x, -x); a < 1e-6 || a >= 1e15 {
		return strconv.AppendFloat(dst, x, 'e', -1, 64)
	}
	return strconv.AppendFloat(dst, x, 'f', -1, 64)
}

// records is CSV (RFC 4180): a header with names and units, and a comment at the
// end.
type records struct {
	header []byte
	last   string // what the last line says besides the state
}

func newRecords(s *Sheet) *records {
	h := s.head()
	r := &records{}
	for _, a := range h.Axes {
		r.header = append(appendField(r.header, withUnit(a.Input, a.Unit)), ',')
	}
	for _, c := range h.Columns {
		r.header = append(appendField(r.header, withUnit(c.Name, c.Unit)), ',')
	}
	r.header = append(r.header, problemName+crlf...)
	r.last = fmt.Sprintf(" case=%s engine=%s catalogue=%s", h.Digest, h.Engine.Version, h.Engine.Catalogue)
	if len(h.Middle) > 0 {
		r.last += " taken_at_middle=" + strings.Join(h.Middle, ";")
	}
	return r
}

// withUnit is the name of a field; a pure number needs no unit.
func withUnit(name string, unit *string) string {
	if unit == nil || *unit == "1" {
		return name
	}
	return name + " [" + *unit + "]"
}

const crlf = "\r\n"

func (r *records) begin() []byte { return r.header }

func (r *records) start(dst []byte, row *whatif.Row) []byte { return appendCells(dst, row.Axes) }

func (r *records) row(dst []byte, row *whatif.Row) []byte {
	dst = appendCells(r.start(dst, row), row.Cells)
	return append(appendField(dst, row.Problem), crlf...)
}

func (r *records) end(e End) []byte {
	return fmt.Appendf(nil, "# state=%s points=%d problems=%d%s"+crlf, e.State, e.Points, e.Problems, r.last)
}

func (r *records) isEnd(line []byte) bool { return len(line) > 0 && line[0] == '#' }

func (r *records) hasProblem(line []byte) bool { return !strings.HasSuffix(string(line), ","+crlf) }

func appendCells(dst []byte, cells []whatif.Cell) []byte {
	for i := range cells {
		c := &cells[i]
		switch {
		case c.Text != "":
			dst = appendField(dst, c.Text)
		case !c.Null():
			dst = appendNumber(dst, c.Number)
		}
		dst = append(dst, ',')
	}
	return dst
}

// appendField quotes a field where it has to be.
func appendField(dst []byte, s string) []byte {
	if !strings.ContainsAny(s, "\",\r\n") {
		return append(dst, s...)
	}
	dst = append(dst, '"')
	dst = append(dst, strings.ReplaceAll(s, `"`, `""`)...)
	return append(dst, '"')
}
