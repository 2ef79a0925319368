package calcnote

import (
	"fmt"
	"math"

	"stillair/checks"
	"stillair/templates/pdf"
)

// layersWorked substitutes the conduction through the wall and layers of the
// face that carries the most heat.
func (n *note) layersWorked() {
	rows := busiest(n.load().Layers)
	if len(rows) == 0 {
		return
	}
	n.part(fmt.Sprintf("%s: wall and layers", capital(rows[0].At)), 34)
	n.runs(pdf.Run{Text: "The heat that reaches this face, "}, inline(`Q = \bar{k}\,S \left(T_1 - T_2\right)`), pdf.Run{Text: " for each layer:"})
	var cellRows []pdf.Row
	for _, l := range rows {
		cellRows = append(cellRows, layerRow(l, smallestStep(rows)))
	}
	n.table([]pdf.Column{
		{Head: "Layer, from the inside", Width: 50}, {Head: "t / mm", Width: 15, Align: pdf.AlignDecimal}, {Head: "S / m", Width: 20, Align: pdf.AlignDecimal},
		{Head: "k mean / W/(m·K)", Width: 22, Align: pdf.AlignDecimal}, {Head: "T₁ / K", Width: 22, Align: pdf.AlignDecimal},
		{Head: "T₂ / K", Width: 22, Align: pdf.AlignDecimal}, {Head: "Q / W", Width: 18, Align: pdf.AlignDecimal}}, cellRows)
}

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

func layerRow(l checks.LayerRow, step float64) pdf.Row {
	return cells(l.Material, plainDigits(1000*l.ThicknessM, 4), plainDigits(l.FactorM, 6), plainDigits(l.K, 5),
		kelvin(l.InnerK, step), kelvin(l.OuterK, step), plainDigits(l.W, 5))
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

// busiest picks the layers of the face that carries the most heat.
func busiest(rows []checks.LayerRow) []checks.LayerRow {
	at, most := "", -1.0
	for _, l := range rows {
		if w := math.Abs(l.W); w > most {
			at, most = l.At, w
		}
	}
	var list []checks.LayerRow
	for _, l := range rows {
		if l.At == at {
			list = append(list, l)
		}
	}
	return list
}
