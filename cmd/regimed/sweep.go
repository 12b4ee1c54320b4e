package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"os/signal"
	"path/filepath"
	"slices"
	"strings"
	"syscall"

	"github.com/spf13/cobra"

	"regimed/api/table"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// sweepFlags are what the command line says about a sweep.
type sweepFlags struct {
	plan          string
	axes, columns []string
	out, format   string
	shards, index int64
	resume        bool
	progress      bool
}

func newSweep() *cobra.Command {
	f := &sweepFlags{}
	cmd := &cobra.Command{
		Use:   "sweep FILE|-",
		Short: "Vary inputs of a case over a grid, a row a point",
		Long: `Judges a case at every combination of the values of one to four of its inputs,
the last varying fastest, and writes a row a point. An axis is written

  flow.speed=0.1..10 m/s:200          200 values, equally spaced
  flow.speed=0.1..10 m/s:200:log      equally spaced in the logarithm
  flow.speed=0..10 m/s:step 0.5 m/s   by a step
  structure.diameter=0.1 m,0.2 m      a list
  fluid.name=water,seawater           a list of names

An input that the case does not give can be varied too. Columns have the names
that check knows: class, reynolds, one-way, one-way.utilisation,
scale.speed_critical, setup.time_step_structure and so on. Without --column they
are the class and the utilisation of each assumption that decides it somewhere.

Numbers are SI, whatever the axis was written in; the unit is in the head. An
uncertain input is taken at its middle, which the head says too. A point that
can't be computed has no values, and says why in the column problem.

The form is NDJSON, CSV or Parquet, by --format or by the ending of --output.
Each ends with a mark: complete or interrupted. On an interrupt or SIGTERM the
rows in hand are written and marked so; a second one ends the program at once.
The same command with --resume goes on behind the last whole row of an NDJSON or
CSV file, whatever stopped it, and makes the file that an undisturbed run would
have made; where there is no file yet it begins one.

--shards and --index write one of several equal parts, each a file of its own,
whose rows in order are those of the whole.

--plan takes the request that POST /v1/sweeps takes, in JSON or YAML, in place of
a case and its axes.

Statuses: 0 every point is there, those with a problem as well; 2 bad use, or an
output that fails; 3 interrupted.`,
		Example: `  regimed sweep riser.yaml --axis 'flow.speed=0.1..10 m/s:200:log' --axis 'structure.diameter=0.1 m,0.2 m'
  regimed sweep riser.yaml --axis 'flow.speed=0..3 m/s:301' --column class --column no-lock-in.utilisation -o riser.csv
  regimed sweep --plan sweep.yaml -o sweep.parquet
  regimed sweep --plan sweep.yaml -o part-3.ndjson --shards 16 --index 3 --resume`,
		Args:              arguments(0, 1, "name one file, or - for standard input"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := f.check(cmd, args); err != nil {
				return err
			}
			request, err := f.request(cmd, args)
			if err != nil {
				return said(cmd, err)
			}
			if !cmd.Flags().Changed("shards") {
				f.shards, f.index = request.Shards, request.Index
			}
			f.progress = f.progress || request.Progress
			format, err := f.formatOf(request.Format)
			if err != nil {
				return err
			}
			return f.run(cmd, request.Plan, format)
		},
	}
	flags := cmd.Flags()
	flags.StringArrayVarP(&f.axes, "axis", "a", nil, "an input and its values; may be repeated up to four times")
	flags.StringArrayVarP(&f.columns, "column", "c", nil, "what is asked of each answer; may be repeated")
	flags.StringVar(&f.plan, "plan", "", "file with the whole request, in place of a case and axes")
	flags.StringVarP(&f.out, "output", "o", "", "file to write (default standard output)")
	flags.StringVarP(&f.format, "format", "f", "", "ndjson, csv or parquet (default by the ending of --output, else ndjson)")
	flags.Int64Var(&f.shards, "shards", 1, "number of equal parts")
	flags.Int64Var(&f.index, "index", 0, "which part to write, from 0")
	flags.BoolVar(&f.resume, "resume", false, "go on behind what the output holds already")
	flags.BoolVar(&f.progress, "progress", false, "say how far it is on standard error (default where that is a terminal)")
	completeFlag(cmd, "axis", cobra.NoFileCompletions)
	completeFlag(cmd, "column", completeFrom(whatif.ColumnNames))
	completeFlag(cmd, "format", completeFrom(func() []string { return table.Formats }))
	completeFlag(cmd, "shards", cobra.NoFileCompletions)
	completeFlag(cmd, "index", cobra.NoFileCompletions)
	return cmd
}

