package main

import (
	"context"
	"errors"
	"fmt"
	"os"
	"os/signal"
	"syscall"

	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/batch"
	"regimed/api/render"
	"regimed/regime/whatif"
)

// largestLine is the largest limit of a line: several are held at a time.
const largestLine = 64 << 20

// batchFlags are what the command line says about a batch.
type batchFlags struct {
	out              string
	fields           []string
	ask              whatif.Options
	workers, limit   int
	shard            batch.Shard
	resume, progress bool
}

func newBatch() *cobra.Command {
	f := &batchFlags{}
	cmd := &cobra.Command{
		Use:   "batch [FILE|-]",
		Short: "Answer a stream of cases, a line each, on all processors",
		Long: `Reads cases in JSON, one a line, and writes an answer a line in the same order.
A line is a case, or a case with an id that comes back:

  {"structure": {…}, "fluid": …}
  {"id": "a7", "case": {"structure": {…}, "fluid": …}}

and gets one of

  {"line":17,"id":"a7","answer":{…}}
  {"line":18,"problem":{…}}

the answer as classify --format json gives it, the problem as the service gives
it to the same text. A line that is wrong stops nothing. Blank lines are passed
over and counted. The last line of the output says whether it is whole:

  {"end":{"state":"complete","lines":18,"answers":17,"problems":1}}

The output is byte for byte that of POST /v1/batch. Answers come without drivers
and turning points unless --what-if asks for them, which takes longer by far.

Input in gzip is recognised; output is packed where its name ends in .gz.

On an interrupt or SIGTERM the lines in hand are answered and the last line says
interrupted; a second one ends the program at once. The same command with
--resume goes on behind the last whole line of the output, whatever stopped it,
and makes the file that an undisturbed run would have made; where there is no
file yet it begins one. It answers the last line there once more, and refuses to
go on where that comes out otherwise.

--shards N --index I answers every line for which the number less 1, modulo N, is
I. To put the parts together again:

  grep -h '^{"line"' part-*.ndjson | sort -t: -k2,2n

Statuses: 0 every line is answered; 1 some have a problem; 2 bad use, or an input
or output that fails; 3 interrupted.`,
		Example: `  regimed batch cases.ndjson -o answers.ndjson.gz
  generate-cases | regimed batch --fields recommendation | jq -c 'select(.answer)'
  regimed batch cases.ndjson.gz -o part-3.ndjson --shards 16 --index 3 --resume`,
		Args: arguments(0, 1, "name one file, or - for standard input"),
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
			return []cobra.Completion{"ndjson", "jsonl", "gz"}, cobra.ShellCompDirectiveFilterFileExt
		},
		RunE: func(cmd *cobra.Command, args []string) error {
			only, err := f.check()
			if err != nil {
				return &usageError{err}
			}
			return f.run(cmd, append(args, "-")[0], only)
		},
	}
	flags := cmd.Flags()
	flags.StringVarP(&f.out, "output", "o", "", "file to write (default standard output)")
	flags.StringSliceVar(&f.fields, "fields", nil, "members of each answer, separated by commas (default all)")
	flags.IntVar(&f.ask.Samples, "samples", whatif.DefaultSamples, "most samples where an input is uncertain")
	flags.BoolVar(&f.ask.Explore, "what-if", false, "with the drivers of each finding and the turning points")
	flags.IntVar(&f.workers, "workers", 0, "lines that are answered at a time (default one a processor)")
	flags.IntVar(&f.limit, "line-limit", batch.DefaultLimit, "longest line in bytes; a longer one is a problem")
	flags.Int64Var(&f.shard.Of, "shards", 1, "number of parts")
	flags.Int64Var(&f.shard.Index, "index", 0, "which part to answer, from 0")
	flags.BoolVar(&f.resume, "resume", false, "go on behind what the output holds already")
	flags.BoolVar(&f.progress, "progress", false, "say how far it is on standard error (default where that is a terminal)")
	completeFlag(cmd, "fields", completeFrom(render.FieldNames))
	for _, name := range []string{"samples", "workers", "line-limit", "shards", "index"} {
		completeFlag(cmd, name, cobra.NoFileCompletions)
	}
	return cmd
}

