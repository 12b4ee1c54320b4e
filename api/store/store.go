package store

import (
	"context"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"strconv"
	"strings"
	"time"
)

// Store keeps records. It is safe for concurrent use. Its errors are
// [ErrNotFound] or an [*Error].
type Store interface {
	// Put keeps a record unless its id has one already, and returns the one
	// that is kept, and whether it is new. When it returns without an error,
	// the record is on the disk.
	Put(ctx context.Context, r *Record) (kept *Record, isNew bool, err error)
	// Get returns the record of an id.
	Get(ctx context.Context, id string) (*Record, error)
	// Match lists ids that begin so, in their order, up to a number of them.
	Match(ctx context.Context, prefix string, most int) ([]string, error)
	// List returns a page of records, the newest first.
	List(ctx context.Context, q Query) (Page, error)
	// Delete removes the record of an id.
	Delete(ctx context.Context, id string) error
	// Close ends the store; what is asked of it afterwards is unavailable.
	Close() error
}

// Record is an answer that is kept, and what it was made from.
type Record struct {
	Head
	Case      []byte // the case as it was sent, JSON
	Canonical []byte // the canonical case, whose digest is the id
	Answer    []byte // the whole answer as it was, JSON
}

// Head is a record without its long parts.
type Head struct {
	ID      string    // SHA-256 of the canonical case, 64 hexadecimal digits in lower case
	Created time.Time // UTC, to the microsecond
	Title   string
	Author  string
	Tags    []string
	Kind    string
	Class   string
	Engine  Engine
	Options []byte // what the answer was made with, a JSON object
}

// Engine says who answered.
type Engine struct{ Version, Catalogue string }

// Digits of an id, and how many of its first ones may stand for it.
const (
	IDDigits     = 2 * sha256.Size
	PrefixDigits = 12
)

// Query asks for a page of records. What is empty does not restrict it.
type Query struct {
	Kind, Class, Tag string
	Text             string    // stands in the title or in the author, in upper or lower case
	From, To         time.Time // From ≤ created < To
	After            *Cursor   // the page after this place
	Limit            int
}

// Page is one page of a list.
type Page struct {
	Records []Head
	Next    *Cursor // where the next page begins; nil: there is none
}

// normal is a record with its time as it is kept.
func (r *Record) normal() *Record {
	n := *r
	n.Created = n.Created.UTC().Truncate(time.Microsecond)
	if len(n.Options) == 0 {
		n.Options = []byte("{}")
	}
	return &n
}

// seal is a digest of everything in a record. It is kept beside it, so that a
// disk that changes a byte is noticed. A text goes in with its length, so that
// no two records have the same input.
func (r *Record) seal() string {
	h := sha256.New()
	var room [20]byte
	put := func(text []byte) {
		h.Write(append(strconv.AppendInt(room[:0], int64(len(text)), 10), ':'))
		h.Write(text)
	}
	for _, s := range []string{r.ID, strconv.FormatInt(r.Created.UnixMicro(), 10), r.Title, r.Author, strings.Join(r.Tags, "\x00"),
		r.Kind, r.Class, r.Engine.Version, r.Engine.Catalogue} {
		put([]byte(s))
	}
	for _, b := range [][]byte{r.Options, r.Case, r.Canonical, r.Answer} {
		put(b)
	}
	return hex.EncodeToString(h.Sum(nil))
}

// ErrNotFound says that no record has the id.
var ErrNotFound = errors.New("store: no record has this id")

// Reason is why a store failed, for those who have to react.
type Reason int

// The reasons.
const (
	Unavailable Reason = iota // closed, busy, or not to be reached: later may do
	ReadOnly                  // it can be read and not written
	Full                      // the disk is full: nothing was written
	Damaged                   // what is kept can't be read, or is not what was written
)

func (r Reason) String() string {
	switch r {
	case ReadOnly:
		return "read-only"
	case Full:
		return "full"
	case Damaged:
		return "damaged"
	}
	return "unavailable"
}

// Error is a failure of the store.
type Error struct {
	Op     string // "put", "get", "match", "list", "delete", "open"
	Reason Reason
	Cause  error
}

func (e *Error) Error() string {
	return "store: " + e.Op + ": " + e.Reason.String() + ": " + e.Cause.Error()
}

func (e *Error) Unwrap() error { return e.Cause }
