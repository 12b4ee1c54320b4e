package store

import (
	"context"
	"database/sql"
	"errors"
	"fmt"
	"net/url"
	"os"
	"path/filepath"

	"github.com/pressly/goose/v3"
	"modernc.org/sqlite"
	sqlite3 "modernc.org/sqlite/lib"
)

// FileName is the file of the records in the directory of the data. SQLite puts
// two more beside it, with -wal and -shm behind the name, which belong to it:
// a copy is made with all three, or with sqlite3's own .backup.
const FileName = "records.db"

// readers is how many reads run at once.
const readers = 8

// OpenSQLite opens the records in a directory, and makes both where they are
// not there yet. A file that can't be read is left as it is.
func OpenSQLite(ctx context.Context, dir string) (*SQL, error) {
	file := filepath.Join(dir, FileName)
	if err := touch(dir, file); err != nil {
		return nil, &Error{Op: "open", Reason: Unavailable, Cause: err}
	}
	writes, err := connect(file, 1)
	if err != nil {
		return nil, &Error{Op: "open", Reason: Unavailable, Cause: err}
	}
	if err := migrate(ctx, goose.DialectSQLite3, writes); err != nil {
		cause := fmt.Errorf("%s: %w", file, errors.Join(err, writes.Close()))
		return nil, &Error{Op: "open", Reason: sqliteReason(err), Cause: cause}
	}
	reads, err := connect(file, readers)
	if err != nil {
		return nil, &Error{Op: "open", Reason: Unavailable, Cause: errors.Join(err, writes.Close())}
	}
	return newSQL(reads, writes, sqliteReason), nil
}

// touch makes the directory and the file, since the system says better than
// the driver why one can't be made or written.
func touch(dir, file string) error {
	if err := os.MkdirAll(dir, 0o750); err != nil {
		return err
	}
	f, err := os.OpenFile(file, os.O_RDWR|os.O_CREATE, 0o640)
	if err != nil {
		return err
	}
	return f.Close()
}

// connect makes a pool of connections to a file. Readers are not held up by a
// writer (WAL), a commit is on the disk (FULL), and a transaction asks for the
// right to write when it begins, so that none finds itself in a deadlock later.
func connect(file string, most int) (*sql.DB, error) {
	path, err := filepath.Abs(file)
	if err != nil {
		return nil, err
	}
	options := url.Values{"_txlock": {"immediate"}, "_pragma": {"busy_timeout(5000)", "journal_mode(WAL)", "synchronous(FULL)", "foreign_keys(1)"}}
	name := url.URL{Scheme: "file", Path: filepath.ToSlash(path), RawQuery: options.Encode()}
	db, err := sql.Open("sqlite", name.String())
	if err != nil {
		return nil, err
	}
	db.SetMaxOpenConns(most)
	db.SetMaxIdleConns(most)
	return db, nil
}

// sqliteReason tells errors of the driver apart.
func sqliteReason(err error) Reason {
	var e *sqlite.Error
	if !errors.As(err, &e) {
		return Unavailable
	}
	switch e.Code() & 0xff { // the rest of a code is detail
	case sqlite3.SQLITE_FULL:
		return Full
	case sqlite3.SQLITE_READONLY:
		return ReadOnly
	case sqlite3.SQLITE_CORRUPT, sqlite3.SQLITE_NOTADB, sqlite3.SQLITE_ERROR:
		// The last is a statement that does not fit the tables. Statements are
		// fixed, so it is the tables that are not what they were.
		return Damaged
	}
	return Unavailable
}
