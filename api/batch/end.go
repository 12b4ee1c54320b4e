package batch

import "strconv"

// Tally counts.
type Tally struct {
	Lines    int64 // of the input: blank ones and those of other shards are counted too
	Answers  int64
	Problems int64
}

// End is how a run ended.
type End struct {
	Complete bool // every line of the input was dealt with
	Shard    Shard
	Tally
}

// State is the word for it in the last line of the output.
func (e End) State() string {
	if e.Complete {
		return "complete"
	}
	return "interrupted"
}

// appendTo appends the last line of the output.
func (e End) appendTo(dst []byte) []byte {
	dst = append(dst, `{"end":{"state":"`...)
	dst = append(dst, e.State()...)
	dst = strconv.AppendInt(append(dst, `","lines":`...), e.Lines, 10)
	dst = strconv.AppendInt(append(dst, `,"answers":`...), e.Answers, 10)
	dst = strconv.AppendInt(append(dst, `,"problems":`...), e.Problems, 10)
	if e.Shard.Of > 1 {
		dst = strconv.AppendInt(append(dst, `,"shard":{"index":`...), e.Shard.Index, 10)
		dst = strconv.AppendInt(append(dst, `,"of":`...), e.Shard.Of, 10)
		dst = append(dst, '}')
	}
	return append(dst, "}}\n"...)
}
