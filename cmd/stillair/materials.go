package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"stillair/checks/material"
)

func (a *app) materialsCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "materials [WORD...]",
		Short:             "List wall and insulation materials: conductivity over temperature",
		Example:           "  stillair materials\n  stillair materials stone wool\n  stillair materials rw_pipe_2",
		Long:              "Lists the materials a wall or layer can name. Words narrow the list; a single match is shown\nwith its conductivity at each temperature and its source.",
		ValidArgsFunction: oneOf(func() []string { return materialList().ids() }),
		RunE:              func(_ *cobra.Command, args []string) error { return a.show(materialList(), args) },
	}
}

func materialList() *listing {
	l := &listing{what: "material", heads: []string{"id", "class", "material", "W/(m·K)", "between °C", "confidence"}}
	for _, m := range material.All() {
		k, t := spans(m.Points)
		l.rows = append(l.rows, listRow{m.ID,
			[]string{m.ID, m.Class, m.Name, k, t, m.Confidence},
			[][2]string{{"id", m.ID}, {"class", m.Class}, {"material", m.Name}, {"conductivity", pointText(m.Points)},
				{"equation", m.Formula}, {"valid", m.ValidRange}, {"density", positive(m.Rho, "kg/m³")},
				{"specific heat", positive(m.C, "J/(kg·K)")}, {"source", m.Source}, {"verified by", m.VerifiedBy},
				{"confidence", m.Confidence}, {"notes", m.Notes}}})
	}
	return l
}

// spans gives the range of conductivity and of temperature in °C.
func spans(points []material.Point) (k, t string) {
	if len(points) == 0 {
		return "", ""
	}
	low, high := points[0].K, points[0].K
	for _, p := range points {
		low, high = min(low, p.K), max(high, p.K)
	}
	return span(low, high), span(celsius(points[0].T), celsius(points[len(points)-1].T))
}

func celsius(T float64) float64 { return T - material.Celsius0 }

func pointText(points []material.Point) string {
	var parts []string
	for _, p := range points {
		parts = append(parts, fmt.Sprintf("%.4g W/(m·K) at %.4g °C", p.K, celsius(p.T)))
	}
	return strings.Join(parts, ", ")
}

// positive shows a number with its unit, or nothing when there is none.
func positive(v float64, unit string) string {
	if v <= 0 {
		return ""
	}
	return fmt.Sprintf("%.5g %s", v, unit)
}
