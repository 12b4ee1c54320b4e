package whatif

import (
	"context"
	"sync"
)

// InOrder works on a stream of items with several workers and hands the results
// on in the order of the items. It holds at most twice as many items and results
// as there are workers: a slow receiver holds the reader back.
//
// next returns the next item, false at the end. It and emit are each called by one
// goroutine at a time. InOrder ends at the first error of next or emit, or with the
// context; everything it started has then ended.
func InOrder[I, O any](ctx context.Context, workers int, next func() (I, bool, error), work func(I) O, emit func(O) error) error {
	inner, cancel := context.WithCancel(ctx)
	defer cancel()
	type job struct {
		item I
		done chan O
	}
	jobs := make(chan job)
	line := make(chan chan O, 2*workers) // results to come, in order
	var failed error                     // of next; read after line is closed
	var all sync.WaitGroup
	all.Go(func() {
		defer close(line)
		defer close(jobs)
		for {
			item, more, err := next()
			if err != nil || !more {
				failed = err
				return
			}
			done := make(chan O, 1)
			select {
			case line <- done:
			case <-inner.Done():
				return
			}
			select {
			case jobs <- job{item, done}:
			case <-inner.Done():
				return
			}
		}
	})
	for range workers {
		all.Go(func() {
			for j := range jobs {
				j.done <- work(j.item)
			}
		})
	}
	err := emitAll(inner, line, emit)
	cancel()
	for range line { // lets the reader go
	}
	all.Wait()
	switch {
	case err != nil:
		return err
	case ctx.Err() != nil:
		return context.Cause(ctx)
	}
	return failed
}

// emitAll hands results on as they become ready, until the line or the context
// ends.
func emitAll[O any](ctx context.Context, line <-chan chan O, emit func(O) error) error {
	for done := range line {
		select {
		case o := <-done:
			if err := emit(o); err != nil {
				return err
			}
		case <-ctx.Done():
			return nil
		}
	}
	return nil
}
