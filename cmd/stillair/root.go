package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// helpTemplate leads with the example: most people copy before they read.
const helpTemplate = `{{if .HasExample}}Example:
{{.Example}}

{{end}}{{with (or .Long .Short)}}{{. | trimTrailingWhitespaces}}

{{end}}{{if or .Runnable .HasSubCommands}}{{.UsageString}}{{end}}`

const usageTemplate = `Usage:{{if .Runnable}}
  {{.UseLine}}{{end}}{{if .HasAvailableSubCommands}}
  {{.CommandPath}} COMMAND

Commands:{{range .Commands}}{{if .IsAvailableCommand}}
  {{rpad .Name .NamePadding}} {{.Short}}{{end}}{{end}}{{end}}{{if .HasAvailableLocalFlags}}

Flags:
{{.LocalFlags.FlagUsages | trimTrailingWhitespaces}}{{end}}{{if .HasAvailableInheritedFlags}}

Flags of every command:
{{.InheritedFlags.FlagUsages | trimTrailingWhitespaces}}{{end}}{{if .HasHelpSubCommands}}

Help topics:{{range .Commands}}{{if .IsAdditionalHelpTopicCommand}}
  {{rpad .Name .NamePadding}} {{.Short}}{{end}}{{end}}{{end}}
`

// root builds the command tree.
func (a *app) root() *cobra.Command {
	root := &cobra.Command{
		Use:   "stillair",
		Short: "Will it shed its heat without a fan?",
		Long: `stillair works out how hot a body gets that sheds its heat by still air and
radiation alone, whether that is allowed, and writes a calculation note that a
second engineer can redo by hand.`,
		Example: `  stillair new panel
  stillair check panel.yaml
  stillair note panel.yaml -o panel-note.pdf`,
		Version:           programVersion(),
		SilenceUsage:      true,
		SilenceErrors:     true,
		DisableAutoGenTag: true,
		Args:              cobra.ArbitraryArgs,
		CompletionOptions: cobra.CompletionOptions{DisableDefaultCmd: true},
	}
	root.RunE = func(cmd *cobra.Command, args []string) error {
		if len(args) > 0 {
			return unknownCommand(root, args[0])
		}
		return cmd.Help()
	}
	a.dress(root)
	root.AddCommand(a.checkCommand(), a.noteCommand(), a.newCommand(), a.methodsCommand(), a.finishesCommand(),
		a.materialsCommand(), a.limitsCommand(), a.schemaCommand(), a.explainCommand(), a.settingsCommand(),
		a.versionCommand(), a.completionCommand(), exitCodesTopic())
	root.SetHelpCommand(helpCommand(root))
	return root
}

// dress gives the tree its help texts, error messages and common flags.
func (a *app) dress(root *cobra.Command) {
	root.SetHelpTemplate(helpTemplate)
	root.SetUsageTemplate(usageTemplate)
	root.SetVersionTemplate("{{.Name}} {{.Version}}\n")
	root.SetFlagErrorFunc(a.flagError)
	root.PersistentFlags().BoolVar(&a.noColor, "no-color", false, "no colour, as the variable NO_COLOR does")
	root.PersistentFlags().StringVar(&a.file, "settings", "", "settings `FILE` instead of the one in the user's configuration folder")
}

// helpCommand shows the help of a command or topic.
func helpCommand(root *cobra.Command) *cobra.Command {
	return &cobra.Command{
		Use:     "help [COMMAND | TOPIC]",
		Short:   "Help about a command or topic",
		Example: "  stillair help check\n  stillair help exit-codes",
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			return commandNames(root), cobra.ShellCompDirectiveNoFileComp
		},
		RunE: func(_ *cobra.Command, args []string) error {
			target := root
			for _, word := range args {
				sub := child(target, word)
				if sub == nil {
					return unknownCommand(target, word)
				}
				target = sub
			}
			target.InitDefaultHelpFlag()
			return target.Help()
		},
	}
}

func child(parent *cobra.Command, name string) *cobra.Command {
	for _, c := range parent.Commands() {
		if c.Name() == name {
			return c
		}
	}
	return nil
}

func commandNames(parent *cobra.Command) []string {
	var names []string
	for _, c := range parent.Commands() {
		if !c.Hidden {
			names = append(names, c.Name())
		}
	}
	return names
}

func unknownCommand(parent *cobra.Command, typed string) error {
	help := didYouMean(typed, commandNames(parent))
	if help == "" {
		help = `"stillair --help" lists the commands.`
	}
	return usageError(help, "There is no command %q.", typed)
}

// flagError tells about a flag that cannot be understood, with the nearest
// one. Before a command that does not exist, that is the message instead.
func (a *app) flagError(cmd *cobra.Command, err error) error {
	if !cmd.HasParent() {
		for _, word := range a.args {
			if !strings.HasPrefix(word, "-") {
				return unknownCommand(cmd, word)
			}
		}
	}
	var unknown *pflag.NotExistError
	if !errors.As(err, &unknown) {
		return usageError(fmt.Sprintf("%q tells how to use it.", cmd.CommandPath()+" --help"), "%s.", capital(err.Error()))
	}
	var names []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) { names = append(names, "--"+f.Name) })
	typed := "--" + unknown.GetSpecifiedName()
	if unknown.GetSpecifiedShortnames() != "" {
		typed = "-" + unknown.GetSpecifiedName()
	}
	return usageError(didYouMean(typed, names), "%s has no flag %s.", cmd.CommandPath(), typed)
}

func capital(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// takes is an argument rule with a message that says what is missing.
func takes(least, most int, what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		help := "Usage: " + cmd.UseLine()
		switch {
		case len(args) < least:
			return usageError(help, "%s needs %s.", cmd.CommandPath(), what)
		case len(args) > most:
			return usageError(help, "%s does not know what to do with %q.", cmd.CommandPath(), args[most])
		}
		return nil
	}
}

// yamlFiles completes case files.
func yamlFiles(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) > 0 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	return []string{"yaml", "yml"}, cobra.ShellCompDirectiveFilterFileExt
}

// oneOf completes the first argument out of a list.
func oneOf(list func() []string) cobra.CompletionFunc {
	return func(_ *cobra.Command, args []string, typed string) ([]string, cobra.ShellCompDirective) {
		if len(args) > 0 {
			return nil, cobra.ShellCompDirectiveNoFileComp
		}
		fits := slices.DeleteFunc(list(), func(w string) bool { return !strings.HasPrefix(w, typed) })
		return fits, cobra.ShellCompDirectiveNoFileComp
	}
}
