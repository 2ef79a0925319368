package calcnote

import (
	"slices"

	"stillair/checks/casefile"
	"stillair/templates/pdf"
)

// entry is one line of the list of symbols.
type entry struct{ symbol, meaning, unit string }

// symbols lists every symbol of the note with its meaning and unit, two
// entries to a row.
func (n *note) symbols() {
	n.part("Symbols", 24)
	list := n.symbolList()
	half := (len(list) + 1) / 2
	var rows []pdf.Row
	for i := range half {
		row := symbolCells(list[i])
		if i+half < len(list) {
			row = append(row, symbolCells(list[i+half])...)
		}
		rows = append(rows, pdf.Row{Cells: row})
	}
	n.table([]pdf.Column{
		{Head: "Symbol", Width: 13}, {Head: "Meaning", Width: 54}, {Head: "Unit", Width: 18},
		{Head: "Symbol", Width: 13}, {Head: "Meaning", Width: 54}, {Head: "Unit", Width: 18}}, rows)
}

func symbolCells(e entry) []pdf.Cell {
	return []pdf.Cell{mathCell(e.symbol), pdf.C(e.meaning), pdf.C(e.unit)}
}

// symbolList are the symbols this note uses, Latin before Greek.
func (n *note) symbolList() []entry {
	b := n.o.Loads[0].Case.Body
	layers := b.Wall != nil || len(b.Layers) > 0
	round := b.Kind != "plate" && b.Kind != "box"
	sun := n.loadsWith(hasSun) != ""
	high := slices.ContainsFunc(n.altitudes(), func(z float64) bool { return z != 0 })
	tilted := b.Kind == "plate" && n.loadsWith(func(c caseOf) bool { return c.Body.Tilt.SI != 0 }) != ""
	groups := []struct {
		used bool
		list []entry
	}{
		{true, []entry{{`A`, "area of a face or of a layer", "m²"}, {`A/P`, "area over perimeter of a face", "m"}, {`c_p`, "specific heat of air", "J/(kg·K)"}}},
		{b.Axis == "vertical" && round, []entry{{`D`, "diameter", "m"}}},
		{b.Kind == "box", []entry{{`f`, "factor of the upper zone", "1"}}},
		{true, []entry{{`g`, "acceleration of free fall", "m/s²"}}},
		{sun, []entry{{`G`, "irradiance of the sun", "W/m²"}}},
		{true, []entry{{`Gr`, "Grashof number, Ra/Pr", "1"}, {`h`, "film coefficient", "W/(m²·K)"}}},
		{high, []entry{{`H, z`, "geopotential, geometric altitude", "m"}}},
		{true, []entry{{`k`, "conductivity of air", "W/(m·K)"}}},
		{layers, []entry{{`\bar{k}`, "mean conductivity of a layer", "W/(m·K)"}}},
		{true, []entry{{`L`, "characteristic length of a face", "m"}}},
		{layers && round && b.Kind != "sphere", []entry{{`\ell`, "length of a cylindrical layer", "m"}}},
		{true, []entry{{`Nu`, "Nusselt number, h L/k", "1"}, {`p`, "pressure of the air", "Pa"}, {`Pr`, "Prandtl number", "1"},
			{`Q_\mathrm{c}, Q_\mathrm{r}`, "heat by convection, by radiation", "W"}}},
		{sun, []entry{{`Q_\mathrm{s}`, "heat taken in from the sun", "W"}}},
		{layers, []entry{{`Q_\mathrm{k}`, "heat by conduction", "W"}}},
		{layers && round, []entry{{`r_1, r_2`, "inner, outer radius of a layer", "m"}}},
		{true, []entry{{`Ra`, "Rayleigh number", "1"}}},
		{layers, []entry{{`S`, "shape factor of a layer", "m"}}},
		{layers && b.Kind != "pipe" && b.Kind != "sphere", []entry{{`t`, "thickness of a layer", "m"}}},
		{true, []entry{{`T`, "property temperature", "K"}, {`T_\mathrm{a}`, airMeaning(b), "K"},
			{`T_\mathrm{r}`, "radiant temperature seen by a face", "K"}, {`T_\mathrm{s}`, "temperature of a face", "K"}}},
		{layers, []entry{{`T_1, T_2`, "inner, outer side of a layer", "K"}}},
		{high, []entry{{`T_H`, "standard temperature at that altitude", "K"}}},
		{true, []entry{{`T_\beta`, "temperature where β is taken", "K"}, {`U`, "uncertainty of a temperature", "K"}, {`\alpha`, "thermal diffusivity of air", "m²/s"}}},
		{sun, []entry{{`\alpha_\mathrm{s}`, "solar absorptance", "1"}}},
		{true, []entry{{`\beta`, "expansion coefficient of air", "1/K"}, {`\Delta`, "change of a temperature", "K"}, {`\varepsilon`, emissivityMeaning(b), "1"}}},
		{tilted, []entry{{`\theta`, "tilt from the vertical", "°"}}},
		{true, []entry{
			{`\mu`, "dynamic viscosity of air", "Pa·s"}, {`\nu`, "kinematic viscosity of air", "m²/s"}, {`\rho`, "density of air", "kg/m³"},
			{`\sigma`, "Stefan-Boltzmann constant", "W/(m²·K⁴)"}}},
	}
	var list []entry
	for _, g := range groups {
		if g.used {
			list = append(list, g.list...)
		}
	}
	return list
}

func airMeaning(b casefile.Body) string {
	if b.Kind == "box" {
		return "air; in inside films: inside air"
	}
	return "air away from the body"
}

func emissivityMeaning(b casefile.Body) string {
	if b.Kind == "box" {
		return "emissivity; inside: effective"
	}
	return "emissivity"
}
