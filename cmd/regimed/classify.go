package main

import (
	"fmt"
	"os"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/whatif"
)

// formats are the forms of an answer; the first is the default. Those beside text
// and JSON are the service's.
var formats = []string{"text", "json", "html", "md", "csv", "svg", "png", "strip"}

func newClassify() *cobra.Command {
	var format, out string
	var fields []string
	var page render.TextOptions
	options := whatif.Options{Explore: true}
	cmd := &cobra.Command{
		Use:   "classify FILE|-",
		Short: "Answer a case: the cheapest class of model that holds, and why",
		Long: `Reads a case in JSON or YAML, from a file or, for -, from standard input, and
prints the answer: as text for people, or as JSON, byte for byte what the
service answers to the same case. The other forms are for reports: html is a page
that prints on two sheets of A4, md goes into a wiki, csv into a spreadsheet; svg
and png are the chart of the margins, and strip is a summary to put on a page.

The ending of the name says which of the two it is: .json, .yaml or .yml. Without
one a document that begins with { is JSON, and any other YAML. YAML is read by
the core schema of its version 1.2: 2 m is a string, yes and on are strings.

Where inputs are uncertain, as in speed: 1.4 m/s +- 20 %, the case is judged for
up to --samples draws of them, fewer where the probability of every class is
known to 1 % sooner: the answer then says how its numbers spread and how likely
each verdict and class is. --what-if=false leaves out what would change the
answer, which takes most of the time.

What is wrong with a case is said all at once, one violation a line: file, line,
JSON Pointer, code, and a sentence that says what would be right. Status 2.`,
		Example: `  regimed classify riser.yaml
  regimed classify --format json riser.json
  regimed classify --format json --fields recommendation,findings riser.yaml
  regimed classify --format html -o riser.html riser.yaml
  generate-case | regimed classify -`,
		Args:              arguments(1, 1, "name one file, or - for standard input"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, args []string) error {
			write, only, err := writerOf(format, fields, page)
			if err != nil {
				return err
			}
			if err := knownSamples(options.Samples); err != nil {
				return err
			}
			d, err := readDocument(args[0], cmd.InOrStdin())
			if err != nil {
				return said(cmd, err)
			}
			options.Explore = options.Explore && only.Explored()
			a, err := d.explore(cmd.Context(), options)
			if err != nil {
				return said(cmd, err)
			}
			body, err := write(a)
			if err != nil {
				return err
			}
			if out == "" {
				_, err = cmd.OutOrStdout().Write(body)
				return err
			}
			return os.WriteFile(out, body, 0o644)
		},
	}
	cmd.Flags().StringVarP(&format, "format", "f", formats[0], "form of the answer: "+strings.Join(formats, ", "))
	cmd.Flags().StringVarP(&out, "output", "o", "", "write the answer into this file (default: standard output)")
	cmd.Flags().StringSliceVar(&fields, "fields", nil, "members of the JSON answer, separated by commas (default all)")
	cmd.Flags().IntVar(&options.Samples, "samples", whatif.DefaultSamples, "most draws of uncertain inputs")
	cmd.Flags().BoolVar(&options.Explore, "what-if", true, "say what would change the answer")
	cmd.Flags().IntVar(&page.Width, "width", 96, "columns of the text, from 72 to 160")
	cmd.Flags().BoolVar(&page.Colour, "colour", false, "set the text in the colours of a terminal")
	completeFlag(cmd, "format", completeFrom(func() []string { return formats }))
	completeFlag(cmd, "fields", completeFrom(render.FieldNames))
	completeFlag(cmd, "samples", cobra.NoFileCompletions)
	completeFlag(cmd, "width", cobra.NoFileCompletions)
	return cmd
}

// said prints what is wrong with a document as it stands, one a line.
func said(cmd *cobra.Command, err error) error {
	cmd.PrintErrln(err)
	return status(statusRefuse)
}

// writerOf returns what writes an answer in a format, and the members that it
// writes.
func writerOf(format string, fields []string, page render.TextOptions) (func(*regime.Answer) ([]byte, error), render.Fields, error) {
	if err := knownFormat(format, formats); err != nil {
		return nil, 0, err
	}
	if format == "json" {
		only, err := render.ParseFields(fields)
		if err != nil {
			return nil, 0, &usageError{err}
		}
		return func(a *regime.Answer) ([]byte, error) { return render.AppendJSON(nil, a, only), nil }, only, nil
	}
	if len(fields) > 0 {
		return nil, 0, &usageError{fmt.Errorf("--fields needs --format json")}
	}
	if format == "text" {
		return func(a *regime.Answer) ([]byte, error) { return render.AppendText(nil, a, page), nil }, render.All, nil
	}
	return func(a *regime.Answer) ([]byte, error) { return api.Draw(format, a) }, render.All, nil
}

func knownSamples(n int) error {
	if n >= whatif.MinSamples && n <= whatif.MaxSamples {
		return nil
	}
	return &usageError{fmt.Errorf("--samples is from %d to %d, not %d", whatif.MinSamples, whatif.MaxSamples, n)}
}

func knownFormat(format string, formats []string) error {
	if slices.Contains(formats, format) {
		return nil
	}
	return &usageError{fmt.Errorf("no format is called %q: %s", format, strings.Join(formats, " or "))}
}
