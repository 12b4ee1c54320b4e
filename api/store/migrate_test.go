package store

import (
	"context"
	"io/fs"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"

	"github.com/pressly/goose/v3"
)

// versionOf is the version of the tables of a store.
func versionOf(t *testing.T, s *SQL) int64 {
	t.Helper()
	p, err := migrator(goose.DialectSQLite3, s.writes)
	if err != nil {
		t.Fatal(err)
	}
	version, err := p.GetDBVersion(context.Background())
	if err != nil {
		t.Fatal(err)
	}
	return version
}

// latest is the number of the last migration.
func latest(t *testing.T) int64 {
	t.Helper()
	files, err := fs.Glob(migrations, "migrations/*.sql")
	if err != nil || len(files) < 2 {
		t.Fatalf("%v: %v", files, err)
	}
	return int64(len(files)) // they are numbered from 1
}

func TestMigrationFromNothing(t *testing.T) {
	dir := t.TempDir()
	for range 2 { // the second finds everything done
		s := open(t, dir)
		if got := versionOf(t, s); got != latest(t) {
			t.Errorf("version %d", got)
		}
		put(t, s, numbered(1))
		if err := s.Close(); err != nil {
			t.Fatal(err)
		}
	}
}

// Each version before the last one becomes the last, and keeps its records.
func TestMigrationFromEachVersion(t *testing.T) {
	ran := 0
	for from := int64(1); from < latest(t); from++ {
		dir := t.TempDir()
		file := filepath.Join(dir, FileName)
		db, err := connect(file, 1)
		if err != nil {
			t.Fatal(err)
		}
		p, err := migrator(goose.DialectSQLite3, db)
		if err != nil {
			t.Fatal(err)
		}
		if _, err := p.UpTo(context.Background(), from); err != nil {
			t.Fatal(err)
		}
		r := numbered(int(from))
		args, err := columnsOf(r)
		if err != nil {
			t.Fatal(err)
		}
		if _, err := db.Exec(insertRecord, args...); err != nil {
			t.Fatal(err)
		}
		if _, err := db.Exec(insertTag, r.ID, "mill"); err != nil {
			t.Fatal(err)
		}
		if err := db.Close(); err != nil {
			t.Fatal(err)
		}
		s := open(t, dir)
		if got := get(t, s, r.ID); !reflect.DeepEqual(got, r) {
			t.Errorf("from version %d: got %+v", from, got)
		}
		if page, err := s.List(context.Background(), Query{Tag: "mill", Limit: 2}); err != nil || len(page.Records) != 1 {
			t.Errorf("from version %d: %v: %+v", from, err, page)
		}
		if got := versionOf(t, s); got != latest(t) {
			t.Errorf("from version %d: version %d", from, got)
		}
		ran++
	}
	if int64(ran) != latest(t)-1 {
		t.Errorf("%d versions", ran)
	}
}

// Tables of a newer program are refused, and left as they are.
func TestNewerTables(t *testing.T) {
	dir := t.TempDir()
	s := open(t, dir)
	exec(t, s, "INSERT INTO goose_db_version (version_id, is_applied) VALUES (99, 1)")
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	before, err := os.ReadFile(filepath.Join(dir, FileName))
	if err != nil {
		t.Fatal(err)
	}
	_, err = OpenSQLite(context.Background(), dir)
	if err == nil || !strings.Contains(err.Error(), "newer program") {
		t.Errorf("%v", err)
	}
	after, err := os.ReadFile(filepath.Join(dir, FileName))
	if err != nil || string(after) != string(before) {
		t.Errorf("%v: the file was changed", err)
	}
}

// The lists use their indexes: a page costs the same however many records there
// are.
func TestListsUseIndexes(t *testing.T) {
	s := open(t, t.TempDir())
	rows := map[string]Query{
		"record_created": {Limit: 10, After: CursorAfter(&numbered(1).Head)},
		"record_kind":    {Kind: "plate", Limit: 10, After: CursorAfter(&numbered(1).Head)},
		"record_class":   {Class: "added-mass", Limit: 10, From: noon},
		"record_tag_tag": {Tag: "mill", Limit: 10},
	}
	for index, q := range rows {
		text, args := listText(&q)
		list, err := s.reads.Query("EXPLAIN QUERY PLAN "+text, args...)
		if err != nil {
			t.Fatal(err)
		}
		var plan []string
		for list.Next() {
			var a, b, c int
			var step string
			if err := list.Scan(&a, &b, &c, &step); err != nil {
				t.Fatal(err)
			}
			plan = append(plan, step)
		}
		if err := list.Close(); err != nil {
			t.Fatal(err)
		}
		if whole := strings.Join(plan, "; "); !strings.Contains(whole, index) || index != "record_tag_tag" && strings.Contains(whole, "TEMP B-TREE") {
			t.Errorf("%s: %s", index, whole)
		}
	}
	if len(rows) != 4 {
		t.Errorf("%d rows", len(rows))
	}
}
