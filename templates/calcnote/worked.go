package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
	"stillair/freeconv"
	"stillair/templates/pdf"
)

type caseOf = casefile.Case

// sigma is the Stefan-Boltzmann constant as the worked surfaces print it.
const sigmaText = `5.670374 \times 10^{-8}`

// Rounding is the promise of the worked surfaces: what a reader gets by redoing
// a line from its printed numbers agrees with the printed result this well.
const Rounding = 0.001

// worked substitutes numbers into the equations, one surface per kind of film.
func (n *note) worked() {
	n.sectionRoom("Worked surfaces", 100)
	l := n.load()
	if l.Status != checks.Converged || len(l.Films) == 0 {
		n.text("Not computed: the governing load case has no valid result.")
		return
	}
	n.textf("Load case “%s”, one surface for each kind of film, the one with the most convective heat. Temperatures are those of the converged solution. "+
		"The program carries all digits and rounds once, for print; a line redone from its printed numbers agrees with its printed result within 0.1 %%. Units are SI.", l.Name)
	shown := map[int]bool{}
	for _, i := range representative(l.Films) {
		shown[i] = true
		n.surface(l.Films[i])
	}
	n.layersWorked()
	n.wholeBody()
	n.otherFilms(shown)
}

// representative picks, for every side, situation and method, the film with the
// most convective heat.
func representative(films []checks.FilmRow) []int {
	type group struct{ side, kind, method string }
	best := map[group]int{}
	var order []group
	for i, f := range films {
		g := group{f.Side, string(f.Film.Kind), f.MethodID}
		j, seen := best[g]
		if !seen {
			order = append(order, g)
		}
		if f.Film.Method != nil && (!seen || math.Abs(f.W) > math.Abs(films[j].W)) {
			best[g] = i
		}
	}
	var list []int
	for _, g := range order {
		if i, ok := best[g]; ok {
			list = append(list, i)
		}
	}
	return list
}

// surface is one film with numbers for every symbol.
func (n *note) surface(f checks.FilmRow) {
	v := f.Film
	if v.Method == nil {
		return
	}
	lines := n.surfaceLines(f)
	columns, rows := n.givens(f)
	n.part(fmt.Sprintf("%s, %s: %s", capital(f.At), f.Side, v.Kind), n.surfaceRoom(columns, rows, lines))
	n.d.Y += 0.5
	n.cited(fmt.Sprintf("%s; %s; %s.", f.Method, strings.ReplaceAll(f.Length, " ", "\u00A0"), v.Regime), v.Method.Citation)
	n.tableIn(n.left()+6, n.width()-6, columns, rows)
	for _, line := range lines {
		n.display(line, "")
	}
	n.closing(f)
	for _, s := range f.Notes {
		n.d.Para(prose("Remark: "+s), smallStyle, n.left()+6, measure-6)
		n.d.Y += 0.6
	}
	if !f.InRange {
		n.d.Para(prose("Outside the range of the source: "+f.Range), smallStyle.With(pdf.Bold), n.left()+6, measure-6)
	}
}

// surfaceRoom is the room for the head of a surface: its table and the first
// two lines.
func (n *note) surfaceRoom(columns []pdf.Column, rows []pdf.Row, lines []string) float64 {
	h := 8 + n.d.TableHeight(styled(n.left()+6, n.width()-6, columns, rows))
	for _, line := range lines[:min(2, len(lines))] {
		h += n.lineHeight(line)
	}
	return h
}

// surfaceLines are the equations of a surface with numbers in them, in the
// order a reader redoes them.
func (n *note) surfaceLines(f checks.FilmRow) []string {
	v := f.Film
	lines := append([]string{rayleighLine(v)}, nusseltLines(v)...)
	lines = append(lines,
		fmt.Sprintf(`h = \frac{Nu\,k}{L} = \frac{%s \times %s}{%s} = %s\ \mathrm{W/(m²·K)}`,
			digits(v.Nu, 5), digits(v.Props.K, 5), digits(v.Length, 5), digits(v.H, 5)),
		convectionLine(f))
	if f.Side == "inside" {
		return append(lines, n.insideLines(f)...)
	}
	return append(lines, n.outsideLines(f)...)
}

// given is one symbol with its value.
type given struct{ symbol, value, unit string }

