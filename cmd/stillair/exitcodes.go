package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"
)

// exitCodesTopic is the help topic on exit codes; it has nothing to run.
func exitCodesTopic() *cobra.Command {
	var b strings.Builder
	b.WriteString("What the exit code says; the same for every command:\n\n")
	for _, e := range exitMeaning {
		fmt.Fprintf(&b, "  %3d  %s\n", e.code, strings.ReplaceAll(e.meaning, "\n", "\n       "))
	}
	b.WriteString("\nWith --json the same is in the object on standard output: \"verdict\" of a result,\n" +
		"or \"error\" with \"code\", \"exit_code\", \"message\" and \"findings\".")
	return &cobra.Command{
		Use:     "exit-codes",
		Short:   "what the exit code says",
		Long:    b.String(),
		Example: "  stillair check panel.yaml; echo $?",
	}
}
