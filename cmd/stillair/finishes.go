package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"stillair/radiation"
)

func (a *app) finishesCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "finishes [WORD...]",
		Short:             "List surface finishes: emissivity and solar absorptance",
		Example:           "  stillair finishes\n  stillair finishes grey paint\n  stillair finishes paint_lgrey",
		Long:              "Lists the surface finishes a case can name, with the range of their emissivity. Words narrow\nthe list; a single match is shown with its source.",
		ValidArgsFunction: oneOf(func() []string { return finishList().ids() }),
		RunE:              func(_ *cobra.Command, args []string) error { return a.show(finishList(), args) },
	}
}

func finishList() *listing {
	l := &listing{what: "finish", heads: []string{"id", "group", "finish", "emissivity", "typical", "absorptance", "confidence"},
		foot: "Emissivity is infrared; absorptance is of sunlight, blank where none is published."}
	for _, f := range radiation.Finishes() {
		sun := ""
		if f.HasAbsorb {
			sun = span(f.AbsorbLow, f.AbsorbHigh)
		}
		l.rows = append(l.rows, listRow{f.ID,
			[]string{f.ID, f.Group, f.Name, span(f.Low, f.High), fmt.Sprintf("%.2f", f.Typical), sun, f.Confidence},
			[][2]string{{"id", f.ID}, {"group", f.Group}, {"finish", f.Name},
				{"emissivity", span(f.Low, f.High) + fmt.Sprintf(", typical %.2f", f.Typical)}, {"band", f.Band},
				{"measured at, °C", f.TempC}, {"solar absorptance", sun}, {"source", f.Source},
				{"verified by", f.VerifiedBy}, {"confidence", f.Confidence}, {"notes", f.Notes}}})
	}
	return l
}