// givens is the table of what goes into the formulas.
func (n *note) givens(f checks.FilmRow) ([]pdf.Column, []pdf.Row) {
	v, p := f.Film, f.Film.Props
	both := func(k float64) string { return "K (" + n.temp(k) + ")" }
	groups := [][]given{{
		{`T_\mathrm{s}`, kelvin(v.Ts, 1), both(v.Ts)},
		{`T_\mathrm{a}`, kelvin(v.Ta, 1), both(v.Ta)},
		{`T_\mathrm{r}`, kelvin(f.RadiantK, 1), both(f.RadiantK)},
		{`\Delta T`, plainDigits(v.DT, 5), "K"},
		{`T`, kelvin(v.TProps, 1), "K"},
	}, {
		{`T_\beta`, kelvin(v.TBeta, 1), "K"},
		{`\beta`, plainDigits(1/v.TBeta, 5), "1/K"},
		{`L`, plainDigits(v.Length, 5), "m"},
		{`A`, plainDigits(f.AreaM2, 5), "m²"},
		{`g`, plainDigits(v.Gravity, 6), "m/s²"},
	}, {
		{`p`, plainDigits(p.P/1000, 6), "kPa"},
		{`\rho`, plainDigits(p.Rho, 5), "kg/m³"},
		{`c_p`, plainDigits(p.Cp, 6), "J/(kg·K)"},
		{`\mu`, plainDigits(p.Mu, 5), "Pa·s"},
		{`k`, plainDigits(p.K, 5), "W/(m·K)"},
	}, {
		{`\nu`, plainDigits(p.Nu, 5), "m²/s"},
		{`\alpha`, plainDigits(p.Alpha, 5), "m²/s"},
		{`Pr`, plainDigits(p.Pr, 5), ""},
		{`\varepsilon`, exact(f.Emissivity), ""},
	}}
	if f.SunWm2 != 0 {
		groups[2] = append(groups[2], given{`G`, exact(f.SunWm2), "W/m²"})
		groups[3] = append(groups[3], given{`\alpha_\mathrm{s}`, exact(f.Absorptance), ""})
	}
	return givenColumns(), givenRows(groups)
}

func givenColumns() []pdf.Column {
	var list []pdf.Column
	for _, width := range []float64{31, 24, 26, 26} {
		list = append(list, pdf.Column{Width: 9}, pdf.Column{Width: width})
	}
	return list
}

// givenRows puts the groups side by side.
func givenRows(groups [][]given) []pdf.Row {
	longest := 0
	for _, g := range groups {
		longest = max(longest, len(g))
	}
	rows := make([]pdf.Row, longest)
	for i := range rows {
		for _, g := range groups {
			if i < len(g) {
				rows[i].Cells = append(rows[i].Cells, mathCell(g[i].symbol), pdf.C(strings.TrimSpace(g[i].value+"\u00A0"+strings.ReplaceAll(g[i].unit, " ", "\u00A0"))))
			} else {
				rows[i].Cells = append(rows[i].Cells, pdf.C(""), pdf.C(""))
			}
		}
	}
	return rows
}

func rayleighLine(v freeconv.Film) string {
	return fmt.Sprintf(`Ra = \frac{g\,\beta \left|\Delta T\right| L^3}{\nu\,\alpha} = \frac{%s \times %s \times %s \times %s^3}{%s \times %s} = %s`,
		digits(v.Gravity, 6), digits(1/v.TBeta, 5), digits(math.Abs(v.DT), 5), digits(v.Length, 5),
		digits(v.Props.Nu, 5), digits(v.Props.Alpha, 5), digits(v.Ra, 5))
}

// nusseltLines is the correlation with its numbers, as its record writes it,
// side equations first.
func nusseltLines(v freeconv.Film) []string {
	result := ` = ` + digits(v.Nu, 5)
	if v.Method.Substitute == nil {
		return []string{`Nu` + result}
	}
	src := strings.ReplaceAll(quantities(v.Method.Substitute(v.In)), `\cdot`, `\times`)
	lines := strings.Split(src, "\n")
	slices.Reverse(lines)
	lines[len(lines)-1] += result
	return lines
}

