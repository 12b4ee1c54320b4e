package store

import (
	"context"
	"database/sql"
	"errors"
	"fmt"
	"strings"
	"sync"
	"time"

	"github.com/go-json-experiment/json"
)

// SQL is a store on database/sql.
type SQL struct {
	reads, writes *sql.DB
	reasonOf      func(error) Reason // of the driver's own errors
	tasks         chan *task
	stop, stopped chan struct{}
	closing       sync.Once
}

// newSQL makes a store of two pools of connections on the same tables; they may
// be the same pool.
func newSQL(reads, writes *sql.DB, reasonOf func(error) Reason) *SQL {
	s := &SQL{reads: reads, writes: writes, reasonOf: reasonOf, tasks: make(chan *task), stop: make(chan struct{}), stopped: make(chan struct{})}
	go s.writer()
	return s
}

// Close waits for the writes that have begun, and ends the store.
func (s *SQL) Close() error {
	var err error
	s.closing.Do(func() {
		close(s.stop)
		<-s.stopped
		err = errors.Join(s.reads.Close(), s.writes.Close())
	})
	return err
}

// The columns of a head, and those of a record after them.
const (
	headColumns   = "id, created, title, author, tags, kind, class, engine, catalogue, options"
	recordColumns = headColumns + ", searched, seal, sent, canonical, answer"
)

const (
	insertRecord = "INSERT INTO record (" + recordColumns + ") VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15) ON CONFLICT DO NOTHING"
	insertTag    = "INSERT INTO record_tag (record_id, tag) VALUES ($1, $2) ON CONFLICT DO NOTHING"
	selectRecord = "SELECT " + recordColumns + " FROM record WHERE id = $1"
	selectIDs    = "SELECT id FROM record WHERE id >= $1 AND id < $2 ORDER BY id LIMIT $3"
	deleteRecord = "DELETE FROM record WHERE id = $1"
)

// mostTries is how often a put may find a record in its way that is gone when
// it looks for it.
const mostTries = 3

// Put keeps a record unless its id has one already.
func (s *SQL) Put(ctx context.Context, r *Record) (*Record, bool, error) {
	r = r.normal()
	args, err := columnsOf(r)
	if err != nil {
		return nil, false, s.fail("put", err)
	}
	for range mostTries {
		isNew := false
		err := s.write(ctx, func(ctx context.Context, tx *sql.Tx) (err error) {
			isNew, err = insert(ctx, tx, r, args)
			return err
		})
		if err != nil {
			return nil, false, s.fail("put", err)
		}
		if isNew {
			return r, true, nil
		}
		kept, err := s.Get(ctx, r.ID)
		if !errors.Is(err, ErrNotFound) {
			return kept, false, err
		}
	}
	return nil, false, s.fail("put", errors.New("others put and delete the same record"))
}

func columnsOf(r *Record) ([]any, error) {
	tags, err := json.Marshal(r.Tags)
	if err != nil {
		return nil, err
	}
	return []any{r.ID, r.Created.UnixMicro(), r.Title, r.Author, string(tags), r.Kind, r.Class, r.Engine.Version, r.Engine.Catalogue, string(r.Options),
		strings.ToLower(r.Title + "\n" + r.Author), r.seal(), string(r.Case), string(r.Canonical), string(r.Answer)}, nil
}

func insert(ctx context.Context, tx *sql.Tx, r *Record, args []any) (bool, error) {
	result, err := tx.ExecContext(ctx, insertRecord, args...)
	if err != nil {
		return false, err
	}
	n, err := result.RowsAffected()
	if err != nil || n == 0 {
		return false, err
	}
	for _, tag := range r.Tags {
		if _, err := tx.ExecContext(ctx, insertTag, r.ID, tag); err != nil {
			return false, err
		}
	}
	return true, nil
}

// Get returns the record of an id, after checking that it is what was put.
func (s *SQL) Get(ctx context.Context, id string) (*Record, error) {
	var r Record
	var searched, seal string
	into, finish := headInto(&r.Head)
	err := s.reads.QueryRowContext(ctx, selectRecord, id).Scan(append(into, &searched, &seal, &r.Case, &r.Canonical, &r.Answer)...)
	if errors.Is(err, sql.ErrNoRows) {
		return nil, ErrNotFound
	}
	if err != nil {
		return nil, s.fail("get", err)
	}
	if err := finish(); err != nil {
		return nil, s.fail("get", err)
	}
	if r.seal() != seal {
		return nil, s.fail("get", &alteredError{id})
	}
	return &r, nil
}

// alteredError says that a record is not what was put.
type alteredError struct{ id string }

