package batch

import "fmt"

// Shard is a part of a batch that can be answered by itself: of Of parts, the
// one that has every line for which the number less 1, modulo Of, is Index. The
// zero value is the whole batch.
type Shard struct {
	Index, Of int64
}

// Has reports whether a line belongs to the shard.
func (s Shard) Has(line int64) bool { return s.Of <= 1 || (line-1)%s.Of == s.Index }

// Check says what is wrong with a shard.
func (s Shard) Check() error {
	most := max(s.Of, 1) - 1
	switch {
	case s.Of < 0:
		return fmt.Errorf("the number of shards is %d: want 1 or more", s.Of)
	case s.Index < 0 || s.Index > most:
		return fmt.Errorf("the index of the shard is %d: want 0 to %d", s.Index, most)
	}
	return nil
}
