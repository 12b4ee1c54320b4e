package whatif

import (
	"context"
	"errors"
	"runtime"
	"sync/atomic"
	"testing"
	"time"
)

// numbers counts up to n.
func numbers(n int) func() (int, bool, error) {
	i := 0
	return func() (int, bool, error) {
		if i == n {
			return 0, false, nil
		}
		i++
		return i, true, nil
	}
}

func TestInOrderKeepsTheOrder(t *testing.T) {
	for _, workers := range []int{1, 2, 7} {
		last := 0
		err := InOrder(context.Background(), workers, numbers(1000), func(i int) int {
			if i%3 == 0 {
				time.Sleep(10 * time.Microsecond)
			}
			return i
		}, func(i int) error {
			if i != last+1 {
				t.Fatalf("%d after %d", i, last)
			}
			last = i
			return nil
		})
		if err != nil || last != 1000 {
			t.Errorf("%d workers: %v, %d results", workers, err, last)
		}
	}
}

// A slow receiver holds the reader back: never more items are read ahead than
// the workers and the line hold.
func TestInOrderHoldsBack(t *testing.T) {
	const workers = 2
	var read atomic.Int64
	emitted := int64(0)
	next := numbers(500)
	err := InOrder(context.Background(), workers, func() (int, bool, error) {
		read.Add(1)
		return next()
	}, func(i int) int { return i }, func(int) error {
		emitted++
		if ahead := read.Load() - emitted; ahead > 3*workers+2 {
			t.Fatalf("%d items ahead", ahead)
		}
		return nil
	})
	if err != nil || emitted != 500 {
		t.Errorf("%v after %d", err, emitted)
	}
}

func TestInOrderEnds(t *testing.T) {
	broken := errors.New("broken")
	same := func(i int) int { return i }
	before := runtime.NumGoroutine()
	seen := 0
	count := func(int) error { seen++; return nil }
	next := numbers(50)
	err := InOrder(context.Background(), 2, func() (int, bool, error) {
		i, more, _ := next()
		if i == 20 {
			return 0, false, broken
		}
		return i, more, nil
	}, same, count)
	if !errors.Is(err, broken) || seen != 19 {
		t.Errorf("reader: %v after %d", err, seen)
	}
	if err := InOrder(context.Background(), 2, numbers(50), same, func(i int) error {
		if i == 20 {
			return broken
		}
		return nil
	}); !errors.Is(err, broken) {
		t.Errorf("receiver: %v", err)
	}
	gone := errors.New("gone away")
	ctx, cancel := context.WithCancelCause(context.Background())
	if err := InOrder(ctx, 2, numbers(1e9), same, func(i int) error {
		if i == 30 {
			cancel(gone)
		}
		return nil
	}); !errors.Is(err, gone) {
		t.Errorf("context: %v", err)
	}
	for range 100 {
		if runtime.NumGoroutine() <= before {
			return
		}
		time.Sleep(time.Millisecond)
	}
	t.Errorf("%d goroutines, %d before", runtime.NumGoroutine(), before)
}
