package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"stillair/freeconv"
)

func (a *app) methodsCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "methods [ID]",
		Short:             "List correlations of free convection with source and range",
		Example:           "  stillair methods\n  stillair methods sphere\n  stillair methods churchill-chu-1975-plate",
		Long:              "Lists the published correlations a case can name (methods: {SITUATION: ID}). Words narrow the\nlist; a single match is shown with its citation, range, scatter and how far it was verified.",
		ValidArgsFunction: oneOf(func() []string { return methodList().ids() }),
		RunE:              func(_ *cobra.Command, args []string) error { return a.show(methodList(), args) },
	}
}

func methodList() *listing {
	l := &listing{what: "method", heads: []string{"id", "used for", "Ra", "scatter", "verification"}}
	for _, c := range freeconv.All() {
		l.rows = append(l.rows, listRow{c.ID,
			[]string{c.ID, kindText(c), tenPowers(c.RaRange()), scatter(c), string(c.Verification)},
			[][2]string{{"id", c.ID}, {"name", c.Name}, {"used for", kindText(c)}, {"default for", defaultText(c)},
				{"citation", c.Citation}, {"equation", plainEquation(c.Equation)}, {"length", string(c.Length)},
				{"properties at", propertyText(c)}, {"Ra", tenPowers(c.RaRange())}, {"Pr", tenPowers(c.PrRange())},
				{"scatter", scatter(c)}, {"scatter from", c.ScatterNote}, {"verification", string(c.Verification)}, {"notes", tenPowers(c.Note)}}})
	}
	return l
}

func kindText(c *freeconv.Correlation) string {
	parts := make([]string, len(c.Kinds))
	for i, k := range c.Kinds {
		parts[i] = string(k)
	}
	return strings.Join(parts, "; ")
}

// defaultText lists the situations a correlation is the default for, and why.
func defaultText(c *freeconv.Correlation) string {
	var parts []string
	for _, k := range c.Kinds {
		if d, why := freeconv.Default(k); d == c {
			parts = append(parts, fmt.Sprintf("%s (%s)", k, tenPowers(why)))
		}
	}
	return strings.Join(parts, "; ")
}

func propertyText(c *freeconv.Correlation) string {
	return fmt.Sprintf("Ta + %.3g (Ts - Ta), expansion coefficient at Ta + %.3g (Ts - Ta)", c.FilmWeight, c.BetaWeight)
}

func scatter(c *freeconv.Correlation) string {
	if c.Scatter == 0 {
		return "none published"
	}
	return fmt.Sprintf("%.3g %%", 100*c.Scatter)
}