// check refuses flags that are out of range or do not go together, all at once.
// It returns which members of an answer are wanted.
func (f *batchFlags) check() (render.Fields, error) {
	only, err := render.ParseFields(f.fields)
	f.ask.Explore = f.ask.Explore && only.Explored()
	bad := []error{err, knownSamples(f.ask.Samples)}
	add := func(wrong bool, format string, args ...any) {
		if wrong {
			bad = append(bad, fmt.Errorf(format, args...))
		}
	}
	add(f.workers < 0, "--workers %d: want 1 or more", f.workers)
	add(f.limit < 1 || f.limit > largestLine, "--line-limit %d: want 1 to %d", f.limit, largestLine)
	add(f.shard.Of < 1, "--shards %d: want 1 or more", f.shard.Of)
	add(f.shard.Of >= 1 && f.shard.Check() != nil, "--index %d: with --shards %d want 0 to %d", f.shard.Index, f.shard.Of, f.shard.Of-1)
	add(f.resume && f.out == "", "--resume needs --output: the file to go on with")
	return only, errors.Join(bad...)
}

// run answers the batch, and returns the status.
func (f *batchFlags) run(cmd *cobra.Command, name string, only render.Fields) error {
	ctx, stop := signal.NotifyContext(cmd.Context(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	context.AfterFunc(ctx, stop) // from now on a signal ends the process
	in, err := openBatch(name, cmd.InOrStdin())
	if err != nil {
		return err
	}
	defer in.close()
	out, past, err := f.open(cmd.OutOrStdout(), in)
	if err != nil {
		return err
	}
	say := newBatchProgress(cmd.ErrOrStderr(), f.progress, in)
	end, err := batch.Run(context.WithoutCancel(ctx), in, out, batch.Options{
		Answer:   api.BatchAnswerer(api.BatchOptions{Fields: only, Ask: f.ask, Fault: tellFault(cmd)}),
		Workers:  f.workers,
		Limit:    f.limit,
		Shard:    f.shard,
		Past:     past,
		Stop:     ctx.Done(),
		Unblock:  in.unblock,
		Progress: say.line,
	})
	say.finish(end)
	failed, closing := f.explained(err, name), out.Close()
	if failed != nil && errors.Is(closing, failed) {
		closing = nil // the buffer tells the same failure again
	}
	if err := errors.Join(failed, closing); err != nil {
		return err
	}
	return f.finish(cmd, end)
}

// explained names the file that a failure is about.
func (f *batchFlags) explained(err error, name string) error {
	var reading *batch.ReadError
	switch {
	case errors.As(err, &reading):
		return fmt.Errorf("%s: %w", inputName(name), err)
	case errors.Is(err, batch.ErrOther):
		return fmt.Errorf("%s can't be gone on with: %w", f.out, err)
	}
	return err
}

// tellFault says on standard error what a fault of the program was, for whoever
// reports it.
func tellFault(cmd *cobra.Command) func(int64, any, []byte) {
	return func(line int64, cause any, trace []byte) {
		cmd.PrintErrf("regimed: fault on line %d: %v\n%s\n", line, cause, trace)
	}
}

// finish says how it ended where that is not plain success.
func (f *batchFlags) finish(cmd *cobra.Command, end batch.End) error {
	if end.Problems > 0 {
		cmd.PrintErrf("regimed: %d of %s with a problem\n", end.Problems, count(int(end.Answers+end.Problems), "line"))
	}
	switch {
	case !end.Complete:
		advice := ""
		if f.out != "" {
			advice = "; the same command with --resume goes on"
		}
		cmd.PrintErrf("regimed: interrupted behind line %d%s\n", end.Lines, advice)
		return status(statusInterrupted)
	case end.Problems > 0:
		return status(statusUnmet)
	}
	return nil
}