func (e *alteredError) Error() string {
	return fmt.Sprintf("the record %s is not what was written", e.id)
}

// headInto lists where the columns of a head go, and what is to be done when
// they are there.
func headInto(h *Head) (into []any, finish func() error) {
	var created int64
	var tags []byte
	into = []any{&h.ID, &created, &h.Title, &h.Author, &tags, &h.Kind, &h.Class, &h.Engine.Version, &h.Engine.Catalogue, &h.Options}
	return into, func() error {
		h.Created = time.UnixMicro(created).UTC()
		if err := json.Unmarshal(tags, &h.Tags); err != nil {
			return &alteredError{h.ID}
		}
		return nil
	}
}

// Match lists ids that begin so.
func (s *SQL) Match(ctx context.Context, prefix string, most int) ([]string, error) {
	// Every id that begins so lies before the prefix with a g behind it, since
	// digits end with f.
	rows, err := s.reads.QueryContext(ctx, selectIDs, prefix, prefix+"g", most)
	if err != nil {
		return nil, s.fail("match", err)
	}
	defer rows.Close()
	var list []string
	for rows.Next() {
		var id string
		if err := rows.Scan(&id); err != nil {
			return nil, s.fail("match", err)
		}
		list = append(list, id)
	}
	if err := rows.Err(); err != nil {
		return nil, s.fail("match", err)
	}
	return list, nil
}

// List returns a page of records, the newest first.
func (s *SQL) List(ctx context.Context, q Query) (Page, error) {
	text, args := listText(&q)
	rows, err := s.reads.QueryContext(ctx, text, args...)
	if err != nil {
		return Page{}, s.fail("list", err)
	}
	defer rows.Close()
	var page Page
	for rows.Next() {
		var h Head
		into, finish := headInto(&h)
		if err := errors.Join(rows.Scan(into...), finish()); err != nil {
			return Page{}, s.fail("list", err)
		}
		page.Records = append(page.Records, h)
	}
	if err := rows.Err(); err != nil {
		return Page{}, s.fail("list", err)
	}
	if len(page.Records) > q.Limit { // one more was asked for, to know whether there is one
		page.Records = page.Records[:q.Limit]
		page.Next = CursorAfter(&page.Records[q.Limit-1])
	}
	return page, nil
}

// listText is the statement of a list, and its arguments.
func listText(q *Query) (string, []any) {
	var where []string
	var args []any
	add := func(condition string, values ...any) {
		for _, v := range values {
			args = append(args, v)
			condition = strings.Replace(condition, "?", fmt.Sprintf("$%d", len(args)), 1)
		}
		where = append(where, condition)
	}
	if q.Kind != "" {
		add("kind = ?", q.Kind)
	}
	if q.Class != "" {
		add("class = ?", q.Class)
	}
	if q.Tag != "" {
		add("id IN (SELECT record_id FROM record_tag WHERE tag = ?)", q.Tag)
	}
	if q.Text != "" {
		add(`searched LIKE ? ESCAPE '\'`, "%"+likeEscapes.Replace(strings.ToLower(q.Text))+"%")
	}
	if !q.From.IsZero() {
		add("created >= ?", q.From.UnixMicro())
	}
	if !q.To.IsZero() {
		add("created < ?", q.To.UnixMicro())
	}
	if q.After != nil {
		add("created <= ?", q.After.created) // says the same as the next one, to the index
		add("(created < ? OR id < ?)", q.After.created, q.After.id)
	}
	text := "SELECT " + headColumns + " FROM record"
	if len(where) > 0 {
		text += " WHERE " + strings.Join(where, " AND ")
	}
	args = append(args, q.Limit+1)
	return text + fmt.Sprintf(" ORDER BY created DESC, id DESC LIMIT $%d", len(args)), args
}

var likeEscapes = strings.NewReplacer(`\`, `\\`, `%`, `\%`, `_`, `\_`)

// Delete removes the record of an id.
func (s *SQL) Delete(ctx context.Context, id string) error {
	found := false
	err := s.write(ctx, func(ctx context.Context, tx *sql.Tx) error {
		result, err := tx.ExecContext(ctx, deleteRecord, id)
		if err != nil {
			return err
		}
		n, err := result.RowsAffected()
		found = n > 0
		return err
	})
	if err != nil {
		return s.fail("delete", err)
	}
	if !found {
		return ErrNotFound
	}
	return nil
}

// fail makes an error of the store from what went wrong.
func (s *SQL) fail(op string, cause error) error {
	reason := s.reasonOf(cause)
	var altered *alteredError
	if errors.As(cause, &altered) {
		reason = Damaged
	}
	return &Error{Op: op, Reason: reason, Cause: cause}
}
