package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/material"
	"stillair/templates/pdf"
)

// layersWorked substitutes the conduction through the wall and layers of every
// face.
func (n *note) layersWorked() {
	rows := n.load().Layers
	if len(rows) == 0 {
		return
	}
	n.part("Wall and layers of every face", 44)
	n.runs(pdf.Run{Text: "The heat that reaches a face from inside goes through each of its layers, from the inside outwards: "},
		inline(`Q_\mathrm{k} = \bar{k}\,S \left(T_1 - T_2\right)`), pdf.Run{Text: "."})
	solids := solidsOf(rows)
	n.conductivities(solids)
	n.table(layerColumns(), layerTable(rows, solids))
	n.small(unrounded)
}

func layerColumns() []pdf.Column {
	return []pdf.Column{
		{Head: "Face", Width: 22}, {Head: "Layer", Width: 11, Align: pdf.AlignCentre}, {Head: "Size", Width: 50}, {Head: "S / m", Width: 17, Align: pdf.AlignDecimal},
		{Head: "k mean / W/(m·K)", Width: 18, Align: pdf.AlignDecimal}, {Head: "T₁ / K", Width: 20, Align: pdf.AlignDecimal},
		{Head: "T₂ / K", Width: 20, Align: pdf.AlignDecimal}, {Head: "Q / W", Width: 15, Align: pdf.AlignDecimal}}
}

// layerTable names each face once, before the first of its layers.
func layerTable(rows []checks.LayerRow, solids []solid) []pdf.Row {
	var out []pdf.Row
	for i, l := range rows {
		face := l.At
		if i > 0 && rows[i-1].At == l.At {
			face = ""
		}
		number := slices.IndexFunc(solids, func(s solid) bool { return s.is(l) }) + 1
		out = append(out, layerRow(face, fmt.Sprintf("(%c)", 'a'+(number-1)%26), l, smallestStep(rows)))
	}
	return out
}

func layerRow(face, number string, l checks.LayerRow, step float64) pdf.Row {
	return cells(face, number, layerSize(l), plainDigits(l.FactorM, 6), plainDigits(l.K, 5), kelvin(l.InnerK, step), kelvin(l.OuterK, step), plainDigits(l.W, 5))
}

// layerSize is what the shape factor of a layer follows from.
func layerSize(l checks.LayerRow) string {
	var parts []string
	add := func(symbol string, v float64, unit string) {
		if v > 0 {
			parts = append(parts, fmt.Sprintf("%s\u00A0=\u00A0%s\u00A0%s", symbol, exact(v), unit))
		}
	}
	if l.AreaM2 > 0 {
		add("A", l.AreaM2, "m²")
		add("t", 1000*l.ThicknessM, "mm")
	}
	add("r₁", l.InnerM, "m")
	add("r₂", l.OuterM, "m")
	add("ℓ", l.LengthM, "m")
	return strings.Join(parts, ", ")
}

// solid is one material in one position.
type solid struct {
	place, name string
	k           float64
	mat         *material.Material
}

func (s solid) is(l checks.LayerRow) bool { return s.place == l.Place && s.name == l.Material }

// solidsOf lists the layers of a body once each.
func solidsOf(rows []checks.LayerRow) []solid {
	var list []solid
	for _, l := range rows {
		if !slices.ContainsFunc(list, func(s solid) bool { return s.is(l) }) {
			list = append(list, solid{l.Place, l.Material, l.K, l.Solid})
		}
	}
	return list
}

// conductivities prints the conductivity that each layer works with.
func (n *note) conductivities(solids []solid) {
	varies := false
	for i, s := range solids {
		text := fmt.Sprintf("(%c) %s: %s.", 'a'+i%26, strings.Join(nonEmpty(s.place, s.name), ", "), conductivity(s))
		n.d.Para(prose(text), smallStyle, n.left()+3, n.width()-3)
		n.d.Y += 0.4
		varies = varies || s.mat != nil && len(s.mat.Points) > 1
	}
	if varies {
		n.d.Y += 0.6
		n.small("Between the points k follows straight lines; the mean is the integral of k over the layer divided by its temperature difference. " +
			"Outside its points k keeps its end value, except that a table rising at its hot end is carried on with its last slope.")
	}
}

func conductivity(s solid) string {
	switch {
	case s.mat == nil:
		return fmt.Sprintf("k = %s W/(m·K) as typed", plainDigits(s.k, 5))
	case len(s.mat.Points) == 1:
		return fmt.Sprintf("k = %s W/(m·K) at every temperature (given at %s °C)", exact(s.mat.Points[0].K), pointCelsius(s.mat.Points[0].T))
	}
	var points []string
	for _, p := range s.mat.Points {
		points = append(points, fmt.Sprintf("%s at %s °C", exact(p.K), pointCelsius(p.T)))
	}
	return "k in W/(m·K): " + strings.Join(points, "; ")
}

func pointCelsius(k float64) string { return exact(math.Round(1000*(k-273.15)) / 1000) }

// smallestStep is the smallest temperature step over the layers, K; it sets
// the decimals of the table.
func smallestStep(rows []checks.LayerRow) float64 {
	least := 1.0
	for _, l := range rows {
		if step := math.Abs(l.InnerK - l.OuterK); step > 0 {
			least = math.Min(least, step)
		}
	}
	return least
}

// kelvin prints a temperature with enough decimals for a difference of four
// significant digits.
func kelvin(k, diff float64) string {
	decimals := 3
	if d := math.Abs(diff); d > 0 && d < 1 {
		decimals = min(9, 3-int(math.Floor(math.Log10(d))))
	}
	return fmt.Sprintf("%.*f", decimals, k)
}