func convectionLine(f checks.FilmRow) string {
	v := f.Film
	diff, dt := `T_\mathrm{s} - T_\mathrm{a}`, v.DT
	if f.Side == "inside" {
		diff, dt = `T_\mathrm{a} - T_\mathrm{s}`, -v.DT
	}
	return fmt.Sprintf(`Q_\mathrm{c} = h\,A \left(%s\right) = %s \times %s \times %s = %s\ \mathrm{W}`,
		diff, digits(v.H, 5), digits(f.AreaM2, 5), signed(dt), digits(f.W, 5))
}

// exact writes a typed number of at most six significant digits without
// padding: 0.9, 1.5·10⁶.
func exact(x float64) string {
	s, exponent, found := strings.Cut(strconv.FormatFloat(x, 'g', 6, 64), "e")
	exp, err := strconv.Atoi(exponent)
	if !found || err != nil {
		return minus(s)
	}
	if !strings.Contains(s, ".") {
		s += ".0"
	}
	return minus(s) + "·10" + superscript(strconv.Itoa(exp))
}

// exactTeX is exact for formulas.
func exactTeX(x float64) string {
	if s := strconv.FormatFloat(x, 'g', 6, 64); !strings.Contains(s, "e") {
		return s
	}
	return digits(x, 6)
}

// signed puts a negative number in brackets, so that it can follow an operator.
func signed(x float64) string {
	if x < 0 {
		return `\left(` + digits(x, 5) + `\right)`
	}
	return digits(x, 5)
}

// outsideLines are radiation, sun and their sum with the convection.
func (n *note) outsideLines(f checks.FilmRow) []string {
	lines := []string{radiationLine(f.Emissivity, f.AreaM2, f.Film.Ts, f.RadiantK, f.RadiationW, `T_\mathrm{s}^4 - T_\mathrm{r}^4`)}
	if f.SunWm2 == 0 {
		return append(lines, sumLine([]string{`Q_\mathrm{c}`, `Q_\mathrm{r}`}, f.W, f.RadiationW))
	}
	return append(lines,
		fmt.Sprintf(`Q_\mathrm{s} = \alpha_\mathrm{s}\,G\,A = %s \times %s \times %s = %s\ \mathrm{W}`,
			exactTeX(f.Absorptance), exactTeX(f.SunWm2), digits(f.AreaM2, 5), digits(f.SunW, 5)),
		sumLine([]string{`Q_\mathrm{c}`, `Q_\mathrm{r}`, `Q_\mathrm{s}`}, f.W, f.RadiationW, -f.SunW))
}

// insideLines are the radiation to the wall and its sum with the convection.
func (n *note) insideLines(f checks.FilmRow) []string {
	return []string{
		radiationLine(f.Emissivity, f.AreaM2, f.RadiantK, f.Film.Ts, f.RadiationW, `T_\mathrm{r}^4 - T_\mathrm{s}^4`),
		sumLine([]string{`Q_\mathrm{c}`, `Q_\mathrm{r}`}, f.W, f.RadiationW),
	}
}

// sumLine adds up heats in W, the third one with a minus sign. The terms carry
// one decimal more than the sum, so that they add up to it as printed.
func sumLine(symbols []string, terms ...float64) string {
	largest, total := 0.0, 0.0
	for _, t := range terms {
		largest, total = math.Max(largest, math.Abs(t)), total+t
	}
	decimals := 4
	if largest > 0 {
		decimals = min(15, max(1, 5-int(math.Floor(math.Log10(largest)))))
	}
	left, right := symbols[0], fmt.Sprintf("%.*f", decimals, terms[0])
	for i, t := range terms[1:] {
		sign := " + "
		if i == 1 {
			sign, t = " - ", -t
		}
		number := fmt.Sprintf("%.*f", decimals, t)
		if t < 0 {
			number = `\left(` + number + `\right)`
		}
		left, right = left+sign+symbols[i+1], right+sign+number
	}
	return fmt.Sprintf(`%s = %s = %.*f\ \mathrm{W}`, left, right, decimals-1, total)
}

// closing compares what leaves the face with what reaches it from the body.
func (n *note) closing(f checks.FilmRow) {
	if f.Side == "inside" {
		n.text("The inside air stands for the equipment; this heat goes on through the wall.")
		return
	}
	in, out := 0.0, 0.0
	found := false
	for _, h := range n.load().Heat {
		switch {
		case h.Final && h.From == f.At:
			out += h.W
		case h.By == "sun" && h.To == f.At:
			out -= h.W
		case h.To == f.At:
			in, found = in+h.W, true
		}
	}
	if found {
		n.textf("From inside the body %s\u00A0W reach this face: the balance closes %s.", plainDigits(in, 5), within(in-out, in))
	}
}

