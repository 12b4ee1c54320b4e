package main

import (
	"fmt"
	"runtime"

	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/render"
)

func newSchema() *cobra.Command {
	return &cobra.Command{
		Use:   "schema",
		Short: "Print the JSON Schema of a case",
		Long: `Prints the JSON Schema of a case, with which an editor checks and completes
cases while they are written. The program itself checks more: dimensions, kinds
of quantity, and what fields must agree on.`,
		Example: `  regimed schema > case.schema.json`,
		Args:    arguments(0, 0, "this command takes none"),
		RunE: func(cmd *cobra.Command, _ []string) error {
			_, err := cmd.OutOrStdout().Write(api.CaseSchema())
			return err
		},
	}
}

func newVersion() *cobra.Command {
	return &cobra.Command{
		Use:   "version",
		Short: "Print the version and the digest of the catalogue",
		Long: `Prints the version of the program, the digest of the assumptions, classes and
presets in force, and the version of Go that built it. Two answers with the same
digest were judged by the same rules.`,
		Example: `  regimed version`,
		Args:    arguments(0, 0, "this command takes none"),
		RunE: func(cmd *cobra.Command, _ []string) error {
			_, err := fmt.Fprintf(cmd.OutOrStdout(), "regimed %s\ncatalogue %s\nbuilt with %s\n", render.Version, render.Catalogue(), runtime.Version())
			return err
		},
	}
}
