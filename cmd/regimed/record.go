package main

import (
	"context"
	"errors"
	"fmt"
	"time"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/store"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// withRecords runs something with the records of a directory, if one is named.
func withRecords(ctx context.Context, dir string, config *api.Config, run func() error) error {
	if dir == "" {
		return run()
	}
	records, err := openRecords(ctx, dir)
	if err != nil {
		return err
	}
	config.Records = records
	return errors.Join(run(), records.Close())
}

func openRecords(ctx context.Context, dir string) (store.Store, error) {
	records, err := store.OpenSQLite(ctx, dir)
	if err == nil {
		return records, nil
	}
	return nil, aboutRecords(dir, err)
}

func aboutRecords(dir string, err error) error {
	return fmt.Errorf("the records in %s: %w", dir, plainCause(err))
}

// plainCause leaves out what a person at a terminal knows already.
func plainCause(err error) error {
	var e *store.Error
	if !errors.As(err, &e) {
		return err
	}
	if e.Reason == store.Damaged {
		return fmt.Errorf("the file is damaged or no file of records; it was left as it is (%w)", e.Cause)
	}
	return e.Cause
}

func newRecord() *cobra.Command {
	var data string
	var about recordTexts
	options := whatif.Options{Explore: true}
	cmd := &cobra.Command{
		Use:   "record FILE|-",
		Short: "Answer a case and keep the answer",
		Long: `Answers a case as classify does, keeps the answer in the records of a directory,
and prints the id of the record: the digest of the case. The service that is
started with the same --data shows it at /v1/records/ID, and may be running.

A case has one record: where it has one already, that one stays as it is, with
the title, the tags and the author that it was given, and its id is printed.`,
		Example: `  regimed record --data /var/lib/regimed riser.yaml
  regimed record --data records --title "Riser, rev. B" --tag riser --tag 2026 --author "M. Vane" riser.yaml`,
		Args:              arguments(1, 1, "name one file, or - for standard input"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, args []string) error {
			if data == "" {
				return &usageError{errors.New("--data names the directory of the records")}
			}
			if err := knownSamples(options.Samples); err != nil {
				return err
			}
			d, err := readDocument(args[0], cmd.InOrStdin())
			if err != nil {
				return said(cmd, err)
			}
			a, err := d.classify()
			if err != nil {
				return said(cmd, err)
			}
			a.Release() // it is known to hold; what is kept is made with the record
			return about.keep(cmd, data, d.raw, options)
		},
	}
	cmd.Flags().StringVar(&data, "data", "", "directory of the records, made where it is missing")
	cmd.Flags().StringVar(&about.Title, "title", "", "title of the record (default that of the case)")
	cmd.Flags().StringArrayVar(&about.Tags, "tag", nil, "tag of the record; may be given several times")
	cmd.Flags().StringVar(&about.Author, "author", "", "who made the record")
	cmd.Flags().IntVar(&options.Samples, "samples", whatif.DefaultSamples, "most draws of uncertain inputs")
	cmd.Flags().BoolVar(&options.Explore, "what-if", true, "say what would change the answer")
	for _, name := range []string{"title", "tag", "author", "samples"} {
		completeFlag(cmd, name, cobra.NoFileCompletions)
	}
	return cmd
}

// recordTexts is what is said about a record, as the service takes it.
type recordTexts struct {
	Case   jsontext.Value `json:"case"`
	Title  string         `json:"title,omitzero"`
	Tags   []string       `json:"tags,omitempty"`
	Author string         `json:"author,omitzero"`
}

func (r *recordTexts) keep(cmd *cobra.Command, dir string, raw []byte, options whatif.Options) error {
	r.Case = raw
	body, err := json.Marshal(r)
	if err != nil {
		return err
	}
	wanted, violations, err := api.ReadSubmission(body, kind.Schema())
	if err != nil {
		return err
	}
	if len(violations) > 0 {
		return said(cmd, listed(violations))
	}
	wanted.Sent = raw // as it is in the file
	records, err := openRecords(cmd.Context(), dir)
	if err != nil {
		return err
	}
	wanted.Ask = options
	kept, isNew, violations, err := api.Keep(cmd.Context(), records, wanted, time.Now())
	if closed := records.Close(); err == nil {
		err = closed
	}
	if err != nil {
		return aboutRecords(dir, err)
	}
	if len(violations) > 0 {
		return said(cmd, listed(violations))
	}
	if !isNew {
		cmd.PrintErrf("The case has a record of %s already; it stays as it is.\n", kept.Created.Format(time.DateOnly))
	}
	_, err = fmt.Fprintln(cmd.OutOrStdout(), kept.ID)
	return err
}

// listed says violations that have no line in a file.
func listed(violations []input.Violation) error {
	p := &problem{}
	for _, v := range violations {
		p.sentences = append(p.sentences, v.Pointer+": "+string(v.Code)+": "+v.Sentence)
	}
	return p
}
