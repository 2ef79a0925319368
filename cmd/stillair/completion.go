package main

import (
	"bytes"
	"slices"

	"github.com/spf13/cobra"
)

var shells = []string{"bash", "zsh", "fish", "powershell"}

func (a *app) completionCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "completion SHELL",
		Short:             "Write the completion script of a shell",
		Example:           "  stillair completion bash > stillair.bash",
		Long:              "Writes a script that lets bash, zsh, fish or powershell complete commands, flags, files\nand the names of starters, methods, finishes, materials and limits.",
		Args:              takes(1, 1, "the name of a shell: bash, zsh, fish or powershell"),
		ValidArgsFunction: oneOf(func() []string { return slices.Clone(shells) }),
		RunE: func(cmd *cobra.Command, args []string) error {
			var b bytes.Buffer
			if err := writeCompletion(cmd.Root(), args[0], &b); err != nil {
				return err
			}
			return a.out.print(b.Bytes())
		},
	}
}

func writeCompletion(root *cobra.Command, shell string, b *bytes.Buffer) error {
	switch shell {
	case "bash":
		return root.GenBashCompletionV2(b, true)
	case "zsh":
		return root.GenZshCompletion(b)
	case "fish":
		return root.GenFishCompletion(b, true)
	case "powershell":
		return root.GenPowerShellCompletionWithDesc(b)
	}
	return usageError(didYouMean(shell, shells), "There is no completion for %q.", shell)
}
