package table

import (
	"io"
	"math"
	"reflect"

	"github.com/go-json-experiment/json"
	"github.com/parquet-go/parquet-go"

	"regimed/regime/whatif"
)

// The names under which a Parquet file keeps what the other forms have in their
// first and last line.
const (
	headKey = "regimed.sweep"
	endKey  = "regimed.end"
)

// rowsPerGroup bounds what is held in memory before it is written, and keeps the
// list of groups in the footer short.
const rowsPerGroup = 1 << 17

// parquetWriter writes an optional column an axis and a column, in their order,
// and the problem last. Texts have a dictionary.
type parquetWriter struct {
	to   *parquet.GenericWriter[any]
	head []byte
	row  parquet.Row // room
}

func newParquet(w io.Writer, s *Sheet) (*parquetWriter, error) {
	schema := schemaOf(s)
	config, err := parquet.NewWriterConfig(schema, parquet.MaxRowsPerRowGroup(rowsPerGroup), parquet.Compression(&parquet.Snappy),
		parquet.CreatedBy("regimed", s.head().Engine.Version, ""))
	if err != nil {
		return nil, err
	}
	return &parquetWriter{to: parquet.NewGenericWriter[any](w, config), head: s.headJSON()}, nil
}

// columns is a group whose columns keep their order.
type columns struct {
	parquet.Group
	fields []parquet.Field
}

func (c columns) Fields() []parquet.Field { return c.fields }

// field is one column.
type field struct {
	parquet.Node
	name string
}

func (f field) Name() string { return f.name }

// Value is asked for only where rows are made from Go values, which these are not.
func (f field) Value(base reflect.Value) reflect.Value { return base.MapIndex(reflect.ValueOf(f.name)) }

func schemaOf(s *Sheet) *parquet.Schema {
	number := parquet.Optional(parquet.Leaf(parquet.DoubleType))
	text := parquet.Optional(parquet.Encoded(parquet.String(), &parquet.RLEDictionary))
	c := columns{Group: parquet.Group{}}
	add := func(name string, isText bool) {
		node := number
		if isText {
			node = text
		}
		c.Group[name] = node
		c.fields = append(c.fields, field{node, name})
	}
	for i := range s.Axes {
		add(s.Axes[i].Name(), s.Axes[i].Named())
	}
	for i := range s.Columns {
		add(s.Columns[i].Name, s.Columns[i].Text != nil)
	}
	add(problemName, true)
	return parquet.NewSchema("sweep", c)
}

func (w *parquetWriter) Begin() error {
	w.to.SetKeyValueMetadata(headKey, string(w.head))
	return nil
}

func (w *parquetWriter) Rows(rows []whatif.Row) error {
	for i := range rows {
		w.fill(&rows[i])
		if _, err := w.to.WriteRows([]parquet.Row{w.row}); err != nil {
			return err
		}
	}
	return nil
}

func (w *parquetWriter) fill(r *whatif.Row) {
	w.row = w.row[:0]
	for i := range r.Axes {
		w.add(&r.Axes[i])
	}
	for i := range r.Cells {
		w.add(&r.Cells[i])
	}
	w.add(&whatif.Cell{Text: r.Problem, Number: math.NaN()})
}

// add appends a cell as the value of the next column.
func (w *parquetWriter) add(c *whatif.Cell) {
	at := len(w.row)
	var v parquet.Value
	switch {
	case c.Text != "":
		v = parquet.ByteArrayValue([]byte(c.Text)).Level(0, 1, at)
	case c.Null():
		v = parquet.NullValue().Level(0, 0, at)
	default:
		v = parquet.DoubleValue(c.Number).Level(0, 1, at)
	}
	w.row = append(w.row, v)
}

// End closes the file: a reader finds its rows whether it is whole or not.
func (w *parquetWriter) End(e End) error {
	data, err := json.Marshal(e)
	if err != nil {
		return err
	}
	w.to.SetKeyValueMetadata(endKey, string(data))
	return w.to.Close()
}
