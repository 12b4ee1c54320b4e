package api

import (
	"bufio"
	"bytes"
	"context"
	"io"
	"runtime"
	"sync"
	"testing"
	"time"

	"regimed/api/batch"
	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// BenchmarkBatchRatio reports the lines a second of a batch, and its throughput
// over that of classifying alone, of cases that are decoded already, on as many
// processors. The two take turns, so that a busy machine slows both.
func BenchmarkBatchRatio(b *testing.B) {
	for name, fields := range map[string]render.Fields{"trimmed": render.Kind | render.Recommendation, "whole": render.All} {
		b.Run(name, func(b *testing.B) {
			const n = 2000
			text, cases := benchLines(b, n)
			answer := BatchAnswerer(BatchOptions{Fields: fields})
			var batched, alone time.Duration
			for range b.N {
				start := time.Now()
				if _, err := batch.Run(context.Background(), bytes.NewReader(text), bufio.NewWriter(io.Discard), batch.Options{Answer: answer}); err != nil {
					b.Fatal(err)
				}
				batched += time.Since(start)
				start = time.Now()
				classifyAll(cases)
				alone += time.Since(start)
			}
			b.ReportMetric(float64(b.N)*n/batched.Seconds(), "lines/s")
			b.ReportMetric(alone.Seconds()/batched.Seconds(), "of-classify")
		})
	}
}

// benchLines are so many good lines, and their cases.
func benchLines(b *testing.B, n int) (text []byte, cases []*input.Case) {
	b.Helper()
	src := source(b)
	for number := int64(1); len(cases) < n; number++ {
		line, broken := src.Append(nil, number)
		if broken {
			continue
		}
		c, violations, err := input.Decode(line, kind.Schema())
		if err != nil || len(violations) > 0 {
			b.Fatal(err, violations)
		}
		text, cases = append(append(text, line...), '\n'), append(cases, c)
	}
	return text, cases
}

func classifyAll(cases []*input.Case) {
	var all sync.WaitGroup
	workers := runtime.GOMAXPROCS(0)
	for w := range workers {
		all.Go(func() {
			for i := w; i < len(cases); i += workers {
				if a, violations := regime.Classify(cases[i]); len(violations) == 0 {
					a.Release()
				}
			}
		})
	}
	all.Wait()
}
