// Package batch answers a stream of lines: one line in, one line out, in the
// order of the input, on all processors and in bounded memory whatever the
// length of the stream. What an answer is, the caller says; here are the lines,
// their numbers, shards, the line at the end, and how a broken run goes on.
//
//	{"line":17,"id":"a7","answer":{…}}
//	{"line":18,"problem":{…}}
//	{"end":{"state":"complete","lines":18,"answers":1,"problems":1}}
//
// Blank lines are passed over and counted. The last line says whether the
// stream is whole: without it, or with the state interrupted, something is
// missing behind the last number.
package batch
