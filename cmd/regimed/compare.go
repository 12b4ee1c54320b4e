package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/similar"
)

func newCompare() *cobra.Command {
	var format string
	var tolerance float64
	var page render.TextOptions
	cmd := &cobra.Command{
		Use:   "compare A B",
		Short: "Compare two cases: which groups agree, and which verdicts differ",
		Long: `Answers two cases and holds b against a: the dimensionless groups that both have,
with the factor from a to b, kept or distorted; those that only one has; the
assumptions that are judged differently; and the axes of the recommendation
that differ. The two may be of different kinds of structure.

Model and prototype, two operating points, before and after a change: what is
listed as distorted is what differs between them.`,
		Example: `  regimed compare prototype.yaml model.yaml
  regimed compare --tolerance 0.1 before.json after.json
  regimed compare --format json summer.yaml winter.yaml`,
		Args:              arguments(2, 2, "name two files; one of them may be - for standard input"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := knownFormat(format, listFormats); err != nil {
				return err
			}
			if err := knownTolerance(tolerance); err != nil {
				return err
			}
			if args[0] == "-" && args[1] == "-" {
				return &usageError{fmt.Errorf("only one of the two can be read from standard input")}
			}
			var answers [2]*regime.Answer
			failed := false
			for i, name := range args {
				a, err := answerOf(cmd, name)
				if err != nil {
					cmd.PrintErrln(err)
					failed = true
				}
				answers[i] = a
			}
			if failed {
				return status(statusRefuse)
			}
			c := similar.Compare(answers[0], answers[1], tolerance)
			if format == "json" {
				return printRecord(cmd, api.NewComparisonRecord(c))
			}
			_, err := cmd.OutOrStdout().Write(render.AppendComparison(nil, c, page))
			return err
		},
	}
	addCompareFlags(cmd, listFormats, &format, &tolerance, &page)
	return cmd
}

// addCompareFlags adds the flags of what compares two answers; forms are those of
// its answer, the first the default.
func addCompareFlags(cmd *cobra.Command, forms []string, format *string, tolerance *float64, page *render.TextOptions) {
	cmd.Flags().StringVarP(format, "format", "f", forms[0], "form of the answer: text or json")
	cmd.Flags().Float64Var(tolerance, "tolerance", similar.Kept, "relative difference up to which a group counts as kept")
	cmd.Flags().IntVar(&page.Width, "width", 96, "columns of the text, from 80 to 160")
	cmd.Flags().BoolVar(&page.Colour, "colour", false, "set the text in the colours of a terminal")
	completeFlag(cmd, "format", completeFrom(func() []string { return forms }))
	completeFlag(cmd, "width", cobra.NoFileCompletions)
	completeFlag(cmd, "tolerance", cobra.NoFileCompletions)
}

func knownTolerance(x float64) error {
	if x >= 0 && x <= 1 {
		return nil
	}
	return &usageError{fmt.Errorf("--tolerance is a number between 0 and 1, not %g", x)}
}

// answerOf reads a file and answers its case.
func answerOf(cmd *cobra.Command, name string) (*regime.Answer, error) {
	d, err := readDocument(name, cmd.InOrStdin())
	if err != nil {
		return nil, err
	}
	return d.classify()
}

// printRecord prints a record as the service sends it.
func printRecord(cmd *cobra.Command, record any) error {
	data, err := appendRecord(nil, record)
	if err != nil {
		return err
	}
	_, err = cmd.OutOrStdout().Write(data)
	return err
}
