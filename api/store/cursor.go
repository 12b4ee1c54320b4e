package store

import (
	"encoding/base64"
	"encoding/binary"
	"encoding/hex"
	"errors"
	"math"
)

// Cursor is a place in a list: right after a record. It names the record
// rather than a count, so that nothing that is added or removed shifts it.
type Cursor struct {
	created int64 // microseconds since 1970
	id      string
}

// CursorAfter is the place after a record.
func CursorAfter(h *Head) *Cursor { return &Cursor{created: h.Created.UnixMicro(), id: h.ID} }

const (
	cursorVersion = 1
	cursorBytes   = 1 + 8 + IDDigits/2
)

// String writes a cursor as a word that can stand in a URL.
func (c *Cursor) String() string {
	b := make([]byte, 1, cursorBytes)
	b[0] = cursorVersion
	b = binary.BigEndian.AppendUint64(b, uint64(c.created))
	b, err := hex.AppendDecode(b, []byte(c.id))
	if err != nil {
		return "" // an id that no record has
	}
	return base64.RawURLEncoding.EncodeToString(b)
}

var errCursor = errors.New("store: this is no cursor of a list")

// ParseCursor reads what String wrote, and nothing else.
func ParseCursor(s string) (*Cursor, error) {
	b, err := base64.RawURLEncoding.Strict().DecodeString(s)
	if err != nil || len(b) != cursorBytes || b[0] != cursorVersion {
		return nil, errCursor
	}
	created := binary.BigEndian.Uint64(b[1:9])
	if created > math.MaxInt64 {
		return nil, errCursor // before 1970
	}
	c := &Cursor{created: int64(created), id: hex.EncodeToString(b[9:])}
	if c.String() != s {
		return nil, errCursor // a line break inside, which the decoder passes over
	}
	return c, nil
}
