package store

import (
	"context"
	"database/sql"
	"errors"
	"time"
)

// Writes wait for the disk, one after another. Those that wait at the same time
// go in one transaction and wait for it once: a burst of writers is then as
// fast as the disk, and none is acknowledged before it is safe.
const (
	mostTogether = 64
	writeTimeout = 15 * time.Second
)

// task is a write. Its error is that of the storage, never of the record, so
// that it fails for all that go together.
type task struct {
	do   func(context.Context, *sql.Tx) error
	done chan error // one place, so that nobody has to wait for it
}

var errClosed = errors.New("it is closed")

// write runs a task in a transaction, together with others.
func (s *SQL) write(ctx context.Context, do func(context.Context, *sql.Tx) error) error {
	t := &task{do: do, done: make(chan error, 1)}
	select {
	case s.tasks <- t:
	case <-s.stop:
		return errClosed
	case <-ctx.Done():
		return ctx.Err()
	}
	select {
	case err := <-t.done:
		return err
	case <-ctx.Done():
		return ctx.Err() // it may be done nonetheless; that harms nobody
	}
}

// writer does tasks until the store is closed.
func (s *SQL) writer() {
	defer close(s.stopped)
	for {
		select {
		case <-s.stop:
			return
		case t := <-s.tasks:
			together := s.gather(t)
			err := s.transact(together)
			for _, t := range together {
				t.done <- err
			}
		}
	}
}

// gather takes what waits already.
func (s *SQL) gather(first *task) []*task {
	list := []*task{first}
	for len(list) < mostTogether {
		select {
		case t := <-s.tasks:
			list = append(list, t)
		default:
			return list
		}
	}
	return list
}

func (s *SQL) transact(tasks []*task) error {
	ctx, cancel := context.WithTimeout(context.Background(), writeTimeout)
	defer cancel()
	tx, err := s.writes.BeginTx(ctx, nil)
	if err != nil {
		return err
	}
	for _, t := range tasks {
		if err := t.do(ctx, tx); err != nil {
			return errors.Join(err, ignoreDone(tx.Rollback()))
		}
	}
	return tx.Commit()
}

// ignoreDone leaves out that a transaction was undone already.
func ignoreDone(err error) error {
	if errors.Is(err, sql.ErrTxDone) {
		return nil
	}
	return err
}