// within tells how well a balance closes. What is below the digits that a
// number in the machine carries is no heat.
func within(left, carried float64) string {
	if math.Abs(left) <= 1e-14*math.Abs(carried) {
		return "to the last digit carried"
	}
	return "within " + plainDigits(math.Abs(left), 1) + unit.NoBreak + "W"
}

// wholeBody adds up all faces: what leaves must be what the body gets.
func (n *note) wholeBody() {
	l := n.load()
	n.part("All faces together", 13)
	n.display(wholeLine(l), "")
	if l.Case.Heat.Set {
		n.textf("The heat to shed is %s; every heat balance of the body closes %s.", n.watts(l.Case.Heat.SI, l.Case.Heat.SI), within(l.ClosureW, l.HeatW))
	}
}

// wholeLine is the sum over all faces.
func wholeLine(l *checks.LoadOutcome) string {
	sum := map[string]float64{}
	for _, h := range l.Heat {
		if h.Final || h.By == "sun" {
			sum[h.By] += h.W
		}
	}
	symbols, terms := []string{`\sum Q_\mathrm{c}`, `\sum Q_\mathrm{r}`}, []float64{sum["convection"], sum["radiation"]}
	if sum["sun"] != 0 {
		symbols, terms = append(symbols, `\sum Q_\mathrm{s}`), append(terms, -sum["sun"])
	}
	return sumLine(symbols, terms...)
}

func radiationLine(eps, area, t1, t2, w float64, powers string) string {
	return fmt.Sprintf(`Q_\mathrm{r} = \varepsilon\,\sigma\,A \left(%s\right) = %s \times %s \times %s \times \left(%.3f^4 - %.3f^4\right) = %s\ \mathrm{W}`,
		powers, exactTeX(eps), sigmaText, digits(area, 5), t1, t2, digits(w, 5))
}

// otherFilms is the table of the films that were not worked out above.
func (n *note) otherFilms(shown map[int]bool) {
	films := n.load().Films
	if len(films) == len(shown) {
		return
	}
	n.part("All films of this load case", 24)
	most := 0.0
	for _, f := range films {
		most = math.Max(most, math.Max(math.Abs(f.W), math.Abs(f.RadiationW)))
	}
	most = math.Max(most/100, math.Min(most, 0.001)) // one digit more than in the results
	var rows []pdf.Row
	for _, f := range films {
		rows = append(rows, cells(placeOf(f), string(f.Film.Kind), plainDigits(f.LengthM, 4), fmt.Sprintf("%.2f", f.FilmK), plainDigits(f.Ra, 4)+outOfRange(f), plainDigits(f.Nu, 4),
			fmt.Sprintf("%.3f", f.H), plainDigits(f.AreaM2, 4), n.bareWatts(f.W, most), n.bareWatts(f.RadiationW, most)))
	}
	n.table([]pdf.Column{
		{Head: "Film", Width: 29}, {Head: "Situation", Width: 49}, {Head: "L / m", Width: 18, Align: pdf.AlignDecimal}, {Head: "T / K", Width: 16, Align: pdf.AlignDecimal},
		{Head: "Ra", Width: 23}, {Head: "Nu", Width: 14, Align: pdf.AlignDecimal}, {Head: "h / W/(m²·K)", Width: 25, Align: pdf.AlignDecimal},
		{Head: "A / m²", Width: 16, Align: pdf.AlignDecimal}, {Head: "Conv. / W", Width: 16, Align: pdf.AlignDecimal}, {Head: "Rad. / W", Width: 16, Align: pdf.AlignDecimal}}, rows)
	if anyOutside(films) {
		n.small(starLegend)
	}
	n.small(unrounded)
}

// outOfRange marks a film outside the range of its source; starLegend says so.
func outOfRange(f checks.FilmRow) string {
	if f.InRange {
		return ""
	}
	return " *"
}

const starLegend = "* outside the range of the source of its correlation"

func inRange(f checks.FilmRow) string {
	if f.InRange {
		return "yes"
	}
	return "no"
}