// check refuses flags that do not go together.
func (f *sweepFlags) check(cmd *cobra.Command, args []string) error {
	bad := func(format string, args ...any) error { return &usageError{fmt.Errorf(format, args...)} }
	switch {
	case f.plan == "" && len(args) == 0:
		return bad("name one file, or - for standard input; or a --plan")
	case f.plan != "" && (len(args) > 0 || len(f.axes) > 0 || len(f.columns) > 0):
		return bad("--plan holds the case, the axes and the columns: give no others")
	case f.shards < 1 || f.shards > whatif.MaxPoints:
		return bad("--shards %d: want at least 1", f.shards)
	case f.index < 0 || f.index >= f.shards:
		return bad("--index %d: with %d shards want one from 0 to %d", f.index, f.shards, f.shards-1)
	case cmd.Flags().Changed("index") && !cmd.Flags().Changed("shards"):
		return bad("--index needs --shards")
	case f.resume && f.out == "":
		return bad("--resume needs --output: the file to go on with")
	}
	return nil
}

// formatOf settles the form of the rows; planned is what the plan says.
func (f *sweepFlags) formatOf(planned string) (string, error) {
	format := f.format
	if ending := strings.TrimPrefix(strings.ToLower(filepath.Ext(f.out)), "."); format == "" && slices.Contains(table.Formats, ending) {
		format = ending
	}
	if format == "" {
		format = planned
	}
	switch {
	case format == "" && f.out != "":
		return "", &usageError{fmt.Errorf("the ending of %s says no form: give --format, or end it in .%s", f.out, strings.Join(table.Formats, ", ."))}
	case format == "":
		return table.NDJSON, nil
	case !slices.Contains(table.Formats, format):
		return "", &usageError{fmt.Errorf("no form of rows is called %q: %s.%s", format, input.OrList(table.Formats), didYouMean(format, table.Formats))}
	case format == table.Parquet && f.out == "":
		return "", &usageError{errors.New("a Parquet file needs --output")}
	case format == table.Parquet && f.resume:
		return "", &usageError{errors.New("a Parquet file can't be gone on with: write NDJSON or CSV, or smaller --shards")}
	}
	return format, nil
}

// run writes the rows, and returns the status.
func (f *sweepFlags) run(cmd *cobra.Command, plan *whatif.Plan, format string) error {
	ctx, stop := signal.NotifyContext(cmd.Context(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	context.AfterFunc(ctx, stop) // from now on a signal ends the process
	sheet := &table.Sheet{Plan: plan}
	sheet.From, sheet.To = plan.Shard(f.shards, f.index)
	out, there, err := f.open(ctx, cmd, sheet, format)
	if err != nil {
		return err
	}
	end, err := f.write(ctx, cmd, sheet, format, out, there)
	if err := errors.Join(err, out.Close()); err != nil {
		return err
	}
	return f.finish(cmd, sheet, format, end)
}

// open opens the output at its beginning, or behind what it holds already.
func (f *sweepFlags) open(ctx context.Context, cmd *cobra.Command, s *table.Sheet, format string) (io.WriteCloser, table.There, error) {
	if f.out == "" {
		return keptOpen{cmd.OutOrStdout()}, table.There{}, nil
	}
	if !f.resume {
		file, err := os.Create(f.out)
		return file, table.There{}, err
	}
	file, err := os.OpenFile(f.out, os.O_RDWR|os.O_CREATE, 0o666)
	if err != nil {
		return nil, table.There{}, err
	}
	there, err := s.Resume(ctx, format, file)
	if err == nil {
		err = file.Truncate(there.Size)
	}
	if err == nil {
		_, err = file.Seek(there.Size, io.SeekStart)
	}
	if err != nil {
		return nil, there, errors.Join(fmt.Errorf("%s can't be gone on with: %w", f.out, err), file.Close())
	}
	return file, there, nil
}

// keptOpen is an output that others close.
type keptOpen struct{ io.Writer }

func (keptOpen) Close() error { return nil }

func (f *sweepFlags) write(ctx context.Context, cmd *cobra.Command, s *table.Sheet, format string, out io.Writer, there table.There) (table.End, error) {
	w, err := table.New(format, out, s)
	if err != nil {
		return table.End{}, err
	}
	if there.Size == 0 {
		if err := w.Begin(); err != nil {
			return table.End{}, err
		}
	}
	p := newProgress(cmd.ErrOrStderr(), f.progress, there.Points, s.Rows())
	defer p.finish()
	return s.Write(ctx, w, there.Tally, func(t table.Tally) error {
		p.say(t.Points, t.Problems)
		return nil
	})
}

// finish says how it ended where that is not plain success.
func (f *sweepFlags) finish(cmd *cobra.Command, s *table.Sheet, format string, end table.End) error {
	if end.Problems > 0 {
		cmd.PrintErrf("regimed: %d of %s can't be computed; the column problem says why\n", end.Problems, count(int(end.Points), "point"))
	}
	if end.State == table.Complete {
		return nil
	}
	advice := ""
	if f.out != "" && format != table.Parquet {
		advice = "; the same command with --resume goes on"
	}
	cmd.PrintErrf("regimed: interrupted after %d of %s%s\n", end.Points, count(int(s.Rows()), "point"), advice)
	return status(statusInterrupted)
}
