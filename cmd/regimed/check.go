package main

import (
	"cmp"
	"context"
	"errors"
	"fmt"
	"io"
	"maps"
	"math"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

func newCheck() *cobra.Command {
	var texts []string
	var quiet bool
	cmd := &cobra.Command{
		Use:   "check FILE...",
		Short: "Compare answers with what is expected of them",
		Long: `Classifies every file and compares the answer with what is expected of it:

  class=added-mass              the recommended class
  axis.coupling=one-way         an axis of the recommendation
  one-way=valid|marginal        the verdict on an assumption
  one-way.utilisation<0.5       a number of its finding: utilisation,
                                estimate, margin, limit or factor
  reynolds>1e4                  a group
  scale.speed_critical<3        a scale, in SI
  setup.time_step_structure<0.1 a figure for setting up, in SI
  probability.added-mass>0.9    how likely a class is, where an input is
                                uncertain

Names take = and !=, and alternatives by |. Numbers take ~ (within 2 %), = and
!= (the same to nine digits), <, <=, > and >=; null stands for a number that
the answer does not have.

A file is a case, or holds a case and its expectations side by side, which are
checked as well:

  title: Riser in a current
  source: where it is known from
  case: {structure: {…}, fluid: {…}}
  expect: ["class=two-way-implicit", "reynolds~1.2e5"]

Prints a line an expectation and a summary. Status 0 if all are met, 1 if some
are not, 2 on bad input or an unknown name.`,
		Example: `  regimed check --expect class=added-mass pile.yaml
  regimed check --expect 'one-way=valid|marginal' --expect 'reynolds>1e4' *.yaml
  regimed check --quiet situations/*.yaml`,
		Args:              arguments(1, math.MaxInt, "name one file or more"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, files []string) error {
			common, err := parseExpectations(texts)
			if err != nil {
				return err
			}
			c := &checker{out: cmd.OutOrStdout(), err: cmd.ErrOrStderr(), quiet: quiet, common: common}
			for _, file := range files {
				c.check(cmd.Context(), file, cmd.InOrStdin())
			}
			return c.finish(len(files))
		},
	}
	cmd.Flags().StringArrayVarP(&texts, "expect", "e", nil, "what is expected of every file; may be repeated")
	cmd.Flags().BoolVarP(&quiet, "quiet", "q", false, "print only what is not met")
	completeFlag(cmd, "expect", func(_ *cobra.Command, _ []string, start string) ([]cobra.Completion, cobra.ShellCompDirective) {
		return expectationWords(start), cobra.ShellCompDirectiveNoFileComp | cobra.ShellCompDirectiveNoSpace
	})
	return cmd
}

// parseExpectations reads all expectations, or returns everything that is
// wrong with them.
func parseExpectations(texts []string) ([]expectation, error) {
	var list []expectation
	var bad []error
	for _, text := range texts {
		e, err := parseExpectation(text)
		if err != nil {
			bad = append(bad, fmt.Errorf("expectation %w", err))
			continue
		}
		list = append(list, e)
	}
	return list, errors.Join(bad...)
}

// checker compares files with expectations and counts.
type checker struct {
	out, err           io.Writer
	quiet              bool
	common             []expectation
	met, unmet, broken int
	kinds, questions   tally // files by kind, expectations by what they ask
	failed             error // of writing
}

func (c *checker) check(ctx context.Context, file string, stdin io.Reader) {
	d, err := readDocument(file, stdin)
	if err != nil {
		c.refuse(err)
		return
	}
	a, list, err := c.prepare(ctx, d)
	if err != nil {
		c.refuse(err)
		return
	}
	c.kinds.add(a.Kind.Name)
	for _, e := range list {
		c.questions.add(e.question())
		c.compare(d.name, a, e)
	}
}

// tally counts by name.
type tally map[string]int

func (t *tally) add(name string) {
	if *t == nil {
		*t = tally{}
	}
	(*t)[name]++
}

// String lists the names by falling count: "class 12, reynolds 3".
func (t tally) String() string {
	names := slices.SortedFunc(maps.Keys(t), func(a, b string) int { return cmp.Or(cmp.Compare(t[b], t[a]), strings.Compare(a, b)) })
	parts := make([]string, len(names))
	for i, n := range names {
		parts[i] = fmt.Sprintf("%s %d", n, t[n])
	}
	return strings.Join(parts, ", ")
}

// prepare classifies the case of a document and reads its expectations. How the
// answer spreads is found out only where it is asked for.
func (c *checker) prepare(ctx context.Context, d *document) (*regime.Answer, []expectation, error) {
	own, bad := ownExpectations(d)
	list := append(append([]expectation{}, c.common...), own...)
	answer := d.classify
	if slices.ContainsFunc(list, func(e expectation) bool { return e.spread }) {
		answer = func() (*regime.Answer, error) { return d.explore(ctx, whatif.Options{}) }
	}
	a, err := answer()
	if len(bad) > 0 {
		err = errors.Join(err, d.refuseAll(bad))
	}
	if err != nil {
		return nil, nil, err
	}
	if len(list) == 0 {
		return nil, nil, refuse(d.name, 0, "Nothing is expected of it: give --expect, or expectations beside the case.")
	}
	return a, list, nil
}

// badExpectation is the code of an expectation that cannot be read.
const badExpectation input.Code = "expectation"

func ownExpectations(d *document) (list []expectation, bad []input.Violation) {
	for i, text := range d.expect {
		e, err := parseExpectation(text)
		if err != nil {
			bad = append(bad, input.Violation{Pointer: fmt.Sprintf("/expect/%d", i), Code: badExpectation, Sentence: "The expectation " + err.Error()})
			continue
		}
		list = append(list, e)
	}
	return list, bad
}

func (c *checker) refuse(err error) {
	c.broken++
	c.print(c.err, "%v\n", err)
}

func (c *checker) compare(file string, a *regime.Answer, e expectation) {
	ok, got := e.met(a)
	if !ok {
		c.unmet++
		c.print(c.out, "FAIL %s  %s  got %s\n", file, e.text, got)
		return
	}
	c.met++
	if !c.quiet {
		c.print(c.out, "ok   %s  %s\n", file, e.text)
	}
}

func (c *checker) print(to io.Writer, format string, args ...any) {
	if _, err := fmt.Fprintf(to, format, args...); err != nil && c.failed == nil {
		c.failed = err
	}
}

// finish prints the summary and returns the status.
func (c *checker) finish(files int) error {
	if !c.quiet {
		c.print(c.out, "%s of %s: %d met, %d not met", count(c.met+c.unmet, "expectation"), count(files, "file"), c.met, c.unmet)
		if c.broken > 0 {
			c.print(c.out, "; %s refused", count(c.broken, "file"))
		}
		c.print(c.out, "\n")
		if files > 1 {
			c.print(c.out, "files by kind: %s\nexpectations by question: %s\n", c.kinds, c.questions)
		}
	}
	switch {
	case c.failed != nil:
		return c.failed
	case c.broken > 0:
		return status(statusRefuse)
	case c.unmet > 0:
		return status(statusUnmet)
	default:
		return nil
	}
}

func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}
