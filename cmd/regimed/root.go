package main

import (
	"context"
	"errors"
	"fmt"
	"io"

	"github.com/spf13/cobra"
)

// The statuses with which the program ends.
const (
	statusMet         = 0 // it did what was asked
	statusUnmet       = 1 // an expectation is not met
	statusRefuse      = 2 // bad input, an unknown name, a wrong use
	statusInterrupted = 3 // it was stopped: neither wrong nor done
)

// status ends the program after everything was said already.
type status int

func (s status) Error() string { return fmt.Sprintf("status %d", int(s)) }

// run is the whole program; it returns the status.
func run(args []string, stdin io.Reader, stdout, stderr io.Writer) int {
	return runContext(context.Background(), args, stdin, stdout, stderr)
}

// runContext is run under a context, whose end stops the server.
func runContext(ctx context.Context, args []string, stdin io.Reader, stdout, stderr io.Writer) int {
	root := newRoot()
	root.SetArgs(append([]string{}, args...)) // never nil: cobra would read the process's own
	root.SetIn(stdin)
	root.SetOut(stdout)
	root.SetErr(stderr)
	failed, err := root.ExecuteContextC(ctx)
	if err == nil {
		return statusMet
	}
	var s status
	if errors.As(err, &s) {
		return int(s)
	}
	fmt.Fprintf(stderr, "regimed: %v\n", err)
	var use *usageError
	if errors.As(err, &use) || failed == root {
		fmt.Fprintf(stderr, "Try %q.\n", failed.CommandPath()+" --help")
	}
	return statusRefuse
}

// usageError says that the command line itself is wrong.
type usageError struct{ error }

func newRoot() *cobra.Command {
	root := &cobra.Command{
		Use:   "regimed",
		Short: "Which physics does a coupled fluid-structure model need?",
		Long: `regimed takes what is known before a coupled fluid-structure model is set up:
geometry, material, a frequency, a fluid, a speed. It computes the
dimensionless groups, prices every modelling simplification by a solved
problem, and recommends the cheapest class of model that holds.

Statuses: 0 done or all expectations met; 1 an expectation is not met, or
a model cannot keep what it should; 2 bad input, an unknown name or a wrong use;
3 interrupted.`,
		Example: `  regimed classify riser.yaml
  regimed classify --format json --fields recommendation riser.yaml
  regimed batch cases.ndjson -o answers.ndjson
  regimed check --expect class=added-mass riser.yaml
  regimed sweep riser.yaml --axis 'flow.speed=0.1..10 m/s:200:log'
  regimed scale riser.yaml --length 1:40 --keep froude
  regimed canon OscillatingCylinder 36
  regimed catalog kinds
  regimed serve`,
		SilenceErrors: true,
		SilenceUsage:  true,
	}
	root.SetFlagErrorFunc(func(_ *cobra.Command, err error) error { return &usageError{err} })
	root.AddCommand(newServe(), newClassify(), newRecord(), newBatch(), newCheck(), newSweep(), newMap(), newCompare(), newScale(), newCanon(), newCatalog(), newSchema(), newVersion())
	return root
}

// arguments demands a number of arguments, and says what is wanted otherwise.
func arguments(least, most int, want string) cobra.PositionalArgs {
	return func(_ *cobra.Command, args []string) error {
		if len(args) < least || len(args) > most {
			return &usageError{fmt.Errorf("got %s: %s", count(len(args), "argument"), want)}
		}
		return nil
	}
}

// completeFrom completes a flag or an argument from a list of words.
func completeFrom(words func() []string) cobra.CompletionFunc {
	return func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
		return words(), cobra.ShellCompDirectiveNoFileComp
	}
}

// completeCases completes the names of case files.
func completeCases(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
	return []cobra.Completion{"json", "yaml", "yml"}, cobra.ShellCompDirectiveFilterFileExt
}

// completeFlag ties a completion to a flag that was defined before.
func completeFlag(cmd *cobra.Command, flag string, complete cobra.CompletionFunc) {
	if err := cmd.RegisterFlagCompletionFunc(flag, complete); err != nil {
		panic(err) // a flag that the command does not have: a mistake in this program
	}
}
