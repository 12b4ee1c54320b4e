package store

import (
	"context"
	"database/sql"
	"embed"
	"fmt"
	"io/fs"

	"github.com/pressly/goose/v3"
)

// migrations are numbered files that each take the tables a step further. One
// that was released is never changed; there is no way back, since it would lose
// what is kept.
//
//go:embed migrations/*.sql
var migrations embed.FS

// migrator brings the tables of a database up to date.
func migrator(dialect goose.Dialect, db *sql.DB) (*goose.Provider, error) {
	files, err := fs.Sub(migrations, "migrations")
	if err != nil {
		return nil, err
	}
	return goose.NewProvider(dialect, db, files, goose.WithDisableGlobalRegistry(true), goose.WithLogger(goose.NopLogger()))
}

// migrate brings the tables up to date, and refuses those of a newer program:
// what they hold might not be understood here.
func migrate(ctx context.Context, dialect goose.Dialect, db *sql.DB) error {
	p, err := migrator(dialect, db)
	if err != nil {
		return err
	}
	if _, err := p.Up(ctx); err != nil {
		return err
	}
	has, knows, err := p.GetVersions(ctx)
	if err != nil {
		return err
	}
	if has > knows {
		return fmt.Errorf("its tables have version %d and this program knows up to %d: use a newer program", has, knows)
	}
	return nil
}
