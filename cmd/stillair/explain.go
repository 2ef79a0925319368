package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"stillair/checks/casefile"
)

func (a *app) explainCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "explain [CODE]",
		Short:             "Explain an error code",
		Example:           "  stillair explain\n  stillair explain " + casefile.Codes()[0],
		Long:              "Says what an error code means and what to do. Without CODE it lists them all.",
		Args:              takes(0, 1, ""),
		ValidArgsFunction: oneOf(allCodes),
		RunE: func(_ *cobra.Command, args []string) error {
			if len(args) == 0 {
				return a.out.print([]byte(codeList()))
			}
			code := strings.ToUpper(args[0])
			text, ok := explain(code)
			if !ok {
				return usageError(didYouMean(code, allCodes()), "There is no error code %q.", args[0])
			}
			return a.out.print([]byte(code + "\n\n" + strings.TrimSpace(text) + "\n"))
		},
	}
}

// codeList is every code with the first sentence of its explanation.
func codeList() string {
	var b strings.Builder
	for _, code := range allCodes() {
		text, _ := explain(code)
		text = strings.TrimPrefix(text, "Warning. ")
		first, _, _ := strings.Cut(strings.ReplaceAll(text, "\n", " "), ". ")
		fmt.Fprintf(&b, "%s  %s.\n", code, strings.TrimSuffix(first, "."))
	}
	return b.String()
}

func allCodes() []string {
	return append(casefile.Codes(), codeSettingsSyntax, codeSettingsUnknown, codeSettingsValue)
}

func explain(code string) (string, bool) {
	if text, ok := settingsCodes[code]; ok {
		return text, true
	}
	return casefile.Explain(code)
}
