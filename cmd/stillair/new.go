package main

import (
	"cmp"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"stillair/checks/casefile"
	"stillair/templates/starter"
)

// schemaFile is the name the first line of every starter points to.
const schemaFile = "stillair.schema.json"

func (a *app) newCommand() *cobra.Command {
	var path string
	var force, schema bool
	cmd := &cobra.Command{
		Use:               "new [KIND]",
		Short:             "Write a commented starter case",
		Example:           "  stillair new panel\n  stillair new steam-pipe -o line-3001.yaml --schema",
		Args:              takes(0, 1, ""),
		ValidArgsFunction: oneOf(starter.Names),
		RunE: func(_ *cobra.Command, args []string) error {
			if len(args) == 0 {
				return a.out.print([]byte(kindList()))
			}
			return a.writeStarter(args[0], cmp.Or(path, args[0]+".yaml"), force, schema)
		},
	}
	cmd.Long = "Writes a case file to begin with. Every line in it is explained. Without KIND it lists them:\n\n" + kindList()
	cmd.Flags().StringVarP(&path, "output", "o", "", "write to `FILE` instead of KIND.yaml; - is standard output")
	cmd.Flags().BoolVar(&force, "force", false, "write over a file that exists")
	cmd.Flags().BoolVar(&schema, "schema", false, "also write "+schemaFile+" beside it, for editors that check while you type")
	return cmd
}

func kindList() string {
	longest := 0
	for _, name := range starter.Names() {
		longest = max(longest, len(name))
	}
	var b strings.Builder
	for _, k := range starter.Kinds() {
		fmt.Fprintf(&b, "  %-*s  %s\n", longest, k.Name, k.About)
	}
	return b.String()
}

func (a *app) writeStarter(kind, path string, force, schema bool) error {
	text, ok := starter.Get(kind)
	if !ok {
		return usageError(didYouMean(kind, starter.Names()), "There is no starter case %q.", kind)
	}
	if path == "-" {
		return a.out.print(text)
	}
	if _, err := os.Stat(path); err == nil && !force {
		return usageError("Choose another name with -o, or write over it with --force.", "%s exists already.", path)
	}
	if err := a.out.save(path, text); err != nil {
		return err
	}
	said := "Wrote " + path
	if schema {
		beside := filepath.Join(filepath.Dir(path), schemaFile)
		if err := a.out.save(beside, casefile.Schema()); err != nil {
			return err
		}
		said += " and " + beside
	}
	return a.out.print([]byte(fmt.Sprintf("%s. Next: stillair check %s\n", said, path)))
}
