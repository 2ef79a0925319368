package main

import (
	"bytes"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"stillair/checks"
	"stillair/templates/calcnote"
)

func (a *app) noteCommand() *cobra.Command {
	var output string
	cmd := &cobra.Command{
		Use:     "note CASE -o FILE.pdf",
		Short:   "Write the calculation note as PDF",
		Example: "  stillair note panel.yaml -o panel-note.pdf",
		Long: `Computes the case as check does and writes the calculation note: verdict, inputs with their
sources, drawing, equations with the numbers put in, checks, second method, cautions, and the
case file as an attachment. The note is written whether the limits are met or not; it is not
written when a load case has no result. The exit code is that of check.`,
		Args:              takes(1, 1, "a case file, or - for standard input"),
		ValidArgsFunction: yamlFiles,
		RunE: func(cmd *cobra.Command, args []string) error {
			if output == "" {
				return usageError("For example: stillair note "+args[0]+" -o note.pdf", "The note needs a file to go to.")
			}
			if output == "-" && a.wide > 0 {
				return usageError("Name a file, or send it through a pipe.", "A PDF is nothing for a terminal.")
			}
			return a.note(cmd, args[0], output)
		},
	}
	cmd.Flags().StringVarP(&output, "output", "o", "", "write the note to `FILE`; - is standard output")
	addSettingFlags(cmd, "units", "company", "logo", "paper")
	return cmd
}

func (a *app) note(cmd *cobra.Command, path, output string) error {
	s, err := a.loadSettings(cmd.Flags())
	if err != nil {
		return err
	}
	out, err := a.compute(cmd, path, output, nil)
	if err != nil {
		return err
	}
	if exitOf(out) == exitInput {
		return noNote(out)
	}
	a.warn(out)
	var pdf bytes.Buffer
	var replaced []string
	if err := calcnote.Write(&pdf, out, calcnote.Options{Company: s.Company, Logo: s.logo, Paper: s.Paper, Replaced: &replaced}); err != nil {
		return fmt.Errorf("the note cannot be made: %w", err)
	}
	if len(replaced) > 0 {
		fmt.Fprintf(a.err, "warning: the font of the note lacks %s; a replacement mark stands there.\n", strings.Join(replaced, ", "))
	}
	if err := a.deliver(out, pdf.Bytes(), output); err != nil {
		return err
	}
	return verdictError(out)
}

// deliver writes the note where it was asked for and says so.
func (a *app) deliver(out *checks.Outcome, pdf []byte, output string) error {
	if output == "-" {
		return a.out.print(pdf)
	}
	if err := a.out.save(output, pdf); err != nil {
		return err
	}
	return a.out.print([]byte(noteSummary(out, output)))
}

// noNote tells which load cases have no result.
func noNote(out *checks.Outcome) error {
	var lines []string
	for _, l := range out.Loads {
		if l.Status != checks.Converged {
			lines = append(lines, fmt.Sprintf("%s: %s", l.Status, l.Message))
		}
	}
	return inputError(strings.Join(lines, "\n  "), "No note was written: %s without a result.", count(len(lines), "load case"))
}

// noteSummary says what the note found, so that an exit code 1 does not read
// like a crash.
func noteSummary(out *checks.Outcome, output string) string {
	governs := ""
	if out.Governs != "" {
		governs = fmt.Sprintf(" (governing load case: %s)", printable(out.Governs))
	}
	text := fmt.Sprintf("Wrote %s. Verdict: %s%s.\n", output, strings.ToUpper(string(out.Verdict)), governs)
	if exitOf(out) == exitLimit {
		text += "The calculated result does not meet a limit, so the exit code is 1.\n"
	}
	return text
}
