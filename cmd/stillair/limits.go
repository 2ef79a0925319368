package main

import (
	"regexp"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"stillair/checks/limit"
)

func (a *app) limitsCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "limits [WORD...]",
		Short:             "List limits and thresholds with their sources",
		Example:           "  stillair limits\n  stillair limits burn plastic\n  stillair limits C1055-60C",
		Long:              "Lists the limits a case can name (rule: ID), burn thresholds and the data behind them, each a\nquotation with its source. They carry no force of their own: read the standard.\n\nMaterials of a touch limit (touch: NAME): " + strings.Join(limit.TouchMaterials(), "; ") + ".",
		ValidArgsFunction: oneOf(func() []string { return limitList().ids() }),
		RunE:              func(_ *cobra.Command, args []string) error { return a.show(limitList(), args) },
	}
}

func limitList() *listing {
	l := &listing{what: "limit", heads: []string{"id", "rule", "limit", "confidence"},
		foot: "\"yes\" under rule: a case can name it as a limit. The others are data behind the methods."}
	for _, e := range limit.All() {
		rule := ""
		if e.Usable() {
			rule = "yes"
		}
		l.rows = append(l.rows, listRow{e.ID, []string{e.ID, rule, readableTimes(e.Text()), e.Confidence},
			[][2]string{{"id", e.ID}, {"says", readableTimes(e.Text())}, {"usable as rule", rule}, {"standard", e.Standard}, {"clause", e.Clause},
				{"conditions", e.Conditions}, {"quoted from", e.Source}, {"verified by", e.VerifiedBy},
				{"confidence", e.Confidence}, {"notes", e.Notes}}})
	}
	return l
}

var seconds = regexp.MustCompile(`\b([0-9]+)([ \x{a0}])s\b`)

// readableTimes writes whole minutes and hours for long times in seconds.
func readableTimes(text string) string {
	return seconds.ReplaceAllStringFunc(text, func(s string) string {
		m := seconds.FindStringSubmatch(s)
		n, err := strconv.Atoi(m[1])
		switch {
		case err != nil || n < 60 || n%60 != 0:
			return s
		case n%3600 == 0:
			return strconv.Itoa(n/3600) + m[2] + "h"
		}
		return strconv.Itoa(n/60) + m[2] + "min"
	})
}
