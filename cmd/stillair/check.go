package main

import (
	"bytes"
	"fmt"

	"github.com/spf13/cobra"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/table"
)

// checkOptions are the flags of the check command.
type checkOptions struct {
	json, verbose bool
	loads         []string
	output        string
}

func (a *app) checkCommand() *cobra.Command {
	var o checkOptions
	cmd := &cobra.Command{
		Use:   "check CASE",
		Short: "Solve a case and judge its temperatures",
		Example: `  stillair check panel.yaml
  stillair check panel.yaml --load "summer sun" --verbose
  stillair check panel.yaml --json -o panel.json
  stillair check - < panel.yaml`,
		Long: `Reads the case file (- is standard input), solves the heat balance of every load case, judges
the temperatures against the limits and prints the report: the governing load case in full,
the others in one line each.

With --json exactly one JSON object goes to standard output, errors included; with -o a result
goes to the file as well. "stillair help exit-codes" says what the exit code means.`,
		Args:              takes(1, 1, "a case file, or - for standard input"),
		ValidArgsFunction: yamlFiles,
		RunE:              func(cmd *cobra.Command, args []string) error { return a.check(cmd, args[0], o) },
	}
	cmd.Flags().BoolVar(&o.json, "json", false, "one JSON object instead of the report")
	cmd.Flags().BoolVarP(&o.verbose, "verbose", "v", false, "every load case in full, every effect and caution")
	cmd.Flags().StringArrayVar(&o.loads, "load", nil, "compute only the load case `NAME`; may be repeated")
	cmd.Flags().StringVarP(&o.output, "output", "o", "", "write the result to `FILE`")
	_ = cmd.RegisterFlagCompletionFunc("load", loadNames) // fails only for a flag that was just added
	addSettingFlags(cmd, "units")
	return cmd
}

func (a *app) check(cmd *cobra.Command, path string, opt checkOptions) error {
	out, err := a.compute(cmd, path, opt.output, opt.loads)
	if err != nil {
		return err
	}
	result, err := a.render(out, opt)
	if err != nil {
		return err
	}
	toFile := opt.output != "" && opt.output != "-" && exitOf(out) != exitInput
	if toFile {
		if err := a.out.save(opt.output, result); err != nil {
			return err
		}
	}
	if opt.json || !toFile {
		if err := a.out.print(result); err != nil {
			return err
		}
	}
	if opt.output != "" && opt.output != "-" && !toFile {
		fmt.Fprintf(a.err, "stillair: a load case has no result; %s was not written.\n", opt.output)
	}
	return verdictError(out)
}

// compute does what check and note share: settings, case file, solution.
func (a *app) compute(cmd *cobra.Command, path, output string, loads []string) (*checks.Outcome, error) {
	s, err := a.loadSettings(cmd.Flags())
	if err != nil {
		return nil, err
	}
	if err := refuseInput(output, path); err != nil {
		return nil, err
	}
	f, err := a.readCase(path, s)
	if err != nil {
		return nil, err
	}
	if err := keepLoads(f, loads); err != nil {
		return nil, err
	}
	return checks.Run(f, thisProgram()), nil
}

// warn tells on standard error what the case file reader warned of.
func (a *app) warn(out *checks.Outcome) {
	for _, w := range out.File.Warnings {
		fmt.Fprintln(a.err, describe(w))
	}
}

// render makes the JSON object or the report.
func (a *app) render(out *checks.Outcome, opt checkOptions) ([]byte, error) {
	if opt.json {
		a.warn(out)
		data, err := checks.JSON(out)
		if err != nil {
			return nil, fmt.Errorf("the result cannot be written as JSON: %w", err)
		}
		return data, nil
	}
	toScreen := opt.output == "" || opt.output == "-"
	style := table.Options{Units: unit.SystemOf(out.File.Cases[0].Units), Verbose: opt.verbose, Partial: partial(opt.loads)}
	if toScreen {
		style.Color, style.Width = a.color(), a.wide
	}
	var b bytes.Buffer
	err := table.Check(&b, out, style)
	return b.Bytes(), err
}
