package calcnote

import (
	"slices"
	"strings"

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
	written := n.written()
	has := func(symbol string) bool { return strings.Contains(written, symbol) }
	dew := n.loadsWith(func(c caseOf) bool { return c.Surroundings.Humidity.Set }) != ""
	groups := []struct {
		used bool
		list []entry
	}{
		{true, []entry{{`A`, "area of a face or of a layer", "m²"}, {`A/P`, "area over perimeter of a face", "m"}, {`c_p`, "specific heat of air", "J/(kg·K)"}}},
		{b.Axis == "vertical" && round, []entry{{`D`, "diameter", "m"}}},
		{b.Kind == "box", []entry{{`f`, "factor of the upper zone", "1"}}},
		{true, []entry{{`g`, "free fall; on an inclined plate its component", "m/s²"}}},
		{sun, []entry{{`G`, "irradiance of the sun", "W/m²"}}},
		{has("Gr"), []entry{{`Gr`, "Grashof number, Ra/Pr", "1"}}},
		{true, []entry{{`h`, "film coefficient", "W/(m²·K)"}}},
		{high, []entry{{`H, z`, "geopotential, geometric altitude", "m"}}},
		{true, []entry{{`k`, "conductivity of air", "W/(m·K)"}}},
		{layers, []entry{{`\bar{k}`, "mean conductivity of a layer", "W/(m·K)"}}},
		{true, []entry{{`L`, "characteristic length of a face", "m"}}},
		{layers && round && b.Kind != "sphere", []entry{{`\ell`, "length of a cylindrical layer", "m"}}},
		{true, []entry{{`Nu`, "Nusselt number, h L/k", "1"}}},
		{has("{Nu}_{l}"), []entry{{`Nu_l, Nu_t`, "its laminar, its turbulent part", "1"}}},
		{has("{Nu}_{T}"), []entry{{`Nu_T`, "its value for a thin boundary layer", "1"}}},
		{true, []entry{{`p`, "pressure of the air", "Pa"}, {`Pr`, "Prandtl number", "1"},
			{`Q_\mathrm{c}, Q_\mathrm{r}`, "heat by convection, by radiation", "W"},
			{`Q_\mathrm{in}, Q_\mathrm{out}`, "heat that comes in, that leaves", "W"}}},
		{sun, []entry{{`Q_\mathrm{s}`, "heat taken in from the sun", "W"}}},
		{layers, []entry{{`Q_\mathrm{k}`, "heat by conduction", "W"}}},
		{layers && round, []entry{{`r_1, r_2`, "inner, outer radius of a layer", "m"}}},
		{true, []entry{{`Ra`, "Rayleigh number", "1"}}},
		{layers, []entry{{`S`, "shape factor of a layer", "m"}}},
		{layers && b.Kind != "pipe" && b.Kind != "sphere", []entry{{`t`, "thickness of a layer", "m"}}},
		{dew, []entry{{`t_\mathrm{a}, t_\mathrm{d}`, "air temperature, dew point", "°C"}}},
		{true, []entry{{`T`, "property temperature", "K"}, {`T_\mathrm{a}`, airMeaning(b), "K"},
			{`T_\mathrm{r}`, "radiant temperature seen by a face", "K"}, {`T_\mathrm{s}`, "temperature of a face", "K"}}},
		{layers, []entry{{`T_1, T_2`, "inner, outer side of a layer", "K"}}},
		{high, []entry{{`T_H`, "standard temperature at that altitude", "K"}}},
		{b.Kind == "box", []entry{{`T_\mathrm{inside}`, "mean of the inside air", "K"}, {`T_\mathrm{upper}`, "upper zone of the inside air", "K"}}},
		{true, []entry{{`T_\beta`, "temperature where β is taken", "K"}, {`U`, "uncertainty of a temperature", "K"},
			{`U_{+}, U_{-}`, "U upwards, downwards", "K"}}},
		{len(n.limits()) > 0, []entry{{`w`, "guard band, equal to U", "K"}}},
		{true, []entry{{`\alpha`, "thermal diffusivity of air", "m²/s"}}},
		{sun, []entry{{`\alpha_\mathrm{s}`, "solar absorptance", "1"}}},
		{true, []entry{{`\beta`, "expansion coefficient of air", "1/K"}, {`\Delta`, "change of a temperature by a shift", "K"}}},
		{dew, []entry{{`\gamma`, "auxiliary value of the dew point", "1"}}},
		{true, []entry{{`\Delta T`, "temperature of a face less that of the air", "K"}, {`\varepsilon`, emissivityMeaning(b), "1"}}},
		{tilted, []entry{{`\theta`, "tilt from the vertical", "°"}}},
		{true, []entry{
			{`\mu`, "dynamic viscosity of air", "Pa·s"}, {`\nu`, "kinematic viscosity of air", "m²/s"}, {`\rho`, "density of air", "kg/m³"},
			{`\sigma`, "Stefan-Boltzmann constant", "W/(m²·K⁴)"}}},
		{dew, []entry{{`\varphi`, "relative humidity", "1"}}},
	}
	var list []entry
	for _, g := range groups {
		if g.used {
			list = append(list, g.list...)
		}
	}
	return list
}

// written is all that the note prints from records of correlations and films.
func (n *note) written() string {
	var b strings.Builder
	films := n.secondFilmsOfAll()
	for _, l := range n.o.Loads {
		films = append(films, l.Films...)
	}
	for _, u := range used(films) {
		b.WriteString(quantities(u.method.Equation) + u.method.Note + "\n")
	}
	for _, f := range films {
		b.WriteString(strings.Join(f.Notes, "\n"))
	}
	return b.String()
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
