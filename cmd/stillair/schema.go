package main

import (
	"github.com/spf13/cobra"

	"stillair/checks/casefile"
)

func (a *app) schemaCommand() *cobra.Command {
	var path string
	cmd := &cobra.Command{
		Use:               "schema",
		Short:             "Print the JSON Schema of the case file",
		Example:           "  stillair schema -o " + schemaFile,
		Long:              "Prints the JSON Schema of the case file. Editors use it to complete and check a case while\nyou type; it needs no network. The first line of every starter case points to it.",
		Args:              takes(0, 0, ""),
		ValidArgsFunction: cobra.NoFileCompletions,
		RunE: func(*cobra.Command, []string) error {
			if path == "" || path == "-" {
				return a.out.print(casefile.Schema())
			}
			return a.out.save(path, casefile.Schema())
		},
	}
	cmd.Flags().StringVarP(&path, "output", "o", "", "write to `FILE` instead of standard output")
	return cmd
}
